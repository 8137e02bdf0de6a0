"""Expressions in counts have the values that SymPy finds, and identities between them are accepted exactly if true."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Mapping
from functools import cache
from typing import Any

import pytest
import sympy
from hypothesis import assume, given
from hypothesis import strategies as st
from sympy.functions.combinatorial.numbers import mobius, totient

from certify.claims.count_identities import IdentityClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.symmetry.expressions import values_of
from tests.helpers import certificate_of, certified_statement
from tests.strategies.expressions import ARITY, BINDING, SUMS, D, Expression, N, expressions, identities, number, op
from tests.verifier.forging import forged, judged


class UndefinedError(Exception):
    """An expression has no value."""


def value(expression: Expression, names: Mapping[str, int]) -> int:
    """Return what the format says the value is, with SymPy's functions and with counts from their recursions."""
    head, parts = expression.head, expression.parts
    if head in SUMS:
        term, *ends = parts
        bounds = [small(value(end, names)) for end in ends]
        places: Iterable[int] = range(*bounds)
        if head == "divisors":
            places = map(int, sympy.divisors(positive(*bounds)))
        return sum(value(term, {**names, SUMS[head]: place}) for place in places)
    if not parts:
        return int(head) if head.isdigit() else names[head]
    values = [value(part, names) for part in parts]
    if head in BINDING:
        return operated(head, *values)
    return int(FORMULAS[head](*map(small, values)))


def operated(head: str, a: int, b: int) -> int:
    match head:
        case "+":
            return int(sympy.Integer(a) + b)
        case "-":
            return int(sympy.Integer(a) - b)
        case "*":
            return int(sympy.Integer(a) * b)
        case "//":
            if b == 0:
                raise UndefinedError
            return int(sympy.floor(sympy.Rational(a, b)))
        case _:
            # The format leaves powers to the limits of a verifier: these are those of ours.
            if b < 0 or b * max(abs(a).bit_length(), 1) > 14_000:
                raise UndefinedError
            return int(sympy.Integer(a) ** b)


def small(argument: int) -> int:
    if not 0 <= argument <= 1000:
        raise UndefinedError
    return argument


def positive(argument: int) -> int:
    if argument < 1:
        raise UndefinedError
    return argument


@cache
def lyndon(n: int, q: int) -> int:
    """Count the words that are no powers: q^n = Σ d L(d) over the divisors d of n."""
    powers = sum(int(d) * lyndon(int(d), q) for d in sympy.divisors(n) if d < n)
    return int((q**n - powers) // n)


def necklaces(n: int, q: int) -> int:
    """Count each necklace by the primitive one that it repeats."""
    return sum(lyndon(int(d), q) for d in sympy.divisors(positive(n)))


def bracelets(n: int, q: int) -> int:
    """Add, by Burnside's lemma, the reflections i → c - i, of which the cycles are pairs and fixed points."""
    fixed = Counter(2 * i % n for i in range(positive(n)))
    turned = sum(int(q ** ((n + fixed[c]) // 2)) for c in range(n))
    return (n * necklaces(n, q) + turned) // (2 * n)


@cache
def witt(*content: int) -> int:
    """Count words with these letters by the primitive ones that they repeat: Σ_{e | gcd} (n/e) W(a/e)."""
    n, common = sum(content), int(sympy.igcd(0, *content))
    words = sympy.factorial(positive(n)) / sympy.prod(map(sympy.factorial, content))
    powers = sum(n // int(e) * witt(*(a // int(e) for a in content)) for e in sympy.divisors(common) if e > 1)
    return int(words - powers) // n


FORMULAS: dict[str, Any] = {
    "binomial": lambda n, k: int(sympy.binomial(n, k)),
    "bracelets": bracelets,
    "gcd": lambda *a: int(sympy.igcd(0, *a)),
    "lyndon": lambda n, q: lyndon(positive(n), q),
    "mobius": lambda n: int(mobius(positive(n))),
    "necklaces": necklaces,
    "totient": lambda n: int(totient(positive(n))),
    "witt": witt,
}


def value_or_none(expression: Expression, n: int) -> int | None:
    try:
        return value(expression, {"n": n})
    except UndefinedError:
        return None


def judged_identity(left: str, right: str, first: int, last: int) -> str:
    """Return what the verifier says to a file with this statement: accepted, or the code of its report."""
    statement = {"left": left, "right": right, "first": first, "last": last}
    report = judged(forged("count-identity", lambda lines: lines[0]["statement"].update(statement)))
    return str(report["reason"] if report["verdict"] != "accepted" else report["verdict"])


@given(expressions(), st.sampled_from(("", " ")), st.integers(1, 30))
def test_expressions_have_the_values_that_sympy_finds(expression: Expression, blank: str, n: int) -> None:
    """Prover and verifier agree with the evaluation above, also on where there is no value."""
    check_value(expression, blank, n)


def check_value(expression: Expression, blank: str, n: int) -> None:
    text, expected = expression.spelled(blank), value_or_none(expression, n)
    assume(len(text) <= 1000)
    if expected is None:
        with pytest.raises(BadInput):
            values_of(text, n, n)
        assert judged_identity(text, "0", n, n) in ("expression", "limit")
        return
    assert values_of(text, n, n) == [expected]
    # The text of it may have 1000 characters.
    assume(abs(expected) < 10**900)
    stated = number(expected).spelled()
    certified_statement(IdentityClaim(text, stated, n, n))
    wrong = number(expected + 1).spelled()
    assert judged_identity(text, wrong, n, n) == "false"
    with pytest.raises(ClaimIsFalse):
        certificate_of(IdentityClaim(text, wrong, n, n))


@pytest.mark.parametrize("name", sorted([*FORMULAS, "divisors"]))
@given(st.lists(st.integers(-1, 30) | st.sampled_from((0, 36, 60, 1000, 1001)), min_size=3, max_size=3), st.data())
def test_formulas_have_the_values_that_sympy_finds(name: str, arguments: list[int], data: st.DataObject) -> None:
    """The same for each formula by itself; and Möbius' function is needed where arguments have a common divisor."""
    common = data.draw(st.integers(1, 4)) if name in ("gcd", "witt") else 1
    parts = [number(common * argument) for argument in arguments[: ARITY.get(name, 1)]]
    if name == "divisors":
        parts.insert(0, data.draw(st.sampled_from((number(1), D, N))))
    check_value(Expression(name, tuple(parts)), "", 7)


@given(st.sampled_from(sorted(BINDING)), st.integers(-(10**20), 10**20), st.integers(-(10**20), 10**20))
def test_operations_on_large_and_negative_numbers(head: str, a: int, b: int) -> None:
    """Quotients are rounded down, not towards zero."""
    check_value(op(number(a), head, number(b % 20 - 1 if head == "**" else b)), "", 1)


def with_values(identity: tuple[Expression, Expression, int]) -> tuple[Expression, Expression, int]:
    """Go on only if both sides have values: a side may add 7 to a huge number, or have powers too large one by one."""
    left, right, last = identity
    assume(all(value_or_none(side, n) is not None for side in (left, right) for n in range(1, last + 1)))
    return identity


@given(identities())
def test_rewritten_expressions_are_equal(identity: tuple[Expression, Expression, int]) -> None:
    """By the laws of rings, the divisor sums of Moreau, Witt and Möbius, and Burnside's lemma."""
    left, right, last = with_values(identity)
    certified_statement(IdentityClaim(left.spelled(), right.spelled(), 1, last))


@given(identities(), st.integers(1, 8), st.sampled_from("+-"))
def test_what_differs_for_one_n_is_refused(identity: tuple[Expression, Expression, int], where: int, sign: str) -> None:
    """The product of the binomials (n over a) and (a over n) is 1 for n = a, and 0 otherwise."""
    left, right, last = with_values(identity)
    a = number(where)
    bump = op(Expression("binomial", (N, a)), "*", Expression("binomial", (a, N)))
    text = left.spelled(), op(right, sign, bump).spelled()
    if where > last:
        certified_statement(IdentityClaim(*text, 1, last))
        return
    assert judged_identity(*text, 1, last) == "false"
    with pytest.raises(ClaimIsFalse, match=f"for n = {where} "):
        certificate_of(IdentityClaim(*text, 1, last))
    if where > 1:
        certified_statement(IdentityClaim(*text, 1, where - 1))


@given(expressions(depth=1), expressions(depth=1), st.integers(1, 6))
def test_an_identity_is_accepted_exactly_if_it_is_one(left: Expression, right: Expression, last: int) -> None:
    pairs = [(value_or_none(left, n), value_or_none(right, n)) for n in range(1, last + 1)]
    assume(all(None not in pair for pair in pairs))
    holds = all(a == b for a, b in pairs)
    assert judged_identity(left.spelled(), right.spelled(), 1, last) == ("accepted" if holds else "false")
    if holds:
        certified_statement(IdentityClaim(left.spelled(), right.spelled(), 1, last))
    else:
        with pytest.raises(ClaimIsFalse):
            certificate_of(IdentityClaim(left.spelled(), right.spelled(), 1, last))
