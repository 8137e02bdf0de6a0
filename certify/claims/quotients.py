"""The claim kinds ``orbit-space``, ``surface`` and ``branching``: (D¹, S⁰)^K and its quotients by symmetries."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.claims.base import Contribution, GroupsClaim, Sum, Task, checked_degrees
from certify.claims.values import Values, ValuesClaim
from certify.exact import AbelianGroup
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.elements import Element, check_symmetries
from certify.symmetry.orbit_spaces import OrbitSpace
from certify.symmetry.surfaces import Surface, branch_orbits, recognise_surface

__all__ = ["BranchingClaim", "OrbitSpaceClaim", "SurfaceClaim"]


def _intervals(complex_: SimplicialComplex) -> PolyhedralProduct:
    return PolyhedralProduct(complex_, parse_pairs("(D1, S0)", complex_.vertex_count))


def _generators_value(generators: Sequence[Element]) -> dict[str, Any]:
    return {"generators": [list(element) for element in generators]}


@dataclass(frozen=True)
class OrbitSpaceClaim(GroupsClaim[int]):
    """A claim about the integral homology of (D¹, S⁰)^K / G.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element
        Of G; signed.
    degrees : tuple of int, or None
    groups : mapping from degree to AbelianGroup, or None

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    complex: SimplicialComplex
    generators: tuple[Element, ...]
    degrees: tuple[int, ...] | None = None
    groups: Mapping[int, AbelianGroup] | None = None
    route: str = "cells"
    kind: ClassVar[str] = "orbit-space"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries, and degrees that are none."""
        object.__setattr__(self, "degrees", checked_degrees(self.degrees, self.groups))
        check_symmetries(self.generators, _intervals(self.complex))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def tasks(self) -> Iterator[Task]:
        """Yield the one piece of work."""
        yield Task(OrbitSpace(_intervals(self.complex), self.generators))

    def total(self, contributions: Iterable[Contribution]) -> dict[int, AbelianGroup]:
        """Return the groups in the degrees of the claim."""
        found = Sum[int]()
        for contribution in contributions:
            for degree, group in enumerate(contribution.groups):
                if self.degrees is None or degree in self.degrees:
                    found.add(degree, group.rank, group.torsion)
        return found.groups()

    def name(self, key: int) -> str:
        """Write a homology group as in print."""
        return f"H_{key}((D¹,S⁰)^K/G; ℤ)"

    @property
    def rest(self) -> str:
        """Say as in print that all other groups are zero, if the claim is about all."""
        return "" if self.degrees is not None else "H_k((D¹,S⁰)^K/G; ℤ) = 0 for all other k"

    def keys(self, found: Mapping[int, AbelianGroup]) -> Sequence[int]:
        """Return the degrees of the claim, or those with homology."""
        return sorted(found) if self.degrees is None else self.degrees

    def fields(self) -> dict[str, Any]:
        """Return degrees and generators."""
        degrees = None if self.degrees is None else list(self.degrees)
        return {"degrees": degrees} | _generators_value(self.generators)


@dataclass(frozen=True)
class SurfaceClaim(ValuesClaim):
    """A claim that (D¹, S⁰)^K / G is a connected compact surface, and which.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element
        Of G; none for the space itself.
    claimed : mapping
        Some of ``euler``, ``orientable`` (0 or 1) and ``boundary``, the number of boundary circles.

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    complex: SimplicialComplex
    generators: tuple[Element, ...] = ()
    claimed: Values = field(default_factory=dict)
    route: str = "cells"
    kind: ClassVar[str] = "surface"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        check_symmetries(self.generators, _intervals(self.complex))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def fields(self) -> dict[str, Any]:
        """Return the generators."""
        return _generators_value(self.generators)

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return Euler characteristic, orientability and boundary."""
        list(contributions)
        surface = recognise_surface(OrbitSpace(_intervals(self.complex), self.generators, always_chains=True))
        return {"boundary": surface.boundary, "euler": surface.euler, "orientable": int(surface.orientable)}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        names = {"euler": "the Euler characteristic", "orientable": "orientability", "boundary": "boundary circles"}
        return f"{names[key]} of (D¹,S⁰)^K{'/G' if self.generators else ''}"

    def shown(self, key: str, value: Any) -> str:
        """Write a value."""
        return ("no", "yes")[value] if key == "orientable" else str(value)

    def lines(self, found: Values) -> list[str]:
        """Say which surface it is."""
        surface = Surface(found["euler"], bool(found["orientable"]), found["boundary"])
        return [f"(D¹,S⁰)^K{'/G' if self.generators else ''} is {surface}"]


@dataclass(frozen=True)
class BranchingClaim(ValuesClaim):
    """A claim about the orbits of points of (D¹, S⁰)^K with isotropy, where these points are isolated.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element
    claimed : mapping
        ``orbits``: pairs of the order of an isotropy group above 1 and the number of orbits, orders ascending.

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    complex: SimplicialComplex
    generators: tuple[Element, ...]
    claimed: Values = field(default_factory=dict)
    route: str = "cells"
    kind: ClassVar[str] = "branching"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        check_symmetries(self.generators, _intervals(self.complex))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def fields(self) -> dict[str, Any]:
        """Return the generators."""
        return _generators_value(self.generators)

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the orbits by the order of the isotropy group."""
        list(contributions)
        space = OrbitSpace(_intervals(self.complex), self.generators, always_chains=True)
        return {"orbits": [list(pair) for pair in branch_orbits(space)]}

    def name(self, key: str) -> str:  # noqa: ARG002 - there is one value only
        """Write in words what a value is."""
        return "orbits of points with isotropy, by its order,"

    def shown(self, key: str, value: Any) -> str:  # noqa: ARG002 - there is one value only
        """Write how many orbits there are of which order."""
        return ", ".join(f"{number} of order {order}" for order, number in value) or "none"

    def value(self, found: Values) -> dict[str, Any]:
        """Return the number of orbits under the order, as sheets have it."""
        return {str(order): number for order, number in found["orbits"]}
