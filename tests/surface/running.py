"""Running `certify` as a person would: in a process of its own, or here, through the same entry and quicker."""

from __future__ import annotations

import json
import os
import subprocess
import sys
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import certify

__all__ = ["Certify", "Ended", "command_line", "environment", "in_process"]


@dataclass(frozen=True)
class Ended:
    """What a person sees in the end."""

    code: int
    out: str
    err: str

    @property
    def json(self) -> Any:
        return json.loads(self.out)


Certify = Callable[..., Ended]
"""Runs `certify` with these arguments."""


def command_line(*arguments: str | Path) -> list[str]:
    return [sys.executable, "-m", "certify", *map(str, arguments)]


def environment(**more: str) -> dict[str, str]:
    """Return an environment in which the package is found, installed or not."""
    assert certify.__file__
    return {**os.environ, "PYTHONPATH": str(Path(certify.__file__).parents[1]), **more}


def in_process(*arguments: str | Path, folder: Path | None = None, **variables: str) -> Ended:
    """Run `certify` in a process of its own, where nobody looks at a terminal."""
    done = subprocess.run(
        command_line(*arguments),
        cwd=folder,
        env=environment(**variables),
        capture_output=True,
        stdin=subprocess.DEVNULL,
        encoding="utf-8",
        check=False,
    )
    return Ended(done.returncode, done.stdout, done.stderr)
