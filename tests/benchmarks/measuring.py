"""What the benchmarks share: running the real path, and timing it."""

from __future__ import annotations

import subprocess
import sys
import time
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import certify
from certify.certificate import Spool
from certify.claims import HomologyClaim, prove
from certify.claims.base import Claim
from certify.claims.homology import Route
from certify.claims.workers import processes
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
    complex_: SimplicialComplex, pair: str, route: Route = "blocks", degrees: tuple[int, ...] | None = None
) -> HomologyClaim:
    """Return the claim that asks for the homology of (X, A)^K."""
    product = PolyhedralProduct(complex_, parse_pairs(pair, complex_.vertex_count))
    return HomologyClaim(product, degrees, route=route)


def prove_to_file(claim: Claim[Any], path: Path, jobs: int = 1) -> int:
    """Prove a claim, write its certificate, and return the number of its records."""
    with Spool() as spool, processes(jobs) as workers:
        prove(claim, spool, workers=workers).write(path, {"claim": "benchmark"})
        return spool.records


def run_prove(sheet: Path, folder: Path, *flags: str) -> None:
    """Prove a sheet as an author would.

    Raises
    ------
    subprocess.CalledProcessError
        If a claim is not proved.
    """
    command = [sys.executable, "-m", "certify", "prove", str(sheet), "--out", str(folder), *flags]
    subprocess.run(command, check=True, stdout=subprocess.DEVNULL)


def verify_file(path: Path) -> None:
    """Run the verifier as a referee would.

    Raises
    ------
    RuntimeError
        If it does not accept the file.
    """
    command = [sys.executable, "-I", "-S", str(VERIFIER), str(path)]
    done = subprocess.run(command, check=False, capture_output=True)
    if done.returncode != 0:
        raise RuntimeError(f"the verifier does not accept {path}: {done.stdout.decode()}")


def peak_memory(command: list[str]) -> int:
    """Return the peak of the memory of a command in bytes.

    Notes
    -----
    The system counts the memory of the parent before the command has started; so a small process starts it.
    """
    program = (
        "import resource, subprocess, sys; subprocess.run(sys.argv[1:], check=True, stdout=subprocess.DEVNULL);"
        "print(resource.getrusage(resource.RUSAGE_CHILDREN).ru_maxrss)"
    )
    done = subprocess.run([sys.executable, "-I", "-S", "-c", program, *command], check=True, capture_output=True)
    return int(done.stdout) * 1024
