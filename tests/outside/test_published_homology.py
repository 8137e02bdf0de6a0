"""Published homology of polyhedral products over points, simplices, polygons and other polytopes.

The values stand in check_values.json; the letter and number before each source is that of the entry. Every group that
is compared stands in a certificate that the verifier accepted.
"""

from __future__ import annotations

from collections.abc import Callable, Hashable
from itertools import combinations
from math import comb

import networkx as nx
import pytest

from certify.simplicial import SimplicialComplex, build, join
from tests.helpers import alternating_sum, certified_homology, disc_product, graded
from tests.outside.values import bigraded_ranks, entry, wedge_of_spheres

REAL, COMPLEX = 1, 2
"""The n of (D¹, S⁰) and of (D², S¹)."""


@pytest.mark.parametrize("n", range(4, 13))
def test_polygons_give_surfaces(n: int) -> None:
    """A01: genus 1 + (n - 4) 2^(n-3). H. S. M. Coxeter, Regular skew polyhedra, Proc. London Math. Soc. 43 (1937).

    The formula was seen in Yu. A. Neretin, arXiv 1904.08181.
    """
    genus = entry("A01").value[str(n)]
    assert genus == _genus(n)
    assert certified_homology(disc_product(build("polygon", n=n), REAL)) == graded({0: 1, 1: 2 * genus, 2: 1})


def test_a_polygon_gives_a_surface_whose_genus_is_no_machine_number() -> None:
    """The same formula where a class of blocks has over 2^64 members."""
    groups = certified_homology(disc_product(build("polygon", n=80), REAL))
    assert groups == graded({0: 1, 1: 2 * _genus(80), 2: 1})


def _genus(n: int) -> int:
    return int(1 + (n - 4) * 2 ** (n - 3))


@pytest.mark.parametrize("m", range(2, 8))
def test_points_give_the_edges_of_a_cube(m: int) -> None:
    """A02: H_1 of rank (m - 2) 2^(m-1) + 1. V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, ch. 4 (memory)."""
    rank = entry("A02").value[str(m)]
    assert certified_homology(disc_product(build("points", m=m), REAL)) == graded({0: 1, 1: rank})


@pytest.mark.parametrize("m", range(2, 7))
def test_points_give_wedges_of_spheres(m: int) -> None:
    """A03: (k - 1) C(m, k) spheres of dimension k + 1.

    G. J. Porter, Higher products, Trans. AMS 148 (1970); J. Grbić, S. Theriault, The homotopy type of the complement of
    a coordinate subspace arrangement, Topology 46 (2007) (from memory).
    """
    value = entry("A03").value[str(m)]
    assert value == {str(k + 1): (k - 1) * comb(m, k) for k in range(2, m + 1)}
    assert certified_homology(disc_product(build("points", m=m), COMPLEX)) == graded({"0": 1, **value})


@pytest.mark.parametrize("n", range(1, 8))
def test_two_points_give_a_sphere(n: int) -> None:
    """A04: the join of two spheres S^(n-1) is S^(2n-1). Buchstaber, Panov, Toric Topology (from memory)."""
    assert entry("A04").value == "S^{2n-1}"
    assert certified_homology(disc_product(build("points", m=2), n)) == wedge_of_spheres(2 * n - 1)


@pytest.mark.parametrize("m", range(2, 7))
@pytest.mark.parametrize(("n", "key"), [(REAL, "RZ"), (COMPLEX, "Z")])
def test_the_boundary_of_a_simplex_gives_a_sphere(m: int, n: int, key: str) -> None:
    """A05: S^(m-1) and S^(2m-1). Buchstaber, Panov, Toric Topology, example 4.1 (from memory)."""
    sphere = entry("A05").value[str(m)][key]
    dimension = int(sphere.removeprefix("S^"))
    assert certified_homology(disc_product(build("simplex-boundary", m=m), n)) == wedge_of_spheres(dimension)


@pytest.mark.parametrize(("n", "key"), [(REAL, "RZ"), (COMPLEX, "Z")])
def test_the_octahedron_gives_a_product_of_three_spheres(n: int, key: str) -> None:
    """A06: the join of a square with two points. Buchstaber, Panov, Toric Topology, proposition 4.1.3 (from memory)."""
    expected = graded(entry("A06").value[key])
    assert certified_homology(disc_product(entry("A06").complex, n)) == expected
    square_and_points = join(build("polygon", n=4), build("points", m=2))
    assert certified_homology(disc_product(square_and_points, n)) == expected


@pytest.mark.parametrize("n", range(1, 5))
@pytest.mark.parametrize(
    "k",
    [
        build("polygon", n=5),
        build("projective-plane"),
        build("torus"),
        SimplicialComplex.from_facets([[1, 2], [4]], vertices=range(1, 7)),
    ],
    ids=str,
)
def test_the_euler_characteristic(k: SimplicialComplex, n: int) -> None:
    """A08: Σ_σ (χX - χA)^|σ| χA^(m-|σ|). Elementary; M. W. Davis, The Euler characteristic of a polyhedral product,
    Geometriae Dedicata 159 (2012) (from memory).
    """
    sphere = 2 if n % 2 else 0
    by_faces = sum(f * (1 - sphere) ** size * sphere ** (k.vertex_count - size) for size, f in enumerate(k.f_vector()))
    groups = certified_homology(disc_product(k, n))
    assert alternating_sum((degree, group.rank) for degree, group in groups.items()) == by_faces


@pytest.mark.parametrize("m", range(4, 10))
def test_polygons_give_sums_of_products_of_spheres(m: int) -> None:
    """B01: the connected sum of (k - 2) C(m - 2, k - 1) copies of S^k × S^(m+2-k), k = 3, …, m - 1.

    D. McGavran, Adjacent connected sums and torus actions, Trans. AMS 251 (1979); Buchstaber, Panov, Toric Topology,
    theorem 4.6.12 (from memory); the general formula was seen in K. Iriye, arXiv 1608.02673, theorem 1.1.
    """
    ranks = {0: 1, m + 2: 1} | dict.fromkeys(range(3, m), 0)
    for k in range(3, m):
        ranks[k] += (k - 2) * comb(m - 2, k - 1)
        ranks[m + 2 - k] += (k - 2) * comb(m - 2, k - 1)
    assert graded(ranks) == graded(entry("B01").value[str(m)])
    assert certified_homology(disc_product(build("polygon", n=m), COMPLEX)) == graded(ranks)


def _stacked(d: int, m: int, choice: Callable[[int], int]) -> SimplicialComplex:
    """Return the boundary of a stacked d-polytope: again and again a facet gives way to the cone over its boundary."""
    facets = list(combinations(range(d + 1), d))
    for new in range(d + 1, m):
        old = facets.pop(choice(len(facets)))
        facets += [(*ridge, new) for ridge in combinations(old, d - 1)]
    return SimplicialComplex.from_facets(facets)


@pytest.mark.parametrize("key", list(entry("B02").value))
@pytest.mark.parametrize("choice", [lambda _: 0, lambda count: count - 1, lambda count: count // 2])
def test_stacked_polytopes(key: str, choice: Callable[[int], int]) -> None:
    """B02: only d and m matter, not how it was stacked. K. Iriye, arXiv 1608.02673, theorem 1.1 (seen)."""
    d, m = (int(part.partition("=")[2]) for part in key.split(","))
    space = disc_product(_stacked(d, m, choice), COMPLEX)
    assert certified_homology(space) == graded(entry("B02").value[key])


@pytest.mark.parametrize("name", ["B03", "B04", "M03"])
@pytest.mark.parametrize(("n", "key"), [(REAL, "RZ"), (COMPLEX, "Z")])
def test_octahedra_with_subdivisions(name: str, n: int, key: str) -> None:
    """Duals of cubes and prisms with a vertex or an edge cut.

    B03: a vertex of the cube cut; F. Bosio, L. Meersseman, Real quadrics in Cⁿ, complex manifolds and convex polytopes,
    Acta Math. 197 (2006) (type from memory, values recomputed).
    B04: the suspended pentagon; by the join rule (recomputed).
    M03: two skew edges of the cube cut; Buchstaber, Panov, Toric Topology, section 4.9 (from memory).
    """
    assert certified_homology(disc_product(entry(name).complex, n)) == graded(entry(name).value[key])


@pytest.mark.parametrize("name", ["B03", "C03", "C04", "M03"])
def test_bigraded_ranks(name: str) -> None:
    """The Tor groups of B03, C03, C04 and M03, by M. Hochster's formula of 1977 (recomputed)."""
    ranks = {tuple(map(int, key.split(","))): group for key, group in entry(name).value["tor"].items()}
    expected = {(i, doubled // 2): graded({0: group})[0].rank for (i, doubled), group in ranks.items()}
    assert bigraded_ranks(entry(name).complex) == expected


@pytest.mark.parametrize("key", list(entry("B05").value))
def test_cyclic_polytopes(key: str) -> None:
    """B05: F. Bosio, L. Meersseman, Acta Math. 197 (2006) (type seen, values recomputed)."""
    m, d = map(int, key.removeprefix("C(").removesuffix(")").split(","))
    space = disc_product(build("cyclic-polytope", m=m, d=d), COMPLEX)
    assert certified_homology(space) == graded(entry("B05").value[key])


def _nested_sets(graph: nx.Graph[Hashable]) -> SimplicialComplex:
    """Return the complex of nested sets of proper connected parts of a graph, a sphere."""
    nodes = list(graph)
    tubes = [
        frozenset(tube)
        for size in range(1, len(nodes))
        for tube in combinations(nodes, size)
        if nx.is_connected(graph.subgraph(tube))
    ]
    fits: nx.Graph[Hashable] = nx.Graph()
    fits.add_nodes_from(range(len(tubes)))
    for (i, a), (j, b) in combinations(enumerate(tubes), 2):
        apart = not a & b and not nx.is_connected(graph.subgraph(a | b))
        if a <= b or b <= a or apart:
            fits.add_edge(i, j)
    return SimplicialComplex.from_facets(nx.find_cliques(fits), vertices=range(len(tubes)))


@pytest.mark.parametrize(
    ("key", "graph"),
    [
        ("path (As^3)", nx.path_graph(4)),
        ("cycle (Cy^3)", nx.cycle_graph(4)),
        ("star (St^3)", nx.star_graph(3)),
        ("complete (Pe^3)", nx.complete_graph(4)),
    ],
)
def test_graph_associahedra(key: str, graph: nx.Graph[Hashable]) -> None:
    """B09: Buchstaber, Panov, Toric Topology, for the associahedron (from memory); the others recomputed."""
    space = disc_product(_nested_sets(graph), COMPLEX)
    assert certified_homology(space) == graded({"0": 1, **entry("B09").value[key]})
