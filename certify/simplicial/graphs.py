"""Complexes of graphs, and graphs as people write them down; NetworkX does the work with graphs."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable, Mapping
from itertools import chain
from pathlib import Path
from types import MappingProxyType
from typing import Any

import networkx as nx

from certify.errors import BadInput
from certify.simplicial.arguments import Label, check_known, distinct_labels, items, natural_order
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.inputs import label_of, pieces_of, read_by_ending

__all__ = [
    "GRAPH_ENDINGS",
    "check_graph",
    "clique_complex",
    "graph_from_edges",
    "independence_complex",
    "read_edges",
    "read_graph6",
    "read_graph_file",
]

GRAPH_ENDINGS = (".g6", ".edges", ".edgelist")
"""Endings of the names of files that cannot hold anything but a graph."""

_HEADER = ">>graph6<<"

# What NetworkX writes behind an edge.
_DATA = re.compile(r"\{[^{}]*\}\s*$")


def clique_complex(graph: nx.Graph[Any]) -> SimplicialComplex:
    """Return the sets of nodes of which every two are joined by an edge.

    Parameters
    ----------
    graph : networkx.Graph
        Its nodes become the vertices, in the order of the graph.

    Raises
    ------
    BadInput
        If the graph is directed or has a loop, or a node is a truth value.

    Notes
    -----
    These are the flag complexes: those whose missing faces have two vertices. The missing faces are the pairs of nodes
    that no edge joins. The cost is exponential in the number of nodes in the worst case, where the number of facets is.

    References
    ----------
    J. Jonsson, Simplicial Complexes of Graphs, Springer 2008, chapter 1 (from memory).

    Examples
    --------
    >>> import networkx as nx
    >>> print(clique_complex(nx.Graph([(1, 2), (2, 3), (1, 3), (3, 4)])))
    4 vertices, facets 123 34
    """
    check_graph(graph)
    return SimplicialComplex.from_facets([[], *nx.find_cliques(graph)], vertices=graph)


def independence_complex(graph: nx.Graph[Any]) -> SimplicialComplex:
    """Return the sets of nodes of which no two are joined by an edge.

    Parameters
    ----------
    graph : networkx.Graph
        Its nodes become the vertices, in the order of the graph.

    Raises
    ------
    BadInput
        If the graph is directed or has a loop, or a node is a truth value.

    Notes
    -----
    It is the clique complex of the complement; its missing faces are the edges, so its face ring is given by the edge
    ideal of the graph.

    References
    ----------
    J. Jonsson, Simplicial Complexes of Graphs, Springer 2008, chapter 1 (from memory).

    Examples
    --------
    >>> import networkx as nx
    >>> print(independence_complex(nx.Graph([(1, 2), (2, 3), (1, 3), (3, 4)])))
    4 vertices, facets 14 24 3
    """
    check_graph(graph)
    return clique_complex(nx.complement(nx.Graph(graph)))


def check_graph(graph: nx.Graph[Any]) -> None:
    """Refuse a graph that is directed or has a loop.

    Raises
    ------
    BadInput
        If it is one of these.
    """
    if graph.is_directed():
        raise BadInput(where="graph", expected="edges without direction", found="a directed graph")
    for node in graph:
        if graph.has_edge(node, node):
            raise BadInput(where="graph", expected="no loop", found=f"one at node {node!r}")


def graph_from_edges(edges: Iterable[Iterable[Label]], vertices: Iterable[Label] | None = None) -> nx.Graph[Any]:
    """Return the graph with the given edges.

    Parameters
    ----------
    edges : iterable of pairs of labels
        Perhaps none; an edge that is given twice counts once.
    vertices : iterable of labels, optional
        All nodes in the order wanted, isolated ones included. Without it the nodes are the labels used: sorted when
        all are whole numbers or all are strings, otherwise in order of first appearance.

    Raises
    ------
    BadInput
        If an edge has other than two different labels, or one that is not in `vertices`.

    Examples
    --------
    >>> graph_from_edges([[2, 3], [1, 2]]).nodes
    NodeView((1, 2, 3))
    >>> graph_from_edges([[1, 2, 3]])
    Traceback (most recent call last):
    certify.errors.BadInput: edge 1: expected two vertices, found 3
    """
    pairs = [distinct_labels(edge, f"edge {number}") for number, edge in enumerate(items(edges, "edges"), start=1)]
    for number, pair in enumerate(pairs, start=1):
        if len(pair) != 2:
            raise BadInput(where=f"edge {number}", expected="two vertices", found=str(len(pair)))
    nodes = natural_order(chain.from_iterable(pairs)) if vertices is None else distinct_labels(vertices, "vertices")
    known = set(nodes)
    for number, pair in enumerate(pairs, start=1):
        check_known(pair, known, f"edge {number}")
    return _graph(nodes, pairs)


def read_graph6(text: str) -> nx.Graph[Any]:
    """Return the graph that a graph6 string stands for.

    Parameters
    ----------
    text : str
        One graph; the header ``>>graph6<<`` and white space around it are allowed.

    Returns
    -------
    networkx.Graph
        Its nodes are numbered 1, 2, ..., as vertices are in this project; the format itself counts from 0.

    Raises
    ------
    BadInput
        If it is no graph6 string.

    References
    ----------
    B. D. McKay, Description of graph6, sparse6 and digraph6 encodings (from memory).

    Examples
    --------
    >>> read_graph6("Dhc").edges
    EdgeView([(1, 2), (1, 5), (2, 3), (3, 4), (4, 5)])
    """
    word = text.strip().removeprefix(_HEADER)
    strange = next((letter for letter in word if not 63 <= ord(letter) <= 126), None)
    if strange is not None:
        raise BadInput(
            where="graph6", expected="a graph6 string", found=f"the character {strange!r}, which is not used"
        )
    try:
        graph = nx.from_graph6_bytes(word.encode("ascii"))
    # An IndexError comes from a string that ends before the number of nodes does.
    except (nx.NetworkXError, IndexError) as fault:
        found = f"{text.strip()!r}, which has the wrong length" if word else "an empty text"
        raise BadInput(where="graph6", expected="a graph6 string", found=found) from fault
    return nx.relabel_nodes(graph, {node: node + 1 for node in graph})


def read_edges(text: str) -> nx.Graph[Any]:
    """Return the graph whose edges are written in plain text.

    Parameters
    ----------
    text : str
        Edges, separated by semicolons or line ends, each with two labels that are separated by blanks or a comma;
        a label alone is an isolated node. Labels and comments are as in `read_facets`. What NetworkX writes behind an
        edge, as in ``1 2 {'weight': 3}``, is passed over.

    Raises
    ------
    BadInput
        If an edge has more than two labels or the same one twice, or a label has a bracket or brace in it.

    Examples
    --------
    >>> read_edges("2 3; 1 2; 4").nodes
    NodeView((1, 2, 3, 4))
    """
    pairs: list[tuple[Label, ...]] = []
    for where, piece in pieces_of(text, "edge"):
        tokens = _DATA.sub("", piece).replace(",", " ").split()
        pair = distinct_labels([label_of(token, where) for token in tokens], where)
        if not 0 < len(pair) <= 2:
            raise BadInput(where=where, expected="two vertices, or one that is isolated", found=repr(piece.strip()))
        pairs.append(pair)
    return _graph(natural_order(chain.from_iterable(pairs)), [pair for pair in pairs if len(pair) == 2])


def read_graph_file(path: str | Path) -> nx.Graph[Any]:
    """Return the graph in a file, which is read by the ending of its name.

    Parameters
    ----------
    path : str or Path
        A UTF-8 file: ``.g6`` with one graph as `read_graph6` reads it; ``.txt``, ``.edges`` or ``.edgelist`` as
        `read_edges` reads it.

    Raises
    ------
    BadInput
        If the file cannot be read, its name has another ending, or what it holds is no graph; the message starts with
        the path.
    """
    return read_by_ending(path, _READERS)


def _graph(nodes: Iterable[Label], edges: Iterable[tuple[Label, ...]]) -> nx.Graph[Any]:
    graph: nx.Graph[Any] = nx.Graph()
    graph.add_nodes_from(nodes)
    graph.add_edges_from((a, b) for a, b in edges)
    return graph


_READERS: Mapping[str, Callable[[str], nx.Graph[Any]]] = MappingProxyType(
    {".g6": read_graph6, ".txt": read_edges, ".edges": read_edges, ".edgelist": read_edges}
)
