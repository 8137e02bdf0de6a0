"""Every space at the sizes that matter: the figures of symmetry, real toric spaces and the gallery."""

from __future__ import annotations

import statistics
import sys
import tempfile
import time
from collections.abc import Iterator
from pathlib import Path

from certify.claims import HomologyClaim, RealToricClaim
from certify.products import Pair, PolyhedralProduct, parse_pair
from certify.products.small_covers import real_permutohedral_variety
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
from tests.benchmarks.smith_forms import fastest_smith_seconds
from tests.gallery import sheets

TWICE = Pair.from_cells([(0, False, {}), (1, False, {}), (2, True, {1: 2})])
"""The projective plane, and a circle that it is glued to twice."""


def spaces(folder: Path) -> Iterator[Measure]:
    """Yield the rows, working in a folder."""
    smith, name = fastest_smith_seconds(9)
    path = folder / "orbits20.cert.jsonl"
    start = time.perf_counter()
    prove_to_file(claim_about(polygon(20), "(D1, S0)", "orbits"), path)
    verify_file(path)
    seconds = time.perf_counter() - start
    what = "(D1,S0) over the 20-gon by orbits, prove + write + verify, against Smith forms of the 9-gon"
    yield Measure(what, seconds / smith, 1, f"{seconds:.2f} s against {smith:.2f} s of {name}")
    complex_ = real_permutohedral_variety(3).complex
    # Nothing is superfluous where d e = 2 t: there the work is that of all blocks, and symmetry is what saves it.
    for pair, name, goal in ((parse_pair("(D2, S1)"), "(D2,S1)", 0.15), (TWICE, "a pair with d e = 2 t", None)):
        whole = PolyhedralProduct(complex_, (pair,) * complex_.vertex_count)
        on = least(3, lambda whole=whole: prove_to_file(HomologyClaim(whole, route="orbits"), path))  # type: ignore[misc]
        off = least(1, lambda whole=whole: prove_to_file(HomologyClaim(whole), path))  # type: ignore[misc]
        what = f"dual of the 3-dimensional permutohedron, {name}, prove, symmetry on against off"
        yield Measure(what, on / off, goal, f"{on:.2f} s against {off:.2f} s")
    for n in (4, 5):
        space = real_permutohedral_variety(n)
        claim = RealToricClaim(space.complex, space.rows)
        start = time.perf_counter()
        prove_to_file(claim, path)
        middle = time.perf_counter()
        verify_file(path)
        prove, verify = middle - start, time.perf_counter() - middle
        what = f"real permutohedral variety of dimension {n}, prove + verify in seconds"
        yield Measure(what, prove + verify, None, f"prove {prove:.2f} s, verify {verify:.2f} s", " s")
    yield _gallery()
    yield from _long_runs(folder)


def _long_runs(folder: Path) -> Iterator[Measure]:
    """Yield what a run of a minute gains from a second process, and the memory of one with millions of subcomplexes."""
    claim = HomologyClaim(PolyhedralProduct(cyclic_polytope(16, 4), (TWICE,) * 16))
    one, two = (least(1, lambda jobs=jobs: prove_to_file(claim, folder / "jobs.cert.jsonl", jobs)) for jobs in (1, 2))  # type: ignore[misc]
    what = "cyclic 4-polytope on 16 vertices, a pair with d e = 2 t, prove with two processes against one"
    yield Measure(what, two / one, 0.6, f"{two:.1f} s against {one:.1f} s")
    sheet = folder / "ring22.toml"
    claim_lines = '[[claims]]\nid = "ring22"\nkind = "homology"\ncomplex = "ring"\npair = "(D1, S0)"\n'
    sheet.write_text(f'[complexes.ring]\nfamily = "polygon"\nn = 22\n{claim_lines}', encoding="utf-8")
    prove = peak_memory([sys.executable, "-m", "certify", "prove", str(sheet), "--out", str(folder / "ring22")])
    verify = peak_memory([sys.executable, "-I", "-S", str(VERIFIER), str(folder / "ring22")])
    for name, peak in (("prove", prove), ("verify", verify)):
        yield Measure(f"peak memory of {name} on the 22-gon, (D1,S0)", peak / 2**20, 1024, "MiB, whole process", " MiB")


def _gallery() -> Measure:
    """Compare verify with prove, both as commands, on each sheet of the gallery."""
    ratios = []
    with tempfile.TemporaryDirectory() as name:
        for sheet in sheets():
            folder = Path(name) / sheet.stem
            prove = least(2, lambda sheet=sheet, folder=folder: run_prove(sheet, folder))  # type: ignore[misc]
            verify = least(2, lambda folder=folder: verify_file(folder))  # type: ignore[misc]
            ratios.append(verify / prove)
    detail = ", ".join(f"{ratio:.2f}" for ratio in ratios)
    return Measure(
        "verify against prove, median over the sheets of the gallery", statistics.median(ratios), 0.5, detail
    )
