"""Options that more than one verb has."""

from __future__ import annotations

from pathlib import Path

import click

__all__ = ["JOBS", "JSON", "PATH"]

PATH = click.Path(readable=False, path_type=Path)
"""A path that click does not look at: what is wrong with a file is not what is wrong with a command line."""

JOBS = click.option(
    "--jobs",
    metavar="N",
    type=click.IntRange(min=1),
    default=1,
    show_default=True,
    help="Compute in N processes; the certificates are the same.",
)

JSON = click.option("--json", "as_json", is_flag=True, help="Print one JSON object instead of text.")
