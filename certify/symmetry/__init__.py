"""Symmetries of a simplicial complex with a pair at each vertex."""

from certify.symmetry.automorphisms import automorphism_generators
from certify.symmetry.orbits import orbit_classes

__all__ = ["automorphism_generators", "orbit_classes"]
