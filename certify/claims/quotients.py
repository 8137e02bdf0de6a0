"""What claims about quotients of (D¹, S⁰)^K by symmetries share."""

from __future__ import annotations

from abc import abstractmethod
from collections.abc import Iterable
from dataclasses import dataclass, field
from math import comb
from typing import Any

from certify.claims.base import Contribution, generators_value
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import check_symmetries, generated_group
from certify.symmetry.orbit_spaces import OrbitSpace

__all__ = ["QuotientClaim", "intervals", "quotient_cells"]


def intervals(complex_: SimplicialComplex) -> PolyhedralProduct:
    """Return (D¹, S⁰)^K."""
    return PolyhedralProduct(complex_, parse_pairs("(D1, S0)", complex_.vertex_count))


def quotient_cells(k: SimplicialComplex, generators: Generators) -> int:
    """Return how many chains of cells of (D¹, S⁰)^K there are, once for each element of a group."""
    group = generated_group(acting(generators, intervals(k)), k.vertex_count)
    # Chains whose last cube has dimension d: the cube alone, or behind a chain that ends in one of its faces.
    ending: list[int] = []
    for d in range(len(k.f_vector())):
        ending.append(1 + sum((comb(d, e) << d - e) * ending[e] for e in range(d)))
    cubes = [faces << k.vertex_count - d for d, faces in enumerate(k.f_vector())]
    return len(group) * sum(number * chains for number, chains in zip(cubes, ending, strict=True))


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

    @property
    def group_cells(self) -> int:
        """The chains of cells, once for each element of the group."""
        return quotient_cells(self.complex, self.generators)

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
