"""Counting orbits on colourings of the vertices, and the formulas of necklaces.

SymPy is loaded where it is needed, because that takes longer than most claims.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Sequence
from math import factorial, gcd, prod

from certify.errors import BadInput
from certify.symmetry.elements import Element, cycles_of

__all__ = ["bracelets", "colouring_orbits", "lyndon_words", "necklaces", "witt_rank"]

Partition = frozenset[frozenset[int]]


def colouring_orbits(group: Sequence[Element], colours: int, content: Sequence[int] | None = None) -> tuple[int, int]:
    """Return the number of orbits of a group on colourings of the vertices, and of those with trivial isotropy.

    Parameters
    ----------
    group : sequence of Element
        All elements, the identity first.
    colours : int
    content : sequence of int, optional
        How many vertices have which colour; by default any number.

    Notes
    -----
    Burnside's lemma for the first number. For the second, the colourings that some element other than 1 fixes are
    counted by inclusion and exclusion over the partitions of the vertices into cycles, joined in all ways; only the
    finest of them are needed, since what is constant on a coarser one is constant on them.

    Examples
    --------
    >>> from certify.symmetry.elements import generated_group
    >>> colouring_orbits(generated_group([(2, 3, 4, 1)], 4), 2)
    (6, 3)
    """
    if content is not None and (len(content) != colours or any(number < 0 for number in content)):
        raise BadInput(
            where="content", expected=f"a number from 0 on for each of {colours} colours", found=f"{content}"
        )
    partitions = Counter(_partition(element) for element in group)
    total = sum(times * _constant(partition, colours, content) for partition, times in partitions.items())
    vertices = _partition(group[0])
    signs = _signed_joins(vertices, _finest(partitions.keys() - {vertices}))
    free = sum(sign * _constant(partition, colours, content) for partition, sign in signs.items())
    return total // len(group), free // len(group)


def necklaces(n: int, q: int) -> int:
    """Return the number of necklaces of n beads in q colours: (1/n) Σ_{d | n} φ(d) q^(n/d).

    References
    ----------
    P. A. MacMahon, 1892; R. P. Stanley, Enumerative Combinatorics 2, exercise 7.112 (from memory).

    Examples
    --------
    >>> [necklaces(n, 2) for n in range(1, 7)]
    [2, 3, 4, 6, 8, 14]
    """
    from sympy import divisors, totient

    return int(sum(totient(d) * q ** (n // d) for d in divisors(n)) // n)


def bracelets(n: int, q: int) -> int:
    """Return the number of bracelets, which are necklaces that may be turned over.

    Examples
    --------
    >>> [bracelets(n, 2) for n in range(1, 7)]
    [2, 3, 4, 6, 8, 13]
    """
    turned = n * q ** ((n + 1) // 2) if n % 2 else n // 2 * (q ** (n // 2) + q ** (n // 2 + 1))
    return int((n * necklaces(n, q) + turned) // (2 * n))


def lyndon_words(n: int, q: int) -> int:
    """Return the number of Lyndon words, or primitive necklaces: (1/n) Σ_{d | n} μ(d) q^(n/d).

    Notes
    -----
    It is the rank of the degree n part of the free Lie algebra on q generators, and the number of basic products of
    weight n in the Hilton–Milnor splitting of a wedge of q spheres (after suspension).

    References
    ----------
    C. Moreau, 1872; E. Witt, 1937 (from memory).

    Examples
    --------
    >>> [lyndon_words(n, 2) for n in range(1, 7)]
    [2, 1, 2, 3, 6, 9]
    """
    from sympy import divisors
    from sympy.functions.combinatorial.numbers import mobius

    return int(sum(mobius(d) * q ** (n // d) for d in divisors(n)) // n)


def witt_rank(content: Sequence[int]) -> int:
    """Return the number of Lyndon words with so many letters of each kind: (1/n) Σ_{d} μ(d) (n/d)! / Π (a_i/d)!.

    Examples
    --------
    >>> witt_rank([2, 2]), witt_rank([3, 2])
    (1, 2)
    """
    from sympy import divisors
    from sympy.functions.combinatorial.numbers import mobius

    n = sum(content)
    terms = (mobius(d) * factorial(n // d) // prod(factorial(a // d) for a in content) for d in divisors(gcd(*content)))
    return int(sum(terms) // n)


def _partition(element: Element) -> Partition:
    return frozenset(frozenset(cycle) for cycle in cycles_of(element))


def _finest(partitions: Iterable[Partition]) -> list[Partition]:
    """Return the partitions of which none of the others is a refinement."""
    found: list[Partition] = []
    for partition in sorted(partitions, key=len, reverse=True):
        if not any(_joined([*partition, *other]) == partition for other in found):
            found.append(partition)
    return found


def _signed_joins(vertices: Partition, partitions: Iterable[Partition]) -> Counter[Partition]:
    """Return the joins of these partitions with the signs of inclusion and exclusion; the empty join is `vertices`."""
    signs: Counter[Partition] = Counter({vertices: 1})
    for partition in partitions:
        for other, sign in list(signs.items()):
            signs[_joined([*other, *partition])] -= sign
        signs = Counter({other: sign for other, sign in signs.items() if sign})
    return signs


def _joined(parts: Iterable[frozenset[int]]) -> Partition:
    """Return the finest partition of which these sets are parts of parts."""
    merged: list[frozenset[int]] = []
    for part in parts:
        meeting = [other for other in merged if other & part]
        merged = [other for other in merged if not other & part]
        merged.append(part.union(*meeting))
    return frozenset(merged)


def _constant(partition: Partition, colours: int, content: Sequence[int] | None) -> int:
    """Return the number of colourings that are constant on the parts."""
    if content is None:
        return int(colours ** len(partition))
    counts: Counter[tuple[int, ...]] = Counter({tuple(content): 1})
    for part in partition:
        fewer: Counter[tuple[int, ...]] = Counter()
        for left, times in counts.items():
            for colour, room in enumerate(left):
                if room >= len(part):
                    fewer[(*left[:colour], room - len(part), *left[colour + 1 :])] += times
        counts = fewer
    return counts[(0,) * colours]
