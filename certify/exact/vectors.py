"""Sparse integer vectors: the numbers of some basis elements with their non-zero coefficients."""

from __future__ import annotations

from collections.abc import Iterable

__all__ = ["Entries", "Vector", "add_multiple", "combination", "entries"]

Vector = dict[int, int]
"""A vector that is being worked on; zero coefficients are never stored."""

Entries = tuple[tuple[int, int], ...]
"""A finished vector: pairs (number, coefficient), numbers ascending, coefficients non-zero."""


def add_multiple(target: Vector, factor: int, pairs: Iterable[tuple[int, int]]) -> None:
    """Add `factor` times the vector with these pairs to `target`, which is changed.

    Examples
    --------
    >>> v = {0: 1, 2: 3}
    >>> add_multiple(v, -3, [(2, 1), (5, 1)])
    >>> v
    {0: 1, 5: -3}
    """
    for place, coefficient in pairs:
        total = target.get(place, 0) + factor * coefficient
        if total:
            target[place] = total
        else:
            target.pop(place, None)


def combination(terms: Iterable[tuple[int, Iterable[tuple[int, int]]]]) -> Vector:
    """Return the sum of ``factor * vector`` over the given terms.

    Examples
    --------
    >>> combination([(2, ((0, 1),)), (-1, ((0, 2), (3, 1)))])
    {3: -1}
    """
    total: Vector = {}
    for factor, vector in terms:
        add_multiple(total, factor, vector)
    return total


def entries(vector: Vector) -> Entries:
    """Return the finished form of a vector: its pairs in ascending order."""
    return tuple(sorted(vector.items()))
