"""Recognising surfaces among quotients, and their branch points."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass

import networkx as nx

from certify.errors import BadInput
from certify.simplicial.spelling import spell_labels
from certify.symmetry.elements import Element
from certify.symmetry.orbit_spaces import Cell, OrbitSpace
from certify.symmetry.subgroups import conjugates, sifted_generators

__all__ = ["BranchOrbits", "Surface", "branch_orbits", "recognise_surface", "spell_point"]


@dataclass(frozen=True, slots=True)
class Surface:
    """A connected compact surface.

    Parameters
    ----------
    euler : int
        Its Euler characteristic.
    orientable : bool
    boundary : int
        The number of boundary circles.
    """

    euler: int
    orientable: bool
    boundary: int

    @property
    def genus(self) -> int:
        """The number of handles, or of cross-caps, of the closed surface that discs make of it."""
        missing = 2 - self.euler - self.boundary
        return missing // 2 if self.orientable else missing

    def __str__(self) -> str:
        """Say what it is."""
        kind = "an orientable" if self.orientable else "a non-orientable"
        rim = f"with {self.boundary} boundary circle{'s' * (self.boundary > 1)}" if self.boundary else "closed"
        return f"{kind} surface of genus {self.genus}, {rim}, Euler characteristic {self.euler}"


def recognise_surface(space: OrbitSpace) -> Surface:
    """Return the surface that a quotient is.

    Parameters
    ----------
    space : OrbitSpace
        On chains, so that its triangles have vertices of dimensions 0, 1 and 2.

    Raises
    ------
    BadInput
        If it is no connected surface; the point and its link, or the edge, are named.

    Notes
    -----
    A complex of triangles is a surface if each edge lies in one or two of them, and the link of each vertex is a circle
    or a path. It is orientable if its triangles can be coloured with two colours so that they change across each edge,
    since the vertices of a triangle are ordered by dimension.
    """
    if len(space.cells) != 3:
        raise _no_surface(f"dimension {len(space.cells) - 1}")
    dual: nx.Graph[Cell] = nx.Graph()
    dual.add_nodes_from(space.cells[2])
    sides: dict[Cell, list[Cell]] = {edge: [] for edge in space.cells[1]}
    links: dict[Cell, nx.MultiGraph[Cell]] = {vertex: nx.MultiGraph() for vertex in space.cells[0]}
    for triangle in space.cells[2]:
        edges = [edge for edge, _ in space.ends(triangle)]
        for place, edge in enumerate(edges):
            sides[edge].append(triangle)
            links[space.first((triangle[place],))].add_edge(*(edges[:place] + edges[place + 1 :]))
    for edge, triangles in sides.items():
        if len(triangles) not in (1, 2):
            near, far = edge
            moved = [label for label, a, b in zip(space.product.complex.labels, near, far, strict=True) if a != b]
            towards = f"in the direction of {spell_labels(moved)}"
            between = f"between the points {spell_point(near)} and {spell_point(far)}, {towards}"
            raise _no_surface(f"{len(triangles)} sheets that meet along the segment {between}")
        if len(triangles) == 2:
            dual.add_edge(*triangles)
    for vertex, link in links.items():
        if not link or not nx.is_connected(link):
            pieces = nx.number_connected_components(link) if link else 0
            raise _no_surface(f"the point {spell_point(vertex[0])}, whose link has {pieces} pieces")
    if not nx.is_connected(dual):
        raise _no_surface(f"{nx.number_connected_components(dual)} pieces")
    rim: nx.Graph[Cell] = nx.Graph()
    for edge, triangles in sides.items():
        if len(triangles) == 1:
            rim.add_edge(*(end for end, _ in space.ends(edge)))
    boundary = nx.number_connected_components(rim) if rim else 0
    return Surface(space.euler_characteristic(), nx.is_bipartite(dual), boundary)


@dataclass(frozen=True, slots=True, order=True)
class BranchOrbits:
    """Orbits of points with conjugate isotropy groups.

    Parameters
    ----------
    order : int
        The order of the isotropy groups, from 2 on.
    generators : tuple of Element
        Of the isotropy group of one of the points.
    number : int
        How many orbits.
    """

    order: int
    generators: tuple[Element, ...]
    number: int


def branch_orbits(space: OrbitSpace) -> list[BranchOrbits]:
    """Return how many orbits of points have which isotropy group other than 1, orders ascending.

    Parameters
    ----------
    space : OrbitSpace
        On chains.

    Raises
    ------
    BadInput
        If such points are not isolated.
    """
    found: Counter[tuple[int, tuple[Element, ...]]] = Counter()
    first: dict[tuple[Element, ...], tuple[Element, ...]] = {}
    for cell, fixing in space.isotropy.items():
        if len(cell) > 1:
            found_words = f"whole cells of dimension {len(cell) - 1}"
            where = "the set of points with isotropy"
            raise BadInput(where=where, expected="a set of isolated points", found=found_words)
        own = tuple(sorted(fixing))
        if own not in first:
            alike = conjugates(own, space.group)
            first |= dict.fromkeys(alike, sifted_generators(min(alike)))
        found[len(own), first[own]] += 1
    return [BranchOrbits(order, generators, number) for (order, generators), number in sorted(found.items())]


def spell_point(word: Sequence[int]) -> str:
    """Write the middle of a cell by its coordinates: -1 and 1 at the ends of an interval, 0 in its middle.

    Examples
    --------
    >>> spell_point((0, 1, 2))
    '(-1, 1, 0)'
    """
    return f"({', '.join(('-1', '1', '0')[letter] for letter in word)})"


def _no_surface(found: str) -> BadInput:
    return BadInput(where="the space", expected="a connected surface", found=found)
