"""Products of other pairs than discs, real toric spaces and resolutions against published values.

Entries of the table of check values stand there with their sources; other sources stand beside the checks.
"""

from __future__ import annotations

from math import comb
from typing import Any

import networkx as nx
import pytest
import sympy

from certify import hilbert_series
from certify.claims import RealToricClaim, TorClaim
from certify.exact import AbelianGroup
from certify.products.real_toric import RealToricSpace
from certify.products.small_covers import (
    coloured_small_cover,
    real_bott_manifold,
    real_nested_set_variety,
    real_permutohedral_variety,
    real_projective_space,
)
from certify.simplicial import SimplicialComplex, build
from certify.simplicial.families import points, polygon, simplex, simplex_boundary
from certify.simplicial.subdivisions import barycentric_subdivision
from tests.helpers import Homology, certified_groups, certified_homology, graded, kunneth, product_of
from tests.outside.values import entry, wedge_of_spheres


def real_toric(space: RealToricSpace) -> Homology:
    """Return the certified homology of a real toric space."""
    claim = RealToricClaim(space.complex, space.rows)
    groups = certified_groups(claim, degrees=None, rows=list(space.rows))
    return {degree: group for (degree,), group in groups.items()}


def tor(k: SimplicialComplex) -> dict[tuple[int, ...], AbelianGroup]:
    """Return the certified Tor of the face ring by (i, j)."""
    return certified_groups(TorClaim(k))


# -- pairs --------------------------------------------------------------------------------------


def test_circles_with_a_point_over_the_projective_plane_have_no_torsion() -> None:
    """Entry A07: one cell for each face, and no boundaries."""
    found = certified_homology(product_of(build("projective-plane"), "(S1, *)"))
    assert found == graded(dict(enumerate(entry("A07").value)))


@pytest.mark.parametrize("n", [1, 2, 3])
@pytest.mark.parametrize("name", ["torus", "klein-bottle", "complex-projective-plane"])
def test_spheres_with_a_point_have_a_cell_for_each_face(name: str, n: int) -> None:
    """The same for larger spheres (as entry A07): ℤ to the number of faces with i vertices in degree n i."""
    k = build(name)
    assert certified_homology(product_of(k, f"(S{n}, *)")) == graded({n * i: f for i, f in enumerate(k.f_vector())})


@pytest.mark.parametrize(
    "k", [polygon(4), polygon(5), simplex_boundary(3), points(3), build("projective-plane")], ids=str
)
def test_complex_projective_spaces_with_a_point_approach_the_face_ring(k: SimplicialComplex) -> None:
    """H_*(CP^∞, *)^K has the Hilbert series of the face ring; (CP³, *)^K agrees with it up to degree 7.

    M. W. Davis, T. Januszkiewicz, 1991, theorem 4.8; Buchstaber, Panov, Toric Topology, section 4.3 (from memory).
    """
    t = sympy.Symbol("t")
    expected = sympy.Poly(sympy.series(hilbert_series(k), t, 0, 8).removeO(), t)
    found = certified_homology(product_of(k, "(CP3, *)"), range(8))
    assert found == graded({degree: int(c) for (degree,), c in expected.terms() if c})


@pytest.mark.parametrize("n", [2, 3, 4])
def test_real_projective_spaces_with_a_point_over_a_simplex(n: int) -> None:
    """ℝPⁿ × ℝPⁿ and ℝPⁿ ∨ ℝPⁿ: Künneth over ℤ; Hatcher, Algebraic Topology, example 2.42 (from memory)."""
    groups: dict[int, str | int] = {0: "Z", **dict.fromkeys(range(1, n, 2), "Z/2")}
    if n % 2:
        groups[n] = "Z"
    one = graded(groups)
    assert certified_homology(product_of(simplex(1), f"(RP{n}, *)")) == one
    assert certified_homology(product_of(simplex(2), f"(RP{n}, *)")) == kunneth(one, one)
    wedge = {k: AbelianGroup.of(2 * g.rank, g.torsion * 2) for k, g in one.items() if k} | {0: AbelianGroup(1)}
    assert certified_homology(product_of(points(2), f"(RP{n}, *)")) == wedge


@pytest.mark.parametrize("m", [2, 3, 4, 5])
def test_cones_on_three_points_over_points(m: int) -> None:
    """Entry A09."""
    found = certified_homology(product_of(points(m), "(cone 3, 3)"))
    assert found == graded({0: 1, 1: entry("A09").value[str(m)]})


@pytest.mark.parametrize("n", [4, 5, 6])
def test_cones_on_three_points_over_polygons(n: int) -> None:
    """Entry A10, and for n = 5 the Euler characteristic of entry A08."""
    first, second = entry("A10").value[str(n)]
    assert certified_homology(product_of(polygon(n), "(cone 3, 3)")) == graded({0: 1, 1: first, 2: second})
    if n == 5:
        assert 1 - first + second == entry("A08").value


@pytest.mark.parametrize(("q", "m"), [(2, 3), (3, 3), (4, 2), (3, 4)])
def test_cones_over_the_boundary_of_a_simplex_are_joins_of_points(q: int, m: int) -> None:
    """(cone q, q) over ∂Δ^{m-1} is the join of m sets of q points: a wedge of (q-1)^m spheres S^{m-1}.

    J. Milnor, Construction of universal bundles II, 1956, lemma 2.3 (from memory).
    """
    found = certified_homology(product_of(simplex_boundary(m), f"(cone {q}, {q})"))
    assert found == wedge_of_spheres(*[m - 1] * (q - 1) ** m)


@pytest.mark.parametrize(("pair", "torsion"), [("(P3(2), *)", 2), ("(P3(6), *)", 6)])
def test_moore_spaces_with_a_point_over_points_are_wedges(pair: str, torsion: int) -> None:
    """A wedge of three Moore spaces P³(q), each with H_2 = ℤ/q."""
    found = certified_homology(product_of(points(3), pair))
    assert found == {0: AbelianGroup(1), 2: AbelianGroup.of(0, [torsion] * 3)}


# -- small covers and real toric spaces ---------------------------------------------------------


@pytest.mark.parametrize("n", [1, 2, 3, 4])
def test_real_permutohedral_varieties_and_secant_numbers(n: int) -> None:
    """Entry D03."""
    found = real_toric(real_permutohedral_variety(n))
    ranks = [found[degree].rank if degree in found else 0 for degree in range(len(entry("D03").value[str(n)]))]
    assert (
        ranks
        == entry("D03").value[str(n)]
        == [comb(n + 1, 2 * i) * e for i, e in enumerate((1, 1, 5, 61)[: len(ranks)])]
    )
    assert sum(group.rank for group in found.values()) == sum(ranks)


@pytest.mark.parametrize("n", [2, 3, 4])
def test_the_torsion_of_real_permutohedral_varieties(n: int) -> None:
    """Entry D04."""
    assert real_toric(real_permutohedral_variety(n)) == graded(entry("D04").value[str(n)])


GRAPHS: dict[str, Any] = {
    "path": nx.path_graph,
    "cycle": nx.cycle_graph,
    "star": lambda nodes: nx.star_graph(nodes - 1),
}


@pytest.mark.parametrize(("name", "nodes"), [(name, nodes) for name in GRAPHS for nodes in ("4", "5")])
def test_real_toric_varieties_of_graph_associahedra(name: str, nodes: str) -> None:
    """Entry D05."""
    expected = entry("D05").value[name][nodes]
    graph = GRAPHS[name](int(nodes))
    found = real_toric(real_nested_set_variety(nx.relabel_nodes(graph, {v: v + 1 for v in graph})))
    assert {degree: group.rank for degree, group in found.items() if group.rank} == dict(enumerate(expected))


def test_real_bott_manifolds_of_dimension_three() -> None:
    """Entry D10: these four homologies occur, and no others."""
    found = set()
    for number in range(8):
        a, b, c = (number >> i & 1 for i in range(3))
        groups = real_toric(real_bott_manifold([f"0{a}{b}", f"00{c}", "000"]))
        found.add(tuple(str(groups.get(degree, AbelianGroup())) for degree in range(4)))
    expected = set()
    for text in entry("D10").value:
        parts = text.removeprefix("H=").strip("()").replace("(Z/2)^2", "Z/2 + Z/2").split(",")
        fixed = [part.replace("+(Z/2", "+ (Z/2") for part in parts]
        expected.add(tuple(str(AbelianGroup.parse(part.replace("Z+Z", "Z + Z"))) for part in fixed))
    assert found == expected


@pytest.mark.parametrize("n", range(3, 9))
def test_small_covers_over_polygons(n: int) -> None:
    """Entry D01."""
    values = entry("D01").value[str(n)]
    rows = ["".join(str(int(v % 2 == 0)) for v in range(n)), "".join(str(v % 2) for v in range(n))]
    if n % 2:
        rows = [row[:-1] + "1" for row in rows]
        assert real_toric(RealToricSpace(polygon(n), tuple(rows))) == graded({0: 1, 1: values["nonorientable H_1"]})
    else:
        assert real_toric(coloured_small_cover(polygon(n))) == graded({0: 1, 1: values["orientable"], 2: 1})


SMALL_COVERS = {
    "RP3": real_projective_space(3),
    "RP4": real_projective_space(4),
    "Bott": real_bott_manifold(["0110", "0011", "0001", "0000"]),
    "hexagon": coloured_small_cover(polygon(6)),
    "subdivided tetrahedron": coloured_small_cover(barycentric_subdivision(simplex_boundary(4))),
    "Pe3": real_permutohedral_variety(3),
    "star": real_nested_set_variety(nx.star_graph(range(1, 5))),
}


@pytest.mark.parametrize("name", SMALL_COVERS)
def test_the_mod_2_betti_numbers_of_small_covers_are_the_h_vector(name: str) -> None:
    """Entry D02: M. W. Davis, T. Januszkiewicz, 1991, theorem 3.1; mod 2 by universal coefficients."""
    space = SMALL_COVERS[name]
    groups = real_toric(space)

    def even(degree: int) -> int:
        return sum(order % 2 == 0 for order in groups.get(degree, AbelianGroup()).torsion)

    top = space.complex.dimension + 1
    betti = [groups.get(i, AbelianGroup()).rank + even(i) + even(i - 1) for i in range(top + 1)]
    assert tuple(betti) == space.complex.h_vector()
    if name == "Pe3":
        assert betti == entry("D02").value["Pe^3"]


def test_real_projective_spaces() -> None:
    """Hatcher, Algebraic Topology, example 2.42 (from memory)."""
    assert real_toric(real_projective_space(2)) == graded({0: "Z", 1: "Z/2"})
    assert real_toric(real_projective_space(5)) == graded({0: "Z", 1: "Z/2", 3: "Z/2", 5: "Z"})


# -- resolutions of face rings ------------------------------------------------------------------


@pytest.mark.parametrize("m", range(4, 10))
def test_tor_of_polygons(m: int) -> None:
    """Entry T01."""
    expected = {(0, 0): 1, (m - 2, m): 1} | {(i, i + 1): b for i, b in enumerate(entry("T01").value[str(m)], start=1)}
    assert {key: group.rank for key, group in tor(polygon(m)).items()} == expected


@pytest.mark.parametrize(("m", "d"), [(7, 4), (8, 4), (9, 4), (9, 6), (10, 4)])
def test_tor_of_cyclic_polytopes_is_pure(m: int, d: int) -> None:
    """Entry T02, with the closed formula: all of the middle lies on one line."""
    k = d // 2
    expected = {(0, 0): 1, (m - d, m): 1}
    for i in range(1, m - d):
        left = comb(m - k - 1, k + i) * comb(k + i - 1, k)
        expected[i, i + k] = left + comb(m - k - 1, i - 1) * comb(m - k - i - 1, k)
    assert {key: group.rank for key, group in tor(build("cyclic-polytope", m=m, d=d)).items()} == expected
    if f"C({m},{d})" in entry("T02").value:
        assert [expected[i, i + k] for i in range(1, m - d)] == entry("T02").value[f"C({m},{d})"]


@pytest.mark.parametrize(("m", "k"), [(6, 1), (6, 2), (7, 0), (7, 2), (5, 3)])
def test_tor_of_skeleta_is_linear(m: int, k: int) -> None:
    """Entry T04, with the closed formula."""
    expected = {(i, i + k + 1): comb(m, i + k + 1) * comb(i + k, k + 1) for i in range(1, m - k)} | {(0, 0): 1}
    found = tor(build("simplex-skeleton", m=m, dim=k))
    assert {key: group.rank for key, group in found.items()} == expected
    assert not any(group.torsion for group in found.values())


@pytest.mark.parametrize(("m", "d"), [(6, 3), (7, 3), (8, 3), (8, 4)])
def test_tor_of_stacked_spheres(m: int, d: int) -> None:
    """Two linear strands: β_{i,i+1} = i C(m-d, i+1), and their duals.

    N. Terai, T. Hibi, Computation of Betti numbers of monomial ideals associated with stacked polytopes, 1997 (from
    memory); the same numbers as in entry B02.
    """
    n = m - d
    expected = {(0, 0): 1, (n, m): 1}
    for i in range(1, n):
        for key, rank in (((i, i + 1), i * comb(n, i + 1)), ((i, i + d - 1), (n - i) * comb(n, n - i + 1))):
            if rank:
                expected[key] = expected.get(key, 0) + rank
    assert {key: group.rank for key, group in tor(build("stacked-polytope", m=m, d=d)).items()} == expected


@pytest.mark.parametrize(
    "k", [polygon(6), points(4), build("projective-plane"), build("torus"), simplex(3), build("klein-bottle")], ids=str
)
def test_tor_has_the_euler_characteristic_of_the_hilbert_series(k: SimplicialComplex) -> None:
    """Σ (-1)^i β_{i,2j} t^{2j} is the Hilbert series times (1 - t²)^m.

    W. Bruns, J. Herzog, Cohen–Macaulay Rings, lemma 4.1.13 (from memory).
    """
    t = sympy.Symbol("t")
    found = sum((-1) ** i * group.rank * t ** (2 * j) for (i, j), group in tor(k).items())
    assert sympy.expand(found) == sympy.expand(sympy.cancel(hilbert_series(k) * (1 - t**2) ** k.vertex_count))
