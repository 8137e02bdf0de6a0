"""Theorems about actions, on random complexes with random symmetries."""

from __future__ import annotations

from collections import Counter
from functools import partial
from itertools import product as words
from typing import Any

import networkx as nx
from hypothesis import assume, given
from hypothesis import strategies as st
from networkx.algorithms.isomorphism import GraphMatcher, categorical_node_match
from sympy.combinatorics import Permutation, PermutationGroup

from certify.claims.actions import ActionClaim
from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.branching import BranchingClaim
from certify.claims.characters import CharacterClaim
from certify.claims.equivariance import EquivarianceClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.surfaces import SurfaceClaim
from certify.errors import ClaimIsFalse
from certify.exact import adapted_basis
from certify.products import PolyhedralProduct, cell_complex
from certify.simplicial import SimplicialComplex, build
from certify.symmetry.counting import colouring_orbits
from certify.symmetry.elements import Element, after, generated_group, identity, inverse, orbit
from certify.symmetry.orbit_spaces import OrbitSpace
from tests.helpers import certified_statement, disc_product, product_of
from tests.strategies import symmetric_complexes

Acted = tuple[SimplicialComplex, tuple[Element, ...]]
PAIRS = ["(D1, S0)", "(D2, S1)", "(D3, S2)", "(S1, *)", "(S2, *)", "(CP2, *)", "(RP2, *)", "(RP3, *)", "(cone 3, 3)"]


def images_of(backs: list[Element], word: str) -> list[str]:
    """Return the words that are got by moving the letters of a word, where elements are given by their inverses."""
    return ["".join(word[place - 1] for place in back) for back in backs]


def automorphisms(product: PolyhedralProduct) -> tuple[Element, ...]:
    """Return the automorphisms of K that preserve the pairs, as networkx finds them."""
    graph: nx.Graph[Any] = nx.Graph()
    for vertex, pair in enumerate(product.pairs):
        graph.add_node(vertex, kind=pair.name)
    for facet in product.complex.facets:
        graph.add_node(facet, kind="facet")
        graph.add_edges_from((facet, vertex) for vertex in facet)
    found = GraphMatcher(graph, graph, categorical_node_match("kind", "")).isomorphisms_iter()
    return tuple(tuple(image[vertex] + 1 for vertex in range(product.complex.vertex_count)) for image in found)


def top_of(product: PolyhedralProduct) -> int:
    """Return the largest degree of a cell."""
    return len(cell_complex(product).sizes) - 1


def character(product: PolyhedralProduct, degree: int, generators: tuple[Element, ...], **more: Any) -> dict[Any, int]:
    """Return a certified character, by the elements that stand for their classes."""
    statement = certified_statement(CharacterClaim(product, degree, generators, **more))
    return dict(zip(map(tuple, statement["elements"]), map(int, statement["values"]), strict=True))


def alternating(product: PolyhedralProduct, generators: tuple[Element, ...]) -> Counter[Element]:
    """Return the alternating sum of the traces over all degrees."""
    total: Counter[Element] = Counter()
    for degree in range(top_of(product) + 1):
        for element, value in character(product, degree, generators).items():
            total[element] += (-1) ** degree * value
    return total


def euler_of_groups(statement: dict[str, Any]) -> int:
    """Return the Euler characteristic of groups that a statement lists."""
    return sum((-1) ** k * int(rank) for k, rank, _ in statement["groups"])


@given(symmetric_complexes(max_vertices=4))
def test_all_automorphisms_are_the_group_that_networkx_lists(acted: Acted) -> None:
    """A claim about all automorphisms says what one says that lists them all."""
    k, _ = acted
    product = disc_product(k, 1)
    listed = automorphisms(product)
    classes = CharacterClaim(product, 1, None).elements
    for every, these in (
        (FixedSetClaim(product, generators=None), FixedSetClaim(product, generators=listed)),
        (OrbitSpaceClaim(k, None), OrbitSpaceClaim(k, listed)),
        (OrbitCountClaim(k, 3), OrbitCountClaim(k, 3, listed)),
        (CharacterClaim(product, 1, None), CharacterClaim(product, 1, listed, classes)),
    ):
        assert certified_statement(every) == certified_statement(these) | {"generators": None}


@given(symmetric_complexes(max_vertices=4, signs=True))
def test_lefschetz(acted: Acted) -> None:
    """The alternating sum of the traces is the Euler characteristic of the fixed set (Hopf and Lefschetz)."""
    k, generators = acted
    product = disc_product(k, 1)
    for element, value in alternating(product, generators).items():
        statement = certified_statement(FixedSetClaim(product, generators=(element,)))
        assert euler_of_groups(statement) == value


@given(symmetric_complexes(max_vertices=4), st.sampled_from(PAIRS))
def test_lefschetz_for_other_pairs(acted: Acted, pair: str) -> None:
    k, (element, *_) = acted
    product = product_of(k, pair)
    assume(sum(cell_complex(product).sizes) < 400)
    statement = certified_statement(FixedSetClaim(product, generators=(element,)))
    assert alternating(product, (element,))[element] == euler_of_groups(statement)


@given(symmetric_complexes(max_vertices=4), st.sampled_from(PAIRS), st.integers(0, 6))
def test_characters_by_blocks_and_by_cells_agree(acted: Acted, pair: str, degree: int) -> None:
    """The splitting is equivariant: traces on blocks add up to traces on the whole product."""
    k, generators = acted
    product = product_of(k, pair)
    assume(sum(cell_complex(product).sizes) < 400)
    assert character(product, degree, generators) == character(product, degree, generators, route="cells")


@given(symmetric_complexes(max_vertices=4, signs=True), st.integers(0, 3))
def test_signed_characters_by_blocks_and_by_cells_agree(acted: Acted, degree: int) -> None:
    k, generators = acted
    product = disc_product(k, 1)
    assert character(product, degree, generators) == character(product, degree, generators, route="cells")


@given(symmetric_complexes(max_vertices=4), st.integers(0, 3))
def test_a_character_is_the_sum_of_those_on_orbits_of_summands(acted: Acted, degree: int) -> None:
    """The blocks of an orbit of sets of vertices are a part of homology of their own."""
    k, generators = acted
    product = disc_product(k, 1)
    backs = [inverse(generator) for generator in generators]
    left = {"".join(word) for word in words("01", repeat=k.vertex_count)}
    total: Counter[Element] = Counter()
    while left:
        word = min(left)
        left -= set(orbit(word, partial(images_of, backs)))
        total.update(character(product, degree, generators, summands=(word,)))
    whole = character(product, degree, generators)
    assert {element: total[element] for element in whole} == whole


@given(symmetric_complexes(max_vertices=4, signs=True), st.integers(0, 2))
def test_matrices_on_homology_multiply(acted: Acted, degree: int) -> None:
    k, generators = acted
    product = disc_product(k, 1)
    first, second = generators[0], generators[-1]

    def matrix(element: Element) -> list[list[int]]:
        found: list[list[int]] = certified_statement(ActionClaim(product, degree, element))["matrix"]
        return found

    left, right = matrix(second), matrix(first)
    whole = [[sum(x * right[i][j] for i, x in enumerate(row)) for j in range(len(left))] for row in left]
    assert whole == matrix(after(second, first))


@given(symmetric_complexes(max_vertices=4, signs=True))
def test_rational_homology_of_an_orbit_space_is_the_invariant_part(acted: Acted) -> None:
    """The rank of H_k(X/G) is the inner product of the character on H_k with 1 (the transfer)."""
    k, generators = acted
    product = disc_product(k, 1)
    groups = certified_statement(OrbitSpaceClaim(k, generators))["groups"]
    ranks = {degree: rank for degree, rank, _ in groups}
    for degree in range(top_of(product) + 1):
        claim = CharacterClaim(product, degree, generators)
        ones = {"trivial": (1,) * len(claim.elements or ())}
        statement = certified_statement(CharacterClaim(product, degree, generators, claim.elements, {}, ones))
        assert statement["products"] == [[ranks.get(degree, 0), 1]]


@given(symmetric_complexes(max_vertices=4, signs=True))
def test_the_euler_characteristic_of_an_orbit_space_is_the_mean_of_those_of_fixed_sets(acted: Acted) -> None:
    """Burnside's lemma, cell by cell."""
    k, generators = acted
    group = generated_group(generators, k.vertex_count)
    assume(len(group) <= 48)
    product = disc_product(k, 1)
    total = sum(
        euler_of_groups(certified_statement(FixedSetClaim(product, generators=(element,)))) for element in group
    )
    assert total == len(group) * euler_of_groups(certified_statement(OrbitSpaceClaim(k, generators)))


@given(symmetric_complexes(max_vertices=3, signs=True))
def test_cells_and_chains_give_the_same_orbit_space(acted: Acted) -> None:
    k, generators = acted
    cells = OrbitSpace(disc_product(k, 1), generators)
    chains = OrbitSpace(disc_product(k, 1), generators, always_chains=True)
    assert chains.on_chains
    assert cells.euler_characteristic() == chains.euler_characteristic()
    groups = [adapted_basis(space.chains()).homology() for space in (cells, chains)]
    assert groups[0] == groups[1]


@given(symmetric_complexes(max_vertices=4))
def test_the_fixed_set_is_made_of_the_cells_that_are_fixed(acted: Acted) -> None:
    """The chains of invariant cells are the barycentric subdivision of the fixed set."""
    k, generators = acted
    space = OrbitSpace(disc_product(k, 1), generators, always_chains=True)
    size = len(space.group)
    levels = [[cell for cell in level if len(space.isotropy.get(cell, "1")) == size] for level in space.cells]
    statement = certified_statement(FixedSetClaim(disc_product(k, 1), generators=generators))
    assert euler_of_groups(statement) == sum((-1) ** degree * len(level) for degree, level in enumerate(levels))
    graph: nx.Graph[Any] = nx.Graph()
    graph.add_nodes_from(cell[0] for cell in levels[0])
    graph.add_edges_from((near, far) for near, far in (levels[1] if len(levels) > 1 else []))
    assert statement["components"] == nx.number_connected_components(graph)
    assert statement["points"] == (None if graph.edges else len(graph))


@given(symmetric_complexes(max_vertices=4), st.sampled_from(PAIRS), st.integers(0, 4))
def test_the_splitting_is_one_of_representations(acted: Acted, pair: str, degree: int) -> None:
    """By the proposition in docs/mathematics.md, section 12.3, the claim is always true; here for random symmetries."""
    k, generators = acted
    product = product_of(k, pair)
    statement = certified_statement(EquivarianceClaim(product, degree, generators))
    assert statement["values"] == list(character(product, degree, generators).values())


@given(symmetric_complexes(max_vertices=4, signs=True))
def test_isotropy_groups_are_those_of_the_points(acted: Acted) -> None:
    """Of each middle of a cell the isotropy group is listed, and its orbit is counted with one class of subgroups."""
    k, generators = acted
    try:
        found = certified_statement(BranchingClaim(k, generators))["orbits"]
    except ClaimIsFalse:
        assume(False)
    group = generated_group(generators, k.vertex_count)
    points = [point for point in words((-1, 0, 1), repeat=k.vertex_count) if k.is_face(support_of(point))]
    classes: Counter[frozenset[frozenset[Element]]] = Counter()
    left = set(points)
    while left:
        point = left.pop()
        left -= {moved_point(point, g) for g in group}
        fixing = [g for g in group if moved_point(point, g) == point]
        if len(fixing) > 1:
            classes[frozenset(frozenset(after(after(g, x), inverse(g)) for x in fixing) for g in group)] += 1
    for by, order, number in found:
        own = frozenset(generated_group([tuple(x) for x in by], k.vertex_count))
        (alike,) = [subgroups for subgroups in classes if own in subgroups]
        assert (len(own), classes.pop(alike)) == (order, number)
    assert not classes


def support_of(point: tuple[int, ...]) -> list[int]:
    """Return the vertices at which a point of a cube is inside the interval."""
    return [vertex for vertex, x in enumerate(point, 1) if x == 0]


def moved_point(point: tuple[int, ...], element: Element) -> tuple[int, ...]:
    """Return the image of a point of a cube."""
    image = [0] * len(point)
    for x, to in zip(point, element, strict=True):
        image[abs(to) - 1] = x if to > 0 else -x
    return tuple(image)


@given(symmetric_complexes(max_vertices=5))
def test_groups_are_those_of_sympy(acted: Acted) -> None:
    k, generators = acted
    group = PermutationGroup([Permutation([image - 1 for image in element]) for element in generators])
    statement = certified_statement(AutomorphismsClaim(disc_product(k, 1), generators))
    assert statement["order"] == group.order()
    assert statement["orbits"]["vertices"] == len(group.orbits())


@given(symmetric_complexes(max_vertices=5), st.booleans())
def test_the_full_group_is_counted_by_networkx(acted: Acted, mixed: bool) -> None:
    """Automorphisms of K with pairs are automorphisms of the coloured graph of vertices and facets."""
    k, _ = acted
    product = disc_product(k, [1 + mixed * (vertex % 2) for vertex in range(k.vertex_count)])
    assert certified_statement(AutomorphismsClaim(product))["order"] == len(automorphisms(product))


@given(symmetric_complexes(max_vertices=5), st.integers(1, 3))
def test_orbits_on_colourings_are_counted_one_by_one(acted: Acted, colours: int) -> None:
    k, generators = acted
    group = generated_group(generators, k.vertex_count)
    backs = [inverse(element) for element in group]
    left = set(words(range(colours), repeat=k.vertex_count))
    contents: Counter[tuple[int, ...]] = Counter()
    orbits = primitive = 0
    while left:
        colouring = next(iter(left))
        images = {tuple(colouring[i - 1] for i in back) for back in backs}
        left -= images
        orbits += 1
        primitive += len(images) == len(group)
        contents[tuple(colouring.count(colour) for colour in range(colours))] += 1
    statement = certified_statement(OrbitCountClaim(k, colours, generators))
    assert (statement["orbits"], statement["primitive"]) == (orbits, primitive)
    for content, number in contents.items():
        assert colouring_orbits(group, colours, content)[0] == number


@given(st.integers(3, 6), st.data())
def test_a_surface_has_the_homology_of_one(n: int, data: st.DataObject) -> None:
    """Quotients of polygon surfaces: H_2 = ℤ if it is closed and orientable; H_1 by the classification of surfaces."""
    k = build("polygon", n=n)
    turn, flip = (*range(2, n + 1), 1), (1, *range(n, 1, -1))
    signs = data.draw(st.lists(st.sampled_from((1, -1)), min_size=n, max_size=n))
    given_ones = [turn, flip, tuple(s * v for s, v in zip(signs, identity(n), strict=True))]
    generators = tuple(data.draw(st.lists(st.sampled_from(given_ones), max_size=2, unique=True)))
    try:
        surface = certified_statement(SurfaceClaim(k, generators))
    except ClaimIsFalse:
        assume(False)
    found = certified_statement(OrbitSpaceClaim(k, generators))["groups"]
    groups = {degree: (rank, torsion) for degree, rank, torsion in found}
    closed = surface["boundary"] == 0
    assert groups[0] == (1, [])
    assert groups.get(2, (0, []))[0] == int(closed and surface["orientable"])
    assert groups.get(1, (0, []))[1] == ([2] if closed and not surface["orientable"] else [])
    assert surface["euler"] == sum((-1) ** degree * rank for degree, (rank, _) in groups.items())


@given(st.integers(3, 7), st.integers(1, 6))
def test_riemann_and_hurwitz(n: int, r: int) -> None:
    """χ(X) = |G| χ(X/G) - Σ (|G| - |G|/e), with all three from certificates."""
    k = build("polygon", n=n)
    element = tuple((vertex + r) % n + 1 for vertex in range(n))
    assume(element != identity(n))
    size = len(generated_group([element], n))
    upstairs, downstairs = (certified_statement(SurfaceClaim(k, g))["euler"] for g in ((), (element,)))
    orbits = certified_statement(BranchingClaim(k, (element,)))["orbits"]
    assert upstairs == size * downstairs - sum(number * (size - size // e) for _, e, number in orbits)
