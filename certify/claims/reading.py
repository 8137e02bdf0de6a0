"""Claims as tables of a sheet: one reader a claim kind, and the faults that a reader finds.

A new claim kind is one more reader and one more entry of `KINDS`.
"""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable, Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass
from types import MappingProxyType

from certify.claims.homology import HomologyClaim, Route
from certify.errors import BadInput
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import SimplicialComplex

__all__ = ["KINDS", "KeyFault", "Keys", "Kind", "Table", "in_words", "shown"]

Keys = tuple[str | int, ...]
"""The way to a value of the sheet: keys of tables, and numbers from 0 of items of lists."""

Complexes = Mapping[str, SimplicialComplex]

_DEGREE = re.compile(r"0|[1-9][0-9]*", re.ASCII)


class KeyFault(BadInput):
    """Bad input at a key of a sheet; whoever holds the text of the sheet adds file and line.

    Parameters
    ----------
    keys : Keys
        Where the faulty value stands, or where a missing one belongs.
    expected, found : str
        As in `BadInput`.
    """

    def __init__(self, keys: Keys, *, expected: str, found: str) -> None:
        super().__init__(where=in_words(keys), expected=expected, found=found)
        self.keys = keys


@dataclass(frozen=True, slots=True)
class Table:
    """A table of a sheet, read with faults that know their place.

    Parameters
    ----------
    keys : Keys
        Where the table stands.
    values : mapping
        What it holds.
    """

    keys: Keys
    values: Mapping[str, object]

    @classmethod
    def of(cls, keys: Keys, value: object) -> Table:
        """Return the table that a value is.

        Raises
        ------
        KeyFault
            If it is something else.
        """
        if not isinstance(value, dict):
            raise KeyFault(keys, expected="a table", found=shown(value))
        return cls(keys, value)

    def fault(self, *keys: str | int, expected: str, found: str) -> KeyFault:
        """Return a fault at this place in the table."""
        return KeyFault((*self.keys, *keys), expected=expected, found=found)

    @contextmanager
    def at(self, *keys: str | int) -> Iterator[None]:
        """Give faults that are found below, where sheets are unknown, this place in the table."""
        try:
            yield
        except BadInput as fault:
            raise self.fault(*keys, expected=fault.expected, found=fault.found) from fault

    def only(self, known: Iterable[str]) -> None:
        """Raise a fault at the first key that is not among the known ones."""
        names = tuple(known)
        for key in self.values:
            if key not in names:
                raise self.fault(key, expected=f"no other keys than {', '.join(names)}", found=shown(key))

    def value(self, key: str, expected: str) -> object:
        """Return the value of a key that must be there."""
        if key not in self.values:
            raise self.fault(expected=f"the key {key} with {expected}", found="no such key")
        return self.values[key]

    def text(self, key: str, expected: str = "a text in quotation marks") -> str:
        """Return the text under a key that must be there."""
        value = self.value(key, expected)
        if not isinstance(value, str):
            raise self.fault(key, expected=expected, found=shown(value))
        return value

    def items(self, key: str, expected: str) -> list[object]:
        """Return the list under a key that must be there."""
        value = self.value(key, expected)
        if not isinstance(value, list):
            raise self.fault(key, expected=expected, found=shown(value))
        return value


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
        # A truth value is a whole number for Python, but no degree.
        if not isinstance(value, int) or isinstance(value, bool) or value < 0:
            raise table.fault("degrees", place, expected="a degree from 0 on", found=shown(value))
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


def in_words(keys: Keys) -> str:
    """Return how a person calls a place in a sheet; items of lists are counted from 1.

    Examples
    --------
    >>> in_words(("claims", 0, "groups", "2"))
    'claim 1, key groups.2'
    >>> in_words(("complexes", "ring", "facets", 4))
    'complex ring, key facets, item 5'
    >>> in_words(("tittle",))
    'key tittle'
    """
    match keys:
        case ("claims", int(number), *rest):
            head = [f"claim {number + 1}"]
        case ("complexes", str(name), *rest):
            head = [f"complex {_bare(name)}"]
        case _:
            head, rest = [], list(keys)
    names = ".".join(_bare(key) for key in rest if isinstance(key, str))
    items = [f"item {key + 1}" for key in rest if isinstance(key, int)]
    return ", ".join(head + ([f"key {names}"] if names else []) + items)


def _bare(key: str) -> str:
    """Return a key as TOML writes it: bare if that is possible, otherwise in quotation marks."""
    return key if re.fullmatch(r"[A-Za-z0-9_-]+", key, re.ASCII) else shown(key)


def shown(value: object) -> str:
    """Return a value of a sheet for a message: short, on one line, in the words of TOML.

    Examples
    --------
    >>> shown("Z^"), shown(True), shown([1, 2]), shown(-3)
    ("'Z^'", 'true', 'a list', '-3')
    """
    match value:
        case bool():
            return "true" if value else "false"
        case list():
            return "a list" if value else "an empty list"
        case dict():
            return "a table"
        case str():
            return repr(value if len(value) <= 60 else value[:57] + "...")
        case int() | float():
            return str(value) if len(str(value)) <= 60 else f"a number of {len(str(value))} digits"
        case _:
            return f"the date or time {value}"
