from __future__ import annotations

from typing import Any

import pytest

from certify.simplicial import (
    SimplicialComplex,
    build,
    disjoint_union,
    is_closed_surface,
    is_pseudomanifold,
    join,
    vertex_links,
)

from_facets = SimplicialComplex.from_facets

TWO_CIRCLES = disjoint_union(build("polygon", n=3), build("polygon", n=3))
# Two tetrahedron boundaries that share vertex 1: every edge is in two triangles, but one cannot walk across.
PINCHED = from_facets([[1, 2, 3], [1, 2, 4], [1, 3, 4], [2, 3, 4], [1, 5, 6], [1, 5, 7], [1, 6, 7], [5, 6, 7]])


@pytest.mark.parametrize(
    ("k", "answer"),
    [
        (build("points", m=0), False),
        (build("points", m=1), False),
        (build("points", m=2), True),
        (build("points", m=3), False),
        (build("polygon", n=5), True),
        (build("simplex", m=3), False),
        (build("simplex-boundary", m=5), True),
        (build("simplex-skeleton", m=4, dim=1), False),
        (TWO_CIRCLES, False),
        (PINCHED, False),
        (from_facets([[1, 2], [2, 3], [1, 3], [4]]), False),
        (from_facets([[1, 2], [2, 3], [1, 3]], vertices=[1, 2, 3, 4]), True),
    ],
)
def test_pseudomanifolds(k: SimplicialComplex, answer: bool) -> None:
    assert is_pseudomanifold(k) is answer


@pytest.mark.parametrize(
    ("k", "answer"),
    [
        (build("points", m=0), False),
        (build("polygon", n=5), False),
        (build("simplex-boundary", m=4), True),
        (build("simplex-boundary", m=5), False),
        (build("cross-polytope", n=3), True),
        (PINCHED, False),
        (from_facets([[1, 2, 3], [1, 2, 4], [1, 3, 4], [2, 3, 4]], vertices=[0, 1, 2, 3, 4]), True),
    ],
)
def test_closed_surfaces(k: SimplicialComplex, answer: bool) -> None:
    assert is_closed_surface(k) is answer


def test_a_pseudomanifold_with_a_pinched_point_is_no_surface() -> None:
    """A triangulated sphere with two far vertices made one: every link but one is a circle, and that one is two."""
    annulus: list[list[Any]] = []
    for ring in range(3):
        for i in range(3):
            a, b = (ring, i), (ring, (i + 1) % 3)
            c, d = (ring + 1, i), (ring + 1, (i + 1) % 3)
            annulus += [[a, b, c], [b, c, d]]
    lids = [[(ring, i), (ring, (i + 1) % 3), "pinched"] for ring in (0, 3) for i in range(3)]
    sphere_with_a_pinch = from_facets(annulus + lids)
    assert is_pseudomanifold(sphere_with_a_pinch)
    assert not is_closed_surface(sphere_with_a_pinch)


def test_vertex_links_leave_ghosts_out() -> None:
    k = from_facets([[1, 2]], vertices=[1, 2, 3])
    assert {label: str(found) for label, found in vertex_links(k).items()} == {
        1: "2 vertices, facets 2, ghosts 3",
        2: "2 vertices, facets 1, ghosts 3",
    }
    assert vertex_links(build("points", m=0)) == {}


def test_the_suspension_of_a_surface_is_a_pseudomanifold() -> None:
    assert is_pseudomanifold(join(build("torus"), build("points", m=2)))
