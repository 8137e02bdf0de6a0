"""The figures of actions, quotients and characters."""

from __future__ import annotations

import time
from collections.abc import Iterator
from pathlib import Path
from typing import Any

from certify.claims.base import Claim
from certify.claims.characters import CharacterClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.products import PolyhedralProduct, parse_pairs
from certify.simplicial.families import polygon
from certify.symmetry.elements import Element
from certify.symmetry.orbit_spaces import OrbitSpace
from tests.benchmarks.measuring import VERIFIER, Measure, claim_about, prove_to_file, verify_file
from tests.verifier.test_apart import lines_of_code


def symmetry(folder: Path) -> Iterator[Measure]:
    """Yield the rows, working in a folder."""
    rotation, reflection = _rotation(12), (1, *range(12, 1, -1))
    alone = sum(_seconds(folder / "homology", claim_about(polygon(12), "(D1, S0)")))
    claims = [CharacterClaim(_surface(12), degree, (rotation, reflection)) for degree in range(3)]
    whole = sum(_seconds(folder / "characters", *claims))
    what = "character of the dihedral group on H_0, H_1, H_2 of (D1,S0) over the 12-gon, against homology alone"
    yield Measure(what, whole / alone, 5, f"{whole:.2f} s against {alone:.2f} s, prove + verify")
    prove, verify = _seconds(folder / "quotient", OrbitSpaceClaim(polygon(10), (_rotation(10),)))
    cells = sum(OrbitSpace(_surface(10), (_rotation(10),)).chains().sizes)
    what = "homology of the rotation quotient over the 10-gon, by chains of cells: verify against prove"
    yield Measure(what, verify / prove, 1, f"{prove:.2f} s and {verify:.2f} s, {cells:,} cells of the quotient")
    twelve, sixteen = (sum(_seconds(folder / f"genus-{n}", _genus(n))) for n in (12, 16))
    what = "genus of the rotation quotient through the character, 16-gon against 12-gon, prove + verify"
    yield Measure(what, sixteen / twelve, None, f"{sixteen:.2f} s against {twelve:.2f} s")
    yield Measure("lines of code of the verifier, all kinds", lines_of_code(VERIFIER.read_bytes()), 900, "no comments")


def _rotation(n: int) -> Element:
    return (*range(2, n + 1), 1)


def _surface(n: int) -> PolyhedralProduct:
    return PolyhedralProduct(polygon(n), parse_pairs("(D1, S0)", n))


def _genus(n: int) -> CharacterClaim:
    """Return the claim about the multiplicity of the trivial character in H_1, which is twice the genus."""
    plain = CharacterClaim(_surface(n), 1, (_rotation(n),))
    ones = {"trivial": (1,) * len(plain.elements or ())}
    return CharacterClaim(_surface(n), 1, (_rotation(n),), plain.elements, {}, ones)


def _seconds(folder: Path, *claims: Claim[Any]) -> tuple[float, float]:
    """Return the seconds of proving, with the files, and of verifying the folder as a referee would."""
    start = time.perf_counter()
    for number, claim in enumerate(claims):
        prove_to_file(claim, folder / f"{number}.cert.jsonl")
    middle = time.perf_counter()
    verify_file(folder)
    return middle - start, time.perf_counter() - middle
