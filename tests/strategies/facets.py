"""Pure complexes by their facets: boundaries of polytopes, and what is nearly one."""

from __future__ import annotations

from collections.abc import Iterable
from itertools import combinations

from hypothesis import assume
from hypothesis import strategies as st

from certify.simplicial import SimplicialComplex, build
from tests.strategies import complexes

__all__ = [
    "Facet",
    "Facets",
    "complex_of",
    "faces_of",
    "facets_of",
    "joined",
    "polytopes",
    "small_complexes",
    "stacked_polytopes",
    "starred",
]

Facet = tuple[int, ...]
Facets = tuple[Facet, ...]


def faces_of(facets: Iterable[Facet]) -> set[Facet]:
    """Return all faces, the empty one included."""
    return {face for facet in facets for size in range(len(facet) + 1) for face in combinations(facet, size)}


def starred(facets: Facets, face: Facet) -> Facets:
    """Return the stellar subdivision at a face that is not empty, with a new vertex; at a facet, this is stacking."""
    new = max(vertex for facet in facets for vertex in facet) + 1
    kept = {facet for facet in facets if not set(face) <= set(facet)}
    cut = {(*(v for v in facet if v != left), new) for facet in set(facets) - kept for left in face}
    return tuple(sorted(kept | cut))


def joined(one: Facets, other: Facets) -> Facets:
    above = max((vertex for facet in one for vertex in facet), default=0)
    return tuple((*left, *(vertex + above for vertex in right)) for left in one for right in other)


def complex_of(facets: Facets) -> SimplicialComplex:
    used = sorted({vertex for facet in facets for vertex in facet})
    return SimplicialComplex.from_facets(facets, vertices=used)


def facets_of(k: SimplicialComplex) -> Facets:
    return tuple(tuple(vertex + 1 for vertex in facet) for facet in k.facets)


@st.composite
def stacked_polytopes(draw: st.DrawFn) -> Facets:
    """Draw the boundary of a simplex of dimension 2 to 4, with pyramids placed on facets again and again."""
    d = draw(st.integers(2, 4))
    facets: Facets = tuple(combinations(range(1, d + 2), d))
    for _ in range(draw(st.integers(0, 6))):
        facets = starred(facets, draw(st.sampled_from(facets)))
    return facets


@st.composite
def polytopes(draw: st.DrawFn, most: int = 60) -> Facets:
    """Draw the boundary of a simplicial polytope: joins and stellar subdivisions keep one polytopal."""
    boundaries = st.integers(0, 3).map(lambda d: tuple(combinations(range(1, d + 2), d)))
    cyclic = st.tuples(st.integers(2, 4), st.integers(1, 4)).map(
        lambda dm: facets_of(build("cyclic-polytope", m=dm[0] + dm[1], d=dm[0]))
    )
    facets: Facets = draw(boundaries | cyclic | stacked_polytopes())
    for _ in range(draw(st.integers(0, 3))):
        if draw(st.booleans()) and len(facets[0]) < 4:
            facets = joined(facets, draw(boundaries))
        elif facets != ((),):
            facets = starred(facets, draw(st.sampled_from(sorted(faces_of(facets) - {()}))))
    assume(len(facets) <= most)
    return facets


@st.composite
def small_complexes(draw: st.DrawFn, most: int = 8) -> Facets:
    """Draw a small sphere, one without a facet, two of them, apart or glued, any sets of one size, or any complex."""
    whole = draw(polytopes(most))
    match draw(st.sampled_from(("sphere", "ball", "two", "sets", "any"))):
        case "ball":
            return whole[1:] or whole
        case "two":
            d = len(whole[0])
            other: Facets = tuple(combinations(range(1, d + 2), d))
            if d and draw(st.booleans()):
                other = starred(other, draw(st.sampled_from(other)))
            top = max((vertex for facet in whole for vertex in facet), default=0)
            by = top - draw(st.integers(0, min(1, top)))
            facets = {*whole, *(tuple(vertex + by for vertex in facet) for facet in other)}
            assume(len(facets) <= most)
            return tuple(sorted(facets))
        case "any":
            return facets_of(draw(complexes(4, ghosts=False)))
        case "sets":
            size = draw(st.integers(1, 3))
            every = list(combinations(range(1, size + 3), size))
            facets = set(draw(st.lists(st.sampled_from(every), min_size=1, max_size=most)))
            return facets_of(complex_of(tuple(sorted(facets))))
        case _:
            return whole
