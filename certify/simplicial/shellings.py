"""Shellings: orders of the facets in which each one meets those before it along ridges."""

from __future__ import annotations

from collections import Counter
from itertools import combinations

from certify.errors import BadInput, LimitReached
from certify.simplicial.complexes import Face, SimplicialComplex

__all__ = ["sphere_shelling"]

_MOST_STEPS = 200_000


def sphere_shelling(k: SimplicialComplex) -> tuple[Face, ...]:
    """Return a shelling of a sphere, as facets of vertex numbers.

    Parameters
    ----------
    k : SimplicialComplex
        Pure, with each ridge in two facets; a complex with a shelling is then a sphere.

    Raises
    ------
    BadInput
        If it is not pure, a ridge does not lie in two facets, or there is no shelling.
    LimitReached
        If none is found in a reasonable number of steps; there may be one all the same.

    Notes
    -----
    Facets are added greedily, with a return where no one fits; spheres that come up in practice need few returns. Every
    facet is tried as the first one before a complex is said to have no shelling.

    References
    ----------
    G. Danaraj, V. Klee, Shellings of spheres and polytopes, Duke Math. J. 41 (1974) (from memory).

    Examples
    --------
    >>> from certify.simplicial.families import polygon
    >>> sphere_shelling(polygon(4))
    ((0, 1), (0, 3), (1, 2), (2, 3))
    """
    facets = k.facets
    size = len(facets[0])
    if any(len(facet) != size for facet in facets):
        raise BadInput(where="complex", expected="a sphere, so facets of one size", found="facets of several sizes")
    ridges = Counter(ridge for facet in facets for ridge in combinations(facet, size - 1)) if size else Counter()
    for ridge, times in ridges.items():
        if times != 2:
            shown = " ".join(str(k.labels[vertex]) for vertex in ridge) or "∅"
            found = f"the face {shown} in {times} facet{'s' * (times != 1)}"
            raise BadInput(where="complex", expected="a sphere, so each ridge in two facets", found=found)
    found_order = _search(facets)
    if found_order is None:
        raise BadInput(where="complex", expected="a shellable sphere", found="one without a shelling")
    return found_order


def _search(facets: tuple[Face, ...]) -> tuple[Face, ...] | None:
    sets = [frozenset(facet) for facet in facets]
    order: list[int] = []
    tried: list[set[int]] = [set()]
    for _ in range(_MOST_STEPS):
        if len(order) == len(facets):
            return tuple(facets[number] for number in order)
        done = set(order)
        following = next(
            (n for n in range(len(facets)) if n not in done and n not in tried[-1] and _fits(sets, order, n)), None
        )
        if following is not None:
            tried[-1].add(following)
            order.append(following)
            tried.append(set())
            continue
        if not order:
            return None
        order.pop()
        tried.pop()
    raise LimitReached(f"no shelling was found in {_MOST_STEPS:,} steps; there may be one all the same")


def _fits(sets: list[frozenset[int]], order: list[int], number: int) -> bool:
    """Tell whether a facet meets those before it in a union of ridges: each intersection lies in such a ridge."""
    facet = sets[number]
    meetings = [facet & sets[earlier] for earlier in order]
    free = frozenset().union(*(facet - common for common in meetings if len(common) == len(facet) - 1))
    return all(free - common for common in meetings)
