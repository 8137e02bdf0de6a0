"""The console entry: calls a verb, and turns whatever happens into an exit code and a sentence."""

from __future__ import annotations

import io
import os
import sys
from collections.abc import Sequence
from contextlib import suppress
from pathlib import Path
from traceback import extract_tb

import click

from certify import __version__
from certify.commands import codes
from certify.commands.compute import compute
from certify.commands.demo import demo
from certify.commands.faults import OUTSIDE, sentence_of
from certify.commands.multiplicities import multiplicities
from certify.commands.picture import picture
from certify.commands.prove import prove
from certify.commands.terminal import tell_fault
from certify.commands.verify import verify

__all__ = ["cli", "main"]

_HELP = """Compute the integral homology of polyhedral products (X, A)^K, and prove it.

An author writes claims into a sheet, and `certify prove` makes a certificate of each: data from which the claim
follows by arithmetic with integers. A referee checks the certificates with `certify verify`, or with the one
file that it runs, which needs nothing but Python.

New here? Say `certify demo`.
"""

_CODES = """Exit codes: 0 everything was proved or accepted; 1 a claim is false or a certificate was rejected; 2 the
command line is wrong; 3 undecided, unreadable, or nothing to do; 70 an internal error; 130 interrupted.
"""


class _Verbs(click.Group):
    """A group that lists its verbs in the order of the work, not of the alphabet."""

    def list_commands(self, ctx: click.Context) -> list[str]:  # noqa: ARG002 - click calls it with one
        """Return the names of the verbs."""
        return list(self.commands)


@click.group(
    cls=_Verbs,
    help=_HELP,
    epilog=_CODES,
    invoke_without_command=True,
    subcommand_metavar="VERB ...",
    context_settings={"help_option_names": ["-h", "--help"]},
)
@click.version_option(__version__, message="certify %(version)s")
@click.pass_context
def cli(context: click.Context) -> int:
    """Without a verb, show how to go on."""
    if context.invoked_subcommand is None:
        click.echo(context.get_help(), err=True)
        return codes.USAGE
    return codes.DONE


for _verb in (prove, verify, compute, multiplicities, picture, demo):
    cli.add_command(_verb)


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command line and return the exit code.

    Parameters
    ----------
    arguments : sequence of str, optional
        What follows the name of the program; by default that of this process.
    """
    _speak_utf8()
    try:
        # Not `cli.main`, which would answer some errors with exit codes of its own.
        with cli.make_context("certify", list(sys.argv[1:] if arguments is None else arguments)) as context:
            code: int = cli.invoke(context)
        sys.stdout.flush()
    except click.exceptions.Exit as end:
        code = end.exit_code
    except (KeyboardInterrupt, Exception) as error:  # noqa: BLE001 - a crash must not look like a verdict
        code, sentence = _end(error)
        if isinstance(error, OSError):
            _let_go_of_output()
        tell_fault(sentence)
    return code


def _end(error: BaseException) -> tuple[int, str]:
    """Return the exit code and the sentence for an error that nobody has caught."""
    match error:
        case click.UsageError():
            command = error.ctx.command_path if error.ctx else "certify"
            return codes.USAGE, f"{error.format_message()} ({command} --help says more.)"
        case KeyboardInterrupt():
            return codes.INTERRUPTED, "interrupted"
        case _ if isinstance(error, OUTSIDE):
            return codes.UNDECIDED, sentence_of(error)
        case _:
            last = extract_tb(error.__traceback__)[-1]
            place = f"{type(error).__name__} in {Path(last.filename).name}, line {last.lineno}"
            what = f"internal error, no verdict ({place}: {error})"
            return codes.INTERNAL, f"{what}; please report it, with what you gave to certify"


def _speak_utf8() -> None:
    """Let mathematics be printed wherever the output goes, and names of files that are no text."""
    for stream in (sys.stdout, sys.stderr):
        if isinstance(stream, io.TextIOWrapper):
            stream.reconfigure(encoding="utf-8", errors="backslashreplace")


def _let_go_of_output() -> None:
    """Send what is left to print nowhere: the output is full or closed, and Python would fail again at its end."""
    with suppress(OSError):
        nowhere = os.open(os.devnull, os.O_WRONLY)
        os.dup2(nowhere, sys.stdout.fileno())
        os.close(nowhere)
