"""``certify compute``: the homology of one polyhedral product, without a sheet."""

from __future__ import annotations

import re
import tomllib
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import TYPE_CHECKING

import click

from certify.commands import codes
from certify.commands.options import CLUSTER, JOBS, JSON, PATH, workers
from certify.commands.terminal import counted, printable, progress
from certify.errors import BadInput

if TYPE_CHECKING:
    from certify.claims.homology import Route
    from certify.simplicial import SimplicialComplex

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
@click.argument("file", required=False, type=PATH)
@click.option("--facets", metavar="TEXT", help='Facets like "1 2; 2 3", instead of FILE.')
@click.option(
    "--complex",
    "definitions",
    metavar="TOML",
    multiple=True,
    help="A definition as in a claim sheet, instead of FILE; NAME = {...} gives it a name for those that follow.",
)
@click.option("--as", "of_graph", metavar="WHAT", help="For a FILE with a graph: clique, independence or nested-sets.")
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
    k = _complex(file, facets, definitions, of_graph)
    with _blaming("--pair"):
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
        raise _wrong("--certificate", f"expected a file NAME.cert.jsonl or NAME.cert.jsonl.gz, found {certificate}")
    return name


def _complex(
    file: Path | None, facets: str | None, definitions: tuple[str, ...], of_graph: str | None
) -> SimplicialComplex:
    from certify.simplicial import read_facets

    if (file is not None) + (facets is not None) + bool(definitions) != 1:
        raise click.UsageError("Give one of --facets, --complex and FILE.", click.get_current_context())
    if of_graph is not None and file is None:
        raise click.UsageError("--as belongs to a FILE with a graph.", click.get_current_context())
    if file is not None:
        k = _complex_in_file(file, of_graph)
        _require_text(k, str(file))
        return k
    with _blaming("--complex" if facets is None else "--facets"):
        k = _defined(definitions) if facets is None else read_facets(facets)
        _require_text(k, "the vertices")
    return k


def _complex_in_file(file: Path, of_graph: str | None) -> SimplicialComplex:
    from certify.simplicial import read_complex_file
    from certify.simplicial.definitions import complex_of_graph
    from certify.simplicial.graphs import GRAPH_ENDINGS, read_graph_file

    if of_graph is None and file.suffix.lower() not in GRAPH_ENDINGS:
        return read_complex_file(file)
    with _blaming("--as"):
        make = complex_of_graph(of_graph or "")
    return make(read_graph_file(file))


def _defined(definitions: tuple[str, ...]) -> SimplicialComplex:
    """Return the last of several complexes that build on each other, each an inline table of TOML, perhaps named."""
    from certify.simplicial.definitions import complex_from_definition
    from certify.tables import Table

    known: dict[str, SimplicialComplex] = {}
    name = ""
    for number, text in enumerate(definitions, 1):
        where = f"definition {number}"
        try:
            values = tomllib.loads(f"K = {text}" if text.lstrip().startswith("{") else text)
        except ValueError as error:
            raise BadInput(where=where, expected="a table of TOML", found=f"a fault ({error})") from error
        if len(values) != 1:
            raise BadInput(where=where, expected="one table of TOML", found=f"{len(values)}")
        ((name, value),) = values.items()
        known[name] = complex_from_definition(Table.of(("complexes", name), value), known, Path())
    return known[name]


def _require_text(k: SimplicialComplex, where: str) -> None:
    """Refuse labels that UTF-8 cannot write, so that certificates can: JSON and command lines may hold such ones."""
    for label in map(str, k.labels):
        if label.encode("utf-8", "replace").decode() != label:
            raise BadInput(where=where, expected="labels that are text", found=ascii(label))


@contextmanager
def _blaming(option: str) -> Iterator[None]:
    """Turn bad input into a fault of the command line."""
    try:
        yield
    except BadInput as fault:
        raise _wrong(option, str(fault)) from fault


def _wrong(option: str, message: str) -> click.BadParameter:
    return click.BadParameter(message, click.get_current_context(), param_hint=f"'{option}'")
