"""Tensor products of the cells at each vertex, cut down to a simplicial complex."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from certify.exact import BasedComplex, Entries, entries
from certify.products.space import PolyhedralProduct
from certify.products.splitting import Alphabet

__all__ = ["cell_complex", "word_complex"]

_Word = tuple[int, ...]


def cell_complex(space: PolyhedralProduct, top: int | None = None) -> BasedComplex:
    """Return the cellular chain complex of (X, A)^K, the direct route.

    Parameters
    ----------
    space : PolyhedralProduct
    top : int, optional
        Leave out cells of larger degree.
    """
    return word_complex(space.complex.face_masks(), [pair.cells for pair in space.pairs], top)


def word_complex(faces: Iterable[int], alphabets: Sequence[Alphabet], top: int | None = None) -> BasedComplex:
    """Return the complex whose cells have a letter for each vertex, the vertices with letters outside A forming a face.

    Parameters
    ----------
    faces : iterable of int
        Faces as bit masks; the complex need not be closed where `top` makes the rest unnecessary.
    alphabets : sequence of Alphabet
        The cells at each vertex.
    top : int, optional
        Leave out cells of larger degree.

    Notes
    -----
    In each degree cells are ordered by the mask of that face, then lexicographically. The boundary is the Leibniz rule
    with sign (-1)^(degree of the factors before). For (D¹, S⁰) there are Σ_σ 2^(m - |σ|) cells.
    """
    known = set(faces)
    words: list[tuple[int, _Word, int]] = [(0, (), 0)]
    for vertex, alphabet in enumerate(alphabets):
        letters = [(i, letter.outside << vertex, letter.degree) for i, letter in enumerate(alphabet)]
        words = [
            (mask | bit, (*word, i), degree + more)
            for mask, word, degree in words
            for i, bit, more in letters
            if mask | bit in known and (top is None or degree + more <= top)
        ]
    degrees: list[list[_Word]] = [[] for _ in range(max((degree for _, _, degree in words), default=-1) + 1)]
    for _, word, degree in sorted(words):
        degrees[degree].append(word)
    boundaries: list[tuple[Entries, ...]] = []
    below: dict[_Word, int] = {}
    for cells in degrees:
        boundaries.append(tuple(_boundary(word, alphabets, below) for word in cells))
        below = {word: number for number, word in enumerate(cells)}
    return BasedComplex(tuple(boundaries))


def _boundary(word: _Word, alphabets: Sequence[Alphabet], below: dict[_Word, int]) -> Entries:
    """Return d of a cell."""
    terms: dict[int, int] = {}
    sign = 1
    for place, (i, alphabet) in enumerate(zip(word, alphabets, strict=True)):
        letter = alphabet[i]
        for j, coefficient in letter.boundary:
            terms[below[(*word[:place], j, *word[place + 1 :])]] = sign * coefficient
        if letter.degree % 2:
            sign = -sign
    return entries(terms)
