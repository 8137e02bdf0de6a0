"""The space that claims are about."""

from __future__ import annotations

from dataclasses import dataclass

from certify.errors import BadInput
from certify.products.pairs import Pair
from certify.simplicial.complexes import SimplicialComplex

__all__ = ["PolyhedralProduct"]


@dataclass(frozen=True, slots=True, repr=False)
class PolyhedralProduct:
    """The polyhedral product (X, A)^K, the union over the faces σ of K of ∏_{i ∈ σ} X_i × ∏_{i ∉ σ} A_i.

    Parameters
    ----------
    complex : SimplicialComplex
        K, with ghost vertices where it has them.
    pairs : tuple of Pair
        (X_i, A_i) for each vertex, in the order of the labels of K.

    References
    ----------
    V. M. Buchstaber, T. E. Panov, Toric Topology, AMS 2015, section 4.2 (from memory).
    """

    complex: SimplicialComplex
    pairs: tuple[Pair, ...]

    def __post_init__(self) -> None:
        """Refuse a list of pairs of the wrong length."""
        if len(self.pairs) != self.complex.vertex_count:
            raise BadInput(
                where="the polyhedral product",
                expected=f"one pair for each of the {self.complex.vertex_count} vertices",
                found=f"{len(self.pairs)} pairs",
            )

    def __str__(self) -> str:
        """Write the space as in print."""
        if len(set(self.pairs)) == 1:
            return f"{self.pairs[0].symbol}^K"
        return "(X,A)^K"

    def __repr__(self) -> str:
        """Write the space as in print, with K; and with the pairs where they differ."""
        pairs = [pair.symbol for pair in self.pairs] if len(set(self.pairs)) > 1 else []
        return f"{self}, where K has {self.complex}" + (f", and the pairs are {', '.join(pairs)}" if pairs else "")
