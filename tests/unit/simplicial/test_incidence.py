from __future__ import annotations

from itertools import combinations, product
from typing import Any

import networkx as nx
import pytest
from hypothesis import assume, given

from certify.errors import BadInput
from certify.simplicial import SimplicialComplex, build, clique_complex, from_incidence, stellar_subdivision
from tests.strategies import spheres
from tests.unit.simplicial.oracles import are_isomorphic

Matrix = list[list[int]]


def incidence(k: SimplicialComplex) -> Matrix:
    """Return the incidence of the simplicial polytope with the given boundary."""
    return [[int(vertex in facet) for facet in k.facets] for vertex in range(k.vertex_count)]


def transposed(matrix: Matrix) -> Matrix:
    return [list(column) for column in zip(*matrix, strict=True)]


def cube(d: int) -> Matrix:
    """Return the incidence of the cube: facet i has coordinate i zero, facet d + i has it one."""
    return [[*(1 - x for x in vertex), *vertex] for vertex in product((0, 1), repeat=d)]


@pytest.mark.parametrize("d", [1, 2, 3, 4])
def test_the_dual_of_a_cube_is_a_cross_polytope(d: int) -> None:
    """For d > 2 the cube is simple only, so facets i and d + i become opposite vertices."""
    if d > 2:
        assert from_incidence(cube(d)) == from_incidence(transposed(cube(d))) == build("cross-polytope", n=d)
    assert are_isomorphic(from_incidence(cube(d)), build("cross-polytope", n=d))


@pytest.mark.parametrize("m", [2, 3, 4, 5])
def test_a_simplex_is_simple_and_simplicial(m: int) -> None:
    matrix = [[int(i != j) for j in range(m)] for i in range(m)]
    assert from_incidence(matrix) == build("simplex-boundary", m=m)


@pytest.mark.parametrize("n", [3, 5, 8])
def test_a_polygon_is_simple_and_simplicial(n: int) -> None:
    """Side j joins vertices j and j + 1; sides j and j + 1 meet in vertex j + 1. Both give a polygon."""
    matrix = [[int(i in (j, (j + 1) % n)) for j in range(n)] for i in range(n)]
    assert from_incidence(matrix) == from_incidence(transposed(matrix)) == build("polygon", n=n)


def test_both_ways_to_read_a_polygon_agree_up_to_isomorphism() -> None:
    matrix = ["1001", "0011", "1100", "0110"]
    turned = ["".join(row[i] for row in matrix) for i in range(4)]
    assert str(from_incidence(matrix)) == "4 vertices, facets 12 13 24 34"
    assert str(from_incidence(turned)) == "4 vertices, facets 12 14 23 34"
    assert are_isomorphic(from_incidence(matrix), from_incidence(turned))


def test_a_cube_with_a_vertex_cut_off() -> None:
    """The vertex 000 becomes three, one on each edge, on a new facet; the dual gets a vertex inside a facet."""
    rows = [[*row, 0] for row in cube(3)[1:]]
    rows += [[*(int(i != j) for j in range(3)), 0, 0, 0, 1] for i in range(3)]
    assert from_incidence(rows) == stellar_subdivision(build("cross-polytope", n=3), [1, 2, 3], 7)


def test_the_dual_of_the_dodecahedron_is_the_icosahedron() -> None:
    graph = nx.dodecahedral_graph()
    pentagons = {frozenset(cycle) for cycle in nx.simple_cycles(graph, length_bound=5)}
    assert len(pentagons) == 12
    k = from_incidence([[int(node in pentagon) for pentagon in pentagons] for node in graph])
    assert k.f_vector() == (1, 12, 30, 20)
    assert are_isomorphic(k, clique_complex(nx.icosahedral_graph()))


@given(spheres())
def test_a_polytope_and_its_dual_give_the_same_complex(k: SimplicialComplex) -> None:
    """All spheres that are drawn bound polytopes."""
    assume(k.dimension >= 0 and not k.ghosts())
    matrix = incidence(k)
    assert from_incidence(matrix) == k.relabelled(range(1, k.vertex_count + 1))
    dual = from_incidence(transposed(matrix))
    is_simplex_or_polygon = k.dimension < 2 or k.vertex_count == k.dimension + 2
    assert are_isomorphic(dual, k) if is_simplex_or_polygon else dual == from_incidence(matrix)


def test_rows_may_be_texts_or_lists() -> None:
    rows = ["".join(map(str, row)) for row in cube(3)]
    assert from_incidence(rows) == from_incidence(iter(cube(3)))
    assert from_incidence([[entry == 1 for entry in row] for row in cube(3)]) == from_incidence(rows)


@pytest.mark.parametrize(
    ("rows", "message"),
    [
        (
            # The pyramid over a square: sides 1 to 4 and the base.
            ["11110", "10011", "11001", "01101", "00111"],
            "incidence: expected 3 ones in each row, for a simple polytope of dimension 3, or in each column, "
            "for a simplicial one, found 4 in row 1 and 4 in column 5",
        ),
        ([], "incidence: expected at least one row and one column, found none"),
        (["", ""], "incidence: expected at least one row and one column, found none"),
        ("0110", "incidence: expected a list, found '0110'"),
        (7, "incidence: expected a list, found 7"),
        ([7], "row 1: expected a list, found 7"),
        (["110", "10"], "row 2: expected 3 entries like row 1, found 2"),
        (["10", "02"], "row 2: expected digits 0 and 1, found '2' in column 2"),
        ([[1, 0], [0, -1]], "row 2: expected digits 0 and 1, found -1 in column 2"),
        ([[1, 0], [0, None]], "row 2: expected digits 0 and 1, found None in column 2"),
        (["01", "11"], "row 2: expected a vertex that lies not on every facet, found only ones"),
    ],
)  # fmt: skip
def test_what_is_no_incidence_of_a_simple_or_simplicial_polytope(rows: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        from_incidence(rows)
    assert str(caught.value) == message


@pytest.mark.parametrize(
    ("vertices", "columns"),
    [
        (1, [[]]),
        # The edges of a tetrahedron, where three meet in each vertex; two triangles apart; one triangle twice.
        (4, list(combinations(range(4), 2))),
        (6, [*combinations(range(3), 2), *combinations(range(3, 6), 2)]),
        (3, [*combinations(range(3), 2), *combinations(range(3), 2)]),
        # A triangle with a facet that has no vertex, and with a vertex that lies on no facet.
        (3, [*combinations(range(3), 2), ()]),
        (4, list(combinations(range(3), 2))),
    ],
)
def test_facets_that_do_not_close_up(vertices: int, columns: list[tuple[int, ...]]) -> None:
    rows = [[int(v in column) for column in columns] for v in range(vertices)]
    with pytest.raises(BadInput) as caught:
        from_incidence(rows)
    assert caught.value.where == "incidence"
    assert caught.value.found == "facets that do not close up"
