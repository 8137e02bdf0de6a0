from __future__ import annotations

import pytest

from certify.exact import Vector, add_multiple, combination, entries

HUGE = 10**40


@pytest.mark.parametrize(
    ("target", "factor", "pairs", "expected"),
    [
        ({}, 5, [], {}),
        ({}, 5, [(3, 2)], {3: 10}),
        ({}, 0, [(3, 2)], {}),
        ({3: 1}, 0, [(3, 2), (4, 7)], {3: 1}),
        ({3: -10}, 5, [(3, 2)], {}),
        ({0: 1, 2: 3}, -3, [(2, 1), (5, 1)], {0: 1, 5: -3}),
        ({0: HUGE}, -HUGE, [(0, 1), (1, HUGE)], {1: -HUGE * HUGE}),
        ({}, 1, [(1, 4), (1, -4), (1, 2)], {1: 2}),
    ],
)
def test_adding_a_multiple_stores_no_zero(
    target: Vector, factor: int, pairs: list[tuple[int, int]], expected: Vector
) -> None:
    add_multiple(target, factor, pairs)
    assert target == expected


def test_adding_a_multiple_does_not_change_the_other_vector() -> None:
    other = {0: 2, 1: 5}
    add_multiple({0: -2}, 1, other.items())
    assert other == {0: 2, 1: 5}


def test_combinations() -> None:
    assert combination([]) == {}
    assert combination([(2, ((0, 1), (1, 3), (2, 3))), (-3, ((1, 3), (2, 2))), (0, ((7, 1),))]) == {0: 2, 1: -3}
    assert combination([(HUGE, ((0, HUGE),)), (-1, ((0, HUGE**2 - 1),))]) == {0: 1}


def test_finished_vectors_ascend() -> None:
    assert entries({}) == ()
    assert entries({5: 1, 0: -2, 3: HUGE}) == ((0, -2), (3, HUGE), (5, 1))
