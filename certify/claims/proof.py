"""Proving: tasks are solved, in this process or by workers, and their records are collected in order."""

from __future__ import annotations

from collections import deque
from collections.abc import Callable, Iterable, Iterator, Mapping
from concurrent.futures import Executor, Future
from dataclasses import dataclass
from itertools import islice
from pathlib import Path
from typing import Any, Generic

from certify.certificate import FORMAT, Spool, canonical_line, fingerprint
from certify.claims.base import Claim, Contribution, Found, Solved, Task, solve
from certify.claims.journal import Journal
from certify.errors import LimitReached

__all__ = ["Progress", "Proof", "Workers", "prove"]

Progress = Callable[[int, int], None]
"""Called now and then with the work that is done and the whole work, in one unit."""

_CHUNK = 64
_AHEAD = 16
_PATIENCE = 1.0
_GONE = "those who computed are gone; with --state, what is finished is kept for later"


@dataclass(frozen=True, slots=True)
class Workers:
    """Processes that solve tasks: on this machine, or on others.

    Parameters
    ----------
    executor : Executor
    number : int
        How many tasks it solves at the same time.
    lost : tuple of types of exceptions
        What is raised when these processes are gone for good.
    alive : callable
        Tells whether they may still answer; it is asked now and then while somebody waits.
    """

    executor: Executor
    number: int
    lost: tuple[type[Exception], ...] = ()
    alive: Callable[[], bool] = lambda: True


@dataclass(frozen=True, slots=True)
class Proof(Generic[Found]):
    """A claim that was proved: what was found, its statement, and its records, ready to be written.

    Parameters
    ----------
    claim : Claim
    found : mapping from degree to AbelianGroup, where the claim is about groups
        The groups that are not zero.
    spool : Spool
        The records; closed by whoever called `prove`.
    """

    claim: Claim[Found]
    found: Found
    spool: Spool

    @property
    def statement(self) -> dict[str, Any]:
        """The statement of the certificate."""
        return self.claim.statement(self.found)

    @property
    def fingerprint(self) -> str:
        """The SHA-256 of the canonical statement."""
        return fingerprint(self.statement)

    def write(self, path: Path, about: Mapping[str, Any]) -> int:
        """Write the certificate and return its size in bytes; `about` holds the claim's name and prose about it."""
        header = {"about": dict(about), "format": FORMAT, "route": self.claim.route, "statement": self.statement}
        return self.spool.write(path, header)


def prove(
    claim: Claim[Found],
    spool: Spool,
    *,
    workers: Workers | None = None,
    journal: Journal | None = None,
    progress: Progress | None = None,
) -> Proof[Found]:
    """Compute a claim and collect the records that prove it.

    Parameters
    ----------
    claim : Claim
    spool : Spool
        Receives the records.
    workers : Workers, optional
        Who solves the tasks; by default this process. The records do not depend on it.
    journal : Journal, optional
        Knows the solutions of the first tasks from an earlier run, and is told those of the others.
    progress : Progress, optional

    Raises
    ------
    ClaimIsFalse
        If the claim states values and they are not those found.
    LimitReached
        If the workers are gone before the work is done, or the claim needs more than a stated limit.
    """

    def contributions() -> Iterator[Contribution]:
        done = 0
        for value in claim.opening():
            spool.add(canonical_line(value))
        for task, (line, groups, traces) in _solved(claim.tasks(), workers, journal):
            done += task.weight
            if progress is not None:
                progress(done, claim.weight)
            if line is not None:
                spool.add(line)
            yield Contribution(groups, task.source, traces)

    found = claim.total(contributions())
    claim.check(found)
    return Proof(claim, found, spool)


def _solved(tasks: Iterable[Task], workers: Workers | None, journal: Journal | None) -> Iterator[tuple[Task, Solved]]:
    """Yield the tasks with their solutions, in order: first those that the journal knows."""
    rest = iter(tasks)
    if journal is not None:
        for solution in journal.known():
            task = next(rest, None)
            if task is None:
                return
            yield task, solution
    for task, solution in _solved_by(workers, rest) if workers else ((task, solve(task)) for task in rest):
        if journal is not None:
            journal.add(solution)
        yield task, solution


def _solved_by(workers: Workers, tasks: Iterator[Task]) -> Iterator[tuple[Task, Solved]]:
    """Yield the tasks with their solutions, in order, while a bounded number of tasks is with the workers."""
    waiting: deque[tuple[list[Task], Future[list[Solved]]]] = deque()
    try:
        while True:
            while len(waiting) < _AHEAD * workers.number and (chunk := list(islice(tasks, _CHUNK))):
                waiting.append((chunk, workers.executor.submit(_solve_all, chunk)))
            if not waiting:
                return
            chunk, future = waiting.popleft()
            yield from zip(chunk, _result(future, workers), strict=True)
    except workers.lost as error:
        raise LimitReached(_GONE) from error
    finally:
        for _, future in waiting:
            future.cancel()


def _result(future: Future[list[Solved]], workers: Workers) -> list[Solved]:
    """Return what the workers have found, however long it takes while they are alive."""
    while True:
        try:
            return future.result(timeout=_PATIENCE)
        except TimeoutError as error:
            if not workers.alive():
                raise LimitReached(_GONE) from error


def _solve_all(tasks: list[Task]) -> list[Solved]:
    return [solve(task) for task in tasks]
