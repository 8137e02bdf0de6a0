"""Proving: tasks are solved, in this process or in several, and their records are collected in order."""

from __future__ import annotations

import signal
from collections import deque
from collections.abc import Callable, Iterable, Iterator, Mapping
from concurrent.futures import Future, ProcessPoolExecutor
from dataclasses import dataclass
from itertools import islice
from pathlib import Path
from typing import Any, Generic

from certify.certificate import FORMAT, Spool, canonical_line, fingerprint
from certify.claims.base import Claim, Contribution, Key, Task, solve
from certify.exact import AbelianGroup

__all__ = ["Progress", "Proof", "prove"]

Progress = Callable[[int, int], None]
"""Called now and then with the work that is done and the whole work, in one unit."""

_CHUNK = 64
_AHEAD = 4

_Solved = tuple[bytes | None, tuple[AbelianGroup, ...]]


@dataclass(frozen=True, slots=True)
class Proof(Generic[Key]):
    """A claim that was proved: its groups, its statement, and its records, ready to be written.

    Parameters
    ----------
    claim : Claim
    groups : mapping from degree to AbelianGroup
        The groups that are not zero.
    spool : Spool
        The records; closed by whoever called `prove`.
    """

    claim: Claim[Key]
    groups: Mapping[Key, AbelianGroup]
    spool: Spool

    @property
    def statement(self) -> dict[str, Any]:
        """The statement of the certificate."""
        return self.claim.statement(self.groups)

    @property
    def fingerprint(self) -> str:
        """The SHA-256 of the canonical statement."""
        return fingerprint(self.statement)

    def write(self, path: Path, about: Mapping[str, Any]) -> int:
        """Write the certificate and return its size in bytes; `about` holds the claim's name and prose about it."""
        header = {"about": dict(about), "format": FORMAT, "route": self.claim.route, "statement": self.statement}
        return self.spool.write(path, header)


def prove(claim: Claim[Key], spool: Spool, *, jobs: int = 1, progress: Progress | None = None) -> Proof[Key]:
    """Compute a claim and collect the records that prove it.

    Parameters
    ----------
    claim : Claim
    spool : Spool
        Receives the records.
    jobs : int
        The number of processes; the records do not depend on it.
    progress : Progress, optional

    Raises
    ------
    ClaimIsFalse
        If the claim states groups and they are not those found.
    """

    def contributions() -> Iterator[Contribution]:
        done = 0
        for value in claim.opening():
            spool.add(canonical_line(value))
        for task, (line, groups) in _solved(claim.tasks(), jobs):
            done += task.weight
            if progress is not None:
                progress(done, claim.weight)
            if line is not None:
                spool.add(line)
            yield Contribution(groups, task.source)

    groups = claim.total(contributions())
    claim.check(groups)
    return Proof(claim, groups, spool)


def _solved(tasks: Iterable[Task], jobs: int) -> Iterator[tuple[Task, _Solved]]:
    """Yield the tasks with their solutions, in order."""
    if jobs == 1:
        yield from ((task, solve(task)) for task in tasks)
        return
    rest = iter(tasks)
    waiting: deque[tuple[list[Task], Future[list[_Solved]]]] = deque()
    # A worker leaves Ctrl-C to the process that started it, and ends without a word.
    with ProcessPoolExecutor(jobs, initializer=signal.signal, initargs=(signal.SIGINT, signal.SIG_DFL)) as pool:
        try:
            while True:
                while len(waiting) < _AHEAD * jobs and (chunk := list(islice(rest, _CHUNK))):
                    waiting.append((chunk, pool.submit(_solve_all, chunk)))
                if not waiting:
                    return
                chunk, future = waiting.popleft()
                yield from zip(chunk, future.result(), strict=True)
        finally:
            pool.shutdown(wait=False, cancel_futures=True)


def _solve_all(tasks: list[Task]) -> list[_Solved]:
    return [solve(task) for task in tasks]
