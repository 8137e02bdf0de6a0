from __future__ import annotations

from xml.etree import ElementTree

import pytest
import sympy

from certify import AbelianGroup, BadInput, GradedGroups, homology, points, polygon, polyhedral_product, simplex

T = sympy.Symbol("t")

# H_*(RP³ × S², say): torsion in the middle, and a free part beside it.
GROUPS = GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(0, (2, 4)), 3: AbelianGroup(2, (3,))})


def test_groups_print_as_mathematics() -> None:
    assert repr(GROUPS) == str(GROUPS) == "H_0 = ℤ, H_1 = ℤ/2 ⊕ ℤ/4, H_3 = ℤ² ⊕ ℤ/3"
    assert repr(GROUPS[3]) == "ℤ² ⊕ ℤ/3"
    assert repr(GROUPS.cohomology()) == "H^0 = ℤ, H^2 = ℤ/2 ⊕ ℤ/4, H^3 = ℤ², H^4 = ℤ/3"
    assert repr(GradedGroups.of({-1: AbelianGroup(1)}, reduced=True)) == "H̃_-1 = ℤ"
    assert repr(GradedGroups.of({}, upper=True)) == "H^k = 0 for all k"


def test_degrees_without_a_group_are_zero() -> None:
    assert GROUPS[2] == GROUPS[100] == GROUPS[-1] == AbelianGroup()
    assert GradedGroups.of({5: AbelianGroup()}).groups == {}


def test_nobody_loops_over_all_degrees_for_ever() -> None:
    with pytest.raises(TypeError, match="not iterable"):
        list(GROUPS)  # type: ignore[call-overload]


@pytest.mark.parametrize(
    ("p", "numbers"),
    [
        (0, {0: 1, 3: 2}),
        (2, {0: 1, 1: 2, 2: 2, 3: 2}),
        (3, {0: 1, 3: 3, 4: 1}),
        (5, {0: 1, 3: 2}),
    ],
)
def test_betti_numbers_by_hand(p: int, numbers: dict[int, int]) -> None:
    assert GROUPS.betti_numbers(p) == GROUPS.cohomology().betti_numbers(p) == numbers
    assert [GROUPS.betti(degree, p) for degree in range(6)] == [numbers.get(degree, 0) for degree in range(6)]
    assert GROUPS.poincare_polynomial(p) == sum(number * T**degree for degree, number in numbers.items())


@pytest.mark.parametrize("p", [-2, 1, 4, 9, 2**11 - 1])
def test_fields_have_prime_characteristic(p: int) -> None:
    for ask in (GROUPS.betti_numbers, GROUPS.poincare_polynomial, lambda p: GROUPS.betti(0, p)):
        with pytest.raises(BadInput, match=f"a prime, or 0 for ℚ, found {p}"):
            ask(p)


def test_the_euler_characteristic_has_signs() -> None:
    assert GROUPS.euler_characteristic() == 1 - 2
    assert GradedGroups.of({-1: AbelianGroup(1)}, reduced=True).euler_characteristic() == -1
    assert GradedGroups.of({}).euler_characteristic() == GradedGroups.of({}).poincare_polynomial() == 0


def test_a_term_below_degree_zero() -> None:
    assert GradedGroups.of({-1: AbelianGroup(1)}, reduced=True).poincare_polynomial() == 1 / T


def test_equality_is_about_groups_and_notation() -> None:
    circle = homology(polyhedral_product(points(2), "(D1, S0)"))
    other = homology(polyhedral_product(polygon(3), "(D1, S0)"))
    assert circle == GradedGroups.of({0: AbelianGroup(1), 1: AbelianGroup(1)}, "S¹")
    assert hash(circle) == hash(GradedGroups.of(circle.groups))
    assert circle != other
    assert circle != circle.cohomology() != GradedGroups.of(circle.groups, reduced=True)
    assert circle != circle.groups


def test_degrees_that_were_not_asked_for_are_not_zero() -> None:
    some = homology(polyhedral_product(polygon(4), "(D1, S0)"), degrees=[2, 1, 4])
    assert repr(some) == "H_1 = ℤ², H_2 = ℤ, H_4 = 0"
    assert some.betti(2, 2) == 1
    assert some.betti(2) == 1
    with pytest.raises(BadInput, match=r"degree: expected one that was asked for \(1, 2, 4\), found 3"):
        some.betti(3)
    # The torsion of H_0 would count.
    with pytest.raises(BadInput, match="found 0"):
        some.betti(1, 2)
    for ask in (some.betti_numbers, some.poincare_polynomial, some.euler_characteristic, some.cohomology):
        with pytest.raises(BadInput, match="expected groups in all degrees, found those in degrees 1, 2, 4 only"):
            ask()


def test_the_degree_below_zero_is_always_known() -> None:
    point = homology(polyhedral_product(simplex(1), "(D1, S0)"), degrees=[0])
    assert point.betti(0, 2) == point.betti(0) == 1


def test_latex_and_html_for_notebooks() -> None:
    cohomology = GROUPS.cohomology()
    assert GROUPS[1]._repr_latex_() == r"$\mathbb{Z}/2 \oplus \mathbb{Z}/4$"
    assert GROUPS[3]._repr_html_() == "ℤ<sup>2</sup> ⊕ ℤ/3"
    assert cohomology.latex().endswith(r"H^{3} \cong \mathbb{Z}^{2},\quad H^{4} \cong \mathbb{Z}/3")
    assert cohomology._repr_latex_() == rf"$\displaystyle {cohomology.latex()}$"
    assert GradedGroups.of({}).latex() == r"H_{k} = 0 \text{ for all } k"


def test_the_table_of_a_notebook() -> None:
    table = ElementTree.fromstring(GradedGroups.of(GROUPS.groups, "X & <Y>")._repr_html_())
    rows = [["".join(cell.itertext()) for cell in row] for row in table.iter("tr")]
    assert rows == [["k", "Hk(X & <Y>; ℤ)"], ["0", "ℤ"], ["1", "ℤ/2 ⊕ ℤ/4"], ["3", "ℤ2 ⊕ ℤ/3"]]
