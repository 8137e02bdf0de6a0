"""Finite abstract simplicial complexes: the model, how to read and build them, and what can be made of them.

A complex has a list of vertices, each with a label; some may be *ghosts*, which lie in no face. Its faces are
sets of vertices, closed under taking subsets; the empty set is always one of them.
"""

from certify.simplicial.arguments import Label
from certify.simplicial.associahedra import nested_set_complex
from certify.simplicial.complexes import Face, SimplicialComplex
from certify.simplicial.definitions import complex_from_definition
from certify.simplicial.graphs import (
    clique_complex,
    graph_from_edges,
    independence_complex,
    read_edges,
    read_graph6,
    read_graph_file,
)
from certify.simplicial.ideals import from_missing_faces, from_monomials
from certify.simplicial.incidence import from_incidence
from certify.simplicial.inputs import complex_from_table, read_complex_file, read_facets
from certify.simplicial.masks import face_of, mask_of
from certify.simplicial.operations import (
    alexander_dual,
    connected_sum,
    deletion,
    disjoint_union,
    full_subcomplex,
    join,
    link,
    skeleton,
    star,
)
from certify.simplicial.recognition import is_closed_surface, is_pseudomanifold, vertex_links
from certify.simplicial.registry import FAMILIES, Family, build
from certify.simplicial.subdivisions import barycentric_subdivision, stellar_subdivision
from certify.simplicial.substitutions import simplicial_wedge, substitution

__all__ = [
    "FAMILIES",
    "Face",
    "Family",
    "Label",
    "SimplicialComplex",
    "alexander_dual",
    "barycentric_subdivision",
    "build",
    "clique_complex",
    "complex_from_definition",
    "complex_from_table",
    "connected_sum",
    "deletion",
    "disjoint_union",
    "face_of",
    "from_incidence",
    "from_missing_faces",
    "from_monomials",
    "full_subcomplex",
    "graph_from_edges",
    "independence_complex",
    "is_closed_surface",
    "is_pseudomanifold",
    "join",
    "link",
    "mask_of",
    "nested_set_complex",
    "read_complex_file",
    "read_edges",
    "read_facets",
    "read_graph6",
    "read_graph_file",
    "simplicial_wedge",
    "skeleton",
    "star",
    "stellar_subdivision",
    "substitution",
    "vertex_links",
]
