"""Groups, characters, quotients and counts against published values and theorems.

Entries of the table of check values stand there with their sources; other sources stand beside the checks.
"""

from __future__ import annotations

from functools import cache
from math import gcd
from typing import Any

import pytest
from sympy import ZZ, factorial, symbols
from sympy.polys.matrices import DomainMatrix
from sympy.polys.monomials import itermonomials
from sympy.polys.rings import ring

from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.branching import BranchingClaim
from certify.claims.characters import CharacterClaim
from certify.claims.count_identities import IdentityClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.shellings import ShellingClaim
from certify.claims.surfaces import SurfaceClaim
from certify.simplicial import SimplicialComplex, build
from certify.simplicial.families import points, polygon
from certify.symmetry.characters import IRREDUCIBLES, specht_character
from certify.symmetry.counting import witt_rank
from certify.symmetry.elements import Element
from tests.helpers import certified_statement, disc_product, graded
from tests.outside.values import entry


def rotation(n: int, r: int = 1) -> Element:
    """Return the rotation of an n-gon by r steps."""
    return tuple((vertex + r) % n + 1 for vertex in range(n))


def quotient_by_rotations(n: int) -> dict[str, Any]:
    """Return what is certified about the surface of the n-gon modulo rotations."""
    return certified_statement(SurfaceClaim(polygon(n), (rotation(n),)))


# For 11-gons and 12-gons the chains of cells take seconds, each of them on the side of the prover and of the verifier.
UP_TO_TWELVE = [*range(4, 11), *(pytest.param(n, marks=pytest.mark.slow) for n in (11, 12))]


@pytest.mark.parametrize("n", UP_TO_TWELVE)
def test_the_genus_of_the_rotation_quotient_is_a_count_of_necklaces(n: int) -> None:
    """Entry S01: genus 1 + 2^(n-3) - N(n)/2 with the number N(n) of binary necklaces, entry N01."""
    statement = quotient_by_rotations(n)
    necklaces = entry("N01").value[n - 1]
    assert statement["euler"] == necklaces - 2 ** (n - 2)
    assert (statement["orientable"], statement["boundary"]) == (1, 0)
    assert (2 - statement["euler"]) // 2 == entry("S01").value[str(n)]


@pytest.mark.parametrize("n", range(4, 13))
def test_the_genus_of_the_rotation_quotient_from_a_character(n: int) -> None:
    """Entry S01 again, through the multiplicity of the trivial character in H_1, which is twice the genus."""
    claim = CharacterClaim(disc_product(polygon(n), 1), 1, (rotation(n),), functions=_trivial(n))
    (product,) = certified_statement(claim)["products"]
    assert product == [2 * entry("S01").value[str(n)], 1]


def _trivial(n: int) -> dict[str, tuple[int, ...]]:
    return {"trivial": (1,) * sum(1 for d in range(1, n + 1) if n % d == 0)}


@pytest.mark.parametrize("n", UP_TO_TWELVE)
def test_the_branch_points_of_the_rotation_quotient(n: int) -> None:
    """Entry S03: with isotropy of order e there are as many orbits as Lyndon words of length n / e, for e > 1."""
    statement = certified_statement(BranchingClaim(polygon(n), (rotation(n),)))
    orbits = [[e, number] for _, e, number in statement["orbits"]]
    assert orbits == sorted([int(e), number] for e, number in entry("S03").value[str(n)].items())
    assert all(number == entry("N02").value[n // e - 1] for e, number in orbits)
    for (by,), e, _ in statement["orbits"]:
        assert abs(by[0] - 1) % (n // e) == 0, "the isotropy group of order e consists of rotations by multiples of n/e"


@pytest.mark.parametrize(("n", "r"), [(n, r) for n in range(3, 13) for r in range(1, n)])
def test_the_fixed_points_of_rotations(n: int, r: int) -> None:
    """Entry S02: 2^gcd(n, r) points; two of them if n is prime, which is common practice in the field."""
    claim = FixedSetClaim(disc_product(polygon(n), 1), generators=(rotation(n, r),))
    statement = certified_statement(claim)
    assert (statement["points"], statement["components"]) == (2 ** gcd(n, r),) * 2
    assert statement["groups"] == [[0, 2 ** gcd(n, r), []]]


@pytest.mark.parametrize("n", range(4, 8))
def test_the_traces_of_rotations(n: int) -> None:
    """Entry S02: 2 - 2^gcd(n, r) on H_1 for r other than 0, and 2 + (n - 4) 2^(n-2) for the identity."""
    rotations = {rotation(n, r): r for r in range(n)}
    statement = certified_statement(CharacterClaim(disc_product(polygon(n), 1), 1, (rotation(n),)))
    for element, value in zip(statement["elements"], statement["values"], strict=True):
        r = rotations[tuple(element)]
        assert value == (2 - 2 ** gcd(n, r) if r else 2 + (n - 4) * 2 ** (n - 2))


@pytest.mark.parametrize("n", [4, 6, 8])
def test_the_rotation_character(n: int) -> None:
    """Entry S04: the multiplicity of the character χ_j of the cyclic group, the same for all j with one gcd(j, n)."""
    claim = CharacterClaim(disc_product(polygon(n), 1), 1, (rotation(n),))
    functions = IRREDUCIBLES["cyclic"]((rotation(n),), claim.elements or ())
    statement = certified_statement(
        CharacterClaim(disc_product(polygon(n), 1), 1, (rotation(n),), claim.elements, {}, functions)
    )
    for d, (inner, norm) in zip(map(int, functions), statement["products"], strict=True):
        assert {entry("S04").value[str(n)][j] for j in range(n) if n // gcd(j, n) == d} == {inner // norm}
        assert inner % norm == 0


def test_small_quotients() -> None:
    """The quarter turn of the torus has a sphere as its quotient, the rotation of the pentagon's surface a torus.

    Common practice in the field.
    """
    assert certified_statement(SurfaceClaim(polygon(4)))["euler"] == 0
    assert quotient_by_rotations(4)["euler"] == 2
    assert certified_statement(SurfaceClaim(polygon(5)))["euler"] == -8
    assert quotient_by_rotations(5)["euler"] == 0


@pytest.mark.parametrize("n", range(4, 8))
def test_antipodal_quotients(n: int) -> None:
    """Entry D14: H_1 of the surface of the n-gon modulo x → -x."""
    claim = OrbitSpaceClaim(polygon(n), (tuple(-vertex for vertex in range(1, n + 1)),))
    (groups,) = [certified_statement(claim)["groups"]]
    found = {k: (rank, torsion) for k, rank, torsion in groups}
    expected = graded({1: entry("D14").value[str(n)]})[1]
    assert found[1] == (expected.rank, list(expected.torsion))
    surface = certified_statement(SurfaceClaim(polygon(n), claim.generators))
    assert surface["orientable"] == int(n % 2 == 0)


@pytest.mark.parametrize(("name", "key"), [("projective-plane", "RP2_6"), ("torus", "T7")])
def test_quotients_by_even_changes_of_sign_are_suspensions(name: str, key: str) -> None:
    """Entry D12: modulo the even changes of sign (D¹, S⁰)^K is the unreduced suspension of K."""
    k = build(name)
    m = k.vertex_count
    pairs = [tuple(-v if v in (1, last) else v for v in range(1, m + 1)) for last in range(2, m + 1)]
    groups = certified_statement(OrbitSpaceClaim(k, tuple(pairs)))["groups"]
    expected = graded(entry("D12").value[key])
    assert {k: (rank, torsion) for k, rank, torsion in groups} == {
        degree: (group.rank, list(group.torsion)) for degree, group in expected.items()
    }


@pytest.mark.parametrize(
    ("name", "key"), [("projective-plane", "RP2_6"), ("torus", "T2_7"), ("complex-projective-plane", "CP2_9")]
)
def test_the_automorphisms_of_small_triangulations(name: str, key: str) -> None:
    """Entry C02."""
    statement = certified_statement(AutomorphismsClaim(disc_product(build(name), 1)))
    assert statement["order"] == entry("C02").value[key]


# -- symmetric groups on points -----------------------------------------------------------------


@pytest.mark.parametrize("m", range(2, 8))
def test_symmetric_groups_on_the_homology_of_points(m: int) -> None:
    """Entry S06, and Kostka numbers: Ind(S^(k-1,1) × 1) is the module M^(k-1, 1, m-k) less M^(k, m-k).

    Young's rule: James, The Representation Theory of the Symmetric Groups, chapter 14 (from memory).
    """
    generators = ((*range(2, m + 1), 1), (2, 1, *range(3, m + 1)))
    product = disc_product(points(m), 1)
    plain = CharacterClaim(product, 1, generators)
    functions = IRREDUCIBLES["symmetric"](generators, plain.elements or ())
    statement = certified_statement(CharacterClaim(product, 1, generators, plain.elements, {}, functions))
    found = {}
    for name, (inner, norm) in zip(functions, statement["products"], strict=True):
        shape = tuple(map(int, name.split()))
        assert norm == 1
        assert inner == sum(kostka(shape, (k - 1, 1, m - k)) - kostka(shape, (k, m - k)) for k in range(2, m + 1))
        if inner:
            found[shape] = inner
    assert found == _decomposition(entry("S06").value[str(m)])


def _decomposition(text: str) -> dict[tuple[int, ...], int]:
    """Read a sum like 3(3,1)+(2,2)."""
    found = {}
    for term in text.split("+"):
        times, _, shape = term.partition("(")
        found[tuple(map(int, shape.removesuffix(")").split(",")))] = int(times or 1)
    return found


def kostka(shape: tuple[int, ...], content: tuple[int, ...]) -> int:
    """Return the number of semistandard tableaux with at most three letters: a coefficient of a Schur polynomial."""
    return int(schur(shape).get((*content, 0, 0)[:3], 0))


@cache
def schur(shape: tuple[int, ...]) -> Any:
    """Return the Schur polynomial in three variables: the determinant of the h_(λ_i - i + j), in SymPy.

    Jacobi and Trudi: Macdonald, Symmetric Functions and Hall Polynomials, chapter I, (3.4) and (5.12) (from memory).
    """
    names = ("x", "y", "z")
    polynomials, *_ = ring(names, ZZ)
    size = len(shape)

    def complete(degree: int) -> Any:
        every = itermonomials(symbols(names), degree, degree) if degree >= 0 else ()
        return sum(map(polynomials.from_expr, every), polynomials.zero)

    rows = [[complete(part - i + j) for j in range(size)] for i, part in enumerate(shape)]
    return DomainMatrix(rows, (size, size), polynomials.to_domain()).det()


@pytest.mark.parametrize(
    ("shape", "content", "number"),
    [((2, 1), (1, 1, 1), 2), ((3, 1), (2, 1, 1), 2), ((2, 2), (2, 1, 1), 1), ((4,), (1, 2, 1), 1), ((1, 1), (2,), 0)],
)
def test_kostka_numbers(shape: tuple[int, ...], content: tuple[int, ...], number: int) -> None:
    """The oracle of the test above, by tableaux that are written down by hand."""
    assert kostka(shape, content) == number


@pytest.mark.parametrize("shape", [(4, 2, 1), (3, 3), (2, 1, 1, 1), (5,)])
def test_the_degrees_of_specht_characters_are_those_of_the_hook_formula(shape: tuple[int, ...]) -> None:
    """Frame, Robinson, Thrall 1954 (from memory), in SymPy's integers."""
    n = sum(shape)
    columns = [sum(1 for part in shape if part > column) for column in range(shape[0])]
    hooks = 1
    for row, part in enumerate(shape):
        for column in range(part):
            hooks *= part - column + columns[column] - row - 1
    assert specht_character(shape, (1,) * n) == factorial(n) / hooks


# -- counts -------------------------------------------------------------------------------------


@pytest.mark.parametrize("n", range(3, 11))
def test_orbits_on_two_colourings_of_a_polygon(n: int) -> None:
    """Entries N01, N02 and N03: necklaces, Lyndon words and bracelets."""
    rotations = certified_statement(OrbitCountClaim(polygon(n), 2, (rotation(n),)))
    assert rotations["orbits"] == entry("N01").value[n - 1]
    assert rotations["primitive"] == entry("N02").value[n - 1]
    assert certified_statement(OrbitCountClaim(polygon(n), 2))["orbits"] == entry("N03").value[n - 1]


@pytest.mark.parametrize(("name", "number"), [("necklaces", "N01"), ("lyndon", "N02"), ("bracelets", "N03")])
def test_formulas_of_counts(name: str, number: str) -> None:
    """Entries N01, N02, N03, each as an identity with the value of the table for one n."""
    for n, value in enumerate(entry(number).value, start=1):
        certified_statement(IdentityClaim(f"{name}(n, 2)", f"{value}", n, n))


@pytest.mark.parametrize("q", ["3", "5"])
def test_moreaus_formula_for_more_colours(q: str) -> None:
    """Entry N04."""
    for n, value in enumerate(entry("N04").value[q], start=1):
        certified_statement(IdentityClaim(f"lyndon(n, {q})", f"{value}", n, n))


def test_witts_formula_adds_up_to_moreaus() -> None:
    """Lyndon words in two letters, counted by the number of the first one (E. Witt, 1937, from memory)."""
    certified_statement(IdentityClaim("sum(witt(k, n - k) for k in range(1, n)) ", "lyndon(n, 2)", 2, 30))
    certified_statement(IdentityClaim("witt(n, n, n)", "sum(witt(n, n, n) for k in range(0, 1))", 1, 20))
    for content, value in (((2, 2), 1), ((3, 2), 2), ((3, 3), 3), ((1, 1, 1), 2), ((2, 2, 2), 14)):
        certified_statement(IdentityClaim(f"witt({', '.join(map(str, content))})", str(value), 1, 1))


def test_the_splitting_of_a_wedge_of_spheres() -> None:
    """Entry N06, by the Hilton–Milnor theorem (Hilton 1955): basic products of 6 S³, 8 S⁴, 3 S⁵, by dimension.

    A basic product with a, b, c factors has dimension 2a + 3b + 4c + 1, and there are as many as Lyndon words with so
    many letters of kinds of which there are 6, 8 and 3; so words are counted by their letters.
    """
    expected = entry("N06").value
    for n, value in enumerate(expected[:5], start=3):
        found = 0
        for c in range(n // 4 + 1):
            for b in range(n // 3 + 1):
                rest = n - 1 - 3 * b - 4 * c
                if rest >= 0 and rest % 2 == 0:
                    found += _coloured_lyndon_words((rest // 2, b, c), (6, 8, 3))
        assert found == value


def _coloured_lyndon_words(content: tuple[int, ...], kinds: tuple[int, ...]) -> int:
    """Return the number of Lyndon words with these many letters of three sorts, where a sort has so many letters."""
    sizes = [(number, kind) for number, kind in zip(content, kinds, strict=True) if number]
    total = 0
    for choice in _contents(sizes):
        total += witt_rank(choice)
    return total


def _contents(sizes: list[tuple[int, int]]) -> list[tuple[int, ...]]:
    found: list[tuple[int, ...]] = [()]
    for number, kind in sizes:
        found = [(*before, *part) for before in found for part in _compositions(number, kind)]
    return [tuple(part for part in whole if part) for whole in found]


def _compositions(number: int, parts: int) -> list[tuple[int, ...]]:
    if parts == 1:
        return [(number,)]
    return [(first, *rest) for first in range(number + 1) for rest in _compositions(number - first, parts - 1)]


# -- shellings ----------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("name", "arguments"),
    [
        ("polygon", {"n": 7}),
        ("cross-polytope", {"n": 4}),
        ("cyclic-polytope", {"m": 9, "d": 4}),
        ("stacked-polytope", {"m": 8, "d": 4}),
        ("permutohedron-dual", {"n": 3}),
        ("associahedron-dual", {"n": 4}),
    ],
)
def test_boundaries_of_polytopes_are_shellable(name: str, arguments: dict[str, int]) -> None:
    """H. Bruggesser, P. Mani, Shellable decompositions of cells and spheres, 1971 (from memory)."""
    k: SimplicialComplex = build(name, **arguments)
    certified_statement(ShellingClaim(k))
