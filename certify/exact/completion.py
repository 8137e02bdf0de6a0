"""Completing some vectors to a basis of the lattice on a few cells."""

from __future__ import annotations

from collections.abc import Sequence

from certify.errors import InternalError
from certify.exact.smith import hermite_transformation, inverse
from certify.exact.vectors import Vector, add_multiple

__all__ = ["completion"]


def completion(vectors: Sequence[Vector]) -> tuple[list[int], list[Vector]]:
    """Return cells, and vectors on them, that complete a basis of a direct summand of a lattice ℤ^n.

    Parameters
    ----------
    vectors : sequence of Vector
        A basis of a direct summand: they can be completed to a basis of ℤ^n.

    Returns
    -------
    tuple
        Cells L and vectors u on them, as many cells as `vectors` and u together: these vectors and the single cells
        outside L are a basis of ℤ^n.

    Raises
    ------
    InternalError
        If the vectors are no basis of a direct summand.

    Notes
    -----
    A cell on which a vector has ±1 becomes its lead, and is cleared from the others. Only where no vector has an entry
    ±1 any more is a Hermite form needed, of as few cells as suffice.

    Examples
    --------
    >>> completion([{0: 2, 1: 1}])
    ([1], [])
    >>> cells, more = completion([{0: 2, 1: 3}])
    >>> sorted(cells), len(more)
    ([0, 1], 1)
    """
    rest = [dict(vector) for vector in vectors]
    cells: list[int] = []
    while unit := _shortest_with_unit(rest):
        pivot, cell = unit
        rest.remove(pivot)
        cells.append(cell)
        for vector in rest:
            if cell in vector:
                add_multiple(vector, -vector[cell] * pivot[cell], list(pivot.items()))
    if not rest:
        return cells, []
    more, carried = _by_hermite_form(rest)
    return cells + more, carried


def _shortest_with_unit(vectors: list[Vector]) -> tuple[Vector, int] | None:
    """Return the shortest vector with an entry ±1, and the largest cell of such an entry."""
    for vector in sorted(vectors, key=len):
        units = [cell for cell, x in vector.items() if x in (1, -1)]
        if units:
            return vector, max(units)
    return None


def _by_hermite_form(vectors: list[Vector]) -> tuple[list[int], list[Vector]]:
    """Complete vectors without units: on more and more cells, until these span the summand."""
    available = sorted({cell for vector in vectors for cell in vector}, reverse=True)
    width = len(vectors)
    for count in range(width, len(available) + 1):
        cells = available[:count]
        form, moves = hermite_transformation([[vector.get(cell, 0) for vector in vectors] for cell in cells])
        if all(form[i][i] == 1 for i in range(width)):
            back = inverse(moves)
            columns = range(width, count)
            return cells, [{cell: back[i][j] for i, cell in enumerate(cells) if back[i][j]} for j in columns]
    raise InternalError("vectors are no basis of a direct summand; please report the sheet that led here")
