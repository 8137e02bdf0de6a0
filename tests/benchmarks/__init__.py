"""Ratios measured in one run; ``python -m tests.benchmarks`` prints the whole table."""
