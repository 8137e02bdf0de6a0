"""Sets of vertices as people write them."""

from __future__ import annotations

import re
from collections.abc import Iterable

from certify.simplicial.arguments import Label

__all__ = ["latex_set", "plain_set"]

_SPECIAL = {"\\": r"\backslash "} | {letter: rf"\{letter}" for letter in "{}_&%$#"}


def plain_set(labels: Iterable[Label]) -> str:
    """Return a set of vertices as in print.

    Examples
    --------
    >>> plain_set([1, 3]), plain_set([])
    ('{1,3}', '∅')
    """
    names = ",".join(map(str, labels))
    return f"{{{names}}}" if names else "∅"


def latex_set(labels: Iterable[Label]) -> str:
    r"""Return a set of vertices in LaTeX.

    Examples
    --------
    >>> print(latex_set([1, "red_a"]))
    \{1, \mathrm{red\_a}\}
    """
    names = ", ".join(_latex_label(label) for label in labels)
    return rf"\{{{names}\}}" if names else r"\varnothing"


def _latex_label(label: Label) -> str:
    text = str(label)
    if re.fullmatch(r"-?[0-9]+|[A-Za-z]", text, re.ASCII):
        return text
    return r"\mathrm{" + "".join(_SPECIAL.get(letter, letter) for letter in text) + "}"
