from __future__ import annotations

import hashlib
import json
from pathlib import Path

import pytest

from certify.certificate import Spool
from certify.claims import HomologyClaim, prove
from certify.claims.homology import Route
from certify.claims.workers import processes
from certify.errors import ClaimIsFalse
from certify.exact import AbelianGroup
from certify.simplicial import SimplicialComplex, build
from tests.helpers import certificate_of, disc_product, examined, graded

CIRCLE = disc_product(build("points", m=2), 1)
both_routes = pytest.mark.parametrize("route", ["blocks", "cells"])
STATEMENT = (
    b'{"degrees":null,"facets":[[1],[2]],"groups":[[0,1,[]],[1,1,[]]],"kind":"homology",'
    b'"pairs":["(D1, S0)","(D1, S0)"],"vertices":2}'
)


@both_routes
def test_a_proof_holds_the_groups_and_the_statement(route: Route) -> None:
    with Spool() as spool:
        proof = prove(HomologyClaim(CIRCLE, route=route), spool)
        assert proof.found == graded({0: "Z", 1: "Z"})
        assert proof.statement == json.loads(STATEMENT)
        assert proof.fingerprint == hashlib.sha256(STATEMENT).hexdigest()


@both_routes
def test_a_written_proof_is_accepted_for_what_it_states(route: Route, tmp_path: Path) -> None:
    path = tmp_path / "circle.cert.jsonl"
    about = {"claim": "circle", "source": "a circle of four edges"}
    with Spool() as spool:
        proof = prove(HomologyClaim(CIRCLE, route=route), spool)
        size = proof.write(path, about)
    lines = path.read_bytes().splitlines()
    assert size == path.stat().st_size
    assert json.loads(lines[0]) == {"about": about, "format": 1, "route": route, "statement": json.loads(STATEMENT)}
    report = examined(path)
    assert report["verdict"] == "accepted"
    assert report["claim"] == "circle"
    assert report["fingerprint"] == proof.fingerprint
    assert report["statement"] == (
        "H_0((D¹,S⁰)^K; ℤ) ≅ ℤ, H_1 ≅ ℤ, H_k = 0 for all other k; K on 2 vertices with facets 1 2"
    )


def test_cones_leave_no_record() -> None:
    """Of the four sets of two vertices the two points are cones; ∅ and the pair are not."""
    certificate = certificate_of(HomologyClaim(CIRCLE))
    records = [json.loads(line) for line in certificate.splitlines()]
    assert [record["block"] for record in records[1:-1]] == ["00", "11"]
    assert records[-1]["end"]["records"] == 2


def test_the_fingerprint_is_that_of_the_statement_and_not_of_the_route() -> None:
    fingerprints = set()
    for route in ("blocks", "cells"):
        header = json.loads(certificate_of(HomologyClaim(CIRCLE, route=route)).splitlines()[0])
        spelled = json.dumps(header["statement"], sort_keys=True, separators=(",", ":"), ensure_ascii=False)
        fingerprints.add(hashlib.sha256(spelled.encode()).hexdigest())
    assert fingerprints == {hashlib.sha256(STATEMENT).hexdigest()}


@both_routes
@pytest.mark.parametrize("jobs", [1, 2])
def test_a_false_claim_is_not_proved(route: Route, jobs: int) -> None:
    claim = HomologyClaim(CIRCLE, groups={0: AbelianGroup(1), 1: AbelianGroup(2)}, route=route)
    with Spool() as spool, processes(jobs) as workers, pytest.raises(ClaimIsFalse, match="claimed to be ℤ², but is ℤ"):
        prove(claim, spool, workers=workers)


@pytest.mark.parametrize("jobs", [1, 2, 3])
@pytest.mark.parametrize(
    "k", [SimplicialComplex.from_facets([[]]), build("polygon", n=5), build("simplex", m=7)], ids=str
)
def test_progress_counts_the_sets_of_vertices(k: SimplicialComplex, jobs: int) -> None:
    calls: list[tuple[int, int]] = []
    claim = HomologyClaim(disc_product(k, 1))
    with Spool() as spool, processes(jobs) as workers:
        prove(claim, spool, workers=workers, progress=lambda done, whole: calls.append((done, whole)))
    whole = 2**k.vertex_count
    assert calls[-1] == (whole, whole)
    done = [done for done, _ in calls]
    assert done == sorted(set(done))
    assert {whole for _, whole in calls} == {whole}


def test_a_restricted_claim_states_its_degrees_and_no_zero_group(tmp_path: Path) -> None:
    path = tmp_path / "circle.cert.jsonl"
    with Spool() as spool:
        proof = prove(HomologyClaim(CIRCLE, degrees=(1, 7)), spool)
        proof.write(path, {"claim": "circle"})
    assert proof.statement["degrees"] == [1, 7]
    assert proof.statement["groups"] == [[1, 1, []]]
    statement = examined(path)["statement"]
    assert statement == "H_1((D¹,S⁰)^K; ℤ) ≅ ℤ, H_7 ≅ 0; K on 2 vertices with facets 1 2"
