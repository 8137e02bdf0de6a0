from __future__ import annotations

import hashlib
import sys
from collections.abc import Iterator
from typing import Any

import pytest

from certify.certificate import canonical_line, fingerprint
from certify.certificate.canonical import canonical_bytes, integer_value

LARGEST = 2**53 - 1


@pytest.mark.parametrize("sign", [1, -1])
@pytest.mark.parametrize(
    ("number", "value"),
    [
        (0, 0),
        (1, 1),
        (LARGEST - 1, LARGEST - 1),
        (LARGEST, LARGEST),
        (LARGEST + 1, "9007199254740992"),
        (10**40, "1" + "0" * 40),
    ],
)
def test_integers_beyond_53_bits_are_strings(number: int, value: int | str, sign: int) -> None:
    """RFC 7493, section 2.2: an I-JSON number is exact from -(2^53 - 1) to 2^53 - 1."""
    signed = value * sign if isinstance(value, int) else ("-" if sign < 0 else "") + value
    assert integer_value(sign * number) == signed


@pytest.fixture
def _digits_as_at_the_start() -> Iterator[None]:
    """Whatever another test has set, Python's own limit on digits holds here."""
    before = sys.get_int_max_str_digits()
    sys.set_int_max_str_digits(sys.int_info.default_max_str_digits)
    yield
    sys.set_int_max_str_digits(before)


@pytest.mark.usefixtures("_digits_as_at_the_start")
def test_integers_of_any_size_are_written() -> None:
    assert integer_value(10**5000) == "1" + "0" * 5000


@pytest.mark.parametrize(
    ("value", "text"),
    [
        ({}, "{}"),
        ([], "[]"),
        ({"b": [], "a": {"d": 1, "c": [1, [2, "3"]]}}, '{"a":{"c":[1,[2,"3"]],"d":1},"b":[]}'),
        ({"Z": 0, "a": None, "é": "ℤ\n\u2028"}, '{"Z":0,"a":null,"é":"ℤ\\n\u2028"}'),
        (-5, "-5"),
    ],
)
def test_there_is_one_spelling(value: Any, text: str) -> None:
    assert canonical_bytes(value) == text.encode("utf-8")
    assert canonical_line(value) == text.encode("utf-8") + b"\n"


def test_a_line_is_one_line() -> None:
    assert canonical_line({"a": "1\n2\r3"}).count(b"\n") == 1


def test_the_fingerprint_is_the_digest_of_the_spelling() -> None:
    expected = hashlib.sha256(b'{"kind":"homology","vertices":0}').hexdigest()
    assert fingerprint({"vertices": 0, "kind": "homology"}) == expected
    assert fingerprint({"vertices": 1, "kind": "homology"}) != expected
