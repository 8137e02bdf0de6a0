"""`certify picture`: files that can be drawn, and faults."""

from __future__ import annotations

from pathlib import Path
from xml.etree import ElementTree

import pytest

from certify.pictures.drawing import places_of
from certify.simplicial import SimplicialComplex
from tests.surface.running import Certify

pytest.importorskip("matplotlib")

RING = ["--facets", "1 2; 2 3; 3 4; 4 5; 5 1"]
TURN = ["--generator", "(1 2 3 4 5)"]


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
    assert certify("picture", "--complex", complex_, "--out", tmp_path / f"empty.{ending}").code == 0


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
            ["--facets", "日 x; x y", "--out", "a.png"],
            3,
            "the picture: expected labels in signs that matplotlib's font has; an .svg file leaves the font to whoever "
            "shows it, found the sign '日'",
        ),
        (
            [*RING, "--generator", "(1 2)", "--out", "a.svg"],
            2,
            "Invalid value for '--generator': element: expected a permutation that preserves K, found (1 2), "
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
            "the picture: expected a polygon with at most 60 sides, as quotients by larger groups have, found "
            "one with 196",
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
