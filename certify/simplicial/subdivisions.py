"""Subdivisions: other complexes that triangulate the same space."""

from __future__ import annotations

from collections.abc import Iterable
from itertools import accumulate, permutations

from certify.errors import BadInput
from certify.simplicial.arguments import Label, distinct_labels
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.masks import face_of, mask_of

__all__ = ["barycentric_subdivision", "stellar_subdivision"]


def barycentric_subdivision(k: SimplicialComplex) -> SimplicialComplex:
    """Return the barycentric subdivision: the chains of non-empty faces, ordered by inclusion.

    Returns
    -------
    SimplicialComplex
        Its vertices are the non-empty faces of `k`, in the order of `SimplicialComplex.face_masks`; the label of a
        face is the tuple of its labels. A ghost vertex of `k` is no face, so nothing of it is left.

    Notes
    -----
    With f_i faces of dimension i in `k`, there are f_i (j + 1)! S(i + 1, j + 1) faces of dimension j that end in one
    of these, with S for the Stirling numbers of the second kind. A facet with s vertices becomes s! facets.

    References
    ----------
    J. R. Munkres, Elements of Algebraic Topology, Addison-Wesley 1984, section 15 (from memory).

    Examples
    --------
    >>> k = barycentric_subdivision(SimplicialComplex.from_facets([["a", "b"], ["c"]]))
    >>> k.labels
    (('a',), ('b',), ('c',), ('a', 'b'))
    >>> k.facets
    ((0, 3), (1, 3), (2,))
    """
    masks = k.face_masks()[1:]
    place = {mask: number for number, mask in enumerate(masks)}
    labels = [tuple(k.labels[vertex] for vertex in face_of(mask)) for mask in masks]
    # Adding the vertices of a facet one by one, in some order, gives a maximal chain.
    orders = (order for facet in k.facets for order in permutations(1 << vertex for vertex in facet))
    chains = [mask_of(place[mask] for mask in accumulate(order)) for order in orders]
    return SimplicialComplex.from_masks(labels, chains)


def stellar_subdivision(
    k: SimplicialComplex, labels: Iterable[Label], vertex: Label | None = None
) -> SimplicialComplex:
    """Return the stellar subdivision at a face: a new vertex inside the face, joined to all that surrounds it.

    Parameters
    ----------
    k : SimplicialComplex
        The complex, which is not changed.
    labels : iterable of labels
        A face of `k` with at least two vertices.
    vertex : label, optional
        The label of the new vertex, which becomes the last one. Without it, the label is the tuple of the labels of
        the face, in the order of `k`, as in `barycentric_subdivision`.

    Returns
    -------
    SimplicialComplex
        The faces of `k` that do not contain the face, and the joins of the new vertex, a proper part of the face
        and a face of its link.

    Raises
    ------
    BadInput
        If the labels do not form a face with at least two vertices, or the new vertex has the label of another one.

    Notes
    -----
    When `k` is the boundary of the dual of a simple polytope P, a face of `k` is a face of P, and the result belongs
    to P with that face cut off; cutting off a vertex of P is the subdivision at a facet of `k`.

    References
    ----------
    V. M. Buchstaber and T. E. Panov, Toric Topology, American Mathematical Society 2015, section 2.7 (from memory).

    Examples
    --------
    >>> triangle = SimplicialComplex.from_facets([[1, 2], [2, 3], [1, 3]])
    >>> print(stellar_subdivision(triangle, [1, 2], vertex=4))
    4 vertices, facets 13 14 23 24
    """
    numbers = k.numbers(labels)
    face = mask_of(numbers)
    around = [facet for facet in k.facet_masks() if face & ~facet == 0]
    if len(numbers) < 2 or not around:
        names = " ".join(str(k.labels[number]) for number in numbers) or "no vertex"
        raise BadInput(where="face", expected="two or more vertices that form a face", found=names)
    new = tuple(k.labels[number] for number in numbers) if vertex is None else vertex
    distinct_labels([new], "vertex")
    if new in k.labels:
        raise BadInput(where="vertex", expected="a label for the new vertex", found=f"{new!r}, which is in use")
    others = [facet for facet in k.facet_masks() if face & ~facet]
    cones = [facet & ~(1 << number) | 1 << k.vertex_count for facet in around for number in numbers]
    return SimplicialComplex.from_masks((*k.labels, new), others + cones)
