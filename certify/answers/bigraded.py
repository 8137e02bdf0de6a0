"""Answers with finer gradings: Tor of the face ring by two degrees, and everything by sets of vertices."""

from __future__ import annotations

from bisect import bisect_left, bisect_right
from collections.abc import Iterable
from dataclasses import dataclass
from typing import TYPE_CHECKING

from certify.answers.certificates import Certificate
from certify.answers.graded import GradedGroups
from certify.answers.writing import check_characteristic, divisible, html_table, html_text
from certify.exact import AbelianGroup
from certify.simplicial import Label, SimplicialComplex, face_of, mask_of
from certify.simplicial.writing import latex_set, plain_set

if TYPE_CHECKING:
    import sympy

__all__ = ["Splitting", "Tor"]

_SHOWN = 12
_SHOWN_IN_TABLE = 500


@dataclass(frozen=True, slots=True, repr=False, eq=False)
class Tor:
    """The bigraded groups Tor_{i,d}(ℤ[K], ℤ) of the face ring; they are H^{-i,d} of (D², S¹)^K.

    Parameters
    ----------
    entries : tuple of pairs of a bidegree and an AbelianGroup
        The groups that are not zero, under (i, d), ascending. All variables have degree 2, so d is even.
    complex : SimplicialComplex
        K.
    certificate : Certificate
        ``certificate.write(path)`` writes it, ``certificate.verify()`` checks it.

    References
    ----------
    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, section 3.2 and theorem 4.5.4 (from memory).
    """

    entries: tuple[tuple[tuple[int, int], AbelianGroup], ...]
    complex: SimplicialComplex
    certificate: Certificate

    @property
    def groups(self) -> dict[tuple[int, int], AbelianGroup]:
        """The groups that are not zero, under (i, d)."""
        return dict(self.entries)

    def __getitem__(self, degrees: tuple[int, int]) -> AbelianGroup:
        """Return Tor_{i,d} for the degrees (i, d)."""
        return self.groups.get(degrees, AbelianGroup())

    # Without this, Python would go through all numbers from 0 on.
    __iter__ = None

    def betti(self, i: int, d: int, p: int = 0) -> int:
        """Return the bigraded Betti number: the dimension of Tor_{i,d} of the face ring over ℚ, or over 𝔽_p.

        Raises
        ------
        BadInput
            If `p` is neither 0 nor a prime.

        Notes
        -----
        Universal coefficients: over 𝔽_p, Tor_{i,d} has one dimension for each ℤ in Tor_{i,d} over ℤ, and for each
        torsion summand of order divisible by p in Tor_{i,d} or Tor_{i-1,d}.
        """
        check_characteristic(p)
        group = self[i, d]
        return group.rank if p == 0 else group.rank + divisible(group, p) + divisible(self[i - 1, d], p)

    def betti_numbers(self, p: int = 0) -> dict[tuple[int, int], int]:
        """Return the bigraded Betti numbers that are not zero, under (i, d).

        Raises
        ------
        BadInput
            If `p` is neither 0 nor a prime.

        Examples
        --------
        >>> from certify import polygon, tor
        >>> tor(polygon(4)).betti_numbers()
        {(0, 0): 1, (1, 4): 2, (2, 8): 1}
        """
        check_characteristic(p)
        keys = sorted({(i + step, d) for (i, d), _ in self.entries for step in (0, 1)})
        numbers = ((key, self.betti(*key, p=p)) for key in keys)
        return {key: number for key, number in numbers if number}

    def poincare_polynomial(self, p: int = 0) -> sympy.Expr:
        """Return Σ b_{i,d} s^i t^d as a SymPy expression in s and t, over ℚ or over 𝔽_p.

        Raises
        ------
        BadInput
            If `p` is neither 0 nor a prime.

        Notes
        -----
        At s = -1 it is the Hilbert series of the face ring times (1 - t²)^m, for each p.

        Examples
        --------
        >>> from certify import polygon, tor
        >>> tor(polygon(4)).poincare_polynomial()
        s**2*t**8 + 2*s*t**4 + 1
        """
        import sympy

        s, t = sympy.symbols("s t")
        return sympy.Add(*(number * s**i * t**d for (i, d), number in self.betti_numbers(p).items()))

    def cohomology(self) -> GradedGroups:
        """Return the integral cohomology of the moment-angle complex (D², S¹)^K: H^k is the sum of Tor_{i,k+i}.

        Examples
        --------
        >>> from certify import polygon, tor
        >>> tor(polygon(5)).cohomology()
        H^0 = ℤ, H^3 = ℤ⁵, H^4 = ℤ⁵, H^7 = ℤ
        """
        groups: dict[int, AbelianGroup] = {}
        for (i, d), group in self.entries:
            groups[d - i] = groups.get(d - i, AbelianGroup()) + group
        return GradedGroups.of(groups, "(D²,S¹)^K", upper=True)

    def __repr__(self) -> str:
        """Write the groups as in print."""
        return ", ".join(f"Tor_{{{i},{d}}} = {group}" for (i, d), group in self.entries)

    def latex(self) -> str:
        """Write the groups in LaTeX, to be used in mathematics mode."""
        name = r"\operatorname{Tor}"
        return r",\quad ".join(rf"{name}_{{{i},{d}}} \cong {group.latex()}" for (i, d), group in self.entries)

    def _repr_latex_(self) -> str:
        """Tell a notebook how to show the groups in LaTeX."""
        return rf"$\displaystyle {self.latex()}$"

    def _repr_html_(self) -> str:
        """Tell a notebook how to show the groups: a row for each i, a column for each d."""
        rows, columns = (sorted({key[place] for key, _ in self.entries}) for place in (0, 1))
        head = ["Tor<sub>i,d</sub>(ℤ[K], ℤ)", *(f"d = {d}" for d in columns)]
        return html_table(head, [[f"i = {i}", *(self[i, d].html() for d in columns)] for i in rows])


@dataclass(frozen=True, slots=True, repr=False, eq=False)
class Splitting:
    """The reduced homology of all full subcomplexes K_I, which is that of (D¹, S⁰)^K, (D², S¹)^K, … up to shifts.

    Parameters
    ----------
    entries : tuple of pairs of (mask of I, degree) and an AbelianGroup
        The groups that are not zero, ascending; bit i of a mask is for vertex i, counted from 0.
    complex : SimplicialComplex
        K.
    certificate : Certificate
        ``certificate.write(path)`` writes it, ``certificate.verify()`` checks it.

    References
    ----------
    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, theorem 4.5.8 (from memory).
    """

    entries: tuple[tuple[tuple[int, int], AbelianGroup], ...]
    complex: SimplicialComplex
    certificate: Certificate

    def __getitem__(self, vertices: Iterable[Label]) -> GradedGroups:
        """Return the reduced homology of K_I for a set I of vertices.

        Raises
        ------
        BadInput
            If a label is no vertex of K, or is given twice.
        """
        mask = mask_of(self.complex.numbers(vertices))
        start, stop = (cut(self.entries, mask, key=lambda entry: entry[0][0]) for cut in (bisect_left, bisect_right))
        found = {degree: group for (_, degree), group in self.entries[start:stop]}
        return GradedGroups.of(found, f"K_{plain_set(self._labels(mask))}", reduced=True)

    # Without this, Python would take numbers from 0 on for sets of vertices.
    __iter__ = None

    @property
    def groups(self) -> dict[tuple[Label, ...], dict[int, AbelianGroup]]:
        """The groups that are not zero, under the vertices of I and the degree."""
        found: dict[tuple[Label, ...], dict[int, AbelianGroup]] = {}
        for (mask, degree), group in self.entries:
            found.setdefault(self._labels(mask), {})[degree] = group
        return found

    def tor(self, i: int, vertices: Iterable[Label]) -> AbelianGroup:
        """Return Tor_i(ℤ[K], ℤ) in the multidegree of a set I of vertices: reduced cohomology of K_I in |I| - i - 1.

        Raises
        ------
        BadInput
            If a label is no vertex of K, or is given twice.

        References
        ----------
        M. Hochster, Cohen-Macaulay rings, combinatorics, and simplicial complexes, 1977 (from memory).

        Examples
        --------
        >>> from certify import projective_plane, splitting
        >>> splitting(projective_plane()).tor(3, range(1, 7))
        ℤ/2
        """
        labels = tuple(vertices)
        return self[labels].cohomology()[len(labels) - i - 1]

    def torsion(self) -> dict[tuple[Label, ...], dict[int, AbelianGroup]]:
        """Return the torsion subgroups of the H̃_q(K_I) that have any, under the vertices of I and q.

        Examples
        --------
        >>> from certify import projective_plane, splitting
        >>> splitting(projective_plane()).torsion()
        {(1, 2, 3, 4, 5, 6): {1: ℤ/2}}
        """
        found: dict[tuple[Label, ...], dict[int, AbelianGroup]] = {}
        for (mask, degree), group in self.entries:
            if group.torsion:
                found.setdefault(self._labels(mask), {})[degree] = AbelianGroup(0, group.torsion)
        return found

    def __repr__(self) -> str:
        """Write the first groups as in print, and how many more there are."""
        shown = [f"H̃_{q}(K_{plain_set(self._labels(mask))}) = {group}" for (mask, q), group in self.entries[:_SHOWN]]
        more = len(self.entries) - _SHOWN
        return ", ".join(shown) + (f", and {more} more" if more > 0 else "")

    def latex(self) -> str:
        """Write all groups in LaTeX, to be used in mathematics mode."""
        names = ((rf"\tilde{{H}}_{{{q}}}(K_{{{latex_set(self._labels(mask))}}})", g) for (mask, q), g in self.entries)
        return r",\quad ".join(rf"{name} \cong {group.latex()}" for name, group in names)

    def _repr_html_(self) -> str:
        """Tell a notebook how to show the groups as a table; very long ones are cut, and say so."""
        rows = [
            (html_text(plain_set(self._labels(mask))), f"{degree}", group.html())
            for (mask, degree), group in self.entries[:_SHOWN_IN_TABLE]
        ]
        more = len(self.entries) - _SHOWN_IN_TABLE
        cut = [(f"and {more} more", "", "")] if more > 0 else []
        return html_table(("I", "q", "H̃<sub>q</sub>(K<sub>I</sub>; ℤ)"), rows + cut)

    def _labels(self, mask: int) -> tuple[Label, ...]:
        return tuple(self.complex.labels[number] for number in face_of(mask))
