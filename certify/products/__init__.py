"""Polyhedral products (X, A)^K: pairs, cells of the whole product, blocks of the stable splitting."""

from certify.products.blocks import Block, block_classes
from certify.products.cells import cell_complex
from certify.products.pairs import Pair, parse_pair, parse_pairs
from certify.products.space import PolyhedralProduct

__all__ = [
    "Block",
    "Pair",
    "PolyhedralProduct",
    "block_classes",
    "cell_complex",
    "parse_pair",
    "parse_pairs",
]
