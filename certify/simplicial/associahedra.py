"""Nested set complexes of graphs: the boundaries of the duals of graph associahedra."""

from __future__ import annotations

from collections.abc import Sequence
from functools import cache
from itertools import chain, product
from typing import Any

import networkx as nx

from certify.errors import BadInput
from certify.simplicial.arguments import check_whole_number
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.families import simplex_boundary
from certify.simplicial.graphs import check_graph
from certify.simplicial.masks import face_of, mask_of
from certify.simplicial.subdivisions import barycentric_subdivision

__all__ = [
    "associahedron_dual",
    "cyclohedron_dual",
    "nested_set_complex",
    "permutohedron_dual",
    "stellohedron_dual",
]


def nested_set_complex(graph: nx.Graph[Any]) -> SimplicialComplex:
    """Return the nested set complex of a connected graph: the boundary of the dual of its graph associahedron.

    Parameters
    ----------
    graph : networkx.Graph
        Connected, with at least one node.

    Returns
    -------
    SimplicialComplex
        The vertices are the *tubes*: the sets of nodes, neither empty nor everything, that induce a connected
        subgraph. The label of a tube is the tuple of its nodes in the order of the graph; tubes come by size, and
        then by mask, as faces do. Tubes form a face when any two of them are nested, or are disjoint with no edge
        between them.

    Raises
    ------
    BadInput
        If the graph is not connected, has no node, is directed, or has a loop.

    Notes
    -----
    With n + 1 nodes it is a flag triangulation of the sphere of dimension n - 1. A facet is made in just one way:
    choose a node, take the components of what is left without it as tubes, and go on within each of them. The cost is
    the sum of the sizes of all facets, of which a complete graph has (n + 1)!.

    References
    ----------
    M. Carr and S. Devadoss, Coxeter complexes and graph-associahedra, Topology and its Applications 153 (2006).
    A. Postnikov, Permutohedra, associahedra, and beyond, International Mathematics Research Notices (2009), section 7
    (both from memory).

    Examples
    --------
    >>> import networkx as nx
    >>> k = nested_set_complex(nx.path_graph([1, 2, 3]))
    >>> k.labels
    ((1,), (2,), (3,), (1, 2), (2, 3))
    >>> k.f_vector()
    (1, 5, 5)
    """
    check_graph(graph)
    nodes = tuple(graph)
    number = {node: i for i, node in enumerate(nodes)}
    neighbours = [mask_of(number[other] for other in graph[node]) for node in nodes]
    everything = (1 << len(nodes)) - 1
    pieces = len(_components(everything, neighbours))
    if pieces != 1:
        found = f"one with {pieces} components" if pieces else "one without nodes"
        raise BadInput(where="graph", expected="a connected graph", found=found)
    facets = _maximal_nested_sets(everything, neighbours)
    tubes = sorted(set(chain.from_iterable(facets)), key=lambda tube: (tube.bit_count(), tube))
    place = {tube: i for i, tube in enumerate(tubes)}
    labels = [tuple(nodes[i] for i in face_of(tube)) for tube in tubes]
    return SimplicialComplex.from_faces(labels, [[place[tube] for tube in facet] for facet in facets])


def associahedron_dual(n: int) -> SimplicialComplex:
    """Return the boundary of the dual of the associahedron of dimension n >= 1: nested sets of a path.

    Parameters
    ----------
    n : int
        The nodes of the path are 1, ..., n + 1 in order; labels as in `nested_set_complex`.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 1.

    Examples
    --------
    >>> associahedron_dual(3).f_vector()
    (1, 9, 21, 14)
    """
    check_whole_number("argument n", n, least=1)
    return nested_set_complex(nx.path_graph(range(1, n + 2)))


def cyclohedron_dual(n: int) -> SimplicialComplex:
    """Return the boundary of the dual of the cyclohedron of dimension n >= 2: nested sets of a cycle.

    Parameters
    ----------
    n : int
        The nodes of the cycle are 1, ..., n + 1 in order; labels as in `nested_set_complex`.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 2.

    Examples
    --------
    >>> cyclohedron_dual(3).f_vector()
    (1, 12, 30, 20)
    """
    check_whole_number("argument n", n, least=2)
    return nested_set_complex(nx.cycle_graph(range(1, n + 2)))


def stellohedron_dual(n: int) -> SimplicialComplex:
    """Return the boundary of the dual of the stellohedron of dimension n >= 1: nested sets of a star.

    Parameters
    ----------
    n : int
        The centre of the star is 1, its leaves are 2, ..., n + 1; labels as in `nested_set_complex`.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 1.

    Examples
    --------
    >>> stellohedron_dual(3).f_vector()
    (1, 10, 24, 16)
    """
    check_whole_number("argument n", n, least=1)
    return nested_set_complex(nx.star_graph(range(1, n + 2)))


def permutohedron_dual(n: int) -> SimplicialComplex:
    """Return the boundary of the dual of the permutohedron of dimension n >= 1.

    Parameters
    ----------
    n : int
        The vertices are the subsets of {1, ..., n + 1} other than the empty and the full one, by size; the label of
        a subset is its tuple. Faces are chains of subsets.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 1.

    Notes
    -----
    It is the barycentric subdivision of the boundary of a simplex, and the nested set complex of a complete graph.

    Examples
    --------
    >>> permutohedron_dual(3).f_vector()
    (1, 14, 36, 24)
    """
    check_whole_number("argument n", n, least=1)
    return barycentric_subdivision(simplex_boundary(n + 1))


def _maximal_nested_sets(everything: int, neighbours: Sequence[int]) -> list[tuple[int, ...]]:
    """Return the maximal sets of nested tubes of a connected graph; tubes are masks of nodes."""

    @cache
    def inside(tube: int) -> list[tuple[int, ...]]:
        found = []
        for node in face_of(tube):
            parts = _components(tube & ~(1 << node), neighbours)
            choices = [[(part, *rest) for rest in inside(part)] for part in parts]
            found += [tuple(chain.from_iterable(choice)) for choice in product(*choices)]
        return found

    return inside(everything)


def _components(nodes: int, neighbours: Sequence[int]) -> list[int]:
    """Return the components of the subgraph on a set of nodes, as masks."""
    found = []
    while nodes:
        part, waiting = 0, nodes & -nodes
        while waiting:
            part |= waiting
            around = 0
            for node in face_of(waiting):
                around |= neighbours[node]
            waiting = around & nodes & ~part
        found.append(part)
        nodes &= ~part
    return found
