"""Print the table of all benchmark ratios: ``python -m tests.benchmarks``."""

from __future__ import annotations

import sys
import tempfile
from collections.abc import Iterator
from pathlib import Path

from tests.benchmarks.foundation import foundation
from tests.benchmarks.measuring import Measure
from tests.benchmarks.spaces import spaces
from tests.benchmarks.symmetry import symmetry


def _rows() -> Iterator[Measure]:
    with tempfile.TemporaryDirectory() as folder:
        yield from foundation(Path(folder))
        yield from spaces(Path(folder))
        yield from symmetry(Path(folder))


def main() -> None:
    """Measure everything in one run and print a row as soon as it is known."""
    print(f"{'ratio':>9}  {'goal':>6}  measure")
    for row in _rows():
        goal = "report" if row.goal is None else f"≤ {row.goal:g}"
        met = "" if row.goal is None or row.value <= row.goal else "   NOT REACHED"
        print(f"{row.value:9.3f}{row.unit}  {goal:>6}  {row.what} [{row.detail}]{met}")
        sys.stdout.flush()


if __name__ == "__main__":
    main()
