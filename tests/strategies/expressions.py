"""Expressions in counts, and pairs of them that have the same values."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from hypothesis import assume
from hypothesis import strategies as st

__all__ = ["ARITY", "BINDING", "SUMS", "D", "Expression", "N", "expressions", "identities", "number", "op"]


@dataclass(frozen=True)
class Expression:
    """A number, a variable, an operation, a function, or a sum over ``divisors`` or ``range``, which binds d or k."""

    head: str
    parts: tuple[Expression, ...] = ()

    def __str__(self) -> str:
        return self.spelled()

    def spelled(self, blank: str = " ") -> str:
        """Write the expression with as few parentheses as Python's precedence allows."""
        texts = [part.spelled(blank) for part in self.parts]
        if self.head in SUMS:
            term, *ends = texts
            return f"sum({term} for {SUMS[self.head]} in {self.head}({', '.join(ends)}))"
        if self.head not in BINDING:
            return f"{self.head}({', '.join(texts)})" if texts else self.head
        own, right_first = BINDING[self.head], self.head == "**"
        for place, part in enumerate(self.parts):
            inner = BINDING.get(part.head, 9)
            if inner < own or (inner == own and (place == 0) == right_first):
                texts[place] = f"({texts[place]})"
        return f"{blank}{self.head}{blank}".join(texts)

    def mentions(self, name: str) -> bool:
        return self.head == name or any(part.mentions(name) for part in self.parts)


SUMS = {"divisors": "d", "range": "k"}
BINDING = {"+": 1, "-": 1, "*": 2, "//": 2, "**": 3}


def op(left: Expression, head: str, right: Expression) -> Expression:
    return Expression(head, (left, right))


def number(value: int) -> Expression:
    return Expression(f"{value}") if value >= 0 else op(Expression("0"), "-", Expression(f"{-value}"))


ARITY = {"binomial": 2, "bracelets": 2, "gcd": 2, "lyndon": 2, "mobius": 1, "necklaces": 2, "totient": 1, "witt": 2}
"""The formulas, with the number of arguments that they get here."""

N, D = Expression("n"), Expression("d")
NUMBERS = st.integers(0, 12).map(number)


@st.composite
def expressions(draw: st.DrawFn, names: tuple[str, ...] = ("n",), depth: int = 3) -> Expression:
    """Draw an expression in these names, which need not have a value."""
    leaves = NUMBERS | st.sampled_from(names).map(Expression)
    if not depth:
        return draw(leaves)

    def inner(*more: str) -> Expression:
        return draw(expressions((*names, *more), depth - 1))

    match draw(st.sampled_from(("leaf", "operation", "function", "sum"))):
        case "leaf":
            return draw(leaves)
        case "operation":
            head = draw(st.sampled_from(sorted(BINDING)))
            right = draw(st.integers(0, 3).map(number)) if head == "**" else inner()
            return op(inner(), head, right)
        case "function":
            name = draw(st.sampled_from(sorted(ARITY)))
            count = draw(st.integers(1, 3)) if name in ("gcd", "witt") else ARITY[name]
            # Mostly small, since there is no value beyond 1000, nor often at 0.
            argument = leaves | leaves.map(lambda leaf: op(leaf, "+", number(1)))
            return Expression(name, tuple(inner() if draw(st.booleans()) else draw(argument) for _ in range(count)))
        case _:
            if draw(st.booleans()):
                return Expression("divisors", (inner("d"), op(draw(leaves), "+", number(draw(st.integers(0, 1))))))
            return Expression("range", (inner("k"), draw(NUMBERS), draw(leaves)))


def rewritten(expression: Expression, draw: st.DrawFn) -> Expression:
    """Return an expression with the same value wherever there is one: each part is changed, or not."""
    parts = tuple(rewritten(part, draw) for part in expression.parts)
    new = [Expression(expression.head, parts), *_rewritings(expression.head, parts)]
    return draw(st.sampled_from(new))


def _rewritings(head: str, parts: tuple[Expression, ...]) -> Iterator[Expression]:
    whole, seven = Expression(head, parts), number(7)
    yield op(op(whole, "+", seven), "-", seven)
    match head, parts:
        case ("+" | "*" | "gcd" | "witt", (a, b)):
            yield Expression(head, (b, a))
            if head == "*" and a.head in ("+", "-"):
                # Multiplication distributes.
                yield op(op(a.parts[0], "*", b), a.head, op(a.parts[1], "*", b))
            if head == "witt" and not b.mentions("d") and not a.mentions("d"):
                # Words by the least numbers: W(a, b) by Möbius inversion, with binomials for the multinomials.
                n = op(a, "+", b)
                term = op(Expression("mobius", (D,)), "*", Expression("binomial", (op(n, "//", D), op(a, "//", D))))
                yield op(Expression("divisors", (term, Expression("gcd", (a, b)))), "//", n)
        case ("-", (a, b)):
            # a - b = a + (0 - b)
            yield op(a, "+", op(number(0), "-", b))
        case ("**", (a, Expression("2", ()))):
            yield op(a, "*", a)
        case ("necklaces", (a, q)) if not q.mentions("d"):
            # Each necklace repeats a primitive one (Moreau), and Burnside's lemma for the rotations.
            yield Expression("divisors", (Expression("lyndon", (D, q)), a))
            term = op(Expression("totient", (D,)), "*", op(q, "**", op(a, "//", D)))
            if not a.mentions("d"):
                yield op(Expression("divisors", (term, a)), "//", a)
        case ("lyndon", (a, q)) if not q.mentions("d") and not a.mentions("d"):
            term = op(Expression("mobius", (D,)), "*", op(q, "**", op(a, "//", D)))
            yield op(Expression("divisors", (term, a)), "//", a)
        case ("totient", (a,)) if not a.mentions("d"):
            # Möbius inversion of n = Σ φ(d).
            yield Expression("divisors", (op(Expression("mobius", (D,)), "*", op(a, "//", D)), a))
        case ("divisors", (Expression(), a)) if not a.mentions("d") and not a.mentions("k"):
            # With d, a // d runs through the divisors of a as well.
            yield Expression("divisors", (_with_quotient(parts[0], a), a))


def _with_quotient(term: Expression, a: Expression) -> Expression:
    """Put a // d in the place of a free d."""
    if term == D:
        return op(a, "//", D)
    if term.head == "divisors":
        return Expression(term.head, (term.parts[0], *(_with_quotient(part, a) for part in term.parts[1:])))
    return Expression(term.head, tuple(_with_quotient(part, a) for part in term.parts))


@st.composite
def identities(draw: st.DrawFn) -> tuple[Expression, Expression, int]:
    """Draw an expression, another one with the same values where both have some, and the last n of a range."""
    names = st.sampled_from(sorted(ARITY))
    small_ones = st.integers(0, 3).map(lambda c: op(N, "+", number(c))) | st.integers(1, 6).map(number)
    counts = names.map(lambda name: Expression(name, tuple(draw(small_ones) for _ in range(ARITY[name]))))
    left, last = draw(counts | expressions()), draw(st.integers(1, 8))
    right = rewritten(left, draw)
    assume(left != right)
    assume(max(len(left.spelled()), len(right.spelled())) <= 900)
    return left, right, last
