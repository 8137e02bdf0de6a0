"""`certify picture`: files that can be drawn, and faults."""

from __future__ import annotations

from pathlib import Path
from xml.etree import ElementTree

import pytest

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
        ([*RING, "--out", "a.jpg"], 3, "a.jpg: expected a file name ending in .svg or .png, found another ending"),
        (
            [*RING, "--generator", "(1 2)", "--out", "a.svg"],
            2,
            "Invalid value for '--generator': element: expected a permutation that preserves K, found (1 2), "
            "by which the face 1 5 goes to 2 5, which is none (certify picture --help says more.)",
        ),
        (
            ["--facets", "1 2; 1 3; 1 4", "--show", "surface", "--out", "a.svg"],
            3,
            "the space: expected a connected surface, found an edge o--- < oo-- that lies in 3 triangles",
        ),
        (
            ["--complex", '{family = "polygon", n = 7}', "--show", "surface", "--out", "a.svg"],
            3,
            "the picture: expected at most 60 sides, found 196",
        ),
    ],
)
def test_what_cannot_be_drawn_is_told_in_one_sentence(
    certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch, arguments: list[str], code: int, message: str
) -> None:
    monkeypatch.chdir(tmp_path)
    ended = certify("picture", *arguments)
    assert (ended.code, ended.out) == (code, "")
    if "triangles" in message:
        assert ended.err.startswith("certify: the space: expected a connected surface, found ")
    else:
        assert ended.err == f"certify: {message}\n"
    assert list(tmp_path.iterdir()) == []
