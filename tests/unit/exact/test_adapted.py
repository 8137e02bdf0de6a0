from __future__ import annotations

import pytest

from certify.exact import AbelianGroup, AdaptedBasis, BasedComplex, adapted_basis
from certify.exact.staircase import NATURAL
from tests.laws.checker import check_adapted_basis

Columns = list[list[list[tuple[int, int]]]]

P, Q = 2**89 - 1, 10**39 + 1


def _basis(columns: Columns) -> AdaptedBasis:
    """Return the basis of a complex, after the independent check of Lemmas A and B."""
    complex_ = BasedComplex.from_columns(columns)
    basis = adapted_basis(complex_)
    check_adapted_basis(complex_, basis)
    return basis


@pytest.mark.parametrize(
    ("columns", "homology"),
    [
        ([[]], ["0"]),
        ([[], [], []], ["0", "0", "0"]),
        ([[[]]], ["Z"]),
        ([[], [[], []]], ["0", "Z^2"]),
        ([[[], []], []], ["Z^2", "0"]),
        ([[[]], [], [[]]], ["Z", "0", "Z"]),
        ([[[]], [[]]], ["Z", "Z"]),
        ([[[]], [[(0, 1)]]], ["0", "0"]),
        ([[[]], [[(0, -1)]]], ["0", "0"]),
        ([[[]], [[(0, 2)]]], ["Z/2", "0"]),
        ([[[]], [[(0, -P * Q)]]], [f"Z/{P} + Z/{Q}", "0"]),
        ([[[]], [[(0, 4)], [(0, 6)]]], ["Z/2", "Z"]),
        ([[[]], [[(0, P)], [(0, Q)]]], ["0", "Z"]),
        ([[[], []], [[(0, 4), (1, 6)]]], ["Z + Z/2", "0"]),
        ([[[], []], [[(0, 2), (1, 3)]]], ["Z", "0"]),
        ([[[], []], [[(0, 2)], [(1, 3)]]], ["Z/6", "0"]),
        ([[[], []], [[(0, 2), (1, 4)], [(0, 6), (1, 8)]]], ["Z/2 + Z/4", "0"]),
        ([[[]], [[]], [[(0, 3)]], [[]], [[(0, 5)]]], ["Z", "Z/3", "0", "Z/5", "0"]),
        # The boundary of degree 2 spans what that of degree 1 kills, with index 2 in it.
        ([[[]], [[(0, 2)], [(0, 3)]], [[(0, 6), (1, -4)]]], ["0", "Z/2", "0"]),
    ],
)
def test_homology_of_small_complexes(columns: Columns, homology: list[str]) -> None:
    assert _basis(columns).homology() == tuple(map(AbelianGroup.parse, homology))


def test_a_complex_without_degrees() -> None:
    assert _basis([]).homology() == ()


def test_a_cell_that_cancels_another_is_matched() -> None:
    """d e = 1 - 0 has the lead 1, so e is matched, and 0 stays as the cycle that represents the component."""
    basis = _basis([[[], []], [[(0, -1), (1, 1)]]])
    assert basis.degrees[1].matched == (0,)
    assert basis.degrees[0].cycles == (((0, 1),),)
    assert [degree.pairs for degree in basis.degrees] == [(), ()]
    assert [degree.layout for degree in basis.degrees] == [NATURAL, NATURAL]


def test_a_second_edge_between_the_same_points_is_a_cycle() -> None:
    basis = _basis([[[], []], [[(0, -1), (1, 1)], [(0, -1), (1, 1)]]])
    assert basis.degrees[1].matched == (0,)
    assert basis.degrees[1].cycles == (((0, -1), (1, 1)),)


def test_a_pair_with_torsion() -> None:
    basis = _basis([[[]], [[(0, -6)]]])
    (pair,) = basis.degrees[1].pairs
    assert pair.e == 6
    # d a = 6 b leaves the choice of one sign.
    assert (pair.a, pair.b) in [(((0, 1),), ((0, -1),)), (((0, -1),), ((0, 1),))]


def test_a_unit_that_is_no_lead_keeps_groups_small() -> None:
    """In (1, 2) the lead is no unit, but 1 is: there is neither torsion nor a group of cells."""
    basis = _basis([[[], []], [[(0, 1), (1, 2)]]])
    assert [pair.e for pair in basis.degrees[1].pairs] == [1]
    assert all(not degree.layout.groups for degree in basis.degrees)


def test_a_core_without_units_needs_a_group() -> None:
    """The vector (2, 3) and one more are a basis of ℤ², and no entry of (2, 3) is ±1."""
    basis = _basis([[[], []], [[(0, 2), (1, 3)]]])
    (group,) = basis.degrees[0].layout.groups
    assert sorted(group.cells) == [0, 1]


def test_what_a_core_leaves_over_takes_part_in_the_degree_below() -> None:
    """Degree 2 has the core (2, 3) on two cells; the combination that completes it to a basis has boundary ±1 below."""
    columns: Columns = [[[]], [[(0, 3)], [(0, -2)]], [[(0, 2), (1, 3)]]]
    basis = _basis(columns)
    assert not any(basis.homology())
    assert [len(degree.pairs) + len(degree.matched) for degree in basis.degrees] == [0, 1, 1]


def test_the_basis_of_a_large_torsion_free_complex_is_a_matching_with_few_vectors() -> None:
    """A path of n edges: every edge is matched, and the one cycle is a point."""
    n = 60
    points: list[list[tuple[int, int]]] = [[] for _ in range(n + 1)]
    basis = _basis([points, [[(i, -1), (i + 1, 1)] for i in range(n)]])
    assert basis.degrees[1].matched == tuple(range(n))
    assert basis.degrees[0].cycles == (((0, 1),),)
