from __future__ import annotations

import tomllib
from pathlib import Path
from typing import Any

import networkx as nx
import pytest

from certify.simplicial import (
    FAMILIES,
    SimplicialComplex,
    build,
    clique_complex,
    complex_from_definition,
    independence_complex,
    join,
    nested_set_complex,
    skeleton,
)
from certify.tables import KeyFault, Table

from_facets = SimplicialComplex.from_facets

SHEET = Path("sheets")
RING = build("polygon", n=5)
CYCLE = nx.cycle_graph(range(1, 6))
SOURCES = "facets, missing-faces, monomials, family, graph6, edges, incidence, file, operation"


def defined(text: str, folder: Path = SHEET) -> SimplicialComplex:
    """Return the complex that a table in TOML defines, where the complex ring is known."""
    return complex_from_definition(Table(("complexes", "k"), tomllib.loads(text)), {"ring": RING}, folder)


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        ("facets = [[1, 2], [2, 3]]", from_facets([[1, 2], [2, 3]])),
        ('facets = [["a"]]\nvertices = ["b", "a"]', from_facets([["a"]], ["b", "a"])),
        ("missing-faces = [[1, 3], [1, 4], [2, 4], [2, 5], [3, 5]]", RING),
        ("missing-faces = []\nvertices = [2, 1]", from_facets([[1, 2]], [2, 1])),
        ('monomials = ["x1*x3", "x2*x4"]', from_facets([["x1", "x2"], ["x2", "x3"], ["x3", "x4"], ["x1", "x4"]])),
        ('monomials = ["x2"]\nvariables = ["x2", "x1"]', from_facets([["x1"]], ["x2", "x1"])),
        ('family = "polygon"\nn = 5', RING),
        ('family = "stacked-polytope"\nm = 6\nd = 3', build("stacked-polytope", m=6, d=3)),
        ('family = "torus"', build("torus")),
        ('graph6 = "Dhc"\nas = "clique"', RING),
        ('graph6 = "Dhc"\nas = "independence"', independence_complex(CYCLE)),
        ('graph6 = "Dhc"\nas = "nested-sets"', nested_set_complex(CYCLE)),
        ('edges = [[1, 2], [2, 3], [3, 4], [4, 5], [5, 1]]\nas = "clique"', RING),
        (
            'edges = [["a", "b"]]\nas = "independence"\nvertices = ["c", "b", "a"]',
            from_facets([["a", "c"], ["b", "c"]], ["c", "b", "a"]),
        ),
        ('edges = []\nvertices = [1, 2]\nas = "clique"', build("points", m=2)),
        ('incidence = ["011", "101", "110"]', build("polygon", n=3)),
        ('operation = "skeleton"\nof = "ring"\ndimension = 0', skeleton(RING, 0)),
        ('operation = "join"\nof = ["ring", "ring"]', join(RING, RING)),
    ],
)
def test_definitions(text: str, expected: SimplicialComplex) -> None:
    assert defined(text) == expected


@pytest.mark.parametrize(
    ("name", "content", "more", "expected"),
    [
        ("k.txt", "1 2; 2 3", "", from_facets([[1, 2], [2, 3]])),
        ("k.json", "[[1, 2], [2, 3]]", "", from_facets([[1, 2], [2, 3]])),
        ("k.toml", "facets = [[1, 2]]\nvertices = [2, 1, 0]", "", from_facets([[1, 2]], [2, 1, 0])),
        ("k.txt", "1 2; 2 3; 1 3", 'as = "clique"', build("simplex", m=3)),
        ("k.edges", "1 2; 2 3; 1 3", 'as = "independence"', build("points", m=3)),
        ("k.g6", "Dhc", 'as = "nested-sets"', nested_set_complex(CYCLE)),
    ],
)
def test_files_lie_beside_the_sheet(
    tmp_path: Path, name: str, content: str, more: str, expected: SimplicialComplex
) -> None:
    (tmp_path / "data").mkdir()
    (tmp_path / "data" / name).write_text(content, encoding="utf-8")
    assert defined(f'file = "data/{name}"\n{more}', tmp_path) == expected
    assert defined(f'file = "../data/{name}"\n{more}', tmp_path / "data") == expected


FAULTS: dict[str, tuple[str, str]] = {
    "nothing": ("", f": expected one of the keys {SOURCES}, found none of them"),
    "vertices alone": ("vertices = [1]", f": expected one of the keys {SOURCES}, found none of them"),
    "two sources": (
        'family = "torus"\nfacets = [[1]]',
        f", key facets: expected only one of the keys {SOURCES}, found family too",
    ),
    "an unknown key": (
        "facets = [[1]]\nghosts = [2]",
        ", key ghosts: expected no other keys than facets, vertices, found 'ghosts'",
    ),
    "facets that are no list": ('facets = "1 2"', ", key facets: expected a list, found '1 2'"),
    "no facet": ("facets = []", ", key facets: expected at least one facet ([[]] has the empty face), found none"),
    "a facet with a vertex twice": (
        "facets = [[1], [2, 2]]",
        ", key facets, item 2: expected each vertex once, found vertex 2 twice",
    ),
    "a facet with an unknown vertex": (
        "vertices = [1]\nfacets = [[1], [2]]",
        ", key facets, item 2: expected vertices of the complex, found vertex 2, which is none",
    ),
    "a vertex twice": (
        "vertices = [1, 1]\nfacets = [[1]]",
        ", key vertices: expected each vertex once, found vertex 1 twice",
    ),
    "a missing face that is no list": (
        "missing-faces = [[1], 2]",
        ", key missing-faces, item 2: expected a list, found 2",
    ),
    "a missing face without vertices": (
        "missing-faces = [[1], []]",
        ", key missing-faces, item 2: expected at least one vertex, found none",
    ),
    "missing faces that are no list": (
        "missing-faces = 1",
        ", key missing-faces: expected a list of lists of labels, found 1",
    ),
    "a vertex beside missing faces that is none": (
        "missing-faces = []\nvertices = [1.5]",
        ", key vertices: expected whole numbers or strings as labels, found 1.5",
    ),
    "a monomial with a square": (
        'monomials = ["x1*x2", "x1**2"]',
        ", key monomials, item 2: expected a product of different variables like x1*x2, found 'x1**2'",
    ),
    "a monomial that is no text": (
        "monomials = [12]",
        ", key monomials, item 1: expected a product of different variables like x1*x2, found 12",
    ),
    "monomials that are no list": (
        'monomials = "x1*x2"',
        ", key monomials: expected a list of texts like \"x1*x2\", found 'x1*x2'",
    ),
    "a monomial with an unknown variable": (
        'monomials = ["x1*x2"]\nvariables = ["x1"]',
        ", key monomials, item 1: expected vertices of the complex, found vertex 'x2', which is none",
    ),
    "a variable that is none": (
        'monomials = ["x1*x2"]\nvariables = ["x1", 2]',
        ", key variables: expected names of variables like x1, found 2",
    ),
    "variables that are no list": (
        'monomials = ["x1*x2"]\nvariables = "x1"',
        ", key variables: expected a list of names, found 'x1'",
    ),
    "an unknown family": (
        'family = "polygoon"\nn = 4',
        f", key family: expected one of {', '.join(FAMILIES)}, found 'polygoon'",
    ),
    "a family that is no text": ("family = 4", ", key family: expected the name of a family, found 4"),
    "an impossible argument": (
        'family = "polygon"\nn = 2',
        ", key n: expected a whole number of at least 3, found 2",
    ),
    "an argument too few": (
        'family = "polygon"',
        ", key family: expected the argument n (number of vertices, at least 3), found none",
    ),
    "an argument too many": (
        'family = "polygon"\nn = 4\nm = 4',
        ", key m: expected no other keys than family, n, found 'm'",
    ),
    "a graph6 text that is none": (
        'graph6 = "Dh"\nas = "clique"',
        ", key graph6: expected a graph6 string, found 'Dh', which has the wrong length",
    ),
    "a graph without as": (
        'graph6 = "Dhc"',
        ': expected the key as with "clique" or "independence" or "nested-sets", found no such key',
    ),
    "a graph as something else": (
        'graph6 = "Dhc"\nas = "matching"',
        ', key as: expected "clique" or "independence" or "nested-sets", found \'matching\'',
    ),
    "as a list": (
        'graph6 = "Dhc"\nas = ["clique"]',
        ', key as: expected "clique" or "independence" or "nested-sets", found a list',
    ),
    "a graph in pieces": (
        'edges = [[1, 2], [3, 4]]\nas = "nested-sets"',
        ", key edges: expected a connected graph, found one with 2 components",
    ),
    "an edge that is none": (
        'edges = [[1, 2], [3]]\nas = "clique"',
        ", key edges, item 2: expected two vertices, found 1",
    ),
    "a polytope that is neither simple nor simplicial": (
        'incidence = ["11110", "10011", "11001", "01101", "00111"]',
        ", key incidence: expected 3 ones in each row, for a simple polytope of dimension 3, or in each column, "
        "for a simplicial one, found 4 in row 1 and 4 in column 5",
    ),
    "a row that is too short": (
        'incidence = ["011", "10", "110"]',
        ", key incidence, item 2: expected 3 entries like row 1, found 2",
    ),
    "a row that is no text": (
        'incidence = ["011", [1, 0, 1]]',
        ', key incidence, item 2: expected a row like "0110", found a list',
    ),
    "a path that is no text": ("file = 1", ", key file: expected a path from the folder of the sheet, found 1"),
    "a path from the root": (
        'file = "/k.txt"',
        ", key file: expected a path from the folder of the sheet, found '/k.txt'",
    ),
    "a file of edges without as": (
        'file = "k.edges"',
        ': expected the key as with "clique" or "independence" or "nested-sets", found no such key',
    ),
    "a file of another kind": (
        'file = "k.pdf"',
        f", key file: expected a file name ending in .txt, .json or .toml, found another ending ({SHEET / 'k.pdf'})",
    ),
    "an unknown complex": (
        'operation = "alexander-dual"\nof = "k"',
        ", key of: expected a complex that stands above this one (ring), found 'k'",
    ),
}


@pytest.mark.parametrize("fault", FAULTS)
def test_a_fault_is_named_with_its_key(fault: str) -> None:
    text, message = FAULTS[fault]
    with pytest.raises(KeyFault) as caught:
        defined(text)
    assert str(caught.value) == f"complex k{message}"


@pytest.mark.parametrize(
    ("name", "content", "more", "expected", "found"),
    [
        ("k.txt", "1 2\n3 3", "", "each vertex once", "vertex 3 twice ({}, line 2, facet 2)"),
        (
            "k.txt",
            "1 2\n1 2 3",
            'as = "clique"',
            "two vertices, or one that is isolated",
            "'1 2 3' ({}, line 2, edge 2)",
        ),
        ("k.g6", "Dh", 'as = "clique"', "a graph6 string", "'Dh', which has the wrong length ({}, graph6)"),
        ("k.edges", "1; 2", 'as = "nested-sets"', "a connected graph", "one with 2 components (graph)"),
        ("k.txt", None, "", "a readable file", "No such file or directory ({}, file)"),
    ],
)
def test_a_fault_in_a_file_is_named_with_the_file(
    tmp_path: Path, name: str, content: str | None, more: str, expected: str, found: str
) -> None:
    path = tmp_path / name
    if content is not None:
        path.write_text(content, encoding="utf-8")
    with pytest.raises(KeyFault) as caught:
        defined(f'file = "{name}"\n{more}', tmp_path)
    assert caught.value.keys == ("complexes", "k", "file")
    assert (caught.value.expected, caught.value.found) == (expected, found.format(path))


@pytest.mark.parametrize(
    ("text", "keys"),
    [
        ("facets = [[1], [2, 2]]", ("facets", 1)),
        ('family = "polygon"\nn = 2', ("n",)),
        ("missing-faces = [[1], []]", ("missing-faces", 1)),
        ('operation = "link"\nof = "ring"\nface = [1, 3]', ("face",)),
        ("", ()),
    ],
)
def test_whoever_has_the_sheet_can_find_the_line(text: str, keys: Any) -> None:
    with pytest.raises(KeyFault) as caught:
        defined(text)
    assert caught.value.keys == ("complexes", "k", *keys)


def test_the_labels_of_a_complex_of_a_graph_are_those_of_the_graph() -> None:
    assert defined('edges = [["b", 1]]\nas = "clique"') == clique_complex(nx.Graph([("b", 1)]))
