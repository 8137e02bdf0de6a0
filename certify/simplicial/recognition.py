"""What kind of space a complex triangulates, as far as counting can tell; ghost vertices are disregarded."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterable

from certify.simplicial.complexes import Label, SimplicialComplex
from certify.simplicial.masks import face_of
from certify.simplicial.operations import link

__all__ = ["is_closed_surface", "is_pseudomanifold", "vertex_links"]


def vertex_links(k: SimplicialComplex) -> dict[Label, SimplicialComplex]:
    """Return the link of every vertex that lies in a face, by its label."""
    ghosts = set(k.ghosts())
    return {label: link(k, [label]) for label in k.labels if label not in ghosts}


def is_pseudomanifold(k: SimplicialComplex) -> bool:
    """Tell whether `k` is a pseudomanifold without boundary.

    That is: all facets have the same dimension d, at least 0; every face of dimension d - 1 lies in exactly
    two facets; and one can walk from each facet to every other, from facet to facet across such faces.

    References
    ----------
    E. H. Spanier, Algebraic Topology, McGraw-Hill 1966, chapter 3, exercise C (from memory).

    Examples
    --------
    >>> is_pseudomanifold(SimplicialComplex.from_facets([[1, 2], [2, 3], [1, 3]]))
    True
    >>> is_pseudomanifold(SimplicialComplex.from_facets([[1, 2], [2, 3]]))
    False
    """
    if k.dimension < 0:
        return False
    # Facets on the two sides of a face have the same dimension, so if one can walk everywhere, all of them have.
    sides = _facets_by_ridge(k)
    return all(len(side) == 2 for side in sides.values()) and _is_connected(len(k.facets), sides.values())


def is_closed_surface(k: SimplicialComplex) -> bool:
    """Tell whether `k` triangulates a connected closed surface.

    That is: it is a pseudomanifold of dimension 2, and the link of every vertex is a circle.

    Examples
    --------
    >>> tetrahedron = SimplicialComplex.from_facets([[1, 2, 3], [1, 2, 4], [1, 3, 4], [2, 3, 4]])
    >>> is_closed_surface(tetrahedron)
    True
    """
    # In dimension 1 a pseudomanifold is a circle.
    return k.dimension == 2 and is_pseudomanifold(k) and all(map(is_pseudomanifold, vertex_links(k).values()))


def _facets_by_ridge(k: SimplicialComplex) -> dict[int, list[int]]:
    """Map the mask of each face one vertex short of a facet to the numbers of the facets around it."""
    sides: defaultdict[int, list[int]] = defaultdict(list)
    for number, facet in enumerate(k.facet_masks()):
        for vertex in face_of(facet):
            sides[facet & ~(1 << vertex)].append(number)
    return sides


def _is_connected(count: int, pairs: Iterable[list[int]]) -> bool:
    """Tell whether the graph on ``0, ..., count - 1`` with the given edges is connected."""
    neighbours: list[list[int]] = [[] for _ in range(count)]
    for a, b in pairs:
        neighbours[a].append(b)
        neighbours[b].append(a)
    reached, waiting = {0}, [0]
    while waiting:
        for number in neighbours[waiting.pop()]:
            if number not in reached:
                reached.add(number)
                waiting.append(number)
    return len(reached) == count
