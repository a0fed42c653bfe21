"""Where a live load stands at its worst, as forces on the deck joints."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from models.calculation import Array
from models.loading.arrangement import worst_arrangement
from models.loading.live import Crowd, Everywhere, Pattern, Placed, Together, axle_places
from models.loading.rules import RULES, CrowdByArea, CrowdByLength

PANELS = np.array([2.0, 3.0, 2.5, 4.0, 1.5])
X = np.concatenate([[0.0], np.cumsum(PANELS)])

CROWD = Crowd(4000.0, 0.0, PANELS)
OVERHANGING = Crowd(4000.0, 300.0, PANELS)
CART = Placed(axle_places(X, np.array([0.0, 1.8]), np.array([8e3, 14e3])), (0.7, -0.1))
PATTERNS: dict[str, Pattern] = {
    "crowd": CROWD,
    "crowd beyond the other truss": OVERHANGING,
    "snow": Everywhere(1500.0, PANELS),
    "cart": CART,
    "together": Together(((1.0, CROWD), (0.4, CART))),
    "by length": CrowdByLength(1.2, 0.1, PANELS),
    "by area": CrowdByArea(1.2, 1.2, 0.1, PANELS),
}

lines = st.lists(st.integers(-20, 20), min_size=6, max_size=6).map(lambda some: 0.1 * np.array(some, float))


@pytest.mark.parametrize("name", PATTERNS)
@settings(max_examples=40)
@given(line=lines)
def test_the_arrangement_gives_the_largest_effect(name: str, line: Array) -> None:
    """Forces on the joints times ordinates are the largest effect that superposition finds."""
    pattern = PATTERNS[name]
    forces = worst_arrangement(pattern, line)
    assert forces.shape == line.shape
    assert forces @ line == pytest.approx(float(pattern.extremes(line)[0]), rel=1e-6, abs=1e-6)


@settings(max_examples=10)
@given(st.lists(lines, min_size=4, max_size=4))
def test_many_lines_are_as_one_by_one(some: list[Array]) -> None:
    """Lines may come in any shape."""
    together = np.array(some).reshape(2, 2, 6)
    for pattern in PATTERNS.values():
        found = worst_arrangement(pattern, together).reshape(4, 6)
        for line, forces in zip(some, found, strict=True):
            # Of several arrangements that are as bad any may come.
            assert forces @ line == pytest.approx(worst_arrangement(pattern, line) @ line, rel=1e-9, abs=1e-6)


def test_a_crowd_ends_where_the_line_crosses_zero() -> None:
    """Over a third of a panel of 3 m, 1 m of crowd stands: five sixths of it on the near joint."""
    line = np.array([-1.0, 1.0, -2.0, 0.0, 0.0, 0.0])
    forces = worst_arrangement(Crowd(600.0, 0.0, PANELS), line)
    np.testing.assert_allclose(forces, [600 * 0.25, 600 * 0.75 + 500, 100, 0, 0, 0])


def test_every_rule_has_an_arrangement() -> None:
    """Pressures by rule stand somewhere too."""
    assert {type(pattern) for pattern in PATTERNS.values()} >= {CrowdByLength, CrowdByArea}
    assert len(RULES) == 2
