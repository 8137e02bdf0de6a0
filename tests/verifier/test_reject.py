"""Well-formed files that try to prove a falsehood, each with the check that stops it."""

from __future__ import annotations

from typing import Any

import pytest

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
    "no symmetry, with the records of orbits": ("ring-by-orbits", _generators(), "block"),
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
    "a boundary of another degree": ("own-pair", lambda v: v[0][S]["pairs"][0]["cells"][2].__setitem__(0, 2), "pair"),
    "a boundary on later cells": (
        "own-pair",
        lambda v: v[0][S]["pairs"][0]["cells"][1].__setitem__(2, [3, 1]),
        "vector",
    ),
    "a side that is 2": ("own-pair", lambda v: v[0][S]["pairs"][0]["cells"][3].__setitem__(1, 2), "pair"),
    "no cells": ("own-pair", lambda v: v[0][S]["pairs"][0].update(cells=[]), "pair"),
}


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


def test_the_records_of_one_claim_do_not_prove_another() -> None:
    """Every pair of claims: the header of one before the records of the other."""
    names = ["ring", "ring-by-cells", "plane", "tor", "table", "smash", "summand", "real-toric", "moore"]
    for name in names:
        for other in names:
            if name != other and {name, other} != {"ring", "tor"}:
                forged_file = signed([values_of(genuine(name))[0], *values_of(genuine(other))[1:]])
                assert judged(forged_file)["verdict"] == "rejected", (name, other)
