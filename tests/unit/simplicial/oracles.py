"""Faces, isomorphy, homology and fundamental groups of small complexes, by textbook methods and general libraries."""

from __future__ import annotations

from collections.abc import Iterable

import networkx as nx
from flint import fmpz_mat
from sympy.combinatorics.fp_groups import FpGroup
from sympy.combinatorics.free_groups import free_group

from certify.simplicial import Face, Label, SimplicialComplex, face_of

Groups = dict[int, tuple[int, tuple[int, ...]]]
"""For each degree in which the group is not zero: its rank and its invariant factors."""

Word = tuple[int, ...]
"""A product of generators: g stands for generator number g >= 1, and -g for its inverse."""


def face_sets(k: SimplicialComplex) -> set[frozenset[Label]]:
    """Return the faces as sets of labels."""
    return {frozenset(k.labels[vertex] for vertex in face_of(mask)) for mask in k.face_masks()}


def renumbered(k: SimplicialComplex) -> SimplicialComplex:
    """Return the complex with its vertices labelled 0, 1, ... in order."""
    return k.relabelled(range(k.vertex_count))


def are_isomorphic(k: SimplicialComplex, other: SimplicialComplex) -> bool:
    """Tell whether a bijection of the vertices carries facets to facets: an isomorphism of graphs, in two colours."""
    return nx.is_isomorphic(_incidence(k), _incidence(other), node_match=lambda a, b: bool(a == b))


def _incidence(k: SimplicialComplex) -> nx.Graph[tuple[str, int]]:
    graph: nx.Graph[tuple[str, int]] = nx.Graph()
    graph.add_nodes_from((("vertex", vertex) for vertex in range(k.vertex_count)), kind="vertex")
    for number, facet in enumerate(k.facets):
        graph.add_node(("facet", number), kind="facet")
        graph.add_edges_from((("vertex", vertex), ("facet", number)) for vertex in facet)
    return graph


def reduced_homology(k: SimplicialComplex) -> Groups:
    """Return the reduced integral homology, from the Smith forms of the augmented simplicial chain complex."""
    factors = [_invariant_factors(k, size) for size in range(k.dimension + 3)]
    groups: Groups = {}
    for size, count in enumerate(k.f_vector()):
        rank = count - len(factors[size]) - len(factors[size + 1])
        torsion = tuple(factor for factor in factors[size + 1] if factor > 1)
        if rank or torsion:
            groups[size - 1] = (rank, torsion)
    return groups


def _invariant_factors(k: SimplicialComplex, size: int) -> list[int]:
    """Return the non-zero invariant factors of the boundary of the faces with `size` vertices."""
    rows = {face: number for number, face in enumerate(k.faces(size - 1))}
    columns = k.faces(size)
    if not rows or not columns:
        return []
    matrix = fmpz_mat(len(rows), len(columns))
    for column, face in enumerate(columns):
        for place in range(size):
            matrix[rows[face[:place] + face[place + 1 :]], column] = (-1) ** place
    smith = matrix.snf()
    diagonal = (int(smith[i, i]) for i in range(min(len(rows), len(columns))))
    return [factor for factor in diagonal if factor]


def fundamental_group_order(k: SimplicialComplex) -> int:
    """Return the order of the fundamental group of a connected complex for which it is finite.

    The edge-path group has a generator for each edge, which is trivial on a spanning tree, and a relation for each
    triangle (E. H. Spanier, Algebraic Topology, McGraw-Hill 1966, section 3.7, from memory).
    """
    number = {edge: i for i, edge in enumerate(k.faces(2), start=1)}
    relators: set[Word] = {(number[edge],) for edge in _spanning_tree(k)}
    relators |= {(number[a, b], number[b, c], -number[a, c]) for a, b, c in k.faces(3)}
    generators, relators = _without_short_relators(set(number.values()), relators)
    if not generators:
        return 1
    free, *symbols = free_group([f"g{i}" for i in sorted(generators)])
    symbol = dict(zip(sorted(generators), symbols, strict=True))
    words = []
    for relator in relators:
        word = free.identity
        for letter in relator:
            word *= symbol[abs(letter)] ** (1 if letter > 0 else -1)
        words.append(word)
    return int(FpGroup(free, words).order())


def _spanning_tree(k: SimplicialComplex) -> list[Face]:
    """Return the edges of a spanning tree of the graph of a connected complex."""
    reached, tree = {k.facets[0][0]}, []
    for _ in range(k.f_vector()[1] - 1):
        edge = next(edge for edge in k.faces(2) if len(reached.intersection(edge)) == 1)
        reached.update(edge)
        tree.append(edge)
    return tree


def _without_short_relators(generators: set[int], relators: set[Word]) -> tuple[set[int], set[Word]]:
    """Use up relators of one or two letters, each of which says that a generator is trivial or is another one."""
    short = next((word for word in relators if len(word) == 1 or _identifies(word)), None)
    while short is not None:
        gone, *image = (abs(short[0]), *([-short[1] if short[0] > 0 else short[1]] if len(short) == 2 else []))
        generators = generators - {gone}
        relators = {_substituted(word, gone, image) for word in relators} - {()}
        short = next((word for word in relators if len(word) == 1 or _identifies(word)), None)
    return generators, relators


def _identifies(word: Word) -> bool:
    return len(word) == 2 and abs(word[0]) != abs(word[1])


def _substituted(word: Word, gone: int, image: Iterable[int]) -> Word:
    """Put the image in place of a generator, and cancel."""
    put = {gone: tuple(image), -gone: tuple(-letter for letter in reversed(list(image)))}
    result: list[int] = []
    for letter in (new for old in word for new in put.get(old, (old,))):
        if result and result[-1] == -letter:
            result.pop()
        else:
            result.append(letter)
    return tuple(result)
