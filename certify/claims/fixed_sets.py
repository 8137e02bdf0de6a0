"""The claim kind ``fixed-set``: integral homology of the points of a polyhedral product that symmetries fix."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any, ClassVar

from certify.claims.base import Task, generators_value
from certify.claims.homology import HomologyClaim
from certify.exact import AbelianGroup
from certify.products import PolyhedralProduct
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import check_symmetries
from certify.symmetry.fixed_sets import fixed_set

__all__ = ["FixedSetClaim"]


@dataclass(frozen=True)
class FixedSetClaim(HomologyClaim):
    """A claim about the integral homology of the fixed set of a group of symmetries.

    Parameters
    ----------
    product : PolyhedralProduct
    degrees, groups
        As for `HomologyClaim`.
    generators : tuple of Element, or None
        None is for all automorphisms of K and the pairs.

    Raises
    ------
    BadInput
        If a generator is no symmetry of K and the pairs.
    """

    generators: Generators = ()
    kind: ClassVar[str] = "fixed-set"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        super().__post_init__()
        check_symmetries(self.generators or (), self.product)

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
