from __future__ import annotations

from pathlib import Path
from typing import Any

import pytest

from certify.errors import BadInput
from certify.simplicial import SimplicialComplex, complex_from_table, read_complex_file, read_facets

from_facets = SimplicialComplex.from_facets


@pytest.mark.parametrize(
    ("text", "facets"),
    [
        ("1 2; 2 3", [[1, 2], [2, 3]]),
        ("1 2\n2 3\n", [[1, 2], [2, 3]]),
        ("1,2;2 , 3;", [[1, 2], [2, 3]]),
        ("\n# dimmers on a ring\n1 2 # left\n\n 2\t3 ; ; 3 1 # 7 8\r\n", [[1, 2], [2, 3], [1, 3]]),
        ("a b; b c1", [["a", "b"], ["b", "c1"]]),
        ("0 -1; 01 2", [[0, -1], [1, 2]]),
        ("left 1", [["left", 1]]),
        ("1.5 2", [["1.5", 2]]),
        ("1234567890123456 1", [["1234567890123456", 1]]),
        ("{}", [[]]),
        ("{}; 1", [[1]]),
        ("# nothing\n{} # but the empty face\n", [[]]),
    ],
)
def test_facets_in_plain_text(text: str, facets: list[list[Any]]) -> None:
    assert read_facets(text) == from_facets(facets)


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("", "facets: expected at least one facet ([[]] has the empty face), found none"),
        ("# 1 2", "facets: expected at least one facet ([[]] has the empty face), found none"),
        (";;", "facets: expected at least one facet ([[]] has the empty face), found none"),
        ("1 2\n\n3 4; 5 5", "line 3, facet 3: expected each vertex once, found vertex 5 twice"),
        ("1 01", "line 1, facet 1: expected each vertex once, found vertex 1 twice"),
        ("[1,2],[2,3]", "line 1, facet 1: expected labels without brackets, as in 1 2; 2 3, found [1"),
        ("1 2; {1 2}", "line 1, facet 2: expected labels without brackets, as in 1 2; 2 3, found {1"),
        ("1 {}", "line 1, facet 1: expected labels without brackets, as in 1 2; 2 3, found {}"),
        ("(1 2)", "line 1, facet 1: expected labels without brackets, as in 1 2; 2 3, found (1"),
    ],
)
def test_faults_in_plain_text_are_named(text: str, message: str) -> None:
    with pytest.raises(BadInput) as caught:
        read_facets(text)
    assert str(caught.value) == message


def test_a_table_may_list_ghosts() -> None:
    table = {"facets": [["a", "b"]], "vertices": ["c", "b", "a"]}
    assert complex_from_table(table) == from_facets([["a", "b"]], ["c", "b", "a"])


@pytest.mark.parametrize(
    ("table", "message"),
    [
        ({}, "key facets: expected a list of facets, found no such key"),
        ({"facets": []}, "facets: expected at least one facet ([[]] has the empty face), found none"),
        ({"facets": "1 2"}, "facets: expected a list, found '1 2'"),
        ({"facets": [[1], 2]}, "facet 2: expected a list, found 2"),
        ({"facets": [[1, 2.5]]}, "facet 1: expected whole numbers or strings as labels, found 2.5"),
        ({"facets": [[True]]}, "facet 1: expected whole numbers or strings as labels, found True"),
        ({"facets": [[1, None]]}, "facet 1: expected whole numbers or strings as labels, found None"),
        ({"facets": [[1, [2]]]}, "facet 1: expected whole numbers or strings as labels, found [2]"),
        ({"facets": [[1], [2, 2]]}, "facet 2: expected each vertex once, found vertex 2 twice"),
        ({"facets": [[1]], "vertices": 1}, "vertices: expected a list, found 1"),
        (
            {"facets": [[1]], "vertices": [None]},
            "vertices: expected whole numbers or strings as labels, found None",
        ),
        (
            {"facets": [[1]], "vertices": []},
            "facet 1: expected vertices of the complex, found vertex 1, which is none",
        ),
        (
            {"facets": [[1]], "ghosts": [2]},
            "key ghosts: expected only the keys facets and vertices, found another key",
        ),
    ],
)
def test_faults_in_tables_are_named(table: dict[str, object], message: str) -> None:
    with pytest.raises(BadInput) as caught:
        complex_from_table(table)
    assert str(caught.value) == message


@pytest.mark.parametrize(
    ("name", "text"),
    [
        ("path.txt", "1 2\n2 3\n"),
        ("PATH.TXT", "1 2; 2 3"),
        ("path.json", "[[1, 2], [2, 3]]"),
        ("path.json", '{"facets": [[2, 3], [1, 2]], "vertices": [1, 2, 3]}'),
        ("path.toml", "facets = [[1, 2], [2, 3]]\n"),
        ("path.toml", "vertices = [1, 2, 3]\nfacets = [\n  [1, 2],\n  [2, 3],\n]\n"),
    ],
)
@pytest.mark.parametrize("mark", ["", "\N{BYTE ORDER MARK}"])
def test_files_are_read_by_their_ending(tmp_path: Path, name: str, text: str, mark: str) -> None:
    path = tmp_path / name
    path.write_text(mark + text, encoding="utf-8")
    assert read_complex_file(path) == from_facets([[1, 2], [2, 3]])
    assert read_complex_file(str(path)) == from_facets([[1, 2], [2, 3]])


@pytest.mark.parametrize(
    ("name", "text", "message"),
    [
        ("k.txt", "1 2\n3 3\n", "line 2, facet 2: expected each vertex once, found vertex 3 twice"),
        ("k.json", "[[1, 2],\n [2,,3]]", "line 2: expected JSON, found Expecting value"),
        ("k.json", "[[1, 1]]", "facet 1: expected each vertex once, found vertex 1 twice"),
        ("k.json", '{"facets": [[1]], "facets": [[2]]}', "key facets: expected each key once, found the key twice"),
        ("k.json", "7", "facets: expected a list, found 7"),
        ("k.json", "null", "facets: expected a list, found None"),
        ("k.json", "[[NaN]]", "facet 1: expected whole numbers or strings as labels, found nan"),
        ("k.toml", "facets = [[1, 2]", "file: expected TOML, found "),
        ("k.toml", "vertices = [1]", "key facets: expected a list of facets, found no such key"),
        ("k.csv", "1 2", "file: expected"),
    ],
)
def test_faults_in_files_begin_with_the_path(tmp_path: Path, name: str, text: str, message: str) -> None:
    path = tmp_path / name
    path.write_text(text, encoding="utf-8")
    with pytest.raises(BadInput) as caught:
        read_complex_file(path)
    if name.endswith(".csv"):
        assert str(caught.value) == f"{path}: expected a file name ending in .txt, .json or .toml, found another ending"
    else:
        assert str(caught.value).startswith(f"{path}, {message}")


@pytest.mark.parametrize("name", ["k.json", "k.toml"])
def test_nesting_without_end_is_bad_input(tmp_path: Path, name: str) -> None:
    path = tmp_path / name
    text = "[" * 100_000 if name == "k.json" else "facets = " + "[" * 100_000
    path.write_text(text, encoding="utf-8")
    with pytest.raises(BadInput, match="of an ordinary size"):
        read_complex_file(path)


@pytest.mark.parametrize(("name", "text"), [("k.json", "[[{}]]"), ("k.toml", "facets = [[{}]]")])
def test_a_number_too_long_to_read_is_bad_input(tmp_path: Path, name: str, text: str) -> None:
    path = tmp_path / name
    path.write_text(text.replace("{}", "1" * 5000), encoding="utf-8")
    with pytest.raises(BadInput, match="of an ordinary size"):
        read_complex_file(path)


def test_a_missing_file_is_bad_input(tmp_path: Path) -> None:
    with pytest.raises(BadInput, match="expected a readable file, found No such file"):
        read_complex_file(tmp_path / "none.txt")


def test_a_folder_is_bad_input(tmp_path: Path) -> None:
    (tmp_path / "folder.txt").mkdir()
    with pytest.raises(BadInput, match="expected a readable file"):
        read_complex_file(tmp_path / "folder.txt")


def test_bytes_that_are_no_text_are_bad_input(tmp_path: Path) -> None:
    (tmp_path / "k.txt").write_bytes(b"1 2\xff")
    with pytest.raises(BadInput, match="expected UTF-8 text, found other bytes at position 3"):
        read_complex_file(tmp_path / "k.txt")
