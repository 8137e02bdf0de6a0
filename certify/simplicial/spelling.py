"""Sets of vertices as keys and in command lines: labels in a row, read back by what they are called."""

from __future__ import annotations

from collections.abc import Iterable, Mapping

from certify.errors import BadInput
from certify.simplicial.arguments import Label
from certify.simplicial.complexes import SimplicialComplex

__all__ = ["labels_by_text", "read_labels", "spell_labels"]


def spell_labels(labels: Iterable[Label]) -> str:
    """Write labels in a row, separated by blanks; by commas where a label has a blank in it.

    Examples
    --------
    >>> spell_labels([1, 3]), spell_labels(["front left", "back"]), spell_labels(["front left"])
    ('1 3', 'front left, back', 'front left,')
    """
    names = [str(label) for label in labels]
    if any(set(name) & set(" \t") for name in names):
        return ", ".join(names) + ("," if len(names) == 1 else "")
    return " ".join(names)


def labels_by_text(k: SimplicialComplex) -> Mapping[str, Label]:
    """Return the labels of a complex by what they are called.

    Raises
    ------
    BadInput
        If two of them are called the same, as 1 and "1" are.
    """
    known = {str(label): label for label in k.labels}
    if len(known) < k.vertex_count:
        twin = next(label for label in k.labels if known[str(label)] != label)
        found = f"{twin!r} and {known[str(twin)]!r}"
        raise BadInput(where="the labels", expected="labels that read differently, or all numbers", found=found)
    return known


def read_labels(k: SimplicialComplex, text: str, where: str) -> tuple[Label, ...]:
    """Return the labels that `spell_labels` wrote, or a person.

    Raises
    ------
    BadInput
        If there is no such vertex, or it stands there twice.

    Examples
    --------
    >>> read_labels(SimplicialComplex.from_facets([[1, 2], [2, 3]]), "1 3", "key groups")
    (1, 3)
    """
    known = labels_by_text(k)
    names = [name.strip() for name in text.removesuffix(",").split(",")] if "," in text else text.split()
    found: dict[Label, None] = {}
    for name in names:
        if name not in known:
            raise BadInput(where=where, expected="vertices of the complex", found=f"{name!r}, which is none")
        if known[name] in found:
            raise BadInput(where=where, expected="each vertex once", found=f"{name!r} twice")
        found[known[name]] = None
    return tuple(found)
