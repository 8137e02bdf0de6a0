from __future__ import annotations

import gc
import gzip
import json
from pathlib import Path

import pytest

from certify import (
    BadInput,
    Certificate,
    HomologyClaim,
    InternalError,
    LimitReached,
    SimplicialComplex,
    Spool,
    homology,
    polygon,
    polyhedral_product,
    projective_plane,
    prove,
    real_toric_space,
    reduced_homology,
    smash_homology,
    splitting,
    tor,
)
from tests.helpers import examined

SURFACE = polyhedral_product(polygon(5), "(D1, S0)")


def answers() -> list[Certificate]:
    """Return the certificate of an answer of each kind."""
    plane = projective_plane()
    return [
        homology(SURFACE).certificate,
        homology(SURFACE, degrees=[1], route="cells").certificate,
        homology(SURFACE, route="orbits").certificate,
        homology(real_toric_space(polygon(4), ["1010", "0101"])).certificate,
        smash_homology(SURFACE).certificate,
        reduced_homology(plane, [1, 2, 3], link_of=[4]).certificate,
        tor(plane).certificate,
        splitting(polygon(4)).certificate,
    ]


def test_the_verifier_accepts_what_is_written(tmp_path: Path) -> None:
    for number, certificate in enumerate(answers()):
        path = tmp_path / f"answer-{number}.cert.jsonl"
        certificate.write(path)
        report = examined(path)
        assert report["verdict"] == "accepted"
        assert report["claim"] == f"answer-{number}"
        assert report["fingerprint"] == certificate.fingerprint
        assert certificate.fingerprint in repr(certificate)


def test_a_certificate_checks_itself_in_another_process() -> None:
    statement = homology(SURFACE).certificate.verify()
    assert statement.startswith("H_0((D¹,S⁰)^K; ℤ) ≅ ℤ, H_1 ≅ ℤ¹⁰, H_2 ≅ ℤ, H_k = 0 for all other k")


def test_the_bytes_are_those_of_the_prover(tmp_path: Path) -> None:
    mine, other = tmp_path / "surface.cert.jsonl", tmp_path / "other.cert.jsonl"
    homology(SURFACE, jobs=2).certificate.write(str(mine))
    with Spool() as spool:
        prove(HomologyClaim(SURFACE), spool).write(other, {"claim": "surface"})
    assert mine.read_bytes() == other.read_bytes()


def test_it_can_be_written_twice_and_compressed(tmp_path: Path) -> None:
    certificate = tor(polygon(4)).certificate
    plain, packed = tmp_path / "x.cert.jsonl", tmp_path / "x.cert.jsonl.gz"
    certificate.write(plain)
    certificate.write(packed)
    assert gzip.decompress(packed.read_bytes()) == plain.read_bytes()


def test_labels_go_into_the_certificate(tmp_path: Path) -> None:
    rig = SimplicialComplex.from_facets([["red", "blue"], ["blue", "white"]])
    path = tmp_path / "rig.cert.jsonl"
    homology(polyhedral_product(rig, "(D1, S0)")).certificate.write(path)
    about = json.loads(path.read_bytes().splitlines()[0])["about"]
    assert about == {"claim": "rig", "labels": ["blue", "red", "white"]}
    assert examined(path)["verdict"] == "accepted"


@pytest.mark.parametrize("name", ["surface.json", "surface", ".cert.jsonl", "a b.cert.jsonl", "-.cert.jsonl"])
def test_a_name_that_no_certificate_has(tmp_path: Path, name: str) -> None:
    with pytest.raises(BadInput, match=r"a file NAME\.cert\.jsonl or NAME\.cert\.jsonl\.gz"):
        tor(polygon(3)).certificate.write(tmp_path / name)
    assert list(tmp_path.iterdir()) == []


def test_a_place_that_cannot_be_written(tmp_path: Path) -> None:
    (tmp_path / "file").touch()
    with pytest.raises(BadInput, match="a place that can be written"):
        tor(polygon(3)).certificate.write(tmp_path / "file" / "x.cert.jsonl")


def test_a_damaged_certificate_is_no_answer() -> None:
    certificate = homology(SURFACE).certificate
    certificate._file.write_bytes(certificate._file.read_bytes().replace(b"[1,10,[]]", b"[1,11,[]]"))
    with pytest.raises(InternalError, match=r"not accepted: .* please report it"):
        certificate.verify()


def test_a_certificate_of_something_else_is_no_answer() -> None:
    certificate, other = homology(SURFACE).certificate, tor(polygon(4)).certificate
    certificate._file.write_bytes(other._file.read_bytes())
    with pytest.raises(InternalError, match="please report it"):
        certificate.verify()


def test_no_verdict_is_no_acceptance() -> None:
    certificate = homology(SURFACE).certificate
    certificate._file.write_bytes(certificate._file.read_bytes().replace(b'"format":1', b'"format":2', 1))
    with pytest.raises(LimitReached, match="no verdict"):
        certificate.verify()


def test_the_records_go_away_with_the_answer() -> None:
    answer = homology(SURFACE)
    file = answer.certificate._file
    assert file.exists()
    del answer
    gc.collect()
    assert not file.exists()
