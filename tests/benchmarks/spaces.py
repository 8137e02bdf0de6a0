"""Every space at the sizes that matter: the figures of symmetry, real toric spaces and the gallery."""

from __future__ import annotations

import statistics
import tempfile
import time
from collections.abc import Iterator
from itertools import permutations
from pathlib import Path

from certify.claims import RealToricClaim
from certify.simplicial import SimplicialComplex
from certify.simplicial.families import polygon
from tests.benchmarks.measuring import Measure, claim_about, least, prove_to_file, run_prove, verify_file
from tests.benchmarks.smith_forms import fastest_smith_seconds
from tests.gallery import sheets


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
    complex_ = dual_permutohedron(3)[0]
    on = least(3, lambda: prove_to_file(claim_about(complex_, "(D2, S1)", "orbits"), path))
    off = least(3, lambda: prove_to_file(claim_about(complex_, "(D2, S1)"), path))
    what = "dual of the 3-dimensional permutohedron, (D2,S1), prove, symmetry on against off"
    yield Measure(what, on / off, 0.15, f"{on:.2f} s against {off:.2f} s")
    for n in (4, 5):
        claim = RealToricClaim(*dual_permutohedron(n))
        start = time.perf_counter()
        prove_to_file(claim, path)
        middle = time.perf_counter()
        verify_file(path)
        prove, verify = middle - start, time.perf_counter() - middle
        what = f"real permutohedral variety of dimension {n}, prove + verify in seconds"
        yield Measure(what, prove + verify, None, f"prove {prove:.2f} s, verify {verify:.2f} s", " s")
    yield _gallery()


def dual_permutohedron(n: int) -> tuple[SimplicialComplex, tuple[str, ...]]:
    """Return the order complex of the proper subsets S ≠ ∅ of n + 1 things, and λ_S = Σ_{i ∈ S} e_i mod (1, …, 1)."""
    subsets = range(1, 2 ** (n + 1) - 1)
    orders = permutations(range(n + 1))
    chains = [[sum(1 << i for i in order[: k + 1]) for k in range(n)] for order in orders]
    rows = tuple("".join(str(s >> i & 1 ^ s >> n & 1) for s in subsets) for i in range(n))
    return SimplicialComplex.from_facets(chains, subsets), rows


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
