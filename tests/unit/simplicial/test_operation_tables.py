from __future__ import annotations

from typing import Any

import pytest

from certify.simplicial import (
    SimplicialComplex,
    alexander_dual,
    barycentric_subdivision,
    build,
    connected_sum,
    deletion,
    disjoint_union,
    full_subcomplex,
    join,
    link,
    simplicial_wedge,
    skeleton,
    star,
    stellar_subdivision,
    substitution,
)
from certify.simplicial.operation_tables import OPERATIONS, read_operation
from certify.tables import KeyFault, Table

RING = build("polygon", n=4)
STAGE = SimplicialComplex.from_facets([["left", "right"], ["front"]])
DOUBLED = join(STAGE, STAGE)
KNOWN = {"ring": RING, "stage": STAGE, "doubled": DOUBLED, "full": build("simplex", m=2)}

GOOD: dict[str, tuple[dict[str, Any], SimplicialComplex]] = {
    "join": ({"of": ["ring", "stage"]}, join(RING, STAGE)),
    "disjoint-union": ({"of": ["stage", "stage", "ring"]}, disjoint_union(STAGE, STAGE, RING)),
    "link": ({"of": "ring", "face": [1]}, link(RING, [1])),
    "star": ({"of": "ring", "face": [1, 2]}, star(RING, [1, 2])),
    "deletion": ({"of": "stage", "vertices": ["left", "front"]}, deletion(STAGE, ["left", "front"])),
    "full-subcomplex": (
        {"of": "doubled", "vertices": [[0, "left"], [1, "front"]]},
        full_subcomplex(DOUBLED, [(0, "left"), (1, "front")]),
    ),
    "skeleton": ({"of": "ring", "dimension": 0}, skeleton(RING, 0)),
    "alexander-dual": ({"of": "ring"}, alexander_dual(RING)),
    "barycentric-subdivision": ({"of": "stage"}, barycentric_subdivision(STAGE)),
    "stellar-subdivision": ({"of": "ring", "face": [2, 1]}, stellar_subdivision(RING, [1, 2])),
    "simplicial-wedge": ({"of": "stage", "multiplicities": [2, 1, 3]}, simplicial_wedge(STAGE, [2, 1, 3])),
    "substitution": ({"of": "full", "parts": ["ring", "stage"]}, substitution(KNOWN["full"], [RING, STAGE])),
    "connected-sum": (
        {"of": ["ring", "stage"], "along": [[1, 2], ["right", "left"]]},
        connected_sum(RING, STAGE, [1, 2], ["right", "left"]),
    ),
}


def test_every_operation_has_an_example() -> None:
    assert set(GOOD) == set(OPERATIONS)


@pytest.mark.parametrize("name", GOOD)
def test_operations(name: str) -> None:
    values, expected = GOOD[name]
    assert read_operation(Table((), {"operation": name, **values}), KNOWN) == expected


@pytest.mark.parametrize("vertex", [9, "cut", [1, [2, "a"]]])
def test_the_new_vertex_of_a_stellar_subdivision_may_be_named(vertex: Any) -> None:
    values = {"operation": "stellar-subdivision", "of": "ring", "face": [1, 2], "vertex": vertex}
    label = (1, (2, "a")) if isinstance(vertex, list) else vertex
    assert read_operation(Table((), values), KNOWN) == stellar_subdivision(RING, [1, 2], label)


_ABOVE = "a complex that stands above this one (ring, stage, doubled, full)"

FAULTS: dict[str, tuple[dict[str, Any], str]] = {
    "an unknown operation": (
        {"operation": "cone", "of": "ring"},
        f"key operation: expected one of {', '.join(OPERATIONS)}, found 'cone'",
    ),
    "an operation that is no text": ({"operation": 1}, "key operation: expected the name of an operation, found 1"),
    "a key that nobody reads": (
        {"operation": "link", "of": "ring", "face": [1], "faces": [1]},
        "key faces: expected no other keys than operation, of, face, found 'faces'",
    ),
    "no complex": (
        {"operation": "alexander-dual"},
        "expected the key of with the name of a complex, found no such key",
    ),
    "a complex further down": ({"operation": "alexander-dual", "of": "k"}, f"key of: expected {_ABOVE}, found 'k'"),
    "a complex that is a list": (
        {"operation": "alexander-dual", "of": ["ring"]},
        f"key of: expected {_ABOVE}, found a list",
    ),
    "a dual that is void": (
        {"operation": "alexander-dual", "of": "full"},
        "key of: expected a complex with a missing face, found the full simplex, whose dual has no face at all",
    ),
    "complexes that are no list": (
        {"operation": "join", "of": "ring"},
        "key of: expected a list of names of complexes, found 'ring'",
    ),
    "one complex alone": ({"operation": "join", "of": ["ring"]}, "key of: expected two names or more, found 1"),
    "an unknown complex in a list": (
        {"operation": "join", "of": ["ring", "k"]},
        f"key of, item 2: expected {_ABOVE}, found 'k'",
    ),
    "no face": (
        {"operation": "link", "of": "ring"},
        "expected the key face with a list of labels, found no such key",
    ),
    "a face that is none": (
        {"operation": "link", "of": "ring", "face": [1, 3]},
        "key face: expected vertices that form a face, found 1 3, which do not",
    ),
    "a face that is no list": (
        {"operation": "star", "of": "ring", "face": 1},
        "key face: expected a list of labels, found 1",
    ),
    "a label of another kind": (
        {"operation": "star", "of": "ring", "face": [1.5]},
        "key face: expected whole numbers, texts or lists of these as labels, found 1.5",
    ),
    "a truth value inside a label": (
        {"operation": "deletion", "of": "ring", "vertices": [[1, True]]},
        "key vertices: expected whole numbers, texts or lists of these as labels, found true",
    ),
    "an unknown vertex": (
        {"operation": "full-subcomplex", "of": "ring", "vertices": [1, 5]},
        "key vertices: expected vertices of the complex, found vertex 5, which is none",
    ),
    "a dimension that is none": (
        {"operation": "skeleton", "of": "ring", "dimension": "1"},
        "key dimension: expected a whole number of at least -1, found '1'",
    ),
    "a dimension that is too small": (
        {"operation": "skeleton", "of": "ring", "dimension": -2},
        "key dimension: expected a whole number of at least -1, found -2",
    ),
    "a face that is too small": (
        {"operation": "stellar-subdivision", "of": "ring", "face": [1], "vertex": 7},
        "key face: expected two or more vertices that form a face, found 1",
    ),
    "a new vertex that is not new": (
        {"operation": "stellar-subdivision", "of": "ring", "face": [1, 2], "vertex": 3},
        "key vertex: expected a label for the new vertex, found 3, which is in use",
    ),
    "a new vertex of another kind": (
        {"operation": "stellar-subdivision", "of": "ring", "face": [1, 2], "vertex": 3.5},
        "key vertex: expected whole numbers, texts or lists of these as labels, found 3.5",
    ),
    "too few multiplicities": (
        {"operation": "simplicial-wedge", "of": "ring", "multiplicities": [2]},
        "key multiplicities: expected 4 numbers, found 1",
    ),
    "a multiplicity that is none": (
        {"operation": "simplicial-wedge", "of": "ring", "multiplicities": [2, 1, 0, 1]},
        "key multiplicities, item 3: expected a whole number of at least 1, found 0",
    ),
    "too few parts": (
        {"operation": "substitution", "of": "ring", "parts": ["stage"]},
        "key parts: expected 4 complexes, found 1",
    ),
    "an unknown part": (
        {"operation": "substitution", "of": "full", "parts": ["stage", 2]},
        f"key parts, item 2: expected {_ABOVE}, found 2",
    ),
    "three complexes in a connected sum": (
        {"operation": "connected-sum", "of": ["ring", "ring", "ring"], "along": [[1, 2], [1, 2]]},
        "key of: expected a list of two, found 3",
    ),
    "one facet": (
        {"operation": "connected-sum", "of": ["ring", "ring"], "along": [[1, 2]]},
        "key along: expected a list of two, found 1",
    ),
    "a facet that is none": (
        {"operation": "connected-sum", "of": ["ring", "stage"], "along": [[1, 2], ["left"]]},
        "key along, item 2: expected the vertices of a facet, at least one, found left",
    ),
    "a facet that is no list": (
        {"operation": "connected-sum", "of": ["ring", "stage"], "along": ["1 2", ["front"]]},
        "key along, item 1: expected a list of labels, found '1 2'",
    ),
}


@pytest.mark.parametrize("fault", FAULTS)
def test_a_fault_is_named_with_its_key(fault: str) -> None:
    values, message = FAULTS[fault]
    with pytest.raises(KeyFault) as caught:
        read_operation(Table((), values), KNOWN)
    assert str(caught.value).removeprefix(": ") == message
