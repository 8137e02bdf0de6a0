"""The claim kind ``orbit-count``: orbits of a group on colourings of the vertices."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.certificate.canonical import integer_value
from certify.claims.base import Contribution, generators_value, is_whole
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.counting import colouring_orbits
from certify.symmetry.elements import check_symmetries, generated_group

__all__ = ["OrbitCountClaim"]


@dataclass(frozen=True)
class OrbitCountClaim(ValuesClaim):
    """A claim about the number of orbits of a group of automorphisms of K on colourings of its vertices.

    Parameters
    ----------
    complex : SimplicialComplex
    colours : int
    generators : tuple of Element, or None
        None is for the full automorphism group.
    content : tuple of int, or None
        How many vertices have which colour; None for all colourings.
    claimed : mapping
        Some of ``orbits``, and ``primitive``: those with trivial isotropy.

    Raises
    ------
    BadInput
        If a generator does not preserve K or has signs, or the content does not fit.
    """

    complex: SimplicialComplex
    colours: int
    generators: Generators = None
    content: tuple[int, ...] | None = None
    claimed: Values = field(default_factory=dict)
    route: str = "permutations"
    kind: ClassVar[str] = "orbit-count"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries, and a content that does not fit."""
        if not is_whole(self.colours):
            raise BadInput(where="colours", expected="a whole number from 0 on", found=repr(self.colours))
        if any(to < 0 for element in self.generators or () for to in element):
            raise BadInput(where="generators", expected="permutations of the vertices", found="changes of signs")
        check_symmetries(self.generators or (), self._product)
        content = self.content
        if content is not None and (len(content) != self.colours or sum(content) != self.complex.vertex_count):
            expected = f"{self.colours} numbers with the sum {self.complex.vertex_count}"
            raise BadInput(where="content", expected=expected, found=f"{list(content)}")

    @property
    def _product(self) -> PolyhedralProduct:
        return PolyhedralProduct(self.complex, parse_pairs("(D2, S1)", self.complex.vertex_count))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.complex

    def fields(self) -> dict[str, Any]:
        """Return colours, content and generators."""
        return {
            "colours": integer_value(self.colours),
            "content": None if self.content is None else list(self.content),
            "generators": generators_value(self.generators),
        }

    @property
    def group_cells(self) -> int:
        """About |G| m."""
        m = self.complex.vertex_count
        return m * len(generated_group(acting(self.generators, self._product), m))

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return both numbers."""
        list(contributions)
        group = generated_group(acting(self.generators, self._product), self.complex.vertex_count)
        orbits, primitive = colouring_orbits(group, self.colours, self.content)
        return {"orbits": integer_value(orbits), "primitive": integer_value(primitive)}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        what = f"{self.colours} colours" if self.content is None else f"the content {list(self.content)}"
        free = " with trivial isotropy" if key == "primitive" else ""
        return f"the number of orbits on colourings with {what}{free}"
