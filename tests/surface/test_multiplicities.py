"""`certify multiplicities`: tables over families."""

from __future__ import annotations

from pathlib import Path

import pytest

from tests.outside.values import entry
from tests.surface.running import Certify


def test_a_table_over_points(certify: Certify, tmp_path: Path) -> None:
    """Entry S06 for two, three and four points; the multiplicity of (m - 1, 1) is m - 1, and grows."""
    ended = certify(
        "multiplicities", "points", "--from", "2", "--to", "5", "--degree", "1", "--json", "--out", tmp_path
    )
    assert ended.code == 0
    rows = ended.json["multiplicities"]
    assert rows["[1]"] == {"2": 1, "3": 2, "4": 3, "5": 4}
    assert rows["[2, 1]"] == {"2": None, "3": None, "4": None, "5": 1}
    assert ended.json["constant_from"]["[1]"] is None
    assert ended.json["constant_from"]["trivial"] == 2
    assert certify("verify", tmp_path).out.endswith("4 accepted, 0 rejected, 0 undecided\n")


def test_a_table_over_polygons(certify: Certify) -> None:
    """Trivial and orientation characters together are the homology of the rotation quotient, entry S01."""
    ended = certify("multiplicities", "polygon", "--from", "4", "--to", "8", "--degree", "1", "--json")
    rows = ended.json["multiplicities"]
    for n in range(4, 9):
        assert rows["trivial"][str(n)] + rows["orientation"][str(n)] == 2 * entry("S01").value[str(n)]
    text = certify("multiplicities", "polygon", "--from", "4", "--to", "8", "--degree", "1").out
    assert text.splitlines()[0].split() == ["4", "5", "6", "7", "8"]


def test_a_constant_row_is_called_an_observation(certify: Certify) -> None:
    ended = certify("multiplicities", "cross-polytope", "--from", "1", "--to", "4", "--degree", "2")
    line = next(line for line in ended.out.splitlines() if line.startswith("[1] "))
    assert line.split(maxsplit=1)[1] == "1  1  1  constant from 2 on, as far as computed"


def test_a_table_can_be_drawn(certify: Certify, tmp_path: Path) -> None:
    pytest.importorskip("matplotlib")
    path = tmp_path / "table.svg"
    assert certify("multiplicities", "points", "--from", "2", "--to", "3", "--degree", "1", "--picture", path).code == 0
    assert "trivial" in path.read_text(encoding="utf-8")


@pytest.mark.parametrize(
    ("arguments", "code", "message"),
    [
        (
            ["cube", "--from", "2", "--to", "3", "--degree", "1"],
            2,
            "Invalid value for 'FAMILY': 'cube' is none of points, simplex-skeleton, polygon, cross-polytope.",
        ),
        (
            ["polygon", "--from", "2", "--to", "3", "--degree", "1"],
            2,
            "Invalid value for '--from': polygon has members from 3 on.",
        ),
        (
            ["points", "--from", "2", "--to", "3", "--degree", "1", "--pair", "(D1, S1)"],
            2,
            "Invalid value for '--pair': the pair: expected the boundary sphere of the disc, as in \"(D1, S0)\", "
            "found '(D1, S1)'",
        ),
        (
            ["points", "--from", "6", "--to", "2", "--degree", "1"],
            2,
            "Invalid value for '--to': 2 is before the first member, 6.",
        ),
        (
            ["simplex-skeleton", "--from", "3", "--to", "4", "--degree", "1", "--dim", "7"],
            2,
            "Invalid value for '--dim': argument dim: expected a whole number from -1 to 2, found 7",
        ),
        (
            ["points", "--from", "2", "--to", "3", "--degree", "1", "--dim", "2"],
            2,
            "Invalid value for '--dim': dim: expected no dimension for a family that has none, found 2",
        ),
        (
            ["points", "--from", "9", "--to", "9", "--degree", "1"],
            3,
            "points 9: the group has more than 200,000 elements, and larger ones are not enumerated; give generators "
            "of a smaller one",
        ),
    ],
)
def test_a_wrong_family_is_refused(certify: Certify, arguments: list[str], code: int, message: str) -> None:
    ended = certify("multiplicities", *arguments)
    hint = " (certify multiplicities --help says more.)" if code == 2 else ""
    assert (ended.code, ended.out, ended.err) == (code, "", f"certify: {message}{hint}\n")
