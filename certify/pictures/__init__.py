"""Pictures: complexes with their orbits, quotient surfaces as polygons, tables of multiplicities."""
