"""``certify demo``: the whole job on a small sheet, from claims to verdict."""

from __future__ import annotations

import shlex
from importlib.resources import files
from pathlib import Path

import click

from certify.commands import codes
from certify.commands.options import JOBS, PATH, workers
from certify.commands.prove import outcomes, say_outcomes
from certify.commands.terminal import printable, say_row
from certify.commands.verify import run_verifier
from certify.errors import BadInput

__all__ = ["demo"]

_HELP = """Show the whole job: claims about a lighting rig.

The claims are written, computed, proved and checked, and you read what each file is for. The folder gets a claim
sheet, which explains itself, and the certificates. A sheet that you have changed is not overwritten.
"""


@click.command(help=_HELP)
@click.option(
    "--out",
    type=PATH,
    default=Path("certify-demo"),
    metavar="DIR",
    show_default=True,
    help="The folder for the sheet and the certificates.",
)
@JOBS
def demo(out: Path, jobs: int) -> int:
    """Write the sheet, prove it, have the certificates checked, and explain."""
    from certify.sheet import read_sheet

    sheet, certificates = out / "lighting-rig.toml", out / "certificates"
    _lay_out(sheet)
    _head(f"The claims stand in {sheet}. They are computed and proved now.")
    claims = read_sheet(sheet)
    with workers(jobs, None) as helpers:
        proving = say_outcomes(claims, outcomes(claims, certificates, workers=helpers))
    _head("A second program, which shares no code with the first, checks the certificates.")
    checking = run_verifier(["--", str(certificates)])
    _explain(sheet, certificates)
    return codes.worst([proving, checking])


def _lay_out(sheet: Path) -> None:
    """Write the sheet of the demo, unless it is there; refuse if something else is."""
    from certify.certificate import write_whole

    text = (files("certify") / "demo" / "lighting-rig.toml").read_bytes()
    try:
        found = sheet.read_bytes()
    except FileNotFoundError:
        with write_whole(sheet) as file:
            file.write(text)
        return
    except OSError as error:
        raise BadInput(
            where=str(sheet), expected="a place for the sheet of the demo", found=f"{error.strerror}"
        ) from error
    if found != text:
        raise BadInput(
            where=str(sheet),
            expected="no file, or the sheet of the demo as it was written",
            found="another one; prove it with certify prove, or choose another folder with --out",
        )


def _head(text: str) -> None:
    click.secho(f"\n{printable(text)}\n", bold=True)


def _explain(sheet: Path, certificates: Path) -> None:
    shown, folder = (printable(shlex.quote(str(path))) for path in (sheet, certificates))
    _head("What the files are for")
    rows = {
        "sheet": [str(sheet), "Your claims: you write and keep it. Its comments explain how."],
        "certificates": [
            str(certificates / "*.cert.jsonl"),
            "One for each claim, with the whole statement and its proof: you publish them beside your table.",
        ],
        "fingerprint": ["It belongs to one statement and no other: you print it beside the theorem."],
        "verifier": [
            str(files("certify") / "verifier.py"),
            "The one file that a referee runs, and may read: python3 -I -S verifier.py certificates",
        ],
    }
    for name, lines in rows.items():
        say_row(name, lines, list(rows))
    _head("What to do next")
    click.echo(f"Read {printable(str(sheet))}, change Z^34 in it to Z^35, and see how a false claim ends:\n")
    click.echo(f"    certify prove {shown}\n")
    click.echo("Change a digit in a certificate, and see what a referee would be told:\n")
    click.echo(f"    certify verify {folder}")
