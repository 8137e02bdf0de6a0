"""An independent check of adapted bases: Lemmas A and B word by word, on dense matrices and by determinants."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from flint import fmpz_mat

from certify.exact import AdaptedBasis, AdaptedDegree, BasedComplex, Entries

__all__ = ["check_adapted_basis"]

Dense = list[int]


def check_adapted_basis(complex_: BasedComplex, basis: AdaptedBasis) -> None:
    """Raise AssertionError, with the condition that fails, unless this is an adapted basis with its staircase."""
    sizes = [len(columns) for columns in complex_.boundaries]
    _require(len(basis.degrees) == len(sizes), "one part for each degree")
    from_above: list[Dense] = []
    for degree in reversed(range(len(sizes))):
        part = basis.degrees[degree]
        size, below = sizes[degree], sizes[degree - 1] if degree else 0
        columns = [_dense(column, below) for column in complex_.boundaries[degree]]
        _require(list(part.matched) == sorted(set(part.matched)), "matched cells ascend")
        matched = [_dense([(cell, 1)], size) for cell in part.matched]
        cycles = [_dense(cycle, size) for cycle in part.cycles]
        boundaries = [_boundary(vector, columns, below) for vector in matched]
        for pair in part.pairs:
            a, b = _dense(pair.a, size), _dense(pair.b, below)
            _require(pair.e >= 1, "e is at least 1")
            _require(_boundary(a, columns, below) == [pair.e * entry for entry in b], "d a = e b")
            matched.append(a)
            boundaries.append(b)
        _require(all(not any(_boundary(cycle, columns, below)) for cycle in cycles), "d z = 0")
        family = matched + cycles + from_above
        _require(len(family) == size, "as many vectors as cells")
        _require(_is_unimodular(family), "the vectors are a basis")
        _check_staircase(size, family, part)
        from_above = boundaries
    _require(not from_above, "nothing bounds below degree 0")


def _check_staircase(size: int, family: Sequence[Dense], part: AdaptedDegree) -> None:
    """Check Lemma B for the arrangement that comes with the basis of one degree."""
    order = list(reversed(range(size))) if part.layout.order is None else list(part.layout.order)
    _require(sorted(order) == list(range(size)), "the order lists each cell once")
    inverses = {group.cells: group.inverse for group in part.layout.groups}
    _require(all(len(cells) > 1 for cells in inverses), "a listed group has two cells or more")
    grouped = [cell for cells in inverses for cell in cells]
    _require(len(set(grouped)) == len(grouped), "groups are disjoint")
    steps = _steps(order, list(inverses))
    step_of = {cell: number for number, cells in enumerate(steps) for cell in cells}
    members: list[list[Dense]] = [[] for _ in steps]
    for vector in family:
        members[min(step_of[cell] for cell, entry in enumerate(vector) if entry)].append(vector)
    for cells, vectors in zip(steps, members, strict=True):
        _require(len(vectors) == len(cells), "a group has as many vectors as cells")
        square = [[vector[cell] for vector in vectors] for cell in cells]
        _require(abs(int(fmpz_mat(square).det())) == 1, "a group is unimodular on its own cells")
        if cells in inverses:
            one = [[int(i == j) for j in range(len(cells))] for i in range(len(cells))]
            _require(fmpz_mat(inverses[cells]) * fmpz_mat(square) == fmpz_mat(one), "the inverse is one")


def _steps(order: list[int], groups: list[tuple[int, ...]]) -> list[tuple[int, ...]]:
    """Cut the order into the groups, which must stand in it one after the other, and the cells between them."""
    steps: list[tuple[int, ...]] = []
    place = 0
    for group in [*groups, ()]:
        while place < len(order) and (not group or order[place] != group[0]):
            steps.append((order[place],))
            place += 1
        _require(tuple(order[place : place + len(group)]) == group, "a group is a run of the order")
        if group:
            steps.append(group)
            place += len(group)
    return steps


def _dense(vector: Entries | Iterable[tuple[int, int]], size: int) -> Dense:
    """Return the dense form of a sparse vector, after checking that it is in canonical form."""
    terms = list(vector)
    cells = [cell for cell, _ in terms]
    _require(cells == sorted(set(cells)) and all(0 <= cell < size for cell in cells), "cells ascend and exist")
    _require(all(entry for _, entry in terms), "no zero is stored")
    dense = [0] * size
    for cell, entry in terms:
        dense[cell] = entry
    return dense


def _boundary(vector: Dense, columns: Sequence[Dense], below: int) -> Dense:
    total = [0] * below
    for factor, column in zip(vector, columns, strict=True):
        total = [a + factor * b for a, b in zip(total, column, strict=True)]
    return total


def _is_unimodular(vectors: Sequence[Dense]) -> bool:
    return not vectors or abs(int(fmpz_mat(vectors).det())) == 1


def _require(holds: bool, condition: str) -> None:
    if not holds:
        raise AssertionError(condition)
