"""Tensor products of the cells at each vertex, cut down to a simplicial complex."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from certify.exact import BasedComplex, Entries, entries
from certify.products.space import PolyhedralProduct
from certify.products.splitting import Alphabet

__all__ = ["Word", "cell_complex", "complex_of_words", "leibniz", "word_complex", "words_by_degree"]

Word = tuple[int, ...]
"""A cell: the number of a cell of its pair for each vertex."""


def cell_complex(space: PolyhedralProduct, top: int | None = None) -> BasedComplex:
    """Return the cellular chain complex of (X, A)^K, the direct route.

    Parameters
    ----------
    space : PolyhedralProduct
    top : int, optional
        Leave out cells of larger degree.
    """
    return word_complex(space.complex.face_masks(), [pair.cells for pair in space.pairs], top)


def words_by_degree(faces: Iterable[int], alphabets: Sequence[Alphabet], top: int | None = None) -> list[list[Word]]:
    """Return the words with a letter for each vertex, where the vertices with letters outside A form a face, by degree.

    Parameters
    ----------
    faces : iterable of int
        Faces as bit masks; the complex need not be closed where `top` makes the rest unnecessary.
    alphabets : sequence of Alphabet
        The cells at each vertex.
    top : int, optional
        Leave out words of larger degree.

    Notes
    -----
    In each degree words are ordered by the mask of that face, then lexicographically. For (D¹, S⁰) there are
    Σ_σ 2^(m - |σ|) words.
    """
    known = set(faces)
    words: list[tuple[int, Word, int]] = [(0, (), 0)]
    for vertex, alphabet in enumerate(alphabets):
        letters = [(i, letter.outside << vertex, letter.degree) for i, letter in enumerate(alphabet)]
        words = [
            (mask | bit, (*word, i), degree + more)
            for mask, word, degree in words
            for i, bit, more in letters
            if mask | bit in known and (top is None or degree + more <= top)
        ]
    degrees: list[list[Word]] = [[] for _ in range(max((degree for _, _, degree in words), default=-1) + 1)]
    for _, word, degree in sorted(words):
        degrees[degree].append(word)
    return degrees


def word_complex(faces: Iterable[int], alphabets: Sequence[Alphabet], top: int | None = None) -> BasedComplex:
    """Return the complex of the words of `words_by_degree`, with the Leibniz rule as boundary."""
    return complex_of_words(words_by_degree(faces, alphabets, top), alphabets)


def complex_of_words(words: Iterable[Sequence[Word]], alphabets: Sequence[Alphabet]) -> BasedComplex:
    """Return the complex of these words by degree, with the Leibniz rule as boundary."""
    boundaries: list[tuple[Entries, ...]] = []
    below: dict[Word, int] = {}
    for cells in words:
        boundaries.append(tuple(entries({below[end]: x for end, x in leibniz(word, alphabets)}) for word in cells))
        below = {word: number for number, word in enumerate(cells)}
    return BasedComplex(tuple(boundaries))


def leibniz(word: Word, alphabets: Sequence[Alphabet]) -> list[tuple[Word, int]]:
    """Return d of a word: different words with coefficients, signed by (-1)^(degree of the letters before)."""
    terms = []
    sign = 1
    for place, (i, alphabet) in enumerate(zip(word, alphabets, strict=True)):
        letter = alphabet[i]
        if letter.boundary:
            terms += [((*word[:place], j, *word[place + 1 :]), sign * x) for j, x in letter.boundary]
        if letter.degree % 2:
            sign = -sign
    return terms
