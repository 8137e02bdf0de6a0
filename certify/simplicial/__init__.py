"""Finite abstract simplicial complexes: the model, how to read and build them, and what can be made of them.

A complex has a list of vertices, each with a label; some may be *ghosts*, which lie in no face. Its faces are
sets of vertices, closed under taking subsets; the empty set is always one of them.
"""

from certify.simplicial.complexes import Face, Label, SimplicialComplex
from certify.simplicial.families import FAMILIES, Family, build
from certify.simplicial.inputs import complex_from_table, read_complex_file, read_facets
from certify.simplicial.masks import face_of, mask_of
from certify.simplicial.operations import (
    alexander_dual,
    deletion,
    disjoint_union,
    full_subcomplex,
    join,
    link,
    skeleton,
    star,
)
from certify.simplicial.recognition import is_closed_surface, is_pseudomanifold, vertex_links

__all__ = [
    "FAMILIES",
    "Face",
    "Family",
    "Label",
    "SimplicialComplex",
    "alexander_dual",
    "build",
    "complex_from_table",
    "deletion",
    "disjoint_union",
    "face_of",
    "full_subcomplex",
    "is_closed_surface",
    "is_pseudomanifold",
    "join",
    "link",
    "mask_of",
    "read_complex_file",
    "read_facets",
    "skeleton",
    "star",
    "vertex_links",
]
