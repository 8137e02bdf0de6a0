"""Certificate files: canonical lines, records, and writing them whole or not at all."""

from certify.certificate.canonical import FORMAT, canonical_line, fingerprint
from certify.certificate.records import basis_value, vector_value
from certify.certificate.writing import Spool, certificate_name, write_whole

__all__ = [
    "FORMAT",
    "Spool",
    "basis_value",
    "canonical_line",
    "certificate_name",
    "fingerprint",
    "vector_value",
    "write_whole",
]
