"""The claim kind ``real-toric``: integral homology of a real toric space."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any, ClassVar

from certify.claims.base import DegreesClaim, Task, checked_degrees
from certify.exact import AbelianGroup
from certify.products.real_toric import RealToricSpace
from certify.simplicial.complexes import SimplicialComplex

__all__ = ["RealToricClaim"]


@dataclass(frozen=True)
class RealToricClaim(DegreesClaim):
    """A claim about the integral homology of (D¹, S⁰)^K / ker λ.

    Parameters
    ----------
    complex : SimplicialComplex
    rows : tuple of str
        λ by rows, a digit 0 or 1 for each vertex in the order of the labels.
    degrees : tuple of int, or None
    groups : mapping from degree to AbelianGroup, or None

    Raises
    ------
    BadInput
        If λ does not fit, or is not injective on a face.
    """

    complex: SimplicialComplex
    rows: tuple[str, ...]
    degrees: tuple[int, ...] | None = None
    groups: Mapping[int, AbelianGroup] | None = None
    route: str = "cells"
    kind: ClassVar[str] = "real-toric"

    def __post_init__(self) -> None:
        """Refuse degrees that are none, groups outside the degrees, and a λ that does not act freely."""
        object.__setattr__(self, "degrees", checked_degrees(self.degrees, self.groups))
        RealToricSpace(self.complex, self.rows)

    @property
    def base(self) -> SimplicialComplex:
        """The complex K that the space is built over."""
        return self.complex

    def tasks(self) -> Iterator[Task]:
        """Yield the one piece of work."""
        yield Task(RealToricSpace(self.complex, self.rows, None if self.degrees is None else self.degrees[-1] + 1))

    def in_degree(self, degree: str) -> str:
        """Write a homology group as in print."""
        return f"H_{degree}((D¹,S⁰)^K/ker λ; ℤ)"

    def remarks(self) -> list[str]:
        """Show λ."""
        return [f"λ has the rows {' '.join(self.rows)}"] if self.rows else []

    def fields(self) -> dict[str, Any]:
        """Return degrees and rows."""
        return super().fields() | {"rows": list(self.rows)}
