"""What claims share that are about groups by degree and about whole numbers beside them."""

from __future__ import annotations

from abc import abstractmethod
from collections.abc import Mapping
from typing import Any

from certify.certificate.canonical import integer_value
from certify.claims.base import DegreesClaim
from certify.errors import ClaimIsFalse
from certify.exact import AbelianGroup

__all__ = ["Numbers", "WithNumbers"]

Numbers = Mapping[str, int | None]
"""Whole numbers under the keys that statements and sheets have for them; None where there is no such number."""


class WithNumbers(DegreesClaim):
    """A claim about homology groups, and about numbers of the same space.

    Attributes
    ----------
    claimed : mapping
        Claimed numbers; one that is missing is asked for.
    """

    claimed: Mapping[str, int]

    @abstractmethod
    def numbers(self, found: Mapping[int, AbelianGroup]) -> Numbers:
        """Return the numbers, once the groups are known."""

    @abstractmethod
    def number_name(self, key: str) -> str:
        """Write in words what a number is."""

    def check(self, found: Mapping[int, AbelianGroup]) -> None:
        """Raise ClaimIsFalse at the first group, or else the first number, that is not the one claimed."""
        super().check(found)
        numbers = self.numbers(found)
        for key, number in self.claimed.items():
            if numbers[key] != number:
                real = "not finite" if numbers[key] is None else str(numbers[key])
                raise ClaimIsFalse(what=self.number_name(key), claimed=str(number), found=real)

    def answer(self, found: Mapping[int, AbelianGroup]) -> dict[str, Any]:
        """Return groups and numbers as the statement holds them."""
        numbers = self.numbers(found)
        return super().answer(found) | {k: None if n is None else integer_value(n) for k, n in numbers.items()}

    def lines(self, found: Mapping[int, AbelianGroup]) -> list[str]:
        """Write the groups and the numbers."""
        numbers = self.numbers(found).items()
        return [*super().lines(found), *(f"{self.number_name(k)} is {n}" for k, n in numbers if n is not None)]

    def value(self, found: Mapping[int, AbelianGroup]) -> dict[str, Any]:
        """Return groups and numbers as JSON."""
        return {**super().value(found), **self.numbers(found)}
