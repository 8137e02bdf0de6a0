"""Subgroups of a group of symmetries: which of their conjugates stands for them, and by what it is generated."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

from certify.symmetry.elements import Element, after, generated_group, inverse

__all__ = ["conjugates", "sifted_generators"]


def conjugates(subgroup: Iterable[Element], group: Sequence[Element]) -> set[tuple[Element, ...]]:
    """Return the conjugates g H g⁻¹ of a subgroup, each with its elements sorted.

    The first of them, in the order of tuples, stands for the conjugacy class in certificates.
    """
    own = tuple(subgroup)
    return {tuple(sorted(after(after(g, element), inverse(g)) for element in own)) for g in group}


def sifted_generators(subgroup: Sequence[Element]) -> tuple[Element, ...]:
    """Return those of the sorted elements of a subgroup that the ones before them do not generate.

    Examples
    --------
    >>> sifted_generators([(1, 2, 3), (2, 3, 1), (3, 1, 2)])
    ((2, 3, 1),)
    """
    generators: list[Element] = []
    reached = {tuple(range(1, len(subgroup[0]) + 1))}
    for element in subgroup:
        if element not in reached:
            generators.append(element)
            reached = set(generated_group(tuple(generators), len(element)))
    return tuple(generators)
