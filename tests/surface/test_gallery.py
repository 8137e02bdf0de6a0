"""Every stored certificate of the gallery is what its sheet gives today, and the verifier accepts it."""

from __future__ import annotations

import subprocess
import sys
import tomllib
from pathlib import Path

import pytest

from tests.gallery import GALLERY, prove_sheet, sheets


def _files(folder: Path) -> dict[str, bytes]:
    return {path.name: path.read_bytes() for path in folder.iterdir()}


@pytest.mark.parametrize("sheet", sheets(), ids=lambda sheet: sheet.stem)
def test_stored_certificates_are_what_the_sheet_gives(sheet: Path, tmp_path: Path) -> None:
    prove_sheet(sheet, tmp_path)
    assert _files(tmp_path) == _files(sheet.with_suffix(""))


@pytest.mark.parametrize("sheet", sheets(), ids=lambda sheet: sheet.stem)
def test_every_claim_names_its_source(sheet: Path) -> None:
    claims = tomllib.loads(sheet.read_text("utf-8"))["claims"]
    assert claims
    assert all(claim["source"] for claim in claims)


def test_the_verifier_accepts_the_whole_gallery() -> None:
    command = [sys.executable, "-m", "certify", "verify", str(GALLERY)]
    assert subprocess.run(command, check=False, capture_output=True).returncode == 0


def test_the_gallery_holds_at_least_twelve_statements() -> None:
    assert len(list(GALLERY.glob("*/*.cert.jsonl"))) >= 12
