"""Real toric spaces: the quotient of (D¹, S⁰)^K by the kernel of λ: (ℤ/2)^m → (ℤ/2)^n.

The quotient is made of a chamber for each value of λ, glued along mirrors. A cell is a face with a value g; (face, g)
and (face, g + λ_i) for a vertex i of the face are the same cell with opposite orientations.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property

from certify.errors import BadInput
from certify.exact import BasedComplex, Entries, entries
from certify.simplicial.complexes import SimplicialComplex

__all__ = ["RealToricSpace"]

_Cell = tuple[int, int]


@dataclass(frozen=True)
class RealToricSpace:
    """The space (D¹, S⁰)^K / ker λ.

    Parameters
    ----------
    complex : SimplicialComplex
    rows : tuple of str
        λ by rows, a digit 0 or 1 for each vertex in the order of the labels.
    top : int or None
        Leave out cells of larger degree.

    Raises
    ------
    BadInput
        If a row does not fit, or λ is not injective on the vertices of a face; the face is named.

    Notes
    -----
    Where λ is injective on the vertices of each face, ker λ acts freely. For λ onto there are Σ f_{k-1} 2^{n-k} cells.

    References
    ----------
    M. W. Davis, T. Januszkiewicz, Convex polytopes, Coxeter orbifolds and torus actions, 1991 (from memory).
    """

    complex: SimplicialComplex
    rows: tuple[str, ...]
    top: int | None = None

    def __post_init__(self) -> None:
        """Refuse a λ that does not fit or is not injective on a face."""
        for number, row in enumerate(self.rows, 1):
            if len(row) != self.complex.vertex_count or set(row) - {"0", "1"}:
                expected = f"a digit 0 or 1 for each of the {self.complex.vertex_count} vertices"
                raise BadInput(where=f"row {number} of λ", expected=expected, found=repr(row))
        for facet in self.complex.facets:
            if len(_reduced([self.columns[vertex] for vertex in facet])) < len(facet):
                labels = " ".join(str(self.complex.labels[vertex]) for vertex in facet)
                raise BadInput(where="λ", expected="a map that is injective on each face", found=f"the face {labels}")

    @cached_property
    def columns(self) -> list[int]:
        """The values λ_i as bit masks, bit n for row n."""
        return [
            sum(1 << n for n, row in enumerate(self.rows) if row[vertex] == "1")
            for vertex in range(self.complex.vertex_count)
        ]

    def chains(self) -> BasedComplex:
        """Return the cellular chain complex; in each degree cells are ordered by the face as a mask, then by g."""
        values = [0]
        for column in self.columns:
            values += [value ^ column for value in values] if column not in values else []
        values.sort()
        bases = {mask: _reduced(self._of(mask)) for mask in self.complex.face_masks()}
        degrees: list[list[_Cell]] = []
        for mask, basis in bases.items():
            size = mask.bit_count()
            if self.top is None or size <= self.top:
                degrees += [[]] if size == len(degrees) else []
                pivots = sum(pivot for pivot, _, _ in basis)
                degrees[size] += [(mask, value) for value in values if not value & pivots]
        boundaries: list[tuple[Entries, ...]] = []
        below: dict[_Cell, int] = {}
        for cells in degrees:
            boundaries.append(tuple(self._boundary(cell, bases, below) for cell in cells))
            below = {cell: number for number, cell in enumerate(cells)}
        return BasedComplex(tuple(boundaries))

    def _of(self, mask: int) -> list[int]:
        return [column for vertex, column in enumerate(self.columns) if mask >> vertex & 1]

    def _boundary(self, cell: _Cell, bases: dict[int, list[tuple[int, int, int]]], below: dict[_Cell, int]) -> Entries:
        """Return d of a cell: at each vertex of the face, with alternating signs, the end at g + λ_i minus g."""
        mask, value = cell
        terms: dict[int, int] = {}
        sign = 1
        for vertex, column in enumerate(self.columns):
            if mask >> vertex & 1:
                face = mask ^ 1 << vertex
                for end, orientation in ((value ^ column, sign), (value, -sign)):
                    representative, parity = _representative(end, bases[face])
                    place = below[face, representative]
                    terms[place] = terms.get(place, 0) + orientation * parity
                sign = -sign
        return entries({place: x for place, x in terms.items() if x})


def _representative(value: int, basis: Sequence[tuple[int, int, int]]) -> tuple[int, int]:
    """Return the value without bits among the pivots that stands for the same cell, and the orientation."""
    parity = 1
    for pivot, vector, sign in basis:
        if value & pivot:
            value ^= vector
            parity *= sign
    return value, parity


def _reduced(columns: Sequence[int]) -> list[tuple[int, int, int]]:
    """Return a basis of the span of these vectors: (pivot bit, vector, -1 to the number of columns in it).

    Each pivot bit is in one vector only. The basis is shorter than `columns` if these are dependent.
    """
    basis: list[tuple[int, int, int]] = []
    for column in columns:
        value, parity = _representative(column, basis)
        if value:
            bit, sign = value & -value, -parity
            basis = [(p, v ^ value, s * sign) if v & bit else (p, v, s) for p, v, s in basis] + [(bit, value, sign)]
    return basis
