"""The two sides are held apart, and the verifier stays small."""

from __future__ import annotations

import ast
import io
import sys
import tokenize
from pathlib import Path

import certify

PACKAGE = Path(certify.__file__).parent
VERIFIER = PACKAGE / "verifier.py"
MOST_LINES = 1600
"""All claim kinds together; those of polyhedral products of discs alone need some 600."""
NO_CODE = {
    tokenize.COMMENT,
    tokenize.NL,
    tokenize.NEWLINE,
    tokenize.INDENT,
    tokenize.DEDENT,
    tokenize.ENDMARKER,
    tokenize.ENCODING,
}


def _tree(path: Path = VERIFIER) -> ast.Module:
    return ast.parse(path.read_bytes())


def _imports(path: Path) -> set[str]:
    """Return the modules that a file imports."""
    found: set[str] = set()
    for node in ast.walk(_tree(path)):
        if isinstance(node, ast.Import):
            found.update(alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            found.update(f"{node.module}.{alias.name}" for alias in node.names)
            found.add(str(node.module))
    return found


def lines_of_code(source: bytes) -> int:
    """Return the number of lines that hold code: no blank lines, comments or docstrings."""
    prose: set[int] = set()
    for node in ast.walk(ast.parse(source)):
        if isinstance(node, ast.Module | ast.ClassDef | ast.FunctionDef) and ast.get_docstring(node) is not None:
            prose.update(range(node.body[0].lineno, (node.body[0].end_lineno or 0) + 1))
    code: set[int] = set()
    for token in tokenize.tokenize(io.BytesIO(source).readline):
        if token.type not in NO_CODE:
            code.update(range(token.start[0], token.end[0] + 1))
    return len(code - prose)


def test_lines_of_code_are_counted() -> None:
    module = b'"""Prose.\n\nMore."""\n\n# A comment.\nx = [\n    1,\n]  # with a comment\n\n\n'
    function = b'def f():\n    """Prose."""\n    return x\n'
    assert lines_of_code(module + function) == 5


def test_the_verifier_is_small() -> None:
    assert lines_of_code(VERIFIER.read_bytes()) <= MOST_LINES


def test_the_verifier_imports_the_standard_library_only() -> None:
    roots = {name.partition(".")[0] for name in _imports(VERIFIER)}
    assert "json" in roots
    assert roots <= sys.stdlib_module_names


def test_the_verifier_loads_no_other_code() -> None:
    names = {node.id for node in ast.walk(_tree()) if isinstance(node, ast.Name)}
    assert not names & {"__import__", "eval", "exec", "compile", "importlib"}


def test_nobody_imports_the_verifier() -> None:
    files = [path for path in PACKAGE.rglob("*.py") if path != VERIFIER]
    assert len(files) > 20
    for path in files:
        assert not _imports(path) & {"verifier", "certify.verifier"}, path


def test_the_verifier_has_no_assert() -> None:
    assert not any(isinstance(node, ast.Assert) for node in ast.walk(_tree()))


def test_a_verdict_is_set_to_accepted_in_one_place() -> None:
    places = []
    for node in ast.walk(_tree()):
        if isinstance(node, ast.Dict):
            items = zip(node.keys, node.values, strict=True)
            places += [v for k, v in items if isinstance(k, ast.Constant) and k.value == "verdict"]
        elif isinstance(node, ast.Assign):
            targets = [t for t in node.targets if isinstance(t, ast.Subscript)]
            places += [node.value for t in targets if isinstance(t.slice, ast.Constant) and t.slice.value == "verdict"]
    words = [c.value for place in places for c in ast.walk(place) if isinstance(c, ast.Constant)]
    assert words.count("accepted") == 1
    assert set(words) == {"accepted", "rejected", "undecided", "reason"}
