"""The claim kind ``count-identity``: two expressions in counts agree for a range of n."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.claims.base import Contribution
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.families import simplex
from certify.symmetry.expressions import values_of

__all__ = ["IdentityClaim", "check_expression", "check_range"]

_LAST = 1000


@dataclass(frozen=True)
class IdentityClaim(ValuesClaim):
    """A claim that two expressions in n have the same values for each n of a range.

    Parameters
    ----------
    left, right : str
        As `certify.symmetry.expressions.values_of` reads them.
    first, last : int
        The range, within 1 to 1000.

    Raises
    ------
    BadInput
        If an expression cannot be read, or the range is none.
    """

    left: str
    right: str
    first: int
    last: int
    claimed: Values = field(default_factory=dict)
    route: str = "values"
    kind: ClassVar[str] = "count-identity"

    def __post_init__(self) -> None:
        """Refuse ranges and expressions that are none."""
        check_range(self.first, self.last)
        check_expression("left", self.left, self.first)
        check_expression("right", self.right, self.first)

    @property
    def base(self) -> SimplicialComplex:
        """The complex of nothing: the claim is about numbers alone."""
        return simplex(0)

    def question(self) -> dict[str, Any]:
        """Return the expressions and the range."""
        return {"kind": self.kind} | self.fields()

    def fields(self) -> dict[str, Any]:
        """Return the expressions and the range."""
        return {"first": self.first, "last": self.last, "left": self.left, "right": self.right}

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return nothing, after both sides have been compared."""
        list(contributions)
        pairs = zip(*(values_of(text, self.first, self.last) for text in (self.left, self.right)), strict=True)
        for n, (left, right) in enumerate(pairs, start=self.first):
            self.compare_one(f"{self.right} for n = {n}", left, right)
        return {}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return key

    def lines(self, found: Values) -> list[str]:  # noqa: ARG002 - there are no values
        """Write the identity."""
        return [f"{self.left} = {self.right} for n = {self.first}, …, {self.last}"]


def check_range(first: int, last: int) -> None:
    """Raise BadInput if this is no range that claims may be about."""
    if not 1 <= first <= last <= _LAST:
        raise BadInput(where="from", expected=f"a range within 1 to {_LAST}", found=f"{first} to {last}")


def check_expression(where: str, text: str, n: int) -> None:
    """Raise BadInput, with this place, if an expression cannot be read, or not be evaluated for n."""
    try:
        values_of(text, n, n)
    except BadInput as fault:
        raise BadInput(where=where, expected=fault.expected, found=fault.found) from fault
