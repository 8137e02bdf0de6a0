"""Alexander duality for complexes, and Poincaré duality for polyhedral products over spheres.

Every group below stands in a certificate that the verifier accepted.
"""

from __future__ import annotations

from hypothesis import assume, given, settings

from certify.products import PolyhedralProduct
from certify.simplicial import SimplicialComplex, alexander_dual, join
from tests.helpers import blocks_apart, certified_homology, cohomology, disc_dimensions
from tests.strategies import complexes, complexes_with_torsion, sphere_products, spheres


@given(complexes() | complexes_with_torsion())
def test_alexander_duality(k: SimplicialComplex) -> None:
    """The reduced homology of the dual in degree i is the reduced cohomology of K in degree m - i - 3.

    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, corollary 2.4.6 (from memory).
    """
    assume(k.missing_faces())
    m = k.vertex_count
    everything = 2**m - 1
    of_dual = blocks_apart(alexander_dual(k))[everything]
    of_k = cohomology(blocks_apart(k)[everything])
    assert of_dual == {m - degree - 3: group for degree, group in of_k.items()}


@given(sphere_products())
def test_poincare_duality(space: PolyhedralProduct) -> None:
    """Over a sphere of dimension n - 1, (X, A)^K is a closed orientable manifold of dimension n + Σ (n_i - 1).

    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, theorem 4.1.4 for (D², S¹) (from memory).
    """
    dimension = space.complex.dimension + 1 + sum(n - 1 for n in disc_dimensions(space))
    groups = certified_homology(space)
    assert groups == {dimension - degree: group for degree, group in cohomology(groups).items()}


@settings(max_examples=20)
@given(spheres(), spheres())
def test_poincare_duality_pairs_the_block_of_a_set_with_that_of_its_complement(
    left: SimplicialComplex, right: SimplicialComplex
) -> None:
    """In a sphere of dimension n - 1, H_i of K_I is reduced cohomology in degree n - i - 2 of K on the other vertices.

    It is Alexander duality in the sphere: A. Hatcher, Algebraic Topology, Cambridge 2002, corollary 3.45 (from memory).
    """
    k = left if left.vertex_count > 5 else join(left, right)
    assume(k.vertex_count <= 8)
    everything = 2**k.vertex_count - 1
    apart = blocks_apart(k)
    for mask, groups in apart.items():
        other = cohomology(apart[everything & ~mask])
        assert groups == {k.dimension - 1 - degree: group for degree, group in other.items()}
