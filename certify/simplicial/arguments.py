"""What people hand over as labels, lists and numbers, and the checks that all readers of complexes share."""

from __future__ import annotations

from collections.abc import Container, Hashable, Iterable
from typing import TypeVar

from certify.errors import BadInput

__all__ = ["Label", "check_known", "check_whole_number", "distinct_labels", "items", "natural_order"]

Label = Hashable
"""What a person calls a vertex: any hashable value except a truth value."""

_Item = TypeVar("_Item")


def items(given: Iterable[_Item], where: str) -> Iterable[_Item]:
    """Return what was given if it is a list of some kind; a string is one name and no list of letters.

    Raises
    ------
    BadInput
        If it is a string or cannot be iterated over.
    """
    if isinstance(given, str | bytes) or not isinstance(given, Iterable):
        raise BadInput(where=where, expected="a list", found=repr(given))
    return given


def distinct_labels(labels: Iterable[Label], where: str) -> tuple[Label, ...]:
    """Return a list of distinct labels as a tuple, in the order given.

    Parameters
    ----------
    labels : iterable of labels
        A facet, or any other set of vertices.
    where : str
        How a message names the list, for example ``"facet 3"``.

    Raises
    ------
    BadInput
        If it is a string or no list at all, or has a label twice, a truth value, or something that cannot be
        hashed.

    Examples
    --------
    >>> distinct_labels([2, "a"], "facet 3")
    (2, 'a')
    >>> distinct_labels("ab", "facet 3")
    Traceback (most recent call last):
    certify.errors.BadInput: facet 3: expected a list, found 'ab'
    """
    seen: dict[Label, None] = {}
    for label in items(labels, where):
        # A truth value equals 0 or 1, so it would silently be taken for the vertex of that name.
        if isinstance(label, bool) or not _is_hashable(label):
            raise BadInput(where=where, expected="numbers or names as labels", found=repr(label))
        if label in seen:
            raise BadInput(where=where, expected="each vertex once", found=f"vertex {label!r} twice")
        seen[label] = None
    return tuple(seen)


def check_known(labels: Iterable[Label], known: Container[Label], where: str) -> None:
    """Refuse a label that no vertex has.

    Raises
    ------
    BadInput
        With `where` as its place.
    """
    for label in labels:
        if label not in known:
            raise BadInput(where=where, expected="vertices of the complex", found=f"vertex {label!r}, which is none")


def natural_order(labels: Iterable[Label]) -> tuple[Label, ...]:
    """Return the different labels: sorted if all are whole numbers or all are strings, else by first appearance.

    Examples
    --------
    >>> natural_order([10, 9, 10]), natural_order(["b", 1, "a"])
    ((9, 10), ('b', 1, 'a'))
    """
    found = tuple(dict.fromkeys(labels))
    numbers = [label for label in found if isinstance(label, int)]
    names = [label for label in found if isinstance(label, str)]
    if len(numbers) == len(found):
        return tuple(sorted(numbers))
    return tuple(sorted(names)) if len(names) == len(found) else found


def check_whole_number(where: str, value: object, *, least: int, most: int | None = None) -> int:
    """Return a value if it is a whole number in range; sheets may hold anything.

    Raises
    ------
    BadInput
        With `where` as its place.

    Examples
    --------
    >>> check_whole_number("argument n", 2, least=3)
    Traceback (most recent call last):
    certify.errors.BadInput: argument n: expected a whole number of at least 3, found 2
    """
    wanted = f"a whole number of at least {least}" if most is None else f"a whole number from {least} to {most}"
    # A truth value is a whole number for Python, but nobody counts with it.
    if isinstance(value, bool) or not isinstance(value, int) or value < least or (most is not None and value > most):
        raise BadInput(where=where, expected=wanted, found=repr(value))
    return value


def _is_hashable(label: object) -> bool:
    try:
        hash(label)
    except TypeError:
        return False
    return True
