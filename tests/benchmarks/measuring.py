"""What the benchmarks share: running the real path, and timing it."""

from __future__ import annotations

import os
import subprocess
import sys
import time
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

import certify
from certify.certificate import Spool
from certify.claims import HomologyClaim, prove
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial import SimplicialComplex

VERIFIER = Path(certify.__file__).with_name("verifier.py")


@dataclass(frozen=True, slots=True)
class Measure:
    """One row of the table: a ratio with its goal, or a figure that is only reported."""

    what: str
    value: float
    goal: float | None
    detail: str
    unit: str = ""


def least(times: int, action: Callable[[], object]) -> float:
    """Return the least time of several runs of an action, in seconds."""
    best = float("inf")
    for _ in range(times):
        start = time.perf_counter()
        action()
        best = min(best, time.perf_counter() - start)
    return best


def claim_about(
    complex_: SimplicialComplex, pair: str, route: str = "blocks", degrees: tuple[int, ...] | None = None
) -> HomologyClaim:
    """Return the claim that asks for the homology of (X, A)^K."""
    product = PolyhedralProduct(complex_, parse_pairs(pair, complex_.vertex_count))
    return HomologyClaim(product, degrees, route="cells" if route == "cells" else "blocks")


def prove_to_file(claim: HomologyClaim, path: Path, jobs: int = 1) -> int:
    """Prove a claim, write its certificate, and return the number of its records."""
    with Spool() as spool:
        prove(claim, spool, jobs=jobs).write(path, {"claim": "benchmark"})
        return spool.records


def verify_file(path: Path, *flags: str) -> int:
    """Run the verifier as a referee would, and return the peak of its memory in bytes.

    Raises
    ------
    RuntimeError
        If it does not accept the file.
    """
    command = [sys.executable, "-I", "-S", str(VERIFIER), *flags, str(path)]
    with subprocess.Popen(command, stdout=subprocess.PIPE) as process:
        output = process.stdout.read() if process.stdout else b""
        _, status, usage = os.wait4(process.pid, 0)
        process.returncode = os.waitstatus_to_exitcode(status)
    if process.returncode != 0:
        raise RuntimeError(f"the verifier does not accept {path}: {output.decode()}")
    return usage.ru_maxrss * 1024
