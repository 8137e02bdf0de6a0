"""Everything that `certify` raises on purpose: one root, and four ways to fall short of a proof."""

from __future__ import annotations

__all__ = ["BadInput", "CertifyError", "ClaimIsFalse", "InternalError", "LimitReached"]


class CertifyError(Exception):
    """The root: its message is one sentence that a mathematician understands."""


class BadInput(CertifyError):
    """Something that was given cannot be read as what it should be.

    Parameters
    ----------
    where : str
        File, line, key or option in which the fault lies, as its author would name it.
    expected : str
        What would have been accepted there.
    found : str
        What stood there instead.
    """

    def __init__(self, *, where: str, expected: str, found: str) -> None:
        super().__init__(f"{where}: expected {expected}, found {found}")
        self.where = where
        self.expected = expected
        self.found = found

    def inside(self, outer: str) -> BadInput:
        """Return the same fault, with the place named more precisely from the outside."""
        return BadInput(where=f"{outer}, {self.where}", expected=self.expected, found=self.found)


class ClaimIsFalse(CertifyError):
    """A claim was computed and its value is another one.

    Parameters
    ----------
    what : str
        The quantity, in the notation of mathematics.
    claimed, found : str
        The value that the author stated, and the value that was computed.
    more : int
        How many other values of the claim are wrong, too.
    """

    def __init__(self, *, what: str, claimed: str, found: str, more: int = 0) -> None:
        rest = f" ({more} more values are wrong)" if more > 1 else " (one more value is wrong)" if more else ""
        super().__init__(f"{what} is claimed to be {claimed}, but is {found}{rest}")
        self.what = what
        self.claimed = claimed
        self.found = found


class LimitReached(CertifyError):
    """A computation is larger than its stated limit; the message says how to raise it."""


class InternalError(CertifyError):
    """The program contradicts itself; the message asks for a report."""
