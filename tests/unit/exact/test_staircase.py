from __future__ import annotations

import pytest

from certify.errors import InternalError
from certify.exact import Entries, Group
from certify.exact.staircase import NATURAL, Layout, arrange, is_natural

Family = list[tuple[Entries, int]]


def test_nothing_to_arrange() -> None:
    assert is_natural([])
    assert arrange(0, []) == NATURAL


@pytest.mark.parametrize(
    "family",
    [
        [(((0, 1),), 0)],
        [(((0, -1),), 0), (((0, 5), (1, 1)), 1)],
        [(((0, 10**30), (1, 7), (2, -1)), 2), (((0, 1),), 0), (((0, 3), (1, -1)), 1)],
    ],
)
def test_vectors_that_end_in_a_unit_need_no_order(family: Family) -> None:
    """The natural order is from the largest cell down, and it is not written out."""
    assert is_natural(family)
    assert arrange(len(family), family) == NATURAL


@pytest.mark.parametrize(
    "family",
    [
        [(((0, 2),), 0)],
        [(((0, 1), (1, 2)), 1)],
        [(((0, 1), (1, 1)), 0)],
    ],
)
def test_vectors_that_do_not_end_in_a_unit_at_home(family: Family) -> None:
    assert not is_natural(family)


def test_a_vector_that_leads_with_a_smaller_cell_gives_an_order() -> None:
    """Cell 0 leads the first vector, which is not zero on 1; so 0 comes before 1."""
    family: Family = [(((0, 1), (1, 2)), 0), (((1, 1),), 1)]
    assert arrange(2, family) == Layout((0, 1), ())


def test_cells_without_a_relation_stand_from_the_largest_down() -> None:
    """The order is 0 before 2, and otherwise from the largest cell down."""
    family: Family = [(((0, 1), (2, 1)), 0), (((1, 1),), 1), (((2, 1),), 2), (((3, -1),), 3)]
    assert arrange(4, family).order == (3, 1, 0, 2)


def test_cells_that_must_be_leads_together() -> None:
    """The columns (2, 3) and (1, 1), on the cells 1 and 0, have determinant 2 · 1 - 1 · 3 = -1."""
    family: Family = [(((0, 3), (1, 2)), 1), (((0, 1), (1, 1)), 1)]
    # Rows are the cells 1, 0: (2, 1), (3, 1).
    assert arrange(2, family, [[0, 1]]) == Layout((1, 0), (Group((1, 0), [[-1, 1], [3, -2]]),))


def test_overlapping_classes_are_joined_and_others_left_alone() -> None:
    family: Family = [(((cell, 1),), cell) for cell in range(5)]
    layout = arrange(5, family, [[0, 3], [3, 4]])
    assert layout.order is not None
    assert [group.cells for group in layout.groups] == [(4, 3, 0)]
    assert layout.groups[0].inverse == [[0, 0, 1], [0, 1, 0], [1, 0, 0]]
    assert sorted(layout.order) == [0, 1, 2, 3, 4]
    start = layout.order.index(4)
    assert layout.order[start : start + 3] == (4, 3, 0)


def test_a_circle_of_relations_becomes_a_group() -> None:
    """Two vectors that each need the other's cell; the matrix of the group, rows 1 and 0, is (1, 2), (1, 1)."""
    family: Family = [(((0, 1), (1, 1)), 0), (((0, 1), (1, 2)), 1)]
    assert arrange(2, family) == Layout((1, 0), (Group((1, 0), [[-1, 2], [1, -1]]),))


@pytest.mark.parametrize(
    "family",
    [
        [(((0, 1), (1, 1)), 1), (((0, 1), (1, -1)), 1)],
        [(((0, 1), (1, 1)), 1), (((0, 2), (1, 2)), 1)],
    ],
)
def test_a_group_that_is_not_unimodular_is_an_error_of_the_program(family: Family) -> None:
    with pytest.raises(InternalError):
        arrange(2, family, [[0, 1]])
