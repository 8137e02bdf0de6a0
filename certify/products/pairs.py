"""Pairs (X, A) of a based complex and a subcomplex, written as in print or given by their cells."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable, Mapping, Sequence
from dataclasses import dataclass, field

from certify.errors import BadInput
from certify.exact import combination, entries
from certify.exact.groups import superscript
from certify.products.splitting import Letter, Move, Shape, Splitting, split

__all__ = ["Pair", "parse_pair", "parse_pairs"]

_RAISED = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹", "0123456789")
_MOST_CELLS = 255
_MOST_SHAPES = 36
_LARGEST_DEGREE = 999
_STAY = Shape(Move.STAY, 0, ((0, 1),))


@dataclass(frozen=True, slots=True)
class Pair:
    """A pair (X, A): the cells of X, of which some are the cells of A, and its direct summands.

    Parameters
    ----------
    name : str
        Written in ASCII, as sheets and certificates do; for a pair that is given by its cells, a list of them.
    symbol : str
        Written as in print.
    cells : tuple of Letter
        The cells of X, numbered from 0, each with its degree, whether it is outside A, and its boundary.
    shapes : tuple of Shape
        The summands of C(X) as a complex with a subcomplex, those that are acyclic left out.
    splitting : Splitting or None
        The change of basis that shows the summands of a pair given by its cells; None for a pair with a name, whose
        summands stand in docs/mathematics.md.
    """

    name: str
    symbol: str = field(compare=False)
    cells: tuple[Letter, ...] = field(compare=False)
    shapes: tuple[Shape, ...] = field(compare=False)
    splitting: Splitting | None = field(default=None, compare=False)

    @classmethod
    def from_cells(cls, cells: Iterable[tuple[int, bool, Mapping[int, int]]]) -> Pair:
        """Return the pair with these cells: degree, whether it is outside A, boundary as coefficients of earlier cells.

        Raises
        ------
        BadInput
            If a boundary leaves the degree below, d d is not zero, or A is not closed under d; the cell is named, with
            cells counted from 1.

        Examples
        --------
        >>> degree_two = Pair.from_cells([(0, False, {}), (1, False, {}), (1, True, {}), (2, True, {1: 1, 2: -2})])
        >>> [shape.move.name for shape in degree_two.shapes]
        ['STAY', 'KEEP']
        """
        letters = tuple(Letter(degree, outside, entries(dict(boundary))) for degree, outside, boundary in cells)
        _check(letters)
        splitting = split(letters)
        if len(splitting.shapes) > _MOST_SHAPES:
            expected = f"at most {_MOST_SHAPES} different summands"
            raise BadInput(where="the pair", expected=expected, found=f"{len(splitting.shapes)}")
        return cls(_described(letters), "(X,A)", letters, splitting.shapes, splitting)

    def __str__(self) -> str:
        """Write the pair in ASCII."""
        return self.name

    @property
    def value(self) -> object:
        """The pair in the statement of a certificate: its name, or its cells."""
        if self.splitting is None:
            return self.name
        return {"cells": [[c.degree, int(c.outside), [x for term in c.boundary for x in term]] for c in self.cells]}


def _check(letters: Sequence[Letter]) -> None:
    """Raise BadInput where these are not the cells of a pair."""
    if not 0 < len(letters) <= _MOST_CELLS:
        raise BadInput(where="the pair", expected=f"1 to {_MOST_CELLS} cells", found=f"{len(letters)}")
    for number, letter in enumerate(letters):
        where = f"cell {number + 1} of the pair"
        if not 0 <= letter.degree <= _LARGEST_DEGREE:
            raise BadInput(where=where, expected=f"a degree from 0 to {_LARGEST_DEGREE}", found=f"{letter.degree}")
        for place, _ in letter.boundary:
            if not 0 <= place < number:
                raise BadInput(where=where, expected="a boundary on earlier cells", found=f"cell {place + 1} in it")
            if letters[place].degree != letter.degree - 1:
                expected = f"a boundary of degree {letter.degree - 1}"
                raise BadInput(
                    where=where, expected=expected, found=f"cell {place + 1} of degree {letters[place].degree}"
                )
            if letters[place].outside and not letter.outside:
                raise BadInput(where=where, expected="a boundary in A, as the cell is in A", found=f"cell {place + 1}")
        if combination((coefficient, letters[place].boundary) for place, coefficient in letter.boundary):
            raise BadInput(where=where, expected="a boundary whose own boundary is zero", found="another")


def _described(letters: Sequence[Letter]) -> str:
    """Return a name for a pair without one: equal exactly when the cells are."""
    return "; ".join(f"{'X' if c.outside else 'A'}{c.degree} {list(c.boundary)}" for c in letters)


def _disc(n: int, k: int) -> Pair | None:
    if n < 1 or k != n - 1:
        return None
    shapes = (_STAY, Shape(Move.KEEP, 1, ((k, 1),)))
    symbol = f"(D{superscript(n)},S{superscript(k)})"
    if n == 1:
        points = (Letter(0, False), Letter(0, False))
        return Pair("(D1, S0)", symbol, (*points, Letter(1, True, ((0, -1), (1, 1)))), shapes)
    cells = (Letter(0, False), Letter(k, False), Letter(n, True, ((1, 1),)))
    return Pair(f"(D{n}, S{k})", symbol, cells, shapes)


def _sphere(n: int) -> Pair | None:
    if n < 1:
        return None
    cells = (Letter(0, False), Letter(n, True))
    return Pair(f"(S{n}, *)", f"(S{superscript(n)},*)", cells, (_STAY, Shape(Move.OUT, 0, ((n, 1),))))


def _complex_projective(n: int) -> Pair | None:
    if n < 1:
        return None
    cells = tuple(Letter(2 * i, i > 0) for i in range(n + 1))
    shapes = (_STAY, Shape(Move.OUT, 0, tuple((2 * i, 1) for i in range(1, n + 1))))
    return Pair(f"(CP{n}, *)", f"(CP{superscript(n)},*)", cells, shapes)


def _real_projective(n: int) -> Pair | None:
    if n < 1:
        return None
    cells = tuple(Letter(i, i > 0, ((i - 1, 2),) if i and i % 2 == 0 else ()) for i in range(n + 1))
    shapes = [_STAY]
    if n % 2:
        shapes.append(Shape(Move.OUT, 0, ((n, 1),)))
    if n > 1:
        shapes.append(Shape(Move.OUTER, 2, tuple((i, 1) for i in range(1, n, 2))))
    return Pair(f"(RP{n}, *)", f"(RP{superscript(n)},*)", cells, tuple(shapes))


def _cone(q: int, again: int) -> Pair | None:
    if q < 1 or again != q:
        return None
    points = (Letter(0, False),) * q
    rays = tuple(Letter(1, True, ((i, 1), (q, -1))) for i in range(q))
    shapes = (_STAY, Shape(Move.KEEP, 1, ((0, q - 1),))) if q > 1 else (_STAY,)
    return Pair(f"(cone {q}, {q})", f"(cone {q},{q})", (*points, Letter(0, True), *rays), shapes)


def _moore(n: int, order: int) -> Pair | None:
    if n < 2 or order < 2:
        return None
    cells = (Letter(0, False), Letter(n - 1, True), Letter(n, True, ((1, order),)))
    shapes = (_STAY, Shape(Move.OUTER, order, ((n - 1, 1),)))
    return Pair(f"(P{n}({order}), *)", f"(P{superscript(n)}({order}),*)", cells, shapes)


_NUMBER = r"\^?(0|[1-9]\d{0,2})"
_FORMS: tuple[tuple[str, Callable[..., Pair | None]], ...] = (
    (r"\(D#,S#\)", _disc),
    (r"\(S#,\*\)", _sphere),
    (r"\(CP#,\*\)", _complex_projective),
    (r"\(RP#,\*\)", _real_projective),
    (r"\(cone#,#\)", _cone),
    (r"\(P#\(#\),\*\)", _moore),
)


def parse_pair(text: str) -> Pair:
    """Return the pair that is written as in print.

    Parameters
    ----------
    text : str
        ``(D2, S1)`` a disc and its boundary sphere; ``(S3, *)``, ``(CP3, *)``, ``(RP3, *)`` a sphere or projective
        space and a point; ``(cone 3, 3)`` the cone on three points and the points; ``(P3(2), *)`` the Moore space
        Pⁿ(q), a cell of degree n glued with degree q to an (n - 1)-sphere, and a point.

    Raises
    ------
    BadInput
        If it cannot be read, or is no pair (the sphere is not the boundary of the disc, say).

    Examples
    --------
    >>> parse_pair("(D2,S1)").symbol
    '(D²,S¹)'
    """
    plain = re.sub(r"\s+", "", text.translate(_RAISED))
    for form, build in _FORMS:
        match = re.fullmatch(form.replace("#", _NUMBER), plain, re.ASCII)
        pair = build(*map(int, match.groups())) if match else None
        if pair is not None:
            return pair
        if match is not None and build is _disc:
            n = max(int(match[1]), 1)
            right = f'"(D{n}, S{n - 1})"'
            raise BadInput(
                where="the pair", expected=f"the boundary sphere of the disc, as in {right}", found=repr(text)
            )
    expected = 'a pair like "(D1, S0)", "(S3, *)", "(CP3, *)", "(RP2, *)", "(cone 3, 3)" or "(P3(2), *)"'
    raise BadInput(where="the pair", expected=expected, found=repr(text))


def parse_pairs(text: str | Sequence[str], vertices: int, named: Mapping[str, Pair] | None = None) -> tuple[Pair, ...]:
    """Return one pair for each vertex, from one text for all of them or from a text for each.

    Parameters
    ----------
    text : str or sequence of str
        Pairs as `parse_pair` reads them, or names of pairs in `named`.
    vertices : int
        The number of vertices.
    named : mapping, optional
        The user's own pairs.

    Raises
    ------
    BadInput
        If a pair cannot be read, or the number of pairs is not the number of vertices.
    """

    def one(name: str) -> Pair:
        return named[name] if named is not None and name in named else parse_pair(name)

    if isinstance(text, str):
        return (one(text),) * vertices
    if len(text) != vertices:
        raise BadInput(where="the pairs", expected=f"one for each of the {vertices} vertices", found=f"{len(text)}")
    return tuple(one(name) for name in text)
