"""Rational characters of symmetric, cyclic and dihedral groups, and permutation characters.

SymPy is loaded where it is needed, because that takes longer than most claims.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from functools import cache
from math import factorial, gcd
from types import MappingProxyType

from certify.errors import BadInput
from certify.symmetry.elements import Element, after, cycles_of, generated_group, identity, inverse

__all__ = ["IRREDUCIBLES", "induced_character", "ramanujan_sum", "specht_character", "specht_functions"]

Partition = tuple[int, ...]
"""Parts, the largest first."""

Functions = dict[str, tuple[int, ...]]
"""Class functions by name, with a value for each of a list of elements."""


@cache
def specht_character(shape: Partition, cycle_type: Partition) -> int:
    """Return the value of the Specht character of a partition on elements with these cycle lengths.

    Parameters
    ----------
    shape, cycle_type : tuple of int
        Partitions of the same number, the largest part first.

    Notes
    -----
    The rule of Murnaghan and Nakayama: rim hooks of the first length are removed in all ways, with signs.

    References
    ----------
    G. James, The Representation Theory of the Symmetric Groups, Springer 1978, section 21 (from memory).

    Examples
    --------
    >>> [specht_character((2, 1), cycles) for cycles in ((1, 1, 1), (2, 1), (3,))]
    [2, 0, -1]
    """
    if not cycle_type:
        return 1
    length, rest = cycle_type[0], cycle_type[1:]
    # On beta-numbers, removing a rim hook is moving one bead; its sign counts the beads that are passed.
    beads = [part + place for place, part in enumerate(reversed(shape))]
    total = 0
    for bead in beads:
        target = bead - length
        if target >= 0 and target not in beads:
            passed = sum(target < other < bead for other in beads)
            moved = sorted([other for other in beads if other != bead] + [target])
            smaller = tuple(part for part in (b - place for place, b in reversed(list(enumerate(moved)))) if part)
            total += (-1) ** passed * specht_character(smaller, rest)
    return total


def ramanujan_sum(d: int, r: int) -> int:
    """Return the sum of the r-th powers of the primitive d-th roots of unity.

    References
    ----------
    G. H. Hardy, E. M. Wright, An Introduction to the Theory of Numbers, theorem 272 (from memory).

    Examples
    --------
    >>> [ramanujan_sum(6, r) for r in range(6)]
    [2, 1, -1, -2, -1, 1]
    """
    from sympy import totient
    from sympy.functions.combinatorial.numbers import mobius

    common = gcd(d, r)
    return int(mobius(d // common) * totient(d) // totient(d // common))


def induced_character(
    group: Sequence[Element], subgroup: Sequence[Element], elements: Sequence[Element]
) -> tuple[int, ...]:
    """Return the permutation character of the group on the cosets of a subgroup, at these elements.

    Examples
    --------
    >>> group = generated_group([(2, 3, 1), (2, 1, 3)], 3)
    >>> induced_character(group, generated_group([(2, 1, 3)], 3), [(1, 2, 3), (2, 1, 3), (2, 3, 1)])
    (3, 1, 0)
    """
    inside = set(subgroup)
    values = []
    for element in elements:
        fixed = sum(after(after(inverse(x), element), x) in inside for x in group)
        values.append(fixed // len(inside))
    return tuple(values)


def _symmetric(generators: Sequence[Element], elements: Sequence[Element]) -> Functions:
    """Return the Specht characters, by partitions of the number of vertices."""
    m = len(elements[0])
    group = generated_group(generators, m)
    if len(group) != factorial(m):
        raise BadInput(
            where="irreducibles", expected=f"all {factorial(m)} permutations", found=f"{len(group)} elements"
        )
    types = [tuple(sorted(map(len, cycles_of(element)), reverse=True)) for element in elements]
    return specht_functions(m, types)


def specht_functions(n: int, types: Sequence[Partition]) -> Functions:
    """Return the Specht characters of the partitions of n, the largest first part first, at these cycle types.

    Examples
    --------
    >>> specht_functions(2, [(1, 1), (2,)])
    {'2': (1, 1), '1 1': (1, -1)}
    """
    from sympy.utilities.iterables import partitions

    found = [[part for part, times in p.items() for _ in range(times)] for p in partitions(n)]
    shapes = sorted((tuple(sorted(parts, reverse=True)) for parts in found), reverse=True)
    return {
        " ".join(map(str, shape)) or "0": tuple(specht_character(shape, kind) for kind in types) for shape in shapes
    }


def _cyclic(generators: Sequence[Element], elements: Sequence[Element]) -> Functions:
    """Return the characters irreducible over ℚ, by the order d of the roots of unity that they add up."""
    from sympy import divisors

    powers = _powers(_only(generators, 1, "one permutation under generators, which generates the group")[0])
    where = {element: r for r, element in enumerate(powers)}
    n = len(powers)
    return {f"{d}": tuple(ramanujan_sum(d, where[element]) for element in elements) for d in divisors(n)}


def _dihedral(generators: Sequence[Element], elements: Sequence[Element]) -> Functions:
    """Return the characters irreducible over ℚ: those of degree 1, and one for each order d of rotations from 3 on."""
    from sympy import divisors

    expected = "two generators, a rotation and a reflection of a dihedral group in this order"
    rotation, reflection = _only(generators, 2, expected)
    powers = _powers(rotation)
    n = len(powers)
    one = powers[0]
    is_dihedral = after(reflection, reflection) == one and after(after(reflection, rotation), reflection) == powers[-1]
    if not is_dihedral or reflection in powers:
        raise BadInput(where="irreducibles", expected=expected, found="two that are not a rotation and a reflection")
    turn = {element: r for r, element in enumerate(powers)}
    flip = {after(element, reflection): r for r, element in enumerate(powers)}
    functions = {
        "trivial": tuple(1 for _ in elements),
        "orientation": tuple(1 if element in turn else -1 for element in elements),
    }
    if n % 2 == 0:
        signs = [(-1) ** turn[element] if element in turn else (-1) ** flip[element] for element in elements]
        functions["alternating"] = tuple(signs)
        pairs = zip(signs, functions["orientation"], strict=True)
        functions["alternating orientation"] = tuple(sign * side for sign, side in pairs)
    for d in divisors(n):
        if d > 2:
            functions[f"{d}"] = tuple(ramanujan_sum(d, turn[e]) if e in turn else 0 for e in elements)
    return functions


def _only(generators: Sequence[Element], count: int, expected: str) -> Sequence[Element]:
    if len(generators) != count:
        raise BadInput(where="irreducibles", expected=expected, found=f"{len(generators)} generators")
    return generators


def _powers(element: Element) -> list[Element]:
    powers = [identity(len(element))]
    while (following := after(element, powers[-1])) != powers[0]:
        powers.append(following)
    return powers


IRREDUCIBLES: Mapping[str, Callable[[Sequence[Element], Sequence[Element]], Functions]] = MappingProxyType(
    {"symmetric": _symmetric, "cyclic": _cyclic, "dihedral": _dihedral}
)
"""The characters irreducible over ℚ of groups of these kinds, at a list of elements, from suitable generators."""
