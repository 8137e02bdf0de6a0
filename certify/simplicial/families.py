"""Well-known complexes with parameters: polygons, simplices and their skeleta, and boundaries of polytopes."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence
from itertools import combinations, product

from certify.simplicial.arguments import check_whole_number
from certify.simplicial.complexes import Face, SimplicialComplex

__all__ = [
    "cross_polytope",
    "cyclic_polytope",
    "points",
    "polygon",
    "simplex",
    "simplex_boundary",
    "simplex_skeleton",
    "stacked_polytope",
]


def polygon(n: int) -> SimplicialComplex:
    """Return the boundary of the polygon with n >= 3 vertices, labelled 1, ..., n around it.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 3.

    Examples
    --------
    >>> print(polygon(4))
    4 vertices, facets 12 14 23 34
    """
    check_whole_number("argument n", n, least=3)
    return _numbered(n, [(i, (i + 1) % n) for i in range(n)])


def simplex(m: int) -> SimplicialComplex:
    """Return the full simplex on m >= 0 vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 0.

    Examples
    --------
    >>> print(simplex(3))
    3 vertices, facets 123
    """
    check_whole_number("argument m", m, least=0)
    return _numbered(m, [range(m)])


def simplex_boundary(m: int) -> SimplicialComplex:
    """Return all faces of the simplex on m >= 1 vertices, labelled 1, ..., m, but the simplex itself.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 1.

    Examples
    --------
    >>> print(simplex_boundary(3))
    3 vertices, facets 12 13 23
    >>> print(simplex_boundary(1))
    1 vertex, facets ∅, ghosts 1
    """
    check_whole_number("argument m", m, least=1)
    return _numbered(m, combinations(range(m), m - 1))


def simplex_skeleton(m: int, dim: int) -> SimplicialComplex:
    """Return the faces of dimension at most `dim` of the simplex on m vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 0, or `dim` not one from -1 to m - 1.

    Examples
    --------
    >>> print(simplex_skeleton(4, 1))
    4 vertices, facets 12 13 14 23 24 34
    """
    check_whole_number("argument m", m, least=0)
    check_whole_number("argument dim", dim, least=-1, most=m - 1)
    return _numbered(m, combinations(range(m), dim + 1))


def cross_polytope(n: int) -> SimplicialComplex:
    """Return the boundary of the cross-polytope of dimension n >= 0; vertex i is opposite to n + i.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 0.

    Examples
    --------
    >>> print(cross_polytope(2))
    4 vertices, facets 12 14 23 34
    """
    check_whole_number("argument n", n, least=0)
    return _numbered(2 * n, product(*((i, n + i) for i in range(n))))


def cyclic_polytope(m: int, d: int) -> SimplicialComplex:
    """Return the boundary of the cyclic polytope of dimension d >= 2 with m > d vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `d` is not a whole number of at least 2, or `m` not one of at least d + 1.

    Notes
    -----
    By Gale's evenness condition, d vertices form a facet exactly when between any two others there is an even
    number of them. So a facet consists of pairs of neighbours in the cyclic order of the vertices when d is
    even; when d is odd, of the first or the last vertex and of pairs of neighbours in the linear order of the
    others.

    References
    ----------
    G. M. Ziegler, Lectures on Polytopes, Springer 1995, theorem 0.7 (from memory).

    Examples
    --------
    >>> print(cyclic_polytope(5, 3))
    5 vertices, facets 123 125 134 145 235 345
    """
    check_whole_number("argument d", d, least=2)
    check_whole_number("argument m", m, least=d + 1)
    first, last, pairs = 0, m - 1, d // 2
    if d % 2:
        facets = [(first, *rest) for rest in _neighbour_pairs(range(1, m), pairs)]
        facets += [(*rest, last) for rest in _neighbour_pairs(range(m - 1), pairs)]
    else:
        facets = list(_neighbour_pairs(range(m), pairs))
        facets += [(first, *rest, last) for rest in _neighbour_pairs(range(1, m - 1), pairs - 1)]
    return _numbered(m, facets)


def stacked_polytope(m: int, d: int) -> SimplicialComplex:
    """Return the boundary of a stacked polytope of dimension d >= 2 with m > d vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `d` is not a whole number of at least 2, or `m` not one of at least d + 1.

    Notes
    -----
    A polytope is stacked when it comes from a simplex by placing a flat pyramid on a facet, again and again. This is
    the one whose simplices are {i, ..., i + d} for i = 1, ..., m - d: vertex d + 1 + j lies beyond the facet
    {j + 1, ..., j + d}. Each simplex shares with the one before it what is left without its last vertex, and with the
    next what is left without its first; all other facets of it are facets of the polytope. In dimension 3 and more
    there are other stacked polytopes, with the same numbers of faces.

    References
    ----------
    B. Grünbaum, Convex Polytopes, 2nd ed., Springer 2003, section 10.6 (from memory).

    Examples
    --------
    >>> print(stacked_polytope(5, 3))
    5 vertices, facets 123 124 134 235 245 345
    """
    check_whole_number("argument d", d, least=2)
    check_whole_number("argument m", m, least=d + 1)
    ends = [range(d), range(m - d, m)]
    sides = [(*range(i, j), *range(j + 1, i + d + 1)) for i in range(m - d) for j in range(i + 1, i + d)]
    return _numbered(m, [*ends, *sides])


def points(m: int) -> SimplicialComplex:
    """Return m >= 0 points, labelled 1, ..., m, with no edge between them.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 0.

    Examples
    --------
    >>> print(points(3))
    3 vertices, facets 1 2 3
    """
    check_whole_number("argument m", m, least=0)
    return simplex_skeleton(m, 0 if m else -1)


def _numbered(count: int, faces: Iterable[Iterable[int]]) -> SimplicialComplex:
    """Return the complex on vertices labelled 1, ..., `count`; its faces are written with numbers from 0."""
    return SimplicialComplex.from_faces(range(1, count + 1), faces)


def _neighbour_pairs(row: Sequence[int], pairs: int) -> Iterator[Face]:
    """Yield all unions of the given number of disjoint pairs of neighbours in a row of vertices."""
    # Shrinking each pair to one place turns such a union into a choice of places in a shorter row.
    for places in combinations(range(len(row) - pairs), pairs):
        starts = [place + number for number, place in enumerate(places)]
        yield tuple(row[place] for start in starts for place in (start, start + 1))
