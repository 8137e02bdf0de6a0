"""Laws of adapted bases, on random based complexes over ℤ whose homology is known."""

from __future__ import annotations

import json
from collections import Counter
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace

import pytest
from hypothesis import given

from certify.certificate import basis_value, canonical_line
from certify.exact import (
    AbelianGroup,
    AdaptedBasis,
    AdaptedDegree,
    BasedComplex,
    Entries,
    Group,
    Pair,
    adapted_basis,
)
from certify.exact.staircase import Layout
from tests.helpers import limits, verifier
from tests.laws.checker import check_adapted_basis
from tests.strategies import based_complexes

Known = tuple[BasedComplex, tuple[AbelianGroup, ...]]


@given(based_complexes())
def test_the_basis_is_adapted_and_its_staircase_shows_it(known: Known) -> None:
    """Lemmas A and B of docs/mathematics.md."""
    complex_, _ = known
    check_adapted_basis(complex_, adapted_basis(complex_))


@given(based_complexes())
def test_it_gives_the_homology_that_the_complex_was_built_with(known: Known) -> None:
    """A complex is, after a change of basis, a sum of pieces ℤ and ℤ --e--> ℤ, and only e matters up to isomorphism."""
    complex_, homology = known
    assert adapted_basis(complex_).homology() == homology


@given(based_complexes(max_degree=1, max_pieces=16))
def test_both_hold_for_one_large_matrix(known: Known) -> None:
    complex_, homology = known
    basis = adapted_basis(complex_)
    check_adapted_basis(complex_, basis)
    assert basis.homology() == homology


@dataclass(frozen=True)
class _Space:
    """A based complex as the verifier handles one: sizes, boundaries, and the leads of matched cells."""

    complex_: BasedComplex
    watched = -1

    @property
    def sizes(self) -> list[int]:
        return list(self.complex_.sizes)

    def boundary(self, degree: int, vector: Sequence[tuple[int, int]]) -> list[tuple[int, int]]:
        total: Counter[int] = Counter()
        for cell, factor in vector:
            for place, entry in self.complex_.boundaries[degree][cell]:
                total[place] += factor * entry
        return sorted((place, entry) for place, entry in total.items() if entry)

    def leads(self, degree: int, cells: Sequence[int]) -> list[int]:
        last = [self.complex_.boundaries[degree][cell][-1] for cell in cells]
        # In the verifier's own spaces the boundary of every cell that can be matched is ±1 there.
        assert all(abs(entry) == 1 for _, entry in last)
        return [place for place, _ in last]


@given(based_complexes())
def test_the_verifier_proves_that_homology_from_the_record(known: Known) -> None:
    """Whatever the complex and the size of its coefficients, prover and verifier agree through a record."""
    complex_, homology = known
    record = json.loads(canonical_line(basis_value(adapted_basis(complex_))))
    proved = verifier().homology(_Space(complex_), record, verifier().Budget(limits()))
    assert tuple(AbelianGroup.of(rank, orders) for rank, orders in proved) == homology


# -- the checker itself can fail ----------------------------------------------------------------

# The columns (2, 4) and (6, 8) have no unit: diag(2, 4) with torsion ℤ/2 ⊕ ℤ/4, and one cycle (2, -1) of degree 2.
_COMPLEX = BasedComplex.from_columns([[(), ()], [[(0, 2), (1, 4)], [(0, 6), (1, 8)], [(0, 1)]], []])

Change = Callable[[AdaptedDegree], AdaptedDegree]


def _twice(vector: Entries) -> Entries:
    return tuple((cell, 2 * entry) for cell, entry in vector)


def _other_layout(order: tuple[int, ...], groups: tuple[Group, ...] = ()) -> Change:
    return lambda part: replace(part, layout=Layout(order, groups))


@pytest.mark.parametrize(
    ("degree", "change", "condition"),
    [
        (1, lambda part: replace(part, pairs=part.pairs[1:]), "as many vectors as cells"),
        (1, lambda part: replace(part, cycles=tuple(map(_twice, part.cycles))), "the vectors are a basis"),
        (1, lambda part: replace(part, cycles=(((0, 1),),)), "d z = 0"),
        (1, lambda part: replace(part, pairs=tuple(replace(p, e=p.e + 1) for p in part.pairs)), "d a = e b"),
        (1, lambda part: replace(part, pairs=tuple(Pair(_twice(p.a), 2 * p.e, p.b) for p in part.pairs)), "a basis"),
        (1, _other_layout((0, 0, 1)), "the order lists each cell once"),
        (1, _other_layout((0, 1, 2)), "a group"),
        (0, lambda part: replace(part, cycles=(((0, 1), (2, 1)),)), "cells ascend and exist"),
    ],
)
def test_the_checker_refuses_a_wrong_basis(degree: int, change: Change, condition: str) -> None:
    basis = adapted_basis(_COMPLEX)
    check_adapted_basis(_COMPLEX, basis)
    parts = list(basis.degrees)
    parts[degree] = change(parts[degree])
    with pytest.raises(AssertionError, match=condition):
        check_adapted_basis(_COMPLEX, AdaptedBasis(tuple(parts)))


def test_the_checker_refuses_a_wrong_inverse() -> None:
    complex_ = BasedComplex.from_columns([[(), ()], [[(0, 2), (1, 3)]]])
    basis = adapted_basis(complex_)
    group = basis.degrees[0].layout.groups[0]
    wrong = Group(group.cells, [[-entry for entry in row] for row in group.inverse])
    bottom = replace(basis.degrees[0], layout=Layout(basis.degrees[0].layout.order, (wrong,)))
    with pytest.raises(AssertionError, match="the inverse is one"):
        check_adapted_basis(complex_, AdaptedBasis((bottom, *basis.degrees[1:])))
