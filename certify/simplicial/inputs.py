"""Complexes as people write them: a line of text, or a file in plain text, JSON or TOML."""

from __future__ import annotations

import json
import re
import tomllib
from collections.abc import Callable, Iterable, Iterator, Mapping
from contextlib import contextmanager
from pathlib import Path
from typing import TypeVar

from certify.errors import BadInput
from certify.simplicial.arguments import Label, distinct_labels
from certify.simplicial.complexes import SimplicialComplex
from certify.tables import KeyFault, Keys, Table

__all__ = [
    "complex_from_table",
    "label_of",
    "pieces_of",
    "placed",
    "plain_labels",
    "read_by_ending",
    "read_complex_file",
    "read_facets",
]

_Read = TypeVar("_Read")

# Longer runs of digits stay names: nobody numbers vertices so, and Python refuses to read very long ones.
_NUMBER = re.compile(r"-?[0-9]{1,15}")


def read_facets(text: str) -> SimplicialComplex:
    """Return the complex whose facets are written in plain text.

    Parameters
    ----------
    text : str
        Facets, separated by semicolons or line ends; labels within a facet, separated by blanks or commas. A
        label of decimal digits (at most 15, perhaps with a minus sign) is a number, any other is a name.
        ``{}`` is the empty face. A ``#`` starts a comment that ends with the line.

    Raises
    ------
    BadInput
        If there is no facet, a facet names a vertex twice, or a label has a bracket or brace in it.

    Examples
    --------
    >>> print(read_facets("1 2; 2,3"))
    3 vertices, facets 12 23
    >>> read_facets("{}")
    SimplicialComplex(labels=(), facets=((),))
    >>> read_facets("1 2; 3 3")
    Traceback (most recent call last):
    certify.errors.BadInput: line 1, facet 2: expected each vertex once, found vertex 3 twice
    """
    # The facets are checked here first, so that a message can name the line.
    return SimplicialComplex.from_facets([_facet_of(piece, where) for where, piece in pieces_of(text, "facet")])


def complex_from_table(table: Mapping[str, object]) -> SimplicialComplex:
    """Return the complex that a table with the keys ``facets`` and, if wanted, ``vertices`` describes.

    Parameters
    ----------
    table : mapping
        ``facets`` is a list of lists of labels. ``vertices`` lists all vertices in order, ghosts included, as
        in `SimplicialComplex.from_facets`. Labels are whole numbers or strings.

    Raises
    ------
    BadInput
        If ``facets`` is missing, another key is there, a label is of another kind, or the facets are faulty.

    Examples
    --------
    >>> print(complex_from_table({"facets": [[1, 2]], "vertices": [1, 2, 3]}))
    3 vertices, facets 12, ghosts 3
    """
    for key in table:
        if key not in ("facets", "vertices"):
            raise BadInput(where=f"key {key}", expected="only the keys facets and vertices", found="another key")
    if "facets" not in table:
        raise BadInput(where="key facets", expected="a list of facets", found="no such key")
    facets = [plain_labels(facet, f"facet {n}") for n, facet in enumerate(_a_list(table["facets"], "facets"), start=1)]
    vertices = plain_labels(table["vertices"], "vertices") if "vertices" in table else None
    return SimplicialComplex.from_facets(facets, vertices)


def read_complex_file(path: str | Path) -> SimplicialComplex:
    """Return the complex in a file, which is read by the ending of its name.

    Parameters
    ----------
    path : str or Path
        A UTF-8 file: ``.txt`` as `read_facets` reads it; ``.toml`` as `complex_from_table` reads it;
        ``.json`` with the same table as an object, or with the list of facets alone.

    Raises
    ------
    BadInput
        If the file cannot be read, its name has another ending, or what it holds is no complex; the message
        starts with the path, and names the line or the key.
    """
    return read_by_ending(path, _READERS)


def read_by_ending(path: str | Path, readers: Mapping[str, Callable[[str], _Read]]) -> _Read:
    """Return what one of the readers makes of the text in a UTF-8 file.

    Parameters
    ----------
    path : str or Path
        The file.
    readers : mapping
        At least two readers, by the ending of the file's name in small letters.

    Raises
    ------
    BadInput
        If there is no reader for the name, the file cannot be read, or the reader finds a fault; the message starts
        with the path.
    """
    path = Path(path)
    reader = readers.get(path.suffix.lower())
    if reader is None:
        *endings, last = readers
        expected = f"a file name ending in {', '.join(endings)} or {last}"
        raise BadInput(where=str(path), expected=expected, found="another ending")
    try:
        return reader(_text_of(path))
    except BadInput as fault:
        raise fault.inside(str(path)) from None


def plain_labels(value: object, where: str) -> list[Label]:
    """Return a list of labels as files and sheets may hold them: whole numbers and strings.

    Raises
    ------
    BadInput
        If it is no list, or holds something else; `where` is its place.
    """
    labels: list[Label] = []
    for label in _a_list(value, where):
        if isinstance(label, bool) or not isinstance(label, int | str):
            raise BadInput(where=where, expected="whole numbers or strings as labels", found=repr(label))
        labels.append(label)
    return labels


@contextmanager
def placed(table: Table, key: str, item: str = "") -> Iterator[None]:
    """Give a fault that is found below, where tables are unknown, its place in the table.

    Parameters
    ----------
    table : Table
        The table that is read.
    key : str
        The key under which the fault lies, unless it says better.
    item : str
        What faults call an item of the list under the key, for example ``"facet"``.

    Notes
    -----
    By a convention of this room, a fault's `where` ends in ``facet 3`` for the third facet, and in ``n`` or
    ``argument n`` when it lies in the argument n.
    """
    try:
        yield
    except KeyFault:
        raise
    except BadInput as fault:
        name, _, last = fault.where.rpartition(", ")[2].rpartition(" ")
        keys: Keys = (last,) if last in table.values else (key,)
        if name == item and last.isdecimal():
            keys = (key, int(last) - 1)
        raise table.fault(*keys, expected=fault.expected, found=fault.found) from fault


def _text_of(path: Path) -> str:
    """Return the text of a file; a byte order mark, which some editors write, is no part of it."""
    try:
        return path.read_text(encoding="utf-8-sig")
    except OSError as fault:
        raise BadInput(where="file", expected="a readable file", found=str(fault.strerror)) from fault
    except UnicodeDecodeError as fault:
        raise BadInput(where="file", expected="UTF-8 text", found=f"other bytes at position {fault.start}") from fault


def pieces_of(text: str, item: str) -> Iterator[tuple[str, str]]:
    """Yield what stands between semicolons, line ends and comments, with its place; what is blank is passed over.

    Parameters
    ----------
    text : str
        A list of items in plain text, with comments from ``#`` to the end of the line.
    item : str
        What a message calls an item.

    Examples
    --------
    >>> list(pieces_of("1 2;; 2 3 # left", "facet"))
    [('line 1, facet 1', '1 2'), ('line 1, facet 2', ' 2 3 ')]
    """
    number = 0
    for line_number, line in enumerate(text.splitlines(), start=1):
        for piece in line.partition("#")[0].split(";"):
            if piece.strip():
                number += 1
                yield f"line {line_number}, {item} {number}", piece


def label_of(token: str, where: str) -> Label:
    """Return the label that a word of plain text stands for: a number if it is one, otherwise the word itself.

    Raises
    ------
    BadInput
        If there is a bracket or a brace in it.
    """
    if re.search(r"[][(){}]", token):
        raise BadInput(where=where, expected="labels without brackets, as in 1 2; 2 3", found=token)
    return int(token) if _NUMBER.fullmatch(token) else token


def _facet_of(piece: str, where: str) -> tuple[Label, ...]:
    tokens = piece.replace(",", " ").split()
    return () if tokens == ["{}"] else distinct_labels([label_of(token, where) for token in tokens], where)


def _a_list(value: object, where: str) -> list[object]:
    if not isinstance(value, list):
        raise BadInput(where=where, expected="a list", found=repr(value))
    return value


def _from_json(text: str) -> SimplicialComplex:
    try:
        value = json.loads(text, object_pairs_hook=_without_repeats)
    except json.JSONDecodeError as fault:
        raise BadInput(where=f"line {fault.lineno}", expected="JSON", found=fault.msg) from fault
    except (ValueError, RecursionError) as fault:
        raise BadInput(where="file", expected="JSON of an ordinary size", found=str(fault)) from fault
    return complex_from_table(value if isinstance(value, dict) else {"facets": value})


def _without_repeats(pairs: Iterable[tuple[str, object]]) -> dict[str, object]:
    """Make an object of JSON; of a key that occurs twice one cannot know which value was meant."""
    table: dict[str, object] = {}
    for key, value in pairs:
        if key in table:
            raise BadInput(where=f"key {key}", expected="each key once", found="the key twice")
        table[key] = value
    return table


def _from_toml(text: str) -> SimplicialComplex:
    try:
        return complex_from_table(tomllib.loads(text))
    except tomllib.TOMLDecodeError as fault:
        raise BadInput(where="file", expected="TOML", found=str(fault)) from fault
    except (ValueError, RecursionError) as fault:
        raise BadInput(where="file", expected="TOML of an ordinary size", found=str(fault)) from fault


_READERS: Mapping[str, Callable[[str], SimplicialComplex]] = {
    ".txt": read_facets,
    ".json": _from_json,
    ".toml": _from_toml,
}
