from __future__ import annotations

import pytest

from certify.exact import BasedComplex
from certify.products import PolyhedralProduct, cell_complex
from certify.simplicial import SimplicialComplex, build
from tests.helpers import disc_product

EMPTY = SimplicialComplex.from_facets([[]])
GHOST = SimplicialComplex.from_facets([[]], vertices=[1])
POINT = build("simplex", m=1)
BETWEEN_GHOSTS = SimplicialComplex.from_facets([["b"]], vertices=["a", "b", "c"])

SPACES = [
    disc_product(EMPTY, 1),
    disc_product(BETWEEN_GHOSTS, [3, 1, 2]),
    disc_product(build("simplex", m=3), 1),
    disc_product(build("simplex", m=3), [2, 3, 4]),
    disc_product(build("polygon", n=5), 2),
    disc_product(build("projective-plane"), [1, 2, 3, 1, 2, 3]),
]
each_space = pytest.mark.parametrize("space", SPACES, ids=lambda space: f"{space}, K with {space.complex}")


@pytest.mark.parametrize(
    ("k", "n", "sizes"),
    [
        (EMPTY, 1, (1,)),
        (GHOST, 1, (2,)),
        (GHOST, 2, (1, 1)),
        (GHOST, 4, (1, 0, 0, 1)),
        (POINT, 1, (2, 1)),
        (POINT, 2, (1, 1, 1)),
        (POINT, 3, (1, 0, 1, 1)),
        # S⁰ × D¹ × S⁰, S¹ × D² × S¹ and S⁰ × D² × S².
        (BETWEEN_GHOSTS, 1, (8, 4)),
        (BETWEEN_GHOSTS, 2, (1, 3, 4, 3, 1)),
        (BETWEEN_GHOSTS, [1, 2, 3], (2, 2, 4, 2, 2)),
        # The torus as a union of squares in the boundary of the 4-cube.
        (build("polygon", n=4), 1, (16, 32, 16)),
    ],
)
def test_the_number_of_cells(k: SimplicialComplex, n: int | list[int], sizes: tuple[int, ...]) -> None:
    assert cell_complex(disc_product(k, n)).sizes == sizes


@each_space
def test_the_total_number_of_cells(space: PolyhedralProduct) -> None:
    m = space.complex.vertex_count
    expected = sum(f * 2 ** (m - size) for size, f in enumerate(space.complex.f_vector()))
    assert sum(cell_complex(space).sizes) == expected


@each_space
def test_it_is_a_complex_in_canonical_form(space: PolyhedralProduct) -> None:
    """The factory refuses a d d that is not zero, and sorts."""
    complex_ = cell_complex(space)
    assert BasedComplex.from_columns(complex_.boundaries) == complex_


def test_the_order_of_cells_and_the_signs_of_a_square() -> None:
    """Points 00, 01, 10, 11; edges e0, e1, 0e, 1e; and d(e × e) = (1 - 0) × e - e × (1 - 0)."""
    assert cell_complex(disc_product(build("simplex", m=2), 1)).boundaries == (
        ((), (), (), ()),
        (((0, -1), (2, 1)), ((1, -1), (3, 1)), ((0, -1), (1, 1)), ((2, -1), (3, 1))),
        (((0, 1), (1, -1), (2, -1), (3, 1)),),
    )


@pytest.mark.parametrize(("n", "degree", "sign"), [(2, 3, -1), (3, 5, 1), (4, 7, -1)])
def test_the_signs_of_a_product_of_two_discs(n: int, degree: int, sign: int) -> None:
    """d(e × e) = t × e + (-1)ⁿ e × t, d(e × t) = t × t, and d(t × e) = (-1)^(n-1) t × t; e × t is before t × e."""
    boundaries = cell_complex(disc_product(build("simplex", m=2), n)).boundaries
    assert boundaries[degree + 1] == (((0, -sign), (1, 1)),)
    ((first, plus), (other, minus)) = boundaries[degree][0] + boundaries[degree][1]
    assert first == other
    assert (plus, minus) == (1, sign)


@each_space
@pytest.mark.parametrize("top", [0, 1, 2, 5, 100])
def test_cells_above_the_top_are_left_out(space: PolyhedralProduct, top: int) -> None:
    assert cell_complex(space, top).boundaries == cell_complex(space).boundaries[: top + 1]
