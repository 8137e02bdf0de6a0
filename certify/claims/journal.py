"""A journal of solved tasks, so that a run that was killed can go on where it stopped."""

from __future__ import annotations

import hashlib
import json
import os
import time
import zlib
from collections.abc import Iterator
from pathlib import Path
from types import TracebackType
from typing import IO, Any

from certify import __version__
from certify.certificate import canonical_line
from certify.certificate.canonical import canonical_bytes, integer_of, integer_value
from certify.claims.base import Claim, Solved, group_value
from certify.errors import BadInput
from certify.exact import AbelianGroup

__all__ = ["Journal"]

_PATIENCE = 5.0
"""Seconds of work that a failure of power may cost."""


class Journal:
    """The solutions of the first tasks of a claim, in a file that survives the process.

    Parameters
    ----------
    path : Path
        Made if it is not there. Each line is a solution with a checksum; a line that was not written to its end, and
        what follows it, is forgotten.
    claim : Claim
        The claim whose tasks are solved.

    Raises
    ------
    BadInput
        If the file holds the journal of another claim or was written by another version of certify; if another run
        writes to it; or if it cannot be written.
    """

    def __init__(self, path: Path, claim: Claim[Any]) -> None:
        self.path = path
        self._title = {"claim": _digest(claim), "version": __version__}
        self._synced = time.monotonic()
        try:
            path.parent.mkdir(parents=True, exist_ok=True)
            # Without buffering: what was written once is with the system, and kill -9 cannot take it back.
            self._file: IO[bytes] = open(path, "a+b", buffering=0)  # noqa: SIM115 - closed by __exit__
        except OSError as error:
            raise self._refusal(error) from error
        try:
            self._lock()
            self._begin()
        except BaseException:
            self._file.close()
            raise

    def __enter__(self) -> Journal:
        """Return the journal itself."""
        return self

    def __exit__(
        self, kind: type[BaseException] | None, error: BaseException | None, trace: TracebackType | None
    ) -> None:
        """Close the file; it stays where it is."""
        self._file.close()

    def known(self) -> Iterator[Solved]:
        """Yield the solutions of an earlier run, in order; must be read to the end before one is added."""
        with self.path.open("rb") as file:
            good = len(next(file))
            for line in file:
                value = _checked(line)
                if value is None:
                    break
                good += len(line)
                text, groups, traces = value
                found = tuple(
                    AbelianGroup(integer_of(rank), tuple(map(integer_of, torsion))) for rank, torsion in groups
                )
                yield None if text is None else (text + "\n").encode(), found, tuple(map(integer_of, traces))
        self._file.truncate(good)

    def add(self, solution: Solved) -> None:
        """Append the solution of the next task."""
        line, groups, traces = solution
        value = [
            None if line is None else line.decode().removesuffix("\n"),
            [group_value(group) for group in groups],
            [integer_value(trace) for trace in traces],
        ]
        self._write(_with_checksum(value))
        if time.monotonic() > self._synced + _PATIENCE:
            os.fsync(self._file.fileno())
            self._synced = time.monotonic()

    def _begin(self) -> None:
        """Write the first line, or check that it is that of this claim."""
        with self.path.open("rb") as file:
            first = file.readline()
        found = _checked(first)
        if found is None and not first.endswith(b"\n"):
            self._file.truncate(0)
            self._write(_with_checksum(self._title))
        elif found != self._title:
            expected = "the state of this claim, by this version of certify"
            found_words = "another one; finish it with its own sheet, or choose another folder"
            raise BadInput(where=str(self.path), expected=expected, found=found_words)

    def _lock(self) -> None:
        try:
            import fcntl
        except ImportError:  # Windows has no such locks; two runs on one state are a rare mistake.
            return
        try:
            fcntl.flock(self._file, fcntl.LOCK_EX | fcntl.LOCK_NB)
        except OSError as error:
            found = "one that another run is writing to"
            raise BadInput(where=str(self.path), expected="a state of its own for each run", found=found) from error

    def _write(self, line: bytes) -> None:
        try:
            written = self._file.write(line)
            while written < len(line):
                written += self._file.write(line[written:])
        except OSError as error:
            raise self._refusal(error) from error

    def _refusal(self, error: OSError) -> BadInput:
        found = f"{error.strerror or error}"
        return BadInput(where=f"writing {self.path}", expected="a place that can be written", found=found)


def _digest(claim: Claim[Any]) -> str:
    """Return a name of the work that a claim makes: what it states, apart from values that are only found."""
    return hashlib.sha256(canonical_bytes([claim.route, claim.question()])).hexdigest()


def _with_checksum(value: Any) -> bytes:
    line = canonical_bytes(value)
    return canonical_line([zlib.crc32(line), value])


def _checked(line: bytes) -> Any:
    """Return the value of a line, or None if it was not written to its end."""
    try:
        checksum, value = json.loads(line)
    except ValueError:
        return None
    return value if line.endswith(b"\n") and zlib.crc32(canonical_bytes(value)) == checksum else None
