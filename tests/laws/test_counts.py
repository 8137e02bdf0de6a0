"""Theorems about shellings, identities between counts, and branch points, on random input."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from functools import cache
from itertools import combinations, permutations, product
from math import comb, factorial
from typing import Any

import pytest
import sympy
from hypothesis import assume, given
from hypothesis import strategies as st
from sympy.functions.combinatorial.numbers import mobius, totient

from certify.claims.identities import IdentityClaim
from certify.claims.quotients import BranchingClaim, OrbitSpaceClaim
from certify.claims.shellings import ShellingClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.simplicial import SimplicialComplex, build
from certify.symmetry.elements import Element
from certify.symmetry.expressions import values_of
from tests.helpers import certificate_of, certified_statement
from tests.strategies import complexes, symmetric_complexes
from tests.verifier.forging import forged, judged
from tests.verifier.forging import values_of as lines_of

# -- shellings, by their definition -------------------------------------------------------------

Facet = tuple[int, ...]
Facets = tuple[Facet, ...]


def faces_of(facets: Iterable[Facet]) -> set[Facet]:
    """Return all faces, the empty one included."""
    return {face for facet in facets for size in range(len(facet) + 1) for face in combinations(facet, size)}


def meets_well(facet: Facet, before: Iterable[Facet]) -> bool:
    """Tell whether the faces that a facet has in common with those before it are the faces of a set of its ridges."""
    common = faces_of([facet]) & faces_of(before)
    ridges = {face for face in common if len(face) == len(facet) - 1}
    return bool(ridges) and common == faces_of(ridges)


def meets_somewhere(facet: Facet, before: Iterable[Facet]) -> bool:
    """Tell whether a facet has a ridge in common with those before it."""
    return any(len(set(facet) & set(earlier)) == len(facet) - 1 for earlier in before)


def is_shelling(order: Sequence[Facet]) -> bool:
    return all(meets_well(facet, order[:number]) for number, facet in enumerate(order) if number)


def has_shelling(facets: Facets) -> bool:
    """Tell whether there is a shelling, over all sets of facets that can come first."""
    reached = {frozenset[Facet]()}
    for _ in facets:
        reached = {
            done | {facet}
            for done in reached
            for facet in facets
            if facet not in done and (not done or meets_well(facet, done))
        }
    return bool(reached)


def is_closed(facets: Facets) -> bool:
    """Tell whether all facets have one size, and each ridge lies in two of them."""
    size = len(facets[0])
    ridges = Counter(ridge for facet in facets if facet for ridge in combinations(facet, len(facet) - 1))
    return all(len(facet) == size for facet in facets) and set(ridges.values()) <= {2}


def f_vector(facets: Iterable[Facet]) -> list[int]:
    """Return how many faces have 0, 1, … vertices."""
    sizes = Counter(map(len, faces_of(facets)))
    return [sizes[size] for size in range(max(sizes) + 1)]


def h_vector(facets: Iterable[Facet]) -> list[int]:
    """Return the coefficients h_j of Σ f_i t^i (1 - t)^(d - i), with f_i faces of i vertices."""
    f = f_vector(facets)
    d = len(f) - 1
    return [sum((-1) ** (j - i) * comb(d - i, j - i) * f[i] for i in range(j + 1)) for j in range(d + 1)]


def starred(facets: Facets, face: Facet) -> Facets:
    """Return the stellar subdivision at a face that is not empty, with a new vertex; at a facet, this is stacking."""
    new = max(vertex for facet in facets for vertex in facet) + 1
    kept = {facet for facet in facets if not set(face) <= set(facet)}
    cut = {(*(v for v in facet if v != left), new) for facet in set(facets) - kept for left in face}
    return tuple(sorted(kept | cut))


def joined(one: Facets, other: Facets) -> Facets:
    above = max((vertex for facet in one for vertex in facet), default=0)
    return tuple((*left, *(vertex + above for vertex in right)) for left in one for right in other)


def complex_of(facets: Facets) -> SimplicialComplex:
    used = sorted({vertex for facet in facets for vertex in facet})
    return SimplicialComplex.from_facets(facets, vertices=used)


def facets_of(k: SimplicialComplex) -> Facets:
    return tuple(tuple(vertex + 1 for vertex in facet) for facet in k.facets)


@st.composite
def stacked_polytopes(draw: st.DrawFn) -> Facets:
    """Draw the boundary of a simplex of dimension 2 to 4, with pyramids placed on facets again and again."""
    d = draw(st.integers(2, 4))
    facets: Facets = tuple(combinations(range(1, d + 2), d))
    for _ in range(draw(st.integers(0, 6))):
        facets = starred(facets, draw(st.sampled_from(facets)))
    return facets


@st.composite
def polytopes(draw: st.DrawFn, most: int = 60) -> Facets:
    """Draw the boundary of a simplicial polytope: joins and stellar subdivisions keep one polytopal."""
    boundaries = st.integers(0, 3).map(lambda d: tuple(combinations(range(1, d + 2), d)))
    cyclic = st.tuples(st.integers(2, 4), st.integers(1, 4)).map(
        lambda dm: facets_of(build("cyclic-polytope", m=dm[0] + dm[1], d=dm[0]))
    )
    facets: Facets = draw(boundaries | cyclic | stacked_polytopes())
    for _ in range(draw(st.integers(0, 3))):
        if draw(st.booleans()) and len(facets[0]) < 4:
            facets = joined(facets, draw(boundaries))
        elif facets != ((),):
            facets = starred(facets, draw(st.sampled_from(sorted(faces_of(facets) - {()}))))
    assume(len(facets) <= most)
    return facets


@given(stacked_polytopes() | polytopes())
def test_boundaries_of_polytopes_have_shellings_that_are_accepted(facets: Facets) -> None:
    """Polytopes are shellable (Bruggesser and Mani 1971), and so the certificate holds a shelling by the definition.

    In a shelling h_j facets meet those before them in exactly j ridges (McMullen 1970), and h_j = h_(d-j) for a sphere
    (Dehn and Sommerville). Both from memory.
    """
    certificate = certificate_of(ShellingClaim(complex_of(facets)))
    certified_statement(ShellingClaim(complex_of(facets)))
    order = [tuple(facet) for facet in lines_of(certificate)[1]["order"]]
    assert len(order) == len(facets)
    assert faces_of(order) == faces_of(facets_of(complex_of(facets)))
    assert is_shelling(order)
    d = len(order[0])
    restrictions = Counter(
        sum(1 for ridge in combinations(facet, d - 1) if ridge in faces_of(order[:number])) if number and d else 0
        for number, facet in enumerate(order)
    )
    h = h_vector(facets)
    assert [restrictions[j] for j in range(d + 1)] == h == h[::-1]


@given(polytopes())
def test_what_is_accepted_as_a_sphere_has_its_euler_characteristic(facets: Facets) -> None:
    """χ = 1 + (-1)^d, from the numbers of faces of the complex in the accepted statement."""
    statement = certified_statement(ShellingClaim(complex_of(facets)))
    f = f_vector(map(tuple, statement["facets"]))
    assert sum((-1) ** i * faces for i, faces in enumerate(f[1:])) == 1 + (-1) ** (len(f) - 2)


# -- orders of facets ---------------------------------------------------------------------------


def judged_order(order: Sequence[Facet], facets: Sequence[Facet] | None = None) -> str:
    """Return what the verifier says to an order as a shelling of these facets: accepted, or the code of the rejection.

    Without `facets`, they are those of the order.
    """
    of = order if facets is None else facets

    def edit(lines: list[Any]) -> None:
        lines[0]["statement"]["facets"] = sorted(map(list, of))
        lines[0]["statement"]["vertices"] = max((vertex for facet in of for vertex in facet), default=0)
        lines[1]["order"] = list(map(list, order))

    report = judged(forged("shelling", edit))
    return str(report["reason"] if report["verdict"] == "rejected" else report["verdict"])


@pytest.mark.parametrize("n", [3, 4, 5, 6])
def test_all_orders_of_the_edges_of_a_polygon(n: int) -> None:
    """An n-gon has n 2^(n-2) shellings: an edge, then one at either end of the path until the last one is left."""
    verdicts = Counter(judged_order(order) for order in permutations(facets_of(build("polygon", n=n))))
    accepted = n * 2 ** (n - 2)
    assert verdicts == {"accepted": accepted} | ({"shelling": factorial(n) - accepted} if n > 3 else {})


def test_all_orders_of_the_triangles_of_a_bipyramid() -> None:
    """In some orders a triangle meets those before it in an edge and the vertex opposite to it."""
    facets = joined(facets_of(build("polygon", n=3)), ((1,), (2,)))
    for order in permutations(facets):
        assert judged_order(order) == ("accepted" if is_shelling(order) else "shelling")


@st.composite
def small_complexes(draw: st.DrawFn, most: int = 8) -> Facets:
    """Draw a small sphere, one without a facet, two of them, apart or glued, any sets of one size, or any complex."""
    whole = draw(polytopes(most))
    match draw(st.sampled_from(("sphere", "ball", "two", "sets", "any"))):
        case "ball":
            return whole[1:] or whole
        case "two":
            d = len(whole[0])
            other: Facets = tuple(combinations(range(1, d + 2), d))
            if d and draw(st.booleans()):
                other = starred(other, draw(st.sampled_from(other)))
            top = max((vertex for facet in whole for vertex in facet), default=0)
            by = top - draw(st.integers(0, min(1, top)))
            facets = {*whole, *(tuple(vertex + by for vertex in facet) for facet in other)}
            assume(len(facets) <= most)
            return tuple(sorted(facets))
        case "any":
            return facets_of(draw(complexes(4, ghosts=False)))
        case "sets":
            size = draw(st.integers(1, 3))
            every = list(combinations(range(1, size + 3), size))
            facets = set(draw(st.lists(st.sampled_from(every), min_size=1, max_size=most)))
            return facets_of(complex_of(tuple(sorted(facets))))
        case _:
            return whole


@given(small_complexes(12), st.data())
def test_an_order_is_accepted_exactly_if_it_is_a_shelling(facets: Facets, data: st.DataObject) -> None:
    """By the definition, and each ridge lies in two facets."""
    # Facets are taken as they come; or one with a common ridge is taken next, or one that meets those before it well.
    first = data.draw(st.sampled_from((lambda *_: True, meets_somewhere, meets_well)))
    order: list[Facet] = []
    left = list(data.draw(st.permutations(facets)))
    while left:
        order.append(left.pop(next((i for i, facet in enumerate(left) if not order or first(facet, order)), 0)))
    assert judged_order(order) == ("accepted" if is_closed(facets) and is_shelling(order) else "shelling")


@pytest.mark.parametrize("size", [2, 3, 4])
def test_a_point_and_a_simplex_are_no_sphere(size: int) -> None:
    """Each has the empty set in the place of its one ridge, if the point comes first."""
    order = (1,), tuple(range(2, size + 2))
    assert judged_order(order) == judged_order(order[::-1]) == "shelling"


@given(polytopes(20), st.data())
def test_a_shelling_is_one_of_the_complex_in_the_statement(facets: Facets, data: st.DataObject) -> None:
    """A shelling of a sphere with a facet too many or too few, or another one twice, is none of it."""
    order = [tuple(f) for f in lines_of(certificate_of(ShellingClaim(complex_of(facets))))[1]["order"]]
    top = max((vertex for facet in order for vertex in facet), default=0)
    if order[0]:
        assert judged_order(order, [*order, tuple(range(top + 1, top + 1 + len(order[0])))]) == "shelling"
    if len(order) > 1:
        assert judged_order(order, order[1:]) == "shelling"
    again = data.draw(st.sampled_from(order))
    assert judged_order([*order, again], order) == judged_order([again, *order], order) == "shelling"


@given(polytopes(20))
def test_a_shelling_of_a_sphere_may_be_turned_around(facets: Facets) -> None:
    """Each facet meets those after it in the ridges that it does not share with those before it (from memory)."""
    order = [tuple(f) for f in lines_of(certificate_of(ShellingClaim(complex_of(facets))))[1]["order"]]
    assert judged_order(order[::-1]) == "accepted"


@given(small_complexes())
def test_the_prover_finds_a_shelling_exactly_if_there_is_one(facets: Facets) -> None:
    """Of all orders of facets, by way of all sets of them that can come first."""
    if is_closed(facets) and has_shelling(facets):
        certified_statement(ShellingClaim(complex_of(facets)))
    else:
        with pytest.raises(ClaimIsFalse):
            certificate_of(ShellingClaim(complex_of(facets)))


# -- expressions --------------------------------------------------------------------------------


class UndefinedError(Exception):
    """An expression has no value."""


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
ARITY = {name: 1 if name in ("mobius", "totient") else 2 for name in FORMULAS}
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
            name = draw(st.sampled_from(sorted(FORMULAS)))
            count = draw(st.integers(1, 3)) if name in ("gcd", "witt") else ARITY[name]
            # Mostly small, since there is no value beyond 1000, nor often at 0.
            argument = leaves | leaves.map(lambda leaf: op(leaf, "+", number(1)))
            return Expression(name, tuple(inner() if draw(st.booleans()) else draw(argument) for _ in range(count)))
        case _:
            if draw(st.booleans()):
                return Expression("divisors", (inner("d"), op(draw(leaves), "+", number(draw(st.integers(0, 1))))))
            return Expression("range", (inner("k"), draw(NUMBERS), draw(leaves)))


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


# -- identities ---------------------------------------------------------------------------------


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
    """Draw an expression, another one with the same values, and the last n of a range in which there are some."""
    names = st.sampled_from(sorted(FORMULAS))
    small_ones = st.integers(0, 3).map(lambda c: op(N, "+", number(c))) | st.integers(1, 6).map(number)
    counts = names.map(lambda name: Expression(name, tuple(draw(small_ones) for _ in range(ARITY[name]))))
    left, last = draw(counts | expressions()), draw(st.integers(1, 8))
    right = rewritten(left, draw)
    assume(left != right)
    assume(max(len(left.spelled()), len(right.spelled())) <= 900)
    assume(all(value_or_none(left, n) is not None for n in range(1, last + 1)))
    # What is rewritten may have no value: 7 is added to a huge number, or powers are too large one by one.
    assume(all(value_or_none(right, n) is not None for n in range(1, last + 1)))
    return left, right, last


@given(identities())
def test_rewritten_expressions_are_equal(identity: tuple[Expression, Expression, int]) -> None:
    """By the laws of rings, the divisor sums of Moreau, Witt and Möbius, and Burnside's lemma."""
    left, right, last = identity
    certified_statement(IdentityClaim(left.spelled(), right.spelled(), 1, last))


@given(identities(), st.integers(1, 8), st.sampled_from("+-"))
def test_what_differs_for_one_n_is_refused(identity: tuple[Expression, Expression, int], where: int, sign: str) -> None:
    """The product of the binomials (n over a) and (a over n) is 1 for n = a, and 0 otherwise."""
    left, right, last = identity
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


# -- branch points ------------------------------------------------------------------------------

Point = tuple[int, ...]
"""The middle of a cube of (D¹, S⁰)^K, by coordinates -1, 0 and 1."""


@st.composite
def graphs_with_groups(draw: st.DrawFn) -> tuple[SimplicialComplex, tuple[Element, ...]]:
    """Draw a polygon, a random graph or any complex, with one or two symmetries with signs."""
    if draw(st.booleans()):
        k, generators = draw(symmetric_complexes(max_vertices=4, signs=True))
        return k, generators
    n = draw(st.integers(3, 6))
    turn, flip = (*range(2, n + 1), 1), (1, *range(n, 1, -1))
    steps = draw(st.just({1}) | st.sets(st.integers(1, n // 2), min_size=1))
    edges = {frozenset((i, (i + step - 1) % n + 1)) for i in range(1, n + 1) for step in steps}
    signs = [draw(st.lists(st.sampled_from((1, -1)), min_size=n, max_size=n)) for _ in range(2)]
    bases = draw(st.lists(st.sampled_from((turn, turn, flip, tuple(range(1, n + 1)))), min_size=1, max_size=2))
    generators = tuple(
        tuple(s * v for s, v in zip(sign, base, strict=True)) for sign, base in zip(signs, bases, strict=False)
    )
    return SimplicialComplex.from_facets(edges, vertices=range(1, n + 1)), generators


def image(element: Element, point: Point) -> Point:
    moved = [0] * len(point)
    for coordinate, to in zip(point, element, strict=True):
        moved[abs(to) - 1] = coordinate if to > 0 else -coordinate
    return tuple(moved)


def group_of(generators: Sequence[Element], m: int) -> set[Element]:
    """Return all elements: where the point (1, 2, …) goes by an element, there stand the images by its inverse."""
    found: set[Point] = {tuple(range(1, m + 1))}
    new = found
    while new:
        new = {image(generator, point) for generator in generators for point in new} - found
        found |= new
    return found


def middles(k: SimplicialComplex) -> list[Point]:
    """Return the middles of all cubes: the coordinates that are 0 are a face."""
    faces = faces_of(facets_of(k))
    every = product((-1, 0, 1), repeat=k.vertex_count)
    return [point for point in every if tuple(i for i, x in enumerate(point, 1) if x == 0) in faces]


def lies_in(point: Point, other: Point) -> bool:
    """Tell whether a cube is a proper face of another one, by their middles."""
    return point != other and all(y in (0, x) for x, y in zip(point, other, strict=True))


@given(graphs_with_groups())
def test_riemann_and_hurwitz_for_isolated_points_with_isotropy(acted: tuple[SimplicialComplex, Any]) -> None:
    """χ(X) = |G| χ(X/G) - Σ (|G|/e)(e - 1) over orbits with isotropy of order e > 1, if those points are isolated.

    χ(X) is Σ (-1)^i f_i 2^(m-i) with f_i faces of i vertices; χ(X/G) is the alternating sum of the ranks of a certified
    homology. A point has the isotropy of the cubes of which the middles it is a mean, one a face of the next; so points
    with isotropy are isolated exactly if no element but 1 preserves a cube and a proper face of it.
    """
    k, generators = acted
    group = group_of(generators, k.vertex_count)
    assume(len(group) <= 64)
    points = middles(k)
    kept = {g: [p for p in points if image(g, p) == p] for g in group - {tuple(range(1, k.vertex_count + 1))}}
    claim = BranchingClaim(k, generators)
    if any(lies_in(p, q) for fixed in kept.values() for p in fixed for q in fixed):
        with pytest.raises(ClaimIsFalse):
            certificate_of(claim)
        assert judged(branching_of(k, generators))["reason"] == "not-isolated"
        return
    orbits = certified_statement(claim)["orbits"]
    isotropy = Counter(1 + sum(p in fixed for fixed in kept.values()) for p in points)
    assert orbits == sorted([e, number * e // len(group)] for e, number in isotropy.items() if e > 1)
    upstairs = sum((-1) ** i * faces * 2 ** (k.vertex_count - i) for i, faces in enumerate(f_vector(facets_of(k))))
    groups = certified_statement(OrbitSpaceClaim(k, generators))["groups"]
    downstairs = sum((-1) ** degree * rank for degree, rank, _ in groups)
    size = len(group)
    assert upstairs == size * downstairs - sum(number * (size // e) * (e - 1) for e, number in orbits)


def branching_of(k: SimplicialComplex, generators: Sequence[Element]) -> bytes:
    """Return a file that claims that no point has isotropy."""

    def edit(lines: list[Any]) -> None:
        lines[0]["statement"] |= {
            "facets": sorted(map(list, facets_of(k))),
            "vertices": k.vertex_count,
            "generators": list(map(list, generators)),
            "orbits": [],
        }

    return forged("branching", edit)
