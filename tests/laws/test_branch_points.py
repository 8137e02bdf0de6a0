"""The formula of Riemann and Hurwitz, for random groups with signs on random graphs."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from itertools import product
from typing import Any

import pytest
from hypothesis import assume, given

from certify.claims.branching import BranchingClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.errors import ClaimIsFalse
from certify.simplicial import SimplicialComplex
from certify.symmetry.elements import Element
from tests.helpers import certificate_of, certified_statement
from tests.strategies import graphs_with_groups
from tests.strategies.facets import faces_of, facets_of
from tests.verifier.forging import forged, judged

Point = tuple[int, ...]
"""The middle of a cube of (D¹, S⁰)^K, by coordinates -1, 0 and 1."""


def image(element: Element, point: Point) -> Point:
    moved = [0] * len(point)
    for coordinate, to in zip(point, element, strict=True):
        moved[abs(to) - 1] = coordinate if to > 0 else -coordinate
    return tuple(moved)


def group_of(generators: Sequence[Element], m: int) -> set[Element]:
    """Return all elements: where the point (1, 2, …) goes by an element, there stand the images by its inverse."""
    found: set[Point] = {tuple(range(1, m + 1))}
    new = found
    while new:
        new = {image(generator, point) for generator in generators for point in new} - found
        found |= new
    return found


def middles(k: SimplicialComplex) -> list[Point]:
    """Return the middles of all cubes: the coordinates that are 0 are a face."""
    faces = faces_of(facets_of(k))
    every = product((-1, 0, 1), repeat=k.vertex_count)
    return [point for point in every if tuple(i for i, x in enumerate(point, 1) if x == 0) in faces]


def lies_in(point: Point, other: Point) -> bool:
    """Tell whether a cube is a proper face of another one, by their middles."""
    return point != other and all(y in (0, x) for x, y in zip(point, other, strict=True))


@given(graphs_with_groups())
def test_riemann_and_hurwitz_for_isolated_points_with_isotropy(acted: tuple[SimplicialComplex, Any]) -> None:
    """χ(X) = |G| χ(X/G) - Σ (|G|/e)(e - 1) over orbits with isotropy of order e > 1, if those points are isolated.

    χ(X) is Σ (-1)^i f_i 2^(m-i) with f_i faces of i vertices; χ(X/G) is the alternating sum of the ranks of a certified
    homology. A point has the isotropy of the cubes of which the middles it is a mean, one a face of the next; so points
    with isotropy are isolated exactly if no element but 1 preserves a cube and a proper face of it.
    """
    k, generators = acted
    group = group_of(generators, k.vertex_count)
    assume(len(group) <= 64)
    points = middles(k)
    kept = {g: [p for p in points if image(g, p) == p] for g in group - {tuple(range(1, k.vertex_count + 1))}}
    claim = BranchingClaim(k, generators)
    if any(lies_in(p, q) for fixed in kept.values() for p in fixed for q in fixed):
        with pytest.raises(ClaimIsFalse):
            certificate_of(claim)
        assert judged(branching_of(k, generators))["reason"] == "not-isolated"
        return
    orbits = [[order, number] for _, order, number in certified_statement(claim)["orbits"]]
    isotropy = Counter(1 + sum(p in fixed for fixed in kept.values()) for p in points)
    counted: Counter[int] = Counter()
    for e, number in orbits:
        counted[e] += number
    assert counted == {e: number * e // len(group) for e, number in isotropy.items() if e > 1}
    sizes = Counter(map(len, faces_of(facets_of(k))))
    upstairs = sum((-1) ** i * faces * 2 ** (k.vertex_count - i) for i, faces in sizes.items())
    groups = certified_statement(OrbitSpaceClaim(k, generators))["groups"]
    downstairs = sum((-1) ** degree * rank for degree, rank, _ in groups)
    size = len(group)
    assert upstairs == size * downstairs - sum(number * (size // e) * (e - 1) for e, number in orbits)


def branching_of(k: SimplicialComplex, generators: Sequence[Element]) -> bytes:
    """Return a file that claims that no point has isotropy."""

    def edit(lines: list[Any]) -> None:
        lines[0]["statement"] |= {
            "facets": sorted(map(list, facets_of(k))),
            "vertices": k.vertex_count,
            "generators": list(map(list, generators)),
            "orbits": [],
        }

    return forged("branching", edit)
