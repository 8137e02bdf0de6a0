from __future__ import annotations

import pytest

from certify.errors import InternalError
from certify.exact import diagonalise
from certify.exact.smith import Matrix, inverse

BIG = 10**50


@pytest.mark.parametrize(
    ("matrix", "expected"),
    [
        ([], []),
        ([[1]], [[1]]),
        # Determinant -1, where inv(integer=True) of python-flint 0.9 gives the negative of the inverse.
        ([[-1]], [[-1]]),
        ([[0, 1], [1, 0]], [[0, 1], [1, 0]]),
        ([[2, 3], [1, 1]], [[-1, 3], [1, -2]]),
        ([[1, 0, 0], [0, 1, 0], [0, 0, -1]], [[1, 0, 0], [0, 1, 0], [0, 0, -1]]),
        ([[1, 2], [3, 5]], [[-5, 2], [3, -1]]),
        # Determinant 1.
        ([[2, 1], [1, 1]], [[1, -1], [-1, 2]]),
        ([[0, 1, 0], [0, 0, 1], [1, 0, 0]], [[0, 0, 1], [1, 0, 0], [0, 1, 0]]),
        # Large entries, both signs of the determinant.
        ([[1, BIG], [0, 1]], [[1, -BIG], [0, 1]]),
        ([[BIG, 1], [BIG**2 + 1, BIG]], [[-BIG, 1], [BIG**2 + 1, -BIG]]),
    ],
)
def test_inverses(matrix: Matrix, expected: Matrix) -> None:
    assert inverse(matrix) == expected


@pytest.mark.parametrize("matrix", [[[0]], [[1, 2], [2, 4]], [[1, 1, 0], [0, 1, 1], [1, 2, 1]]])
def test_a_singular_matrix_has_no_inverse(matrix: Matrix) -> None:
    with pytest.raises(InternalError, match="singular"):
        inverse(matrix)


@pytest.mark.parametrize("matrix", [[[2]], [[-3]], [[1, 1], [1, -1]], [[BIG, 1], [1, BIG]]])
def test_a_matrix_of_another_determinant_has_no_integer_inverse(matrix: Matrix) -> None:
    with pytest.raises(InternalError, match="not unimodular"):
        inverse(matrix)


@pytest.mark.parametrize(
    ("matrix", "entries"),
    [
        ([[0]], ()),
        ([[0, 0, 0]], ()),
        ([[0], [0]], ()),
        ([[-6]], (6,)),
        ([[6, 10, 15]], (1,)),
        ([[6], [10], [15]], (1,)),
        ([[6, 10]], (2,)),
        ([[2, 0], [0, 3]], (2, 3)),
        ([[0, 4], [0, 0]], (4,)),
        ([[0, 0, 0], [0, 0, 7]], (7,)),
        ([[2, 4], [4, 8]], (2,)),
        ([[BIG, BIG + 1]], (1,)),
        ([[BIG, 0], [0, BIG]], (BIG, BIG)),
    ],
)
def test_diagonal_entries(matrix: Matrix, entries: tuple[int, ...]) -> None:
    """Only their sum of cyclic groups is promised; in these examples there is one way to write it, or a natural one."""
    form = diagonalise(matrix)
    assert form.entries == entries
    assert len(form.left) == len(matrix)
    assert len(form.right) == len(matrix[0])


def test_the_identity_that_holds() -> None:
    """M · right = left · D, by hand for a row: (4, 6) · right = (2, 0)."""
    form = diagonalise([[4, 6]])
    (a, b), (c, d) = form.right
    assert [4 * a + 6 * c, 4 * b + 6 * d] == [2 * form.left[0][0], 0]
    assert abs(a * d - b * c) == abs(form.left[0][0]) == 1
