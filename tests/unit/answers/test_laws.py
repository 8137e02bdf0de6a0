"""Theorems that tie the answers together, and to matrices that are built here without the package."""

from __future__ import annotations

from collections import Counter
from collections.abc import Sequence
from itertools import chain, combinations, pairwise

import flint
import pytest
import sympy
from hypothesis import given, settings

from certify import (
    PolyhedralProduct,
    SimplicialComplex,
    homology,
    polyhedral_product,
    projective_plane,
    splitting,
    tor,
)
from certify.answers import f_polynomial, h_polynomial, hilbert_series
from tests.helpers import disc_dimensions
from tests.outside.dense import Matrix, boundary_matrices
from tests.strategies import complexes, disc_products

T, S = sympy.symbols("t s")
FIELDS = (0, 2, 3, 5)
PLANE = polyhedral_product(projective_plane(), "(D1, S0)")


def rank(matrix: Matrix, p: int) -> int:
    """Return the rank over ℚ or 𝔽_p."""
    if not matrix or not matrix[0]:
        return 0
    return flint.fmpz_mat(matrix).rank() if p == 0 else flint.nmod_mat(matrix, p).rank()


def dimensions(sizes: Sequence[int], matrices: Sequence[Matrix], p: int) -> dict[int, int]:
    """Return the dimensions of homology over a field that are not zero; matrix k leads from degree k to k - 1."""
    ranks = [*(rank(matrix, p) for matrix in matrices), 0]
    found = {k: size - ranks[k] - ranks[k + 1] for k, size in enumerate(sizes)}
    return {k: number for k, number in found.items() if number}


def simplicial_matrices(faces: set[frozenset[int]]) -> tuple[list[int], list[Matrix]]:
    """Return sizes and boundary matrices of an augmented complex; degree k is spanned by the faces of k vertices."""
    table = [sorted(sorted(f) for f in faces if len(f) == k) for k in range(max(map(len, faces)) + 1)]
    matrices: list[Matrix] = [[]]
    for below, above in pairwise(table):
        matrix = [[0] * len(above) for _ in below]
        for column, face in enumerate(above):
            for place in range(len(face)):
                matrix[below.index(face[:place] + face[place + 1 :])][column] = (-1) ** place
        matrices.append(matrix)
    return [len(row) for row in table], matrices


def hochster(k: SimplicialComplex, p: int) -> dict[tuple[int, int], int]:
    """Return the bigraded Betti numbers of the face ring over a field, by Hochster's formula from dense matrices."""
    faces = {frozenset(face) for facet in k.facets for n in range(len(facet) + 1) for face in combinations(facet, n)}
    found: Counter[tuple[int, int]] = Counter()
    for chosen in chain.from_iterable(combinations(range(k.vertex_count), j) for j in range(k.vertex_count + 1)):
        sizes, matrices = simplicial_matrices({face for face in faces if face <= set(chosen)})
        for size, number in dimensions(sizes, matrices, p).items():
            found[len(chosen) - size, 2 * len(chosen)] += number
    return dict(found)


def check_universal_coefficients(space: PolyhedralProduct) -> None:
    """Compare Betti numbers over several fields with ranks of matrices, and the Euler characteristic with sizes."""
    answer = homology(space)
    sizes, matrices = boundary_matrices(space.complex.facets, disc_dimensions(space))
    euler = sum((-1) ** degree * size for degree, size in enumerate(sizes))
    assert answer.euler_characteristic() == answer.cohomology().euler_characteristic() == euler
    for p in FIELDS:
        assert answer.betti_numbers(p) == dimensions(sizes, matrices, p)
        assert answer.cohomology().betti_numbers(p) == answer.betti_numbers(p)
        assert answer.poincare_polynomial(p).subs(T, -1) == euler


@settings(max_examples=20)
@given(disc_products(max_vertices=4))
def test_universal_coefficients(space: PolyhedralProduct) -> None:
    check_universal_coefficients(space)


def test_universal_coefficients_where_there_is_torsion() -> None:
    check_universal_coefficients(PLANE)
    assert homology(PLANE).betti_numbers(2) != homology(PLANE).betti_numbers()


@given(complexes())
def test_the_hilbert_series_counts_monomials_face_by_face(k: SimplicialComplex) -> None:
    by_faces = sum(number * (T**2 / (1 - T**2)) ** i for i, number in enumerate(k.f_vector()))
    assert sympy.cancel(hilbert_series(k) - by_faces) == 0


@given(complexes(max_vertices=5))
def test_f_polynomials_determine_h_polynomials(k: SimplicialComplex) -> None:
    n = k.dimension + 1
    assert sympy.cancel(h_polynomial(k) - (1 - T) ** n * f_polynomial(k).subs(T, T / (1 - T))) == 0
    assert f_polynomial(k).subs(T, -1) == 1 - k.euler_characteristic()


def check_tor(k: SimplicialComplex, p: int) -> None:
    """Compare Tor with the Hilbert series of the face ring and with Hochster's formula over a field."""
    answer = tor(k)
    alternating = answer.poincare_polynomial(p).subs(S, -1)
    assert sympy.cancel(alternating / (1 - T**2) ** k.vertex_count - hilbert_series(k)) == 0
    assert answer.betti_numbers(p) == hochster(k, p)


@pytest.mark.parametrize("p", FIELDS)
@settings(max_examples=15)
@given(k=complexes(max_vertices=5))
def test_tor_of_face_rings(k: SimplicialComplex, p: int) -> None:
    check_tor(k, p)


@pytest.mark.parametrize("p", FIELDS)
def test_tor_where_there_is_torsion(p: int) -> None:
    check_tor(projective_plane(), p)


def check_gradings(k: SimplicialComplex) -> None:
    """Compare what is graded by sets of vertices with Tor, and Tor with the moment-angle complex."""
    table, bigraded = splitting(k), tor(k)
    assert bigraded.cohomology() == homology(polyhedral_product(k, "(D2, S1)")).cohomology()
    m = k.vertex_count
    for i in range(m + 1):
        for j in range(m + 1):
            groups = [table.tor(i, chosen) for chosen in combinations(k.labels, j)]
            assert sum(group.rank for group in groups) == bigraded[i, 2 * j].rank
            orders = sorted(order for group in groups for order in group.torsion)
            assert orders == sorted(bigraded[i, 2 * j].torsion)


@settings(max_examples=15)
@given(complexes(max_vertices=5))
def test_finer_gradings_add_up(k: SimplicialComplex) -> None:
    check_gradings(k)


def test_finer_gradings_add_up_where_there_is_torsion() -> None:
    check_gradings(projective_plane())
