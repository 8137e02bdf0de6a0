from __future__ import annotations

import pytest

from certify.errors import BadInput
from certify.exact import BasedComplex

Columns = list[list[list[tuple[int, int]]]]


@pytest.mark.parametrize(
    ("columns", "sizes"),
    [
        ([], ()),
        ([[]], (0,)),
        ([[], []], (0, 0)),
        ([[[]]], (1,)),
        ([[[], []], [], [[]]], (2, 0, 1)),
    ],
)
def test_complexes_with_few_or_no_cells(columns: Columns, sizes: tuple[int, ...]) -> None:
    assert BasedComplex.from_columns(columns).sizes == sizes


def test_boundaries_become_canonical() -> None:
    given = [[(1, 1), (0, -1)], [(0, 2), (0, -2)], [(1, 3), (0, 1), (1, -4)]]
    complex_ = BasedComplex.from_columns([[[], []], given])
    assert complex_.boundaries == (((), ()), (((0, -1), (1, 1)), (), ((0, 1), (1, -1))))


@pytest.mark.parametrize(
    ("columns", "where", "found"),
    [
        ([[[(0, 1)]]], "cell 0 of degree 0", "cell 0 in it"),
        ([[[]], [[(0, 1)], [(1, 1)]]], "cell 1 of degree 1", "cell 1 in it"),
        ([[[]], [[(-1, 1)]]], "cell 0 of degree 1", "cell -1 in it"),
        ([[], [[(0, 1)]]], "cell 0 of degree 1", "cell 0 in it"),
        ([[[]], [], [[(0, 1)]]], "cell 0 of degree 2", "cell 0 in it"),
        ([[[]], [[(0, 1)]], [[(0, 1)]]], "cell 0 of degree 2", "another"),
        ([[[]], [[(0, 2)], [(0, 3)]], [[(0, 3), (1, -2)], [(0, 3), (1, 2)]]], "cell 1 of degree 2", "another"),
    ],
)
def test_what_is_no_complex_is_refused(columns: Columns, where: str, found: str) -> None:
    with pytest.raises(BadInput) as caught:
        BasedComplex.from_columns(columns)
    assert (caught.value.where, caught.value.found) == (where, found)


def test_large_coefficients() -> None:
    a, b = 10**30 + 1, 10**30 - 1
    complex_ = BasedComplex.from_columns([[[]], [[(0, a)], [(0, b)]], [[(0, b), (1, -a)]]])
    assert complex_.dense(1) == [[a, b]]
    assert complex_.dense(2) == [[b], [-a]]


def test_dense_matrices() -> None:
    complex_ = BasedComplex.from_columns([[[], [], []], [[(0, -1), (2, 1)], []], []])
    assert complex_.dense(0) == []  # 0×3
    assert complex_.dense(1) == [[-1, 0], [0, 0], [1, 0]]
    assert complex_.dense(2) == [[], []]  # 2×0
