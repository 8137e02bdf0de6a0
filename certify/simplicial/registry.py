"""The families of complexes that can be asked for by name."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from types import MappingProxyType

from certify.errors import BadInput
from certify.simplicial import associahedra, families, triangulations
from certify.simplicial.complexes import SimplicialComplex

__all__ = ["FAMILIES", "Family", "build"]


@dataclass(frozen=True, slots=True)
class Family:
    """A complex, or a family of complexes with parameters, that can be asked for by name.

    Parameters
    ----------
    name : str
        As claim sheets write it.
    function : callable
        Returns the complex; takes the parameters by name.
    parameters : mapping
        The name of each parameter, with its meaning in a few words.
    description : str
        What it is, in a few words.
    """

    name: str
    function: Callable[..., SimplicialComplex]
    parameters: Mapping[str, str]
    description: str


FAMILIES: Mapping[str, Family] = MappingProxyType(
    {
        family.name: family
        for family in (
            Family("polygon", families.polygon, {"n": "number of vertices, at least 3"}, "boundary of a polygon"),
            Family("simplex", families.simplex, {"m": "number of vertices"}, "full simplex"),
            Family(
                "simplex-boundary",
                families.simplex_boundary,
                {"m": "number of vertices, at least 1"},
                "boundary of a simplex",
            ),
            Family(
                "simplex-skeleton",
                families.simplex_skeleton,
                {"m": "number of vertices", "dim": "dimension of the skeleton, from -1 to m - 1"},
                "skeleton of a simplex",
            ),
            Family(
                "cross-polytope",
                families.cross_polytope,
                {"n": "dimension"},
                "boundary of a cross-polytope, 2n vertices",
            ),
            Family(
                "cyclic-polytope",
                families.cyclic_polytope,
                {"m": "number of vertices, at least d + 1", "d": "dimension, at least 2"},
                "boundary of a cyclic polytope",
            ),
            Family(
                "stacked-polytope",
                families.stacked_polytope,
                {"m": "number of vertices, at least d + 1", "d": "dimension, at least 2"},
                "boundary of a stacked polytope",
            ),
            Family(
                "associahedron-dual",
                associahedra.associahedron_dual,
                {"n": "dimension, at least 1"},
                "boundary of the dual of an associahedron",
            ),
            Family(
                "cyclohedron-dual",
                associahedra.cyclohedron_dual,
                {"n": "dimension, at least 2"},
                "boundary of the dual of a cyclohedron",
            ),
            Family(
                "stellohedron-dual",
                associahedra.stellohedron_dual,
                {"n": "dimension, at least 1"},
                "boundary of the dual of a stellohedron",
            ),
            Family(
                "permutohedron-dual",
                associahedra.permutohedron_dual,
                {"n": "dimension, at least 1"},
                "boundary of the dual of a permutohedron, 2^(n + 1) - 2 vertices",
            ),
            Family("points", families.points, {"m": "number of points"}, "points without edges"),
            Family("projective-plane", triangulations.projective_plane, {}, "real projective plane, 6 vertices"),
            Family("torus", triangulations.torus, {}, "torus, 7 vertices"),
            Family("klein-bottle", triangulations.klein_bottle, {}, "Klein bottle, 8 vertices"),
            Family(
                "complex-projective-plane",
                triangulations.complex_projective_plane,
                {},
                "complex projective plane, 9 vertices",
            ),
            Family(
                "poincare-sphere",
                triangulations.poincare_sphere,
                {},
                "Poincaré homology 3-sphere, 16 vertices",
            ),
        )
    }
)
"""The families, by name."""


_LARGEST_ARGUMENT = 10_000


def build(name: str, /, **arguments: object) -> SimplicialComplex:
    """Return a member of a family.

    Parameters
    ----------
    name : str
        A key of `FAMILIES`.
    **arguments
        A value for each parameter of the family.

    Raises
    ------
    BadInput
        If there is no such family, or an argument is missing, unknown or impossible.

    Examples
    --------
    >>> print(build("polygon", n=3))
    3 vertices, facets 12 13 23
    >>> build("polygon", n=2)
    Traceback (most recent call last):
    certify.errors.BadInput: family polygon, argument n: expected a whole number of at least 3, found 2
    """
    family = FAMILIES.get(name)
    if family is None:
        raise BadInput(where="family", expected=f"one of {', '.join(FAMILIES)}", found=repr(name))
    for parameter, meaning in family.parameters.items():
        if parameter not in arguments:
            raise BadInput(where=f"family {name}", expected=f"the argument {parameter} ({meaning})", found="none")
    for argument in arguments:
        if argument not in family.parameters:
            known = f"only {', '.join(family.parameters)}" if family.parameters else "no argument"
            raise BadInput(where=f"family {name}", expected=known, found=f"the argument {argument}")
    for argument, value in arguments.items():
        # A slip of the finger should not take all the memory of the machine.
        if isinstance(value, int) and value > _LARGEST_ARGUMENT:
            where = f"family {name}, argument {argument}"
            raise BadInput(where=where, expected=f"a whole number of at most {_LARGEST_ARGUMENT}", found=f"{value}")
    try:
        return family.function(**arguments)
    except BadInput as fault:
        raise fault.inside(f"family {name}") from None
