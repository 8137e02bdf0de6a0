from __future__ import annotations

import inspect
from typing import Any

import pytest

from certify.errors import BadInput
from certify.simplicial import FAMILIES, build


@pytest.mark.parametrize("name", FAMILIES)
def test_the_registry_describes_the_functions(name: str) -> None:
    family = FAMILIES[name]
    assert family.name == name
    assert list(family.parameters) == list(inspect.signature(family.function).parameters)
    assert all(family.parameters.values())
    assert family.description


@pytest.mark.parametrize(
    ("name", "arguments", "text"),
    [
        ("polygon", {"n": 5}, "5 vertices, facets 12 15 23 34 45"),
        ("simplex", {"m": 2}, "2 vertices, facets 12"),
        ("simplex-boundary", {"m": 2}, "2 vertices, facets 1 2"),
        ("simplex-skeleton", {"m": 3, "dim": 0}, "3 vertices, facets 1 2 3"),
        ("cross-polytope", {"n": 1}, "2 vertices, facets 1 2"),
        ("cyclic-polytope", {"m": 4, "d": 3}, "4 vertices, facets 123 124 134 234"),
        ("stacked-polytope", {"m": 5, "d": 2}, "5 vertices, facets 12 13 24 35 45"),
        ("points", {"m": 0}, "0 vertices, facets ∅"),
    ],
)
def test_building_by_name(name: str, arguments: dict[str, object], text: str) -> None:
    assert str(build(name, **arguments)) == text


@pytest.mark.parametrize(
    ("name", "arguments", "message"),
    [
        ("polygon", {}, "family polygon: expected the argument n (number of vertices, at least 3), found none"),
        ("polygon", {"n": 4, "k": 1}, "family polygon: expected only n, found the argument k"),
        (
            "cyclic-polytope",
            {"m": 6, "d": 3, "n": 1},
            "family cyclic-polytope: expected only m, d, found the argument n",
        ),
        ("torus", {"n": 7}, "family torus: expected no argument, found the argument n"),
        ("polygon", {"n": 2}, "family polygon, argument n: expected a whole number of at least 3, found 2"),
        ("polygon", {"n": "4"}, "family polygon, argument n: expected a whole number of at least 3, found '4'"),
        ("polygon", {"n": 4.0}, "family polygon, argument n: expected a whole number of at least 3, found 4.0"),
        ("points", {"m": True}, "family points, argument m: expected a whole number of at least 0, found True"),
        ("simplex", {"m": -1}, "family simplex, argument m: expected a whole number of at least 0, found -1"),
        (
            "simplex-boundary",
            {"m": 0},
            "family simplex-boundary, argument m: expected a whole number of at least 1, found 0",
        ),
        (
            "simplex-skeleton",
            {"m": 3, "dim": 3},
            "family simplex-skeleton, argument dim: expected a whole number from -1 to 2, found 3",
        ),
        (
            "simplex-skeleton",
            {"m": 3, "dim": -2},
            "family simplex-skeleton, argument dim: expected a whole number from -1 to 2, found -2",
        ),
        (
            "cross-polytope",
            {"n": None},
            "family cross-polytope, argument n: expected a whole number of at least 0, found None",
        ),
        (
            "cyclic-polytope",
            {"m": 5, "d": 1},
            "family cyclic-polytope, argument d: expected a whole number of at least 2, found 1",
        ),
        (
            "cyclic-polytope",
            {"m": 4, "d": 4},
            "family cyclic-polytope, argument m: expected a whole number of at least 5, found 4",
        ),
        (
            "stacked-polytope",
            {"m": 3, "d": 3},
            "family stacked-polytope, argument m: expected a whole number of at least 4, found 3",
        ),
        (
            "stacked-polytope",
            {"m": 3, "d": 1},
            "family stacked-polytope, argument d: expected a whole number of at least 2, found 1",
        ),
        (
            "associahedron-dual",
            {"n": 0},
            "family associahedron-dual, argument n: expected a whole number of at least 1, found 0",
        ),
        (
            "cyclohedron-dual",
            {"n": 1},
            "family cyclohedron-dual, argument n: expected a whole number of at least 2, found 1",
        ),
        (
            "stellohedron-dual",
            {"n": "2"},
            "family stellohedron-dual, argument n: expected a whole number of at least 1, found '2'",
        ),
        (
            "permutohedron-dual",
            {"n": True},
            "family permutohedron-dual, argument n: expected a whole number of at least 1, found True",
        ),
    ],
)
def test_arguments_that_do_not_fit(name: str, arguments: dict[str, Any], message: str) -> None:
    with pytest.raises(BadInput) as caught:
        build(name, **arguments)
    assert str(caught.value) == message


def test_an_unknown_family_is_answered_with_the_known_ones() -> None:
    with pytest.raises(BadInput) as caught:
        build("pentagon")
    assert caught.value.found == "'pentagon'"
    assert caught.value.expected == f"one of {', '.join(FAMILIES)}"
    assert "cyclic-polytope" in caught.value.expected


def test_a_parameter_may_even_be_called_name() -> None:
    with pytest.raises(BadInput, match="found the argument name"):
        build("torus", name=1)


def test_a_slip_of_the_finger_does_not_take_all_memory() -> None:
    with pytest.raises(BadInput) as caught:
        build("polygon", n=10**9)
    assert str(caught.value) == (
        "family polygon, argument n: expected a whole number of at most 10000, found 1000000000"
    )
