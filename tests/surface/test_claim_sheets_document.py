"""The reference of claim sheets: its examples are one sheet, which is proved, and its tables name everything."""

from __future__ import annotations

import re
from pathlib import Path

from certify.claims.kinds import KINDS
from certify.products.small_covers import REAL_TORIC_FAMILIES
from certify.sheet import parse_sheet
from certify.simplicial.operation_tables import OPERATIONS
from certify.simplicial.registry import FAMILIES
from certify.symmetry.characters import IRREDUCIBLES
from tests.surface.running import Certify

PAGE = Path(__file__).parents[2] / "docs" / "claim-sheets.md"
TEXT = PAGE.read_text(encoding="utf-8")


def examples() -> str:
    """Return all examples as one sheet; the first one has a title and stands alone."""
    first, *rest = re.findall(r"^```toml\n(.*?)^```$", TEXT, re.M | re.S)
    return "\n".join([str(first), *map(str, rest)])


def test_every_example_is_proved(certify: Certify, tmp_path: Path) -> None:
    sheet = tmp_path / "examples.toml"
    sheet.write_text(examples(), encoding="utf-8")
    ended = certify("prove", sheet)
    assert ended.code == 0, ended.out + ended.err
    assert certify("verify", tmp_path / "certificates").code == 0
    assert {item.kind for item in parse_sheet(examples())[1]} == set(KINDS)


def test_the_tables_name_every_kind_family_and_operation() -> None:
    named = set(re.findall(r"`([a-z0-9-]+)`", TEXT))
    assert {*KINDS, *FAMILIES, *OPERATIONS, *REAL_TORIC_FAMILIES} <= named
    assert {f'"{name}"' for name in IRREDUCIBLES} <= set(re.findall(r'`("[a-z]+")`', TEXT))
    for kind in KINDS.values():
        assert set(kind.keys) <= named | {"n", "matrix", "family"}
