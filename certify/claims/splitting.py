"""The claim kinds ``tor``, ``table`` and ``summand``: full subcomplexes one by one, and what they add up to."""

from __future__ import annotations

from collections.abc import Hashable, Iterable, Iterator, Mapping
from dataclasses import dataclass
from itertools import product
from typing import Any, ClassVar

from certify.claims.base import Contribution, GroupsClaim, Sum, Task
from certify.errors import BadInput
from certify.exact import AbelianGroup, BasedComplex
from certify.products import Block, PolyhedralProduct, block_classes, parse_pairs
from certify.products.blocks import Choices
from certify.simplicial.complexes import SimplicialComplex
from certify.simplicial.operations import full_subcomplex, link
from certify.simplicial.spelling import spell_labels
from certify.simplicial.writing import plain_set

__all__ = ["SummandClaim", "TableClaim", "TorClaim"]


def _subcomplexes(complex_: SimplicialComplex) -> PolyhedralProduct:
    """Return a product whose blocks are the full subcomplexes, each with its number of vertices as shift."""
    return PolyhedralProduct(complex_, parse_pairs("(D2, S1)", complex_.vertex_count))


@dataclass(frozen=True)
class TorClaim(GroupsClaim[tuple[int, int]]):
    """A claim about the bigraded groups Tor_{i,2j}(ℤ[K], ℤ) of the face ring, which are H^{-i,2j} of (D², S¹)^K.

    Parameters
    ----------
    complex : SimplicialComplex
    groups : mapping from (i, j) to AbelianGroup, or None
        The claimed groups under i and j; a key that is missing is claimed to be zero. None asks for the value.

    Notes
    -----
    Tor_{i,2j} is the direct sum over the sets I of j vertices of the reduced cohomology of K_I in degree j - i - 1.

    References
    ----------
    M. Hochster, Cohen-Macaulay rings, combinatorics, and simplicial complexes, 1977 (from memory).
    """

    complex: SimplicialComplex
    groups: Mapping[tuple[int, int], AbelianGroup] | None = None
    route: str = "blocks"
    kind: ClassVar[str] = "tor"

    @property
    def weight(self) -> int:
        """The number of full subcomplexes."""
        return 1 << self.complex.vertex_count

    @property
    def base(self) -> SimplicialComplex:
        """The complex K that the space is built over."""
        return self.complex

    def tasks(self) -> Iterator[Task]:
        """Yield the classes of full subcomplexes."""
        for block in block_classes(_subcomplexes(self.complex)):
            yield Task(block, sum(block.shifts.values()))

    def total(self, contributions: Iterable[Contribution]) -> dict[tuple[int, int], AbelianGroup]:
        """Return the groups under (i, j): free parts of homology, and torsion one degree up, as cohomology has it."""
        found = Sum[tuple[int, int]]()
        for contribution in contributions:
            block = contribution.source
            if isinstance(block, Block):
                for (j, times), (size, group) in product(block.shifts.items(), enumerate(contribution.groups)):
                    found.add((j - size, j), group.rank, (), times)
                    found.add((j - size - 1, j), 0, group.torsion, times)
        return found.groups()

    def name(self, key: tuple[int, int]) -> str:
        """Write a group as in print."""
        i, j = key
        return f"Tor_{i},{2 * j}(ℤ[K], ℤ)"

    @property
    def rest(self) -> str:
        """Say as in print that all other groups are zero."""
        return "Tor_i,2j(ℤ[K], ℤ) = 0 for all other i, j"

    def path(self, key: tuple[int, int]) -> tuple[str, ...]:
        """Return i and 2j, as in print."""
        return (f"{key[0]},{2 * key[1]}",)

    def fields(self) -> dict[str, Any]:
        """Return nothing more."""
        return {}


@dataclass(frozen=True)
class TableClaim(TorClaim):
    """A claim about the reduced homology of every full subcomplex: the whole table of the stable splitting.

    Parameters
    ----------
    complex : SimplicialComplex
    groups : mapping from (mask, q) to AbelianGroup, or None
        The claimed H̃_q(K_I; ℤ) under I as a bit mask (bit i for vertex i + 1) and q from -1 on.
    """

    kind: ClassVar[str] = "table"

    def total(self, contributions: Iterable[Contribution]) -> dict[tuple[int, int], AbelianGroup]:
        """Return the groups of each full subcomplex."""
        known = {c.source.faces: c.groups for c in contributions if isinstance(c.source, Block)}
        found = Sum[tuple[int, int]]()
        m = self.complex.vertex_count
        choices = Choices(_subcomplexes(self.complex))
        for number in range(1 << m):
            word = f"{number:0{m}b}" if m else ""
            block = choices.block(word)
            for size, group in enumerate(known[block.faces] if block else ()):
                found.add((int(word[::-1] or "0", 2), size - 1), group.rank, group.torsion)
        return found.groups()

    def name(self, key: tuple[int, int]) -> str:
        """Write a reduced homology group as in print."""
        mask, q = key
        return f"H̃_{q}(K_{plain_set(self._labels(mask))}; ℤ)"

    @property
    def rest(self) -> str:
        """Say as in print that all other groups are zero."""
        return "H̃_q(K_I; ℤ) = 0 for all other q and I"

    def path(self, key: tuple[int, int]) -> tuple[str, ...]:
        """Return the vertices, and the degree."""
        return (spell_labels(self._labels(key[0])), str(key[1]))

    def _labels(self, mask: int) -> list[Hashable]:
        return [label for place, label in enumerate(self.complex.labels) if mask >> place & 1]


@dataclass(frozen=True)
class SummandClaim(GroupsClaim[int]):
    """A claim about one summand of the stable splitting: the reduced homology of a link, restricted to some vertices.

    Parameters
    ----------
    complex : SimplicialComplex
    kept : iterable of labels
        The vertices I of the full subcomplex of the link.
    out : iterable of labels
        The face J whose link is taken; empty for a full subcomplex of K itself.
    groups : mapping from degree to AbelianGroup, or None
        The claimed groups by degree from -1 on.

    Raises
    ------
    BadInput
        If `out` is no face, a label is unknown, or a vertex is kept and out at once.
    """

    complex: SimplicialComplex
    kept: tuple[Hashable, ...]
    out: tuple[Hashable, ...] = ()
    groups: Mapping[int, AbelianGroup] | None = None
    route: str = "cells"
    kind: ClassVar[str] = "summand"

    def __post_init__(self) -> None:
        """Refuse vertices that are kept and out at once, and ones that form no face."""
        if set(self.kept) & set(self.out):
            twice = next(label for label in self.kept if label in self.out)
            found = f"vertex {twice!r} in both"
            raise BadInput(where="out", expected="vertices that are not kept as well", found=found)
        self.complex.numbers(self.kept)
        if not self.complex.is_face(self.out):
            shown = plain_set(self.out)
            raise BadInput(where="out", expected="vertices that form a face", found=f"{shown}, which do not")

    @property
    def base(self) -> SimplicialComplex:
        """The complex K that the space is built over."""
        return self.complex

    def tasks(self) -> Iterator[Task]:
        """Yield the one piece of work."""
        part = full_subcomplex(link(self.complex, self.out), self.kept)
        yield Task(_Augmented(part))

    def total(self, contributions: Iterable[Contribution]) -> dict[int, AbelianGroup]:
        """Return the reduced homology."""
        found = Sum[int]()
        for contribution in contributions:
            for degree, group in enumerate(contribution.groups, -1):
                found.add(degree, group.rank, group.torsion)
        return found.groups()

    def name(self, key: int) -> str:
        """Write a reduced homology group as in print."""
        return self._name(str(key))

    @property
    def rest(self) -> str:
        """Say as in print that all other groups are zero."""
        return f"{self._name('q')} = 0 for all other q"

    def _name(self, degree: str) -> str:
        space = f"(link of {plain_set(self.out)})" if self.out else "K"
        return f"H̃_{degree}({space}_{plain_set(self.kept)}; ℤ)"

    def fields(self) -> dict[str, Any]:
        """Return the numbers of the vertices that are kept, and out."""
        return {
            "kept": [number + 1 for number in self.complex.numbers(self.kept)],
            "out": [number + 1 for number in self.complex.numbers(self.out)],
        }


@dataclass(frozen=True, slots=True)
class _Augmented:
    """A simplicial complex as one piece of work."""

    complex: SimplicialComplex

    def chains(self) -> BasedComplex:
        """Return its augmented oriented chain complex; degree k is spanned by the faces of k vertices."""
        return Block("", (1,) * self.complex.vertex_count, self.complex.face_masks(), {0: 1}).chains()
