"""New complexes from old: joins, unions and sums, full subcomplexes, links, skeleta and the Alexander dual.

Ghost vertices are never dropped on the way. A polyhedral product sees them, and the results below are the
complexes that occur in statements about polyhedral products as they stand.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence
from itertools import chain, product

from certify.errors import BadInput
from certify.simplicial.arguments import Label, check_known, distinct_labels
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.masks import Face, face_of, levels, mask_of, restrict

__all__ = [
    "alexander_dual",
    "connected_sum",
    "deletion",
    "disjoint_union",
    "full_subcomplex",
    "join",
    "link",
    "skeleton",
    "star",
]


def join(*complexes: SimplicialComplex) -> SimplicialComplex:
    """Return the join: the unions of a face of each complex.

    Parameters
    ----------
    *complexes : SimplicialComplex
        Their vertices become the vertices of the join, those of the first complex first. When two complexes share a
        label, every label a of the first complex is replaced by the pair (0, a), every label b of the second by
        (1, b), and so on; otherwise all labels are kept.

    Notes
    -----
    (X, A)^(K * L) is the product of (X, A)^K and (X, A)^L. The join of no complex is the one without vertices, whose
    only face is empty.

    Examples
    --------
    >>> two = SimplicialComplex.from_facets([[1], [2]])
    >>> print(join(two, two.relabelled([3, 4])))
    4 vertices, facets 13 14 23 24
    >>> join(two, two).labels
    ((0, 1), (0, 2), (1, 1), (1, 2))
    """
    masks = [sum(choice) for choice in product(*_masks_side_by_side(complexes))]
    return SimplicialComplex.from_masks(_labels_side_by_side([k.labels for k in complexes]), masks)


def disjoint_union(*complexes: SimplicialComplex) -> SimplicialComplex:
    """Return the disjoint union: the faces of all complexes, with only the empty face in common.

    Parameters
    ----------
    *complexes : SimplicialComplex
        Vertices and labels are treated as in `join`.

    Examples
    --------
    >>> edge = SimplicialComplex.from_facets([[1, 2]])
    >>> print(disjoint_union(edge, SimplicialComplex.from_facets([[3]])))
    3 vertices, facets 12 3
    """
    masks = chain([0], *_masks_side_by_side(complexes))
    return SimplicialComplex.from_masks(_labels_side_by_side([k.labels for k in complexes]), masks)


def connected_sum(
    k: SimplicialComplex, other: SimplicialComplex, facet: Iterable[Label], other_facet: Iterable[Label]
) -> SimplicialComplex:
    """Return the connected sum along two facets: they are made one, vertex by vertex, and taken out.

    Parameters
    ----------
    k, other : SimplicialComplex
        The complexes, which are not changed.
    facet, other_facet : iterable of labels
        A facet of each, with the same number of vertices, at least one. The first vertex of one becomes the first
        vertex of the other, and so on; another order may give another complex.

    Returns
    -------
    SimplicialComplex
        Its vertices are those of `k`, and then those of `other` outside of the facet. Labels are kept, unless two of
        these would share one; then all become pairs (0, a) and (1, b), as in `join`.

    Raises
    ------
    BadInput
        If one of the lists is no facet, or they differ in length.

    Notes
    -----
    The proper faces of the facet stay. The connected sum with the boundary of a simplex is, up to the label of a
    vertex, the stellar subdivision at the facet. The connected sum of two triangulated closed manifolds of the same
    dimension is one again.

    References
    ----------
    V. M. Buchstaber and T. E. Panov, Toric Topology, American Mathematical Society 2015, section 2.2 (from memory).

    Examples
    --------
    >>> square = SimplicialComplex.from_facets([[1, 2], [2, 3], [3, 4], [1, 4]])
    >>> triangle = SimplicialComplex.from_facets([["a", "b"], ["b", "c"], ["a", "c"]])
    >>> print(connected_sum(square, triangle, [1, 2], ["a", "b"]))
    5 vertices, facets 14 1c 23 2c 34
    """
    ours, theirs = _facet_in_order(k, facet, "facet 1"), _facet_in_order(other, other_facet, "facet 2")
    if len(ours) != len(theirs):
        raise BadInput(where="facet 2", expected=f"{len(ours)} vertices like the first facet", found=f"{len(theirs)}")
    rest = [vertex for vertex in range(other.vertex_count) if vertex not in theirs]
    place = dict(zip(theirs, ours, strict=True)) | {vertex: k.vertex_count + i for i, vertex in enumerate(rest)}
    moved = [mask_of(place[vertex] for vertex in face) for face in other.facets]
    gone = mask_of(ours)
    masks = [mask for mask in (*k.facet_masks(), *moved) if mask != gone]
    sides = [gone & ~(1 << vertex) for vertex in ours]
    labels = _labels_side_by_side([k.labels, tuple(other.labels[vertex] for vertex in rest)])
    return SimplicialComplex.from_masks(labels, masks + sides)


def full_subcomplex(k: SimplicialComplex, labels: Iterable[Label]) -> SimplicialComplex:
    """Return the faces of `k` that use only the given vertices.

    Parameters
    ----------
    k : SimplicialComplex
        The complex, which is not changed.
    labels : iterable of labels
        These are the vertices of the result, in the order that they have in `k`; those that lie in no face
        are ghosts.

    Raises
    ------
    BadInput
        If a label is no vertex of `k`, or is given twice.

    Examples
    --------
    >>> path = SimplicialComplex.from_facets([[1, 2], [2, 3]])
    >>> print(full_subcomplex(path, [3, 1]))
    2 vertices, facets 1 3
    """
    return _restricted(k, k.numbers(labels), k.facet_masks())


def deletion(k: SimplicialComplex, labels: Iterable[Label]) -> SimplicialComplex:
    """Return the faces of `k` that use none of the given vertices: the full subcomplex on all others.

    Raises
    ------
    BadInput
        If a label is no vertex of `k`, or is given twice.

    Notes
    -----
    When the vertices form a face, their link has the same vertices as the deletion and lies inside it. For a
    single vertex v that is no ghost, `k` is the union of the star and the deletion of v, and their
    intersection is the link of v.

    Examples
    --------
    >>> path = SimplicialComplex.from_facets([[1, 2], [2, 3]])
    >>> print(deletion(path, [2]))
    2 vertices, facets 1 3
    """
    return _restricted(k, _all_but(k, k.numbers(labels)), k.facet_masks())


def link(k: SimplicialComplex, labels: Iterable[Label]) -> SimplicialComplex:
    """Return the faces that are disjoint from the given face and together with it form a face.

    Parameters
    ----------
    k : SimplicialComplex
        The complex, which is not changed.
    labels : iterable of labels
        A face of `k`. All other vertices of `k`, in their order, are the vertices of the link: a vertex that
        no longer lies in a face stays as a ghost, as polyhedral products need it.

    Raises
    ------
    BadInput
        If the labels do not form a face of `k`.

    Examples
    --------
    >>> path = SimplicialComplex.from_facets([[1, 2], [2, 3]])
    >>> print(link(path, [1]))
    2 vertices, facets 2, ghosts 3
    """
    face = k.numbers(labels)
    return _restricted(k, _all_but(k, face), _facets_around(k, face))


def star(k: SimplicialComplex, labels: Iterable[Label]) -> SimplicialComplex:
    """Return the faces that together with the given face form a face (the closed star).

    Parameters
    ----------
    k : SimplicialComplex
        The complex, which is not changed.
    labels : iterable of labels
        A face of `k`. The vertices of the star are all vertices of `k`.

    Raises
    ------
    BadInput
        If the labels do not form a face of `k`.

    Examples
    --------
    >>> path = SimplicialComplex.from_facets([[1, 2], [2, 3]])
    >>> print(star(path, [1]))
    3 vertices, facets 12, ghosts 3
    """
    return SimplicialComplex.from_masks(k.labels, _facets_around(k, k.numbers(labels)))


def skeleton(k: SimplicialComplex, dimension: int) -> SimplicialComplex:
    """Return the faces of at most the given dimension, on the same vertices.

    Raises
    ------
    BadInput
        If the dimension is below -1, where not even the empty face is left.

    Examples
    --------
    >>> print(skeleton(SimplicialComplex.from_facets([[1, 2, 3]]), 1))
    3 vertices, facets 12 13 23
    """
    if dimension < -1:
        raise BadInput(where="skeleton", expected="a dimension of at least -1", found=str(dimension))
    if dimension >= k.dimension:
        return k
    smaller = (mask for mask in k.facet_masks() if mask.bit_count() <= dimension)
    return SimplicialComplex.from_masks(k.labels, [*levels(k.facets)[dimension + 1], *smaller])


def alexander_dual(k: SimplicialComplex) -> SimplicialComplex:
    """Return the complements of the non-faces of `k`, on the same vertices.

    Raises
    ------
    BadInput
        If `k` is the full simplex on its vertices, which has no non-face: its dual is void.

    Notes
    -----
    The facets of the dual are the complements of the missing faces, and the dual of the dual is `k`. On m
    vertices, ghosts included, the reduced homology of the dual in degree i is the reduced cohomology of `k`
    in degree m - i - 3.

    References
    ----------
    V. M. Buchstaber and T. E. Panov, Toric Topology, American Mathematical Society 2015, section 2.4 (from
    memory).

    Examples
    --------
    >>> square = SimplicialComplex.from_facets([[1, 2], [2, 3], [3, 4], [1, 4]])
    >>> print(alexander_dual(square))
    4 vertices, facets 13 24
    >>> print(alexander_dual(SimplicialComplex.from_facets([[]], vertices=[1, 2, 3])))
    3 vertices, facets 12 13 23
    """
    everything = (1 << k.vertex_count) - 1
    masks = [everything & ~mask_of(face) for face in k.missing_faces()]
    if not masks:
        raise BadInput(
            where="Alexander dual",
            expected="a complex with a missing face",
            found="the full simplex, whose dual has no face at all",
        )
    return SimplicialComplex.from_masks(k.labels, masks)


def _labels_side_by_side(groups: Sequence[tuple[Label, ...]]) -> tuple[Label, ...]:
    """Return all labels, made different by pairing with the number of their group if two groups share one."""
    labels = tuple(chain.from_iterable(groups))
    if len(set(labels)) == len(labels):
        return labels
    return tuple((number, label) for number, group in enumerate(groups) for label in group)


def _masks_side_by_side(complexes: Sequence[SimplicialComplex]) -> Iterator[list[int]]:
    """Yield the facets of each complex, with its vertices numbered on from those of the complex before."""
    shift = 0
    for k in complexes:
        yield [mask << shift for mask in k.facet_masks()]
        shift += k.vertex_count


def _facet_in_order(k: SimplicialComplex, labels: Iterable[Label], where: str) -> tuple[int, ...]:
    """Return the numbers of the vertices of a facet, in the order in which they are given."""
    given = distinct_labels(labels, where)
    check_known(given, k.labels, where)
    numbers = tuple(k.labels.index(label) for label in given)
    if not given or tuple(sorted(numbers)) not in k.facets:
        names = " ".join(map(str, given)) or "no vertex"
        raise BadInput(where=where, expected="the vertices of a facet, at least one", found=names)
    return numbers


def _all_but(k: SimplicialComplex, face: Face) -> Face:
    return face_of((1 << k.vertex_count) - 1 & ~mask_of(face))


def _restricted(k: SimplicialComplex, vertices: Face, masks: Iterable[int]) -> SimplicialComplex:
    """Return the complex that the masks generate, cut down to the given vertex numbers."""
    labels = [k.labels[vertex] for vertex in vertices]
    return SimplicialComplex.from_masks(labels, {restrict(mask, vertices) for mask in masks})


def _facets_around(k: SimplicialComplex, face: Face) -> list[int]:
    """Return the masks of the facets that contain a face."""
    mask = mask_of(face)
    found = [facet for facet in k.facet_masks() if mask & ~facet == 0]
    if not found:
        names = " ".join(str(k.labels[vertex]) for vertex in face)
        raise BadInput(where="face", expected="vertices that form a face", found=f"{names}, which do not")
    return found
