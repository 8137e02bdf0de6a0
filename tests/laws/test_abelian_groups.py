"""Laws of finitely generated abelian groups: writing, reading, and direct sums."""

from __future__ import annotations

from itertools import pairwise
from math import gcd, prod

from hypothesis import given
from hypothesis import strategies as st
from sympy import ZZ, Matrix, diag
from sympy.matrices.normalforms import smith_normal_form

from certify.exact import AbelianGroup
from tests.strategies import cyclic_orders

ranks = st.integers(0, 10**6)


def _invariant_factors_by_sympy(orders: list[int]) -> tuple[int, ...]:
    """Return those above 1 of the cokernel of the diagonal matrix with these entries."""
    matrix: Matrix = smith_normal_form(diag(*orders), domain=ZZ)
    factors = sorted(abs(int(matrix[i, i])) for i in range(len(orders)))
    return tuple(factor for factor in factors if factor > 1)


@given(ranks, cyclic_orders())
def test_the_torsion_is_that_of_the_smith_form(rank: int, orders: list[int]) -> None:
    """ℤ/d_1 ⊕ … ⊕ ℤ/d_n is the cokernel of diag(d_1, …, d_n), and the Smith form gives its invariant factors."""
    group = AbelianGroup.of(rank, orders)
    assert group == AbelianGroup(rank, _invariant_factors_by_sympy(orders) if orders else ())


@given(cyclic_orders())
def test_invariant_factors_divide_one_another_and_keep_the_order(orders: list[int]) -> None:
    torsion = AbelianGroup.of(0, orders).torsion
    assert all(b % a == 0 for a, b in pairwise(torsion))
    assert all(factor > 1 for factor in torsion)
    assert prod(torsion) == prod(orders)


@given(ranks, cyclic_orders(), ranks, cyclic_orders())
def test_the_direct_sum_puts_summands_together(rank: int, orders: list[int], more: int, others: list[int]) -> None:
    left, right = AbelianGroup.of(rank, orders), AbelianGroup.of(more, others)
    assert left + right == AbelianGroup.of(rank + more, orders + others)
    assert left + right == right + left
    assert left + AbelianGroup() == left


@given(ranks, cyclic_orders())
def test_what_is_written_is_read_as_the_same_group(rank: int, orders: list[int]) -> None:
    # Numbers of up to 40 digits can be read; the product of all orders bounds every invariant factor.
    while prod(orders) >= 10**40:
        orders.pop()
    group = AbelianGroup.of(rank, orders)
    assert AbelianGroup.parse(str(group)) == group
    assert AbelianGroup.parse(group.plain()) == group
    assert group.plain().isascii()


@given(st.integers(0, 99), cyclic_orders(), st.data())
def test_summands_are_read_in_any_order_and_spelling(rank: int, orders: list[int], data: st.DataObject) -> None:
    terms = [f"Z^{rank}", *(f"Z/{order}" for order in orders if order < 10**19)]
    shuffled = data.draw(st.permutations(terms))
    plus = data.draw(st.sampled_from(["+", " + ", "⊕", " ⊕ "]))
    written = plus.join(term.replace("Z", data.draw(st.sampled_from("Zℤ"))) for term in shuffled)
    assert AbelianGroup.parse(written) == AbelianGroup.of(rank, [order for order in orders if order < 10**19])


@given(st.integers(1, 10**9), st.integers(1, 10**9))
def test_the_chinese_remainder_theorem(a: int, b: int) -> None:
    """ℤ/ab ≅ ℤ/a ⊕ ℤ/b exactly when a and b have no common divisor."""
    together, apart = AbelianGroup.of(0, [a * b]), AbelianGroup.of(0, [a, b])
    assert (together == apart) == (gcd(a, b) == 1)
