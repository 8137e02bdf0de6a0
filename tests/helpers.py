"""What many tests need: a certificate that the verifier accepted, and the algebra of graded groups around it."""

from __future__ import annotations

import json
import warnings
from argparse import Namespace
from collections import Counter
from collections.abc import Iterable, Mapping, Sequence
from functools import cache
from importlib.util import find_spec, module_from_spec, spec_from_file_location
from math import gcd
from pathlib import Path
from tempfile import TemporaryDirectory
from types import ModuleType
from typing import Any

from certify.certificate import Spool
from certify.claims import Claim, GroupsClaim, HomologyClaim, TableClaim, prove
from certify.claims.base import Key
from certify.claims.homology import Route
from certify.claims.workers import processes
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import SimplicialComplex

__all__ = [
    "Homology",
    "accepted_groups",
    "accepted_homology",
    "alternating_sum",
    "blocks_apart",
    "certificate_of",
    "certified_groups",
    "certified_homology",
    "certified_statement",
    "cohomology",
    "disc_dimensions",
    "disc_product",
    "examined",
    "graded",
    "kunneth",
    "limits",
    "product_of",
    "verifier",
]

Homology = dict[int, AbelianGroup]
"""The groups that are not zero, by degree."""


# -- certificates -------------------------------------------------------------------------------


@cache
def verifier() -> ModuleType:
    """Return the verifier, loaded from its file as a referee would run it: under no name of the package."""
    beside = find_spec("certify.verifier")
    assert beside is not None
    assert beside.origin is not None
    spec = spec_from_file_location("verifier_of_the_tests", beside.origin)
    assert spec is not None
    assert spec.loader is not None
    module = module_from_spec(spec)
    spec.loader.exec_module(module)
    return module


def limits() -> Namespace:
    """Return limits that no test reaches by accident."""
    return Namespace(max_bytes=1 << 30, max_cells=50_000_000, max_bits=100_000, max_seconds=3600.0)


def examined(path: Path) -> dict[str, Any]:
    """Return the report of the verifier on a file."""
    with warnings.catch_warnings():
        # The verifier runs in a process of its own, and leaves it to the end of the process to close its files.
        warnings.simplefilter("ignore", ResourceWarning)
        report: dict[str, Any] = verifier().examine(str(path), limits())
    return report


def product_of(k: SimplicialComplex, pairs: str | Sequence[str]) -> PolyhedralProduct:
    """Return the product over `k` of pairs that have names: one for all vertices, or one for each."""
    return PolyhedralProduct(k, parse_pairs(pairs, k.vertex_count))


def disc_product(k: SimplicialComplex, n: int | Sequence[int]) -> PolyhedralProduct:
    """Return the product over `k` of the pairs (Dⁿ, Sⁿ⁻¹): one n for all vertices, or one for each."""
    sizes = [n] * k.vertex_count if isinstance(n, int) else n
    return PolyhedralProduct(k, tuple(parse_pair(f"(D{size}, S{size - 1})") for size in sizes))


def disc_dimensions(space: PolyhedralProduct) -> list[int]:
    """Return the n of the pair (Dⁿ, Sⁿ⁻¹) at each vertex of a product of discs."""
    return [int(pair.name.removeprefix("(D").partition(",")[0]) for pair in space.pairs]


def certificate_of(claim: Claim[Any], jobs: int = 1) -> bytes:
    """Return the bytes of the certificate of a claim."""
    with TemporaryDirectory() as folder, Spool() as spool, processes(jobs) as workers:
        path = Path(folder) / "claim.cert.jsonl"
        prove(claim, spool, workers=workers).write(path, {"claim": "claim"})
        return path.read_bytes()


def accepted_groups(certificate: bytes, expected: Mapping[str, Any]) -> dict[tuple[int, ...], AbelianGroup]:
    """Return the groups of a certificate by their degrees, after the verifier has accepted it.

    The statement is read from the file and must be `expected` with groups, so that neither a prover that writes down
    another space nor one that keeps other groups in memory than in the file goes unnoticed.
    """
    with TemporaryDirectory() as folder:
        path = Path(folder) / "claim.cert.jsonl"
        path.write_bytes(certificate)
        report = examined(path)
    assert report["verdict"] == "accepted", report
    statement = json.loads(certificate.splitlines()[0])["statement"]
    groups = statement.pop("groups")
    assert statement == expected
    return {tuple(key): AbelianGroup.of(int(rank), map(int, torsion)) for *key, rank, torsion in groups}


def certified_groups(claim: GroupsClaim[Key], **fields: Any) -> dict[tuple[int, ...], AbelianGroup]:
    """Prove, write, let the verifier check the file, and return the groups that the accepted statement holds.

    The statement must be about the complex of the claim and have these fields besides.
    """
    return accepted_groups(certificate_of(claim), _about(claim.base) | {"kind": claim.kind} | fields)


def certified_statement(claim: Claim[Any]) -> dict[str, Any]:
    """Prove, write, let the verifier check the file, and return the accepted statement, which must be the claim's."""
    certificate = certificate_of(claim)
    with TemporaryDirectory() as folder:
        path = Path(folder) / "claim.cert.jsonl"
        path.write_bytes(certificate)
        report = examined(path)
    assert report["verdict"] == "accepted", report
    statement: dict[str, Any] = json.loads(certificate.splitlines()[0])["statement"]
    assert claim.question().items() <= statement.items()
    return statement


def _about(k: SimplicialComplex) -> dict[str, Any]:
    """Return the part of a statement that says which complex it is about."""
    facets = sorted([vertex + 1 for vertex in facet] for facet in k.facets)
    return {"facets": facets, "vertices": len(k.labels)}


def certified_homology(
    space: PolyhedralProduct, degrees: Sequence[int] | None = None, *, route: Route = "blocks"
) -> Homology:
    """Prove, write, let the verifier check the file, and return the groups that the accepted statement holds."""
    claim = HomologyClaim(space, degrees=None if degrees is None else tuple(degrees), route=route)
    return accepted_homology(certificate_of(claim), space, degrees)


def accepted_homology(certificate: bytes, space: PolyhedralProduct, degrees: Sequence[int] | None = None) -> Homology:
    """Return the homology groups of a certificate, after the verifier has accepted it, and for this space."""
    expected = _about(space.complex) | {
        "degrees": None if degrees is None else sorted(set(degrees)),
        "kind": "homology",
        "pairs": [pair.name if pair.splitting is None else {"cells": _cells(pair)} for pair in space.pairs],
    }
    return {degree: group for (degree,), group in accepted_groups(certificate, expected).items()}


def _cells(pair: Pair) -> list[list[Any]]:
    """Return the cells of a pair as a statement lists them: degree, 1 outside A, and the boundary as a flat vector."""
    return [
        [cell.degree, 1 if cell.outside else 0, [number for term in cell.boundary for number in term]]
        for cell in pair.cells
    ]


def blocks_apart(k: SimplicialComplex) -> dict[int, Homology]:
    """Return the reduced homology of all full subcomplexes K_I, by the mask of I, from one certified table."""
    apart: dict[int, Homology] = {mask: {} for mask in range(2**k.vertex_count)}
    for (mask, degree), group in certified_groups(TableClaim(k)).items():
        apart[mask][degree] = group
    return apart


# -- graded groups ------------------------------------------------------------------------------


def graded(values: Mapping[str, str | int] | Mapping[int, str | int]) -> Homology:
    """Return groups that are given as texts, or as ranks of free groups; the degrees may be texts as well."""
    return {
        int(degree): AbelianGroup.of(value) if isinstance(value, int) else AbelianGroup.parse(value)
        for degree, value in values.items()
    }


def cohomology(homology: Homology) -> Homology:
    """Return the integral cohomology of a space with this homology: Hᵏ ≅ free part of H_k plus torsion of H_(k-1).

    Universal coefficients: A. Hatcher, Algebraic Topology, Cambridge 2002, corollary 3.3 (from memory).
    """
    groups: Homology = {}
    for degree, group in homology.items():
        groups[degree] = groups.get(degree, AbelianGroup()) + AbelianGroup.of(group.rank)
        groups[degree + 1] = groups.get(degree + 1, AbelianGroup()) + AbelianGroup.of(0, group.torsion)
    return {degree: group for degree, group in groups.items() if group}


def kunneth(left: Homology, right: Homology) -> Homology:
    """Return the homology of a product of spaces with these groups.

    H_n is the sum of H_i ⊗ H_j over i + j = n and of Tor(H_i, H_j) over i + j = n - 1: A. Hatcher, Algebraic Topology,
    Cambridge 2002, theorem 3B.6 (from memory).
    """
    groups: Homology = {}
    for i, a in left.items():
        for j, b in right.items():
            for above, torsion in ((0, False), (1, True)):
                degree = i + j + above
                groups[degree] = groups.get(degree, AbelianGroup()) + _pairwise(a, b, torsion=torsion)
    return {degree: group for degree, group in groups.items() if group}


def _pairwise(a: AbelianGroup, b: AbelianGroup, *, torsion: bool) -> AbelianGroup:
    """Return Tor(a, b), or a ⊗ b: on cyclic groups both are ℤ/gcd, with ℤ as ℤ/0, but Tor vanishes on ℤ."""
    orders: Counter[int] = Counter()
    for order, times in _cyclic(a).items():
        for other, often in _cyclic(b).items():
            if not torsion or (order and other):
                orders[gcd(order, other)] += times * often
    rank = orders.pop(0, 0)
    return AbelianGroup.of(rank, orders.elements())


def _cyclic(group: AbelianGroup) -> Counter[int]:
    return Counter({0: group.rank}) + Counter(group.torsion)


def alternating_sum(terms: Iterable[tuple[int, int]]) -> int:
    """Return Σ (-1)^degree · number over pairs of a degree and a number."""
    return sum((-1) ** degree * number for degree, number in terms)
