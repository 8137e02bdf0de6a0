from __future__ import annotations

from itertools import combinations
from pathlib import Path
from typing import Any

import networkx as nx
import pytest
from hypothesis import given
from hypothesis import strategies as st

from certify.errors import BadInput
from certify.simplicial import (
    Label,
    SimplicialComplex,
    build,
    clique_complex,
    full_subcomplex,
    graph_from_edges,
    independence_complex,
    read_edges,
    read_graph6,
    read_graph_file,
)
from tests.strategies import graphs
from tests.unit.simplicial.oracles import face_sets

PAW: list[list[Label]] = [[1, 2], [2, 3], [1, 3], [3, 4]]


# -- complexes --------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("graph", "clique", "independence"),
    [
        (nx.Graph(), "0 vertices, facets ∅", "0 vertices, facets ∅"),
        (nx.empty_graph(["a", "b"]), "2 vertices, facets a b", "2 vertices, facets ab"),
        (graph_from_edges(PAW), "4 vertices, facets 123 34", "4 vertices, facets 14 24 3"),
        (nx.cycle_graph(range(1, 6)), "5 vertices, facets 12 15 23 34 45", "5 vertices, facets 13 14 24 25 35"),
        (nx.MultiGraph([(1, 2), (1, 2)]), "2 vertices, facets 12", "2 vertices, facets 1 2"),
    ],
)
def test_complexes_of_small_graphs(graph: Any, clique: str, independence: str) -> None:
    assert str(clique_complex(graph)) == clique
    assert str(independence_complex(graph)) == independence


@given(graphs())
def test_faces_are_cliques_and_independent_sets(graph: nx.Graph[int]) -> None:
    nodes = list(graph)
    subsets = [set(chosen) for size in range(len(nodes) + 1) for chosen in combinations(nodes, size)]
    edges_in = {frozenset(chosen): graph.subgraph(chosen).number_of_edges() for chosen in subsets}
    clique, independence = clique_complex(graph), independence_complex(graph)
    assert clique.labels == independence.labels == tuple(nodes)
    assert face_sets(clique) == {s for s, count in edges_in.items() if count == len(s) * (len(s) - 1) // 2}
    assert face_sets(independence) == {s for s, count in edges_in.items() if count == 0}


@given(graphs())
def test_clique_complexes_are_flag(graph: nx.Graph[int]) -> None:
    """The missing faces of the clique complex are the pairs without an edge, of the independence complex the edges."""
    pairs = {frozenset(pair) for pair in combinations(graph, 2)}
    edges = {frozenset(edge) for edge in graph.edges}
    for k, expected in ((clique_complex(graph), pairs - edges), (independence_complex(graph), edges)):
        assert {frozenset(k.labels[v] for v in face) for face in k.missing_faces()} == expected


@given(graphs(), st.data())
def test_a_full_subcomplex_belongs_to_an_induced_subgraph(graph: nx.Graph[int], data: st.DataObject) -> None:
    chosen = data.draw(st.sets(st.sampled_from(list(graph)))) if graph else set()
    part = full_subcomplex(clique_complex(graph), chosen)
    assert face_sets(part) == face_sets(clique_complex(graph.subgraph(chosen)))


@pytest.mark.parametrize("make", [clique_complex, independence_complex])
@pytest.mark.parametrize(
    ("graph", "message"),
    [
        (nx.DiGraph([(1, 2)]), "expected edges without direction, found a directed graph"),
        (nx.Graph([(1, 2), ("a", "a")]), "expected no loop, found one at node 'a'"),
        (nx.empty_graph([2, True]), "expected numbers or names as labels, found True"),
    ],
)
def test_graphs_that_have_no_such_complex(make: Any, graph: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        make(graph)
    assert str(caught.value).partition(": ")[2] == message


# -- edges ------------------------------------------------------------------------------------


def test_nodes_come_in_their_natural_order_or_as_they_are_listed() -> None:
    assert list(graph_from_edges([[10, 2], [2, 9]])) == [2, 9, 10]
    assert list(graph_from_edges([["b", 1]])) == ["b", 1]
    graph = graph_from_edges([[1, 2], [2, 1]], vertices=[3, 2, 1])
    assert list(graph) == [3, 2, 1]
    assert graph.number_of_edges() == 1
    assert list(graph_from_edges([])) == []


@pytest.mark.parametrize(
    ("edges", "vertices", "message"),
    [
        ([[1, 2], [3]], None, "edge 2: expected two vertices, found 1"),
        ([[1, 2, 3]], None, "edge 1: expected two vertices, found 3"),
        ([[1, 1]], None, "edge 1: expected each vertex once, found vertex 1 twice"),
        (["12"], None, "edge 1: expected a list, found '12'"),
        ("1 2", None, "edges: expected a list, found '1 2'"),
        ([[1, 2], [2, 3]], [1, 2], "edge 2: expected vertices of the complex, found vertex 3, which is none"),
        ([[1, 2]], [1, 2, 1], "vertices: expected each vertex once, found vertex 1 twice"),
    ],
)
def test_edges_that_are_none(edges: Any, vertices: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        graph_from_edges(edges, vertices)
    assert str(caught.value) == message


@pytest.mark.parametrize(
    ("text", "nodes", "edges"),
    [
        ("", [], []),
        ("# nothing\n\n;", [], []),
        ("2 3; 1,2 # a comment; 8 9\n4", [1, 2, 3, 4], [(2, 3), (1, 2)]),
        ("b a\r\nc", ["a", "b", "c"], [("a", "b")]),
        ("1 2 {}\n2 3 {'weight': 3.5, 'colour': 'red'}", [1, 2, 3], [(1, 2), (2, 3)]),
    ],
)
def test_edges_in_plain_text(text: str, nodes: list[Any], edges: list[Any]) -> None:
    graph = read_edges(text)
    assert list(graph) == nodes
    assert nx.utils.edges_equal(graph.edges, edges)


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("1 2\n1 2 3", "line 2, edge 2: expected two vertices, or one that is isolated, found '1 2 3'"),
        ("1 2; 3 3", "line 1, edge 2: expected each vertex once, found vertex 3 twice"),
        ("{}", "line 1, edge 1: expected two vertices, or one that is isolated, found '{}'"),
        ("1 {2", "line 1, edge 1: expected labels without brackets, as in 1 2; 2 3, found {2"),
        ("(1, 2)", "line 1, edge 1: expected labels without brackets, as in 1 2; 2 3, found (1"),
    ],
)
def test_faults_in_lists_of_edges_are_named(text: str, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        read_edges(text)
    assert str(caught.value) == message


@given(graphs())
def test_what_networkx_writes_is_read(graph: nx.Graph[int]) -> None:
    isolated = [str(node) for node in nx.isolates(graph)]
    for data in (True, False):
        read = read_edges("\n".join([*nx.generate_edgelist(graph, data=data), *isolated]))
        assert list(read) == sorted(graph)
        assert nx.utils.edges_equal(read.edges, graph.edges)


# -- graph6 -----------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("text", "nodes", "edges"),
    [
        ("?", [], []),
        ("@", [1], []),
        ("A_", [1, 2], [(1, 2)]),
        (" >>graph6<<Bw\n", [1, 2, 3], [(1, 2), (1, 3), (2, 3)]),
        # The example of the format's description: 5 nodes, the edges 02, 04, 13 and 34 when counted from 0.
        ("DQc", [1, 2, 3, 4, 5], [(1, 3), (1, 5), (2, 4), (4, 5)]),
    ],
)
def test_graph6(text: str, nodes: list[int], edges: list[tuple[int, int]]) -> None:
    graph = read_graph6(text)
    assert list(graph) == nodes
    assert nx.utils.edges_equal(graph.edges, edges)


@given(graphs(9))
def test_graph6_both_ways(graph: nx.Graph[int]) -> None:
    read = read_graph6(nx.to_graph6_bytes(graph).decode("ascii"))
    number = {node: i for i, node in enumerate(graph, start=1)}
    assert list(read) == list(number.values())
    assert nx.utils.edges_equal(read.edges, [(number[a], number[b]) for a, b in graph.edges])


def test_graph6_with_more_than_62_nodes() -> None:
    text = nx.to_graph6_bytes(nx.cycle_graph(70)).decode("ascii")
    assert clique_complex(read_graph6(text)) == build("polygon", n=70)


@pytest.mark.parametrize(
    ("text", "found"),
    [
        ("", "an empty text"),
        (">>graph6<<", "an empty text"),
        ("D", "'D', which has the wrong length"),
        ("Dhc?", "'Dhc?', which has the wrong length"),
        ("~", "'~', which has the wrong length"),
        ("~~~", "'~~~', which has the wrong length"),
        ("Dh c", "the character ' ', which is not used"),
        ("Dhc\nDhc", r"the character '\n', which is not used"),
        ("Dhé", "the character 'é', which is not used"),
        ("D\x01c", r"the character '\x01', which is not used"),
        (":Fa@x^", "the character ':', which is not used"),
    ],
)
def test_what_is_no_graph6(text: str, found: str) -> None:
    with pytest.raises(BadInput) as caught:
        read_graph6(text)
    assert str(caught.value) == f"graph6: expected a graph6 string, found {found}"


# -- files ------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("name", "text"), [("k.g6", "Dhc\n"), ("K.EDGES", "1 2\n2 3\n3 4\n4 5\n1 5"), ("k.txt", "1 2;2 3;3 4;4 5;5 1")]
)
def test_files_are_read_by_their_ending(tmp_path: Path, name: str, text: str) -> None:
    (tmp_path / name).write_text(text, encoding="utf-8")
    assert clique_complex(read_graph_file(tmp_path / name)) == build("polygon", n=5)


def test_a_file_that_networkx_wrote(tmp_path: Path) -> None:
    path = tmp_path / "ring.edgelist"
    nx.write_edgelist(nx.cycle_graph(range(1, 6)), path)
    assert clique_complex(read_graph_file(str(path))) == build("polygon", n=5)


@pytest.mark.parametrize(
    ("name", "text", "message"),
    [
        ("k.g6", "Dh", ", graph6: expected a graph6 string, found 'Dh', which has the wrong length"),
        ("k.edges", "1 2\n3 3", ", line 2, edge 2: expected each vertex once, found vertex 3 twice"),
        ("k.json", "[]", ": expected a file name ending in .g6, .txt, .edges or .edgelist, found another ending"),
    ],
)
def test_faults_in_files_begin_with_the_path(tmp_path: Path, name: str, text: str, message: str) -> None:
    path = tmp_path / name
    path.write_text(text, encoding="utf-8")
    with pytest.raises(BadInput) as caught:
        read_graph_file(path)
    assert str(caught.value) == f"{path}{message}"


def test_a_complex_has_the_order_of_its_graph() -> None:
    graph = graph_from_edges([["b", "a"]], vertices=["c", "b", "a"])
    assert clique_complex(graph) == SimplicialComplex.from_facets([["a", "b"], ["c"]], ["c", "b", "a"])
