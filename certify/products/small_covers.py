"""Families of real toric spaces: λ together with the complex that it belongs to."""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass
from types import MappingProxyType
from typing import Any

import networkx as nx

from certify.errors import BadInput
from certify.products.real_toric import RealToricSpace
from certify.simplicial.arguments import check_whole_number, natural_order
from certify.simplicial.associahedra import nested_set_complex, permutohedron_dual
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.families import cross_polytope, simplex_boundary
from certify.simplicial.masks import mask_of

__all__ = [
    "REAL_TORIC_FAMILIES",
    "RealToricFamily",
    "coloured_small_cover",
    "real_bott_manifold",
    "real_nested_set_variety",
    "real_permutohedral_variety",
    "real_projective_space",
    "space_of_subsets",
]


@dataclass(frozen=True, slots=True)
class RealToricFamily:
    """A family of real toric spaces that can be asked for by name.

    Parameters
    ----------
    function : callable
        Returns the space; takes the parameters by name.
    parameters : mapping
        The name of each parameter, with its meaning in a few words.
    """

    function: Callable[..., RealToricSpace]
    parameters: Mapping[str, str]


def real_projective_space(n: int) -> RealToricSpace:
    """Return real projective space of dimension n >= 1: the small cover over the n-simplex.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 1.

    Examples
    --------
    >>> real_projective_space(2).rows
    ('101', '011')
    """
    check_whole_number("argument n", n, least=1)
    return _space(simplex_boundary(n + 1), [*_identity(n), (1,) * n])


def real_permutohedral_variety(n: int) -> RealToricSpace:
    """Return the real locus of the permutohedral variety of dimension n >= 1.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 1.

    Notes
    -----
    A vertex of K is a proper subset S of {1, …, n + 1}, and λ(S) is the sum of the e_i for i in S, modulo
    e_1 + … + e_{n+1} = 0.

    References
    ----------
    A. Henderson, Rational cohomology of the real Coxeter toric variety of type A, 2012 (from memory).

    Examples
    --------
    >>> real_permutohedral_variety(2).rows
    ('101101', '011110')
    """
    return space_of_subsets(permutohedron_dual(n))


def real_nested_set_variety(graph: nx.Graph[Any]) -> RealToricSpace:
    """Return the real toric manifold of the graph associahedron of a connected graph.

    Parameters
    ----------
    graph : networkx.Graph
        Connected, with at least two nodes.

    References
    ----------
    S. Choi, H. Park, A new graph invariant arises in toric topology, J. Math. Soc. Japan 67 (2015) (from memory).
    """
    return space_of_subsets(nested_set_complex(graph))


def space_of_subsets(k: SimplicialComplex) -> RealToricSpace:
    """Return the real toric space where λ of a vertex is the sum of the e_i for i in its label, modulo the sum of all.

    Parameters
    ----------
    k : SimplicialComplex
        The labels are tuples, as those of `nested_set_complex` and `permutohedron_dual` are.

    Raises
    ------
    BadInput
        If a label is no tuple, or λ is not injective on a face.
    """
    for label in k.labels:
        if not isinstance(label, tuple):
            raise BadInput(where="complex", expected="subsets (tuples) as labels of its vertices", found=repr(label))
    subsets = [tuple(label) for label in k.labels if isinstance(label, tuple)]
    ground = {
        element: i for i, element in enumerate(natural_order(element for subset in subsets for element in subset))
    }
    full = (1 << len(ground)) - 1
    columns = []
    for subset in subsets:
        mask = mask_of(ground[element] for element in subset)
        # The last basis vector is the sum of the others.
        mask ^= full if mask > full >> 1 else 0
        columns.append([mask >> i & 1 for i in range(len(ground) - 1)])
    return _space(k, columns)


def real_bott_manifold(matrix: Sequence[str]) -> RealToricSpace:
    """Return a real Bott manifold, an iterated bundle of circles: a small cover over the cube.

    Parameters
    ----------
    matrix : sequence of str
        The rows of a strictly upper triangular matrix over ℤ/2, n strings of n digits: ``["01", "00"]``.

    Raises
    ------
    BadInput
        If the matrix is not square, not strictly upper triangular, or has other digits than 0 and 1.

    Notes
    -----
    K is the boundary of the cross-polytope; λ is e_i on its vertex i and e_i + Σ_j A_ij e_j on the opposite one.

    References
    ----------
    Y. Kamishima, M. Masuda, Cohomological rigidity of real Bott manifolds, 2009 (from memory).

    Examples
    --------
    >>> from certify import homology
    >>> homology(real_bott_manifold(["01", "00"]))
    H_0 = ℤ, H_1 = ℤ ⊕ ℤ/2
    """
    if isinstance(matrix, str) or not isinstance(matrix, Sequence):
        raise BadInput(where="matrix", expected='a list of rows like ["01", "00"]', found=repr(matrix))
    n = len(matrix)
    for i, row in enumerate(matrix):
        good = isinstance(row, str) and len(row) == n and not set(row) - {"0", "1"} and "1" not in row[: i + 1]
        if not good:
            expected = f"{n} digits 0 or 1, with 0 up to place {i + 1}"
            raise BadInput(where=f"matrix, row {i + 1}", expected=expected, found=repr(row))
    k = cross_polytope(n)
    columns: list[Sequence[int]] = [()] * (2 * n)
    for i, (near, far) in enumerate(k.missing_faces()):
        columns[near] = _identity(n)[i]
        columns[far] = [int(digit == "1") ^ int(i == j) for j, digit in enumerate(matrix[i])]
    return _space(k, columns)


def coloured_small_cover(k: SimplicialComplex) -> RealToricSpace:
    """Return the real toric space of a proper colouring of the vertices with dim K + 1 colours: λ is e_{colour}.

    Parameters
    ----------
    k : SimplicialComplex
        Balanced: its vertices have such a colouring, in which every edge has two colours. A barycentric subdivision
        is balanced, and so is a polygon with an even number of vertices.

    Raises
    ------
    BadInput
        If no colouring is found by giving forced colours from facet to neighbouring facet.

    References
    ----------
    M. W. Davis, T. Januszkiewicz, Convex polytopes, Coxeter orbifolds and torus actions, 1991, example 1.15 (the
    pullback of the linear model; from memory).

    Examples
    --------
    >>> from certify import polygon
    >>> coloured_small_cover(polygon(4)).rows
    ('1010', '0101')
    """
    n = k.dimension + 1
    colours: dict[int, int] = {}
    waiting = list(k.facets[:1])
    done: set[tuple[int, ...]] = set()
    while waiting:
        facet = waiting.pop()
        done.add(facet)
        free = [colour for colour in range(n) if colour not in {colours.get(vertex) for vertex in facet}]
        for vertex in facet:
            if vertex not in colours:
                colours[vertex] = free.pop(0)
        waiting += [
            other
            for other in k.facets
            if other not in done and other not in waiting and len(set(other) & set(facet)) == n - 1
        ]
    proper = len(done) == len(k.facets) and all(len({colours[v] for v in facet}) == len(facet) for facet in k.facets)
    if not proper:
        raise BadInput(where="complex", expected=f"a complex that {n} colours colour properly", found=f"{k}")
    return _space(k, [tuple(int(colours.get(vertex) == i) for i in range(n)) for vertex in range(k.vertex_count)])


def _identity(n: int) -> list[tuple[int, ...]]:
    return [tuple(int(i == j) for j in range(n)) for i in range(n)]


def _space(k: SimplicialComplex, columns: Sequence[Sequence[int]]) -> RealToricSpace:
    return RealToricSpace(k, tuple("".join(map(str, row)) for row in zip(*columns, strict=True)))


REAL_TORIC_FAMILIES: Mapping[str, RealToricFamily] = MappingProxyType(
    {
        "real-projective-space": RealToricFamily(real_projective_space, {"n": "dimension, at least 1"}),
        "real-permutohedral-variety": RealToricFamily(real_permutohedral_variety, {"n": "dimension, at least 1"}),
        "real-bott-manifold": RealToricFamily(
            real_bott_manifold, {"matrix": "rows of a strictly upper triangular matrix of digits 0 and 1"}
        ),
    }
)
"""The families whose complex is part of the family, by the name that sheets give under ``family``."""
