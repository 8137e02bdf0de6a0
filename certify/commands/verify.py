"""``certify verify``: runs the very file that a referee would run, in a process of its own."""

from __future__ import annotations

import signal
import subprocess
import sys
from collections.abc import Iterator, Sequence
from contextlib import contextmanager
from importlib.resources import as_file, files

import click

from certify.commands import codes
from certify.commands.options import JSON
from certify.commands.terminal import progress, tell_fault

__all__ = ["run_verifier", "verify"]

_HELP = """Check certificates, and say what they prove.

PATH is a certificate (*.cert.jsonl or *.cert.jsonl.gz) or a folder to search for them. For each one you read whether
it is accepted, rejected or undecided; if it is accepted, the statement that was proved, written from the checked data
and not from anybody's prose; otherwise the reason, and the line of the file.

Limits keep a file from taking all your memory or time; a file that reaches one is undecided. Each has a default.

The work is done by one file that shares no code with the rest of certify and runs in a process of its own, with
nothing but the standard library of Python.
"""

_VERDICTS = {codes.DONE, codes.REFUSED, codes.USAGE, codes.UNDECIDED, codes.INTERNAL}


@click.command(help=_HELP)
@click.argument("paths", metavar="PATH...", nargs=-1, required=True)
@JSON
@click.option(
    "--max-bytes", metavar="N", type=click.IntRange(min=1), help="Give up on a file of more bytes, decompressed."
)
@click.option("--max-cells", metavar="N", type=click.IntRange(min=1), help="Give up on a space of more cells.")
@click.option("--max-bits", metavar="N", type=click.IntRange(min=1), help="Give up on an integer of more bits.")
@click.option(
    "--max-seconds", metavar="N", type=click.FloatRange(min=0), help="Give up on a file after so many seconds."
)
def verify(paths: tuple[str, ...], as_json: bool, **limits: float | None) -> int:
    """Pass the command line on to the verifier."""
    options = ["--json"] if as_json else []
    for name, limit in limits.items():
        if limit is not None:
            options += [f"--{name.replace('_', '-')}", str(limit)]
    return run_verifier([*options, "--", *paths])


def run_verifier(arguments: Sequence[str]) -> int:
    """Run the verifier, whose output goes where ours goes, and return its exit code."""
    sys.stdout.flush()
    watched = sys.stdout.isatty() and sys.stderr.isatty()
    with as_file(files("certify") / "verifier.py") as file:
        command = [sys.executable, "-I", "-S", str(file), *arguments]
        with _interrupts_ignored():
            process = subprocess.Popen(command, stdout=subprocess.PIPE if watched else None)
        try:
            _pass_on(process)
            code = process.wait()
        finally:
            process.kill()
            process.wait()
    if code not in _VERDICTS:
        how = f"was ended by signal {-code}" if code < 0 else f"ended with the unknown exit code {code}"
        tell_fault(f"the verifier {how}, no verdict")
        return codes.INTERNAL
    return code


def _pass_on(process: subprocess.Popen[bytes]) -> None:
    """Print what the verifier prints, and show that it is at work while nothing comes."""
    while process.stdout is not None:
        with progress("verifying"):
            line = process.stdout.readline()
        if not line:
            return
        sys.stdout.buffer.write(line)
        sys.stdout.flush()


@contextmanager
def _interrupts_ignored() -> Iterator[None]:
    """Ignore Ctrl-C for a moment, and so for good in a process that is started meanwhile: we end it ourselves."""
    before = signal.signal(signal.SIGINT, signal.SIG_IGN)
    try:
        yield
    finally:
        signal.signal(signal.SIGINT, before)
