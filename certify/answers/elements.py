"""Permutations as people give them at a prompt."""

from __future__ import annotations

from collections.abc import Iterable
from typing import TYPE_CHECKING, TypeAlias, TypeVar

from certify.errors import BadInput
from certify.products import PolyhedralProduct
from certify.simplicial import SimplicialComplex
from certify.simplicial.arguments import items
from certify.symmetry.automorphisms import Generators
from certify.symmetry.elements import Element, element_from_cycles, element_from_sympy

if TYPE_CHECKING:
    from sympy.combinatorics import Permutation

__all__ = ["Given", "elements_of", "require_kind"]

Given: TypeAlias = "str | Element | Permutation"
"""A permutation of the vertices as people give it: in cycles of labels, as images with signs, or as SymPy has it."""


_Known = TypeVar("_Known", SimplicialComplex, PolyhedralProduct)


def require_kind(given: _Known, kind: type[_Known]) -> _Known:
    """Return a complex or a product, and refuse the other: which of them is acted on is easily mixed up.

    Raises
    ------
    BadInput
        If it is something else.
    """
    if not isinstance(given, kind):
        names = {SimplicialComplex: "a complex K", PolyhedralProduct: "a product polyhedral_product(K, pair)"}
        raise BadInput(where="the first argument", expected=names[kind], found=type(given).__name__)
    return given


def elements_of(given: Iterable[Given] | None, k: SimplicialComplex) -> Generators:
    """Return elements from what people give.

    Raises
    ------
    BadInput
        If it is no list, or something in it is no permutation.
    """
    return None if given is None else tuple(_element_of(one, k) for one in items(given, "generators"))


def _element_of(one: Given, k: SimplicialComplex) -> Element:
    if isinstance(one, str):
        return element_from_cycles(one, k)
    if isinstance(one, tuple) and all(isinstance(image, int) and not isinstance(image, bool) for image in one):
        return one
    if hasattr(one, "array_form"):
        return element_from_sympy(one, k)
    expected = 'permutations in cycles like "(1 2 3)", as tuples of images, or as SymPy has them'
    raise BadInput(where="generators", expected=expected, found=repr(one))
