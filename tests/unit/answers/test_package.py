"""The package's face: names load when they are used, and type checkers see the same ones."""

from __future__ import annotations

import ast
import subprocess
import sys
from importlib import import_module
from pathlib import Path

import pytest

import certify

HEAVY = ("flint", "igraph", "networkx", "sympy")


def typed_names() -> dict[str, str]:
    """Return the names that type checkers see, with the modules that they come from."""
    tree = ast.parse(Path(certify.__file__).read_text(encoding="utf-8"))
    blocks = [block for block in tree.body if isinstance(block, ast.If) and ast.unparse(block.test) == "TYPE_CHECKING"]
    imports = [line for block in blocks for line in block.body if isinstance(line, ast.ImportFrom)]
    return {alias.name: line.module or "" for line in imports for alias in line.names}


def loaded_after(code: str) -> set[str]:
    """Return which of the large libraries a fresh process has loaded after some code."""
    report = f"import sys\n{code}\nprint(*({set(HEAVY)} & set(sys.modules)), file=sys.stderr)"
    run = subprocess.run([sys.executable, "-c", report], capture_output=True, text=True, check=True)
    return set(run.stderr.split())


def test_all_names_are_typed_and_sorted() -> None:
    assert sorted(typed_names()) == sorted(certify.__all__)
    assert len(set(certify.__all__)) == len(certify.__all__)
    assert set(certify.__all__) <= set(dir(certify))


@pytest.mark.parametrize("name", sorted(certify.__all__))
def test_a_name_is_what_type_checkers_think(name: str) -> None:
    assert getattr(certify, name) is getattr(import_module(typed_names()[name]), name)


def test_what_is_not_there() -> None:
    assert not hasattr(certify, "nothing")
    with pytest.raises(AttributeError, match="module 'certify' has no attribute 'nothing'"):
        certify.nothing  # type: ignore[attr-defined] # noqa: B018


def test_the_package_loads_nothing_before_it_is_used() -> None:
    assert loaded_after("import certify") == set()
    assert loaded_after("from certify import BadInput") == set()


def test_help_loads_nothing() -> None:
    assert loaded_after("from certify.commands.main import main\nassert main(['--help']) == 0") == set()


def test_integral_homology_does_without_sympy() -> None:
    code = "from certify import *\nhomology(polyhedral_product(polygon(4), '(D1, S0)')).betti(1)"
    assert "sympy" not in loaded_after(code)
