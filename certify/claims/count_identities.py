"""The claim kind ``count-identity``: two expressions in counts agree for a range of n."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.claims.base import Contribution
from certify.claims.expressions import ExpressionsClaim
from certify.claims.values import Values

__all__ = ["IdentityClaim"]


@dataclass(frozen=True)
class IdentityClaim(ExpressionsClaim):
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

    def expressions(self) -> dict[str, str]:
        """Return both sides."""
        return {"left": self.left, "right": self.right}

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return nothing, after both sides have been compared."""
        list(contributions)
        pairs = zip(self.values("left"), self.values("right"), strict=True)
        for n, (left, right) in enumerate(pairs, start=self.first):
            self.compare_one(f"{self.right} for n = {n}", left, right)
        return {}

    def lines(self, found: Values) -> list[str]:  # noqa: ARG002 - there are no values
        """Write the identity."""
        return [f"{self.left} = {self.right} {self.range_in_words}"]
