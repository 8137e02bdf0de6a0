from __future__ import annotations

from pathlib import Path

import pytest

from certify.commands.main import main
from tests.surface.running import Certify, Ended


@pytest.fixture
def certify(capfd: pytest.CaptureFixture[str]) -> Certify:
    """Run `certify` through its console entry in this process; the verifier still runs in one of its own."""

    def run(*arguments: str | Path) -> Ended:
        capfd.readouterr()
        code = main([str(argument) for argument in arguments])
        return Ended(code, *capfd.readouterr())

    return run


RIG = """\
title = "A rig"

[complexes.ring]
facets = [[1, 2], [2, 3], [3, 4], [4, 5], [5, 6], [6, 1]]

[complexes.stage]
vertices = ["front", "back", "left", "right"]
facets = [["front", "left"], ["front", "right"], ["back", "left"], ["back", "right"]]

[[claims]]
id = "ring"
kind = "homology"
complex = "ring"
pair = "(D1, S0)"
groups = { 0 = "Z", 1 = "Z^34", 2 = "Z" }

[[claims]]
id = "stage"
kind = "homology"
complex = "stage"
pair = ["(D1, S0)", "(D1, S0)", "(D2, S1)", "(D2, S1)"]
degrees = [1, 2]
"""


@pytest.fixture
def rig(tmp_path: Path) -> Path:
    """Return a sheet with two true claims, in a folder of its own."""
    path = tmp_path / "rig.toml"
    path.write_text(RIG, encoding="utf-8")
    return path
