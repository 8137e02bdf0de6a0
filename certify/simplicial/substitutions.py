"""Every vertex of a complex replaced by something larger: simplicial wedges and substitutions.

In both, the new vertices are labelled by pairs: the old vertex, and what tells its successors apart.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence
from itertools import chain, product

from certify.errors import BadInput
from certify.simplicial.arguments import check_whole_number, items
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.masks import Face

__all__ = ["simplicial_wedge", "substitution"]


def simplicial_wedge(k: SimplicialComplex, multiplicities: Iterable[int]) -> SimplicialComplex:
    """Return the simplicial wedge K(J): every missing face now needs all copies of each of its vertices.

    Parameters
    ----------
    k : SimplicialComplex
        The complex K, which is not changed.
    multiplicities : iterable of int
        The vector J: one number j >= 1 for each vertex of `k`, in order. Two for one vertex and one for all others is
        the simplicial wedge construction on that vertex.

    Returns
    -------
    SimplicialComplex
        In place of a vertex a it has the vertices (a, 1), ..., (a, j). A set of them is a face when the vertices all
        of whose copies are in it form a face of `k`.

    Raises
    ------
    BadInput
        If the numbers are not as many as the vertices, or one is no whole number of at least 1.

    Notes
    -----
    (D^1, S^0)^K(J), with J = (2, ..., 2), is (D^2, S^1)^K; more generally, a pair (D^j, S^(j-1)) at a vertex amounts
    to the pair (D^1, S^0) at each of its j copies. The reduced homology of K(J) is that of K, shifted up by the sum
    of all j - 1.

    References
    ----------
    A. Bahri, M. Bendersky, F. R. Cohen and S. Gitler, Operations on polyhedral products and a new topological
    construction of infinite families of toric manifolds, Homology, Homotopy and Applications 17 (2015), section 2
    (from memory).

    Examples
    --------
    >>> print(simplicial_wedge(SimplicialComplex.from_facets([["a"], ["b"]]), [2, 1]).relabelled(["a", "A", "b"]))
    3 vertices, facets aA ab Ab
    """
    numbers = list(items(multiplicities, "multiplicities"))
    if len(numbers) != k.vertex_count:
        raise BadInput(where="multiplicities", expected=f"{k.vertex_count} numbers", found=str(len(numbers)))
    for place, number in enumerate(numbers, start=1):
        check_whole_number(f"multiplicity {place}", number, least=1)
    labels = [(label, copy) for label, number in zip(k.labels, numbers, strict=True) for copy in range(1, number + 1)]
    copies = _ranges(numbers)
    return SimplicialComplex.from_faces(labels, chain.from_iterable(_wedge_facets(face, copies) for face in k.facets))


def substitution(k: SimplicialComplex, parts: Iterable[SimplicialComplex]) -> SimplicialComplex:
    """Return the substitution K(K_1, ..., K_m): unions of faces of the K_i for all i in a face of K.

    Parameters
    ----------
    k : SimplicialComplex
        The complex K, which is not changed.
    parts : iterable of SimplicialComplex
        The complexes K_1, ..., K_m: one for each vertex of `k`, in order.

    Returns
    -------
    SimplicialComplex
        Its vertices are the pairs (a, b) of a vertex a of `k` and a vertex b of the complex that is put in place of a.

    Raises
    ------
    BadInput
        If the complexes are not as many as the vertices of `k`.

    Notes
    -----
    Substitution into a simplex is the join, and into points it is the disjoint union. The missing faces are those of
    each K_i, and the sets with one vertex, that is no ghost, from K_i for each i in a missing face of K.

    References
    ----------
    S. A. Abramyan and T. E. Panov, Higher Whitehead products in moment-angle complexes and substitution of simplicial
    complexes, Proceedings of the Steklov Institute of Mathematics 305 (2019), section 2 (from memory).

    Examples
    --------
    >>> edge, points = SimplicialComplex.from_facets([[1, 2]]), SimplicialComplex.from_facets([[1], [2]])
    >>> print(substitution(points, [edge, points]).relabelled(["a", "A", "b", "B"]))
    4 vertices, facets aA b B
    """
    complexes = list(parts)
    if len(complexes) != k.vertex_count:
        raise BadInput(where="parts", expected=f"{k.vertex_count} complexes", found=str(len(complexes)))
    labels = [(label, inner) for label, part in zip(k.labels, complexes, strict=True) for inner in part.labels]
    starts = [places.start for places in _ranges([part.vertex_count for part in complexes])]
    facets = [[mask << start for mask in part.facet_masks()] for part, start in zip(complexes, starts, strict=True)]
    masks = (sum(choice) for face in k.facets for choice in product(*(facets[vertex] for vertex in face)))
    return SimplicialComplex.from_masks(labels, masks)


def _wedge_facets(face: Face, copies: Sequence[range]) -> Iterator[list[int]]:
    """Yield all copies of the vertices of a facet with all copies but one of each other vertex."""
    choices = [[None] if vertex in face else list(places) for vertex, places in enumerate(copies)]
    everything = range(copies[-1].stop if copies else 0)
    for left_out in product(*choices):
        yield [place for place in everything if place not in left_out]


def _ranges(sizes: Iterable[int]) -> list[range]:
    """Return neighbouring ranges of the given sizes, the first from 0."""
    found, start = [], 0
    for size in sizes:
        found.append(range(start, start + size))
        start += size
    return found
