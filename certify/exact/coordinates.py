"""Coordinates of vectors in an adapted basis."""

from __future__ import annotations

from collections.abc import Iterable
from heapq import heapify, heappop, heappush

from certify.exact.adapted import AdaptedBasis
from certify.exact.complexes import BasedComplex
from certify.exact.vectors import Entries, Vector, add_multiple, combination

__all__ = ["Coordinates"]


class Coordinates:
    """The basis of one degree, in which vectors are expanded along its staircase.

    Parameters
    ----------
    complex_ : BasedComplex
    basis : AdaptedBasis
        An adapted basis of the complex.
    degree : int

    Notes
    -----
    A cycle is a boundary up to torsion plus the sum of its coordinates times the cycles of the basis; so these
    coordinates are those of its class in homology modulo torsion.

    Examples
    --------
    >>> from certify.exact import adapted_basis
    >>> circle = BasedComplex.from_columns([[(), ()], [[(0, -1), (1, 1)], [(1, 1), (0, -1)]]])
    >>> basis = adapted_basis(circle)
    >>> cycles = basis.degrees[1].cycles
    >>> Coordinates(circle, basis, 1).of(((0, 3), (1, -3))) in {(3,), (-3,)}, len(cycles)
    (True, 1)
    """

    def __init__(self, complex_: BasedComplex, basis: AdaptedBasis, degree: int) -> None:
        own = basis.degrees[degree]
        above = basis.degrees[degree + 1 : degree + 2]
        # The order in which the inverses of groups count the vectors.
        family: list[Entries] = [((cell, 1),) for cell in own.matched]
        family += [pair.a for pair in own.pairs] + list(own.cycles)
        family += [complex_.boundaries[degree + 1][cell] for part in above for cell in part.matched]
        family += [pair.b for part in above for pair in part.pairs]
        self._family = family
        self._cycles = range(len(own.matched) + len(own.pairs), len(own.matched) + len(own.pairs) + len(own.cycles))
        self._order = own.layout.order or tuple(reversed(range(complex_.sizes[degree])))
        self._place = {cell: place for place, cell in enumerate(self._order)}
        self._group = {cell: group for group in own.layout.groups for cell in group.cells}
        self._led: dict[int, list[int]] = {}
        for number, vector in enumerate(family):
            lead = min((cell for cell, _ in vector), key=self._place.__getitem__)
            self._led.setdefault(self._cells(lead)[0], []).append(number)

    def of(self, vector: Iterable[tuple[int, int]]) -> tuple[int, ...]:
        """Return the coordinates of a vector at the cycles of the basis."""
        rest = combination([(1, vector)])
        found: dict[int, int] = {}
        waiting = [self._place[cell] for cell in rest]
        heapify(waiting)
        while waiting:
            cell = self._order[heappop(waiting)]
            if cell in rest:
                for number, coefficient in self._solved(cell, rest):
                    found[number] = coefficient
                    add_multiple(rest, -coefficient, self._family[number])
                    for other, _ in self._family[number]:
                        heappush(waiting, self._place[other])
        return tuple(found.get(number, 0) for number in self._cycles)

    def _cells(self, cell: int) -> tuple[int, ...]:
        """Return the cells that are leads together with a cell."""
        return self._group[cell].cells if cell in self._group else (cell,)

    def _solved(self, cell: int, rest: Vector) -> list[tuple[int, int]]:
        """Return the vectors that these cells lead, with the coefficients that the rest has at them."""
        cells = self._cells(cell)
        numbers = self._led[cells[0]]
        if cell not in self._group:
            return [(numbers[0], rest[cell] * dict(self._family[numbers[0]])[cell])]
        values = [rest.get(other, 0) for other in cells]
        rows = self._group[cell].inverse
        return [(n, sum(x * y for x, y in zip(row, values, strict=True))) for n, row in zip(numbers, rows, strict=True)]
