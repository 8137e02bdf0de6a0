"""What all claim kinds share: a table of groups, proved by records that each hold an adapted basis."""

from __future__ import annotations

from abc import ABC, abstractmethod
from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Any, ClassVar, Generic, Protocol, TypeVar

from certify.certificate import basis_value, canonical_line
from certify.certificate.canonical import LARGEST, integer_value
from certify.errors import BadInput, ClaimIsFalse, LimitReached
from certify.exact import AbelianGroup, BasedComplex, adapted_basis
from certify.products import Block
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.actions import ActedCells
from certify.symmetry.automorphisms import Generators

__all__ = [
    "Claim",
    "Contribution",
    "DegreesClaim",
    "Found",
    "GroupsClaim",
    "Key",
    "Solved",
    "Source",
    "Sum",
    "Task",
    "check_degree",
    "checked_degrees",
    "complex_value",
    "generators_value",
    "group_value",
    "is_whole",
    "solve",
]

Key = TypeVar("Key", bound=int | tuple[int, int])
"""The degree of a group, or its two degrees."""

Found = TypeVar("Found")
"""What a claim is about: groups by degree, say."""


class Source(Protocol):
    """Something that has a chain complex; it must be possible to send it to another process."""

    def chains(self) -> BasedComplex:
        """Return the complex, degrees from 0."""
        ...


@dataclass(frozen=True, slots=True)
class Task:
    """One piece of work that leads to one record, or to none if it is a block that is a cone.

    Parameters
    ----------
    source : Source
    weight : int
        How much of the whole the task settles, in the unit of ``Claim.weight``.
    """

    source: Source
    weight: int = 1


Solved = tuple[bytes | None, tuple[AbelianGroup, ...], tuple[int, ...]]
"""The record of a task as a line, the groups by degree, and traces; no record and no groups for a cone."""


@dataclass(frozen=True, slots=True)
class Contribution:
    """What a task has found: the groups by degree from 0 (none for a cone), where they come from, and traces."""

    groups: tuple[AbelianGroup, ...]
    source: Source
    traces: tuple[int, ...] = ()


class Claim(ABC, Generic[Found]):
    """A claim that something found about a space is a certain value; a kind is a subclass.

    Attributes
    ----------
    kind, route : str
        As they stand in the certificate.
    """

    kind: ClassVar[str]
    route: str

    @property
    @abstractmethod
    def base(self) -> SimplicialComplex:
        """The complex K that the space is built over."""

    @abstractmethod
    def tasks(self) -> Iterator[Task]:
        """Yield the work, in the order of the records."""

    @abstractmethod
    def total(self, contributions: Iterable[Contribution]) -> Found:
        """Return what these contributions add up to."""

    @abstractmethod
    def check(self, found: Found) -> None:
        """Raise ClaimIsFalse if what is claimed is not what was found."""

    @abstractmethod
    def question(self) -> dict[str, Any]:
        """Return what the statement holds besides what was found; vertices are numbered from 1, in their order."""

    @abstractmethod
    def answer(self, found: Found) -> dict[str, Any]:
        """Return what was found as the statement holds it."""

    @abstractmethod
    def lines(self, found: Found) -> list[str]:
        """Write what was found as in print, a line for each part of it."""

    @abstractmethod
    def value(self, found: Found) -> dict[str, Any]:
        """Return what was found as JSON, under the keys that sheets have for it."""

    def statement(self, found: Found) -> dict[str, Any]:
        """Return the statement of the certificate."""
        return self.question() | self.answer(found)

    @property
    def weight(self) -> int:
        """The sum of the weights of all tasks, or a bound for it."""
        return 1

    @property
    def group_cells(self) -> int:
        """About how many cells the verifier counts because of a group, in the unit of its option --max-cells."""
        return 0

    def opening(self) -> Iterator[dict[str, Any]]:
        """Yield the records that come before those of the tasks."""
        yield from ()

    def remarks(self) -> list[str]:
        """Write what else a reader of the lines must know, besides the complex."""
        return []


class GroupsClaim(Claim[Mapping[Key, AbelianGroup]], Generic[Key]):
    """A claim that groups, each under a degree or several, are those of a space.

    Attributes
    ----------
    groups : mapping or None
        The claimed groups; what is missing is claimed to be zero. None asks for the value.
    """

    groups: Mapping[Key, AbelianGroup] | None

    @abstractmethod
    def name(self, key: Key) -> str:
        """Write the group with this key as in print."""

    @property
    @abstractmethod
    def rest(self) -> str:
        """Say as in print that all other groups are zero."""

    @abstractmethod
    def fields(self) -> dict[str, Any]:
        """Return what the statement holds besides complex, groups and kind."""

    def path(self, key: Key) -> tuple[str, ...]:
        """Return the keys under which a sheet has the group."""
        return (str(key),)

    def keys(self, found: Mapping[Key, AbelianGroup]) -> Sequence[Key]:
        """Return the keys of the groups that are worth a line, in order."""
        return sorted(found, key=_tuple)

    def check(self, found: Mapping[Key, AbelianGroup]) -> None:
        """Raise ClaimIsFalse with the first key under which the claimed group is not the one found."""
        if self.groups is None:
            return
        wrong = []
        for key in sorted({*found, *self.groups}, key=_tuple):
            claimed, real = self.groups.get(key, AbelianGroup()), found.get(key, AbelianGroup())
            if claimed != real:
                wrong.append((self.name(key), str(claimed), str(real)))
        if wrong:
            what, first, value = wrong[0]
            raise ClaimIsFalse(what=what, claimed=first, found=value, more=len(wrong) - 1)

    def question(self) -> dict[str, Any]:
        """Return the complex, the kind, and what the kind adds."""
        return {"kind": self.kind} | complex_value(self.base) | self.fields()

    def answer(self, found: Mapping[Key, AbelianGroup]) -> dict[str, Any]:
        """Return the groups that are not zero, keys ascending."""
        groups = [
            [*_tuple(key), *group_value(group)]
            for key, group in sorted(found.items(), key=lambda item: _tuple(item[0]))
        ]
        return {"groups": groups}

    def lines(self, found: Mapping[Key, AbelianGroup]) -> list[str]:
        """Write the groups, and that all others are zero if the claim speaks of all."""
        keys = self.keys(found)
        lines = [f"{self.name(key)} ≅ {found[key]}" if found.get(key) else f"{self.name(key)} = 0" for key in keys]
        if not self.rest:
            return lines
        return [*lines, self.rest] if lines else [self.rest.replace(" all other ", " all ")]

    def value(self, found: Mapping[Key, AbelianGroup]) -> dict[str, Any]:
        """Return the groups that are not zero as JSON: the rank, and torsion as invariant factors."""
        value: dict[str, Any] = {}
        for key, group in sorted(found.items(), key=lambda item: _tuple(item[0])):
            *outer, last = self.path(key)
            inner = value
            for name in outer:
                inner = inner.setdefault(name, {})
            inner[last] = {"rank": group.rank, "torsion": list(group.torsion)}
        return value


def group_value(group: AbelianGroup) -> tuple[int | str, list[int | str]]:
    """Return rank and torsion as certificates have them."""
    return integer_value(group.rank), [integer_value(order) for order in group.torsion]


def complex_value(k: SimplicialComplex) -> dict[str, Any]:
    """Return the complex as statements have it."""
    return {"facets": [[number + 1 for number in facet] for facet in k.facets], "vertices": k.vertex_count}


def generators_value(generators: Generators) -> list[list[int]] | None:
    """Return generators as statements have them."""
    return None if generators is None else [list(element) for element in generators]


_MOST_TORSION = 10**6


class Sum(Generic[Key]):
    """Groups that are added up under keys."""

    def __init__(self) -> None:
        self._ranks: dict[Key, int] = {}
        self._orders: dict[Key, list[int]] = {}

    def add(self, key: Key, rank: int, orders: Iterable[int] = (), times: int = 1) -> None:
        """Add a group under a key, so many times."""
        self._ranks[key] = self._ranks.get(key, 0) + rank * times
        torsion = self._orders.setdefault(key, [])
        found = list(orders)
        if len(torsion) + len(found) * times > _MOST_TORSION:
            raise LimitReached(f"more than {_MOST_TORSION} torsion summands in one degree cannot be written out")
        if found:  # otherwise `times` may be any number, also one that is too large for the length of a list
            torsion.extend(found * times)

    def groups(self) -> dict[Key, AbelianGroup]:
        """Return the sums that are not zero, keys ascending."""
        keys = sorted(self._ranks, key=_tuple)
        groups = ((key, AbelianGroup.of(self._ranks[key], self._orders[key])) for key in keys)
        return {key: group for key, group in groups if group}


class DegreesClaim(GroupsClaim[int]):
    """A claim about the homology of a space in all degrees, or in some of them.

    Attributes
    ----------
    degrees : tuple of int, or None
        The degrees that the claim speaks of, ascending; None for all.
    """

    degrees: tuple[int, ...] | None

    @abstractmethod
    def in_degree(self, degree: str) -> str:
        """Write a homology group as in print, with this degree."""

    def total(self, contributions: Iterable[Contribution]) -> dict[int, AbelianGroup]:
        """Return the groups that these contributions add up to, in the degrees of the claim."""
        found = Sum[int]()
        for contribution in contributions:
            source = contribution.source
            for shift, times in (source.shifts if isinstance(source, Block) else {0: 1}).items():
                for degree, group in enumerate(contribution.groups, shift):
                    if group and (self.degrees is None or degree in self.degrees):
                        found.add(degree, group.rank, group.torsion, times)
        return found.groups()

    def name(self, key: int) -> str:
        """Write a homology group as in print."""
        return self.in_degree(str(key))

    @property
    def rest(self) -> str:
        """Say as in print that all other groups are zero, if the claim is about all."""
        return "" if self.degrees is not None else f"{self.in_degree('k')} = 0 for all other k"

    def keys(self, found: Mapping[int, AbelianGroup]) -> Sequence[int]:
        """Return the degrees of the claim, or those with homology."""
        return sorted(found) if self.degrees is None else self.degrees

    def fields(self) -> dict[str, Any]:
        """Return the degrees."""
        return {"degrees": None if self.degrees is None else list(self.degrees)}


def solve(task: Task) -> Solved:
    """Solve a task."""
    source = task.source
    if isinstance(source, Block) and source.is_cone:
        return None, (), ()
    complex_ = source.chains()
    basis = adapted_basis(complex_)
    value: dict[str, Any] = {"basis": basis_value(basis)}
    if isinstance(source, Block | ActedCells) and source.name is not None:
        value["block"] = source.name
    traces = source.traces(complex_, basis) if isinstance(source, ActedCells) else ()
    return canonical_line(value), basis.homology(), traces


def is_whole(number: object) -> bool:
    """Tell whether something is a whole number from 0 on; True and False are none."""
    return isinstance(number, int) and not isinstance(number, bool) and number >= 0


def check_degree(degree: int) -> None:
    """Raise BadInput if something is no degree from 0 on."""
    if not is_whole(degree) or not degree < LARGEST:
        raise BadInput(where="degree", expected="a whole number from 0 to 2^53 - 2", found=repr(degree))


def checked_degrees(degrees: Iterable[int] | None, groups: Iterable[int] | None) -> tuple[int, ...] | None:
    """Return the degrees that a claim speaks of, ascending, each once.

    Raises
    ------
    BadInput
        If there are none, one is out of range, or a group is claimed in another degree.
    """
    if degrees is not None:
        given = list(degrees)
        degrees = tuple(sorted(set(given)))
        if not degrees or not all(is_whole(degree) for degree in degrees) or degrees[-1] >= LARGEST:
            raise BadInput(where="degrees", expected="at least one degree from 0 on", found=f"{given}")
    for key in groups or ():
        if key < 0 or (degrees is not None and key not in degrees):
            raise BadInput(where="groups", expected="degrees that the claim speaks of", found=f"degree {key}")
    return degrees


def _tuple(key: int | tuple[int, int]) -> tuple[int, ...]:
    return (key,) if isinstance(key, int) else key
