from __future__ import annotations

import pytest

from certify.errors import BadInput
from certify.products import parse_pair, parse_pairs


@pytest.mark.parametrize(
    ("text", "n"),
    [
        ("(D1, S0)", 1),
        ("(D2,S1)", 2),
        ("  ( D^5 ,  S^4 )  ", 5),
        ("(D¹,S⁰)", 1),
        ("(D¹², S¹¹)", 12),
        ("(D999, S998)", 999),
    ],
)
def test_disc_pairs_are_read_as_in_print(text: str, n: int) -> None:
    assert parse_pair(text).name == f"(D{n}, S{n - 1})"


@pytest.mark.parametrize(
    "text",
    [
        "",
        "D1, S0",
        "(D1 S0)",
        "(D1, S0",
        "(d1, s0)",
        "(S0, D1)",
        "(D1, S0) (D1, S0)",
        "(D-1, S-2)",
        "(D1.0, S0)",
        "(D٢, S١)",
        "(D1000, S999)",
        "(S0, *)",
        "(RP0, *)",
        "(cone 3, 2)",
        "(P1(2), *)",
        "(P2(1), *)",
        "(S1, S0)",
    ],
)
def test_what_is_no_pair_is_refused(text: str) -> None:
    with pytest.raises(BadInput, match="expected a pair like") as caught:
        parse_pair(text)
    assert caught.value.found == repr(text)


@pytest.mark.parametrize(
    ("text", "right"),
    [("(D1, S1)", "(D1, S0)"), ("(D3, S1)", "(D3, S2)"), ("(D0, S0)", "(D1, S0)"), ("(D2, S3)", "(D2, S1)")],
)
def test_another_sphere_is_refused_with_the_right_one(text: str, right: str) -> None:
    with pytest.raises(BadInput) as caught:
        parse_pair(text)
    assert right in caught.value.expected


@pytest.mark.parametrize(("n", "text", "symbol"), [(1, "(D1, S0)", "(D¹,S⁰)"), (10, "(D10, S9)", "(D¹⁰,S⁹)")])
def test_disc_pairs_are_written_and_read_again(n: int, text: str, symbol: str) -> None:
    pair = parse_pair(f"(D{n},S{n - 1})")
    assert str(pair) == text
    assert pair.symbol == symbol
    assert parse_pair(text) == parse_pair(symbol) == pair


@pytest.mark.parametrize("vertices", [0, 1, 3])
def test_one_text_is_for_all_vertices(vertices: int) -> None:
    assert parse_pairs("(D2, S1)", vertices) == (parse_pair("(D2, S1)"),) * vertices


def test_a_list_has_a_text_for_each_vertex() -> None:
    assert parse_pairs([], 0) == ()
    assert parse_pairs(["(D2, S1)", "(D1, S0)"], 2) == (parse_pair("(D2, S1)"), parse_pair("(D1, S0)"))


@pytest.mark.parametrize(("texts", "vertices"), [([], 1), (["(D1, S0)"], 0), (["(D1, S0)"] * 2, 3)])
def test_a_list_of_another_length_is_refused(texts: list[str], vertices: int) -> None:
    with pytest.raises(BadInput) as caught:
        parse_pairs(texts, vertices)
    assert caught.value.expected == f"one for each of the {vertices} vertices"
    assert caught.value.found == str(len(texts))


def test_a_faulty_text_is_refused_even_if_there_is_no_vertex() -> None:
    with pytest.raises(BadInput):
        parse_pairs("(D1, S7)", 0)
