"""The questions that a person asks at a prompt; each answer has been proved, and has its certificate."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from typing import get_args

from certify.answers.bigraded import Splitting, Tor
from certify.answers.certificates import proved
from certify.answers.graded import Homology
from certify.claims import HomologyClaim, RealToricClaim, SmashClaim, SummandClaim, TableClaim, TorClaim
from certify.claims.homology import Route
from certify.errors import BadInput
from certify.products import Pair, PolyhedralProduct, parse_pair
from certify.products.real_toric import RealToricSpace
from certify.simplicial import Label, SimplicialComplex
from certify.simplicial.writing import plain_set

__all__ = [
    "homology",
    "polyhedral_product",
    "real_toric_space",
    "reduced_homology",
    "smash_homology",
    "splitting",
    "tor",
]


def polyhedral_product(k: SimplicialComplex, pairs: str | Pair | Sequence[str | Pair]) -> PolyhedralProduct:
    """Return the polyhedral product (X, A)^K.

    Parameters
    ----------
    k : SimplicialComplex
        K, with ghost vertices where it has them.
    pairs : str, Pair, or a sequence of these
        One pair for all vertices, or one for each in the order of the labels; written as `parse_pair` reads them.

    Raises
    ------
    BadInput
        If a pair cannot be read, or there are not as many as vertices.

    Examples
    --------
    >>> from certify import SimplicialComplex
    >>> two_points = SimplicialComplex.from_facets([[1], [2]])
    >>> print(polyhedral_product(two_points, "(D2, S1)"))
    (D²,S¹)^K
    """
    if isinstance(pairs, str | Pair):
        return PolyhedralProduct(k, (_pair(pairs),) * k.vertex_count)
    return PolyhedralProduct(k, tuple(map(_pair, pairs)))


def real_toric_space(k: SimplicialComplex, rows: Iterable[str | Iterable[int]]) -> RealToricSpace:
    """Return the real toric space (D¹, S⁰)^K / ker λ.

    Parameters
    ----------
    k : SimplicialComplex
    rows : iterable of str, or of iterables of int
        λ by rows, with a 0 or 1 for each vertex in the order of the labels: ``"110"`` or ``[1, 1, 0]``.

    Raises
    ------
    BadInput
        If a row does not fit, or λ is not injective on the vertices of a face; the face is named.

    Examples
    --------
    >>> from certify import polygon
    >>> homology(real_toric_space(polygon(3), ["101", "011"]))
    H_0 = ℤ, H_1 = ℤ/2
    """
    return RealToricSpace(k, tuple(row if isinstance(row, str) else "".join(map(str, row)) for row in rows))


def homology(
    space: PolyhedralProduct | RealToricSpace,
    degrees: Iterable[int] | None = None,
    *,
    route: Route | None = None,
    jobs: int = 1,
) -> Homology:
    """Return the integral homology of a space, proved.

    Parameters
    ----------
    space : PolyhedralProduct or RealToricSpace
    degrees : iterable of int, optional
        The degrees wanted, from 0 on; by default all of them.
    route : {"blocks", "orbits", "cells"}, optional
        How a polyhedral product is proved: by the blocks of the stable splitting, which is the default; by one block
        for each orbit of the symmetries; or by the cells of the whole product. A real toric space has cells only.
    jobs : int
        The number of processes. The answer and its certificate do not depend on it.

    Returns
    -------
    Homology
        ``H[k]`` is the group in degree k.

    Raises
    ------
    BadInput
        If a degree is negative, or there are none; if there is no such route; if the space is neither of these.

    Examples
    --------
    >>> from certify import polygon
    >>> surface = polyhedral_product(polygon(6), "(D1, S0)")
    >>> homology(surface)
    H_0 = ℤ, H_1 = ℤ³⁴, H_2 = ℤ
    >>> homology(surface, degrees=[2, 3])
    H_2 = ℤ, H_3 = 0
    """
    wanted = None if degrees is None else tuple(degrees)
    if isinstance(space, PolyhedralProduct):
        return _homology(HomologyClaim(space, wanted, route=_route(route or "blocks")), str(space), jobs)
    if not isinstance(space, RealToricSpace):
        raise _no_space(space)
    if route not in (None, "cells"):
        raise BadInput(where="route", expected="cells for a real toric space", found=f"{route}")
    return _homology(RealToricClaim(space.complex, space.rows, wanted), "(D¹,S⁰)^K/ker λ", jobs)


def smash_homology(
    product: PolyhedralProduct, degrees: Iterable[int] | None = None, *, route: Route = "blocks", jobs: int = 1
) -> Homology:
    """Return the reduced integral homology of the polyhedral smash product of the same pairs, proved.

    Parameters
    ----------
    product : PolyhedralProduct
        Of pairs that have names.
    degrees, route, jobs
        As in `homology`; the route cannot be ``"cells"``.

    Raises
    ------
    BadInput
        If a pair is given by its cells, or a degree or the route is wrong.

    Examples
    --------
    >>> from certify import polygon
    >>> smash_homology(polyhedral_product(polygon(4), "(D1, S0)"))
    H̃_2 = ℤ
    """
    wanted = None if degrees is None else tuple(degrees)
    claim = SmashClaim(product, wanted, route=_route(route))
    return _homology(claim, f"polyhedral smash product {product}", jobs, reduced=True)


def reduced_homology(
    k: SimplicialComplex, vertices: Iterable[Label] | None = None, *, link_of: Iterable[Label] = (), jobs: int = 1
) -> Homology:
    """Return the reduced integral homology of a complex, a full subcomplex, or a link cut down to some vertices.

    Parameters
    ----------
    k : SimplicialComplex
    vertices : iterable of labels, optional
        The vertices I of the full subcomplex; by default all that do not belong to the face of the link.
    link_of : iterable of labels
        A face J whose link is taken; by default the empty face, so that it is the complex itself.
    jobs : int
        The number of processes.

    Returns
    -------
    Homology
        In degrees from -1 on: the complex whose only face is empty has H̃_{-1} = ℤ. This is one summand of the stable
        splitting, without its shift of degree.

    Raises
    ------
    BadInput
        If J is no face, or a label is unknown or belongs to both.

    Examples
    --------
    >>> from certify import projective_plane
    >>> reduced_homology(projective_plane())
    H̃_1 = ℤ/2
    >>> reduced_homology(projective_plane(), link_of=[1])
    H̃_1 = ℤ
    """
    out = tuple(link_of)
    kept = tuple(label for label in k.labels if label not in out) if vertices is None else tuple(vertices)
    within = f"(link of {plain_set(out)})" if out else "K"
    space = within if len(kept) + len(out) == k.vertex_count else f"{within}_{plain_set(kept)}"
    return _homology(SummandClaim(k, kept, out), space, jobs, reduced=True)


def tor(k: SimplicialComplex, *, jobs: int = 1) -> Tor:
    """Return the bigraded groups Tor(ℤ[K], ℤ) of the face ring over the ring of polynomials in the vertices, proved.

    Parameters
    ----------
    k : SimplicialComplex
    jobs : int
        The number of processes.

    Returns
    -------
    Tor
        ``T[i, d]`` is Tor_{i,d}(ℤ[K], ℤ), with all variables in degree 2.

    Examples
    --------
    >>> from certify import polygon
    >>> tor(polygon(5))
    Tor_{0,0} = ℤ, Tor_{1,4} = ℤ⁵, Tor_{2,6} = ℤ⁵, Tor_{3,10} = ℤ
    """
    entries, certificate = proved(TorClaim(k), "Tor(ℤ[K], ℤ)", jobs)
    return Tor(tuple(((i, 2 * j), group) for (i, j), group in entries), k, certificate)


def splitting(k: SimplicialComplex, *, jobs: int = 1) -> Splitting:
    """Return the reduced homology of every full subcomplex: the stable splitting of moment-angle complexes, proved.

    Parameters
    ----------
    k : SimplicialComplex
    jobs : int
        The number of processes.

    Returns
    -------
    Splitting
        ``S[I]`` is the reduced homology of K_I; ``S.tor(i, I)`` is Tor in the multidegree of I.

    Notes
    -----
    The answer has a line for each of the 2^m sets of vertices whose subcomplex has homology.

    Examples
    --------
    >>> from certify import polygon
    >>> splitting(polygon(4))
    H̃_-1(K_∅) = ℤ, H̃_0(K_{1,3}) = ℤ, H̃_0(K_{2,4}) = ℤ, H̃_1(K_{1,2,3,4}) = ℤ
    """
    entries, certificate = proved(TableClaim(k), "H̃_*(K_I; ℤ) for all I", jobs)
    return Splitting(entries, k, certificate)


def _pair(pair: str | Pair) -> Pair:
    return parse_pair(pair) if isinstance(pair, str) else pair


def _no_space(given: object) -> BadInput:
    expected = "a polyhedral product or a real toric space (for K itself there is reduced_homology)"
    return BadInput(where="space", expected=expected, found=f"{type(given).__name__}")


def _route(route: Route) -> Route:
    """Refuse a route that is none: nobody below asks."""
    if route not in get_args(Route):
        raise BadInput(where="route", expected=f"one of {', '.join(get_args(Route))}", found=f"{route}")
    return route


def _homology(
    claim: HomologyClaim | RealToricClaim | SummandClaim, space: str, jobs: int, *, reduced: bool = False
) -> Homology:
    """Return the answer to a claim whose groups have one degree."""
    entries, certificate = proved(claim, f"{'H̃' if reduced else 'H'}_*({space}; ℤ)", jobs)
    degrees = None if isinstance(claim, SummandClaim) else claim.degrees
    return Homology(entries, degrees, space, reduced, certificate=certificate)
