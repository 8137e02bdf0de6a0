"""Published homology with torsion, and places where there must be none.

The values stand in check_values.json; the letter and number before each source is that of the entry. Every group that
is compared stands in a certificate that the verifier accepted.
"""

from __future__ import annotations

from collections.abc import Iterator
from itertools import combinations
from math import prod

import pytest

from certify.exact import AbelianGroup
from certify.simplicial import SimplicialComplex, build, join
from tests.helpers import certified_homology, disc_product, graded, kunneth
from tests.outside.values import entry

REAL, COMPLEX = 1, 2
"""The n of (D¹, S⁰) and of (D², S¹)."""


@pytest.mark.parametrize("name", ["C01", "C03", "C04", "C05", "C07", "C08"])
@pytest.mark.parametrize(("n", "key"), [(REAL, "RZ"), (COMPLEX, "Z")])
def test_triangulated_spaces(name: str, n: int, key: str) -> None:
    """Minimal triangulations and Moore spaces.

    C01: the projective plane on 6 vertices; J. Grbić, T. Panov, S. Theriault, J. Wu, arXiv 1211.0873 (from memory).
    C03: the torus on 7 vertices of A. F. Möbius, 1861 (recomputed).
    C04: the complex projective plane on 9 vertices; W. Kühnel, T. F. Banchoff, The 9-vertex complex projective plane,
    Math. Intelligencer 5 (1983), and I. Limonchenko, arXiv 1509.04302 (statement seen).
    C05: a Klein bottle on 8 vertices; P. Franklin, A six color problem, J. Math. Phys. 13 (1934), for the number 8.
    C07, C08: Moore spaces for ℤ/3 and ℤ/4 on 9 vertices (recomputed).
    """
    given = entry(name)
    assert certified_homology(disc_product(given.complex, n)) == graded(given.value[key])


@pytest.mark.parametrize(
    ("name", "family"),
    [
        ("C01", "projective-plane"),
        ("C03", "torus"),
        ("C04", "complex-projective-plane"),
        ("C05", "klein-bottle"),
    ],
)
def test_our_own_triangulations(name: str, family: str) -> None:
    """C01, C03, C04, C05 again, for the lists of facets of this program: they must agree up to names of vertices."""
    for n, key in ((REAL, "RZ"), (COMPLEX, "Z")):
        assert certified_homology(disc_product(build(family), n)) == graded(entry(name).value[key])


def test_the_cell_route_finds_the_torsion_of_the_projective_plane() -> None:
    """C01 once more, without the stable splitting."""
    given = entry("C01")
    for n, key in ((REAL, "RZ"), (COMPLEX, "Z")):
        groups = certified_homology(disc_product(given.complex, n), route="cells")
        assert groups == graded(given.value[key])


@pytest.mark.slow
def test_the_join_of_a_projective_plane_and_a_klein_bottle() -> None:
    """A06 with torsion: the product of the spaces of C01 and C05, by Künneth on the published groups."""
    plane, bottle = entry("C01"), entry("C05")
    expected = kunneth(graded(plane.value["RZ"]), graded(bottle.value["RZ"]))
    assert expected[5] == AbelianGroup.of(0, [2])  # Tor(ℤ/2, ℤ/2)
    assert certified_homology(disc_product(join(plane.complex, bottle.complex), REAL)) == expected


@pytest.mark.parametrize(
    "sphere",
    [
        *(build("polygon", n=n) for n in (3, 5, 8)),
        *(build("simplex-boundary", m=m) for m in (3, 4, 5)),
        *(build("cross-polytope", n=n) for n in (2, 3, 4)),
        *(build("cyclic-polytope", m=m, d=d) for d in (3, 4) for m in (d + 2, 8)),
        join(build("polygon", n=5), build("points", m=2)),
        join(build("polygon", n=3), build("polygon", n=5)),
        entry("B03").complex,
        entry("M03").complex,
    ],
    ids=lambda sphere: f"{sphere.vertex_count} vertices, dimension {sphere.dimension}",
)
def test_small_spheres_give_no_torsion(sphere: SimplicialComplex) -> None:
    """C12: none over a sphere of dimension 1, 2 or 3.

    F. Bosio, L. Meersseman, Acta Math. 197 (2006), corollary 11.1, quoted in arXiv 1705.05531 (seen).
    """
    assert entry("C12").value is True
    assert 1 <= sphere.dimension <= 3
    for n in (REAL, COMPLEX):
        groups = certified_homology(disc_product(sphere, n)).values()
        assert groups
        assert not any(group.torsion for group in groups)


# -- Kalai's count of acyclic complexes ---------------------------------------------------------

_TRIANGLES = list(combinations(range(6), 3))


def _triangle_permutation(images: list[int]) -> list[int]:
    """Return where a permutation of the six vertices takes each triangle."""
    place = {frozenset(triangle): number for number, triangle in enumerate(_TRIANGLES)}
    return [place[frozenset(images[vertex] for vertex in triangle)] for triangle in _TRIANGLES]


def _halves(permutation: list[int]) -> tuple[list[int], list[int]]:
    """Return tables of the images of all sets of the first ten and of the last ten triangles, as masks."""
    low, high = (
        [sum(1 << permutation[start + i] for i in range(10) if half >> i & 1) for half in range(1024)]
        for start in (0, 10)
    )
    return low, high


def _orbits() -> Iterator[tuple[int, int]]:
    """Yield a representative and the size of each orbit of sets of ten triangles under renaming the vertices."""
    generators = [_halves(_triangle_permutation(images)) for images in ([1, 0, 2, 3, 4, 5], [1, 2, 3, 4, 5, 0])]
    seen = bytearray(1 << 20)
    for chosen in combinations(range(20), 10):
        start = sum(1 << triangle for triangle in chosen)
        if seen[start]:
            continue
        seen[start] = 1
        orbit = [start]
        for mask in orbit:
            for low, high in generators:
                image = low[mask & 1023] | high[mask >> 10]
                if not seen[image]:
                    seen[image] = 1
                    orbit.append(image)
        yield start, len(orbit)


@pytest.mark.slow
def test_kalais_count_of_acyclic_complexes() -> None:
    """C13: Σ |H_1(K)|² = 6^C(4,2) over the ℚ-acyclic complexes K with all edges on 6 vertices and ten triangles.

    G. Kalai, Enumeration of ℚ-acyclic simplicial complexes, Israel J. Math. 45 (1983); the formula was seen. With
    (Dⁿ, Sⁿ⁻¹), n - 1 = 4, at every vertex, the block of all vertices is alone in degrees from 24 on: H_k(K) is in
    degree k + 25.
    """
    total = torsion = 0
    for mask, size in _orbits():
        faces = [triangle for i, triangle in enumerate(_TRIANGLES) if mask >> i & 1]
        k = SimplicialComplex.from_facets([*faces, *combinations(range(6), 2)])
        groups = certified_homology(disc_product(k, 5), [26, 27])
        if any(group.rank for group in groups.values()):
            continue
        order = prod(groups[26].torsion) if groups else 1
        total += size * order**2
        torsion += size if order > 1 else 0
    assert total == entry("C13").value == 6**6
    # The note of the entry: only the 720 / 60 copies of the projective plane have torsion.
    assert torsion == 12
