"""Closed surfaces as polygons with sides that are glued in pairs."""

from __future__ import annotations

from dataclasses import dataclass

import networkx as nx

from certify.errors import BadInput
from certify.symmetry.orbit_spaces import Cell, OrbitSpace
from certify.symmetry.surfaces import recognise_surface

__all__ = ["Side", "polygon_pattern", "spell_pattern"]


@dataclass(frozen=True, slots=True)
class Side:
    """A side of the polygon.

    Parameters
    ----------
    number : int
        Sides with the same number are glued; a side of the boundary of the surface has a number of its own.
    forward : bool
        Whether its arrow points along the way around.
    """

    number: int
    forward: bool


def polygon_pattern(space: OrbitSpace) -> tuple[Side, ...]:
    """Return the sides of a polygon that makes the surface, in the order around it.

    Parameters
    ----------
    space : OrbitSpace
        A quotient on chains that is a connected closed surface.

    Returns
    -------
    tuple of Side
        For a closed surface of Euler characteristic χ there are 2 (2 - χ) sides, whose ends are all the same point; the
        sphere has the two sides a a⁻¹.

    Raises
    ------
    BadInput
        If it is no closed surface.

    Notes
    -----
    Triangles are joined along a spanning tree of the dual graph; what is left around them is a word in the other edges.
    The edges of a spanning tree of their graph are contracted, that is, left out of the word.

    References
    ----------
    W. S. Massey, A Basic Course in Algebraic Topology, Springer 1991, section I.7 (from memory).
    """
    surface = recognise_surface(space)
    if surface.boundary:
        raise BadInput(where="the surface", expected="a closed one", found=f"{surface}")
    word = _word_around(space)
    kept = _without_tree(space, [edge for edge, _ in word])
    sides = [(edge, forward) for edge, forward in word if edge in kept]
    numbers: dict[Cell, int] = {}
    pattern = [Side(numbers.setdefault(edge, len(numbers)), forward) for edge, forward in sides]
    return tuple(pattern) or (Side(0, True), Side(0, False))


def spell_pattern(sides: tuple[Side, ...]) -> str:
    """Write a pattern as a word.

    Examples
    --------
    >>> spell_pattern((Side(0, True), Side(1, True), Side(0, False), Side(1, False)))
    'a b a⁻¹ b⁻¹'
    """
    return " ".join(side_name(side) + ("" if side.forward else "⁻¹") for side in sides)


def side_name(side: Side) -> str:
    """Return the letter of a side; from the 27th on with a number."""
    letter = chr(ord("a") + side.number % 26)
    return letter if side.number < 26 else f"{letter}{side.number // 26}"


def _word_around(space: OrbitSpace) -> list[tuple[Cell, bool]]:
    """Return the edges around the triangles, joined along a tree, each with its direction."""
    around = {triangle: _around(space, triangle) for triangle in space.cells[2]}
    holders: dict[Cell, list[Cell]] = {}
    for triangle, edges in around.items():
        for edge, _ in edges:
            holders.setdefault(edge, []).append(triangle)
    first = space.cells[2][0]
    inside, word = {first}, list(around[first])
    place = 0
    while len(inside) < len(space.cells[2]):
        edge, forward = word[place]
        other = next((triangle for triangle in holders[edge] if triangle not in inside), None)
        if other is None:
            place = (place + 1) % len(word)
            continue
        inside.add(other)
        word[place : place + 1] = _other_way(around[other], edge, forward)
    return word


def _around(space: OrbitSpace, triangle: Cell) -> list[tuple[Cell, bool]]:
    """Return the sides of a triangle in turn: from dimension 0 to 1, to 2, and back."""
    (far, _), (middle, _), (near, _) = space.ends(triangle)
    return [(near, True), (far, True), (middle, False)]


def _other_way(edges: list[tuple[Cell, bool]], edge: Cell, forward: bool) -> list[tuple[Cell, bool]]:
    """Return the other sides of a triangle, from the start of an edge that is walked this way to its end."""
    start = next(place for place, (other, _) in enumerate(edges) if other == edge)
    others = edges[start + 1 :] + edges[:start]
    # Walked in the same direction as the triangle walks it, the edge is replaced by the others backwards.
    if edges[start][1] == forward:
        return [(other, not direction) for other, direction in reversed(others)]
    return others


def _without_tree(space: OrbitSpace, edges: list[Cell]) -> set[Cell]:
    """Return the edges that are not in a spanning tree of the graph of these edges."""
    graph: nx.MultiGraph[Cell] = nx.MultiGraph()
    for edge in dict.fromkeys(edges):
        (one, _), (other, _) = space.ends(edge)
        graph.add_edge(one, other, key=edge)
    tree = {key for _, _, key in nx.minimum_spanning_edges(graph, keys=True, data=False)}
    return set(edges) - tree
