from __future__ import annotations

from xml.etree import ElementTree

import pytest
import sympy

from certify import (
    AbelianGroup,
    BadInput,
    SimplicialComplex,
    disjoint_union,
    points,
    polygon,
    projective_plane,
    splitting,
    tor,
)

Z = AbelianGroup(1)
TWO = AbelianGroup(0, (2,))

# The minimal resolution over ℚ is linear but for nothing; over 𝔽₂ the fundamental class adds to its end:
# G. Reisner, Cohen-Macaulay quotients of polynomial rings, Advances in Mathematics 21 (1976), remark 3 (from memory).
LINEAR = {(0, 0): 1, (1, 6): 10, (2, 8): 15, (3, 10): 6}


def test_the_face_ring_of_the_projective_plane_depends_on_the_field() -> None:
    answer = tor(projective_plane())
    assert answer.betti_numbers() == answer.betti_numbers(3) == LINEAR
    assert answer.betti_numbers(2) == LINEAR | {(3, 12): 1, (4, 12): 1}
    assert answer[3, 12] == TWO
    assert (answer.betti(3, 12), answer.betti(3, 12, 2), answer.betti(4, 12, p=2)) == (0, 1, 1)
    assert answer[7, 7] == AbelianGroup()


def test_tor_prints_as_mathematics() -> None:
    answer = tor(points(3))
    assert repr(answer) == "Tor_{0,0} = ℤ, Tor_{1,4} = ℤ³, Tor_{2,6} = ℤ²"
    assert answer._repr_latex_().endswith(r",\quad \operatorname{Tor}_{2,6} \cong \mathbb{Z}^{2}$")
    s, t = sympy.symbols("s t")
    assert answer.poincare_polynomial() == 1 + 3 * s * t**4 + 2 * s**2 * t**6


def test_the_table_of_tor() -> None:
    table = ElementTree.fromstring(tor(points(3))._repr_html_())
    rows = [["".join(cell.itertext()) for cell in row] for row in table.iter("tr")]
    assert [row[0] for row in rows] == ["Tori,d(ℤ[K], ℤ)", "i = 0", "i = 1", "i = 2"]
    assert [row[1:] for row in rows[1:]] == [["ℤ", "0", "0"], ["0", "ℤ3", "0"], ["0", "0", "ℤ2"]]


def test_torsion_by_multidegree() -> None:
    # With a point beside it, the plane has torsion in two full subcomplexes.
    plane = tuple(range(1, 7))
    answer = splitting(disjoint_union(projective_plane(), SimplicialComplex.from_facets([["apart"]])))
    assert answer.torsion() == {plane: {1: TWO}, (*plane, "apart"): {1: TWO}}
    assert answer.tor(3, plane) == answer.tor(4, [*plane, "apart"]) == TWO
    assert answer[[*plane, "apart"]].groups == {0: Z, 1: TWO}


def test_the_order_of_the_vertices_does_not_matter() -> None:
    answer = splitting(polygon(5))
    assert answer[[3, 1]] == answer[(1, 3)] == answer[{1, 3}]
    assert repr(answer[[4, 1, 3]]) == "H̃_0 = ℤ"
    assert answer[[4, 1, 3]].space == "K_{1,3,4}"
    assert answer[[1, 2]].groups == {}
    with pytest.raises(BadInput, match="labels"):
        answer[[1, 9]]


def test_nobody_loops_over_numbers_for_ever() -> None:
    for answer in (tor(points(2)), splitting(points(2))):
        with pytest.raises(TypeError, match="not iterable"):
            list(answer)  # type: ignore[call-overload]


def test_fields_have_prime_characteristic() -> None:
    answer = tor(points(2))
    for ask in (answer.betti_numbers, answer.poincare_polynomial, lambda p: answer.betti(0, 0, p)):
        with pytest.raises(BadInput, match="a prime, or 0 for ℚ, found 6"):
            ask(6)


def test_long_answers_are_cut_when_shown() -> None:
    # Every set of at least two of the points has homology, and the empty one: 2⁹ - 9 lines.
    answer = splitting(points(9))
    assert repr(answer).startswith("H̃_-1(K_∅) = ℤ, H̃_0(K_{1,2}) = ℤ, ")
    assert repr(answer).endswith("and 491 more")
    rows = list(ElementTree.fromstring(answer._repr_html_()).iter("tr"))
    assert len(rows) == 1 + 500 + 1
    assert [cell.text for cell in rows[-1]] == ["and 3 more", None, None]
    assert len(answer.groups) == answer.latex().count(r"\cong") == 2**9 - 9


def test_labels_in_a_notebook() -> None:
    answer = splitting(SimplicialComplex.from_facets([["a_1"], ["<b>"]]))
    assert r"\tilde{H}_{0}(K_{\{\mathrm{<b>}, \mathrm{a\_1}\}}) \cong \mathbb{Z}" in answer.latex()
    assert ElementTree.fromstring(answer._repr_html_())[1][1][0].text == "{<b>,a_1}"
