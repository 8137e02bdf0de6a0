"""The stable splitting piece by piece: smash products, Tor, tables, summands."""

from __future__ import annotations

import pytest
from flint import fmpz_mat
from hypothesis import given, settings
from hypothesis import strategies as st

from certify.claims import HomologyClaim, SmashClaim, SummandClaim, TableClaim, TorClaim
from certify.claims.homology import Route
from certify.errors import InternalError
from certify.exact import AbelianGroup
from certify.exact.completion import completion
from certify.products import PolyhedralProduct, parse_pair
from certify.simplicial import Label, SimplicialComplex, build
from certify.simplicial.operations import full_subcomplex, join
from tests.helpers import (
    Homology,
    blocks_apart,
    certified_groups,
    certified_homology,
    cohomology,
    disc_product,
    kunneth,
    product_of,
)
from tests.strategies import (
    NAMED_PAIRS,
    complexes,
    complexes_with_face,
    complexes_with_torsion,
    summand_bases,
    unimodular_matrices,
)


def added(*parts: Homology) -> Homology:
    """Return the direct sum of graded groups."""
    total: Homology = {}
    for part in parts:
        for degree, group in part.items():
            known = total.get(degree, AbelianGroup())
            total[degree] = AbelianGroup.of(known.rank + group.rank, (*known.torsion, *group.torsion))
    return {degree: group for degree, group in total.items() if group}


def by_degree(groups: dict[tuple[int, ...], AbelianGroup]) -> Homology:
    """Return groups with one degree under this degree."""
    return {degree: group for (degree,), group in groups.items()}


@given(complexes(max_vertices=3), st.sampled_from(["blocks", "orbits"]), st.data())
def test_a_product_splits_into_smash_products_over_full_subcomplexes(
    k: SimplicialComplex, route: Route, data: st.DataObject
) -> None:
    """Bahri, Bendersky, Cohen, Gitler, 2010 (from memory); with other pairs at other vertices."""
    name = st.sampled_from(NAMED_PAIRS)
    pairs = data.draw(st.lists(name, min_size=k.vertex_count, max_size=k.vertex_count))
    parts = []
    for number in range(2**k.vertex_count):
        places = [place for place in range(k.vertex_count) if number >> place & 1]
        names = [pairs[place] for place in places]
        product = product_of(full_subcomplex(k, [k.labels[place] for place in places]), names)
        claim = SmashClaim(product, route=route)
        parts.append(by_degree(certified_groups(claim, degrees=None, pairs=names)))
    # The whole is by cells, which know nothing of any splitting.
    assert added(*parts) == certified_homology(product_of(k, pairs), route="cells")


@given(complexes(max_vertices=5) | complexes_with_torsion())
def test_tor_is_the_cohomology_of_all_full_subcomplexes(k: SimplicialComplex) -> None:
    """Hochster's formula, from a certified table."""
    expected: dict[tuple[int, int], list[Homology]] = {}
    for mask, groups in blocks_apart(k).items():
        j = mask.bit_count()
        for degree, group in cohomology(groups).items():
            expected.setdefault((j - degree - 1, j), []).append({0: group})
    sums = {key: added(*groups)[0] for key, groups in expected.items()}
    assert certified_groups(TorClaim(k)) == sums


@given(complexes(max_vertices=5) | complexes_with_torsion())
def test_tor_is_the_cohomology_of_the_moment_angle_complex(k: SimplicialComplex) -> None:
    """H^n of (D², S¹)^K is the sum of Tor_{i,2j} with 2j - i = n."""
    parts: list[Homology] = [{2 * j - i: group} for (i, j), group in certified_groups(TorClaim(k)).items()]
    assert added(*parts) == cohomology(certified_homology(disc_product(k, 2)))


Bigraded = dict[tuple[int, ...], AbelianGroup]
"""Groups under i and j."""


def tor_of_a_product(left: Bigraded, right: Bigraded) -> Bigraded:
    """Return what Künneth gives for the two Tor: in each pair of degrees j, homology graded by i."""
    total: dict[int, list[Homology]] = {}
    for j in {j for _, j in left}:
        for k in {k for _, k in right}:
            one = {i: group for (i, other), group in left.items() if other == j}
            two = {i: group for (i, other), group in right.items() if other == k}
            total.setdefault(j + k, []).append(kunneth(one, two))
    return {(i, j): group for j, parts in total.items() for i, group in added(*parts).items()}


@settings(max_examples=25)
@given(complexes(max_vertices=3) | complexes_with_torsion(), complexes(max_vertices=2))
def test_tor_of_a_join_is_given_by_kunneth(left: SimplicialComplex, right: SimplicialComplex) -> None:
    """The face ring of a join is the tensor product of the two, and so is the Koszul complex that gives Tor."""
    expected = tor_of_a_product(certified_groups(TorClaim(left)), certified_groups(TorClaim(right)))
    assert certified_groups(TorClaim(join(left, right))) == expected


def test_tor_of_a_join_is_given_by_kunneth_where_both_have_torsion() -> None:
    plane = build("projective-plane")
    tor = certified_groups(TorClaim(plane))
    expected = tor_of_a_product(tor, tor)
    # ℤ/2 in one place for each gives ℤ/2 ⊗ ℤ/2 and Tor(ℤ/2, ℤ/2), in neighbouring degrees.
    assert [key for key, group in expected.items() if key[1] == 12 and group.torsion] == [(6, 12), (7, 12)]
    assert certified_groups(TorClaim(join(plane, plane))) == expected


@given(complexes_with_face(max_vertices=5), st.data())
def test_a_summand_is_the_homology_of_a_link_cut_down(
    acted: tuple[SimplicialComplex, list[Label]], data: st.DataObject
) -> None:
    """Its faces are the sets of kept vertices that form a face together with those that are out."""
    k, out = acted
    kept = [label for label in k.labels if label not in out and data.draw(st.booleans())]
    numbers = {label: number for number, label in enumerate(k.labels)}
    claim = SummandClaim(k, tuple(kept), tuple(out))
    fields = {"kept": sorted(numbers[label] + 1 for label in kept), "out": sorted(numbers[label] + 1 for label in out)}
    faces = set(k.face_masks())
    base = sum(1 << numbers[label] for label in out)
    chosen = [
        [place for place in range(len(kept)) if number >> place & 1]
        for number in range(2 ** len(kept))
        if base + sum(1 << numbers[kept[place]] for place in range(len(kept)) if number >> place & 1) in faces
    ]
    part = SimplicialComplex.from_faces(kept, chosen)
    everything = 2 ** len(kept) - 1
    assert by_degree(certified_groups(claim, **fields)) == blocks_apart(part)[everything]


@given(complexes(max_vertices=4))
def test_a_table_adds_up_to_the_homology_of_the_product(k: SimplicialComplex) -> None:
    parts: list[Homology] = [{degree + 1: group} for (_, degree), group in certified_groups(TableClaim(k)).items()]
    assert added(*parts) == certified_homology(disc_product(k, 1))


@given(complexes(max_vertices=4))
def test_spheres_with_a_point_have_a_cell_for_each_face(k: SimplicialComplex) -> None:
    """All blocks of (S², *) are single cells: the homology is free, with a ℤ in degree 2|σ| for each face."""
    claim = HomologyClaim(PolyhedralProduct(k, (parse_pair("(S2, *)"),) * k.vertex_count))
    found = by_degree(certified_groups(claim, degrees=None, pairs=["(S2, *)"] * k.vertex_count))
    assert found == {2 * size: AbelianGroup(number) for size, number in enumerate(k.f_vector()) if number}


def completed(vectors: list[dict[int, int]], size: int) -> int:
    """Return the determinant of vectors, what completes them, and the single cells elsewhere."""
    leads, more = completion(vectors)
    assert len(set(leads)) == len(leads) == len(vectors) + len(more)
    assert all(set(vector) <= set(leads) for vector in more)
    single = [{cell: 1} for cell in range(size) if cell not in leads]
    whole = [*vectors, *more, *single]
    assert len(whole) == size
    return abs(int(fmpz_mat([[vector.get(cell, 0) for vector in whole] for cell in range(size)]).det())) if size else 1


@given(unimodular_matrices(), st.data())
def test_a_part_of_a_basis_is_completed_to_a_basis(matrix: list[list[int]], data: st.DataObject) -> None:
    size = len(matrix)
    number = data.draw(st.integers(0, size))
    vectors = [{i: row[j] for i, row in enumerate(matrix) if row[j]} for j in range(number)]
    assert completed(vectors, size) == 1


@given(summand_bases())
def test_a_basis_of_a_summand_without_units_is_completed_to_a_basis(drawn: tuple[list[dict[int, int]], int]) -> None:
    vectors, size = drawn
    assert completed(vectors, size) == 1


@given(
    summand_bases().filter(lambda drawn: bool(drawn[0])), st.integers(-3, 3).filter(lambda x: abs(x) != 1), st.data()
)
def test_what_is_no_basis_of_a_summand_is_refused(
    drawn: tuple[list[dict[int, int]], int], factor: int, data: st.DataObject
) -> None:
    """A multiple of one vector, plus others, spans a smaller lattice of the same rank; or a dependent one, for 0."""
    vectors, size = drawn
    place = data.draw(st.integers(0, len(vectors) - 1))
    mixed = [factor * vectors[place].get(cell, 0) for cell in range(size)]
    for vector in vectors[:place]:
        mixed = [a + vector.get(cell, 0) for cell, a in enumerate(mixed)]
    wrong = [*vectors[:place], {cell: x for cell, x in enumerate(mixed) if x}, *vectors[place + 1 :]]
    with pytest.raises(InternalError, match="no basis of a direct summand"):
        completion(wrong)
