"""``certify prove``: every claim of a sheet is computed, and gets a certificate if it is true."""

from __future__ import annotations

import os
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING, Any, Literal

import click

from certify.commands import codes
from certify.commands.faults import OUTSIDE, sentence_of
from certify.commands.options import JOBS, JSON, PATH
from certify.commands.terminal import counted, printable, progress, say_row, tell_fault
from certify.errors import BadInput, ClaimIsFalse

if TYPE_CHECKING:
    from certify.exact import AbelianGroup
    from certify.sheet import NamedClaim, Sheet

__all__ = ["Outcome", "outcomes", "prove", "say_outcomes"]

_HELP = """Prove the claims of a sheet, and write their certificates.

A certificate holds the statement in full and the data from which it follows: check it with `certify verify`, publish
it beside your table, and print its fingerprint beside the theorem. A claim that is false gets none; you are told the
claimed value and the true one, and the other claims are proved all the same. A claim that states no groups asks for
them.
"""

_EPILOG = """A sheet is a TOML file. The smallest one:

\b
  [complexes.ring]
  facets = [[1, 2], [2, 3], [3, 4], [4, 1]]

\b
  [[claims]]
  id = "torus"
  kind = "homology"
  complex = "ring"
  pair = "(D1, S0)"
  groups = { 0 = "Z", 1 = "Z^2", 2 = "Z" }

`certify demo` writes a longer one, with comments.
"""

_CODE = {"proved": codes.DONE, "false": codes.REFUSED, "undecided": codes.UNDECIDED}


@dataclass(frozen=True, slots=True)
class Outcome:
    """What became of a claim.

    Parameters
    ----------
    item : NamedClaim
    path : Path
        The certificate, written if the claim is proved.
    verdict : {"proved", "false", "undecided"}
    sentence : str
        Why there is no certificate; empty if there is one.
    groups : mapping from degree to AbelianGroup, or None
    size : int or None
        The bytes of the certificate.
    fingerprint : str or None
    """

    item: NamedClaim
    path: Path
    verdict: Literal["proved", "false", "undecided"]
    sentence: str = ""
    groups: Mapping[int, AbelianGroup] | None = None
    size: int | None = None
    fingerprint: str | None = None

    @property
    def code(self) -> int:
        """The exit code for this claim alone."""
        return _CODE[self.verdict]


@click.command(help=_HELP, epilog=_EPILOG)
@click.argument("sheet", type=PATH)
@click.option(
    "--out",
    metavar="DIR",
    type=PATH,
    show_default="certificates, beside SHEET",
    help="The folder for the certificates.",
)
@JOBS
@click.option("--gzip", "packed", is_flag=True, help="Write compressed certificates (*.cert.jsonl.gz).")
@JSON
def prove(sheet: Path, out: Path | None, jobs: int, packed: bool, as_json: bool) -> int:
    """Read the sheet, prove its claims, and say what came of them."""
    from certify.commands.results import say_json
    from certify.sheet import read_sheet

    claims = read_sheet(sheet)
    folder = sheet.parent / "certificates" if out is None else out
    results = outcomes(claims, folder, jobs=jobs, packed=packed)
    if not as_json:
        return say_outcomes(claims, results)
    done = list(results)
    code = codes.worst(outcome.code for outcome in done)
    verdict = next(verdict for verdict, its_code in _CODE.items() if its_code == code)
    say_json({"verdict": verdict, "claims": [_value(outcome) for outcome in done]})
    return code


def outcomes(sheet: Sheet, folder: Path, *, jobs: int, packed: bool = False) -> Iterator[Outcome]:
    """Return what becomes of each claim of a sheet, one after the other as they are proved; faults are told at once.

    Raises
    ------
    BadInput
        If the folder cannot hold files; this is looked at before the work starts.
    """
    _require_folder(folder)
    return (_outcome(item, folder, jobs, packed) for item in sheet.claims)


def _outcome(item: NamedClaim, folder: Path, jobs: int, packed: bool) -> Outcome:
    from certify.certificate import certificate_name

    outcome = _attempt(item, folder / certificate_name(item.id, packed=packed), jobs)
    if outcome.verdict == "undecided":
        tell_fault(f"claim {item.id}: {outcome.sentence}")
    return outcome


def _attempt(item: NamedClaim, path: Path, jobs: int) -> Outcome:
    from certify.certificate import Spool
    from certify.claims import prove as prove_claim

    try:
        with progress(item.id) as report, Spool() as spool:
            proof = prove_claim(item.claim, spool, jobs=jobs, progress=report)
            size = proof.write(path, item.about)
        return Outcome(item, path, "proved", "", proof.groups, size, proof.fingerprint)
    except ClaimIsFalse as fault:
        return Outcome(item, path, "false", str(fault))
    except OUTSIDE as error:
        return Outcome(item, path, "undecided", sentence_of(error))


def _require_folder(folder: Path) -> None:
    """Refuse a folder that cannot be written, without making it: nobody should learn that after hours of work."""
    nearest = next(place for place in (folder, *folder.absolute().parents) if place.exists())
    if not nearest.is_dir():
        raise BadInput(where=f"the folder {folder}", expected="a folder", found=f"{nearest}, which is a file")
    if not os.access(nearest, os.W_OK | os.X_OK):
        raise BadInput(where=f"the folder {folder}", expected="a place that can be written", found="no permission")


def say_outcomes(sheet: Sheet, results: Iterator[Outcome]) -> int:
    """Print a row for each claim as soon as its outcome is known, and return the exit code."""
    if sheet.title:
        click.secho(f"{printable(sheet.title)}\n", bold=True)
    names = [item.id for item in sheet.claims]
    done = []
    for outcome in results:
        if outcome.verdict != "undecided":
            say_row(outcome.item.id, list(_lines(outcome)), names)
        done.append(outcome)
    counts = {verdict: sum(outcome.verdict == verdict for outcome in done) for verdict in _CODE}
    rest = [f"{count} {verdict}" for verdict, count in counts.items() if count and verdict != "proved"]
    click.echo(", ".join([f"{counts['proved']} of {counted(len(done), 'claim')} proved", *rest]))
    return codes.worst(outcome.code for outcome in done)


def _lines(outcome: Outcome) -> Iterator[str]:
    from certify.commands.results import homology_lines, pair_lines

    claim = outcome.item.claim
    if outcome.groups is None:
        yield f"false: {outcome.sentence}"
        if outcome.path.exists():
            yield f"no certificate was written; {outcome.path} is of an earlier run"
        return
    yield from homology_lines(claim, outcome.groups)
    yield f"where K is {outcome.item.complex}, on {counted(claim.product.complex.vertex_count, 'vertex', 'vertices')}"
    yield from pair_lines(claim)
    yield f"certificate {outcome.path}, {counted(outcome.size or 0, 'byte')}"
    yield f"fingerprint {outcome.fingerprint}"


def _value(outcome: Outcome) -> dict[str, Any]:
    from certify.commands.results import homology_value

    proved = outcome.verdict == "proved"
    return {
        "claim": outcome.item.id,
        "verdict": outcome.verdict,
        "sentence": outcome.sentence,
        "homology": homology_value(outcome.groups or {}) if proved else None,
        "path": str(outcome.path) if proved else None,
        "bytes": outcome.size,
        "fingerprint": outcome.fingerprint,
    }
