"""Claims about counts as tables of a sheet: one reader a claim kind."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

from certify.claims.count_identities import IdentityClaim
from certify.claims.count_values import CountValuesClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.reading.elements import generators_of
from certify.claims.reading.tables import Given, Kind, complex_of, numbers_of, whole, wholes, with_defaults
from certify.simplicial.inputs import placed
from certify.tables import Table

__all__ = ["COUNT_KINDS"]

_EXPRESSION = 'an expression like "necklaces(n, 2)"'


def _orbit_count(table: Table, given: Given) -> OrbitCountClaim:
    k = complex_of(table, given)
    content = None
    if "content" in table.values:
        content = tuple(wholes(table, "content", "a list with the number of vertices of each colour"))
    colours = whole(table, "colours") if "colours" in table.values or content is None else len(content)
    claimed = numbers_of(table, ("orbits", "primitive"))
    generators = generators_of(with_defaults(table, generators="all"), k)
    with placed(table, "generators", "generator"):
        return OrbitCountClaim(k, colours, generators, content, claimed)


def _identity(table: Table, _: Given) -> IdentityClaim:
    left, right = (table.text(key, _EXPRESSION) for key in ("left", "right"))
    first, last = _range(table)
    with placed(table, "from"):
        return IdentityClaim(left, right, first, last)


def _values(table: Table, _: Given) -> CountValuesClaim:
    formula, (first, last) = table.text("formula", _EXPRESSION), _range(table)
    claimed = {}
    if "values" in table.values:
        claimed["values"] = wholes(table, "values", "a list with one value for each n", least=None)
    with placed(table, "from"):
        return CountValuesClaim(formula, first, last, claimed)


def _range(table: Table) -> tuple[int, int]:
    return whole(table, "from", least=1), whole(table, "to", least=1)


COUNT_KINDS: Mapping[str, Kind] = MappingProxyType(
    {
        "orbit-count": Kind(("complex", "generators", "colours", "content", "orbits", "primitive"), _orbit_count),
        "count-identity": Kind(("left", "right", "from", "to"), _identity),
        "count-values": Kind(("formula", "from", "to", "values"), _values),
    }
)
"""The claim kinds about counts, by the name that sheets give under ``kind``."""
