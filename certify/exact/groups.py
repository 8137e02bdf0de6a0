"""Finitely generated abelian groups, written and read as in print."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from math import gcd

from flint import fmpz

from certify.errors import BadInput

__all__ = ["AbelianGroup", "decimal", "superscript"]

_TERM = re.compile(
    r"(?P<zero>0)"
    r"|[Zℤ](?:\s*\^\s*(?P<rank>[0-9]{1,4000}))?"
    r"|[Zℤ]\s*/\s*(?P<one>[0-9]{1,4000})"
    r"|\(\s*[Zℤ]\s*/\s*(?P<many>[0-9]{1,4000})\s*\)\s*\^\s*(?P<count>[0-9]{1,40})"
)
_DIGITS = str.maketrans("0123456789", "⁰¹²³⁴⁵⁶⁷⁸⁹")
_PLAIN = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹", "0123456789")
_MOST_SUMMANDS = 10**6

_Power = Callable[[int], str]


@dataclass(frozen=True, slots=True, repr=False)
class AbelianGroup:
    """The group ℤ^rank ⊕ ℤ/d_1 ⊕ … ⊕ ℤ/d_s with invariant factors 1 < d_1 | d_2 | … | d_s.

    Equality is isomorphism, because the invariant factors are canonical; make groups through `of` or `parse`.

    Examples
    --------
    >>> AbelianGroup.of(2, [2, 6, 4])
    ℤ² ⊕ (ℤ/2)² ⊕ ℤ/12
    >>> AbelianGroup.parse("Z/2 + Z/3") == AbelianGroup.parse("Z/6")
    True
    """

    rank: int = 0
    torsion: tuple[int, ...] = ()

    @classmethod
    def of(cls, rank: int, orders: Iterable[int] = ()) -> AbelianGroup:
        """Return ℤ^rank plus one cyclic group of each of these orders (each at least 1)."""
        return cls(rank, _invariant_factors(orders))

    @classmethod
    def parse(cls, text: str) -> AbelianGroup:
        """Return the group that is written like ``0``, ``Z^34``, ``Z + (Z/2)^3`` or ``ℤ ⊕ ℤ/4``.

        Raises
        ------
        BadInput
            If a summand cannot be read; it is named.
        """
        rank = 0
        orders: list[int] = []
        plain = re.sub(r"([⁰¹²³⁴⁵⁶⁷⁸⁹]+)", lambda raised: "^" + raised[1].translate(_PLAIN), text)
        for summand in re.split(r"[+⊕]", plain):
            match = _TERM.fullmatch(summand.strip())
            order = int(match["one"] or match["many"] or 2) if match else 0
            count = int(match["count"] or 1) if match else 0
            if match is None or order < 1 or count > _MOST_SUMMANDS:
                raise BadInput(
                    where=f"the group {text!r}",
                    expected="summands like 0, Z, Z^34, Z/2 or (Z/2)^3 joined by +",
                    found=repr(summand.strip()),
                )
            if match["one"] or match["many"]:
                orders += [order] * count
            elif not match["zero"]:
                rank += int(match["rank"] or 1)
        return cls.of(rank, orders)

    def __add__(self, other: AbelianGroup) -> AbelianGroup:
        """Return the direct sum."""
        return AbelianGroup.of(self.rank + other.rank, self.torsion + other.torsion)

    def __bool__(self) -> bool:
        """Tell whether the group is other than zero."""
        return bool(self.rank or self.torsion)

    def __str__(self) -> str:
        """Write the group as in print."""
        return self._written("ℤ", " ⊕ ", superscript)

    def __repr__(self) -> str:
        """Write the group as in print: at a prompt, people want to read it."""
        return str(self)

    def latex(self) -> str:
        r"""Write the group in LaTeX, to be used in mathematics mode.

        Examples
        --------
        >>> print(AbelianGroup.of(34, [2, 2]).latex())
        \mathbb{Z}^{34} \oplus (\mathbb{Z}/2)^{2}
        """
        return self._written(r"\mathbb{Z}", r" \oplus ", lambda exponent: f"^{{{decimal(exponent)}}}")

    def html(self) -> str:
        """Write the group in HTML.

        Examples
        --------
        >>> AbelianGroup.of(34, [2]).html()
        'ℤ<sup>34</sup> ⊕ ℤ/2'
        """
        return self._written("ℤ", " ⊕ ", lambda exponent: f"<sup>{decimal(exponent)}</sup>")

    def _repr_latex_(self) -> str:
        """Tell a notebook how to show the group in LaTeX."""
        return f"${self.latex()}$"

    def _repr_html_(self) -> str:
        """Tell a notebook how to show the group in HTML."""
        return self.html()

    def plain(self) -> str:
        """Write the group in ASCII, as claim sheets do.

        Examples
        --------
        >>> AbelianGroup.of(3, [2, 2]).plain()
        'Z^3 + (Z/2)^2'
        """
        return self._written("Z", " + ", lambda exponent: f"^{decimal(exponent)}")

    def _written(self, ring: str, plus: str, power: _Power) -> str:
        terms = []
        if self.rank:
            terms.append(ring + (power(self.rank) if self.rank > 1 else ""))
        for order in sorted(set(self.torsion)):
            count = self.torsion.count(order)
            cyclic = f"{ring}/{decimal(order)}"
            terms.append(cyclic if count == 1 else f"({cyclic}){power(count)}")
        return plus.join(terms) or "0"


def superscript(number: int) -> str:
    """Write an exponent.

    Examples
    --------
    >>> superscript(34)
    '³⁴'
    """
    return decimal(number).translate(_DIGITS)


def decimal(number: int) -> str:
    """Write an integer of any size; Python itself refuses beyond some thousand digits.

    Examples
    --------
    >>> len(decimal(10**5000))
    5001
    """
    return str(fmpz(number))


def _invariant_factors(orders: Iterable[int]) -> tuple[int, ...]:
    """Return the invariant factors of the sum of cyclic groups of these orders, by ℤ/a ⊕ ℤ/b ≅ ℤ/gcd ⊕ ℤ/lcm."""
    factors: list[int] = []
    for number in orders:
        order = number
        if order == 1:
            continue
        for place in reversed(range(len(factors))):
            if factors[place] % order == 0 and (place == 0 or order % factors[place - 1] == 0):
                factors.insert(place, order)
                break
            common = gcd(factors[place], order)
            factors[place], order = factors[place] // common * order, common
            if order == 1:
                break
        else:
            factors.insert(0, order)
    return tuple(factors)
