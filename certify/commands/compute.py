"""``certify compute``: the homology of one polyhedral product, without a sheet."""

from __future__ import annotations

import re
from pathlib import Path
from typing import TYPE_CHECKING, Any, Literal

import click

from certify.commands import codes
from certify.commands.prove import JOBS
from certify.commands.terminal import counted, printable, progress
from certify.errors import BadInput

if TYPE_CHECKING:
    from certify.simplicial import SimplicialComplex

__all__ = ["compute"]

_HELP = """Print the integral homology of (X, A)^K.

K is given by its facets on the command line, or by a FILE: plain text (.txt, a facet a line), JSON or TOML
(facets = [[1, 2], [2, 3]], and vertices = [...] if the order matters or some lie in no face).
"""

_EPILOG = """For example:

\b
  certify compute --facets "1 2; 2 3; 3 4; 4 1" --pair "(D1, S0)"
  certify compute rig.txt --pair "(D2, S1)" --degrees 3,4 --json
"""

_CERTIFICATE = re.compile(r"([A-Za-z0-9][A-Za-z0-9._-]{0,99})\.cert\.jsonl(\.gz)?", re.ASCII)


class _Degrees(click.ParamType):
    """Degrees, separated by commas or blanks."""

    name = "degrees"

    def convert(self, value: Any, param: click.Parameter | None, ctx: click.Context | None) -> tuple[int, ...]:
        words = value.replace(",", " ").split()
        if not words or not all(re.fullmatch("[0-9]{1,9}", word, re.ASCII) for word in words):
            self.fail(f"expected degrees like 0,1, found {value!r}", param, ctx)
        return tuple(map(int, words))


@click.command(help=_HELP, epilog=_EPILOG)
@click.argument("file", required=False, type=click.Path(path_type=Path))
@click.option("--facets", metavar="TEXT", help='Facets like "1 2; 2 3", instead of FILE.')
@click.option(
    "--pair",
    "pairs",
    metavar="PAIR",
    multiple=True,
    required=True,
    help='The pair (X, A), like "(D1, S0)"; give it once for all vertices, or once for each in order.',
)
@click.option("--degrees", type=_Degrees(), metavar="DEGREES", help="Only these degrees, like 0,1.  [default: all]")
@click.option(
    "--route",
    type=click.Choice(["blocks", "cells"]),
    default="blocks",
    show_default=True,
    help="Work with the blocks of the stable splitting, or with the cells of the whole product.",
)
@click.option(
    "--certificate", type=click.Path(path_type=Path), metavar="FILE", help="Write a certificate too, NAME.cert.jsonl."
)
@JOBS
@click.option("--json", "as_json", is_flag=True, help="Print one JSON object instead of text.")
def compute(
    file: Path | None,
    facets: str | None,
    pairs: tuple[str, ...],
    degrees: tuple[int, ...] | None,
    route: Literal["blocks", "cells"],
    certificate: Path | None,
    jobs: int,
    as_json: bool,
) -> int:
    """Compute, print, and write the certificate if there is to be one."""
    from certify.certificate import Spool
    from certify.claims import HomologyClaim, prove
    from certify.commands.results import homology_lines, homology_value, say_json
    from certify.products import PolyhedralProduct, parse_pairs

    name = _claim_name(certificate)
    k = _complex(file, facets)
    with _command_line("--pair"):
        product = PolyhedralProduct(k, parse_pairs(pairs[0] if len(pairs) == 1 else pairs, k.vertex_count))
    claim = HomologyClaim(product, degrees, route=route)
    with Spool() as spool:
        with progress("computing") as report:
            proof = prove(claim, spool, jobs=jobs, progress=report)
        size = proof.write(certificate, {"claim": name}) if certificate else None
    ...
    return codes.DONE
