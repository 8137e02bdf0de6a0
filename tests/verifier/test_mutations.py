"""Every small change of a genuine certificate, signed anew, is refused, or leaves a statement that is true."""

from __future__ import annotations

import random
from collections.abc import Iterator
from copy import deepcopy
from typing import Any

import pytest

from tests.verifier.forging import CLAIMS, Values, genuine, judged, signed, values_of
from tests.verifier.truth import is_true

PER_CLAIM = 250

Way = tuple[Any, ...]


def _places(value: Any, way: Way = ()) -> Iterator[Way]:
    """Yield the way to every value inside."""
    items = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    for key, inner in items:
        yield (*way, key)
        yield from _places(inner, (*way, key))


def _at(values: Any, way: Way) -> Any:
    for key in way:
        values = values[key]
    return values


def _mutated(values: Values, rng: random.Random) -> Values:
    """Return the values after one random change of a record or of the statement."""
    changed = deepcopy(values)
    ways = [way for way in _places(changed) if way[0] not in (len(changed) - 1,) and way[:2] not in ((0, "about"),)]
    *way, last = rng.choice(ways)
    holder = _at(changed, tuple(way))
    value = holder[last]
    match rng.randrange(4):
        case 0 if type(value) is int:
            holder[last] = value + rng.choice([-2, -1, 1, 2])
        case 1 if isinstance(holder, list):
            holder.insert(last, deepcopy(rng.choice(holder)))
        case 2:
            del holder[last]
        case _ if isinstance(holder, list):
            other = rng.randrange(len(holder))
            holder[last], holder[other] = holder[other], holder[last]
        case _:
            holder[last] = rng.choice([None, 0, 1, [], {}, "", True, [[0, 1]], value])
    return changed


@pytest.mark.parametrize("name", CLAIMS)
def test_mutations_prove_nothing_new(name: str) -> None:
    """A mutant may be accepted where it states the same, or something else that is true by Smith forms."""
    values = values_of(genuine(name))
    rng = random.Random(name)
    refused = 0
    for _ in range(PER_CLAIM):
        mutant = _mutated(values, rng)
        if judged(signed(mutant))["verdict"] != "accepted":
            refused += 1
            continue
        assert mutant[0]["statement"] == values[0]["statement"] or is_true(mutant[0]["statement"])
    assert refused > PER_CLAIM // 3


@pytest.mark.parametrize("name", ["ring", "plane", "moore", "own-pair", "real-projective", "real-toric", "summand"])
def test_the_oracle_knows_what_is_true(name: str) -> None:
    statement = deepcopy(values_of(genuine(name))[0]["statement"])
    assert is_true(statement)
    statement["groups"][-1][1] += 1
    assert not is_true(statement)
