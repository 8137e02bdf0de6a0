"""How signed permutations act on cells of a polyhedral product, and on its homology."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import cached_property
from itertools import product as choices

from certify.exact import AdaptedBasis, BasedComplex
from certify.exact.coordinates import Coordinates
from certify.products import PolyhedralProduct
from certify.products.blocks import DIGITS
from certify.products.cells import Word, complex_of_words, words_by_degree
from certify.products.splitting import Alphabet, Letter, Move, Shape
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
        The faces of K as masks.
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


def acted_blocks(product: PolyhedralProduct, degree: int, element: Element, number: int) -> Iterator[ActedCells]:
    """Yield the blocks that an element maps to themselves and that have cells of this degree.

    Notes
    -----
    The vertices of a cycle must have the same summand, and the same copy of it; so a cycle counts its copies once. A
    change of sign acts on a block, up to smaller blocks, as -1 for each interval that is kept (docs/mathematics.md).
    """
    faces = product.complex.face_masks()
    cycles = cycles_of(element)
    options = [
        [
            (digit, shape, shift, times)
            for digit, shape in enumerate(product.pairs[cycle[0] - 1].shapes)
            for shift, times in shape.shifts
        ]
        for cycle in cycles
    ]
    plain = tuple(map(abs, element))
    for choice in choices(*options):
        alphabets: list[Alphabet] = [()] * len(element)
        word = [""] * len(element)
        factor, low = 1, 0
        for cycle, (digit, shape, shift, times) in zip(cycles, choice, strict=True):
            factor *= times
            low += shift * len(cycle)
            for vertex in cycle:
                word[vertex - 1] = DIGITS[digit]
                alphabets[vertex - 1] = _letters(shape, shift)
                factor *= -1 if element[vertex - 1] < 0 and shape.move == Move.KEEP else 1
        if low > degree:
            continue
        block = ActedCells(faces, tuple(alphabets), degree, (plain,), "".join(word), factor, number)
        if block.is_watched:
            yield block


def _letters(shape: Shape, shift: int) -> Alphabet:
    """Return the cells of a summand whose lowest cell has this degree."""
    if shape.move in (Move.STAY, Move.OUT):
        return (Letter(shift, shape.move == Move.OUT),)
    if isinstance(shape.tag, int):
        boundary = ((0, shape.tag),)
        return (Letter(shift, shape.move == Move.OUTER), Letter(shift + 1, shape.move != Move.INNER, boundary))
    return tuple(Letter(letter.degree + shift, letter.outside, letter.boundary) for letter in shape.tag)
