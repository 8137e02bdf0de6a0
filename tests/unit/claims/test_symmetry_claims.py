"""Claims about symmetries that are false, or cannot be decided, in one sentence each."""

from __future__ import annotations

from typing import Any

import pytest

from certify.certificate import Spool
from certify.claims import Claim, prove
from certify.claims.actions import ActionClaim
from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.branching import BranchingClaim
from certify.claims.characters import CharacterClaim
from certify.claims.count_identities import IdentityClaim
from certify.claims.count_values import CountValuesClaim
from certify.claims.equivariance import EquivarianceClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.shellings import ShellingClaim
from certify.claims.surfaces import SurfaceClaim
from certify.errors import ClaimIsFalse, LimitReached
from certify.exact import AbelianGroup
from certify.simplicial import SimplicialComplex, build
from certify.simplicial.families import points, polygon, simplex
from certify.symmetry.elements import MOST_ELEMENTS
from tests.helpers import disc_product

TURN, FLIP = (2, 3, 4, 5, 1), (1, 5, 4, 3, 2)
BOOK = SimplicialComplex.from_facets([[1, 2], [1, 3], [1, 4]])
RING_AND_GHOST = SimplicialComplex.from_facets([[1, 2], [2, 3], [1, 3]], [1, 2, 3, 4])
CROSSING = SimplicialComplex.from_facets([[1, 2], [3, 4]])

FALSE: dict[str, tuple[Claim[Any], str]] = {
    "an order": (
        AutomorphismsClaim(disc_product(polygon(5), 1), claimed={"order": 12}),
        "the order of the automorphism group of K is claimed to be 12, but is 10",
    ),
    "orbits": (
        AutomorphismsClaim(disc_product(polygon(5), 1), (TURN,), {"orbits": {"subsets": 7}}),
        "the number of orbits on sets of vertices of the group of these generators is claimed to be 7, but is 8",
    ),
    "a trace": (
        CharacterClaim(disc_product(polygon(5), 1), 1, (TURN,), claimed={"values": [10, 1]}),
        "χ((1 2 3 4 5)) is claimed to be 1, but is 0",
    ),
    "a multiplicity": (
        CharacterClaim(
            disc_product(polygon(5), 1), 1, (TURN,), None, {"multiplicities": {"trivial": 3}}, {"trivial": (1, 1)}
        ),
        "the multiplicity of trivial is claimed to be 3, but is 2",
    ),
    "a quotient": (
        OrbitSpaceClaim(polygon(5), (TURN,), groups={0: AbelianGroup(1), 2: AbelianGroup(1)}),
        "H_1((D¹,S⁰)^K/G; ℤ) is claimed to be 0, but is ℤ²",
    ),
    "an orientation": (
        SurfaceClaim(polygon(5), (TURN,), {"orientable": 0}),
        "orientability of (D¹,S⁰)^K/G is claimed to be no, but is yes",
    ),
    "three sheets at an edge": (
        SurfaceClaim(BOOK),
        "the space is claimed to be a connected surface, but is not: it has 3 sheets that meet along the segment "
        "between the points (-1, -1, -1, -1) and (0, -1, -1, -1), in the direction of 1",
    ),
    "a space in two pieces": (
        SurfaceClaim(SimplicialComplex.from_facets([[1, 2], [2, 3], [1, 3]], [1, 2, 3, 4])),
        "2 pieces",
    ),
    "two discs at a point": (SurfaceClaim(CROSSING), "whose link has 2 pieces"),
    "a graph": (SurfaceClaim(points(3)), "but is not: it has dimension 1"),
    "branch points on a line": (
        BranchingClaim(polygon(5), (FLIP,)),
        "the set of points with isotropy is claimed to be a set of isolated points, but is not: "
        "it has whole cells of dimension 1",
    ),
    "other branch points": (
        BranchingClaim(polygon(5), (TURN,), {"orbits": {5: 1}}),
        "orbits of points with isotropy is claimed to be 1 with a group of order 5, but is 2 with a group of order 5",
    ),
    "other isotropy groups": (
        BranchingClaim(polygon(5), (TURN,), {"isotropy": {(TURN,): 3}}),
        "orbits of points with isotropy is claimed to be 3 with ⟨(1 2 3 4 5)⟩, but is 2 with ⟨(1 2 3 4 5)⟩",
    ),
    "a splitting with another trace": (
        EquivarianceClaim(disc_product(polygon(5), 1), 1, (TURN,), None, {"values": [10, 1]}),
        "χ((1 2 3 4 5)) is claimed to be 1, but is 0",
    ),
    "the trace of a matrix": (
        ActionClaim(disc_product(polygon(5), 1), 1, TURN, {"trace": 1}),
        "the trace of (1 2 3 4 5) on H_1((D¹,S⁰)^K; ℤ) mod torsion is claimed to be 1, but is 0",
    ),
    "a matrix": (
        ActionClaim(disc_product(points(2), 1), 1, (2, 1), {"matrix": [[1]]}),
        "the matrix of (1 2) on H_1((D¹,S⁰)^K; ℤ) mod torsion is claimed to be [[1]], but is [[-1]]",
    ),
    "a number of points": (
        FixedSetClaim(disc_product(polygon(5), 1), generators=(TURN,), claimed={"points": 3}),
        "the number of points of ((D¹,S⁰)^K)^G is claimed to be 3, but is 2",
    ),
    "points of a curve": (
        FixedSetClaim(disc_product(polygon(5), 1), generators=(FLIP,), claimed={"points": 3}),
        "the number of points of ((D¹,S⁰)^K)^G is claimed to be 3, but is not finite",
    ),
    "an Euler characteristic": (
        OrbitSpaceClaim(polygon(5), (TURN,), claimed={"euler": 2}),
        "the Euler characteristic of (D¹,S⁰)^K/G is claimed to be 2, but is 0",
    ),
    "an inner product that is no whole number": (
        CharacterClaim(disc_product(polygon(4), 1), 0, ((2, 3, 4, 1),), functions={"two": (2, 0, 0)}),
        "⟨χ, ψ⟩ for ψ = two is claimed to be a whole number, but is 1/2",
    ),
    "a path": (ShellingClaim(SimplicialComplex.from_facets([[1, 2], [2, 3]])), "K is claimed to be a shellable sphere"),
    "two circles": (
        ShellingClaim(SimplicialComplex.from_facets([[1, 2], [2, 3], [1, 3], [4, 5], [5, 6], [4, 6]])),
        "K is claimed to be a shellable sphere, but is none: expected a shellable sphere, found one without a shelling",
    ),
    "a surface of genus 1": (ShellingClaim(build("torus")), "K is claimed to be a shellable sphere"),
    "necklaces": (
        OrbitCountClaim(polygon(5), 2, (TURN,), claimed={"orbits": 9}),
        "the number of orbits on colourings with 2 colours is claimed to be 9, but is 8",
    ),
    "a value of a count": (
        CountValuesClaim("necklaces(n, 2)", 1, 3, {"values": [2, 3, 5]}),
        "necklaces(n, 2) for n = 3 is claimed to be 5, but is 4",
    ),
    "an identity": (IdentityClaim("n", "n + n // 5", 1, 9), "n + n // 5 for n = 5 is claimed to be 5, but is 6"),
}


@pytest.mark.parametrize("name", FALSE)
def test_a_false_claim_is_refused_with_both_values(name: str) -> None:
    claim, message = FALSE[name]
    with Spool() as spool, pytest.raises(ClaimIsFalse) as caught:
        prove(claim, spool)
    assert message in str(caught.value)


def test_a_group_that_is_too_large_is_undecided() -> None:
    m = 10
    generators = ((*range(2, m + 1), 1), (2, 1, *range(3, m + 1)))
    message = f"the group has more than {MOST_ELEMENTS:,} elements, and larger ones are not enumerated"
    with Spool() as spool, pytest.raises(LimitReached, match=message):
        prove(AutomorphismsClaim(disc_product(simplex(m), 1), generators), spool)


def test_the_full_group_may_be_larger() -> None:
    """All permutations of fourteen vertices; nobody lists them."""
    with Spool() as spool:
        assert prove(AutomorphismsClaim(disc_product(simplex(12), 1)), spool).found["order"] == 479001600
