"""Which vertices the verifier leaves out of a block, against the definition (docs/mathematics.md, 6.3)."""

from __future__ import annotations

from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from certify.simplicial import SimplicialComplex
from tests.helpers import verifier
from tests.strategies import complexes

LARGER = ((0, 0, ()), (1, 0, ()), (1, 1, ((0, 2),)))
"""A tag with three cells."""

EDGE = ((0,), (1, 2), (3,))
TRIANGLE = ((0,), (1, 2, 4), (3, 5, 6), (7,))
HOLLOW = TRIANGLE[:3]


def by_size(k: SimplicialComplex) -> tuple[tuple[int, ...], ...]:
    """Return the faces as the verifier holds them."""
    masks = k.face_masks()
    return tuple(tuple(mask for mask in masks if mask.bit_count() == size) for size in range(k.dimension + 2))


@given(complexes(max_vertices=6), st.data())
def test_a_vertex_is_superfluous_as_defined(k: SimplicialComplex, data: st.DataObject) -> None:
    m = k.vertex_count
    decided = data.draw(st.integers(0, m))
    tags = tuple(data.draw(st.lists(st.sampled_from([1, 2, LARGER]), min_size=decided, max_size=decided)))
    faces, known = by_size(k), set(k.face_masks())
    for v in range(decided):
        around = [mask for mask in known if mask >> v & 1]
        apexes = [a for a in range(decided) if a != v and tags[a] == 1 and all(f | 1 << a in known for f in around)]
        expected = tags[v] != LARGER and (not around or bool(apexes))
        assert verifier().superfluous(faces, v, tags) is expected


@pytest.mark.parametrize(
    ("faces", "place", "tags", "superfluous"),
    [
        (EDGE, 0, (1, 1), True),
        (EDGE, 0, (4, 1), True),
        # Only a vertex with the tag 1 dominates,
        (EDGE, 0, (1, 2), False),
        (EDGE, 0, (1, LARGER), False),
        # which is decided,
        (EDGE, 0, (1,), False),
        # and another one;
        (EDGE[:2], 0, (1, 1), False),
        # and only one whose tag is a number is left out.
        (EDGE, 0, (LARGER, 1), False),
        (((0,), (2,)), 0, (LARGER, 1), False),
        (((0,), (2,)), 0, (3, 1), True),
        (((0,),), 0, (1,), True),
        (TRIANGLE, 2, (2, 1, 1), True),
        # A face that was left out because of its size completes nothing.
        (HOLLOW, 2, (1, 1, 1), False),
        # The link of the middle of a path is two points, and no cone.
        (((0,), (1, 2, 4), (3, 6)), 1, (1, 1, 1), False),
        (((0,), (1, 2, 4), (3, 6)), 0, (1, 1, 1), True),
    ],
)
def test_cases_of_superfluous_vertices(
    faces: tuple[tuple[int, ...], ...], place: int, tags: tuple[object, ...], superfluous: bool
) -> None:
    assert verifier().superfluous(faces, place, tags) is superfluous


KEPT = ((0, 0, ()), (1, 1, ((0, 1),)))
"""The cells of a kept interval: t inside, e outside with d e = t."""

TWICE = ((0, 0, ()), (1, 1, ((0, 2),)))


@pytest.mark.parametrize(
    ("faces", "cells", "cycles", "left_out"),
    [
        # The ends of an edge dominate each other; if they are exchanged, neither may go.
        (EDGE, [KEPT, KEPT], [[0], [1]], [0]),
        (EDGE, [KEPT, KEPT], [[0, 1]], []),
        # The ends of a path, which are exchanged, are dominated by its middle.
        (((0,), (1, 2, 4), (3, 6)), [KEPT, KEPT, KEPT], [[0, 2], [1]], [0, 2]),
        (((0,), (1, 2, 4), (3, 6)), [KEPT, TWICE, KEPT], [[0, 2], [1]], []),
        # Vertices that are rotated, or in no face, and a larger summand.
        (TRIANGLE, [KEPT, KEPT, KEPT], [[0, 1, 2]], []),
        (((0,),), [KEPT, TWICE], [[0, 1]], [0, 1]),
        (EDGE, [KEPT, LARGER], [[0], [1]], []),
    ],
)
def test_cycles_are_left_out_as_a_whole(
    faces: tuple[tuple[int, ...], ...], cells: list[tuple[Any, ...]], cycles: list[list[int]], left_out: list[int]
) -> None:
    alphabets = dict(enumerate(cells))
    keep = verifier().KEEP
    shapes = {v: (keep, each if each == LARGER else each[1][2][0][1], {0: 1}) for v, each in alphabets.items()}
    verifier().shorten(alphabets, shapes, cycles, faces)
    assert alphabets == {v: each[:1] if v in left_out else each for v, each in enumerate(cells)}
