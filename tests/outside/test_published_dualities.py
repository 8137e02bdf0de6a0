"""Published dualities, bounds and bigraded ranks.

The values stand in check_values.json; the letter and number before each source is that of the entry. Every group that
is compared stands in a certificate that the verifier accepted.
"""

from __future__ import annotations

from itertools import combinations
from math import comb

import pytest
from hypothesis import given, settings

from certify.simplicial import SimplicialComplex, alexander_dual, build, join
from tests.helpers import Homology, blocks_apart, certified_homology, cohomology, disc_product
from tests.outside.values import bigraded_ranks, entry
from tests.strategies import complexes, complexes_with_torsion


def _reduced_homology(k: SimplicialComplex) -> Homology:
    return blocks_apart(k)[2**k.vertex_count - 1]


@pytest.mark.parametrize("name", ["C01", "C03", "C05", "C07", "C08"])
def test_alexander_duality_shifts_torsion(name: str) -> None:
    """U01: H_i(K) ≅ H^(m-i-3) of the dual, reduced.

    J. A. Eagon, V. Reiner, J. Pure Appl. Algebra 130 (1998) (from memory).
    """
    k = entry(name).complex
    dual = _reduced_homology(alexander_dual(k))
    assert dual
    assert _reduced_homology(k) == {k.vertex_count - i - 3: group for i, group in cohomology(dual).items()}


def test_the_projective_plane_is_its_own_dual() -> None:
    """U02: of each two complementary triangles exactly one is a face (well known)."""
    k = entry("C01").complex
    assert entry("U02").value is True
    for triangle in combinations(k.labels, 3):
        assert k.is_face(triangle) != k.is_face(set(k.labels) - set(triangle))
    assert alexander_dual(k) == k
    assert certified_homology(disc_product(alexander_dual(k), 2)) == certified_homology(disc_product(k, 2))


SPHERES = [
    build("polygon", n=7),
    build("simplex-boundary", m=5),
    build("cross-polytope", n=4),
    build("cyclic-polytope", m=8, d=5),
    build("cyclic-polytope", m=8, d=4),
    entry("B03").complex,
    entry("M03").complex,
    join(build("simplex-boundary", m=4), build("polygon", n=5)),
]
size_of = pytest.mark.parametrize("k", SPHERES, ids=lambda k: f"{k.vertex_count} vertices, dimension {k.dimension}")


@size_of
def test_bigraded_duality_over_a_sphere(k: SimplicialComplex) -> None:
    """U03: β^(-i,2j) = β^(-(m-n-i),2(m-j)) over a sphere of dimension n - 1.

    L. L. Avramov, E. S. Golod, Homology of the Koszul complex of a local Gorenstein ring, Math. Notes 9 (1971);
    Buchstaber, Panov, Toric Topology (from memory).
    """
    m, n = k.vertex_count, k.dimension + 1
    ranks = bigraded_ranks(k)
    assert ranks == {(m - n - i, m - j): rank for (i, j), rank in ranks.items()}


@size_of
@pytest.mark.parametrize("factor", [1, 2])
def test_poincare_duality_over_a_sphere(k: SimplicialComplex, factor: int) -> None:
    """U03: in dimension n for (D¹, S⁰) and m + n for (D², S¹)."""
    top = k.dimension + 1 + (factor - 1) * k.vertex_count
    groups = certified_homology(disc_product(k, factor))
    assert groups == {top - degree: group for degree, group in cohomology(groups).items()}


def _total_rank(k: SimplicialComplex) -> int:
    return sum(group.rank for group in certified_homology(disc_product(k, 2)).values())


@settings(max_examples=40)
@given(complexes() | complexes_with_torsion())
def test_the_total_rank_is_bounded_below(k: SimplicialComplex) -> None:
    """U04: Σ b_i ≥ 2^(m-n) over a complex of dimension n - 1.

    X. Cao, Z. Lü, Möbius transform, moment-angle complexes and Halperin-Carlsson conjecture, J. Algebraic Combin. 35
    (2012); Yu. Ustinovsky, 2011 (seen).
    """
    assert _total_rank(k) >= 2 ** (k.vertex_count - k.dimension - 1)


@pytest.mark.parametrize("sizes", [(1,), (2,), (1, 1), (2, 2), (3, 4), (2, 3, 3), (1, 2, 5)])
def test_the_bound_is_reached_by_joins_of_boundaries_of_simplices(sizes: tuple[int, ...]) -> None:
    """U04, note: equality. A single vertex has the boundary {∅}, so it is a ghost."""
    k = SimplicialComplex.from_facets([[]])
    for m in sizes:
        k = join(k, build("simplex-boundary", m=m))
    assert k.vertex_count == sum(sizes)
    assert _total_rank(k) == 2 ** len(sizes) == 2 ** (k.vertex_count - k.dimension - 1)


# -- Tor of face rings --------------------------------------------------------------------------


@pytest.mark.parametrize("m", range(4, 12))
def test_tor_of_a_polygon(m: int) -> None:
    """T01: β^(-i,2(i+1)) = i (m-2-i) / (m-1) · C(m, i+1), and β^(-(m-2),2m) = 1.

    M. Hochster, Cohen-Macaulay rings, combinatorics, and simplicial complexes, 1977; Buchstaber, Panov (from memory).
    """
    inner = {(i, i + 1): i * (m - 2 - i) * comb(m, i + 1) // (m - 1) for i in range(1, m - 2)}
    assert list(inner.values()) == entry("T01").value[str(m)]
    assert bigraded_ranks(build("polygon", n=m)) == {(0, 0): 1, **inner, (m - 2, m): 1}


@pytest.mark.parametrize("key", list(entry("T02").value))
def test_tor_of_a_cyclic_polytope(key: str) -> None:
    """T02: a pure resolution. P. Schenzel, 1981; N. Terai, T. Hibi, 1996 (from memory)."""
    m, d = map(int, key.removeprefix("C(").removesuffix(")").split(","))
    half = d // 2
    inner = {(i, i + half): rank for i, rank in enumerate(entry("T02").value[key], start=1)}
    assert bigraded_ranks(build("cyclic-polytope", m=m, d=d)) == {(0, 0): 1, **inner, (m - d, m): 1}


@pytest.mark.parametrize("key", list(entry("T04").value))
def test_tor_of_a_skeleton_of_a_simplex(key: str) -> None:
    """T04: β^(-i,2(i+k+1)) = C(m, i+k+1) C(i+k, k+1). Hochster, 1977; Grbić, Theriault, 2007 (from memory)."""
    m, dim = (int(part.partition("=")[2]) for part in key.split(","))
    inner = {(i, i + dim + 1): rank for i, rank in enumerate(entry("T04").value[key], start=1)}
    assert list(inner.values()) == [comb(m, i + dim + 1) * comb(i + dim, dim + 1) for i in range(1, m - dim)]
    assert bigraded_ranks(build("simplex-skeleton", m=m, dim=dim)) == {(0, 0): 1, **inner}
