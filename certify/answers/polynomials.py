"""What counts the faces of a complex, as SymPy expressions in t."""

from __future__ import annotations

from typing import TYPE_CHECKING

from certify.simplicial import SimplicialComplex

if TYPE_CHECKING:
    import sympy

__all__ = ["f_polynomial", "h_polynomial", "hilbert_series"]


def f_polynomial(k: SimplicialComplex) -> sympy.Expr:
    """Return Σ f_{i-1} t^i, where f_{i-1} counts the faces with i vertices.

    Examples
    --------
    >>> from certify import polygon
    >>> f_polynomial(polygon(6))
    6*t**2 + 6*t + 1
    """
    return _polynomial(k.f_vector(), 1)


def h_polynomial(k: SimplicialComplex) -> sympy.Expr:
    """Return Σ h_i t^i, where (h_0, …, h_n) is the h-vector and n - 1 the dimension.

    References
    ----------
    R. P. Stanley, Combinatorics and Commutative Algebra, 2nd ed., Birkhäuser 1996, section II.2 (from memory).

    Examples
    --------
    >>> from certify import polygon
    >>> h_polynomial(polygon(6))
    t**2 + 4*t + 1
    """
    return _polynomial(k.h_vector(), 1)


def hilbert_series(k: SimplicialComplex) -> sympy.Expr:
    """Return the Hilbert series of the face ring of K as a rational function of t, with all variables in degree 2.

    Returns
    -------
    sympy.Expr
        Σ h_i t^{2i} / (1 - t²)^n, which is Σ f_{i-1} t^{2i} / (1 - t²)^i. For the grading with variables in degree 1,
        put t for t².

    References
    ----------
    R. P. Stanley, Combinatorics and Commutative Algebra, 2nd ed., Birkhäuser 1996, theorem II.1.4 (from memory).

    Examples
    --------
    >>> from certify import polygon
    >>> hilbert_series(polygon(6))
    (t**4 + 4*t**2 + 1)/(1 - t**2)**2
    """
    t = _variable()
    return _polynomial(k.h_vector(), 2) / (1 - t**2) ** (k.dimension + 1)


def _variable() -> sympy.Symbol:
    import sympy

    return sympy.Symbol("t")


def _polynomial(coefficients: tuple[int, ...], step: int) -> sympy.Expr:
    import sympy

    t = _variable()
    return sympy.Add(*(coefficient * t ** (step * i) for i, coefficient in enumerate(coefficients)))
