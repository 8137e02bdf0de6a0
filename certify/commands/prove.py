"""``certify prove``: every claim of a sheet is computed, and gets a certificate if it is true."""

from __future__ import annotations

import os
from collections.abc import Iterator, Mapping
from contextlib import nullcontext, suppress
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING, Any, Literal

import click

from certify.commands import codes
from certify.commands.faults import OUTSIDE, sentence_of
from certify.commands.options import CLUSTER, JOBS, JSON, PATH, workers
from certify.commands.terminal import counted, printable, progress, say_row, tell_fault
from certify.errors import BadInput, ClaimIsFalse, LimitReached

if TYPE_CHECKING:
    from certify.claims import Workers
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

_MOST_CELLS = 10_000_000
"""What the verifier counts up to if it is given no other limit."""

_JOURNAL = ".state.jsonl"

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
    lines : tuple of str
        What was found, as in print.
    value : mapping or None
        What was found, as JSON.
    size : int or None
        The bytes of the certificate.
    fingerprint : str or None
    """

    item: NamedClaim
    path: Path
    verdict: Literal["proved", "false", "undecided"]
    sentence: str = ""
    lines: tuple[str, ...] = ()
    value: Mapping[str, Any] | None = None
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
@CLUSTER
@click.option(
    "--state",
    metavar="DIR",
    type=PATH,
    help="Keep what is computed in DIR; if the run is killed, the same command goes on where it stopped.",
)
@click.option("--gzip", "packed", is_flag=True, help="Write compressed certificates (*.cert.jsonl.gz).")
@JSON
def prove(
    sheet: Path, out: Path | None, jobs: int, cluster: str | None, state: Path | None, packed: bool, as_json: bool
) -> int:
    """Read the sheet, prove its claims, and say what came of them."""
    from certify.commands.results import say_json
    from certify.sheet import read_sheet

    with progress("reading"):
        claims = read_sheet(sheet)
    folder = sheet.parent / "certificates" if out is None else out
    with workers(jobs, cluster) as helpers:
        results = outcomes(claims, folder, workers=helpers, packed=packed, state=state)
        if not as_json:
            return say_outcomes(claims, results)
        done = list(results)
    code = codes.worst(outcome.code for outcome in done)
    verdict = next(verdict for verdict, its_code in _CODE.items() if its_code == code)
    say_json({"verdict": verdict, "claims": [_value(outcome) for outcome in done]})
    return code


def outcomes(
    sheet: Sheet, folder: Path, *, workers: Workers | None = None, packed: bool = False, state: Path | None = None
) -> Iterator[Outcome]:
    """Return what becomes of each claim of a sheet, one after the other as they are proved; faults are told at once.

    Parameters
    ----------
    sheet : Sheet
    folder : Path
        Where certificates go.
    workers : Workers, optional
        Who computes; by default this process.
    packed : bool
        Whether certificates are compressed.
    state : Path, optional
        A folder for journals. They are removed once every claim has been decided.

    Raises
    ------
    BadInput
        If the folder cannot hold files, or the state is of another sheet; this is looked at before the work starts.
    """
    _require_folder(folder)
    if state is not None:
        _require_folder(state)
        _require_own_state(state, sheet)
    return _outcomes(sheet, folder, workers, packed, state)


def _outcomes(
    sheet: Sheet, folder: Path, workers: Workers | None, packed: bool, state: Path | None
) -> Iterator[Outcome]:
    from certify.certificate import certificate_name

    decided = True
    for item in sheet.claims:
        journal = None if state is None else state / f"{item.id}{_JOURNAL}"
        outcome = _attempt(item, folder / certificate_name(item.id, packed=packed), workers, journal)
        if outcome.verdict == "undecided":
            decided = False
            tell_fault(f"claim {item.id}: {outcome.sentence}")
        yield outcome
    if state is not None and decided:
        for item in sheet.claims:
            (state / f"{item.id}{_JOURNAL}").unlink(missing_ok=True)
        with suppress(OSError):
            state.rmdir()


def _attempt(item: NamedClaim, path: Path, workers: Workers | None, journal_path: Path | None) -> Outcome:
    from certify.certificate import Spool
    from certify.claims import prove as prove_claim
    from certify.claims.journal import Journal

    claim = item.claim
    try:
        if isinstance(claim, LimitReached):
            raise claim
        with (
            progress(item.id) as report,
            Spool() as spool,
            Journal(journal_path, claim) if journal_path else nullcontext() as journal,
        ):
            proof = prove_claim(claim, spool, workers=workers, journal=journal, progress=report)
            size = proof.write(path, item.about)
        lines = tuple(claim.lines(proof.found))
        return Outcome(item, path, "proved", "", lines, claim.value(proof.found), size, proof.fingerprint)
    except ClaimIsFalse as fault:
        return Outcome(item, path, "false", str(fault))
    except OUTSIDE as error:
        return Outcome(item, path, "undecided", sentence_of(error))


def _require_own_state(state: Path, sheet: Sheet) -> None:
    """Refuse a folder with journals of claims that the sheet does not have."""
    own = {f"{item.id}{_JOURNAL}" for item in sheet.claims}
    for path in sorted(state.glob(f"*{_JOURNAL}")):
        if path.name not in own:
            expected = "an empty folder, or the state of an earlier run with this sheet"
            raise BadInput(where=f"the folder {state}", expected=expected, found=f"{path.name}, of another sheet")


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
    from certify.commands.results import shortened

    claim = outcome.item.claim
    if outcome.verdict != "proved" or isinstance(claim, LimitReached):
        yield f"false: {outcome.sentence}"
        if outcome.path.exists():
            yield f"no certificate was written; {outcome.path} is of an earlier run"
        return
    base = claim.base
    yield from shortened(outcome.lines)
    if outcome.item.complex:
        yield f"where K is {outcome.item.complex}, on {counted(base.vertex_count, 'vertex', 'vertices')}"
    yield from claim.remarks()
    if 2 * claim.group_cells > _MOST_CELLS:
        limit = 10 ** len(str(2 * claim.group_cells))
        yield f"the group is large; the verifier may need certify verify --max-cells {limit}"
    yield f"certificate {outcome.path}, {counted(outcome.size or 0, 'byte')}"
    yield f"fingerprint {outcome.fingerprint}"


def _value(outcome: Outcome) -> dict[str, Any]:
    proved = outcome.verdict == "proved"
    return {
        "claim": outcome.item.id,
        "verdict": outcome.verdict,
        "sentence": outcome.sentence,
        "kind": outcome.item.kind,
        "found": outcome.value,
        "path": str(outcome.path) if proved else None,
        "bytes": outcome.size,
        "fingerprint": outcome.fingerprint,
    }
