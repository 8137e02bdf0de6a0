"""The claim kind ``branching``: the orbits of points of (D¹, S⁰)^K with isotropy, by isotropy group."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Mapping, Sequence
from typing import Any, ClassVar

from certify.claims.quotients import QuotientClaim, intervals
from certify.claims.values import Values
from certify.errors import BadInput
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.automorphisms import acting
from certify.symmetry.elements import Element, generated_group, spell_cycles
from certify.symmetry.fixed_sets import quotient_euler
from certify.symmetry.orbit_spaces import OrbitSpace
from certify.symmetry.subgroups import conjugates, sifted_generators
from certify.symmetry.surfaces import branch_orbits

__all__ = ["BranchingClaim", "by_isotropy", "by_order"]


class BranchingClaim(QuotientClaim):
    """A claim about the orbits of points of (D¹, S⁰)^K with isotropy, where these points are isolated.

    Parameters
    ----------
    complex : SimplicialComplex
    generators : tuple of Element, or None
        None is for all automorphisms of K.
    claimed : mapping
        ``orbits``: the number of orbits by the order of their isotropy groups, from 2 on; ``isotropy``: the same by
        generators of the isotropy group of one of the points.

    Raises
    ------
    BadInput
        If a generator does not preserve K, or what is claimed to be an isotropy group is no subgroup other than 1, or
        conjugate to another one.

    Notes
    -----
    The statement holds a list of generators, order and number for each conjugacy class of isotropy groups.
    """

    kind: ClassVar[str] = "branching"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries, and isotropy groups that are none."""
        super().__post_init__()
        if "isotropy" in self.claimed:
            self._claimed_isotropy()

    def _group(self) -> list[Element]:
        return generated_group(acting(self.generators, intervals(self.complex)), self.complex.vertex_count)

    def _claimed_isotropy(self) -> dict[tuple[Element, ...], int]:
        """Return claimed numbers by the generators that stand for the conjugacy classes in certificates."""
        group = self._group()
        found: dict[tuple[Element, ...], int] = {}
        for generators, number in self.claimed["isotropy"].items():
            subgroup = generated_group(generators, self.complex.vertex_count)
            shown = _spelled(generators, self.complex)
            if len(subgroup) == 1 or not set(subgroup) <= set(group):
                raise BadInput(where="isotropy", expected="generators of a subgroup of G other than 1", found=shown)
            first = sifted_generators(min(conjugates(subgroup, group)))
            if first in found:
                raise BadInput(where="isotropy", expected="each conjugacy class once", found=f"that of {shown} again")
            found[first] = number
        return found

    def read_off(self, space: OrbitSpace) -> dict[str, Any]:
        """Return the orbits by isotropy group."""
        return {"orbits": [[list(map(list, o.generators)), o.order, o.number] for o in branch_orbits(space)]}

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse if the numbers by order, or by group, are not those claimed."""
        if "orbits" in self.claimed:
            self.compare_one(self.name("orbits"), _in_words(self.claimed["orbits"]), _in_words(by_order(found)))
        if "isotropy" in self.claimed:
            real = {tuple(map(tuple, generators)): number for generators, _, number in found["orbits"]}
            claimed = self._claimed_isotropy()
            if claimed != real:
                self.compare_one(self.name("isotropy"), self._by_group(claimed), self._by_group(real))

    def _by_group(self, numbers: dict[tuple[Element, ...], int]) -> str:
        return _listed(f"{number} with ⟨{_spelled(by, self.complex)}⟩" for by, number in sorted(numbers.items()))

    def name(self, key: str) -> str:  # noqa: ARG002 - both keys are about the same orbits
        """Write in words what a value is."""
        return "orbits of points with isotropy"

    def lines(self, found: Values) -> list[str]:
        """Write the orbits by isotropy group, and how the Euler characteristics go together (Riemann and Hurwitz)."""
        group = self._group()
        euler = quotient_euler(intervals(self.complex), group)
        whole = quotient_euler(intervals(self.complex), group[:1])
        points = [(number * len(group) // order, order) for _, order, number in found["orbits"]]
        count = " - ".join([f"{len(group)}·({euler})", *(f"{many}·{order - 1}" for many, order in points)])
        numbers = by_isotropy(found, self.complex)
        sized = zip(numbers.items(), found["orbits"], strict=True)
        shown = _listed(f"{number} with ⟨{by}⟩ of order {order}" for (by, number), (_, order, _) in sized)
        return [f"{self.name('orbits')}: {shown}", f"χ((D¹,S⁰)^K) = {count} = {whole}"]

    def value(self, found: Values) -> dict[str, Any]:
        """Return the numbers of orbits by order and by isotropy group, as sheets have them."""
        orders = {str(order): number for order, number in by_order(found).items()}
        return {"orbits": orders, "isotropy": by_isotropy(found, self.complex)}


def by_order(found: Values) -> dict[int, int]:
    """Return how many orbits have isotropy groups of which order."""
    orders: Counter[int] = Counter()
    for _, order, number in found["orbits"]:
        orders[order] += number
    return dict(sorted(orders.items()))


def by_isotropy(found: Values, k: SimplicialComplex) -> dict[str, int]:
    """Return how many orbits have which isotropy group, under generators in cycles of labels."""
    return {_spelled(generators, k): number for generators, _, number in found["orbits"]}


def _spelled(generators: Iterable[Sequence[int]], k: SimplicialComplex) -> str:
    return ", ".join(spell_cycles(tuple(element), k) for element in generators)


def _in_words(orders: Mapping[int, int]) -> str:
    return _listed(f"{number} with a group of order {order}" for order, number in sorted(orders.items()))


def _listed(parts: Iterable[str]) -> str:
    return ", ".join(parts) or "none"
