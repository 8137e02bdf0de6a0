from __future__ import annotations

from itertools import combinations

import pytest

from certify.simplicial import (
    SimplicialComplex,
    build,
    is_closed_surface,
    is_pseudomanifold,
    vertex_links,
)
from tests.unit.simplicial.oracles import Groups, fundamental_group_order, reduced_homology

MANIFOLDS = ["projective-plane", "torus", "klein-bottle", "complex-projective-plane", "poincare-sphere"]
SURFACES = MANIFOLDS[:3]


def is_two_sphere(k: SimplicialComplex) -> bool:
    """Tell whether a complex triangulates the 2-sphere, the only closed surface of Euler characteristic 2."""
    return is_closed_surface(k) and k.euler_characteristic() == 2


@pytest.mark.parametrize("name", MANIFOLDS)
def test_vertices_are_numbered_and_all_used(name: str) -> None:
    k = build(name)
    assert k.labels == tuple(range(1, k.vertex_count + 1))
    assert k.ghosts() == ()


@pytest.mark.parametrize(
    ("name", "f"),
    [
        ("projective-plane", (1, 6, 15, 10)),
        ("torus", (1, 7, 21, 14)),
        ("klein-bottle", (1, 8, 24, 16)),
        ("complex-projective-plane", (1, 9, 36, 84, 90, 36)),
        ("poincare-sphere", (1, 16, 106, 180, 90)),
    ],
)
def test_face_numbers_as_published(name: str, f: tuple[int, ...]) -> None:
    """The papers are named in the docstrings of the functions; the numbers are from memory."""
    assert build(name).f_vector() == f


@pytest.mark.parametrize("name", MANIFOLDS)
def test_two_facets_meet_at_every_ridge(name: str) -> None:
    assert is_pseudomanifold(build(name))


@pytest.mark.parametrize("name", SURFACES)
def test_surfaces_have_circles_as_links(name: str) -> None:
    assert is_closed_surface(build(name))


@pytest.mark.parametrize(
    ("name", "homology"),
    [
        ("projective-plane", {1: (0, (2,))}),
        ("torus", {1: (2, ()), 2: (1, ())}),
        ("klein-bottle", {1: (1, (2,))}),
        ("complex-projective-plane", {2: (1, ()), 4: (1, ())}),
        ("poincare-sphere", {3: (1, ())}),
    ],
)
def test_reduced_homology(name: str, homology: Groups) -> None:
    """The homology of these spaces, as in A. Hatcher, Algebraic Topology, Cambridge 2002, chapter 2 (from memory)."""
    assert reduced_homology(build(name)) == homology


def test_the_torus_has_every_edge_and_a_cyclic_symmetry() -> None:
    torus = build("torus")
    assert torus.faces(2) == tuple(sorted(combinations(range(7), 2), key=lambda edge: edge[::-1]))
    turned = [[label % 7 + 1 for label in (v + 1 for v in facet)] for facet in torus.facets]
    assert SimplicialComplex.from_facets(turned) == torus


def test_the_complex_projective_plane_is_a_simply_connected_manifold() -> None:
    plane = build("complex-projective-plane")
    assert len(plane.faces(3)) == 84
    assert fundamental_group_order(plane) == 1
    # A simply connected closed 3-manifold is a sphere, so these links make it a manifold.
    for around_vertex in vertex_links(plane).values():
        assert all(map(is_two_sphere, vertex_links(around_vertex).values()))
        assert reduced_homology(around_vertex) == {3: (1, ())}
        assert fundamental_group_order(around_vertex) == 1


def test_the_poincare_sphere_is_a_manifold() -> None:
    assert all(map(is_two_sphere, vertex_links(build("poincare-sphere")).values()))


def test_the_poincare_sphere_has_the_binary_icosahedral_group() -> None:
    """A group of order 120 that equals its commutator group is SL(2, 5); by the homology above, H_1 is zero."""
    assert fundamental_group_order(build("poincare-sphere")) == 120
