from __future__ import annotations

from itertools import combinations, product
from math import factorial
from typing import Any

import networkx as nx
import pytest
from hypothesis import given
from sympy.functions.combinatorial.numbers import stirling

from certify.errors import BadInput
from certify.simplicial import (
    Label,
    SimplicialComplex,
    barycentric_subdivision,
    build,
    clique_complex,
    deletion,
    face_of,
    join,
    link,
    stellar_subdivision,
)
from tests.strategies import complexes, complexes_with_large_face
from tests.unit.simplicial.oracles import face_sets, reduced_homology

from_facets = SimplicialComplex.from_facets

# The octahedron with opposite vertices 0 1, 2 3, 4 5.
OCTAHEDRON = join(*(from_facets([[a], [a + 1]]) for a in (0, 2, 4)))


# -- barycentric ------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("k", "labels", "facets"),
    [
        (from_facets([[]]), (), ((),)),
        (from_facets([[]], [1, 2]), (), ((),)),
        (from_facets([["a"]], ["a", "b"]), (("a",),), ((0,),)),
        (from_facets([[2, 1]], [2, 1]), ((2,), (1,), (2, 1)), ((0, 2), (1, 2))),
    ],
)
def test_barycentric_subdivisions_of_small_complexes(k: SimplicialComplex, labels: Any, facets: Any) -> None:
    assert barycentric_subdivision(k) == SimplicialComplex(labels, facets)


def test_the_subdivided_triangle() -> None:
    k = barycentric_subdivision(build("simplex", m=3))
    assert k.f_vector() == (1, 7, 12, 6)
    assert k.is_face([(2,), (1, 2), (1, 2, 3)])
    assert not k.is_face([(1, 2), (2, 3)])


@given(complexes(5))
def test_faces_of_a_subdivision_are_counted_by_stirling_numbers(k: SimplicialComplex) -> None:
    """f_j = sum of f_i (j + 1)! S(i + 1, j + 1): a chain that ends in a face is an ordered partition of it."""
    f = k.f_vector()
    expected = [sum(f[s] * factorial(t) * stirling(s, t) for s in range(len(f))) for t in range(len(f))]
    assert barycentric_subdivision(k).f_vector() == tuple(expected)


@given(complexes(4))
def test_a_subdivision_has_the_homology_of_the_complex(k: SimplicialComplex) -> None:
    subdivided = barycentric_subdivision(k)
    assert reduced_homology(subdivided) == reduced_homology(k)
    assert subdivided.euler_characteristic() == k.euler_characteristic()


@given(complexes(4))
def test_a_subdivision_is_the_clique_complex_of_inclusion(k: SimplicialComplex) -> None:
    faces = [tuple(k.labels[vertex] for vertex in face_of(mask)) for mask in k.face_masks()[1:]]
    inclusions: nx.Graph[Any] = nx.Graph()
    inclusions.add_nodes_from(faces)
    inclusions.add_edges_from(pair for pair in combinations(faces, 2) if set(pair[0]) < set(pair[1]))
    assert barycentric_subdivision(k) == clique_complex(inclusions)


# -- stellar ----------------------------------------------------------------------------------


def test_the_new_vertex_comes_last_and_is_called_after_the_face() -> None:
    k = from_facets([["b", "a", "c"]], ["c", "b", "a", "g"])
    assert stellar_subdivision(k, ["a", "b"]).labels == ("c", "b", "a", "g", ("b", "a"))
    assert stellar_subdivision(k, ["a", "b"], "new").labels == ("c", "b", "a", "g", "new")


def test_the_cube_with_a_vertex_cut_off() -> None:
    """The facets are written out by hand: the triangle 0 2 4 gives way to three that meet in vertex 6."""
    assert stellar_subdivision(OCTAHEDRON, [4, 0, 2], 6) == from_facets(
        [[1, 2, 4], [0, 3, 4], [1, 3, 4], [0, 2, 5], [1, 2, 5], [0, 3, 5], [1, 3, 5], [0, 2, 6], [0, 4, 6], [2, 4, 6]]
    )


def test_the_cube_with_an_edge_cut_off_is_a_prism_over_a_pentagon() -> None:
    """Its dual is the suspension of the pentagon 0 6 2 1 3 with apices 4 and 5."""
    pentagon = from_facets([[0, 6], [6, 2], [2, 1], [1, 3], [3, 0]], [0, 1, 2, 3, 6])
    suspension = join(pentagon, from_facets([[4], [5]]))
    assert face_sets(stellar_subdivision(OCTAHEDRON, [0, 2], 6)) == face_sets(suspension)


@given(complexes_with_large_face())
def test_stellar_subdivisions_by_the_definition(drawn: tuple[SimplicialComplex, list[Label]]) -> None:
    k, labels = drawn
    face, faces = frozenset(labels), face_sets(k)
    parts = [frozenset(part) for size in range(len(face)) for part in combinations(labels, size)]
    around = face_sets(link(k, labels))
    cones = {frozenset({"new"}) | part | other for part, other in product(parts, around)}
    found = stellar_subdivision(k, labels, "new")
    assert face_sets(found) == {other for other in faces if not face <= other} | cones
    assert found.labels == (*k.labels, "new")


@given(complexes_with_large_face())
def test_a_stellar_subdivision_changes_neither_homology_nor_euler_characteristic(
    drawn: tuple[SimplicialComplex, list[Label]],
) -> None:
    k, labels = drawn
    found = stellar_subdivision(k, labels)
    assert reduced_homology(found) == reduced_homology(k)
    assert found.euler_characteristic() == k.euler_characteristic()


@given(complexes_with_large_face())
def test_the_link_of_the_new_vertex(drawn: tuple[SimplicialComplex, list[Label]]) -> None:
    k, labels = drawn
    boundary = SimplicialComplex.from_facets([set(labels) - {label} for label in labels], labels)
    expected = join(boundary, link(k, labels))
    found = link(stellar_subdivision(k, labels, "new"), ["new"])
    assert face_sets(found) == face_sets(expected)
    assert set(found.ghosts()) == set(k.labels) - {label for facet in face_sets(expected) for label in facet}


@given(complexes_with_large_face())
def test_without_the_new_vertex_only_faces_around_the_face_are_gone(
    drawn: tuple[SimplicialComplex, list[Label]],
) -> None:
    k, labels = drawn
    rest = deletion(stellar_subdivision(k, labels, "new"), ["new"])
    assert {face for face in face_sets(k) if not set(labels) <= face} == face_sets(rest)
    assert rest.labels == k.labels


@pytest.mark.parametrize(
    ("labels", "vertex", "message"),
    [
        ([], None, "face: expected two or more vertices that form a face, found no vertex"),
        ([1], None, "face: expected two or more vertices that form a face, found 1"),
        ([1, 3], None, "face: expected two or more vertices that form a face, found 1 3"),
        ([1, 7], None, "labels: expected vertices of the complex, found vertex 7, which is none"),
        ([1, 1], None, "labels: expected each vertex once, found vertex 1 twice"),
        ([1, 2], 3, "vertex: expected a label for the new vertex, found 3, which is in use"),
        ([1, 2], True, "vertex: expected numbers or names as labels, found True"),
        ([1, 2], [9], "vertex: expected numbers or names as labels, found [9]"),
    ],
)
def test_where_there_is_no_stellar_subdivision(labels: Any, vertex: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        stellar_subdivision(from_facets([[1, 2], [2, 3]]), labels, vertex)
    assert str(caught.value) == message


def test_the_name_of_the_face_may_be_in_use() -> None:
    k = from_facets([[1, 2], [(1, 2), 1]])
    with pytest.raises(BadInput, match=r"vertex: expected a label for the new vertex, found \(1, 2\), which is in use"):
        stellar_subdivision(k, [1, 2])
