"""The direct route: the cellular chain complex of the whole product."""

from __future__ import annotations

from itertools import product as choices

from certify.exact import BasedComplex, Entries, entries
from certify.products.pairs import DiscPair
from certify.products.space import PolyhedralProduct

__all__ = ["cell_complex"]

_POINT, _LOWER, _UPPER = range(3)
"""The cells of a disc pair: a point, the cell t of the sphere (for n = 1 its other point), the cell e of the disc."""

_Cell = tuple[int, ...]


def cell_complex(space: PolyhedralProduct, top: int | None = None) -> BasedComplex:
    """Return the cellular chain complex of (X, A)^K.

    Parameters
    ----------
    space : PolyhedralProduct
    top : int, optional
        Leave out cells of larger degree.

    Notes
    -----
    Cells are tuples with a cell of X_i for each vertex i; those vertices whose cell is outside A_i form a face of K. In
    each degree they are ordered by that face as a bit mask, then by the mask of the vertices with cell t. The boundary is the Leibniz rule with sign
    (-1)^(degree of the factors before). The number of cells is Σ_σ 2^(m - |σ|).
    """
    degrees: dict[int, list[_Cell]] = {0: []}
    for mask in space.complex.face_masks():
        options = [(_UPPER,) if mask >> i & 1 else (_POINT, _LOWER) for i in range(len(space.pairs))]
        least = sum(pair.n for i, pair in enumerate(space.pairs) if mask >> i & 1)
        if top is not None and least > top:
            continue
        for cell in choices(*options):
            degree = sum(_degree(pair, letter) for pair, letter in zip(space.pairs, cell, strict=True))
            if top is None or degree <= top:
                degrees.setdefault(degree, []).append(cell)
    boundaries: list[tuple[Entries, ...]] = []
    below: dict[_Cell, int] = {}
    for degree in range(max(degrees) + 1):
        cells = sorted(degrees.get(degree, []), key=_masks)
        boundaries.append(tuple(_boundary(space, cell, below) for cell in cells))
        below = {cell: number for number, cell in enumerate(cells)}
    return BasedComplex(tuple(boundaries))


def _masks(cell: _Cell) -> tuple[int, int]:
    """Return the vertices with cell e, and those with cell t, as bit masks."""
    uppers = sum(1 << place for place, letter in enumerate(cell) if letter == _UPPER)
    return uppers, sum(1 << place for place, letter in enumerate(cell) if letter == _LOWER)


def _degree(pair: DiscPair, letter: int) -> int:
    return (0, pair.n - 1, pair.n)[letter]


def _boundary(space: PolyhedralProduct, cell: _Cell, below: dict[_Cell, int]) -> Entries:
    """Return d of a cell: d e = t, and for (D¹, S⁰) d e = 1 - 0."""
    terms: dict[int, int] = {}
    sign = 1
    for place, (pair, letter) in enumerate(zip(space.pairs, cell, strict=True)):
        if letter == _UPPER:
            terms[below[(*cell[:place], _LOWER, *cell[place + 1 :])]] = sign
            if pair.n == 1:
                terms[below[(*cell[:place], _POINT, *cell[place + 1 :])]] = -sign
        if _degree(pair, letter) % 2:
            sign = -sign
    return entries(terms)
