"""What is true: groups computed from a statement with python-flint's Smith forms, without any certificate."""

from __future__ import annotations

from typing import Any

from flint import fmpz_mat

from certify.certificate import Spool
from certify.claims import Claim, prove
from certify.claims.actions import ActionClaim
from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.branching import BranchingClaim
from certify.claims.characters import CharacterClaim
from certify.claims.count_identities import IdentityClaim
from certify.claims.count_values import CountValuesClaim
from certify.claims.equivariance import EquivarianceClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.shellings import ShellingClaim
from certify.claims.surfaces import SurfaceClaim
from certify.errors import CertifyError
from certify.exact import AbelianGroup, BasedComplex
from certify.products import Block, Pair, PolyhedralProduct, cell_complex, parse_pair
from certify.products.real_toric import RealToricSpace
from certify.simplicial import SimplicialComplex
from certify.simplicial.operations import full_subcomplex, link

__all__ = ["is_true"]


def is_true(statement: dict[str, Any]) -> bool:
    """Tell whether a statement is true.

    For the kinds homology, real-toric and summand by Smith forms; for those about symmetries by the prover, which
    shares no code with the verifier and is held against published values and theorems elsewhere.
    """
    if statement["kind"] not in ("homology", "real-toric", "summand"):
        return _recomputed(statement)
    complex_, least = _space(statement)
    found = {k + least: group for k, group in enumerate(_homology(complex_)) if group}
    stated = {k: AbelianGroup.of(int(rank), map(int, torsion)) for k, rank, torsion in statement["groups"]}
    degrees = statement.get("degrees")
    return stated == {k: group for k, group in found.items() if degrees is None or k in degrees}


def _recomputed(statement: dict[str, Any]) -> bool:
    """Tell whether the prover answers the question of a statement in the same way."""
    try:
        claim = _claim(statement)
        with Spool() as spool:
            return prove(claim, spool).statement == statement
    except CertifyError:
        return False


def _claim(statement: dict[str, Any]) -> Claim[Any]:
    """Return the claim that asks the question of a statement about symmetries."""
    if statement["kind"] == "count-identity":
        return IdentityClaim(*(statement[key] for key in ("left", "right", "first", "last")))
    if statement["kind"] == "count-values":
        return CountValuesClaim(*(statement[key] for key in ("formula", "first", "last")))
    k = SimplicialComplex.from_facets(statement["facets"], range(1, statement["vertices"] + 1))
    given = statement.get("generators")
    generators = None if given is None else tuple(map(tuple, given))
    product = PolyhedralProduct(k, tuple(map(_pair, statement.get("pairs", ["(D1, S0)"] * k.vertex_count))))
    degrees = statement.get("degrees")
    match statement["kind"]:
        case "automorphisms":
            return AutomorphismsClaim(product, generators)
        case "character":
            elements = tuple(map(tuple, statement["elements"]))
            functions = {str(i): tuple(map(int, psi)) for i, psi in enumerate(statement["functions"])}
            words = statement["summands"]
            summands = None if words is None else tuple(words)
            return CharacterClaim(product, statement["degree"], generators, elements, {}, functions, summands)
        case "equivariance":
            elements = tuple(map(tuple, statement["elements"]))
            return EquivarianceClaim(product, statement["degree"], generators, elements)
        case "action":
            return ActionClaim(product, statement["degree"], tuple(statement["element"]))
        case "fixed-set":
            return FixedSetClaim(product, degrees and tuple(degrees), generators=generators)
        case "orbit-space":
            return OrbitSpaceClaim(k, generators, degrees and tuple(degrees))
        case "surface":
            return SurfaceClaim(k, generators)
        case "branching":
            return BranchingClaim(k, generators)
        case "shelling":
            return ShellingClaim(k)
        case "orbit-count":
            content = statement["content"]
            return OrbitCountClaim(k, statement["colours"], generators, content and tuple(content))
        case kind:
            raise NotImplementedError(kind)


def _space(statement: dict[str, Any]) -> tuple[BasedComplex, int]:
    """Return the whole chain complex that a statement is about, and its lowest degree."""
    vertices = range(1, statement["vertices"] + 1)
    k = SimplicialComplex.from_facets(statement["facets"], vertices)
    match statement["kind"]:
        case "homology":
            return cell_complex(PolyhedralProduct(k, tuple(map(_pair, statement["pairs"])))), 0
        case "real-toric":
            return RealToricSpace(k, tuple(statement["rows"])).chains(), 0
        case "summand":
            part = full_subcomplex(link(k, statement["out"]), statement["kept"])
            return Block("", (1,) * part.vertex_count, part.face_masks(), {0: 1}).chains(), -1
        case kind:
            raise NotImplementedError(kind)


def _pair(value: Any) -> Pair:
    if isinstance(value, str):
        return parse_pair(value)
    cells = [(d, bool(side), dict(zip(b[::2], b[1::2], strict=True))) for d, side, b in value["cells"]]
    return Pair.from_cells(cells)


def _homology(complex_: BasedComplex) -> list[AbelianGroup]:
    """Return the homology by ranks and invariant factors of the dense boundary matrices."""
    forms = [_invariants(complex_.dense(k)) if k else [] for k in range(len(complex_.sizes))] + [[]]
    return [
        AbelianGroup.of(size - len(forms[k]) - len(forms[k + 1]), forms[k + 1]) for k, size in enumerate(complex_.sizes)
    ]


def _invariants(matrix: list[list[int]]) -> list[int]:
    """Return the non-zero diagonal entries of the Smith form."""
    if not matrix or not matrix[0]:
        return []
    form = fmpz_mat(matrix).snf()
    return [abs(int(form[i, i])) for i in range(min(form.nrows(), form.ncols())) if form[i, i] != 0]
