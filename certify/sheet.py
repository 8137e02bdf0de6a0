"""Claim sheets: from a TOML file to claims, with faults that name file, line and key.

A sheet has a ``title``, complexes ``[complexes.NAME]``, pairs ``[pairs.NAME]`` and claims ``[[claims]]``. It is read
whole and checked before anything is computed, and a key that nobody reads is a fault.
"""

from __future__ import annotations

import tomllib
from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from certify.certificate.about import NAME_RULE, about_claim, is_claim_name
from certify.claims import Claim
from certify.claims.kinds import KINDS
from certify.claims.reading.tables import Given
from certify.errors import BadInput, LimitReached
from certify.products import Pair
from certify.products.reading import pair_from_table
from certify.simplicial import SimplicialComplex
from certify.simplicial.complexes import Label
from certify.simplicial.definitions import complex_from_definition
from certify.tables import KeyFault, Keys, Table, shown

__all__ = ["NamedClaim", "Sheet", "line_of", "parse_sheet", "read_sheet"]

_COMMON = ("id", "kind", "title", "source")

# What `tomllib` says, and what that means to somebody who writes a sheet; anything else is passed on as it stands.
_PLAIN_WORDS = {
    "Cannot overwrite a value": "a key that is already set",
    "Invalid value": "something that is no value (texts and pairs stand in quotation marks)",
    "Expected '=' after a key in a key/value pair": "a key without =",
    "Expected newline or end of document after a statement": "something behind a complete line",
    "Unclosed array": "a list whose ] is missing",
    "Unclosed inline table": "a table whose } is missing",
    "Unterminated string": "a text whose closing quotation mark is missing",
}


@dataclass(frozen=True, slots=True)
class NamedClaim:
    """A claim of a sheet.

    Parameters
    ----------
    id : str
        The claim's name, which is also the name of its certificate.
    kind : str
    complex : str
        The name that the sheet gives to K; for a space of a family, that of the family; empty
        where there is none.
    claim : Claim, or LimitReached
        Why there is none, where it would take too much even to ask: then this claim alone is undecided.
    about : mapping
        What the certificate says besides the statement: the claim's name under ``claim``, ``title`` and ``source`` if
        the sheet has them, and ``labels`` of the vertices where these are not 1, 2, ….
    """

    id: str
    kind: str
    complex: str
    claim: Claim[Any] | LimitReached
    about: Mapping[str, str | list[str]]


@dataclass(frozen=True, slots=True)
class Sheet:
    """A claim sheet that was read and found in order.

    Parameters
    ----------
    path : Path
        Where it was read.
    title : str
        Empty if there is none.
    claims : tuple of NamedClaim
        At least one; no two names differ only in case.
    """

    path: Path
    title: str
    claims: tuple[NamedClaim, ...]


def read_sheet(path: Path) -> Sheet:
    """Return the claim sheet in a file.

    Raises
    ------
    BadInput
        If it cannot be read, is no UTF-8 or no TOML, or something in it is not as it should be. The message names
        the file, and the line and the key where there are some.
    """
    try:
        data = path.read_bytes()
    except OSError as error:
        raise BadInput(where=str(path), expected="a claim sheet", found=f"{error.strerror or error}") from error
    try:
        title, claims = parse_sheet(_text_of(data), path.parent)
    except BadInput as fault:
        raise fault.inside(str(path)) from fault
    return Sheet(path, title, claims)


def parse_sheet(text: str, folder: Path = Path()) -> tuple[str, tuple[NamedClaim, ...]]:
    """Return the title and the claims of a sheet.

    Parameters
    ----------
    text : str
        The sheet.
    folder : Path
        Where files that it mentions are looked for.

    Raises
    ------
    BadInput
        If it is no TOML, or something in it is not as it should be; the message names line and key.
    """
    table = Table((), _toml(text))
    try:
        table.only(("title", "complexes", "pairs", "claims"))
        title = table.text("title") if "title" in table.values else ""
        return title, _claims(table, Given(_complexes(table, folder), _pairs(table)))
    except KeyFault as fault:
        raise fault.inside(f"line {line_of(text, fault.keys)}") from fault


def _text_of(data: bytes) -> str:
    if data.startswith(b"\xef\xbb\xbf"):
        raise BadInput(where="line 1", expected="UTF-8 without a byte order mark", found="a byte order mark")
    try:
        return data.decode("utf-8")
    except UnicodeDecodeError as error:
        line = data.count(b"\n", 0, error.start) + 1
        raise BadInput(
            where=f"line {line}", expected="UTF-8", found=f"the byte 0x{data[error.start]:02x}, which is none"
        ) from error


def _toml(text: str) -> dict[str, object]:
    try:
        return tomllib.loads(text)
    except tomllib.TOMLDecodeError as error:
        message, _, place = str(error).removesuffix(")").rpartition(" (at ")
        where = place if place.startswith("line") else f"line {text.rstrip().count(chr(10)) + 1}, the end"
        found = _PLAIN_WORDS.get(message, f"a fault ({message})")
        raise BadInput(where=where, expected="TOML", found=found) from error
    except (ValueError, RecursionError) as error:
        # Integers of thousands of digits and lists in lists without end: legal TOML that nobody needs.
        raise BadInput(where="the sheet", expected="TOML of an ordinary size", found=str(error)) from error


# -- complexes and pairs ------------------------------------------------------------------------


def _complexes(table: Table, folder: Path) -> dict[str, SimplicialComplex]:
    """Return the complexes by name; each may refer to those above it."""
    known: dict[str, SimplicialComplex] = {}
    for name, value in Table.of(("complexes",), table.values.get("complexes", {})).values.items():
        known[name] = complex_from_definition(Table.of(("complexes", name), value), known, folder)
    return known


def _pairs(table: Table) -> dict[str, Pair]:
    tables = Table.of(("pairs",), table.values.get("pairs", {}))
    return {name: pair_from_table(Table.of(("pairs", name), value), name) for name, value in tables.values.items()}


# -- claims -------------------------------------------------------------------------------------


def _claims(table: Table, given: Given) -> tuple[NamedClaim, ...]:
    if not table.values.get("claims"):
        raise BadInput(where="the sheet", expected="at least one claim ([[claims]])", found="none")
    claims: dict[str, NamedClaim] = {}
    for number, value in enumerate(table.items("claims", "a list of tables ([[claims]])")):
        entry = Table.of(("claims", number), value)
        claim = _claim(entry, given)
        # Some systems take two names that differ only in case for the same file.
        twin = claims.setdefault(claim.id.lower(), claim)
        if twin is not claim:
            other = "" if twin.id == claim.id else f", which differs from {twin.id!r} only in case"
            raise entry.fault("id", expected="an id of its own for each claim", found=f"{claim.id!r} again{other}")
    return tuple(claims.values())


def _claim(table: Table, given: Given) -> NamedClaim:
    name = table.text("id")
    if not is_claim_name(name):
        raise table.fault("id", expected=NAME_RULE, found=shown(name))
    kind = table.text("kind", "the name of a claim kind")
    if kind not in KINDS:
        raise table.fault("kind", expected=f"one of the claim kinds {', '.join(KINDS)}", found=shown(kind))
    table.only((*_COMMON, *KINDS[kind].keys))
    prose = {key: table.text(key) for key in ("title", "source") if key in table.values}
    claim, labels = _read(kind, table, given)
    complex_ = next((table.text(key) for key in ("complex", "family") if key in table.values), "")
    return NamedClaim(name, kind, complex_, claim, about_claim(name, labels, prose))


def _read(kind: str, table: Table, given: Given) -> tuple[Claim[Any] | LimitReached, tuple[Label, ...]]:
    """Return a claim and the labels of its complex, or why it takes too much to ask it."""
    try:
        claim = KINDS[kind].read(table, given)
    except LimitReached as limit:
        return limit, ()
    return claim, claim.base.labels


# -- lines --------------------------------------------------------------------------------------


def line_of(text: str, keys: Keys) -> int:
    r"""Return the line, counted from 1, on which a value of a sheet starts.

    Parameters
    ----------
    text : str
        The whole sheet, which is TOML.
    keys : Keys
        Where the value stands. If there is none, the longest part of the way that leads to a value counts.

    Notes
    -----
    `tomllib` does not tell positions. But the first lines of a sheet are a sheet, except where they end within a
    value; so the line is found by halving, with prefixes that the library itself parses. A list may be cut short: its
    brackets are closed for it, so that an item has a line of its own.

    Examples
    --------
    >>> line_of("[complexes.k]\nfacets = [\n  [1, 2],\n  [2, 2],\n]\n", ("complexes", "k", "facets", 1))
    4
    """
    lines = text.replace("\r\n", "\n").split("\n")
    document = _prefix(lines, len(lines))
    while not _leads_somewhere(document, keys):
        keys = keys[:-1]
    without, within = 0, len(lines)
    while within - without > 1:
        middle = (without + within) // 2
        nearest = [*range(middle, without, -1), *range(middle + 1, within)]
        number = next((number for number in nearest if _prefix(lines, number) is not None), None)
        if number is None:
            break
        if _leads_somewhere(_prefix(lines, number), keys):
            within = number
        else:
            without = number
    return without + 1


def _prefix(lines: list[str], number: int) -> dict[str, object] | None:
    """Return what the first lines say, or None where they end within a value."""
    text = "\n".join(lines[:number])
    # On a line of its own, because the last line may end in a comment.
    for ending in ("", "\n]", "\n]]"):
        try:
            return tomllib.loads(text + ending)
        except tomllib.TOMLDecodeError:
            continue
    return None


def _leads_somewhere(document: object, keys: Keys) -> bool:
    for key in keys:
        match document, key:
            case dict(), str() if key in document:
                document = document[key]
            case list(), int() if key < len(document):
                document = document[key]
            case _:
                return False
    return True
