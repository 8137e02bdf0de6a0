"""Real toric spaces by two routes, and the theorems about them."""

from __future__ import annotations

from functools import reduce
from operator import xor

import pytest
from hypothesis import given
from hypothesis import strategies as st

from certify.claims import RealToricClaim
from certify.errors import BadInput
from certify.products.real_toric import RealToricSpace
from certify.products.small_covers import real_bott_manifold
from certify.simplicial import SimplicialComplex
from tests.helpers import Homology, blocks_apart, certified_groups, certified_homology, disc_product
from tests.strategies import complexes, real_toric_spaces


def homology(space: RealToricSpace) -> Homology:
    """Return the certified homology of a real toric space."""
    claim = RealToricClaim(space.complex, space.rows)
    groups = certified_groups(claim, degrees=None, rows=list(space.rows))
    return {degree: group for (degree,), group in groups.items()}


def row_space(space: RealToricSpace) -> set[int]:
    """Return all sums of rows of λ, as masks of vertices."""
    masks = [sum(1 << vertex for vertex, digit in enumerate(row) if digit == "1") for row in space.rows]
    chosen = [[mask for i, mask in enumerate(masks) if number >> i & 1] for number in range(2 ** len(masks))]
    return {reduce(xor, some, 0) for some in chosen}


@given(real_toric_spaces())
def test_rational_betti_numbers_by_the_row_space(space: RealToricSpace) -> None:
    """b_k is the sum, over the elements ω of the row space of λ, of the rank of H̃_{k-1} of K on the support of ω.

    A. Suciu, A. Trevisan, 2012; S. Choi, H. Park, 2013 (from memory).
    """
    apart = blocks_apart(space.complex)
    expected: dict[int, int] = {}
    for mask in row_space(space):
        for degree, group in apart[mask].items():
            expected[degree + 1] = expected.get(degree + 1, 0) + group.rank
    found = {degree: group.rank for degree, group in homology(space).items() if group.rank}
    assert found == {degree: rank for degree, rank in expected.items() if rank}


@given(real_toric_spaces(), st.lists(st.integers(0, 5), min_size=1, max_size=2))
def test_a_claim_about_some_degrees_is_part_of_the_claim_about_all(space: RealToricSpace, degrees: list[int]) -> None:
    claim = RealToricClaim(space.complex, space.rows, tuple(degrees))
    found = certified_groups(claim, degrees=sorted(set(degrees)), rows=list(space.rows))
    whole = homology(space)
    assert found == {(degree,): whole[degree] for degree in set(degrees) if degree in whole}


@given(real_toric_spaces(), st.data())
def test_the_order_of_the_vertices_does_not_matter(space: RealToricSpace, data: st.DataObject) -> None:
    """Vertices move with their columns of λ."""
    k = space.complex
    order = data.draw(st.permutations(range(k.vertex_count)))
    place = {vertex: number for number, vertex in enumerate(order)}
    moved = SimplicialComplex.from_faces(
        [k.labels[vertex] for vertex in order], [[place[vertex] for vertex in facet] for facet in k.facets]
    )
    rows = tuple("".join(row[vertex] for vertex in order) for row in space.rows)
    assert homology(RealToricSpace(moved, rows)) == homology(space)


@given(real_toric_spaces())
def test_the_euler_characteristic_is_divided_by_the_order_of_the_kernel(space: RealToricSpace) -> None:
    """ker λ acts freely; it has 2^m over the number of elements of the row space."""
    k = space.complex
    upstairs = sum((-1) ** d * 2 ** (k.vertex_count - d) * number for d, number in enumerate(k.f_vector()))
    found = sum((-1) ** degree * group.rank for degree, group in homology(space).items())
    assert found * 2**k.vertex_count == upstairs * len(row_space(space))


@given(complexes(max_vertices=4), st.data())
def test_a_map_is_refused_exactly_when_its_kernel_does_not_act_freely(
    k: SimplicialComplex, data: st.DataObject
) -> None:
    """An element of (ℤ/2)^m has fixed points just when its support is a face: it reflects these intervals."""
    m = k.vertex_count
    masks = data.draw(st.lists(st.integers(0, 2**m - 1), max_size=m))
    rows = tuple("".join(str(mask >> vertex & 1) for vertex in range(m)) for mask in masks)
    kernel = [element for element in range(1, 2**m) if all((element & mask).bit_count() % 2 == 0 for mask in masks)]
    if set(kernel) & set(k.face_masks()):
        with pytest.raises(BadInput, match="injective on each face"):
            RealToricSpace(k, rows)
    else:
        assert homology(RealToricSpace(k, rows))


@given(complexes(max_vertices=4))
def test_without_a_kernel_it_is_the_product_itself(k: SimplicialComplex) -> None:
    m = k.vertex_count
    rows = tuple("".join(str(int(i == j)) for j in range(m)) for i in range(m))
    assert homology(RealToricSpace(k, rows)) == certified_homology(disc_product(k, 1))


@given(real_toric_spaces(max_vertices=4), st.data())
def test_a_row_that_depends_on_others_changes_nothing(space: RealToricSpace, data: st.DataObject) -> None:
    m = space.complex.vertex_count
    mask = data.draw(st.sampled_from(sorted(row_space(space))))
    more = "".join(str(mask >> vertex & 1) for vertex in range(m))
    place = data.draw(st.integers(0, len(space.rows)))
    rows = (*space.rows[:place], more, *space.rows[place:])
    assert homology(RealToricSpace(space.complex, rows)) == homology(space)


@given(real_toric_spaces(max_vertices=4))
def test_chambers_hang_together_along_mirrors(space: RealToricSpace) -> None:
    """There is a chamber for each value of λ, and each vertex of K glues those that differ by its λ_i."""
    assert homology(space)[0].rank * _span(space) == len(row_space(space))


def _span(space: RealToricSpace) -> int:
    """Return the number of values that the λ_i of vertices that are no ghosts span."""
    columns = [
        column
        for label, column in zip(space.complex.labels, space.columns, strict=True)
        if label not in space.complex.ghosts()
    ]
    values = {0}
    for column in columns:
        values |= {value ^ column for value in values}
    return len(values)


@given(st.integers(1, 3), st.data())
def test_real_bott_manifolds_are_bundles_of_circles(n: int, data: st.DataObject) -> None:
    """Euler characteristic 0; orientable just when the rows of the matrix have an even number of ones.

    Y. Kamishima, M. Masuda, Cohomological rigidity of real Bott manifolds, 2009 (from memory).
    """
    rows = [
        "0" * (i + 1) + "".join(data.draw(st.lists(st.sampled_from("01"), min_size=n - i - 1, max_size=n - i - 1)))
        for i in range(n)
    ]
    groups = homology(real_bott_manifold(rows))
    assert sum((-1) ** degree * group.rank for degree, group in groups.items()) == 0
    orientable = all(row.count("1") % 2 == 0 for row in rows)
    assert (groups[n].rank if n in groups else 0) == int(orientable)
