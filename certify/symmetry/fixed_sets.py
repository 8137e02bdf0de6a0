"""The points of a polyhedral product that a group of symmetries fixes, and how many there are."""

from __future__ import annotations

from collections.abc import Sequence
from math import prod

from certify.products import PolyhedralProduct
from certify.simplicial import SimplicialComplex
from certify.symmetry.elements import Element, after, moved_mask, orbit

__all__ = ["fixed_set", "number_of_points", "quotient_euler"]


def fixed_set(product: PolyhedralProduct, generators: Sequence[Element]) -> PolyhedralProduct | None:
    """Return the polyhedral product that is the fixed set of the group of these symmetries, or None if it is empty.

    Parameters
    ----------
    product : PolyhedralProduct
    generators : sequence of Element
        Symmetries of K and the pairs; signs only on (D¹, S⁰).

    Notes
    -----
    A fixed point has equal coordinates on each orbit of vertices; so the fixed set is the product over the complex K_G,
    of which the orbits are the vertices, and the sets of orbits with a face of K as union are the faces. An orbit
    on which a coordinate must equal its negative has the coordinate 0, which is inside the interval: it belongs to
    every support, and K_G is replaced by the link of these orbits (docs/mathematics.md).
    """
    k = product.complex
    halves: dict[int, int] = {}
    centre = 0
    for vertex in range(1, k.vertex_count + 1):
        met = orbit(vertex, lambda v: (after(element, (v,))[0] for element in generators))
        mask = sum({1 << abs(v) - 1 for v in met})
        if -vertex in met:
            centre |= mask
        else:
            halves.setdefault(mask, vertex)
    invariant = (m for m in k.face_masks() if all(moved_mask(m, element) == m for element in generators))
    faces = [mask ^ centre for mask in invariant if mask & centre == centre]
    if not faces:
        return None
    labels = [_name([str(label) for i, label in enumerate(k.labels) if mask >> i & 1]) for mask in halves]
    sets = [[place for place, half in enumerate(halves) if mask & half] for mask in faces]
    pairs = tuple(product.pairs[vertex - 1] for vertex in halves.values())
    return PolyhedralProduct(SimplicialComplex.from_faces(labels, sets), pairs)


def number_of_points(product: PolyhedralProduct) -> int | None:
    """Return the number of points of a polyhedral product, or None if there are infinitely many."""
    points = 0
    for mask in product.complex.face_masks():
        degrees = [
            [letter.degree for letter in pair.cells if letter.outside == bool(mask >> vertex & 1)]
            for vertex, pair in enumerate(product.pairs)
        ]
        if all(degrees) and any(map(any, degrees)):
            return None
        points += prod(map(len, degrees))
    return points


def quotient_euler(product: PolyhedralProduct, group: Sequence[Element]) -> int:
    """Return the Euler characteristic of (D¹, S⁰)^K / G.

    Parameters
    ----------
    product : PolyhedralProduct
        Of the pairs (D¹, S⁰).
    group : sequence of Element
        All elements of G.

    Notes
    -----
    It is the mean of the Euler characteristics of the fixed sets of the elements, by Burnside's lemma for the cells of
    the barycentric subdivision. That of (D¹, S⁰)^L is Σ (-1)^|σ| 2^(m - |σ|), over the faces σ of L on m vertices.
    """
    total = 0
    for element in group:
        fixed = fixed_set(product, [element])
        if fixed is not None:
            m = fixed.complex.vertex_count
            f_vector = fixed.complex.f_vector()
            total += sum((-1) ** size * number * 2 ** (m - size) for size, number in enumerate(f_vector))
    return total // len(group)


def _name(orbit_: Sequence[str]) -> str:
    """Return what an orbit is called: its vertex, or the set of them."""
    return orbit_[0] if len(orbit_) == 1 else f"{{{','.join(orbit_)}}}"
