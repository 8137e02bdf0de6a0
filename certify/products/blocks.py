"""Blocks of the stable splitting, equal ones merged.

The cellular chain complex of (X, A)^K is the direct sum, over all choices of one summand of C(X_i) for each vertex i,
of tensor products cut down to supports in K; docs/mathematics.md proves it. For discs the choices are the sets I of
vertices, and a block is the augmented oriented chain complex of the full subcomplex K_I, shifted. A vertex that is
X, which leaves the homology as it is. After the vertices that are left have been
moved down to 1, 2, …, many blocks are the same complex, and one record serves them all.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, replace
from itertools import pairwise

from certify.exact import BasedComplex, Entries
from certify.products.cells import word_complex
from certify.products.space import PolyhedralProduct
from certify.products.splitting import Alphabet, Letter, Move, Shape, Tag

__all__ = ["BATCH", "DIGITS", "Block", "Choices", "block_classes", "is_superfluous", "relevant_faces"]

BATCH = 1 << 18
"""Faces that are merged together at most; a constant of the certificate format."""

DIGITS = "0123456789abcdefghijklmnopqrstuvwxyz"
"""The digits of the names of blocks: the number of the shape that is chosen at a vertex."""

_Masks = tuple[int, ...]
_State = tuple[tuple[Tag, ...], _Masks]
_States = dict[_State, tuple[str, dict[int, int]]]


@dataclass(frozen=True, slots=True)
class Block:
    """All choices of summands that lead to the same complex, without dominated vertices, moved down to 1, 2, ….

    Parameters
    ----------
    name : str
        The first such choice as a word, a digit for each vertex. For discs: 1 for the vertices in I, 0 for the others.
    tags : tuple of Tag
        What the vertices of the complex bring; for discs all are 1.
    faces : tuple of int
        The complex on these vertices as bit masks, sorted by size and mask, ∅ first.
    shifts : mapping
        For each degree shift, the number of choices that have it.
    most : int or None
        Cells of larger degree, before the shift, are left out.
    """

    name: str
    tags: tuple[Tag, ...]
    faces: _Masks
    shifts: Mapping[int, int]
    most: int | None = None

    @property
    def weights(self) -> tuple[int, ...] | None:
        """The tags, if all of them are numbers: then cells are faces."""
        weights = tuple(tag for tag in self.tags if isinstance(tag, int))
        return weights if len(weights) == len(self.tags) else None

    def truncated(self, top: int | None) -> Block:
        """Return the block without the cells that have a degree above `top` after each shift."""
        if top is None:
            return self
        most = top - min(self.shifts)
        faces = self.faces if self.weights is None else _skeleton(self.faces, most)
        return replace(self, faces=faces, most=most)

    @property
    def is_cone(self) -> bool:
        """Whether a vertex with tag 1 completes each face of fewer than `most` vertices to a face (Lemma C)."""
        known = set(self.faces)
        most = len(self.tags) + 1 if self.most is None or self.weights is None else self.most
        apexes = sum(1 << place for place, tag in enumerate(self.tags) if tag == 1)
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
        """Return the chain complex of the block, before the shift."""
        weights = self.weights
        if weights is None:
            return word_complex(self.faces, [_alphabet(tag) for tag in self.tags], self.most)
        degrees: list[list[int]] = [[] for _ in range(self.faces[-1].bit_count() + 1)]
        for mask in self.faces:
            degrees[mask.bit_count()].append(mask)
        boundaries: list[tuple[Entries, ...]] = [((),)]
        for below, faces in pairwise(degrees):
            numbers = {mask: number for number, mask in enumerate(below)}
            boundaries.append(tuple([_boundary(mask, numbers, weights) for mask in faces]))
        return BasedComplex(tuple(boundaries))


def _alphabet(tag: Tag) -> Alphabet:
    """Return the cells t and e with d e = n t for a number n."""
    return (Letter(0, False), Letter(1, True, ((0, tag),))) if isinstance(tag, int) else tag


def _boundary(mask: int, below: Mapping[int, int], weights: tuple[int, ...]) -> Entries:
    """Return the boundary of a face, entries ascending: leaving out a smaller vertex gives a larger mask."""
    terms = []
    rest = mask
    sign = 1
    while rest:
        bit = rest & -rest
        terms.append((below[mask ^ bit], sign * weights[bit.bit_length() - 1]))
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
    The vertices are decided one after the other; choices that leave the same complex on the vertices kept and undecided
    are merged on the way, so the cost follows the number of different complexes and not that of the choices. Dominated
    vertices are left out on the way too: of a polygon, sets of points are left, and the number of complexes grows with
    the square of m where it doubled with each vertex. A level with more than `BATCH` faces is cut into runs, finished
    one after the other, which bounds the memory.

    References
    ----------
    J. A. Barmak and E. G. Minian, Strong homotopy types, nerves and collapses, 2012, on dominated vertices
    (from memory).
    """
    pending: list[tuple[int, _States]] = [(0, {((), relevant_faces(product, top)): ("", {0: 1})})]
    while pending:
        vertex, states = pending.pop()
        if vertex < len(product.pairs):
            level = _decide_all(states, product, vertex, top)
            pending += [(vertex + 1, run) for run in reversed(_runs(level))]
            continue
        for (tags, faces), (name, shifts) in states.items():
            yield Block(name, tags, faces, shifts).truncated(top)


class Choices:
    """The blocks of single words, without merging; what words asked for in turn have in common is decided once.

    Steps from a state to the next are remembered, as far as their faces fit into a batch: words have few states.
    """

    def __init__(self, product: PolyhedralProduct, top: int | None = None) -> None:
        self._product = product
        self._top = top
        self._steps: dict[tuple[_State, Move, Tag], _State] = {}
        self._room = BATCH
        self._path: list[tuple[str, _State, dict[int, int]]] = [("", ((), relevant_faces(product, top)), {0: 1})]

    def block(self, word: str) -> Block | None:
        """Return the whole block of a word; None where it chooses a non-face, or has no cells up to ``top - 1``."""
        while not word.startswith(self._path[-1][0]):
            self._path.pop()
        for vertex in range(len(self._path) - 1, len(word)):
            shape = self._product.pairs[vertex].shapes[DIGITS.index(word[vertex])]
            _, state, shifts = self._path[-1]
            left = self._step(state, shape) if state[1] else state
            self._path.append((word[: vertex + 1], left, _convolved(shifts, shape.shifts, self._top)))
        name, (tags, faces), shifts = self._path[-1]
        return Block(name, tags, faces, shifts) if faces and shifts else None

    def _step(self, state: _State, shape: Shape) -> _State:
        key = (state, shape.move, shape.tag)
        if key not in self._steps:
            if self._room < 0:
                self._steps, self._room = {}, BATCH
            self._steps[key] = _decide(*state, shape)
            self._room -= len(state[1]) + len(self._steps[key][1])
        return self._steps[key]


def relevant_faces(product: PolyhedralProduct, top: int | None) -> _Masks:
    """Return the faces that carry cells up to the degree `top`."""
    masks = product.complex.face_masks()
    least = min((cell.degree for pair in product.pairs for cell in pair.cells if cell.outside), default=1)
    return masks if top is None or least == 0 else _skeleton(masks, top // least)


def _skeleton(faces: _Masks, most: int) -> _Masks:
    """Return the faces of at most so many vertices."""
    return tuple(mask for mask in faces if mask.bit_count() <= most)


def _decide_all(states: _States, product: PolyhedralProduct, vertex: int, top: int | None) -> _States:
    """Return the states after a summand has been chosen for one more vertex."""
    level: _States = {}
    for (tags, faces), (name, shifts) in states.items():
        for digit, shape in zip(DIGITS, product.pairs[vertex].shapes, strict=False):
            moved = _convolved(shifts, shape.shifts, top)
            state = _decide(tags, faces, shape) if moved else (tags, ())
            if state[1]:
                _merge(level, state, name + digit, moved)
    return level


def _convolved(shifts: Mapping[int, int], more: tuple[tuple[int, int], ...], top: int | None) -> dict[int, int]:
    """Return the shifts of pairs of choices, below `top`; what is given is below it already."""
    if more == ((0, 1),):
        return dict(shifts)
    total: dict[int, int] = {}
    for shift, number in shifts.items():
        for extra, times in more:
            if top is None or shift + extra < top:
                total[shift + extra] = total.get(shift + extra, 0) + number * times
    return total


def _merge(level: _States, state: _State, name: str, shifts: dict[int, int]) -> None:
    """Add the choices of a state to a level; the first name stays."""
    if state not in level:
        level[state] = (name, shifts)
        return
    known = level[state][1]
    for shift, number in shifts.items():
        known[shift] = known.get(shift, 0) + number


def _decide(tags: tuple[Tag, ...], faces: _Masks, shape: Shape) -> _State:
    """Return what a choice for the next vertex leaves, without superfluous vertices; no faces if no face is left."""
    left = _moved(faces, len(tags), shape.move)
    return _reduced(tags if shape.move in (Move.STAY, Move.OUT) else (*tags, shape.tag), left)


def _moved(faces: _Masks, place: int, move: Move) -> _Masks:
    """Return what becomes of the faces when the vertex at `place` is decided; nothing if no face is left."""
    if move == Move.KEEP:
        return faces
    bit = 1 << place
    if move == Move.STAY:
        return _without(faces, bit)
    if move == Move.OUT:
        below, above = bit - 1, -bit
        return tuple([mask & below | mask >> 1 & above for mask in faces if mask & bit])
    chosen = [mask & ~bit for mask in faces if bool(mask & bit) == (move == Move.OUTER)]
    return tuple(sorted(chosen + [mask | bit for mask in chosen], key=lambda mask: (mask.bit_count(), mask)))


def _without(faces: _Masks, bit: int) -> _Masks:
    """Return the faces without a vertex; the vertices above it move down by one."""
    below, above = bit - 1, -bit
    return tuple([mask & below | mask >> 1 & above for mask in faces if not mask & bit])


def _reduced(tags: tuple[Tag, ...], faces: _Masks) -> _State:
    """Leave out the first kept vertex that is superfluous, as long as there is one (Lemma C)."""
    apexes = sum([1 << place for place, tag in enumerate(tags) if tag == 1])
    place = 0
    while place < len(tags):
        bit = 1 << place
        if isinstance(tags[place], int) and is_superfluous(faces, bit, apexes & ~bit):
            faces = _without(faces, bit)
            tags = tags[:place] + tags[place + 1 :]
            apexes = apexes & bit - 1 | apexes >> 1 & -bit
            place = 0
        else:
            place += 1
    return tags, faces


def is_superfluous(faces: _Masks, bit: int, apexes: int) -> bool:
    """Tell whether a vertex is in no face, or another vertex completes all its faces to faces (Lemma C).

    Parameters
    ----------
    faces : tuple of int
        Faces as masks, ascending by number of vertices.
    bit : int
        The vertex, as a mask.
    apexes : int
        The other vertices that count, as a mask.
    """
    size = 0
    for mask in reversed(faces):  # an apex lies in all of the largest faces, and few vertices do
        if mask & bit:
            if mask.bit_count() < size:
                break
            apexes &= mask
            if not apexes:
                return False
            size = mask.bit_count()
    if not size:
        return True
    around = [mask for mask in faces if mask & bit]
    while apexes:
        apex = apexes & -apexes
        if 2 * sum([1 for mask in around if mask & apex]) == len(around):
            return True
        apexes ^= apex
    return False


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
