from __future__ import annotations

import pytest
from hypothesis import given

from certify.simplicial import Face, SimplicialComplex
from certify.simplicial.masks import face_of, levels, mask_of, maximal, minimal_non_faces, restrict
from tests.strategies import complexes


@pytest.mark.parametrize(("face", "mask"), [((), 0), ((0,), 1), ((1, 3), 10), ((70,), 1 << 70)])
def test_a_mask_and_its_face_are_the_same_set(face: Face, mask: int) -> None:
    assert mask_of(face) == mask
    assert face_of(mask) == face


@pytest.mark.parametrize(
    ("mask", "vertices", "part"),
    [(0b1011, (), 0), (0b1011, (0, 1, 2, 3), 0b1011), (0b1011, (1, 2, 3), 0b101), (0b1011, (2,), 0)],
)
def test_restriction_renumbers_by_position(mask: int, vertices: Face, part: int) -> None:
    assert restrict(mask, vertices) == part


@pytest.mark.parametrize(
    ("masks", "largest"),
    [
        ([], []),
        ([0], [0]),
        ([0, 0], [0]),
        ([0, 1], [1]),
        ([1, 2], [1, 2]),
        ([3, 1, 2, 0, 3], [3]),
        ([1, 6, 4], [1, 6]),
        ([0b111, 0b1011, 0b11, 0b1100, 0b10000], [0b111, 0b1011, 0b1100, 0b10000]),
    ],
)
def test_only_the_sets_inside_no_other_one_remain(masks: list[int], largest: list[int]) -> None:
    assert sorted(maximal(masks)) == sorted(largest)


def test_levels_of_the_complex_whose_only_face_is_empty() -> None:
    assert levels(((),)) == ((0,),)


@pytest.mark.parametrize(
    ("facets", "vertex_count", "missing"),
    [
        (((),), 0, ()),
        (((),), 2, ((0,), (1,))),
        (((0,),), 1, ()),
        (((0,), (1,)), 2, ((0, 1),)),
        (((0, 1), (0, 2), (1, 2)), 4, ((3,), (0, 1, 2))),
        (((0, 1, 2), (1, 2, 3)), 4, ((0, 3),)),
    ],
)
def test_minimal_non_faces(facets: tuple[Face, ...], vertex_count: int, missing: tuple[Face, ...]) -> None:
    assert minimal_non_faces(facets, vertex_count) == missing


@given(complexes())
def test_levels_hold_exactly_the_subsets_of_facets(k: SimplicialComplex) -> None:
    facets = k.facet_masks()
    faces = [mask for mask in range(1 << k.vertex_count) if any(mask & ~facet == 0 for facet in facets)]
    for size, level in enumerate(levels(k.facets)):
        assert list(level) == [mask for mask in faces if mask.bit_count() == size]
    assert sum(map(len, levels(k.facets))) == len(faces)


@given(complexes())
def test_minimal_non_faces_by_the_definition(k: SimplicialComplex) -> None:
    faces = set(k.face_masks())
    minimal = [
        mask
        for mask in range(1 << k.vertex_count)
        if mask not in faces and all(mask & ~(1 << vertex) in faces for vertex in face_of(mask))
    ]
    found = minimal_non_faces(k.facets, k.vertex_count)
    assert list(found) == [face_of(mask) for mask in sorted(minimal, key=lambda m: (m.bit_count(), m))]
