"""Pairs as tables of a sheet: ``[pairs.NAME]`` with the cells of X, of which some are the cells of A."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import replace

from certify.errors import BadInput
from certify.products.pairs import Pair
from certify.tables import Table, shown

__all__ = ["pair_from_table"]

_CELL = 'a table like { degree = 1, in = "X", boundary = { 1 = -1, 2 = 1 } }'


def pair_from_table(table: Table, name: str) -> Pair:
    """Return the pair that a table with the key ``cells`` lists.

    Parameters
    ----------
    table : Table
        ``cells`` is a list of tables: ``degree``; ``in``, which is ``"A"``, or ``"X"`` for a cell outside A; and
        ``boundary``, a table of coefficients under the numbers of earlier cells, counted from 1, or nothing for 0.
    name : str
        How the sheet calls the pair; it is shown, and no part of the statement.

    Raises
    ------
    KeyFault
        If the table is not as it should be, d d is not zero, or A is not closed under d; it names the cell.

    Examples
    --------
    >>> disc = [{"degree": 0, "in": "A"}, {"degree": 1, "in": "A"}, {"degree": 2, "in": "X", "boundary": {"2": 1}}]
    >>> print(pair_from_table(Table((), {"cells": disc}), "disc").symbol)
    (disc)
    """
    table.only(("cells",))
    cells = []
    for place, value in enumerate(table.items("cells", f"a list of cells, each {_CELL}")):
        if not isinstance(value, dict):
            raise table.fault("cells", place, expected=_CELL, found=shown(value))
        cells.append(_cell(Table((*table.keys, "cells", place), value)))
    try:
        return replace(Pair.from_cells(cells), symbol=f"({name})")
    except BadInput as fault:
        match = re.fullmatch(r"cell (\d+) of the pair", fault.where, re.ASCII)
        keys = ("cells", int(match[1]) - 1) if match else ("cells",)
        raise table.fault(*keys, expected=fault.expected, found=fault.found) from fault


def _cell(table: Table) -> tuple[int, bool, Mapping[int, int]]:
    table.only(("degree", "in", "boundary"))
    degree = table.value("degree", "a whole number")
    if isinstance(degree, bool) or not isinstance(degree, int):
        raise table.fault("degree", expected="a whole number from 0 on", found=shown(degree))
    side = table.text("in", '"A" or "X"')
    if side not in ("A", "X"):
        raise table.fault("in", expected='"A", or "X" for a cell outside A', found=shown(side))
    boundary = table.values.get("boundary", {})
    if not isinstance(boundary, dict):
        raise table.fault("boundary", expected="a table like { 1 = -1, 2 = 1 }", found=shown(boundary))
    coefficients = {}
    for key, value in boundary.items():
        if not re.fullmatch(r"[1-9][0-9]{0,8}", key, re.ASCII):
            raise table.fault("boundary", key, expected="the number of a cell, counted from 1", found=shown(key))
        if isinstance(value, bool) or not isinstance(value, int):
            raise table.fault("boundary", key, expected="a whole number", found=shown(value))
        if value:
            coefficients[int(key) - 1] = value
    return degree, side == "X", coefficients
