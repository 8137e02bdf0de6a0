"""Claims as tables of a sheet: one reader a claim kind.

A new claim kind is one more reader and one more entry of `KINDS`.
"""

from __future__ import annotations

import re
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from types import MappingProxyType

from certify.claims.homology import HomologyClaim, Route
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import SimplicialComplex
from certify.tables import KeyFault, Keys, Table, in_words, shown

__all__ = ["KINDS", "KeyFault", "Keys", "Kind", "Table", "in_words", "shown"]

Complexes = Mapping[str, SimplicialComplex]

_DEGREE = re.compile(r"0|[1-9][0-9]*", re.ASCII)
_LARGEST_DEGREE = 10**9 - 1


@dataclass(frozen=True, slots=True)
class Kind:
    """A claim kind as sheets know it.

    Parameters
    ----------
    keys : tuple of str
        The keys of its table, besides those that every claim has.
    read : callable
        Returns the claim; takes the table, with no other keys in it, and the complexes of the sheet by name.
    """

    keys: tuple[str, ...]
    read: Callable[[Table, Complexes], HomologyClaim]


def _homology(table: Table, complexes: Complexes) -> HomologyClaim:
    complex_ = _complex(table, complexes)
    pairs = _pairs(table, complex_.vertex_count)
    with table.at("pair"):
        product = PolyhedralProduct(complex_, pairs)
    degrees = _degrees(table) if "degrees" in table.values else None
    groups = _groups(table) if "groups" in table.values else None
    route = _route(table)
    with table.at("groups"):
        return HomologyClaim(product, degrees, groups, route)


KINDS: Mapping[str, Kind] = MappingProxyType(
    {"homology": Kind(("complex", "pair", "degrees", "groups", "route"), _homology)}
)
"""The claim kinds, by the name that sheets give under ``kind``."""


def _complex(table: Table, complexes: Complexes) -> SimplicialComplex:
    name = table.text("complex", "the name of a complex of the sheet")
    if name not in complexes:
        known = (
            f"one of the complexes {', '.join(complexes)}" if complexes else "a complex [complexes.NAME] of the sheet"
        )
        raise table.fault("complex", expected=known, found=shown(name))
    return complexes[name]


def _pairs(table: Table, vertices: int) -> tuple[Pair, ...]:
    """Return one pair a vertex, from a text for all or a list with a text for each."""
    expected = 'a pair like "(D1, S0)", or a list with one for each vertex'
    value = table.value("pair", expected)
    if isinstance(value, str):
        with table.at("pair"):
            return parse_pairs(value, vertices)
    pairs = []
    for place, text in enumerate(table.items("pair", expected)):
        if not isinstance(text, str):
            raise table.fault("pair", place, expected='a pair like "(D1, S0)"', found=shown(text))
        with table.at("pair", place):
            pairs.append(parse_pair(text))
    return tuple(pairs)


def _degrees(table: Table) -> tuple[int, ...]:
    degrees: list[int] = []
    values = table.items("degrees", "a list of degrees like [0, 1]")
    for place, value in enumerate(values):
        # A truth value is a whole number for Python, but no degree. Certificates hold degrees as JSON numbers, so
        # there must be a largest one; no product that anybody can compute comes near it.
        if not isinstance(value, int) or isinstance(value, bool) or not 0 <= value <= _LARGEST_DEGREE:
            raise table.fault("degrees", place, expected="a degree from 0 on, of at most 9 digits", found=shown(value))
        if value in degrees:
            raise table.fault("degrees", place, expected="each degree once", found=f"{value} twice")
        degrees.append(value)
    if not degrees:
        raise table.fault("degrees", expected="at least one degree", found="an empty list")
    return tuple(degrees)


def _groups(table: Table) -> dict[int, AbelianGroup]:
    """Return the claimed groups by degree."""
    value = table.value("groups", "a table of groups")
    if not isinstance(value, dict):
        raise table.fault("groups", expected='a table like { 0 = "Z", 1 = "Z^34" }', found=shown(value))
    groups = {}
    for key, text in value.items():
        if not _DEGREE.fullmatch(key):
            raise table.fault("groups", key, expected="a degree from 0 on, in plain digits", found=shown(key))
        if not isinstance(text, str):
            raise table.fault("groups", key, expected='a group in quotation marks like "Z^34"', found=shown(text))
        with table.at("groups", key):
            groups[int(key)] = AbelianGroup.parse(text)
    return groups


def _route(table: Table) -> Route:
    match table.values.get("route", "blocks"):
        case "blocks":
            return "blocks"
        case "cells":
            return "cells"
        case other:
            raise table.fault("route", expected='"blocks" or "cells"', found=shown(other))
