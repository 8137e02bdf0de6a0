"""The table of check values beside this file: published numbers with their sources."""

from __future__ import annotations

import json
from dataclasses import dataclass
from functools import cache
from pathlib import Path
from typing import Any

from certify.simplicial import SimplicialComplex
from tests.helpers import Homology, certified_homology, disc_product, graded

__all__ = ["Entry", "bigraded_ranks", "entry", "wedge_of_spheres"]


@dataclass(frozen=True)
class Entry:
    """One entry of the table: the value in the words of the table, and the complex if it lists one."""

    value: Any
    facets: tuple[tuple[int, ...], ...] = ()

    @property
    def complex(self) -> SimplicialComplex:
        """The complex that the entry lists; its vertices are 0, 1, 2, … or 1, 2, 3, …."""
        return SimplicialComplex.from_facets(self.facets)


@cache
def _table() -> dict[str, Entry]:
    text = Path(__file__).with_name("check_values.json").read_text(encoding="utf-8")
    return {
        given["id"]: Entry(given["value"], tuple(map(tuple, given.get("facets", ()))))
        for given in json.loads(text)["entries"]
    }


def entry(name: str) -> Entry:
    """Return the entry with this name."""
    return _table()[name]


def bigraded_ranks(k: SimplicialComplex) -> dict[tuple[int, int], int]:
    """Return rank β^(-i,2j) of Tor of the face ring by (i, j), as a certified product gives it.

    With (Dⁿ, Sⁿ⁻¹), n - 1 = m + 1, at every vertex, the blocks of the sets of j vertices lie in degrees from (m + 1) j
    to (m + 1) j + m. Degree k above (m + 1) j is reduced homology in degree k - 1 of full subcomplexes, which by
    Hochster's formula belongs to i = j - k.
    """
    width = k.vertex_count + 1
    groups = certified_homology(disc_product(k, width + 1))
    places = {degree: divmod(degree, width) for degree in groups}
    return {(j - low, j): groups[degree].rank for degree, (j, low) in places.items() if groups[degree].rank}


def wedge_of_spheres(*dimensions: int) -> Homology:
    """Return the homology of a wedge of spheres of dimensions above 0."""
    counts: dict[int, int] = {0: 1}
    for dimension in dimensions:
        counts[dimension] = counts.get(dimension, 0) + 1
    return graded(counts)
