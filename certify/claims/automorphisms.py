"""The claim kind ``automorphisms``: the order of a group of symmetries of K and the pairs, and its orbits."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from functools import partial
from typing import Any, ClassVar

from certify.certificate.canonical import integer_value
from certify.claims.base import Contribution, generators_value
from certify.claims.values import ValuesClaim
from certify.products import PolyhedralProduct
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import Generators, acting, automorphism_count
from certify.symmetry.elements import Element, check_symmetries, generated_group, moved_mask, orbit

__all__ = ["MOST_VERTICES", "AutomorphismsClaim"]

MOST_VERTICES = 16
"""Orbits on sets of vertices are counted up to this number of vertices; part of the format."""


@dataclass(frozen=True)
class AutomorphismsClaim(ValuesClaim):
    """A claim about the group of all automorphisms of K that preserve the pairs, or the group of some of them.

    Parameters
    ----------
    product : PolyhedralProduct
    generators : tuple of Element, or None
        None is for the full group.
    claimed : mapping
        ``order``, and ``orbits``: their number on ``vertices``, on ``faces`` (a list by the number of vertices, from
        the empty face on) and on ``subsets`` of vertices, which are the full subcomplexes (None for more than
        `MOST_VERTICES` vertices).

    Raises
    ------
    BadInput
        If a generator does not preserve K or the pairs.
    """

    product: PolyhedralProduct
    generators: Generators = None
    claimed: Mapping[str, Any] = field(default_factory=dict)
    route: str = "permutations"
    kind: ClassVar[str] = "automorphisms"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries."""
        check_symmetries(self.generators or (), self.product)

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.product.complex

    def fields(self) -> dict[str, Any]:
        """Return generators and pairs."""
        return {"generators": generators_value(self.generators), "pairs": [pair.value for pair in self.product.pairs]}

    @property
    def group_cells(self) -> int:
        """About |G| m for a group that is listed, and for orbits the sets that generators move."""
        k, m = self.base, self.base.vertex_count
        generators = acting(self.generators, self.product)
        listed = 0 if self.generators is None else len(generated_group(generators, m)) * m
        sets = sum(k.f_vector()) + (1 << m if m <= MOST_VERTICES else 0)
        return listed + sets * (1 + len(generators))

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:  # noqa: ARG002 - there are none
        """Return order and orbits."""
        k, m = self.base, self.base.vertex_count
        generators = acting(self.generators, self.product)
        every = self.generators is None
        order = automorphism_count(self.product) if every else len(generated_group(generators, m))
        levels: dict[int, list[int]] = {}
        for mask in k.face_masks():
            levels.setdefault(mask.bit_count(), []).append(mask)
        orbits = {
            "faces": [_orbits(level, generators) for level in levels.values()],
            "subsets": _orbits(range(1 << m), generators) if m <= MOST_VERTICES else None,
            "vertices": _orbits((1 << vertex for vertex in range(m)), generators),
        }
        return {"order": integer_value(order), "orbits": orbits}

    def check(self, found: Mapping[str, Any]) -> None:
        """Raise ClaimIsFalse at the first value that is not the one claimed; orbits may be claimed in part."""
        self.compare({key: value for key, value in self.claimed.items() if key != "orbits"}, found)
        for key, claimed in self.claimed.get("orbits", {}).items():
            on = {"vertices": "on vertices", "faces": "on faces by size", "subsets": "on sets of vertices"}[key]
            self.compare_one(f"the number of orbits {on} of {self._group}", claimed, found["orbits"][key])

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return f"the {key} of {self._group}"

    @property
    def _group(self) -> str:
        return "the automorphism group of K" if self.generators is None else "the group of these generators"

    def shown(self, key: str, value: Any) -> str:
        """Write a value."""
        if key == "order":
            return f"{value}"
        faces = ", ".join(map(str, value["faces"]))
        sets = "" if value["subsets"] is None else f", {value['subsets']} on sets of vertices"
        return f"{value['vertices']} on vertices, {faces} on faces by size{sets}"


def _images(generators: tuple[Element, ...], mask: int) -> list[int]:
    return [moved_mask(mask, element) for element in generators]


def _orbits(masks: Iterable[int], generators: Iterable[Element]) -> int:
    left, count = set(masks), 0
    by = tuple(generators)
    while left:
        left.difference_update(orbit(next(iter(left)), partial(_images, by)))
        count += 1
    return count
