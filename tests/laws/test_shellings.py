"""Theorems about shellings, on random spheres and on what is nearly one."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Sequence
from itertools import combinations, permutations
from math import comb, factorial
from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from certify.claims.shellings import ShellingClaim
from certify.errors import ClaimIsFalse
from certify.simplicial import build
from tests.helpers import certificate_of, certified_statement
from tests.strategies.facets import (
    Facet,
    Facets,
    complex_of,
    faces_of,
    facets_of,
    joined,
    polytopes,
    small_complexes,
    stacked_polytopes,
)
from tests.verifier.forging import forged, judged
from tests.verifier.forging import values_of as lines_of


def meets_well(facet: Facet, before: Iterable[Facet]) -> bool:
    """Tell whether the faces that a facet has in common with those before it are the faces of a set of its ridges."""
    common = faces_of([facet]) & faces_of(before)
    ridges = {face for face in common if len(face) == len(facet) - 1}
    return bool(ridges) and common == faces_of(ridges)


def meets_somewhere(facet: Facet, before: Iterable[Facet]) -> bool:
    """Tell whether a facet has a ridge in common with those before it."""
    return any(len(set(facet) & set(earlier)) == len(facet) - 1 for earlier in before)


def is_shelling(order: Sequence[Facet]) -> bool:
    return all(meets_well(facet, order[:number]) for number, facet in enumerate(order) if number)


def has_shelling(facets: Facets) -> bool:
    """Tell whether there is a shelling, over all sets of facets that can come first."""
    reached = {frozenset[Facet]()}
    for _ in facets:
        reached = {
            done | {facet}
            for done in reached
            for facet in facets
            if facet not in done and (not done or meets_well(facet, done))
        }
    return bool(reached)


def is_closed(facets: Facets) -> bool:
    """Tell whether all facets have one size, and each ridge lies in two of them."""
    size = len(facets[0])
    ridges = Counter(ridge for facet in facets if facet for ridge in combinations(facet, len(facet) - 1))
    return all(len(facet) == size for facet in facets) and set(ridges.values()) <= {2}


def f_vector(facets: Iterable[Facet]) -> list[int]:
    """Return how many faces have 0, 1, … vertices."""
    sizes = Counter(map(len, faces_of(facets)))
    return [sizes[size] for size in range(max(sizes) + 1)]


def h_vector(facets: Iterable[Facet]) -> list[int]:
    """Return the coefficients h_j of Σ f_i t^i (1 - t)^(d - i), with f_i faces of i vertices."""
    f = f_vector(facets)
    d = len(f) - 1
    return [sum((-1) ** (j - i) * comb(d - i, j - i) * f[i] for i in range(j + 1)) for j in range(d + 1)]


@given(stacked_polytopes() | polytopes())
def test_boundaries_of_polytopes_have_shellings_that_are_accepted(facets: Facets) -> None:
    """Polytopes are shellable (Bruggesser and Mani 1971), and so the certificate holds a shelling by the definition.

    In a shelling h_j facets meet those before them in exactly j ridges (McMullen 1970), and h_j = h_(d-j) for a sphere
    (Dehn and Sommerville). Both from memory.
    """
    certificate = certificate_of(ShellingClaim(complex_of(facets)))
    certified_statement(ShellingClaim(complex_of(facets)))
    order = [tuple(facet) for facet in lines_of(certificate)[1]["order"]]
    assert len(order) == len(facets)
    assert faces_of(order) == faces_of(facets_of(complex_of(facets)))
    assert is_shelling(order)
    d = len(order[0])
    restrictions = Counter(
        sum(1 for ridge in combinations(facet, d - 1) if ridge in faces_of(order[:number])) if number and d else 0
        for number, facet in enumerate(order)
    )
    h = h_vector(facets)
    assert [restrictions[j] for j in range(d + 1)] == h == h[::-1]


@given(polytopes())
def test_what_is_accepted_as_a_sphere_has_its_euler_characteristic(facets: Facets) -> None:
    """χ = 1 + (-1)^d, from the numbers of faces of the complex in the accepted statement."""
    statement = certified_statement(ShellingClaim(complex_of(facets)))
    f = f_vector(map(tuple, statement["facets"]))
    assert sum((-1) ** i * faces for i, faces in enumerate(f[1:])) == 1 + (-1) ** (len(f) - 2)


# -- orders of facets ---------------------------------------------------------------------------


def judged_order(order: Sequence[Facet], facets: Sequence[Facet] | None = None) -> str:
    """Return what the verifier says to an order as a shelling of these facets: accepted, or the code of the rejection.

    Without `facets`, they are those of the order.
    """
    of = order if facets is None else facets

    def edit(lines: list[Any]) -> None:
        lines[0]["statement"]["facets"] = sorted(map(list, of))
        lines[0]["statement"]["vertices"] = max((vertex for facet in of for vertex in facet), default=0)
        lines[1]["order"] = list(map(list, order))

    report = judged(forged("shelling", edit))
    return str(report["reason"] if report["verdict"] == "rejected" else report["verdict"])


@pytest.mark.parametrize("n", [3, 4, 5, 6])
def test_all_orders_of_the_edges_of_a_polygon(n: int) -> None:
    """An n-gon has n 2^(n-2) shellings: an edge, then one at either end of the path until the last one is left."""
    verdicts = Counter(judged_order(order) for order in permutations(facets_of(build("polygon", n=n))))
    accepted = n * 2 ** (n - 2)
    assert verdicts == {"accepted": accepted} | ({"shelling": factorial(n) - accepted} if n > 3 else {})


def test_all_orders_of_the_triangles_of_a_bipyramid() -> None:
    """In some orders a triangle meets those before it in an edge and the vertex opposite to it."""
    facets = joined(facets_of(build("polygon", n=3)), ((1,), (2,)))
    for order in permutations(facets):
        assert judged_order(order) == ("accepted" if is_shelling(order) else "shelling")


@given(small_complexes(12), st.data())
def test_an_order_is_accepted_exactly_if_it_is_a_shelling(facets: Facets, data: st.DataObject) -> None:
    """By the definition, and each ridge lies in two facets."""
    # Facets are taken as they come; or one with a common ridge is taken next, or one that meets those before it well.
    first = data.draw(st.sampled_from((lambda *_: True, meets_somewhere, meets_well)))
    order: list[Facet] = []
    left = list(data.draw(st.permutations(facets)))
    while left:
        order.append(left.pop(next((i for i, facet in enumerate(left) if not order or first(facet, order)), 0)))
    assert judged_order(order) == ("accepted" if is_closed(facets) and is_shelling(order) else "shelling")


@pytest.mark.parametrize("size", [2, 3, 4])
def test_a_point_and_a_simplex_are_no_sphere(size: int) -> None:
    """Each has the empty set in the place of its one ridge, if the point comes first."""
    order = (1,), tuple(range(2, size + 2))
    assert judged_order(order) == judged_order(order[::-1]) == "shelling"


@given(polytopes(20), st.data())
def test_a_shelling_is_one_of_the_complex_in_the_statement(facets: Facets, data: st.DataObject) -> None:
    """A shelling of a sphere with a facet too many or too few, or another one twice, is none of it."""
    order = [tuple(f) for f in lines_of(certificate_of(ShellingClaim(complex_of(facets))))[1]["order"]]
    top = max((vertex for facet in order for vertex in facet), default=0)
    if order[0]:
        assert judged_order(order, [*order, tuple(range(top + 1, top + 1 + len(order[0])))]) == "shelling"
    if len(order) > 1:
        assert judged_order(order, order[1:]) == "shelling"
    again = data.draw(st.sampled_from(order))
    assert judged_order([*order, again], order) == judged_order([again, *order], order) == "shelling"


@given(polytopes(20))
def test_a_shelling_of_a_sphere_may_be_turned_around(facets: Facets) -> None:
    """Each facet meets those after it in the ridges that it does not share with those before it (from memory)."""
    order = [tuple(f) for f in lines_of(certificate_of(ShellingClaim(complex_of(facets))))[1]["order"]]
    assert judged_order(order[::-1]) == "accepted"


@given(small_complexes())
def test_the_prover_finds_a_shelling_exactly_if_there_is_one(facets: Facets) -> None:
    """Of all orders of facets, by way of all sets of them that can come first."""
    if is_closed(facets) and has_shelling(facets):
        certified_statement(ShellingClaim(complex_of(facets)))
    else:
        with pytest.raises(ClaimIsFalse):
            certificate_of(ShellingClaim(complex_of(facets)))
