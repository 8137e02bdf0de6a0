"""Exact linear algebra over the integers: sparse vectors, based complexes, adapted bases, abelian groups."""

from certify.exact.adapted import AdaptedBasis, AdaptedDegree, Group, Pair, adapted_basis
from certify.exact.complexes import BasedComplex
from certify.exact.groups import AbelianGroup
from certify.exact.smith import Diagonal, diagonalise
from certify.exact.vectors import Entries, Vector, add_multiple, combination, entries

__all__ = [
    "AbelianGroup",
    "AdaptedBasis",
    "AdaptedDegree",
    "BasedComplex",
    "Diagonal",
    "Entries",
    "Group",
    "Pair",
    "Vector",
    "adapted_basis",
    "add_multiple",
    "combination",
    "diagonalise",
    "entries",
]
