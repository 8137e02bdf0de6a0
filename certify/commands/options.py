"""Options that more than one verb has."""

from __future__ import annotations

from contextlib import AbstractContextManager
from pathlib import Path
from typing import TYPE_CHECKING

import click

if TYPE_CHECKING:
    from certify.claims import Workers

__all__ = ["CLUSTER", "JOBS", "JSON", "PATH", "picture_path", "workers"]

PATH = click.Path(readable=False, path_type=Path)
"""A path that click does not look at: what is wrong with a file is not what is wrong with a command line."""


def picture_path(_: click.Context, parameter: click.Parameter, path: Path | None) -> Path | None:
    """Return the path of a picture.

    Raises
    ------
    click.BadParameter
        If its ending is that of no picture.
    """
    if path is not None:
        from certify.pictures.drawing import ENDINGS

        if path.suffix.lower() not in ENDINGS:
            raise click.BadParameter(f"expected a file ending in {' or '.join(ENDINGS)}, found {path}", param=parameter)
    return path


JOBS = click.option(
    "--jobs",
    metavar="N",
    type=click.IntRange(min=1),
    default=1,
    show_default=True,
    help="Compute in N processes; the certificates are the same.",
)

CLUSTER = click.option(
    "--cluster",
    metavar="ADDRESS",
    help="Compute on a Dask cluster, whose scheduler has this address; the certificates are the same.",
)


def workers(jobs: int, cluster_address: str | None) -> AbstractContextManager[Workers | None]:
    """Return who computes: this process, so many processes, or a cluster.

    Raises
    ------
    click.UsageError
        If both are given.
    """
    from certify.claims.workers import cluster, processes

    if cluster_address is None:
        return processes(jobs)
    if jobs != 1:
        raise click.UsageError("Give either --jobs or --cluster.", click.get_current_context())
    return cluster(cluster_address)


JSON = click.option("--json", "as_json", is_flag=True, help="Print one JSON object instead of text.")
