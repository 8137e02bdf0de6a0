"""Polygons whose sides are glued in pairs make the surfaces that they should."""

from __future__ import annotations

from collections import Counter

import networkx as nx
import pytest

from certify.errors import BadInput
from certify.simplicial.families import polygon
from certify.symmetry.elements import Element
from certify.symmetry.orbit_spaces import OrbitSpace
from certify.symmetry.patterns import Side, polygon_pattern
from certify.symmetry.surfaces import Surface, recognise_surface
from tests.helpers import disc_product


def glued(sides: tuple[Side, ...]) -> Surface:
    """Return the surface that a polygon makes, counted from scratch: corners that are glued, edges, one face."""
    count = len(sides)
    corners: nx.Graph[int] = nx.Graph()
    corners.add_nodes_from(range(count))
    places: dict[int, list[tuple[int, int]]] = {}
    for place, side in enumerate(sides):
        ends = (place, (place + 1) % count)
        places.setdefault(side.number, []).append(ends if side.forward else ends[::-1])
    for (start, end), (other_start, other_end) in places.values():
        corners.add_edge(start, other_start)
        corners.add_edge(end, other_end)
    directions = Counter((side.number, side.forward) for side in sides)
    orientable = all(times == 1 for times in directions.values())
    return Surface(nx.number_connected_components(corners) - count // 2 + 1, orientable, 0)


def turned(n: int) -> Element:
    """Return the rotation of a polygon by one step."""
    return (*range(2, n + 1), 1)


CASES: list[tuple[int, tuple[Element, ...]]] = [
    (3, ()),
    (4, ()),
    (5, ()),
    (4, (turned(4),)),
    (5, (turned(5),)),
    (6, (turned(6),)),
    (7, (turned(7),)),
    (5, ((-1, -2, -3, -4, -5),)),
    (6, ((-1, -2, -3, -4, -5, -6),)),
    (3, ((-1, -2, -3),)),
]


@pytest.mark.parametrize(("n", "generators"), CASES)
def test_a_pattern_makes_the_surface_it_was_made_from(n: int, generators: tuple[Element, ...]) -> None:
    space = OrbitSpace(disc_product(polygon(n), 1), generators, always_chains=True)
    surface = recognise_surface(space)
    sides = polygon_pattern(space)
    assert glued(sides) == surface
    assert len(sides) == max(2, 2 * (2 - surface.euler))
    assert all(times == 2 for times in Counter(side.number for side in sides).values())


def test_a_surface_with_a_boundary_has_no_such_pattern() -> None:
    space = OrbitSpace(disc_product(polygon(5), 1), ((1, 5, 4, 3, 2),), always_chains=True)
    with pytest.raises(BadInput, match="expected a closed one, found a non-orientable surface of genus 4, with 2"):
        polygon_pattern(space)
