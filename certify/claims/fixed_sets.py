"""The claim kind ``fixed-set``: homology and number of the points of a polyhedral product that symmetries fix."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.claims.base import Task, generators_value
from certify.claims.homology import HomologyClaim
from certify.claims.numbers import Numbers, WithNumbers
from certify.errors import BadInput
from certify.exact import AbelianGroup
from certify.products import PolyhedralProduct
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import check_symmetries
from certify.symmetry.fixed_sets import fixed_set, number_of_points

__all__ = ["FixedSetClaim"]


@dataclass(frozen=True)
class FixedSetClaim(WithNumbers, HomologyClaim):
    """A claim about the fixed set of a group of symmetries: its integral homology, its components and its points.

    Parameters
    ----------
    product : PolyhedralProduct
    degrees, groups
        As for `HomologyClaim`.
    generators : tuple of Element, or None
        None is for all automorphisms of K and the pairs.
    claimed : mapping
        Some of ``components``, the number of connected components, and ``points``, the number of points. The first is
        found if the claim speaks of degree 0, the second is None where there are infinitely many.

    Raises
    ------
    BadInput
        If a generator is no symmetry of K and the pairs, or components are claimed without degree 0.
    """

    generators: Generators = ()
    claimed: Mapping[str, int] = field(default_factory=dict)
    kind: ClassVar[str] = "fixed-set"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        super().__post_init__()
        check_symmetries(self.generators or (), self.product)
        if "components" in self.claimed and not self._speaks_of_components:
            raise BadInput(
                where="components", expected="0 among the degrees of the claim", found=f"{list(self.degrees or ())}"
            )

    @property
    def _speaks_of_components(self) -> bool:
        return self.degrees is None or 0 in self.degrees

    def numbers(self, found: Mapping[int, AbelianGroup]) -> Numbers:
        """Return the numbers of components, which is the rank of H_0, and of points."""
        components = found.get(0, AbelianGroup()).rank if self._speaks_of_components else None
        fixed = self._fixed
        return {"components": components, "points": 0 if fixed is None else number_of_points(fixed)}

    def number_name(self, key: str) -> str:
        """Write in words what a number is."""
        return f"the number of {key} of ({self.product})^G"

    @property
    def _fixed(self) -> PolyhedralProduct | None:
        return fixed_set(self.product, acting(self.generators, self.product))

    @property
    def _inner(self) -> HomologyClaim | None:
        """The claim about the polyhedral product that the fixed set is, or None if it is empty."""
        fixed = self._fixed
        return None if fixed is None else HomologyClaim(fixed, self.degrees)

    def opening(self) -> Iterator[dict[str, Any]]:
        """Yield the splitting of each pair of the fixed set that is given by its cells."""
        if self._inner is not None:
            yield from self._inner.opening()

    def tasks(self) -> Iterator[Task]:
        """Yield the work of the fixed set."""
        if self._inner is not None:
            yield from self._inner.tasks()

    @property
    def weight(self) -> int:
        """The number of blocks of the fixed set."""
        return self._inner.weight if self._inner is not None else 0

    def fields(self) -> dict[str, Any]:
        """Return degrees, pairs and generators."""
        return super().fields() | {"generators": generators_value(self.generators)}

    def in_degree(self, degree: str) -> str:
        """Write a homology group as in print."""
        return f"H_{degree}(({self.product})^G; ℤ)"

    def lines(self, found: Mapping[int, AbelianGroup]) -> list[str]:
        """Write the groups, and what the fixed set is."""
        fixed = self._fixed
        which = "empty" if fixed is None else f"{fixed}, K_G on {fixed.complex}"
        return [*super().lines(found), f"the fixed set is {which}"]
