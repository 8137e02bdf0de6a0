"""The claim kind ``character``: the traces of a group of symmetries on homology, by rational classes."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass, field
from fractions import Fraction
from typing import Any, ClassVar, Literal

from certify.certificate.canonical import integer_value
from certify.claims.base import Contribution, Task, check_degree, generators_value
from certify.claims.homology import HomologyClaim
from certify.claims.values import Values, ValuesClaim
from certify.errors import BadInput, ClaimIsFalse
from certify.products import Block, PolyhedralProduct, block_classes
from certify.products.blocks import DIGITS
from certify.simplicial.complexes import SimplicialComplex
from certify.symmetry.actions import ActedCells, acted_blocks
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.elements import (
    Element,
    check_symmetries,
    generated_group,
    identity,
    inverse,
    orbit,
    rational_classes,
    spell_cycles,
)

__all__ = ["CharacterClaim"]


@dataclass(frozen=True)
class CharacterClaim(ValuesClaim):
    """A claim about the character of a group on H_k((X, A)^K; ℚ).

    Parameters
    ----------
    product : PolyhedralProduct
    degree : int
    generators : tuple of Element, or None
        None is for all automorphisms of K and the pairs.
    elements : tuple of Element, or None
        One element of each rational class; None lets them be found.
    claimed : mapping
        ``values``: the traces on these elements, in this order; ``multiplicities``: ⟨χ, ψ⟩ / ⟨ψ, ψ⟩ by the name of the
        class function ψ, a fraction in general, a function that is left out being claimed to have multiplicity 0.
    functions : mapping
        Class functions ψ by name, with their values on these elements. Their inner products ⟨χ, ψ⟩ and ⟨ψ, ψ⟩ are
        proved; the quotient is the multiplicity of ψ if it is irreducible over ℚ, which is not part of the proof.
    summands : tuple of str, or None
        Words for summands of the stable splitting, with a digit for the summand of the pair at each vertex (for discs 1
        where the vertex belongs to I): the character is that on the sum of their orbits. None for all summands.
    route : {"blocks", "cells"}

    Raises
    ------
    BadInput
        If a generator is no symmetry, a word is none, a rational class is missing or there twice, or a class function
        has another number of values or a norm that is no whole number above 0.
    """

    product: PolyhedralProduct
    degree: int
    generators: Generators
    elements: tuple[Element, ...] | None = None
    claimed: Values = field(default_factory=dict)
    functions: Mapping[str, tuple[int, ...]] = field(default_factory=dict)
    summands: tuple[str, ...] | None = None
    route: Literal["blocks", "cells"] = "blocks"
    kind: ClassVar[str] = "character"

    def __post_init__(self) -> None:
        """Refuse generators that are no symmetries, and a list of elements that does not match the classes."""
        k = self.base
        check_degree(self.degree)
        check_symmetries(self.generators or (), self.product)
        generators = acting(self.generators, self.product)
        classes = rational_classes(generated_group(generators, k.vertex_count), generators)
        if self.elements is None:
            object.__setattr__(self, "elements", tuple(own[0] for own in classes))
        where = {element: number for number, own in enumerate(classes) for element in own}
        met: dict[int, Element] = {}
        for element in self._elements:
            shown = spell_cycles(element, k)
            if element not in where:
                raise BadInput(where="values", expected="elements of the group", found=f"{shown}, which is none")
            if where[element] in met:
                other = spell_cycles(met[where[element]], k)
                found = f"{other} and {shown}, which are in one class"
                raise BadInput(where="values", expected="each rational class once", found=found)
            met[where[element]] = element
        for number, own in enumerate(classes):
            if number not in met:
                found = f"none of the class of {spell_cycles(own[0], k)}"
                raise BadInput(where="values", expected="an element of each rational class", found=found)
        object.__setattr__(self, "_sizes", tuple(len(classes[where[element]]) for element in self._elements))
        self._check_functions()
        self._check_words()

    def _check_functions(self) -> None:
        """Refuse class functions that are zero, have another number of values, or whose norm is no whole number."""
        for name, psi in self.functions.items():
            if len(psi) != len(self._elements):
                expected = f"a value for each of the {len(self._elements)} classes"
                raise BadInput(where="functions", expected=expected, found=f"{len(psi)} for {name}")
            norm = self._inner(psi, psi)
            if norm.denominator > 1 or not norm:
                expected = "class functions ψ for which ⟨ψ, ψ⟩ is a whole number above 0"
                raise BadInput(where="functions", expected=expected, found=f"{norm} for {name}")

    def _check_words(self) -> None:
        """Refuse words that choose no summands, and summands on the route of cells."""
        if self.summands is not None and self.route == "cells":
            raise BadInput(where="route", expected="blocks where single summands are meant", found="cells")
        if self.summands == ():
            raise BadInput(where="summands", expected="at least one summand", found="none")
        signs = any(to < 0 for element in self.generators or () for to in element)
        if self.summands is not None and signs:
            found = "a change of sign, which preserves no single summand"
            raise BadInput(where="summands", expected="generators without signs", found=found)
        for word in self.summands or ():
            sizes = [len(pair.shapes) for pair in self.product.pairs]
            fits = len(word) == len(sizes) and all(
                digit in DIGITS[:size] for digit, size in zip(word, sizes, strict=True)
            )
            if not fits:
                expected = (
                    f"lists of vertices, or words of {len(sizes)} digits, for each vertex that of a summand of its pair"
                )
                raise BadInput(where="summands", expected=expected, found=repr(word))

    def _chosen(self) -> set[str] | None:
        """Return the words in the orbits of those that are meant."""
        if self.summands is None:
            return None
        backs = [inverse(element) for element in acting(self.generators, self.product)]

        def images(word: str) -> list[str]:
            return ["".join(word[abs(place) - 1] for place in back) for back in backs]

        return {word for given in self.summands for word in orbit(given, images)}

    def class_sizes(self) -> dict[str, int]:
        """Return how many elements each rational class has, under the element that stands for it."""
        elements = (spell_cycles(element, self.base) for element in self._elements)
        return dict(zip(elements, getattr(self, "_sizes"), strict=True))  # noqa: B009 - no field, and so not compared

    @property
    def group_cells(self) -> int:
        """About 2 |G| m, once for the group and once for its classes."""
        sizes: tuple[int, ...] = getattr(self, "_sizes")  # noqa: B009 - no field, and so not compared
        return 2 * sum(sizes) * self.base.vertex_count

    @property
    def _elements(self) -> tuple[Element, ...]:
        return self.elements or ()

    @property
    def base(self) -> SimplicialComplex:
        """The complex K."""
        return self.product.complex

    def fields(self) -> dict[str, Any]:
        """Return degree, elements, functions, generators and pairs."""
        return {
            "degree": self.degree,
            "elements": [list(element) for element in self._elements],
            "functions": [[integer_value(x) for x in psi] for psi in self.functions.values()],
            "generators": generators_value(self.generators),
            "pairs": [pair.value for pair in self.product.pairs],
            "summands": None if self.summands is None else list(self.summands),
        }

    def opening(self) -> Iterator[dict[str, Any]]:
        """Yield the splitting of each pair that is given by its cells."""
        if self.route == "blocks":
            yield from HomologyClaim(self.product).opening()

    def tasks(self) -> Iterator[Task]:
        """Yield the whole product, or the blocks that each element maps to themselves; all of them for the identity."""
        if self.route == "cells":
            cells = tuple(pair.cells for pair in self.product.pairs)
            whole = ActedCells(self.base.face_masks(), cells, self.degree, self._elements)
            if whole.is_watched:
                yield Task(whole)
            return
        chosen = self._chosen()
        for number, element in enumerate(self._elements):
            if chosen is None and element == identity(self.base.vertex_count):
                for block in block_classes(self.product, self.degree + 1):
                    yield Task(block)
            else:
                yield from map(Task, acted_blocks(self.product, self.degree, element, number, chosen))

    def found(self, contributions: Iterable[Contribution]) -> dict[str, Any]:
        """Return the values of the character, and the inner products."""
        values = [0] * len(self._elements)
        for contribution in contributions:
            source = contribution.source
            if isinstance(source, ActedCells):
                for place, trace in enumerate(contribution.traces, source.number):
                    values[place] += source.factor * trace
            elif isinstance(source, Block):
                one = self._elements.index(identity(self.base.vertex_count))
                for shift, times in source.shifts.items():
                    if 0 <= self.degree - shift < len(contribution.groups):
                        values[one] += times * contribution.groups[self.degree - shift].rank
        products = []
        for name, psi in self.functions.items():
            inner = self._inner(values, psi)
            if inner.denominator > 1:
                raise ClaimIsFalse(what=f"⟨χ, ψ⟩ for ψ = {name}", claimed="a whole number", found=str(inner))
            products.append([int(inner), int(self._inner(psi, psi))])
        return {"products": products, "values": values}

    def _inner(self, some: Iterable[int], others: Iterable[int]) -> Fraction:
        sizes: tuple[int, ...] = getattr(self, "_sizes")  # noqa: B009 - no field, and so not compared
        return Fraction(sum(n * x * y for n, x, y in zip(sizes, some, others, strict=True)), sum(sizes))

    def check(self, found: Values) -> None:
        """Raise ClaimIsFalse at the first value of the character, or multiplicity, that is not the one claimed."""
        if "values" in self.claimed:
            pairs = zip(self._elements, self.claimed["values"], found["values"], strict=True)
            for element, claimed, real in pairs:
                self.compare_one(f"χ({spell_cycles(element, self.base)})", claimed, real)
        if "multiplicities" in self.claimed:
            for name, real in self._multiplicities(found).items():
                self.compare_one(f"the multiplicity of {name}", self.claimed["multiplicities"].get(name, 0), real)

    def _multiplicities(self, found: Values) -> dict[str, Fraction]:
        pairs = zip(self.functions, found["products"], strict=True)
        return {name: Fraction(inner, norm) for name, (inner, norm) in pairs}

    def answer(self, found: Values) -> dict[str, Any]:
        """Return values and products as the statement holds them."""
        products = [[integer_value(x) for x in pair] for pair in found["products"]]
        return {"products": products, "values": [integer_value(value) for value in found["values"]]}

    def lines(self, found: Values) -> list[str]:
        """Write the values of the character, class by class."""
        of = f"on H_{self.degree}({self.product}; ℚ)"
        lines = [
            f"χ({spell_cycles(element, self.base)}) = {value} {of}, {size} in the class"
            for element, value, size in zip(self._elements, found["values"], getattr(self, "_sizes"), strict=True)  # noqa: B009
        ]
        for name, multiplicity in self._multiplicities(found).items():
            if multiplicity:
                values = ", ".join(map(str, self.functions[name]))
                lines.append(f"multiplicity {multiplicity} of {name}, which has the values {values}")
        return lines

    def name(self, key: str) -> str:
        """Write in words what a value is."""
        return f"the {key} of the character"

    def value(self, found: Values) -> dict[str, Any]:
        """Return the values under the elements, and the products."""
        elements = [spell_cycles(element, self.base) for element in self._elements]
        multiplicities = {name: str(value) for name, value in self._multiplicities(found).items()}
        return {"values": dict(zip(elements, found["values"], strict=True)), "multiplicities": multiplicities}
