"""The quotient of (D¹, S⁰)^K by a group of signed automorphisms: orbits of cells, or of chains of cells."""

from __future__ import annotations

from collections import Counter
from dataclasses import dataclass
from functools import cached_property

from certify.exact import BasedComplex, Entries, entries
from certify.products import PolyhedralProduct
from certify.products.cells import Word, leibniz, words_by_degree
from certify.products.splitting import Alphabet
from certify.symmetry.actions import moved_word
from certify.symmetry.elements import Element, generated_group

__all__ = ["Cell", "OrbitSpace"]

Cell = tuple[Word, ...]
"""A cell of the cube complex alone, or a chain of cells by dimension."""

_INSIDE = 2


@dataclass(frozen=True)
class OrbitSpace:
    """The quotient of (D¹, S⁰)^K by a group.

    Parameters
    ----------
    product : PolyhedralProduct
        Of the pairs (D¹, S⁰).
    generators : tuple of Element
        Symmetries of K, with signs.
    always_chains : bool
        Work with chains of cells even if single cells would do.

    Notes
    -----
    Orbits of cells are the cells of the quotient if no element maps a cell to itself other than identically. Otherwise
    this holds for the chains of cells, the order complex of the cubes, because dimensions along a chain differ. An
    orbit is represented by its first cell.
    """

    product: PolyhedralProduct
    generators: tuple[Element, ...]
    always_chains: bool = False

    @cached_property
    def group(self) -> list[Element]:
        """All elements of the group."""
        return generated_group(self.generators, self.product.complex.vertex_count)

    @cached_property
    def _words(self) -> list[list[Word]]:
        return words_by_degree(self.product.complex.face_masks(), self._alphabets)

    @property
    def _alphabets(self) -> list[Alphabet]:
        return [pair.cells for pair in self.product.pairs]

    @cached_property
    def _images(self) -> dict[Word, list[tuple[Word, int]]]:
        return {
            word: [moved_word(word, element, self._alphabets) for element in self.group]
            for level in self._words
            for word in level
        }

    @cached_property
    def on_chains(self) -> bool:
        """Whether the cells of the quotient are orbits of chains."""
        return self.always_chains or not all(
            image != word or _is_identical(element, word)
            for word, images in self._images.items()
            for element, (image, _) in zip(self.group, images, strict=True)
        )

    @cached_property
    def _all_cells(self) -> list[list[Cell]]:
        """Return the cells that are permuted, by dimension, sorted."""
        if not self.on_chains:
            return [sorted((word,) for word in level) for level in self._words]
        below: dict[Word, list[Word]] = {}
        flags: dict[Word, list[Cell]] = {}
        cells: list[list[Cell]] = [[] for _ in self._words]
        for level in self._words:
            for word in level:
                parts = [part for part, _ in leibniz(word, self._alphabets)]
                below[word] = list(dict.fromkeys(face for part in parts for face in (part, *below[part])))
                flags[word] = [(word,), *((*chain, word) for part in below[word] for chain in flags[part])]
                for chain in flags[word]:
                    cells[len(chain) - 1].append(chain)
        return [sorted(level) for level in cells]

    @cached_property
    def _orbits(self) -> tuple[list[list[Cell]], dict[Cell, tuple[Cell, int]], dict[Cell, list[Element]]]:
        """Return the first cells of orbits, where each cell goes with which sign, and isotropy groups other than 1."""
        first: dict[Cell, tuple[Cell, int]] = {}
        kept: list[list[Cell]] = []
        isotropy: dict[Cell, list[Element]] = {}
        for level in self._all_cells:
            kept.append([])
            for cell in level:
                if cell not in first:
                    kept[-1].append(cell)
                    fixing = []
                    for element, images in zip(
                        self.group, zip(*(self._images[word] for word in cell), strict=True), strict=True
                    ):
                        image = tuple(word for word, _ in images)
                        first.setdefault(image, (cell, 1 if self.on_chains else images[0][1]))
                        if image == cell:
                            fixing.append(element)
                    if len(fixing) > 1:
                        isotropy[cell] = fixing
        return kept, first, isotropy

    @property
    def cells(self) -> list[list[Cell]]:
        """The first cell of each orbit, by dimension."""
        return self._orbits[0]

    @property
    def isotropy(self) -> dict[Cell, list[Element]]:
        """The isotropy groups other than 1, all elements of each, by the first cells of orbits."""
        return self._orbits[2]

    def first(self, cell: Cell) -> Cell:
        """Return the first cell of the orbit of a cell."""
        return self._orbits[1][cell][0]

    def ends(self, cell: Cell) -> list[tuple[Cell, int]]:
        """Return d of a cell of the quotient; a cell may occur in it twice."""
        if self.on_chains:
            parts = [(cell[:i] + cell[i + 1 :], (-1) ** i) for i in range(len(cell)) if len(cell) > 1]
        else:
            parts = [((word,), sign) for word, sign in leibniz(cell[0], self._alphabets)]
        where = self._orbits[1]
        return [(where[part][0], sign * where[part][1]) for part, sign in parts]

    def euler_characteristic(self) -> int:
        """Return the alternating number of cells."""
        return sum((-1) ** k * len(level) for k, level in enumerate(self.cells))

    def chains(self) -> BasedComplex:
        """Return the cellular chain complex of the quotient."""
        boundaries: list[tuple[Entries, ...]] = []
        below: dict[Cell, int] = {}
        for level in self.cells:
            columns = []
            for cell in level:
                column: Counter[int] = Counter()
                for end, sign in self.ends(cell):
                    column[below[end]] += sign
                columns.append(entries({place: x for place, x in column.items() if x}))
            boundaries.append(tuple(columns))
            below = {cell: number for number, cell in enumerate(level)}
        return BasedComplex(tuple(boundaries))


def _is_identical(element: Element, word: Word) -> bool:
    """Tell whether an element that maps a cell to itself does so identically: on the intervals inside it."""
    return all(element[place] == place + 1 for place, letter in enumerate(word) if letter == _INSIDE)
