"""The automorphism group of a complex that respects the pairs at its vertices."""

from __future__ import annotations

from typing import TYPE_CHECKING

from certify.products import PolyhedralProduct
from certify.symmetry.elements import Element

if TYPE_CHECKING:
    import igraph

__all__ = ["Generators", "Permutation", "acting", "automorphism_count", "automorphism_generators"]

Permutation = tuple[int, ...]
"""The images of the vertex numbers 0, 1, …, in order."""

Generators = tuple[Element, ...] | None
"""Generators of a group of symmetries; None for that of all automorphisms of K and the pairs."""


def acting(generators: Generators, product: PolyhedralProduct) -> tuple[Element, ...]:
    """Return the generators, or those that are found for the group of all automorphisms.

    Examples
    --------
    >>> from certify.products import parse_pairs
    >>> from certify.simplicial.families import points
    >>> product = PolyhedralProduct(points(2), parse_pairs("(D1, S0)", 2))
    >>> acting(None, product), acting(((-1, 2),), product)
    (((2, 1),), ((-1, 2),))
    """
    if generators is not None:
        return generators
    return tuple(tuple(to + 1 for to in image) for image in automorphism_generators(product))


def automorphism_generators(product: PolyhedralProduct) -> tuple[Permutation, ...]:
    """Return generators of the group of all permutations of the vertices that preserve K and the pairs.

    Notes
    -----
    These are the colour-preserving automorphisms of the graph of vertices and facets, found by igraph. The group of
    order 1 has no generators.

    Examples
    --------
    >>> from certify.products import parse_pairs
    >>> from certify.simplicial.families import points
    >>> automorphism_generators(PolyhedralProduct(points(2), parse_pairs("(D1, S0)", 2)))
    ((1, 0),)
    """
    graph, colours = _graph(product)
    m = product.complex.vertex_count
    found = graph.automorphism_group(color=colours)
    return tuple(sorted({tuple(image[:m]) for image in found} - {tuple(range(m))}))


def automorphism_count(product: PolyhedralProduct) -> int:
    """Return how many permutations of the vertices preserve K and the pairs.

    Examples
    --------
    >>> from certify.products import parse_pairs
    >>> from certify.simplicial.families import polygon
    >>> automorphism_count(PolyhedralProduct(polygon(6), parse_pairs("(D1, S0)", 6)))
    12
    """
    graph, colours = _graph(product)
    return int(graph.count_automorphisms(color=colours))


def _graph(product: PolyhedralProduct) -> tuple[igraph.Graph, list[int]]:
    """Return the graph of vertices and facets, with a colour for each pair and one for facets."""
    # It loads everything that it could draw with, which takes longer than most claims.
    import igraph

    complex_ = product.complex
    m = complex_.vertex_count
    names = sorted({pair.name for pair in product.pairs})
    colours = [names.index(pair.name) for pair in product.pairs] + [len(names)] * len(complex_.facets)
    edges = [(vertex, m + number) for number, facet in enumerate(complex_.facets) for vertex in facet]
    return igraph.Graph(n=m + len(complex_.facets), edges=edges), colours
