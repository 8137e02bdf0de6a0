"""`certify picture`: files that can be drawn, and faults."""

from __future__ import annotations

import re
from itertools import combinations
from pathlib import Path
from xml.etree import ElementTree

import pytest

from certify.pictures.drawing import draw_table
from certify.pictures.layout import places_of
from certify.simplicial import SimplicialComplex
from tests.surface.running import Certify

pytest.importorskip("matplotlib")

RING = ["--facets", "1 2; 2 3; 3 4; 4 5; 5 1"]
TURN = ["--generator", "(1 2 3 4 5)"]

Box = tuple[float, float, float, float]


def nodes(path: Path, kind: str) -> list[ElementTree.Element]:
    return [node for node in ElementTree.parse(path).iter() if node.tag.endswith("}" + kind)]


def texts_of(path: Path) -> dict[str, ElementTree.Element]:
    return {"".join(node.itertext()).strip(): node for node in nodes(path, "text")}


def white_boxes_of(path: Path) -> dict[str, Box]:
    """Return the ends of the white box behind each label: left, upper, right, lower."""
    found = {}
    for group in nodes(path, "g"):
        outline = group.find("{*}g/{*}path")
        text = group.find("{*}text")
        if group.attrib.get("id", "").startswith("text_") and outline is not None and text is not None:
            assert outline.attrib["style"] == "fill: #ffffff"
            numbers = [float(number) for number in re.findall(r"-?\d+(?:\.\d+)?", outline.attrib["d"])]
            xs, ys = numbers[::2], numbers[1::2]
            found["".join(text.itertext())] = (min(xs), min(ys), max(xs), max(ys))
    return found


def test_a_picture_of_a_complex_has_all_labels_and_orbits(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "new" / "rig.svg"
    rig = ["--facets", "front left; left back; back right", "--generator", "(front right)(left back)"]
    ended = certify("picture", *rig, "--out", path)
    assert (ended.code, ended.err) == (0, "")
    assert ended.out == f"{path}: 4 vertices, facets back,left back,right front,left\n"
    texts = {"".join(node.itertext()).strip() for node in ElementTree.parse(path).iter() if node.tag.endswith("text")}
    assert {"front", "left", "back", "right", "orbit 1", "orbit 2", "4 vertices, f-vector 1, 4, 3"} <= texts


def test_a_quotient_surface_is_a_polygon_with_letters(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "torus.svg"
    ended = certify("picture", *RING, *TURN, "--show", "surface", "--out", path)
    assert ended.code == 0
    assert "an orientable surface of genus 1, closed, Euler characteristic 0; pattern a" in ended.out
    texts = ["".join(node.itertext()).strip() for node in ElementTree.parse(path).iter() if node.tag.endswith("text")]
    assert sorted(text for text in texts if len(text) == 1) == ["a", "a", "b", "b"]


@pytest.mark.parametrize("complex_", ["{facets = [[]]}", '{family = "points", m = 0}'])
@pytest.mark.parametrize("ending", ["svg", "png"])
def test_a_complex_without_vertices_is_an_empty_picture(
    certify: Certify, tmp_path: Path, complex_: str, ending: str
) -> None:
    path = tmp_path / f"empty.{ending}"
    ended = certify("picture", "--complex", complex_, "--out", path)
    assert (ended.code, ended.err) == (0, "")
    if ending == "svg":
        assert list(texts_of(path)) == ["0 vertices, f-vector 1"]


@pytest.mark.parametrize(
    ("complex_", "labels"),
    [
        ('{family = "associahedron-dual", n = 3}', {"(1,)", "(1, 2, 3)"}),
        ('{family = "permutohedron-dual", n = 3}', {"(4,)", "(1, 3, 4)"}),
        ('{family = "torus"}', {"1", "7"}),
        ('{family = "polygon", n = 24}', {"1", "10", "24"}),
        ('{facets = [["a long label", "another long label", "x"], ["x", "y"], ["alone"]]}', {"a long label", "alone"}),
    ],
)
def test_labels_lie_on_white_outside_of_markers_and_each_other(
    certify: Certify, tmp_path: Path, complex_: str, labels: set[str]
) -> None:
    path = tmp_path / "k.svg"
    assert certify("picture", "--complex", complex_, "--out", path).code == 0
    boxes = white_boxes_of(path)
    markers = [(float(use.attrib["x"]), float(use.attrib["y"])) for use in nodes(path, "use")]
    assert labels <= boxes.keys()
    assert len(boxes) == len(markers)
    for left, upper, right, lower in boxes.values():
        # Markers are circles with a radius of about 4.5 points.
        assert all(x < left - 1 or x > right + 1 or y < upper - 1 or y > lower + 1 for x, y in markers)
    for one, other in combinations(boxes.values(), 2):
        assert one[2] < other[0] or other[2] < one[0] or one[3] < other[1] or other[3] < one[1]


def test_labels_of_a_polygon_lie_outside_of_it(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "polygon.svg"
    assert certify("picture", "--complex", '{family = "polygon", n = 24}', "--out", path).code == 0
    markers = [(float(use.attrib["x"]), float(use.attrib["y"])) for use in nodes(path, "use")]
    x, y = (sum(marker[axis] for marker in markers) / len(markers) for axis in (0, 1))
    radius = max(marker[0] for marker in markers) - x
    for left, upper, right, lower in white_boxes_of(path).values():
        assert ((left + right) / 2 - x) ** 2 + ((upper + lower) / 2 - y) ** 2 > radius**2


def test_a_label_is_no_formula_and_stays_on_one_line(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "signs.svg"
    complex_ = r'{facets = [["$\\frac$", "$x$"], ["$x$", "a\u0007\nb"]]}'
    ended = certify("picture", "--complex", complex_, "--out", path)
    assert (ended.code, ended.err) == (0, "")
    assert {r"$\frac$", "$x$", r"a\x07\nb"} <= texts_of(path).keys()


def test_text_stays_text_in_an_svg_file(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "signs.svg"
    ended = certify("picture", "--facets", "日本 x; x y", "--out", path)
    assert (ended.code, ended.err) == (0, "")
    assert "日本" in path.read_text(encoding="utf-8")


def test_pieces_lie_apart_and_other_vertices_below() -> None:
    k = SimplicialComplex.from_facets([["a", "b"], ["b", "c"], ["d", "e"]], ["a", "b", "c", "d", "e", "ghost"])
    places = places_of(k)
    xs = {label: places[number][0] for number, label in enumerate(k.labels)}
    assert max(xs["a"], xs["b"], xs["c"]) < min(xs["d"], xs["e"])
    assert max(xs["a"], xs["b"], xs["c"]) - min(xs["a"], xs["b"], xs["c"]) > 1
    assert places[5][1] < min(y for number, (_, y) in places.items() if number != 5)


def test_a_piece_keeps_its_size_beside_others() -> None:
    ring = [["a", "b"], ["b", "c"], ["c", "d"], ["a", "d"]]
    alone = places_of(SimplicialComplex.from_facets(ring))
    beside = places_of(SimplicialComplex.from_facets([*ring, ["x"], ["y"]], [*"abcdxy", "ghost 1", "ghost 2"]))
    for axis in (0, 1):
        spans = [sorted(places[v][axis] for v in range(4)) for places in (alone, beside)]
        assert spans[0][-1] - spans[0][0] == pytest.approx(spans[1][-1] - spans[1][0])
    assert len({y for v, (_, y) in beside.items() if v >= 4}) == 1
    assert len({x for v, (x, _) in beside.items() if v >= 4}) == 4


def test_a_ghost_is_told_from_a_vertex(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "ghost.svg"
    complex_ = '{facets = [["a", "b"]], vertices = ["a", "b", "ghost"]}'
    assert certify("picture", "--complex", complex_, "--out", path).code == 0
    assert {"vertices", "ghosts"} <= texts_of(path).keys()
    # Once in the picture and once beside the word ghosts.
    assert sum("stroke-dasharray" in node.attrib.get("style", "") for node in nodes(path, "path")) == 2


@pytest.mark.parametrize("count", [2, 6, 20])
def test_a_table_fills_its_picture(tmp_path: Path, count: int) -> None:
    path = tmp_path / "table.svg"
    rows = {f"row {number} with a long head": ["0", "", "1"] for number in range(count)}
    draw_table(["4", "5", "6"], rows, "A title", path)
    image = ElementTree.parse(path).getroot()
    width, height = (float(image.attrib[name].removesuffix("pt")) for name in ("width", "height"))
    cells = [node.attrib["d"] for node in nodes(path, "path")][1:]
    points = [tuple(map(float, point)) for cell in cells for point in re.findall(r"([\d.]+) ([\d.]+)", cell)]
    xs, ys = zip(*points, strict=True)
    assert max(xs) - min(xs) > width - 30
    assert max(ys) - min(ys) > height - 50


@pytest.mark.parametrize("ending", ["svg", "png"])
def test_the_same_picture_has_the_same_bytes(certify: Certify, tmp_path: Path, ending: str) -> None:
    paths = [tmp_path / f"{number}.{ending}" for number in range(2)]
    for path in paths:
        assert certify("picture", "--complex", '{family = "torus"}', "--out", path).code == 0
    first, second = (path.read_bytes() for path in paths)
    assert first == second
    assert first.startswith(b"\x89PNG" if ending == "png" else b"<?xml")


@pytest.mark.parametrize(
    ("arguments", "code", "message"),
    [
        (
            [*RING, "--out", "a.jpg"],
            2,
            "Invalid value for '--out': expected a file ending in .svg or .png, found a.jpg "
            "(certify picture --help says more.)",
        ),
        (
            ["--facets", "日本 x; x y", "--out", "a.png"],
            3,
            "the picture: expected labels in signs that matplotlib's font has (an .svg file leaves the font to whoever "
            "shows it), found the sign 日 in the label 日本",
        ),
        (
            [*RING, "--generator", "(1 2)", "--out", "a.svg"],
            2,
            "Invalid value for '--generator': generator 1: expected a permutation that preserves K, found (1 2), "
            "by which the face 1 5 goes to 2 5, which is none (certify picture --help says more.)",
        ),
        (
            ["--facets", "1 2; 1 3; 1 4", "--show", "surface", "--out", "a.svg"],
            3,
            "the space: expected a connected surface, found 3 sheets that meet along the segment between the points "
            "(-1, -1, -1, -1) and (0, -1, -1, -1), in the direction of 1",
        ),
        (
            ["--complex", '{family = "polygon", n = 7}', "--show", "surface", "--out", "a.svg"],
            3,
            "the picture: expected a polygon with at most 60 sides, found one with 196; a quotient by a larger group "
            "has fewer",
        ),
    ],
)
def test_what_cannot_be_drawn_is_told_in_one_sentence(
    certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch, arguments: list[str], code: int, message: str
) -> None:
    monkeypatch.chdir(tmp_path)
    ended = certify("picture", *arguments)
    assert (ended.code, ended.out) == (code, "")
    assert ended.err == f"certify: {message}\n"
    assert list(tmp_path.iterdir()) == []
