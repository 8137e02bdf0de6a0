"""``certify multiplicities``: how homology decomposes, over a family of complexes with groups."""

from __future__ import annotations

from pathlib import Path

import click

from certify.commands import codes
from certify.commands.given import blaming
from certify.commands.options import JOBS, JSON, PATH, picture_path
from certify.commands.terminal import printable, progress

__all__ = ["multiplicities"]

_HELP = """Decompose homology into irreducible characters.

FAMILY is points or simplex-skeleton, with the symmetric group on the vertices; polygon, with the dihedral group; or
cross-polytope, with the symmetric group on the axes. A row [2, 1] of a symmetric group stands for the partitions
(n - 3, 2, 1). Where a row becomes constant this is an observation, and no proof. With --out each column gets the
certificate of its character.
"""

_EPILOG = """For example:

\b
  certify multiplicities points --from 2 --to 6 --degree 1
  certify multiplicities polygon --from 4 --to 9 --degree 1 --picture table.svg
"""


@click.command(help=_HELP, epilog=_EPILOG)
@click.argument("family")
@click.option("--from", "first", type=click.IntRange(1, 99), required=True, metavar="N", help="The first member.")
@click.option("--to", "last", type=click.IntRange(1, 99), required=True, metavar="N", help="The last member.")
@click.option("--degree", type=click.IntRange(0, 999), required=True, metavar="K", help="The degree of homology.")
@click.option("--pair", default="(D1, S0)", show_default=True, metavar="PAIR", help="The pair at each vertex.")
@click.option(
    "--dim", type=click.IntRange(-1), show_default="1", metavar="D", help="The dimension of a simplex-skeleton."
)
@click.option("--out", type=PATH, metavar="DIR", help="Write the certificates of the characters there.")
@click.option(
    "--picture", "path", type=PATH, callback=picture_path, metavar="FILE", help="Draw the table too, .svg or .png."
)
@JOBS
@JSON
def multiplicities(
    family: str,
    first: int,
    last: int,
    degree: int,
    pair: str,
    dim: int | None,
    out: Path | None,
    path: Path | None,
    jobs: int,
    as_json: bool,
) -> int:
    """Compute, print, and write what is asked for."""
    from certify.answers.decompositions import ACTED_FAMILIES, decomposition
    from certify.commands.results import say_json
    from certify.products import parse_pair

    if family not in ACTED_FAMILIES:
        raise click.BadParameter(f"{family!r} is none of {', '.join(ACTED_FAMILIES)}.", param_hint="'FAMILY'")
    if last < first:
        raise click.BadParameter(f"{last} is before the first member, {first}.", param_hint="'--to'")
    least = ACTED_FAMILIES[family].least
    if first < least:
        raise click.BadParameter(f"{family} has members from {least} on.", param_hint="'--from'")
    with blaming("--pair"):
        parse_pair(pair)
    with blaming("--dim"):
        ACTED_FAMILIES[family].member(first, dim)
    with progress("decomposing") as report:
        table = decomposition(family, range(first, last + 1), degree, pair=pair, dim=dim, jobs=jobs, progress=report)
    if out is not None:
        for n, found in table.characters.items():
            found.certificate.write(out / f"{family}-{n}-degree-{degree}.cert.jsonl")
    if path is not None:
        from certify.pictures.drawing import draw_table

        cells = {name: ["" if value is None else str(value) for value in row] for name, row in table.rows.items()}
        draw_table(list(map(str, table.columns)), cells, f"H_{degree} over {family}", path)
    if as_json:
        rows = {name: dict(zip(map(str, table.columns), row, strict=True)) for name, row in table.rows.items()}
        say_json({"multiplicities": rows, "constant_from": {name: table.constant_from(name) for name in rows}})
        return codes.DONE
    for line in repr(table).split("\n"):
        click.echo(printable(line))
    return codes.DONE
