from __future__ import annotations

import pytest

from certify.exact import BasedComplex
from certify.products import Block, Pair, PolyhedralProduct, block_classes, parse_pair
from certify.simplicial import SimplicialComplex, build
from tests.helpers import disc_product

EMPTY = SimplicialComplex.from_facets([[]])
GHOSTS = SimplicialComplex.from_facets([[]], vertices=[1, 2])

# Faces by bit mask: points 1, 2, 4, 8; edges are sums of two.
NOTHING = (0,)
POINT = (0, 1)
TWO_POINTS = (0, 1, 2)
EDGE = (0, 1, 2, 3)
PATH_WITH_MIDDLE = {place: (0, 1, 2, 4, *sorted({3, 5, 6} - {7 - (1 << place)})) for place in range(3)}
SQUARE = (0, 1, 2, 4, 8, 3, 6, 9, 12)

INTERVAL = parse_pair("(D1, S0)")
TWICE = Pair.from_cells([(0, False, {}), (1, False, {}), (2, True, {1: 2})])


def over_an_edge(*pairs: Pair) -> PolyhedralProduct:
    """Return the product of two spaces, as one over an edge."""
    return PolyhedralProduct(build("simplex", m=2), pairs)


Expected = list[tuple[str, tuple[int, ...], int, dict[int, int]]]


def _listed(space: PolyhedralProduct, top: int | None = None) -> Expected:
    return [(b.name, b.faces, len(b.tags), dict(b.shifts)) for b in block_classes(space, top)]


@pytest.mark.parametrize(
    ("space", "expected"),
    [
        (disc_product(EMPTY, 1), [("", NOTHING, 0, {0: 1})]),
        (disc_product(GHOSTS, 1), [("00", NOTHING, 0, {0: 4})]),
        (disc_product(GHOSTS, [2, 5]), [("00", NOTHING, 0, {0: 1, 1: 1, 4: 1, 5: 1})]),
        (disc_product(build("simplex", m=1), 3), [("0", NOTHING, 0, {0: 1}), ("1", POINT, 1, {2: 1})]),
        (
            disc_product(build("points", m=2), 2),
            [("00", NOTHING, 0, {0: 1}), ("01", POINT, 1, {1: 2}), ("11", TWO_POINTS, 2, {2: 1})],
        ),
        # Of the sixteen sets, 4 points, 4 edges and 4 paths become points when dominated vertices are left out.
        (
            disc_product(build("polygon", n=4), 1),
            [
                ("0000", NOTHING, 0, {0: 1}),
                ("0001", POINT, 1, {0: 12}),
                ("0101", TWO_POINTS, 2, {0: 2}),
                ("1111", SQUARE, 4, {0: 1}),
            ],
        ),
        # A vertex with the tag 2 is dominated by one with the tag 1, and dominates none.
        (
            over_an_edge(TWICE, INTERVAL),
            [("00", NOTHING, 0, {0: 1}), ("01", POINT, 1, {0: 1, 1: 1}), ("10", POINT, 1, {1: 1})],
        ),
        (over_an_edge(TWICE, TWICE), [("00", NOTHING, 0, {0: 1}), ("01", POINT, 1, {1: 2}), ("11", EDGE, 2, {2: 1})]),
    ],
)
def test_classes_of_blocks(space: PolyhedralProduct, expected: Expected) -> None:
    assert _listed(space) == expected


@pytest.mark.parametrize(
    ("top", "expected"),
    [
        # Up to degree 1 - 1 only the empty set has a cell, and of its complex only ∅ and the points matter.
        (1, [("00", NOTHING, 0, {0: 1})]),
        (2, [("00", NOTHING, 0, {0: 1}), ("01", POINT, 1, {1: 2})]),
        (3, [("00", NOTHING, 0, {0: 1}), ("01", POINT, 1, {1: 2}), ("11", TWO_POINTS, 2, {2: 1})]),
        # Now the edge is there, and one of its ends dominates the other.
        (4, [("00", NOTHING, 0, {0: 1}), ("01", POINT, 1, {1: 2, 2: 1})]),
    ],
)
def test_blocks_and_faces_above_the_top_are_left_out(top: int, expected: Expected) -> None:
    """A face of k vertices in the block of I is a cell of degree k + |I| of (D², S¹)^K, K an edge."""
    assert _listed(disc_product(build("simplex", m=2), 2), top) == expected


def test_every_set_of_vertices_is_in_one_class() -> None:
    k = build("projective-plane")
    classes = list(block_classes(disc_product(k, [1, 2, 3, 4, 5, 6])))
    names = [block.name for block in classes]
    assert names == sorted(set(names))
    assert sum(sum(block.shifts.values()) for block in classes) == 2**6
    assert all(block.tags == (1,) * len(block.tags) and len(block.tags) <= block.name.count("1") for block in classes)


@pytest.mark.parametrize(
    ("faces", "vertices", "most", "cone"),
    [
        (NOTHING, 0, 0, False),
        (NOTHING, 0, 5, False),
        (NOTHING, 1, 1, False),
        (POINT, 1, 1, True),
        (POINT, 2, 2, True),
        (TWO_POINTS, 2, 1, True),
        (TWO_POINTS, 2, 2, False),
        (EDGE, 2, 2, True),
        (PATH_WITH_MIDDLE[0], 3, 3, True),
        (PATH_WITH_MIDDLE[2], 3, 3, True),
        (SQUARE, 4, 1, True),
        (SQUARE, 4, 2, False),
        ((0, 1, 2, 4, 3, 5, 6), 3, 2, True),
        ((0, 1, 2, 4, 3, 5, 6), 3, 3, False),
        ((0, 1, 2, 4, 3, 5, 6, 7), 3, 3, True),
    ],
)
def test_cones(faces: tuple[int, ...], vertices: int, most: int, cone: bool) -> None:
    """Does one vertex complete each face of fewer than `most` vertices to a face? (Lemma C, cut off at a degree.)"""
    assert Block("", (1,) * vertices, faces, {0: 1}, most).is_cone is cone


def test_the_chains_of_a_triangle() -> None:
    """d leaves out one vertex after the other with alternating signs, + for the first; degree k has k vertices."""
    chains = Block("111", (1, 1, 1), (0, 1, 2, 4, 3, 5, 6, 7), {0: 1}).chains()
    assert chains.boundaries == (
        ((),),
        (((0, 1),), ((0, 1),), ((0, 1),)),
        (((0, -1), (1, 1)), ((0, -1), (2, 1)), ((1, -1), (2, 1))),
        (((0, 1), (1, -1), (2, 1)),),
    )


@pytest.mark.parametrize("k", [EMPTY, GHOSTS, build("torus"), build("simplex", m=5)], ids=str)
def test_the_chains_of_all_blocks_are_complexes_in_canonical_form(k: SimplicialComplex) -> None:
    for block in block_classes(disc_product(k, 1)):
        chains = block.chains()
        assert BasedComplex.from_columns(chains.boundaries) == chains
        assert sum(chains.sizes) == len(block.faces)
