"""Blocks of the stable splitting, equal ones merged.

For disc pairs the cellular chain complex of (X, A)^K is the direct sum, over the sets I of vertices, of the augmented
oriented chain complex of the full subcomplex K_I, shifted by Σ_{i ∈ I} (n_i - 1); docs/mathematics.md proves it. After
the vertices of I have been moved down to 1, 2, …, many K_I are the same complex, and one record serves them all.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from itertools import pairwise

from certify.exact import BasedComplex, Entries
from certify.products.space import PolyhedralProduct

__all__ = ["BATCH", "Block", "block_classes"]

BATCH = 1 << 18
"""Faces that are merged together at most; a constant of the certificate format."""

_Masks = tuple[int, ...]
_States = dict[tuple[int, _Masks], tuple[str, dict[int, int]]]


@dataclass(frozen=True, slots=True)
class Block:
    """All the sets I whose full subcomplexes become the same complex when I is moved down to 1, 2, ….

    Parameters
    ----------
    name : str
        The first such I as a 0/1 word, a digit for each vertex.
    faces : tuple of int
        The faces as bit masks, sorted by size and mask, ∅ first.
    vertices : int
        The number of elements of I.
    shifts : mapping
        For each degree shift, the number of sets I that have it.
    """

    name: str
    faces: _Masks
    vertices: int
    shifts: Mapping[int, int]

    def is_cone(self, most: int) -> bool:
        """Tell whether a vertex completes each face of fewer than `most` vertices to a face (Lemma C)."""
        known = set(self.faces)
        apexes = (1 << self.vertices) - 1
        for mask in self.faces:
            if mask.bit_count() < most:
                rest = apexes & ~mask
                while rest:
                    bit = rest & -rest
                    rest ^= bit
                    if mask | bit not in known:
                        apexes ^= bit
                if not apexes:
                    return False
        return bool(apexes)

    def chains(self) -> BasedComplex:
        """Return the augmented oriented chain complex; degree k is spanned by the faces of k vertices."""
        degrees: list[list[int]] = [[] for _ in range(self.faces[-1].bit_count() + 1)]
        for mask in self.faces:
            degrees[mask.bit_count()].append(mask)
        boundaries: list[tuple[Entries, ...]] = [((),)]
        for below, faces in pairwise(degrees):
            numbers = {mask: number for number, mask in enumerate(below)}
            boundaries.append(tuple([_boundary(mask, numbers) for mask in faces]))
        return BasedComplex(tuple(boundaries))


def _boundary(mask: int, below: Mapping[int, int]) -> Entries:
    """Return the boundary of a face, entries ascending: leaving out a smaller vertex gives a larger mask."""
    terms = []
    rest = mask
    sign = 1
    while rest:
        bit = rest & -rest
        terms.append((below[mask ^ bit], sign))
        sign = -sign
        rest ^= bit
    terms.reverse()
    return tuple(terms)


def block_classes(product: PolyhedralProduct, top: int | None = None) -> Iterator[Block]:
    """Yield the classes of blocks in the order of their names, cones included.

    Parameters
    ----------
    product : PolyhedralProduct
    top : int, optional
        Leave out cells of larger degree, and blocks that have none up to ``top - 1``.

    Notes
    -----
    The vertices are decided one after the other; sets that leave the same complex on the vertices kept and undecided
    are merged on the way, so the cost follows the number of different complexes and not the 2^m sets. A level with more
    than `BATCH` faces is cut into runs, finished one after the other, which bounds the memory.
    """
    m = product.complex.vertex_count
    masks = product.complex.face_masks()
    if top is not None:
        masks = _skeleton(masks, top)
    pending: list[tuple[int, _States]] = [(0, {(0, masks): ("", {0: 1})})]
    while pending:
        vertex, states = pending.pop()
        if vertex < m:
            level = _decide(states, product.pairs[vertex].n - 1, top)
            pending += [(vertex + 1, run) for run in reversed(_runs(level))]
            continue
        for (kept, faces), (name, shifts) in states.items():
            yield Block(name, faces if top is None else _skeleton(faces, top - min(shifts)), kept, shifts)


def _skeleton(faces: _Masks, most: int) -> _Masks:
    """Return the faces of at most so many vertices."""
    return tuple(mask for mask in faces if mask.bit_count() <= most)


def _decide(states: _States, shift: int, top: int | None) -> _States:
    """Return the states after one more vertex has been left out of I, or taken in with this shift."""
    level: _States = {}
    for (kept, faces), (name, shifts) in states.items():
        _merge(level, (kept, _without(faces, kept)), name + "0", shifts)
        shifted = {old + shift: n for old, n in shifts.items() if top is None or old + shift < top}
        if shifted:
            _merge(level, (kept + 1, faces), name + "1", shifted)
    return level


def _merge(level: _States, state: tuple[int, _Masks], name: str, shifts: dict[int, int]) -> None:
    """Add the sets of a state to a level; the first name stays."""
    if state not in level:
        level[state] = (name, dict(shifts))
        return
    known = level[state][1]
    for shift, number in shifts.items():
        known[shift] = known.get(shift, 0) + number


def _without(faces: _Masks, place: int) -> _Masks:
    """Return the faces that avoid the vertex at `place`, with the vertices above moved down by one."""
    below = (1 << place) - 1
    above = ~below
    return tuple([mask & below | mask >> 1 & above for mask in faces if not mask >> place & 1])


def _runs(level: _States) -> list[_States]:
    """Cut a level into runs of at most `BATCH` faces, or of one state."""
    runs: list[_States] = []
    room = 0
    for state, entry in level.items():
        room -= len(state[1])
        if not runs or room < 0:
            runs.append({})
            room = BATCH - len(state[1])
        runs[-1][state] = entry
    return runs
