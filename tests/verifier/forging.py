"""Genuine certificates, and files forged from them: edited as values, then counted and signed again."""

from __future__ import annotations

import hashlib
import json
from argparse import Namespace
from collections.abc import Callable
from copy import deepcopy
from functools import cache
from pathlib import Path
from tempfile import TemporaryDirectory
from typing import Any

from certify.claims import (
    Claim,
    HomologyClaim,
    RealToricClaim,
    SmashClaim,
    SummandClaim,
    TableClaim,
    TorClaim,
)
from certify.claims.actions import ActionClaim
from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.branching import BranchingClaim
from certify.claims.characters import CharacterClaim
from certify.claims.count_identities import IdentityClaim
from certify.claims.count_values import CountValuesClaim
from certify.claims.equivariance import EquivarianceClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.homology import Route
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.shellings import ShellingClaim
from certify.claims.surfaces import SurfaceClaim
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import SimplicialComplex, build
from certify.simplicial.families import polygon, simplex
from tests.helpers import certificate_of, disc_product, limits, verifier

Values = list[Any]
"""The values of the lines of a certificate, the end record included."""

Edit = Callable[[Values], object]

DEGREE_TWO = Pair.from_cells([(0, False, {}), (1, False, {}), (1, True, {}), (2, True, {1: 1, 2: -2})])
"""A circle A in a space X, on which it goes around twice: a pair with a summand of three cells."""

TWICE = Pair.from_cells([(0, False, {}), (1, False, {}), (2, True, {1: 2})])
"""A circle A in the projective plane X: a pair with a summand d e = 2 t."""


def _over(k: SimplicialComplex, pair: str, route: Route = "blocks", **fields: Any) -> HomologyClaim:
    return HomologyClaim(PolyhedralProduct(k, parse_pairs(pair, k.vertex_count)), route=route, **fields)


def _mixed(*pairs: str | Pair, route: Route = "blocks") -> HomologyClaim:
    chosen = tuple(pair if isinstance(pair, Pair) else parse_pair(pair) for pair in pairs)
    return HomologyClaim(PolyhedralProduct(simplex(len(pairs)), chosen), route=route)


ROTATION, REFLECTION = (2, 3, 4, 5, 1), (1, 5, 4, 3, 2)

CLAIMS: dict[str, Claim[Any]] = {
    "ring": _over(polygon(5), "(D1, S0)"),
    "ring-by-orbits": _over(polygon(5), "(D1, S0)", "orbits"),
    "bipartite-by-orbits": _over(
        SimplicialComplex.from_facets([[1, 2], [1, 4], [1, 5], [3, 2], [3, 4], [3, 5]]), "(D1, S0)", "orbits"
    ),
    "ring-by-cells": _over(polygon(4), "(D1, S0)", "cells"),
    "low-degrees": _over(polygon(5), "(D2, S1)", degrees=(3,)),
    "plane": _over(build("projective-plane"), "(D1, S0)"),
    "plane-by-cells": _over(build("projective-plane"), "(D2, S1)", "cells"),
    "points-of-a-cone": _over(build("points", m=3), "(cone 3, 3)"),
    "moore": _mixed("(P2(4), *)", "(P2(6), *)"),
    "real-projective": _mixed("(RP3, *)", "(RP2, *)", route="cells"),
    "moore-alone": _mixed("(P2(3), *)", route="cells"),
    "circle": _over(SimplicialComplex.from_facets([[]], vertices=[1]), "(D2, S1)", "cells"),
    "twos": _mixed(TWICE, TWICE),
    "own-pair": _mixed(DEGREE_TWO, "(D1, S0)"),
    "smash": SmashClaim(PolyhedralProduct(build("projective-plane"), parse_pairs("(D1, S0)", 6))),
    "real-toric": RealToricClaim(polygon(5), ("10101", "01011")),
    "real-toric-low": RealToricClaim(polygon(5), ("10101", "01011"), degrees=(1,)),
    "tor": TorClaim(polygon(5)),
    "table": TableClaim(polygon(4)),
    "summand": SummandClaim(build("projective-plane"), (2, 3, 4, 5, 6), (1,)),
    "automorphisms": AutomorphismsClaim(disc_product(polygon(5), 1)),
    "cyclic-group": AutomorphismsClaim(disc_product(polygon(5), (1, 1, 1, 1, 1)), (ROTATION,)),
    "character": CharacterClaim(
        disc_product(polygon(5), 1), 1, (ROTATION, REFLECTION), functions={"trivial": (1, 1, 1), "two": (4, -1, 0)}
    ),
    "character-of-all": CharacterClaim(disc_product(polygon(5), 2), 3, None, summands=("10100",)),
    "character-by-cells": CharacterClaim(disc_product(polygon(4), 1), 1, ((2, -3, 4, 1),), route="cells"),
    "character-of-summands": CharacterClaim(disc_product(polygon(5), 2), 3, (ROTATION,), summands=("10100",)),
    "character-of-a-point": CharacterClaim(
        disc_product(SimplicialComplex.from_facets([[]], vertices=[1]), 1), 0, (), summands=("0",)
    ),
    "character-of-own-pair": CharacterClaim(
        PolyhedralProduct(build("points", m=2), (DEGREE_TWO, DEGREE_TWO)), 2, ((2, 1),)
    ),
    "equivariance": EquivarianceClaim(disc_product(polygon(4), 2), 3, ((2, 3, 4, 1),)),
    "equivariance-of-own-pair": EquivarianceClaim(
        PolyhedralProduct(build("points", m=2), (DEGREE_TWO, DEGREE_TWO)), 2, None
    ),
    "action": ActionClaim(disc_product(polygon(4), 1), 1, (2, 3, 4, 1)),
    "fixed-set": FixedSetClaim(disc_product(polygon(5), 1), generators=(REFLECTION,)),
    "fixed-set-of-nothing": FixedSetClaim(disc_product(polygon(5), 1)),
    "fixed-set-of-all": FixedSetClaim(disc_product(polygon(5), 1), generators=None),
    "fixed-set-with-signs": FixedSetClaim(disc_product(polygon(4), 1), generators=((-1, 2, 3, 4),)),
    "fixed-set-of-own-pair": FixedSetClaim(
        PolyhedralProduct(build("points", m=3), (DEGREE_TWO,) * 3), generators=((2, 1, 3),)
    ),
    "orbit-space": OrbitSpaceClaim(polygon(4), ((2, 3, 4, 1),)),
    "orbit-space-of-all": OrbitSpaceClaim(polygon(4), None),
    "free-orbit-space": OrbitSpaceClaim(polygon(4), ((-1, -2, -3, -4),)),
    "surface": SurfaceClaim(polygon(4), ((1, 4, 3, 2),)),
    "branching": BranchingClaim(polygon(5), (ROTATION,)),
    "branching-of-conjugates": BranchingClaim(polygon(3), ((2, 3, 1), (-1, -2, 3))),
    "shelling": ShellingClaim(polygon(5)),
    "orbit-count": OrbitCountClaim(polygon(5), 2, (ROTATION,)),
    "orbit-count-by-content": OrbitCountClaim(polygon(5), 2, None, (2, 3)),
    "count-identity": IdentityClaim("necklaces(n, 2)", "sum(lyndon(d, 2) for d in divisors(n))", 1, 6),
    "count-values": CountValuesClaim("witt(n, 2) + 2 ** 60", 2, 5),
}
"""Claims that together use every kind, route, pair and key of the format."""


@cache
def genuine(name: str) -> bytes:
    """Return the certificate of a claim."""
    return certificate_of(CLAIMS[name])


def values_of(certificate: bytes) -> Values:
    """Return the values of the lines."""
    return [json.loads(line) for line in certificate.splitlines()]


def line_of(value: Any) -> bytes:
    """Return a line in canonical spelling."""
    return json.dumps(value, sort_keys=True, separators=(",", ":"), ensure_ascii=False).encode() + b"\n"


def signed(values: Values) -> bytes:
    """Return the certificate with these lines, but with the last one counted and signed anew."""
    body = b"".join(map(line_of, values[:-1]))
    end = {"end": {"records": len(values) - 2, "sha256": hashlib.sha256(body).hexdigest()}}
    return body + line_of(end)


def forged(name: str, edit: Edit) -> bytes:
    """Return a genuine certificate after an edit of its values, signed."""
    values = deepcopy(values_of(genuine(name)))
    edit(values)
    return signed(values)


def judged(content: bytes, name: str = "x.cert.jsonl", **changed: Any) -> dict[str, Any]:
    """Return the report of the verifier on a file with this content."""
    with TemporaryDirectory() as folder:
        path = Path(folder) / name
        path.write_bytes(content)
        report: dict[str, Any] = verifier().examine(str(path), Namespace(**(vars(limits()) | changed)))
    return report
