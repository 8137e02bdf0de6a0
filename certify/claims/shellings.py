"""The claim kind ``shelling``: K is a shellable sphere."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass, field
from functools import cached_property
from typing import Any, ClassVar

from certify.claims.base import Contribution
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.simplicial.complexes import Face, SimplicialComplex
from certify.simplicial.shellings import sphere_shelling

__all__ = ["ShellingClaim"]


@dataclass(frozen=True)
class ShellingClaim(ValuesClaim):
    """A claim that K is a shellable sphere, so that (D¹, S⁰)^K and (D², S¹)^K are closed manifolds.

    Parameters
    ----------
    complex : SimplicialComplex

    References
    ----------
    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, theorem 4.1.4 (from memory).
    """

    complex: SimplicialComplex
    claimed: Values = field(default_factory=dict)
    route: str = "shelling"
    kind: ClassVar[str] = "shelling"

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    @cached_property
    def _order(self) -> tuple[Face, ...]:
        try:
            return sphere_shelling(self.complex)
        except BadInput as fault:
            found = f"none: expected {fault.expected}, found {fault.found}"
            raise ClaimIsFalse(what="K", claimed="a shellable sphere", found=found) from fault

    def fields(self) -> dict[str, Any]:
        """Return nothing more."""
        return {}

    def opening(self) -> Iterator[dict[str, Any]]:
        """Yield the shelling."""
        yield {"order": [[vertex + 1 for vertex in facet] for facet in self._order]}

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return nothing: the claim has no value besides being true."""
        list(contributions)
        return {}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return key

    def lines(self, found: Values) -> list[str]:  # noqa: ARG002 - there are no values
        """Say what K is."""
        dimension = self.complex.dimension
        return [f"K is a shellable sphere of dimension {dimension}, with {len(self.complex.facets)} facets"]
