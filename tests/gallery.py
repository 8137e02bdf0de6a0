"""The gallery of published statements: ``python -m tests.gallery`` proves every sheet in certificates/ again."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

GALLERY = Path(__file__).resolve().parent.parent / "certificates"


def sheets() -> list[Path]:
    """Return the sheets of the gallery; the certificates of NAME.toml are in the folder NAME."""
    return sorted(GALLERY.glob("*.toml"))


def prove_sheet(sheet: Path, folder: Path) -> None:
    """Prove a sheet into a folder, as an author would.

    Raises
    ------
    subprocess.CalledProcessError
        If a claim of the sheet is not proved.
    """
    subprocess.run([sys.executable, "-m", "certify", "prove", str(sheet), "--out", str(folder)], check=True)


if __name__ == "__main__":
    for path in sheets():
        prove_sheet(path, path.with_suffix(""))
