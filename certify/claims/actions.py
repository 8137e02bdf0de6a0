"""The claim kind ``action``: the integer matrix of a symmetry on homology modulo torsion."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass, field
from typing import Any, ClassVar

from certify.certificate import vector_value
from certify.certificate.canonical import integer_of, integer_value
from certify.claims.base import Contribution, Task, check_degree
from certify.claims.values import Values, ValuesClaim
from certify.exact import adapted_basis
from certify.products import PolyhedralProduct
from certify.products.cells import Word
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.actions import ActedCells
from certify.symmetry.elements import Element, check_symmetries, spell_cycles
from certify.symmetry.surfaces import spell_point

__all__ = ["ActionClaim"]


@dataclass(frozen=True)
class ActionClaim(ValuesClaim):
    """A claim about the integer matrix of a symmetry on H_k((X, A)^K; ℤ) modulo torsion, in a basis of cycles.

    Parameters
    ----------
    product : PolyhedralProduct
    degree : int
    element : Element
    claimed : mapping
        ``trace``; ``matrix``, by rows: it belongs to the basis that is found, which depends on K and the pairs alone.

    Raises
    ------
    BadInput
        If the element is no symmetry.
    """

    product: PolyhedralProduct
    degree: int
    element: Element
    claimed: Values = field(default_factory=dict)
    route: str = "cells"
    kind: ClassVar[str] = "action"

    def __post_init__(self) -> None:
        """Refuse an element that is no symmetry, and a degree that is none."""
        check_degree(self.degree)
        check_symmetries([self.element], self.product)

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.product.complex

    @property
    def _cells(self) -> ActedCells:
        cells = tuple(pair.cells for pair in self.product.pairs)
        return ActedCells(self.base.face_masks(), cells, self.degree, (self.element,))

    def fields(self) -> dict[str, Any]:
        """Return degree, element and pairs."""
        pairs = [pair.value for pair in self.product.pairs]
        return {"degree": self.degree, "element": list(self.element), "pairs": pairs}

    def tasks(self) -> Iterator[Task]:
        """Yield the whole product."""
        if self._cells.is_watched:
            yield Task(self._cells)

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the cycles of the basis, and the matrix by rows."""
        list(contributions)
        if not self._cells.is_watched:
            return {"basis": [], "matrix": [], "trace": 0}
        complex_ = self._cells.chains()
        # The same basis as in the record, since it depends on the complex alone.
        basis = adapted_basis(complex_)
        (columns,) = self._cells.matrices(complex_, basis)
        cycles = [vector_value(cycle) for cycle in basis.degrees[self.degree].cycles]
        matrix = [list(row) for row in zip(*columns, strict=True)]
        return {"basis": cycles, "matrix": matrix, "trace": sum(row[i] for i, row in enumerate(matrix))}

    def answer(self, found: Values) -> dict[str, Any]:
        """Return basis, matrix and trace as the statement holds them."""
        matrix = [[integer_value(x) for x in row] for row in found["matrix"]]
        return {"basis": found["basis"], "matrix": matrix, "trace": integer_value(found["trace"])}

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return f"the {key} of {spell_cycles(self.element, self.base)} on H_{self.degree}({self.product}; ℤ) mod torsion"

    def lines(self, found: Values) -> list[str]:
        """Write the matrix by rows, its trace, and the cycles of the basis as sums of cells."""
        rows = [" ".join(map(str, row)) for row in found["matrix"]]
        cycles = [f"z_{i} = {cycle}" for i, cycle in enumerate(self.basis(found), 1)]
        basis = " in the basis of the cycles z" if cycles else " since this group is finite"
        return [f"{self.name('matrix')}, of trace {found['trace']},{basis}:", *rows, *cycles]

    def basis(self, found: Values) -> list[str]:
        """Write the cycles of the basis: cells by their middles in a cube, else by numbers of cells of pairs."""
        words = self._cells.watched_words if found["basis"] else []
        return [self._cycle(flat, words) for flat in found["basis"]]

    def _cycle(self, flat: Sequence[int | str], words: Sequence[Word]) -> str:
        """Write a cycle as a sum of cells."""
        cube = all(pair.symbol == "(D¹,S⁰)" for pair in self.product.pairs)
        terms = []
        for cell, coefficient in zip(flat[::2], map(integer_of, flat[1::2]), strict=True):
            word = words[int(cell)]
            shown = spell_point(word) if cube else f"[{' '.join(map(str, word))}]"
            times = "" if abs(coefficient) == 1 else f"{abs(coefficient)} "
            terms.append(f"{'-' if coefficient < 0 else '+'} {times}{shown}")
        return " ".join(terms).removeprefix("+ ")
