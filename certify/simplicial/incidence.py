"""Simple and simplicial polytopes by the incidence of their vertices and facets."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from certify.errors import BadInput
from certify.simplicial.arguments import items
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.masks import mask_of
from certify.simplicial.recognition import is_pseudomanifold

__all__ = ["from_incidence"]


def from_incidence(rows: Iterable[Iterable[object]]) -> SimplicialComplex:
    """Return the boundary of a simplicial polytope, or of the dual of a simple one.

    Parameters
    ----------
    rows : iterable of rows
        A matrix with a row for each vertex and a column for each facet of a polytope of dimension d >= 1; an entry is
        1 when the vertex lies on the facet, and 0 when not. A row is a text of digits such as ``"0110"``, or a list of
        numbers.

    Returns
    -------
    SimplicialComplex
        If every facet has d vertices: the boundary of the polytope, with its vertices labelled 1, 2, ... by row.
        Otherwise, if every vertex lies on d facets: the boundary of the dual polytope, with the facets labelled
        1, 2, ... by column.

    Raises
    ------
    BadInput
        If an entry is neither 0 nor 1, the rows differ in length, the polytope is neither simple nor simplicial (the
        message names a row and a column), or there is no such polytope, as far as counting can tell.

    Notes
    -----
    The dimension is the length of a chain of faces that starts with the polytope and goes on from each face to one of
    its facets: a largest intersection with a facet of the polytope that does not contain it.

    The transpose of the matrix belongs to the dual polytope, so it gives the same complex, unless the polytope is
    both simple and simplicial; then it is a simplex or a polygon, and the two complexes are isomorphic.

    That the result is a pseudomanifold is checked. Whether it bounds a convex polytope is not: no quick way is known.

    References
    ----------
    G. M. Ziegler, Lectures on Polytopes, Springer 1995, section 2.5 and proposition 2.16 (from memory).

    Examples
    --------
    A prism over a triangle, which has three sides, a bottom and a top:

    >>> print(from_incidence(["11010", "10110", "01110", "11001", "10101", "01101"]))
    5 vertices, facets 124 125 134 135 234 235
    """
    matrix = _matrix(rows)
    by_row = [mask_of(j for j, entry in enumerate(row) if entry) for row in matrix]
    by_column = [mask_of(i for i, entry in enumerate(column) if entry) for column in zip(*matrix, strict=True)]
    dimension = _dimension(len(by_row), by_column)
    if all(facet.bit_count() == dimension for facet in by_column):
        return _boundary(len(by_row), by_column)
    if all(facet.bit_count() == dimension for facet in by_row):
        return _boundary(len(by_column), by_row)
    row, column = _first_other_than(dimension, by_row), _first_other_than(dimension, by_column)
    raise BadInput(
        where="incidence",
        expected=f"{dimension} ones in each row, for a simple polytope of dimension {dimension}, or in each column, "
        "for a simplicial one",
        found=f"{by_row[row].bit_count()} in row {row + 1} and {by_column[column].bit_count()} in column {column + 1}",
    )


def _matrix(rows: Iterable[Iterable[object]]) -> list[list[bool]]:
    matrix: list[list[bool]] = []
    for number, row in enumerate(items(rows, "incidence"), start=1):
        where = f"row {number}"
        entries = list(row) if isinstance(row, str) else list(items(row, where))
        for place, entry in enumerate(entries, start=1):
            if entry not in (0, 1, "0", "1"):
                raise BadInput(where=where, expected="digits 0 and 1", found=f"{entry!r} in column {place}")
        if matrix and len(entries) != len(matrix[0]):
            raise BadInput(where=where, expected=f"{len(matrix[0])} entries like row 1", found=str(len(entries)))
        matrix.append([entry in (1, "1") for entry in entries])
    if not matrix or not matrix[0]:
        raise BadInput(where="incidence", expected="at least one row and one column", found="none")
    return matrix


def _dimension(vertices: int, facets: Sequence[int]) -> int:
    """Return the dimension of a polytope with facets given as masks of vertices."""
    face, steps = (1 << vertices) - 1, 0
    while face:
        smaller = [face & facet for facet in facets if face & ~facet]
        if not smaller:
            row = (face & -face).bit_length()
            raise BadInput(where=f"row {row}", expected="a vertex that lies not on every facet", found="only ones")
        face, steps = max(smaller, key=int.bit_count), steps + 1
    # The chain ends with a vertex, of dimension 0, and the empty face.
    return steps - 1


def _boundary(vertices: int, facets: Sequence[int]) -> SimplicialComplex:
    """Return the complex on 1, 2, ... with the given facets, if it can be the boundary of a polytope."""
    k = SimplicialComplex.from_masks(range(1, vertices + 1), facets)
    if len(k.facets) < len(facets) or k.ghosts() or not is_pseudomanifold(k):
        found = "facets that do not close up"
        raise BadInput(where="incidence", expected="the vertices and facets of a polytope", found=found)
    return k


def _first_other_than(size: int, masks: Sequence[int]) -> int:
    """Return the number of the first mask that has not the given size."""
    return next(number for number, mask in enumerate(masks) if mask.bit_count() != size)
