"""Claims about groups and how they act, as tables of a sheet: one reader a claim kind."""

from __future__ import annotations

import re
from collections.abc import Mapping
from fractions import Fraction
from types import MappingProxyType
from typing import Any, Literal

from certify.claims.actions import ActionClaim
from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.characters import CharacterClaim
from certify.claims.equivariance import EquivarianceClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.reading.elements import by_element, element_of, elements_of, generators_of
from certify.claims.reading.tables import (
    Given,
    Kind,
    degrees_of,
    groups_by_degree,
    numbers_of,
    product_of,
    route_of,
    whole,
    wholes,
    with_defaults,
)
from certify.products import PolyhedralProduct
from certify.simplicial import SimplicialComplex
from certify.simplicial.inputs import placed, plain_labels
from certify.symmetry.automorphisms import acting
from certify.symmetry.characters import IRREDUCIBLES, induced_character
from certify.symmetry.elements import Element, generated_group, rational_classes, spell_cycles
from certify.tables import Table, shown

__all__ = ["ACTION_KINDS"]


def _automorphisms(table: Table, given: Given) -> AutomorphismsClaim:
    table = with_defaults(table, pair="(D1, S0)", generators="all")
    product = product_of(table, given)
    claimed: dict[str, Any] = {}
    claimed |= numbers_of(table, ["order"], least=1)
    if "orbits" in table.values:
        claimed["orbits"] = _orbits(table)
    generators = generators_of(table, product.complex)
    with placed(table, "generators", "generator"):
        return AutomorphismsClaim(product, generators, claimed)


def _orbits(table: Table) -> dict[str, Any]:
    """Return claimed numbers of orbits: on vertices and sets of them, and on faces by size."""
    inner = Table.of((*table.keys, "orbits"), table.values["orbits"])
    inner.only(("vertices", "faces", "subsets"))
    found: dict[str, Any] = {}
    for key in inner.values:
        if key == "faces":
            found[key] = wholes(inner, "faces", "a list of numbers, for faces of 0, 1, 2, … vertices")
        else:
            found[key] = whole(inner, key)
    return found


def _character(table: Table, given: Given) -> CharacterClaim:
    product = product_of(with_defaults(table, pair="(D1, S0)"), given)
    k = product.complex
    degree = whole(table, "degree")
    generators = generators_of(table, k)
    elements: tuple[Element, ...] | None = None
    claimed: dict[str, Any] = {}
    if "values" in table.values:
        values = by_element(table, ("values",), k)
        elements, claimed["values"] = tuple(values), list(values.values())
    with placed(table, "generators", "generator"):
        CharacterClaim(product, degree, generators)
    with placed(table, "values"):
        claim = CharacterClaim(product, degree, generators, elements)
    functions = _functions(table, k, acting(generators, product), claim.elements or ())
    if "multiplicities" in table.values:
        claimed["multiplicities"] = _multiplicities(table, functions)
    summands = _summands(table, product) if "summands" in table.values else None
    routes: tuple[Literal["blocks", "cells"], ...] = ("blocks", "cells")
    route = route_of(table, routes)
    with placed(table, "functions"):
        return CharacterClaim(product, degree, generators, claim.elements, claimed, functions, summands, route)


def _summands(table: Table, product: PolyhedralProduct) -> tuple[str, ...]:
    """Return words: given as such, or as the list of vertices with the second summand where each pair has only two."""
    k = product.complex
    words = []
    for place, value in enumerate(table.items("summands", "a list of lists of vertices, like [[1, 3]]")):
        if isinstance(value, str):
            words.append(value)
            continue
        with table.at("summands", place):
            numbers = k.numbers(plain_labels(value, "summands"))
            words.append("".join(str(int(number in numbers)) for number in range(k.vertex_count)))
    return tuple(words)


def _functions(
    table: Table, k: SimplicialComplex, generators: tuple[Element, ...], elements: tuple[Element, ...]
) -> dict[str, tuple[int, ...]]:
    """Return class functions by name: the irreducible characters of a kind of group, induced ones, and others."""
    found: dict[str, tuple[int, ...]] = {}
    if "irreducibles" in table.values:
        names = ", ".join(IRREDUCIBLES)
        kind = table.text("irreducibles", f"one of {names}")
        if kind not in IRREDUCIBLES:
            raise table.fault("irreducibles", expected=f"one of {names}", found=shown(kind))
        with table.at("irreducibles"):
            found.update(IRREDUCIBLES[kind](generators, elements))
    if "functions" not in table.values:
        return found
    inner = Table.of((*table.keys, "functions"), table.values["functions"])
    group = generated_group(generators, k.vertex_count)
    classes = rational_classes(group, generators)
    for name, value in inner.values.items():
        if not name.strip():
            raise inner.fault(name, expected="a name for each function", found="an empty one")
        if name in found:
            raise inner.fault(name, expected="a name of its own for each function", found="one that is taken")
        if isinstance(value, list):
            subgroup = generated_group(elements_of(inner, name, k), k.vertex_count)
            if not set(subgroup) <= set(group):
                raise inner.fault(name, expected="generators of a subgroup", found="an element outside the group")
            found[name] = induced_character(group, subgroup, elements)
            continue
        values = by_element(table, ("functions", name), k)
        by_class = []
        for own in (set(own) for element in elements for own in classes if element in own):
            fitting = [x for element, x in values.items() if element in own]
            if len(fitting) != 1:
                found_words = f"{len(fitting)} for that of {spell_cycles(min(own), k)}"
                raise inner.fault(name, expected="one value for each rational class", found=found_words)
            by_class += fitting
        found[name] = tuple(by_class)
    return found


def _multiplicities(table: Table, functions: Mapping[str, tuple[int, ...]]) -> dict[str, Fraction]:
    inner = Table.of((*table.keys, "multiplicities"), table.values["multiplicities"])
    if not functions:
        raise table.fault("multiplicities", expected="irreducibles or functions as well", found="neither")
    inner.only(functions)
    return {name: _fraction(inner, name) for name in inner.values}


def _fraction(inner: Table, name: str) -> Fraction:
    """Return a multiplicity: a whole number, or a fraction as a text like "1/2"."""
    value = inner.values[name]
    if not isinstance(value, str):
        return Fraction(whole(inner, name, least=None))
    if not re.fullmatch("-?(0|[1-9][0-9]*)(/[1-9][0-9]*)?", value, re.ASCII):
        raise inner.fault(name, expected='a whole number, or a fraction like "1/2"', found=shown(value))
    return Fraction(value)


def _equivariance(table: Table, given: Given) -> EquivarianceClaim:
    product = product_of(with_defaults(table, pair="(D1, S0)"), given)
    k, degree = product.complex, whole(table, "degree")
    generators = generators_of(table, k)
    with placed(table, "generators", "generator"):
        claim = EquivarianceClaim(product, degree, generators)
    if "values" not in table.values:
        return claim
    values = by_element(table, ("values",), k)
    with placed(table, "values"):
        return EquivarianceClaim(product, degree, generators, tuple(values), {"values": list(values.values())})


def _action(table: Table, given: Given) -> ActionClaim:
    product = product_of(with_defaults(table, pair="(D1, S0)"), given)
    element, degree = element_of(table, "element", product.complex), whole(table, "degree")
    claimed: dict[str, Any] = numbers_of(table, ["trace"], least=None)
    if "matrix" in table.values:
        claimed["matrix"] = _matrix(table)
    with placed(table, "element"):
        return ActionClaim(product, degree, element, claimed)


def _matrix(table: Table) -> list[list[int]]:
    """Return a square matrix by rows."""
    expected = "a square matrix of whole numbers by rows, like [[0, 1], [1, 0]]"
    rows: list[list[int]] = []
    size = len(table.items("matrix", expected))
    for place, row in enumerate(table.items("matrix", expected)):
        fits = isinstance(row, list) and all(isinstance(x, int) and not isinstance(x, bool) for x in row)
        if not isinstance(row, list) or not fits or len(row) != size:
            found = f"a row of {len(row)} numbers" if isinstance(row, list) and fits else shown(row)
            raise table.fault("matrix", place, expected=expected, found=found)
        rows.append(row)
    return rows


def _fixed_set(table: Table, given: Given) -> FixedSetClaim:
    product = product_of(with_defaults(table, pair="(D1, S0)"), given)
    if ("element" in table.values) == ("generators" in table.values):
        raise table.fault(expected="one of the keys element and generators", found="both or neither")
    key = "element" if "element" in table.values else "generators"
    k, alone = product.complex, key == "element"
    elements = (element_of(table, key, k),) if alone else generators_of(table, k)
    degrees, groups = degrees_of(table), groups_by_degree(table)
    claimed = numbers_of(table, ("components", "points"))
    with placed(table, key, "generator"):
        return FixedSetClaim(product, degrees, groups, generators=elements, claimed=claimed)


ACTION_KINDS: Mapping[str, Kind] = MappingProxyType(
    {
        "automorphisms": Kind(("complex", "pair", "generators", "order", "orbits"), _automorphisms),
        "character": Kind(
            (
                "complex",
                "pair",
                "degree",
                "generators",
                "values",
                "irreducibles",
                "functions",
                "multiplicities",
                "summands",
                "route",
            ),
            _character,
        ),
        "equivariance": Kind(("complex", "pair", "degree", "generators", "values"), _equivariance),
        "action": Kind(("complex", "pair", "degree", "element", "matrix", "trace"), _action),
        "fixed-set": Kind(
            ("complex", "pair", "element", "generators", "degrees", "groups", "components", "points"), _fixed_set
        ),
    }
)
"""The claim kinds about groups and how they act, by the name that sheets give under ``kind``."""
