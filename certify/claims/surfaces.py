"""The claim kind ``surface``: (D¹, S⁰)^K or its quotient by symmetries is a surface, and which."""

from __future__ import annotations

from typing import Any, ClassVar

from certify.claims.quotients import QuotientClaim
from certify.claims.values import Values
from certify.symmetry.orbit_spaces import OrbitSpace
from certify.symmetry.surfaces import Surface, recognise_surface

__all__ = ["SurfaceClaim"]


class SurfaceClaim(QuotientClaim):
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
