"""The values of records: adapted bases as JSON."""

from __future__ import annotations

from typing import Any

from certify.certificate.canonical import integer_value
from certify.exact import AdaptedBasis, AdaptedDegree, Entries, Pair

__all__ = ["basis_value", "vector_value"]


def vector_value(vector: Entries) -> list[int | str]:
    """Return a sparse vector as the list of its cells and coefficients in turn.

    Examples
    --------
    >>> vector_value(((0, 1), (4, -2)))
    [0, 1, 4, -2]
    """
    return [value for cell, coefficient in vector for value in (cell, integer_value(coefficient))]


def basis_value(basis: AdaptedBasis) -> list[dict[str, Any]]:
    """Return an adapted basis as a list of objects, one for each degree from 0; empty parts are left out."""
    return [_degree_value(degree) for degree in basis.degrees]


def _degree_value(degree: AdaptedDegree) -> dict[str, Any]:
    parts: dict[str, Any] = {
        "cycles": [vector_value(cycle) for cycle in degree.cycles],
        "groups": [
            {"cells": list(group.cells), "inverse": [[integer_value(x) for x in row] for row in group.inverse]}
            for group in degree.layout.groups
        ],
        "matched": list(degree.matched),
        "pairs": [_pair_value(pair) for pair in degree.pairs],
    }
    value = {key: part for key, part in parts.items() if part}
    if degree.layout.order is not None:
        value["order"] = list(degree.layout.order)
    return value


def _pair_value(pair: Pair) -> list[Any]:
    """Return [a] for e = 1, since then b = d a, and [a, e, b] otherwise."""
    if pair.e == 1:
        return [vector_value(pair.a)]
    return [vector_value(pair.a), integer_value(pair.e), vector_value(pair.b)]
