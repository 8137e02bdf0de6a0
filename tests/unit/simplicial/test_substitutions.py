from __future__ import annotations

from itertools import combinations, product
from typing import Any

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from certify.errors import BadInput
from certify.simplicial import (
    Label,
    SimplicialComplex,
    build,
    disjoint_union,
    join,
    simplicial_wedge,
    substitution,
)
from tests.strategies import complexes, complexes_with_multiplicities, complexes_with_parts
from tests.unit.simplicial.oracles import face_sets, reduced_homology, renumbered

from_facets = SimplicialComplex.from_facets

NOTHING = from_facets([[]])
POINT = from_facets([["p"]])


def missing_sets(k: SimplicialComplex) -> set[frozenset[Label]]:
    return {frozenset(k.labels[vertex] for vertex in face) for face in k.missing_faces()}


# -- simplicial wedges ------------------------------------------------------------------------


def test_the_wedge_of_a_square_on_one_vertex() -> None:
    """The missing faces 1 3 and 2 4 become 1 1' 3 and 2 4: the suspension of a triangle."""
    found = simplicial_wedge(build("polygon", n=4), [2, 1, 1, 1])
    assert found.labels == ((1, 1), (1, 2), (2, 1), (3, 1), (4, 1))
    triangle = from_facets([[(1, 1), (1, 2)], [(1, 2), (3, 1)], [(1, 1), (3, 1)]])
    assert face_sets(found) == face_sets(join(triangle, from_facets([[(2, 1)], [(4, 1)]])))


def test_a_ghost_with_copies_is_the_boundary_of_a_simplex() -> None:
    assert renumbered(simplicial_wedge(from_facets([[]], ["g"]), [3])) == renumbered(build("simplex-boundary", m=3))
    assert simplicial_wedge(from_facets([[]], ["g"]), [1]).ghosts() == (("g", 1),)
    assert simplicial_wedge(NOTHING, []) == NOTHING


@given(complexes_with_multiplicities())
def test_wedges_by_the_definition(drawn: tuple[SimplicialComplex, list[int]]) -> None:
    k, numbers = drawn
    found = simplicial_wedge(k, numbers)
    copies = [frozenset((label, i + 1) for i in range(j)) for label, j in zip(k.labels, numbers, strict=True)]
    assert set(found.labels) == frozenset().union(*copies)
    for mask in range(1 << min(found.vertex_count, 8)):
        chosen = {found.labels[i] for i in range(found.vertex_count) if mask >> i & 1}
        full = [label for label, own in zip(k.labels, copies, strict=True) if own <= chosen]
        assert found.is_face(chosen) is k.is_face(full)


@given(complexes_with_multiplicities())
def test_a_missing_face_of_a_wedge_has_all_copies(drawn: tuple[SimplicialComplex, list[int]]) -> None:
    k, numbers = drawn
    copies = dict(zip(k.labels, numbers, strict=True))
    expected = {frozenset((a, i + 1) for a in face for i in range(copies[a])) for face in missing_sets(k)}
    assert missing_sets(simplicial_wedge(k, numbers)) == expected


@given(complexes_with_multiplicities())
def test_a_wedge_shifts_the_homology(drawn: tuple[SimplicialComplex, list[int]]) -> None:
    """Each further copy of a vertex suspends the complex."""
    k, numbers = drawn
    assume(sum(numbers) <= 9)  # dense Smith forms of the boundary of a simplex on 12 vertices take hours
    shift = sum(numbers) - len(numbers)
    shifted = {degree + shift: group for degree, group in reduced_homology(k).items()}
    assert reduced_homology(simplicial_wedge(k, numbers)) == shifted


@given(complexes_with_multiplicities(3), st.data())
def test_copies_of_copies(drawn: tuple[SimplicialComplex, list[int]], data: st.DataObject) -> None:
    k, numbers = drawn
    more = [data.draw(st.lists(st.integers(1, 2), min_size=j, max_size=j)) for j in numbers]
    twice = simplicial_wedge(simplicial_wedge(k, numbers), [number for row in more for number in row])
    assert renumbered(twice) == renumbered(simplicial_wedge(k, map(sum, more)))
    assert renumbered(simplicial_wedge(k, [1] * len(numbers))) == renumbered(k)


@pytest.mark.parametrize(
    ("numbers", "message"),
    [
        ([1], "multiplicities: expected 2 numbers, found 1"),
        ([1, 1, 1], "multiplicities: expected 2 numbers, found 3"),
        ([1, 0], "multiplicity 2: expected a whole number of at least 1, found 0"),
        ([1.0, 1], "multiplicity 1: expected a whole number of at least 1, found 1.0"),
        ([1, True], "multiplicity 2: expected a whole number of at least 1, found True"),
        ("12", "multiplicities: expected a list, found '12'"),
        (2, "multiplicities: expected a list, found 2"),
    ],
)
def test_multiplicities_that_are_none(numbers: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        simplicial_wedge(from_facets([[1, 2]]), numbers)
    assert str(caught.value) == message


# -- substitution -----------------------------------------------------------------------------


def test_a_substitution_into_a_path() -> None:
    path, points, edge = from_facets([[1, 2], [2, 3]]), from_facets([["x"], ["y"]]), from_facets([["u", "v"]])
    found = substitution(path, [points, edge, POINT])
    assert found.labels == ((1, "x"), (1, "y"), (2, "u"), (2, "v"), (3, "p"))
    assert str(found.relabelled(["x", "y", "u", "v", "p"])) == "5 vertices, facets xuv yuv uvp"


def test_a_vertex_may_be_replaced_by_nothing() -> None:
    found = substitution(from_facets([[1, 2], [3]]), [NOTHING, POINT, from_facets([[]], ["g"])])
    assert str(found.relabelled(["p", "g"])) == "2 vertices, facets p, ghosts g"


@given(complexes_with_parts())
def test_substitutions_by_the_definition(drawn: tuple[SimplicialComplex, list[SimplicialComplex]]) -> None:
    k, parts = drawn
    inner = [[{(a, b) for b in face} for face in face_sets(part)] for a, part in zip(k.labels, parts, strict=True)]
    expected = {
        frozenset().union(*choice)
        for size in range(k.vertex_count + 1)
        for chosen in combinations(range(k.vertex_count), size)
        if k.is_face(k.labels[i] for i in chosen)
        for choice in product(*(inner[i] for i in chosen))
    }
    found = substitution(k, parts)
    assert face_sets(found) == expected
    assert found.vertex_count == sum(part.vertex_count for part in parts)


@given(complexes_with_parts())
def test_missing_faces_of_a_substitution(drawn: tuple[SimplicialComplex, list[SimplicialComplex]]) -> None:
    k, parts = drawn
    part_of = dict(zip(k.labels, parts, strict=True))
    inner = {frozenset((a, b) for b in face) for a, part in part_of.items() for face in missing_sets(part)}
    real = {a: [(a, b) for b in part.labels if b not in part.ghosts()] for a, part in part_of.items()}
    across = {frozenset(choice) for face in missing_sets(k) for choice in product(*(real[a] for a in face))}
    candidates = inner | across
    least = {face for face in candidates if not any(other < face for other in candidates)}
    assert missing_sets(substitution(k, parts)) == least


@given(st.lists(complexes(3), max_size=3))
def test_substitutions_into_a_simplex_and_into_points(parts: list[SimplicialComplex]) -> None:
    m = len(parts)
    assert renumbered(substitution(build("simplex", m=m), parts)) == renumbered(join(*parts))
    assert renumbered(substitution(build("points", m=m), parts)) == renumbered(disjoint_union(*parts))


@given(complexes())
def test_a_point_in_place_of_a_point_changes_nothing(k: SimplicialComplex) -> None:
    assert renumbered(substitution(k, [POINT] * k.vertex_count)) == renumbered(k)
    assert renumbered(substitution(POINT, [k])) == renumbered(k)


def test_each_vertex_needs_a_complex() -> None:
    with pytest.raises(BadInput) as caught:
        substitution(from_facets([[1, 2]]), [POINT])
    assert str(caught.value) == "parts: expected 2 complexes, found 1"
