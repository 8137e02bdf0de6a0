from __future__ import annotations

import inspect
from itertools import combinations
from math import comb
from typing import Any

import pytest

from certify.errors import BadInput
from certify.simplicial import FAMILIES, build
from certify.simplicial.families import (
    cross_polytope,
    cyclic_polytope,
    points,
    polygon,
    simplex,
    simplex_boundary,
    simplex_skeleton,
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


@pytest.mark.parametrize("name", FAMILIES)
def test_the_registry_describes_the_functions(name: str) -> None:
    family = FAMILIES[name]
    assert family.name == name
    assert list(family.parameters) == list(inspect.signature(family.function).parameters)
    assert all(family.parameters.values())
    assert family.description


@pytest.mark.parametrize(
    ("name", "arguments", "text"),
    [
        ("polygon", {"n": 5}, "5 vertices, facets 12 15 23 34 45"),
        ("simplex", {"m": 2}, "2 vertices, facets 12"),
        ("simplex-boundary", {"m": 2}, "2 vertices, facets 1 2"),
        ("simplex-skeleton", {"m": 3, "dim": 0}, "3 vertices, facets 1 2 3"),
        ("cross-polytope", {"n": 1}, "2 vertices, facets 1 2"),
        ("cyclic-polytope", {"m": 4, "d": 3}, "4 vertices, facets 123 124 134 234"),
        ("points", {"m": 0}, "0 vertices, facets ∅"),
    ],
)
def test_building_by_name(name: str, arguments: dict[str, object], text: str) -> None:
    assert str(build(name, **arguments)) == text


@pytest.mark.parametrize(
    ("name", "arguments", "message"),
    [
        ("polygon", {}, "family polygon: expected the argument n (number of vertices, at least 3), found none"),
        ("polygon", {"n": 4, "k": 1}, "family polygon: expected only n, found the argument k"),
        (
            "cyclic-polytope",
            {"m": 6, "d": 3, "n": 1},
            "family cyclic-polytope: expected only m, d, found the argument n",
        ),
        ("torus", {"n": 7}, "family torus: expected no argument, found the argument n"),
        ("polygon", {"n": 2}, "family polygon, argument n: expected a whole number of at least 3, found 2"),
        ("polygon", {"n": "4"}, "family polygon, argument n: expected a whole number of at least 3, found '4'"),
        ("polygon", {"n": 4.0}, "family polygon, argument n: expected a whole number of at least 3, found 4.0"),
        ("points", {"m": True}, "family points, argument m: expected a whole number of at least 0, found True"),
        ("simplex", {"m": -1}, "family simplex, argument m: expected a whole number of at least 0, found -1"),
        (
            "simplex-boundary",
            {"m": 0},
            "family simplex-boundary, argument m: expected a whole number of at least 1, found 0",
        ),
        (
            "simplex-skeleton",
            {"m": 3, "dim": 3},
            "family simplex-skeleton, argument dim: expected a whole number from -1 to 2, found 3",
        ),
        (
            "simplex-skeleton",
            {"m": 3, "dim": -2},
            "family simplex-skeleton, argument dim: expected a whole number from -1 to 2, found -2",
        ),
        (
            "cross-polytope",
            {"n": None},
            "family cross-polytope, argument n: expected a whole number of at least 0, found None",
        ),
        (
            "cyclic-polytope",
            {"m": 5, "d": 1},
            "family cyclic-polytope, argument d: expected a whole number of at least 2, found 1",
        ),
        (
            "cyclic-polytope",
            {"m": 4, "d": 4},
            "family cyclic-polytope, argument m: expected a whole number of at least 5, found 4",
        ),
    ],
)
def test_arguments_that_do_not_fit(name: str, arguments: dict[str, Any], message: str) -> None:
    with pytest.raises(BadInput) as caught:
        build(name, **arguments)
    assert str(caught.value) == message


def test_an_unknown_family_is_answered_with_the_known_ones() -> None:
    with pytest.raises(BadInput) as caught:
        build("pentagon")
    assert caught.value.found == "'pentagon'"
    assert caught.value.expected == f"one of {', '.join(FAMILIES)}"
    assert "cyclic-polytope" in caught.value.expected


def test_a_parameter_may_even_be_called_name() -> None:
    with pytest.raises(BadInput, match="found the argument name"):
        build("torus", name=1)
