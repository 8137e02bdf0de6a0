"""Answers: what a mathematician at a prompt asks for, and sees as mathematics; each one can show its certificate."""

from certify.answers.bigraded import Splitting, Tor
from certify.answers.certificates import Certificate
from certify.answers.conversions import face_ideal, face_poset, one_skeleton, variables
from certify.answers.counts import CountValues, OrbitCount, count_identity, count_values, orbit_count
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
from certify.answers.quotients import (
    BranchPoints,
    ProvedSurface,
    branch_points,
    orbit_space_homology,
    shelling,
    surface,
)
from certify.answers.symmetry import (
    Action,
    Character,
    FixedSet,
    SymmetryGroup,
    action,
    automorphism_group,
    character,
    equivariance,
    fixed_set,
)

__all__ = [
    "Action",
    "BranchPoints",
    "Certificate",
    "Character",
    "CountValues",
    "FixedSet",
    "GradedGroups",
    "Homology",
    "OrbitCount",
    "ProvedSurface",
    "Splitting",
    "SymmetryGroup",
    "Tor",
    "action",
    "automorphism_group",
    "branch_points",
    "character",
    "count_identity",
    "count_values",
    "equivariance",
    "f_polynomial",
    "face_ideal",
    "face_poset",
    "fixed_set",
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
