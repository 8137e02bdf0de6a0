"""Signed permutations of the vertices: cycle notation, products, groups and their classes.

An element is the tuple of the images of the vertices, which are numbered from 1; the image is negative where the
coordinate in (D¹, S⁰) changes its sign on the way. So the element (2, -1) takes (x, y) to (-y, x).
"""

from __future__ import annotations

import re
from collections.abc import Callable, Hashable, Iterable, Sequence
from math import gcd
from typing import TYPE_CHECKING, TypeVar

from certify.errors import BadInput, LimitReached
from certify.products import PolyhedralProduct
from certify.simplicial import SimplicialComplex
from certify.simplicial.spelling import labels_by_text

if TYPE_CHECKING:
    from sympy.combinatorics import Permutation

__all__ = [
    "MOST_ELEMENTS",
    "Element",
    "after",
    "check_symmetries",
    "cycles_of",
    "element_from_cycles",
    "element_from_sympy",
    "generated_group",
    "identity",
    "inverse",
    "moved_mask",
    "orbit",
    "rational_classes",
    "spell_cycles",
]

Element = tuple[int, ...]
"""The images of the vertices 1, 2, …, each with a sign."""

MOST_ELEMENTS = 200_000
"""Larger groups are not enumerated."""

_Point = TypeVar("_Point", bound=Hashable)


def identity(m: int) -> Element:
    """Return the element that moves nothing, on m vertices."""
    return tuple(range(1, m + 1))


def after(second: Element, first: Element) -> Element:
    """Return the product: first the one, then the other.

    Examples
    --------
    >>> after((-1, 2), (2, 1))
    (2, -1)
    """
    return tuple(second[to - 1] if to > 0 else -second[-to - 1] for to in first)


def inverse(element: Element) -> Element:
    """Return the inverse.

    Examples
    --------
    >>> after(inverse((2, -3, 1)), (2, -3, 1))
    (1, 2, 3)
    """
    found = [0] * len(element)
    for place, to in enumerate(element, start=1):
        found[abs(to) - 1] = place if to > 0 else -place
    return tuple(found)


def moved_mask(mask: int, element: Element) -> int:
    """Return the image of a set of vertices, given as a bit mask."""
    return sum(1 << abs(to) - 1 for place, to in enumerate(element) if mask >> place & 1)


def cycles_of(element: Element) -> tuple[tuple[int, ...], ...]:
    """Return the cycles on the vertices, those of length 1 included, each from its smallest vertex on.

    Examples
    --------
    >>> cycles_of((2, -3, 1, 4))
    ((1, 2, 3), (4,))
    """
    cycles = (tuple(orbit(vertex, lambda v: [abs(element[v - 1])])) for vertex in identity(len(element)))
    return tuple(cycle for cycle in cycles if cycle[0] == min(cycle))


def orbit(start: _Point, images: Callable[[_Point], Iterable[_Point]], most: int | None = None) -> list[_Point]:
    """Return all points that can be reached, in the order in which they are found.

    Raises
    ------
    LimitReached
        If there are more than `most`.
    """
    found = {start: None}
    order = [start]
    for point in order:
        for image in images(point):
            if image not in found:
                if most is not None and len(order) >= most:
                    raise LimitReached(
                        f"the group has more than {most:,} elements, and larger ones are not enumerated; "
                        "give generators of a smaller one"
                    )
                found[image] = None
                order.append(image)
    return order


def generated_group(generators: Sequence[Element], m: int) -> list[Element]:
    """Return all elements of the group on m vertices that these elements generate, the identity first.

    Raises
    ------
    LimitReached
        If there are more than `MOST_ELEMENTS`.
    """
    return orbit(identity(m), lambda element: (after(generator, element) for generator in generators), MOST_ELEMENTS)


def rational_classes(group: Sequence[Element], generators: Sequence[Element]) -> list[list[Element]]:
    """Return the rational classes of a group, in the order in which the group lists their first elements.

    Notes
    -----
    Two elements are in one rational class if the cyclic groups that they generate are conjugate. The characters of
    rational representations, and so of homology, have one value on such a class.

    References
    ----------
    J.-P. Serre, Linear Representations of Finite Groups, section 13.1 (from memory).
    """
    met: set[Element] = set()
    classes = []
    by = [(generator, inverse(generator)) for generator in generators]
    for element in group:
        if element not in met:
            classes.append(orbit(element, lambda x: [*_units(x), *(after(after(g, x), back) for g, back in by)]))
            met.update(classes[-1])
    return classes


def _units(element: Element) -> list[Element]:
    """Return the elements that generate the same cyclic group."""
    powers = orbit(identity(len(element)), lambda power: [after(element, power)])
    return [power for k, power in enumerate(powers) if gcd(k, len(powers)) == 1]


def check_symmetries(elements: Iterable[Element], product: PolyhedralProduct) -> None:
    """Refuse an element that does not preserve K and the pairs, or changes signs elsewhere than in (D¹, S⁰).

    Raises
    ------
    BadInput
        It names a face with its image, or a vertex; the place is ``generator 2`` for the second element.
    """
    for number, element in enumerate(elements, 1):
        where = f"generator {number}"
        if sorted(map(abs, element)) != list(identity(product.complex.vertex_count)):
            expected = f"images of all {product.complex.vertex_count} vertices"
            raise BadInput(where=where, expected=expected, found=f"{element}")
        _check_faces(where, element, product.complex)
        _check_pairs(where, element, product)


def _check_faces(where: str, element: Element, k: SimplicialComplex) -> None:
    facets = k.facet_masks()
    for mask in facets:
        image = moved_mask(mask, element)
        if not any(image & facet == image for facet in facets):
            face, other = (_labels(k, part) for part in (mask, image))
            found = f"{spell_cycles(element, k)}, by which the face {face} goes to {other}, which is none"
            raise BadInput(where=where, expected="a permutation that preserves K", found=found)


def _check_pairs(where: str, element: Element, product: PolyhedralProduct) -> None:
    k, pairs = product.complex, product.pairs
    for place, to in enumerate(element):
        if pairs[place] != pairs[abs(to) - 1]:
            ends = (f"{pairs[i].symbol} at {k.labels[i]}" for i in (place, abs(to) - 1))
            found = f"{spell_cycles(element, k)}, which exchanges {' and '.join(ends)}"
            raise BadInput(where=where, expected="a permutation that preserves the pairs", found=found)
        if to < 0 and pairs[place].name != "(D1, S0)":
            found = f"{spell_cycles(element, k)}, with one on {pairs[place].symbol} at {k.labels[place]}"
            raise BadInput(where=where, expected="changes of sign on (D1, S0) only", found=found)


def _labels(k: SimplicialComplex, mask: int) -> str:
    return " ".join(str(label) for place, label in enumerate(k.labels) if mask >> place & 1) or "∅"


# -- notation -----------------------------------------------------------------------------------


def element_from_cycles(text: str, k: SimplicialComplex) -> Element:
    """Return the element that is written in cycles of labels.

    Parameters
    ----------
    text : str
        Cycles like ``(1 2 3)(4 5)``, labels separated by blanks, or by commas if they have blanks in them (then
        one alone is followed by a comma); ``()`` is the identity. A minus sign before
        a label says that the coordinate changes its sign on the way to this vertex: ``(1 -2)`` takes (x, y) to
        (y, -x), and ``(-1)`` takes x to -x. Cycles with a vertex in common are multiplied, the last one first.
    k : SimplicialComplex
        Has the labels; where some of them have brackets or commas, vertices are called by their numbers from 1 on.

    Raises
    ------
    BadInput
        If it cannot be read, a label is unknown, or a cycle names a vertex twice.

    Examples
    --------
    >>> from certify.simplicial.families import polygon
    >>> element_from_cycles("(1 2 3 4)", polygon(4)), element_from_cycles("(1 -2)", polygon(4))
    ((2, 3, 4, 1), (-2, 1, 3, 4))
    """
    known = {name: number for number, name in enumerate(_names(k), start=1)}
    if not re.fullmatch(r"(\s*\([^()]*\)\s*)+", text):
        raise BadInput(where="element", expected="cycles like (1 2 3)(4 5), or () for the identity", found=repr(text))
    element = identity(k.vertex_count)
    for cycle in reversed(re.findall(r"\(([^()]*)\)", text)):
        element = after(_cycle(cycle, known, k.vertex_count), element)
    return element


def _names(k: SimplicialComplex) -> list[str]:
    """Return what vertices are called in cycles: by labels, or by numbers where labels have brackets or commas."""
    names = list(labels_by_text(k))
    return [str(number) for number in range(1, len(names) + 1)] if set("".join(names)) & set("(),") else names


def _cycle(text: str, known: dict[str, int], m: int) -> Element:
    names = [name.strip() for name in text.removesuffix(",").split(",")] if "," in text else text.split()
    steps: list[tuple[int, int]] = []
    for name in names:
        # A label may begin with a minus sign itself.
        sign, plain = (1, name) if name in known else (-1, name.removeprefix("-"))
        if plain not in known:
            expected = "vertices of the complex, with commas between labels that have blanks in them"
            raise BadInput(where="element", expected=expected, found=f"{name!r}, which is none")
        if known[plain] in {vertex for vertex, _ in steps}:
            raise BadInput(where="element", expected="each vertex once in a cycle", found=f"{plain!r} twice")
        steps.append((known[plain], sign))
    images = list(identity(m))
    for (vertex, _), (to, sign) in zip(steps, [*steps[1:], *steps[:1]], strict=True):
        images[vertex - 1] = sign * to
    return tuple(images)


def spell_cycles(element: Element, k: SimplicialComplex) -> str:
    """Write an element as `element_from_cycles` reads it.

    Examples
    --------
    >>> from certify.simplicial.families import polygon
    >>> spell_cycles((2, 1, 4, -3), polygon(4)), spell_cycles((1, 2, 3, 4), polygon(4))
    ('(1 2)(-3 4)', '()')
    """
    names = _names(k)
    between = ", " if any(set(name) & set(" \t") for name in names) else " "
    text = ""
    for cycle in cycles_of(element):
        signs = {abs(element[vertex - 1]): "-" if element[vertex - 1] < 0 else "" for vertex in cycle}
        if len(cycle) > 1 or signs[cycle[0]]:
            alone = "," if len(cycle) == 1 and between == ", " else ""
            text += f"({between.join(signs[vertex] + names[vertex - 1] for vertex in cycle)}{alone})"
    return text or "()"


def element_from_sympy(permutation: Permutation, k: SimplicialComplex) -> Element:
    """Return the element of a SymPy permutation of 0, 1, …, which stand for the vertices in the order of the labels.

    Raises
    ------
    BadInput
        If it moves more points than there are vertices.

    Examples
    --------
    >>> from sympy.combinatorics import Permutation
    >>> from certify.simplicial.families import polygon
    >>> element_from_sympy(Permutation(0, 1, 2, 3), polygon(4))
    (2, 3, 4, 1)
    """
    images = list(permutation.array_form)
    if len(images) > k.vertex_count:
        found = f"one of {len(images)} points"
        raise BadInput(where="element", expected=f"a permutation of {k.vertex_count} vertices", found=found)
    return tuple(image + 1 for image in images) + tuple(range(len(images) + 1, k.vertex_count + 1))
