"""Claim kinds: what each states, how it is computed, which records prove it. One module a kind."""

from certify.claims.actions import ActionClaim
from certify.claims.automorphisms import AutomorphismsClaim
from certify.claims.base import Claim, GroupsClaim
from certify.claims.branching import BranchingClaim
from certify.claims.characters import CharacterClaim
from certify.claims.count_identities import IdentityClaim
from certify.claims.count_values import CountValuesClaim
from certify.claims.equivariance import EquivarianceClaim
from certify.claims.fixed_sets import FixedSetClaim
from certify.claims.homology import HomologyClaim, SmashClaim
from certify.claims.orbit_counts import OrbitCountClaim
from certify.claims.orbit_spaces import OrbitSpaceClaim
from certify.claims.proof import Progress, Proof, Workers, prove
from certify.claims.real_toric import RealToricClaim
from certify.claims.shellings import ShellingClaim
from certify.claims.splitting import SummandClaim, TableClaim, TorClaim
from certify.claims.surfaces import SurfaceClaim

__all__ = [
    "ActionClaim",
    "AutomorphismsClaim",
    "BranchingClaim",
    "CharacterClaim",
    "Claim",
    "CountValuesClaim",
    "EquivarianceClaim",
    "FixedSetClaim",
    "GroupsClaim",
    "HomologyClaim",
    "IdentityClaim",
    "OrbitCountClaim",
    "OrbitSpaceClaim",
    "Progress",
    "Proof",
    "RealToricClaim",
    "ShellingClaim",
    "SmashClaim",
    "SummandClaim",
    "SurfaceClaim",
    "TableClaim",
    "TorClaim",
    "Workers",
    "prove",
]
