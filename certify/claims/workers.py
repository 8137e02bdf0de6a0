"""Who solves the tasks of a claim: processes of this machine, or of a Dask cluster."""

from __future__ import annotations

import logging
import signal
from collections.abc import Iterator
from concurrent.futures import CancelledError, ProcessPoolExecutor
from contextlib import contextmanager

from certify.claims.proof import Workers
from certify.errors import BadInput

__all__ = ["cluster", "processes"]

_SECONDS = 10
"""How long a cluster has to answer the first time, and to get workers."""


@contextmanager
def processes(number: int) -> Iterator[Workers | None]:
    """Give so many processes of this machine, or none for a single one: then the work is done where it is asked for.

    Raises
    ------
    BadInput
        If it is less than one.
    """
    if number < 1:
        raise BadInput(where="jobs", expected="at least one process", found=f"{number}")
    if number == 1:
        yield None
        return
    # A worker leaves Ctrl-C to the process that started it, and ends without a word.
    pool = ProcessPoolExecutor(number, initializer=signal.signal, initargs=(signal.SIGINT, signal.SIG_DFL))
    try:
        yield Workers(pool, number)
    finally:
        pool.shutdown(wait=False, cancel_futures=True)


@contextmanager
def cluster(address: str) -> Iterator[Workers]:
    """Give the workers of a Dask cluster, on which the same version of certify must be installed.

    Parameters
    ----------
    address : str
        Of the scheduler, for example ``tcp://10.0.0.5:8786``.

    Raises
    ------
    BadInput
        If the extra is not installed, nobody answers at the address, or the cluster has no workers.

    Notes
    -----
    A worker that dies is no trouble: the scheduler gives its tasks to another one. If the scheduler vanishes, `prove`
    raises LimitReached.
    """
    try:
        from distributed import Client, KilledWorker
    except ImportError as error:
        found = "no Dask; install certify with the extra cluster"
        raise BadInput(where="the cluster", expected="dask.distributed", found=found) from error
    # What it logs about lost connections is told in one sentence by whoever waits for the work.
    for name in ("tornado.application", *logging.root.manager.loggerDict):
        if name.startswith(("distributed", "tornado")):
            logging.getLogger(name).setLevel(logging.CRITICAL + 1)
    try:
        client = Client(address, timeout=_SECONDS, set_as_default=False)
    except (OSError, ValueError) as error:
        found = f"nobody who answers at {address}"
        raise BadInput(where="the cluster", expected="the address of a Dask scheduler", found=found) from error
    try:
        client.wait_for_workers(1, timeout=_SECONDS)
        number = sum(client.nthreads().values())
        yield Workers(
            client.get_executor(pure=False),
            max(number, 1),
            lost=(CancelledError, KilledWorker),
            alive=lambda: client.status == "running",
        )
    except TimeoutError as error:
        raise BadInput(where="the cluster", expected="at least one worker", found="none") from error
    finally:
        client.close(timeout=1)
