from __future__ import annotations

from itertools import chain
from typing import Any

import pytest
import sympy
from hypothesis import given
from hypothesis import strategies as st
from sympy.abc import a, b, c, x

from certify.errors import BadInput
from certify.simplicial import SimplicialComplex, build, from_missing_faces, from_monomials, join
from tests.strategies import complexes
from tests.unit.simplicial.oracles import face_sets, renumbered

from_facets = SimplicialComplex.from_facets


# -- missing faces ----------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("missing", "vertices", "text"),
    [
        ([], None, "0 vertices, facets ∅"),
        ([], [1, 2], "2 vertices, facets 12"),
        ([[1]], None, "1 vertex, facets ∅, ghosts 1"),
        ([[3, 1]], None, "2 vertices, facets 1 3"),
        ([[1, 2], [1, 2, 3], [2, 1], [4]], [4, 3, 2, 1], "4 vertices, facets 32 31, ghosts 4"),
        ([["b", "a", "c"]], None, "3 vertices, facets ab ac bc"),
    ],
)
def test_complexes_by_missing_faces(missing: Any, vertices: Any, text: str) -> None:
    assert str(from_missing_faces(missing, vertices)) == text


@given(complexes())
def test_missing_faces_determine_the_complex(k: SimplicialComplex) -> None:
    missing = [[k.labels[vertex] for vertex in face] for face in k.missing_faces()]
    assert from_missing_faces(reversed(missing), k.labels) == k


@given(st.lists(st.sets(st.integers(1, 6), min_size=1), max_size=6))
def test_faces_are_the_sets_that_contain_no_missing_one(missing: list[set[int]]) -> None:
    subsets = [{v for v in range(1, 7) if mask >> v & 1} for mask in range(0, 128, 2)]
    expected = {frozenset(s) for s in subsets if not any(m <= s for m in missing)}
    assert face_sets(from_missing_faces(missing, range(1, 7))) == expected


@pytest.mark.parametrize(
    "k", [build("polygon", n=16), build("cross-polytope", n=9), build("cyclic-polytope", m=14, d=4)]
)
def test_more_missing_faces_than_one_writes_by_hand(k: SimplicialComplex) -> None:
    missing = [[k.labels[vertex] for vertex in face] for face in k.missing_faces()]
    assert from_missing_faces(missing) == k


@pytest.mark.parametrize(
    ("missing", "vertices", "message"),
    [
        ([[1], []], None, "missing face 2: expected at least one vertex, found none"),
        ([[1, 1]], None, "missing face 1: expected each vertex once, found vertex 1 twice"),
        (["12"], None, "missing face 1: expected a list, found '12'"),
        ("12", None, "missing faces: expected a list, found '12'"),
        ([[1, 2], [1, 3]], [1, 2], "missing face 2: expected vertices of the complex, found vertex 3, which is none"),
        ([], [1, 1], "vertices: expected each vertex once, found vertex 1 twice"),
    ],
)
def test_faults_in_missing_faces_are_named(missing: Any, vertices: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        from_missing_faces(missing, vertices)
    assert str(caught.value) == message


# -- monomials --------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("monomials", "variables", "text"),
    [
        ([], None, "0 vertices, facets ∅"),
        ([], [x], "1 vertex, facets x"),
        ([x], None, "1 vertex, facets ∅, ghosts x"),
        ([a * b * c], None, "3 vertices, facets ab ac bc"),
        ([b * a, "b * c"], ["c", b, "a"], "3 vertices, facets ca b"),
        (("a*b", a * b * c), [c, b, a], "3 vertices, facets cb ca"),
    ],
)
def test_complexes_by_monomials(monomials: Any, variables: Any, text: str) -> None:
    assert str(from_monomials(monomials, variables)) == text


def test_variables_with_numbers_come_in_the_order_of_the_numbers() -> None:
    names = ["x1", "x2", "x9", "x10", "y", "y1_2", "y1_10"]
    assert from_monomials(["y1_10*x10*y", "x9*x2*y1_2*x1"]).labels == tuple(names)
    assert from_monomials(sympy.symbols("x10 x9")).labels == ("x9", "x10")


def test_a_name_with_more_digits_than_python_reads_as_a_number() -> None:
    long = "x" + "1" * 5000
    assert from_monomials([f"{long}*x2"]).labels == ("x2", long)


@given(complexes())
def test_the_generators_of_the_ideal_determine_the_complex(k: SimplicialComplex) -> None:
    variables = sympy.symbols(f"x1:{k.vertex_count + 1}")
    products = [sympy.Mul(*(variables[vertex] for vertex in face)) for face in k.missing_faces()]
    found = from_monomials(products, variables)
    assert renumbered(found) == renumbered(k)
    assert found.labels == tuple(map(str, variables))
    assert from_monomials(map(str, products), variables) == found


@given(complexes(4), complexes(4))
def test_ideals_in_different_variables_add_up_to_the_join(k: SimplicialComplex, other: SimplicialComplex) -> None:
    left = ["*".join(f"x{v}" for v in face) for face in k.missing_faces()]
    right = ["*".join(f"y{v}" for v in face) for face in other.missing_faces()]
    variables = chain((f"x{v}" for v in range(k.vertex_count)), (f"y{v}" for v in range(other.vertex_count)))
    assert renumbered(from_monomials(left + right, variables)) == renumbered(join(k, other))


@pytest.mark.parametrize(
    "monomial",
    [
        "", "x1*", "x1**2", "x1*x1", "x1^2", "2*x1", "x1 x2", "x1+x2", "1", "__import__('os')",
        x**2, 2 * x, x + a, sympy.Integer(1), sympy.Integer(0), sympy.sqrt(x) * a, sympy.Function("f")(x) * a,
        7, None, ["x1"],
    ],
)  # fmt: skip
def test_what_is_no_square_free_monomial(monomial: Any) -> None:
    with pytest.raises(BadInput) as caught:
        from_monomials([a * b, monomial])
    assert str(caught.value) == (
        f"monomial 2: expected a product of different variables like x1*x2, found {monomial!r}"
    )


@pytest.mark.parametrize(
    ("monomials", "variables", "message"),
    [
        ("x1*x2", None, "monomials: expected a list, found 'x1*x2'"),
        (["x1*x2"], ["x1"], "monomial 1: expected vertices of the complex, found vertex 'x2', which is none"),
        (["x1*x2"], "x1", "variables: expected a list, found 'x1'"),
        (["x1*x2"], ["x1", "x1"], "variables: expected each vertex once, found vertex 'x1' twice"),
        (["x1*x2"], ["x1", "x 2"], "variables: expected names of variables like x1, found 'x 2'"),
        (["x1*x2"], ["x1", x**2], "variables: expected names of variables like x1, found x**2"),
        (["x1*x2"], [1], "variables: expected names of variables like x1, found 1"),
    ],
)
def test_faults_in_lists_of_monomials_are_named(monomials: Any, variables: Any, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        from_monomials(monomials, variables)
    assert str(caught.value) == message
