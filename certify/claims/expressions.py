"""What claims share that are about expressions in counts, and about no complex."""

from __future__ import annotations

from abc import abstractmethod
from collections.abc import Mapping
from typing import Any

from certify.claims.values import ValuesClaim
from certify.errors import BadInput
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.families import simplex
from certify.symmetry.expressions import values_of

__all__ = ["ExpressionsClaim"]

_LAST = 1000


class ExpressionsClaim(ValuesClaim):
    """A claim about expressions in n, for each n of a range.

    Attributes
    ----------
    first, last : int
        The range, within 1 to 1000.
    """

    first: int
    last: int

    def __post_init__(self) -> None:
        """Refuse ranges and expressions that are none."""
        if not 1 <= self.first <= self.last <= _LAST:
            raise BadInput(where="from", expected=f"a range within 1 to {_LAST}", found=f"{self.first} to {self.last}")
        for where, text in self.expressions().items():
            try:
                values_of(text, self.first, self.first)
            except BadInput as fault:
                raise BadInput(where=where, expected=fault.expected, found=fault.found) from fault

    @abstractmethod
    def expressions(self) -> Mapping[str, str]:
        """Return the expressions under their keys."""

    def values(self, key: str) -> list[int]:
        """Return the values of an expression for each n of the range."""
        return values_of(self.expressions()[key], self.first, self.last)

    @property
    def base(self) -> SimplicialComplex:
        """The complex of nothing: the claim is about numbers alone."""
        return simplex(0)

    def question(self) -> dict[str, Any]:
        """Return the expressions and the range."""
        return {"kind": self.kind} | self.fields()

    def fields(self) -> dict[str, Any]:
        """Return the expressions and the range."""
        return {"first": self.first, "last": self.last, **self.expressions()}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return key

    @property
    def range_in_words(self) -> str:
        """The range as in print."""
        return f"for n = {self.first}, …, {self.last}"
