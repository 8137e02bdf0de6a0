"""Drawing with matplotlib: legible in grey, every part labelled, on white."""

from __future__ import annotations

import re
import warnings
from collections.abc import Iterable, Mapping, Sequence
from math import cos, hypot, pi, sin
from pathlib import Path
from typing import TYPE_CHECKING, Any

import networkx as nx

from certify.certificate import write_whole
from certify.errors import BadInput
from certify.simplicial import SimplicialComplex
from certify.symmetry.elements import Element
from certify.symmetry.patterns import Side, side_name

if TYPE_CHECKING:
    from matplotlib.axes import Axes
    from matplotlib.figure import Figure

__all__ = ["ENDINGS", "draw_complex", "draw_pattern", "draw_table", "places_of"]

ENDINGS = (".svg", ".png")
"""The endings of the files that can be drawn."""

_MARKS = "os^Dv<>ph*"
"""A shape for each orbit of vertices; with the shade of grey it is told apart without colours."""

_MOST_SIDES = 60

Place = tuple[float, float]


def draw_complex(k: SimplicialComplex, generators: Sequence[Element], path: Path) -> None:
    """Draw a complex of dimension at most 2 in full, the 2-skeleton of a larger one; the orbits of vertices are marked.

    Parameters
    ----------
    k : SimplicialComplex
    generators : sequence of Element
        Of the group whose orbits are marked; none for the trivial group.
    path : Path
        An .svg or .png file.

    Raises
    ------
    BadInput
        If the path has another ending or cannot be written, or matplotlib is not installed.
    """
    orbits = _orbits(k, generators)
    figure, axes = _canvas(6, 6)
    places = places_of(k)
    for a, b, c in k.faces(3):
        axes.fill(*zip(*(places[v] for v in (a, b, c)), strict=True), color="0.85", alpha=0.5, zorder=1, linewidth=0)
    for a, b in k.faces(2):
        axes.plot(*zip(places[a], places[b], strict=True), color="0.35", linewidth=1.2, zorder=2)
    for number, orbit in enumerate(orbits):
        shade = f"{0.95 - 0.55 * number / max(len(orbits), 1):.2f}"
        xs, ys = zip(*(places[vertex] for vertex in orbit), strict=True)
        mark = _MARKS[number % len(_MARKS)]
        name = "ghosts" if not k.is_face([k.labels[orbit[0]]]) else f"orbit {number + 1}"
        axes.scatter(xs, ys, s=110, marker=mark, color=shade, edgecolors="black", linewidths=1.2, zorder=3, label=name)
    for vertex, label in enumerate(k.labels):
        _write_beside(axes, str(label), places[vertex], _outwards(places, vertex))
    if len(orbits) > 1:
        axes.legend(loc="upper left", bbox_to_anchor=(1.05, 1), frameon=False)
    axes.set_title(f"{k.vertex_count} vertices, f-vector {', '.join(map(str, k.f_vector()))}", fontsize=10, pad=18)
    axes.set_aspect("equal")
    _save(figure, path)


def draw_pattern(sides: Sequence[Side], title: str, path: Path) -> None:
    """Draw a polygon whose sides are glued as their letters and arrows say.

    Raises
    ------
    BadInput
        If there are too many sides to be read, the path has another ending or cannot be written, or matplotlib is not
        installed.
    """
    if len(sides) > _MOST_SIDES:
        expected = f"a polygon with at most {_MOST_SIDES} sides, as quotients by larger groups have"
        raise BadInput(where="the picture", expected=expected, found=f"one with {len(sides)}")
    figure, axes = _canvas(6, 6)
    count = max(len(sides), 3) if len(sides) != 2 else 2
    corners = [(sin(2 * pi * i / count), cos(2 * pi * i / count)) for i in range(count)]
    styles = ("-", "--", "-.", ":")
    for place, side in enumerate(sides):
        start, end = corners[place], corners[(place + 1) % count]
        bow = 0.4 if count == 2 else 0.0
        points = _curve(start, end, bow)
        style = styles[side.number % len(styles)]
        axes.plot(*zip(*points, strict=True), linestyle=style, color="black", linewidth=1.8)
        middle = len(points) // 2
        tail, head = (points[middle - 1], points[middle]) if side.forward else (points[middle], points[middle - 1])
        axes.annotate("", head, tail, arrowprops={"arrowstyle": "-|>", "color": "black", "mutation_scale": 18})
        x, y = points[middle]
        axes.annotate(side_name(side), (1.13 * x, 1.13 * y), ha="center", va="center", fontsize=12, style="italic")
    axes.scatter([x for x, _ in corners], [y for _, y in corners], s=30, color="black", zorder=3)
    axes.set_title(title, fontsize=10)
    axes.set_xlim(-1.3, 1.3)
    axes.set_ylim(-1.3, 1.3)
    axes.set_aspect("equal")
    _save(figure, path)


def draw_table(columns: Sequence[str], rows: Mapping[str, Sequence[str]], title: str, path: Path) -> None:
    """Draw a table of multiplicities.

    Parameters
    ----------
    columns : sequence of str
        The heads.
    rows : mapping
        A cell for each column, under the head of the row.
    title : str
    path : Path

    Raises
    ------
    BadInput
        If the path has another ending or cannot be written, or matplotlib is not installed.
    """
    figure, axes = _canvas(2 + 0.8 * len(columns), 1 + 0.35 * len(rows))
    shades = [["0.88" if cell not in ("0", "") else "white" for cell in cells] for cells in rows.values()]
    table = axes.table(
        cellText=[list(cells) for cells in rows.values()],
        rowLabels=list(rows),
        colLabels=list(columns),
        cellColours=shades,
        loc="center",
        cellLoc="center",
    )
    table.auto_set_font_size(False)
    table.set_fontsize(10)
    axes.set_title(title, fontsize=10)
    _save(figure, path)


def _orbits(k: SimplicialComplex, generators: Sequence[Element]) -> list[list[int]]:
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(k.vertex_count))
    graph.add_edges_from((v, abs(element[v]) - 1) for element in generators for v in range(k.vertex_count))
    parts = nx.connected_components(graph) if generators else [range(k.vertex_count)]
    return sorted(sorted(part) for part in parts if part)


def places_of(k: SimplicialComplex) -> dict[int, Place]:
    """Return places of the vertices: the pieces with edges side by side, and a row of the other vertices below."""
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(k.vertex_count))
    graph.add_edges_from((a, b) for a, b in k.faces(2))
    if not graph.edges:
        return _plain(nx.circular_layout(graph))
    places: dict[int, Place] = {}
    pieces = [graph.subgraph(sorted(part)) for part in nx.connected_components(graph) if len(part) > 1]
    for number, piece in enumerate(pieces):
        places |= {v: (x + 2.6 * number, y) for v, (x, y) in _places_of_piece(piece).items()}
    alone = sorted(nx.isolates(graph))
    middle = 1.3 * (len(pieces) - 1)
    return places | {v: (middle + 0.5 * (i - (len(alone) - 1) / 2), -1.5) for i, v in enumerate(alone)}


def _places_of_piece(graph: nx.Graph[int]) -> dict[int, Place]:
    """Return places between -1 and 1: around a circle for a ring, otherwise as springs pull them."""
    if len(graph) > 2 and all(degree == 2 for _, degree in graph.degree):
        first = min(graph)
        order = [first, *(b for _, b in nx.find_cycle(graph, first))][: len(graph)]
        return {v: (sin(2 * pi * i / len(order)), cos(2 * pi * i / len(order))) for i, v in enumerate(order)}
    planar, _ = nx.check_planarity(graph)
    start = nx.planar_layout(graph) if planar else nx.circular_layout(graph)
    return _plain(nx.spring_layout(graph, pos=start, iterations=60 if planar else 200, seed=1))


def _plain(layout: Mapping[int, Any]) -> dict[int, Place]:
    return {vertex: (float(x), float(y)) for vertex, (x, y) in layout.items()}


def _outwards(places: Mapping[int, Place], vertex: int) -> Place:
    """Return the direction from the middle of all places to that of a vertex, of length 1; up in the middle itself."""
    x, y = (places[vertex][axis] - sum(place[axis] for place in places.values()) / len(places) for axis in (0, 1))
    length = hypot(x, y)
    return (x / length, y / length) if length > 0.01 else (0.0, 1.0)


def _write_beside(axes: Axes, text: str, place: Place, towards: Place) -> None:
    """Write a label beside its marker, on white, so that neither outlines nor edges run through it."""
    x, y = towards
    axes.annotate(
        text,
        place,
        xytext=(9 * x, 9 * y),
        textcoords="offset points",
        ha="left" if x > 0.4 else "right" if x < -0.4 else "center",
        va="bottom" if y > 0.4 else "top" if y < -0.4 else "center",
        fontsize=9,
        zorder=4,
        bbox={"boxstyle": "round,pad=0.15", "facecolor": "white", "edgecolor": "none", "alpha": 0.8},
    )


def _curve(start: tuple[float, float], end: tuple[float, float], bow: float) -> list[tuple[float, float]]:
    """Return points from one to the other, on a line or on a bow to the left of it."""
    points = []
    for i in range(21):
        t = i / 20
        x, y = (a + t * (b - a) for a, b in zip(start, end, strict=True))
        dx, dy = end[0] - start[0], end[1] - start[1]
        points.append((x - bow * dy * sin(pi * t), y + bow * dx * sin(pi * t)))
    return points


def _canvas(width: float, height: float) -> tuple[Figure, Axes]:
    try:
        from matplotlib.figure import Figure
    except ImportError as error:
        found = "none; install certify with the extra pictures"
        raise BadInput(where="the picture", expected="matplotlib", found=found) from error
    figure = Figure(figsize=(width, height), layout="constrained")
    axes = figure.subplots()
    axes.set_axis_off()
    return figure, axes


def _save(figure: Figure, path: Path) -> None:
    """Write a figure, whole or not at all, with the same bytes each time."""
    ending = path.suffix.lower()
    if ending not in ENDINGS:
        raise BadInput(
            where=str(path), expected=f"a file name ending in {' or '.join(ENDINGS)}", found="another ending"
        )
    from matplotlib import rc_context

    kind = ending.removeprefix(".")
    # Without a date and random names of parts, the same picture has the same bytes.
    plain: dict[str, Any] = (
        {"metadata": {"Date": None}} if kind == "svg" else {"dpi": 150, "metadata": {"Software": None}}
    )
    cropped: dict[str, Any] = {"bbox_inches": "tight", "pad_inches": 0.15}
    with write_whole(path) as file, rc_context({"svg.hashsalt": "certify", "svg.fonttype": "none"}):
        with warnings.catch_warnings(record=True) as told:
            warnings.simplefilter("always")
            figure.savefig(file, format=kind, **plain, **cropped)
        if kind == "png":
            _require_signs(str(warning.message) for warning in told)


def _require_signs(messages: Iterable[str]) -> None:
    """Refuse a picture of pixels with a sign that the font lacks; in an .svg file text stays text."""
    for message in messages:
        if missing := re.match(r"Glyph (\d+) .* missing from", message):
            expected = "labels in signs that matplotlib's font has; an .svg file leaves the font to whoever shows it"
            raise BadInput(where="the picture", expected=expected, found=f"the sign {chr(int(missing[1]))!r}")
