"""The claim kinds ``homology`` and ``smash``: integral homology of a polyhedral product, or polyhedral smash product.

Routes: ``blocks``, one record for each class of blocks of the stable splitting that is no cone; ``orbits``, the same
with one block for each orbit of the symmetries; ``cells``, one record for the whole product. Each record is an adapted
basis (Lemmas A and B of docs/mathematics.md).
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, replace
from math import prod
from typing import Any, ClassVar, Literal, get_args

from certify.certificate.canonical import integer_value
from certify.certificate.records import vector_value
from certify.claims.base import DegreesClaim, Task, checked_degrees
from certify.errors import BadInput
from certify.exact import AbelianGroup, BasedComplex
from certify.products import PolyhedralProduct, block_classes, cell_complex
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry import automorphism_generators, orbit_classes

__all__ = ["HomologyClaim", "Route", "SmashClaim"]

Route = Literal["blocks", "cells", "orbits"]


@dataclass(frozen=True, slots=True)
class _WholeProduct:
    """The product as one piece of work."""

    product: PolyhedralProduct
    top: int | None

    def chains(self) -> BasedComplex:
        """Return its cellular chain complex."""
        return cell_complex(self.product, self.top)


@dataclass(frozen=True)
class HomologyClaim(DegreesClaim):
    """A claim about the integral homology of a polyhedral product.

    Parameters
    ----------
    product : PolyhedralProduct
    degrees : tuple of int, or None
        The degrees that the claim speaks of; None for all.
    groups : mapping from degree to AbelianGroup, or None
        The claimed groups; a degree that is missing is claimed to be zero. None asks for the value.
    route : {"blocks", "orbits", "cells"}
    """

    product: PolyhedralProduct
    degrees: tuple[int, ...] | None = None
    groups: Mapping[int, AbelianGroup] | None = None
    route: Route = "blocks"
    kind: ClassVar[str] = "homology"

    def __post_init__(self) -> None:
        """Refuse degrees that are none, groups outside the degrees, and routes that are none."""
        if self.route not in get_args(Route):
            raise BadInput(where="route", expected=" or ".join(get_args(Route)), found=repr(self.route))
        object.__setattr__(self, "degrees", checked_degrees(self.degrees, self.groups))

    @property
    def base(self) -> SimplicialComplex:
        """The complex K that the space is built over."""
        return self.product.complex

    @property
    def top(self) -> int | None:
        """The largest degree whose cells matter: one above the largest degree of the claim."""
        return None if self.degrees is None else self.degrees[-1] + 1

    def opening(self) -> Iterator[dict[str, Any]]:
        """Yield the splitting of each pair that is given by its cells, and the generators of the route ``orbits``."""
        splittings = {pair: pair.splitting for pair in self.product.pairs if pair.splitting is not None}
        if splittings and self.route != "cells":
            values = []
            for splitting in splittings.values():
                inverse = [[integer_value(x) for x in row] for row in splitting.inverse]
                values.append({"basis": [vector_value(v) for v in splitting.basis], "inverse": inverse})
            yield {"splitting": values}
        if self.route == "orbits":
            generators = automorphism_generators(self.product)
            yield {"generators": [[image + 1 for image in generator] for generator in generators]}

    def tasks(self) -> Iterator[Task]:
        """Yield the work, in the order of the records."""
        product = self._reduced()
        if self.route == "cells":
            yield Task(_WholeProduct(product, self.top))
            return
        if self.route == "blocks":
            blocks = block_classes(product, self.top)
        else:
            blocks = orbit_classes(product, automorphism_generators(product), self.top)
        for block in blocks:
            yield Task(block, sum(block.shifts.values()))

    @property
    def weight(self) -> int:
        """The number of blocks, where some may have no faces."""
        if self.route == "cells":
            return 1
        pairs = self._reduced().pairs
        return prod(sum(times for shape in pair.shapes for _, times in shape.shifts) for pair in pairs)

    def in_degree(self, degree: str) -> str:
        """Write a homology group as in print."""
        return f"H_{degree}({self.product}; ℤ)"

    def remarks(self) -> list[str]:
        """Say which vertices have which pair, where not all have the same."""
        places: dict[str, list[str]] = {}
        for label, pair in zip(self.base.labels, self.product.pairs, strict=True):
            places.setdefault(pair.symbol, []).append(str(label))
        if len(places) < 2:
            return []
        return ["(X,A) is " + "; ".join(f"{pair} at {', '.join(labels)}" for pair, labels in places.items())]

    def fields(self) -> dict[str, Any]:
        """Return degrees and pairs."""
        return super().fields() | {"pairs": [pair.value for pair in self.product.pairs]}

    def _reduced(self) -> PolyhedralProduct:
        """Return the product with the summands that count."""
        return self.product


@dataclass(frozen=True)
class SmashClaim(HomologyClaim):
    """A claim about the reduced integral homology of the polyhedral smash product of pairs with names over K.

    The summand of the base point is left out at each vertex. (X, A)^K splits after one suspension into the polyhedral
    smash products over the full subcomplexes K_I.
    """

    kind: ClassVar[str] = "smash"

    def __post_init__(self) -> None:
        """Refuse what has no base point of its own, and the direct route."""
        super().__post_init__()
        if any(pair.splitting is not None for pair in self.product.pairs):
            raise BadInput(
                where="pair", expected="pairs with a name for a smash product", found="a pair given by its cells"
            )
        if self.route == "cells":
            raise BadInput(where="route", expected="blocks or orbits for a smash product", found="cells")

    def in_degree(self, degree: str) -> str:
        """Write a reduced homology group as in print."""
        return f"H̃_{degree}(polyhedral smash product {self.product}; ℤ)"

    def _reduced(self) -> PolyhedralProduct:
        """Return the product without the base points, which are the first summands."""
        pairs = tuple(replace(pair, shapes=pair.shapes[1:]) for pair in self.product.pairs)
        return PolyhedralProduct(self.product.complex, pairs)
