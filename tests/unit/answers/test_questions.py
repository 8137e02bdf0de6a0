from __future__ import annotations

import pytest

from certify import (
    AbelianGroup,
    BadInput,
    GradedGroups,
    Pair,
    RealToricSpace,
    SimplicialComplex,
    cross_polytope,
    homology,
    parse_pair,
    points,
    polygon,
    polyhedral_product,
    projective_plane,
    real_toric_space,
    reduced_homology,
    simplex,
    simplex_boundary,
    smash_homology,
    splitting,
    tor,
)
from certify.claims.homology import Route

Z = AbelianGroup(1)
TWO = AbelianGroup(0, (2,))
NOTHING = SimplicialComplex.from_facets([[]])


def projective_space(n: int) -> RealToricSpace:
    """Return RPⁿ as the quotient of the n-sphere in ℝⁿ⁺¹ by -1."""
    rows = [[int(i == j or j == n) for j in range(n + 1)] for i in range(n)]
    return real_toric_space(simplex_boundary(n + 1), rows)


def test_pairs_are_given_in_three_ways() -> None:
    k = points(2)
    one = polyhedral_product(k, "(D2, S1)")
    assert one == polyhedral_product(k, parse_pair("(D2, S1)")) == polyhedral_product(k, ["(D2, S1)"] * 2)
    own = Pair.from_cells([(0, False, {}), (1, True, {})])
    mixed = polyhedral_product(k, ["(D1, S0)", own])
    assert mixed.pairs == (parse_pair("(D1, S0)"), own)


@pytest.mark.parametrize("pairs", [["(D1, S0)"], ["(D1, S0)"] * 3, []])
def test_as_many_pairs_as_vertices(pairs: list[str]) -> None:
    with pytest.raises(BadInput, match="one pair for each of the 2 vertices"):
        polyhedral_product(points(2), pairs)


@pytest.mark.parametrize("route", ["blocks", "orbits", "cells"])
def test_every_route_gives_the_same(route: Route) -> None:
    space = polyhedral_product(polygon(5), "(D2, S1)")
    five = AbelianGroup(5)
    assert homology(space, route=route) == GradedGroups.of({0: Z, 3: five, 4: five, 7: Z})


# RPⁿ: A. Hatcher, Algebraic Topology, Cambridge 2002, example 2.42 (from memory).
@pytest.mark.parametrize("n", range(1, 5))
def test_real_projective_spaces(n: int) -> None:
    groups = {0: Z} | dict.fromkeys(range(1, n, 2), TWO) | ({n: Z} if n % 2 else {})
    answer = homology(projective_space(n))
    assert answer == GradedGroups.of(groups)
    assert answer.betti_numbers(2) == dict.fromkeys(range(n + 1), 1)
    assert answer.space == "(D¹,S⁰)^K/ker λ"


def test_rows_are_texts_or_numbers() -> None:
    k = polygon(4)
    assert real_toric_space(k, ["1010", "0101"]) == real_toric_space(k, [[1, 0, 1, 0], (0, 1, 0, 1)])
    with pytest.raises(BadInput, match="row 2 of λ"):
        real_toric_space(k, ["1010", [0, 1, 0, 2]])
    with pytest.raises(BadInput, match="injective on each face, found the face 1 2"):
        real_toric_space(k, ["1111"])


def test_a_space_is_needed() -> None:
    with pytest.raises(BadInput, match=r"reduced_homology\), found SimplicialComplex"):
        homology(polygon(3))  # type: ignore[arg-type]


@pytest.mark.parametrize("degrees", [[], [-1], [0, -3]])
def test_degrees_that_are_none(degrees: list[int]) -> None:
    with pytest.raises(BadInput, match="at least one degree from 0 on"):
        homology(polyhedral_product(polygon(3), "(D1, S0)"), degrees)


def test_routes_that_are_none() -> None:
    space = polyhedral_product(polygon(3), "(D1, S0)")
    with pytest.raises(BadInput, match="route: expected one of blocks, cells, orbits, found block"):
        homology(space, route="block")  # type: ignore[arg-type]
    with pytest.raises(BadInput, match="route: expected cells for a real toric space, found orbits"):
        homology(projective_space(2), route="orbits")
    with pytest.raises(BadInput, match="route"):
        smash_homology(space, route="cells")
    with pytest.raises(BadInput, match="jobs: expected at least one process, found 0"):
        homology(space, jobs=0)


def test_smash_products_over_a_simplex_are_smash_products_of_spaces() -> None:
    # ℝP² ∧ ℝP² has Tor(ℤ/2, ℤ/2) one degree above the tensor product.
    space = polyhedral_product(simplex(2), "(RP2, *)")
    assert smash_homology(space) == GradedGroups.of({2: TWO, 3: TWO}, reduced=True)
    assert repr(smash_homology(space, degrees=[3, 4])) == "H̃_3 = ℤ/2, H̃_4 = 0"


def test_reduced_homology_of_parts() -> None:
    plane = projective_plane()
    circle = GradedGroups.of({1: Z}, reduced=True)
    assert reduced_homology(plane) == GradedGroups.of({1: TWO}, reduced=True)
    assert reduced_homology(plane, link_of=[6]) == circle
    assert reduced_homology(cross_polytope(2), [1, 3]) == GradedGroups.of({0: Z}, reduced=True)
    assert reduced_homology(plane, [], link_of=[1, 2, 4]) == GradedGroups.of({-1: Z}, reduced=True)
    assert reduced_homology(NOTHING) == GradedGroups.of({-1: Z}, reduced=True)


@pytest.mark.parametrize(("vertices", "link_of"), [([1, 9], []), ([1], [1]), ([1], [1, 2, 3]), ([1, 1], [])])
def test_parts_that_are_none(vertices: list[int], link_of: list[int]) -> None:
    with pytest.raises(BadInput):
        reduced_homology(projective_plane(), vertices, link_of=link_of)


def test_answers_know_what_they_are_about() -> None:
    plane = projective_plane()
    assert reduced_homology(plane).space == "K"
    assert reduced_homology(plane, [1, 2]).space == "K_{1,2}"
    assert reduced_homology(plane, link_of=[1, 2]).space == "(link of {1,2})"
    assert reduced_homology(plane, [3, 4], link_of=[1]).space == "(link of {1})_{3,4}"
    assert smash_homology(polyhedral_product(plane, "(D1, S0)")).space == "polyhedral smash product (D¹,S⁰)^K"


def test_the_complex_without_vertices() -> None:
    assert homology(polyhedral_product(NOTHING, "(D1, S0)")) == GradedGroups.of({0: Z})
    assert tor(NOTHING).groups == {(0, 0): Z}
    assert splitting(NOTHING).groups == {(): {-1: Z}}


def test_processes_change_nothing() -> None:
    space = polyhedral_product(projective_plane(), "(D1, S0)")
    alone, together = homology(space), homology(space, jobs=2)
    assert alone == together
    assert alone.certificate.fingerprint == together.certificate.fingerprint
