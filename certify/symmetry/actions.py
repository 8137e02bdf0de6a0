"""How signed permutations act on cells of a polyhedral product, and on its homology."""

from __future__ import annotations

from collections.abc import Container, Iterator, Sequence
from dataclasses import dataclass, replace
from functools import cached_property
from itertools import product as choices
from math import prod

from certify.exact import AdaptedBasis, BasedComplex
from certify.exact.coordinates import Coordinates
from certify.products import PolyhedralProduct
from certify.products.blocks import BATCH, DIGITS, is_superfluous, relevant_faces
from certify.products.cells import Word, complex_of_words, words_by_degree
from certify.products.splitting import Alphabet, Letter, Move, Shape
from certify.simplicial.masks import restrict
from certify.symmetry.elements import Element, cycles_of

__all__ = ["ActedCells", "acted_blocks", "moved_word"]

_TURNED = (1, 0, 2)
"""Where a change of sign takes the cells of (D¹, S⁰)."""


def moved_word(word: Word, element: Element, alphabets: Sequence[Alphabet]) -> tuple[Word, int]:
    """Return the image of a cell with its sign: letters move, odd ones past each other (Koszul's rule).

    A change of sign swaps the ends of an interval, and turns the interval around.
    """
    image = [0] * len(word)
    odd: list[int] = []
    sign = 1
    for letter, alphabet, to in zip(word, alphabets, element, strict=True):
        place = abs(to) - 1
        image[place] = letter if to > 0 else _TURNED[letter]
        if alphabet[letter].degree % 2:
            turns = sum(other > place for other in odd) + (to < 0)
            sign = -sign if turns % 2 else sign
            odd.append(place)
    return tuple(image), sign


@dataclass(frozen=True)
class ActedCells:
    """The words over alphabets, with elements that act on them, watched in one degree.

    Parameters
    ----------
    faces : tuple of int
        The faces as masks.
    alphabets : tuple of Alphabet
    degree : int
    elements : tuple of Element
    name : str or None
        The word of a block; None for the whole product.
    factor : int
        What the trace counts.
    number : int
        Which of the elements of a claim this is about.
    """

    faces: tuple[int, ...]
    alphabets: tuple[Alphabet, ...]
    degree: int
    elements: tuple[Element, ...]
    name: str | None = None
    factor: int = 1
    number: int = 0

    def chains(self) -> BasedComplex:
        """Return the complex, up to the degree above the one that is watched."""
        return complex_of_words(self._words, self.alphabets)

    @cached_property
    def _words(self) -> list[list[Word]]:
        """The cells, up to the degree above the one that is watched."""
        return words_by_degree(self.faces, self.alphabets, self.degree + 1)

    @property
    def watched_words(self) -> list[Word]:
        """The cells of the degree that is watched."""
        return self._words[self.degree]

    @property
    def is_watched(self) -> bool:
        """Whether there are cells of the degree that is watched."""
        return len(self._words) > self.degree and bool(self._words[self.degree])

    def matrices(self, complex_: BasedComplex, basis: AdaptedBasis) -> list[list[tuple[int, ...]]]:
        """Return the columns of the matrix of each element on homology modulo torsion, in the cycles of the basis."""
        words = self._words[self.degree]
        number = {word: place for place, word in enumerate(words)}
        coordinates = Coordinates(complex_, basis, self.degree)
        matrices = []
        for element in self.elements:
            columns = []
            for cycle in basis.degrees[self.degree].cycles:
                images = [(moved_word(words[cell], element, self.alphabets), x) for cell, x in cycle]
                columns.append(coordinates.of((number[word], sign * x) for (word, sign), x in images))
            matrices.append(columns)
        return matrices

    def traces(self, complex_: BasedComplex, basis: AdaptedBasis) -> tuple[int, ...]:
        """Return the trace of each element on homology in this degree."""
        return tuple(sum(column[i] for i, column in enumerate(m)) for m in self.matrices(complex_, basis))


def acted_blocks(
    product: PolyhedralProduct, degree: int, element: Element, number: int, chosen: Container[str] | None = None
) -> Iterator[ActedCells]:
    """Yield the blocks that an element maps to themselves and that have cells of this degree, equal ones once.

    Parameters
    ----------
    product : PolyhedralProduct
    degree : int
    element : Element
    number : int
        Which of the elements of a claim this is.
    chosen : container of str, optional
        The words of the blocks that count; all count if it is left out.

    Notes
    -----
    The vertices of a cycle must have the same summand, and the same copy of it; so a cycle counts its copies once. A
    change of sign acts on a block, up to smaller blocks, as -1 for each interval that is kept (docs/mathematics.md).
    """
    faces = relevant_faces(product, degree + 1)
    cycles = [[vertex - 1 for vertex in cycle] for cycle in cycles_of(element)]
    known: dict[object, ActedCells] = {}
    room = BATCH
    for word, shapes, alphabets, factor in _invariant_choices(product, degree, element, cycles):
        if chosen is not None and word not in chosen:
            continue
        _shorten(alphabets, shapes, cycles, faces)
        cells = _live(faces, alphabets, degree, element)
        key = (cells.faces, cells.alphabets, cells.elements, cells.degree)
        if key in known:
            known[key] = replace(known[key], factor=known[key].factor + factor)
            continue
        room -= len(cells.faces)
        if room < 0:
            yield from (old for old in known.values() if old.is_watched)
            known, room = {}, BATCH - len(cells.faces)
        known[key] = replace(cells, name=word, factor=factor, number=number)
    yield from (old for old in known.values() if old.is_watched)


_Choice = tuple[str, list[Shape], list[Alphabet], int]
"""The word, the shapes and the cells of a choice, and what it counts."""


def _invariant_choices(
    product: PolyhedralProduct, degree: int, element: Element, cycles: Sequence[Sequence[int]]
) -> Iterator[_Choice]:
    """Yield the choices that are the same on each cycle and may have cells of this degree."""
    options = [
        [
            (digit, shape, shift, times)
            for digit, shape in enumerate(product.pairs[cycle[0]].shapes)
            for shift, times in shape.shifts
        ]
        for cycle in cycles
    ]
    for choice in choices(*options):
        placed = {vertex: part for cycle, part in zip(cycles, choice, strict=True) for vertex in cycle}
        parts = [placed[place] for place in range(len(element))]
        if sum(shift for _, _, shift, _ in parts) > degree:
            continue
        shapes = [shape for _, shape, _, _ in parts]
        turned = sum(to < 0 and shape.move == Move.KEEP for to, shape in zip(element, shapes, strict=True))
        factor = prod(times for _, _, _, times in choice) * (-1) ** turned
        word = "".join(DIGITS[digit] for digit, _, _, _ in parts)
        yield word, shapes, [_letters(shape, shift) for _, shape, shift, _ in parts], factor


def _shorten(
    alphabets: list[Alphabet], shapes: Sequence[Shape], cycles: Sequence[Sequence[int]], faces: tuple[int, ...]
) -> None:
    """Leave only the cell t at the vertices of a cycle that are superfluous, and not just by one another (Lemma C)."""
    kept = sum(1 << place for place, shape in enumerate(shapes) if shape.move == Move.KEEP)
    out = sum(1 << place for place, shape in enumerate(shapes) if shape.move in (Move.OUT, Move.OUTER))
    apexes = sum(1 << place for place, shape in enumerate(shapes) if kept >> place & 1 and shape.tag == 1)
    left = tuple([mask for mask in faces if mask & out == out and not mask & ~(kept | out)])
    rest = [cycle for cycle in cycles if kept >> cycle[0] & 1 and isinstance(shapes[cycle[0]].tag, int)]
    place = 0
    while place < len(rest):
        gone = sum(1 << vertex for vertex in rest[place])
        if is_superfluous(left, 1 << rest[place][0], apexes & ~gone):
            left = tuple([mask for mask in left if not mask & gone])
            apexes &= ~gone
            for vertex in rest.pop(place):
                alphabets[vertex] = alphabets[vertex][:1]
            place = 0
        else:
            place += 1


def _live(faces: tuple[int, ...], alphabets: Sequence[Alphabet], degree: int, element: Element) -> ActedCells:
    """Return the block without the vertices that have one cell only, inside and of even degree: they change no sign."""
    live, places = [], 0
    for vertex, letters in enumerate(alphabets):
        outside = any(letter.outside for letter in letters)
        if len(letters) > 1 or outside or letters[0].degree % 2:
            live.append(vertex)
            places |= outside << vertex
        else:
            degree -= letters[0].degree
    part = tuple([restrict(mask, tuple(live)) for mask in faces if not mask & ~places])
    moved = tuple(live.index(abs(element[vertex]) - 1) + 1 for vertex in live)
    return ActedCells(part, tuple(alphabets[vertex] for vertex in live), degree, (moved,))


def _letters(shape: Shape, shift: int) -> Alphabet:
    """Return the cells of a summand whose lowest cell has this degree."""
    if shape.move in (Move.STAY, Move.OUT):
        return (Letter(shift, shape.move == Move.OUT),)
    if isinstance(shape.tag, int):
        boundary = ((0, shape.tag),)
        return (Letter(shift, shape.move == Move.OUTER), Letter(shift + 1, shape.move != Move.INNER, boundary))
    return tuple(Letter(letter.degree + shift, letter.outside, letter.boundary) for letter in shape.tag)
