"""Graded groups as one reads them: printed, in LaTeX, as a table, and as polynomials."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from certify.answers.certificates import Certificate
from certify.answers.writing import check_characteristic, divisible, html_table, html_text
from certify.errors import BadInput
from certify.exact import AbelianGroup

if TYPE_CHECKING:
    import sympy

__all__ = ["GradedGroups", "Homology"]


@dataclass(frozen=True, slots=True, repr=False, eq=False)
class GradedGroups:
    """The homology or cohomology groups of a space, by degree.

    Two are equal when they have the same groups in the same degrees and the same notation; of what space they are,
    and whether a certificate stands behind them, does not matter.

    Parameters
    ----------
    entries : tuple of pairs of a degree and an AbelianGroup
        The groups that are not zero, degrees ascending.
    degrees : tuple of int, or None
        The degrees that are known, from 0 on; None if all are.
    space : str
        What they are the groups of, in the notation of mathematics.
    reduced, upper : bool
        Whether this is reduced homology, and whether it is cohomology.

    Examples
    --------
    >>> GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(2, (2,))})
    H_0 = ℤ, H_1 = ℤ² ⊕ ℤ/2
    """

    entries: tuple[tuple[int, AbelianGroup], ...]
    degrees: tuple[int, ...] | None = None
    space: str = "X"
    reduced: bool = False
    upper: bool = False

    @classmethod
    def of(
        cls, groups: Mapping[int, AbelianGroup], space: str = "X", *, reduced: bool = False, upper: bool = False
    ) -> GradedGroups:
        """Return these groups, with zero in all other degrees."""
        entries = tuple((degree, groups[degree]) for degree in sorted(groups) if groups[degree])
        return GradedGroups(entries, None, space, reduced, upper)

    @property
    def groups(self) -> dict[int, AbelianGroup]:
        """The groups that are not zero, by degree."""
        return dict(self.entries)

    def __getitem__(self, degree: int) -> AbelianGroup:
        """Return the group in a degree.

        Raises
        ------
        BadInput
            If this degree was not asked for.
        """
        if self.degrees is not None and degree >= 0 and degree not in self.degrees:
            known = ", ".join(map(str, self.degrees))
            raise BadInput(where="degree", expected=f"one that was asked for ({known})", found=f"{degree}")
        return self.groups.get(degree, AbelianGroup())

    def __eq__(self, other: object) -> bool:
        """Compare groups and notation, not spaces or certificates."""
        return isinstance(other, GradedGroups) and self._key() == other._key()

    def __hash__(self) -> int:
        """Return the hash of what is compared."""
        return hash(self._key())

    # Without this, Python would go through all degrees from 0 on for ever.
    __iter__ = None

    def betti(self, degree: int, p: int = 0) -> int:
        """Return the Betti number in a degree: over ℚ, or over 𝔽_p for a prime p.

        Raises
        ------
        BadInput
            If `p` is neither 0 nor a prime, or the degree (or, for a prime, the neighbour whose torsion counts) was
            not asked for.

        Notes
        -----
        Universal coefficients: over 𝔽_p, H_k has one dimension for each ℤ in H_k(ℤ), and for each torsion summand of
        order divisible by p in H_k(ℤ) or H_{k-1}(ℤ). In cohomology it is H^k(ℤ) and H^{k+1}(ℤ).

        References
        ----------
        A. Hatcher, Algebraic Topology, Cambridge 2002, corollary 3A.6 (from memory).

        Examples
        --------
        >>> plane = GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(0, (2,))})
        >>> [plane.betti(k) for k in range(3)], [plane.betti(k, p=2) for k in range(3)]
        ([1, 0, 0], [1, 1, 1])
        """
        check_characteristic(p)
        if p == 0:
            return self[degree].rank
        neighbour = degree + 1 if self.upper else degree - 1
        return self[degree].rank + divisible(self[degree], p) + divisible(self[neighbour], p)

    def betti_numbers(self, p: int = 0) -> dict[int, int]:
        """Return the Betti numbers that are not zero, by degree.

        Raises
        ------
        BadInput
            If `p` is neither 0 nor a prime, or only some degrees were asked for.
        """
        check_characteristic(p)
        self._need_all("Betti numbers")
        step = -1 if self.upper else 1
        degrees = sorted({degree + away for degree, _ in self.entries for away in (0, step)})
        numbers = ((degree, self.betti(degree, p)) for degree in degrees)
        return {degree: number for degree, number in numbers if number}

    def euler_characteristic(self) -> int:
        """Return Σ (-1)^k b_k; for reduced groups it is one less than for the space.

        Raises
        ------
        BadInput
            If only some degrees were asked for.
        """
        self._need_all("the Euler characteristic")
        return sum((-1) ** (degree % 2) * group.rank for degree, group in self.entries)

    def poincare_polynomial(self, p: int = 0) -> sympy.Expr:
        """Return Σ b_k t^k as a SymPy expression in t, over ℚ or over 𝔽_p.

        Raises
        ------
        BadInput
            If `p` is neither 0 nor a prime, or only some degrees were asked for.

        Notes
        -----
        Its value at -1 is the Euler characteristic, for each p. Reduced groups may have a term t^-1.

        Examples
        --------
        >>> plane = GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(0, (2,))})
        >>> plane.poincare_polynomial(), plane.poincare_polynomial(p=2)
        (1, t**2 + t + 1)
        """
        import sympy

        t = sympy.Symbol("t")
        return sympy.Add(*(number * t**degree for degree, number in self.betti_numbers(p).items()))

    def cohomology(self) -> GradedGroups:
        """Return the integral cohomology; groups that are cohomology already stay as they are.

        Raises
        ------
        BadInput
            If only some degrees were asked for.

        Notes
        -----
        Universal coefficients: H^k is the free part of H_k plus the torsion of H_{k-1}.

        Examples
        --------
        >>> GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(0, (2,))}).cohomology()
        H^0 = ℤ, H^2 = ℤ/2
        """
        self._need_all("cohomology")
        if self.upper:
            return self
        groups: dict[int, AbelianGroup] = {}
        for degree, group in self.entries:
            groups[degree] = groups.get(degree, AbelianGroup()) + AbelianGroup(group.rank)
            groups[degree + 1] = AbelianGroup(0, group.torsion)
        return GradedGroups.of(groups, self.space, reduced=self.reduced, upper=True)

    def __repr__(self) -> str:
        """Write the groups as in print; if only some degrees are known, zero groups as well."""
        letter = "H̃" if self.reduced else "H"
        mark = "^" if self.upper else "_"
        rows = (f"{letter}{mark}{degree} = {group}" for degree, group in self._rows())
        return ", ".join(rows) or f"{letter}{mark}k = 0 for all k"

    def latex(self) -> str:
        r"""Write the groups in LaTeX, to be used in mathematics mode.

        Examples
        --------
        >>> print(GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(2)}).latex())
        H_{0} \cong \mathbb{Z},\quad H_{1} \cong \mathbb{Z}^{2}
        """
        letter = r"\tilde{H}" if self.reduced else "H"
        mark = "^" if self.upper else "_"
        rows = (rf"{letter}{mark}{{{k}}} {_relation(group)} {group.latex()}" for k, group in self._rows())
        return r",\quad ".join(rows) or rf"{letter}{mark}{{k}} = 0 \text{{ for all }} k"

    def _repr_latex_(self) -> str:
        """Tell a notebook how to show the groups in LaTeX."""
        return rf"$\displaystyle {self.latex()}$"

    def _repr_html_(self) -> str:
        """Tell a notebook how to show the groups as a table."""
        index = "<sup>k</sup>" if self.upper else "<sub>k</sub>"
        head = f"{'H̃' if self.reduced else 'H'}{index}({html_text(self.space)}; ℤ)"
        return html_table(("k", head), [(f"{degree}", group.html()) for degree, group in self._rows()])

    def _key(self) -> tuple[object, ...]:
        return self.entries, self.degrees, self.reduced, self.upper

    def _rows(self) -> list[tuple[int, AbelianGroup]]:
        """Return the groups to be shown."""
        if self.degrees is None:
            return list(self.entries)
        return [(degree, self[degree]) for degree in self.degrees]

    def _need_all(self, what: str) -> None:
        if self.degrees is not None:
            known = ", ".join(map(str, self.degrees))
            raise BadInput(where=what, expected="groups in all degrees", found=f"those in degrees {known} only")


@dataclass(frozen=True, slots=True, repr=False, eq=False)
class Homology(GradedGroups):
    """Proved homology groups; what is derived from them follows from what their certificate proves.

    Parameters
    ----------
    entries, degrees, space, reduced, upper
        As in `GradedGroups`.
    certificate : Certificate
        ``certificate.write(path)`` writes it, ``certificate.verify()`` checks it.
    """

    certificate: Certificate = field(kw_only=True)


def _relation(group: AbelianGroup) -> str:
    """Return how a group is set against its name: isomorphic, or equal to zero."""
    return r"\cong" if group else "="
