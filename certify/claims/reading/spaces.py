"""Claims about spaces as tables of a sheet: one reader a claim kind."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from types import MappingProxyType
from typing import get_args

from certify.claims.homology import HomologyClaim, Route, SmashClaim
from certify.claims.reading.tables import (
    BIDEGREE,
    Given,
    Kind,
    complex_of,
    degrees_of,
    groups_by_degree,
    groups_under,
    labels_of,
    product_of,
    reduced_groups,
    route_of,
    table_under,
)
from certify.claims.real_toric import RealToricClaim
from certify.claims.splitting import SummandClaim, TableClaim, TorClaim
from certify.exact import AbelianGroup
from certify.products.real_toric import RealToricSpace
from certify.products.small_covers import REAL_TORIC_FAMILIES, coloured_small_cover, space_of_subsets
from certify.simplicial import SimplicialComplex
from certify.simplicial.inputs import placed
from certify.simplicial.spelling import read_labels
from certify.tables import Table, shown

__all__ = ["SPACE_KINDS"]


def _homology(table: Table, given: Given) -> HomologyClaim:
    return _about_product(HomologyClaim, table, given)


def _smash(table: Table, given: Given) -> HomologyClaim:
    return _about_product(SmashClaim, table, given)


def _about_product(kind: type[HomologyClaim], table: Table, given: Given) -> HomologyClaim:
    product = product_of(table, given)
    degrees, groups, route = degrees_of(table), groups_by_degree(table), route_of(table, get_args(Route))
    with placed(table, "groups"):
        return kind(product, degrees, groups, route)


def _real_toric(table: Table, given: Given) -> RealToricClaim:
    space = _real_toric_space(table, given)
    degrees, groups = degrees_of(table), groups_by_degree(table)
    with placed(table, "groups"):
        return RealToricClaim(space.complex, space.rows, degrees, groups)


_SPACES_OVER: Mapping[str, Callable[[SimplicialComplex], RealToricSpace]] = MappingProxyType(
    {"colouring": coloured_small_cover, "subsets": space_of_subsets}
)


def _real_toric_space(table: Table, given: Given) -> RealToricSpace:
    """Return the space of a family, or of a complex with λ by rows or by name."""
    if "family" in table.values:
        return _real_toric_family(table)
    complex_ = complex_of(table, given)
    names = " or ".join(f'"{name}"' for name in _SPACES_OVER)
    expected = f'the rows of λ as a list of texts like "110", or {names}'
    rows = table.value("rows", expected)
    if isinstance(rows, str):
        if rows not in _SPACES_OVER:
            raise table.fault("rows", expected=expected, found=shown(rows))
        with table.at("rows"):
            return _SPACES_OVER[rows](complex_)
    texts = []
    for place, row in enumerate(table.items("rows", expected)):
        if not isinstance(row, str):
            raise table.fault("rows", place, expected='a text of digits 0 and 1 like "110"', found=shown(row))
        texts.append(row)
    with table.at("rows"):
        return RealToricSpace(complex_, tuple(texts))


def _real_toric_family(table: Table) -> RealToricSpace:
    name = table.text("family")
    if name not in REAL_TORIC_FAMILIES:
        raise table.fault("family", expected=f"one of {', '.join(REAL_TORIC_FAMILIES)}", found=shown(name))
    family = REAL_TORIC_FAMILIES[name]
    for key in ("complex", "rows", "n", "matrix"):
        if key in table.values and key not in family.parameters:
            known = ", ".join(family.parameters)
            raise table.fault(key, expected=f"the family with {known} alone", found=shown(table.values[key]))
    arguments = {key: table.value(key, meaning) for key, meaning in family.parameters.items()}
    (only,) = family.parameters
    with placed(table, only):
        return family.function(**arguments)


def _tor(table: Table, given: Given) -> TorClaim:
    complex_ = complex_of(table, given)
    groups: dict[tuple[int, int], AbelianGroup] | None = None
    if "groups" in table.values:
        groups = {}
        for key, group in groups_under(table, ("groups",), *BIDEGREE).items():
            i, d = map(int, key.split(","))
            groups[i, d // 2] = group
    return TorClaim(complex_, groups)


def _table(table: Table, given: Given) -> TableClaim:
    complex_ = complex_of(table, given)
    groups: dict[tuple[int, int], AbelianGroup] | None = None
    if "groups" in table.values:
        groups = {}
        for name in table_under(table, ("groups",)):
            with table.at("groups", name):
                mask = sum(1 << number for number in complex_.numbers(read_labels(complex_, name, "groups")))
            for degree, group in reduced_groups(table, ("groups", name)).items():
                if (mask, degree) in groups:
                    raise table.fault("groups", name, expected="each set of vertices once", found="the same set again")
                groups[mask, degree] = group
    return TableClaim(complex_, groups)


def _summand(table: Table, given: Given) -> SummandClaim:
    complex_ = complex_of(table, given)
    kept, out = (labels_of(table, key, complex_) for key in ("kept", "out"))
    groups = reduced_groups(table, ("groups",)) if "groups" in table.values else None
    with table.at("out"):
        return SummandClaim(complex_, kept, out, groups)


SPACE_KINDS: Mapping[str, Kind] = MappingProxyType(
    {
        "homology": Kind(("complex", "pair", "degrees", "groups", "route"), _homology),
        "smash": Kind(("complex", "pair", "degrees", "groups", "route"), _smash),
        "real-toric": Kind(("complex", "rows", "family", "n", "matrix", "degrees", "groups"), _real_toric),
        "tor": Kind(("complex", "groups"), _tor),
        "table": Kind(("complex", "groups"), _table),
        "summand": Kind(("complex", "kept", "out", "groups"), _summand),
    }
)
"""The claim kinds about spaces, by the name that sheets give under ``kind``."""
