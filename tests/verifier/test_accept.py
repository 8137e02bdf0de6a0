"""Genuine certificates of every kind and route are accepted, also compressed."""

from __future__ import annotations

import gzip

import pytest

from tests.verifier.forging import CLAIMS, forged, genuine, judged, signed, values_of


@pytest.mark.parametrize("name", CLAIMS)
def test_genuine_certificates_are_accepted(name: str) -> None:
    report = judged(genuine(name))
    assert (report["verdict"], report["reason"]) == ("accepted", "proved")
    assert len(str(report["fingerprint"])) == 64
    assert report["statement"]


@pytest.mark.parametrize("name", CLAIMS)
def test_signing_again_changes_nothing(name: str) -> None:
    """Otherwise the forged files of the other tests would be refused for another reason than the one they try."""
    assert signed(values_of(genuine(name))) == genuine(name)


@pytest.mark.parametrize("level", [0, 1, 9])
def test_compressed_certificates_are_accepted(level: int) -> None:
    assert judged(gzip.compress(genuine("plane"), level), "x.cert.jsonl.gz")["verdict"] == "accepted"


def test_prose_changes_neither_verdict_nor_statement_nor_fingerprint() -> None:
    content = forged("ring", lambda v: v[0]["about"].update(title="H_9 = Z", source="me", labels=["a"] * 5))
    plain, other = judged(genuine("ring")), judged(content)
    assert other == plain | {"path": other["path"]}


def test_the_statement_is_written_from_the_data() -> None:
    assert judged(genuine("ring"))["statement"] == (
        "H_0((D¹,S⁰)^K; ℤ) ≅ ℤ, H_1 ≅ ℤ¹⁰, H_2 ≅ ℤ, H_k = 0 for all other k; K on 5 vertices with facets 12 15 23 34 45"
    )


def test_a_statement_about_a_real_toric_space_tells_what_it_is() -> None:
    assert "Euler characteristic -1, non-orientable" in judged(genuine("real-toric"))["statement"]
