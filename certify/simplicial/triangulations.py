"""Triangulated manifolds on few vertices, as lists of facets; the vertices are labelled 1, 2, ..., n.

The tests do not trust these lists: they check links, homology and, where it matters, the fundamental group.
"""

from __future__ import annotations

from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.inputs import read_facets

__all__ = ["complex_projective_plane", "klein_bottle", "poincare_sphere", "projective_plane", "torus"]


def projective_plane() -> SimplicialComplex:
    """Return the real projective plane on 6 vertices: the icosahedron with opposite points identified.

    Notes
    -----
    It is the only triangulation with 6 vertices, and no triangulation has fewer; 10 triangles, 60
    automorphisms.

    References
    ----------
    W. Kühnel, Tight Polyhedral Submanifolds and Tight Triangulations, Springer 1995, chapter 2 (from memory).
    """
    return read_facets("1 2 4; 1 3 4; 1 3 5; 2 3 5; 2 4 5; 1 2 6; 2 3 6; 3 4 6; 1 5 6; 4 5 6")


def torus() -> SimplicialComplex:
    """Return the torus on 7 vertices: the triangles {i, i+1, i+3} and {i, i+2, i+3} modulo 7.

    Notes
    -----
    Every two vertices are joined by an edge, so no triangulation has fewer vertices; 14 triangles.

    References
    ----------
    A. F. Möbius, note of 1861, in: Gesammelte Werke, vol. 2, Leipzig 1886 (from memory).
    """
    facets = [{(i + step) % 7 + 1 for step in steps} for i in range(7) for steps in ((0, 1, 3), (0, 2, 3))]
    return SimplicialComplex.from_facets(facets)


def klein_bottle() -> SimplicialComplex:
    """Return a Klein bottle on 8 vertices, with 16 triangles.

    Notes
    -----
    There is none on 7 vertices. The list was made for this project by bistellar flips from a larger
    triangulation; it is one of several types with 8 vertices.

    References
    ----------
    P. Franklin, A six color problem, Journal of Mathematics and Physics 13 (1934), for the number 8 (from
    memory).
    """
    return read_facets(
        "1 3 4; 1 3 5; 2 4 5; 2 3 6; 1 5 6; 2 5 6; 2 4 7; 3 4 7;1 6 7; 3 6 7; 2 3 8; 1 4 8; 3 5 8; 4 5 8; 1 7 8; 2 7 8"
    )


def complex_projective_plane() -> SimplicialComplex:
    """Return the complex projective plane on 9 vertices, with 36 facets of dimension 4.

    Notes
    -----
    Every three vertices span a triangle, and no triangulation has fewer vertices; 54 automorphisms.

    References
    ----------
    W. Kühnel and T. F. Banchoff, The 9-vertex complex projective plane, Mathematical Intelligencer 5 (1983).
    W. Kühnel and G. Lassmann, The unique 3-neighborly 4-manifold with few vertices, Journal of Combinatorial
    Theory A 35 (1983) (both from memory).
    """
    return read_facets(
        """
        1 2 3 7 8; 1 2 3 7 9; 1 2 3 8 9; 1 2 4 5 6; 1 2 4 5 9; 1 2 4 6 7; 1 2 4 7 9; 1 2 5 6 8; 1 2 5 8 9
        1 2 6 7 8; 1 3 4 5 6; 1 3 4 5 7; 1 3 4 6 8; 1 3 4 7 8; 1 3 5 6 9; 1 3 5 7 9; 1 3 6 8 9; 1 4 5 7 9
        1 4 6 7 8; 1 5 6 8 9; 2 3 4 5 6; 2 3 4 5 8; 2 3 4 6 9; 2 3 4 8 9; 2 3 5 6 7; 2 3 5 7 8; 2 3 6 7 9
        2 4 5 8 9; 2 4 6 7 9; 2 5 6 7 8; 3 4 5 7 8; 3 4 6 8 9; 3 5 6 7 9; 4 5 7 8 9; 4 6 7 8 9; 5 6 7 8 9
        """
    )


def poincare_sphere() -> SimplicialComplex:
    """Return the Poincaré homology 3-sphere on 16 vertices, with 106 edges and 90 tetrahedra.

    Notes
    -----
    The list was made for this project. Opposite faces of a solid dodecahedron were glued with the smallest
    twist, a tenth of a turn; the boundary was subdivided barycentrically, a collar was put between it and a
    cone over the subdivided sphere inside (84 vertices, 480 tetrahedra), and random bistellar flips that
    change 2 tetrahedra into 3, 3 into 2 or 4 into 1, with a preference for few edges, brought it down to 16
    vertices. Flips do not change the manifold. All vertex links are 2-spheres, the integral homology is that
    of the 3-sphere, and the fundamental group has 120 elements; a perfect group of that order is the binary
    icosahedral group.

    References
    ----------
    For the gluing: H. Seifert and W. Threlfall, Lehrbuch der Topologie, Teubner 1934, section 62. For the
    number of vertices: A. Björner and F. H. Lutz, Simplicial manifolds, bistellar flips and a 16-vertex
    triangulation of the Poincaré homology 3-sphere, Experimental Mathematics 9 (2000) (both from memory).
    """
    return read_facets(
        """
        1 2 3 14; 1 2 3 16; 1 2 5 10; 1 2 5 16; 1 2 10 11; 1 2 11 14; 1 3 4 7; 1 3 4 16; 1 3 7 14
        1 4 5 8; 1 4 5 16; 1 4 7 15; 1 4 8 15; 1 5 8 13; 1 5 10 13; 1 6 7 14; 1 6 7 15; 1 6 9 12
        1 6 9 15; 1 6 11 12; 1 6 11 14; 1 8 9 13; 1 8 9 15; 1 9 12 13; 1 10 11 12; 1 10 12 13; 2 3 8 9
        2 3 8 12; 2 3 9 14; 2 3 12 16; 2 4 6 10; 2 4 6 13; 2 4 10 11; 2 4 11 13; 2 5 7 12; 2 5 7 15
        2 5 10 15; 2 5 12 16; 2 6 7 8; 2 6 7 15; 2 6 8 13; 2 6 10 15; 2 7 8 12; 2 8 9 13; 2 9 11 13
        2 9 11 14; 3 4 6 12; 3 4 6 13; 3 4 7 13; 3 4 12 16; 3 5 6 11; 3 5 6 13; 3 5 10 13; 3 5 10 15
        3 5 11 15; 3 6 11 12; 3 7 10 13; 3 7 10 14; 3 8 9 15; 3 8 11 12; 3 8 11 15; 3 9 10 14; 3 9 10 15
        4 5 8 14; 4 5 9 12; 4 5 9 14; 4 5 12 16; 4 6 9 10; 4 6 9 12; 4 7 11 13; 4 7 11 15; 4 8 10 11
        4 8 10 14; 4 8 11 15; 4 9 10 14; 5 6 8 13; 5 6 8 14; 5 6 11 14; 5 7 9 11; 5 7 9 12; 5 7 11 15
        5 9 11 14; 6 7 8 14; 6 9 10 15; 7 8 10 12; 7 8 10 14; 7 9 11 13; 7 9 12 13; 7 10 12 13; 8 10 11 12
        """
    )
