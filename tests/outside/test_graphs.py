"""Our certified answers against networkx on one-dimensional products: connected components and independent cycles."""

from __future__ import annotations

from itertools import product

import networkx as nx
import pytest
from hypothesis import given

from certify.claims.homology import Route
from certify.exact import AbelianGroup
from certify.simplicial import SimplicialComplex, build, skeleton
from tests.helpers import certified_homology, disc_product, graded
from tests.strategies import complexes

State = tuple[int, ...]

both_routes = pytest.mark.parametrize("route", ["blocks", "cells"])


def _states(k: SimplicialComplex) -> nx.Graph[State]:
    """Return the graph of the cube's corners, with the edges of the cube along those coordinates that are faces."""
    graph: nx.Graph[State] = nx.Graph()
    m = k.vertex_count
    graph.add_nodes_from(product((0, 1), repeat=m))
    moving = [i for i, label in enumerate(k.labels) if k.is_face([label])]
    for state in list(graph):
        graph.add_edges_from((state, (*state[:i], 1 - state[i], *state[i + 1 :])) for i in moving)
    return graph


@both_routes
@given(complexes(max_vertices=6))
def test_components_and_cycles_of_a_graph_of_states(route: Route, k: SimplicialComplex) -> None:
    """H_0 counts the components of a graph, and H_1 the edges outside a spanning forest."""
    points = skeleton(k, min(k.dimension, 0))
    graph = _states(points)
    forest = nx.number_of_edges(graph) - len(list(nx.minimum_spanning_edges(graph)))
    components = nx.number_connected_components(graph)
    groups = certified_homology(disc_product(points, 1), route=route)
    assert groups == {k: g for k, g in graded({0: components, 1: forest}).items() if g}


@given(complexes(max_vertices=6))
def test_components_of_any_product(k: SimplicialComplex) -> None:
    """Cells of degree above 1 join nothing that edges do not join; the other pairs (Dⁿ, Sⁿ⁻¹) are connected."""
    components = nx.number_connected_components(_states(k))
    assert certified_homology(disc_product(k, 1), [0]) == {0: AbelianGroup.of(components)}
    assert certified_homology(disc_product(k, 2), [0]) == {0: AbelianGroup.of(1)}


@pytest.mark.parametrize(("m", "cycles"), [(1, 0), (2, 1), (3, 5), (4, 17)])
def test_a_cycle_basis_of_the_cube(m: int, cycles: int) -> None:
    """The numbers are those of A02 in check_values.json; networkx finds as many cycles in a basis."""
    k = build("points", m=m)
    assert len(nx.cycle_basis(_states(k))) == cycles
    assert certified_homology(disc_product(k, 1)).get(1, AbelianGroup()) == AbelianGroup.of(cycles)
