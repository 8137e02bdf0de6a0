"""What is wrong with claims of all kinds, with pairs and with complexes: each fault in one sentence with its place."""

from __future__ import annotations

import pytest

from certify.claims.kinds import KINDS
from certify.errors import BadInput
from certify.sheet import parse_sheet

COMPLEXES = """\
[complexes.ring]
family = "polygon"
n = 5
[complexes.two]
facets = [["a"], ["b"]]
"""

FAULTS = {
    "a boundary that has a boundary": (
        """\
[pairs.p]
cells = [
  { degree = 0, in = "A" },
  { degree = 1, in = "A", boundary = { 1 = 1 } },
  { degree = 2, in = "X", boundary = { 2 = 1 } },
]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 10, pair p, key cells, item 3: expected a boundary whose own boundary is zero, found another",
    ),
    "a boundary of a cell of A outside A": (
        """\
[pairs.p]
cells = [
  { degree = 0, in = "X" },
  { degree = 1, in = "A", boundary = { 1 = 1 } },
]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 9, pair p, key cells, item 2: expected a boundary in A, as the cell is in A, found cell 1",
    ),
    "a boundary on later cells": (
        """\
[pairs.p]
cells = [
  { degree = 1, in = "X", boundary = { 2 = 1 } },
  { degree = 0, in = "A" },
]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 8, pair p, key cells, item 1: expected a boundary on earlier cells, found cell 2 in it",
    ),
    "a boundary of another degree": (
        """\
[pairs.p]
cells = [
  { degree = 0, in = "A" },
  { degree = 2, in = "X", boundary = { 1 = 1 } },
]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 9, pair p, key cells, item 2: expected a boundary of degree 1, found cell 1 of degree 0",
    ),
    "a pair without cells": (
        """\
[pairs.p]
cells = []
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 7, pair p, key cells: expected 1 to 255 cells, found 0",
    ),
    "a cell on a third side": (
        """\
[pairs.p]
cells = [{ degree = 0, in = "B" }]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        'line 7, pair p, key cells.in, item 1: expected "A", or "X" for a cell outside A, found \'B\'',
    ),
    "a truth value as a coefficient": (
        """\
[pairs.p]
cells = [{ degree = 0, in = "A" }, { degree = 1, in = "A", boundary = { 1 = true } }]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 7, pair p, key cells.boundary.1, item 2: expected a whole number, found true",
    ),
    "a cell with the number 0": (
        """\
[pairs.p]
cells = [{ degree = 0, in = "A" }, { degree = 1, in = "A", boundary = { 0 = 1 } }]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 7, pair p, key cells.boundary.0, item 2: expected the number of a cell, counted from 1, found '0'",
    ),
    "a misspelt key of a cell": (
        """\
[pairs.p]
cells = [{ degree = 0, inn = "A" }]
[[claims]]
id = "a"
kind = "homology"
complex = "ring"
pair = "p"
""",
        "line 7, pair p, key cells.inn, item 1: expected no other keys than degree, in, boundary, found 'inn'",
    ),
    "a smash product of a pair without a base point": (
        """\
[pairs.p]
cells = [{ degree = 0, in = "A" }]
[[claims]]
id = "a"
kind = "smash"
complex = "ring"
pair = "p"
""",
        "line 12, claim 1, key pair: expected pairs with a name for a smash product, found a pair given by its cells",
    ),
    "a smash product by cells": (
        """\
[[claims]]
id = "a"
kind = "smash"
complex = "ring"
pair = "(S2, *)"
route = "cells"
""",
        "line 11, claim 1, key route: expected blocks or orbits for a smash product, found cells",
    ),
    "a λ that is not injective on a face": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
complex = "ring"
rows = ["10101", "10101"]
""",
        "line 10, claim 1, key rows: expected a map that is injective on each face, found the face 1 2",
    ),
    "a row of λ that is too short": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
complex = "ring"
rows = ["10101", "101"]
""",
        "line 10, claim 1, key rows: expected a digit 0 or 1 for each of the 5 vertices, found '101'",
    ),
    "a row of λ that is a number": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
complex = "ring"
rows = ["10101", 101]
""",
        'line 10, claim 1, key rows, item 2: expected a text of digits 0 and 1 like "110", found 101',
    ),
    "a way to make λ that there is not": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
complex = "ring"
rows = "colour"
""",
        'line 10, claim 1, key rows: expected the rows of λ as a list of texts like "110", or '
        '"colouring" or "subsets", found \'colour\'',
    ),
    "a complex that cannot be coloured": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
complex = "ring"
rows = "colouring"
""",
        "line 10, claim 1, key rows: expected a complex that 2 colours colour properly, found 5 "
        "vertices, facets 12 15 23 34 45",
    ),
    "vertices that are no subsets": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
complex = "ring"
rows = "subsets"
""",
        "line 10, claim 1, key rows: expected subsets (tuples) as labels of its vertices, found 1",
    ),
    "an unknown family of real toric spaces": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
family = "real-permutohedral"
n = 3
""",
        "line 9, claim 1, key family: expected one of real-projective-space, "
        "real-permutohedral-variety, real-bott-manifold, found 'real-permutohedral'",
    ),
    "an impossible dimension of a family": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
family = "real-permutohedral-variety"
n = 0
""",
        "line 10, claim 1, key n: expected a whole number of at least 1, found 0",
    ),
    "a family without its dimension": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
family = "real-permutohedral-variety"
""",
        "line 6, claim 1: expected the key n with dimension, at least 1, found no such key",
    ),
    "a family and a complex": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
family = "real-permutohedral-variety"
n = 2
complex = "ring"
""",
        "line 11, claim 1, key complex: expected the family with n alone, found 'ring'",
    ),
    "a matrix that is not triangular": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
family = "real-bott-manifold"
matrix = ["01", "10"]
""",
        "line 10, claim 1, key matrix: expected 2 digits 0 or 1, with 0 up to place 2, found '10'",
    ),
    "a matrix that is a number": (
        """\
[[claims]]
id = "a"
kind = "real-toric"
family = "real-bott-manifold"
matrix = 3
""",
        'line 10, claim 1, key matrix: expected a list of rows like ["01", "00"], found 3',
    ),
    "a graph6 text that cannot be read": (
        """\
[complexes.g]
graph6 = "D?"
as = "clique"
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 7, complex g, key graph6: expected a graph6 string, found 'D?', which has the wrong length",
    ),
    "an unknown complex of a graph": (
        """\
[complexes.g]
graph6 = "Dhc"
as = "cliques"
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        'line 8, complex g, key as: expected "clique" or "independence" or "nested-sets", found \'cliques\'',
    ),
    "a polytope with a vertex on all facets": (
        """\
[complexes.g]
incidence = ["1111", "1110", "0111", "1101", "1011"]
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 7, complex g, key incidence, item 1: expected a vertex that lies not on every facet, found only ones",
    ),
    "impossible arguments of a family": (
        """\
[complexes.g]
family = "cyclic-polytope"
m = 4
d = 6
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 8, complex g, key m: expected a whole number of at least 7, found 4",
    ),
    "an argument too many": (
        """\
[complexes.g]
family = "polygon"
n = 4
k = 6
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 9, complex g, key k: expected no other keys than family, n, found 'k'",
    ),
    "a complex that stands below": (
        """\
[complexes.g]
operation = "join"
of = ["ring", "h"]
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 8, complex g, key of, item 2: expected a complex that stands above this one (ring, two), found 'h'",
    ),
    "the link of something that is no face": (
        """\
[complexes.g]
operation = "link"
of = "ring"
face = [1, 3]
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 9, complex g, key face: expected vertices that form a face, found 1 3, which do not",
    ),
    "a file that is not there": (
        """\
[complexes.g]
file = "nothing.txt"
[[claims]]
id = "a"
kind = "tor"
complex = "g"
""",
        "line 7, complex g, key file: expected a readable file, found No such file or directory (nothing.txt, file)",
    ),
    "Tor in an odd degree": (
        """\
[[claims]]
id = "a"
kind = "tor"
complex = "ring"
groups = { "1,3" = "Z" }
""",
        "line 10, claim 1, key groups.'1,3': expected two degrees i,2j of Tor, the second one even, "
        "like \"1,4\", found '1,3'",
    ),
    "a set with an unknown vertex": (
        """\
[[claims]]
id = "a"
kind = "table"
complex = "ring"
groups = { "1 9" = { 0 = "Z" } }
""",
        "line 10, claim 1, key groups.'1 9': expected vertices of the complex, found '9', which is none",
    ),
    "a set of vertices twice": (
        """\
[[claims]]
id = "a"
kind = "table"
complex = "ring"
groups = { "1 3" = { 0 = "Z" }, "3 1" = { 0 = "Z" } }
""",
        "line 10, claim 1, key groups.'3 1': expected each set of vertices once, found the same set again",
    ),
    "a group where groups by degree belong": (
        """\
[[claims]]
id = "a"
kind = "table"
complex = "ring"
groups = { "1 3" = "Z" }
""",
        "line 10, claim 1, key groups.'1 3': expected a table like { 0 = \"Z\", 1 = \"Z^34\" }, found 'Z'",
    ),
    "a degree below -1": (
        """\
[[claims]]
id = "a"
kind = "table"
complex = "ring"
groups = { "1 3" = { -2 = "Z" } }
""",
        "line 10, claim 1, key groups.'1 3'.-2: expected a degree from -1 on, in plain digits, found '-2'",
    ),
    "a vertex kept and out": (
        """\
[[claims]]
id = "a"
kind = "summand"
complex = "ring"
kept = [1, 2]
out = [2]
""",
        "line 11, claim 1, key out: expected vertices that are not kept as well, found vertex 2 in both",
    ),
    "out is no face": (
        """\
[[claims]]
id = "a"
kind = "summand"
complex = "ring"
kept = [2]
out = [1, 3]
""",
        "line 11, claim 1, key out: expected vertices that form a face, found {1,3}, which do not",
    ),
    "an unknown vertex in a summand": (
        """\
[[claims]]
id = "a"
kind = "summand"
complex = "ring"
kept = ["x"]
""",
        "line 10, claim 1, key kept: expected vertices of the complex, found vertex 'x', which is none",
    ),
    "a cycle that does not close": (
        """\
[[claims]]
id = "a"
kind = "automorphisms"
complex = "ring"
generators = ["(1 2"]
""",
        "line 10, claim 1, key generators, item 1: expected cycles like (1 2 3)(4 5), or () for the "
        "identity, found '(1 2'",
    ),
    "a cycle with an unknown vertex": (
        """\
[[claims]]
id = "a"
kind = "automorphisms"
complex = "ring"
generators = ["(1 9)"]
""",
        "line 10, claim 1, key generators, item 1: expected vertices of the complex, with commas between "
        "labels that have blanks in them, found '9', which is none",
    ),
    "a vertex twice in a cycle": (
        """\
[[claims]]
id = "a"
kind = "automorphisms"
complex = "ring"
generators = ["(1 2 1)"]
""",
        "line 10, claim 1, key generators, item 1: expected each vertex once in a cycle, found '1' twice",
    ),
    "a permutation that does not preserve the complex": (
        """\
[[claims]]
id = "a"
kind = "automorphisms"
complex = "ring"
generators = ["(1 2)"]
""",
        "line 10, claim 1, key generators, item 1: expected a permutation that preserves K, found (1 2), by "
        "which the face 1 5 goes to 2 5, which is none",
    ),
    "a permutation that does not preserve the pairs": (
        """\
[[claims]]
id = "a"
kind = "automorphisms"
complex = "two"
pair = ["(D1, S0)", "(D2, S1)"]
generators = ["(a b)"]
""",
        "line 11, claim 1, key generators, item 1: expected a permutation that preserves the pairs, found (a "
        "b), which exchanges (D¹,S⁰) at a and (D²,S¹) at b",
    ),
    "a change of sign on a disc": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "two"
pair = "(D2, S1)"
degree = 1
generators = ["(-a)"]
""",
        "line 12, claim 1, key generators, item 1: expected changes of sign on (D1, S0) only, found (-a), with "
        "one on (D²,S¹) at a",
    ),
    "a class without a value": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
values = { "()" = 10 }
""",
        "line 12, claim 1, key values: expected an element of each rational class, found none of the "
        "class of (1 2 3 4 5)",
    ),
    "a class with two values": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
values = { "()" = 10, "(1 2 3 4 5)" = 0, "(1 3 5 2 4)" = 0 }
""",
        "line 12, claim 1, key values: expected each rational class once, found (1 2 3 4 5) and (1 3 5 "
        "2 4), which are in one class",
    ),
    "a value outside the group": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
values = { "()" = 10, "(2 5)(3 4)" = 0 }
""",
        "line 12, claim 1, key values: expected elements of the group, found (2 5)(3 4), which is none",
    ),
    "irreducible characters of unknown groups": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
irreducibles = "abelian"
""",
        "line 12, claim 1, key irreducibles: expected one of symmetric, cyclic, dihedral, found 'abelian'",
    ),
    "Specht characters of a small group": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
irreducibles = "symmetric"
""",
        "line 12, claim 1, key irreducibles: expected all 120 permutations, found 5 elements",
    ),
    "multiplicities of nothing": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
multiplicities = { trivial = 2 }
""",
        "line 12, claim 1, key multiplicities: expected irreducibles or functions as well, found neither",
    ),
    "a class function with a value too few": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
functions = { f = { "()" = 1 } }
""",
        "line 12, claim 1, key functions.f: expected one value for each rational class, found 0 for that "
        "of (1 2 3 4 5)",
    ),
    "a subgroup that is none": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
functions = { f = ["(2 5)(3 4)"] }
""",
        "line 12, claim 1, key functions.f: expected generators of a subgroup, found an element outside the group",
    ),
    "a word that is too short": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
summands = ["01"]
""",
        "line 12, claim 1, key summands: expected lists of vertices, or words of 5 digits, for each vertex "
        "that of a summand of its pair, found '01'",
    ),
    "a summand with an unknown vertex": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
summands = [[7]]
""",
        "line 12, claim 1, key summands, item 1: expected vertices of the complex, found vertex 7, which is none",
    ),
    "an element and generators": (
        """\
[[claims]]
id = "a"
kind = "fixed-set"
complex = "ring"
generators = ["(1 2 3 4 5)"]
element = "()"
""",
        "line 6, claim 1: expected one of the keys element and generators, found both or neither",
    ),
    "a genus without orientability": (
        """\
[[claims]]
id = "a"
kind = "surface"
complex = "ring"
genus = 5
""",
        "line 10, claim 1, key genus: expected orientable = true beside a genus, and no boundary; claim "
        "euler for other surfaces, found no key orientable",
    ),
    "isotropy of order 1": (
        """\
[[claims]]
id = "a"
kind = "branching"
complex = "ring"
generators = ["(1 2 3 4 5)"]
orbits = { 1 = 2 }
""",
        "line 11, claim 1, key orbits.1: expected the order of an isotropy group, from 2 on, found '1'",
    ),
    "a content that does not add up": (
        """\
[[claims]]
id = "a"
kind = "orbit-count"
complex = "ring"
content = [2, 2]
""",
        "line 10, claim 1, key content: expected 2 numbers with the sum 5, found [2, 2]",
    ),
    "no colours": (
        """\
[[claims]]
id = "a"
kind = "orbit-count"
complex = "ring"
colours = -1
""",
        "line 10, claim 1, key colours: expected a whole number from 0 on, found -1",
    ),
    "an unknown name in an expression": (
        """\
[[claims]]
id = "a"
kind = "count-identity"
left = "n"
right = "x"
from = 1
to = 3
""",
        "line 10, claim 1, key right: expected whole numbers, n, + - * // **, sums over d in "
        "divisors(n) or k in range(a, b), and binomial, bracelets, gcd, lyndon, mobius, necklaces, totient, witt, "
        "found the name x",
    ),
    "a comment in an expression": (
        """\
[[claims]]
id = "a"
kind = "count-identity"
left = "n"
right = "n # one"
from = 1
to = 3
""",
        "line 10, claim 1, key right: expected whole numbers, n, + - * // **, sums over d in "
        "divisors(n) or k in range(a, b), and binomial, bracelets, gcd, lyndon, mobius, necklaces, totient, witt, "
        "found 'n # one'",
    ),
    "an expression of very many terms": (
        f"""\
[[claims]]
id = "a"
kind = "count-identity"
left = "{"+".join(["n"] * 451)}"
right = "451 * n"
from = 1
to = 3
""",
        "line 9, claim 1, key left: expected whole numbers, n, + - * // **, sums over d in "
        "divisors(n) or k in range(a, b), and binomial, bracelets, gcd, lyndon, mobius, necklaces, totient, witt, "
        "found one that is nested too deeply; sum(...) is one way to write many terms",
    ),
    "a range without a beginning": (
        """\
[[claims]]
id = "a"
kind = "count-values"
formula = "sum(k for k in range(n))"
from = 1
to = 3
""",
        "line 9, claim 1, key formula: expected 2 arguments of range, found range(n)",
    ),
    "a value that is too long": (
        """\
[[claims]]
id = "a"
kind = "count-values"
formula = "2**7000 * 2**7000 * n"
from = 1
to = 3
""",
        "line 9, claim 1, key formula: expected whole numbers, n, + - * // **, sums over d in "
        "divisors(n) or k in range(a, b), and binomial, bracelets, gcd, lyndon, mobius, necklaces, totient, witt, "
        "found a value of more than 14000 bits, for n = 1",
    ),
    "a single summand under a change of sign": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(-1)"]
summands = [[1, 3]]
""",
        "line 12, claim 1, key summands: expected generators without signs, found a change of sign, which preserves no "
        "single summand",
    ),
    "no summands": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["()"]
summands = []
""",
        "line 12, claim 1, key summands: expected at least one summand, found none",
    ),
    "a range that is empty": (
        """\
[[claims]]
id = "a"
kind = "count-identity"
left = "n"
right = "n"
from = 4
to = 3
""",
        "line 11, claim 1, key from: expected a range within 1 to 1000, found 4 to 3",
    ),
    "a matrix that is not square": (
        """\
[[claims]]
id = "a"
kind = "action"
complex = "ring"
degree = 1
element = "(1 2 3 4 5)"
matrix = [[1, 0], [0]]
""",
        "line 12, claim 1, key matrix, item 2: expected a square matrix of whole numbers by rows, like [[0, 1], "
        "[1, 0]], found a row of 1 numbers",
    ),
    "a splitting under a change of sign": (
        """\
[[claims]]
id = "a"
kind = "equivariance"
complex = "ring"
degree = 1
generators = ["(-1)"]
""",
        "line 11, claim 1, key generators: expected permutations without signs, found a change of sign, which "
        "preserves no single summand",
    ),
    "components without degree 0": (
        """\
[[claims]]
id = "a"
kind = "fixed-set"
complex = "ring"
element = "()"
degrees = [1]
components = 2
""",
        "line 12, claim 1, key components: expected 0 among the degrees of the claim, found [1]",
    ),
    "a second generator that does not preserve the complex": (
        """\
[[claims]]
id = "a"
kind = "orbit-space"
complex = "ring"
generators = ["(1 2 3 4 5)", "(1 2)"]
""",
        "line 10, claim 1, key generators, item 2: expected a permutation that preserves K, found (1 2), by which the "
        "face 1 5 goes to 2 5, which is none",
    ),
    "a quotient of a product of discs": (
        """\
[[claims]]
id = "a"
kind = "orbit-space"
complex = "ring"
pair = "(D2, S1)"
generators = ["(1 2 3 4 5)"]
""",
        'line 10, claim 1, key pair: expected the pair "(D1, S0)" alone, whose product is made of cubes, found (D²,S¹)',
    ),
    "an isotropy group outside the group": (
        """\
[[claims]]
id = "a"
kind = "branching"
complex = "ring"
generators = ["(1 2 3 4 5)"]
isotropy = { "(2 5)(3 4)" = 1 }
""",
        "line 11, claim 1, key isotropy: expected generators of a subgroup of G other than 1, found (2 5)(3 4)",
    ),
    "an isotropy group twice": (
        """\
[[claims]]
id = "a"
kind = "branching"
complex = "ring"
generators = ["(1 2 3 4 5)"]
isotropy = { "(1 2 3 4 5)" = 1, "(1 3 5 2 4), ()" = 1 }
""",
        "line 11, claim 1, key isotropy: expected each conjugacy class once, found that of (1 3 5 2 4), () again",
    ),
    "a multiplicity that is no number": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
irreducibles = "cyclic"
multiplicities = { 1 = "1/0" }
""",
        "line 13, claim 1, key multiplicities.1: expected a whole number, or a fraction like \"1/2\", found '1/0'",
    ),
    "a class function that is zero": (
        """\
[[claims]]
id = "a"
kind = "character"
complex = "ring"
degree = 1
generators = ["(1 2 3 4 5)"]
functions = { f = { "()" = 0, "(1 2 3 4 5)" = 0 } }
""",
        "line 12, claim 1, key functions: expected class functions ψ for which ⟨ψ, ψ⟩ is a whole number above 0, "
        "found 0 for f",
    ),
    "values of counts for other numbers": (
        """\
[[claims]]
id = "a"
kind = "count-values"
formula = "necklaces(n, 2)"
from = 1
to = 3
values = [2, 3]
""",
        "line 12, claim 1, key values: expected one for each of the 3 numbers n, found 2",
    ),
    "a quotient by nothing": (
        """\
[[claims]]
id = "a"
kind = "orbit-space"
complex = "ring"
""",
        'line 6, claim 1: expected the key generators with a list of permutations in cycles like ["(1 2 '
        '3)(4 5)"], or "all", found no such key',
    ),
    "a group that is called by another name": (
        """\
[[claims]]
id = "a"
kind = "orbit-space"
complex = "ring"
generators = "most"
""",
        'line 10, claim 1, key generators: expected a list of permutations in cycles like ["(1 2 3)(4 5)"], or "all", '
        "found 'most'",
    ),
}
"""What follows the complexes, and the whole message."""


@pytest.mark.parametrize("fault", FAULTS)
def test_a_fault_is_told_in_one_sentence(fault: str) -> None:
    text, message = FAULTS[fault]
    with pytest.raises(BadInput) as caught:
        parse_sheet(COMPLEXES + text)
    assert str(caught.value) == message


def test_every_kind_has_a_fault_here() -> None:
    text = "".join(text for text, _ in FAULTS.values())
    assert {kind for kind in KINDS if f'kind = "{kind}"' not in text} == {"shelling"}
