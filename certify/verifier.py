#!/usr/bin/env python3
"""Check certificates of topological claims. This one file is everything that a referee has to trust.

Run it with any Python from 3.11 on, without installing anything:

    python3 -I -S verifier.py PATH...

PATH is a certificate (*.cert.jsonl or *.cert.jsonl.gz) or a folder that is searched for them. For each file it
prints accepted, rejected or undecided, and for an accepted one the statement that was proved, written from the
checked data alone. Exit code: 0 all accepted; 1 something was rejected; 2 the command line is wrong;
3 something is undecided or unreadable, or there was nothing to check; 70 an internal error.

The format is specified in docs/certificate-format.md, the mathematics in docs/mathematics.md; the Lemmas A to D
named below stand there with proofs. The file believes nothing: cells and boundaries are rebuilt from the statement,
and every total is counted anew. Claims are accepted in one place only, at the end of `examine`.
"""

from __future__ import annotations

import argparse
import hashlib
import io
import json
import operator
import os
import re
import sys
import time
import zlib
from collections import Counter
from collections.abc import Callable, Iterable, Iterator, Sequence
from copy import copy
from functools import lru_cache, partial, reduce
from heapq import heapify, heappop, heappush
from itertools import combinations, pairwise, product, zip_longest
from math import comb, factorial, gcd, lcm, prod
from operator import and_, ge, xor

TYPE_CHECKING = False
if TYPE_CHECKING:  # for readers with a type checker only
    import ast
    from typing import Any

FORMAT = 1
LETTERS = [bytes([i]) for i in range(256)]
DIGITS = "0123456789abcdefghijklmnopqrstuvwxyz"
BATCH = 1 << 18  # faces that are merged together at most; part of the format, since it decides which records there are
LARGEST = 2**53 - 1  # integers beyond are written as strings (RFC 7493); above the degrees of all cells, since those
# of a pair are below 2,000, and more than 10^9 vertices are beyond any limit
ENDINGS = (".cert.jsonl", ".cert.jsonl.gz")
CHUNK = 1 << 16
LINE = 1 << 26  # bytes of a line at most, since a line is held in memory
UNDECIDED = {"limit", "unknown-format", "unknown-kind", "unknown-pair", "not-a-certificate", "unreadable"}


Vector = list[tuple[int, int]]  # cells with coefficients, cells ascending
Faces = tuple[tuple[int, ...], ...]  # for each number of vertices the faces as ascending bit masks
Letter = tuple[int, int, tuple[tuple[int, int], ...]]  # a cell of X: degree, 1 if outside A, boundary on other letters
Alphabet = tuple[Letter, ...]  # the cells of a pair (X, A), or of a summand of one
Tag = int | Alphabet  # what a kept vertex brings: n for cells e and t with d e = n t, or the cells of a larger summand
Shape = tuple[int, Tag, dict[int, int]]  # a summand: move, tag, and how often it occurs with which degree shift
States = dict[tuple[tuple[Tag, ...], Faces], tuple[str, dict[int, int]]]  # tags, K on kept and undecided: name, shifts
Block = tuple[str, tuple[Tag, ...], Faces, dict[int, int]]  # name, tags and complex of the kept vertices, shifts
Group = Counter[int]  # how often Z (under 0) and Z/e (under e) are summands
Key = tuple[int, ...]  # the degree of a group, or its degrees
Total = dict[Key, Group]  # a group for each key; a key that is missing has the group 0
Element = tuple[int, ...]  # the image of each vertex; negative where its coordinate in (D^1, S^0) changes sign
Proved = tuple[dict[str, object], str]  # the answer as a statement holds it, and in words


class Failure(Exception):
    """The one way in which a check fails, with a stable code and a sentence."""


def require(holds: bool, code: str, sentence: str) -> None:
    """Check that something holds."""
    if not holds:
        raise Failure(code, sentence)


class Budget:
    """What may still be spent on a file; a limit that is reached makes it undecided, never accepted."""

    def __init__(self, limits: argparse.Namespace) -> None:
        self.limits = {"bytes": limits.max_bytes, "cells": limits.max_cells, "bits": limits.max_bits}
        self.left = dict(self.limits)
        self.deadline = time.monotonic() + limits.max_seconds

    def spend(self, what: str, number: int) -> None:
        self.left[what] -= number
        if self.left[what] < 0:  # a sentence is only put together when it is needed, since this runs often
            raise Failure("limit", f"more than {self.limits[what]} {what} are needed; raise --max-{what}")
        require(time.monotonic() <= self.deadline, "limit", "not done within the time allowed; raise --max-seconds")


# ---- the file: lines, canonical JSON, integers ----------------------------------------------------------------------


class Inflated(io.RawIOBase):
    """The content of a file that holds one gzip member and nothing else."""

    def __init__(self, file: io.BufferedReader) -> None:
        self.file = file
        self.inflate = zlib.decompressobj(31)

    def readable(self) -> bool:
        return True

    def readinto(self, buffer: memoryview, /) -> int:  # type: ignore[override]
        data = b""
        while not data:
            piece = self.inflate.unconsumed_tail or self.inflate.unused_data or self.file.read(CHUNK)
            require(not (piece and self.inflate.eof), "gzip", "bytes follow the first gzip member")
            if not piece:
                break
            data = self.inflate.decompress(piece, len(buffer))
        require(bool(data) or self.inflate.eof, "gzip", "the gzip stream ends too early")
        buffer[: len(data)] = data
        return len(data)


class Lines:
    """The lines of a certificate, one by one, with a running digest of all lines before the one at hand."""

    def __init__(self, path: str, file: io.BufferedReader, budget: Budget) -> None:
        self.file = io.BufferedReader(Inflated(file), CHUNK) if path.endswith(".gz") else file
        self.budget = budget
        self.number = 0
        self.line = b""
        self.digest = hashlib.sha256()

    def raw(self) -> bytes:
        """Return the next line with its line feed, or nothing at the end of the file."""
        self.digest.update(self.line)
        self.number += 1
        self.line = self.file.readline(min(self.budget.left["bytes"], LINE) + 1)
        self.budget.spend("bytes", len(self.line))
        require(len(self.line) <= LINE, "limit", f"a line of more than {LINE} bytes")
        require(self.line[-1:] in (b"", b"\n"), "truncated", "the last line has no line feed")
        return self.line

    def next(self) -> object:
        """Return the value of the next line."""
        require(self.raw() != b"", "truncated", "the file ends without its end record")
        return value_of(self.line)


def refuse_float(text: str) -> object:
    raise Failure("number", f"{text[:40]} is not an integer")


ENCODER = json.JSONEncoder(sort_keys=True, separators=(",", ":"), ensure_ascii=False)
DECODER = json.JSONDecoder(parse_float=refuse_float, parse_constant=refuse_float)


def canonical(value: object) -> bytes:
    """Return the one spelling of a value: keys sorted, no spaces, UTF-8."""
    return ENCODER.encode(value).encode("utf-8")


def value_of(line: bytes) -> object:
    """Return the JSON value of a line that is spelled canonically."""
    try:
        value = DECODER.decode(line.decode("utf-8"))
        spelled = canonical(value) + b"\n"
    except (RecursionError, ValueError) as error:
        raise Failure("json", "the line is not JSON in UTF-8, or nested too deeply") from error
    require(spelled == line, "spelling", "the line is not canonical (sorted unique keys, no spaces, plain integers)")
    return value


def record(value: object, required: Sequence[str], optional: Sequence[str] = ()) -> dict[str, object]:
    """Return a JSON object after checking its keys."""
    if type(value) is not dict:
        raise Failure("shape", "an object is expected")
    more = len(value) - len(required)
    if any(key not in value for key in required) or (more and not value.keys() <= {*required, *optional}):
        raise Failure("keys", f"the keys {', '.join([*required, *optional])} are expected, not {', '.join(value)[:60]}")
    return value


def sequence(value: object) -> list[object]:
    """Return a JSON array."""
    if type(value) is not list:
        raise Failure("shape", "a list is expected")
    return value


def integer(value: object, budget: Budget) -> int:
    """Return an integer; beyond ±(2^53 - 1) it is spelled as a decimal string."""
    if type(value) is int:
        require(-LARGEST <= value <= LARGEST, "number", "an integer beyond ±(2^53 - 1) must be a decimal string")
        return value
    if type(value) is not str or not re.fullmatch(r"-?[1-9][0-9]*", value, re.ASCII):
        raise Failure("number", "an integer is expected")
    short = len(value) <= budget.limits["bits"] * 0.30103 + 2
    require(short, "limit", f"an integer of more than {budget.limits['bits']} bits; raise --max-bits")
    require(abs(int(value)) > LARGEST, "number", "an integer within ±(2^53 - 1) must be a JSON number")
    return int(value)


def numbers(value: object, start: int, stop: int) -> list[int]:
    """Return a list of strictly ascending integers from `start` to below `stop`."""
    found = [number for number in sequence(value) if type(number) is int]
    ascending = len(found) == len(sequence(value)) and not any(map(ge, found, found[1:]))
    require(ascending, "index", "integers in ascending order are expected, each once")
    if found:
        require(start <= found[0] and found[-1] < stop, "index", f"integers from {start} to {stop - 1} are expected")
    return found


# ---- the statement --------------------------------------------------------------------------------------------------


class Statement:
    """The question of a claim, read strictly from the header. What is stated as the answer is compared at the end."""

    def __init__(self, raw: object, budget: Budget) -> None:
        kind = raw.get("kind") if type(raw) is dict else None
        if type(kind) is not str or kind not in KINDS:
            raise Failure("unknown-kind", f"claims of the kind {str(kind)[:40]!r} are unknown here")
        question, answer, self.routes = KINDS[kind]
        self.kind = kind
        about = () if kind in NUMBERS else ("facets", "vertices")
        self.value = value = record(raw, ("kind", *about, *question, *answer))
        self.stated = {key: value[key] for key in answer}
        self.vertices = integer(value.get("vertices", 0), budget)
        require(self.vertices >= 0, "statement", "a number of vertices from 0 on is expected")
        budget.spend("cells", self.vertices)
        self.facets = [numbers(facet, 1, self.vertices + 1) for facet in sequence(value.get("facets", [[]]))]
        self.check_facets(budget)
        self.pairs = [Pair(pair, budget) for pair in sequence(value.get("pairs", ["(D1, S0)"] * self.vertices))]
        require(len(self.pairs) == self.vertices, "statement", "one pair for each vertex is expected")
        degrees = value.get("degrees")
        self.degrees = None if degrees is None else numbers(degrees, 0, LARGEST)
        require(self.degrees != [], "statement", "at least one degree is expected")
        self.degree = numbers([value.get("degree", 0)], 0, LARGEST)[0]
        self.top = self.degrees[-1] + 1 if self.degrees else self.degree + 1 if "degree" in value else LARGEST
        self.rows = [str(row) for row in sequence(value.get("rows", []))]
        binary = value.get("rows", []) == self.rows and all(set(row) <= {"0", "1"} for row in self.rows)
        fit = binary and all(len(row) == self.vertices for row in self.rows)
        require(fit, "statement", "a row of λ has a 0 or 1 for each vertex")
        self.kept, self.out = (numbers(value.get(key, []), 1, self.vertices + 1) for key in ("kept", "out"))
        require(not set(self.kept) & set(self.out), "statement", "a vertex is kept and out at once")
        every = value.get("generators", []) is None
        self.order, self.generators = full_group(self, budget) if every else (0, self.elements("generators"))

    def elements(self, key: str) -> list[Element]:
        """Return the signed permutations under a key; they must preserve K and the pairs."""
        return [read_element(element, self) for element in sequence(self.value.get(key, []))]

    def check_facets(self, budget: Budget) -> None:
        """Require the facets to be in order, and none to lie in another."""
        require(bool(self.facets), "statement", "a complex has a facet; the complex {∅} has the empty one")
        require(not any(map(ge, self.facets, self.facets[1:])), "statement", "the facets must ascend, each once")
        holders = dict.fromkeys(range(1, self.vertices + 1), 0)
        budget.spend("cells", sum(map(len, self.facets)) * (1 + len(self.facets) // 64))
        for number, facet in enumerate(self.facets):
            for vertex in facet:
                holders[vertex] |= 1 << number
        for number, facet in enumerate(self.facets):
            common = reduce(and_, (holders[vertex] for vertex in facet), (1 << len(self.facets)) - 1)
            require(common == 1 << number, "statement", "a facet lies in another one")

    def text(self, proved: str) -> str:
        """Render what was proved, and what it is about, in the notation of mathematics."""
        if "facets" not in self.value:
            return proved
        places: dict[str, list[str]] = {}
        for i, pair in enumerate(self.pairs, 1):
            places.setdefault(pair.text, []).append(str(i))
        mixed = [f", (X_i,A_i) = {name} for i = {', '.join(places[name])}" for name in sorted(places)]
        pairs = "".join(mixed) if len(places) > 1 and "pairs" in self.value else ""
        comma = "," if self.vertices > 9 else ""
        facets = " ".join(comma.join(map(str, facet)) or "∅" for facet in self.facets)
        acting = f", G generated by {cycles_text(self.generators) or '()'}" if "G" in proved else ""
        acting = ", G all automorphisms" if self.order else acting
        rows = f", λ with the rows {' '.join(self.rows)}" if self.rows else ""
        return f"{proved}; K on {self.vertices} vertices with facets {facets}{pairs}{acting}{rows}"

    def space(self) -> str:
        """Return the polyhedral product."""
        names = {pair.text for pair in self.pairs}
        return f"{names.pop() if len(names) == 1 else '(X,A)'}^K"

    def manifold(self, groups: Total) -> str:
        """Return the Euler characteristic and, where K is a connected closed pseudomanifold, the orientability."""
        if self.degrees is not None:
            return ""
        euler = sum((-1) ** key[0] * group[0] for key, group in groups.items())
        sharing: dict[tuple[int, ...], list[int]] = {}
        for number, facet in enumerate(self.facets):
            for ridge in combinations(facet, max(len(facet) - 1, 0)):
                sharing.setdefault(ridge, []).append(number)
        top = len(self.facets[0])
        closed = {len(facet) for facet in self.facets} == {top} and {len(n) for n in sharing.values()} == {2}
        if not closed or not connected(range(len(self.facets)), sharing.values()):
            return f"; Euler characteristic {euler}"
        ranks = [groups.get((degree,), Counter())[0] for degree in (0, top)]
        return f"; Euler characteristic {euler}, {'orientable' if ranks[0] == ranks[1] else 'non-orientable'}"


def connected(points: Iterable[object], sharing: Iterable[Sequence[object]]) -> bool:
    """Tell whether these points are in one piece when those in each of these sequences hang together."""
    near: dict[object, list[object]] = {point: [] for point in points}
    for one, other in (step for together in sharing for step in pairwise(together)):
        near[one].append(other)
        near[other].append(one)
    return not near or len(orbit(next(iter(near)), lambda point: near[point])) == len(near)


STAY, OUT, KEEP, INNER, OUTER = range(5)  # what a summand does to its vertex in K, see `decide`
PAIRS = (r"\(D{}, S{}\)", r"\(S{}, \*\)", r"\(CP{}, \*\)", r"\(RP{}, \*\)", r"\(cone {}, {}\)", r"\(P{}\({}\), \*\)")


def named_pair(name: str) -> tuple[list[Letter], list[Shape]]:
    """Return the cells of a pair that is written as in print, and its summands (docs/mathematics.md)."""
    for form in PAIRS:
        if match := re.fullmatch(form.replace("{}", "(0|[1-9][0-9]{0,2})"), name, re.ASCII):
            n, k = int(match[1]), int(match[match.lastindex or 1])
            if form == PAIRS[0] and n == 1 and k == 0:
                return [(0, 0, ()), (0, 0, ()), (1, 1, ((0, -1), (1, 1)))], [(STAY, 0, {0: 1}), (KEEP, 1, {0: 1})]
            if form == PAIRS[0] and n == k + 1:
                return [(0, 0, ()), (k, 0, ()), (n, 1, ((1, 1),))], [(STAY, 0, {0: 1}), (KEEP, 1, {k: 1})]
            if form == PAIRS[1] and n:
                return [(0, 0, ()), (n, 1, ())], [(STAY, 0, {0: 1}), (OUT, 0, {n: 1})]
            if form == PAIRS[2] and n:
                cells: list[Letter] = [(2 * i, min(i, 1), ()) for i in range(n + 1)]
                return cells, [(STAY, 0, {0: 1}), (OUT, 0, {2 * i: 1 for i in range(1, n + 1)})]
            if form == PAIRS[3] and n:
                cells = [(i, min(i, 1), ((i - 1, 2),) if i and i % 2 == 0 else ()) for i in range(n + 1)]
                top: list[Shape] = [(OUT, 0, {n: 1})] if n % 2 else []
                torsion: list[Shape] = [(OUTER, 2, dict.fromkeys(range(1, n, 2), 1))] if n > 1 else []
                return cells, [(STAY, 0, {0: 1}), *top, *torsion]
            if form == PAIRS[4] and n == k > 0:
                cells = [(0, 0, ())] * n + [(0, 1, ())] + [(1, 1, ((i, 1), (n, -1))) for i in range(n)]
                return cells, [(STAY, 0, {0: 1}), *([(KEEP, 1, {0: n - 1})] if n > 1 else [])]
            if form == PAIRS[5] and n > 1 and k > 1:
                return [(0, 0, ()), (n - 1, 1, ()), (n, 1, ((1, k),))], [(STAY, 0, {0: 1}), (OUTER, k, {n - 1: 1})]
    raise Failure("unknown-pair", f"the pair {name[:40]!r} is unknown here")


class Pair:
    """A pair (X, A) of a based complex and a subcomplex: its cells, and its summands once they are known."""

    def __init__(self, raw: object, budget: Budget) -> None:
        self.raw = raw
        self.shapes: list[Shape]  # not there before `split` for a pair that lists its cells, so that none is overlooked
        if type(raw) is str:
            self.cells, self.shapes = named_pair(raw)
            self.text = re.sub("(?<=[DSP])[0-9]+", lambda digits: raised(int(digits[0])), raw).replace(", ", ",")
            return
        entries = [sequence(cell) for cell in sequence(record(raw, ("cells",))["cells"])]
        fit = 0 < len(entries) < 256 and all(len(entry) == 3 for entry in entries)
        require(fit, "pair", "1 to 255 cells with degree, side and boundary are expected")
        self.cells = []
        for degree, side, boundary in entries:
            entry = vector(boundary, len(self.cells), budget) if sequence(boundary) else []
            self.cells.append((numbers([degree], 0, 1000)[0], integer(side, budget), tuple(entry)))
        degrees = [degree for degree, _, _ in self.cells]
        for degree, outside, terms in self.cells:
            below = all(degrees[cell] == degree - 1 and self.cells[cell][1] <= outside for cell, _ in terms)
            require(outside in (0, 1) and below, "pair", "degrees fit, and A is closed under d")
            require(not self.image(terms), "pair", "the boundary of a boundary is zero")
        ends = [" ".join(f"{x:+} c{i}" for i, x in terms) for _, _, terms in self.cells]
        names = [f"c{i} in degree {d}" + f", d c{i} = {ends[i]}" * bool(t) for i, (d, _, t) in enumerate(self.cells)]
        inside = " ".join(f"c{i}" for i, (_, outside, _) in enumerate(self.cells) if not outside)
        self.text = f"(⟨{'; '.join(names)}⟩,⟨{inside}⟩)"

    def image(self, terms: Iterable[tuple[int, int]]) -> dict[int, int]:
        """Return d of a vector on the cells."""
        total: Counter[int] = Counter()
        for cell, coefficient in terms:
            for place, entry in self.cells[cell][2]:
                total[place] += coefficient * entry
        return {place: entry for place, entry in total.items() if entry}

    def split(self, value: object, budget: Budget) -> None:
        """Find the summands in the basis given with its inverse: each vector of one degree, those of A within A."""
        size = len(self.cells)
        proof = record(value, ("basis", "inverse"))
        basis = [vector(entry, size, budget) for entry in sequence(proof["basis"])]
        rows = check_inverse(list(range(size)), [dict(terms) for terms in basis], proof["inverse"], budget)
        new: list[tuple[int, int, dict[int, int]]] = []
        for terms in basis:
            degrees = {self.cells[cell][0] for cell, _ in terms}
            require(len(degrees) == 1, "splitting", "a basis vector has cells of one degree")
            image = self.image(terms)
            coordinates = [sum(row[cell] * entry for cell, entry in image.items()) for row in rows]
            outside = max(self.cells[cell][1] for cell, _ in terms)
            new.append((degrees.pop(), outside, {i: entry for i, entry in enumerate(coordinates) if entry}))
        within = [sum(1 for _, outside, _ in cells if not outside) for cells in (new, self.cells)]
        require(within[0] == within[1], "splitting", "A has a basis in the basis")
        found: dict[tuple[int, bytes], Shape] = {}
        for part in components(new):
            shape = shape_of([new[i] for i in part], {i: number for number, i in enumerate(part)})
            if shape[1] != 1 or shape[0] == KEEP:  # a twin with n = 1 is acyclic, and so is every block with it
                known = found.setdefault((shape[0], canonical(shape[1])), (shape[0], shape[1], {}))[2]
                known.update((shift, times + known.get(shift, 0)) for shift, times in shape[2].items())
        self.shapes = [found[key] for key in sorted(found)]
        require(len(self.shapes) <= len(DIGITS), "pair", "a pair has at most 36 different summands")


def components(cells: list[tuple[int, int, dict[int, int]]]) -> list[list[int]]:
    """Return the sets of cells that boundaries connect, each ascending, in the order of their first cells."""
    label = list(range(len(cells)))
    for i, (_, _, terms) in enumerate(cells):
        for j in terms:
            low, high = sorted((label[i], label[j]))
            label = [low if old == high else old for old in label]
    return [[i for i, own in enumerate(label) if own == first] for first in sorted(set(label))]


def shape_of(cells: list[tuple[int, int, dict[int, int]]], number: dict[int, int]) -> Shape:
    """Return what a summand with these cells does to its vertex."""
    low = min(degree for degree, _, _ in cells)
    if len(cells) == 1:
        return OUT if cells[0][1] else STAY, 0, {low: 1}
    if len(cells) == 2:
        (_, t, _), (_, e, terms) = sorted(cells, key=lambda cell: cell[0])
        return (KEEP if e > t else OUTER if t else INNER), abs(next(iter(terms.values()))), {low: 1}
    alphabet = tuple(
        (degree - low, outside, tuple(sorted((number[i], entry) for i, entry in terms.items())))
        for degree, outside, terms in cells
    )
    return KEEP, alphabet, {low: 1}


def raised(number: int) -> str:
    return str(number).translate(str.maketrans("0123456789", "⁰¹²³⁴⁵⁶⁷⁸⁹"))


def group_text(group: Group) -> str:
    rank = group[0]
    terms = ["ℤ" + (raised(rank) if rank > 1 else "")] if rank else []
    for order, count in sorted((group - Counter({0: rank})).items()):
        terms.append(f"ℤ/{order}" if count == 1 else f"(ℤ/{order}){raised(count)}")
    return " ⊕ ".join(terms) or "0"


# ---- the space: faces, blocks up to relabelling, cells of the whole product ------------------------------------------


def face_masks(statement: Statement, budget: Budget, whole: bool = False) -> Faces:
    """Return the faces of K as ascending bit masks, bit i for vertex i + 1, as far as their size matters, or all."""
    least = min((degree for pair in statement.pairs for degree, outside, _ in pair.cells if outside), default=1)
    longest = max(map(len, statement.facets))
    sizes = range(min(longest, longest if whole or not least else statement.top // least) + 1)
    masks: list[set[int]] = [set() for _ in sizes]
    for facet in statement.facets:
        for size in sizes[: len(facet) + 1]:
            budget.spend("cells", comb(len(facet), size) * (1 + statement.vertices // 64))
            masks[size].update(sum(1 << vertex - 1 for vertex in face) for face in combinations(facet, size))
    return tuple(tuple(sorted(found)) for found in masks)


def decide(faces: Faces, place: int, move: int) -> Faces:
    """Return what becomes of the faces when the vertex at `place` is decided; nothing if no face is left.

    STAY leaves the vertex out, and OUT passes to its link; the vertices above move down by one. INNER and OUTER do the
    same, but then put a new vertex there that lies in a face with every face. KEEP changes nothing.
    """
    bit = 1 << place
    below, above = bit - 1, -bit
    if move == KEEP:
        return faces
    if move in (OUT, OUTER):
        faces = tuple(tuple([mask ^ bit for mask in masks if mask & bit]) for masks in faces[1:])
    if move in (STAY, OUT):
        left = [tuple([mask & below | mask >> 1 & above for mask in masks if not mask & bit]) for masks in faces]
    else:
        chosen = [[mask for mask in masks if not mask & bit] for masks in faces]
        steps = zip([*chosen, []], [[], *chosen], strict=True)
        left = [tuple(sorted(same + [mask | bit for mask in fewer])) for same, fewer in steps]
    while left and not left[-1]:
        left.pop()
    return tuple(left)


def choose(tags: tuple[Tag, ...], faces: Faces, shape: Shape) -> tuple[tuple[Tag, ...], Faces]:
    """Return tags and faces after a choice for the next vertex.

    As long as there is a superfluous vertex among those that are kept, the first one is left out (Lemma C).
    """
    faces = decide(faces, len(tags), shape[0])
    tags = tags if shape[0] in (STAY, OUT) else (*tags, shape[1])
    place = 0
    while place < len(tags):
        if superfluous(faces, place, tags):
            tags, faces, place = tags[:place] + tags[place + 1 :], decide(faces, place, STAY), 0
        else:
            place += 1
    return tags, faces


def superfluous(faces: Faces, place: int, tags: tuple[Tag, ...]) -> bool:
    """Tell whether a vertex whose tag is a number is in no face, or another one with tag 1 completes all its faces."""
    if type(tags[place]) is not int:
        return False
    bit = 1 << place
    largest = next(filter(None, ([mask for mask in masks if mask & bit] for masks in reversed(faces))), None)
    if largest is None:
        return True
    common = reduce(and_, largest) ^ bit  # the largest faces cannot be completed, so they have the other vertex
    apexes = [1 << other for other, tag in enumerate(tags) if tag == 1 and common >> other & 1]
    around = [mask for masks in faces for mask in masks if mask & bit] if apexes else []
    return any(2 * sum(1 for mask in around if mask & apex) == len(around) for apex in apexes)


def block_classes(statement: Statement, budget: Budget) -> Iterator[Block]:
    """Yield the blocks, which are the choices of a summand for each vertex; equal ones together (Lemma D).

    Yields (name, tags, faces, shifts): the word of the first choice, a digit for each vertex; the tags of the vertices
    that are kept, and the complex on them; how many choices have which degree shift. The names ascend. Vertices are
    decided one after the other, and choices that lead to the same remaining complex are merged on the way; a level of
    more than BATCH faces is cut into runs that are finished one after the other.
    """
    pending: list[tuple[int, States]] = [(0, {((), face_masks(statement, budget)): ("", {0: 1})})]
    while pending:
        vertex, states = pending.pop()
        if vertex == statement.vertices:
            for (tags, faces), (name, shifts) in states.items():
                yield name, tags, faces, shifts
            continue
        level: States = {}
        for (tags, faces), (name, shifts) in states.items():
            budget.spend("cells", sum(map(len, faces)) + len(shifts))
            for digit, shape in zip(DIGITS, statement.pairs[vertex].shapes, strict=False):
                counts = convolved(shifts, shape[2], statement.top)
                state = choose(tags, faces, shape) if counts else (tags, ())
                if state[1]:
                    known = level.setdefault(state, (name + digit, {}))[1]
                    known.update((s, n + known.get(s, 0)) for s, n in counts.items())
        runs: list[States] = []
        room = 0
        for state, entry in level.items():
            size = sum(map(len, state[1]))
            room -= size
            if not runs or room < 0:
                runs.append({})
                room = BATCH - size
            runs[-1][state] = entry
        pending += [(vertex + 1, run) for run in reversed(runs)]


def convolved(shifts: dict[int, int], degrees: dict[int, int], top: int) -> dict[int, int]:
    """Return how many pairs of choices have which degree shift below `top`."""
    if degrees == {0: 1}:
        return shifts
    counts: Counter[int] = Counter()
    for shift, more in product(shifts, degrees):
        if shift + more < top:
            counts[shift + more] += shifts[shift] * degrees[more]
    return counts


def is_cone(faces: Faces, tags: tuple[Tag, ...], most: int) -> bool:
    """Tell whether some vertex with tag 1 lies with every face of less than `most` vertices in a face (Lemma C)."""
    candidates = -1
    if len(faces) <= most:  # no face of the largest size can be completed, so an apex lies in all of them
        candidates = reduce(and_, faces[-1])
    for vertex, tag in enumerate(tags):
        bit = 1 << vertex
        if candidates & bit and tag == 1:
            completed = sum(1 for masks in faces for mask in masks if mask & bit)
            if completed == sum(1 for masks in faces[:most] for mask in masks if not mask & bit):
                return True
    return False


class Space:
    """A based complex that was rebuilt from the statement: the cells of each degree in their order, and d of a cell.

    d is given as terms, which are different cells with their coefficients.
    """

    def __init__(self, cells: Sequence[Sequence[Any]], d: Callable[[Any], list[tuple[Any, int]]]) -> None:
        self.cells, self.d = cells, d
        self.index = [{cell: number for number, cell in enumerate(degree)} for degree in cells]
        self.sizes = [len(degree) for degree in cells]
        self.watched = -1  # the degree whose basis is kept for reading coordinates
        self.stairs: Staircase  # of the degree that is watched, after a proof

    def boundary(self, degree: int, vector: Vector) -> Vector:
        """Return d of a vector of this degree."""
        total: dict[Any, int] = {}
        for number, coefficient in vector:
            for cell, entry in self.d(self.cells[degree][number]):
                total[cell] = total.get(cell, 0) + coefficient * entry
        below = self.index[degree - 1]
        return sorted((below[cell], coefficient) for cell, coefficient in total.items() if coefficient)

    def leads(self, degree: int, numbers: list[int]) -> list[int]:
        """Return the last cell in d of each of these cells, where d must have ±1."""
        cells, below = self.cells[degree], self.index[degree - 1]
        last = [max(((below[cell], entry) for cell, entry in self.d(cells[n])), default=(0, 0)) for n in numbers]
        require(all(entry in (1, -1) for _, entry in last), "boundary", "d of a matched cell does not end in ±1")
        return [number for number, _ in last]


class Simplices(Space):
    """The augmented chain complex of a simplicial complex with an integer for each vertex: d e = n t at each vertex.

    Degree k is spanned by the faces of k vertices.
    """

    def __init__(self, faces: Faces, weights: Sequence[int]) -> None:
        super().__init__(faces, self.facets)
        self.weights = weights

    def facets(self, mask: int) -> list[tuple[int, int]]:
        """Return d of a face: alternating signs, + where the first vertex is left out, times the vertex's integer."""
        terms, rest, sign = [], mask, 1
        while rest:
            bit = rest & -rest
            terms.append((mask ^ bit, sign * self.weights[bit.bit_length() - 1]))
            sign = -sign
            rest ^= bit
        return terms

    def leads(self, degree: int, numbers: list[int]) -> list[int]:
        if any(weight != 1 for weight in self.weights):
            return super().leads(degree, numbers)
        masks, below = self.cells[degree], self.index[degree - 1]
        return [below[masks[number] & masks[number] - 1] for number in numbers]  # leaving out the first vertex


class Words(Space):
    """The tensor product of the cells at each vertex, where the vertices with a cell outside A form a face.

    Cells are words with a letter for each vertex. They are ordered by the mask of that face, then as words.
    """

    def __init__(self, faces: Faces, alphabets: Sequence[Alphabet], top: int, budget: Budget) -> None:
        known = set().union(*faces)
        self.alphabets = alphabets
        words = [(0, b"", 0)]
        for place, alphabet in enumerate(alphabets):
            letters = [(LETTERS[i], outside << place, degree) for i, (degree, outside, _) in enumerate(alphabet)]
            budget.spend("cells", len(words) * len(letters))
            grown = ((mask | bit, word + letter, d + more) for mask, word, d in words for letter, bit, more in letters)
            words = [(mask, word, degree) for mask, word, degree in grown if degree <= top and mask in known]
        longest = max((degree for _, _, degree in words), default=-1)
        budget.spend("cells", longest + 1)
        cells: list[list[bytes]] = [[] for _ in range(longest + 1)]
        for _, word, degree in sorted(words):
            cells[degree].append(word)
        super().__init__(cells, lru_cache(1 << 14)(self.leibniz))  # a cell occurs in several vectors, mostly soon

    def leibniz(self, word: bytes) -> list[tuple[bytes, int]]:
        """Return d of a word, with the sign of the degrees of the letters before."""
        terms, sign = [], 1
        for place, letter in enumerate(word):
            degree, _, boundary = self.alphabets[place][letter]
            for i, entry in boundary:
                terms.append((word[:place] + LETTERS[i] + word[place + 1 :], sign * entry))
            if degree & 1:
                sign = -sign
        return terms


class Chambers(Space):
    """The cellular chain complex of a real toric space: a chamber for each value of λ, glued along mirrors.

    A cell is a face with a value g of λ; (face, g) and (face, g + λ_i) for a vertex i of the face are the same cell
    with opposite orientations. The one with no bit of g among the pivots of the face stands for all of them.
    """

    def __init__(self, statement: Statement, budget: Budget) -> None:
        rows, vertices = statement.rows, range(statement.vertices)
        self.columns = [sum(1 << n for n, row in enumerate(rows) if row[vertex] == "1") for vertex in vertices]
        values = [0]
        for column in self.columns:
            budget.spend("cells", len(values))
            values += [value ^ column for value in values] if column not in values else []
        values.sort()
        for facet in statement.facets:  # also where faces as large as this do not matter for the homology
            self.reduced(sum(1 << vertex - 1 for vertex in facet))
        self.pivots: dict[int, list[tuple[int, int, int]]] = {}
        cells: list[list[tuple[int, int]]] = []
        for size, masks in enumerate(face_masks(statement, budget)):
            cells.append([])
            budget.spend("cells", len(masks) * (len(values) >> size))
            for mask in masks:
                self.pivots[mask] = self.reduced(mask)
                bits = sum(pivot for pivot, _, _ in self.pivots[mask])
                cells[-1] += [(mask, value) for value in values if not value & bits]
        super().__init__(cells[: statement.top + 1], self.mirrors)

    def reduced(self, mask: int) -> list[tuple[int, int, int]]:
        """Return a basis of the λ_i of a face, (pivot bit, vector, sign), each pivot in one vector only."""
        basis: list[tuple[int, int, int]] = []
        for vertex, column in enumerate(self.columns):
            if mask >> vertex & 1:
                value, sign = column, -1
                for pivot, vector, parity in basis:
                    if value & pivot:
                        value, sign = value ^ vector, sign * parity
                require(value != 0, "not-injective", f"λ is not injective on a face with vertex {vertex + 1}")
                bit = value & -value
                basis = [(p, v ^ value, s * sign) if v & bit else (p, v, s) for p, v, s in basis] + [(bit, value, sign)]
        return basis

    def mirrors(self, cell: tuple[int, int]) -> list[tuple[tuple[int, int], int]]:
        """Return d of a cell: at each vertex of the face, with alternating signs, the end at g + λ_i minus g."""
        mask, value = cell
        terms, sign = [], 1
        for vertex, column in enumerate(self.columns):
            if mask >> vertex & 1:
                face = mask ^ 1 << vertex
                for g, orientation in ((value ^ column, sign), (value, -sign)):
                    used = [(vector, parity) for pivot, vector, parity in self.pivots[face] if g & pivot]
                    end = reduce(xor, (vector for vector, _ in used), g)
                    terms.append(((face, end), orientation * prod(parity for _, parity in used)))
                sign = -sign
        return terms


# ---- the proof: Lemma A and Lemma B ----------------------------------------------------------------------------------


def vector(value: object, size: int, budget: Budget) -> Vector:
    """Return a sparse vector, read from the list of its cells and coefficients in turn, cells ascending."""
    flat = sequence(value)
    require(bool(flat) and not len(flat) % 2, "vector", "a vector lists cells and coefficients in turn")
    terms = []
    last = -1
    for cell, given in zip(flat[::2], flat[1::2], strict=True):
        coefficient = given if type(given) is int and -LARGEST <= given <= LARGEST else integer(given, budget)
        if type(cell) is not int or not last < cell < size or not coefficient:
            raise Failure(
                "vector", f"cells from 0 to {size - 1} are expected, ascending, with coefficients other than 0"
            )
        terms.append((cell, coefficient))
        last = cell
    return terms


def homology(space: Space, basis: object, budget: Budget) -> list[tuple[int, list[int]]]:
    """Return rank and orders of cyclic summands of H_k for each degree k, proved by an adapted basis (Lemma A)."""
    entries = sequence(basis)
    require(len(entries) == len(space.sizes), "degrees", f"a basis in each of {len(space.sizes)} degrees is expected")
    groups: list[tuple[int, list[int]]] = []
    above: tuple[list[int], list[Vector], list[int]] = ([], [], [])  # matched cells; the b, and the e > 1, of pairs
    for degree in reversed(range(len(space.sizes))):
        size = space.sizes[degree]
        entry = record(entries[degree], (), ("cycles", "groups", "matched", "order", "pairs"))
        require(all(map(sequence, entry.values())), "shape", "an empty list is written by leaving out its key")
        matched = numbers(entry["matched"], 0, size) if "matched" in entry else []
        pairs = [read_pair(sequence(pair), degree, space, budget) for pair in sequence(entry.get("pairs", []))]
        require(degree > 0 or not (matched or pairs), "boundary", "degree 0 has a pair, but nothing is below it")
        cycles = [vector(cycle, size, budget) for cycle in sequence(entry.get("cycles", []))]
        closed = degree == 0 or not any(space.boundary(degree, cycle) for cycle in cycles)
        require(closed, "cycle", "a vector listed as a cycle has a boundary")
        vectors = [a for a, _, _ in pairs] + cycles
        matched_above, boundaries, orders = above
        require("order" in entry or "groups" not in entry, "order", "groups need an order")
        if "order" in entry or degree == space.watched:
            family = [[(cell, 1)] for cell in matched] + vectors
            family += [space.boundary(degree + 1, [(cell, 1)]) for cell in matched_above] + boundaries
            first = len(matched) + len(pairs)
            stairs = Staircase(family, range(first, first + len(cycles)), entry, size, budget)
            if degree == space.watched:
                space.stairs = stairs
        else:
            leads = matched + (space.leads(degree + 1, matched_above) if matched_above else [])
            check_natural(size, leads, vectors + boundaries)
        groups.append((len(cycles), orders))
        above = (matched, [b for _, _, b in pairs], [e for _, e, _ in pairs if e > 1])
        budget.spend("cells", size)
    return groups[::-1]


def read_pair(value: list[object], degree: int, space: Space, budget: Budget) -> tuple[Vector, int, Vector]:
    """Return a, e, b with d a = e b; where e is 1 only a is written, and b is d a."""
    require(len(value) in (1, 3), "shape", "a pair is [a], or [a, e, b]")
    a = vector(value[0], space.sizes[degree], budget)
    image = space.boundary(degree, a) if degree else []
    if len(value) == 1:
        return a, 1, image
    e = integer(value[1], budget)
    require(e > 1, "torsion", "the e of a pair that lists its b is at least 2")
    b = vector(value[2], space.sizes[degree - 1] if degree else 0, budget)
    multiple = [(cell, e * coefficient) for cell, coefficient in b]
    require(image == multiple, "boundary", "d a is not e b for a pair")
    return a, e, b


def check_natural(size: int, leads: list[int], vectors: list[Vector]) -> None:
    """Require a basis of Z^size in which the largest cells of all vectors differ and carry ±1 (Lemma B).

    `leads` are the largest cells of those vectors for which the coefficient is known to be ±1 by construction.
    """
    units = all(terms and terms[-1][1] in (1, -1) for terms in vectors)
    require(units, "basis", "a vector is zero, or its coefficient on its largest cell is not ±1")
    found = leads + [terms[-1][0] for terms in vectors]
    each_once = len(found) == size == len(set(found))
    require(each_once, "basis", "the vectors do not lead each cell once")


class Staircase:
    """A basis of Z^size in staircase form for the order and groups given, or for the natural order (Lemma B)."""

    def __init__(
        self, family: list[Vector], cycles: range, entry: dict[str, object], size: int, budget: Budget
    ) -> None:
        self.family, self.cycles = family, cycles  # the vectors, and which of them are the cycles
        given = sequence(entry.get("order", [*range(size)][::-1]))
        self.order = [cell for cell in given if type(cell) is int]
        whole = len(self.order) == len(given) and sorted(self.order) == [*range(size)]
        require(whole, "order", "the order must list every cell once")
        require(len(family) == size and all(family), "basis", f"{size} vectors other than zero are expected")
        self.place = {cell: n for n, cell in enumerate(self.order)}
        self.led: dict[int, tuple[list[int], list[int], list[list[int]]]] = {}  # cells, their vectors, the inverse
        groups = []
        for value in sequence(entry.get("groups", [])):
            group = record(value, ("cells", "inverse"))
            cells = [cell for cell in sequence(group["cells"]) if type(cell) is int and cell in self.place]
            start = self.place[cells[0]] if cells else 0
            run = len(cells) > 1 and cells == group["cells"] == self.order[start : start + len(cells)]
            require(run, "group", "a group has two cells or more, as they follow one another in the order")
            require(not any(cell in self.led for cell in cells), "group", "a cell is in two groups")
            self.led.update(dict.fromkeys(cells, (cells, [], [])))
            groups.append((cells[0], group["inverse"]))
        for number, terms in enumerate(family):
            cell, coefficient = min(terms, key=lambda term: self.place[term[0]])
            cells, leading, _ = self.led.setdefault(cell, ([cell], [], [[coefficient]]))
            leading.append(number)
            fit = len(cells) > 1 or (len(leading) == 1 and coefficient in (1, -1))
            require(fit, "basis", f"cell {cell} leads two vectors, or one with a coefficient that is not ±1")
        for first, inverse in groups:
            cells, leading, rows = self.led[first]
            rows += check_inverse(cells, [dict(family[number]) for number in leading], inverse, budget)

    def coordinates(self, terms: Iterable[tuple[int, int]]) -> list[int]:
        """Return the coordinates of a vector at the cycles."""
        rest = dict(terms)
        found = dict.fromkeys(self.cycles, 0)
        waiting = [self.place[cell] for cell in rest]
        heapify(waiting)
        while waiting:
            cell = self.order[heappop(waiting)]
            if rest.get(cell, 0):
                cells, numbers, rows = self.led[cell]
                for number, row in zip(numbers, rows, strict=True):
                    found[number] = sum(x * rest.get(c, 0) for x, c in zip(row, cells, strict=True))
                for c, x in ((c, found[number] * x) for number in numbers for c, x in self.family[number]):
                    rest[c] = rest.get(c, 0) - x
                    heappush(waiting, self.place[c])
        return [found[number] for number in self.cycles]


def check_inverse(cells: list[int], vectors: list[dict[int, int]], inverse: object, budget: Budget) -> list[list[int]]:
    """Return the inverse of the square matrix with a row for each cell and a column for each vector, after a check."""
    rows = [[integer(entry, budget) for entry in sequence(row)] for row in sequence(inverse)]
    square = len(vectors) == len(cells) == len(rows) and all(len(row) == len(cells) for row in rows)
    require(square, "group", f"{len(cells)} vectors and the inverse of their square matrix are expected")
    place = {cell: n for n, cell in enumerate(cells)}
    columns = [[(place[cell], entry) for cell, entry in member.items() if cell in place] for member in vectors]
    for i, row in enumerate(rows):
        budget.spend("cells", len(cells))
        for j, column in enumerate(columns):
            product = sum(row[n] * entry for n, entry in column)
            require(product == (i == j), "group", "what is given as an inverse is not the inverse")
    return rows


# ---- the claim -------------------------------------------------------------------------------------------------------


def add(total: Total, groups: list[tuple[int, list[int]]], shift: int, times: int) -> None:
    """Add groups by degree to a total, shifted, so many times."""
    for degree, (rank, orders) in enumerate(groups, shift):
        if rank or orders:
            put(total, (degree,), rank, orders, times)


def put(total: Total, key: Key, rank: int, orders: list[int], times: int = 1) -> None:
    """Add a group to a total, so many times."""
    group = total.setdefault(key, Counter())
    for order, count in ((0, rank), *((order, 1) for order in orders)):
        group[order] += count * times


def invariant_factors(group: Group) -> Group:
    """Return the same group with torsion orders that divide one another, by Z/a + Z/b = Z/gcd + Z/lcm, many at once."""
    counts = +group
    while clash := next(((a, b) for a, b in combinations(sorted(counts), 2) if a and b % a), None):
        times = min(counts[order] for order in clash)
        counts += Counter({gcd(*clash): times, lcm(*clash): times})
        counts -= Counter(dict.fromkeys(clash, times))
        counts -= Counter({1: counts[1]})
    return counts


def spelled(number: int) -> int | str:
    """Return an integer as a certificate spells it."""
    return number if -LARGEST <= number <= LARGEST else str(number)


def stated_groups(statement: Statement, total: Total) -> Proved:
    """Return groups, in the degrees of the claim, as a statement holds them and in words."""
    spoken_of = None if statement.degrees is None else set(statement.degrees)
    groups = {key: invariant_factors(total[key]) for key in sorted(total) if spoken_of is None or key[0] in spoken_of}
    stated = []
    for key, group in groups.items():
        few = group.total() - group[0] <= 10**6
        require(few, "limit", "more than 10^6 torsion summands in one degree cannot be written out")
        torsion = [spelled(order) for order in sorted(group) if order for _ in range(group[order])]
        if group:
            stated.append([*map(spelled, key), spelled(group[0]), torsion])
    space, kept, out = statement.space(), *(",".join(map(str, v)) for v in (statement.kept, statement.out))
    head, rest, of = {
        "homology": ("H_{}", "H_k = 0 for all other k", f"({space}; ℤ)"),
        "smash": ("H̃_{}", "H̃_k = 0 for all other k", f"(polyhedral smash product of {space[:-2]} over K; ℤ)"),
        "real-toric": ("H_{}", "H_k = 0 for all other k", "((D¹,S⁰)^K / ker λ; ℤ)"),
        "tor": ("Tor_{},{}", "Tor_i,2j = 0 for all other i, j", "(ℤ[K], ℤ)"),
        "summand": ("H̃_{}", "H̃_q = 0 for all other q", f"((link of {{{out}}} in K) restricted to {{{kept}}}; ℤ)"),
        "table": ("H̃_{1}(K_{0}; ℤ)", "H̃_q(K_I; ℤ) = 0 for all other q and I", ""),
        "fixed-set": ("H_{}", "H_k = 0 for all other k", f"(points of {space} fixed by G; ℤ)"),
        "orbit-space": ("H_{}", "H_k = 0 for all other k", f"({space} / G; ℤ)"),
    }[statement.kind]
    parts: list[str] = []
    for key in sorted(key for key in groups if groups[key]) if spoken_of is None else [(k,) for k in sorted(spoken_of)]:
        shown: list[object] = list(key)
        if statement.kind == "tor":
            shown[1] = 2 * key[1]
        if statement.kind == "table":
            shown[0] = "{" + ",".join(str(i + 1) for i in range(statement.vertices) if key[0] >> i & 1) + "}"
        parts.append(f"{head.format(*shown)}{'' if parts else of} ≅ {group_text(groups.get(key, Counter()))}")
    if spoken_of is None:
        parts.append(rest if parts else rest.replace(" = 0 for all other", f"{of} = 0 for all"))
    return {"groups": stated}, ", ".join(parts) + (statement.manifold(groups) if statement.kind == "real-toric" else "")


def find_summands(statement: Statement, lines: Lines, budget: Budget) -> None:
    """Read the splitting of the pairs that are given by their cells; prepare a smash product."""
    unsplit = {pair.text: pair for pair in statement.pairs if type(pair.raw) is not str}
    if unsplit:
        require(statement.kind != "smash", "pair", "a smash product is known of pairs with names only")
        proofs = sequence(record(lines.next(), ("splitting",))["splitting"])
        require(len(proofs) == len(unsplit), "splitting", f"{len(unsplit)} pairs need a splitting")
        for pair, proof in zip(unsplit.values(), proofs, strict=True):
            pair.split(proof, budget)
    for pair in statement.pairs:
        pair.shapes = unsplit.get(pair.text, pair).shapes
        if statement.kind == "smash":  # the first summand of a pair with a name is its base point
            pair.shapes = pair.shapes[1:]


def block_homology(block: Block, top: int, lines: Lines, budget: Budget) -> list[tuple[int, list[int]]]:
    """Check the record of a block, unless it is a cone, and return rank and orders by degree before the shift."""
    name, tags, all_faces, shifts = block
    weights = [tag for tag in tags if type(tag) is int]
    simple = len(weights) == len(tags)
    most = top - min(shifts) if simple else LARGEST
    faces = all_faces[: most + 1]
    if is_cone(faces, tags, most):
        return []
    value = record(lines.next(), ("basis", "block"))
    require(value["block"] == name, "block", f"the record of block {name} is expected here")
    if simple:
        return homology(Simplices(faces, weights), value["basis"], budget)
    alphabets = [((0, 0, ()), (1, 1, ((0, tag),))) if isinstance(tag, int) else tag for tag in tags]
    return homology(Words(faces, alphabets, top - min(shifts), budget), value["basis"], budget)


def prove_by_blocks(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Check one record for each class of blocks that is no cone, and return the total (stable splitting)."""
    find_summands(statement, lines, budget)
    return stated_groups(statement, sum_of_blocks(statement, lines, budget))


def sum_of_blocks(statement: Statement, lines: Lines, budget: Budget) -> Total:
    total: Total = {}
    for block in block_classes(statement, budget):
        groups = block_homology(block, statement.top, lines, budget)
        for shift, times in block[3].items():
            add(total, groups, shift, times)
    return total


class Choices:
    """The blocks one by one, for words in ascending order: what two words in turn have in common is decided once."""

    def __init__(self, statement: Statement, budget: Budget) -> None:
        self.pairs, self.top = statement.pairs, statement.top
        self.steps: dict[object, tuple[tuple[Tag, ...], Faces]] = {}  # what choices lead to, for at most BATCH faces
        self.room = BATCH
        self.path: list[Block] = [("", (), face_masks(statement, budget), {0: 1})]

    def block(self, word: str) -> Block:
        """Return the block of a word, without faces where the word chooses a non-face."""
        while not word.startswith(self.path[-1][0]):
            self.path.pop()
        for vertex in range(len(self.path) - 1, len(word)):
            shape = self.pairs[vertex].shapes[DIGITS.index(word[vertex])]
            _, tags, faces, shifts = self.path[-1]
            key = (tags, faces, shape[:2])
            if key not in self.steps:
                self.room -= sum(map(len, faces))
                if self.room < 0:
                    self.steps, self.room = {}, BATCH
                self.steps[key] = choose(tags, faces, shape) if faces else (tags, ())
            self.path.append((word[: vertex + 1], *self.steps[key], convolved(shifts, shape[2], self.top)))
        return self.path[-1]


def prove_by_orbits(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Check one record for each orbit of a group of symmetries on the blocks, equal ones only once (Lemma D).

    Words are numbers with a digit for each vertex, the first vertex first. A permutation moves digits, so its value on
    a word is a sum over parts of the word, which are tabulated.
    """
    total: Total = {}
    find_summands(statement, lines, budget)
    m, base = statement.vertices, max((len(pair.shapes) for pair in statement.pairs), default=1)
    budget.spend("cells", base**m)
    tables, part = [], 1
    while base ** (part + 1) <= 1024 and part < m:
        part += 1
    for value in sequence(record(lines.next(), ("generators",))["generators"]):
        generator = read_element(value, statement)
        budget.spend("cells", base**m // 8)
        weights = [
            base ** (m - abs(to)) for to in reversed(generator)
        ]  # of the digits of a word, the last vertex first
        tables.append([spread(weights[start : start + part], base) for start in range(0, m, part)])
    seen, choices, room = bytearray(base**m), Choices(statement, budget), BATCH
    known: dict[tuple[tuple[Tag, ...], Faces, int], list[tuple[int, list[int]]]] = {}
    position = seen.find(0)
    while position >= 0:
        orbit = [position]
        seen[position] = 1
        for number in orbit:
            for table in tables:
                rest, image_number = number, 0
                for values in table:
                    rest, digits = divmod(rest, len(values))
                    image_number += values[digits]
                if not seen[image_number]:
                    seen[image_number] = 1
                    orbit.append(image_number)
        word = "".join(DIGITS[position // base ** (m - 1 - vertex) % base] for vertex in range(m))
        if all(DIGITS.index(digit) < len(pair.shapes) for digit, pair in zip(word, statement.pairs, strict=True)):
            block = choices.block(word)
            size = sum(map(len, block[2]))
            if block[2] and block[3]:
                key = (block[1], block[2], min(block[3]) if statement.degrees else 0)
                if key not in known:
                    budget.spend("cells", size)
                    room -= size
                    if room < 0:
                        known, room = {}, BATCH - size
                    known[key] = block_homology(block, statement.top, lines, budget)
                for shift, times in block[3].items():
                    add(total, known[key], shift, times * len(orbit))
        position = seen.find(0, position)
    return stated_groups(statement, total)


def spread(weights: Sequence[int], base: int) -> list[int]:
    """Return for each number with these many digits the sum of its digits times their weights, last digit first."""
    values = [0]
    for weight in weights:
        values = [value + digit * weight for digit in range(base) for value in values]
    return values


def prove_tor(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Return Tor of the face ring by bidegree (i, j), j = |I|: cohomology of K_I in degree j - i - 1 (Hochster)."""
    total: Total = {}
    statement.pairs = [Pair("(D2, S1)", budget)] * statement.vertices  # the shift of a block is |I|
    for block in block_classes(statement, budget):
        groups = block_homology(block, statement.top, lines, budget)
        for (j, times), (k, (rank, orders)) in product(block[3].items(), enumerate(groups)):
            put(total, (j - k, j), rank, [], times)
            put(total, (j - k - 1, j), 0, orders, times)
    return stated_groups(statement, total)


def prove_table(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Return the reduced homology of each full subcomplex K_I, under the bit mask of I and the degree."""
    total: Total = {}
    groups = {}
    for block in block_classes(statement, budget):
        groups[block[1:3]] = block_homology(block, statement.top, lines, budget)
    choices, m = Choices(statement, budget), statement.vertices
    budget.spend("cells", 1 << m)
    for number in range(1 << m):
        word = f"{number:0{m}b}" if m else ""
        for k, (rank, orders) in enumerate(groups[choices.block(word)[1:3]]):
            put(total, (int(word[::-1] or "0", 2), k - 1), rank, orders)
    return stated_groups(statement, total)


def prove_whole(
    space_of: Callable[[Statement, Budget], Space], statement: Statement, lines: Lines, budget: Budget
) -> Proved:
    """Check the one record of a complex that is rebuilt from the statement, and return its homology."""
    total: Total = {}
    groups = homology(space_of(statement, budget), record(lines.next(), ("basis",))["basis"], budget)
    add(total, groups, -1 if statement.kind == "summand" else 0, 1)
    return stated_groups(statement, total)


def whole_product(statement: Statement, budget: Budget) -> Words:
    alphabets = [tuple(pair.cells) for pair in statement.pairs]
    return Words(face_masks(statement, budget), alphabets, statement.top, budget)


def link_part(statement: Statement, budget: Budget) -> Simplices:
    """Return the augmented chain complex of the link of a face, restricted to the vertices that are kept."""
    faces = face_masks(statement, budget)
    place = 0
    for vertex in range(1, statement.vertices + 1):
        move = KEEP if vertex in statement.kept else OUT if vertex in statement.out else STAY
        faces = decide(faces, place, move) if faces else ()
        place += move == KEEP
    require(bool(faces), "statement", "the vertices that are out form no face")
    return Simplices(faces, [1] * place)


# ---- symmetry: groups, characters, fixed sets, orbit spaces, surfaces, counts ----------------------------------------


def read_element(value: object, statement: Statement) -> Element:
    """Return a signed permutation that preserves K and the pairs."""
    image = [entry for entry in sequence(value) if type(entry) is int]
    permutes = image == value and sorted(map(abs, image)) == list(range(1, statement.vertices + 1))
    require(permutes, "symmetry", "an element lists the image of each vertex, negative where a sign changes")
    moved = sorted(sorted(abs(image[vertex - 1]) for vertex in facet) for facet in statement.facets)
    pairs = [statement.pairs[abs(to) - 1].text for to in image] == [pair.text for pair in statement.pairs]
    signs = all(to > 0 or pair.raw == "(D1, S0)" for to, pair in zip(image, statement.pairs, strict=True))
    require(moved == statement.facets and pairs and signs, "symmetry", "an element preserves K and the pairs")
    return tuple(image)


def after(second: Element, first: Element) -> Element:
    return tuple(second[to - 1] if to > 0 else -second[-to - 1] for to in first)


def inverse_of(element: Element) -> Element:
    back = sorted((abs(to), place if to > 0 else -place) for place, to in enumerate(element, 1))
    return tuple(place for _, place in back)


def orbit(start: Any, moves: Callable[[Any], Iterable[Any]]) -> list[Any]:
    """Return everything that moves lead to."""
    found = {start: None}
    order = [start]
    for point in order:
        for image in moves(point):
            if image not in found:
                found[image] = None
                order.append(image)
    return order


def group_of(statement: Statement, budget: Budget) -> list[Element]:
    """Return all elements of the group that the generators generate."""
    reached: list[Element] = []

    def images(element: Element) -> list[Element]:
        reached.append(element)
        more = budget.left["cells"] >= statement.vertices
        require(more, "limit", f"the group has more than {len(reached)} elements; raise --max-cells")
        budget.spend("cells", statement.vertices)
        return [after(generator, element) for generator in statement.generators]

    return orbit(tuple(range(1, statement.vertices + 1)), images)


def full_group(statement: Statement, budget: Budget) -> tuple[int, list[Element]]:
    """Return the order of the group of automorphisms of K and the pairs, and generators.

    The order is the product of the sizes of the orbits of each vertex under those that fix the vertices before it; an
    automorphism with given first images is looked for by trying all, face by face.
    """
    masks = {face for level in face_masks(statement, budget, whole=True) for face in level}
    m = statement.vertices
    ending = [[face for face in masks if face.bit_length() == vertex + 1] for vertex in range(m)]
    marks = [
        (pair.text, sorted(Counter(face.bit_count() for face in masks if face >> vertex & 1).items()))
        for vertex, pair in enumerate(statement.pairs)
    ]

    def extended(image: list[int]) -> list[int] | None:
        budget.spend("cells", 1 + m // 16)
        if image:
            last = len(image) - 1
            moved = (sum(1 << image[v] for v in range(m) if face >> v & 1) for face in ending[last])
            if marks[last] != marks[image[last]] or not all(face in masks for face in moved):
                return None
        if len(image) == m:
            return image
        trials = (extended([*image, to]) for to in range(m) if to not in image)
        return next((found for found in trials if found), None)

    order, generators = 1, []
    for vertex in range(m):
        found = [image for to in range(vertex, m) if (image := extended([*range(vertex), to]))]
        order *= len(found)
        generators += [tuple(to + 1 for to in image) for image in found if image[vertex] != vertex]
    return order, generators


def cycles_of(element: Element) -> list[list[int]]:
    """Return the cycles on the vertices, in the order of their first members."""
    found = [orbit(vertex, lambda v: [abs(element[v - 1])]) for vertex in range(1, len(element) + 1)]
    return [cycle for cycle in found if cycle[0] == min(cycle)]


def cycles_text(elements: Iterable[Element]) -> str:
    """Write signed permutations as cycles; a minus sign where a coordinate changes sign on the way to this vertex."""
    texts = []
    for element in elements:
        text = ""
        for cycle in cycles_of(element):
            signed = [str(element[vertex - 1]) for vertex in cycle[-1:] + cycle[:-1]]
            text += f"({' '.join(signed)})" if len(cycle) > 1 or signed[0][0] == "-" else ""
        texts.append(text or "()")
    return ", ".join(texts)


def prove_automorphisms(statement: Statement, _: Lines, budget: Budget) -> Proved:
    """Return the order of a group of automorphisms, and its orbits on vertices, faces by size, and sets of vertices."""
    order, generators = statement.order or len(group_of(statement, budget)), statement.generators

    def count(masks: Iterable[int]) -> int:
        left, orbits = set(masks), 0
        budget.spend("cells", len(left) * (1 + len(generators)))
        while left:
            left -= set(orbit(next(iter(left)), lambda mask: [moved(mask, element) for element in generators]))
            orbits += 1
        return orbits

    faces = [count(level) for level in face_masks(statement, budget)]
    vertices = count(1 << vertex for vertex in range(statement.vertices))
    subsets = count(range(1 << statement.vertices)) if statement.vertices <= 16 else None
    answer: dict[str, object] = {
        "order": spelled(order),
        "orbits": {"faces": faces, "subsets": subsets, "vertices": vertices},
    }
    sets = "" if subsets is None else f", {subsets} on sets of vertices"
    by_size = ", ".join(map(str, faces))
    return answer, f"G has order {order}; its orbits are {vertices} on vertices, {by_size} on faces by size{sets}"


def moved(mask: int, element: Element) -> int:
    return sum(1 << abs(to) - 1 for vertex, to in enumerate(element) if mask >> vertex & 1)


def act(word: bytes, element: Element, alphabets: Sequence[Alphabet]) -> tuple[bytes, int]:
    """Return the image of a cell, with its sign: odd letters move past each other, and a change of sign turns them."""
    sign = 1
    odd: list[int] = []
    for to, letter, alphabet in zip(element, word, alphabets, strict=True):
        if alphabet[letter][0] & 1:
            flips = sum(1 for other in odd if other > abs(to)) + (to < 0)
            sign *= -1 if flips & 1 else 1
            odd.append(abs(to))
    return placed(word, element), sign


def placed(word: bytes, element: Element) -> bytes:
    """Return the word in which the letters have moved; a change of sign swaps the ends of an interval."""
    image = bytearray(len(word))
    for to, letter in zip(element, word, strict=True):
        image[abs(to) - 1] = letter if to > 0 else (1, 0, 2)[letter]
    return bytes(image)


def matrix_of(space: Words, element: Element, alphabets: Sequence[Alphabet]) -> list[list[int]]:
    """Return the columns of the matrix of an element on homology modulo torsion, in the cycles of the basis."""
    columns = []
    for number in space.stairs.cycles:
        image: Counter[int] = Counter()
        for cell, coefficient in space.stairs.family[number]:
            word, sign = act(space.cells[space.watched][cell], element, alphabets)
            image[space.index[space.watched][word]] += sign * coefficient
        columns.append(space.stairs.coordinates(image.items()))
    return columns


def trace(columns: list[list[int]]) -> int:
    return sum(column[i] for i, column in enumerate(columns))


def watched_words(
    faces: Faces, alphabets: Sequence[Alphabet], degree: int, lines: Lines, budget: Budget, block: str | None = None
) -> Words | None:
    """Check the record of a product of cells, and return it with its basis in this degree, if it has cells there."""
    space = Words(faces, alphabets, degree + 1, budget)
    if len(space.cells) <= degree or not space.cells[degree]:
        return None
    space.watched = degree
    value = record(lines.next(), ("basis",) if block is None else ("basis", "block"))
    require(value.get("block") == block, "block", f"the record of block {block} is expected here")
    homology(space, value["basis"], budget)
    return space


def traces_by_cells(statement: Statement, elements: list[Element], lines: Lines, budget: Budget) -> list[int]:
    """Return the traces of elements on the homology of the whole product."""
    require(statement.value.get("summands") is None, "statement", "single summands have the route blocks only")
    alphabets = [tuple(pair.cells) for pair in statement.pairs]
    space = watched_words(face_masks(statement, budget), alphabets, statement.degree, lines, budget)
    return [trace(matrix_of(space, element, alphabets)) if space else 0 for element in elements]


def traces_by_blocks(statement: Statement, elements: list[Element], lines: Lines, budget: Budget) -> list[int]:
    """Return the traces of elements on the blocks, all of them or those of the orbits of some words."""
    find_summands(statement, lines, budget)
    faces = face_masks(statement, budget)
    chosen = None
    if statement.value.get("summands") is not None:
        words = sequence(statement.value["summands"])
        word_form = "".join(f"[{DIGITS[: len(pair.shapes)]}]" for pair in statement.pairs)
        fit = all(type(word) is str and re.fullmatch(word_form, word) for word in words)
        require(bool(words) and fit, "statement", "summands are words with a digit for each vertex")
        plain = all(to > 0 for generator in statement.generators for to in generator)
        require(plain, "symmetry", "a change of sign preserves no single summand")
        by = [inverse_of(generator) for generator in statement.generators]
        moved_words = (orbit(word, lambda w: ["".join(w[v - 1] for v in back) for back in by]) for word in words)
        chosen = {word for reached in moved_words for word in reached}
    traces = []
    for element in elements:
        if chosen is None and element == tuple(range(1, statement.vertices + 1)):
            total = sum_of_blocks(statement, lines, budget)
            traces.append(total.get((statement.degree,), Counter())[0])
        else:
            traces.append(trace_by_blocks(statement, element, faces, chosen, lines, budget))
    return traces


def traces_both_ways(statement: Statement, elements: list[Element], lines: Lines, budget: Budget) -> list[int]:
    """Return the traces of elements on the summands, after checking that they are those on the whole product."""
    plain = all(to > 0 for generator in statement.generators for to in generator)
    require(plain, "symmetry", "the splitting does not respect a change of sign")
    by_blocks = traces_by_blocks(statement, elements, lines, budget)
    same = traces_by_cells(statement, elements, lines, budget) == by_blocks
    require(same, "false", "the traces on the whole product are not those on its summands")
    return by_blocks


def trace_by_blocks(
    statement: Statement, element: Element, faces: Faces, chosen: set[str] | None, lines: Lines, budget: Budget
) -> int:
    """Return the trace of an element: only blocks that it maps to themselves count (docs/mathematics.md, 12.3).

    The vertices of a cycle must choose the same summand, and the same copy of it. On the block of a word an element
    permutes letters; a change of sign acts on it, up to smaller blocks, as -1 for each interval that is kept.
    """
    cycles = [[vertex - 1 for vertex in cycle] for cycle in cycles_of(element)]
    options = []
    for cycle in cycles:
        shapes = enumerate(statement.pairs[cycle[0]].shapes)
        options.append([(digit, shape, shift) for digit, shape in shapes for shift in sorted(shape[2])])
    size, total = sum(map(len, faces)), 0
    known: dict[object, int] = {}
    room = BATCH
    for choice in product(*options):
        budget.spend("cells", size + 1)
        digits, taken, alphabets, factor, low = {}, {}, {}, 1, 0
        for cycle, (digit, shape, shift) in zip(cycles, choice, strict=True):
            factor *= shape[2][shift]
            low += shift * len(cycle)
            for v in cycle:
                digits[v], taken[v], alphabets[v] = DIGITS[digit], shape, letters_of(shape, shift)
                factor *= -1 if element[v] < 0 and shape[0] == KEEP else 1
        word = "".join(digits[v] for v in range(statement.vertices))
        if low > statement.degree or (chosen is not None and word not in chosen):
            continue
        shorten(alphabets, taken, cycles, faces)
        # A vertex with one cell, inside and of even degree, has no part in any sign, and is left out.
        live = [v for v, letters in sorted(alphabets.items()) if letters[1:] or letters[0][1] or letters[0][0] & 1]
        degree = statement.degree - sum(letters[0][0] for v, letters in alphabets.items() if v not in live)
        parts = tuple(alphabets[v] for v in live)
        outside = sum(1 << v for v in live if any(side for _, side, _ in alphabets[v]))
        small = tuple(tuple(restricted(mask, live) for mask in masks if not mask & ~outside) for masks in faces)
        plain = tuple(live.index(abs(element[v]) - 1) + 1 for v in live)
        key = (small, parts, plain, degree)
        if key not in known:
            room -= sum(map(len, small))
            if room < 0:
                known, room = {}, BATCH - sum(map(len, small))
            space = watched_words(small, parts, degree, lines, budget, word)
            known[key] = trace(matrix_of(space, plain, parts)) if space else 0
        total += factor * known[key]
    return total


def shorten(alphabets: dict[int, Alphabet], shapes: dict[int, Shape], cycles: list[list[int]], faces: Faces) -> None:
    """Leave only the cell t at the vertices of a cycle that are superfluous, and not just by one another (Lemma C)."""
    out = sum(1 << v for v, (move, _, _) in shapes.items() if move in (OUT, OUTER))
    kept = sum(1 << v for v, (move, _, _) in shapes.items() if move == KEEP)
    left = tuple(tuple(mask for mask in masks if not mask & ~kept & ~out and mask & out == out) for masks in faces)
    tags = tuple(shape[1] if shape[0] == KEEP else 0 for _, shape in sorted(shapes.items()))
    rest = [cycle for cycle in cycles if type(tags[cycle[0]]) is int and shapes[cycle[0]][0] == KEEP]
    place = 0
    while place < len(rest):
        others = tuple(0 if v in rest[place] else tag for v, tag in enumerate(tags))
        if superfluous(left, rest[place][0], others):
            tags, gone = others, sum(1 << v for v in rest[place])
            left = tuple(tuple(mask for mask in masks if not mask & gone) for masks in left)
            for v in rest.pop(place):
                alphabets[v] = alphabets[v][:1]
            place = 0
        else:
            place += 1


def restricted(mask: int, vertices: Sequence[int]) -> int:
    return sum(1 << place for place, v in enumerate(vertices) if mask >> v & 1)


def letters_of(shape: Shape, shift: int) -> Alphabet:
    """Return the cells of a summand whose lowest cell has this degree."""
    move, tag, _ = shape
    if move in (STAY, OUT):
        return ((shift, int(move == OUT), ()),)
    if isinstance(tag, tuple):
        return tuple((degree + shift, outside, terms) for degree, outside, terms in tag)
    return ((shift, int(move == OUTER), ()), (shift + 1, int(move != INNER), ((0, tag),)))


def units(element: Element) -> list[Element]:
    """Return the elements that generate the same cyclic group; rational characters have one value on them."""
    powers = orbit(tuple(range(1, len(element) + 1)), lambda power: [after(element, power)])
    return [power for k, power in enumerate(powers) if gcd(k, len(powers)) == 1]


def prove_character(traces: Callable[..., list[int]], statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Return the character of G on homology modulo torsion, by rational classes, and products with functions."""
    group, elements = set(group_of(statement, budget)), statement.elements("elements")
    generators, sizes, covered = statement.generators, [], 0
    met: set[Element] = set()
    for element in elements:
        require(element in group and element not in met, "classes", "each class has one of its elements in the list")
        own = orbit(element, lambda x: [*units(x), *(after(after(g, x), inverse_of(g)) for g in generators)])
        budget.spend("cells", len(own) * statement.vertices)
        met.update(own)
        sizes.append(len(own))
        covered += len(own)
    require(covered == len(group), "classes", "some class has no element in the list")
    values = traces(statement, elements, lines, budget)
    products, inner = [], ""
    for function in sequence(statement.value.get("functions", [])):
        psi = [integer(entry, budget) for entry in sequence(function)]
        require(len(psi) == len(values), "statement", "a class function has a value for each class")
        pair = [sum(map(prod, zip(sizes, psi, with_, strict=True))) for with_ in (values, psi)]
        require(not any(total % len(group) for total in pair), "false", "an inner product is no integer")
        products.append([spelled(total // len(group)) for total in pair])
        inner += f"; ⟨χ, ψ⟩ = {products[-1][0]}, ⟨ψ, ψ⟩ = {products[-1][1]} for ψ = {psi}"
    shown = ", ".join(f"χ({cycles_text([e])}) = {value}" for e, value in zip(elements, values, strict=True))
    only = statement.value.get("summands")
    part = "" if only is None else f"the orbits of the summands {', '.join(map(str, sequence(only)))} of "
    of = f"the character of G, of order {len(group)}, on {part}H_{statement.degree}({statement.space()}; ℚ)"
    answer: dict[str, object] = {"products": products, "values": [spelled(value) for value in values]}
    if statement.kind == "equivariance":
        del answer["products"]
        inner = ", and it is the sum of the characters induced from the stabilisers of the summands"
    return answer, f"{of} is {shown}{inner}"


def prove_action(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Return cycles that are a basis of homology modulo torsion, and the matrix of an element in it."""
    element = read_element(statement.value["element"], statement)
    alphabets = [tuple(pair.cells) for pair in statement.pairs]
    space = watched_words(face_masks(statement, budget), alphabets, statement.degree, lines, budget)
    cycles = [space.stairs.family[number] for number in space.stairs.cycles] if space else []
    basis = [[spelled(entry) for term in terms for entry in term] for terms in cycles]
    columns = matrix_of(space, element, alphabets) if space else []
    matrix = [[spelled(entry) for entry in row] for row in zip(*columns, strict=True)]
    on = f"H_{statement.degree}({statement.space()}; ℤ) modulo torsion"
    answer: dict[str, object] = {"basis": basis, "matrix": matrix, "trace": spelled(trace(columns))}
    by = f"in the basis of the cycles {basis} (cells, each with its coefficient) by the matrix {matrix}"
    return answer, f"{cycles_text([element])} acts on {on} {by}, of trace {trace(columns)}"


def prove_fixed_set(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Return the homology of the points that a group fixes: the product over K_G, whose vertices are the orbits of G.

    Where a coordinate must equal its negative it is 0, inside the interval; such orbits are in every support.
    """
    generators = statement.generators
    signed = [v for vertex in range(1, statement.vertices + 1) for v in (vertex, -vertex)]
    whole, halves, centre = {}, [], 0
    for vertex in signed[::2]:
        met = orbit(vertex, lambda v: [after(element, (v,))[0] for element in generators])
        mask = sum({1 << abs(v) - 1 for v in met})
        if -vertex in met:
            centre |= mask
        elif mask not in whole:
            whole[mask] = statement.pairs[vertex - 1]
    halves = list(whole)
    every = [mask for masks in face_masks(statement, budget, whole=True) for mask in masks]
    invariant = [mask for mask in every if all(moved(mask, g) == mask for g in generators)]
    faces = [mask ^ centre for mask in invariant if mask & centre == centre]
    if not faces:
        answer, text = stated_groups(statement, {})
        return answer | {"components": 0, "points": 0}, f"{text}; points: 0"
    known = set(faces)
    top = [mask for mask in faces if not any(mask | half in known for half in halves if not mask & half)]
    fixed = copy(statement)
    fixed.vertices, fixed.pairs, fixed.kind = len(halves), list(whole.values()), "homology"
    fixed.facets = sorted([place for place, half in enumerate(halves, 1) if mask & half] for mask in top)
    find_summands(fixed, lines, budget)
    total = sum_of_blocks(fixed, lines, budget)
    answer, text = stated_groups(statement, total)
    components = total[(0,)][0] if statement.degrees is None or 0 in statement.degrees else None
    points = points_of(fixed, [[mask & half > 0 for half in halves] for mask in faces], budget)
    text += "" if components is None else f"; components: {components}"
    text += "" if points is None else f"; points: {points}"
    return answer | {"components": components and spelled(components), "points": points and spelled(points)}, text


def points_of(statement: Statement, faces: list[list[bool]], budget: Budget) -> int | None:
    """Return the number of points of a polyhedral product, or None if it has cells of higher dimension."""
    points = 0
    budget.spend("cells", len(faces) * (1 + statement.vertices))
    for face in faces:
        degrees = [[c[0] for c in pair.cells if c[1] == out] for pair, out in zip(statement.pairs, face, strict=True)]
        if all(degrees) and any(map(any, degrees)):
            return None
        points += prod(map(len, degrees))
    return points


class OrbitSpace(Space):
    """The quotient of (D^1, S^0)^K by a group of signed automorphisms.

    Orbits of cells are its cells if no element maps a cell to itself other than identically; otherwise orbits of chains
    of cells, where this always holds. The first cell of an orbit, in the order of words, or of chains of words, stands
    for it.
    """

    def __init__(self, statement: Statement, budget: Budget, chains: bool = False) -> None:
        intervals = [tuple(pair.cells) for pair in statement.pairs]
        words = Words(face_masks(statement, budget, whole=True), intervals, LARGEST, budget)
        self.group = group_of(statement, budget)
        budget.spend("cells", sum(words.sizes) * len(self.group))
        images = {word: [placed(word, g) for g in self.group] for level in words.cells for word in level}
        self.chains = chains or not all(
            image != word or all(g[place] == place + 1 for place, letter in enumerate(word) if letter == 2)
            for word, moved in images.items()
            for g, image in zip(self.group, moved, strict=True)
        )
        cells: list[list[tuple[bytes, ...]]] = [[(word,) for word in level] for level in words.cells]
        if self.chains:
            below: dict[bytes, list[bytes]] = {}
            flags: dict[bytes, list[tuple[bytes, ...]]] = {}
            cells = [[] for _ in words.cells]
            for level in words.cells:
                for word in level:
                    parts = [part for part, _ in words.leibniz(word)]
                    below[word] = list(dict.fromkeys(part for whole in parts for part in (whole, *below[whole])))
                    flags[word] = [(word,), *((*chain, word) for part in below[word] for chain in flags[part])]
                    budget.spend("cells", len(flags[word]) * len(self.group))
                    for chain in flags[word]:
                        cells[len(chain) - 1].append(chain)
        self.first: dict[tuple[bytes, ...], tuple[tuple[bytes, ...], int]] = {}
        self.isotropy: list[
            tuple[tuple[bytes, ...], list[Element]]
        ] = []  # cells with those who fix them, if not only 1
        kept: list[list[tuple[bytes, ...]]] = []
        for level in cells:
            kept.append([])
            for cell in sorted(level):
                if cell not in self.first:
                    fixing = []
                    for g, image in zip(self.group, zip(*(images[word] for word in cell), strict=True), strict=True):
                        sign = 1 if self.chains else act(cell[0], g, intervals)[1]
                        self.first.setdefault(image, (cell, sign))
                        fixing += [g] * (image == cell)
                    kept[-1].append(cell)
                    self.isotropy += [(cell, fixing)] * (len(fixing) > 1)
        self.words = words
        super().__init__(kept, self.ends)
        self.euler = sum((-1) ** k * size for k, size in enumerate(self.sizes))

    def ends(self, cell: tuple[bytes, ...]) -> list[tuple[tuple[bytes, ...], int]]:
        """Return d of a cell in the cells that stand for orbits, each once."""
        if self.chains:
            left_out = [(cell[:i] + cell[i + 1 :], (-1) ** i) for i in range(len(cell)) if len(cell) > 1]
        else:
            left_out = [((end,), sign) for end, sign in self.words.leibniz(cell[0])]
        terms: Counter[tuple[bytes, ...]] = Counter()
        for end, sign in left_out:
            terms[self.first[end][0]] += sign * self.first[end][1]
        return [(end, coefficient) for end, coefficient in terms.items() if coefficient]


def prove_surface(statement: Statement, _: Lines, budget: Budget) -> Proved:
    """Return Euler characteristic, orientability and number of boundary circles of a quotient that is a surface.

    In the order complex the vertices of a triangle have dimensions 0, 1, 2. So the surface is orientable just when its
    triangles can be coloured in two colours, different ones on both sides of each edge.
    """
    space = OrbitSpace(statement, budget, chains=True)
    require(len(space.cells) == 3, "no-surface", "the space does not have dimension 2")
    sides: dict[Any, list[Any]] = {edge: [] for edge in space.cells[1]}
    around: dict[Any, list[Any]] = {vertex: [] for vertex in space.cells[0]}
    for triangle in space.cells[2]:
        edges = [edge for edge, _ in space.ends(triangle)]
        for edge in edges:
            sides[edge].append(triangle)
        for vertex, one, other in zip(range(3), edges[1:] + edges[:1], edges[2:] + edges[:2], strict=True):
            around[space.first[triangle[vertex : vertex + 1]][0]].append((one, other))
    for edge, triangles in sides.items():
        require(len(triangles) in (1, 2), "no-surface", f"{len(triangles)} triangles meet in the edge {letters(edge)}")
    for vertex, corners in around.items():
        whole = bool(corners) and connected({edge for corner in corners for edge in corner}, corners)
        require(whole, "no-surface", f"the link of the point {letters(vertex)} is no circle and no path")
    require(connected(space.cells[2], sides.values()), "no-surface", "the space is in more than one piece")
    rims = {edge: [end for end, _ in space.ends(edge)] for edge, triangles in sides.items() if len(triangles) == 1}
    ends = {end for pair in rims.values() for end in pair}
    boundary = 0
    while ends:
        ends -= set(orbit(next(iter(ends)), lambda end: [e for pair in rims.values() if end in pair for e in pair]))
        boundary += 1
    double = [(pair[0], pair[1]) for pair in sides.values() if len(pair) == 2]
    twofold = [((a, side), (b, not side)) for a, b in double for side in (False, True)]
    sheets = [(triangle, side) for triangle in space.cells[2] for side in (False, True)]
    orientable = not connected(sheets, twofold)
    euler = space.euler
    answer: dict[str, object] = {"boundary": boundary, "euler": euler, "orientable": int(orientable)}
    genus = (2 - euler - boundary) // 2 if orientable else 2 - euler - boundary
    name = f"{'an orientable' if orientable else 'a non-orientable'} surface of genus {genus}"
    rim = f", with {boundary} boundary circles" if boundary else ", closed"
    return answer, f"{statement.space()}{' / G' * (len(space.group) > 1)} is {name}{rim}; Euler characteristic {euler}"


def letters(chain: tuple[bytes, ...]) -> str:
    """Write the middles of cells by their coordinates: -1 and 1 at the ends of an interval, 0 in its middle."""
    return " < ".join(f"({', '.join(('-1', '1', '0')[letter] for letter in word)})" for word in chain)


def prove_orbit_space(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Return homology and Euler characteristic of a quotient."""
    space = OrbitSpace(statement, budget)
    answer, text = prove_whole(lambda *_: space, statement, lines, budget)
    return answer | {"euler": space.euler}, f"{text}; Euler characteristic {space.euler}"


def prove_branching(statement: Statement, _: Lines, budget: Budget) -> Proved:
    """Return how many orbits of points have which isotropy group other than 1, if these points are isolated.

    The isotropy groups of an orbit are conjugate in G; the one whose sorted elements come first stands for them.
    """
    space = OrbitSpace(statement, budget, chains=True)
    require(all(len(cell) == 1 for cell, _ in space.isotropy), "not-isolated", "points with isotropy are not isolated")
    first: dict[tuple[Element, ...], list[Element]] = {}
    found: Counter[tuple[int, tuple[Element, ...]]] = Counter()
    size = len(space.group)
    for own in (tuple(sorted(fixing)) for cell, fixing in space.isotropy):
        if own not in first:
            budget.spend("cells", len(own) * size * statement.vertices)
            conjugates = [tuple(sorted(after(after(g, x), inverse_of(g)) for x in own)) for g in space.group]
            first |= dict.fromkeys(conjugates, generators_of(min(conjugates)))
        found[len(own), tuple(first[own])] += 1
    orbits = [[list(map(list, by)), order, number] for (order, by), number in sorted(found.items())]
    points = [f"{number} with isotropy ⟨{cycles_text(by)}⟩ of order {n}" for (n, by), number in sorted(found.items())]
    lost = [f"{number * size // order}·{order - 1}" for (order, _), number in sorted(found.items())]
    euler = size * space.euler - sum(number * size // order * (order - 1) for (order, _), number in found.items())
    count = f"χ({statement.space()}) = {' - '.join([f'{size}·({space.euler})', *lost])} = {euler}"
    which = f"orbits of G, of order {size}, with isotropy other than 1: {', '.join(points) or 'none'}"
    return {"orbits": orbits}, f"{which}; {count}"


def generators_of(group: Sequence[Element]) -> list[Element]:
    """Return those of the sorted elements of a group that do not lie in the group of the ones before."""
    generators: list[Element] = []
    identity = tuple(sorted(map(abs, group[0])))
    reached = {identity}
    for element in group:
        if element not in reached:
            generators.append(element)
            reached = set(orbit(identity, lambda power: [after(g, power) for g in generators]))
    return generators


def prove_shelling(statement: Statement, lines: Lines, budget: Budget) -> Proved:
    """Require that the facets in the order given are a shelling, and that each ridge lies in two facets."""
    given = sequence(record(lines.next(), ("order",))["order"])
    order = [tuple(numbers(facet, 1, statement.vertices + 1)) for facet in given]
    require(sorted(map(list, order)) == statement.facets, "shelling", "the order lists every facet once")
    size = len(order[0])
    require(all(len(facet) == size for facet in order), "shelling", "facets of one size are expected")
    budget.spend("cells", len(order) * (size * size + len(order)) // 4)
    ridges = Counter(ridge for facet in order for ridge in combinations(facet, size - 1)) if size else Counter()
    require(size == 0 or set(ridges.values()) == {2}, "shelling", "each ridge lies in two facets of a sphere")
    for number, facet in enumerate(order[1:], 1):
        before = [set(facet) & set(earlier) for earlier in order[:number]]
        free = {vertex for common in before if len(common) == size - 1 for vertex in set(facet) - common}
        well = all(free - common for common in before)
        require(well, "shelling", f"facet {number + 1} does not meet those before it well")
    whole = len({vertex for facet in order for vertex in facet}) == statement.vertices
    spaces = ", so (D¹,S⁰)^K and (D²,S¹)^K are closed manifolds" if whole else ""
    return {}, f"K is a shellable sphere of dimension {size - 1}{spaces}"


def prove_orbit_count(statement: Statement, _: Lines, budget: Budget) -> Proved:
    """Return the number of orbits of G on colourings, and of those that no element but 1 fixes (Burnside; Möbius)."""
    colours = integer(statement.value["colours"], budget)
    content = statement.value["content"]
    parts = None if content is None else [integer(entry, budget) for entry in sequence(content)]
    fit = parts is None or (len(parts) == colours and min(parts, default=0) >= 0)
    require(colours >= 0 and fit, "statement", "a content gives a number of vertices for each colour")
    require(colours.bit_length() * statement.vertices < 10**6, "limit", "a power of more than 10^6 bits is needed")
    group = group_of(statement, budget)
    require(all(to > 0 for element in group for to in element), "symmetry", "elements have no signs here")

    def blocks(element: Element) -> frozenset[frozenset[int]]:
        return frozenset(map(frozenset, cycles_of(element)))

    def constant(partition: Iterable[frozenset[int]]) -> int:
        if parts is None:
            return int(colours ** len(list(partition)))
        counts = {tuple(parts): 1}
        for block in partition:
            budget.spend("cells", len(counts) * (1 + colours * colours // 64))
            fewer: Counter[tuple[int, ...]] = Counter()
            for left, times in counts.items():
                for colour, room in enumerate(left):
                    if room >= len(block):
                        fewer[(*left[:colour], room - len(block), *left[colour + 1 :])] += times
            counts = dict(fewer)
        return counts.get((0,) * colours, 0)

    total = sum(times * constant(partition) for partition, times in Counter(map(blocks, group)).items())
    # Colourings that some element other than 1 fixes: inclusion and exclusion over the partitions into cycles. Those
    # that are coarser than another one are not needed, since what is constant on them is constant on that one.
    finest: list[frozenset[frozenset[int]]] = []
    for partition in sorted({blocks(element) for element in group[1:]}, key=len, reverse=True):
        budget.spend("cells", len(finest))
        if not any(orbit_partition([*partition, *other]) == partition for other in finest):
            finest.append(partition)
    signs: Counter[frozenset[frozenset[int]]] = Counter({blocks(group[0]): 1})
    for partition in finest:
        for other, sign in list(signs.items()):
            budget.spend("cells", statement.vertices)
            joined = orbit_partition([*other, *partition])
            signs[joined] -= sign
        signs = Counter({other: sign for other, sign in signs.items() if sign})
    free = sum(sign * constant(partition) for partition, sign in signs.items())
    answer: dict[str, object] = {"orbits": spelled(total // len(group)), "primitive": spelled(free // len(group))}
    what = f"{colours} colours" if parts is None else f"the content {parts}"
    text = f"G, of order {len(group)}, has {total // len(group)} orbits on colourings of the vertices with {what}"
    return answer, f"{text}, {free // len(group)} of them with trivial isotropy"


def orbit_partition(parts: list[frozenset[int]]) -> frozenset[frozenset[int]]:
    """Return the finest partition of which these sets are parts of parts."""
    merged: list[frozenset[int]] = []
    for part in parts:
        apart = [other for other in merged if not other & part]
        merged = [*apart, part.union(*(other for other in merged if other & part))]
    return frozenset(merged)


def divisors(n: int) -> list[int]:
    require(n > 0, "expression", "0 has no finite list of divisors")
    return [d for d in range(1, n + 1) if n % d == 0]


def mobius(n: int) -> int:
    return 1 if n == 1 else -sum(mobius(d) for d in divisors(n)[:-1])


def multinomial(parts: list[int]) -> int:
    return factorial(sum(parts)) // prod(map(factorial, parts))


def over_divisors(n: int, term: Callable[[int], int]) -> int:
    return sum(term(d) for d in divisors(n)) // n


def necklaces(n: int, q: int) -> int:
    return int(sum(q ** gcd(n, r) for r in range(n)) // n)  # Burnside's lemma for the rotations


FORMULAS: dict[str, Callable[..., int]] = {
    "binomial": comb,
    "bracelets": lambda n, q: (necklaces(n, q) + (q ** ((n + 1) // 2) + q ** (n // 2 + 1)) // 2) // 2,
    "gcd": gcd,
    "lyndon": lambda n, q: over_divisors(n, lambda d: mobius(d) * q ** (n // d)),
    "mobius": mobius,
    "necklaces": necklaces,
    "witt": lambda *a: sum(mobius(d) * multinomial([x // d for x in a]) for d in divisors(gcd(*a))) // sum(a),
    "totient": lambda n: sum(mobius(d) * (n // d) for d in divisors(n)),
}


def evaluate(node: ast.AST, names: dict[str, int], budget: Budget) -> int:
    """Return the value of an expression in whole numbers: + - * // **, formulas, sum(... for d in divisors(...))."""
    import ast  # few claims need it

    budget.spend("cells", 1)
    match node:
        case ast.Expression(body):
            return evaluate(body, names, budget)
        case ast.Constant(int(value)) if type(value) is int:
            return value
        case ast.Name(name) if name in names:
            return names[name]
        case ast.BinOp(left, operation, right) if type(operation).__name__ in OPERATIONS:
            a, b = evaluate(left, names, budget), evaluate(right, names, budget)
            power = isinstance(operation, ast.Pow)
            fits = b >= 0 if power else b != 0 or not isinstance(operation, ast.FloorDiv)
            require(fits, "expression", "a negative exponent, or a division by 0")
            small = not power or b * max(a.bit_length(), 1) <= budget.limits["bits"]
            require(small, "limit", f"a power of more than {budget.limits['bits']} bits; raise --max-bits")
            return OPERATIONS[type(operation).__name__](a, b)
        case ast.Call(ast.Name("sum"), [ast.GeneratorExp(term, [ast.comprehension(ast.Name(name), over, [], 0)])], []):
            match name, over:
                case "d", ast.Call(ast.Name("divisors"), [number], []):
                    places: Iterable[int] = divisors(small_number(number, names, budget))
                case "k", ast.Call(ast.Name("range"), [first, last], []):
                    places = range(small_number(first, names, budget), small_number(last, names, budget))
                case _:
                    raise Failure("expression", "a sum is over d in divisors(n) or k in range(a, b)")
            return sum(evaluate(term, names | {name: place}, budget) for place in places)
        case ast.Call(ast.Name(name), arguments, []) if name in FORMULAS and arguments:
            return int(FORMULAS[name](*(small_number(argument, names, budget) for argument in arguments)))
    raise Failure("expression", "something in an expression is unknown here")


def small_number(node: ast.AST, names: dict[str, int], budget: Budget) -> int:
    value = evaluate(node, names, budget)
    require(0 <= value <= 1000, "expression", "formulas are evaluated for numbers from 0 to 1000")
    return value


NUMBERS = ("count-identity", "count-values")  # the kinds that are about numbers alone
MIXED = "[0-9][a-z]|[a-z][0-9]"
OPERATIONS: dict[str, Callable[[int, int], int]]
OPERATIONS = {"Add": operator.add, "Sub": operator.sub, "Mult": operator.mul, "FloorDiv": operator.floordiv, "Pow": pow}


def values_of(statement: Statement, sides: Sequence[str], budget: Budget) -> list[list[int]]:
    """Return the values of the expressions under these keys for each n of the range."""
    import ast

    value = statement.value
    first, last = (integer(value[key], budget) for key in ("first", "last"))
    require(1 <= first <= last <= 1000, "statement", "the range lies within 1 to 1000, and is not empty")
    found = []
    for text in (value[side] for side in sides):
        if type(text) is not str or len(text) > 1000:
            raise Failure("statement", "an expression is a text of at most 1000 characters")
        plain = re.fullmatch("[0-9a-z+*/(), -]+", text) and not re.search(MIXED, text)
        require(bool(plain), "expression", "an expression has lower-case names, decimal numbers and + - * / ( ) , only")
        try:
            tree = ast.parse(text, mode="eval")
            found.append([evaluate(tree, {"n": n}, budget) for n in range(first, last + 1)])
        except (SyntaxError, TypeError, ValueError, ZeroDivisionError, RecursionError) as error:
            raise Failure("expression", "an expression cannot be read or evaluated") from error
    return found


def prove_identity(statement: Statement, _: Lines, budget: Budget) -> Proved:
    """Require two expressions to have the same value for each n of a range."""
    value, first, last = (statement.value, *(statement.value[key] for key in ("first", "last")))
    left, right = values_of(statement, ("left", "right"), budget)
    wrong = [n for n, (a, b) in enumerate(zip(left, right, strict=True), integer(first, budget)) if a != b]
    require(not wrong, "false", f"the two sides differ for n = {wrong[:1]}")
    return {}, f"{value['left']} = {value['right']} for n = {first}, …, {last}"


def prove_values(statement: Statement, _: Lines, budget: Budget) -> Proved:
    """Return the values of an expression for each n of a range."""
    formula, first, last = (statement.value[key] for key in ("formula", "first", "last"))
    (values,) = values_of(statement, ("formula",), budget)
    answer: dict[str, object] = {"values": list(map(spelled, values))}
    return answer, f"{formula} has the values {', '.join(map(str, values))} for n = {first}, …, {last}"


Routes = dict[str, Callable[[Statement, Lines, Budget], Proved]]
BY_BLOCKS: Routes = {"blocks": prove_by_blocks, "orbits": prove_by_orbits}
CHARACTERS: Routes = {
    "blocks": partial(prove_character, traces_by_blocks),
    "cells": partial(prove_character, traces_by_cells),
}
KINDS: dict[str, tuple[tuple[str, ...], tuple[str, ...], Routes]] = {  # kind: keys of question and answer, routes
    "homology": (("degrees", "pairs"), ("groups",), BY_BLOCKS | {"cells": partial(prove_whole, whole_product)}),
    "smash": (("degrees", "pairs"), ("groups",), BY_BLOCKS),
    "real-toric": (("degrees", "rows"), ("groups",), {"cells": partial(prove_whole, Chambers)}),
    "tor": ((), ("groups",), {"blocks": prove_tor}),
    "table": ((), ("groups",), {"blocks": prove_table}),
    "summand": (("kept", "out"), ("groups",), {"cells": partial(prove_whole, link_part)}),
    "automorphisms": (("generators", "pairs"), ("orbits", "order"), {"permutations": prove_automorphisms}),
    "character": (
        ("degree", "elements", "functions", "generators", "pairs", "summands"),
        ("products", "values"),
        CHARACTERS,
    ),
    "equivariance": (
        ("degree", "elements", "generators", "pairs"),
        ("values",),
        {"both": partial(prove_character, traces_both_ways)},
    ),
    "action": (("degree", "element", "pairs"), ("basis", "matrix", "trace"), {"cells": prove_action}),
    "fixed-set": (
        ("degrees", "generators", "pairs"),
        ("components", "groups", "points"),
        {"blocks": prove_fixed_set},
    ),
    "orbit-space": (("degrees", "generators"), ("euler", "groups"), {"cells": prove_orbit_space}),
    "surface": (("generators",), ("boundary", "euler", "orientable"), {"cells": prove_surface}),
    "branching": (("generators",), ("orbits",), {"cells": prove_branching}),
    "shelling": ((), (), {"shelling": prove_shelling}),
    "count-identity": (("first", "last", "left", "right"), (), {"values": prove_identity}),
    "count-values": (("first", "formula", "last"), ("values",), {"values": prove_values}),
    "orbit-count": (("colours", "content", "generators"), ("orbits", "primitive"), {"permutations": prove_orbit_count}),
}


def read_header(lines: Lines) -> tuple[str, str, object]:
    """Return the claim's name, the route and the raw statement."""
    require(b'"format"' in lines.raw(), "not-a-certificate", "the first line is no certificate header")
    value = value_of(lines.line)
    version = value.get("format") if type(value) is dict else None
    known = type(version) is int and version == FORMAT
    require(known, "unknown-format", f"format {str(version)[:40]} is unknown here, {FORMAT} is known")
    header = record(value, ("about", "format", "route", "statement"))
    about = record(header["about"], ("claim",), ("labels", "source", "title"))
    texts = [about["claim"], about.get("source", ""), about.get("title", ""), header["route"]]
    prose = all(type(text) is str for text in texts + sequence(about.get("labels", [])))
    require(prose, "shape", "the claim's name, source, title, labels and route are texts")
    named = re.fullmatch(r"[A-Za-z0-9][A-Za-z0-9._-]{0,99}", str(about["claim"]), re.ASCII) is not None
    require(named, "claim-name", "a claim's name has 1 to 100 letters, digits, dots, dashes and underscores")
    return str(about["claim"]), str(header["route"]), header["statement"]


def check_end(lines: Lines) -> None:
    """Require the end record, with the right count and digest, and nothing behind it."""
    end = record(record(lines.next(), ("end",))["end"], ("records", "sha256"))
    counted = type(end["records"]) is int and end["records"] == lines.number - 2
    require(counted, "end", "the end record gives another number of records")
    require(end["sha256"] == lines.digest.hexdigest(), "digest", "the digest of the lines before the end is another")
    require(lines.raw() == b"", "trailing", "something follows the end record")


def compare(stated: dict[str, object], proved: dict[str, object]) -> None:
    """Require what was proved to be what is stated."""
    for key, value in proved.items():
        ours, theirs = (part if type(part) is list else [part] for part in (value, stated[key]))
        differ = next((pair for pair in zip_longest(theirs, ours) if canonical(pair[0]) != canonical(pair[1])), (0, 0))
        sentence = f"{key}: {str(differ[0])[:200]} is stated, but {str(differ[1])[:200]} is proved"
        require(canonical(ours) == canonical(theirs) and type(value) is type(stated[key]), "false", sentence)


def examine(path: str, limits: argparse.Namespace) -> dict[str, str | None]:
    """Return the report on one file. Only the last step of the try block accepts, after every check has passed."""
    report: dict[str, str | None] = dict.fromkeys(("path", "verdict", "reason", "where", "claim", "statement"))
    report |= {"path": path, "verdict": "undecided", "fingerprint": None}
    lines = None
    try:
        require(os.path.isfile(path), "unreadable", "there is no certificate here that can be read")
        require(path.endswith(ENDINGS), "not-a-certificate", f"a certificate's name ends in {' or '.join(ENDINGS)}")
        with open(path, "rb") as file:
            budget = Budget(limits)
            lines = Lines(path, file, budget)
            report["claim"], route, raw = read_header(lines)
            statement = Statement(raw, budget)
            require(route in statement.routes, "route", f"the route is {' or '.join(map(repr, statement.routes))}")
            answer, text = statement.routes[route](statement, lines, budget)
            check_end(lines)
            compare(statement.stated, answer)
        report |= {"statement": statement.text(text), "fingerprint": hashlib.sha256(canonical(raw)).hexdigest()}
        report |= {"verdict": "accepted", "reason": "proved", "sentence": "every record was checked"}
    except Failure as failure:
        report["reason"], report["sentence"] = failure.args
        report["verdict"] = "undecided" if report["reason"] in UNDECIDED else "rejected"
        report["where"] = f"line {1 if report['reason'] == 'false' else lines.number}" if lines else None
    except (RecursionError, ValueError) as error:
        if not re.search("recursion|digits", str(error)):
            raise
        sentence = "a search goes too deep, or a number that was computed has too many digits; raise --max-bits"
        report |= {"reason": "limit", "sentence": sentence, "where": f"line {lines.number}" if lines else None}
    except (OSError, MemoryError, zlib.error) as error:
        report |= {"reason": "unreadable", "sentence": f"the file cannot be read ({type(error).__name__})"}
    return report


# ---- the command -----------------------------------------------------------------------------------------------------


def certificates_in(path: str) -> list[str]:
    """Return the certificates at a path: the file itself, or all below a folder, in the order of their names.

    A folder without any, and one that cannot be entered, stand for themselves, so that they are reported as unreadable.
    Links to folders are not followed.
    """
    failed: list[OSError] = []
    below = [os.path.join(at, name) for at, _, names in os.walk(path, onerror=failed.append) for name in names]
    found = [file for file in below if file.endswith(ENDINGS)] + [str(error.filename) for error in failed]
    return sorted(found) or [path] if os.path.isdir(path) else [path]


def printable(text: str | None) -> str:
    """Return a text that cannot disturb a terminal or forge a line."""
    return text if text and text.isprintable() else ascii(text)


def show(report: dict[str, str | None]) -> None:
    """Print the report on one file."""
    print(f"{report['verdict']:<10} {printable(report['path'])}")
    if report["verdict"] == "accepted":
        print(f"           {printable(report['statement'])}\n           fingerprint {report['fingerprint']}")
    else:
        where = f"{report['where']}, " if report["where"] else ""
        print(f"           {where}{report['reason']}: {printable(report['sentence'])}")


def limit(text: str) -> int:
    """Return a limit; what is no number from 1 to 10^9 is refused by the parser of the command line."""
    if not 1 <= int(text) <= 10**9:
        raise ValueError
    return int(text)


def main(arguments: list[str] | None = None) -> int:
    """Check the files named on the command line and return the exit code."""
    parser = argparse.ArgumentParser(prog="verifier.py", description="Check certificates; read the head of this file.")
    parser.add_argument("paths", nargs="+", metavar="PATH", help="a certificate, or a folder to search for them")
    parser.add_argument("--json", action="store_true", help="print one JSON object instead of text")
    parser.add_argument("--max-bytes", type=limit, default=10**9, help="bytes of a file, decompressed (%(default)s)")
    parser.add_argument("--max-cells", type=limit, default=10_000_000, help="cells to rebuild (%(default)s)")
    parser.add_argument("--max-bits", type=limit, default=14_000, help="bits of one integer (%(default)s)")
    parser.add_argument("--max-seconds", type=limit, default=3600, help="seconds for one file (%(default)s)")
    limits = parser.parse_args(arguments)
    sys.set_int_max_str_digits(max(4300, limits.max_bits // 3))
    reports = []
    for path in (file for given in limits.paths for file in certificates_in(given)):
        reports.append(examine(path, limits))
        if not limits.json:
            show(reports[-1])
            sys.stdout.flush()
    verdicts = Counter(report["verdict"] for report in reports)
    code = 1 if verdicts["rejected"] else 0 if reports and verdicts["accepted"] == len(reports) else 3
    if limits.json:
        verdict = {0: "accepted", 1: "rejected"}.get(code, "undecided")
        print(json.dumps({"verdict": verdict, "files": reports}, ensure_ascii=False, indent=1))
    else:
        print(", ".join(f"{verdicts[verdict]} {verdict}" for verdict in ("accepted", "rejected", "undecided")))
    return code


if __name__ == "__main__":
    try:
        sys.stdout.reconfigure(encoding="utf-8", errors="backslashreplace")  # type: ignore[union-attr]
        code = main()
    except KeyboardInterrupt:
        code = 130
    except BrokenPipeError:  # whoever read the output has gone, so nobody was told a verdict
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        code = 3
    except Exception as error:  # noqa: BLE001 - a crash must never look like a verdict
        print(f"internal error, no verdict: {type(error).__name__}: {str(error)!a}", file=sys.stderr)
        code = 70
    sys.exit(code)
