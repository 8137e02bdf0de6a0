"""Tables of multiplicities over families of complexes with their groups."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping, Sequence
from dataclasses import dataclass
from fractions import Fraction
from types import MappingProxyType

from certify.answers.symmetry import Character, character
from certify.errors import BadInput, LimitReached
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial import SimplicialComplex
from certify.simplicial.families import cross_polytope, points, polygon, simplex_skeleton
from certify.symmetry.characters import IRREDUCIBLES, specht_functions
from certify.symmetry.elements import Element, cycles_of

__all__ = ["ACTED_FAMILIES", "Decomposition", "decomposition"]


@dataclass(frozen=True, slots=True)
class ActedFamily:
    """A family of complexes with a group for each member.

    Parameters
    ----------
    least : int
        The smallest member.
    complex : callable
        Returns a member; takes its number, and the dimension if the family has one.
    generators : callable
        Returns generators of the group; takes the member's number.
    functions : callable
        Returns the irreducible characters by name; takes the generators and an element of each class.
    has_dimension : bool
    """

    least: int
    complex: Callable[[int, int], SimplicialComplex]
    generators: Callable[[int], tuple[Element, ...]]
    functions: Callable[[tuple[Element, ...], Sequence[Element]], Mapping[str, tuple[int, ...]]]
    has_dimension: bool = False

    def member(self, n: int, dim: int | None) -> SimplicialComplex:
        """Return a member; the dimension is 1 if none is given.

        Raises
        ------
        BadInput
            If there is no such member, or a dimension is given where the family has none.
        """
        if dim is not None and not self.has_dimension:
            raise BadInput(where="dim", expected="no dimension for a family that has none", found=f"{dim}")
        return self.complex(n, 1 if dim is None else dim)


@dataclass(frozen=True, slots=True, repr=False)
class Decomposition:
    """Multiplicities of irreducible characters in the homology of the members of a family.

    Attributes
    ----------
    family : str
    columns : tuple of int
        The members.
    rows : mapping from str to tuple
        The multiplicity in each member by the name of the character, None where the member has no such character. For
        symmetric groups a partition (n - |μ|, μ) stands under the parts of μ, so that rows go on from member to member.
    characters : mapping from int to Character
        Each with its certificate.
    """

    family: str
    columns: tuple[int, ...]
    rows: Mapping[str, tuple[int | None, ...]]
    characters: Mapping[int, Character]

    def constant_from(self, name: str) -> int | None:
        """Return from which member on the multiplicities of a row are the same, if at least the last three are.

        This is what was observed as far as the table goes, and no proof that it goes on.
        """
        known = [(n, value) for n, value in zip(self.columns, self.rows[name], strict=True) if value is not None]
        run = [n for n, value in known if all(other == value for later, other in known if later >= n)]
        return run[0] if len(run) >= 3 else None

    def __repr__(self) -> str:
        """Write the table."""
        heads = ["", *map(str, self.columns), ""]
        lines = [heads]
        for name, values in self.rows.items():
            since = self.constant_from(name)
            note = "" if since is None else f"constant from {since} on, as far as computed"
            lines.append([name, *("" if value is None else str(value) for value in values), note])
        widths = [max(len(line[place]) for line in lines) for place in range(len(heads))]
        return "\n".join(
            "  ".join(
                cell.ljust(width) if place in (0, len(heads) - 1) else cell.rjust(width)
                for place, (cell, width) in enumerate(zip(line, widths, strict=True))
            ).rstrip()
            for line in lines
        )


def decomposition(
    family: str,
    members: Iterable[int],
    degree: int,
    *,
    pair: str = "(D1, S0)",
    dim: int | None = None,
    jobs: int = 1,
    progress: Callable[[int, int], None] | None = None,
) -> Decomposition:
    """Return the multiplicities of irreducible characters in H_k((X, A)^K; ℚ) for members of a family, proved.

    Parameters
    ----------
    family : {"points", "simplex-skeleton", "polygon", "cross-polytope"}
        With the symmetric group on the vertices, the dihedral group, or the symmetric group on the axes.
    members : iterable of int
        Numbers of vertices, or of axes.
    degree : int
    pair : str
        The pair at each vertex.
    dim : int, optional
        The dimension of a skeleton, 1 if it is left out.
    jobs : int
    progress : callable, optional
        Is told how many members are done, of how many.

    Raises
    ------
    BadInput
        If there is no such family, or no such member.
    LimitReached
        If the group of a member is too large; the member is named.

    Examples
    --------
    >>> decomposition("points", range(2, 5), 1)
               2  3  4
    trivial    0  0  0  constant from 2 on, as far as computed
    [1]        1  2  3
    [1, 1]        1  2
    [2]              1
    [1, 1, 1]        0
    """
    if family not in ACTED_FAMILIES:
        raise BadInput(where="family", expected=f"one of {', '.join(ACTED_FAMILIES)}", found=repr(family))
    acted = ACTED_FAMILIES[family]
    columns = tuple(members)
    rows: dict[str, dict[int, int]] = {}
    characters: dict[int, Character] = {}
    for done, n in enumerate(columns, 1):
        if n < acted.least:
            raise BadInput(where=f"family {family}", expected=f"members from {acted.least} on", found=f"{n}")
        k = acted.member(n, dim)
        product = PolyhedralProduct(k, parse_pairs(pair, k.vertex_count))
        try:
            found = character(product, degree, acted.generators(n), functions_of=acted.functions, jobs=jobs)
        except LimitReached as limit:
            raise LimitReached(f"{family} {n}: {limit}") from limit
        characters[n] = found
        if progress is not None:
            progress(done, len(columns))
        for name, value in found.multiplicities.items():
            rows.setdefault(name, {})[n] = _whole(value)
    table = {name: tuple(values.get(n) for n in columns) for name, values in rows.items()}
    return Decomposition(family, columns, table, characters)


def _whole(value: Fraction) -> int:
    return int(value)


def _symmetric_generators(m: int) -> tuple[Element, ...]:
    return ((*range(2, m + 1), 1), (2, 1, *range(3, m + 1))) if m > 1 else ((1,),)


def _dihedral_generators(n: int) -> tuple[Element, ...]:
    return (*range(2, n + 1), 1), (1, *range(n, 1, -1))


def _padded(functions: Mapping[str, tuple[int, ...]]) -> dict[str, tuple[int, ...]]:
    """Return Specht characters under the parts of the partition behind the first."""
    padded = {}
    for name, values in functions.items():
        rest = list(map(int, name.split()[1:]))
        padded[str(rest) if rest else "trivial"] = values
    return padded


def _on_vertices(generators: tuple[Element, ...], elements: Sequence[Element]) -> Mapping[str, tuple[int, ...]]:
    return _padded(IRREDUCIBLES["symmetric"](generators, elements))


def _axes_generators(n: int) -> tuple[Element, ...]:
    """Return the permutations of axes as permutations of the vertices of a cross-polytope, opposite pairs."""
    pairs = cross_polytope(n).missing_faces()
    found = []
    for element in _symmetric_generators(n):
        image = [0] * (2 * n)
        for (near, far), to in zip(pairs, element, strict=True):
            image[near], image[far] = pairs[to - 1][0] + 1, pairs[to - 1][1] + 1
        found.append(tuple(image))
    return tuple(found)


def _on_axes(generators: tuple[Element, ...], elements: Sequence[Element]) -> Mapping[str, tuple[int, ...]]:
    """Return Specht characters by the cycles on axes: each has two cycles of its length on vertices."""
    n = len(generators[0]) // 2
    types = [tuple(sorted((len(cycle) for cycle in cycles_of(element)), reverse=True)[::2]) for element in elements]
    return _padded(specht_functions(n, types))


ACTED_FAMILIES: Mapping[str, ActedFamily] = MappingProxyType(
    {
        "points": ActedFamily(1, lambda m, _: points(m), _symmetric_generators, _on_vertices),
        "simplex-skeleton": ActedFamily(2, simplex_skeleton, _symmetric_generators, _on_vertices, has_dimension=True),
        "polygon": ActedFamily(3, lambda n, _: polygon(n), _dihedral_generators, IRREDUCIBLES["dihedral"]),
        "cross-polytope": ActedFamily(1, lambda n, _: cross_polytope(n), _axes_generators, _on_axes),
    }
)
"""The families, by name."""
