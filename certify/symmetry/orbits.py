"""Blocks by orbits: one block for each orbit of a group on the choices of summands (Lemma D).

A choice is a word with a digit for each vertex, held as a number with the first vertex as its first digit. A
permutation of the vertices moves digits, so its value on a word is a sum over parts of the word, and these are
tabulated.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import replace

from certify.errors import LimitReached
from certify.products import Block, PolyhedralProduct
from certify.products.blocks import BATCH, DIGITS, Choices
from certify.symmetry.automorphisms import Permutation

__all__ = ["MOST_WORDS", "orbit_classes"]

MOST_WORDS = 1 << 23
"""More choices than this are not walked through one by one."""

_PART = 1024


def orbit_classes(
    product: PolyhedralProduct, generators: Sequence[Permutation], top: int | None = None
) -> Iterator[Block]:
    """Yield one block for each orbit, equal ones merged, in the order of the first words of the orbits.

    Parameters
    ----------
    product : PolyhedralProduct
    generators : sequence of Permutation
        Symmetries of K and the pairs.
    top : int, optional
        As for `certify.products.block_classes`.

    Raises
    ------
    LimitReached
        If there are more than `MOST_WORDS` choices.
    """
    m = product.complex.vertex_count
    base = max((len(pair.shapes) for pair in product.pairs), default=1)
    if base**m > MOST_WORDS:
        raise LimitReached(f"orbits are walked through for at most {MOST_WORDS} blocks; use the route blocks instead")
    sizes = [len(pair.shapes) for pair in product.pairs]
    choices = Choices(product, top)
    known: dict[object, Block] = {}
    room = BATCH
    for number, times in _orbits(base**m, [_tables(generator, base) for generator in generators]):
        digits = [number // base ** (m - 1 - vertex) % base for vertex in range(m)]
        if any(digit >= size for digit, size in zip(digits, sizes, strict=True)):
            continue
        block = choices.block("".join(DIGITS[digit] for digit in digits))
        if block is None:
            continue
        shifts = {shift: count * times for shift, count in block.shifts.items()}
        key = (block.tags, block.faces, 0 if top is None else min(shifts))
        if key in known:
            known[key] = replace(known[key], shifts=_sum(known[key].shifts, shifts))
            continue
        room -= len(block.faces)
        if room < 0:
            yield from (old.truncated(top) for old in known.values())
            known, room = {}, BATCH - len(block.faces)
        known[key] = replace(block, shifts=shifts)
    yield from (old.truncated(top) for old in known.values())


def _sum(some: Mapping[int, int], more: Mapping[int, int]) -> dict[int, int]:
    return {shift: some.get(shift, 0) + more.get(shift, 0) for shift in (*some, *more)}


def _tables(generator: Permutation, base: int) -> list[list[int]]:
    """Return the values of a permutation on the parts of a word, from the last digit on."""
    m = len(generator)
    part = 1
    while base ** (part + 1) <= _PART and part < m:
        part += 1
    weights = [base ** (m - 1 - to) for to in reversed(generator)]
    return [_sums(weights[start : start + part], base) for start in range(0, m, part)]


def _sums(weights: Sequence[int], base: int) -> list[int]:
    """Return for each number with these many digits the sum of its digits times their weights, last digit first."""
    values = [0]
    for weight in weights:
        values = [value + digit * weight for digit in range(base) for value in values]
    return values


def _orbits(count: int, permutations: Sequence[list[list[int]]]) -> Iterator[tuple[int, int]]:
    """Yield the least number of each orbit on 0, …, count - 1, and the size of the orbit."""
    seen = bytearray(count)
    position = seen.find(0)
    while position >= 0:
        orbit = [position]
        seen[position] = 1
        for number in orbit:
            for tables in permutations:
                rest, image = number, 0
                for values in tables:
                    rest, digits = divmod(rest, len(values))
                    image += values[digits]
                if not seen[image]:
                    seen[image] = 1
                    orbit.append(image)
        yield position, len(orbit)
        position = seen.find(0, position)
