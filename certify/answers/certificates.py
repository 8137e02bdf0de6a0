"""The certificate that stands behind an answer; its records wait in a file until somebody wants them."""

from __future__ import annotations

import json
import os
import subprocess
import sys
import tempfile
import weakref
from importlib.resources import as_file, files
from pathlib import Path
from typing import Any

from certify.certificate import Spool
from certify.certificate.about import about_claim, name_in
from certify.claims import Proof, prove
from certify.claims.base import Claim, Found, GroupsClaim, Key
from certify.claims.workers import processes
from certify.errors import BadInput, InternalError, LimitReached
from certify.exact import AbelianGroup

__all__ = ["Certificate", "proved", "proved_value"]


class Certificate:
    """The proof of an answer, ready to be written and checked.

    Attributes
    ----------
    title : str
        What is proved, in the notation of mathematics.
    fingerprint : str
        The SHA-256 of the canonical statement; print it beside the theorem.

    Notes
    -----
    The records lie in a temporary file that goes away with this object. It is not kept open, so that thousands of
    answers can be held at once.
    """

    def __init__(self, proof: Proof[Any], title: str) -> None:
        self.title = title
        self.fingerprint: str = proof.fingerprint
        handle, name = tempfile.mkstemp(prefix="certify-", suffix=".cert.jsonl")
        os.close(handle)
        self._file = Path(name)
        weakref.finalize(self, self._file.unlink, missing_ok=True)
        self._labels = proof.claim.base.labels
        proof.write(self._file, about_claim("answer", self._labels))

    def __repr__(self) -> str:
        """Say what is proved, and the fingerprint."""
        return f"certificate of {self.title}, fingerprint {self.fingerprint}"

    def write(self, path: str | os.PathLike[str]) -> None:
        """Write the certificate to a file, whole or not at all.

        Parameters
        ----------
        path : str or path
            ``NAME.cert.jsonl``, or ``NAME.cert.jsonl.gz`` for a compressed one; the claim gets this name.

        Raises
        ------
        BadInput
            If the file has another name, or cannot be written.
        """
        target = Path(path)
        name = name_in(target)
        if name is None:
            raise BadInput(where="the path", expected="a file NAME.cert.jsonl or NAME.cert.jsonl.gz", found=str(path))
        with Spool() as spool, self._file.open("rb") as lines:
            header = json.loads(next(lines))
            waiting = next(lines)
            # The last line counts the bytes before it; the spool writes a new one.
            for line in lines:
                spool.add(waiting)
                waiting = line
            spool.write(target, header | {"about": about_claim(name, self._labels)})

    def verify(self) -> str:
        """Let the verifier check the certificate, as a referee would, and return the statement that it proves.

        Returns
        -------
        str
            Written by the verifier from the data that it has checked.

        Raises
        ------
        LimitReached
            If the certificate is larger than the limits that the verifier has by default.
        InternalError
            If it is not accepted.

        Notes
        -----
        The verifier shares no code with the rest of certify and runs in a process of its own.
        """
        with as_file(files("certify") / "verifier.py") as verifier:
            command = [sys.executable, "-I", "-S", str(verifier), "--json", "--", str(self._file)]
            output = subprocess.run(command, capture_output=True, encoding="utf-8", check=False).stdout
        report = json.loads(output)["files"][0] if output else {"verdict": "none", "sentence": "the verifier was ended"}
        if report["verdict"] == "undecided":
            raise LimitReached(f"the verifier gives no verdict: {report['sentence']}; certify verify can raise limits")
        if report["verdict"] != "accepted" or report["fingerprint"] != self.fingerprint:
            raise InternalError(f"the certificate is not accepted: {report['sentence']}; please report it")
        return str(report["statement"])


def proved_value(claim: Claim[Found], title: str, jobs: int = 1) -> tuple[Found, Certificate]:
    """Return what a claim asks for, and the certificate that proves it."""
    with Spool() as spool, processes(jobs) as workers:
        proof = prove(claim, spool, workers=workers)
        return proof.found, Certificate(proof, title)


def proved(claim: GroupsClaim[Key], title: str, jobs: int) -> tuple[tuple[tuple[Key, AbelianGroup], ...], Certificate]:
    """Return the groups of a claim that are not zero, keys ascending, and the certificate that proves them."""
    found, certificate = proved_value(claim, title, jobs)
    return tuple(found.items()), certificate
