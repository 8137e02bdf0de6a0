"""Tor of face rings, which is their minimal free resolution, against published formulas.

The values stand in check_values.json; the letter and number before each source is that of the entry. Every group that
is compared stands in a certificate that the verifier accepted. Whole groups are compared, so that torsion is noticed.
"""

from __future__ import annotations

from collections.abc import Sequence
from itertools import combinations
from math import comb, prod

import networkx as nx
import pytest
import sympy
from hypothesis import given, settings

from certify.claims import SummandClaim, TorClaim
from certify.exact import AbelianGroup
from certify.simplicial import SimplicialComplex, alexander_dual, build, clique_complex, join
from tests.helpers import Homology, certified_groups, cohomology, graded
from tests.outside.values import entry
from tests.strategies import complexes, complexes_with_torsion

Bigraded = dict[tuple[int, ...], AbelianGroup]
"""The groups Tor_{i,2j} that are not zero, by (i, j)."""


def tor(k: SimplicialComplex) -> Bigraded:
    """Return the certified Tor of the face ring by (i, j)."""
    return certified_groups(TorClaim(k))


def free(ranks: dict[tuple[int, int], int]) -> Bigraded:
    """Return free groups of these ranks, without those of rank 0."""
    return {key: AbelianGroup.of(rank) for key, rank in ranks.items() if rank}


def pure(shifts: Sequence[int]) -> Bigraded:
    """Return the Tor of a Cohen-Macaulay quotient with a pure resolution that has these shifts, the first of them 0.

    The rank in step i is the product over all other steps j > 0 of d_j / |d_j - d_i|.
    J. Herzog, M. Kühl, On the Betti numbers of finite pure and linear resolutions, Comm. Algebra 12 (1984); W. Bruns,
    J. Herzog, Cohen-Macaulay Rings, theorem 4.1.15 (from memory).
    """
    ranks = {(0, 0): 1}
    for i, shift in enumerate(shifts[1:], start=1):
        others = [other for other in shifts[1:] if other != shift]
        rank, rest = divmod(prod(others), prod(abs(other - shift) for other in others))
        assert not rest
        ranks[i, shift] = rank
    return free(ranks)


# -- pure resolutions ---------------------------------------------------------------------------


@pytest.mark.parametrize("m", range(4, 10))
def test_polygons(m: int) -> None:
    """T01: M. Hochster, Cohen-Macaulay rings, combinatorics, and simplicial complexes, 1977 (from memory)."""
    inner = {(i, i + 1): rank for i, rank in enumerate(entry("T01").value[str(m)], start=1)}
    found = tor(build("polygon", n=m))
    assert found == free({(0, 0): 1, **inner, (m - 2, m): 1})
    assert found == pure([0, *range(2, m - 1), m])


@pytest.mark.parametrize(("m", "d"), [(6, 4), (7, 4), (8, 4), (9, 4), (8, 6), (9, 6), (10, 6)])
def test_cyclic_polytopes_of_even_dimension(m: int, d: int) -> None:
    """T02: β_{i,i+k} = C(m-k-1, k+i) C(k+i-1, k) + C(m-k-1, i-1) C(m-k-i-1, k) with d = 2k.

    P. Schenzel, Über die freien Auflösungen extremaler Cohen-Macaulay-Ringe, J. Algebra 64 (1980); N. Terai, T. Hibi,
    Computation of Betti numbers of monomial ideals associated with cyclic polytopes, Discrete Comput. Geom. 15 (1996)
    (from memory).
    """
    k = d // 2
    inner = {
        i: comb(m - k - 1, k + i) * comb(k + i - 1, k) + comb(m - k - 1, i - 1) * comb(m - k - i - 1, k)
        for i in range(1, m - d)
    }
    published = entry("T02").value.get(f"C({m},{d})")
    assert published in (None, list(inner.values()))
    found = tor(build("cyclic-polytope", m=m, d=d))
    assert found == free({(0, 0): 1, **{(i, i + k): rank for i, rank in inner.items()}, (m - d, m): 1})
    assert found == pure([0, *range(k + 1, m - k), m])


@pytest.mark.parametrize(("m", "k"), [(5, 0), (7, 0), (6, 1), (6, 2), (7, 2), (5, 3), (4, -1)])
def test_skeleta_of_a_simplex(m: int, k: int) -> None:
    """T04: β_{i,i+k+1} = C(m, i+k+1) C(i+k, k+1), a linear resolution. It has the ranks of the Eagon-Northcott complex.

    J. A. Eagon, D. G. Northcott, Ideals defined by matrices and a certain complex associated with them, Proc. Royal
    Soc. London A 269 (1962); R. Fröberg, On Stanley-Reisner rings, Banach Center Publ. 26 (1990) (from memory).
    """
    inner = {i: comb(m, i + k + 1) * comb(i + k, k + 1) for i in range(1, m - k)}
    published = entry("T04").value.get(f"m={m},k={k}")
    assert published in (None, list(inner.values()))
    skeleton = SimplicialComplex.from_facets(combinations(range(m), k + 1), vertices=range(m))
    found = tor(skeleton)
    assert found == free({(0, 0): 1, **{(i, i + k + 1): rank for i, rank in inner.items()}})
    assert found == pure([0, *range(k + 2, m + 1)])


@pytest.mark.parametrize("sizes", [(3,), (2, 2, 2), (2, 3, 3), (1, 2, 4)])
def test_joins_of_boundaries_of_simplices_are_complete_intersections(sizes: tuple[int, ...]) -> None:
    """The Koszul complex: an exterior algebra with a generator in (1, s) for each boundary of a simplex on s vertices.

    Bruns, Herzog, Cohen-Macaulay Rings, corollary 1.6.14 (from memory). One vertex alone has the boundary {∅}.
    """
    expected: dict[tuple[int, int], int] = {}
    for number in range(len(sizes) + 1):
        for chosen in combinations(sizes, number):
            key = (number, sum(chosen))
            expected[key] = expected.get(key, 0) + 1
    assert tor(join(*(build("simplex-boundary", m=m) for m in sizes))) == free(expected)


# -- two strands --------------------------------------------------------------------------------


@pytest.mark.parametrize(("m", "d"), [(5, 3), (6, 3), (7, 3), (8, 3), (7, 4), (8, 4), (9, 5)])
def test_stacked_polytopes(m: int, d: int) -> None:
    """β_{i,i+1} = i C(m-d, i+1), and its dual β_{i,i+d-1} = (m-d-i) C(m-d, i-1), for 0 < i < m - d and d > 2.

    N. Terai, T. Hibi, Computation of Betti numbers of monomial ideals associated with stacked polytopes, Manuscripta
    Math. 92 (1997) (from memory).
    """
    n = m - d
    linear = {(i, i + 1): i * comb(n, i + 1) for i in range(1, n)}
    dual = {(i, i + d - 1): (n - i) * comb(n, i - 1) for i in range(1, n)}
    found = tor(build("stacked-polytope", m=m, d=d))
    assert found == free({(0, 0): 1, **linear, **dual, (n, m): 1})


# -- complexes that the table lists -------------------------------------------------------------


@pytest.mark.parametrize("name", ["B03", "C03", "C04", "M03"])
def test_bigraded_groups(name: str) -> None:
    """The Tor of B03, C03, C04 and M03, by M. Hochster's formula of 1977 (recomputed)."""
    groups = {
        tuple(map(int, key.split(","))): AbelianGroup.parse(text) for key, text in entry(name).value["tor"].items()
    }
    assert tor(entry(name).complex) == {(i, doubled // 2): group for (i, doubled), group in groups.items()}


@pytest.mark.parametrize("name", ["C01", "C03", "C04", "C05", "C07", "C08"])
def test_tor_is_the_cohomology_of_a_moment_angle_complex(name: str) -> None:
    """H^l of (D², S¹)^K is the sum of Tor_{i,2j} over 2j - i = l, with the torsion of C01, C05, C07 and C08.

    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, theorem 4.5.4 (from memory).
    """
    sums: Homology = {}
    for (i, j), group in tor(entry(name).complex).items():
        sums[2 * j - i] = sums.get(2 * j - i, AbelianGroup()) + group
    assert sums == cohomology(graded(entry(name).value["Z"]))


# -- numbers that Tor must add up to ------------------------------------------------------------


@pytest.mark.parametrize(
    "k",
    [
        build("polygon", n=6),
        build("points", m=4),
        build("simplex", m=3),
        build("torus"),
        entry("C01").complex,
        entry("C05").complex,
        entry("C07").complex,
        entry("C08").complex,
        SimplicialComplex.from_facets([[1, 2], [2, 3], [5]], vertices=range(1, 7)),
        SimplicialComplex.from_facets([[]], vertices=range(3)),
    ],
    ids=str,
)
def test_the_alternating_sum_is_the_numerator_of_the_hilbert_series(k: SimplicialComplex) -> None:
    """Σ (-1)^i β_{i,2j} t^j = h(t) (1-t)^(m-n) over a complex of dimension n - 1.

    R. P. Stanley, Combinatorics and Commutative Algebra, chapter II, section 1; Bruns, Herzog, Cohen-Macaulay Rings,
    lemma 4.1.13 (from memory). Here h(t) = Σ_σ t^|σ| (1-t)^(n-|σ|), with the faces σ listed from the facets.
    """
    t = sympy.Symbol("t")
    faces = {
        frozenset(face) for facet in k.facets for size in range(len(facet) + 1) for face in combinations(facet, size)
    }
    m, n = k.vertex_count, max(map(len, faces))
    h = sum((t ** len(face) * (1 - t) ** (n - len(face)) for face in faces), sympy.Integer(0))
    found = sum(((-1) ** i * group.rank * t**j for (i, j), group in tor(k).items()), sympy.Integer(0))
    assert sympy.expand(found) == sympy.expand(h * (1 - t) ** (m - n))


# -- linear resolutions -------------------------------------------------------------------------


def is_linear(groups: Bigraded) -> bool:
    """Say whether the ideal has a linear resolution over every field.

    By universal coefficients that is so if and only if over ℤ all of Tor above (0, 0) is free and lies on one line
    i + q with q + 1 the degree of the generators: torsion in (i, j) is seen over a field in (i, j) and in (i + 1, j).
    """
    return len({j - i for i, j in groups if i}) <= 1 and not any(group.torsion for group in groups.values())


@pytest.mark.parametrize("nodes", [4, 5, 6])
def test_flag_complexes_with_linear_resolutions_have_chordal_graphs(nodes: int) -> None:
    """M01: so many graphs are chordal, and so many there are.

    R. Fröberg, On Stanley-Reisner rings, Banach Center Publ. 26 (1990), theorem 1; the numbers of chordal graphs are
    A048192 of the OEIS (from memory). networkx knows which graphs are chordal.
    """
    graphs = [graph for graph in nx.graph_atlas_g() if len(graph) == nodes]
    linear = {number for number, graph in enumerate(graphs) if is_linear(tor(clique_complex(graph)))}
    assert [len(linear), len(graphs)] == entry("M01").value[str(nodes)]
    assert linear == {number for number, graph in enumerate(graphs) if nx.is_chordal(graph)}


def is_cohen_macaulay(k: SimplicialComplex) -> bool:
    """Say whether K is Cohen-Macaulay over ℤ, by certified homology of all links.

    G. A. Reisner, Cohen-Macaulay quotients of polynomial rings, Advances in Math. 21 (1976): the link of a face σ has
    reduced homology in degree n - 1 - |σ| alone, where n - 1 is the dimension of K (from memory).
    """
    for face in (face for size in range(k.dimension + 2) for face in k.faces(size)):
        out = tuple(k.labels[vertex] for vertex in face)
        kept = tuple(label for label in k.labels if label not in out)
        numbers = {"kept": [n + 1 for n in k.numbers(kept)], "out": [n + 1 for n in k.numbers(out)]}
        if certified_groups(SummandClaim(k, kept, out), **numbers).keys() - {(k.dimension - len(face),)}:
            return False
    return True


PATH_AND_EDGE = SimplicialComplex.from_facets([[1, 2], [2, 3], [4, 5]])


@pytest.mark.parametrize(
    ("k", "linear"),
    [
        (build("points", m=4), True),
        (build("simplex-skeleton", m=5, dim=1), True),
        (build("simplex-boundary", m=4), True),
        (build("polygon", n=4), False),
        (PATH_AND_EDGE, True),
        # Over a field of any other characteristic than 2 both sides are true.
        (entry("C01").complex, False),
    ],
    ids=str,
)
def test_linear_resolutions_belong_to_cohen_macaulay_duals(k: SimplicialComplex, linear: bool) -> None:
    """T05: the ideal of K has a linear resolution if and only if the dual of K is Cohen-Macaulay.

    J. A. Eagon, V. Reiner, Resolutions of Stanley-Reisner rings and Alexander duality, J. Pure Appl. Algebra 130
    (1998), theorem 3 (from memory).
    """
    assert is_linear(tor(k)) is linear
    assert is_cohen_macaulay(alexander_dual(k)) is linear


@settings(max_examples=25)
@given(complexes(max_vertices=5))
def test_linear_resolutions_belong_to_cohen_macaulay_duals_everywhere(k: SimplicialComplex) -> None:
    """T05 again, for any complex but a simplex, whose dual has no faces at all."""
    if k.missing_faces():
        assert is_linear(tor(k)) is is_cohen_macaulay(alexander_dual(k))


@settings(max_examples=25)
@given(complexes(max_vertices=5) | complexes_with_torsion())
def test_the_length_of_a_resolution(k: SimplicialComplex) -> None:
    """The last step of a resolution is at most m, and exactly m - n if and only if K is Cohen-Macaulay.

    The formula of M. Auslander and D. A. Buchsbaum, 1957: Bruns, Herzog, Cohen-Macaulay Rings, theorem 1.3.3 (from
    memory). Torsion in (i, j) is seen over a field in (i + 1, j) as well.
    """
    groups = tor(k)
    last = max(i + bool(group.torsion) for (i, _), group in groups.items())
    assert k.vertex_count >= last >= k.vertex_count - k.dimension - 1
    assert is_cohen_macaulay(k) is (last == k.vertex_count - k.dimension - 1)
