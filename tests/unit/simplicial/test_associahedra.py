from __future__ import annotations

from itertools import combinations
from math import comb, factorial
from typing import Any

import networkx as nx
import pytest
from hypothesis import given

from certify.errors import BadInput
from certify.simplicial import (
    SimplicialComplex,
    build,
    clique_complex,
    is_pseudomanifold,
    join,
    link,
    nested_set_complex,
)
from certify.simplicial.associahedra import (
    associahedron_dual,
    cyclohedron_dual,
    permutohedron_dual,
    stellohedron_dual,
)
from tests.strategies import connected_graphs
from tests.unit.simplicial.oracles import are_isomorphic, face_sets, reduced_homology


def eulerian(n: int) -> list[int]:
    """Return the number of permutations of n things with 0, 1, ..., n - 1 descents."""
    row = [1]
    for size in range(2, n + 1):
        padded = [0, *row, 0]
        row = [(size - k) * padded[k] + (k + 1) * padded[k + 1] for k in range(size)]
    return row


# -- any graph --------------------------------------------------------------------------------


@given(connected_graphs())
def test_nested_sets_by_the_definition(graph: nx.Graph[int]) -> None:
    """Tubes form a face when any two are nested, or neither meet nor have an edge between them."""
    nodes = list(graph)
    subsets = [chosen for size in range(1, len(nodes)) for chosen in combinations(nodes, size)]
    tubes = [chosen for chosen in subsets if nx.is_connected(graph.subgraph(chosen))]
    compatible: nx.Graph[Any] = nx.Graph()
    compatible.add_nodes_from(tubes)
    for one, other in combinations(tubes, 2):
        a, b = set(one), set(other)
        apart = not a & b and not nx.is_connected(graph.subgraph(a | b))
        if a <= b or b <= a or apart:
            compatible.add_edge(one, other)
    found = nested_set_complex(graph)
    expected = clique_complex(compatible)
    assert set(found.labels) == set(expected.labels)
    assert found == SimplicialComplex.from_facets(
        [[expected.labels[v] for v in facet] for facet in expected.facets], found.labels
    )


@given(connected_graphs(4))
def test_nested_set_complexes_are_spheres(graph: nx.Graph[int]) -> None:
    k, n = nested_set_complex(graph), len(graph) - 1
    assert reduced_homology(k) == {n - 1: (1, ())}
    assert n == 0 or is_pseudomanifold(k)
    h = k.h_vector()
    assert h == h[::-1]


def test_the_link_of_a_tube_is_a_join() -> None:
    """In the path 1 2 3 4, the tube 2 3 may hold 2 or 3, and apart from that 2 3 may grow to 1 2 3 or 2 3 4."""
    inside, outside = [[(2,)], [(3,)]], [[(1, 2, 3)], [(2, 3, 4)]]
    # The tubes 1 and 4 would have an edge to 2 3.
    expected = join(SimplicialComplex.from_facets(inside), SimplicialComplex.from_facets(outside))
    assert face_sets(link(associahedron_dual(3), [(2, 3)])) == face_sets(expected)


def test_labels_are_tuples_in_the_order_of_the_graph() -> None:
    k = nested_set_complex(nx.path_graph(["c", "a", "b"]))
    assert k.labels == (("c",), ("a",), ("b",), ("c", "a"), ("a", "b"))
    assert k.is_face([("c",), ("b",)])
    assert not k.is_face([("c",), ("a",)])
    assert nested_set_complex(nx.empty_graph(1)) == SimplicialComplex.from_facets([[]])


@pytest.mark.parametrize(
    ("graph", "message"),
    [
        (nx.Graph(), "graph: expected a connected graph, found one without nodes"),
        (nx.empty_graph(3), "graph: expected a connected graph, found one with 3 components"),
        (nx.DiGraph([(1, 2)]), "graph: expected edges without direction, found a directed graph"),
        (nx.Graph([(1, 2), (2, 2)]), "graph: expected no loop, found one at node 2"),
    ],
)
def test_graphs_without_a_nested_set_complex(graph: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        nested_set_complex(graph)
    assert str(caught.value) == message


# -- four families ----------------------------------------------------------------------------


@pytest.mark.parametrize("n", range(1, 7))
def test_associahedra(n: int) -> None:
    """The h-vector has the Narayana numbers, and Catalan numbers count the facets.

    A. Postnikov, V. Reiner and L. Williams, Faces of generalized permutohedra, Documenta Mathematica 13 (2008),
    section 10.2 (from memory).
    """
    k = associahedron_dual(n)
    assert k.vertex_count == n * (n + 3) // 2
    assert k.h_vector() == tuple(comb(n + 1, i) * comb(n + 1, i + 1) // (n + 1) for i in range(n + 1))
    assert len(k.facets) == comb(2 * n + 2, n + 1) // (n + 2)


@pytest.mark.parametrize("n", range(2, 7))
def test_cyclohedra(n: int) -> None:
    """h_i = C(n, i)^2 (section 10.3 of the same paper, from memory)."""
    k = cyclohedron_dual(n)
    assert k.vertex_count == n * (n + 1)
    assert k.h_vector() == tuple(comb(n, i) ** 2 for i in range(n + 1))
    assert len(k.facets) == comb(2 * n, n)


@pytest.mark.parametrize("n", range(1, 6))
def test_stellohedra(n: int) -> None:
    """The h-polynomial is 1 + t (sum of C(n, k) A_k(t) for k from 1 to n) (section 10.4 there)."""
    k = stellohedron_dual(n)
    assert k.vertex_count == 2**n + n - 1
    rows = {size: eulerian(size) for size in range(1, n + 1)}
    sums = [sum(comb(n, size) * row[i] for size, row in rows.items() if i < size) for i in range(n)]
    assert k.h_vector() == (1, *sums)
    assert len(k.facets) == sum(factorial(n) // factorial(size) for size in range(n + 1))


@pytest.mark.parametrize("n", range(1, 6))
def test_permutohedra(n: int) -> None:
    """h_i is the number of permutations of n + 1 things with i descents (Stanley, Enumerative Combinatorics 1)."""
    k = permutohedron_dual(n)
    assert k.vertex_count == 2 ** (n + 1) - 2
    assert k.h_vector() == tuple(eulerian(n + 1))
    assert len(k.facets) == factorial(n + 1)


@pytest.mark.parametrize("n", range(1, 5))
def test_the_permutohedron_belongs_to_a_complete_graph(n: int) -> None:
    nodes = range(1, n + 2)
    assert nested_set_complex(nx.complete_graph(nodes)) == permutohedron_dual(n)


@pytest.mark.parametrize(
    ("k", "vertices", "missing_edges"),
    [
        (associahedron_dual(3), 9, 15),
        (cyclohedron_dual(3), 12, 36),
        (stellohedron_dual(3), 10, 21),
        (permutohedron_dual(3), 14, 55),
    ],
)
def test_published_counts_in_dimension_three(k: SimplicialComplex, vertices: int, missing_edges: int) -> None:
    """The rank of H_3 of (D^2, S^1)^K counts missing edges; 15 for the associahedron: Toric Topology (from memory)."""
    assert k.vertex_count == vertices
    assert [len(face) for face in k.missing_faces()] == [2] * missing_edges


@pytest.mark.parametrize("k", [associahedron_dual(2), stellohedron_dual(2)])
def test_a_path_with_three_nodes_is_a_star(k: SimplicialComplex) -> None:
    assert are_isomorphic(k, build("polygon", n=5))
