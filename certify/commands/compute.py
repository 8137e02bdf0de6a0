"""``certify compute``: the homology of one polyhedral product, without a sheet."""

from __future__ import annotations

import re
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import TYPE_CHECKING, Literal

import click

from certify.commands import codes
from certify.commands.options import JOBS, JSON, PATH
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
    type=click.Choice(["blocks", "cells"]),
    default="blocks",
    show_default=True,
    help="Work with the blocks of the stable splitting, or with the cells of the whole product.",
)
@click.option("--certificate", type=PATH, metavar="FILE", help="Write a certificate too, NAME.cert.jsonl.")
@JOBS
@JSON
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
    from certify.commands.results import homology_lines, homology_value, pair_lines, say_json
    from certify.products import PolyhedralProduct, parse_pairs
    from certify.sheet import NamedClaim

    name = _claim_name(certificate)
    k = _complex(file, facets)
    with _blaming("--pair"):
        product = PolyhedralProduct(k, parse_pairs(pairs[0] if len(pairs) == 1 else pairs, k.vertex_count))
    item = NamedClaim.of(name, "K", HomologyClaim(product, degrees, route=route), {})
    with Spool() as spool:
        with progress("computing") as report:
            proof = prove(item.claim, spool, jobs=jobs, progress=report)
        size = proof.write(certificate, item.about) if certificate else 0
    if as_json:
        say_json({"homology": homology_value(proof.groups)})
        return codes.DONE
    lines = [*homology_lines(item.claim, proof.groups), f"where K has {k}", *pair_lines(item.claim)]
    if certificate:
        lines += [f"certificate {certificate}, {counted(size, 'byte')}", f"fingerprint {proof.fingerprint}"]
    for line in lines:
        click.echo(printable(line))
    return codes.DONE


def _claim_name(certificate: Path | None) -> str:
    """Return the name of the claim, which is that of its file."""
    match = _CERTIFICATE.fullmatch(certificate.name) if certificate else None
    if certificate and not match:
        raise _wrong("--certificate", f"expected a file NAME.cert.jsonl or NAME.cert.jsonl.gz, found {certificate}")
    return match[1] if match else ""


def _complex(file: Path | None, facets: str | None) -> SimplicialComplex:
    from certify.simplicial import read_complex_file, read_facets

    if file is not None and facets is None:
        k = read_complex_file(file)
        _require_text(k, str(file))
        return k
    if facets is None or file is not None:
        raise click.UsageError("Give either --facets or FILE.", click.get_current_context())
    with _blaming("--facets"):
        k = read_facets(facets)
        _require_text(k, "the vertices")
        return k


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
