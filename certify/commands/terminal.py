"""What verbs share when they speak to a person: rows of text, faults, progress."""

from __future__ import annotations

import shutil
import sys
import textwrap
import threading
import time
from collections.abc import Callable, Iterator, Sequence
from contextlib import contextmanager
from typing import TYPE_CHECKING

import click

if TYPE_CHECKING:
    from rich.progress import Progress

__all__ = ["counted", "printable", "progress", "say_row", "tell_fault"]

_WIDEST_NAME = 24
_PATIENCE = 1.0
"""Seconds before progress is shown."""

_REFRESH = 0.1
"""Seconds between two looks at the work."""


def printable(text: str) -> str:
    r"""Return a text on one line that cannot disturb a terminal.

    Examples
    --------
    >>> print(printable("a\nb\x1b[2J"))
    a\nb\x1b[2J
    """
    return "".join(sign if sign.isprintable() else sign.encode("unicode_escape").decode() for sign in text)


def counted(number: int, one: str, many: str | None = None) -> str:
    """Return a number with its noun.

    Examples
    --------
    >>> counted(1, "claim"), counted(12345, "byte"), counted(0, "vertex", "vertices")
    ('1 claim', '12,345 bytes', '0 vertices')
    """
    return f"{number:,} {one if number == 1 else many or one + 's'}"


def tell_fault(message: str) -> None:
    """Print a sentence about what went wrong to standard error."""
    click.echo(f"certify: {printable(message)}", err=True)


def say_row(name: str, lines: Sequence[str], names: Sequence[str]) -> None:
    """Print a row of a table with two columns.

    Parameters
    ----------
    name : str
        What stands on the left.
    lines : sequence of str
        What stands on the right. A terminal gets them broken at its edge; a file gets them whole.
    names : sequence of str
        Everything that will stand on the left, for the width of that column; a very long name gets a line of its own.
    """
    column = 2 + min(max(map(len, names)), _WIDEST_NAME)
    room = shutil.get_terminal_size().columns - column if sys.stdout.isatty() else sys.maxsize
    pieces = [piece for line in lines for piece in _broken(printable(line), max(room, 40))]
    head = printable(name)
    if len(head) > column - 2:
        click.secho(head, bold=True)
        head = ""
    for piece in pieces:
        click.echo((click.style(head, bold=True) if head else "") + " " * (column - len(head)) + piece)
        head = ""
    click.echo()


def _broken(line: str, width: int) -> list[str]:
    # Paths and fingerprints stay whole, so that they can be copied.
    return textwrap.wrap(line, width, subsequent_indent="  ", break_long_words=False, break_on_hyphens=False)


@contextmanager
def progress(what: str) -> Iterator[Callable[[int, int], None] | None]:
    """Give a function that is told about the work done, and show progress if that takes more than a second.

    Nothing is shown, and None given, when standard error is not a terminal.
    """
    if not sys.stderr.isatty():
        yield None
        return
    bar = _Bar(what)
    timer = threading.Timer(_PATIENCE, bar.show)
    timer.daemon = True
    timer.start()
    try:
        yield bar.advance
    finally:
        timer.cancel()
        timer.join()
        bar.hide()


class _Bar:
    """A line at the foot of the terminal that vanishes when the work is done."""

    def __init__(self, what: str) -> None:
        self._what = what
        self._shown: Progress | None = None
        self._next = 0.0

    def show(self) -> None:
        """Start to draw, from a thread of its own, since the work may be one long step."""
        from rich.console import Console
        from rich.progress import (
            BarColumn,
            Progress,
            TaskProgressColumn,
            TextColumn,
            TimeElapsedColumn,
            TimeRemainingColumn,
        )

        bar = Progress(
            TextColumn("{task.description}", markup=False),
            BarColumn(30, style="dim", complete_style="default", finished_style="default", pulse_style="default"),
            TaskProgressColumn("{task.percentage:>3.0f} %", style="default"),
            TimeElapsedColumn(),
            TextColumn("left:"),
            TimeRemainingColumn(),
            console=Console(stderr=True),
            transient=True,
            redirect_stdout=False,
            redirect_stderr=False,
        )
        bar.add_task(self._what, total=None)
        self._shown = bar
        bar.start()

    def advance(self, done: int, whole: int) -> None:
        """Take note of the work that is done; a whole of one step shows movement and no share."""
        # This is called for every record, so most calls only look at the clock.
        if self._shown is not None and whole > 1 and time.monotonic() >= self._next:
            self._next = time.monotonic() + _REFRESH
            self._shown.update(self._shown.task_ids[0], completed=done, total=whole)

    def hide(self) -> None:
        """Take the line away."""
        if self._shown is not None:
            self._shown.stop()
