"""Certified homology of polyhedral products (X, A)^K: claims that are computed, proved, and checked by anybody.

Names are loaded when they are first used, so that `import certify` and the command line stay quick.
"""

from importlib import import_module
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from certify.answers import (
        BranchPoints,
        Certificate,
        Character,
        GradedGroups,
        Homology,
        OrbitCount,
        ProvedSurface,
        Splitting,
        SymmetryGroup,
        Tor,
        automorphism_group,
        branch_points,
        character,
        f_polynomial,
        face_ideal,
        face_poset,
        fixed_set_homology,
        h_polynomial,
        hilbert_series,
        homology,
        one_skeleton,
        orbit_count,
        orbit_space_homology,
        polyhedral_product,
        real_toric_space,
        reduced_homology,
        shelling,
        smash_homology,
        splitting,
        surface,
        tor,
        variables,
    )
    from certify.certificate import Spool
    from certify.claims import (
        Claim,
        HomologyClaim,
        Proof,
        RealToricClaim,
        SmashClaim,
        SummandClaim,
        TableClaim,
        TorClaim,
        prove,
    )
    from certify.errors import BadInput, CertifyError, ClaimIsFalse, InternalError, LimitReached
    from certify.exact import AbelianGroup
    from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
    from certify.products.real_toric import RealToricSpace
    from certify.products.small_covers import (
        coloured_small_cover,
        real_bott_manifold,
        real_nested_set_variety,
        real_permutohedral_variety,
        real_projective_space,
        space_of_subsets,
    )
    from certify.simplicial import (
        SimplicialComplex,
        alexander_dual,
        barycentric_subdivision,
        clique_complex,
        connected_sum,
        deletion,
        disjoint_union,
        from_incidence,
        from_missing_faces,
        from_monomials,
        full_subcomplex,
        graph_from_edges,
        independence_complex,
        join,
        link,
        nested_set_complex,
        read_complex_file,
        read_edges,
        read_facets,
        read_graph6,
        read_graph_file,
        simplicial_wedge,
        skeleton,
        star,
        stellar_subdivision,
        substitution,
    )
    from certify.simplicial.associahedra import (
        associahedron_dual,
        cyclohedron_dual,
        permutohedron_dual,
        stellohedron_dual,
    )
    from certify.simplicial.families import (
        cross_polytope,
        cyclic_polytope,
        points,
        polygon,
        simplex,
        simplex_boundary,
        simplex_skeleton,
        stacked_polytope,
    )
    from certify.simplicial.triangulations import (
        complex_projective_plane,
        klein_bottle,
        poincare_sphere,
        projective_plane,
        torus,
    )

__all__ = [
    "AbelianGroup",
    "BadInput",
    "BranchPoints",
    "Certificate",
    "CertifyError",
    "Character",
    "Claim",
    "ClaimIsFalse",
    "GradedGroups",
    "Homology",
    "HomologyClaim",
    "InternalError",
    "LimitReached",
    "OrbitCount",
    "Pair",
    "PolyhedralProduct",
    "Proof",
    "ProvedSurface",
    "RealToricClaim",
    "RealToricSpace",
    "SimplicialComplex",
    "SmashClaim",
    "Splitting",
    "Spool",
    "SummandClaim",
    "SymmetryGroup",
    "TableClaim",
    "Tor",
    "TorClaim",
    "alexander_dual",
    "associahedron_dual",
    "automorphism_group",
    "barycentric_subdivision",
    "branch_points",
    "character",
    "clique_complex",
    "coloured_small_cover",
    "complex_projective_plane",
    "connected_sum",
    "cross_polytope",
    "cyclic_polytope",
    "cyclohedron_dual",
    "deletion",
    "disjoint_union",
    "f_polynomial",
    "face_ideal",
    "face_poset",
    "fixed_set_homology",
    "from_incidence",
    "from_missing_faces",
    "from_monomials",
    "full_subcomplex",
    "graph_from_edges",
    "h_polynomial",
    "hilbert_series",
    "homology",
    "independence_complex",
    "join",
    "klein_bottle",
    "link",
    "nested_set_complex",
    "one_skeleton",
    "orbit_count",
    "orbit_space_homology",
    "parse_pair",
    "parse_pairs",
    "permutohedron_dual",
    "poincare_sphere",
    "points",
    "polygon",
    "polyhedral_product",
    "projective_plane",
    "prove",
    "read_complex_file",
    "read_edges",
    "read_facets",
    "read_graph6",
    "read_graph_file",
    "real_bott_manifold",
    "real_nested_set_variety",
    "real_permutohedral_variety",
    "real_projective_space",
    "real_toric_space",
    "reduced_homology",
    "shelling",
    "simplex",
    "simplex_boundary",
    "simplex_skeleton",
    "simplicial_wedge",
    "skeleton",
    "smash_homology",
    "space_of_subsets",
    "splitting",
    "stacked_polytope",
    "star",
    "stellar_subdivision",
    "stellohedron_dual",
    "substitution",
    "surface",
    "tor",
    "torus",
    "variables",
]
__version__ = "0.1.0"

_ROOMS = (
    "errors",
    "simplicial",
    "simplicial.families",
    "simplicial.triangulations",
    "simplicial.associahedra",
    "products",
    "products.real_toric",
    "products.small_covers",
    "exact",
    "certificate",
    "claims",
    "answers",
)
"""Where names are looked for, in this order: the `Pair` of `products` is wanted, not the one of `exact`."""


if not TYPE_CHECKING:  # Otherwise type checkers would let every misspelt name pass.

    def __getattr__(name: str) -> object:
        """Load a name when it is first used."""
        if name in __all__:
            for room in _ROOMS:
                module = import_module(f"certify.{room}")
                if name in module.__all__:
                    globals()[name] = getattr(module, name)
                    return globals()[name]
        raise AttributeError(f"module 'certify' has no attribute {name!r}", name=name)


def __dir__() -> list[str]:
    """Return all names, loaded or not."""
    return sorted({*globals(), *__all__})
