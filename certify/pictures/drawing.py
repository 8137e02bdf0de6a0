"""Drawing with matplotlib: legible in grey, every part labelled, on white."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from math import cos, pi, sin
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
    orbits = _orbits(k, generators)
    figure, axes = _canvas(6, 6)
    places = _places(k)
    for a, b, c in k.faces(3):
        axes.fill(*zip(*(places[v] for v in (a, b, c)), strict=True), color="0.85", alpha=0.5, zorder=1, linewidth=0)
    for a, b in k.faces(2):
        axes.plot(*zip(places[a], places[b], strict=True), color="0.35", linewidth=1.2, zorder=2)
    for number, orbit in enumerate(orbits):
        shade = f"{0.95 - 0.55 * number / max(len(orbits), 1):.2f}"
        xs, ys = zip(*(places[vertex] for vertex in orbit), strict=True)
        mark = _MARKS[number % len(_MARKS)]
        name = "ghosts" if not k.is_face([k.labels[orbit[0]]]) else f"orbit {number + 1}"
        axes.scatter(xs, ys, s=420, marker=mark, color=shade, edgecolors="black", linewidths=1.2, zorder=3, label=name)
    for vertex, label in enumerate(k.labels):
        axes.annotate(str(label), places[vertex], ha="center", va="center", fontsize=9, zorder=4)
    if len(orbits) > 1:
        axes.legend(loc="upper left", bbox_to_anchor=(1, 1), frameon=False, markerscale=0.5)
    axes.set_title(f"{k.vertex_count} vertices, f-vector {', '.join(map(str, k.f_vector()))}", fontsize=10)
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
        raise BadInput(where="the picture", expected=f"at most {_MOST_SIDES} sides", found=f"{len(sides)}")
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
    return (
        sorted(sorted(part) for part in nx.connected_components(graph)) if generators else [list(range(k.vertex_count))]
    )


def _places(k: SimplicialComplex) -> dict[int, tuple[float, float]]:
    """Return places of the vertices: around a circle for a ring, or for no edges; otherwise as springs pull them."""
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(k.vertex_count))
    graph.add_edges_from((a, b) for a, b in k.faces(2))
    ring = k.vertex_count > 2 and all(degree == 2 for _, degree in graph.degree) and nx.is_connected(graph)
    if ring:
        order = [0, *(b for _, b in nx.find_cycle(graph, 0))][: k.vertex_count]
        return {v: (sin(2 * pi * i / len(order)), cos(2 * pi * i / len(order))) for i, v in enumerate(order)}
    if not graph.edges:
        layout: dict[int, Any] = nx.circular_layout(graph)
    else:
        planar, _ = nx.check_planarity(graph)
        start = nx.planar_layout(graph) if planar else nx.circular_layout(graph)
        layout = nx.spring_layout(graph, pos=start, iterations=60 if planar else 200, seed=1)
    return {vertex: (float(x), float(y)) for vertex, (x, y) in layout.items()}


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
    with write_whole(path) as file, rc_context({"svg.hashsalt": "certify", "svg.fonttype": "none"}):
        figure.savefig(file, format=kind, **plain)
