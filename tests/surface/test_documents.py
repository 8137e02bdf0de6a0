from __future__ import annotations

import ast
import json
import re
import shlex
import subprocess
import sys
from copy import deepcopy
from functools import cache
from pathlib import Path
from typing import Any

import pytest
from jsonschema import Draft202012Validator
from referencing import Registry, Resource

from certify.certificate import Spool
from certify.claims import (
    Claim,
    HomologyClaim,
    RealToricClaim,
    SmashClaim,
    SummandClaim,
    TableClaim,
    TorClaim,
    prove,
)
from certify.claims.homology import Route
from certify.products import Pair, PolyhedralProduct, parse_pair
from certify.simplicial import SimplicialComplex
from certify.simplicial.families import points, polygon, simplex
from tests.helpers import disc_product, verifier
from tests.verifier import forging

ROOT = Path(__file__).parents[2]
DOCS = ROOT / "docs"
FORMAT = DOCS / "certificate-format.md"
REFEREES = DOCS / "for-referees.md"
DOCUMENTS = sorted([*DOCS.glob("*.md"), *DOCS.glob("decisions/*.md")])

PROJECTIVE_PLANE = ("124", "126", "134", "135", "156", "235", "236", "245", "346", "456")
RECORDS = {"basis": "record-cells", "block": "record-blocks"} | {
    key: f"record-{key}" for key in ("splitting", "generators", "order")
}


def claim(
    *facets: str, n: int | list[int] = 1, degrees: tuple[int, ...] | None = None, route: Route = "blocks"
) -> HomologyClaim:
    """Return a claim over the complex with these facets, one digit a vertex, and as many vertices as n has entries."""
    vertices = range(1, len(n) + 1) if isinstance(n, list) else None
    k = SimplicialComplex.from_facets([[int(vertex) for vertex in facet] for facet in facets], vertices)
    return HomologyClaim(disc_product(k, n), degrees=degrees, route=route)


OWN = Pair.from_cells([(0, False, {}), (1, False, {}), (1, True, {}), (2, True, {1: 1, 2: -2})])


def over(*pairs: str | Pair, route: Route = "blocks") -> HomologyClaim:
    """Return a claim over a simplex with these pairs."""
    chosen = tuple(pair if isinstance(pair, Pair) else parse_pair(pair) for pair in pairs)
    return HomologyClaim(PolyhedralProduct(simplex(len(pairs)), chosen), route=route)


SPACES = {"homology", "smash", "real-toric", "tor", "table", "summand"}
CLAIMS: dict[str, Claim[Any]] = {
    "two-points": claim("1", "2"),
    "two-points-by-cells": claim("1", "2", route="cells"),
    "point": claim(""),
    "degree-3": claim("1", "2", "3", n=[1, 2, 3], degrees=(3,)),
    "ghosts-alone": claim("", n=[1, 3]),
    "mixed-with-a-ghost": claim("12", "23", "13", n=[1, 2, 3, 2]),
    "torsion": claim(*PROJECTIVE_PLANE),
    "torsion-by-cells": claim(*PROJECTIVE_PLANE, n=2, route="cells"),
    "torsion-in-one-degree": claim(*PROJECTIVE_PLANE, n=2, degrees=(8,)),
    "group": over("(P2(4), *)", "(P2(6), *)"),
    "own-pair": over(OWN, "(cone 3, 3)", "(RP3, *)"),
    "orbits": over("(D1, S0)", "(D1, S0)", OWN, route="orbits"),
    "twice": HomologyClaim(PolyhedralProduct(points(2), (OWN, OWN)), route="orbits"),
    "smash": SmashClaim(over("(CP2, *)", "(S3, *)").product),
    "klein-bottle": RealToricClaim(polygon(4), ("1010", "0111")),
    "tor": TorClaim(polygon(5)),
    "table": TableClaim(polygon(4)),
    "summand": SummandClaim(polygon(5), (2, 3, 5), (1,)),
    **{name: claim for name, claim in forging.CLAIMS.items() if claim.kind not in SPACES},
}
"""Claims that together make the prover write everything that the format has; some of them are in the documents."""


@cache
def certificate(name: str, folder: Path) -> str:
    path = folder / f"{name}.cert.jsonl"
    with Spool() as spool:
        prove(CLAIMS[name], spool).write(path, {"claim": name})
    return path.read_text(encoding="utf-8")


@pytest.fixture(scope="session")
def written(tmp_path_factory: pytest.TempPathFactory) -> Any:
    folder = tmp_path_factory.mktemp("certificates")
    return lambda name: certificate(name, folder)


# -- schemas ------------------------------------------------------------------------------------


@cache
def schemas() -> dict[str, Any]:
    files = DOCS.glob("schema/*.schema.json")
    return {path.name.removesuffix(".schema.json"): json.loads(path.read_bytes()) for path in files}


def is_valid(kind: str, value: object) -> bool:
    resources = [(schema["$id"], Resource.from_contents(schema)) for schema in schemas().values()]
    registry: Registry[Any] = Registry().with_resources(resources)
    return Draft202012Validator(schemas()[kind], registry=registry).is_valid(value)


def test_there_is_a_schema_for_each_kind_of_line() -> None:
    openings = {"record-splitting", "record-generators", "record-order"}
    assert set(schemas()) == {"header", "record-blocks", "record-cells", "end", "values"} | openings
    for name, schema in schemas().items():
        Draft202012Validator.check_schema(schema)
        assert schema["$id"] == f"{name}.schema.json"


@pytest.mark.parametrize("name", CLAIMS)
def test_what_the_prover_writes_is_valid(name: str, written: Any) -> None:
    header, *records, end = map(json.loads, written(name).splitlines())
    assert is_valid("header", header)
    assert is_valid("end", end)
    for record in records:
        assert is_valid(RECORDS[max(record)], record)


def test_the_claims_make_the_prover_write_every_key_of_a_basis(written: Any) -> None:
    """Otherwise the test above would say less than it seems to."""
    records = [json.loads(line) for name in CLAIMS for line in written(name).splitlines()[1:-1]]
    keys = {key for record in records if "basis" in record for degree in record["basis"] for key in degree}
    assert keys == set(schemas()["values"]["$defs"]["basis"]["items"]["properties"])


HEADER: dict[str, Any] = {
    "about": {"claim": "a"},
    "format": 1,
    "route": "blocks",
    "statement": {
        "degrees": [1],
        "facets": [[1], [2]],
        "groups": [[1, 1, [2]]],
        "kind": "homology",
        "pairs": ["(D1, S0)", "(D1, S0)"],
        "vertices": 2,
    },
}
CHARACTER: dict[str, Any] = HEADER | {
    "statement": {
        "degree": 1,
        "elements": [[1, 2], [2, 1]],
        "facets": [[1], [2]],
        "functions": [[1, 1]],
        "generators": [[2, 1]],
        "kind": "character",
        "pairs": ["(D1, S0)", "(D1, S0)"],
        "products": [[0, 1]],
        "summands": None,
        "values": [1, -1],
        "vertices": 2,
    }
}
RECORD: dict[str, Any] = {
    "basis": [{"matched": [0], "pairs": [[[0, 1]], [[0, 2], 2, [0, 1]]], "cycles": [[0, str(2**53)]]}],
    "block": "11",
}
GROUPED: dict[str, Any] = {"order": [1, 0], "groups": [{"cells": [1, 0], "inverse": [[1, 0], [0, 1]]}]}
END: dict[str, Any] = {"end": {"records": 0, "sha256": "0" * 64}}

INVALID: dict[str, tuple[str, Any, tuple[str | int, ...], Any]] = {
    "another format": ("header", HEADER, ("format",), 2),
    "true as the format": ("header", HEADER, ("format",), True),
    "an unknown route": ("header", HEADER, ("route",), "summands"),
    "a name with a line feed": ("header", HEADER, ("about", "claim"), "a\nb"),
    "an unknown key": ("header", HEADER, ("note",), ""),
    "no degrees": ("header", HEADER, ("statement", "degrees"), []),
    "a degree twice": ("header", HEADER, ("statement", "degrees"), [1, 1]),
    "no facets": ("header", HEADER, ("statement", "facets"), []),
    "vertex 0": ("header", HEADER, ("statement", "facets", 0), [0]),
    "a group that is zero": ("header", HEADER, ("statement", "groups", 0), [1, 0, []]),
    "a negative rank": ("header", HEADER, ("statement", "groups", 0, 1), -1),
    "torsion of order 1": ("header", HEADER, ("statement", "groups", 0, 2, 0), 1),
    "a fourth entry of a group": ("header", HEADER, ("statement", "groups", 0), [1, 1, [], 0]),
    "an unknown kind": ("header", HEADER, ("statement", "kind"), "cohomology"),
    "a pair without its space": ("header", HEADER, ("statement", "pairs", 0), "(D1,S0)"),
    "a small integer as text": ("header", HEADER, ("statement", "vertices"), "2"),
    "a block that is no word": ("record-blocks", RECORD, ("block",), "1-"),
    "a block on the other route": ("record-cells", {"basis": RECORD["basis"]}, ("block",), "11"),
    "an empty list": ("record-blocks", RECORD, ("basis", 0, "matched"), []),
    "a matched cell twice": ("record-blocks", RECORD, ("basis", 0, "matched"), [0, 0]),
    "the zero vector": ("record-blocks", RECORD, ("basis", 0, "cycles", 0), []),
    "a fraction": ("record-blocks", RECORD, ("basis", 0, "cycles", 0, 1), 0.5),
    "a short number as text": ("record-blocks", RECORD, ("basis", 0, "cycles", 0, 1), "7"),
    "a long integer as a number": ("record-blocks", RECORD, ("basis", 0, "cycles", 0, 1), 2**53),
    "a pair without b": ("record-blocks", RECORD, ("basis", 0, "pairs", 1), [[0, 2], 2]),
    "a pair with e = 1 and b": ("record-blocks", RECORD, ("basis", 0, "pairs", 1, 1), 1),
    "groups without an order": ("record-blocks", RECORD, ("basis", 0, "groups"), GROUPED["groups"]),
    "a group of one cell": ("record-cells", {"basis": [GROUPED]}, ("basis", 0, "groups", 0, "cells"), [1]),
    "an element with 0": ("header", CHARACTER, ("statement", "generators", 0, 0), 0),
    "an image twice": ("header", CHARACTER, ("statement", "generators", 0, 0), 1),
    "a value that is a fraction": ("header", CHARACTER, ("statement", "values", 0), 0.5),
    "a product of three": ("header", CHARACTER, ("statement", "products", 0), [1, 1, 1]),
    "groups of another kind": ("header", CHARACTER, ("statement", "groups"), []),
    "a facet twice in a shelling": ("record-order", {"order": [[1], [2]]}, ("order", 0), [2]),
    "a short digest": ("end", END, ("end", "sha256"), "0" * 63),
    "a digest in capitals": ("end", END, ("end", "sha256"), "A" * 64),
    "no number of records": ("end", END, ("end",), {"sha256": "0" * 64}),
}
"""A schema, a line that it accepts, the place of a change, and the value that makes it invalid."""


@pytest.mark.parametrize("name", INVALID)
def test_a_schema_refuses(name: str) -> None:
    kind, valid, place, value = INVALID[name]
    assert is_valid(kind, valid)
    line = deepcopy(valid)
    inner = line
    for step in place[:-1]:
        inner = inner[step]
    inner[place[-1]] = value
    assert not is_valid(kind, line)


# -- the verifier and what the documents say of it ----------------------------------------------


@cache
def verifier_tree() -> ast.Module:
    return ast.parse((ROOT / "certify" / "verifier.py").read_bytes())


def reason_codes() -> set[str]:
    """Return the codes that the verifier can give: those it fails with, and those it puts into a report itself."""
    given: list[ast.expr | None] = []
    for node in ast.walk(verifier_tree()):
        if isinstance(node, ast.Call) and isinstance(node.func, ast.Name) and node.func.id in {"Failure", "require"}:
            given.append(node.args[0 if node.func.id == "Failure" else 1])
        elif isinstance(node, ast.Dict):
            items = zip(node.keys, node.values, strict=True)
            given += [value for key, value in items if isinstance(key, ast.Constant) and key.value == "reason"]
    codes = [code.value for code in given if isinstance(code, ast.Constant)]
    # The one code that is not written out is that which `require` hands on.
    assert len(codes) == len(given) - 1
    return {str(code) for code in codes}


def test_every_reason_code_is_documented_with_its_verdict_and_no_other_one() -> None:
    text = FORMAT.read_text(encoding="utf-8")
    rows = re.findall(r"^\| `([a-z-]+)` \| (accepted|rejected|undecided) \|", text, re.M)
    undecided = set(verifier().UNDECIDED)
    expected = {code: "undecided" if code in undecided else "rejected" for code in reason_codes()}
    expected["proved"] = "accepted"
    assert undecided <= set(expected)
    assert dict(rows) == expected
    assert len(rows) == len(expected)


def test_the_reading_guide_names_every_part_of_the_verifier() -> None:
    guide = REFEREES.read_text(encoding="utf-8")
    guide = guide[guide.index("| read |") : guide.index("## A small certificate")]
    named = {name for row in re.findall(r"^\| (`[^|]*) \|", guide, re.M) for name in re.findall(r"`(\w+)`", row)}
    parts = {node.name for node in verifier_tree().body if isinstance(node, ast.FunctionDef | ast.ClassDef)}
    assert parts <= named
    assert all(hasattr(verifier(), name) for name in named)


def test_the_limits_are_those_that_the_verifier_has() -> None:
    text = FORMAT.read_text(encoding="utf-8")
    assert f"$2^{{18}} = {verifier().BATCH}$" in text
    rows = re.findall(r"^\| [^|]+ \| `(--max-[a-z]+)` \| ([0-9 ^]+) \|", text, re.M)
    documented = {option: _number(number) for option, number in rows}
    help_text = _output([sys.executable, "-I", "-S", "verifier.py", "--help"], ROOT / "certify")
    in_help = re.findall(r"^  (--max-[a-z]+) [^(]*\(([0-9]+)\)", help_text, re.M)
    assert documented == {option: int(number) for option, number in in_help}
    assert len(documented) == 4


def _number(text: str) -> int:
    base, _, exponent = text.replace(" ", "").partition("^")
    power: int = int(base) ** int(exponent or 1)
    return power


# -- what the documents show ---------------------------------------------------------------------


def blocks(path: Path, language: str) -> list[str]:
    """Return the code blocks of a document in this language."""
    return re.findall(rf"^```{language}\n(.*?)^```$", path.read_text(encoding="utf-8"), re.M | re.S)


def test_the_certificates_that_are_shown_are_those_that_the_prover_writes(written: Any) -> None:
    end, *whole = blocks(FORMAT, "jsonl")
    shown, by_cells, record, group = blocks(REFEREES, "jsonl")
    assert group == written("group").splitlines(keepends=True)[-2]
    named = re.findall(r"^`([a-z0-9-]+)\.cert\.jsonl`:$", FORMAT.read_text(encoding="utf-8"), re.M)
    assert whole == [written(name) for name in named]
    assert len(named) == 6
    assert end == written("two-points").splitlines(keepends=True)[-1]
    assert [shown, by_cells] == whole[:2]
    assert record == written("torsion").splitlines(keepends=True)[-2]


@pytest.fixture
def folder(tmp_path: Path, written: Any) -> Path:
    """Return a folder as a referee has it while reading: the verifier, and the files of the example."""
    (tmp_path / "verifier.py").write_bytes((ROOT / "certify" / "verifier.py").read_bytes())
    example = written("two-points")
    changed = example.replace("[0,-1,1,1]", "[0,1,1,1]")
    assert changed != example
    (tmp_path / "two-points.cert.jsonl").write_text(example, encoding="utf-8")
    (tmp_path / "changed.cert.jsonl").write_text(changed, encoding="utf-8")
    return tmp_path


def test_commands_print_what_the_documents_show(folder: Path) -> None:
    shown = [block for path in DOCUMENTS for block in blocks(path, "console")]
    assert len(shown) == 3
    for block in shown:
        for command, output in re.findall(r"^\$ (.*)\n((?:[^$].*\n)*)", block, re.M):
            python, *arguments = shlex.split(command)
            assert python == "python3"
            assert _output([sys.executable, *arguments], folder) == output


def _output(command: list[str], folder: Path) -> str:
    return subprocess.run(command, cwd=folder, capture_output=True, check=False, encoding="utf-8").stdout


# -- links --------------------------------------------------------------------------------------


def anchors(path: Path) -> set[str]:
    """Return the anchors of a document's headings, as GitHub makes them: no punctuation, dashes for spaces."""
    headings = re.findall(r"^#+ (.*)$", path.read_text(encoding="utf-8"), re.M)
    return {re.sub(r"[^\w\- ]", "", heading.lower()).replace(" ", "-") for heading in headings}


@pytest.mark.parametrize("path", DOCUMENTS, ids=lambda path: path.name)
def test_links_between_the_documents_lead_somewhere(path: Path) -> None:
    for link in re.findall(r"\]\(([^)\s]+)\)", path.read_text(encoding="utf-8")):
        file, _, anchor = link.partition("#")
        if "://" not in file:
            target = (path.parent / file).resolve() if file else path
            assert target.exists(), link
            assert not anchor or anchor in anchors(target), link
