"""Exit codes: how a verb tells a script what came of it."""

from __future__ import annotations

from collections.abc import Iterable

__all__ = ["DONE", "INTERNAL", "INTERRUPTED", "REFUSED", "UNDECIDED", "USAGE", "worst"]

DONE = 0
"""Everything was proved or accepted."""

REFUSED = 1
"""A claim is false, or a certificate was rejected."""

USAGE = 2
"""The command line is wrong."""

UNDECIDED = 3
"""Something could not be read, written or finished, or there was nothing to do."""

INTERNAL = 70
"""The program is at fault."""

INTERRUPTED = 130
"""Somebody pressed Ctrl-C."""


def worst(codes: Iterable[int]) -> int:
    """Return the code that stands for all: an internal error first, then a refusal, then what is undecided.

    Examples
    --------
    >>> worst([0, 3, 1, 0]), worst([0, 3]), worst([0])
    (1, 3, 0)
    """
    return max(codes, key=[DONE, UNDECIDED, REFUSED, USAGE, INTERNAL].index)
