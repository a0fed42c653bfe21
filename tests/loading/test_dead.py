"""Dead load on joints: totals, places, and what belongs to components and to the wearing course."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace

import numpy as np
import pytest
from plane.footbridge import footbridge, metres, pratt, quantity

from models.bridge import Deck
from models.loading.dead import bar_weights, deck_on_joints, edge_load, own_weight_on_joints
from models.quantity import GRAVITY, Quantity
from models.statics.geometry import geometry_of

PLAIN = Deck(
    width=metres(2.4),
    truss_spacing=metres(2.8),
    dead=quantity("0.9 kPa", "pressure"),
    wearing=quantity("0.2 kPa", "pressure"),
    edge=quantity("0.4 kN/m", "line load"),
)
NEAR, FAR = pratt(6, "3 m", "2 m"), pratt(6, "3 m", "2 m")
GEOMETRY = geometry_of(NEAR)
LENGTH = 18.0


def totals(deck: Deck, truss: str = "near") -> tuple[float, float]:
    """Components and wearing course of a whole truss, N."""
    components, wearing = deck_on_joints(footbridge({"near": NEAR, "far": FAR}, deck), truss, GEOMETRY)
    return float(components.sum()), float(wearing.sum())


def test_weight_of_a_bar() -> None:
    """Density times area times length, in N, with the allowance for connections."""
    weights = bar_weights(np.array([2e-3]), np.array([7850.0]), np.array([4.0]), 1.1)
    assert weights == pytest.approx([2e-3 * 7850 * 4.0 * 9.80665 * 1.1], rel=1e-15)
    assert GRAVITY == 9.80665


def test_own_weight_goes_to_both_ends() -> None:
    """Half of each bar stands on either joint, and nothing is lost."""
    weights = np.arange(1.0, len(GEOMETRY.bars) + 1)
    on_joints = own_weight_on_joints(GEOMETRY, weights)
    assert on_joints.sum() == pytest.approx(weights.sum())
    for joint, number in zip(GEOMETRY.joints, range(len(GEOMETRY.joints)), strict=True):
        touching = (GEOMETRY.ends == number).any(axis=1)
        assert on_joints[number] == pytest.approx(weights[touching].sum() / 2), joint


def test_totals_of_the_deck() -> None:
    """Half of the deck's dead load and the whole edge load are components, half of the wearing course stands apart."""
    components, wearing = totals(PLAIN)
    assert components == pytest.approx((900 * 2.4 / 2 + 400) * LENGTH)
    assert wearing == pytest.approx(200 * 2.4 / 2 * LENGTH)


def test_half_a_panel_goes_to_either_deck_joint() -> None:
    """Inner deck joints carry twice what the end ones do, other joints nothing."""
    components, _ = deck_on_joints(footbridge({"near": NEAR, "far": FAR}, PLAIN), "near", GEOMETRY)
    inner = (900 * 1.2 + 400) * 3.0
    expected = [inner / 2, *[inner] * 5, inner / 2] + [0.0] * 5
    np.testing.assert_allclose(components, expected)


def test_dead_width() -> None:
    """Weight counts over its own width, not the clear one."""
    components, wearing = totals(replace(PLAIN, dead_width=metres(3.0), edge=None))
    assert (components, wearing) == pytest.approx((900 * 1.5 * LENGTH, 200 * 1.5 * LENGTH))


@pytest.mark.parametrize(("truss", "share"), [("near", 0.5 + 0.28 / 2.8), ("far", 0.5 - 0.28 / 2.8)])
def test_deck_off_centre(truss: str, share: float) -> None:
    """A deck off centre is shared by lever."""
    _, wearing = totals(replace(PLAIN, offset={"near": metres(0.28)}), truss)
    assert wearing == pytest.approx(200 * 2.4 * share * LENGTH)


def test_one_truss_carries_the_whole_deck() -> None:
    """A single truss has all of it."""
    components, _ = deck_on_joints(footbridge({"only": NEAR}, PLAIN), "only", GEOMETRY)
    assert components.sum() == pytest.approx((900 * 2.4 + 400) * LENGTH)


def test_no_wearing_course() -> None:
    """None given is none carried."""
    assert totals(replace(PLAIN, wearing=None))[1] == 0.0


@pytest.mark.parametrize(
    ("edge", "expected"),
    [
        (None, 0.0),
        (quantity("0.4 kN/m", "line load"), 400.0),
        ({"near": quantity("0.3 kN/m", "line load")}, 300.0),
        ({"far": quantity("0.3 kN/m", "line load")}, 0.0),
    ],
)
def test_edge(edge: Quantity | Mapping[str, Quantity] | None, expected: float) -> None:
    """An edge load is one for both trusses, or each truss's own."""
    assert edge_load(replace(PLAIN, edge=edge), "near") == pytest.approx(expected)
