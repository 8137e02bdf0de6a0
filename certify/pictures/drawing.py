"""Drawing with matplotlib: legible in grey, every part labelled, on white."""

from __future__ import annotations

import re
import warnings
from collections.abc import Iterable, Iterator, Mapping, Sequence
from math import ceil, cos, pi, sin
from pathlib import Path
from typing import TYPE_CHECKING, Any, Literal

import networkx as nx

from certify.certificate import write_whole
from certify.errors import BadInput
from certify.pictures.layout import LABEL_SIZE, Label, Place, in_points, labels_beside, places_of, width_of
from certify.simplicial import SimplicialComplex
from certify.symmetry.elements import Element
from certify.symmetry.patterns import Side, side_name

if TYPE_CHECKING:
    from matplotlib.axes import Axes
    from matplotlib.figure import Figure

__all__ = ["ENDINGS", "draw_complex", "draw_pattern", "draw_table"]

ENDINGS = (".svg", ".png")
"""The endings of the files that can be drawn."""

_MARKS = "os^Dv<>ph*"
"""A shape for each orbit of vertices; with the shade of grey it is told apart without colours."""

_MOST_SIDES = 60


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
    places = in_points(places_of(k))
    labels = labels_beside(k, places)
    figure, axes = _canvas_around(places, labels)
    for a, b, c in k.faces(3):
        axes.fill(*zip(*(places[v] for v in (a, b, c)), strict=True), color="0.85", alpha=0.5, zorder=1, linewidth=0)
    for a, b in k.faces(2):
        axes.plot(*zip(places[a], places[b], strict=True), color="0.35", linewidth=1.2, zorder=2)
    _mark_orbits(axes, k, generators, places)
    for label in labels:
        _write(axes, label)
    axes.set_title(f"{k.vertex_count} vertices, f-vector {', '.join(map(str, k.f_vector()))}", fontsize=10, pad=12)
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
        expected = f"a polygon with at most {_MOST_SIDES} sides"
        found = f"one with {len(sides)}; a quotient by a larger group has fewer"
        raise BadInput(where="the picture", expected=expected, found=found)
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
    lines = [["", *columns], *([head, *cells] for head, cells in rows.items())]
    widths = [max(width_of(line[i], 10) for line in lines) + 18 for i in range(len(columns) + 1)]
    figure, axes = _canvas(sum(widths) / 72, 20 * len(lines) / 72)
    from matplotlib.table import Table
    from matplotlib.transforms import Bbox

    # The table fills the axes and the axes the figure, so that nothing is blank but the margin.
    table = Table(axes, bbox=Bbox.unit())
    table.auto_set_font_size(False)
    for row, line in enumerate(lines):
        for column, text in enumerate(line):
            shade = "0.88" if row and column and text not in ("0", "") else "white"
            loc: Literal["left", "center"] = "center" if column else "left"
            cell = table.add_cell(row, column, widths[column], 1, text=text, facecolor=shade, loc=loc)
            cell.set_fontsize(10)
    axes.add_table(table)
    axes.set_title(title, fontsize=10, pad=10)
    _save(figure, path)


def _orbits(k: SimplicialComplex, generators: Sequence[Element]) -> list[list[int]]:
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(k.vertex_count))
    graph.add_edges_from((v, abs(element[v]) - 1) for element in generators for v in range(k.vertex_count))
    parts = nx.connected_components(graph) if generators else [range(k.vertex_count)]
    return sorted(sorted(part) for part in parts if part)


def _mark_orbits(axes: Axes, k: SimplicialComplex, generators: Sequence[Element], places: Mapping[int, Place]) -> None:
    """Draw the vertices, with a mark and a shade for each orbit; outlines of ghosts are dotted."""
    # Without a group there is one part of all vertices, in which the ghosts must still be told apart.
    ghosts = {v for v in range(k.vertex_count) if not k.is_face([k.labels[v]])}
    parts = [part for orbit in _orbits(k, generators) for part in _parted(orbit, ghosts)]
    for number, part in enumerate(parts):
        is_ghost = part[0] in ghosts
        name = f"orbit {number + 1}{', ghosts' * is_ghost}" if generators else "ghosts" if is_ghost else "vertices"
        axes.scatter(
            [places[vertex][0] for vertex in part],
            [places[vertex][1] for vertex in part],
            s=80,
            marker=_MARKS[number % len(_MARKS)],
            color="white" if is_ghost else f"{0.95 - 0.55 * number / len(parts):.2f}",
            edgecolors="black",
            linewidths=1.2,
            linestyles=":" if is_ghost else "-",
            zorder=3,
            clip_on=False,
            label=name,
        )
    if len(parts) > 1:
        axes.legend(loc="upper left", bbox_to_anchor=(1, 1), frameon=False, ncols=ceil(len(parts) / 20))


def _parted(orbit: Sequence[int], ghosts: set[int]) -> Iterator[list[int]]:
    for part in ([v for v in orbit if v not in ghosts], [v for v in orbit if v in ghosts]):
        if part:
            yield part


def _write(axes: Axes, label: Label) -> None:
    """Write a label on white, so that edges do not run through it where there is no room without them."""
    across, up = label.sides
    axes.text(
        *label.anchor,
        label.text,
        ha=("center", "left", "right")[across],
        va=("center", "bottom", "top")[up],
        fontsize=LABEL_SIZE,
        zorder=4,
        # A label is no formula, even if there are dollar signs in it.
        parse_math=False,
        bbox={"boxstyle": "round,pad=0.1", "facecolor": "white", "edgecolor": "none"},
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


def _canvas_around(places: Mapping[int, Place], labels: Sequence[Label]) -> tuple[Figure, Axes]:
    """Return axes for all vertices and labels in which the unit is a point."""
    boxes = [(x - 6, y - 6, x + 6, y + 6) for x, y in places.values()] + [label.box for label in labels]
    if not boxes:
        return _canvas(2, 0.5)
    left, lower = (min(box[end] for box in boxes) for end in (0, 1))
    right, upper = (max(box[end] for box in boxes) for end in (2, 3))
    figure, axes = _canvas((right - left) / 72, (upper - lower) / 72)
    axes.set_xlim(left, right)
    axes.set_ylim(lower, upper)
    return figure, axes


def _canvas(width: float, height: float) -> tuple[Figure, Axes]:
    """Return a figure that its axes fill, in inches; titles and legends beside them are added when it is cropped."""
    try:
        from matplotlib.figure import Figure
    except ImportError as error:
        found = "none; install certify with the extra pictures"
        raise BadInput(where="the picture", expected="matplotlib", found=found) from error
    figure = Figure(figsize=(width, height))
    axes = figure.add_axes((0, 0, 1, 1))
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
            _require_signs(figure, (str(warning.message) for warning in told))


def _require_signs(figure: Figure, messages: Iterable[str]) -> None:
    """Refuse a picture of pixels with a sign that the font lacks; in an .svg file text stays text."""
    from matplotlib.text import Text

    for message in messages:
        if missing := re.match(r"Glyph (\d+) .* missing from", message):
            sign = chr(int(missing[1]))
            texts = (found.get_text() for found in figure.findobj(Text) if isinstance(found, Text))
            label = next((text for text in texts if sign in text), sign)
            expected = "labels in signs that matplotlib's font has (an .svg file leaves the font to whoever shows it)"
            raise BadInput(where="the picture", expected=expected, found=f"the sign {sign} in the label {label}")
