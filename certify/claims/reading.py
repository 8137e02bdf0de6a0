"""Claims about spaces as tables of a sheet: one reader a claim kind, and readers of values that many kinds have."""

from __future__ import annotations

import re
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from types import MappingProxyType
from typing import Any, get_args

from certify.claims.base import Claim
from certify.claims.homology import HomologyClaim, Route, SmashClaim
from certify.claims.real_toric import RealToricClaim
from certify.claims.splitting import SummandClaim, TableClaim, TorClaim
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.products.real_toric import RealToricSpace
from certify.products.small_covers import REAL_TORIC_FAMILIES, coloured_small_cover, space_of_subsets
from certify.simplicial import Label, SimplicialComplex
from certify.simplicial.inputs import placed, plain_labels
from certify.simplicial.spelling import read_labels
from certify.tables import Table, shown

__all__ = [
    "SPACE_KINDS",
    "Given",
    "Kind",
    "complex_of",
    "degrees_of",
    "groups_by_degree",
    "labels_of",
    "pairs_of",
    "product_of",
]

_DEGREE = ("0|[1-9][0-9]*", "a degree from 0 on, in plain digits")
_REDUCED_DEGREE = ("-1|0|[1-9][0-9]*", "a degree from -1 on, in plain digits")
_BIDEGREE = (
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


def _homology(table: Table, given: Given) -> HomologyClaim:
    return _about_product(HomologyClaim, table, given)


def _smash(table: Table, given: Given) -> HomologyClaim:
    return _about_product(SmashClaim, table, given)


def _about_product(kind: type[HomologyClaim], table: Table, given: Given) -> HomologyClaim:
    product = product_of(table, given)
    degrees, groups, route = degrees_of(table), groups_by_degree(table), _route(table)
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
        for key, group in _groups(table, ("groups",), *_BIDEGREE).items():
            i, d = map(int, key.split(","))
            groups[i, d // 2] = group
    return TorClaim(complex_, groups)


def _table(table: Table, given: Given) -> TableClaim:
    complex_ = complex_of(table, given)
    groups: dict[tuple[int, int], AbelianGroup] | None = None
    if "groups" in table.values:
        groups = {}
        for name in _a_table(table, ("groups",)):
            with table.at("groups", name):
                mask = sum(1 << number for number in complex_.numbers(read_labels(complex_, name, "groups")))
            for degree, group in _reduced_groups(table, ("groups", name)).items():
                if (mask, degree) in groups:
                    raise table.fault("groups", name, expected="each set of vertices once", found="the same set again")
                groups[mask, degree] = group
    return TableClaim(complex_, groups)


def _summand(table: Table, given: Given) -> SummandClaim:
    complex_ = complex_of(table, given)
    kept, out = (labels_of(table, key, complex_) for key in ("kept", "out"))
    groups = _reduced_groups(table, ("groups",)) if "groups" in table.values else None
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


# -- values that several kinds have -------------------------------------------------------------


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
    return {int(key): group for key, group in _groups(table, ("groups",), *_DEGREE).items()}


def _reduced_groups(table: Table, keys: tuple[str, ...]) -> dict[int, AbelianGroup]:
    """Return claimed groups by degree from -1 on."""
    return {int(key): group for key, group in _groups(table, keys, *_REDUCED_DEGREE).items()}


def _groups(table: Table, keys: tuple[str, ...], form: str, expected: str) -> dict[str, AbelianGroup]:
    """Return the groups of a table in the table of the claim, under their keys, which have this form."""
    groups = {}
    for key, text in _a_table(table, keys).items():
        if not re.fullmatch(form, key, re.ASCII):
            raise table.fault(*keys, key, expected=expected, found=shown(key))
        if not isinstance(text, str):
            raise table.fault(*keys, key, expected='a group in quotation marks like "Z^34"', found=shown(text))
        with table.at(*keys, key):
            groups[key] = AbelianGroup.parse(text)
    return groups


def _a_table(table: Table, keys: tuple[str, ...]) -> dict[str, object]:
    value: object = table.values
    for key in keys:
        value = value[key] if isinstance(value, Mapping) else None
    if not isinstance(value, dict):
        raise table.fault(*keys, expected='a table like { 0 = "Z", 1 = "Z^34" }', found=shown(value))
    return value


def _route(table: Table) -> Route:
    value = table.values.get("route", "blocks")
    for route in get_args(Route):
        if value == route:
            found: Route = route
            return found
    names = " or ".join(f'"{route}"' for route in get_args(Route))
    raise table.fault("route", expected=names, found=shown(value))
