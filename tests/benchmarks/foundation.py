"""Homology of disc pairs: the figures of the foundation."""

from __future__ import annotations

import gzip
import sys
from collections.abc import Iterator
from pathlib import Path

import pytest

from certify.claims.homology import Route
from certify.simplicial.families import cyclic_polytope, polygon
from tests.benchmarks.measuring import (
    VERIFIER,
    Measure,
    claim_about,
    least,
    peak_memory,
    prove_to_file,
    run_prove,
    verify_file,
)
from tests.benchmarks.smith_forms import fastest_smith_seconds, polygon_matrices, rational_ranks_seconds
from tests.helpers import limits, verifier

_MIB = 1 << 20


def foundation(folder: Path) -> Iterator[Measure]:
    """Yield the rows, working in a folder."""
    smith, name = fastest_smith_seconds(8)
    for route in ("orbits", "blocks"):
        yield _against_smith(folder, 14, route, smith, name)
    yield _against_smith(folder, 10, "cells", smith, name)
    ranks = rational_ranks_seconds(polygon_matrices(8))
    whole = _whole(folder, 8, "blocks")
    yield Measure("8-gon: prove + write + verify, against its rational ranks by python-flint", whole / ranks, None, "")
    yield from _growth(folder)
    for vertices in (12, 14):
        yield from _verify_against_prove(folder, vertices)
    yield from _sizes(folder)


def _whole(folder: Path, n: int, route: Route) -> float:
    path = folder / f"polygon{n}{route}.cert.jsonl"

    def action() -> None:
        prove_to_file(claim_about(polygon(n), "(D1, S0)", route), path)
        verify_file(path)

    return least(3, action)


def _against_smith(folder: Path, n: int, route: Route, smith: float, name: str) -> Measure:
    seconds = _whole(folder, n, route)
    what = f"(D1,S0) over the {n}-gon by {route}, prove + write + verify, against Smith forms of the 8-gon"
    return Measure(what, seconds / smith, 0.5, f"{seconds:.2f} s against {smith:.2f} s of {name}")


def _growth(folder: Path) -> Iterator[Measure]:
    """Time per cell, 16-gon against 10-gon: of all blocks that are no cones, and of what the verifier rebuilds."""
    prove, verify, block_cells, rebuilt = {}, {}, {}, {}
    for n in (10, 16):
        claim = claim_about(polygon(n), "(D1, S0)")
        path = folder / f"growth{n}.cert.jsonl"
        prove[n] = least(20, lambda claim=claim, path=path: prove_to_file(claim, path))  # type: ignore[misc]
        verify[n] = least(20, lambda path=path: verifier().examine(str(path), limits()))  # type: ignore[misc]
        # The cells of all full subcomplexes without the arcs, of which n have k vertices and 2k cells, for 0 < k < n.
        block_cells[n] = 2**n + n * 2 ** (n - 1) + n * 2 ** (n - 2) - n * n * (n - 1)
        rebuilt[n] = _cells_rebuilt(path)
    for what, seconds, cells in (
        ("prove, time per cell of the blocks that are not acyclic, 16-gon against 10-gon", prove, block_cells),
        ("verify, time per rebuilt cell, 16-gon against 10-gon", verify, rebuilt),
    ):
        ratio = (seconds[16] / cells[16]) / (seconds[10] / cells[10])
        yield Measure(what, ratio, 1.5, f"{1e6 * seconds[16] / cells[16]:.2f} µs a cell, {cells[16]:,} cells")
    memory = peak_memory([sys.executable, "-I", "-S", str(VERIFIER), str(folder / "growth16.cert.jsonl")])
    yield Measure("peak memory of the verifier on the 16-gon", memory / _MIB, 120, "MiB, whole process", " MiB")


def _cells_rebuilt(path: Path) -> int:
    """Return how many cells the verifier counts against its limit."""
    spent = 0

    class Counting(verifier().Budget):  # type: ignore[misc]
        def spend(self, what: str, number: int) -> None:
            nonlocal spent
            spent += number if what == "cells" else 0
            super().spend(what, number)

    with pytest.MonkeyPatch.context() as patch:
        patch.setattr(verifier(), "Budget", Counting)
        if verifier().examine(str(path), limits())["verdict"] != "accepted":
            raise RuntimeError(f"the verifier does not accept {path}")
    return spent


def _point(folder: Path) -> Path:
    """Return the smallest certificate, which shows what starting the verifier costs."""
    path = folder / "point.cert.jsonl"
    if not path.exists():
        prove_to_file(claim_about(polygon(3), "(D1, S0)", degrees=(0,)), path)
    return path


def _verify_against_prove(folder: Path, vertices: int) -> Iterator[Measure]:
    """Compare the commands as an author and a referee run them, and the work alone without starting a program."""
    sheet, certificates = folder / f"cyclic{vertices}.toml", folder / f"cyclic{vertices}"
    sheet.write_text(
        f"[complexes.k]\nfamily = 'cyclic-polytope'\nm = {vertices}\nd = 4\n"
        "[[claims]]\nid = 'k'\nkind = 'homology'\ncomplex = 'k'\npair = '(D2, S1)'\n",
        "utf-8",
    )
    path = certificates / "k.cert.jsonl"
    prove = least(5, lambda: run_prove(sheet, certificates))
    verify = least(5, lambda: verify_file(path))
    what = f"cyclic 4-polytope on {vertices} vertices, (D2,S1): verify against prove"
    yield Measure(f"{what}, both as commands", verify / prove, 0.6, f"{verify:.2f} s against {prove:.2f} s")
    claim = claim_about(cyclic_polytope(vertices, 4), "(D2, S1)")
    prove = least(5, lambda: prove_to_file(claim, path))
    verify -= least(5, lambda: verify_file(_point(folder)))
    yield Measure(f"{what}, without starting Python", verify / prove, None, f"{verify:.2f} s against {prove:.2f} s")


def _sizes(folder: Path) -> Iterator[Measure]:
    for n in (14, 16):
        path = folder / f"size{n}.cert.jsonl"
        records = prove_to_file(claim_about(polygon(n), "(D1, S0)"), path)
        plain = path.read_bytes()
        packed = len(gzip.compress(plain, 9))
        blocks = 1 << n
        detail = (
            f"{len(plain)} bytes, {packed} with gzip, {records} records for {blocks} blocks; gzip {packed / blocks:.2f}"
        )
        yield Measure(f"certificate of the {n}-gon, bytes a block", len(plain) / blocks, None, detail)
