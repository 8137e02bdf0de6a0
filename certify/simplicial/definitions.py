"""Complexes as claim sheets define them: the tables ``[complexes.NAME]``.

A table has exactly one of these keys, which says where the complex comes from:

=================  ======================================================  ==========================
key                its value                                               more keys
=================  ======================================================  ==========================
``facets``         list of lists of labels                                 ``vertices``
``missing-faces``  list of lists of labels                                 ``vertices``
``monomials``      list of texts like ``"x1*x3"``                          ``variables``
``incidence``      list of texts like ``"0110"``: a row a vertex of a      none
                   polytope, a digit a facet
``family``         name of a family                                        its arguments
``graph6``         a graph6 text                                           ``as``
``edges``          list of pairs of labels                                 ``as``, ``vertices``
``file``           path from the folder of the sheet                       ``as``, if it holds a graph
``operation``      name of an operation on complexes of the sheet, as      ``of``, and others
                   `certify.simplicial.operation_tables` lists them
=================  ======================================================  ==========================

``as`` says which complex of a graph is meant: ``"clique"``, ``"independence"`` or ``"nested-sets"``. Labels are whole
numbers and texts. ``vertices`` and ``variables`` may be left out; they fix the order, and may name ghosts or vertices
that nothing else mentions.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from pathlib import Path
from types import MappingProxyType
from typing import Any

import networkx as nx

from certify.errors import BadInput
from certify.simplicial.arguments import Label
from certify.simplicial.associahedra import nested_set_complex
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.graphs import (
    GRAPH_ENDINGS,
    clique_complex,
    graph_from_edges,
    independence_complex,
    read_graph6,
    read_graph_file,
)
from certify.simplicial.ideals import from_missing_faces, from_monomials
from certify.simplicial.incidence import from_incidence
from certify.simplicial.inputs import complex_from_table, placed, plain_labels, read_complex_file
from certify.simplicial.operation_tables import Known, read_operation
from certify.simplicial.registry import FAMILIES, build
from certify.tables import KeyFault, Table, shown

__all__ = ["complex_from_definition", "complex_of_graph"]


def complex_from_definition(table: Table, known: Known, folder: Path) -> SimplicialComplex:
    """Return the complex that a table ``[complexes.NAME]`` defines.

    Parameters
    ----------
    table : Table
        As described at the head of this module.
    known : mapping
        The complexes that stand above in the sheet, by name: those that the table may refer to. So no complex can be
        made, by whatever detour, from itself.
    folder : Path
        The folder of the sheet.

    Raises
    ------
    KeyFault
        If the table is not as it should be; it names the key, and in a list the item.

    Examples
    --------
    >>> ring = complex_from_definition(Table((), {"family": "polygon", "n": 4}), {}, Path())
    >>> square = Table((), {"operation": "alexander-dual", "of": "ring"})
    >>> print(complex_from_definition(square, {"ring": ring}, Path()))
    4 vertices, facets 13 24
    >>> complex_from_definition(square, {}, Path())
    Traceback (most recent call last):
    certify.tables.KeyFault: key of: expected a complex that stands above this one (none does), found 'ring'
    """
    sources = [key for key in table.values if key in _SOURCES]
    if not sources:
        raise table.fault(expected=f"one of the keys {', '.join(_SOURCES)}", found="none of them")
    if len(sources) > 1:
        raise table.fault(sources[1], expected=f"only one of the keys {', '.join(_SOURCES)}", found=f"{sources[0]} too")
    return _SOURCES[sources[0]](table, known, folder)


# -- lists --------------------------------------------------------------------------------------


def _from_facets(table: Table, _: Known, __: Path) -> SimplicialComplex:
    table.only(("facets", "vertices"))
    with placed(table, "facets", "facet"):
        return complex_from_table(table.values)


def _from_missing_faces(table: Table, _: Known, __: Path) -> SimplicialComplex:
    table.only(("missing-faces", "vertices"))
    with placed(table, "missing-faces", "missing face"):
        return from_missing_faces(_label_lists(table, "missing-faces", "missing face"), _vertices(table))


def _from_monomials(table: Table, _: Known, __: Path) -> SimplicialComplex:
    table.only(("monomials", "variables"))
    variables = table.items("variables", "a list of names") if "variables" in table.values else None
    with placed(table, "monomials", "monomial"):
        return from_monomials(table.items("monomials", 'a list of texts like "x1*x2"'), variables)


def _from_incidence(table: Table, _: Known, __: Path) -> SimplicialComplex:
    table.only(("incidence",))
    rows = []
    for place, row in enumerate(table.items("incidence", 'a list of rows like "0110"')):
        if not isinstance(row, str):
            raise table.fault("incidence", place, expected='a row like "0110"', found=shown(row))
        rows.append(row)
    with placed(table, "incidence", "row"):
        return from_incidence(rows)


def _label_lists(table: Table, key: str, item: str) -> list[list[Label]]:
    values = table.items(key, "a list of lists of labels")
    return [plain_labels(value, f"{item} {number}") for number, value in enumerate(values, start=1)]


def _vertices(table: Table) -> list[Label] | None:
    return plain_labels(table.values["vertices"], "vertices") if "vertices" in table.values else None


# -- families -----------------------------------------------------------------------------------


def _from_family(table: Table, _: Known, __: Path) -> SimplicialComplex:
    name = table.text("family", "the name of a family")
    if name in FAMILIES:
        table.only(("family", *FAMILIES[name].parameters))
    with placed(table, "family"):
        return build(name, **{key: value for key, value in table.values.items() if key != "family"})


# -- graphs -------------------------------------------------------------------------------------

_OF_GRAPHS: Mapping[str, Callable[[nx.Graph[Any]], SimplicialComplex]] = MappingProxyType(
    {"clique": clique_complex, "independence": independence_complex, "nested-sets": nested_set_complex}
)


def _from_graph6(table: Table, _: Known, __: Path) -> SimplicialComplex:
    table.only(("graph6", "as"))
    make = _of_graph(table)
    with placed(table, "graph6"):
        return make(read_graph6(table.text("graph6")))


def _from_edges(table: Table, _: Known, __: Path) -> SimplicialComplex:
    table.only(("edges", "as", "vertices"))
    make = _of_graph(table)
    with placed(table, "edges", "edge"):
        return make(graph_from_edges(_label_lists(table, "edges", "edge"), _vertices(table)))


_OF_GRAPH_NAMES = " or ".join(f'"{name}"' for name in _OF_GRAPHS)


def complex_of_graph(name: str) -> Callable[[nx.Graph[Any]], SimplicialComplex]:
    """Return what makes a complex of a graph: ``clique``, ``independence`` or ``nested-sets``.

    Raises
    ------
    BadInput
        If it is called otherwise.
    """
    if name not in _OF_GRAPHS:
        raise BadInput(where="as", expected=_OF_GRAPH_NAMES, found=shown(name))
    return _OF_GRAPHS[name]


def _of_graph(table: Table) -> Callable[[nx.Graph[Any]], SimplicialComplex]:
    name = table.text("as", _OF_GRAPH_NAMES)
    with table.at("as"):
        return complex_of_graph(name)


# -- files --------------------------------------------------------------------------------------


def _from_file(table: Table, _: Known, folder: Path) -> SimplicialComplex:
    table.only(("file", "as"))
    name = table.text("file", "a path from the folder of the sheet")
    if Path(name).is_absolute():
        raise table.fault("file", expected="a path from the folder of the sheet", found=shown(name))
    path = folder / name
    try:
        # Edges may stand in .txt as well, where they would be facets if nothing else were said.
        if "as" in table.values or path.suffix.lower() in GRAPH_ENDINGS:
            return _of_graph(table)(read_graph_file(path))
        return read_complex_file(path)
    except KeyFault:
        raise
    except BadInput as fault:
        raise table.fault("file", expected=fault.expected, found=f"{fault.found} ({fault.where})") from fault


# -- all of them -------------------------------------------------------------------------------

_SOURCES: Mapping[str, Callable[[Table, Known, Path], SimplicialComplex]] = MappingProxyType(
    {
        "facets": _from_facets,
        "missing-faces": _from_missing_faces,
        "monomials": _from_monomials,
        "family": _from_family,
        "graph6": _from_graph6,
        "edges": _from_edges,
        "incidence": _from_incidence,
        "file": _from_file,
        "operation": lambda table, known, _: read_operation(table, known),
    }
)
