"""Files that are not what the format says, each with the code that refuses it."""

from __future__ import annotations

import gzip
from typing import Any

import pytest

from tests.verifier.forging import forged, genuine, judged, line_of

RING = genuine("ring")
HEADER, *_, END = RING.splitlines(keepends=True)


def _in_record(old: bytes, new: bytes) -> bytes:
    """Change bytes in a record. The reader stops there, so neither count nor digest matters."""
    assert old in RING
    return RING.replace(old, new, 1)


BYTES: dict[str, tuple[bytes, str]] = {
    "a byte order mark": (b"\xef\xbb\xbf" + RING, "json"),
    "UTF-16": (RING.decode().encode("utf-16"), "not-a-certificate"),
    "latin-1": (_in_record(b'"claim":"claim"', b'"claim":"\xe9"') if b'"claim":"claim"' in RING else b"\xe9", "json"),
    "a lone surrogate": (HEADER.replace(b'"claim":', b'"claim":"a","source":"\\ud800","x":', 1), "json"),
    "a key twice": (_in_record(b'{"basis"', b'{"basis":[],"basis"'), "spelling"),
    "keys out of order": (line_of({"about": {"claim": "a"}})[:-2] + b',"a":1,"format":1}\n', "spelling"),
    "a blank": (_in_record(b'"basis":[', b'"basis": ['), "spelling"),
    "a carriage return": (RING.replace(b"\n", b"\r\n"), "spelling"),
    "an escape that is not needed": (HEADER.replace(b'"about"', b'"\\u0061bout"'), "spelling"),
    "a fraction": (_in_record(b"[0,1]", b"[0,1.0]"), "number"),
    "an exponent": (_in_record(b"[0,1]", b"[0,1e0]"), "number"),
    "NaN": (_in_record(b"[0,1]", b"[0,NaN]"), "number"),
    "infinity": (_in_record(b"[0,1]", b"[0,-Infinity]"), "number"),
    "a leading zero": (_in_record(b"[0,1]", b"[0,01]"), "json"),
    "minus zero": (_in_record(b"[0,1]", b"[-0,1]"), "spelling"),
    "a plus": (_in_record(b"[0,1]", b"[0,+1]"), "json"),
    "deep nesting": (HEADER + b'{"basis":' + b"[" * 100_000 + b"]" * 100_000 + b"}\n", "json"),
    "no JSON": (HEADER + b"nonsense\n", "json"),
    "an empty line": (HEADER + b"\n", "json"),
    "a line too many": (RING + b"\n", "trailing"),
    "a second certificate behind": (RING + RING, "trailing"),
    "a byte behind": (RING + b" ", "truncated"),
    "no line feed at the end": (RING[:-1], "truncated"),
    "no end record": (RING[: -len(END)], "truncated"),
    "the header alone": (HEADER, "truncated"),
    "half a file": (RING[: len(RING) // 2], "truncated"),
    "another digest": (RING.replace(b'"sha256":"', b'"sha256":"0', 1)[:-5] + b'"}}\n', "digest"),
    "an older body under the digest": (RING.replace(b'"claim":"', b'"claim":"x', 1), "digest"),
}


@pytest.mark.parametrize("name", BYTES)
def test_bytes_that_are_no_certificate(name: str) -> None:
    content, code = BYTES[name]
    report = judged(content)
    assert report["reason"] == code
    assert report["verdict"] == ("undecided" if code == "not-a-certificate" else "rejected")


@pytest.mark.parametrize(
    ("content", "code"),
    [
        (gzip.compress(RING) + gzip.compress(b""), "gzip"),
        (gzip.compress(RING[:50]) + gzip.compress(RING[50:]), "gzip"),
        (gzip.compress(RING) + b"x", "gzip"),
        (gzip.compress(RING)[:-3], "gzip"),
        (b"", "gzip"),
        (RING, "unreadable"),
        (gzip.compress(RING)[:-8] + b"\0" * 8, "unreadable"),
    ],
)
def test_compressed_files_that_are_none(content: bytes, code: str) -> None:
    report = judged(content, "x.cert.jsonl.gz")
    assert (report["reason"], report["verdict"] != "accepted") == (code, True)


def _set(*way: Any, to: Any) -> Any:
    """Return the edit that sets a value."""

    def edit(values: Any) -> None:
        for key in way[:-1]:
            values = values[key]
        values[way[-1]] = to

    return edit


def _drop(*way: Any) -> Any:
    """Return the edit that removes a key or an item."""

    def edit(values: Any) -> None:
        for key in way[:-1]:
            values = values[key]
        del values[way[-1]]

    return edit


S = (0, "statement")
VALUES: dict[str, tuple[str, Any, str]] = {
    "an unknown version": ("ring", _set(0, "format", to=2), "unknown-format"),
    "a later version with another key": ("ring", lambda v: v[0].update(format=2, more=1), "unknown-format"),
    "true as the version": ("ring", _set(0, "format", to=True), "unknown-format"),
    "an unknown kind": ("ring", _set(*S, "kind", to="trace"), "unknown-kind"),
    "an unknown kind on an unknown route": (
        "ring",
        lambda v: (_set(*S, "kind", to="x")(v), _set(0, "route", to="y")(v)),
        "unknown-kind",
    ),
    "a kind that is a list": ("ring", _set(*S, "kind", to=["homology"]), "unknown-kind"),
    "a statement that is a list": ("ring", _set(*S, to=[]), "unknown-kind"),
    "an unknown route": ("ring", _set(0, "route", to="faith"), "route"),
    "a route of another kind": ("tor", _set(0, "route", to="cells"), "route"),
    "the other route": ("ring", _set(0, "route", to="cells"), "keys"),
    "an unknown pair": ("ring", _set(*S, "pairs", 0, to="(D2, S2)"), "unknown-pair"),
    "a pair with a leading zero": ("ring", _set(*S, "pairs", 0, to="(D01, S0)"), "unknown-pair"),
    "a pair in digits of another script": ("ring", _set(*S, "pairs", 0, to="(D١, S٠)"), "unknown-pair"),
    "a pair with a line feed": ("ring", _set(*S, "pairs", 0, to="(D1, S0)\n"), "unknown-pair"),
    "a pair too few": ("ring", _drop(*S, "pairs", 0), "statement"),
    "an unknown key in the header": ("ring", _set(0, "more", to=1), "keys"),
    "an unknown key in the statement": ("ring", _set(*S, "more", to=1), "keys"),
    "a key of another kind": ("tor", _set(*S, "pairs", to=[]), "keys"),
    "a missing key": ("ring", _drop(*S, "degrees"), "keys"),
    "no claim name": ("ring", _drop(0, "about", "claim"), "keys"),
    "a claim name with a line feed": ("ring", _set(0, "about", "claim", to="a\naccepted"), "claim-name"),
    "a claim name with an escape": ("ring", _set(0, "about", "claim", to="\x1b[2J"), "claim-name"),
    "a title that is a number": ("ring", _set(0, "about", "title", to=1), "shape"),
    "true as the number of vertices": ("ring", _set(*S, "vertices", to=True), "number"),
    "vertices as text": ("ring", _set(*S, "vertices", to="5"), "number"),
    "a facet out of range": ("ring", _set(*S, "facets", -1, to=[4, 6]), "index"),
    "a facet with vertex 0": ("ring", _set(*S, "facets", 0, to=[0, 2]), "index"),
    "a facet that descends": ("ring", _set(*S, "facets", 0, to=[2, 1]), "index"),
    "a vertex twice in a facet": ("ring", _set(*S, "facets", 0, to=[1, 1]), "index"),
    "true as a vertex": ("ring", _set(*S, "facets", 0, to=[True, 2]), "index"),
    "facets out of order": ("ring", lambda v: v[0]["statement"]["facets"].reverse(), "statement"),
    "a facet twice": ("ring", lambda v: v[0]["statement"]["facets"].insert(0, [1, 2]), "statement"),
    "a facet within another": ("ring", lambda v: v[0]["statement"]["facets"].insert(0, [1]), "statement"),
    "no facet": ("ring", _set(*S, "facets", to=[]), "statement"),
    "no degree": ("low-degrees", _set(*S, "degrees", to=[]), "statement"),
    "a negative degree": ("low-degrees", _set(*S, "degrees", to=[-1, 3]), "index"),
    "degrees that descend": ("low-degrees", _set(*S, "degrees", to=[3, 1]), "index"),
    "a group outside the degrees": ("low-degrees", _set(*S, "groups", 0, 0, to=4), "false"),
    "a group that is zero": ("ring", _set(*S, "groups", 0, to=[0, 0, []]), "false"),
    "a negative rank": ("ring", _set(*S, "groups", 0, to=[0, -1, [2]]), "false"),
    "groups out of order": ("ring", lambda v: v[0]["statement"]["groups"].reverse(), "false"),
    "a degree twice": ("ring", _set(*S, "groups", 1, 0, to=0), "false"),
    "torsion 1": ("plane", _set(*S, "groups", 1, 2, to=[1, 2]), "false"),
    "torsion 0": ("plane", _set(*S, "groups", 1, 2, to=[0]), "false"),
    "torsion that is no chain": ("plane", _set(*S, "groups", 1, 2, to=[2, 3]), "false"),
    "a short integer as text": ("ring", _set(*S, "groups", 1, 1, to="10"), "false"),
    "a long integer as a number": ("ring", _set(*S, "groups", 1, 1, to=2**53), "false"),
    "a group of two entries": ("ring", _set(*S, "groups", 0, to=[0, 1]), "false"),
    "a group of one degree where two are due": ("tor", _set(*S, "groups", 0, to=[0, 1, []]), "false"),
    "rows of another length": ("real-toric", _set(*S, "rows", 0, to="1010"), "statement"),
    "rows of other digits": ("real-toric", _set(*S, "rows", 0, to="10102"), "statement"),
    "rows that are numbers": ("real-toric", _set(*S, "rows", 0, to=10101), "statement"),
    "a vertex kept and out": ("summand", _set(*S, "kept", to=[1, 2]), "statement"),
    "a record that is a list": ("ring", _set(1, to=[]), "shape"),
    "an unknown key in a record": ("ring", _set(1, "more", to=1), "keys"),
    "an unknown key in a degree": ("ring", _set(1, "basis", 0, "more", to=[1]), "keys"),
    "a list that is empty": ("ring", _set(1, "basis", 0, "pairs", to=[]), "shape"),
    "a list that is a number": ("ring", _set(1, "basis", 0, "cycles", to=1), "shape"),
    "a degree too few": ("ring", _drop(-2, "basis", -1), "degrees"),
    "a degree too many": ("ring", lambda v: v[-2]["basis"].append({}), "degrees"),
    "an odd vector": ("ring", _set(1, "basis", 0, "cycles", to=[[0, 1, 2]]), "vector"),
    "an empty vector": ("ring", _set(1, "basis", 0, "cycles", to=[[]]), "vector"),
    "a zero coefficient": ("ring", _set(1, "basis", 0, "cycles", to=[[0, 0]]), "vector"),
    "true as a coefficient": ("ring", _set(1, "basis", 0, "cycles", to=[[0, True]]), "number"),
    "a cell out of range": ("ring", _set(1, "basis", 0, "cycles", to=[[1, 1]]), "vector"),
    "a negative cell": ("ring", _set(1, "basis", 0, "cycles", to=[[-1, 1]]), "vector"),
    "cells that descend": ("ring", _set(-2, "basis", 1, "cycles", to=[[2, 1, 0, 1]]), "vector"),
    "a cell twice": ("ring", _set(-2, "basis", 1, "cycles", to=[[1, 1, 1, 1]]), "vector"),
    "a matched cell out of range": ("ring", _set(-2, "basis", 1, "matched", to=[99]), "index"),
    "a negative matched cell": ("ring", _set(-2, "basis", 1, "matched", to=[-1]), "index"),
    "matched cells twice": ("ring", _set(-2, "basis", 1, "matched", to=[0, 0]), "index"),
    "a pair of two": ("ring", _set(-2, "basis", 1, "pairs", to=[[[0, 1], 2]]), "shape"),
}


@pytest.mark.parametrize("name", VALUES)
def test_values_that_the_format_does_not_allow(name: str) -> None:
    claim, edit, code = VALUES[name]
    report = judged(forged(claim, edit))
    assert report["reason"] == code
    expected = "undecided" if code.startswith("unknown") else "rejected"
    assert report["verdict"] == expected


@pytest.mark.parametrize("name", ["x.txt", "x.cert.json", "cert.jsonl"])
def test_other_names_are_not_looked_into(name: str) -> None:
    assert judged(RING, name)["reason"] == "not-a-certificate"
