from __future__ import annotations

import networkx as nx
import pytest
import sympy
from hypothesis import given

from certify import (
    SimplicialComplex,
    clique_complex,
    face_ideal,
    face_poset,
    from_monomials,
    one_skeleton,
    polygon,
    simplex,
    variables,
)
from tests.strategies import complexes, graphs

GHOST = SimplicialComplex.from_facets([["a", "b"], ["c"]], vertices=["c", "g", "b", "a"])


def test_the_graph_of_a_complex_leaves_ghosts_out() -> None:
    graph = one_skeleton(GHOST)
    assert list(graph) == ["c", "b", "a"]
    assert list(graph.edges) == [("b", "a")]


@given(graphs())
def test_graphs_come_back_from_their_clique_complexes(graph: nx.Graph[int]) -> None:
    found = one_skeleton(clique_complex(graph))
    assert list(found) == list(graph)
    assert set(map(frozenset, found.edges)) == set(map(frozenset, graph.edges))


@given(complexes(max_vertices=5))
def test_the_face_poset_is_inclusion(k: SimplicialComplex) -> None:
    poset = face_poset(k)
    faces = [tuple(k.labels[vertex] for vertex in face) for size in range(k.dimension + 2) for face in k.faces(size)]
    assert set(poset) == set(faces)
    contained = {(a, b) for a in faces for b in faces if set(a) < set(b)}
    assert set(nx.transitive_closure_dag(poset).edges) == contained
    assert nx.transitive_reduction(poset).edges == poset.edges


def test_the_empty_face_is_there() -> None:
    poset = face_poset(SimplicialComplex.from_facets([[]], vertices=[1]))
    assert list(poset) == [()]


@pytest.mark.parametrize(
    ("labels", "names"),
    [
        (["red", "blue"], ["red", "blue"]),
        ([7, 0], ["v7", "v0"]),
        (["red", 1], ["v1", "v2"]),
        (["a b", "c"], ["v1", "v2"]),
        ([-1, 1], ["v1", "v2"]),
        ([(1, 2), (1,)], ["v1", "v2"]),
        ([], []),
    ],
)
def test_variables(labels: list[object], names: list[str]) -> None:
    k = SimplicialComplex.from_facets([labels], vertices=labels)
    assert variables(k) == tuple(map(sympy.Symbol, names))


def test_the_ideal_has_a_generator_for_each_missing_face() -> None:
    a, b, c, g = sympy.symbols("a b c g")
    assert set(face_ideal(GHOST)) == {g, a * c, b * c}
    assert face_ideal(simplex(3)) == ()
    assert face_ideal(polygon(3)) == (sympy.prod(sympy.symbols("v1 v2 v3")),)


@given(complexes())
def test_complexes_come_back_from_their_ideals(k: SimplicialComplex) -> None:
    assert from_monomials(face_ideal(k), variables(k)).relabelled(k.labels) == k
