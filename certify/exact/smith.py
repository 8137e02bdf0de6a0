"""Diagonal forms of small dense integer matrices with both transformations, through python-flint."""

from __future__ import annotations

from dataclasses import dataclass

from flint import fmpz_mat

from certify.errors import InternalError

__all__ = ["Diagonal", "Matrix", "diagonal_columns", "diagonalise", "hermite_transformation", "inverse"]

Matrix = list[list[int]]

_ROUNDS = 1000


@dataclass(frozen=True, slots=True)
class Diagonal:
    """A diagonal form of an integer matrix M: ``M @ right == left @ D`` with `left` and `right` unimodular.

    Parameters
    ----------
    entries : tuple of int
        The positive diagonal entries of D; behind them D is zero. They need not divide one another.
    left : Matrix
        Square, as many rows as M.
    right : Matrix
        Square, as many rows as M has columns.
    """

    entries: tuple[int, ...]
    left: Matrix
    right: Matrix


def diagonalise(matrix: Matrix) -> Diagonal:
    """Return a diagonal form of a matrix with at least one row and one column.

    Notes
    -----
    Row and column Hermite forms in turn. The form of [M | 1] carries the transformation along: it is
    [H | U] with U M = H and U unimodular. The first diagonal entry only ever gets smaller under
    divisibility, so the turns end. Cost: that of Hermite forms of the matrix, meant for cores of a few
    hundred rows.

    References
    ----------
    R. Kannan, A. Bachem, Polynomial algorithms for computing the Smith and Hermite normal forms of an
    integer matrix, SIAM J. Comput. 8 (1979).

    Examples
    --------
    >>> diagonalise([[2, 4], [6, 8]]).entries
    (2, 4)
    """
    form = fmpz_mat(matrix)
    rows, columns = form.nrows(), form.ncols()
    row_moves, column_moves = _identity(rows), _identity(columns)
    for _ in range(_ROUNDS):
        form, row_moves = _hermite(form, row_moves)
        if form.is_diagonal():
            break
        turned, turned_moves = _hermite(form.transpose(), column_moves.transpose())
        form, column_moves = turned.transpose(), turned_moves.transpose()
        if form.is_diagonal():
            break
    else:
        raise InternalError("a matrix did not become diagonal; please report the sheet that led here")
    rank = form.rank()
    return Diagonal(
        entries=tuple(int(form[i, i]) for i in range(rank)),
        left=inverse(_integers(row_moves)),
        right=_integers(column_moves),
    )


def diagonal_columns(matrix: Matrix) -> tuple[tuple[int, ...], Matrix]:
    """Return diagonal entries e and a unimodular matrix R: column j of ``matrix @ R`` is e_j times a vector b_j.

    The b_j are a basis of a direct summand of the lattice of all columns; behind them ``matrix @ R`` is zero.

    Notes
    -----
    Row operations do not change R, so the matrix is replaced by its Hermite form, which has no more rows than columns.

    Examples
    --------
    >>> diagonal_columns([[2], [4], [6]])
    ((2,), [[1]])
    """
    form = diagonalise([row for row in _integers(fmpz_mat(matrix).hnf()) if any(row)])
    return form.entries, form.right


def inverse(matrix: Matrix) -> Matrix:
    """Return the inverse of a unimodular matrix: ``matrix @ result == 1``.

    Raises
    ------
    InternalError
        If the matrix has no inverse over the integers.

    Examples
    --------
    >>> inverse([[2, 1], [1, 1]])
    [[1, -1], [-1, 2]]
    """
    try:
        # The rational inverse: in python-flint 0.9 inv(integer=True) has the wrong sign for determinant -1.
        table = fmpz_mat(matrix).inv().tolist()
    except ZeroDivisionError as error:
        raise InternalError("a change of basis is singular; please report the sheet that led here") from error
    if any(entry.q != 1 for row in table for entry in row):
        raise InternalError("a change of basis is not unimodular; please report the sheet that led here")
    return [[int(entry.p) for entry in row] for row in table]


def hermite_transformation(matrix: Matrix) -> tuple[Matrix, Matrix]:
    """Return the row Hermite form H of a matrix, and a unimodular U with ``U @ matrix == H``."""
    form = fmpz_mat(matrix)
    hermite, moves = _hermite(form, _identity(form.nrows()))
    return _integers(hermite), _integers(moves)


def _identity(size: int) -> fmpz_mat:
    return fmpz_mat(size, size, [int(i == j) for i in range(size) for j in range(size)])


def _hermite(form: fmpz_mat, moves: fmpz_mat) -> tuple[fmpz_mat, fmpz_mat]:
    """Return the Hermite form of `form`, and `moves` under the same row operations."""
    wide = fmpz_mat([left + right for left, right in zip(form.tolist(), moves.tolist(), strict=True)]).hnf()
    split = form.ncols()
    table = wide.tolist()
    return fmpz_mat([row[:split] for row in table]), fmpz_mat([row[split:] for row in table])


def _integers(matrix: fmpz_mat) -> Matrix:
    return [[int(entry) for entry in row] for row in matrix.tolist()]
