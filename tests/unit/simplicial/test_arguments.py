from __future__ import annotations

from typing import Any

import pytest

from certify.errors import BadInput
from certify.simplicial.arguments import check_known, check_whole_number, distinct_labels, items, natural_order


@pytest.mark.parametrize(
    ("labels", "order"),
    [
        ([], ()),
        ([10, 9, 10], (9, 10)),
        (["b", "a10", "a9"], ("a10", "a9", "b")),
        (["b", 1, "a"], ("b", 1, "a")),
        ([(2,), (1,), (2,)], ((2,), (1,))),
    ],
)
def test_the_natural_order(labels: list[Any], order: tuple[Any, ...]) -> None:
    assert natural_order(iter(labels)) == order


@pytest.mark.parametrize(("value", "least", "most"), [(0, 0, None), (7, -1, None), (-1, -1, 0), (0, -1, 0)])
def test_a_whole_number_in_range_is_returned(value: int, least: int, most: int | None) -> None:
    assert check_whole_number("n", value, least=least, most=most) == value


@pytest.mark.parametrize("value", [True, 2.0, "2", None, [2], -1, 4])
def test_anything_else_is_refused(value: object) -> None:
    with pytest.raises(BadInput) as caught:
        check_whole_number("n", value, least=0, most=3)
    assert str(caught.value) == f"n: expected a whole number from 0 to 3, found {value!r}"


def test_lists_are_lists() -> None:
    assert items((1, 2), "facet 3") == (1, 2)
    for value in ("12", b"12"):
        with pytest.raises(BadInput, match="facet 3: expected a list"):
            items(value, "facet 3")


def test_labels_are_distinct_and_known() -> None:
    assert distinct_labels(iter([2, "a", (1,)]), "facet 3") == (2, "a", (1,))
    check_known([1, 2], {1, 2, 3}, "facet 3")
    with pytest.raises(BadInput, match="facet 3: expected each vertex once, found vertex 2 twice"):
        distinct_labels([2, 2], "facet 3")
    with pytest.raises(BadInput, match="facet 3: expected vertices of the complex, found vertex 4, which is none"):
        check_known([1, 4], {1, 2, 3}, "facet 3")
