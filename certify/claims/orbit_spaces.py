"""The claim kind ``orbit-space``: homology and Euler characteristic of a quotient of (D¹, S⁰)^K by symmetries."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field
from functools import cached_property
from typing import Any, ClassVar

from certify.claims.base import Task, checked_degrees, generators_value
from certify.claims.numbers import Numbers, WithNumbers
from certify.claims.quotients import intervals, quotient_cells
from certify.exact import AbelianGroup
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import check_symmetries, generated_group
from certify.symmetry.fixed_sets import quotient_euler
from certify.symmetry.orbit_spaces import OrbitSpace

__all__ = ["OrbitSpaceClaim"]


@dataclass(frozen=True)
class OrbitSpaceClaim(WithNumbers):
    """A claim about the integral homology and the Euler characteristic of (D¹, S⁰)^K / G.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element, or None
        Of G; signed. None is for all automorphisms of K.
    degrees : tuple of int, or None
    groups : mapping from degree to AbelianGroup, or None
    claimed : mapping
        ``euler``, the Euler characteristic.

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    complex: SimplicialComplex
    generators: Generators
    degrees: tuple[int, ...] | None = None
    groups: Mapping[int, AbelianGroup] | None = None
    claimed: Mapping[str, int] = field(default_factory=dict)
    route: str = "cells"
    kind: ClassVar[str] = "orbit-space"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries, and degrees that are none."""
        object.__setattr__(self, "degrees", checked_degrees(self.degrees, self.groups))
        check_symmetries(self.generators or (), intervals(self.complex))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def tasks(self) -> Iterator[Task]:
        """Yield the one piece of work."""
        product = intervals(self.complex)
        yield Task(OrbitSpace(product, acting(self.generators, product)))

    @property
    def group_cells(self) -> int:
        """The chains of cells, once for each element of the group; fewer if single cells will do."""
        return quotient_cells(self.complex, self.generators)

    def in_degree(self, degree: str) -> str:
        """Write a homology group as in print."""
        return f"H_{degree}((D¹,S⁰)^K/G; ℤ)"

    def numbers(self, found: Mapping[int, AbelianGroup]) -> Numbers:  # noqa: ARG002 - not all groups may be known
        """Return the Euler characteristic."""
        return {"euler": self._euler}

    @cached_property
    def _euler(self) -> int:
        product = intervals(self.complex)
        return quotient_euler(product, generated_group(acting(self.generators, product), self.complex.vertex_count))

    def number_name(self, key: str) -> str:  # noqa: ARG002 - there is one number only
        """Write in words what the number is."""
        return "the Euler characteristic of (D¹,S⁰)^K/G"

    def fields(self) -> dict[str, Any]:
        """Return degrees and generators."""
        return super().fields() | {"generators": generators_value(self.generators)}
