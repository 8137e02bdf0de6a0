from __future__ import annotations

from collections.abc import Sequence

import pytest

from certify.exact import BasedComplex
from certify.products import cell_complex
from certify.simplicial import SimplicialComplex, build
from tests.helpers import disc_product

EMPTY = SimplicialComplex.from_facets([[]])
GHOST = SimplicialComplex.from_facets([[]], vertices=[1])
POINT = build("simplex", m=1)
TWO_GHOSTS_AND_A_POINT = SimplicialComplex.from_facets([["b"]], vertices=["a", "b", "c"])


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
        (TWO_GHOSTS_AND_A_POINT, 1, (8, 4)),
        (TWO_GHOSTS_AND_A_POINT, 2, (1, 3, 4, 3, 1)[:1] + (3, 4, 3, 1)),
        (TWO_GHOSTS_AND_A_POINT, [1, 2, 3], (2, 2, 4, 4, 4, 4)[:0] + (2, 0, 2 + 2, 2 + 2, 2 + 2, 0)),
        # The torus: 16 points, 32 edges, 16 squares.
        (build("polygon", n=4), 1, (16, 32, 16)),
    ],
)
def test_the_number_of_cells(k: SimplicialComplex, n: int | list[int], sizes: tuple[int, ...]) -> None:
    assert cell_complex(disc_product(k, n)).sizes == sizes
