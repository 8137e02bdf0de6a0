"""What was found, for a person in the notation of mathematics and for a program as JSON."""

from __future__ import annotations

import json
from collections.abc import Sequence
from typing import Any

import click

__all__ = ["say_json", "shortened"]

_MOST_LINES = 60


def shortened(lines: Sequence[str]) -> list[str]:
    """Return lines for a person, who does not want to read thousands of them; the last one always stays.

    Examples
    --------
    >>> shortened([f"H_{k} = 0" for k in range(1000)])[59:]
    ['H_59 = 0', '… 939 more, in the certificate and with --json …', 'H_999 = 0']
    """
    if len(lines) <= _MOST_LINES + 1:
        return list(lines)
    rest = len(lines) - _MOST_LINES - 1
    return [*lines[:_MOST_LINES], f"… {rest:,} more, in the certificate and with --json …", lines[-1]]


def say_json(value: Any) -> None:
    """Print a value as one JSON object."""
    click.echo(json.dumps(value, ensure_ascii=False, indent=1))
