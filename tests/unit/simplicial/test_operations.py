from __future__ import annotations

from collections.abc import Callable
from typing import Any

import pytest

from certify.errors import BadInput
from certify.simplicial import (
    SimplicialComplex,
    alexander_dual,
    build,
    connected_sum,
    deletion,
    disjoint_union,
    full_subcomplex,
    join,
    link,
    skeleton,
    star,
)

from_facets = SimplicialComplex.from_facets

NOTHING = from_facets([[]])
GHOST = from_facets([[]], vertices=["g"])
EDGE = from_facets([[1, 2]])
POINT = from_facets([["a"]])
PATH = from_facets([[1, 2], [2, 3]], vertices=[1, 2, 3, 4])
SQUARE = build("polygon", n=4)


@pytest.mark.parametrize(
    ("k", "other", "text"),
    [
        (NOTHING, NOTHING, "0 vertices, facets ∅"),
        (NOTHING, EDGE, "2 vertices, facets 12"),
        (EDGE, NOTHING, "2 vertices, facets 12"),
        (EDGE, GHOST, "3 vertices, facets 12, ghosts g"),
        (GHOST, EDGE, "3 vertices, facets 12, ghosts g"),
        (EDGE, POINT, "3 vertices, facets 12a"),
        (PATH, POINT, "5 vertices, facets 12a 23a, ghosts 4"),
    ],
)
def test_joins(k: SimplicialComplex, other: SimplicialComplex, text: str) -> None:
    assert str(join(k, other)) == text


@pytest.mark.parametrize(
    ("k", "other", "text"),
    [
        (NOTHING, NOTHING, "0 vertices, facets ∅"),
        (NOTHING, EDGE, "2 vertices, facets 12"),
        (GHOST, EDGE, "3 vertices, facets 12, ghosts g"),
        (GHOST, NOTHING, "1 vertex, facets ∅, ghosts g"),
        (PATH, POINT, "5 vertices, facets 12 23 a, ghosts 4"),
    ],
)
def test_disjoint_unions(k: SimplicialComplex, other: SimplicialComplex, text: str) -> None:
    assert str(disjoint_union(k, other)) == text


@pytest.mark.parametrize("operation", [join, disjoint_union])
def test_a_label_in_both_is_told_apart(
    operation: Callable[[SimplicialComplex, SimplicialComplex], SimplicialComplex],
) -> None:
    other = from_facets([[2, 5]])
    assert operation(EDGE, other).labels == ((0, 1), (0, 2), (1, 2), (1, 5))
    assert operation(EDGE, from_facets([[4, 5]])).labels == (1, 2, 4, 5)


def test_many_complexes_are_numbered_through() -> None:
    assert join(EDGE, POINT, EDGE).labels == ((0, 1), (0, 2), (1, "a"), (2, 1), (2, 2))
    assert str(disjoint_union(EDGE, POINT, from_facets([["b"]]))) == "4 vertices, facets 12 a b"
    assert join() == disjoint_union() == NOTHING


# -- connected sums ---------------------------------------------------------------------------

TRIANGLE = from_facets([["x", "y"], ["y", "z"], ["x", "z"]])


def test_two_polygons_make_one() -> None:
    found = connected_sum(SQUARE, TRIANGLE, [4, 1], ["x", "z"])
    assert str(found) == "5 vertices, facets 12 1y 23 34 4y"
    assert str(connected_sum(SQUARE, TRIANGLE, [1, 4], ["x", "z"])) == str(found)


def test_the_order_of_the_vertices_tells_how_to_glue() -> None:
    """Two tetrahedra with a flag attached to the edge a b or b c: the flags may meet or not."""
    k = from_facets([[1, 2, 3], [1, 2, 4]])
    other = from_facets([["a", "b", "c"], ["a", "b", "d"]])
    assert str(connected_sum(k, other, [1, 2, 3], ["a", "b", "c"])) == "5 vertices, facets 124 12d 13 23"
    assert str(connected_sum(k, other, [1, 2, 3], ["c", "a", "b"])) == "5 vertices, facets 124 13 23d"


def test_labels_of_a_connected_sum() -> None:
    """Only labels that stay are told apart: the glued facet of the second complex has no labels of its own."""
    one, two = from_facets([[1, 2], [2, 3]]), from_facets([[2, 1], [1, 9]])
    assert connected_sum(one, two, [1, 2], [2, 1]).labels == (1, 2, 3, 9)
    assert connected_sum(one, one, [1, 2], [2, 1]).labels == ((0, 1), (0, 2), (0, 3), (1, 3))


def test_points_are_glued_and_taken_out_but_stay_as_ghosts() -> None:
    two, three = from_facets([[1], [2]]), from_facets([["a"], ["b"], ["c"]])
    assert str(connected_sum(two, three, [2], ["b"])) == "4 vertices, facets 1 a c, ghosts 2"


@pytest.mark.parametrize(
    ("facet", "other_facet", "message"),
    [
        ([1, 3], ["x", "y"], "facet 1: expected the vertices of a facet, at least one, found 1 3"),
        ([1], ["x"], "facet 1: expected the vertices of a facet, at least one, found 1"),
        ([1, 2], [], "facet 2: expected the vertices of a facet, at least one, found no vertex"),
        ([1, 2], ["x", "q"], "facet 2: expected vertices of the complex, found vertex 'q', which is none"),
        ([1, 2], ["x", "x"], "facet 2: expected each vertex once, found vertex 'x' twice"),
        ("12", ["x", "y"], "facet 1: expected a list, found '12'"),
    ],
)
def test_connected_sums_need_facets(facet: Any, other_facet: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        connected_sum(SQUARE, TRIANGLE, facet, other_facet)
    assert str(caught.value) == message


def test_facets_of_different_size_cannot_be_glued() -> None:
    with pytest.raises(BadInput) as caught:
        connected_sum(SQUARE, from_facets([["a", "b", "c"]]), [1, 2], ["a", "b", "c"])
    assert str(caught.value) == "facet 2: expected 2 vertices like the first facet, found 3"


# -- parts ------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("labels", "text"),
    [
        ([], "0 vertices, facets ∅"),
        ([4], "1 vertex, facets ∅, ghosts 4"),
        ([3, 1], "2 vertices, facets 1 3"),
        ([4, 3, 2], "3 vertices, facets 23, ghosts 4"),
        ([1, 2, 3, 4], "4 vertices, facets 12 23, ghosts 4"),
    ],
)
def test_full_subcomplexes(labels: list[int], text: str) -> None:
    assert str(full_subcomplex(PATH, labels)) == text


@pytest.mark.parametrize(
    ("face", "the_link", "the_star", "the_deletion"),
    [
        (
            [],
            "4 vertices, facets 12 23, ghosts 4",
            "4 vertices, facets 12 23, ghosts 4",
            "4 vertices, facets 12 23, ghosts 4",
        ),
        (
            [2],
            "3 vertices, facets 1 3, ghosts 4",
            "4 vertices, facets 12 23, ghosts 4",
            "3 vertices, facets 1 3, ghosts 4",
        ),
        (
            [1],
            "3 vertices, facets 2, ghosts 3 4",
            "4 vertices, facets 12, ghosts 3 4",
            "3 vertices, facets 23, ghosts 4",
        ),
        (
            [2, 1],
            "2 vertices, facets ∅, ghosts 3 4",
            "4 vertices, facets 12, ghosts 3 4",
            "2 vertices, facets 3, ghosts 4",
        ),
    ],
)
def test_links_stars_and_deletions(face: list[int], the_link: str, the_star: str, the_deletion: str) -> None:
    assert str(link(PATH, face)) == the_link
    assert str(star(PATH, face)) == the_star
    assert str(deletion(PATH, face)) == the_deletion


def test_vertices_that_are_no_face_can_be_deleted() -> None:
    assert str(deletion(PATH, [1, 3])) == "2 vertices, facets 2, ghosts 4"


@pytest.mark.parametrize("operation", [link, star])
@pytest.mark.parametrize("labels", [[1, 3], [4]])
def test_a_link_or_star_needs_a_face(operation: Callable[..., SimplicialComplex], labels: list[int]) -> None:
    with pytest.raises(BadInput) as caught:
        operation(PATH, labels)
    names = " ".join(map(str, labels))
    assert str(caught.value) == f"face: expected vertices that form a face, found {names}, which do not"


@pytest.mark.parametrize("operation", [link, star, deletion, full_subcomplex])
@pytest.mark.parametrize("labels", [[1, 7], [1, 1], "1"])
def test_labels_must_be_vertices(operation: Callable[..., SimplicialComplex], labels: Any) -> None:
    with pytest.raises(BadInput, match="labels: expected"):
        operation(PATH, labels)


@pytest.mark.parametrize(
    ("k", "dimension", "text"),
    [
        (PATH, 5, "4 vertices, facets 12 23, ghosts 4"),
        (PATH, 1, "4 vertices, facets 12 23, ghosts 4"),
        (PATH, 0, "4 vertices, facets 1 2 3, ghosts 4"),
        (PATH, -1, "4 vertices, facets ∅, ghosts 1 2 3 4"),
        (NOTHING, -1, "0 vertices, facets ∅"),
        (NOTHING, 3, "0 vertices, facets ∅"),
        (from_facets([[1, 2, 3], [4, 5], [6]]), 1, "6 vertices, facets 12 13 23 45 6"),
    ],
)
def test_skeleta(k: SimplicialComplex, dimension: int, text: str) -> None:
    assert str(skeleton(k, dimension)) == text


def test_below_the_empty_face_there_is_no_skeleton() -> None:
    with pytest.raises(BadInput, match="a dimension of at least -1, found -2"):
        skeleton(PATH, -2)


@pytest.mark.parametrize(
    ("k", "dual"),
    [
        (GHOST, "1 vertex, facets ∅, ghosts g"),
        (from_facets([[]], [1, 2, 3]), "3 vertices, facets 12 13 23"),
        (build("simplex-boundary", m=3), "3 vertices, facets ∅, ghosts 1 2 3"),
        (SQUARE, "4 vertices, facets 13 24"),
        (PATH, "4 vertices, facets 123 24"),
    ],
)
def test_alexander_duals(k: SimplicialComplex, dual: str) -> None:
    assert str(alexander_dual(k)) == dual


@pytest.mark.parametrize("k", [NOTHING, POINT, EDGE])
def test_the_full_simplex_has_no_alexander_dual(k: SimplicialComplex) -> None:
    with pytest.raises(BadInput) as caught:
        alexander_dual(k)
    assert str(caught.value) == (
        "Alexander dual: expected a complex with a missing face, found the full simplex, whose dual has no face at all"
    )


def test_the_projective_plane_is_its_own_alexander_dual() -> None:
    """All 15 edges are faces, and of two complementary triangles exactly one is."""
    plane = build("projective-plane")
    assert alexander_dual(plane) == plane
