"""What we compare with: Smith forms by general-purpose libraries on the dense boundary matrices of polygon products."""

from __future__ import annotations

import multiprocessing
import time
from multiprocessing.connection import Connection

from certify.exact.complexes import BasedComplex
from certify.products import PolyhedralProduct, cell_complex, parse_pairs
from certify.simplicial.families import polygon

Matrix = list[list[int]]


def polygon_matrices(n: int) -> list[Matrix]:
    """Return both boundary matrices of (D¹, S⁰)^K for the n-gon K."""
    complex_: BasedComplex = cell_complex(PolyhedralProduct(polygon(n), parse_pairs("(D1, S0)", n)))
    return [complex_.dense(1), complex_.dense(2)]


def rational_ranks_seconds(matrices: list[Matrix]) -> float:
    """Return the time that python-flint needs for the ranks over ℚ."""
    from flint import fmpz_mat

    built = [fmpz_mat(matrix) for matrix in matrices]
    start = time.perf_counter()
    for matrix in built:
        matrix.rank()
    return time.perf_counter() - start


def _flint(matrices: list[Matrix], answer: Connection) -> None:
    from flint import fmpz_mat

    built = [fmpz_mat(matrix) for matrix in matrices]
    start = time.perf_counter()
    for matrix in built:
        matrix.snf()
    answer.send(time.perf_counter() - start)


def _pari(matrices: list[Matrix], answer: Connection) -> None:
    from cypari import pari

    pari.allocatemem(2 * 10**9, silent=True)
    built = [pari.matrix(len(m), len(m[0]), [entry for row in m for entry in row]) for m in matrices]
    start = time.perf_counter()
    for matrix in built:
        matrix.matsnf()
    answer.send(time.perf_counter() - start)


def fastest_smith_seconds(n: int) -> tuple[float, str]:
    """Return the time of the faster of PARI's matsnf and python-flint's snf on both matrices of the n-gon, and which.

    Notes
    -----
    PARI runs first; python-flint is stopped once it has taken three times as long, since it has lost by then.
    The matrices are handed over before the clock starts.
    """
    matrices = polygon_matrices(n)
    context = multiprocessing.get_context("fork")
    best, name = float("inf"), ""
    for title, target in (("PARI matsnf", _pari), ("python-flint snf", _flint)):
        receiver, sender = context.Pipe(duplex=False)
        process = context.Process(target=target, args=(matrices, sender))
        process.start()
        if receiver.poll(None if best == float("inf") else 3 * best + 5):
            seconds = float(receiver.recv())
            if seconds < best:
                best, name = seconds, title
        process.terminate()
        process.join()
    return best, name
