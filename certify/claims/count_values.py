"""The claim kind ``count-values``: the values of an expression in counts for a range of n."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.certificate.canonical import integer_value
from certify.claims.base import Contribution
from certify.claims.count_identities import check_expression, check_range
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.families import simplex
from certify.symmetry.expressions import values_of

__all__ = ["CountValuesClaim"]


@dataclass(frozen=True)
class CountValuesClaim(ValuesClaim):
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
        """Refuse ranges and expressions that are none."""
        check_range(self.first, self.last)
        check_expression("formula", self.formula, self.first)
        if "values" in self.claimed:
            _check_number(self.claimed["values"], self.last - self.first + 1)

    @property
    def base(self) -> SimplicialComplex:
        """The complex of nothing: the claim is about numbers alone."""
        return simplex(0)

    def question(self) -> dict[str, Any]:
        """Return the expression and the range."""
        return {"kind": self.kind} | self.fields()

    def fields(self) -> dict[str, Any]:
        """Return the expression and the range."""
        return {"first": self.first, "formula": self.formula, "last": self.last}

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the values."""
        list(contributions)
        return {"values": values_of(self.formula, self.first, self.last)}

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse at the first value that is not the one claimed."""
        for n, claimed in enumerate(self.claimed.get("values", ()), self.first):
            self.compare_one(f"{self.formula} for n = {n}", claimed, found["values"][n - self.first])

    def answer(self, found: Values) -> dict[str, Any]:
        """Return the values as the statement holds them."""
        return {"values": [integer_value(value) for value in found["values"]]}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return key

    def lines(self, found: Values) -> list[str]:
        """Write the values."""
        values = ", ".join(map(str, found["values"]))
        return [f"{self.formula} = {values} for n = {self.first}, …, {self.last}"]


def _check_number(values: Sequence[int], number: int) -> None:
    if len(values) != number:
        raise BadInput(where="values", expected=f"one for each of the {number} numbers n", found=f"{len(values)}")
