"""What was found, for a person in the notation of mathematics and for a program as JSON."""

from __future__ import annotations

import json
from collections.abc import Mapping, Sequence
from typing import Any

import click

from certify.claims import HomologyClaim
from certify.exact import AbelianGroup

__all__ = ["homology_lines", "homology_value", "pair_lines", "say_json"]

Groups = Mapping[int, AbelianGroup]


def homology_lines(claim: HomologyClaim, groups: Groups) -> list[str]:
    """Return one line a degree, in the degrees that the claim speaks of, and one for all others where it is about all.

    Parameters
    ----------
    claim : HomologyClaim
    groups : mapping from degree to AbelianGroup
        The groups that are not zero.

    Examples
    --------
    >>> from certify import PolyhedralProduct, SimplicialComplex, parse_pairs
    >>> two_points = SimplicialComplex.from_facets([[1], [2]])
    >>> claim = HomologyClaim(PolyhedralProduct(two_points, parse_pairs("(D2, S1)", 2)), degrees=(2, 3))
    >>> for line in homology_lines(claim, {3: AbelianGroup(1)}):
    ...     print(line)
    H_2((D²,S¹)^K; ℤ) = 0
    H_3((D²,S¹)^K; ℤ) ≅ ℤ
    """
    space = str(claim.product)
    degrees: Sequence[int] = sorted(groups) if claim.degrees is None else claim.degrees
    lines = [f"H_{k}({space}; ℤ) ≅ {groups[k]}" if groups.get(k) else f"H_{k}({space}; ℤ) = 0" for k in degrees]
    return lines if claim.degrees is not None else [*lines, f"H_k({space}; ℤ) = 0 for all other k"]


def pair_lines(claim: HomologyClaim) -> list[str]:
    """Return a line that says which vertices have which pair, or none where all have the same."""
    places: dict[str, list[str]] = {}
    for label, pair in zip(claim.product.complex.labels, claim.product.pairs, strict=True):
        places.setdefault(pair.symbol, []).append(str(label))
    if len(places) < 2:
        return []
    return ["(X,A) is " + "; ".join(f"{pair} at {', '.join(labels)}" for pair, labels in places.items())]


def homology_value(groups: Groups) -> dict[str, dict[str, Any]]:
    """Return the groups that are not zero as JSON has them: the rank, and torsion as invariant factors.

    Examples
    --------
    >>> homology_value({2: AbelianGroup.of(31, [2])})
    {'2': {'rank': 31, 'torsion': [2]}}
    """
    return {
        str(degree): {"rank": group.rank, "torsion": list(group.torsion)} for degree, group in sorted(groups.items())
    }


def say_json(value: Any) -> None:
    """Print a value as one JSON object."""
    click.echo(json.dumps(value, ensure_ascii=False, indent=1))
