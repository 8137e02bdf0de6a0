"""What a claim sheet says, and what is wrong with it: each fault with its exact place."""

from __future__ import annotations

from pathlib import Path

import pytest

from certify.claims import Claim, HomologyClaim
from certify.claims.kinds import KINDS
from certify.errors import BadInput
from certify.exact import AbelianGroup
from certify.products import parse_pairs
from certify.sheet import NamedClaim, parse_sheet, read_sheet
from certify.simplicial import FAMILIES, SimplicialComplex, build

GOOD = """\
title = "A ring"

[complexes.ring]
facets = [[1, 2], [2, 3], [3, 4], [4, 1]]

[complexes.stage]
vertices = ["front", "left", "spare"]
facets = [["front", "left"]]

[[claims]]
id = "ring.states"
kind = "homology"
complex = "ring"
pair = "(D1, S0)"
groups = { 0 = "Z", 1 = "Z^2", 2 = "Z" }
title = "A torus"
source = "A book"

[[claims]]
id = "stage"
kind = "homology"
complex = "stage"
pair = ["(D1, S0)", "(D2, S1)", "(D3, S2)"]
degrees = [2, 0]
route = "cells"
"""


def test_a_sheet_says_what_it_says() -> None:
    title, (ring, stage) = parse_sheet(GOOD)
    assert isinstance(ring.claim, HomologyClaim)
    assert isinstance(stage.claim, HomologyClaim)
    assert title == "A ring"
    assert (ring.id, ring.complex) == ("ring.states", "ring")
    assert ring.claim.product.complex == SimplicialComplex.from_facets([[1, 2], [2, 3], [3, 4], [1, 4]])
    assert ring.claim.product.pairs == parse_pairs("(D1, S0)", 4)
    assert ring.claim.groups == {0: AbelianGroup.of(1), 1: AbelianGroup.of(2), 2: AbelianGroup.of(1)}
    assert (ring.claim.degrees, ring.claim.route) == (None, "blocks")
    assert ring.about == {"claim": "ring.states", "title": "A torus", "source": "A book"}
    assert stage.claim.product.pairs == parse_pairs(["(D1, S0)", "(D2, S1)", "(D3, S2)"], 3)
    assert (stage.claim.groups, stage.claim.degrees, stage.claim.route) == (None, (0, 2), "cells")
    assert stage.about == {"claim": "stage", "labels": ["front", "left", "spare"]}


@pytest.mark.parametrize(
    ("name", "arguments"), [("polygon", {"n": 5}), ("torus", {}), ("cyclic-polytope", {"m": 7, "d": 3})]
)
def test_a_family_is_asked_for_by_name_with_its_arguments_as_keys(name: str, arguments: dict[str, int]) -> None:
    table = f'[complexes.k]\nfamily = "{name}"\n' + "".join(f"{key} = {value}\n" for key, value in arguments.items())
    claim = '[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\npair = "(D2, S1)"\n'
    _, (item,) = parse_sheet(table + claim)
    assert _complex_of(item) == build(name, **arguments)
    assert "labels" not in item.about


def test_a_ghost_vertex_and_the_complex_with_the_empty_face_alone_are_complexes() -> None:
    table = "[complexes.k]\nfacets = [[]]\nvertices = [1]\n"
    _, (item,) = parse_sheet(table + '[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\npair = "(D2, S1)"\n')
    assert _complex_of(item) == SimplicialComplex((1,), ((),))


def _complex_of(item: NamedClaim) -> SimplicialComplex:
    assert isinstance(item.claim, Claim)
    return item.claim.base


def test_every_claim_kind_can_be_named_and_an_unknown_one_is_told_their_names() -> None:
    assert "homology" in KINDS
    with pytest.raises(BadInput) as caught:
        parse_sheet(GOOD.replace('kind = "homology"', 'kind = "cohomology"', 1))
    assert str(caught.value) == (
        "line 12, claim 1, key kind: expected one of the claim kinds " + ", ".join(KINDS) + ", found 'cohomology'"
    )


# A change to the good sheet (a text of it, and what stands there instead), and the whole message that it must cause.
FAULTS = {
    "a facet that is no list": (
        "[2, 3], [3, 4]",
        "[2, 3], 3",
        "line 4, complex ring, key facets, item 3: expected a list, found 3",
    ),
    "a vertex twice in a facet": (
        "[2, 3], [3, 4]",
        "[2, 3],\n  [3, 3]",
        "line 5, complex ring, key facets, item 3: expected each vertex once, found vertex 3 twice",
    ),
    "a label of another kind": (
        "[2, 3], [3, 4]",
        "[2, 3], [3, 4.5]",
        "line 4, complex ring, key facets, item 3: expected whole numbers or strings as labels, found 4.5",
    ),
    "facets that are no list": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        'facets = "1 2"',
        "line 4, complex ring, key facets: expected a list, found '1 2'",
    ),
    "no facet": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        "facets = []",
        "line 4, complex ring, key facets: expected at least one facet ([[]] has the empty face), found none",
    ),
    "a facet with a vertex that is none": (
        '["front", "left"]]',
        '["front", "right"]]',
        "line 8, complex stage, key facets, item 1: "
        "expected vertices of the complex, found vertex 'right', which is none",
    ),
    "a vertex listed twice": (
        '"left", "spare"]',
        '"left", "left"]',
        "line 7, complex stage, key vertices: expected each vertex once, found vertex 'left' twice",
    ),
    "a complex without facets": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        "",
        "line 3, complex ring: expected one of the keys facets, missing-faces, monomials, family, graph6, edges, "
        "incidence, file, operation, found none of them",
    ),
    "an unknown key of a complex": (
        "[complexes.stage]",
        "[complexes.stage]\nghosts = 1",
        "line 7, complex stage, key ghosts: expected no other keys than facets, vertices, found 'ghosts'",
    ),
    "a complex that is no table": (
        "[complexes.ring]\nfacets",
        "[complexes]\nring",
        "line 4, complex ring: expected a table, found a list",
    ),
    "an unknown family": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        'family = "polygoon"\nn = 4',
        "line 4, complex ring, key family: expected one of {families}, found 'polygoon'",
    ),
    "a family that is no text": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        "n = 4\nfamily = 4",
        "line 5, complex ring, key family: expected the name of a family, found 4",
    ),
    "an impossible argument of a family": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        'family = "polygon"\nn = 2',
        "line 5, complex ring, key n: expected a whole number of at least 3, found 2",
    ),
    "a missing argument of a family": (
        "facets = [[1, 2], [2, 3], [3, 4], [4, 1]]",
        'family = "polygon"',
        "line 4, complex ring, key family: expected the argument n (number of vertices, at least 3), found none",
    ),
    "a family and facets": (
        "facets = [[1, 2]",
        'family = "torus"\nfacets = [[1, 2]',
        "line 5, complex ring, key facets: expected only one of the keys facets, missing-faces, monomials, family, "
        "graph6, edges, incidence, file, operation, found family too",
    ),
    "an unknown complex": (
        'complex = "ring"',
        'complex = "rng"',
        "line 13, claim 1, key complex: expected one of the complexes ring, stage, found 'rng'",
    ),
    "an unknown pair": (
        'pair = "(D1, S0)"',
        'pair = "(D1, S1)"',
        "line 14, claim 1, key pair: expected the boundary sphere of the disc, as in \"(D1, S0)\", found '(D1, S1)'",
    ),
    "a pair that is no text": (
        'pair = "(D1, S0)"',
        "pair = 1",
        'line 14, claim 1, key pair: expected a pair like "(D1, S0)", or a list with one for each vertex, found 1',
    ),
    "an unknown pair in a list": (
        '"(D2, S1)", "(D3, S2)"]',
        '"(D2, S1)",\n  "nonsense"]',
        "line 24, claim 2, key pair, item 3: "
        'expected a pair like "(D1, S0)", "(S3, *)", "(CP3, *)", "(RP2, *)", "(cone 3, 3)" or "(P3(2), *)", '
        "found 'nonsense'",
    ),
    "a pair in a list that is no text": (
        '"(D2, S1)", "(D3, S2)"]',
        '2, "(D3, S2)"]',
        'line 23, claim 2, key pair, item 2: expected a pair like "(D1, S0)", found 2',
    ),
    "a list of pairs of the wrong length": (
        ', "(D3, S2)"]',
        "]",
        "line 23, claim 2, key pair: expected one pair for each of the 3 vertices, found 2 pairs",
    ),
    "a group that cannot be read": (
        '1 = "Z^2"',
        '1 = "Z^^2"',
        "line 15, claim 1, key groups.1: expected summands like 0, Z, Z^34, Z/2 or (Z/2)^3 joined by +, found 'Z^^2'",
    ),
    "a group that is no text": (
        '1 = "Z^2"',
        "1 = 2",
        'line 15, claim 1, key groups.1: expected a group in quotation marks like "Z^34", found 2',
    ),
    "groups that are no table": (
        'groups = { 0 = "Z", 1 = "Z^2", 2 = "Z" }',
        'groups = ["Z", "Z^2", "Z"]',
        'line 15, claim 1, key groups: expected a table like { 0 = "Z", 1 = "Z^34" }, found a list',
    ),
    "a negative degree of a group": (
        '1 = "Z^2"',
        '-1 = "Z^2"',
        "line 15, claim 1, key groups.-1: expected a degree from 0 on, in plain digits, found '-1'",
    ),
    "a degree with a nought in front": (
        '1 = "Z^2"',
        '01 = "Z^2"',
        "line 15, claim 1, key groups.01: expected a degree from 0 on, in plain digits, found '01'",
    ),
    "a group outside the degrees": (
        "degrees = [2, 0]",
        'degrees = [2, 0]\ngroups = { 1 = "Z" }',
        "line 25, claim 2, key groups: expected degrees that the claim speaks of, found degree 1",
    ),
    "a negative degree": (
        "degrees = [2, 0]",
        "degrees = [2, -1]",
        "line 24, claim 2, key degrees, item 2: expected a degree from 0 on, of at most 9 digits, found -1",
    ),
    "a degree that is too large": (
        "degrees = [2, 0]",
        "degrees = [2, 1000000000]",
        "line 24, claim 2, key degrees, item 2: expected a degree from 0 on, of at most 9 digits, found 1000000000",
    ),
    "a degree that is no whole number": (
        "degrees = [2, 0]",
        "degrees = [2, true]",
        "line 24, claim 2, key degrees, item 2: expected a degree from 0 on, of at most 9 digits, found true",
    ),
    "a degree twice": (
        "degrees = [2, 0]",
        "degrees = [2, 2]",
        "line 24, claim 2, key degrees, item 2: expected each degree once, found 2 twice",
    ),
    "no degree": (
        "degrees = [2, 0]",
        "degrees = []",
        "line 24, claim 2, key degrees: expected at least one degree, found an empty list",
    ),
    "degrees that are no list": (
        "degrees = [2, 0]",
        "degrees = 2",
        "line 24, claim 2, key degrees: expected a list of degrees like [0, 1], found 2",
    ),
    "an unknown route": (
        'route = "cells"',
        'route = "faces"',
        'line 25, claim 2, key route: expected "blocks" or "cells" or "orbits", found \'faces\'',
    ),
    "an id twice": (
        'id = "stage"',
        'id = "ring.states"',
        "line 20, claim 2, key id: expected an id of its own for each claim, found 'ring.states' again",
    ),
    "two ids that differ in case": (
        'id = "stage"',
        'id = "Ring.States"',
        "line 20, claim 2, key id: expected an id of its own for each claim, "
        "found 'Ring.States' again, which differs from 'ring.states' only in case",
    ),
    "an id that is no name of a file": (
        'id = "stage"',
        'id = "../stage"',
        "line 20, claim 2, key id: expected 1 to 100 letters, digits, dots, dashes and underscores, "
        "a letter or digit first, found '../stage'",
    ),
    "an id that is no text": (
        'id = "stage"',
        "id = 7",
        "line 20, claim 2, key id: expected a text in quotation marks, found 7",
    ),
    "a claim without id": (
        'id = "stage"',
        "",
        "line 19, claim 2: expected the key id with a text in quotation marks, found no such key",
    ),
    "a claim without kind": (
        'id = "stage"\nkind = "homology"',
        'id = "stage"',
        "line 19, claim 2: expected the key kind with the name of a claim kind, found no such key",
    ),
    "a claim without complex": (
        'complex = "stage"',
        "",
        "line 19, claim 2: expected the key complex with the name of a complex of the sheet, found no such key",
    ),
    "a claim without pair": (
        'pair = "(D1, S0)"',
        "",
        "line 10, claim 1: "
        'expected the key pair with a pair like "(D1, S0)", or a list with one for each vertex, found no such key',
    ),
    "an unknown key of a claim": (
        'pair = "(D1, S0)"',
        'pairs = "(D1, S0)"',
        "line 14, claim 1, key pairs: expected no other keys than id, kind, title, source, complex, pair, degrees, "
        "groups, route, found 'pairs'",
    ),
    "an unknown key of the sheet": (
        'title = "A ring"',
        'tittle = "A ring"',
        "line 1, key tittle: expected no other keys than title, complexes, pairs, claims, found 'tittle'",
    ),
    "a title that is no text": (
        'title = "A ring"',
        "title = 1",
        "line 1, key title: expected a text in quotation marks, found 1",
    ),
    "a source that is no text": (
        'source = "A book"',
        "source = { book = 1 }",
        "line 17, claim 1, key source: expected a text in quotation marks, found a table",
    ),
    "a table twice": (
        "[complexes.stage]",
        "[complexes.ring]",
        "line 6, column 16: expected TOML, found a fault (Cannot declare ('complexes', 'ring') twice)",
    ),
    "a key twice": (
        'id = "stage"',
        'id = "stage"\nid = "stage"',
        "line 21, column 13: expected TOML, found a key that is already set",
    ),
    "a pair without quotation marks": (
        'pair = "(D1, S0)"',
        "pair = (D1, S0)",
        "line 14, column 8: expected TOML, found something that is no value (texts and pairs stand in quotation marks)",
    ),
    "a list that never ends": (
        'route = "cells"',
        "route = [",
        "line 25, the end: expected TOML, found something that is no value (texts and pairs stand in quotation marks)",
    ),
}


@pytest.mark.parametrize("fault", FAULTS)
def test_a_fault_is_named_with_its_place(fault: str) -> None:
    old, new, message = FAULTS[fault]
    assert old in GOOD
    with pytest.raises(BadInput) as caught:
        parse_sheet(GOOD.replace(old, new, 1))
    assert str(caught.value) == message.replace("{families}", ", ".join(FAMILIES))


@pytest.mark.parametrize("text", ["", "# nothing\n", 'title = "x"\n', "claims = []\n", "[complexes]\n"])
def test_a_sheet_without_claims_is_refused(text: str) -> None:
    with pytest.raises(BadInput, match=r"^the sheet: expected at least one claim \(\[\[claims\]\]\), found none$"):
        parse_sheet(text)


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("claims = 1", "line 1, key claims: expected a list of tables ([[claims]]), found 1"),
        ("claims = [1]", "line 1, claim 1: expected a table, found 1"),
        ("complexes = 1\nclaims = [1]", "line 1, key complexes: expected a table, found 1"),
        (
            '[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"',
            "line 4, claim 1, key complex: expected a complex [complexes.NAME] of the sheet, found 'k'",
        ),
    ],
)
def test_tables_are_tables(text: str, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        parse_sheet(text)
    assert str(caught.value) == message


@pytest.mark.parametrize("text", ["x = " + "1" * 5000, "x = " + "[" * 100_000])
def test_toml_beyond_all_measure_is_refused_and_does_not_crash(text: str) -> None:
    with pytest.raises(BadInput, match=r"^(the sheet|line 1, .*): expected TOML"):
        parse_sheet(text)


@pytest.mark.parametrize(
    ("data", "message"),
    [
        (b"\xef\xbb\xbf" + GOOD.encode(), "line 1: expected UTF-8 without a byte order mark, found a byte order mark"),
        (GOOD.encode("utf-16"), "line 1: expected UTF-8, found the byte 0xff, which is none"),
        (b"# one\n# caf\xe9\n", "line 2: expected UTF-8, found the byte 0xe9, which is none"),
        (b"", "the sheet: expected at least one claim ([[claims]]), found none"),
        (b"\x00\x01", "line 1, column 1: expected TOML, found a fault (Invalid statement)"),
    ],
)
def test_a_file_that_is_no_text_is_refused_with_its_name(tmp_path: Path, data: bytes, message: str) -> None:
    path = tmp_path / "rig.toml"
    path.write_bytes(data)
    with pytest.raises(BadInput) as caught:
        read_sheet(path)
    assert str(caught.value) == f"{path}, {message}"


def test_a_file_that_is_not_there_is_refused_with_its_name(tmp_path: Path) -> None:
    with pytest.raises(BadInput) as caught:
        read_sheet(tmp_path / "rig.toml")
    assert str(caught.value) == f"{tmp_path / 'rig.toml'}: expected a claim sheet, found No such file or directory"


def test_a_sheet_knows_its_path(tmp_path: Path) -> None:
    path = tmp_path / "rig.toml"
    path.write_text(GOOD, encoding="utf-8")
    sheet = read_sheet(path)
    assert (sheet.path, sheet.title, [item.id for item in sheet.claims]) == (path, "A ring", ["ring.states", "stage"])
