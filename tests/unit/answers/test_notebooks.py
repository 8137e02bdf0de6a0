from __future__ import annotations

from xml.etree import ElementTree

from certify import SimplicialComplex, points, polygon, polyhedral_product


def test_complexes_in_latex() -> None:
    assert polygon(3)._repr_latex_() == r"$\langle \{1, 2\}, \{1, 3\}, \{2, 3\} \rangle$"
    assert SimplicialComplex.from_facets([[]]).latex() == r"\langle \varnothing \rangle"
    ghost = SimplicialComplex.from_facets([["a"]], vertices=["a", "b_1"])
    assert ghost.latex() == r"\langle \{a\} \rangle \text{ on } \{a, \mathrm{b\_1}\}"


def test_complexes_in_html() -> None:
    shown = ElementTree.fromstring(SimplicialComplex.from_facets([["<b>", "&"]])._repr_html_())
    assert shown.text == "2 vertices, facets &,<b>; f-vector (1, 2, 1)"


def test_products_at_a_prompt() -> None:
    k = points(2)
    assert repr(polyhedral_product(k, "(D1, S0)")) == "(D¹,S⁰)^K, where K has 2 vertices, facets 1 2"
    mixed = repr(polyhedral_product(k, ["(D1, S0)", "(S3, *)"]))
    assert mixed == "(X,A)^K, where K has 2 vertices, facets 1 2, and the pairs are (D¹,S⁰), (S³,*)"
