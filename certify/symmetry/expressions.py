"""Expressions in whole numbers, in which identities between counts are written."""

from __future__ import annotations

import ast
import re
from collections.abc import Callable, Mapping
from math import comb, gcd
from types import CodeType, MappingProxyType

from certify.errors import BadInput
from certify.symmetry.counting import bracelets, lyndon_words, necklaces, witt_rank

__all__ = ["FORMULAS", "values_of"]

_MOST_CHARACTERS = 1000
_LARGEST_ARGUMENT = 1000
_MOST_BITS = 14_000
_PLACES = {"d": "divisors", "k": "range"}
_OPERATIONS = (ast.Add, ast.Sub, ast.Mult, ast.FloorDiv, ast.Pow)


def _totient(n: int) -> int:
    from sympy import totient

    return int(totient(_positive(n)))


def _mobius(n: int) -> int:
    from sympy.functions.combinatorial.numbers import mobius

    return int(mobius(_positive(n)))


def _divisors(n: int) -> list[int]:
    from sympy import divisors

    return [int(d) for d in divisors(_positive(n))]


def _positive(n: int) -> int:
    if n < 1:
        raise ValueError(f"{n} where a number from 1 on is needed")
    return n


FORMULAS: Mapping[str, Callable[..., int]] = MappingProxyType(
    {
        "binomial": comb,
        "bracelets": bracelets,
        "gcd": gcd,
        "lyndon": lyndon_words,
        "mobius": _mobius,
        "necklaces": necklaces,
        "totient": _totient,
        "witt": lambda *content: witt_rank(content),
    }
)
"""What an expression may call, with whole numbers from 0 to 1000."""


def values_of(text: str, first: int, last: int) -> list[int]:
    """Return the values of an expression in n, for n from `first` to `last`.

    Parameters
    ----------
    text : str
        Whole numbers, ``n``, ``+ - * // **``, the formulas of `FORMULAS`, and sums like
        ``sum(lyndon(d, 2) for d in divisors(n))`` and ``sum(... for k in range(0, n))``.
    first, last : int

    Raises
    ------
    BadInput
        If there is something else in it, or it cannot be evaluated.

    Examples
    --------
    >>> values_of("sum(lyndon(d, 2) for d in divisors(n))", 1, 6)
    [2, 3, 4, 6, 8, 14]
    """
    code = _compiled(text)
    known: dict[str, object] = {name: _checked(function) for name, function in FORMULAS.items()}
    known |= {
        "divisors": _checked(_divisors),
        "range": _checked(range),
        "sum": sum,
        "power": _power,
        "__builtins__": {},
    }
    values = []
    for n in range(first, last + 1):
        try:
            # The tree has been checked: it calls nothing but these.
            values.append(int(eval(code, known | {"n": n})))
        except (NameError, TypeError, ValueError, ArithmeticError) as error:
            raise _fault(f"{error} for n = {n}") from error
    return values


def _compiled(text: str) -> CodeType:
    """Return an expression ready to be evaluated, after a look at each part of it."""
    if len(text) > _MOST_CHARACTERS:
        raise _fault(f"one of {len(text)} characters")
    if not re.fullmatch("[0-9a-z+*/(), -]+", text) or re.search("[0-9][a-z]|[a-z][0-9]", text):
        raise _fault(repr(text))
    try:
        tree = ast.parse(text, mode="eval")
    except (SyntaxError, ValueError, RecursionError) as error:
        raise _fault(repr(text)) from error
    try:
        for node in ast.walk(tree):
            if not _is_known(node):
                raise _fault(f"{ast.unparse(node) if isinstance(node, ast.expr) else type(node).__name__!r}")
        return compile(ast.fix_missing_locations(_Powers().visit(tree)), "expression", "eval")
    except RecursionError as error:
        raise _fault("one that is nested too deeply; sum(...) is one way to write many terms") from error


class _Powers(ast.NodeTransformer):
    """Turns powers into calls of a function that refuses those that would take for ever."""

    def visit_BinOp(self, node: ast.BinOp) -> ast.expr:
        """Return the call in the place of a power."""
        self.generic_visit(node)
        if isinstance(node.op, ast.Pow):
            return ast.Call(ast.Name("power", ast.Load()), [node.left, node.right], [])
        return node


def _power(base: int, exponent: int) -> int:
    if exponent < 0 or exponent * max(base.bit_length(), 1) > _MOST_BITS:
        raise ValueError(f"a power of more than {_MOST_BITS} bits, or a negative exponent")
    return int(base**exponent)


def _is_known(node: ast.AST) -> bool:
    match node:
        case ast.Constant(value):
            return type(value) is int
        case ast.Call(ast.Name("sum"), [ast.GeneratorExp(_, [ast.comprehension(ast.Name(name), over, [])])], []):
            return isinstance(over, ast.Call) and isinstance(over.func, ast.Name) and over.func.id == _PLACES.get(name)
        case ast.Call(ast.Name(name), arguments, []):
            return bool(arguments) and (name in FORMULAS or name in _PLACES.values())
        case ast.BinOp():
            return isinstance(node.op, _OPERATIONS)
        case ast.Expression() | ast.Name() | ast.GeneratorExp() | ast.comprehension() | ast.Load() | ast.Store():
            return True
        case _:
            return isinstance(node, _OPERATIONS)


def _checked(function: Callable[..., object]) -> Callable[..., object]:
    """Return a function that refuses numbers that are too large, which would take for ever."""

    def checked(*arguments: int) -> object:
        if not all(0 <= argument <= _LARGEST_ARGUMENT for argument in arguments):
            raise ValueError(f"an argument beyond 0 to {_LARGEST_ARGUMENT}")
        return function(*arguments)

    return checked


def _fault(found: str) -> BadInput:
    formulas = ", ".join(FORMULAS)
    expected = f"whole numbers, n, + - * // **, sums over d in divisors(n) or k in range(a, b), and {formulas}"
    return BadInput(where="expression", expected=expected, found=found)
