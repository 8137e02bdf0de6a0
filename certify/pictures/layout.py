"""Where vertices and their labels stand in a picture."""

from __future__ import annotations

from collections import Counter
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from math import atan2, ceil, cos, hypot, pi, sin, sqrt
from unicodedata import east_asian_width

import networkx as nx

from certify.simplicial import SimplicialComplex

__all__ = ["LABEL_SIZE", "Label", "Place", "in_points", "labels_beside", "places_of", "width_of"]

# Lengths in points, of which an inch has 72.
_UNIT = 160
_LARGEST = 20 * 72
LABEL_SIZE = 9
_LABEL_DISTANCE = 8
_GRID = 4

# Lengths between places, before they are scaled to points.
_STEP = 0.6
_GAP = 0.7

Place = tuple[float, float]


@dataclass(frozen=True)
class Label:
    """A label beside its vertex, in points.

    Parameters
    ----------
    text : str
    anchor : Place
        The point of the text that is nearest to the vertex.
    sides : pair of int
        Whether the text lies left of the anchor (-1), around it (0) or right of it (1); and below, around or above it.
    """

    text: str
    anchor: Place
    sides: tuple[int, int]

    @property
    def box(self) -> tuple[float, float, float, float]:
        """The left, lower, right and upper ends of the text, as far as they can be known without its font."""
        (x, y), (across, up) = self.anchor, self.sides
        width, height = width_of(self.text, LABEL_SIZE), 1.2 * LABEL_SIZE
        left, lower = x - width * (1 - across) / 2, y - height * (1 - up) / 2
        return left, lower, left + width, lower + height


def places_of(k: SimplicialComplex) -> dict[int, Place]:
    """Return places of the vertices: the pieces with edges beside each other, and rows of the other vertices below."""
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(k.vertex_count))
    graph.add_edges_from((a, b) for a, b in k.faces(2))
    if not graph.edges:
        return _circle(range(k.vertex_count))
    pieces = [graph.subgraph(sorted(part)) for part in nx.connected_components(graph) if len(part) > 1]
    places = _beside_each_other([_places_of_piece(piece) for piece in pieces])
    alone = sorted(nx.isolates(graph))
    return places | _rows_below(places, alone, max((len(_shown(k.labels[v])) for v in alone), default=0))


def _beside_each_other(pieces: Sequence[Mapping[int, Place]]) -> dict[int, Place]:
    """Move pieces apart, into as many rows as make a square of them."""
    places: dict[int, Place] = {}
    columns = ceil(sqrt(len(pieces)))
    top = 0.0
    for first in range(0, len(pieces), columns):
        row = pieces[first : first + columns]
        height = max(_span(piece, 1)[1] - _span(piece, 1)[0] for piece in row)
        end = 0.0
        for piece in row:
            (left, right), (lower, upper) = _span(piece, 0), _span(piece, 1)
            rise = top - height / 2 - (lower + upper) / 2
            places |= {v: (x - left + end, y + rise) for v, (x, y) in piece.items()}
            end += right - left + _GAP
        top -= height + _GAP
    return places


def _rows_below(places: Mapping[int, Place], alone: Sequence[int], letters: int) -> dict[int, Place]:
    """Return places for vertices without edges: below the others, no wider than they are if that is possible."""
    (left, right), (lower, _) = _span(places, 0), _span(places, 1)
    step = max(0.4, 0.045 * letters + 0.1)
    longest = max(ceil((right - left) / step), ceil(sqrt(len(alone))))
    found = {}
    for number, vertex in enumerate(alone):
        row, column = divmod(number, longest)
        count = min(longest, len(alone) - row * longest)
        found[vertex] = ((left + right) / 2 + step * (column - (count - 1) / 2), lower - 0.5 - 0.4 * row)
    return found


def _span(places: Mapping[int, Place], axis: int) -> tuple[float, float]:
    values = [place[axis] for place in places.values()]
    return min(values), max(values)


def _places_of_piece(graph: nx.Graph[int]) -> dict[int, Place]:
    """Return places of a connected graph: a line for a path, a circle for a ring, otherwise as springs pull them."""
    ends = [v for v, degree in graph.degree if degree == 1]
    if all(degree <= 2 for _, degree in graph.degree):
        first = min(ends or graph)
        order = list(nx.dfs_preorder_nodes(graph, first))
        return {v: (_STEP * i, 0.0) for i, v in enumerate(order)} if ends else _circle(order)
    planar, _ = nx.check_planarity(graph)
    start = nx.planar_layout(graph) if planar else nx.circular_layout(graph)
    layout = nx.spring_layout(graph, pos=start, iterations=60 if planar else 200, seed=1)
    # More vertices need more room, or their labels have none.
    room = max(1, sqrt(len(graph) / 20))
    return {vertex: (room * float(x), room * float(y)) for vertex, (x, y) in layout.items()}


def _circle(order: Sequence[int]) -> dict[int, Place]:
    """Return places around a circle, from the top on; a single one in the middle."""
    count = len(order)
    radius = 0 if count == 1 else max(1, count / 40)
    return {v: (radius * sin(2 * pi * i / count), radius * cos(2 * pi * i / count)) for i, v in enumerate(order)}


def in_points(places: Mapping[int, Place]) -> dict[int, Place]:
    """Scale places to points, to less than usual if the picture became too large for a page or for pixels."""
    spans = [_span(places, axis) for axis in (0, 1)] if places else []
    unit = min([_UNIT, *(_LARGEST / (end - start) for start, end in spans if end > start)])
    return {vertex: (unit * x, unit * y) for vertex, (x, y) in places.items()}


def labels_beside(k: SimplicialComplex, places: Mapping[int, Place]) -> list[Label]:
    """Return a label beside each vertex, away from its neighbours if nothing is there, or else where the least is."""
    neighbours: dict[int, list[int]] = {v: [] for v in places}
    ink: Counter[tuple[int, int]] = Counter()
    edges = k.faces(2)
    for a, b in edges:
        neighbours[a].append(b)
        neighbours[b].append(a)
        ink.update(_squares_of_edge(places[a], places[b]))
    # Neither a marker nor another label may be covered where the alternative is an edge, whose course is plain anyhow.
    for place in places.values():
        ink.update(dict.fromkeys(_squares_of_marker(place), 50))
    labels = []
    for vertex, text in enumerate(k.labels):
        place, others = places[vertex], [places[v] for v in neighbours[vertex]]
        # A vertex without edges stands below the others, if there are any, and its label below it.
        away = -pi / 2 if edges and not others else _away(place, others or list(places.values()))
        # The ends of its own edges are beside every vertex, wherever its label is.
        own = set(_squares_of_marker(place))
        choices = _labels_around(_shown(text), place, away)
        best = min(choices, key=lambda label: sum(ink[square] for square in _squares(label.box) if square not in own))
        ink.update(dict.fromkeys(_squares(best.box), 50))
        labels.append(best)
    return labels


def _squares_of_marker(place: Place) -> list[tuple[int, int]]:
    x, y = place
    return _squares((x - 5, y - 5, x + 5, y + 5))


def _squares(box: tuple[float, float, float, float]) -> list[tuple[int, int]]:
    """Return the squares of a grid that a box meets; counting what lies in them is quick for any number of edges."""
    left, lower, right, upper = (int(end // _GRID) for end in box)
    return [(x, y) for x in range(left, right + 1) for y in range(lower, upper + 1)]


def _squares_of_edge(start: Place, end: Place) -> set[tuple[int, int]]:
    (x, y), (dx, dy) = start, (end[0] - start[0], end[1] - start[1])
    steps = ceil(hypot(dx, dy) / _GRID) + 1
    return {(int((x + dx * i / steps) // _GRID), int((y + dy * i / steps) // _GRID)) for i in range(steps + 1)}


def _away(place: Place, others: Sequence[Place]) -> float:
    """Return the angle of the direction away from the middle of others; upwards in the middle itself."""
    x, y = (place[axis] - sum(other[axis] for other in others) / len(others) for axis in (0, 1))
    return atan2(y, x) if hypot(x, y) > 1 else pi / 2


def _labels_around(text: str, place: Place, away: float) -> list[Label]:
    """Return a label in 16 directions from a vertex, those first that are nearest to the wanted one."""
    labels = []
    for eighth in sorted(range(-7, 9), key=abs):
        x, y = cos(away + eighth * pi / 8), sin(away + eighth * pi / 8)
        anchor = (place[0] + _LABEL_DISTANCE * x, place[1] + _LABEL_DISTANCE * y)
        labels.append(Label(text, anchor, (_side(x), _side(y))))
    return labels


def _side(length: float) -> int:
    return 1 if length > 0.4 else -1 if length < -0.4 else 0


def _shown(label: object) -> str:
    """Return a label on one line; signs that no font has and no .svg file may contain are spelled."""
    return "".join(sign if sign.isprintable() else sign.encode("unicode_escape").decode() for sign in str(label))


def width_of(text: str, size: float) -> float:
    """Return about how wide a text of a size is."""
    return size * sum(1.0 if east_asian_width(sign) in "WF" else 0.62 for sign in text)
