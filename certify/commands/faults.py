"""What can end the work although neither the claims nor the program are at fault."""

from __future__ import annotations

from concurrent.futures import BrokenExecutor

from certify.errors import BadInput, LimitReached

__all__ = ["OUTSIDE", "sentence_of"]

OUTSIDE = (BadInput, LimitReached, OSError, MemoryError, BrokenExecutor)
"""Errors that come from outside: bad input, a limit, a full disk, no memory."""


def sentence_of(error: BaseException) -> str:
    """Return the sentence that a person reads about such an error.

    Examples
    --------
    >>> sentence_of(OSError(28, "No space left on device"))
    'the system refuses to go on: No space left on device'
    """
    match error:
        case OSError():
            return f"{error.filename or 'the system refuses to go on'}: {error.strerror or error}"
        case MemoryError():
            return "the memory of this machine does not suffice"
        case BrokenExecutor():
            return "a process that computed was ended from outside, perhaps because memory ran out"
        case _:
            return str(error)
