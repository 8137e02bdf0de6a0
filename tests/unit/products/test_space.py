from __future__ import annotations

import pytest

from certify.errors import BadInput
from certify.products import PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import SimplicialComplex, build

DISC = parse_pair("(D1, S0)")
OTHER_DISC = parse_pair("(D2, S1)")


@pytest.mark.parametrize(
    ("pairs", "text"),
    [([1, 1, 1], "(D¹,S⁰)^K"), ([12, 12, 12], "(D¹²,S¹¹)^K"), ([1, 2, 1], "(X,A)^K")],
)
def test_the_space_is_written_as_in_print(pairs: list[int], text: str) -> None:
    assert str(PolyhedralProduct(build("points", m=3), parse_pairs([f"(D{n}, S{n - 1})" for n in pairs], 3))) == text


def test_a_product_without_vertices() -> None:
    empty = PolyhedralProduct(SimplicialComplex.from_facets([[]]), ())
    assert str(empty) == "(X,A)^K"


@pytest.mark.parametrize("count", [0, 2, 4])
def test_one_pair_for_each_vertex_is_needed(count: int) -> None:
    with pytest.raises(BadInput) as caught:
        PolyhedralProduct(build("points", m=3), (DISC,) * count)
    assert caught.value.expected == "one pair for each of the 3 vertices"
    assert caught.value.found == f"{count} pairs"


def test_ghosts_have_pairs_too() -> None:
    k = SimplicialComplex.from_facets([[1]], vertices=[1, 2])
    with pytest.raises(BadInput):
        PolyhedralProduct(k, (DISC,))
    assert PolyhedralProduct(k, (DISC, OTHER_DISC)).pairs[1] == OTHER_DISC
