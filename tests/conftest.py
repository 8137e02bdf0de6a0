"""What holds for every test: how Hypothesis searches, and what pytest leaves to another command."""

from __future__ import annotations

from hypothesis import HealthCheck, settings

# Run by hand with `python -m tests.benchmarks`.
collect_ignore = ["benchmarks"]

# No test depends on the time of day or on how busy the machine is: no deadline for an example, and no
# complaint when drawing the examples is slow.
_CALM = settings(deadline=None, max_examples=50, suppress_health_check=[HealthCheck.too_slow])

# At the desk each run draws new examples and remembers the ones that failed. In CI every run of a commit
# draws the same ones, so that a change is only ever red for a fault of its own.
settings.register_profile("dev", _CALM)
settings.register_profile("ci", _CALM, derandomize=True)
settings.load_profile("dev")
