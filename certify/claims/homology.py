"""The claim kind ``homology``: the integral homology groups of a polyhedral product.

Statement: H_k((X, A)^K; ℤ) for all degrees, or for a list of degrees. Routes: ``blocks``, one record for each class
of blocks of the stable splitting that is no cone, or ``cells``, one record for the whole product. Each record is an
adapted basis (Lemmas A and B of docs/mathematics.md).
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from math import prod
from typing import Any, Literal

from certify.certificate import basis_value, canonical_line, vector_value
from certify.certificate.canonical import integer_value
from certify.errors import BadInput, ClaimIsFalse
from certify.exact import AbelianGroup, adapted_basis
from certify.products import Block, PolyhedralProduct, block_classes, cell_complex

__all__ = ["Contribution", "HomologyClaim", "Route", "Task", "solve"]

Route = Literal["blocks", "cells"]
Groups = Mapping[int, AbelianGroup]


@dataclass(frozen=True, slots=True)
class Contribution:
    """What one record adds to the homology: groups by degree before the shifts, and how often each shift occurs."""

    groups: tuple[AbelianGroup, ...]
    shifts: Mapping[int, int]


@dataclass(frozen=True, slots=True)
class Task:
    """One piece of work that leads to one record, or to none if the block is a cone.

    Parameters
    ----------
    source : Block or PolyhedralProduct
        A class of blocks, or the whole product.
    top : int or None
        Cells of larger degree are left out.
    """

    source: Block | PolyhedralProduct
    top: int | None

    @property
    def weight(self) -> int:
        """How many blocks the task settles."""
        return sum(self.source.shifts.values()) if isinstance(self.source, Block) else 1


@dataclass(frozen=True, slots=True)
class HomologyClaim:
    """A claim about the integral homology of a polyhedral product.

    Parameters
    ----------
    product : PolyhedralProduct
    degrees : tuple of int, or None
        The degrees that the claim speaks of, ascending; None for all.
    groups : mapping from degree to AbelianGroup, or None
        The claimed groups; a degree that is missing is claimed to be zero. None asks for the value.
    route : {"blocks", "cells"}
    """

    product: PolyhedralProduct
    degrees: tuple[int, ...] | None = None
    groups: Groups | None = None
    route: Route = "blocks"

    def __post_init__(self) -> None:
        """Refuse degrees that are none, and groups outside the degrees."""
        if self.degrees is not None:
            if not self.degrees or any(degree < 0 for degree in self.degrees):
                raise BadInput(where="degrees", expected="at least one degree from 0 on", found=f"{list(self.degrees)}")
            object.__setattr__(self, "degrees", tuple(sorted(set(self.degrees))))
        for degree in self.groups or ():
            if degree < 0 or (self.degrees is not None and degree not in self.degrees):
                raise BadInput(where="groups", expected="degrees that the claim speaks of", found=f"degree {degree}")

    @property
    def top(self) -> int | None:
        """The largest degree whose cells matter: one above the largest degree of the claim."""
        return None if self.degrees is None else self.degrees[-1] + 1

    def opening(self) -> bytes | None:
        """Return the record that comes first: the splitting of each pair that is given by its cells; None without any."""
        splittings = {pair: pair.splitting for pair in self.product.pairs if pair.splitting is not None}
        if self.route == "cells" or not splittings:
            return None
        values = [
            {
                "basis": [vector_value(v) for v in s.basis],
                "inverse": [[integer_value(x) for x in row] for row in s.inverse],
            }
            for s in splittings.values()
        ]
        return canonical_line({"splitting": values})

    def tasks(self) -> Iterator[Task]:
        """Yield the work, in the order of the records."""
        if self.route == "cells":
            yield Task(self.product, self.top)
            return
        for block in block_classes(self.product, self.top):
            yield Task(block, self.top)

    @property
    def weight(self) -> int:
        """The sum of the weights of all tasks, for progress; an upper bound where faces or degrees are restricted."""
        if self.route == "cells":
            return 1
        return prod(sum(times for shape in pair.shapes for _, times in shape.shifts) for pair in self.product.pairs)

    def total(self, contributions: Iterator[Contribution]) -> dict[int, AbelianGroup]:
        """Return the groups that these contributions add up to, in the degrees of the claim, zero groups left out."""
        ranks: dict[int, int] = {}
        orders: dict[int, list[int]] = {}
        for contribution in contributions:
            for degree, group in enumerate(contribution.groups):
                for shift, times in contribution.shifts.items() if group else ():
                    ranks[degree + shift] = ranks.get(degree + shift, 0) + group.rank * times
                    orders.setdefault(degree + shift, []).extend(group.torsion * times)
        found = {degree: AbelianGroup.of(rank, orders[degree]) for degree, rank in sorted(ranks.items())}
        return {k: group for k, group in found.items() if self.degrees is None or k in self.degrees}

    def check(self, found: Groups) -> None:
        """Raise ClaimIsFalse at the first degree in which the claimed group is not the one found."""
        if self.groups is None:
            return
        for degree in sorted(found.keys() | self.groups.keys()):
            claimed, real = (groups.get(degree, AbelianGroup()) for groups in (self.groups, found))
            if claimed != real:
                raise ClaimIsFalse(what=f"H_{degree}({self.product}; ℤ)", claimed=str(claimed), found=str(real))

    def statement(self, found: Groups) -> dict[str, Any]:
        """Return the statement of the certificate, with vertices numbered from 1 in the order of the labels."""
        complex_ = self.product.complex
        return {
            "degrees": None if self.degrees is None else list(self.degrees),
            "facets": [[number + 1 for number in facet] for facet in complex_.facets],
            "groups": [
                [degree, integer_value(group.rank), [integer_value(order) for order in group.torsion]]
                for degree, group in sorted(found.items())
            ],
            "kind": "homology",
            "pairs": [pair.value for pair in self.product.pairs],
            "vertices": complex_.vertex_count,
        }


def solve(task: Task) -> tuple[bytes, Contribution] | None:
    """Return the record of a task as a line, with what it adds to the homology; None for a cone."""
    if isinstance(task.source, PolyhedralProduct):
        basis = adapted_basis(cell_complex(task.source, task.top))
        return canonical_line({"basis": basis_value(basis)}), Contribution(basis.homology(), {0: 1})
    block = task.source
    if block.is_cone:
        return None
    basis = adapted_basis(block.chains())
    value = {"basis": basis_value(basis), "block": block.name}
    return canonical_line(value), Contribution(basis.homology(), block.shifts)
