"""Writing: records go to a spool while the claim is computed; the file appears whole or not at all."""

from __future__ import annotations

import gzip
import hashlib
import os
import tempfile
from collections.abc import Iterator
from contextlib import contextmanager, suppress
from pathlib import Path
from types import TracebackType
from typing import IO, Any

from certify.certificate.canonical import canonical_line
from certify.errors import BadInput

__all__ = ["Spool", "certificate_name", "write_whole"]

_PIECE = 1 << 20


def certificate_name(claim: str, *, packed: bool = False) -> str:
    """Return the file name of a claim's certificate."""
    return f"{claim}.cert.jsonl.gz" if packed else f"{claim}.cert.jsonl"


class Spool:
    """The records of one certificate, kept in a temporary file until the statement is complete.

    Notes
    -----
    The header holds the groups that were found, so it can only be written after the last record is known. Memory stays
    bounded by the largest record.
    """

    def __init__(self) -> None:
        self.records = 0
        self._file: IO[bytes] = tempfile.TemporaryFile()  # noqa: SIM115 - closed by __exit__

    def __enter__(self) -> Spool:
        """Return the spool itself."""
        return self

    def __exit__(
        self, kind: type[BaseException] | None, error: BaseException | None, trace: TracebackType | None
    ) -> None:
        """Give the temporary file back."""
        self._file.close()

    def add(self, line: bytes) -> None:
        """Append a record, given as its canonical line."""
        self.records += 1
        try:
            self._file.write(line)
        except OSError as error:
            found = f"{error.strerror or error}"
            raise BadInput(where="the temporary folder", expected="room for the records", found=found) from error

    def write(self, path: Path, header: dict[str, Any]) -> int:
        """Write header, records and end record to `path` and return the number of bytes of the file.

        Raises
        ------
        BadInput
            If the file cannot be written; then nothing is left at `path` that was not there before.
        """
        digest = hashlib.sha256()
        with write_whole(path) as raw:
            file = gzip.GzipFile("", "wb", 9, raw, mtime=0) if path.suffix == ".gz" else raw
            for piece in self._pieces(header):
                digest.update(piece)
                file.write(piece)
            file.write(canonical_line({"end": {"records": self.records, "sha256": digest.hexdigest()}}))
            if file is not raw:
                file.close()
        return path.stat().st_size

    def _pieces(self, header: dict[str, Any]) -> Iterator[bytes]:
        yield canonical_line(header)
        self._file.seek(0)
        while piece := self._file.read(_PIECE):
            yield piece
        self._file.seek(0, os.SEEK_END)


@contextmanager
def write_whole(path: Path) -> Iterator[IO[bytes]]:
    """Open a file that replaces `path` in one step when the block ends well, and leaves no trace otherwise.

    Raises
    ------
    BadInput
        If the folder cannot be made or the file cannot be written (no permission, a full disk).
    """
    temporary: Path | None = None
    try:
        path.parent.mkdir(parents=True, exist_ok=True)
        handle, name = tempfile.mkstemp(prefix=f".{path.name}.", dir=path.parent)
        temporary = Path(name)
        with os.fdopen(handle, "wb") as file:
            yield file
            file.flush()
            os.fsync(file.fileno())
        temporary.chmod(0o644)
        temporary.replace(path)
        temporary = None
    except OSError as error:
        raise BadInput(
            where=f"writing {path}", expected="a place that can be written", found=f"{error.strerror or error}"
        ) from error
    finally:
        if temporary is not None:
            with suppress(OSError):
                temporary.unlink()
