"""Questions about counts that a person asks at a prompt; each answer has been proved, and has its certificate."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, field

from certify.answers.certificates import Certificate, proved_value
from certify.answers.elements import Given, elements_of, require_kind
from certify.claims.count_identities import IdentityClaim
from certify.claims.count_values import CountValuesClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.simplicial import SimplicialComplex

__all__ = ["CountValues", "OrbitCount", "count_identity", "count_values", "orbit_count"]


@dataclass(frozen=True, slots=True, repr=False)
class OrbitCount:
    """A number of orbits on colourings.

    Attributes
    ----------
    orbits, primitive : int
        All of them, and those with trivial isotropy.
    certificate : Certificate
    """

    orbits: int
    primitive: int
    certificate: Certificate = field(compare=False)

    def __repr__(self) -> str:
        """Write both numbers."""
        return f"{self.orbits} orbits, {self.primitive} with trivial isotropy"


@dataclass(frozen=True, slots=True, repr=False)
class CountValues:
    """The values of an expression in counts for a range of n.

    Attributes
    ----------
    values : tuple of int
    certificate : Certificate
    """

    values: tuple[int, ...]
    certificate: Certificate = field(compare=False)

    def __repr__(self) -> str:
        """Write the values."""
        return ", ".join(map(str, self.values))


def orbit_count(
    k: SimplicialComplex,
    colours: int,
    generators: Iterable[Given] | None = None,
    *,
    content: Sequence[int] | None = None,
) -> OrbitCount:
    """Return the number of orbits of a group of automorphisms of K on colourings of its vertices, proved.

    Examples
    --------
    >>> from certify import polygon
    >>> orbit_count(polygon(6), 2, ["(1 2 3 4 5 6)"])
    14 orbits, 9 with trivial isotropy
    """
    claim = OrbitCountClaim(
        k,
        colours,
        elements_of(generators, require_kind(k, SimplicialComplex)),
        None if content is None else tuple(content),
    )
    found, certificate = proved_value(claim, "a number of orbits")
    return OrbitCount(int(found["orbits"]), int(found["primitive"]), certificate)


def count_values(formula: str, first: int, last: int) -> CountValues:
    """Return the values of an expression in counts, for n from `first` to `last`, proved.

    Parameters
    ----------
    formula : str
        In ``n``, with + - * // **, sums and the counts that docs/claim-sheets.md lists.
    first, last : int
        Within 1 to 1000.

    Raises
    ------
    BadInput
        If the expression cannot be read or evaluated, or the range is none.

    Examples
    --------
    >>> count_values("witt(n, 2)", 1, 5)
    1, 1, 2, 2, 3
    """
    claim = CountValuesClaim(formula, first, last)
    found, certificate = proved_value(claim, f"{formula} for n = {first}, …, {last}")
    return CountValues(tuple(found["values"]), certificate)


def count_identity(left: str, right: str, first: int, last: int) -> Certificate:
    """Return a certificate that two expressions in counts have the same values, for n from `first` to `last`.

    Raises
    ------
    BadInput
        If an expression cannot be read or evaluated, or the range is none.
    ClaimIsFalse
        If they differ; the first such n is named.

    Examples
    --------
    >>> count_identity("necklaces(n, 2)", "sum(lyndon(d, 2) for d in divisors(n))", 1, 20).title
    'necklaces(n, 2) = sum(lyndon(d, 2) for d in divisors(n)) for n = 1, …, 20'
    """
    claim = IdentityClaim(left, right, first, last)
    return proved_value(claim, f"{left} = {right} for n = {first}, …, {last}")[1]
