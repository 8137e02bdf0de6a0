"""Expressions in whole numbers, in which identities between counts are written."""

from __future__ import annotations

import ast
import re
from collections.abc import Callable, Iterable, Mapping
from math import comb, gcd
from types import CodeType, MappingProxyType

from certify.errors import BadInput, LimitReached
from certify.symmetry.counting import bracelets, lyndon_words, necklaces, witt_rank

__all__ = ["FORMULAS", "values_of"]

_MOST_CHARACTERS = 1000
_LARGEST_ARGUMENT = 1000
_MOST_BITS = 14_000
_MOST_TERMS = 1_000_000
_PLACES = {"d": "divisors", "k": "range"}
_ARGUMENTS = {"binomial": 2, "bracelets": 2, "lyndon": 2, "mobius": 1, "necklaces": 2, "totient": 1} | {
    "divisors": 1,
    "range": 2,
}
_FROM_ONE = ("bracelets", "divisors", "lyndon", "mobius", "necklaces", "totient")
_OPERATIONS = (ast.Add, ast.Sub, ast.Mult, ast.FloorDiv, ast.Pow)


def _totient(n: int) -> int:
    from sympy import totient

    return int(totient(n))


def _mobius(n: int) -> int:
    from sympy.functions.combinatorial.numbers import mobius

    return int(mobius(n))


def _divisors(n: int) -> list[int]:
    from sympy import divisors

    return [int(d) for d in divisors(n)]


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
"""What an expression may call, with whole numbers from 0 to 1000 (the first one from 1 where that is needed)."""


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
        If there is something else in it, it cannot be evaluated, or a value has more than 14,000 bits.
    LimitReached
        If its sums have more than a million terms.

    Examples
    --------
    >>> values_of("sum(lyndon(d, 2) for d in divisors(n))", 1, 6)
    [2, 3, 4, 6, 8, 14]
    """
    code = _compiled(text)
    known: dict[str, object] = {name: _checked(name, function) for name, function in FORMULAS.items()}
    known |= {
        "divisors": _checked("divisors", _divisors),
        "range": _checked("range", range),
        "sum": _Sum(),
        "power": _power,
        "__builtins__": {},
    }
    values = []
    for n in range(first, last + 1):
        try:
            # The tree has been checked: it calls nothing but these.
            values.append(_short(int(eval(code, known | {"n": n}))))
        except ZeroDivisionError as error:
            raise _fault(f"a division by 0 for n = {n}") from error
        except ValueError as error:
            raise _fault(f"{error}, for n = {n}") from error
    return values


class _Sum:
    """Adds up, until there were too many terms in all sums of an expression."""

    def __init__(self) -> None:
        self._terms = 0

    def __call__(self, terms: Iterable[int]) -> int:
        """Return the sum."""
        total = 0
        for term in terms:
            self._terms += 1
            if self._terms > _MOST_TERMS:
                raise LimitReached(f"the sums of an expression have more than {_MOST_TERMS:,} terms")
            total += term
        return total


def _short(value: int) -> int:
    if value.bit_length() > _MOST_BITS:
        raise ValueError(f"a value of more than {_MOST_BITS} bits")
    return value


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
        _check(tree, ("n",))
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


def _check(node: ast.AST, names: tuple[str, ...]) -> None:
    """Refuse an expression with anything in it that is not known here."""
    match node:
        case ast.Expression(body):
            _check(body, names)
        case ast.Constant(value) if type(value) is int:
            pass
        case ast.Name(name):
            if name not in names:
                raise _fault(f"the name {name}")
        case ast.BinOp(left, operation, right) if isinstance(operation, _OPERATIONS):
            _check(left, names)
            _check(right, names)
        case ast.Call(ast.Name("sum"), [ast.GeneratorExp(term, [ast.comprehension(ast.Name(name), over, [], 0)])], []):
            if not isinstance(over, ast.Call) or ast.unparse(over.func) != _PLACES.get(name):
                raise _fault(f"a sum over {name} in {ast.unparse(over)}")
            _check_call(over, names)
            _check(term, (*names, name))
        case ast.Call(ast.Name(name)) if name in FORMULAS:
            _check_call(node, names)
        case ast.expr():
            raise _fault(repr(ast.unparse(node)))
        case _:
            raise _fault(type(node).__name__)


def _check_call(node: ast.Call, names: tuple[str, ...]) -> None:
    """Refuse a call with another number of arguments, or with other ones than expressions."""
    wanted = _ARGUMENTS.get(ast.unparse(node.func))
    if node.keywords or not node.args or wanted not in (None, len(node.args)):
        known = "at least one argument" if wanted is None else f"{wanted} argument{'s' * (wanted > 1)}"
        raise BadInput(where="expression", expected=f"{known} of {ast.unparse(node.func)}", found=ast.unparse(node))
    for argument in node.args:
        _check(argument, names)


def _checked(name: str, function: Callable[..., object]) -> Callable[..., object]:
    """Return a function that refuses numbers that are too large, which would take for ever, or too small."""

    def checked(*arguments: int) -> object:
        shown = f"{name}({', '.join(map(str, arguments))})"
        if not all(0 <= argument <= _LARGEST_ARGUMENT for argument in arguments):
            raise ValueError(f"{shown}, with an argument beyond 0 to {_LARGEST_ARGUMENT}")
        if (arguments[0] if name in _FROM_ONE else sum(arguments) if name == "witt" else 1) < 1:
            raise ValueError(f"{shown}, where a number from 1 on is needed")
        return function(*arguments)

    return checked


def _fault(found: str) -> BadInput:
    formulas = ", ".join(FORMULAS)
    expected = f"whole numbers, n, + - * // **, sums over d in divisors(n) or k in range(a, b), and {formulas}"
    return BadInput(where="expression", expected=expected, found=found)
