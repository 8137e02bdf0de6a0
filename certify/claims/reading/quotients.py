"""Claims about quotients and manifolds as tables of a sheet: one reader a claim kind."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType
from typing import Any

from certify.claims.branching import BranchingClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.reading.elements import elements_in, generators_of
from certify.claims.reading.tables import (
    Given,
    Kind,
    complex_of,
    degrees_of,
    groups_by_degree,
    numbers_of,
    product_of,
    whole,
    with_defaults,
)
from certify.claims.shellings import ShellingClaim
from certify.claims.surfaces import SurfaceClaim
from certify.simplicial import SimplicialComplex
from certify.simplicial.inputs import placed
from certify.symmetry.elements import Element
from certify.tables import Table, shown

__all__ = ["QUOTIENT_KINDS"]


def _orbit_space(table: Table, given: Given) -> OrbitSpaceClaim:
    k = _complex_of_cube(table, given)
    generators, degrees, groups = generators_of(table, k), degrees_of(table), groups_by_degree(table)
    claimed = numbers_of(table, ["euler"], least=None)
    with placed(table, "generators", "generator"):
        return OrbitSpaceClaim(k, generators, degrees, groups, claimed)


def _surface(table: Table, given: Given) -> SurfaceClaim:
    k = _complex_of_cube(table, given)
    claimed: dict[str, Any] = numbers_of(table, ["euler"], least=None) | numbers_of(table, ["boundary"])
    if "orientable" in table.values:
        value = table.values["orientable"]
        if not isinstance(value, bool):
            raise table.fault("orientable", expected="true or false", found=shown(value))
        claimed["orientable"] = int(value)
    if "genus" in table.values:
        _require_closed_orientable(table, claimed)
        claimed |= {"boundary": 0, "genus": whole(table, "genus")}
    generators = generators_of(with_defaults(table, generators=[]), k)
    with placed(table, "generators", "generator"):
        return SurfaceClaim(k, generators, claimed)


def _require_closed_orientable(table: Table, claimed: Mapping[str, int]) -> None:
    """Refuse a genus that does not say by itself which surface is meant."""
    if "euler" in claimed:
        raise table.fault("genus", expected="only one of genus and euler", found="both")
    if claimed.get("orientable") != 1 or claimed.get("boundary", 0):
        found = "no key orientable" if "orientable" not in claimed else "orientable = false"
        found = f"boundary = {claimed['boundary']}" if claimed.get("boundary") else found
        expected = "orientable = true beside a genus, and no boundary; claim euler for other surfaces"
        raise table.fault("genus", expected=expected, found=found)


def _branching(table: Table, given: Given) -> BranchingClaim:
    k = _complex_of_cube(table, given)
    claimed: dict[str, Any] = {}
    if "orbits" in table.values:
        claimed["orbits"] = _by_order(Table.of((*table.keys, "orbits"), table.values["orbits"]))
    if "isotropy" in table.values:
        inner = Table.of((*table.keys, "isotropy"), table.values["isotropy"])
        claimed["isotropy"] = _by_generators(inner, k)
    generators = generators_of(table, k)
    with placed(table, "generators", "generator"):
        return BranchingClaim(k, generators, claimed)


def _by_order(inner: Table) -> dict[int, int]:
    """Return numbers of orbits by the order of isotropy groups."""
    for key in inner.values:
        if not key.isdecimal() or int(key) < 2 or str(int(key)) != key:
            raise inner.fault(key, expected="the order of an isotropy group, from 2 on", found=shown(key))
    return {int(key): whole(inner, key, least=1) for key in inner.values}


def _by_generators(inner: Table, k: SimplicialComplex) -> dict[tuple[Element, ...], int]:
    """Return numbers of orbits by generators of isotropy groups, which are separated by commas."""
    found: dict[tuple[Element, ...], int] = {}
    for text in inner.values:
        with inner.at(text):
            generators = elements_in(text, k)
        if generators in found:
            raise inner.fault(text, expected="each group once", found="the same one again")
        found[generators] = whole(inner, text, least=1)
    return found


def _shelling(table: Table, given: Given) -> ShellingClaim:
    return ShellingClaim(complex_of(table, given))


def _complex_of_cube(table: Table, given: Given) -> SimplicialComplex:
    """Return K, after a look at the pair, which can be (D1, S0) only."""
    product = product_of(with_defaults(table, pair="(D1, S0)"), given)
    for pair in product.pairs:
        if pair.symbol != "(D¹,S⁰)":
            expected = 'the pair "(D1, S0)" alone, whose product is made of cubes'
            raise table.fault("pair", expected=expected, found=pair.symbol)
    return product.complex


QUOTIENT_KINDS: Mapping[str, Kind] = MappingProxyType(
    {
        "orbit-space": Kind(("complex", "pair", "generators", "degrees", "groups", "euler"), _orbit_space),
        "surface": Kind(("complex", "pair", "generators", "orientable", "euler", "genus", "boundary"), _surface),
        "branching": Kind(("complex", "pair", "generators", "orbits", "isotropy"), _branching),
        "shelling": Kind(("complex",), _shelling),
    }
)
"""The claim kinds about quotients and manifolds, by the name that sheets give under ``kind``."""
