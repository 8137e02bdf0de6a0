"""Adapted bases: the decomposition of a based complex into pieces ℤ and ℤ --e--> ℤ, ready to be certified.

The algorithm goes from the top degree down. In each degree it reduces the boundary columns of those basis
elements that are not already boundaries, on unit pivots: the *lead* of a reduced column is its cell with the
largest number. A column whose lead is no unit, or is taken and cannot be cleared, waits; what is left at the end
is a small core, which a diagonal form settles. Its boundaries are completed to a basis of the cells that they use up;
what completes them takes part in the degree below in place of these cells.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, field

from certify.exact.completion import completion
from certify.exact.complexes import BasedComplex
from certify.exact.groups import AbelianGroup
from certify.exact.smith import diagonal_columns
from certify.exact.staircase import NATURAL, Group, Layout, arrange, is_natural
from certify.exact.vectors import Entries, Vector, add_multiple, combination, entries

__all__ = ["AdaptedBasis", "AdaptedDegree", "Group", "Pair", "adapted_basis"]


@dataclass(frozen=True, slots=True)
class Pair:
    """Vectors a of degree k and b of degree k - 1 with ``d a == e * b``, e at least 1."""

    a: Entries
    e: int
    b: Entries


@dataclass(frozen=True, slots=True)
class AdaptedDegree:
    """What an adapted basis holds in one degree k.

    Parameters
    ----------
    matched : tuple of int
        Cells that are an a on their own, with e = 1 and so b = d a.
    pairs : tuple of Pair
        The other pairs with a of degree k.
    cycles : tuple of Entries
        The z of degree k.
    layout : Layout
        The staircase of degree k: of the a of `matched` and `pairs`, the z, and the b of degree k + 1, in this order.
    """

    matched: tuple[int, ...]
    pairs: tuple[Pair, ...]
    cycles: tuple[Entries, ...]
    layout: Layout


@dataclass(frozen=True, slots=True)
class AdaptedBasis:
    """An adapted basis of a based complex, degree by degree from 0.

    Notes
    -----
    In every degree the vectors {a} ∪ {z} ∪ {b of the pairs one degree up} are a ℤ-basis, so that the complex is the
    direct sum of the pieces ℤ z and ℤ a --e--> ℤ b (Lemma A of docs/mathematics.md).
    """

    degrees: tuple[AdaptedDegree, ...]

    def homology(self) -> tuple[AbelianGroup, ...]:
        """Return H_k for each degree k: one ℤ for each z of degree k, one ℤ/e for each pair of degree k + 1."""
        return tuple(
            AbelianGroup.of(
                len(degree.cycles), [pair.e for above in self.degrees[k + 1 : k + 2] for pair in above.pairs]
            )
            for k, degree in enumerate(self.degrees)
        )


def adapted_basis(complex_: BasedComplex) -> AdaptedBasis:
    """Return an adapted basis of any finite based complex over ℤ.

    Notes
    -----
    Cost: that of a sparse column reduction; linear in the cells when every column has a lead of its own.

    References
    ----------
    Lemmas A and B of docs/mathematics.md.

    Examples
    --------
    >>> rp2 = BasedComplex.from_columns([[()], [()], [[(0, 2)]]])
    >>> [str(group) for group in adapted_basis(rp2).homology()]
    ['ℤ', 'ℤ/2', '0']
    """
    from_above = _FromAbove()
    degrees = []
    for degree in reversed(range(len(complex_.boundaries))):
        work = _Degree(complex_.boundaries[degree], from_above)
        work.reduce()
        degrees.append(work.finish())
        from_above = work.below
    return AdaptedBasis(tuple(reversed(degrees)))


@dataclass(slots=True)
class _Element:
    """A basis element a of the degree at work: its vector, its boundary, and a cell of the class that it belongs to."""

    chain: Vector
    boundary: Vector
    home: int


@dataclass(slots=True)
class _FromAbove:
    """What a degree leaves to the one below: boundaries b with the cells they use up, and carried basis vectors."""

    matched: list[tuple[Entries, int]] = field(default_factory=list)
    boundaries: list[tuple[Entries, int]] = field(default_factory=list)
    carried: list[tuple[Vector, int]] = field(default_factory=list)
    classes: list[list[int]] = field(default_factory=list)
    used: set[int] = field(default_factory=set)


class _Degree:
    """The work in one degree: columns are the boundaries of its cells."""

    def __init__(self, columns: tuple[Entries, ...], above: _FromAbove) -> None:
        self.columns = columns
        self.above = above
        self.below = _FromAbove()
        self.classes = list(above.classes)
        self.pivots: dict[int, _Element | int] = {}
        self.matched: list[int] = []
        self.matched_boundaries: list[tuple[Entries, int]] = []
        self.pairs: list[tuple[Pair, int]] = []
        self.pair_boundaries: list[tuple[Entries, int]] = []
        self.cycles: list[tuple[Entries, int]] = []

    # -- reduction on unit pivots ------------------------------------------------------------------------------

    def reduce(self) -> None:
        """Find every a, e, b and z of this degree."""
        waiting = [element for element in self._slow_elements() if not self._settle(element)]
        progress = True
        while waiting and progress:
            still = [element for element in waiting if not self._settle(element)]
            progress = len(still) < len(waiting)
            waiting = still
        if waiting:
            self._core(waiting)

    def _slow_elements(self) -> Iterator[_Element]:
        """Yield the elements that need work; a column with a free unit lead is a pivot as it stands."""
        pivots, used = self.pivots, self.above.used
        for cell, column in enumerate(self.columns):
            if cell in used:
                continue
            if not column:
                self.cycles.append((((cell, 1),), cell))
                continue
            lead, coefficient = column[-1]
            if lead not in pivots and coefficient in (1, -1):
                pivots[lead] = cell
                self.matched.append(cell)
                self.matched_boundaries.append((column, lead))
            else:
                yield _Element({cell: 1}, dict(column), cell)
        for vector, home in self.above.carried:
            terms = ((coefficient, self.columns[cell]) for cell, coefficient in vector.items())
            yield _Element(vector, combination(terms), home)

    def _settle(self, element: _Element) -> bool:
        """Reduce an element until it is a cycle or a pivot (then True), or stuck on a lead that is no unit."""
        boundary = element.boundary
        while boundary:
            lead = max(boundary)
            if lead in self.pivots:
                self._clear(element, lead)
            elif boundary[lead] in (1, -1):
                self._accept_pivot(element, lead)
                return True
            else:
                return False
        self.cycles.append((entries(element.chain), element.home))
        return True

    def _clear(self, element: _Element, lead: int) -> None:
        """Remove `lead` from the boundary of an element with the pivot that has this lead."""
        pivot = self.pivots[lead]
        if isinstance(pivot, int):
            column = self.columns[pivot]
            factor = -element.boundary[lead] * column[-1][1]
            add_multiple(element.boundary, factor, column)
            add_multiple(element.chain, factor, ((pivot, 1),))
        else:
            factor = -element.boundary[lead] * pivot.boundary[lead]
            add_multiple(element.boundary, factor, pivot.boundary.items())
            add_multiple(element.chain, factor, pivot.chain.items())

    def _accept_pivot(self, element: _Element, lead: int) -> None:
        self.pivots[lead] = element
        self._accept_pair(element, 1, entries(element.boundary), lead)

    def _accept_pair(self, element: _Element, e: int, b: Entries, home: int) -> None:
        self.pairs.append((Pair(entries(element.chain), e, b), element.home))
        self.pair_boundaries.append((b, home))

    # -- the core ----------------------------------------------------------------------------------------------

    def _core(self, waiting: list[_Element]) -> None:
        """Settle the elements that no lead settles: units anywhere first, a diagonal form for the rest."""
        for element in waiting:
            while taken := [row for row in element.boundary if row in self.pivots]:
                self._clear(element, max(taken))
        while (unit := _sparsest_unit(waiting)) is not None:
            pivot, row = unit
            waiting.remove(pivot)
            self._accept_pivot(pivot, row)
            for element in waiting:
                if row in element.boundary:
                    self._clear(element, row)
        rest = [element for element in waiting if element.boundary]
        self.cycles += [(entries(element.chain), element.home) for element in waiting if not element.boundary]
        if rest:
            self._diagonal(rest)

    def _diagonal(self, elements: list[_Element]) -> None:
        """Settle the elements together, by a diagonal form of the matrix of their boundaries."""
        rows = sorted({row for element in elements for row in element.boundary})
        matrix = [[element.boundary.get(row, 0) for element in elements] for row in rows]
        orders, right = diagonal_columns(matrix)
        home = elements[0].home
        self.classes.append([element.home for element in elements])
        mixed = [
            _Element(
                combination((right[i][j], element.chain.items()) for i, element in enumerate(elements)),
                combination((right[i][j], element.boundary.items()) for i, element in enumerate(elements)),
                home,
            )
            for j in range(len(elements))
        ]
        boundaries = [{row: x // e for row, x in a.boundary.items()} for a, e in zip(mixed, orders, strict=False)]
        leads, carried = completion(boundaries)
        for element, e, boundary in zip(mixed, orders, boundaries, strict=False):
            self._accept_pair(element, e, entries(boundary), leads[0])
        self.cycles += [(entries(element.chain), home) for element in mixed[len(orders) :]]
        self.below.classes.append(leads)
        self.below.carried += [(vector, leads[0]) for vector in carried]
        self.below.used.update(leads)

    # -- the result --------------------------------------------------------------------------------------------

    def finish(self) -> AdaptedDegree:
        """Return this degree of the adapted basis, and leave the boundaries to the degree below."""
        self.below.boundaries = self.pair_boundaries
        self.below.matched = self.matched_boundaries
        self.below.used.update(self.pivots)
        explicit = [(pair.a, home) for pair, home in self.pairs] + self.cycles
        layout = NATURAL
        if self.classes or not is_natural(explicit + self.above.boundaries):
            family: list[tuple[Entries, int]] = [(((cell, 1),), cell) for cell in self.matched]
            family += explicit + self.above.matched + self.above.boundaries
            layout = arrange(len(self.columns), family, self.classes)
        return AdaptedDegree(
            matched=tuple(self.matched),
            pairs=tuple(pair for pair, _ in self.pairs),
            cycles=tuple(cycle for cycle, _ in self.cycles),
            layout=layout,
        )


def _sparsest_unit(elements: list[_Element]) -> tuple[_Element, int] | None:
    """Return the shortest boundary with an entry ±1, and the largest row of such an entry."""
    for element in sorted(elements, key=lambda element: len(element.boundary)):
        units = [row for row, coefficient in element.boundary.items() if coefficient in (1, -1)]
        if units:
            return element, max(units)
    return None
