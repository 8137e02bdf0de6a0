"""Dense boundary matrices of polyhedral products, made here from the definition and with no help from the package."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from itertools import combinations, product

__all__ = ["Matrix", "PairCells", "boundary_matrices", "homology_from_factors", "matrices_of_pairs"]

Matrix = list[list[int]]
Cell = tuple[str, ...]


def boundary_matrices(facets: Sequence[Sequence[int]], discs: Sequence[int]) -> tuple[list[int], list[Matrix]]:
    """Return the number of cells in each degree, and the matrix of d from each degree to the one below.

    Vertices are 0, 1, 2, …, with the pair (Dⁿ, Sⁿ⁻¹) for the n given at each. The cells of (D¹, S⁰) are "left", "right"
    and "edge"; those of larger discs "point", "sphere" and "disc".
    """
    faces = {
        frozenset(face) for facet in facets for size in range(len(facet) + 1) for face in combinations(facet, size)
    }
    cells: dict[int, list[Cell]] = {}
    for cell in product(*(_letters(n) for n in discs)):
        if frozenset(i for i, letter in enumerate(cell) if letter in ("edge", "disc")) in faces:
            cells.setdefault(_degree(cell, discs), []).append(cell)
    sizes = [len(cells.get(degree, [])) for degree in range(max(cells) + 1)]
    matrices = []
    for degree in range(len(sizes)):
        rows = {cell: number for number, cell in enumerate(cells.get(degree - 1, []))}
        matrix = [[0] * sizes[degree] for _ in rows]
        for column, cell in enumerate(cells.get(degree, [])):
            for face, coefficient in _boundary(cell, discs):
                matrix[rows[face]][column] = coefficient
        matrices.append(matrix)
    return sizes, matrices


def homology_from_factors(
    sizes: Sequence[int], factors: Sequence[Sequence[int]]
) -> dict[int, tuple[int, tuple[int, ...]]]:
    """Return rank and torsion in each degree with homology, from the non-zero invariant factors of each boundary."""
    groups = {}
    for degree, size in enumerate(sizes):
        above = factors[degree + 1] if degree + 1 < len(sizes) else ()
        rank = size - len(factors[degree]) - len(above)
        torsion = tuple(sorted(factor for factor in above if factor > 1))
        if rank or torsion:
            groups[degree] = (rank, torsion)
    return groups


def _letters(n: int) -> tuple[str, str, str]:
    return ("edge", "right", "left") if n == 1 else ("disc", "sphere", "point")


def _degree(cell: Cell, discs: Sequence[int]) -> int:
    degrees = ({"edge": 1, "disc": n, "sphere": n - 1}.get(letter, 0) for letter, n in zip(cell, discs, strict=True))
    return sum(degrees)


def _boundary(cell: Cell, discs: Sequence[int]) -> Iterator[tuple[Cell, int]]:
    """Yield the boundary by d(x × y) = dx × y + (-1)^deg(x) x × dy, where x is the first letter."""
    if not cell:
        return
    first, rest = cell[:1], cell[1:]
    if first == ("edge",):
        yield ("right", *rest), 1
        yield ("left", *rest), -1
    elif first == ("disc",):
        yield ("sphere", *rest), 1
    sign = -1 if _degree(first, discs[:1]) % 2 else 1
    for face, coefficient in _boundary(rest, discs[1:]):
        yield first + face, sign * coefficient


PairCells = Sequence[tuple[int, bool, dict[int, int]]]
"""The cells of a pair (X, A): degree, whether it is outside A, and boundary on the numbers of other cells."""


def matrices_of_pairs(facets: Sequence[Sequence[int]], pairs: Sequence[PairCells]) -> tuple[list[int], list[Matrix]]:
    """Return the same as `boundary_matrices` for any pairs; vertices are 0, 1, 2, …."""
    faces = {
        frozenset(face) for facet in facets for size in range(len(facet) + 1) for face in combinations(facet, size)
    }
    cells: dict[int, list[tuple[int, ...]]] = {}
    for cell in product(*(range(len(pair)) for pair in pairs)):
        if frozenset(i for i, letter in enumerate(cell) if pairs[i][letter][1]) in faces:
            cells.setdefault(sum(pairs[i][letter][0] for i, letter in enumerate(cell)), []).append(cell)
    sizes = [len(cells.get(degree, [])) for degree in range(max(cells, default=-1) + 1)]
    matrices = []
    for degree in range(len(sizes)):
        rows = {cell: number for number, cell in enumerate(cells.get(degree - 1, []))}
        matrix = [[0] * sizes[degree] for _ in rows]
        for column, cell in enumerate(cells.get(degree, [])):
            before = 0
            for i, letter in enumerate(cell):
                for end, coefficient in pairs[i][letter][2].items():
                    matrix[rows[(*cell[:i], end, *cell[i + 1 :])]][column] += (-1) ** before * coefficient
                before += pairs[i][letter][0]
        matrices.append(matrix)
    return sizes, matrices
