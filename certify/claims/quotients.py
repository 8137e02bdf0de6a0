"""What claims about quotients of (D¹, S⁰)^K by symmetries share."""

from __future__ import annotations

from abc import abstractmethod
from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Any

from certify.claims.base import Contribution, generators_value
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import check_symmetries
from certify.symmetry.orbit_spaces import OrbitSpace

__all__ = ["QuotientClaim", "intervals"]


def intervals(complex_: SimplicialComplex) -> PolyhedralProduct:
    """Return (D¹, S⁰)^K."""
    return PolyhedralProduct(complex_, parse_pairs("(D1, S0)", complex_.vertex_count))


@dataclass(frozen=True)
class QuotientClaim(ValuesClaim):
    """A claim about values that are read off the chains of cells of (D¹, S⁰)^K / G."""

    complex: SimplicialComplex
    generators: Generators = ()
    claimed: Values = field(default_factory=dict)
    route: str = "cells"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        check_symmetries(self.generators or (), intervals(self.complex))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def fields(self) -> dict[str, Any]:
        """Return the generators."""
        return {"generators": generators_value(self.generators)}

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the values of the quotient."""
        list(contributions)
        product = intervals(self.complex)
        space = OrbitSpace(product, acting(self.generators, product), always_chains=True)
        try:
            return self.read_off(space)
        except BadInput as fault:
            # What is claimed makes sense, and is not so.
            raise ClaimIsFalse(what=fault.where, claimed=fault.expected, found=f"not: it has {fault.found}") from fault

    @abstractmethod
    def read_off(self, space: OrbitSpace) -> dict[str, Any]:
        """Return the values of a quotient."""
