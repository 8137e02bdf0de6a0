"""Laws of diagonal forms and inverses of dense integer matrices."""

from __future__ import annotations

from flint import fmpz_mat
from hypothesis import assume, given

from certify.exact import AbelianGroup, diagonalise
from certify.exact.smith import Matrix, inverse
from tests.strategies import integer_matrices, unimodular_matrices


def _product(left: Matrix, right: Matrix) -> Matrix:
    return [
        [sum(a * b for a, b in zip(row, column, strict=True)) for column in zip(*right, strict=True)] for row in left
    ]


def _identity(size: int) -> Matrix:
    return [[int(i == j) for j in range(size)] for i in range(size)]


@given(integer_matrices())
def test_the_transformations_are_unimodular_and_diagonalise(matrix: Matrix) -> None:
    """M · right = left · D."""
    form = diagonalise(matrix)
    rows, columns = len(matrix), len(matrix[0])
    diagonal = [
        [form.entries[i] if i == j and i < len(form.entries) else 0 for j in range(columns)] for i in range(rows)
    ]
    assert all(entry > 0 for entry in form.entries)
    assert abs(int(fmpz_mat(form.left).det())) == 1
    assert abs(int(fmpz_mat(form.right).det())) == 1
    assert _product(matrix, form.right) == _product(form.left, diagonal)


@given(integer_matrices())
def test_the_cokernel_is_that_of_the_smith_form(matrix: Matrix) -> None:
    """The entries need not divide one another, but they present the same group as the invariant factors do."""
    smith = fmpz_mat(matrix).snf()
    factors = [int(smith[i, i]) for i in range(min(len(matrix), len(matrix[0])))]
    entries = diagonalise(matrix).entries
    assert AbelianGroup.of(0, entries) == AbelianGroup.of(0, [factor for factor in factors if factor])
    assert len(entries) == sum(1 for factor in factors if factor)


@given(unimodular_matrices())
def test_an_inverse_is_one_on_both_sides(matrix: Matrix) -> None:
    one = _identity(len(matrix))
    assert _product(matrix, inverse(matrix)) == one
    assert _product(inverse(matrix), matrix) == one


@given(unimodular_matrices())
def test_an_inverse_keeps_its_sign_when_the_determinant_is_minus_one(matrix: Matrix) -> None:
    assume(matrix)
    negative = fmpz_mat(matrix).det() < 0
    turned = matrix if negative else [[-entry for entry in matrix[0]], *matrix[1:]]
    assert int(fmpz_mat(turned).det()) == -1
    assert _product(turned, inverse(turned)) == _identity(len(matrix))
