"""All claim kinds that sheets know.

A new claim kind is one more reader and one more entry in one of the tables that are joined here.
"""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

from certify.claims.reading import SPACE_KINDS, Kind
from certify.claims.reading_symmetry import SYMMETRY_KINDS

__all__ = ["KINDS"]

KINDS: Mapping[str, Kind] = MappingProxyType({**SPACE_KINDS, **SYMMETRY_KINDS})
"""The claim kinds, by the name that sheets give under ``kind``."""
