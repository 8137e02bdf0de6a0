from __future__ import annotations

from functools import reduce

from hypothesis import assume, given
from hypothesis import strategies as st

from certify.simplicial import (
    Label,
    SimplicialComplex,
    alexander_dual,
    build,
    connected_sum,
    deletion,
    disjoint_union,
    full_subcomplex,
    join,
    link,
    mask_of,
    read_facets,
    skeleton,
    star,
    stellar_subdivision,
)
from tests.strategies import complexes, complexes_with_face, complexes_with_vertices, spheres
from tests.unit.simplicial.oracles import face_sets, reduced_homology, renumbered

NOTHING = SimplicialComplex.from_facets([[]])


def facets_in_labels(k: SimplicialComplex) -> list[list[Label]]:
    return [[k.labels[vertex] for vertex in facet] for facet in k.facets]


@given(complexes())
def test_the_facets_and_vertices_determine_a_complex(k: SimplicialComplex) -> None:
    assert SimplicialComplex.from_facets(reversed(facets_in_labels(k)), k.labels) == k
    assert SimplicialComplex.from_masks(k.labels, k.face_masks()) == k


@given(complexes(ghosts=False))
def test_without_ghosts_the_facets_alone_do(k: SimplicialComplex) -> None:
    text = "; ".join(" ".join(map(str, facet)) or "{}" for facet in facets_in_labels(k))
    assert k.ghosts() == ()
    assert SimplicialComplex.from_facets(facets_in_labels(k)) == k
    assert read_facets(text) == k


@given(complexes())
def test_the_missing_faces_determine_a_complex(k: SimplicialComplex) -> None:
    missing = [mask_of(face) for face in k.missing_faces()]
    faces = {mask for mask in range(1 << k.vertex_count) if all(mask & m != m for m in missing)}
    assert faces == set(k.face_masks())


@given(complexes())
def test_faces_are_closed_under_subsets(k: SimplicialComplex) -> None:
    faces = face_sets(k)
    assert all(face - {label} in faces for face in faces for label in face)
    assert all(k.is_face(face) for face in faces)


@given(complexes(), st.integers(-3, 3))
def test_f_and_h_are_the_same_polynomial(k: SimplicialComplex, x: int) -> None:
    """sum h_i x^(d-i) = sum f_(i-1) (x-1)^(d-i)."""
    d = k.dimension + 1
    f, h = k.f_vector(), k.h_vector()
    assert sum(h[i] * x ** (d - i) for i in range(d + 1)) == sum(f[i] * (x - 1) ** (d - i) for i in range(d + 1))


@given(complexes())
def test_the_euler_characteristic_by_cells_and_by_homology(k: SimplicialComplex) -> None:
    by_homology = sum((-1) ** degree * rank for degree, (rank, _) in reduced_homology(k).items())
    by_faces = sum((-1) ** (mask.bit_count() - 1) for mask in k.face_masks())
    assert by_faces == by_homology == k.euler_characteristic() - 1


@given(complexes(4), complexes(4))
def test_f_polynomials_multiply_under_joins(k: SimplicialComplex, other: SimplicialComplex) -> None:
    product = [0] * (k.dimension + other.dimension + 3)
    for i, a in enumerate(k.f_vector()):
        for j, b in enumerate(other.f_vector()):
            product[i + j] += a * b
    assert join(k, other).f_vector() == tuple(product)
    assert len(join(k, other).ghosts()) == len(k.ghosts()) + len(other.ghosts())


@given(complexes(4), complexes(4))
def test_missing_faces_of_a_join_lie_on_one_side(k: SimplicialComplex, other: SimplicialComplex) -> None:
    shifted = [tuple(vertex + k.vertex_count for vertex in face) for face in other.missing_faces()]
    assert sorted(join(k, other).missing_faces()) == sorted([*k.missing_faces(), *shifted])


@given(complexes(3), complexes(3), complexes(3))
def test_joins_are_associative_up_to_labels(
    k: SimplicialComplex, second: SimplicialComplex, third: SimplicialComplex
) -> None:
    left, right = join(join(k, second), third), join(k, join(second, third))
    assert renumbered(left) == renumbered(right)


@given(st.lists(complexes(3), max_size=4))
def test_joins_and_unions_of_many_are_made_of_those_of_two(complexes: list[SimplicialComplex]) -> None:
    assert renumbered(join(*complexes)) == renumbered(reduce(join, complexes, NOTHING))
    assert renumbered(disjoint_union(*complexes)) == renumbered(reduce(disjoint_union, complexes, NOTHING))


@given(complexes(4), complexes(4))
def test_disjoint_unions_share_only_the_empty_face(k: SimplicialComplex, other: SimplicialComplex) -> None:
    union = disjoint_union(k, other)
    assert len(union.face_masks()) == len(k.face_masks()) + len(other.face_masks()) - 1
    assert union.euler_characteristic() == k.euler_characteristic() + other.euler_characteristic()
    assert full_subcomplex(renumbered(union), range(k.vertex_count)) == renumbered(k)


@given(complexes_with_vertices())
def test_full_subcomplexes_keep_the_faces_inside(drawn: tuple[SimplicialComplex, list[Label]]) -> None:
    k, labels = drawn
    part = full_subcomplex(k, labels)
    assert part.labels == tuple(label for label in k.labels if label in labels)
    assert face_sets(part) == {face for face in face_sets(k) if face <= set(labels)}
    assert deletion(k, [label for label in k.labels if label not in labels]) == part


@given(complexes_with_face())
def test_links_and_stars_by_the_definition(drawn: tuple[SimplicialComplex, list[Label]]) -> None:
    k, labels = drawn
    face, faces = frozenset(labels), face_sets(k)
    assert face_sets(star(k, labels)) == {other for other in faces if other | face in faces}
    assert face_sets(link(k, labels)) == {other for other in faces if not other & face and other | face in faces}
    assert star(k, labels).labels == k.labels
    assert link(k, labels).labels == tuple(label for label in k.labels if label not in face)


@given(complexes_with_face(), st.data())
def test_the_link_of_a_face_in_a_link_is_a_link(
    drawn: tuple[SimplicialComplex, list[Label]], data: st.DataObject
) -> None:
    k, labels = drawn
    cut = data.draw(st.integers(0, len(labels)))
    assert link(link(k, labels[:cut]), labels[cut:]) == link(k, labels)


@given(complexes_with_face())
def test_a_star_is_the_join_of_the_face_and_its_link(drawn: tuple[SimplicialComplex, list[Label]]) -> None:
    k, labels = drawn
    joined = join(SimplicialComplex.from_facets([labels]), link(k, labels))
    assert face_sets(joined) == face_sets(star(k, labels))


@given(complexes_with_face())
def test_star_and_deletion_of_a_vertex_meet_in_its_link(drawn: tuple[SimplicialComplex, list[Label]]) -> None:
    k, labels = drawn
    assume(labels)
    vertex = labels[:1]
    around, without = face_sets(star(k, vertex)), face_sets(deletion(k, vertex))
    assert around | without == face_sets(k)
    assert around & without == face_sets(link(k, vertex))


@given(complexes(), st.integers(-1, 6))
def test_a_skeleton_has_the_small_faces(k: SimplicialComplex, dimension: int) -> None:
    small = skeleton(k, dimension)
    assert small.labels == k.labels
    assert face_sets(small) == {face for face in face_sets(k) if len(face) <= dimension + 1}


@given(complexes())
def test_the_alexander_dual_by_the_definition_and_twice(k: SimplicialComplex) -> None:
    assume(k.missing_faces())
    dual, everything, faces = alexander_dual(k), (1 << k.vertex_count) - 1, set(k.face_masks())
    assert set(dual.face_masks()) == {everything & ~mask for mask in range(1 << k.vertex_count) if mask not in faces}
    assert alexander_dual(dual) == k


@given(complexes())
def test_alexander_duality(k: SimplicialComplex) -> None:
    """Reduced H_i of the dual is reduced H^(m-i-3) of K, which has the torsion of H_(m-i-4)."""
    assume(k.missing_faces())
    m, homology, dual = k.vertex_count, reduced_homology(k), reduced_homology(alexander_dual(k))
    for i in range(-1, m):
        rank, torsion = homology.get(m - i - 3, (0, ()))[0], homology.get(m - i - 4, (0, ()))[1]
        assert dual.get(i, (0, ())) == (rank, torsion)


@given(complexes(4), complexes(4))
def test_the_alexander_dual_of_a_join(k: SimplicialComplex, other: SimplicialComplex) -> None:
    """A set is no face of K * L when its part in K or in L is none: (K * L)^ is K^ * D(L) together with D(K) * L^."""
    assume(k.missing_faces() and other.missing_faces())
    left, right = renumbered(k), other.relabelled(range(k.vertex_count, k.vertex_count + other.vertex_count))
    expected = [set(facet) | set(right.labels) for facet in facets_in_labels(alexander_dual(left))]
    expected += [set(left.labels) | set(facet) for facet in facets_in_labels(alexander_dual(right))]
    labels = left.labels + right.labels
    assert alexander_dual(join(left, right)) == SimplicialComplex.from_facets(expected, labels)


@given(spheres(), spheres(), st.data())
def test_connected_sums_by_the_definition(k: SimplicialComplex, other: SimplicialComplex, data: st.DataObject) -> None:
    other = other.relabelled([f"v{label}" for label in other.labels])
    ours = data.draw(st.sampled_from(facets_in_labels(k)))
    theirs = data.draw(st.sampled_from(facets_in_labels(other)))
    assume(ours and len(ours) == len(theirs))
    moved = dict(zip(theirs, data.draw(st.permutations(ours)), strict=True))
    found = connected_sum(k, other, moved.values(), moved.keys())
    image = {frozenset(moved.get(label, label) for label in face) for face in face_sets(other)}
    assert face_sets(found) == (face_sets(k) | image) - {frozenset(ours)}
    assert reduced_homology(found) == reduced_homology(k)


@given(spheres(), st.data())
def test_a_connected_sum_with_the_boundary_of_a_simplex_subdivides_a_facet(
    k: SimplicialComplex, data: st.DataObject
) -> None:
    facet = data.draw(st.sampled_from(facets_in_labels(k)))
    assume(len(facet) >= 2)
    simplex = build("simplex-boundary", m=len(facet) + 1).relabelled([f"v{i}" for i in range(len(facet) + 1)])
    apex = simplex.labels[-1]
    assert connected_sum(k, simplex, facet, simplex.labels[:-1]) == stellar_subdivision(k, facet, apex)
