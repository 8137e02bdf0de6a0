"""Claim kinds: what each states, how it is computed, which records prove it. One module a kind."""

from certify.claims.base import Claim, GroupsClaim
from certify.claims.homology import HomologyClaim, SmashClaim
from certify.claims.proof import Progress, Proof, Workers, prove
from certify.claims.real_toric import RealToricClaim
from certify.claims.splitting import SummandClaim, TableClaim, TorClaim

__all__ = [
    "Claim",
    "GroupsClaim",
    "HomologyClaim",
    "Progress",
    "Proof",
    "RealToricClaim",
    "SmashClaim",
    "SummandClaim",
    "TableClaim",
    "TorClaim",
    "Workers",
    "prove",
]
