"""Every Hypothesis strategy of the tests."""

from __future__ import annotations

from hypothesis import strategies as st

from certify.simplicial import Label, SimplicialComplex, face_of

__all__ = ["complexes", "complexes_with_face", "complexes_with_vertices"]


# -- simplicial complexes -----------------------------------------------------------------------


@st.composite
def complexes(draw: st.DrawFn, max_vertices: int = 6, ghosts: bool = True) -> SimplicialComplex:
    """Draw a complex on vertices 1, ..., m; the simplest is the one without vertices, whose only face is empty.

    Without `ghosts`, every vertex that no drawn facet uses becomes a point.
    """
    m = draw(st.integers(0, max_vertices))
    # Small numbers are simple for Hypothesis, and so are faces with few vertices and low numbers.
    masks = draw(st.lists(st.integers(0, 2**m - 1), max_size=2 * m))
    points = [] if ghosts else [1 << vertex for vertex in range(m)]
    return SimplicialComplex.from_masks(range(1, m + 1), [0, *masks, *points])


@st.composite
def complexes_with_face(draw: st.DrawFn, max_vertices: int = 6) -> tuple[SimplicialComplex, list[Label]]:
    """Draw a complex and the labels of one of its faces, perhaps the empty one."""
    k = draw(complexes(max_vertices))
    face = face_of(draw(st.sampled_from(k.face_masks())))
    return k, [k.labels[vertex] for vertex in face]


@st.composite
def complexes_with_vertices(draw: st.DrawFn, max_vertices: int = 6) -> tuple[SimplicialComplex, list[Label]]:
    """Draw a complex and the labels of some of its vertices, perhaps none, in any order."""
    k = draw(complexes(max_vertices))
    chosen = draw(st.permutations(k.labels))
    return k, list(chosen[: draw(st.integers(0, len(chosen)))])
