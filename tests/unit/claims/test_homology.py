from __future__ import annotations

import json
from collections.abc import Mapping

import pytest

from certify.claims import HomologyClaim
from certify.claims.base import Contribution, Task, solve
from certify.claims.homology import Route
from certify.errors import BadInput, ClaimIsFalse
from certify.exact import AbelianGroup
from certify.products import Block, cell_complex
from certify.simplicial import SimplicialComplex, build
from tests.helpers import Homology, certified_homology, disc_product, graded

CIRCLE = disc_product(build("points", m=2), 1)
EMPTY = disc_product(SimplicialComplex.from_facets([[]]), 1)
GHOSTS = SimplicialComplex.from_facets([[]], vertices=[1, 2, 3])

Z = AbelianGroup(1)
both_routes = pytest.mark.parametrize("route", ["blocks", "cells"])


# -- the claim ----------------------------------------------------------------------------------


def test_degrees_are_put_in_order_and_kept_once() -> None:
    assert HomologyClaim(CIRCLE, degrees=(3, 0, 3)).degrees == (0, 3)
    assert HomologyClaim(CIRCLE, degrees=(3, 0, 3)) == HomologyClaim(CIRCLE, degrees=(0, 3))
    assert HomologyClaim(CIRCLE).degrees is None


@pytest.mark.parametrize("degrees", [(), (-1,), (0, -2)])
def test_a_claim_about_no_degree_or_a_negative_one_is_refused(degrees: tuple[int, ...]) -> None:
    with pytest.raises(BadInput) as caught:
        HomologyClaim(CIRCLE, degrees=degrees)
    assert caught.value.where == "degrees"
    assert caught.value.found == str(list(degrees))


@pytest.mark.parametrize(("degrees", "groups"), [(None, {-1: Z}), ((0, 1), {2: Z}), ((0,), {0: Z, 1: AbelianGroup()})])
def test_groups_outside_the_degrees_are_refused(degrees: tuple[int, ...] | None, groups: Homology) -> None:
    with pytest.raises(BadInput) as caught:
        HomologyClaim(CIRCLE, degrees=degrees, groups=groups)
    assert caught.value.where == "groups"


@pytest.mark.parametrize(("degrees", "top"), [(None, None), ((0,), 1), ((2, 7, 5), 8)])
def test_cells_matter_up_to_one_degree_above(degrees: tuple[int, ...] | None, top: int | None) -> None:
    assert HomologyClaim(CIRCLE, degrees=degrees).top == top


@pytest.mark.parametrize(
    ("groups", "false"),
    [
        (None, None),
        ({0: Z, 1: Z}, None),
        ({0: Z, 1: Z, 2: AbelianGroup()}, None),
        ({0: Z}, (1, "0", "ℤ")),
        ({}, (0, "0", "ℤ")),
        ({0: Z, 1: AbelianGroup(2, (2,))}, (1, "ℤ² ⊕ ℤ/2", "ℤ")),
        ({0: Z, 1: Z, 5: Z}, (5, "ℤ", "0")),
    ],
)
def test_a_false_claim_is_refused_in_its_first_false_degree(
    groups: Homology | None, false: tuple[int, str, str] | None
) -> None:
    claim = HomologyClaim(CIRCLE, groups=groups)
    found = {0: Z, 1: Z}
    if false is None:
        claim.check(found)
        return
    degree, claimed, real = false
    with pytest.raises(ClaimIsFalse) as caught:
        claim.check(found)
    assert (caught.value.what, caught.value.claimed, caught.value.found) == (
        f"H_{degree}((D¹,S⁰)^K; ℤ)",
        claimed,
        real,
    )


def _total(contributions: list[Contribution], degrees: tuple[int, ...] | None = None) -> Mapping[int, AbelianGroup]:
    return HomologyClaim(CIRCLE, degrees=degrees).total(iter(contributions))


def _found(groups: tuple[AbelianGroup, ...], shifts: dict[int, int]) -> Contribution:
    return Contribution(groups, Block("", (), (0,), shifts))


def test_contributions_are_shifted_and_multiplied() -> None:
    one = _found((AbelianGroup(), AbelianGroup(2, (2,))), {0: 1, 3: 2})
    other = _found((AbelianGroup(0, (3,)),), {1: 1})
    assert _total([]) == {}
    assert _total([one]) == graded({1: "Z^2 + Z/2", 4: "Z^4 + (Z/2)^2"})
    assert _total([one, other]) == graded({1: "Z^2 + Z/6", 4: "Z^4 + (Z/2)^2"})
    assert _total([one, other], degrees=(0, 4, 9)) == graded({4: "Z^4 + (Z/2)^2"})


def test_the_statement_is_complete() -> None:
    k = SimplicialComplex.from_facets([["red", "green"], ["blue"]], vertices=["red", "ghost", "green", "blue"])
    claim = HomologyClaim(disc_product(k, [1, 2, 3, 4]), degrees=(3, 1))
    found = {1: AbelianGroup(2**60, (2, 2**61)), 3: AbelianGroup(1)}
    assert claim.statement(found) == {
        "degrees": [1, 3],
        "facets": [[1, 3], [4]],
        "groups": [[1, str(2**60), [2, str(2**61)]], [3, 1, []]],
        "kind": "homology",
        "pairs": ["(D1, S0)", "(D2, S1)", "(D3, S2)", "(D4, S3)"],
        "vertices": 4,
    }
    assert HomologyClaim(EMPTY).statement({0: Z}) == {
        "degrees": None,
        "facets": [[]],
        "groups": [[0, 1, []]],
        "kind": "homology",
        "pairs": [],
        "vertices": 0,
    }


# -- the work -----------------------------------------------------------------------------------


def test_the_cell_route_is_one_task() -> None:
    claim = HomologyClaim(CIRCLE, degrees=(1,), route="cells")
    (task,) = claim.tasks()
    assert task.weight == claim.weight == 1
    assert task.source.chains() == cell_complex(CIRCLE, 2)


@pytest.mark.parametrize("m", [0, 1, 5])
def test_the_tasks_of_the_block_route_settle_every_set_of_vertices(m: int) -> None:
    claim = HomologyClaim(disc_product(build("points", m=m), 2))
    assert sum(task.weight for task in claim.tasks()) == claim.weight == 2**m


def test_the_record_of_a_block() -> None:
    """Two points: ∅ is d of the first point, and the difference of the points is a cycle."""
    line, groups, _ = solve(Task(Block("0110", (1, 1), (0, 1, 2), {1: 3})))
    assert line is not None
    assert json.loads(line) == {"basis": [{}, {"cycles": [[0, -1, 1, 1]], "matched": [0]}], "block": "0110"}
    assert groups == (AbelianGroup(), AbelianGroup(1))


@pytest.mark.parametrize(
    ("block", "top"),
    [
        (Block("1", (1,), (0, 1), {0: 1}), None),
        (Block("11", (1, 1), (0, 1, 2, 3), {5: 1}), None),
        (Block("11", (2, 1), (0, 1, 2, 3), {0: 1}), None),
        # Up to degree 0 of the block only ∅ and the points matter: two points are as good as a cone there.
        (Block("11", (1, 1), (0, 1, 2), {2: 1}), 3),
    ],
)
def test_a_cone_has_no_record(block: Block, top: int | None) -> None:
    assert solve(Task(block.truncated(top))) == (None, (), ())


def test_a_vertex_with_another_tag_is_no_apex() -> None:
    """d e = 2 t makes ℤ/2, and no acyclic complex."""
    line, groups, _ = solve(Task(Block("1", (2,), (0, 1), {0: 1})))
    assert line is not None
    assert groups == (AbelianGroup(0, (2,)), AbelianGroup())


def test_the_record_of_a_whole_product() -> None:
    """(D¹, S⁰) over two points is a circle of four edges."""
    (task,) = HomologyClaim(CIRCLE, route="cells").tasks()
    line, groups, _ = solve(task)
    assert line is not None
    record = json.loads(line)
    assert list(record) == ["basis"]
    assert len(record["basis"][1]["cycles"]) == 1
    assert groups == (Z, Z)


# -- small spaces, by hand, through the whole of it ---------------------------------------------


@both_routes
@pytest.mark.parametrize(
    ("k", "n", "expected"),
    [
        # No vertex: the product is a point. Only ghosts: it is a product of spheres.
        (SimplicialComplex.from_facets([[]]), 1, {0: "Z"}),
        (GHOSTS, 1, {0: "Z^8"}),
        (GHOSTS, 2, {0: "Z", 1: "Z^3", 2: "Z^3", 3: "Z"}),
        (GHOSTS, [1, 2, 4], {0: "Z^2", 1: "Z^2", 3: "Z^2", 4: "Z^2"}),
        # A simplex: a product of discs.
        (build("simplex", m=1), 1, {0: "Z"}),
        (build("simplex", m=3), [1, 2, 3], {0: "Z"}),
        # A point and a ghost: D¹ × S⁰ and D² × S¹.
        (SimplicialComplex.from_facets([[1]], vertices=[1, 2]), 1, {0: "Z^2"}),
        (SimplicialComplex.from_facets([[1]], vertices=[1, 2]), 2, {0: "Z", 1: "Z"}),
        # Two points: the join of the two spheres.
        (build("points", m=2), [1, 4], {0: "Z", 4: "Z"}),
        # An edge and a point: three of the full subcomplexes have two components.
        (SimplicialComplex.from_facets([[1, 2], [3]]), 1, {0: "Z", 1: "Z^3"}),
    ],
)
def test_small_products(route: Route, k: SimplicialComplex, n: int | list[int], expected: dict[int, str]) -> None:
    assert certified_homology(disc_product(k, n), route=route) == graded(expected)
