"""Tables of a sheet, read with faults that know their place.

Readers in several rooms take a `Table` and raise a `KeyFault`; only the room that holds the text of the sheet knows
lines, and adds them.
"""

from __future__ import annotations

import re
from collections.abc import Iterable, Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass

from certify.errors import BadInput

__all__ = ["KeyFault", "Keys", "Table", "in_words", "shown"]

Keys = tuple[str | int, ...]
"""The way to a value of the sheet: keys of tables, and numbers from 0 of items of lists."""


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
        """Give faults that are found below, where sheets are unknown, this place in the table; others know theirs."""
        try:
            yield
        except KeyFault:
            raise
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
        case ("pairs", str(name), *rest):
            head = [f"pair {_bare(name)}"]
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
