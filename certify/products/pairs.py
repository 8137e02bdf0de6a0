"""Pairs (X, A) of a based complex and a subcomplex, written as in print."""

from __future__ import annotations

import re
from collections.abc import Sequence
from dataclasses import dataclass

from certify.errors import BadInput
from certify.exact.groups import superscript

__all__ = ["DiscPair", "parse_pair", "parse_pairs"]

_DISC = re.compile(r"\(\s*D\^?(\d{1,6})\s*,\s*S\^?(\d{1,6})\s*\)", re.ASCII)
_RAISED = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹", "0123456789")


@dataclass(frozen=True, slots=True, order=True)
class DiscPair:
    """The pair (Dⁿ, Sⁿ⁻¹) of a disc and its boundary sphere, n at least 1.

    Notes
    -----
    Cells: for n = 1 the points 0 and 1 of S⁰ and the edge e with d e = 1 - 0; for larger n a point and a cell t of
    degree n - 1 in Sⁿ⁻¹, and a cell e of degree n with d e = t.
    """

    n: int

    def __str__(self) -> str:
        """Write the pair in ASCII, as sheets and certificates do."""
        return f"(D{self.n}, S{self.n - 1})"

    @property
    def symbol(self) -> str:
        """The pair as in print."""
        return f"(D{superscript(self.n)},S{superscript(self.n - 1)})"


def parse_pair(text: str) -> DiscPair:
    """Return the pair that is written like ``(D1, S0)``.

    Raises
    ------
    BadInput
        If it cannot be read, or the sphere is not the boundary of the disc.

    Examples
    --------
    >>> parse_pair("(D2,S1)").symbol
    '(D²,S¹)'
    """
    match = _DISC.fullmatch(text.translate(_RAISED).strip())
    if match is None:
        raise BadInput(where="the pair", expected='a disc and its boundary sphere like "(D1, S0)"', found=repr(text))
    n = int(match[1])
    if n < 1 or int(match[2]) != n - 1:
        right = f'"(D{max(n, 1)}, S{max(n, 1) - 1})"'
        raise BadInput(where="the pair", expected=f"the boundary sphere of the disc, as in {right}", found=repr(text))
    return DiscPair(n)


def parse_pairs(text: str | Sequence[str], vertices: int) -> tuple[DiscPair, ...]:
    """Return one pair for each vertex, from one text for all of them or from a text for each.

    Raises
    ------
    BadInput
        If a pair cannot be read, or the number of pairs is not the number of vertices.
    """
    if isinstance(text, str):
        return (parse_pair(text),) * vertices
    if len(text) != vertices:
        raise BadInput(where="the pairs", expected=f"one for each of the {vertices} vertices", found=f"{len(text)}")
    return tuple(parse_pair(one) for one in text)
