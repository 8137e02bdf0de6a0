"""The claim kind ``equivariance``: the stable splitting goes along with a group of symmetries, on rational homology."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.certificate.canonical import integer_value
from certify.claims.base import Contribution, Task
from certify.claims.characters import CharacterClaim
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput, InternalError
from certify.products import PolyhedralProduct
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.actions import ActedCells
from certify.symmetry.automorphisms import Generators
from certify.symmetry.elements import Element

__all__ = ["EquivarianceClaim"]


@dataclass(frozen=True)
class EquivarianceClaim(ValuesClaim):
    """A claim that G acts on H_k((X, A)^K; ℚ) as on the sum of the summands of the stable splitting.

    The character of G on the homology of the whole product, on its cells, is the sum over the orbits of summands of the
    characters induced from their stabilisers; so the two representations of G are isomorphic.

    Parameters
    ----------
    product : PolyhedralProduct
    degree : int
    generators : tuple of Element, or None
        None is for all automorphisms of K and the pairs.
    elements : tuple of Element, or None
        One element of each rational class; None lets them be found.
    claimed : mapping
        ``values``: the traces on these elements, in this order.

    Raises
    ------
    BadInput
        As for `CharacterClaim`, and if a generator changes signs: on the summands that is known up to smaller ones.

    References
    ----------
    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, section 8.3, for the splitting (from memory); that a
    rational representation is known by its character: J.-P. Serre, Linear Representations of Finite Groups, Springer
    1977, section 2.3 (from memory).
    """

    product: PolyhedralProduct
    degree: int
    generators: Generators
    elements: tuple[Element, ...] | None = None
    claimed: Values = field(default_factory=dict)
    route: str = "both"
    kind: ClassVar[str] = "equivariance"

    def __post_init__(self) -> None:
        """Refuse what a character refuses, and changes of sign."""
        if any(to < 0 for element in self.generators or () for to in element):
            found = "a change of sign, which preserves no single summand"
            raise BadInput(where="generators", expected="permutations without signs", found=found)
        object.__setattr__(self, "elements", self._on_summands.elements)

    @property
    def _on_summands(self) -> CharacterClaim:
        return CharacterClaim(self.product, self.degree, self.generators, self.elements, self.claimed)

    @property
    def _on_cells(self) -> CharacterClaim:
        return CharacterClaim(self.product, self.degree, self.generators, self.elements, route="cells")

    @property
    def group_cells(self) -> int:
        """As for the character."""
        return self._on_summands.group_cells

    def class_sizes(self) -> dict[str, int]:
        """Return how many elements each rational class has, under the element that stands for it."""
        return self._on_summands.class_sizes()

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.product.complex

    def fields(self) -> dict[str, Any]:
        """Return degree, elements, generators and pairs."""
        fields = self._on_summands.fields()
        return {key: fields[key] for key in ("degree", "elements", "generators", "pairs")}

    def opening(self) -> Iterator[dict[str, Any]]:
        """Yield the splitting of each pair that is given by its cells."""
        yield from self._on_summands.opening()

    def tasks(self) -> Iterator[Task]:
        """Yield the blocks, and then the whole product."""
        yield from self._on_summands.tasks()
        yield from self._on_cells.tasks()

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the values of the character, after they were found to be the same on both sides."""
        on_summands: list[Contribution] = []
        on_cells: list[Contribution] = []
        for contribution in contributions:
            source = contribution.source
            whole = isinstance(source, ActedCells) and source.name is None
            (on_cells if whole else on_summands).append(contribution)
        values = self._on_summands.found(on_summands)["values"]
        if values != self._on_cells.found(on_cells)["values"]:
            raise InternalError("the stable splitting is not equivariant; please report it")
        return {"values": values}

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse at the first value of the character that is not the one claimed."""
        self._on_summands.check(found)

    def answer(self, found: Values) -> dict[str, Any]:
        """Return the values as the statement holds them."""
        return {"values": [integer_value(value) for value in found["values"]]}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return self._on_summands.name(key)

    def lines(self, found: Values) -> list[str]:
        """Write the values of the character, class by class, and what they are."""
        values = self._on_summands.lines({"values": found["values"], "products": []})
        return [*values, "and χ is the sum of the characters induced from the stabilisers of the summands"]

    def value(self, found: Values) -> dict[str, Any]:
        """Return the values under the elements."""
        return {"values": self._on_summands.value({"values": found["values"], "products": []})["values"]}
