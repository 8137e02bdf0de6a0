"""Small things that answers share: tables and labels for notebooks, and what universal coefficients count."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from html import escape

from certify.errors import BadInput
from certify.exact import AbelianGroup

__all__ = ["check_characteristic", "divisible", "html_table", "html_text"]


def check_characteristic(p: int) -> None:
    """Raise BadInput if no field of our kind has this characteristic: ℚ has 0, 𝔽_p has p."""
    if p != 0 and not _is_prime(p):
        raise BadInput(where="p", expected="a prime, or 0 for ℚ", found=f"{p}")


def divisible(group: AbelianGroup, p: int) -> int:
    """Return the number of torsion summands of order divisible by p: the dimension of Tor(group, 𝔽_p)."""
    return sum(order % p == 0 for order in group.torsion)


def html_text(text: object) -> str:
    """Return a text as HTML."""
    return escape(str(text))


def html_table(head: Sequence[str], rows: Iterable[Sequence[str]]) -> str:
    """Return a table from cells that are HTML already.

    Examples
    --------
    >>> html_table(["k"], [["0"]])
    '<table><thead><tr><th>k</th></tr></thead><tbody><tr><td>0</td></tr></tbody></table>'
    """
    top = "".join(f"<th>{cell}</th>" for cell in head)
    lines = ("".join(f"<td>{cell}</td>" for cell in row) for row in rows)
    body = "".join(f"<tr>{line}</tr>" for line in lines)
    return f"<table><thead><tr>{top}</tr></thead><tbody>{body}</tbody></table>"


def _is_prime(number: int) -> bool:
    # SymPy takes longer to load than everything else, and over ℚ it is not needed.
    from sympy import isprime

    return bool(isprime(number))
