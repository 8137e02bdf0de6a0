"""Products of other pairs than discs, and real toric spaces, against published values.

The values stand in check_values.json; the letter and number before each source is that of the entry. Every group that
is compared stands in a certificate that the verifier accepted.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from functools import cache
from itertools import combinations, permutations, product
from math import comb

import networkx as nx
import pytest
import sympy

from certify import hilbert_series
from certify.claims import RealToricClaim
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
from certify.simplicial.families import cross_polytope, points, polygon, simplex, simplex_boundary
from certify.simplicial.subdivisions import barycentric_subdivision
from tests.helpers import Homology, certified_groups, certified_homology, graded, kunneth, product_of
from tests.outside.values import entry, wedge_of_spheres


def real_toric(space: RealToricSpace) -> Homology:
    """Return the certified homology of a real toric space."""
    claim = RealToricClaim(space.complex, space.rows)
    groups = certified_groups(claim, degrees=None, rows=list(space.rows))
    return {degree: group for (degree,), group in groups.items()}


def ranks(groups: Homology) -> dict[int, int]:
    """Return the Betti numbers that are not zero."""
    return {degree: group.rank for degree, group in groups.items() if group.rank}


def mod_2(groups: Homology, top: int) -> list[int]:
    """Return the Betti numbers over ℤ/2 in degrees 0 to `top`: A. Hatcher, Algebraic Topology, corollary 3A.6."""
    even = {degree: sum(order % 2 == 0 for order in group.torsion) for degree, group in groups.items()}
    return [ranks(groups).get(i, 0) + even.get(i, 0) + even.get(i - 1, 0) for i in range(top + 1)]


# -- pairs --------------------------------------------------------------------------------------


def test_circles_with_a_point_over_the_projective_plane_have_no_torsion() -> None:
    """A07: one cell for each face, and no boundaries.

    K. H. Kim, F. W. Roush, Homology of certain algebras defined by graphs, J. Pure Appl. Algebra 17 (1980) (from
    memory).
    """
    found = certified_homology(product_of(build("projective-plane"), "(S1, *)"))
    assert found == graded(dict(enumerate(entry("A07").value)))


@pytest.mark.parametrize("n", [1, 2, 3])
@pytest.mark.parametrize("name", ["torus", "klein-bottle", "complex-projective-plane"])
def test_spheres_with_a_point_have_a_cell_for_each_face(name: str, n: int) -> None:
    """The same for larger spheres: ℤ to the number of faces with i vertices in degree n i.

    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, chapter 8 (from memory).
    """
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


def projective(n: int) -> Homology:
    """Return the homology of real projective n-space: Hatcher, Algebraic Topology, example 2.42 (from memory)."""
    return graded({0: "Z", **dict.fromkeys(range(1, n, 2), "Z/2"), **({n: "Z"} if n % 2 else {})})


@pytest.mark.parametrize("sizes", [(2,), (3,), (4,), (2, 2), (3, 3), (2, 3), (4, 3), (2, 2, 2), (3, 2, 1)])
def test_real_projective_spaces_with_a_point_over_a_simplex(sizes: tuple[int, ...]) -> None:
    """The product of these spaces, by Künneth over ℤ: Hatcher, Algebraic Topology, theorem 3B.6 (from memory)."""
    expected = graded({0: 1})
    for n in sizes:
        expected = kunneth(expected, projective(n))
    assert certified_homology(product_of(simplex(len(sizes)), [f"(RP{n}, *)" for n in sizes])) == expected


@pytest.mark.parametrize("sizes", [(2, 2), (3, 3), (4, 4), (2, 3, 5)])
def test_real_projective_spaces_with_a_point_over_points(sizes: tuple[int, ...]) -> None:
    """The wedge of these spaces: Hatcher, Algebraic Topology, corollary 2.25 (from memory)."""
    wedge = graded({0: 1})
    for n in sizes:
        for degree, group in projective(n).items():
            if degree:
                wedge[degree] = wedge.get(degree, AbelianGroup()) + group
    assert certified_homology(product_of(points(len(sizes)), [f"(RP{n}, *)" for n in sizes])) == wedge


@pytest.mark.parametrize("m", [2, 3, 4, 5])
def test_cones_on_three_points_over_points(m: int) -> None:
    """A09: a graph, whose group is the kernel of the map from the free product of m groups ℤ/3 to their product.

    T. Panov, Ya. Veryovkin, Polyhedral products and commutator subgroups of right-angled Artin and Coxeter groups, 2016
    (from memory).
    """
    found = certified_homology(product_of(points(m), "(cone 3, 3)"))
    assert found == graded({0: 1, 1: entry("A09").value[str(m)]})


@pytest.mark.parametrize(("q", "m"), [(1, 3), (2, 4), (4, 2), (4, 3), (5, 2)])
def test_cones_on_any_number_of_points_over_points(q: int, m: int) -> None:
    """The formula of A09 for q points: a wedge of 1 + (m - 1) q^m - m q^(m-1) circles."""
    circles = 1 + (m - 1) * q**m - m * q ** (m - 1)
    assert certified_homology(product_of(points(m), f"(cone {q}, {q})")) == wedge_of_spheres(*[1] * circles)


@pytest.mark.parametrize("n", [4, 5, 6])
def test_cones_on_three_points_over_polygons(n: int) -> None:
    """A10, and for n = 5 the Euler characteristic of A08.

    By the stable splitting: Buchstaber, Panov, Toric Topology, chapter 8 (recomputed). For n = 4 the space is a product
    of two complete bipartite graphs on 3 and 3 nodes.
    """
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
    """Three Moore spaces P³(q), each with H_2 = ℤ/q: Hatcher, Algebraic Topology, example 2.40 (from memory)."""
    found = certified_homology(product_of(points(3), pair))
    assert found == {0: AbelianGroup(1), 2: AbelianGroup.of(0, [torsion] * 3)}


# -- small covers and real toric spaces ---------------------------------------------------------


@pytest.mark.parametrize("n", [1, 2, 3, 4])
def test_real_permutohedral_varieties_and_secant_numbers(n: int) -> None:
    """D03: b_i = C(n + 1, 2i) E_2i with the secant numbers E_0, E_2, … = 1, 1, 5, 61, ….

    A. Henderson, Rational cohomology of the real Coxeter toric variety of type A, 2012 (from memory).
    """
    betti = entry("D03").value[str(n)]
    assert betti == [comb(n + 1, 2 * i) * secant for i, secant in zip(range(len(betti)), (1, 1, 5, 61), strict=False)]
    assert ranks(real_toric(real_permutohedral_variety(n))) == dict(enumerate(betti))


@pytest.mark.parametrize("n", [2, 3, 4])
def test_the_torsion_of_real_permutohedral_varieties(n: int) -> None:
    """D04: all torsion has order 2. The groups were recomputed.

    E. M. Rains, The homology of real subspace arrangements, J. Topology 3 (2010), for the order (from memory).
    """
    assert real_toric(real_permutohedral_variety(n)) == graded(entry("D04").value[str(n)])


GRAPHS: dict[str, Callable[[range], nx.Graph[int]]] = {
    "path": nx.path_graph,
    "cycle": nx.cycle_graph,
    "star": nx.star_graph,
}


@pytest.mark.parametrize(
    ("name", "nodes"),
    [
        *((name, nodes) for name in GRAPHS for nodes in ("4", "5")),
        ("path", "6"),
        pytest.param("cycle", "6", marks=pytest.mark.slow),
        pytest.param("star", "6", marks=pytest.mark.slow),
    ],
)
def test_real_toric_varieties_of_graph_associahedra(name: str, nodes: str) -> None:
    """D05: ballot numbers for paths, binomials for cycles, tangent numbers for stars.

    S. Choi, H. Park, A new graph invariant arises in toric topology, J. Math. Soc. Japan 67 (2015) (abstract seen).
    """
    graph = GRAPHS[name](range(1, int(nodes) + 1))
    assert ranks(real_toric(real_nested_set_variety(graph))) == dict(enumerate(entry("D05").value[name][nodes]))


# Entry i, j is the value of the coroot i on the simple root j. N. Bourbaki, Groupes et algèbres de Lie, chapter VI,
# planches II to IV (from memory).
CARTAN = {
    "B3": ((2, -1, 0), (-1, 2, -1), (0, -2, 2)),
    "C3": ((2, -1, 0), (-1, 2, -2), (0, -1, 2)),
    "D4": ((2, -1, 0, 0), (-1, 2, -1, -1), (0, -1, 2, 0), (0, -1, 0, 2)),
    "B4": ((2, -1, 0, 0), (-1, 2, -1, 0), (0, -1, 2, -1), (0, 0, -2, 2)),
    "C4": ((2, -1, 0, 0), (-1, 2, -1, 0), (0, -1, 2, -2), (0, 0, -1, 2)),
}


def weyl_chambers(cartan: Sequence[Sequence[int]]) -> RealToricSpace:
    """Return the real toric variety of the fan of Weyl chambers, in the lattice of coweights.

    A coweight is written by its values on the simple roots, in which the rays of the first chamber are unit vectors;
    a simple reflection takes from it a multiple of the coroot. λ of a ray is the ray modulo 2.
    """
    n = len(cartan)
    first = tuple(tuple(int(i == j) for j in range(n)) for i in range(n))
    chambers, waiting = {first}, [first]
    while waiting:
        chamber = waiting.pop()
        for i, coroot in enumerate(cartan):
            image = tuple(tuple(x - ray[i] * c for x, c in zip(ray, coroot, strict=True)) for ray in chamber)
            if image not in chambers:
                chambers.add(image)
                waiting.append(image)
    rays = sorted({ray for chamber in chambers for ray in chamber})
    k = SimplicialComplex.from_facets([[rays.index(ray) for ray in c] for c in chambers], vertices=range(len(rays)))
    return RealToricSpace(k, tuple("".join(str(ray[row] % 2) for ray in rays) for row in range(n)))


@cache
def of_weyl_chambers(name: str) -> Homology:
    """Return the certified homology of the real toric variety of a root system."""
    return real_toric(weyl_chambers(CARTAN[name]))


@pytest.mark.parametrize("name", ["B3", "C3", "D4", "B4", pytest.param("C4", marks=pytest.mark.slow)])
def test_real_toric_varieties_of_weyl_chambers(name: str) -> None:
    """D08: types B and C have the same K and different λ (recomputed; no source has the torsion)."""
    assert of_weyl_chambers(name) == graded({"0": "Z", **entry("D08").value[name]})


@pytest.mark.parametrize("n", [3, 4])
def test_weyl_chambers_of_type_b_and_snakes(n: int) -> None:
    """b_i = C(n, 2i) S_2i + C(n, 2i-1) S_(2i-1) with the numbers of snakes S_0, S_1, … = 1, 1, 3, 11, 57, ….

    S. Choi, B. Park, H. Park, The Betti numbers of real toric varieties associated to Weyl chambers of type B, Chin.
    Ann. Math. 38B (2017); T. A. Springer, Remarks on a combinatorial problem, 1971, for the numbers (from memory).
    """
    snakes = (1, 1, 3, 11, 57)
    expected = {0: 1}
    for i in range(1, n // 2 + n % 2 + 1):
        expected[i] = sum(comb(n, k) * snakes[k] for k in (2 * i - 1, 2 * i) if k <= n)
    assert ranks(of_weyl_chambers(f"B{n}")) == expected


@pytest.mark.parametrize("name", ["B4", "D4"])
def test_the_mod_2_betti_numbers_of_weyl_chambers(name: str) -> None:
    """D02: the h-vector of K, which counts the elements of the Weyl group by descents.

    M. W. Davis, T. Januszkiewicz, 1991, theorem 3.1; F. Brenti, q-Eulerian polynomials arising from Coxeter groups,
    European J. Combin. 15 (1994), for the numbers (from memory).
    """
    assert mod_2(of_weyl_chambers(name), 4) == entry("D02").value[name]


# -- real Bott manifolds ------------------------------------------------------------------------


Digraph = tuple[tuple[int, ...], ...]
"""The matrix of a digraph: 1 in row i, column j for an arc from i to j."""


@cache
def bott(digraph: Digraph) -> tuple[AbelianGroup, ...]:
    """Return the certified homology of the real Bott manifold of an upper triangular matrix, from degree 0 on."""
    groups = real_toric(real_bott_manifold(["".join(map(str, row)) for row in digraph]))
    return tuple(groups.get(degree, AbelianGroup()) for degree in range(len(digraph) + 1))


def upper_triangular(n: int) -> Iterator[Digraph]:
    """Yield all strictly upper triangular matrices of n rows over ℤ/2."""
    places = list(combinations(range(n), 2))
    for digits in product((0, 1), repeat=len(places)):
        arcs = {place for place, digit in zip(places, digits, strict=True) if digit}
        yield tuple(tuple(int((i, j) in arcs) for j in range(n)) for i in range(n))


def relabelled(digraph: Digraph) -> Iterator[Digraph]:
    """Yield the digraph with its nodes in all orders."""
    for order in permutations(range(len(digraph))):
        yield tuple(tuple(digraph[i][j] for j in order) for i in order)


def moved(digraph: Digraph) -> Iterator[Digraph]:
    """Yield all results of a local complementation or a slide."""
    nodes = range(len(digraph))
    for k in nodes:
        yield tuple(tuple(digraph[i][j] ^ digraph[i][k] & digraph[k][j] for j in nodes) for i in nodes)
    for k, m in permutations(nodes, 2):
        if all(row[k] == row[m] for row in digraph):
            yield tuple(tuple(digraph[i][j] ^ (i == m) & digraph[k][j] for j in nodes) for i in nodes)


def classes(digraphs: set[Digraph], steps: Sequence[Callable[[Digraph], Iterator[Digraph]]]) -> list[set[Digraph]]:
    """Return the connected components of these digraphs under these steps."""
    graph: nx.Graph[Digraph] = nx.Graph()
    graph.add_nodes_from(digraphs)
    graph.add_edges_from((digraph, other) for digraph in digraphs for step in steps for other in step(digraph))
    assert set(graph) == digraphs
    return list(nx.connected_components(graph))


def test_real_bott_manifolds_of_dimension_three() -> None:
    """D10: these four homologies occur, and no others.

    Y. Kamishima, M. Masuda, Cohomological rigidity of real Bott manifolds, 2009: they are flat. J. A. Wolf, Spaces of
    Constant Curvature, section 3.5, for the homology (from memory).
    """
    listed = (text.removeprefix("H=")[1:-1].split(",") for text in entry("D10").value)
    assert {bott(matrix) for matrix in upper_triangular(3)} == {tuple(map(AbelianGroup.parse, row)) for row in listed}


@pytest.mark.parametrize("n", [1, 2, 3, 4])
def test_real_bott_manifolds_that_are_diffeomorphic(n: int) -> None:
    """D09: three operations on acyclic digraphs give all diffeomorphisms, so homology is the same within a class.

    S. Choi, M. Masuda, S. Oum, Classification of real Bott manifolds and acyclic digraphs, Trans. AMS 369 (2017)
    (operations seen; numbers from memory); the acyclic digraphs are A003087 of the OEIS. The homologies of D10, note:
    eight for n = 4.
    """
    matrices = set(upper_triangular(n))
    digraphs = {digraph for matrix in matrices for digraph in relabelled(matrix)}
    assert len(classes(digraphs, [relabelled])) == entry("D09").value["digraphs"][n - 1]
    found = classes(digraphs, [relabelled, moved])
    homologies = [{bott(matrix) for matrix in alike & matrices} for alike in found]
    assert all(len(values) == 1 for values in homologies)
    # A closed manifold of dimension n is orientable if and only if its H_n is ℤ.
    orientable = [values for values in homologies if values.pop()[n]]
    assert len(found) == entry("D09").value["classes"][n - 1]
    assert len(orientable) == entry("D09").value["orientable"][n - 1]
    assert len({bott(matrix) for matrix in matrices}) == (1, 2, 4, 8)[n - 1]


# -- small covers -------------------------------------------------------------------------------


@pytest.mark.parametrize("n", range(3, 11))
def test_small_covers_over_polygons_with_three_values(n: int) -> None:
    """D01: e_1 and e_2 in turn, but e_1 + e_2 at the last vertex: a surface that is not orientable.

    M. W. Davis, T. Januszkiewicz, Convex polytopes, Coxeter orbifolds and torus actions, Duke Math. J. 62 (1991)
    (from memory).
    """
    rows = ("10" * n, "01" * n)
    space = RealToricSpace(polygon(n), tuple(row[: n - 1] + "1" for row in rows))
    assert real_toric(space) == graded({0: 1, 1: entry("D01").value[str(n)]["nonorientable H_1"]})


@pytest.mark.parametrize("n", range(4, 11, 2))
def test_small_covers_over_polygons_with_two_values(n: int) -> None:
    """D01: an orientable surface of genus (n - 2) / 2. Davis, Januszkiewicz, 1991 (from memory)."""
    expected = graded({0: 1, 1: entry("D01").value[str(n)]["orientable"], 2: 1})
    assert expected[1] == AbelianGroup.of(n - 2)
    assert real_toric(coloured_small_cover(polygon(n))) == expected


SMALL_COVERS = {
    "RP3": real_projective_space(3),
    "RP4": real_projective_space(4),
    "Bott": real_bott_manifold(["0110", "0011", "0001", "0000"]),
    "hexagon": coloured_small_cover(polygon(6)),
    "subdivided tetrahedron": coloured_small_cover(barycentric_subdivision(simplex_boundary(4))),
    "subdivided octahedron": coloured_small_cover(barycentric_subdivision(cross_polytope(3))),
    "Pe3": real_permutohedral_variety(3),
    "star": real_nested_set_variety(nx.star_graph(range(1, 5))),
    "cycle": real_nested_set_variety(nx.cycle_graph(range(1, 6))),
}


@pytest.mark.parametrize("name", SMALL_COVERS)
def test_the_mod_2_betti_numbers_of_small_covers_are_the_h_vector(name: str) -> None:
    """D02: Davis, Januszkiewicz, 1991, theorem 3.1 (from memory); h is read off from faces that are counted here."""
    space = SMALL_COVERS[name]
    k = space.complex
    t = sympy.Symbol("t")
    n = k.dimension + 1
    faces = {face for facet in k.facets for size in range(n + 1) for face in combinations(facet, size)}
    h = sympy.Poly(sum((t ** len(face) * (1 - t) ** (n - len(face)) for face in faces), sympy.Integer(0)), t)
    betti = mod_2(real_toric(space), n)
    assert betti == [int(c) for c in reversed(h.all_coeffs())]
    if name == "Pe3":
        assert betti == entry("D02").value["Pe^3"]


@pytest.mark.parametrize("n", range(1, 7))
def test_real_projective_spaces(n: int) -> None:
    """The small cover over a simplex: Davis, Januszkiewicz, 1991 (from memory)."""
    assert real_toric(real_projective_space(n)) == projective(n)
