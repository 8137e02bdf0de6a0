"""``certify compute``: the homology of one polyhedral product, without a sheet."""

from __future__ import annotations

import re
from pathlib import Path
from typing import TYPE_CHECKING

import click

from certify.commands import codes
from certify.commands.given import COMPLEX_OPTIONS, blaming, given_complex, wrong
from certify.commands.options import CLUSTER, JOBS, JSON, PATH, workers
from certify.commands.terminal import counted, printable, progress

if TYPE_CHECKING:
    from certify.claims.homology import Route

__all__ = ["compute"]

_HELP = """Print the integral homology of (X, A)^K.

K is given by its facets on the command line; by a FILE, plain text (.txt, a facet a line), JSON or TOML
(facets = [[1, 2], [2, 3]], and vertices = [...] if the order matters or some lie in no face), or a graph (.g6, .edges);
or as a claim sheet defines it, with --complex. Several definitions build on each other, and the last one is K.
"""

_EPILOG = """For example:

\b
  certify compute --facets "1 2; 2 3; 3 4; 4 1" --pair "(D1, S0)"
  certify compute rig.txt --pair "(D2, S1)" --degrees 3,4 --json
  certify compute --complex '{family = "polygon", n = 20}' --pair "(D1, S0)" --route orbits
  certify compute --complex 'a = {graph6 = "Dhc", as = "clique"}' \\
      --complex '{operation = "join", of = ["a", "a"]}' --pair "(D1, S0)"
"""


def _degrees(context: click.Context, option: click.Parameter, value: str | None) -> tuple[int, ...] | None:
    """Return degrees that are separated by commas or blanks."""
    if value is None:
        return None
    words = value.replace(",", " ").split()
    if not words or not all(re.fullmatch("[0-9]{1,9}", word, re.ASCII) for word in words):
        raise click.BadParameter(f"expected degrees like 0,1, found {value!r}", context, option)
    return tuple(map(int, words))


@click.command(help=_HELP, epilog=_EPILOG)
@COMPLEX_OPTIONS
@click.option(
    "--pair",
    "pairs",
    metavar="PAIR",
    multiple=True,
    required=True,
    help='The pair (X, A), like "(D1, S0)"; give it once for all vertices, or once for each in order.',
)
@click.option("--degrees", callback=_degrees, metavar="DEGREES", help="Only these degrees, like 0,1.  [default: all]")
@click.option(
    "--route",
    type=click.Choice(["blocks", "orbits", "cells"]),
    default="blocks",
    show_default=True,
    help="Work with the blocks of the stable splitting, with one block for each orbit of the symmetries, or with the "
    "cells of the whole product.",
)
@click.option("--certificate", type=PATH, metavar="FILE", help="Write a certificate too, NAME.cert.jsonl.")
@JOBS
@CLUSTER
@JSON
def compute(
    file: Path | None,
    facets: str | None,
    definitions: tuple[str, ...],
    of_graph: str | None,
    pairs: tuple[str, ...],
    degrees: tuple[int, ...] | None,
    route: Route,
    certificate: Path | None,
    jobs: int,
    cluster: str | None,
    as_json: bool,
) -> int:
    """Compute, print, and write the certificate if there is to be one."""
    from certify.certificate import Spool
    from certify.certificate.about import about_claim
    from certify.claims import HomologyClaim, prove
    from certify.commands.results import say_json, shortened
    from certify.products import PolyhedralProduct, parse_pairs

    name = _claim_name(certificate)
    k = given_complex(file, facets, definitions, of_graph)
    with blaming("--pair"):
        product = PolyhedralProduct(k, parse_pairs(pairs[0] if len(pairs) == 1 else pairs, k.vertex_count))
    claim = HomologyClaim(product, degrees, route=route)
    with Spool() as spool:
        with workers(jobs, cluster) as helpers, progress("computing") as report:
            proof = prove(claim, spool, workers=helpers, progress=report)
        size = proof.write(certificate, about_claim(name, k.labels)) if certificate else 0
    if as_json:
        say_json({"homology": claim.value(proof.found)})
        return codes.DONE
    lines = [*shortened(claim.lines(proof.found)), f"where K has {k}", *claim.remarks()]
    if certificate:
        lines += [f"certificate {certificate}, {counted(size, 'byte')}", f"fingerprint {proof.fingerprint}"]
    for line in lines:
        click.echo(printable(line))
    return codes.DONE


def _claim_name(certificate: Path | None) -> str:
    """Return the name of the claim, which is that of its file."""
    from certify.certificate.about import name_in

    name = name_in(certificate) if certificate else ""
    if name is None:
        raise wrong("--certificate", f"expected a file NAME.cert.jsonl or NAME.cert.jsonl.gz, found {certificate}")
    return name
