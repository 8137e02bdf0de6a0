"""All claim kinds that sheets know.

A new claim kind is one more reader and one more entry in one of the tables that are joined here.
"""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

from certify.claims.reading.actions import ACTION_KINDS
from certify.claims.reading.counts import COUNT_KINDS
from certify.claims.reading.quotients import QUOTIENT_KINDS
from certify.claims.reading.spaces import SPACE_KINDS
from certify.claims.reading.tables import Kind

__all__ = ["KINDS"]

KINDS: Mapping[str, Kind] = MappingProxyType({**SPACE_KINDS, **ACTION_KINDS, **QUOTIENT_KINDS, **COUNT_KINDS})
"""The claim kinds, by the name that sheets give under ``kind``."""
