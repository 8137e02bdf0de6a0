"""The stable splitting piece by piece: smash products, Tor, tables, summands."""

from __future__ import annotations

from hypothesis import given
from hypothesis import strategies as st

from certify.claims import HomologyClaim, SmashClaim, SummandClaim, TableClaim, TorClaim
from certify.exact import AbelianGroup
from certify.exact.completion import completion
from certify.products import PolyhedralProduct, parse_pair
from certify.simplicial import Label, SimplicialComplex
from certify.simplicial.operations import full_subcomplex, join, link
from tests.helpers import (
    Homology,
    blocks_apart,
    certified_groups,
    certified_homology,
    cohomology,
    disc_product,
    product_of,
)
from tests.strategies import NAMED_PAIRS, complexes, complexes_with_face, complexes_with_torsion, unimodular_matrices


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


@given(complexes(max_vertices=3), st.sampled_from(NAMED_PAIRS))
def test_a_product_splits_into_smash_products_over_full_subcomplexes(k: SimplicialComplex, pair: str) -> None:
    """Bahri, Bendersky, Cohen, Gitler, 2010 (from memory)."""
    parts = []
    for number in range(2**k.vertex_count):
        chosen = [label for place, label in enumerate(k.labels) if number >> place & 1]
        product = product_of(full_subcomplex(k, chosen), pair)
        names = [pair] * len(chosen)
        parts.append(by_degree(certified_groups(SmashClaim(product), degrees=None, pairs=names)))
    assert added(*parts) == certified_homology(product_of(k, pair))


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


@given(complexes(max_vertices=3), complexes(max_vertices=2))
def test_tor_of_a_join_is_a_tensor_product(left: SimplicialComplex, right: SimplicialComplex) -> None:
    """Ranks multiply: the face ring of a join is the tensor product of the two."""
    ranks: dict[tuple[int, int], int] = {}
    for (i, j), group in certified_groups(TorClaim(left)).items():
        for (a, b), other in certified_groups(TorClaim(right)).items():
            ranks[i + a, j + b] = ranks.get((i + a, j + b), 0) + group.rank * other.rank
    found = certified_groups(TorClaim(join(left, right)))
    assert {key: group.rank for key, group in found.items()} == ranks


@given(complexes_with_face(max_vertices=5), st.data())
def test_a_summand_is_the_homology_of_a_link_cut_down(
    acted: tuple[SimplicialComplex, list[Label]], data: st.DataObject
) -> None:
    k, out = acted
    others = [label for label in k.labels if label not in out]
    kept = [label for label in others if data.draw(st.booleans())]
    numbers = {label: number for number, label in enumerate(k.labels, start=1)}
    claim = SummandClaim(k, tuple(kept), tuple(out))
    fields = {"kept": sorted(numbers[label] for label in kept), "out": sorted(numbers[label] for label in out)}
    part = full_subcomplex(link(k, out), kept)
    everything = 2**part.vertex_count - 1
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


@given(unimodular_matrices(), st.data())
def test_a_part_of_a_basis_is_completed_to_a_basis(matrix: list[list[int]], data: st.DataObject) -> None:
    """Vectors that are part of a basis come back with others that make one of all cells that they use."""
    size = len(matrix)
    number = data.draw(st.integers(0, size))
    vectors = [{i: row[j] for i, row in enumerate(matrix) if row[j]} for j in range(number)]
    leads, others = completion(vectors)
    used = sorted({cell for vector in [*vectors, *others] for cell in vector})
    assert set(leads) <= set(used) or not used
    from flint import fmpz_mat

    whole = [*vectors, *others]
    if whole:
        assert len(whole) == len(leads)
        dense = fmpz_mat([[vector.get(cell, 0) for vector in whole] for cell in sorted(leads)])
        assert abs(int(dense.det())) == 1
