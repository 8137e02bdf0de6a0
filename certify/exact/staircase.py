"""Staircases: an arrangement that shows a family of integer vectors to be a basis (Lemma B)."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from itertools import chain

import networkx as nx

from certify.exact.smith import Matrix, inverse
from certify.exact.vectors import Entries

__all__ = ["NATURAL", "Group", "Layout", "arrange", "is_natural"]


@dataclass(frozen=True, slots=True)
class Group:
    """Several cells that are leads together.

    Parameters
    ----------
    cells : tuple of int
        The lead cells of the group, as they follow one another in the order of the layout.
    inverse : Matrix
        The inverse of the square matrix whose rows are these cells and whose columns are the vectors of the group,
        in the order of the family.
    """

    cells: tuple[int, ...]
    inverse: Matrix


@dataclass(frozen=True, slots=True)
class Layout:
    """A staircase: cells in an order such that each vector lives on its own group and on cells behind it.

    Parameters
    ----------
    order : tuple of int, or None
        All cells, each once. None is the natural order, from the largest number down.
    groups : tuple of Group
        The groups of two or more cells, in order; each other cell is a group of its own, with entry ±1.

    Notes
    -----
    A vector belongs to the group of the first cell, in this order, on which it is not zero.
    """

    order: tuple[int, ...] | None
    groups: tuple[Group, ...]


NATURAL = Layout(None, ())


def is_natural(family: Iterable[tuple[Entries, int]]) -> bool:
    """Tell whether each vector has its home as its largest cell, with coefficient ±1.

    If the homes are all the cells, each once, then the natural order is a staircase.
    """
    return all(vector[-1][0] == home and vector[-1][1] in (1, -1) for vector, home in family)


def arrange(size: int, family: Sequence[tuple[Entries, int]], classes: Iterable[Sequence[int]] = ()) -> Layout:
    """Return a staircase for a basis of ℤ^size.

    Parameters
    ----------
    size : int
        The number of cells.
    family : sequence of (Entries, int)
        The basis, each vector with a cell of the class whose lead cells it uses.
    classes : iterable of sequences of int
        Cells that must be leads together; overlapping ones are joined. Every other cell is a class of its own.

    Returns
    -------
    Layout
        With groups as small as these classes allow: the strongly connected components of the relation
        "a vector of this class is not zero on a lead of that one", in topological order.

    Raises
    ------
    InternalError
        If the vectors of a group of two cells or more have no inverse; a family that is no basis may pass otherwise.

    Examples
    --------
    >>> arrange(2, [(((0, 1), (1, 5)), 0), (((1, -1),), 1)]).order
    (0, 1)
    """
    lead_class = _joined(size, classes)
    relation: nx.DiGraph[int] = nx.DiGraph()
    relation.add_nodes_from(sorted(set(lead_class), reverse=True))
    for vector, home in family:
        own = lead_class[home]
        relation.add_edges_from((own, lead_class[cell]) for cell, _ in vector if lead_class[cell] != own)
    components = _in_order(relation)
    where = {name: place for place, component in enumerate(components) for name in component}
    cells: list[list[int]] = [[] for _ in components]
    vectors: list[list[Entries]] = [[] for _ in components]
    for cell in reversed(range(size)):
        cells[where[lead_class[cell]]].append(cell)
    for vector, home in family:
        vectors[where[lead_class[home]]].append(vector)
    groups = tuple(_group(c, v) for c, v in zip(cells, vectors, strict=True) if len(c) > 1)
    order = tuple(chain.from_iterable(cells))
    return NATURAL if not groups and order == tuple(reversed(range(size))) else Layout(order, groups)


def _joined(size: int, classes: Iterable[Sequence[int]]) -> list[int]:
    """Return, for each cell, the largest cell of its class."""
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(size))
    for cells in classes:
        nx.add_path(graph, cells)
    lead_class = [0] * size
    for component in nx.connected_components(graph):
        for cell in component:
            lead_class[cell] = max(component)
    return lead_class


def _in_order(relation: nx.DiGraph[int]) -> list[set[int]]:
    """Return the strongly connected components, each before those that it points to, largest cells first."""
    condensed = nx.condensation(relation)
    members: dict[int, set[int]] = {node: condensed.nodes[node]["members"] for node in condensed}
    order = nx.lexicographical_topological_sort(condensed, key=lambda node: -max(members[node]))
    return [members[node] for node in order]


def _group(cells: list[int], vectors: list[Entries]) -> Group:
    table = [dict(vector) for vector in vectors]
    return Group(tuple(cells), inverse([[vector.get(cell, 0) for vector in table] for cell in cells]))
