"""Summands of a pair: a unimodular change of basis of C(X) that respects C(A) and breaks the boundary into pieces."""

from __future__ import annotations

import json
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from enum import IntEnum

import networkx as nx

from certify.exact import BasedComplex, Entries, Vector, adapted_basis, add_multiple, combination, diagonalise, entries
from certify.exact.adapted import AdaptedBasis
from certify.exact.smith import Matrix, inverse

__all__ = ["Alphabet", "Letter", "Move", "Shape", "Splitting", "Tag", "split"]


@dataclass(frozen=True, slots=True)
class Letter:
    """A cell of X: its degree, whether it is outside A, and its boundary on the numbers of other cells."""

    degree: int
    outside: bool
    boundary: Entries = ()


Alphabet = tuple[Letter, ...]
Tag = int | Alphabet
"""What a kept vertex brings: n for cells e and t with d e = n t, or the cells of a larger summand, lowest degree 0."""


class Move(IntEnum):
    """What a summand does to its vertex in K."""

    STAY = 0
    """One cell in A: the vertex is left out."""
    OUT = 1
    """One cell outside A: the complex becomes the link of the vertex."""
    KEEP = 2
    """Cells on both sides: the vertex stays, and lies in the face where the cell is outside."""
    INNER = 3
    """Cells e and t, both in A: the vertex gives way to one that lies in a face with every face that avoided it."""
    OUTER = 4
    """Cells e and t, both outside A: the same with the link."""


@dataclass(frozen=True, slots=True)
class Shape:
    """Summands of one kind.

    Parameters
    ----------
    move : Move
    tag : Tag
        0 where no vertex is kept.
    shifts : tuple of pairs
        For each degree of the lowest cell, ascending, how many such summands there are.
    """

    move: Move
    tag: Tag
    shifts: tuple[tuple[int, int], ...]


@dataclass(frozen=True, slots=True)
class Splitting:
    """A basis of C(X) in which C(X) is the direct sum of summands with these shapes.

    Parameters
    ----------
    basis : tuple of Entries
        Vectors on the cells, each of one degree; those on cells of A alone are a basis of C(A).
    inverse : Matrix
        The inverse of the matrix whose columns are these vectors.
    shapes : tuple of Shape
        The shapes, acyclic ones left out.
    """

    basis: tuple[Entries, ...]
    inverse: Matrix
    shapes: tuple[Shape, ...]


def split(cells: Sequence[Letter]) -> Splitting:
    """Return a splitting of the pair with these cells.

    Notes
    -----
    Adapted bases of C(A) and of C(X)/C(A) are put together; then the classes of C(X)/C(A) are changed so that the
    connecting homomorphism H_k(X, A) → H_{k-1}(A) is diagonal on the free parts. What does not come apart stays
    together in a larger summand: the result is right in any case, and good where homology is free.
    """
    inside, outside = _Part.of(cells, False), _Part.of(cells, True)
    _lift(cells, inside, outside)
    for degree in range(max(cell.degree for cell in cells) + 1):
        _straighten(cells, inside, outside, degree)
    basis = tuple(entries(vector) for part in (inside, outside) for vector in part.vectors())
    rows = inverse([[dict(vector).get(cell, 0) for vector in basis] for cell in range(len(cells))])
    return Splitting(basis, rows, _shapes(cells, basis, rows))


@dataclass(slots=True)
class _Part:
    """A basis of C(A), or of C(X)/C(A), by what it is: cycles by degree, and pairs a, b with e."""

    cycles: dict[int, list[Vector]]
    pairs: list[tuple[Vector, int, Vector]]

    @classmethod
    def of(cls, cells: Sequence[Letter], outside: bool) -> _Part:
        """Return the adapted basis of the complex on the cells of one side."""
        own = [number for number, cell in enumerate(cells) if cell.outside == outside]
        degrees = [[n for n in own if cells[n].degree == k] for k in range(max(c.degree for c in cells) + 1)]
        place = {n: i for degree in degrees for i, n in enumerate(degree)}
        columns = tuple(
            tuple(tuple((place[c], x) for c, x in cells[n].boundary if c in place) for n in degree)
            for degree in degrees
        )
        return cls._read(degrees, columns, adapted_basis(BasedComplex(columns)))

    @classmethod
    def _read(cls, degrees: list[list[int]], columns: tuple[tuple[Entries, ...], ...], basis: AdaptedBasis) -> _Part:
        def named(degree: int, vector: Entries) -> Vector:
            return {degrees[degree][i]: x for i, x in vector}

        cycles = {k: [named(k, z) for z in part.cycles] for k, part in enumerate(basis.degrees)}
        pairs = []
        for k, part in enumerate(basis.degrees):
            pairs += [(named(k, ((i, 1),)), 1, named(k - 1, columns[k][i])) for i in part.matched]
            pairs += [(named(k, pair.a), pair.e, named(k - 1, pair.b)) for pair in part.pairs]
        return cls(cycles, pairs)

    def vectors(self) -> Iterable[Vector]:
        """Yield all vectors of the basis."""
        for degree in sorted(self.cycles):
            yield from self.cycles[degree]
        for a, _, b in self.pairs:
            yield a
            yield b


def _d(cells: Sequence[Letter], vector: Vector) -> Vector:
    return combination((coefficient, cells[cell].boundary) for cell, coefficient in vector.items())


def _lift(cells: Sequence[Letter], inside: _Part, outside: _Part) -> None:
    """Change the vectors outside A by vectors in A, so that their boundaries meet C(A) in as little as possible."""
    outside.pairs = [(a, e, _d(cells, a) if e == 1 else b) for a, e, b in outside.pairs]
    rows, names = _coordinates(len(cells), [v for part in (inside, outside) for v in part.vectors()])
    position = {id(vector): i for i, vector in enumerate(names)}
    for cycle in (cycle for cycles in outside.cycles.values() for cycle in cycles):
        image = _d(cells, cycle)
        for a, e, b in inside.pairs:
            times = sum(rows[position[id(b)]][cell] * x for cell, x in image.items()) // e
            if times:
                add_multiple(cycle, -times, a.items())


def _straighten(cells: Sequence[Letter], inside: _Part, outside: _Part, degree: int) -> None:
    """Make the connecting homomorphism diagonal, from the cycles of this degree outside A to those below in A."""
    above, below = outside.cycles.get(degree, []), inside.cycles.get(degree - 1, [])
    if not above or not below:
        return
    rows, names = _coordinates(len(cells), [v for part in (inside, outside) for v in part.vectors()])
    position = {id(vector): i for i, vector in enumerate(names)}
    images = [_d(cells, cycle) for cycle in above]
    matrix = [[sum(rows[position[id(z)]][cell] * x for cell, x in image.items()) for image in images] for z in below]
    form = diagonalise(matrix)
    outside.cycles[degree] = _mixed(above, form.right)
    inside.cycles[degree - 1] = _mixed(below, form.left)


def _mixed(vectors: list[Vector], matrix: Matrix) -> list[Vector]:
    """Return the combinations of vectors by the columns of a matrix."""
    columns = range(len(vectors))
    return [combination((matrix[i][j], vectors[i].items()) for i in columns) for j in columns]


def _coordinates(size: int, vectors: list[Vector]) -> tuple[Matrix, list[Vector]]:
    """Return the inverse of the matrix with these columns, and the columns."""
    return inverse([[vector.get(cell, 0) for vector in vectors] for cell in range(size)]), vectors


def _shapes(cells: Sequence[Letter], basis: Sequence[Entries], rows: Matrix) -> tuple[Shape, ...]:
    """Return the shapes of the pieces into which the boundary falls in this basis."""
    letters = []
    pieces: nx.Graph[int] = nx.Graph()
    for number, vector in enumerate(basis):
        image = _d(cells, dict(vector))
        new = {i: sum(row[cell] * x for cell, x in image.items()) for i, row in enumerate(rows)}
        boundary = entries({i: x for i, x in new.items() if x})
        letters.append(Letter(cells[vector[0][0]].degree, any(cells[c].outside for c, _ in vector), boundary))
        pieces.add_node(number)
        pieces.add_edges_from((number, i) for i, _ in boundary)
    found: dict[tuple[int, str], tuple[Move, Tag, dict[int, int]]] = {}
    for piece in nx.connected_components(pieces):
        move, tag, low = _shape([letters[i] for i in sorted(piece)], {i: n for n, i in enumerate(sorted(piece))})
        if move in (Move.INNER, Move.OUTER) and tag == 1:
            continue
        shifts = found.setdefault((move, _spelled(tag)), (move, tag, {}))[2]
        shifts[low] = shifts.get(low, 0) + 1
    return tuple(
        Shape(m, tag, tuple(sorted(shifts.items()))) for m, tag, shifts in (found[key] for key in sorted(found))
    )


def _shape(letters: list[Letter], number: dict[int, int]) -> tuple[Move, Tag, int]:
    """Return move, tag and lowest degree of a piece."""
    low = min(letter.degree for letter in letters)
    if len(letters) == 1:
        return (Move.OUT if letters[0].outside else Move.STAY), 0, low
    if len(letters) == 2:
        t, e = sorted(letters, key=lambda letter: letter.degree)
        order = abs(e.boundary[0][1])
        return (Move.KEEP if e.outside != t.outside else Move.OUTER if t.outside else Move.INNER), order, low
    renumbered = (entries({number[i]: x for i, x in letter.boundary}) for letter in letters)
    return Move.KEEP, tuple(Letter(a.degree - low, a.outside, b) for a, b in zip(letters, renumbered, strict=True)), low


def _spelled(tag: Tag) -> str:
    """Return the spelling by which shapes with the same move are ordered; a constant of the certificate format."""
    value = tag if isinstance(tag, int) else [[c.degree, int(c.outside), c.boundary] for c in tag]
    return json.dumps(value, separators=(",", ":"))
