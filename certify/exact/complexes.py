"""Finite complexes of free abelian groups with a numbered basis of cells in each degree."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass

from certify.errors import BadInput
from certify.exact.vectors import Entries, combination, entries

__all__ = ["BasedComplex"]


@dataclass(frozen=True, slots=True)
class BasedComplex:
    """A complex C_top → … → C_1 → C_0 over ℤ, free with a numbered basis in each degree.

    Parameters
    ----------
    boundaries : tuple of tuples of Entries
        ``boundaries[k][i]`` is d of cell i of degree k, a vector on the cells of degree k - 1;
        in degree 0 every boundary is empty. Degrees start at 0: a complex that starts elsewhere is shifted.

    Notes
    -----
    The constructor trusts its caller; `from_columns` checks everything, d d = 0 included.
    """

    boundaries: tuple[tuple[Entries, ...], ...]

    @classmethod
    def from_columns(cls, degrees: Iterable[Iterable[Iterable[tuple[int, int]]]]) -> BasedComplex:
        """Return the complex with these boundaries, made canonical and checked.

        Raises
        ------
        BadInput
            If a boundary leaves the cells of the degree below, or if d d is not zero; the cell is named.

        Examples
        --------
        >>> circle = BasedComplex.from_columns([[(), ()], [[(0, -1), (1, 1)], [(1, 1), (0, -1)]]])
        >>> circle.sizes
        (2, 2)
        """
        boundaries = tuple(tuple(entries(combination([(1, tuple(column))])) for column in degree) for degree in degrees)
        complex_ = cls(boundaries)
        complex_._check()
        return complex_

    def _check(self) -> None:
        """Raise BadInput where this is no complex."""
        below: Sequence[Entries] = ()
        for degree, columns in enumerate(self.boundaries):
            for number, column in enumerate(columns):
                where = f"cell {number} of degree {degree}"
                outside = [place for place, _ in column if not 0 <= place < len(below)]
                if outside:
                    raise BadInput(
                        where=where,
                        expected=f"a boundary on the {len(below)} cells of degree {degree - 1}",
                        found=f"cell {outside[0]} in it",
                    )
                if combination((coefficient, below[place]) for place, coefficient in column):
                    raise BadInput(where=where, expected="a boundary whose own boundary is zero", found="another")
            below = columns

    @property
    def sizes(self) -> tuple[int, ...]:
        """The number of cells in each degree."""
        return tuple(len(columns) for columns in self.boundaries)

    def dense(self, degree: int) -> list[list[int]]:
        """Return the matrix of d from `degree` to ``degree - 1``: one row for each cell below, one column a cell.

        Examples
        --------
        >>> BasedComplex.from_columns([[()], [[(0, 2)]]]).dense(1)
        [[2]]
        """
        columns = self.boundaries[degree]
        rows = [[0] * len(columns) for _ in range(self.sizes[degree - 1] if degree else 0)]
        for j, column in enumerate(columns):
            for i, coefficient in column:
                rows[i][j] = coefficient
        return rows
