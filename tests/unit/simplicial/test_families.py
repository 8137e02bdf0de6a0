from __future__ import annotations

from itertools import combinations
from math import comb

import pytest

from certify.simplicial import stellar_subdivision
from certify.simplicial.families import (
    cross_polytope,
    cyclic_polytope,
    points,
    polygon,
    simplex,
    simplex_boundary,
    simplex_skeleton,
    stacked_polytope,
)
from tests.unit.simplicial.oracles import reduced_homology

CYCLIC = [(m, d) for d in range(2, 7) for m in range(d + 1, d + 5)]


@pytest.mark.parametrize("n", [3, 4, 5, 12])
def test_a_polygon_is_a_circle(n: int) -> None:
    assert polygon(n).labels == tuple(range(1, n + 1))
    assert polygon(n).f_vector() == (1, n, n)
    assert reduced_homology(polygon(n)) == {1: (1, ())}
    assert polygon(n).is_face([n, 1])


@pytest.mark.parametrize("m", range(6))
def test_faces_of_a_simplex_are_all_subsets(m: int) -> None:
    assert simplex(m).f_vector() == tuple(comb(m, i) for i in range(m + 1))
    assert simplex(m).ghosts() == ()


@pytest.mark.parametrize("m", range(1, 6))
def test_the_boundary_of_a_simplex_lacks_one_face(m: int) -> None:
    assert simplex_boundary(m).f_vector() == tuple(comb(m, i) for i in range(m))
    assert simplex_boundary(m).missing_faces() == (tuple(range(m)),)
    assert reduced_homology(simplex_boundary(m)) == {m - 2: (1, ())}


def test_the_boundary_of_a_point_is_a_ghost() -> None:
    assert simplex_boundary(1).ghosts() == (1,)
    assert simplex_boundary(1).facets == ((),)


@pytest.mark.parametrize(("m", "dim"), [(m, dim) for m in range(6) for dim in range(-1, m)])
def test_a_skeleton_of_a_simplex_is_a_wedge_of_spheres(m: int, dim: int) -> None:
    """It has C(m - 1, dim + 1) spheres: it is shellable, and its reduced Euler characteristic counts them."""
    k = simplex_skeleton(m, dim)
    assert k.f_vector() == tuple(comb(m, i) for i in range(dim + 2))
    count = comb(m - 1, dim + 1) if m else 1
    assert reduced_homology(k) == ({dim: (count, ())} if count else {})


@pytest.mark.parametrize("n", range(5))
def test_cross_polytopes(n: int) -> None:
    """f_{i-1} = 2^i C(n, i) (B. Grünbaum, Convex Polytopes, 2nd ed., Springer 2003, section 4.3, from memory)."""
    k = cross_polytope(n)
    assert k.f_vector() == tuple(2**i * comb(n, i) for i in range(n + 1))
    assert k.missing_faces() == tuple((i, n + i) for i in range(n))
    assert reduced_homology(k) == {n - 1: (1, ())}


@pytest.mark.parametrize(("m", "d"), CYCLIC)
def test_facets_of_cyclic_polytopes_by_gale_evenness(m: int, d: int) -> None:
    """An even number of members between any two others (Ziegler, Lectures on Polytopes, theorem 0.7, from memory)."""

    def is_even_between(chosen: tuple[int, ...]) -> bool:
        others = [i for i in range(m) if i not in chosen]
        return all(sum(a < i < b for i in chosen) % 2 == 0 for a, b in combinations(others, 2))

    assert cyclic_polytope(m, d).facets == tuple(filter(is_even_between, combinations(range(m), d)))


@pytest.mark.parametrize(("m", "d"), CYCLIC)
def test_cyclic_polytopes_have_the_largest_h_vector(m: int, d: int) -> None:
    """h_i = h_{d-i} = C(m-d-1+i, i) for i <= d/2 (Ziegler, Lectures on Polytopes, section 8.4, from memory)."""
    k = cyclic_polytope(m, d)
    assert k.h_vector() == tuple(comb(m - d - 1 + min(i, d - i), min(i, d - i)) for i in range(d + 1))
    assert reduced_homology(k) == {d - 1: (1, ())}


@pytest.mark.parametrize("n", [3, 6])
def test_in_the_plane_a_cyclic_polytope_is_a_polygon(n: int) -> None:
    assert cyclic_polytope(n, 2) == polygon(n)


@pytest.mark.parametrize("m", [0, 1, 2, 7])
def test_points(m: int) -> None:
    assert points(m).f_vector() == ((1, m) if m else (1,))
    assert points(m).ghosts() == ()


STACKED = [(m, d) for d in range(2, 6) for m in range(d + 1, d + 5)]


@pytest.mark.parametrize(("m", "d"), STACKED)
def test_stacked_polytopes_have_the_smallest_h_vector(m: int, d: int) -> None:
    """h = (1, m - d, ..., m - d, 1) (B. Grünbaum, Convex Polytopes, section 10.2, from memory)."""
    k = stacked_polytope(m, d)
    assert k.h_vector() == (1, *[m - d] * (d - 1), 1)
    assert k.labels == tuple(range(1, m + 1))
    assert reduced_homology(k) == {d - 1: (1, ())}


@pytest.mark.parametrize(("m", "d"), STACKED)
def test_stacking_is_subdividing_a_facet(m: int, d: int) -> None:
    assert stellar_subdivision(stacked_polytope(m, d), range(m - d + 1, m + 1), m + 1) == stacked_polytope(m + 1, d)


@pytest.mark.parametrize("d", [2, 3, 4])
def test_the_first_stacked_polytope_is_a_simplex(d: int) -> None:
    assert stacked_polytope(d + 1, d) == simplex_boundary(d + 1)
