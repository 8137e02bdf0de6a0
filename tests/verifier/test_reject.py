"""Well-formed files that try to prove a falsehood, each with the check that stops it."""

from __future__ import annotations

from typing import Any

import pytest

from certify.claims import RealToricClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.simplicial.families import points, simplex, simplex_boundary
from tests.helpers import certificate_of, disc_product
from tests.verifier.forging import Edit, Values, forged, genuine, judged, signed, values_of

S = "statement"


def _groups(*groups: list[Any]) -> Edit:
    """Return the edit that states other groups."""

    def edit(values: Values) -> None:
        values[0][S]["groups"] = list(groups)

    return edit


def _both(*edits: Edit) -> Edit:
    def edit(values: Values) -> None:
        for one in edits:
            one(values)

    return edit


def _basis(record: int, degree: int, **parts: Any) -> Edit:
    """Return the edit that replaces parts of one degree of a basis; None takes a part away."""

    def edit(values: Values) -> None:
        entry = values[record]["basis"][degree]
        for key, part in parts.items():
            entry.pop(key, None)
            if part is not None:
                entry[key] = part

    return edit


def _swap(first: int, second: int) -> Edit:
    def edit(values: Values) -> None:
        values[first], values[second] = values[second], values[first]

    return edit


def _generators(*generators: list[int]) -> Edit:
    def edit(values: Values) -> None:
        values[1]["generators"] = list(generators)

    return edit


def _splitting(**parts: Any) -> Edit:
    def edit(values: Values) -> None:
        values[1]["splitting"][0].update(parts)

    return edit


def _point(name: str) -> dict[str, Any]:
    """Return a record of a block with the homology of a point."""
    return {"basis": [{"cycles": [[0, 1]]}], "block": name}


def _group(cells: list[int], inverse: list[list[int]]) -> Edit:
    """Return the edit that replaces the group of the block of two Moore spaces."""
    return _basis(-2, 1, groups=[{"cells": cells, "inverse": inverse}])


IDENTITY = [[int(i == j) for j in range(4)] for i in range(4)]

CASES: dict[str, tuple[str, Edit, str]] = {
    # The statement is another one.
    "a larger rank": ("ring", _groups([0, 1, []], [1, 12, []], [2, 1, []]), "false"),
    "a smaller rank": ("ring", _groups([0, 1, []], [1, 8, []], [2, 1, []]), "false"),
    "a degree left out": ("ring", _groups([0, 1, []], [1, 10, []]), "false"),
    "a degree too many": ("ring", _groups([0, 1, []], [1, 10, []], [2, 1, []], [7, 1, []]), "false"),
    "torsion left out": ("plane", _groups([0, 1, []], [2, 31, []]), "false"),
    "torsion of another order": ("plane", _groups([0, 1, []], [2, 31, [4]]), "false"),
    "torsion in another degree": ("plane", _groups([0, 1, []], [1, 0, [2]], [2, 31, []]), "false"),
    "torsion that is no torsion": ("plane", _groups([0, 1, []], [2, 32, []]), "false"),
    "another group of the same order": ("moore", _groups([0, 1, []], [1, 0, [24]], [2, 0, [2]], [3, 0, [2]]), "false"),
    "a false group in the one degree": ("low-degrees", _groups([3, 4, []]), "false"),
    "zero in the one degree": ("low-degrees", _groups(), "false"),
    "Tor in another bidegree": ("tor", _groups([0, 0, 1, []], [1, 3, 5, []], [2, 3, 5, []], [3, 5, 1, []]), "false"),
    "a row of the table left out": ("table", lambda v: v[0][S]["groups"].pop(), "false"),
    "a smash product with a base point": ("smash", _groups([0, 1, []], [2, 0, [2]]), "false"),
    "an orientable projective plane": ("real-toric", _groups([0, 1, []], [1, 2, []], [2, 1, []]), "false"),
    "a link with another group": ("summand", _groups([0, 1, []]), "false"),
    # The complex is another one, and the records are those of the old one.
    "another complex": ("ring", lambda v: v[0][S]["facets"].pop(), "block"),
    "one more ghost": (
        "ring",
        lambda v: (v[0][S]["pairs"].append("(D1, S0)"), v[0][S].update(vertices=6)),
        "block",
    ),
    "another pair": ("ring", lambda v: v[0][S].update(pairs=["(D2, S1)"] * 5), "false"),
    "a pair of a larger disc at one vertex": ("ring", lambda v: v[0][S]["pairs"].__setitem__(0, "(D2, S1)"), "false"),
    "all degrees with the records of one": ("low-degrees", lambda v: v[0][S].update(degrees=None), "keys"),
    "another face ring": ("tor", lambda v: v[0][S]["facets"].pop(), "block"),
    "another λ": ("real-toric", lambda v: v[0][S].update(rows=["10100", "01011"]), "not-injective"),
    "λ equal at two ends of an edge": ("real-toric", lambda v: v[0][S].update(rows=["11101", "01011"]), "boundary"),
    "out is no face": ("summand", lambda v: v[0][S].update(out=[1, 2, 3], kept=[4]), "statement"),
    # Records are missing, extra, twice, or in another order.
    "no records": ("ring", lambda v: v.__delitem__(slice(1, -1)), "keys"),
    "the first record missing": ("ring", lambda v: v.pop(1), "block"),
    "the last record missing": ("ring", lambda v: v.pop(-2), "keys"),
    "a record twice": ("ring", lambda v: v.insert(2, v[2]), "block"),
    "the last record twice": ("ring", lambda v: v.insert(-1, v[-2]), "keys"),
    "two records swapped": ("ring", _swap(2, 3), "block"),
    "a record under another name": ("ring", lambda v: v[2].update(block="11111"), "block"),
    "a record for a cone": (
        "ring",
        lambda v: v.insert(2, {"basis": [{"cycles": [[0, 1]]}], "block": "00001"}),
        "block",
    ),
    "two records by cells": ("ring-by-cells", lambda v: v.insert(1, v[1]), "keys"),
    "a record of an orbit missing": ("ring-by-orbits", lambda v: v.pop(-2), "keys"),
    "a record of an orbit twice": ("ring-by-orbits", lambda v: v.insert(3, v[3]), "block"),
    # Vertices that are left out, though they may not be (Lemma C).
    "a vertex left out that one with the tag 2 dominates": (
        "twos",
        lambda v: v[-2].update(basis=v[-3]["basis"]),
        "degrees",
    ),
    "a dominated vertex that is not left out": (
        "ring",
        lambda v: v.insert(2, {"basis": [{}, {"cycles": [[0, -1, 1, 1]], "matched": [0]}], "block": "00011"}),
        "block",
    ),
    # Lemma A.
    "a cycle that is none": ("ring", _basis(-2, 1, cycles=[[1, 1]]), "cycle"),
    "a pair in degree 0": ("ring", _basis(1, 0, cycles=None, pairs=[[[0, 1]]]), "boundary"),
    "a matched cell in degree 0": ("ring", _basis(1, 0, cycles=None, matched=[0]), "boundary"),
    "e that does not fit": ("plane", lambda v: v[-2]["basis"][3]["pairs"][-1].__setitem__(1, 4), "boundary"),
    "b that does not fit": ("plane", lambda v: v[-2]["basis"][3]["pairs"][-1].__setitem__(2, [0, 1]), "boundary"),
    "e = 1 written out": (
        "plane",
        lambda v: v[-2]["basis"][3]["pairs"][-1].__setitem__(slice(1, 3), [1, [0, 2, 1, -2, 2, 2]]),
        "torsion",
    ),
    "a negative e": (
        "plane",
        lambda v: v[-2]["basis"][3]["pairs"][-1].__setitem__(slice(1, 3), [-2, [0, -1, 1, 1, 2, -1]]),
        "torsion",
    ),
    "torsion hidden by e = 1": ("plane", lambda v: v[-2]["basis"][3]["pairs"][-1].__delitem__(slice(1, 3)), "basis"),
    "a cycle by cells that is none": ("ring-by-cells", _basis(1, 1, cycles=[[0, 1]]), "cycle"),
    "a matched cell that is a cycle": (
        "circle",
        _both(_basis(1, 1, cycles=None, matched=[0]), _basis(1, 0, cycles=None)),
        "boundary",
    ),
    "a matched cell whose d ends in 3": ("moore-alone", _basis(1, 2, pairs=None, matched=[0]), "boundary"),
    # Lemma B.
    "no vectors": ("ring", _basis(1, 0, cycles=None), "basis"),
    "a cycle twice": ("ring", _basis(1, 0, cycles=[[0, 1], [0, 1]]), "basis"),
    "twice a cycle": ("ring", _basis(1, 0, cycles=[[0, 2]]), "basis"),
    "two vectors with one lead": ("ring", lambda v: v[-2]["basis"][1].update(matched=[1]), "basis"),
    "one matched cell too many": ("ring", lambda v: v[-2]["basis"][2]["matched"].append(4), "basis"),
    "groups without an order": ("moore", _basis(-2, 1, order=None), "order"),
    "an order that leaves a cell out": ("moore", _basis(-2, 1, order=[1]), "order"),
    "an order with a cell twice": ("moore", _basis(-2, 1, order=[1, 1]), "order"),
    "an order with true": ("moore", _basis(-2, 1, order=[True, 0]), "order"),
    "an order with a negative cell": ("moore", _basis(-2, 1, order=[1, -2]), "order"),
    "no groups": ("moore", _basis(-2, 1, groups=None), "basis"),
    "a group of one": ("moore", _group([1], [[-1]]), "group"),
    "a group of other cells": (
        "moore",
        _group([0, 1], [[3, 2], [2, 1]]),
        "group",
    ),
    "a group twice": ("moore", lambda v: v[-2]["basis"][1]["groups"].append(v[-2]["basis"][1]["groups"][0]), "group"),
    "a wrong inverse": ("moore", _group([1, 0], [[3, 2], [2, 2]]), "group"),
    "an inverse up to sign": (
        "moore",
        _group([1, 0], [[-3, -2], [-2, -1]]),
        "group",
    ),
    "an inverse that is no square": (
        "moore",
        _group([1, 0], [[3, 2, 0], [2, 1]]),
        "group",
    ),
    "an inverse with a row too few": ("moore", _group([1, 0], [[3, 2]]), "group"),
    "a pair that is a multiple": (
        "moore",
        lambda v: v[-2]["basis"][1]["pairs"].__setitem__(0, [[0, 4, 1, -2], 4, [0, 1]]),
        "group",
    ),
    # Symmetries.
    "a generator that is no permutation": ("ring-by-orbits", _generators([1, 1, 2, 3, 4]), "symmetry"),
    "a generator of other length": ("ring-by-orbits", _generators([2, 3, 4, 1]), "symmetry"),
    "a generator with true": ("ring-by-orbits", _generators([True, 2, 3, 4, 5]), "symmetry"),
    "a generator that moves faces to non-faces": ("ring-by-orbits", _generators([2, 1, 3, 4, 5]), "symmetry"),
    "the generators missing": ("ring-by-orbits", lambda v: v.pop(1), "keys"),
    "no symmetry, with the records of orbits": ("bipartite-by-orbits", _generators(), "block"),
    "a generator that moves pairs": (
        "ring-by-orbits",
        lambda v: v[0][S]["pairs"].__setitem__(0, "(D2, S1)"),
        "symmetry",
    ),
    # Pairs given by their cells.
    "no splitting": ("own-pair", lambda v: v.pop(1), "keys"),
    "a splitting too many": ("own-pair", lambda v: v[1]["splitting"].append(v[1]["splitting"][0]), "splitting"),
    "a basis over several degrees": (
        "own-pair",
        _splitting(
            basis=[[0, 1], [0, 1, 1, 1], [2, 1], [3, 1]],
            inverse=[[1, -1, 0, 0], [0, 1, 0, 0], [0, 0, 1, 0], [0, 0, 0, 1]],
        ),
        "splitting",
    ),
    "a basis that leaves A": (
        "own-pair",
        _splitting(
            basis=[[0, 1], [1, 1, 2, 1], [2, 1], [3, 1]],
            inverse=[[1, 0, 0, 0], [0, 1, 0, 0], [0, -1, 1, 0], [0, 0, 0, 1]],
        ),
        "splitting",
    ),
    "a basis of a part": ("own-pair", _splitting(basis=[[0, 1], [1, 2], [2, 1], [3, 1]], inverse=IDENTITY), "group"),
    "a vector too few": ("own-pair", _splitting(basis=[[0, 1], [1, 1], [2, 1]], inverse=IDENTITY[:3]), "group"),
    "A that is not closed": ("own-pair", lambda v: v[0][S]["pairs"][0]["cells"][3].__setitem__(1, 0), "pair"),
    "dd that is not zero": (
        "own-pair",
        lambda v: v[0][S]["pairs"][0]["cells"][1].__setitem__(2, [0, 1]),
        "pair",
    ),
    "a cell of degree 1000": ("own-pair", lambda v: v[0][S]["pairs"][0]["cells"][3].__setitem__(0, 1000), "index"),
    "a boundary of another degree": ("own-pair", lambda v: v[0][S]["pairs"][0]["cells"][2].__setitem__(0, 2), "pair"),
    "a boundary on later cells": (
        "own-pair",
        lambda v: v[0][S]["pairs"][0]["cells"][1].__setitem__(2, [3, 1]),
        "vector",
    ),
    "a side that is 2": ("own-pair", lambda v: v[0][S]["pairs"][0]["cells"][3].__setitem__(1, 2), "pair"),
    "no cells": ("own-pair", lambda v: v[0][S]["pairs"][0].update(cells=[]), "pair"),
}


def _state(*way: Any, to: Any) -> Edit:
    """Return an edit of the statement."""

    def edit(values: Values) -> None:
        holder = values[0][S]
        for key in way[:-1]:
            holder = holder[key]
        holder[way[-1]] = to

    return edit


SYMMETRY_CASES: dict[str, tuple[str, Edit, str]] = {
    "a larger group": ("automorphisms", _state("order", to=20), "false"),
    "the full group where a part is meant": ("cyclic-group", _state("order", to=10), "false"),
    "more orbits on sets": ("automorphisms", _state("orbits", "subsets", to=9), "false"),
    "an element that is none": ("cyclic-group", _state("generators", to=[[2, 1, 3, 4, 5]]), "symmetry"),
    "an element that is no permutation": ("cyclic-group", _state("generators", to=[[2, 2, 3, 4, 5]]), "symmetry"),
    "an element that is too short": ("cyclic-group", _state("generators", to=[[2, 3, 4, 1]]), "symmetry"),
    "true as an image": ("cyclic-group", _state("generators", to=[[2, 3, 4, 5, True]]), "symmetry"),
    "a sign on a disc": ("character-of-summands", _state("generators", to=[[-2, 3, 4, 5, 1]]), "symmetry"),
    "an element that exchanges different pairs": (
        "cyclic-group",
        _state("pairs", 0, to="(D2, S1)"),
        "symmetry",
    ),
    "another trace": ("character", _state("values", 1, to=1), "false"),
    "another degree of the identity": ("character", _state("values", 0, to=11), "false"),
    "another inner product": ("character", _state("products", 0, to=[2, 1]), "false"),
    "a trace of cells": ("character-by-cells", _state("values", 1, to=7), "false"),
    "a class left out": ("character", lambda v: _shorten(v, -1), "classes"),
    "a class twice": ("character", lambda v: v[0][S]["elements"].__setitem__(2, [2, 3, 4, 5, 1]), "classes"),
    "an element outside the group": (
        "character-of-summands",
        lambda v: v[0][S]["elements"].__setitem__(1, [1, 5, 4, 3, 2]),
        "classes",
    ),
    "a function with a value too few": ("character", lambda v: v[0][S]["functions"][0].pop(), "statement"),
    "a function that is none of a class": ("character", _state("functions", 0, to=[1, 0, 0]), "false"),
    "other summands": ("character-of-summands", _state("summands", to=["11000"]), "block"),
    "summands of too few vertices": ("character-of-summands", _state("summands", to=["101"]), "statement"),
    "no summands": ("character-of-summands", _state("summands", to=[]), "statement"),
    "a summand that the pair has not": ("character-of-summands", _state("summands", to=["20100"]), "statement"),
    "a summand with a line feed": ("character-of-summands", _state("summands", to=["1010\n"]), "statement"),
    "a summand that is a number": ("character-of-summands", _state("summands", to=[10100]), "statement"),
    "a single summand under a change of sign": (
        "character-of-a-point",
        lambda v: v[0][S].update(generators=[[-1]], elements=[[1], [-1]], values=[1, 1]),
        "symmetry",
    ),
    "a record of a fixed block left out": ("character", lambda v: v.pop(-2), "keys"),
    "another matrix": ("action", _state("matrix", to=[[0, 1], [1, 0]]), "false"),
    "another basis": ("action", _state("basis", 0, to=[0, 1]), "false"),
    "another trace of a matrix": ("action", _state("trace", to=2), "false"),
    "an induced character with another value": ("equivariance", _state("values", 1, to=2), "false"),
    "a splitting without the whole product": ("equivariance", lambda v: v.pop(-2), "keys"),
    "a splitting that goes along with signs": (
        "equivariance",
        lambda v: v[0][S].update(
            pairs=["(D1, S0)"] * 4, generators=[[-1, 2, 3, 4]], elements=[[1, 2, 3, 4], [-1, 2, 3, 4]]
        ),
        "symmetry",
    ),
    "traces of single summands in place of all": (
        "equivariance",
        lambda v: v[0][S].update(summands=["1010"]),
        "keys",
    ),
    "more fixed points": ("fixed-set", lambda v: v[0][S]["groups"][0].__setitem__(1, 5), "false"),
    "another number of fixed points": ("fixed-set-of-all", _state("points", to=3), "false"),
    "finitely many points where there are curves": ("fixed-set-of-own-pair", _state("points", to=2), "false"),
    "curves where there are finitely many points": ("fixed-set-of-all", _state("points", to=None), "false"),
    "another number of components": ("fixed-set", _state("components", to=3), "false"),
    "true as the number of components": ("fixed-set-with-signs", _state("components", to=True), "false"),
    "a point in the empty fixed set": (
        "fixed-set-of-nothing",
        lambda v: _empty_fixed_set(v, points=1),
        "false",
    ),
    "a component of the empty fixed set": (
        "fixed-set-of-nothing",
        lambda v: _empty_fixed_set(v, components=1),
        "false",
    ),
    "fixed points of an own pair without its splitting": (
        "fixed-set-of-own-pair",
        _both(lambda v: v[0][S].update(groups=[]), lambda v: [v.pop(1) for _ in v[2:]]),
        "keys",
    ),
    "fixed points of all automorphisms": ("fixed-set-of-nothing", _state("generators", to=None), "block"),
    "fixed points of no automorphism": ("fixed-set-of-all", _state("generators", to=[]), "block"),
    "the quotient by all automorphisms": ("orbit-space", _state("generators", to=None), "cycle"),
    "the character of all automorphisms on some summands": (
        "character-of-summands",
        _state("generators", to=None),
        "classes",
    ),
    "fixed points of the whole group": ("fixed-set", lambda v: v[0][S]["generators"].append([2, 3, 4, 5, 1]), "block"),
    "a quotient that is a sphere no more": ("orbit-space", _state("groups", to=[[0, 1, []], [1, 2, []]]), "false"),
    "a quotient with another Euler characteristic": ("orbit-space", _state("euler", to=0), "false"),
    "the quotient by another group": ("orbit-space", _state("generators", to=[[1, 4, 3, 2]]), "cycle"),
    "a quotient on cells where the action is not free": ("orbit-space", lambda v: v[1]["basis"].pop(), "degrees"),
    "a torus for a Klein bottle": ("free-orbit-space", _state("groups", to=[[0, 1, []], [1, 2, []]]), "false"),
    "an orientation": ("surface", lambda v: v[0][S].update(orientable=1 - v[0][S]["orientable"]), "false"),
    "true as orientable": ("surface", _state("orientable", to=True), "false"),
    "a boundary": ("surface", lambda v: v[0][S].update(boundary=v[0][S]["boundary"] + 1), "false"),
    "another Euler characteristic": ("surface", lambda v: v[0][S].update(euler=v[0][S]["euler"] + 2), "false"),
    "a graph as a surface": ("surface", _state("facets", to=[[1], [2], [3], [4]]), "no-surface"),
    "three discs at an edge": (
        "surface",
        lambda v: v[0][S].update(facets=[[1, 2], [1, 3], [1, 4]], generators=[]),
        "no-surface",
    ),
    "two spheres at a point": (
        "surface",
        lambda v: v[0][S].update(facets=[[1, 2], [3, 4]], generators=[]),
        "no-surface",
    ),
    "a branch point too many": ("branching", _state("orbits", 0, 2, to=3), "false"),
    "another generator of an isotropy group": ("branching", _state("orbits", 0, 0, 0, to=[3, 4, 5, 1, 2]), "false"),
    "another conjugate of an isotropy group": (
        "branching-of-conjugates",
        _state("orbits", 0, 0, 0, to=[-1, 2, -3]),
        "false",
    ),
    "conjugate isotropy groups apart": (
        "branching-of-conjugates",
        lambda v: v[0][S]["orbits"].__setitem__(slice(1, 2), [[v[0][S]["orbits"][1][0], 3, 1]] * 2),
        "false",
    ),
    "branch points on a line": ("branching", _state("generators", to=[[1, 5, 4, 3, 2]]), "not-isolated"),
    "a facet of a shelling twice": (
        "shelling",
        lambda v: v[1]["order"].__setitem__(0, v[1]["order"][1]),
        "shelling",
    ),
    "a shelling that falls apart": (
        "shelling",
        lambda v: v[1].update(order=[[1, 2], [3, 4], [2, 3], [4, 5], [1, 5]]),
        "shelling",
    ),
    "a path that is no sphere": (
        "shelling",
        lambda v: (v[0][S].update(facets=[[1, 2], [2, 3]]), v[1].update(order=[[1, 2], [2, 3]])),
        "shelling",
    ),
    "two circles": (
        "shelling",
        lambda v: (
            v[0][S].update(facets=(f := [[1, 2], [1, 3], [2, 3], [4, 5], [4, 6], [5, 6]]), vertices=6),
            v[1].update(order=f),
        ),
        "shelling",
    ),
    "an orbit too many": ("orbit-count", _state("orbits", to=9), "false"),
    "a primitive orbit too many": ("orbit-count", _state("primitive", to=8), "false"),
    "signs on colourings": ("orbit-count", _state("generators", to=[[-2, 3, 4, 5, 1]]), "symmetry"),
    "another content": ("orbit-count-by-content", _state("content", to=[1, 4]), "false"),
    "a content of three colours": ("orbit-count-by-content", _state("content", to=[1, 2, 2]), "statement"),
    "an identity that is none": ("count-identity", _state("right", to="lyndon(n, 2)"), "false"),
    "an identity that fails at the end": ("count-identity", _state("left", to="necklaces(n, 2) + n // 6"), "false"),
    "another value of a count": ("count-values", _state("values", 1, to="1152921504606846977"), "false"),
    "a value too few": ("count-values", lambda v: v[0][S]["values"].pop(), "false"),
    "a value too many": ("count-values", lambda v: v[0][S]["values"].append(3), "false"),
    "a count that calls for trouble": ("count-values", _state("formula", to="exit(n)"), "expression"),
    "a count that is a number": ("count-values", _state("formula", to=5), "statement"),
    "values from 0 on": ("count-values", _state("first", to=0), "statement"),
    "a range without a number": ("count-identity", _state("last", to=0), "statement"),
    "an expression that calls for trouble": ("count-identity", _state("left", to="exit(n, 2)"), "expression"),
    "an expression with an attribute": ("count-identity", _state("left", to="n.real"), "expression"),
    "an expression with a lambda": ("count-identity", _state("left", to="(lambda: n)()"), "expression"),
    "an expression that cannot be read": ("count-identity", _state("left", to="n +"), "expression"),
    "a truth value in an expression": ("count-identity", _state("left", to="n * True"), "expression"),
    "a fraction": ("count-identity", _state("left", to="n / 1"), "expression"),
    "a division by zero": ("count-identity", _state("left", to="n // 0"), "expression"),
    "a negative exponent": ("count-identity", _state("left", to="n ** (0 - 1)"), "expression"),
    "an expression that is a number": ("count-identity", _state("left", to=5), "statement"),
    "a comment in an expression": ("count-identity", _state("left", to="n * n # + 1"), "expression"),
    "a line in an expression": ("count-identity", _state("left", to="(n +\n n)"), "expression"),
    "a control sequence in an expression": ("count-identity", _state("left", to="n # \x1b[2Jaccepted"), "expression"),
    "letters of another alphabet in an expression": ("count-identity", _state("left", to="\uff4e"), "expression"),
    "hexadecimal numbers": ("count-identity", _state("left", to="n + 0x10"), "expression"),
    "a number with an underscore": ("count-identity", _state("left", to="n + 1_0"), "expression"),
    "n as the name in a sum": ("count-identity", _state("left", to="sum(n for n in divisors(n))"), "expression"),
    "a sum that is no plain one": (
        "count-identity",
        lambda v: v[0][S].update(left="sum(k async for k in range(0, n))", right="n * (n - 1) // 2"),
        "expression",
    ),
    "k over divisors": ("count-identity", _state("left", to="sum(k for k in divisors(n))"), "expression"),
    "divisors of 0": ("count-identity", _state("left", to="sum(d for d in divisors(n - n))"), "expression"),
    "the Möbius function at 0": ("count-identity", _state("left", to="mobius(0)"), "expression"),
    "the totient of 0": ("count-identity", _state("left", to="totient(0)"), "expression"),
    "a name that is bound in a sum only": ("count-identity", _state("left", to="d"), "expression"),
}
CASES |= SYMMETRY_CASES


def _empty_fixed_set(values: Values, **numbers: int) -> None:
    """Make it a claim about an edge whose ends are exchanged with a change of sign of both: nothing is fixed."""
    quarter = {"facets": [[1], [2]], "vertices": 2, "pairs": ["(D1, S0)"] * 2, "generators": [[2, -1]]}
    values[0][S].update({**quarter, "groups": [], "components": 0, "points": 0, **numbers})
    del values[1:-1]


def _shorten(values: Values, place: int) -> None:
    """Leave a class out of a claim about a character, everywhere."""
    statement = values[0][S]
    for key in ("elements", "values"):
        del statement[key][place]
    for function in statement["functions"]:
        del function[place]


@pytest.mark.parametrize("name", CASES)
def test_a_falsehood_is_rejected(name: str) -> None:
    claim, edit, code = CASES[name]
    report = judged(forged(claim, edit))
    assert (report["verdict"], report["reason"]) == ("rejected", code)
    assert report["statement"] is report["fingerprint"] is None


def test_a_false_statement_is_said_to_stand_in_the_first_line() -> None:
    claim, edit, _ = CASES["a larger rank"]
    report = judged(forged(claim, edit))
    assert report["where"] == "line 1"
    assert report["sentence"] == "groups: [1, 12, []] is stated, but [1, 10, []] is proved"


def test_faces_of_a_real_toric_space_are_not_left_out_in_claims_about_some_degrees() -> None:
    """Without its squares the quotient of the pentagon's surface would be a graph with H_1 = ℤ⁶."""
    values = values_of(genuine("real-toric-low"))
    values[0]["statement"]["groups"] = [[1, 6, []]]
    corners, edges = 5, 10
    values[1] = {"basis": [{}, {}]}
    assert corners < edges
    assert judged(signed(values))["reason"] == "degrees"


def test_a_real_toric_space_is_one_also_where_its_large_faces_do_not_matter() -> None:
    """ker λ = {000, 111} fixes a point of the cube D³; on its boundary it acts freely, with ℝP² as the quotient."""
    values = values_of(certificate_of(RealToricClaim(simplex_boundary(3), ("101", "011"), degrees=(1,))))
    assert judged(signed(values))["verdict"] == "accepted"
    values[0]["statement"]["facets"] = [[1, 2, 3]]
    assert judged(signed(values))["reason"] == "not-injective"


def test_a_pair_has_no_more_summands_than_there_are_digits() -> None:
    """With a 37th summand, which no word can name, its group would be left out of the sum."""
    cells = [[0, 0, []] for _ in range(37)] + [[1, 0, [i, i + 2]] for i in range(37)]
    identity = [[int(i == j) for j in range(74)] for i in range(74)]
    values = values_of(genuine("own-pair"))
    values[0][S] |= {"facets": [[]], "groups": [], "pairs": [{"cells": cells}], "vertices": 1}
    values[1] = {"splitting": [{"basis": [[i, 1] for i in range(74)], "inverse": identity}]}
    assert judged(signed(values))["reason"] == "pair"
    del cells[73], cells[36]
    values[1] = {"splitting": [{"basis": [[i, 1] for i in range(72)], "inverse": [row[:72] for row in identity[:72]]}]}
    assert judged(signed(values))["reason"] == "block"


def test_a_fixed_set_has_all_faces_also_in_claims_about_low_degrees() -> None:
    """The rotation of three vertices fixes the diagonal of the cube D³, which is in one piece."""
    claim = FixedSetClaim(disc_product(simplex(3), 1), degrees=(0,), generators=((2, 3, 1),))
    values = values_of(certificate_of(claim))
    assert values[0]["statement"]["groups"] == [[0, 1, []]]
    assert judged(signed(values))["verdict"] == "accepted"


def test_an_edge_that_becomes_a_loop_has_no_boundary() -> None:
    """(D¹, S⁰) on one vertex is an interval; exchanging its ends by x → -x on a second, ghost vertex makes no loop.

    Two edges of the square modulo the half turn do: their ends are one point, and cancel.
    """
    half_turn = (-1, -2)
    values = values_of(certificate_of(OrbitSpaceClaim(points(2), (half_turn,))))
    assert values[0]["statement"]["groups"] == [[0, 1, []], [1, 1, []]]
    assert judged(signed(values))["verdict"] == "accepted"
    values[0]["statement"]["groups"] = [[0, 1, []]]
    for basis in ([{"cycles": [[0, 1]]}, {"matched": [0, 1]}], [{}, {"matched": [0, 1]}]):
        values[1]["basis"] = basis
        assert judged(signed(values))["verdict"] == "rejected"


def test_an_orbit_space_has_all_cells_also_in_claims_about_low_degrees() -> None:
    """D³ by x → -x is a cone; without its inside there would be ℝP², with ℤ/2 in degree 1."""
    values = values_of(certificate_of(OrbitSpaceClaim(simplex(3), ((-1, -2, -3),), degrees=(1,))))
    assert values[0]["statement"]["groups"] == []
    assert judged(signed(values))["verdict"] == "accepted"
    sphere = values_of(certificate_of(OrbitSpaceClaim(simplex_boundary(3), ((-1, -2, -3),), degrees=(1,))))
    assert sphere[0]["statement"]["groups"] == [[1, 0, [2]]]
    sphere[0]["statement"]["facets"] = [[1, 2, 3]]
    assert judged(signed(sphere))["verdict"] == "rejected"


def test_the_records_of_one_claim_do_not_prove_another() -> None:
    """Every pair of claims: the header of one before the records of the other."""
    names = ["ring", "ring-by-cells", "plane", "tor", "table", "smash", "summand", "real-toric", "moore"]
    for name in names:
        for other in names:
            if name != other and {name, other} != {"ring", "tor"}:
                forged_file = signed([values_of(genuine(name))[0], *values_of(genuine(other))[1:]])
                assert judged(forged_file)["verdict"] == "rejected", (name, other)
