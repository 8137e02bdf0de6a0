"""A complex on the command line: by facets, a file, or definitions as in a claim sheet."""

from __future__ import annotations

import tomllib
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import TYPE_CHECKING, Any

import click

from certify.commands.options import PATH
from certify.errors import BadInput

if TYPE_CHECKING:
    from certify.simplicial import SimplicialComplex

__all__ = ["COMPLEX_OPTIONS", "blaming", "given_complex", "wrong"]


def COMPLEX_OPTIONS(command: Callable[..., Any]) -> Callable[..., Any]:
    """Give a verb the options that `given_complex` reads."""
    for option in reversed(
        (
            click.argument("file", required=False, type=PATH),
            click.option("--facets", metavar="TEXT", help='Facets like "1 2; 2 3", instead of FILE.'),
            click.option(
                "--complex",
                "definitions",
                metavar="TOML",
                multiple=True,
                help="A definition as in a claim sheet, instead of FILE; NAME = {...} names it for the next ones.",
            ),
            click.option(
                "--as", "of_graph", metavar="WHAT", help="For a FILE with a graph: clique, independence or nested-sets."
            ),
        )
    ):
        command = option(command)
    return command


def given_complex(
    file: Path | None, facets: str | None, definitions: tuple[str, ...], of_graph: str | None
) -> SimplicialComplex:
    """Return the complex that one of the ways defines.

    Raises
    ------
    click.UsageError
        If none or several are given, or what is given is faulty.
    BadInput
        If a file is faulty.
    """
    from certify.simplicial import read_facets

    if (file is not None) + (facets is not None) + bool(definitions) != 1:
        raise click.UsageError("Give one of --facets, --complex and FILE.", click.get_current_context())
    if of_graph is not None and file is None:
        raise click.UsageError("--as belongs to a FILE with a graph.", click.get_current_context())
    if file is not None:
        k = _complex_in_file(file, of_graph)
        _require_text(k, str(file))
        return k
    with blaming("--complex" if facets is None else "--facets"):
        k = _defined(definitions) if facets is None else read_facets(facets)
        _require_text(k, "the vertices")
    return k


def _complex_in_file(file: Path, of_graph: str | None) -> SimplicialComplex:
    from certify.simplicial import read_complex_file
    from certify.simplicial.definitions import complex_of_graph
    from certify.simplicial.graphs import GRAPH_ENDINGS, read_graph_file

    if of_graph is None and file.suffix.lower() not in GRAPH_ENDINGS:
        return read_complex_file(file)
    with blaming("--as"):
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
def blaming(option: str) -> Iterator[None]:
    """Turn bad input into a fault of the command line."""
    try:
        yield
    except BadInput as fault:
        raise wrong(option, str(fault)) from fault


def wrong(option: str, message: str) -> click.BadParameter:
    """Return a fault of an option."""
    return click.BadParameter(message, click.get_current_context(), param_hint=f"'{option}'")
