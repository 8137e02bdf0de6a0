"""Our certified answers against the Smith normal forms of two general-purpose libraries, on dense boundary matrices."""

from __future__ import annotations

import pytest
from flint import fmpz_mat
from hypothesis import given, settings
from sympy import ZZ
from sympy.polys.matrices import DomainMatrix
from sympy.polys.matrices.normalforms import invariant_factors

from certify.claims.homology import Route
from certify.products import PolyhedralProduct
from certify.simplicial import build
from tests.helpers import certified_homology, disc_dimensions, disc_product
from tests.outside.dense import Matrix, PairCells, boundary_matrices, homology_from_factors, matrices_of_pairs
from tests.strategies import disc_products, mixed_products

both_routes = pytest.mark.parametrize("route", ["blocks", "cells"])


def _factors_by_flint(matrix: Matrix) -> list[int]:
    """Return the non-zero invariant factors by python-flint (FLINT)."""
    if not matrix or not matrix[0]:
        return []
    smith = fmpz_mat(matrix).snf()
    diagonal = (abs(int(smith[i, i])) for i in range(min(len(matrix), len(matrix[0]))))
    return [factor for factor in diagonal if factor]


def _factors_by_sympy(matrix: Matrix) -> list[int]:
    """Return the non-zero invariant factors by SymPy, which computes them in Python."""
    if not matrix or not matrix[0]:
        return []
    found = invariant_factors(DomainMatrix(matrix, (len(matrix), len(matrix[0])), ZZ).convert_to(ZZ))
    return [abs(int(factor)) for factor in found if factor]


def _ours(space: PolyhedralProduct, route: Route) -> dict[int, tuple[int, tuple[int, ...]]]:
    return {degree: (group.rank, group.torsion) for degree, group in certified_homology(space, route=route).items()}


@both_routes
@given(disc_products(max_vertices=4))
def test_against_the_smith_form_of_flint(route: Route, space: PolyhedralProduct) -> None:
    sizes, matrices = boundary_matrices(space.complex.facets, disc_dimensions(space))
    assert _ours(space, route) == homology_from_factors(sizes, [_factors_by_flint(matrix) for matrix in matrices])


@pytest.mark.parametrize("pairs", [[1] * 6, [2] * 6, [1, 2, 1, 3, 2, 1]])
def test_against_the_smith_form_of_flint_where_there_is_torsion(pairs: list[int]) -> None:
    space = disc_product(build("projective-plane"), pairs)
    sizes, matrices = boundary_matrices(space.complex.facets, pairs)
    expected = homology_from_factors(sizes, [_factors_by_flint(matrix) for matrix in matrices])
    assert [torsion for _, torsion in expected.values() if torsion] == [(2,)]
    assert _ours(space, "blocks") == _ours(space, "cells") == expected


@settings(max_examples=25)
@given(disc_products(max_vertices=3, max_n=4))
def test_against_the_smith_form_of_sympy(space: PolyhedralProduct) -> None:
    sizes, matrices = boundary_matrices(space.complex.facets, disc_dimensions(space))
    assert _ours(space, "blocks") == homology_from_factors(sizes, [_factors_by_sympy(matrix) for matrix in matrices])


def _pairs(space: PolyhedralProduct) -> list[PairCells]:
    return [[(cell.degree, cell.outside, dict(cell.boundary)) for cell in pair.cells] for pair in space.pairs]


@pytest.mark.parametrize("route", ["blocks", "orbits", "cells"])
@given(mixed_products())
def test_any_pairs_against_the_smith_form_of_flint(route: Route, space: PolyhedralProduct) -> None:
    sizes, matrices = matrices_of_pairs(space.complex.facets, _pairs(space))
    assert _ours(space, route) == homology_from_factors(sizes, [_factors_by_flint(matrix) for matrix in matrices])


@settings(max_examples=25)
@given(mixed_products(most_cells=60))
def test_any_pairs_against_the_smith_form_of_sympy(space: PolyhedralProduct) -> None:
    sizes, matrices = matrices_of_pairs(space.complex.facets, _pairs(space))
    assert _ours(space, "blocks") == homology_from_factors(sizes, [_factors_by_sympy(matrix) for matrix in matrices])
