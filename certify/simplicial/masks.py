"""Finite sets of vertex numbers as bit masks: the plain kernels under `SimplicialComplex`."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterable, Iterator
from functools import lru_cache

__all__ = ["Face", "face_of", "levels", "mask_of", "maximal", "minimal_non_faces", "restrict"]

Face = tuple[int, ...]
"""Vertex numbers in ascending order, counted from 0."""


def mask_of(face: Iterable[int]) -> int:
    """Return the bit mask of a face: bit i is set when vertex number i belongs to it.

    Examples
    --------
    >>> mask_of((0, 1, 3)), mask_of(())
    (11, 0)
    """
    mask = 0
    for vertex in face:
        mask |= 1 << vertex
    return mask


def face_of(mask: int) -> Face:
    """Return the face with the given bit mask, so that ``mask_of(face_of(mask)) == mask``.

    Examples
    --------
    >>> face_of(11), face_of(0)
    ((0, 1, 3), ())
    """
    return tuple(bit.bit_length() - 1 for bit in _bits(mask))


def restrict(mask: int, vertices: Face) -> int:
    """Return the part of a face that lies in `vertices`, renumbered by position in `vertices`.

    Examples
    --------
    >>> face_of(restrict(mask_of((0, 2, 5)), (2, 3, 5)))
    (0, 2)
    """
    return sum(1 << place for place, vertex in enumerate(vertices) if mask >> vertex & 1)


def maximal(masks: Iterable[int]) -> list[int]:
    """Return the sets that lie in no other given set, each once, the larger ones first.

    Notes
    -----
    Each vertex keeps the numbers of the larger sets that contain it as the bits of an integer. A set lies in
    a larger one exactly when the integers of its vertices have a bit in common, which is quick for thousands
    of sets.
    """
    by_size: defaultdict[int, set[int]] = defaultdict(set)
    for mask in masks:
        by_size[mask.bit_count()].add(mask)
    found: list[int] = []
    holders: defaultdict[int, int] = defaultdict(int)
    for size in sorted(by_size, reverse=True):
        new = [mask for mask in by_size[size] if not _is_held(mask, holders, len(found))]
        if size > min(by_size):
            for number, mask in enumerate(new, start=len(found)):
                for bit in _bits(mask):
                    holders[bit] |= 1 << number
        found += new
    return found


# A whole table of faces can take tens of megabytes, so only a few are kept.
@lru_cache(maxsize=8)
def levels(facets: tuple[Face, ...]) -> tuple[tuple[int, ...], ...]:
    """Return the faces of the complex with the given facets: entry s has the ascending masks with s vertices.

    Notes
    -----
    The cost is the sum of the sizes of all faces.
    """
    top = max(map(len, facets))
    table: list[set[int]] = [set() for _ in range(top + 1)]
    for facet in facets:
        table[len(facet)].add(mask_of(facet))
    for size in range(top, 0, -1):
        below = table[size - 1]
        for mask in table[size]:
            for bit in _bits(mask):
                below.add(mask ^ bit)
    return tuple(tuple(sorted(level)) for level in table)


@lru_cache(maxsize=64)
def minimal_non_faces(facets: tuple[Face, ...], vertex_count: int) -> tuple[Face, ...]:
    """Return the minimal sets of vertices that are no faces, sorted by number of vertices and then by mask.

    Notes
    -----
    For a face F let e(F) be the set of vertices v outside F such that F + v is a face. Let v be the largest
    vertex of a set N and F = N - v. Then N is a minimal non-face exactly when F is a face, v is not in e(F),
    and v is in e(F - w) for every w in F. So the cost is the sum of the sizes of all faces.
    """
    everything = (1 << vertex_count) - 1
    table = levels(facets)
    found: list[int] = []
    below: dict[int, int] = {}
    for level, above in zip(table, (*table[1:], ()), strict=True):
        here = _extensions(level, above)
        for face in level:
            largest = face.bit_length()
            new = everything >> largest << largest & ~here[face]
            for bit in _bits(face):
                if not new:
                    break
                new &= below[face ^ bit]
            found += [face | bit for bit in _bits(new)]
        below = here
    return tuple(map(face_of, sorted(found, key=lambda mask: (mask.bit_count(), mask))))


def _extensions(level: Iterable[int], above: Iterable[int]) -> dict[int, int]:
    """Map each face of one size to the mask of the vertices that extend it to a face of the next size."""
    found = dict.fromkeys(level, 0)
    for face in above:
        for bit in _bits(face):
            found[face ^ bit] |= bit
    return found


def _is_held(mask: int, holders: dict[int, int], count: int) -> bool:
    """Tell whether one of the first `count` sets contains the given one."""
    common = (1 << count) - 1
    for bit in _bits(mask):
        if not common:
            break
        common &= holders[bit]
    return common != 0


def _bits(mask: int) -> Iterator[int]:
    """Yield the powers of two in a mask, ascending."""
    while mask:
        bit = mask & -mask
        yield bit
        mask ^= bit
