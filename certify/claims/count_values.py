"""The claim kind ``count-values``: the values of an expression in counts for a range of n."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.certificate.canonical import integer_value
from certify.claims.base import Contribution
from certify.claims.expressions import ExpressionsClaim
from certify.claims.values import Values
from certify.errors import BadInput

__all__ = ["CountValuesClaim"]


@dataclass(frozen=True)
class CountValuesClaim(ExpressionsClaim):
    """A claim that an expression in n has certain values for each n of a range.

    So are stated the numbers of necklaces, of bracelets and of Lyndon words, and the ranks in the Hilton–Milnor
    splitting, of which ``witt`` gives the number of basic products of a multidegree.

    Parameters
    ----------
    formula : str
        As `certify.symmetry.expressions.values_of` reads it.
    first, last : int
        The range, within 1 to 1000.
    claimed : mapping
        ``values``, a list with one number for each n.

    Raises
    ------
    BadInput
        If the expression cannot be read, the range is none, or there is not one value for each n.
    """

    formula: str
    first: int
    last: int
    claimed: Values = field(default_factory=dict)
    route: str = "values"
    kind: ClassVar[str] = "count-values"

    def __post_init__(self) -> None:
        """Refuse ranges and expressions that are none, and another number of values."""
        super().__post_init__()
        number, given = self.last - self.first + 1, self.claimed.get("values")
        if given is not None and len(given) != number:
            raise BadInput(where="values", expected=f"one for each of the {number} numbers n", found=f"{len(given)}")

    def expressions(self) -> dict[str, str]:
        """Return the formula."""
        return {"formula": self.formula}

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the values."""
        list(contributions)
        return {"values": self.values("formula")}

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse at the first value that is not the one claimed."""
        for n, claimed in enumerate(self.claimed.get("values", ()), self.first):
            self.compare_one(f"{self.formula} for n = {n}", claimed, found["values"][n - self.first])

    def answer(self, found: Values) -> dict[str, Any]:
        """Return the values as the statement holds them."""
        return {"values": [integer_value(value) for value in found["values"]]}

    def lines(self, found: Values) -> list[str]:
        """Write the values."""
        return [f"{self.formula} = {', '.join(map(str, found['values']))} {self.range_in_words}"]
