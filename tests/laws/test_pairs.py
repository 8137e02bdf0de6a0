"""Products of any pairs: the routes agree; splittings are what they should be."""

from __future__ import annotations

import pytest
from flint import fmpz_mat
from hypothesis import given
from hypothesis import strategies as st

from certify.claims.homology import Route
from certify.products import Pair, PolyhedralProduct, parse_pair
from certify.simplicial.families import simplex
from tests.helpers import Homology, certified_homology, kunneth
from tests.strategies import NAMED_PAIRS, mixed_products, own_pairs


@pytest.mark.parametrize("route", ["blocks", "orbits", "cells"])
@given(space=mixed_products(), degrees=st.lists(st.integers(0, 6), min_size=1, max_size=3))
def test_restricted_claims_say_the_same(route: Route, space: PolyhedralProduct, degrees: list[int]) -> None:
    """On each route, as the whole claim by cells; that one is held against Smith forms in tests/outside."""
    whole = certified_homology(space, route="cells")
    assert certified_homology(space, route=route) == whole
    found = certified_homology(space, degrees, route=route)
    assert found == {degree: group for degree, group in whole.items() if degree in degrees}


@given(own_pairs())
def test_the_splitting_of_a_pair_is_a_change_of_basis_that_respects_a(pair: Pair) -> None:
    splitting = pair.splitting
    assert splitting is not None
    size = len(pair.cells)
    basis = [[dict(vector).get(cell, 0) for vector in splitting.basis] for cell in range(size)]
    assert fmpz_mat(basis) * fmpz_mat([list(row) for row in splitting.inverse]) == fmpz_mat(
        [[int(i == j) for j in range(size)] for i in range(size)]
    )
    inside = [vector for vector in splitting.basis if not any(pair.cells[cell].outside for cell, _ in vector)]
    assert len(inside) == sum(not cell.outside for cell in pair.cells)
    for vector in splitting.basis:
        assert len({pair.cells[cell].degree for cell, _ in vector}) == 1


@given(own_pairs())
def test_a_full_simplex_gives_products_of_x(pair: Pair) -> None:
    """Over one vertex that is a face the product is X; over a simplex of two it is X × X (Künneth over ℤ)."""
    x = certified_homology(PolyhedralProduct(simplex(1), (pair,)))
    assert certified_homology(PolyhedralProduct(simplex(2), (pair, pair))) == kunneth(x, x)


@given(st.sampled_from(NAMED_PAIRS), st.sampled_from(NAMED_PAIRS))
def test_a_simplex_of_two_vertices_gives_the_product_of_different_spaces(left: str, right: str) -> None:
    spaces = [PolyhedralProduct(simplex(1), (parse_pair(name),)) for name in (left, right)]
    both = PolyhedralProduct(simplex(2), (parse_pair(left), parse_pair(right)))
    factors: list[Homology] = [certified_homology(space) for space in spaces]
    assert certified_homology(both) == kunneth(*factors)


def test_a_pair_with_a_name_is_the_pair_of_its_cells() -> None:
    for name in NAMED_PAIRS:
        pair = parse_pair(name)
        own = Pair.from_cells([(cell.degree, cell.outside, dict(cell.boundary)) for cell in pair.cells])
        assert own.shapes == pair.shapes
        assert own.splitting is not None
