"""Certified homology of polyhedral products (X, A)^K: claims that are computed, proved, and checked by anybody."""

from certify.certificate import Spool
from certify.claims import HomologyClaim, Proof, prove
from certify.errors import BadInput, CertifyError, ClaimIsFalse, InternalError, LimitReached
from certify.exact import AbelianGroup
from certify.products import Pair, PolyhedralProduct, parse_pair, parse_pairs
from certify.simplicial import SimplicialComplex

__all__ = [
    "AbelianGroup",
    "BadInput",
    "CertifyError",
    "ClaimIsFalse",
    "HomologyClaim",
    "InternalError",
    "LimitReached",
    "Pair",
    "PolyhedralProduct",
    "Proof",
    "SimplicialComplex",
    "Spool",
    "parse_pair",
    "parse_pairs",
    "prove",
]
__version__ = "0.1.0"
