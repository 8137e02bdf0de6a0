from __future__ import annotations

import pickle
from typing import Any

import pytest

from certify.errors import BadInput
from certify.simplicial import SimplicialComplex, build

from_facets = SimplicialComplex.from_facets

ONLY_EMPTY = from_facets([[]])
GHOSTS = from_facets([[]], vertices=[1, 2])
PATH = from_facets([[1, 2], [2, 3]], vertices=[1, 2, 3, 4])
TRIANGLE_AND_EDGE = from_facets([["a", "b", "c"], ["c", "d"]])


@pytest.mark.parametrize(
    ("facets", "vertices", "labels", "faces"),
    [
        ([[]], None, (), ((),)),
        ([[]], [7], (7,), ((),)),
        ([[3, 1], [2]], None, (1, 2, 3), ((0, 2), (1,))),
        ([[10, 9]], None, (9, 10), ((0, 1),)),
        ([["b", "a"], ["c"]], None, ("a", "b", "c"), ((0, 1), (2,))),
        ([["b", 1], ["a"]], None, ("b", 1, "a"), ((0, 1), (2,))),
        ([[(2, 0), (1, 0)]], None, ((2, 0), (1, 0)), ((0, 1),)),
        ([[1, 2], [2], [], [2, 1], [3]], [3, 2, 1, 0], (3, 2, 1, 0), ((0,), (1, 2))),
        (({1, 2}, frozenset({2, 3})), None, (1, 2, 3), ((0, 1), (1, 2))),
    ],
)
def test_canonical_form(facets: Any, vertices: Any, labels: Any, faces: Any) -> None:
    k = from_facets(facets, vertices)
    assert k.labels == labels
    assert k.facets == faces


def test_generators_are_read_once() -> None:
    k = from_facets(iter([iter([1, 2]), iter([2, 3])]), vertices=iter([3, 2, 1]))
    assert k == SimplicialComplex.from_faces([3, 2, 1], [(2, 1), [0, 1]])


def test_equality_is_equality_of_vertices_and_faces() -> None:
    assert from_facets([[2, 1], [3, 2], [3]]) == from_facets([[2, 3], [1, 2]])
    assert from_facets([[1, 2]]) != from_facets([[1, 2]], vertices=[1, 2, 3])
    assert from_facets([[1, 2]]) != from_facets([[1, 2]], vertices=[2, 1])


@pytest.mark.parametrize(
    ("facets", "vertices", "message"),
    [
        ([], None, "facets: expected at least one facet ([[]] has the empty face), found none"),
        ([], [1], "facets: expected at least one facet ([[]] has the empty face), found none"),
        ("12", None, "facets: expected a list, found '12'"),
        (5, None, "facets: expected a list, found 5"),
        ([[1], "12"], None, "facet 2: expected a list, found '12'"),
        ([[1], b"12"], None, "facet 2: expected a list, found b'12'"),
        ([3], None, "facet 1: expected a list, found 3"),
        ([[1, 2], [4, 4]], None, "facet 2: expected each vertex once, found vertex 4 twice"),
        ([["a", "b", "a"]], None, "facet 1: expected each vertex once, found vertex 'a' twice"),
        ([[1, True]], None, "facet 1: expected numbers or names as labels, found True"),
        ([[False]], None, "facet 1: expected numbers or names as labels, found False"),
        ([[[1]]], None, "facet 1: expected numbers or names as labels, found [1]"),
        ([[([],)]], None, "facet 1: expected numbers or names as labels, found ([],)"),
        ([[1], [2, 9]], [1, 2], "facet 2: expected vertices of the complex, found vertex 9, which is none"),
        ([[1]], [1, 2, 1], "vertices: expected each vertex once, found vertex 1 twice"),
        ([[1]], "123", "vertices: expected a list, found '123'"),
        ([[1]], [True], "vertices: expected numbers or names as labels, found True"),
    ],
)
def test_faulty_facets_are_named(facets: Any, vertices: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        from_facets(facets, vertices)
    assert str(caught.value) == message


def test_numbers_without_a_face_are_refused_too() -> None:
    with pytest.raises(BadInput, match="at least one facet"):
        SimplicialComplex.from_faces([1, 2], [])


@pytest.mark.parametrize(
    ("k", "f", "h", "euler", "dimension", "missing"),
    [
        (ONLY_EMPTY, (1,), (1,), 0, -1, ()),
        (GHOSTS, (1,), (1,), 0, -1, ((0,), (1,))),
        (from_facets([[1]]), (1, 1), (1, 0), 1, 0, ()),
        (from_facets([[1], [2]]), (1, 2), (1, 1), 2, 0, ((0, 1),)),
        (PATH, (1, 3, 2), (1, 1, 0), 1, 1, ((3,), (0, 2))),
        (TRIANGLE_AND_EDGE, (1, 4, 4, 1), (1, 1, -1, 0), 1, 2, ((0, 3), (1, 3))),
        (from_facets([[1, 2], [3, 4]]), (1, 4, 2), (1, 2, -1), 2, 1, ((0, 2), (1, 2), (0, 3), (1, 3))),
    ],
)
def test_counts_worked_out_by_hand(
    k: SimplicialComplex, f: Any, h: Any, euler: int, dimension: int, missing: Any
) -> None:
    assert k.f_vector() == f
    assert k.h_vector() == h
    assert k.euler_characteristic() == euler
    assert k.dimension == dimension
    assert k.missing_faces() == missing


def test_faces_come_by_size_and_then_by_mask() -> None:
    assert PATH.face_masks() == (0b000, 0b001, 0b010, 0b100, 0b011, 0b110)
    assert PATH.faces(1) == ((0,), (1,), (2,))
    assert PATH.faces(2) == ((0, 1), (1, 2))
    assert PATH.faces(3) == PATH.faces(-1) == ()
    assert ONLY_EMPTY.face_masks() == GHOSTS.face_masks() == (0,)
    assert GHOSTS.faces(0) == ((),)


def test_ghosts() -> None:
    assert ONLY_EMPTY.ghosts() == ()
    assert GHOSTS.ghosts() == (1, 2)
    assert PATH.ghosts() == (4,)
    assert (ONLY_EMPTY.vertex_count, GHOSTS.vertex_count, PATH.vertex_count) == (0, 2, 4)


@pytest.mark.parametrize(("labels", "answer"), [([], True), ([2], True), ([2, 1], True), ([1, 3], False), ([4], False)])
def test_whether_labels_form_a_face(labels: list[int], answer: bool) -> None:
    assert PATH.is_face(labels) is answer


def test_numbers_of_labels_ascend() -> None:
    assert PATH.numbers([4, 1]) == (0, 3)
    assert PATH.numbers([]) == ()


@pytest.mark.parametrize(
    ("labels", "found"), [([1, 5], "vertex 5, which is none"), ([1, 1], "vertex 1 twice"), ("1", "'1'")]
)
def test_labels_that_are_no_set_of_vertices(labels: Any, found: str) -> None:
    with pytest.raises(BadInput) as caught:
        PATH.is_face(labels)
    assert (caught.value.where, caught.value.found) == ("labels", found)


def test_relabelling_keeps_the_faces() -> None:
    renamed = PATH.relabelled(["a", "b", "c", "z"])
    assert renamed.labels == ("a", "b", "c", "z")
    assert renamed.facets == PATH.facets
    assert ONLY_EMPTY.relabelled([]) == ONLY_EMPTY


@pytest.mark.parametrize(("labels", "found"), [([1, 2, 3], "3"), ([1, 2, 3, 3], "vertex 3 twice"), ("abcd", "'abcd'")])
def test_relabelling_needs_one_new_label_a_vertex(labels: Any, found: str) -> None:
    with pytest.raises(BadInput) as caught:
        PATH.relabelled(labels)
    assert caught.value.found == found


@pytest.mark.parametrize(
    ("k", "text"),
    [
        (ONLY_EMPTY, "0 vertices, facets ∅"),
        (from_facets([[]], [1]), "1 vertex, facets ∅, ghosts 1"),
        (PATH, "4 vertices, facets 12 23, ghosts 4"),
        (from_facets([[9, 10], [1]]), "3 vertices, facets 1 9,10"),
        (build("polygon", n=6), "6 vertices, facets 12 16 23 34 45 56"),
    ],
)
def test_as_text(k: SimplicialComplex, text: str) -> None:
    assert str(k) == text


def test_another_process_gets_an_equal_complex() -> None:
    assert pickle.loads(pickle.dumps(PATH)) == PATH


def test_more_faces_than_a_sheet_of_paper_holds() -> None:
    k = build("cross-polytope", n=10)
    masks = k.face_masks()
    assert len(masks) == len(set(masks)) == 3**10
    assert k.missing_faces() == tuple((i, 10 + i) for i in range(10))
    assert SimplicialComplex.from_masks(k.labels, masks) == k
