"""Claim kinds: what each states, how it is computed, which records prove it. One module a kind."""

from certify.claims.homology import HomologyClaim
from certify.claims.proof import Progress, Proof, prove

__all__ = ["HomologyClaim", "Progress", "Proof", "prove"]
