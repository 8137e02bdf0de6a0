"""Complexes as objects of SymPy and NetworkX; the way back is in `from_monomials` and `clique_complex`."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

import networkx as nx

from certify.simplicial import Face, Label, SimplicialComplex

if TYPE_CHECKING:
    import sympy

__all__ = ["face_ideal", "face_poset", "one_skeleton", "variables"]


def one_skeleton(k: SimplicialComplex) -> nx.Graph[Any]:
    """Return the graph of the vertices and edges of K; its nodes are labels.

    Notes
    -----
    A ghost vertex is no face, and so no node. K is the clique complex of this graph exactly when it has no ghosts and
    its missing faces have two vertices.

    Examples
    --------
    >>> from certify import clique_complex, polygon
    >>> clique_complex(one_skeleton(polygon(5))) == polygon(5)
    True
    """
    graph: nx.Graph[Any] = nx.Graph()
    graph.add_nodes_from(k.labels[vertex] for (vertex,) in k.faces(1))
    graph.add_edges_from((k.labels[a], k.labels[b]) for a, b in k.faces(2))
    return graph


def face_poset(k: SimplicialComplex) -> nx.DiGraph[Any]:
    """Return the Hasse diagram of the faces of K under inclusion, the empty face included.

    Returns
    -------
    networkx.DiGraph
        Its nodes are faces as tuples of labels in the order of K; an edge leads from each face to the faces with one
        vertex more that contain it.

    Notes
    -----
    The cost is the sum of the sizes of all faces.

    Examples
    --------
    >>> from certify import simplex
    >>> sorted(face_poset(simplex(2)).edges)
    [((), (1,)), ((), (2,)), ((1,), (1, 2)), ((2,), (1, 2))]
    """
    poset: nx.DiGraph[Any] = nx.DiGraph()
    poset.add_node(())
    for size in range(1, k.dimension + 2):
        for face in k.faces(size):
            facets = (face[:place] + face[place + 1 :] for place in range(size))
            poset.add_edges_from((_labels(k, facet), _labels(k, face)) for facet in facets)
    return poset


def variables(k: SimplicialComplex) -> tuple[sympy.Symbol, ...]:
    """Return a SymPy symbol for each vertex, in order: the variables of the face ring.

    Notes
    -----
    Where all labels are names, the symbols have these names; where all are whole numbers from 0 on, they are v and the
    number; otherwise they are v1, …, vm.

    Examples
    --------
    >>> from certify import SimplicialComplex, polygon
    >>> variables(polygon(3)), variables(SimplicialComplex.from_facets([["a", "b"]]))
    ((v1, v2, v3), (a, b))
    """
    import sympy

    return tuple(map(sympy.Symbol, _names(k.labels)))


def face_ideal(k: SimplicialComplex) -> tuple[sympy.Expr, ...]:
    """Return the generators of the Stanley-Reisner ideal: a product of `variables` for each missing face.

    Notes
    -----
    ``from_monomials(face_ideal(k), variables(k))`` is K again, with the names of the variables as labels.

    Examples
    --------
    >>> from certify import from_monomials, polygon
    >>> square = polygon(4)
    >>> face_ideal(square)
    (v1*v3, v2*v4)
    >>> from_monomials(face_ideal(square), variables(square)).facets == square.facets
    True
    """
    import sympy

    symbols = variables(k)
    return tuple(sympy.Mul(*(symbols[vertex] for vertex in face)) for face in k.missing_faces())


def _names(labels: tuple[Label, ...]) -> list[str]:
    """Return a different name for each label."""
    if all(isinstance(label, str) and label.isidentifier() for label in labels):
        return [str(label) for label in labels]
    if all(isinstance(label, int) and label >= 0 for label in labels):
        return [f"v{label}" for label in labels]
    return [f"v{number}" for number in range(1, len(labels) + 1)]


def _labels(k: SimplicialComplex, face: Face) -> tuple[Label, ...]:
    return tuple(k.labels[vertex] for vertex in face)
