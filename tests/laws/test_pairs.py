"""Products of any pairs: the routes agree; splittings are what they should be."""

from __future__ import annotations

from collections import Counter

import pytest
from flint import fmpz_mat
from hypothesis import given, settings
from hypothesis import strategies as st

from certify.claims.homology import Route
from certify.products import Pair, PolyhedralProduct, parse_pair
from certify.products.splitting import Move, Shape, Splitting
from certify.simplicial import join
from certify.simplicial.families import simplex
from tests.helpers import Homology, certified_homology, kunneth
from tests.outside.dense import PairCells, homology_from_factors, matrices_of_pairs
from tests.strategies import NAMED_PAIRS, mixed_products, own_pairs, relabelled_mixed_products, twisted_pairs

Groups = dict[int, tuple[int, tuple[int, ...]]]
"""Rank and invariant factors, by degree."""


@pytest.mark.parametrize("route", ["blocks", "orbits", "cells"])
@given(space=mixed_products(), degrees=st.lists(st.integers(0, 6), min_size=1, max_size=3))
def test_restricted_claims_say_the_same(route: Route, space: PolyhedralProduct, degrees: list[int]) -> None:
    """On each route, as the whole claim by cells; that one is held against Smith forms in tests/outside."""
    whole = certified_homology(space, route="cells")
    assert certified_homology(space, route=route) == whole
    found = certified_homology(space, degrees, route=route)
    assert found == {degree: group for degree, group in whole.items() if degree in degrees}


@given(relabelled_mixed_products())
def test_the_order_of_the_vertices_does_not_matter(spaces: tuple[PolyhedralProduct, PolyhedralProduct]) -> None:
    one, other = spaces
    assert certified_homology(one) == certified_homology(other)


@settings(max_examples=30)
@given(mixed_products(max_vertices=2), mixed_products(max_vertices=2))
def test_joins_multiply(left: PolyhedralProduct, right: PolyhedralProduct) -> None:
    """The product over K * L is the product of those over K and over L, and its homology is given by Künneth.

    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, section 4.2 (from memory).
    """
    both = PolyhedralProduct(join(left.complex, right.complex), (*left.pairs, *right.pairs))
    assert certified_homology(both) == kunneth(certified_homology(left), certified_homology(right))


# -- the splitting of a pair --------------------------------------------------------------------


def splitting_of(pair: Pair) -> Splitting:
    """Return the splitting of a pair that is given by its cells."""
    assert pair.splitting is not None
    return pair.splitting


def in_new_basis(pair: Pair) -> PairCells:
    """Return the cells of a pair in the basis of the splitting, after checking that its inverse is one."""
    splitting, size = splitting_of(pair), len(pair.cells)
    basis = fmpz_mat([[dict(vector).get(cell, 0) for vector in splitting.basis] for cell in range(size)])
    rows = fmpz_mat([list(row) for row in splitting.inverse])
    assert rows * basis == fmpz_mat([[int(i == j) for j in range(size)] for i in range(size)])
    d = fmpz_mat([[dict(letter.boundary).get(cell, 0) for letter in pair.cells] for cell in range(size)])
    new = rows * d * basis
    degrees = [{pair.cells[cell].degree for cell, _ in vector} for vector in splitting.basis]
    assert all(len(found) == 1 for found in degrees)
    return [
        (min(degrees[j]), any(pair.cells[cell].outside for cell, _ in vector), _column(new, j))
        for j, vector in enumerate(splitting.basis)
    ]


def _column(matrix: fmpz_mat, j: int) -> dict[int, int]:
    return {i: int(matrix[i, j]) for i in range(matrix.nrows()) if matrix[i, j] != 0}


def pieces_of(cells: PairCells) -> list[list[int]]:
    """Return the finest grouping of cells with which each group spans a subcomplex."""
    group = list(range(len(cells)))
    for number, (_, _, boundary) in enumerate(cells):
        for low in boundary:
            group = [group[low] if g == group[number] else g for g in group]
    return [[i for i, g in enumerate(group) if g == chosen] for chosen in sorted(set(group))]


def is_acyclic(piece: list[int], cells: PairCells) -> bool:
    """Say whether a piece is ℤ --±1--> ℤ on one side of A."""
    entries = [abs(x) for i in piece for x in cells[i][2].values()]
    return len(piece) == 2 and entries == [1] and len({cells[i][1] for i in piece}) == 1


def described(piece: list[int], cells: PairCells) -> str:
    """Return degrees, sides and boundaries of a piece, whatever the numbers of its cells; a lone entry has no sign."""
    lone = len(piece) == 2
    return str(
        sorted(
            (cells[i][0], cells[i][1], sorted((cells[low][1], abs(x) if lone else x) for low, x in cells[i][2].items()))
            for i in piece
        )
    )


def cells_of(shapes: tuple[Shape, ...]) -> list[tuple[int, bool, dict[int, int]]]:
    """Return the cells of a sum of summands, from their meaning alone."""
    cells: list[tuple[int, bool, dict[int, int]]] = []
    for shape in shapes:
        for low, times in shape.shifts:
            for _ in range(times):
                start = len(cells)
                if shape.move in (Move.STAY, Move.OUT):
                    cells.append((low, shape.move == Move.OUT, {}))
                elif isinstance(shape.tag, int):
                    cells.append((low, shape.move == Move.OUTER, {}))
                    cells.append((low + 1, shape.move != Move.INNER, {start: shape.tag}))
                else:
                    cells += [(low + c.degree, c.outside, {start + i: x for i, x in c.boundary}) for c in shape.tag]
    return cells


def homology(cells: PairCells, faces: list[list[int]]) -> Groups:
    """Return the homology of X or A, which is the product over a vertex that is a face or a ghost."""
    sizes, matrices = matrices_of_pairs(faces, [cells])
    factors = []
    for matrix in matrices:
        smith = fmpz_mat(matrix).snf() if matrix and matrix[0] else fmpz_mat(0, 0)
        diagonal = [abs(int(smith[i, i])) for i in range(min(smith.nrows(), smith.ncols()))]
        factors.append([factor for factor in diagonal if factor])
    return homology_from_factors(sizes, factors)


def homology_of_a_and_x_and_both(cells: PairCells) -> list[Groups]:
    """Return the homology of A, of X, and of X relative to A."""
    outside = {number: new for new, number in enumerate(n for n, cell in enumerate(cells) if cell[1])}
    relative = [
        (cells[number][0], False, {outside[low]: x for low, x in cells[number][2].items() if low in outside})
        for number in outside
    ]
    return [homology(cells, [[]]), homology(cells, [[0]]), homology(relative, [[]])]


def given_cells(pair: Pair) -> PairCells:
    """Return the cells of a pair as plain numbers."""
    return [(cell.degree, cell.outside, dict(cell.boundary)) for cell in pair.cells]


@given(own_pairs() | twisted_pairs())
def test_the_splitting_of_a_pair_is_a_change_of_basis_that_respects_a(pair: Pair) -> None:
    """Vectors have one degree, as many as A has cells lie in A, and d leads from these to these."""
    cells = in_new_basis(pair)
    assert sum(not outside for _, outside, _ in cells) == sum(not cell.outside for cell in pair.cells)
    for degree, outside, boundary in cells:
        assert all(cells[low][0] == degree - 1 for low in boundary)
        assert outside or not any(cells[low][1] for low in boundary)


@given(own_pairs() | twisted_pairs())
def test_the_shapes_are_the_pieces_into_which_d_falls(pair: Pair) -> None:
    """Each summand is a subcomplex with these cells and this d; only ℤ --±1--> ℤ on one side of A is left out."""
    cells, shapes = in_new_basis(pair), cells_of(pair.shapes)
    found = Counter(described(piece, cells) for piece in pieces_of(cells) if not is_acyclic(piece, cells))
    assert found == Counter(described(piece, shapes) for piece in pieces_of(shapes))


@given(own_pairs() | twisted_pairs())
def test_the_shapes_alone_give_the_homology_of_a_and_x_and_both(pair: Pair) -> None:
    """Leaving out acyclic summands changes none of H(A), H(X) and H(X, A), by Smith forms of FLINT."""
    assert homology_of_a_and_x_and_both(cells_of(pair.shapes)) == homology_of_a_and_x_and_both(given_cells(pair))


@given(own_pairs(torsion=False))
def test_where_homology_is_free_no_summand_is_large(pair: Pair) -> None:
    """With H(A) and H(X, A) free the connecting homomorphism is diagonal in some basis, and nothing else is left."""
    inside, _, relative = homology_of_a_and_x_and_both(given_cells(pair))
    assert not any(torsion for groups in (inside, relative) for _, torsion in groups.values())
    assert all(isinstance(shape.tag, int) for shape in pair.shapes)


@given(twisted_pairs())
def test_a_pair_that_cannot_come_apart_keeps_a_large_summand(pair: Pair) -> None:
    """In a sum of summands e, t the connecting homomorphism reaches no torsion but 0; here it does."""
    assert any(not isinstance(shape.tag, int) for shape in pair.shapes)


# -- pairs over simplices -----------------------------------------------------------------------


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
