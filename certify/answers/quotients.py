"""Questions about quotients and manifolds that a person asks at a prompt; each answer has its certificate."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field

from certify.answers.certificates import Certificate, proved_value
from certify.answers.elements import Given, elements_of, require_kind
from certify.answers.graded import Homology
from certify.claims.branching import BranchingClaim, by_isotropy, by_order
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.shellings import ShellingClaim
from certify.claims.surfaces import SurfaceClaim
from certify.simplicial import SimplicialComplex
from certify.symmetry.surfaces import Surface

__all__ = ["BranchPoints", "ProvedSurface", "branch_points", "orbit_space_homology", "shelling", "surface"]


@dataclass(frozen=True, slots=True, repr=False)
class ProvedSurface:
    """A surface, with the proof that the space is one.

    Attributes
    ----------
    euler, boundary, genus : int
    orientable : bool
    certificate : Certificate
    """

    surface: Surface
    certificate: Certificate = field(compare=False)

    @property
    def euler(self) -> int:
        """The Euler characteristic."""
        return self.surface.euler

    @property
    def orientable(self) -> bool:
        """Whether it is orientable."""
        return self.surface.orientable

    @property
    def boundary(self) -> int:
        """The number of boundary circles."""
        return self.surface.boundary

    @property
    def genus(self) -> int:
        """The number of handles, or of cross-caps."""
        return self.surface.genus

    def __repr__(self) -> str:
        """Say which surface it is."""
        return str(self.surface)


@dataclass(frozen=True, slots=True, repr=False)
class BranchPoints:
    """Orbits of isolated points with isotropy.

    Attributes
    ----------
    orbits : mapping from int to int
        The number of orbits by the order of the isotropy groups, from 2 on.
    isotropy : mapping from str to int
        The number of orbits by isotropy group, whose generators are written in cycles of labels.
    certificate : Certificate
    """

    orbits: Mapping[int, int]
    isotropy: Mapping[str, int]
    certificate: Certificate = field(compare=False)

    def __repr__(self) -> str:
        """Write how many orbits there are of which order."""
        return ", ".join(f"{number} of order {order}" for order, number in self.orbits.items()) or "none"


def orbit_space_homology(
    k: SimplicialComplex, generators: Iterable[Given] | None, degrees: Iterable[int] | None = None, *, jobs: int = 1
) -> Homology:
    """Return the integral homology of (D¹, S⁰)^K / G, proved.

    Examples
    --------
    >>> from certify import polygon
    >>> orbit_space_homology(polygon(5), ["(1 2 3 4 5)"])
    H_0 = ℤ, H_1 = ℤ², H_2 = ℤ
    """
    wanted = None if degrees is None else tuple(degrees)
    claim = OrbitSpaceClaim(k, elements_of(generators, require_kind(k, SimplicialComplex)), wanted)
    found, certificate = proved_value(claim, "H_*((D¹,S⁰)^K/G; ℤ)", jobs)
    return Homology(tuple(found.items()), claim.degrees, "(D¹,S⁰)^K/G", certificate=certificate)


def surface(k: SimplicialComplex, generators: Iterable[Given] | None = ()) -> ProvedSurface:
    """Return the surface that (D¹, S⁰)^K, or its quotient by a group, is, proved.

    Raises
    ------
    ClaimIsFalse
        If it is no connected surface; the point and its link are named.

    Examples
    --------
    >>> from certify import polygon
    >>> surface(polygon(6))
    an orientable surface of genus 17, closed, Euler characteristic -32
    >>> surface(polygon(6), ["(1 2 3 4 5 6)"]).genus
    2
    """
    found, certificate = proved_value(
        SurfaceClaim(k, elements_of(generators, require_kind(k, SimplicialComplex))), "a surface"
    )
    return ProvedSurface(Surface(found["euler"], bool(found["orientable"]), found["boundary"]), certificate)


def branch_points(k: SimplicialComplex, generators: Iterable[Given] | None) -> BranchPoints:
    """Return the orbits of points of (D¹, S⁰)^K with isotropy, where these points are isolated, proved.

    Examples
    --------
    >>> from certify import polygon
    >>> branch_points(polygon(6), ["(1 2 3 4 5 6)"])
    2 of order 2, 1 of order 3, 2 of order 6
    """
    found, certificate = proved_value(
        BranchingClaim(k, elements_of(generators, require_kind(k, SimplicialComplex))), "branch points"
    )
    return BranchPoints(by_order(found), by_isotropy(found, k), certificate)


def shelling(k: SimplicialComplex) -> Certificate:
    """Return a certificate that K is a shellable sphere, so that (D¹, S⁰)^K and (D², S¹)^K are closed manifolds.

    Raises
    ------
    ClaimIsFalse
        If it is none.

    Examples
    --------
    >>> from certify import cyclic_polytope
    >>> shelling(cyclic_polytope(7, 4)).title
    'K is a shellable sphere'
    """
    return proved_value(ShellingClaim(require_kind(k, SimplicialComplex)), "K is a shellable sphere")[1]
