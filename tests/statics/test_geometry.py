"""Trusses as arrays."""

from __future__ import annotations

import numpy as np
import pytest
from plane.build import truss
from plane.footbridge import pratt

from models.statics.geometry import equilibrium_matrix, geometry_of

TRIANGLE = truss({"A": (0, 0), "B": (4, 0), "C": (0, 3)}, "AB BC CA", {"A": "xy", "B": "y"}, deck="A B")


def test_a_truss_of_a_bridge_keeps_the_order_of_the_file() -> None:
    """Joints and bars stand in the order of the site file, which numbers the equations."""
    built = pratt(4, "3 m", "2 m")
    geometry = geometry_of(built)
    assert geometry.joints == tuple(built.joints)
    assert geometry.bars == tuple(bar.id for bar in built.bars)
    assert [geometry.joints[number] for number in geometry.deck] == list(built.deck_joints)
    assert {geometry.joints[number] for number in geometry.ends[-1]} == {built.bars[-1].start, built.bars[-1].end}
    np.testing.assert_allclose(geometry.coordinates[geometry.joints.index("U1")], [3.0, 2.0])


def test_a_pin_holds_both_ways_and_a_roller_upward() -> None:
    """Supports hold what their kind says and nothing else."""
    geometry = geometry_of(pratt(4, "3 m", "2 m"))
    held = {geometry.joints[at // 2] + "xy"[at % 2] for at in np.flatnonzero(geometry.held)}
    assert held == {"L0x", "L0y", "L4y"}


def test_lengths() -> None:
    """A 3-4-5 triangle has its lengths."""
    np.testing.assert_allclose(TRIANGLE.lengths, [4.0, 5.0, 3.0], rtol=1e-15)


def test_degree_counts_bars_reactions_and_joints() -> None:
    """The degree is m + r - 2j (Maxwell)."""
    assert TRIANGLE.degree == 0
    assert TRIANGLE.keeping([0, 1]).degree == -1


@pytest.mark.parametrize(
    ("held", "span"), [({"A": "xy", "B": "y"}, 4.0), ({"A": "xy"}, 4.0), ({}, 4.0), ({"A": "x", "C": "y"}, 0.0)]
)
def test_span_is_between_the_outermost_supports(held: dict[str, str], span: float) -> None:
    """Of all joints where there are fewer than two supports."""
    assert truss({"A": (0, 0), "B": (4, 0), "C": (0, 3)}, "AB BC CA", held).span == span


def test_keeping_some_bars() -> None:
    """The kept bars keep their names and ends, in the order asked for; joints and supports stay."""
    kept = TRIANGLE.keeping(np.array([2, 0]))
    assert kept.bars == ("CA", "AB")
    np.testing.assert_array_equal(kept.ends, TRIANGLE.ends[[2, 0]])
    assert kept.joints == TRIANGLE.joints
    np.testing.assert_array_equal(kept.held, TRIANGLE.held)


def test_keeping_no_bar() -> None:
    """A truss may have lost all its bars."""
    kept = TRIANGLE.keeping([])
    assert kept.bars == ()
    assert kept.ends.shape == (0, 2)
    assert equilibrium_matrix(kept).shape == (6, 0)


def test_equilibrium_matrix_of_a_triangle() -> None:
    """The column of a bar holds the unit vector towards its other end, at both ends."""
    expected = np.array([
        [1.0, 0.0, 0.0],
        [0.0, 0.0, 1.0],
        [-1.0, -0.8, 0.0],
        [0.0, 0.6, 0.0],
        [0.0, 0.8, 0.0],
        [0.0, -0.6, -1.0],
    ])  # fmt: skip
    np.testing.assert_allclose(equilibrium_matrix(TRIANGLE), expected, atol=1e-15)
