"""Permutations in sheets: elements, generators of groups, numbers under elements."""

from __future__ import annotations

import re
from typing import Any

from certify.claims.reading.tables import whole
from certify.simplicial import SimplicialComplex
from certify.symmetry.automorphisms import Generators
from certify.symmetry.elements import Element, element_from_cycles
from certify.tables import Table, shown

__all__ = ["by_element", "element_of", "elements_in", "elements_of", "generators_of"]


def element_of(table: Table, key: str, k: SimplicialComplex) -> Element:
    """Return the permutation that is written in cycles under a key."""
    text = table.text(key, 'a permutation in cycles like "(1 2 3)(4 5)"')
    with table.at(key):
        return element_from_cycles(text, k)


_LIST = 'a list of permutations in cycles like ["(1 2 3)(4 5)"]'


def elements_of(table: Table, key: str, k: SimplicialComplex, expected: str = _LIST) -> tuple[Element, ...]:
    """Return the permutations of a list, each located by its place there."""
    found = []
    for place, text in enumerate(table.items(key, expected)):
        if not isinstance(text, str):
            raise table.fault(key, place, expected='a permutation in cycles like "(1 2 3)"', found=shown(text))
        with table.at(key, place):
            found.append(element_from_cycles(text, k))
    return tuple(found)


def generators_of(table: Table, k: SimplicialComplex) -> Generators:
    """Return the generators of G, or None for all automorphisms."""
    if table.values.get("generators") == "all":
        return None
    return elements_of(table, "generators", k, f'{_LIST}, or "all"')


def by_element(table: Table, keys: tuple[str, ...], k: SimplicialComplex) -> dict[Element, int]:
    """Return whole numbers under elements that are written in cycles."""
    value: Any = table.values
    for key in keys:
        value = value[key]
    inner = Table.of((*table.keys, *keys), value)
    found: dict[Element, int] = {}
    for text in inner.values:
        with inner.at(text):
            element = element_from_cycles(text, k)
        if element in found:
            raise inner.fault(text, expected="each element once", found="the same element again")
        found[element] = whole(inner, text, least=None)
    return found


def elements_in(text: str, k: SimplicialComplex) -> tuple[Element, ...]:
    """Return the permutations of a text like ``(1 2)(3 4), (1 3)(2 4)``, which are separated by commas."""
    return tuple(element_from_cycles(part, k) for part in re.split(r"(?<=\))\s*,\s*(?=\()", text.strip()))
