"""Signed permutations: their notation, products, groups and classes."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st
from sympy.combinatorics import Permutation, PermutationGroup

from certify.errors import BadInput
from certify.simplicial import SimplicialComplex, build
from certify.simplicial.families import points
from certify.symmetry.elements import (
    Element,
    after,
    check_symmetries,
    cycles_of,
    element_from_cycles,
    element_from_sympy,
    generated_group,
    identity,
    inverse,
    rational_classes,
    spell_cycles,
)
from tests.helpers import disc_product
from tests.strategies import signed_permutations


def as_matrix(element: Element) -> list[list[int]]:
    """Return the matrix of an element on coordinates: column i has the sign at the image of i."""
    m = len(element)
    return [[(abs(to) == row + 1) * (1 if to > 0 else -1) for to in element] for row in range(m)]


@given(st.data())
def test_products_and_inverses_are_those_of_matrices(data: st.DataObject) -> None:
    m = data.draw(st.integers(1, 5))
    first, second = data.draw(signed_permutations(m)), data.draw(signed_permutations(m))
    a, b = as_matrix(second), as_matrix(first)
    product = [[sum(a[i][k] * b[k][j] for k in range(m)) for j in range(m)] for i in range(m)]
    assert as_matrix(after(second, first)) == product
    assert after(inverse(first), first) == after(first, inverse(first)) == identity(m)


@given(signed_permutations())
def test_what_is_written_in_cycles_is_read_again(element: Element) -> None:
    k = points(len(element))
    assert element_from_cycles(spell_cycles(element, k), k) == element


@given(signed_permutations())
def test_labels_may_be_names_with_blanks(element: Element) -> None:
    k = SimplicialComplex.from_facets([[f"lamp {i}"] for i in range(1, len(element) + 1)])
    assert element_from_cycles(spell_cycles(element, k), k) == element


def test_a_label_may_begin_with_a_minus_sign() -> None:
    k = SimplicialComplex.from_facets([[-1], [1], [2]])
    assert element_from_cycles("(-1 2)", k) == (3, 2, 1)
    assert spell_cycles((3, 2, 1), k) == "(-1 2)"


def test_vertices_are_called_by_numbers_where_labels_have_brackets() -> None:
    k = build("permutohedron-dual", n=2)
    assert k.labels[3] == (1, 2)
    turn = element_from_cycles("(1 2 3)(4 6 5)", k)
    check_symmetries([turn], disc_product(k, 1))
    assert spell_cycles(turn, k) == "(1 2 3)(4 6 5)"


@pytest.mark.parametrize(
    ("text", "element"),
    [
        ("()", (1, 2, 3, 4)),
        ("(1 2 3)", (2, 3, 1, 4)),
        ("(1, 2)(3, 4)", (2, 1, 4, 3)),
        (" (1 2) (3 4) ", (2, 1, 4, 3)),
        # The last cycle first: 2 goes to 3 by the second one, and 3 stays in the first.
        ("(1 2)(2 3)", (2, 3, 1, 4)),
        ("(1 -2)", (-2, 1, 3, 4)),
        ("(-1)", (-1, 2, 3, 4)),
        ("(-1)(-2)", (-1, -2, 3, 4)),
        ("(-1 -2)", (-2, -1, 3, 4)),
    ],
)
def test_cycles_are_read_as_the_documents_say(text: str, element: Element) -> None:
    assert element_from_cycles(text, points(4)) == element


def test_sympy_permutations_of_fewer_points_leave_the_others() -> None:
    assert element_from_sympy(Permutation(0, 1, size=3), points(4)) == (2, 1, 3, 4)
    with pytest.raises(BadInput, match="expected a permutation of 2 vertices, found one of 3 points"):
        element_from_sympy(Permutation(0, 1, 2), points(2))


@given(st.data())
def test_groups_and_classes_against_sympy(data: st.DataObject) -> None:
    """Rational classes are unions of conjugacy classes, closed under powers prime to the order."""
    m = data.draw(st.integers(1, 4))
    images = data.draw(st.lists(st.permutations(range(1, m + 1)).map(tuple), min_size=1, max_size=2))
    group = generated_group(images, m)
    theirs = PermutationGroup([Permutation([to - 1 for to in image]) for image in images])
    assert len(group) == theirs.order()
    assert group[0] == identity(m)
    classes = rational_classes(group, images)
    assert sorted(element for own in classes for element in own) == sorted(group)
    conjugacy = [{tuple(to + 1 for to in p.array_form) for p in own} for own in theirs.conjugacy_classes()]
    for own in classes:
        assert all(part <= set(own) or not part & set(own) for part in conjugacy)
        assert len({len(cycles_of(element)) for element in own}) == 1


def test_images_that_are_no_permutation_are_refused() -> None:
    with pytest.raises(BadInput, match="expected images of all 3 vertices"):
        check_symmetries([(1, 1, 2)], disc_product(points(3), 1))
