"""Answers: what a mathematician at a prompt asks for, and sees as mathematics; each one can show its certificate."""

from certify.answers.bigraded import Splitting, Tor
from certify.answers.certificates import Certificate
from certify.answers.conversions import face_ideal, face_poset, one_skeleton, variables
from certify.answers.graded import GradedGroups, Homology
from certify.answers.polynomials import f_polynomial, h_polynomial, hilbert_series
from certify.answers.questions import (
    homology,
    polyhedral_product,
    real_toric_space,
    reduced_homology,
    smash_homology,
    splitting,
    tor,
)
from certify.answers.symmetry import (
    BranchPoints,
    Character,
    OrbitCount,
    ProvedSurface,
    SymmetryGroup,
    automorphism_group,
    branch_points,
    character,
    fixed_set_homology,
    orbit_count,
    orbit_space_homology,
    shelling,
    surface,
)

__all__ = [
    "BranchPoints",
    "Certificate",
    "Character",
    "GradedGroups",
    "Homology",
    "OrbitCount",
    "ProvedSurface",
    "Splitting",
    "SymmetryGroup",
    "Tor",
    "automorphism_group",
    "branch_points",
    "character",
    "f_polynomial",
    "face_ideal",
    "face_poset",
    "fixed_set_homology",
    "h_polynomial",
    "hilbert_series",
    "homology",
    "one_skeleton",
    "orbit_count",
    "orbit_space_homology",
    "polyhedral_product",
    "real_toric_space",
    "reduced_homology",
    "shelling",
    "smash_homology",
    "splitting",
    "surface",
    "tor",
    "variables",
]
