"""Limits end in undecided, never in accepted; and small files that ask for much are stopped by them."""

from __future__ import annotations

import gzip
import time
from collections import Counter
from typing import Any

import pytest

from tests.helpers import verifier
from tests.verifier.forging import CLAIMS, forged, genuine, judged, line_of, signed, values_of


@pytest.mark.parametrize("name", CLAIMS)
@pytest.mark.parametrize(
    "limit", [{"max_bytes": 200}, {"max_cells": 2}, {"max_seconds": -1}], ids=["bytes", "cells", "seconds"]
)
def test_a_limit_makes_undecided(name: str, limit: dict[str, Any]) -> None:
    report = judged(genuine(name), **limit)
    assert (report["verdict"], report["reason"]) == ("undecided", "limit")


def test_long_integers_are_limited() -> None:
    def edit(values: Any) -> None:
        values[1]["basis"][0]["cycles"] = [[0, str(2**200)]]

    assert judged(forged("ring", edit), max_bits=100)["reason"] == "limit"
    assert judged(forged("ring", edit), max_bits=300)["reason"] == "basis"


def test_a_compressed_file_may_not_grow_beyond_the_limit() -> None:
    bomb = gzip.compress(genuine("ring")[:-1] + b" " * 10_000_000)
    assert len(bomb) < 20_000
    assert judged(bomb, "x.cert.jsonl.gz", max_bytes=1_000_000)["reason"] == "limit"


def _statement(**fields: Any) -> bytes:
    statement: dict[str, Any] = {"degrees": None, "facets": [[]], "groups": [[0, 1, []]], "kind": "homology"}
    whole = statement | {"pairs": [], "vertices": 0} | fields
    return signed([{"about": {"claim": "a"}, "format": 1, "route": "blocks", "statement": whole}, {"end": None}])


def _vertices(m: int, pair: str = "(D1, S0)") -> dict[str, Any]:
    return {"vertices": m, "pairs": [pair] * m}


GREEDY = {
    "many ghosts": _statement(vertices=10**9),
    "fewer vertices than none": _statement(vertices=str(-(2**63) - 1)),
    "a shelling by one large facet": signed(
        [
            {
                "about": {"claim": "a"},
                "format": 1,
                "route": "shelling",
                "statement": {"facets": [list(range(1, 20_001))], "kind": "shelling", "vertices": 20_000},
            },
            {"order": [list(range(1, 20_001))]},
            {"end": None},
        ]
    ),
    "many ghosts on the route orbits, many symmetries": signed(
        [
            values_of(_statement(**_vertices(16)))[0] | {"route": "orbits"},
            {"generators": [list(range(1, 17))] * 2000},
            {"end": None},
        ]
    ),
    "a content of many colours": signed(
        [
            {
                "about": {"claim": "a"},
                "format": 1,
                "route": "permutations",
                "statement": {
                    "colours": 20_000,
                    "content": [1] * 20_000,
                    "facets": [[]],
                    "generators": [],
                    "kind": "orbit-count",
                    "orbits": 1,
                    "primitive": 1,
                    "vertices": 4,
                },
            },
            {"end": None},
        ]
    ),
    "more ghosts than there are numbers": _statement(vertices=str(2**70)),
    "a large simplex": _statement(facets=[list(range(1, 61))], **_vertices(60)),
    "many shifts": _statement(
        vertices=26, pairs=[f"(D{2 ** (i % 9) + i}, S{2 ** (i % 9) + i - 1})" for i in range(26)]
    ),
    "many ghosts on the route orbits": _statement(**_vertices(40)).replace(b'"blocks"', b'"orbits"'),
    "many words that a trivial group fixes": signed(
        [
            {
                "about": {"claim": "a"},
                "format": 1,
                "route": "blocks",
                "statement": {
                    "degree": 60,
                    "elements": [list(range(1, 51))],
                    "facets": [[]],
                    "functions": [],
                    "generators": [],
                    "kind": "character",
                    "products": [],
                    "summands": ["0" * 50],
                    "values": [0],
                    **_vertices(50),
                },
            },
            {"end": None},
        ]
    ),
    "a table over many vertices": line_of(
        values_of(_statement())[0]
        | {"statement": {"facets": [[i] for i in range(1, 51)], "groups": [], "kind": "table", "vertices": 50}}
    ),
}


@pytest.mark.parametrize("name", GREEDY)
def test_small_files_cannot_ask_for_too_much(name: str) -> None:
    """They end as undecided (or are refused) before they cost much; the clock is a safety net of the test only."""
    start = time.monotonic()
    report = judged(GREEDY[name], max_cells=200_000, max_seconds=60)
    assert report["verdict"] != "accepted"
    assert report["reason"] in {"limit", "truncated", "keys", "block", "statement"}
    assert time.monotonic() - start < 60


def test_a_computed_number_of_too_many_digits_is_a_limit() -> None:
    """2^16000 points, as many as (D¹, S⁰) has over 16000 ghosts, are a number that Python does not write by itself."""
    values = values_of(_statement(**_vertices(16_000)))
    values.insert(1, {"basis": [{"cycles": [[0, 1]]}], "block": "0" * 16_000})
    report = judged(signed(values))
    assert (report["verdict"], report["reason"], report["where"]) == ("undecided", "limit", "line 2")


@pytest.mark.parametrize("statement", [{"colours": str(10**4000)}, {"colours": 2, "vertices": 10**6}])
def test_a_power_of_too_many_bits_is_a_limit(statement: dict[str, Any]) -> None:
    asked: dict[str, Any] = {
        "content": None,
        "generators": [],
        "kind": "orbit-count",
        "orbits": 1,
        "primitive": 1,
        "vertices": 200,
    }
    header = {"about": {"claim": "a"}, "format": 1, "route": "permutations"}
    values = [header | {"statement": {"facets": [[]]} | asked | statement}, {"end": None}]
    assert judged(signed(values), max_bits=20_000)["reason"] == "limit"


def test_a_search_for_automorphisms_that_goes_deep_is_a_limit() -> None:
    values = values_of(genuine("automorphisms"))
    values[0]["statement"] |= {"facets": [[]], **_vertices(700)}
    assert judged(signed(values))["reason"] == "limit"


def test_a_huge_multiplicity_of_torsion_is_counted_and_not_written_out() -> None:
    """A multiplicity doubles with each ghost: 2^60 summands ℤ/2 and five ℤ/3 make five ℤ/6."""
    found = verifier().invariant_factors(Counter({0: 3, 2: 2**60, 3: 5}))
    assert found == Counter({0: 3, 2: 2**60 - 5, 6: 5})
