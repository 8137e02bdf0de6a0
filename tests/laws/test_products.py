"""Laws of polyhedral products of disc pairs; every group below stands in a certificate that the verifier accepted."""

from __future__ import annotations

from collections.abc import Sequence
from math import prod

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from certify.claims import HomologyClaim
from certify.claims.homology import Route
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, blocks
from certify.simplicial import SimplicialComplex, build, face_of, full_subcomplex, join, link
from certify.simplicial.families import cyclic_polytope
from tests.helpers import (
    Homology,
    accepted_homology,
    alternating_sum,
    blocks_apart,
    certificate_of,
    certified_homology,
    disc_dimensions,
    disc_product,
    kunneth,
    verifier,
)
from tests.strategies import (
    complexes,
    complexes_with_torsion,
    disc_products,
    disc_products_with_torsion,
    products_with_degrees,
    relabelled_products,
)
from tests.unit.simplicial.oracles import reduced_homology

both_routes = pytest.mark.parametrize("route", ["blocks", "cells"])
few = settings(max_examples=15)


# -- superfluous vertices -------------------------------------------------------------------------


def weighted_product(k: SimplicialComplex, numbers: Sequence[int]) -> PolyhedralProduct:
    """Return the product of pairs with a point, a cell t in A and a cell e outside with d e = n t."""
    pairs = [Pair.from_cells([(0, False, {}), (1, False, {}), (2, True, {1: n})]) for n in numbers]
    return PolyhedralProduct(k, tuple(pairs))


@given(complexes(max_vertices=5), st.data())
def test_vertices_are_left_out_without_a_change_of_the_homology(k: SimplicialComplex, data: st.DataObject) -> None:
    """Vertices with the number 1 dominate others, and those with other numbers are dominated only."""
    numbers = data.draw(st.lists(st.sampled_from([1, 1, 2, 3, 4]), min_size=k.vertex_count, max_size=k.vertex_count))
    space = weighted_product(k, numbers)
    assert certified_homology(space, route="blocks") == certified_homology(space, route="cells")


@given(complexes(max_vertices=7))
def test_no_vertex_of_a_class_is_dominated(k: SimplicialComplex) -> None:
    """A complex without dominated vertices is its own core; that of a cone is a point (Barmak, Minian; from memory)."""
    for block in blocks.block_classes(disc_product(k, 1)):
        facets = [face_of(mask) for mask in block.faces]
        core = SimplicialComplex.from_facets(facets, vertices=range(len(block.tags)))
        assert not core.ghosts()
        if len(block.tags) > 1:
            links = [link(core, [vertex]) for vertex in core.labels]
            assert not any(set.intersection(*map(set, around.facets)) for around in links)


@given(st.integers(3, 40))
def test_the_classes_of_a_polygon_are_its_sets_of_points(n: int) -> None:
    """A full subcomplex is the polygon, or as many points as it has arcs: so the number grows with n, not with 2^n."""
    assert sum(1 for _ in blocks.block_classes(disc_product(build("polygon", n=n), 1))) == n // 2 + 2


# -- the stable splitting -----------------------------------------------------------------------


@given(disc_products())
def test_the_block_route_and_the_cell_route_agree(space: PolyhedralProduct) -> None:
    """H_*((X, A)^K) is the sum over I of the reduced homology of K_I, shifted by 1 + Σ (n_i - 1) over i in I.

    A. Bahri, M. Bendersky, F. R. Cohen, S. Gitler, The polyhedral product functor: a method of decomposition for
    moment-angle complexes, arrangements and related spaces, Advances in Mathematics 225 (2010) (from memory).
    """
    assert certified_homology(space, route="blocks") == certified_homology(space, route="cells")


@few
@given(disc_products_with_torsion())
def test_the_routes_agree_where_there_is_torsion(space: PolyhedralProduct) -> None:
    groups = certified_homology(space, route="blocks")
    assert any(group.torsion for group in groups.values())
    assert certified_homology(space, route="cells") == groups


@given(complexes() | complexes_with_torsion())
def test_each_block_is_the_homology_of_a_full_subcomplex(k: SimplicialComplex) -> None:
    """The same theorem, block by block, against Smith forms of the simplicial boundary matrices."""
    for mask, groups in blocks_apart(k).items():
        part = full_subcomplex(k, [k.labels[vertex] for vertex in face_of(mask)])
        expected = reduced_homology(part)
        assert {degree: (group.rank, group.torsion) for degree, group in groups.items()} == expected


@given(disc_products() | disc_products_with_torsion())
def test_the_euler_characteristic_is_a_sum_over_faces(space: PolyhedralProduct) -> None:
    """χ((X, A)^K) = Σ_σ ∏_{i ∈ σ} (χ(X_i) - χ(A_i)) ∏_{i ∉ σ} χ(A_i), by counting cells."""
    sphere = [1 + (-1) ** (n - 1) for n in disc_dimensions(space)]
    vertices = range(len(space.pairs))
    by_faces = sum(
        prod(1 - sphere[i] if mask >> i & 1 else sphere[i] for i in vertices) for mask in space.complex.face_masks()
    )
    groups = certified_homology(space)
    assert alternating_sum((degree, group.rank) for degree, group in groups.items()) == by_faces


@given(complexes() | complexes_with_torsion())
def test_all_disc_pairs_have_the_same_homology_but_for_the_degrees(k: SimplicialComplex) -> None:
    """The blocks are the same for all n; so is the sum of all groups."""
    sums = {n: sum(certified_homology(disc_product(k, n)).values(), AbelianGroup()) for n in (1, 2, 3)}
    assert sums[1] == sums[2] == sums[3]


# -- restriction, order of the vertices, joins --------------------------------------------------


@both_routes
@given(products_with_degrees())
def test_a_claim_about_some_degrees_is_part_of_the_claim_about_all(
    route: Route, drawn: tuple[PolyhedralProduct, list[int]]
) -> None:
    space, degrees = drawn
    whole = certified_homology(space)
    assert certified_homology(space, degrees, route=route) == {k: whole[k] for k in degrees if k in whole}


@both_routes
@settings(max_examples=25)
@given(relabelled_products())
def test_the_order_of_the_vertices_does_not_matter(
    route: Route, spaces: tuple[PolyhedralProduct, PolyhedralProduct]
) -> None:
    space, moved = spaces
    assert certified_homology(space, route=route) == certified_homology(moved, route=route)


def _joined(left: PolyhedralProduct, right: PolyhedralProduct) -> PolyhedralProduct:
    return PolyhedralProduct(join(left.complex, right.complex), left.pairs + right.pairs)


@given(disc_products(max_vertices=4), disc_products(max_vertices=4))
def test_joins_multiply(left: PolyhedralProduct, right: PolyhedralProduct) -> None:
    """(X, A)^{K * L} = (X, A)^K × (X, A)^L, and Künneth.

    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, proposition 4.1.3 for (D², S¹) (from memory).
    """
    assert certified_homology(_joined(left, right)) == kunneth(certified_homology(left), certified_homology(right))


@few
@given(disc_products_with_torsion(), disc_products(max_vertices=3))
def test_joins_multiply_where_one_factor_has_torsion(left: PolyhedralProduct, right: PolyhedralProduct) -> None:
    assert certified_homology(_joined(left, right)) == kunneth(certified_homology(left), certified_homology(right))


@pytest.mark.parametrize("pairs", [[1] * 12, [2] * 12, [1, 3, 1, 2, 1, 1, 2, 1, 1, 4, 1, 1]])
def test_joins_multiply_where_both_factors_have_torsion(pairs: Sequence[int]) -> None:
    """Here Tor(ℤ/2, ℤ/2) takes part."""
    plane = build("projective-plane")
    left, right = disc_product(plane, pairs[:6]), disc_product(plane, pairs[6:])
    expected = kunneth(certified_homology(left), certified_homology(right))
    assert certified_homology(_joined(left, right)) == expected
    # The products of the two groups ℤ/2 are in the two top degrees, and the highest is Tor alone.
    assert max(expected) == max(certified_homology(left)) + max(certified_homology(right)) + 1
    assert str(expected[max(expected)]) == "ℤ/2"


# -- what must not make a difference ------------------------------------------------------------


def _bytes_for_one_and_two_jobs(space: PolyhedralProduct, route: Route) -> tuple[bytes, bytes]:
    claim = HomologyClaim(space, route=route)
    return certificate_of(claim, jobs=1), certificate_of(claim, jobs=2)


@both_routes
@settings(max_examples=5)
@given(disc_products(max_vertices=8, max_n=2))
def test_the_bytes_do_not_depend_on_the_number_of_jobs(route: Route, space: PolyhedralProduct) -> None:
    one, two = _bytes_for_one_and_two_jobs(space, route)
    assert one == two


def test_the_bytes_do_not_depend_on_the_number_of_jobs_when_there_is_much_to_do() -> None:
    """Where no summand has the number 1 nothing is dominated; some hundreds of tasks are left, for both processes."""
    space = weighted_product(cyclic_polytope(11, 4), [2] * 11)
    assert sum(1 for _ in HomologyClaim(space).tasks()) > 200
    one, two = _bytes_for_one_and_two_jobs(space, "blocks")
    assert one == two
    accepted_homology(two, space)


def _with_batch(space: PolyhedralProduct, size: int, degrees: Sequence[int] | None) -> tuple[int, Homology]:
    """Return the number of records and the groups when prover and verifier merge at most `size` faces together."""
    with pytest.MonkeyPatch.context() as patch:
        patch.setattr(blocks, "BATCH", size)
        patch.setattr(verifier(), "BATCH", size)
        claim = HomologyClaim(space, degrees=None if degrees is None else tuple(degrees))
        certificate = certificate_of(claim)
        return certificate.count(b"\n") - 2, accepted_homology(certificate, space, degrees)


@given(products_with_degrees(), st.integers(0, 60), st.booleans())
def test_the_homology_does_not_depend_on_how_many_faces_are_merged(
    drawn: tuple[PolyhedralProduct, list[int]], size: int, whole: bool
) -> None:
    space, some = drawn
    degrees = None if whole else some
    assert _with_batch(space, size, degrees)[1] == certified_homology(space, degrees)


def test_a_smaller_batch_merges_less() -> None:
    """Otherwise the law above would say nothing. Without merging there is one record for each set that is no cone."""
    space = disc_product(build("polygon", n=6), 1)
    fine, coarse = _with_batch(space, 0, None), _with_batch(space, blocks.BATCH, None)
    assert fine[1] == coarse[1]
    assert fine[0] > coarse[0]
