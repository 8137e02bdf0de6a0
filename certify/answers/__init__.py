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

__all__ = [
    "Certificate",
    "GradedGroups",
    "Homology",
    "Splitting",
    "Tor",
    "f_polynomial",
    "face_ideal",
    "face_poset",
    "h_polynomial",
    "hilbert_series",
    "homology",
    "one_skeleton",
    "polyhedral_product",
    "real_toric_space",
    "reduced_homology",
    "smash_homology",
    "splitting",
    "tor",
    "variables",
]
