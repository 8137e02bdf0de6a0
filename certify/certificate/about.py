"""What a certificate says besides its statement: the claim's name, prose, and the labels of the vertices."""

from __future__ import annotations

import re
from collections.abc import Hashable, Mapping, Sequence
from pathlib import Path

__all__ = ["NAME_RULE", "about_claim", "is_claim_name", "name_in"]

NAME_RULE = "1 to 100 letters, digits, dots, dashes and underscores, a letter or digit first"
"""What a claim may be called, in words."""

_NAME = r"[A-Za-z0-9][A-Za-z0-9._-]{0,99}"


def is_claim_name(text: str) -> bool:
    """Say whether a claim may be called so."""
    return re.fullmatch(_NAME, text, re.ASCII) is not None


def name_in(path: Path) -> str | None:
    """Return the name of the claim whose certificate has this path, or None if a certificate cannot be called so.

    Examples
    --------
    >>> name_in(Path("out/ring.cert.jsonl.gz")), name_in(Path("ring.json"))
    ('ring', None)
    """
    match = re.fullmatch(rf"({_NAME})\.cert\.jsonl(\.gz)?", path.name, re.ASCII)
    return match[1] if match else None


def about_claim(
    name: str, labels: Sequence[Hashable], prose: Mapping[str, str] | None = None
) -> dict[str, str | list[str]]:
    """Return what the header of a certificate says about a claim.

    Parameters
    ----------
    name : str
        The claim's name.
    labels : sequence
        The labels of the vertices; they are left out where they are 1, 2, ….
    prose : mapping, optional
        ``title`` and ``source``, if there are any.
    """
    plain = tuple(labels) == tuple(range(1, len(labels) + 1))
    named = {} if plain else {"labels": [str(label) for label in labels]}
    return {"claim": name, **(prose or {}), **named}
