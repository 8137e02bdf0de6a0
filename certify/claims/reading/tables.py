"""Values that claims of many kinds have in a sheet: complexes, pairs, degrees, groups, whole numbers."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable, Mapping
from dataclasses import dataclass
from typing import Any, TypeVar

from certify.claims.base import Claim
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import Label, SimplicialComplex
from certify.simplicial.inputs import plain_labels
from certify.tables import Table, shown

__all__ = [
    "BIDEGREE",
    "REDUCED_DEGREE",
    "Given",
    "Kind",
    "complex_of",
    "degrees_of",
    "groups_by_degree",
    "groups_under",
    "labels_of",
    "numbers_of",
    "pairs_of",
    "product_of",
    "reduced_groups",
    "route_of",
    "table_under",
    "whole",
    "wholes",
    "with_defaults",
]

_Name = TypeVar("_Name", bound=str)

_DEGREE = ("0|[1-9][0-9]*", "a degree from 0 on, in plain digits")
REDUCED_DEGREE = ("-1|0|[1-9][0-9]*", "a degree from -1 on, in plain digits")
BIDEGREE = (
    "(0|[1-9][0-9]{0,8}),(0|[2468]|[1-9][0-9]{0,7}[02468])",
    'two degrees i,2j of Tor, the second one even, like "1,4"',
)
_LARGEST_DEGREE = 10**9 - 1


@dataclass(frozen=True, slots=True)
class Given:
    """What a sheet has defined, by name.

    Parameters
    ----------
    complexes : mapping from name to SimplicialComplex
    pairs : mapping from name to Pair
    """

    complexes: Mapping[str, SimplicialComplex]
    pairs: Mapping[str, Pair]


@dataclass(frozen=True, slots=True)
class Kind:
    """A claim kind as sheets know it.

    Parameters
    ----------
    keys : tuple of str
        The keys of its table, besides those that every claim has.
    read : callable
        Returns the claim; takes the table, with no other keys in it, and what the sheet has defined.
    """

    keys: tuple[str, ...]
    read: Callable[[Table, Given], Claim[Any]]


def complex_of(table: Table, given: Given) -> SimplicialComplex:
    """Return the complex of the sheet that the key ``complex`` names."""
    name = table.text("complex", "the name of a complex of the sheet")
    if name not in given.complexes:
        names = ", ".join(given.complexes)
        known = f"one of the complexes {names}" if names else "a complex [complexes.NAME] of the sheet"
        raise table.fault("complex", expected=known, found=shown(name))
    return given.complexes[name]


def product_of(table: Table, given: Given) -> PolyhedralProduct:
    """Return the polyhedral product of the keys ``complex`` and ``pair``."""
    complex_ = complex_of(table, given)
    pairs = pairs_of(table, complex_.vertex_count, given.pairs)
    with table.at("pair"):
        return PolyhedralProduct(complex_, pairs)


def pairs_of(table: Table, vertices: int, named: Mapping[str, Pair]) -> tuple[Pair, ...]:
    """Return one pair a vertex, from a text for all or a list with a text for each."""
    names = f" or one of the pairs {', '.join(named)} of the sheet" if named else ""
    expected = f'a pair like "(D1, S0)"{names}, or a list with one for each vertex'
    value = table.value("pair", expected)
    if isinstance(value, str):
        with table.at("pair"):
            return parse_pairs(value, vertices, named)
    pairs = []
    for place, text in enumerate(table.items("pair", expected)):
        if not isinstance(text, str):
            raise table.fault("pair", place, expected=f'a pair like "(D1, S0)"{names}', found=shown(text))
        with table.at("pair", place):
            pairs.append(named[text] if text in named else parse_pair(text))
    return tuple(pairs)


def labels_of(table: Table, key: str, k: SimplicialComplex) -> tuple[Label, ...]:
    """Return a list of vertices, empty if it is not there."""
    if key not in table.values:
        return ()
    with table.at(key):
        labels = plain_labels(table.values[key], key)
        k.numbers(labels)
        return tuple(labels)


def degrees_of(table: Table) -> tuple[int, ...] | None:
    """Return the degrees to which a claim is restricted."""
    if "degrees" not in table.values:
        return None
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


def groups_by_degree(table: Table) -> dict[int, AbelianGroup] | None:
    """Return the claimed groups by degree from 0 on, or None where the claim asks for them."""
    if "groups" not in table.values:
        return None
    return {int(key): group for key, group in groups_under(table, ("groups",), *_DEGREE).items()}


def reduced_groups(table: Table, keys: tuple[str, ...]) -> dict[int, AbelianGroup]:
    """Return claimed groups by degree from -1 on."""
    return {int(key): group for key, group in groups_under(table, keys, *REDUCED_DEGREE).items()}


def groups_under(table: Table, keys: tuple[str, ...], form: str, expected: str) -> dict[str, AbelianGroup]:
    """Return the groups of a table in the table of the claim, under their keys, which have this form."""
    groups = {}
    for key, text in table_under(table, keys).items():
        if not re.fullmatch(form, key, re.ASCII):
            raise table.fault(*keys, key, expected=expected, found=shown(key))
        if not isinstance(text, str):
            raise table.fault(*keys, key, expected='a group in quotation marks like "Z^34"', found=shown(text))
        with table.at(*keys, key):
            groups[key] = AbelianGroup.parse(text)
    return groups


def table_under(table: Table, keys: tuple[str, ...]) -> dict[str, object]:
    """Return the table under these keys."""
    value: object = table.values
    for key in keys:
        value = value[key] if isinstance(value, Mapping) else None
    if not isinstance(value, dict):
        raise table.fault(*keys, expected='a table like { 0 = "Z", 1 = "Z^34" }', found=shown(value))
    return value


def route_of(table: Table, routes: tuple[_Name, ...]) -> _Name:
    """Return the route of a claim, which is the first of these if none is given."""
    value = table.values.get("route", routes[0])
    for route in routes:
        if value == route:
            return route
    raise table.fault("route", expected=" or ".join(f'"{route}"' for route in routes), found=shown(value))


def with_defaults(table: Table, **values: Any) -> Table:
    """Return a table in which these values stand where none are given."""
    return Table(table.keys, {**values, **table.values})


def whole(table: Table, key: str, place: int | None = None, *, least: int | None = 0) -> int:
    """Return a whole number, or an item of a list of them."""
    value: Any = table.value(key, "a whole number")
    keys: tuple[str | int, ...] = (key,)
    if place is not None:
        value, keys = value[place], (key, place)
    if isinstance(value, bool) or not isinstance(value, int) or (least is not None and value < least):
        expected = "a whole number" if least is None else f"a whole number from {least} on"
        raise table.fault(*keys, expected=expected, found=shown(value))
    return value


def wholes(table: Table, key: str, expected: str, *, least: int | None = 0) -> list[int]:
    """Return a list of whole numbers."""
    return [whole(table, key, place, least=least) for place in range(len(table.items(key, expected)))]


def numbers_of(table: Table, keys: Iterable[str], *, least: int | None = 0) -> dict[str, int]:
    """Return the whole numbers under those of the keys that are there."""
    return {key: whole(table, key, least=least) for key in keys if key in table.values}
