from __future__ import annotations

from typing import Any

import pytest

from certify.certificate import basis_value, vector_value
from certify.exact import AdaptedBasis, AdaptedDegree, Entries, Group, Pair
from certify.exact.staircase import NATURAL, Layout

BIG = 2**60


@pytest.mark.parametrize(
    ("vector", "value"),
    [
        ((), []),
        (((0, 1),), [0, 1]),
        (((3, -1), (7, BIG), (8, -BIG)), [3, -1, 7, str(BIG), 8, str(-BIG)]),
    ],
)
def test_vectors_are_cells_and_coefficients_in_turn(vector: Entries, value: list[int | str]) -> None:
    assert vector_value(vector) == value


def _degree(
    matched: tuple[int, ...] = (),
    pairs: tuple[Pair, ...] = (),
    cycles: tuple[Entries, ...] = (),
    layout: Layout = NATURAL,
) -> AdaptedDegree:
    return AdaptedDegree(matched, pairs, cycles, layout)


@pytest.mark.parametrize(
    ("degrees", "value"),
    [
        ([], []),
        ([_degree()], [{}]),
        ([_degree(matched=(2, 5)), _degree()], [{"matched": [2, 5]}, {}]),
        ([_degree(cycles=(((0, 1), (1, -1)),))], [{"cycles": [[0, 1, 1, -1]]}]),
        # With e = 1 the b is d a, and is not written.
        ([_degree(pairs=(Pair(((0, 1),), 1, ((4, 3),)),))], [{"pairs": [[[0, 1]]]}]),
        ([_degree(pairs=(Pair(((0, 1),), 2, ((4, 3),)),))], [{"pairs": [[[0, 1], 2, [4, 3]]]}]),
        ([_degree(pairs=(Pair(((0, 1),), BIG, ((4, -BIG),)),))], [{"pairs": [[[0, 1], str(BIG), [4, str(-BIG)]]]}]),
        # An order is written even when there are no groups.
        ([_degree(layout=Layout((1, 0), ()))], [{"order": [1, 0]}]),
        (
            [_degree(layout=Layout((1, 0), (Group((1, 0), [[BIG, 1], [-1, 0]]),)))],
            [{"groups": [{"cells": [1, 0], "inverse": [[str(BIG), 1], [-1, 0]]}], "order": [1, 0]}],
        ),
    ],
)
def test_bases_leave_out_what_is_empty(degrees: list[AdaptedDegree], value: list[dict[str, Any]]) -> None:
    assert basis_value(AdaptedBasis(tuple(degrees))) == value
