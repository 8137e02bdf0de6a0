"""The one spelling of a value: keys sorted, no spaces, UTF-8, integers as in I-JSON."""

from __future__ import annotations

import hashlib
import json
from typing import Any

from flint import fmpz

from certify.exact.groups import decimal

__all__ = ["FORMAT", "LARGEST", "canonical_bytes", "canonical_line", "fingerprint", "integer_of", "integer_value"]

FORMAT = 1
"""The version of the certificate format that is written."""

LARGEST = 2**53 - 1
"""Integers beyond ± this are written as decimal strings."""


_ENCODER = json.JSONEncoder(sort_keys=True, separators=(",", ":"), ensure_ascii=False)


def integer_value(number: int) -> int | str:
    """Return the JSON value of an integer.

    Examples
    --------
    >>> integer_value(-7), integer_value(2**53)
    (-7, '9007199254740992')

    References
    ----------
    RFC 7493, The I-JSON message format, section 2.2.
    """
    return number if -LARGEST <= number <= LARGEST else decimal(number)


def integer_of(value: int | str) -> int:
    """Return the integer that a JSON value stands for; the inverse of `integer_value`, for any number of digits."""
    return value if isinstance(value, int) else int(fmpz(value))


def canonical_bytes(value: Any) -> bytes:
    """Return the canonical JSON of a value.

    Examples
    --------
    >>> canonical_bytes({"b": [1, 2], "a": "é"}).decode()
    '{"a":"é","b":[1,2]}'
    """
    return _ENCODER.encode(value).encode("utf-8")


def canonical_line(value: Any) -> bytes:
    """Return a line of a certificate."""
    return canonical_bytes(value) + b"\n"


def fingerprint(statement: dict[str, Any]) -> str:
    """Return the SHA-256 of a canonical statement, in hexadecimal: what an author prints beside a theorem."""
    return hashlib.sha256(canonical_bytes(statement)).hexdigest()
