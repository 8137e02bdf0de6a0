"""The claim kinds ``orbit-space``, ``surface`` and ``branching``: (D¹, S⁰)^K and its quotients by symmetries."""

from __future__ import annotations

from abc import abstractmethod
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.claims.base import Contribution, DegreesClaim, Task, checked_degrees, generators_value
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.exact import AbelianGroup
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import check_symmetries
from certify.symmetry.orbit_spaces import OrbitSpace
from certify.symmetry.surfaces import Surface, branch_orbits, recognise_surface

__all__ = ["BranchingClaim", "OrbitSpaceClaim", "SurfaceClaim"]


def _intervals(complex_: SimplicialComplex) -> PolyhedralProduct:
    return PolyhedralProduct(complex_, parse_pairs("(D1, S0)", complex_.vertex_count))


@dataclass(frozen=True)
class OrbitSpaceClaim(DegreesClaim):
    """A claim about the integral homology of (D¹, S⁰)^K / G.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element, or None
        Of G; signed. None is for all automorphisms of K.
    degrees : tuple of int, or None
    groups : mapping from degree to AbelianGroup, or None

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    complex: SimplicialComplex
    generators: Generators
    degrees: tuple[int, ...] | None = None
    groups: Mapping[int, AbelianGroup] | None = None
    route: str = "cells"
    kind: ClassVar[str] = "orbit-space"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries, and degrees that are none."""
        object.__setattr__(self, "degrees", checked_degrees(self.degrees, self.groups))
        check_symmetries(self.generators or (), _intervals(self.complex))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def tasks(self) -> Iterator[Task]:
        """Yield the one piece of work."""
        product = _intervals(self.complex)
        yield Task(OrbitSpace(product, acting(self.generators, product)))

    def in_degree(self, degree: str) -> str:
        """Write a homology group as in print."""
        return f"H_{degree}((D¹,S⁰)^K/G; ℤ)"

    def fields(self) -> dict[str, Any]:
        """Return degrees and generators."""
        return super().fields() | {"generators": generators_value(self.generators)}


@dataclass(frozen=True)
class _QuotientClaim(ValuesClaim):
    """A claim about values that are read off the chains of cells of (D¹, S⁰)^K / G."""

    complex: SimplicialComplex
    generators: Generators = ()
    claimed: Values = field(default_factory=dict)
    route: str = "cells"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        check_symmetries(self.generators or (), _intervals(self.complex))

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
        product = _intervals(self.complex)
        space = OrbitSpace(product, acting(self.generators, product), always_chains=True)
        try:
            return self.read_off(space)
        except BadInput as fault:
            # What is claimed makes sense, and is not so.
            raise ClaimIsFalse(what=fault.where, claimed=fault.expected, found=f"not: it has {fault.found}") from fault

    @abstractmethod
    def read_off(self, space: OrbitSpace) -> dict[str, Any]:
        """Return the values of a quotient."""


class SurfaceClaim(_QuotientClaim):
    """A claim that (D¹, S⁰)^K / G is a connected compact surface, and which.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element, or None
        Of G; empty for the space itself. None is for all automorphisms of K.
    claimed : mapping
        Some of ``euler`` or ``genus``, ``orientable`` (0 or 1) and ``boundary``, the number of boundary circles.

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    kind: ClassVar[str] = "surface"

    def read_off(self, space: OrbitSpace) -> dict[str, Any]:
        """Return Euler characteristic, orientability and boundary."""
        surface = recognise_surface(space)
        return {"boundary": surface.boundary, "euler": surface.euler, "orientable": int(surface.orientable)}

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse at the first value that is not the one claimed; the genus follows from the others."""
        surface = Surface(found["euler"], bool(found["orientable"]), found["boundary"])
        self.compare(self.claimed, {**found, "genus": surface.genus})

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        names = {
            "euler": "the Euler characteristic",
            "genus": "the genus",
            "orientable": "orientability",
            "boundary": "the number of boundary circles",
        }
        return f"{names[key]} of {self._space}"

    @property
    def _space(self) -> str:
        return f"(D¹,S⁰)^K{'' if self.generators == () else '/G'}"

    def shown(self, key: str, value: Any) -> str:
        """Write a value."""
        return ("no", "yes")[value] if key == "orientable" else str(value)

    def lines(self, found: Values) -> list[str]:
        """Say which surface it is."""
        return [f"{self._space} is {Surface(found['euler'], bool(found['orientable']), found['boundary'])}"]


class BranchingClaim(_QuotientClaim):
    """A claim about the orbits of points of (D¹, S⁰)^K with isotropy, where these points are isolated.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element, or None
        None is for all automorphisms of K.
    claimed : mapping
        ``orbits``: pairs of the order of an isotropy group above 1 and the number of orbits, orders ascending.

    Raises
    ------
    BadInput
        If a generator does not preserve K.
    """

    kind: ClassVar[str] = "branching"

    def read_off(self, space: OrbitSpace) -> dict[str, Any]:
        """Return the orbits by the order of the isotropy group."""
        return {"orbits": [list(pair) for pair in branch_orbits(space)]}

    def name(self, key: str) -> str:  # noqa: ARG002 - there is one value only
        """Write in words what a value is."""
        return "orbits of points with isotropy"

    def shown(self, key: str, value: Any) -> str:  # noqa: ARG002 - there is one value only
        """Write how many orbits there are of which order."""
        return ", ".join(f"{number} with a group of order {order}" for order, number in value) or "none"

    def value(self, found: Values) -> dict[str, Any]:
        """Return the number of orbits under the order, as sheets have it."""
        return {str(order): number for order, number in found["orbits"]}
