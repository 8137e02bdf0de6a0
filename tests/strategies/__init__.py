"""Every Hypothesis strategy of the tests."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable
from itertools import combinations
from math import gcd, prod

import networkx as nx
from hypothesis import assume
from hypothesis import strategies as st

from certify.exact import AbelianGroup, BasedComplex
from certify.products import Pair, PolyhedralProduct, parse_pair
from certify.products.real_toric import RealToricSpace
from certify.simplicial import Label, SimplicialComplex, build, face_of, join
from certify.symmetry.elements import Element, moved_mask, orbit
from tests.helpers import disc_dimensions

__all__ = [
    "NAMED_PAIRS",
    "based_complexes",
    "complexes",
    "complexes_with_face",
    "complexes_with_large_face",
    "complexes_with_multiplicities",
    "complexes_with_parts",
    "complexes_with_torsion",
    "complexes_with_vertices",
    "connected_graphs",
    "cyclic_orders",
    "disc_products",
    "disc_products_with_torsion",
    "graphs",
    "graphs_with_groups",
    "integer_matrices",
    "mixed_products",
    "own_pairs",
    "products_with_degrees",
    "real_toric_spaces",
    "relabelled_mixed_products",
    "relabelled_products",
    "signed_permutations",
    "sphere_products",
    "spheres",
    "summand_bases",
    "symmetric_complexes",
    "twisted_pairs",
    "unimodular_matrices",
]


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


@st.composite
def complexes_with_large_face(draw: st.DrawFn, max_vertices: int = 6) -> tuple[SimplicialComplex, list[Label]]:
    """Draw a complex and the labels of a face with at least two vertices."""
    k = draw(complexes(max_vertices - 2))
    chosen = face_of(draw(st.integers(0, 2**max_vertices - 1).filter(lambda mask: mask.bit_count() >= 2)))
    labels = range(1, max(k.vertex_count, chosen[-1] + 1) + 1)
    return SimplicialComplex.from_faces(labels, [*k.facets, chosen]), [vertex + 1 for vertex in chosen]


@st.composite
def complexes_with_multiplicities(draw: st.DrawFn, max_vertices: int = 4) -> tuple[SimplicialComplex, list[int]]:
    """Draw a complex and a whole number from 1 to 3 for each of its vertices."""
    k = draw(complexes(max_vertices))
    return k, draw(st.lists(st.integers(1, 3), min_size=k.vertex_count, max_size=k.vertex_count))


@st.composite
def complexes_with_parts(draw: st.DrawFn, max_vertices: int = 3) -> tuple[SimplicialComplex, list[SimplicialComplex]]:
    """Draw a complex and another one for each of its vertices."""
    k = draw(complexes(max_vertices))
    return k, draw(st.lists(complexes(max_vertices), min_size=k.vertex_count, max_size=k.vertex_count))


# -- graphs -------------------------------------------------------------------------------------


@st.composite
def graphs(draw: st.DrawFn, max_nodes: int = 7) -> nx.Graph[int]:
    """Draw a graph on nodes 1, ..., n in any order, perhaps without nodes or edges."""
    nodes = draw(st.permutations(range(1, draw(st.integers(0, max_nodes)) + 1)))
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(nodes)
    graph.add_edges_from(pair for pair in combinations(nodes, 2) if draw(st.booleans()))
    return graph


@st.composite
def connected_graphs(draw: st.DrawFn, max_nodes: int = 5) -> nx.Graph[int]:
    """Draw a connected graph on nodes 1, ..., n, at least one of them: a tree with more edges."""
    n = draw(st.integers(1, max_nodes))
    graph: nx.Graph[int] = nx.Graph()
    graph.add_nodes_from(range(1, n + 1))
    graph.add_edges_from((draw(st.integers(1, node - 1)), node) for node in range(2, n + 1))
    graph.add_edges_from(pair for pair in combinations(range(1, n + 1), 2) if draw(st.booleans()))
    return graph


# -- abelian groups and integer matrices --------------------------------------------------------


def orders() -> st.SearchStrategy[int]:
    """Draw the order of a cyclic group: 1, a small number with divisors in common with others, or a huge one."""
    return st.integers(1, 12) | st.sampled_from([16, 27, 36, 60, 2**61 - 1, 10**18, 2**40 * 3**20])


def cyclic_orders() -> st.SearchStrategy[list[int]]:
    """Draw the orders of the summands of a finite abelian group, in any order, some perhaps 1."""
    return st.lists(orders(), max_size=6)


def coefficients() -> st.SearchStrategy[int]:
    """Draw an integer: mostly small, at times far beyond the size of a machine word."""
    return st.integers(-3, 3) | st.integers(-3, 3) | st.sampled_from([2**64 + 1, -(10**30)])


@st.composite
def integer_matrices(draw: st.DrawFn, max_size: int = 4) -> list[list[int]]:
    """Draw a matrix with at least one row and one column."""
    rows, columns = draw(st.integers(1, max_size)), draw(st.integers(1, max_size))
    line = st.lists(coefficients(), min_size=columns, max_size=columns)
    return draw(st.lists(line, min_size=rows, max_size=rows))


@st.composite
def unimodular_matrices(draw: st.DrawFn, max_size: int = 4) -> list[list[int]]:
    """Draw a square matrix of determinant 1 or -1, perhaps 0×0."""
    size = draw(st.integers(0, max_size))
    matrix = [[int(i == j) for j in range(size)] for i in range(size)]
    for i, j, factor in draw(_moves(size)):
        matrix[i] = [a + factor * b for a, b in zip(matrix[i], matrix[j], strict=True)]
    signs = draw(st.lists(st.sampled_from([1, -1]), min_size=size, max_size=size))
    rows = draw(st.permutations(matrix))
    return [[sign * entry for entry in row] for sign, row in zip(signs, rows, strict=True)]


@st.composite
def summand_bases(draw: st.DrawFn) -> tuple[list[dict[int, int]], int]:
    """Draw a basis of a direct summand of ℤ^n, mostly without entries ±1, and n.

    Vectors (p, q) with p and q coprime, on cells of their own, are disguised by changes of the basis of ℤ^n and by
    adding vectors to others; both keep the summand one.
    """
    coprime = st.sampled_from([(2, 3), (5, 3), (4, -9), (6, 35), (10, 7), (0, 1), (1, 4)])
    parts = draw(st.lists(coprime, max_size=3))
    size = 2 * len(parts) + draw(st.integers(0, 2))
    rows = [[0] * len(parts) for _ in range(size)]
    for number, (p, q) in enumerate(parts):
        rows[2 * number][number], rows[2 * number + 1][number] = p, q
    factors = st.integers(-7, 7)
    for _ in range(draw(st.integers(0, 4)) if size > 1 else 0):
        i, j = draw(st.permutations(range(size)))[:2]
        factor = draw(factors)
        rows[i] = [a + factor * b for a, b in zip(rows[i], rows[j], strict=True)]
    columns = [list(column) for column in zip(*rows, strict=True)]
    for _ in range(draw(st.integers(0, 2)) if len(columns) > 1 else 0):
        i, j = draw(st.permutations(range(len(columns))))[:2]
        factor = draw(factors)
        columns[i] = [a + factor * b for a, b in zip(columns[i], columns[j], strict=True)]
    return [{cell: x for cell, x in enumerate(column) if x} for column in columns], size


@st.composite
def _moves(draw: st.DrawFn, size: int) -> list[tuple[int, int, int]]:
    """Draw (i, j, factor) for all i ≠ j: a factor for each elementary matrix."""
    places = [(i, j) for i in range(size) for j in range(size) if i != j]
    factors = draw(st.lists(coefficients(), min_size=len(places), max_size=len(places)))
    return [(i, j, factor) for (i, j), factor in zip(places, factors, strict=True) if factor]


# -- based complexes ----------------------------------------------------------------------------


@st.composite
def based_complexes(
    draw: st.DrawFn, max_degree: int = 3, max_pieces: int = 8
) -> tuple[BasedComplex, tuple[AbelianGroup, ...]]:
    """Draw a based complex together with its homology, degree by degree.

    It starts as a sum of pieces ℤ and ℤ --e--> ℤ, of which the homology can be read off, and is disguised by random
    changes of the basis in each degree.
    """
    top = draw(st.integers(0, max_degree))
    lone = st.tuples(st.integers(0, top), st.just(0))
    joined = st.tuples(st.integers(1, max(top, 1)), orders())
    pieces = draw(st.lists(lone | joined if top else lone, max_size=max_pieces))
    boundaries, homology = _elementary(top, pieces)
    for degree in range(top + 1):
        _change_basis(draw, boundaries, degree)
    columns = [[tuple(enumerate(column)) for column in boundary] for boundary in boundaries]
    return BasedComplex.from_columns(columns), homology


def _elementary(top: int, pieces: list[tuple[int, int]]) -> tuple[list[list[list[int]]], tuple[AbelianGroup, ...]]:
    """Return the boundaries, as lists of dense columns, and the homology of a sum of pieces (degree, e)."""
    sizes = [0] * (top + 1)
    ranks = [0] * (top + 1)
    torsion: list[list[int]] = [[] for _ in sizes]
    joins = []
    for degree, e in pieces:
        if e:
            joins.append((degree, sizes[degree], sizes[degree - 1], e))
            sizes[degree - 1] += 1
            torsion[degree - 1].append(e)
        else:
            ranks[degree] += 1
        sizes[degree] += 1
    boundaries = [[[0] * (sizes[k - 1] if k else 0) for _ in range(sizes[k])] for k in range(top + 1)]
    for degree, column, row, e in joins:
        boundaries[degree][column][row] = e
    return boundaries, tuple(map(AbelianGroup.of, ranks, torsion))


def _change_basis(draw: st.DrawFn, boundaries: list[list[list[int]]], degree: int) -> None:
    """Add multiples of cells to other cells of a degree, change signs and shuffle them."""
    size = len(boundaries[degree])
    above = boundaries[degree + 1] if degree + 1 < len(boundaries) else []
    for i, j, factor in draw(_moves(size)):
        # Cell i becomes cell i + factor · cell j, so the old cell i is the new one minus factor · cell j.
        own = boundaries[degree]
        own[i] = [a + factor * b for a, b in zip(own[i], own[j], strict=True)]
        for column in above:
            column[j] -= factor * column[i]
    order = draw(st.permutations(range(size)))
    signs = draw(st.lists(st.sampled_from([1, -1]), min_size=size, max_size=size))
    boundaries[degree][:] = [[signs[i] * a for a in boundaries[degree][i]] for i in order]
    for column in above:
        column[:] = [signs[i] * column[i] for i in order]


# -- polyhedral products ------------------------------------------------------------------------


@st.composite
def complexes_with_torsion(draw: st.DrawFn) -> SimplicialComplex:
    """Draw a projective plane on shuffled vertices, with a cone over some of it and perhaps a ghost.

    The plane is a full subcomplex, so that every polyhedral product of disc pairs over the complex has torsion.
    """
    order = draw(st.permutations(range(6)))
    plane = [[order[vertex] for vertex in facet] for facet in build("projective-plane").facets]
    cone = draw(st.lists(st.sampled_from([face for facet in plane for face in (facet, facet[:2])]), max_size=4))
    vertices = 6 + bool(cone) + draw(st.integers(0, 1))
    return SimplicialComplex.from_faces(range(1, vertices + 1), plane + [[*face, 6] for face in cone])


@st.composite
def disc_products(draw: st.DrawFn, max_vertices: int = 5, max_n: int = 3) -> PolyhedralProduct:
    """Draw a polyhedral product of disc pairs, one pair for each vertex, over a complex that may have ghosts."""
    return draw(_with_pairs(draw(complexes(max_vertices)), max_n))


@st.composite
def disc_products_with_torsion(draw: st.DrawFn, max_n: int = 3) -> PolyhedralProduct:
    """Draw a polyhedral product of disc pairs that has torsion in its homology."""
    return draw(_with_pairs(draw(complexes_with_torsion()), max_n))


@st.composite
def spheres(draw: st.DrawFn) -> SimplicialComplex:
    """Draw a complex on at most 8 vertices that triangulates a sphere; the empty one is the sphere of dimension -1."""
    boundaries = [build("simplex-boundary", m=m) for m in range(1, 6)]
    polygons = [build("polygon", n=n) for n in range(3, 8)]
    cross_polytopes = [build("cross-polytope", n=n) for n in range(4)]
    cyclic_polytopes = [build("cyclic-polytope", m=m, d=d) for d in range(2, 5) for m in range(d + 1, 9)]
    k = draw(st.sampled_from(boundaries + polygons + cross_polytopes + cyclic_polytopes))
    small = k.vertex_count < 4
    return join(k, draw(st.sampled_from(boundaries[:4]))) if small and draw(st.booleans()) else k


def _with_pairs(k: SimplicialComplex, max_n: int) -> st.SearchStrategy[PolyhedralProduct]:
    disc = st.integers(1, max_n).map(lambda n: parse_pair(f"(D{n}, S{n - 1})"))
    pairs = st.lists(disc, min_size=k.vertex_count, max_size=k.vertex_count)
    return pairs.map(lambda chosen: PolyhedralProduct(k, tuple(chosen)))


@st.composite
def sphere_products(draw: st.DrawFn, max_n: int = 3) -> PolyhedralProduct:
    """Draw a polyhedral product of disc pairs over a sphere; it is a closed manifold."""
    return draw(_with_pairs(draw(spheres()), max_n))


@st.composite
def products_with_degrees(draw: st.DrawFn) -> tuple[PolyhedralProduct, list[int]]:
    """Draw a product, and degrees in any order, some of which may lie above all its cells."""
    space = draw(disc_products() | disc_products_with_torsion(max_n=2))
    most = sum(disc_dimensions(space)) + 2
    return space, draw(st.lists(st.integers(0, most), min_size=1, max_size=4))


@st.composite
def relabelled_products(draw: st.DrawFn) -> tuple[PolyhedralProduct, PolyhedralProduct]:
    """Draw a product, and the same one with its vertices in another order."""
    return draw(_relabelled(draw(disc_products(max_vertices=6) | disc_products_with_torsion())))


@st.composite
def _relabelled(draw: st.DrawFn, space: PolyhedralProduct) -> tuple[PolyhedralProduct, PolyhedralProduct]:
    order = draw(st.permutations(range(space.complex.vertex_count)))
    place = {vertex: number for number, vertex in enumerate(order)}
    faces = [[place[vertex] for vertex in facet] for facet in space.complex.facets]
    labels = [space.complex.labels[vertex] for vertex in order]
    moved = SimplicialComplex.from_faces(labels, faces)
    return space, PolyhedralProduct(moved, tuple(space.pairs[vertex] for vertex in order))


# -- symmetries ---------------------------------------------------------------------------------


@st.composite
def signed_permutations(draw: st.DrawFn, m: int | None = None) -> Element:
    """Draw a signed permutation of m points, or of one to six."""
    size = draw(st.integers(1, 6)) if m is None else m
    image = draw(st.permutations(range(1, size + 1)))
    signs = draw(st.lists(st.sampled_from((1, -1)), min_size=size, max_size=size))
    return tuple(sign * to for sign, to in zip(signs, image, strict=True))


@st.composite
def symmetric_complexes(
    draw: st.DrawFn, max_vertices: int = 5, signs: bool = False
) -> tuple[SimplicialComplex, tuple[Element, ...]]:
    """Draw a complex with one or two symmetries of it, which may have signs; faces are drawn, and all their images."""
    m = draw(st.integers(1, max_vertices))
    generators = draw(st.lists(st.permutations(range(1, m + 1)).map(tuple), min_size=1, max_size=2))
    drawn = draw(st.lists(st.integers(0, 2**m - 1), max_size=3))
    masks = {0} | {mask for start in drawn for mask in orbit(start, lambda x: [moved_mask(x, g) for g in generators])}
    if signs:
        flips = st.lists(st.sampled_from((1, -1)), min_size=m, max_size=m)
        generators = [tuple(s * to for s, to in zip(draw(flips), g, strict=True)) for g in generators]
    return SimplicialComplex.from_masks(range(1, m + 1), sorted(masks)), tuple(generators)


@st.composite
def graphs_with_groups(draw: st.DrawFn) -> tuple[SimplicialComplex, tuple[Element, ...]]:
    """Draw a polygon, a random graph or any complex, with one or two symmetries with signs."""
    if draw(st.booleans()):
        k, generators = draw(symmetric_complexes(max_vertices=4, signs=True))
        return k, generators
    n = draw(st.integers(3, 6))
    turn, flip = (*range(2, n + 1), 1), (1, *range(n, 1, -1))
    steps = draw(st.just({1}) | st.sets(st.integers(1, n // 2), min_size=1))
    edges = {frozenset((i, (i + step - 1) % n + 1)) for i in range(1, n + 1) for step in steps}
    signs = [draw(st.lists(st.sampled_from((1, -1)), min_size=n, max_size=n)) for _ in range(2)]
    bases = draw(st.lists(st.sampled_from((turn, turn, flip, tuple(range(1, n + 1)))), min_size=1, max_size=2))
    generators = tuple(
        tuple(s * v for s, v in zip(sign, base, strict=True)) for sign, base in zip(signs, bases, strict=False)
    )
    return SimplicialComplex.from_facets(edges, vertices=range(1, n + 1)), generators


# -- pairs --------------------------------------------------------------------------------------

NAMED_PAIRS = (
    *("(D1, S0)", "(D2, S1)", "(D3, S2)", "(S1, *)", "(S2, *)", "(CP1, *)", "(CP2, *)", "(RP1, *)", "(RP2, *)"),
    *("(RP3, *)", "(cone 1, 1)", "(cone 2, 2)", "(cone 3, 3)", "(P2(3), *)", "(P3(2), *)"),
)
"""A pair of every form that has a name."""


Cells = list[tuple[int, bool, dict[int, int]]]
"""The cells of a pair: degree, whether it is outside A, and boundary on the numbers of other cells."""

_FREE = ("cell", "inner", "outer", "across")
_PIECES = st.sampled_from((*_FREE, "onto torsion", "from torsion", "torsion to torsion"))


@st.composite
def own_pairs(draw: st.DrawFn, torsion: bool = True) -> Pair:
    """Draw a pair by its cells: pieces on both sides of A, in another basis that respects A; A may be empty, or X.

    Without `torsion`, the homology of A and that of X relative to A are free.

    Adding multiples of earlier cells of the same degree to later ones, those of A to any, leaves d d = 0 and A closed,
    but hides the pieces.
    """
    cells: Cells = [(0, draw(st.booleans()), {})]
    for kind in draw(st.lists(_PIECES if torsion else st.sampled_from(_FREE), max_size=3)):
        if len(cells) < 6:
            cells += _piece(draw, kind, len(cells), torsion)
    return Pair.from_cells(_mixed(draw, cells))


@st.composite
def twisted_pairs(draw: st.DrawFn) -> Pair:
    """Draw a pair whose connecting homomorphism H_k(X, A) → H_{k-1}(A) reaches torsion, and more cells around it."""
    cells = _piece(draw, "onto torsion", 0)
    if draw(st.booleans()):
        cells += _piece(draw, draw(_PIECES), len(cells))
    return Pair.from_cells(_mixed(draw, cells))


def _piece(draw: st.DrawFn, kind: str, start: int, torsion: bool = True) -> Cells:
    """Draw the cells of a piece, numbered from `start`: one that splits no further, or cells e and t with d e = n t."""
    degree, n = draw(st.integers(0, 2)), draw(st.sampled_from((2, 1, 3, 4, 6)))
    t, e, f = start, start + 1, start + 2
    if kind == "cell":
        return [(degree, draw(st.booleans()), {})]
    if kind in ("inner", "outer", "across"):
        return [
            (degree, kind == "outer", {}),
            (degree + 1, kind != "inner", {t: n if torsion or kind == "across" else 1}),
        ]
    n = max(n, 2)
    c = draw(st.integers(1, n - 1))
    if kind == "onto torsion":
        # A cell outside A whose boundary is c times the generator of ℤ/n in H_k(A).
        return [(degree, False, {}), (degree + 1, False, {t: n}), (degree + 1, True, {t: c})]
    if kind == "from torsion":
        # H_k(X, A) is ℤ/n, but n times its generator t is bounded only together with c times the cycle e of A.
        return [(degree, True, {}), (degree, False, {}), (degree + 1, True, {t: n, e: c})]
    # H_{k+1}(X, A) is ℤ/m, with a generator f whose boundary is m' t in A, where H_k(A) is ℤ/n and n divides m m'.
    m = draw(st.sampled_from((2, 3, 4)))
    times = n // gcd(n, m)
    above = {f: m, e: -(m * times) // n}
    return [(degree, False, {}), (degree + 1, False, {t: n}), (degree + 1, True, {t: times}), (degree + 2, True, above)]


def _mixed(draw: st.DrawFn, cells: Cells) -> Cells:
    """Return the same complex in another basis: x' = x + c y for cells x, y of one degree, y in A if x is."""
    order = sorted(range(len(cells)), key=lambda number: (cells[number][0], cells[number][1]))
    place = {number: new for new, number in enumerate(order)}
    moved = [
        (cells[number][0], cells[number][1], {place[low]: n for low, n in cells[number][2].items()}) for number in order
    ]
    moves = [
        (x, y)
        for x, (degree, outside, _) in enumerate(moved)
        for y, (other, side, _) in enumerate(moved)
        if x != y and degree == other and side <= outside
    ]
    for _ in range(draw(st.integers(0, 5)) if moves else 0):
        x, y = draw(st.sampled_from(moves))
        c = draw(st.sampled_from((1, -1, 2, -3)))
        # x' = x + c y: d x' = d x + c d y, and in boundaries x = x' - c y.
        boundary = Counter(moved[x][2])
        for cell, n in moved[y][2].items():
            boundary[cell] += c * n
        moved[x] = (moved[x][0], moved[x][1], {cell: n for cell, n in boundary.items() if n})
        for number, (degree, outside, terms) in enumerate(moved):
            if x in terms:
                changed = Counter(terms)
                changed[y] -= c * terms[x]
                moved[number] = (degree, outside, {cell: n for cell, n in changed.items() if n})
    return moved


@st.composite
def mixed_products(draw: st.DrawFn, max_vertices: int = 3, most_cells: int = 500) -> PolyhedralProduct:
    """Draw a product of any pairs, with names and without, mostly different ones at different vertices."""
    k = draw(complexes(max_vertices))
    pair = st.sampled_from(NAMED_PAIRS).map(parse_pair) | own_pairs() | twisted_pairs()
    pairs = draw(st.lists(pair, min_size=k.vertex_count, max_size=k.vertex_count))
    assume(prod(len(pair.cells) for pair in pairs) <= most_cells)
    return PolyhedralProduct(k, tuple(pairs))


@st.composite
def relabelled_mixed_products(draw: st.DrawFn, max_vertices: int = 3) -> tuple[PolyhedralProduct, PolyhedralProduct]:
    """Draw a product of any pairs, and the same one with its vertices in another order."""
    return draw(_relabelled(draw(mixed_products(max_vertices))))


@st.composite
def real_toric_spaces(draw: st.DrawFn, max_vertices: int = 5) -> RealToricSpace:
    """Draw a complex with a λ that is injective on its faces, mostly with a kernel.

    The values λ_i are drawn one by one, outside the span of the values on any face that the vertex completes, with a
    new row where there are no others. The value of a ghost may be zero.
    """
    k = draw(complexes(max_vertices))
    rows = draw(st.integers(0, k.dimension + 2))
    columns: list[int] = []
    for vertex in range(k.vertex_count):
        taken: set[int] = set()
        for mask in k.face_masks():
            if mask >> vertex == 1:
                taken |= _span(columns[i] for i in face_of(mask ^ 1 << vertex))
        free = [value for value in range(1 << rows) if value not in taken]
        if not free:
            free, rows = [1 << rows], rows + 1
        columns.append(draw(st.sampled_from(free)))
    return RealToricSpace(k, tuple("".join(str(column >> row & 1) for column in columns) for row in range(rows)))


def _span(vectors: Iterable[int]) -> set[int]:
    """Return all sums of vectors over the field of two elements, given as masks."""
    values = {0}
    for vector in vectors:
        values |= {value ^ vector for value in values}
    return values
