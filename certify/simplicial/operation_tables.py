"""Operations on complexes as claim sheets write them: ``operation = "link"``, ``of = "ring"``, ``face = [1]``.

=======================================  ==========================  ==================================================
operation                                ``of``                      more keys
=======================================  ==========================  ==================================================
join, disjoint-union                     list of names, two or more  none
link, star                               name                        ``face``: list of labels
deletion, full-subcomplex                name                        ``vertices``: list of labels
skeleton                                 name                        ``dimension``
alexander-dual, barycentric-subdivision  name                        none
stellar-subdivision                      name                        ``face``; ``vertex``, the new label, if wanted
simplicial-wedge                         name                        ``multiplicities``: a number for each vertex
substitution                             name                        ``parts``: the name of a complex for each vertex
connected-sum                            list of two names           ``along``: list of two facets, lists of labels
=======================================  ==========================  ==================================================

A complex that is named must stand above in the sheet. Its labels are written as numbers and texts; a label that is a
tuple, as many operations make them, is written as a list: ``[0, "a"]`` for (0, "a").
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from types import MappingProxyType
from typing import cast

from certify.errors import BadInput
from certify.simplicial.arguments import Label, check_whole_number
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.inputs import placed
from certify.simplicial.operations import (
    alexander_dual,
    connected_sum,
    deletion,
    disjoint_union,
    full_subcomplex,
    join,
    link,
    skeleton,
    star,
)
from certify.simplicial.subdivisions import barycentric_subdivision, stellar_subdivision
from certify.simplicial.substitutions import simplicial_wedge, substitution
from certify.tables import Table, shown

__all__ = ["OPERATIONS", "Known", "Operation", "read_operation"]

Known = Mapping[str, SimplicialComplex]
"""The complexes that a table may refer to, by name."""


@dataclass(frozen=True, slots=True)
class Operation:
    """An operation as sheets know it.

    Parameters
    ----------
    keys : tuple of str
        The keys of its table, besides ``operation`` and ``of``.
    read : callable
        Returns the result; takes the table, with no other keys in it, and the complexes that it may refer to.
    """

    keys: tuple[str, ...]
    read: Callable[[Table, Known], SimplicialComplex]


def read_operation(table: Table, known: Known) -> SimplicialComplex:
    """Return the complex that a table with the key ``operation`` defines.

    Raises
    ------
    KeyFault
        If the table is not as it should be; it names the key, and in a list the item.
    """
    name = table.text("operation", "the name of an operation")
    if name not in OPERATIONS:
        raise table.fault("operation", expected=f"one of {', '.join(OPERATIONS)}", found=shown(name))
    table.only(("operation", "of", *OPERATIONS[name].keys))
    return OPERATIONS[name].read(table, known)


def _alone(function: Callable[[SimplicialComplex], SimplicialComplex]) -> Operation:
    def read(table: Table, known: Known) -> SimplicialComplex:
        with placed(table, "of"):
            return function(_one(table, known))

    return Operation((), read)


def _together(function: Callable[..., SimplicialComplex]) -> Operation:
    def read(table: Table, known: Known) -> SimplicialComplex:
        parts = _several(table, known, "of")
        if len(parts) < 2:
            raise table.fault("of", expected="two names or more", found=f"{len(parts)}")
        return function(*parts)

    return Operation((), read)


def _at(key: str, function: Callable[[SimplicialComplex, list[Label]], SimplicialComplex]) -> Operation:
    def read(table: Table, known: Known) -> SimplicialComplex:
        k = _one(table, known)
        with placed(table, key):
            return function(k, _labels(table.value(key, "a list of labels"), key))

    return Operation((key,), read)


def _skeleton(table: Table, known: Known) -> SimplicialComplex:
    k = _one(table, known)
    dimension = table.value("dimension", "a whole number")
    with placed(table, "dimension"):
        return skeleton(k, check_whole_number("dimension", dimension, least=-1))


def _stellar_subdivision(table: Table, known: Known) -> SimplicialComplex:
    k = _one(table, known)
    with placed(table, "face"):
        vertex = _label(table.values["vertex"], "vertex") if "vertex" in table.values else None
        return stellar_subdivision(k, _labels(table.value("face", "a list of labels"), "face"), vertex)


def _simplicial_wedge(table: Table, known: Known) -> SimplicialComplex:
    k = _one(table, known)
    numbers = table.items("multiplicities", "a list of whole numbers")
    with placed(table, "multiplicities", "multiplicity"):
        # What the items are is checked there.
        return simplicial_wedge(k, cast("list[int]", numbers))


def _substitution(table: Table, known: Known) -> SimplicialComplex:
    k, parts = _one(table, known), _several(table, known, "parts")
    with placed(table, "parts"):
        return substitution(k, parts)


def _connected_sum(table: Table, known: Known) -> SimplicialComplex:
    parts, facets = _several(table, known, "of"), table.items("along", "a list of two facets")
    for key, values in (("of", parts), ("along", facets)):
        if len(values) != 2:
            raise table.fault(key, expected="a list of two", found=f"{len(values)}")
    with placed(table, "along", "facet"):
        ours, theirs = (_labels(facet, f"facet {number}") for number, facet in enumerate(facets, start=1))
        return connected_sum(parts[0], parts[1], ours, theirs)


def _one(table: Table, known: Known) -> SimplicialComplex:
    return _named(table, known, table.value("of", "the name of a complex"), "of")


def _several(table: Table, known: Known, key: str) -> list[SimplicialComplex]:
    names = table.items(key, "a list of names of complexes")
    return [_named(table, known, name, key, place) for place, name in enumerate(names)]


def _named(table: Table, known: Known, name: object, *keys: str | int) -> SimplicialComplex:
    if isinstance(name, str) and name in known:
        return known[name]
    names = ", ".join(known) or "none does"
    raise table.fault(*keys, expected=f"a complex that stands above this one ({names})", found=shown(name))


def _labels(value: object, where: str) -> list[Label]:
    if not isinstance(value, list):
        raise BadInput(where=where, expected="a list of labels", found=shown(value))
    return [_label(label, where) for label in value]


def _label(value: object, where: str) -> Label:
    """Return a label; a list stands for a tuple."""
    if isinstance(value, list):
        return tuple(_label(part, where) for part in value)
    if isinstance(value, bool) or not isinstance(value, int | str):
        raise BadInput(where=where, expected="whole numbers, texts or lists of these as labels", found=shown(value))
    return value


OPERATIONS: Mapping[str, Operation] = MappingProxyType(
    {
        "join": _together(join),
        "disjoint-union": _together(disjoint_union),
        "link": _at("face", link),
        "star": _at("face", star),
        "deletion": _at("vertices", deletion),
        "full-subcomplex": _at("vertices", full_subcomplex),
        "skeleton": Operation(("dimension",), _skeleton),
        "alexander-dual": _alone(alexander_dual),
        "barycentric-subdivision": _alone(barycentric_subdivision),
        "stellar-subdivision": Operation(("face", "vertex"), _stellar_subdivision),
        "simplicial-wedge": Operation(("multiplicities",), _simplicial_wedge),
        "substitution": Operation(("parts",), _substitution),
        "connected-sum": Operation(("along",), _connected_sum),
    }
)
"""The operations, by the name that sheets give under ``operation``."""
