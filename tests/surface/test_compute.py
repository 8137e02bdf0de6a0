"""`certify compute`: homology without a sheet."""

from __future__ import annotations

import errno
import os
from pathlib import Path
from typing import Any

import pytest

from tests.helpers import examined
from tests.surface.running import Certify

SQUARE = "1 2; 2 3; 3 4; 4 1"
SPACE = "H_{}((D¹,S⁰)^K; ℤ)"


def test_the_groups_are_printed_in_the_notation_of_mathematics(certify: Certify) -> None:
    ended = certify("compute", "--facets", SQUARE, "--pair", "(D1, S0)")
    assert (ended.code, ended.err) == (0, "")
    assert ended.out.splitlines() == [
        "H_0((D¹,S⁰)^K; ℤ) ≅ ℤ",
        "H_1((D¹,S⁰)^K; ℤ) ≅ ℤ²",
        "H_2((D¹,S⁰)^K; ℤ) ≅ ℤ",
        "H_k((D¹,S⁰)^K; ℤ) = 0 for all other k",
        "where K has 4 vertices, facets 12 14 23 34",
    ]


def test_json_leaves_zero_groups_out(certify: Certify) -> None:
    ended = certify("compute", "--facets", "a b; b c; a c", "--pair", "(D2, S1)", "--json")
    assert (ended.code, ended.err) == (0, "")
    assert ended.json == {"homology": {"0": {"rank": 1, "torsion": []}, "5": {"rank": 1, "torsion": []}}}


def test_torsion_is_printed(certify: Certify) -> None:
    plane = "1 2 4; 1 3 4; 1 3 5; 2 3 5; 2 4 5; 1 2 6; 2 3 6; 3 4 6; 1 5 6; 4 5 6"
    ended = certify("compute", "--facets", plane, "--pair", "(D1, S0)", "--degrees", "1, 2")
    assert ended.out.splitlines()[:2] == [f"{SPACE.format(1)} = 0", f"{SPACE.format(2)} ≅ ℤ³¹ ⊕ ℤ/2"]
    ended = certify("compute", "--facets", plane, "--pair", "(D1, S0)", "--degrees", "1 2", "--json")
    assert ended.json == {"homology": {"2": {"rank": 31, "torsion": [2]}}}


@pytest.mark.parametrize("route", ["blocks", "cells"])
@pytest.mark.parametrize("jobs", ["1"])
def test_both_routes_say_the_same(certify: Certify, route: str, jobs: str) -> None:
    ended = certify("compute", "--facets", SQUARE, "--pair", "(D2, S1)", "--route", route, "--jobs", jobs, "--json")
    ranks = {"0": 1, "3": 2, "6": 1}
    assert ended.json == {"homology": {degree: {"rank": rank, "torsion": []} for degree, rank in ranks.items()}}


def test_each_vertex_may_have_a_pair_of_its_own(certify: Certify) -> None:
    ended = certify("compute", "--facets", "a; b", "--pair", "(D1, S0)", "--pair", "(D3,S2)")
    # Two points: the join of the spheres, here S⁰ * S² = S³.
    assert ended.out.splitlines() == [
        "H_0((X,A)^K; ℤ) ≅ ℤ",
        "H_3((X,A)^K; ℤ) ≅ ℤ",
        "H_k((X,A)^K; ℤ) = 0 for all other k",
        "where K has 2 vertices, facets a b",
        "(X,A) is (D¹,S⁰) at a; (D³,S²) at b",
    ]


@pytest.mark.parametrize(
    ("name", "text"),
    [
        ("k.txt", "1 2\n2 3  # a comment\n3 4; 4 1\n"),
        ("k.json", "[[1, 2], [2, 3], [3, 4], [4, 1]]"),
        ("k.toml", "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]"),
    ],
)
def test_a_complex_may_come_from_a_file(certify: Certify, tmp_path: Path, name: str, text: str) -> None:
    (tmp_path / name).write_text(text, encoding="utf-8")
    ended = certify("compute", tmp_path / name, "--pair", "(D1, S0)")
    assert ended == certify("compute", "--facets", SQUARE, "--pair", "(D1, S0)")
    assert ended.code == 0


def test_a_complex_without_vertices_is_no_trouble(certify: Certify) -> None:
    ended = certify("compute", "--facets", "{}", "--pair", "(D1, S0)", "--json")
    assert ended.json == {"homology": {"0": {"rank": 1, "torsion": []}}}


@pytest.mark.parametrize("name", ["square.cert.jsonl", "square.cert.jsonl.gz"])
def test_a_certificate_is_written_when_asked_for(certify: Certify, tmp_path: Path, name: str) -> None:
    path = tmp_path / name
    ended = certify("compute", "--facets", "a b; b c; c d; d a", "--pair", "(D1, S0)", "--certificate", path)
    report = examined(path)
    assert ended.code == 0
    assert (report["verdict"], report["claim"]) == ("accepted", "square")
    assert ended.out.splitlines()[-2:] == [
        f"certificate {path}, {path.stat().st_size:,} bytes",
        f"fingerprint {report['fingerprint']}",
    ]
    if name.endswith("jsonl"):
        assert b'"labels":["a","b","c","d"]' in path.read_bytes()


HELP = "(certify compute --help says more.)"


@pytest.mark.parametrize(
    ("arguments", "message"),
    [
        (
            ["--facets", "1 2; 3 3", "--pair", "(D1, S0)"],
            "Invalid value for '--facets': line 1, facet 2: expected each vertex once, found vertex 3 twice",
        ),
        (
            ["--facets", "", "--pair", "(D1, S0)"],
            "Invalid value for '--facets': facets: expected at least one facet ([[]] has the empty face), found none",
        ),
        (
            ["--facets", SQUARE, "--pair", "(D1, S1)"],
            "Invalid value for '--pair': the pair: "
            "expected the boundary sphere of the disc, as in \"(D1, S0)\", found '(D1, S1)'",
        ),
        (
            ["--facets", SQUARE, "--pair", "(D1, S0)", "--pair", "(D1, S0)"],
            "Invalid value for '--pair': the pairs: expected one for each of the 4 vertices, found 2",
        ),
        (
            ["--facets", SQUARE, "--pair", "(D1, S0)", "--degrees", "0,-1"],
            "Invalid value for '--degrees': expected degrees like 0,1, found '0,-1'",
        ),
        (
            ["--facets", SQUARE, "--pair", "(D1, S0)", "--degrees", " "],
            "Invalid value for '--degrees': expected degrees like 0,1, found ' '",
        ),
        (
            ["--facets", SQUARE, "--pair", "(D1, S0)", "--certificate", "square.json"],
            "Invalid value for '--certificate': "
            "expected a file NAME.cert.jsonl or NAME.cert.jsonl.gz, found square.json",
        ),
        (["--pair", "(D1, S0)"], "Give one of --facets, --complex and FILE."),
        (["k.txt", "--facets", SQUARE, "--pair", "(D1, S0)"], "Give one of --facets, --complex and FILE."),
        (["--facets", SQUARE], "Missing option '--pair'."),
        (
            ["--facets", SQUARE, "--pair", "(D1, S0)", "--jobs", "0"],
            "Invalid value for '--jobs': 0 is not in the range x>=1.",
        ),
    ],
)
def test_a_wrong_command_line_is_refused_in_one_sentence(certify: Certify, arguments: list[str], message: str) -> None:
    ended = certify("compute", *arguments)
    assert (ended.code, ended.out, ended.err) == (2, "", f"certify: {message} {HELP}\n")


def test_a_file_that_is_not_there_is_unreadable(certify: Certify, tmp_path: Path) -> None:
    ended = certify("compute", tmp_path / "k.txt", "--pair", "(D1, S0)")
    message = f"certify: {tmp_path / 'k.txt'}, file: expected a readable file, found No such file or directory\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)


def test_a_file_that_holds_no_complex_is_unreadable(certify: Certify, tmp_path: Path) -> None:
    path = tmp_path / "k.txt"
    path.write_text("1 2\n3 3\n", encoding="utf-8")
    ended = certify("compute", path, "--pair", "(D1, S0)")
    message = f"certify: {path}, line 2, facet 2: expected each vertex once, found vertex 3 twice\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)


def test_labels_that_are_no_text_are_refused(certify: Certify, tmp_path: Path) -> None:
    # The first is what Python makes of the byte 0xff on the command line.
    ended = certify("compute", "--facets", "1 \udcff", "--pair", "(D1, S0)")
    fault = "the vertices: expected labels that are text, found '\\udcff'"
    assert (ended.code, ended.out, ended.err) == (2, "", f"certify: Invalid value for '--facets': {fault} {HELP}\n")
    path = tmp_path / "k.json"
    path.write_text('[["a", "\\ud800"]]', encoding="utf-8")
    ended = certify("compute", path, "--pair", "(D1, S0)")
    message = f"certify: {path}: expected labels that are text, found '\\ud800'\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)


def test_a_complex_may_be_defined_as_in_a_sheet(certify: Certify) -> None:
    """The join of two square rings is the boundary of a cross-polytope; the product is a torus times a torus."""
    join = ["--complex", 'a = {family = "polygon", n = 4}', "--complex", '{operation = "join", of = ["a", "a"]}']
    ended = certify("compute", *join, "--pair", "(D1, S0)", "--json")
    ranks = {degree: group["rank"] for degree, group in ended.json["homology"].items()}
    assert (ended.code, ranks) == (0, {"0": 1, "1": 4, "2": 6, "3": 4, "4": 1})


def test_the_route_of_orbits_is_one_of_three(certify: Certify, tmp_path: Path) -> None:
    ring = ["--complex", '{family = "polygon", n = 9}', "--pair", "(D1, S0)"]
    found = [certify("compute", *ring, "--route", route).out for route in ("blocks", "orbits", "cells")]
    assert found[0] == found[1] == found[2]
    assert "ℤ⁶⁴²" in found[0]
    path = tmp_path / "ring.cert.jsonl"
    assert certify("compute", *ring, "--route", "orbits", "--certificate", path).code == 0
    assert examined(path)["verdict"] == "accepted"


@pytest.mark.parametrize(
    ("name", "text", "options"),
    [
        ("k.g6", "Cl\n", ["--as", "clique"]),
        ("k.edges", "1 2\n2 3\n3 4\n4 1\n", ["--as", "clique"]),
        ("k.txt", "1 2\n2 3\n3 4\n4 1\n", ["--as", "clique"]),
    ],
)
def test_a_graph_may_stand_in_a_file(
    certify: Certify, tmp_path: Path, name: str, text: str, options: list[str]
) -> None:
    """The square as a graph: its clique complex is the ring of four, whose product with intervals is a torus."""
    path = tmp_path / name
    path.write_text(text, encoding="utf-8")
    ended = certify("compute", path, "--pair", "(D1, S0)", "--json", *options)
    assert {degree: group["rank"] for degree, group in ended.json["homology"].items()} == {"0": 1, "1": 2, "2": 1}


@pytest.mark.parametrize(
    ("arguments", "message"),
    [
        (
            ["--complex", "{family = ", "--pair", "(D1, S0)"],
            "Invalid value for '--complex': definition 1: expected a table of TOML, found a fault "
            "(Invalid value (at end of document))",
        ),
        (
            ["--complex", 'a = {family = "torus"}\nb = 1', "--pair", "(D1, S0)"],
            "Invalid value for '--complex': definition 1: expected one table of TOML, found 2",
        ),
        (
            ["--complex", '{operation = "join", of = ["a", "b"]}', "--pair", "(D1, S0)"],
            "Invalid value for '--complex': complex K, key of, item 1: "
            "expected a complex that stands above this one (none does), found 'a'",
        ),
        (
            ["--facets", "1 2", "--as", "clique", "--pair", "(D1, S0)"],
            "--as belongs to a FILE with a graph.",
        ),
        (
            ["k.g6", "--as", "cliques", "--pair", "(D1, S0)"],
            'Invalid value for \'--as\': as: expected "clique" or "independence" or "nested-sets", found \'cliques\'',
        ),
    ],
)
def test_a_wrong_definition_is_refused_in_one_sentence(certify: Certify, arguments: list[str], message: str) -> None:
    ended = certify("compute", *arguments)
    assert (ended.code, ended.out, ended.err) == (2, "", f"certify: {message} {HELP}\n")


def test_a_disk_that_fills_leaves_no_certificate(
    certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def full(_: Any) -> None:
        raise OSError(errno.ENOSPC, os.strerror(errno.ENOSPC))

    monkeypatch.setattr(os, "fsync", full)
    path = tmp_path / "square.cert.jsonl"
    ended = certify("compute", "--facets", SQUARE, "--pair", "(D1, S0)", "--certificate", path)
    message = f"certify: writing {path}: expected a place that can be written, found No space left on device\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)
    assert list(tmp_path.iterdir()) == []
