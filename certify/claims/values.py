"""What claims about values share that are no groups: numbers, tables of numbers, matrices."""

from __future__ import annotations

from abc import abstractmethod
from collections.abc import Iterable, Iterator, Mapping
from typing import Any

from certify.claims.base import Claim, Contribution, Task, complex_value
from certify.errors import ClaimIsFalse

__all__ = ["Values", "ValuesClaim"]

Values = Mapping[str, Any]
"""What was found, under the names that statements have for it, as JSON."""


class ValuesClaim(Claim[Values]):
    """A claim that certain values are those of a complex or of a group that acts on it.

    Attributes
    ----------
    claimed : mapping
        The claimed values, under the same names as those found; one that is missing is asked for.
    """

    claimed: Values

    @abstractmethod
    def fields(self) -> dict[str, Any]:
        """Return what the statement holds besides complex, kind and values."""

    @abstractmethod
    def name(self, key: str) -> str:
        """Write in words what a value is."""

    def tasks(self) -> Iterator[Task]:
        """Yield nothing: the verifier finds such values by itself, unless a subclass says otherwise."""
        yield from ()

    @abstractmethod
    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the values."""

    def total(self, contributions: Iterable[Contribution]) -> Values:
        """Return the values, after the last task has been solved."""
        return self.found(contributions)

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse at the first value that is not the one claimed."""
        self.compare(self.claimed, found)

    def compare(self, claimed: Values, found: Values) -> None:
        """Raise ClaimIsFalse at the first of these values that is not the one found."""
        for key, value in claimed.items():
            if found[key] != value:
                self.compare_one(self.name(key), self.shown(key, value), self.shown(key, found[key]))

    def compare_one(self, what: str, claimed: object, found: object) -> None:
        """Raise ClaimIsFalse if two values differ."""
        if claimed != found:
            raise ClaimIsFalse(what=what, claimed=f"{claimed}", found=f"{found}")

    def shown(self, key: str, value: Any) -> str:  # noqa: ARG002 - for those whose values need it
        """Write a value."""
        return str(value)

    def question(self) -> dict[str, Any]:
        """Return the complex, the kind, and what the kind adds."""
        return {"kind": self.kind} | complex_value(self.base) | self.fields()

    def answer(self, found: Values) -> dict[str, Any]:
        """Return the values as the statement holds them."""
        return dict(found)

    def lines(self, found: Values) -> list[str]:
        """Write each value."""
        return [f"{self.name(key)}: {self.shown(key, value)}" for key, value in found.items()]

    def value(self, found: Values) -> dict[str, Any]:
        """Return the values."""
        return dict(found)
