"""Well-known complexes by name: polygons, simplices, polytope boundaries and triangulated manifolds."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from itertools import combinations, product
from types import MappingProxyType

from certify.errors import BadInput
from certify.simplicial import triangulations
from certify.simplicial.complexes import Face, SimplicialComplex

__all__ = [
    "FAMILIES",
    "Family",
    "build",
    "cross_polytope",
    "cyclic_polytope",
    "points",
    "polygon",
    "simplex",
    "simplex_boundary",
    "simplex_skeleton",
]


def polygon(n: int) -> SimplicialComplex:
    """Return the boundary of the polygon with n >= 3 vertices, labelled 1, ..., n around it.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 3.

    Examples
    --------
    >>> print(polygon(4))
    4 vertices, facets 12 14 23 34
    """
    _check("n", n, least=3)
    return _numbered(n, [(i, (i + 1) % n) for i in range(n)])


def simplex(m: int) -> SimplicialComplex:
    """Return the full simplex on m >= 0 vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 0.

    Examples
    --------
    >>> print(simplex(3))
    3 vertices, facets 123
    """
    _check("m", m, least=0)
    return _numbered(m, [range(m)])


def simplex_boundary(m: int) -> SimplicialComplex:
    """Return all faces of the simplex on m >= 1 vertices, labelled 1, ..., m, but the simplex itself.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 1.

    Examples
    --------
    >>> print(simplex_boundary(3))
    3 vertices, facets 12 13 23
    >>> print(simplex_boundary(1))
    1 vertex, facets ∅, ghosts 1
    """
    _check("m", m, least=1)
    return _numbered(m, combinations(range(m), m - 1))


def simplex_skeleton(m: int, dim: int) -> SimplicialComplex:
    """Return the faces of dimension at most `dim` of the simplex on m vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 0, or `dim` not one from -1 to m - 1.

    Examples
    --------
    >>> print(simplex_skeleton(4, 1))
    4 vertices, facets 12 13 14 23 24 34
    """
    _check("m", m, least=0)
    _check("dim", dim, least=-1, most=m - 1)
    return _numbered(m, combinations(range(m), dim + 1))


def cross_polytope(n: int) -> SimplicialComplex:
    """Return the boundary of the cross-polytope of dimension n >= 0; vertex i is opposite to n + i.

    Raises
    ------
    BadInput
        If `n` is not a whole number of at least 0.

    Examples
    --------
    >>> print(cross_polytope(2))
    4 vertices, facets 12 14 23 34
    """
    _check("n", n, least=0)
    return _numbered(2 * n, product(*((i, n + i) for i in range(n))))


def cyclic_polytope(m: int, d: int) -> SimplicialComplex:
    """Return the boundary of the cyclic polytope of dimension d >= 2 with m > d vertices, labelled 1, ..., m.

    Raises
    ------
    BadInput
        If `d` is not a whole number of at least 2, or `m` not one of at least d + 1.

    Notes
    -----
    By Gale's evenness condition, d vertices form a facet exactly when between any two others there is an even
    number of them. So a facet consists of pairs of neighbours in the cyclic order of the vertices when d is
    even; when d is odd, of the first or the last vertex and of pairs of neighbours in the linear order of the
    others.

    References
    ----------
    G. M. Ziegler, Lectures on Polytopes, Springer 1995, theorem 0.7 (from memory).

    Examples
    --------
    >>> print(cyclic_polytope(5, 3))
    5 vertices, facets 123 125 134 145 235 345
    """
    _check("d", d, least=2)
    _check("m", m, least=d + 1)
    first, last, pairs = 0, m - 1, d // 2
    if d % 2:
        facets = [(first, *rest) for rest in _neighbour_pairs(range(1, m), pairs)]
        facets += [(*rest, last) for rest in _neighbour_pairs(range(m - 1), pairs)]
    else:
        facets = list(_neighbour_pairs(range(m), pairs))
        facets += [(first, *rest, last) for rest in _neighbour_pairs(range(1, m - 1), pairs - 1)]
    return _numbered(m, facets)


def points(m: int) -> SimplicialComplex:
    """Return m >= 0 points, labelled 1, ..., m, with no edge between them.

    Raises
    ------
    BadInput
        If `m` is not a whole number of at least 0.

    Examples
    --------
    >>> print(points(3))
    3 vertices, facets 1 2 3
    """
    _check("m", m, least=0)
    return simplex_skeleton(m, 0 if m else -1)


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
            Family("polygon", polygon, {"n": "number of vertices, at least 3"}, "boundary of a polygon"),
            Family("simplex", simplex, {"m": "number of vertices"}, "full simplex"),
            Family(
                "simplex-boundary",
                simplex_boundary,
                {"m": "number of vertices, at least 1"},
                "boundary of a simplex",
            ),
            Family(
                "simplex-skeleton",
                simplex_skeleton,
                {"m": "number of vertices", "dim": "dimension of the skeleton, from -1 to m - 1"},
                "skeleton of a simplex",
            ),
            Family(
                "cross-polytope",
                cross_polytope,
                {"n": "dimension"},
                "boundary of a cross-polytope, 2n vertices",
            ),
            Family(
                "cyclic-polytope",
                cyclic_polytope,
                {"m": "number of vertices, at least d + 1", "d": "dimension, at least 2"},
                "boundary of a cyclic polytope",
            ),
            Family("points", points, {"m": "number of points"}, "points without edges"),
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
    try:
        return family.function(**arguments)
    except BadInput as fault:
        raise fault.inside(f"family {name}") from None


def _check(name: str, value: int, *, least: int, most: int | None = None) -> None:
    """Refuse a value that is no whole number or out of range; sheets may hold anything here."""
    wanted = f"a whole number of at least {least}" if most is None else f"a whole number from {least} to {most}"
    is_number = isinstance(value, int) and not isinstance(value, bool)
    if not is_number or value < least or (most is not None and value > most):
        raise BadInput(where=f"argument {name}", expected=wanted, found=repr(value))


def _numbered(count: int, faces: Iterable[Iterable[int]]) -> SimplicialComplex:
    """Return the complex on vertices labelled 1, ..., `count`; its faces are written with numbers from 0."""
    return SimplicialComplex.from_faces(range(1, count + 1), faces)


def _neighbour_pairs(row: Sequence[int], pairs: int) -> Iterator[Face]:
    """Yield all unions of the given number of disjoint pairs of neighbours in a row of vertices."""
    # Shrinking each pair to one place turns such a union into a choice of places in a shorter row.
    for places in combinations(range(len(row) - pairs), pairs):
        starts = [place + number for number, place in enumerate(places)]
        yield tuple(row[place] for start in starts for place in (start, start + 1))
