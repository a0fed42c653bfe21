"""Settings of every test: generated examples are repeatable in a build and fresh everywhere else."""

from __future__ import annotations

import os

from hypothesis import HealthCheck, settings

# No time limit a single example: the machine may be busy. A failure prints what repeats it.
settings.register_profile(
    "fresh", deadline=None, print_blob=True, suppress_health_check=[HealthCheck.too_slow, HealthCheck.data_too_large]
)
settings.register_profile("repeatable", settings.get_profile("fresh"), derandomize=True, database=None)
settings.load_profile("repeatable" if os.environ.get("CI") else "fresh")
