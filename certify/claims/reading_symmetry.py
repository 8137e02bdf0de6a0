"""Claims about symmetries as tables of a sheet: one reader a claim kind."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType
from typing import Any, Literal

from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.characters import ActionClaim, CharacterClaim
from certify.claims.counts import OrbitCountClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.identities import IdentityClaim
from certify.claims.quotients import BranchingClaim, OrbitSpaceClaim, SurfaceClaim
from certify.claims.reading import Given, Kind, complex_of, degrees_of, groups_by_degree, product_of
from certify.claims.shellings import ShellingClaim
from certify.products import PolyhedralProduct
from certify.simplicial import SimplicialComplex
from certify.simplicial.inputs import placed, plain_labels
from certify.symmetry.automorphisms import Generators, acting
from certify.symmetry.characters import IRREDUCIBLES, induced_character
from certify.symmetry.elements import Element, element_from_cycles, generated_group, rational_classes, spell_cycles
from certify.tables import Table, shown

__all__ = ["SYMMETRY_KINDS"]


def _automorphisms(table: Table, given: Given) -> AutomorphismsClaim:
    table = _with(table, pair="(D1, S0)", generators="all")
    product = product_of(table, given)
    claimed: dict[str, Any] = {}
    if "order" in table.values:
        claimed["order"] = _whole(table, "order", least=1)
    if "orbits" in table.values:
        claimed["orbits"] = _orbits(table)
    with table.at("generators"):
        return AutomorphismsClaim(product, _generators(table, product.complex), claimed)


def _orbits(table: Table) -> dict[str, Any]:
    """Return claimed numbers of orbits: on vertices and sets of them, and on faces by size."""
    inner = Table.of((*table.keys, "orbits"), table.values["orbits"])
    inner.only(("vertices", "faces", "subsets"))
    found: dict[str, Any] = {}
    for key in inner.values:
        if key == "faces":
            places = range(len(inner.items("faces", "a list of numbers, for faces of 0, 1, 2, … vertices")))
            found[key] = [_whole(inner, key, place) for place in places]
        else:
            found[key] = _whole(inner, key)
    return found


def _character(table: Table, given: Given) -> CharacterClaim:
    product = product_of(_with(table, pair="(D1, S0)"), given)
    k = product.complex
    degree = _whole(table, "degree")
    generators = _generators(table, k)
    elements: tuple[Element, ...] | None = None
    claimed: dict[str, Any] = {}
    if "values" in table.values:
        values = _by_element(table, ("values",), k)
        elements, claimed["values"] = tuple(values), list(values.values())
    with placed(table, "generators"):
        CharacterClaim(product, degree, generators)
    with placed(table, "values"):
        claim = CharacterClaim(product, degree, generators, elements)
    functions = _functions(table, k, acting(generators, product), claim.elements or ())
    if "multiplicities" in table.values:
        claimed["multiplicities"] = _multiplicities(table, functions)
    summands = _summands(table, product) if "summands" in table.values else None
    with placed(table, "functions"):
        return CharacterClaim(product, degree, generators, claim.elements, claimed, functions, summands, _route(table))


def _summands(table: Table, product: PolyhedralProduct) -> tuple[str, ...]:
    """Return words: given as such, or as the list of vertices with the second summand where each pair has only two."""
    k = product.complex
    words = []
    for place, value in enumerate(table.items("summands", "a list of lists of vertices, like [[1, 3]]")):
        if isinstance(value, str):
            words.append(value)
            continue
        with table.at("summands", place):
            numbers = k.numbers(plain_labels(value, "summands"))
            words.append("".join(str(int(number in numbers)) for number in range(k.vertex_count)))
    return tuple(words)


def _functions(
    table: Table, k: SimplicialComplex, generators: tuple[Element, ...], elements: tuple[Element, ...]
) -> dict[str, tuple[int, ...]]:
    """Return class functions by name: the irreducible characters of a kind of group, induced ones, and others."""
    found: dict[str, tuple[int, ...]] = {}
    if "irreducibles" in table.values:
        names = ", ".join(IRREDUCIBLES)
        kind = table.text("irreducibles", f"one of {names}")
        if kind not in IRREDUCIBLES:
            raise table.fault("irreducibles", expected=f"one of {names}", found=shown(kind))
        with table.at("irreducibles"):
            found.update(IRREDUCIBLES[kind](generators, elements))
    if "functions" not in table.values:
        return found
    inner = Table.of((*table.keys, "functions"), table.values["functions"])
    group = generated_group(generators, k.vertex_count)
    classes = rational_classes(group, generators)
    for name, value in inner.values.items():
        if not name.strip():
            raise inner.fault(name, expected="a name for each function", found="an empty one")
        if name in found:
            raise inner.fault(name, expected="a name of its own for each function", found="one that is taken")
        if isinstance(value, list):
            subgroup = generated_group(_elements(inner, name, k), k.vertex_count)
            if not set(subgroup) <= set(group):
                raise inner.fault(name, expected="generators of a subgroup", found="an element outside the group")
            found[name] = induced_character(group, subgroup, elements)
            continue
        values = _by_element(table, ("functions", name), k)
        by_class = []
        for own in (set(own) for element in elements for own in classes if element in own):
            fitting = [x for element, x in values.items() if element in own]
            if len(fitting) != 1:
                found_words = f"{len(fitting)} for that of {spell_cycles(min(own), k)}"
                raise inner.fault(name, expected="one value for each rational class", found=found_words)
            by_class += fitting
        found[name] = tuple(by_class)
    return found


def _multiplicities(table: Table, functions: Mapping[str, tuple[int, ...]]) -> dict[str, int]:
    inner = Table.of((*table.keys, "multiplicities"), table.values["multiplicities"])
    if not functions:
        raise table.fault("multiplicities", expected="irreducibles or functions as well", found="neither")
    inner.only(functions)
    return {name: _whole(inner, name, least=None) for name in inner.values}


def _action(table: Table, given: Given) -> ActionClaim:
    product = product_of(_with(table, pair="(D1, S0)"), given)
    element = _element(table, "element", product.complex)
    with table.at("element"):
        return ActionClaim(product, _whole(table, "degree"), element)


def _fixed_set(table: Table, given: Given) -> FixedSetClaim:
    product = product_of(_with(table, pair="(D1, S0)"), given)
    if ("element" in table.values) == ("generators" in table.values):
        raise table.fault(expected="one of the keys element and generators", found="both or neither")
    key = "element" if "element" in table.values else "generators"
    k, alone = product.complex, key == "element"
    elements = (_element(table, key, k),) if alone else _generators(table, k)
    degrees, groups = degrees_of(table), groups_by_degree(table)
    with placed(table, key):
        return FixedSetClaim(product, degrees, groups, generators=elements)


def _orbit_space(table: Table, given: Given) -> OrbitSpaceClaim:
    k = complex_of(table, given)
    generators, degrees, groups = _generators(table, k), degrees_of(table), groups_by_degree(table)
    with placed(table, "generators"):
        return OrbitSpaceClaim(k, generators, degrees, groups)


def _surface(table: Table, given: Given) -> SurfaceClaim:
    k = complex_of(table, given)
    claimed: dict[str, Any] = {}
    if "orientable" in table.values:
        value = table.values["orientable"]
        if not isinstance(value, bool):
            raise table.fault("orientable", expected="true or false", found=shown(value))
        claimed["orientable"] = int(value)
    for key in ("euler", "boundary"):
        if key in table.values:
            claimed[key] = _whole(table, key, least=None if key == "euler" else 0)
    if "genus" in table.values:
        if "euler" in claimed:
            raise table.fault("genus", expected="only one of genus and euler", found="both")
        if claimed.get("orientable") != 1 or claimed.get("boundary", 0):
            expected = "orientable = true and no boundary where the genus is claimed; claim euler for other surfaces"
            raise table.fault("genus", expected=expected, found="another surface")
        claimed |= {"boundary": 0, "genus": _whole(table, "genus")}
    with table.at("generators"):
        return SurfaceClaim(k, _generators(_with(table, generators=[]), k), claimed)


def _branching(table: Table, given: Given) -> BranchingClaim:
    k = complex_of(table, given)
    claimed: dict[str, Any] = {}
    if "orbits" in table.values:
        inner = Table.of((*table.keys, "orbits"), table.values["orbits"])
        for key in inner.values:
            if not key.isdecimal() or int(key) < 2 or str(int(key)) != key:
                raise inner.fault(key, expected="the order of an isotropy group, from 2 on", found=shown(key))
        claimed["orbits"] = sorted([int(key), _whole(inner, key, least=1)] for key in inner.values)
    generators = _generators(table, k)
    with table.at("generators"):
        return BranchingClaim(k, generators, claimed)


def _shelling(table: Table, given: Given) -> ShellingClaim:
    return ShellingClaim(complex_of(table, given))


def _orbit_count(table: Table, given: Given) -> OrbitCountClaim:
    k = complex_of(table, given)
    content = None
    if "content" in table.values:
        places = range(len(table.items("content", "a list with the number of vertices of each colour")))
        content = tuple(_whole(table, "content", place) for place in places)
    colours = _whole(table, "colours") if "colours" in table.values or content is None else len(content)
    claimed = {key: _whole(table, key) for key in ("orbits", "primitive") if key in table.values}
    with placed(table, "generators"):
        generators = _generators(_with(table, generators="all"), k)
        return OrbitCountClaim(k, colours, generators, content, claimed)


def _identity(table: Table, _: Given) -> IdentityClaim:
    left, right = (table.text(key, 'an expression like "necklaces(n, 2)"') for key in ("left", "right"))
    first, last = (_whole(table, key, least=1) for key in ("from", "to"))
    with placed(table, "from"):
        return IdentityClaim(left, right, first, last)


SYMMETRY_KINDS: Mapping[str, Kind] = MappingProxyType(
    {
        "automorphisms": Kind(("complex", "pair", "generators", "order", "orbits"), _automorphisms),
        "character": Kind(
            (
                "complex",
                "pair",
                "degree",
                "generators",
                "values",
                "irreducibles",
                "functions",
                "multiplicities",
                "summands",
                "route",
            ),
            _character,
        ),
        "action": Kind(("complex", "pair", "degree", "element"), _action),
        "fixed-set": Kind(("complex", "pair", "element", "generators", "degrees", "groups"), _fixed_set),
        "orbit-space": Kind(("complex", "generators", "degrees", "groups"), _orbit_space),
        "surface": Kind(("complex", "generators", "orientable", "euler", "genus", "boundary"), _surface),
        "branching": Kind(("complex", "generators", "orbits"), _branching),
        "shelling": Kind(("complex",), _shelling),
        "count-identity": Kind(("left", "right", "from", "to"), _identity),
        "orbit-count": Kind(("complex", "generators", "colours", "content", "orbits", "primitive"), _orbit_count),
    }
)
"""The claim kinds about symmetries, by the name that sheets give under ``kind``."""


# -- values that several kinds have -------------------------------------------------------------


def _with(table: Table, **values: Any) -> Table:
    """Return a table in which these values stand where none are given."""
    return Table(table.keys, {**values, **table.values})


def _whole(table: Table, key: str, place: int | None = None, *, least: int | None = 0) -> int:
    """Return a whole number, or an item of a list of them."""
    value: Any = table.value(key, "a whole number")
    keys: tuple[str | int, ...] = (key,)
    if place is not None:
        value, keys = value[place], (key, place)
    if isinstance(value, bool) or not isinstance(value, int) or (least is not None and value < least):
        expected = "a whole number" if least is None else f"a whole number from {least} on"
        raise table.fault(*keys, expected=expected, found=shown(value))
    return value


def _element(table: Table, key: str, k: SimplicialComplex) -> Element:
    text = table.text(key, 'a permutation in cycles like "(1 2 3)(4 5)"')
    with table.at(key):
        return element_from_cycles(text, k)


_LIST = 'a list of permutations in cycles like ["(1 2 3)(4 5)"]'


def _elements(table: Table, key: str, k: SimplicialComplex, expected: str = _LIST) -> tuple[Element, ...]:
    found = []
    for place, text in enumerate(table.items(key, expected)):
        if not isinstance(text, str):
            raise table.fault(key, place, expected='a permutation in cycles like "(1 2 3)"', found=shown(text))
        with table.at(key, place):
            found.append(element_from_cycles(text, k))
    return tuple(found)


def _generators(table: Table, k: SimplicialComplex) -> Generators:
    """Return the generators of G, or None for all automorphisms."""
    if table.values.get("generators") == "all":
        return None
    return _elements(table, "generators", k, f'{_LIST}, or "all"')


def _by_element(table: Table, keys: tuple[str, ...], k: SimplicialComplex) -> dict[Element, int]:
    """Return whole numbers under elements that are written in cycles."""
    value: Any = table.values
    for key in keys:
        value = value[key]
    inner = Table.of((*table.keys, *keys), value)
    found: dict[Element, int] = {}
    for text in inner.values:
        with inner.at(text):
            element = element_from_cycles(text, k)
        if element in found:
            raise inner.fault(text, expected="each element once", found="the same element again")
        found[element] = _whole(inner, text, least=None)
    return found


def _route(table: Table) -> Literal["blocks", "cells"]:
    match table.values.get("route", "blocks"):
        case "blocks":
            return "blocks"
        case "cells":
            return "cells"
        case other:
            raise table.fault("route", expected='"blocks" or "cells"', found=shown(other))
