"""Across the deck: how much of what stands on it each truss takes."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from plane.footbridge import footbridge, metres, pratt, quantity
from scipy.integrate import trapezoid

from models.bridge import Deck
from models.loading.floor import Floor, floor_of

DECK = Deck(
    width=metres(3.0),
    truss_spacing=metres(2.0),
    dead=quantity("1 kPa", "pressure"),
    dead_width=metres(3.4),
    offset={"near": metres(0.25)},
)
TWO = footbridge({"near": pratt(4, "3 m", "2 m"), "far": pratt(4, "3 m", "2 m")}, DECK)
ONE = footbridge({"only": pratt(4, "3 m", "2 m")}, DECK)


def lever(floor: Floor, x: float) -> float:
    """What the truss takes of a unit force at x from it."""
    assert floor.spacing is not None
    return (floor.spacing - x) / floor.spacing


def test_between_the_trusses() -> None:
    """A deck no wider than the spacing gives each truss half of its people, and nobody lifts."""
    assert Floor(2.4, 2.4, 2.8, -0.2).strips() == (pytest.approx(1.2), 0.0)


def test_as_wide_as_the_trusses() -> None:
    """A deck that ends over the trusses is the limit of both cases."""
    assert Floor(2.4, 2.4, 2.4, 0.0).strips() == (pytest.approx(1.2), 0.0)


@pytest.mark.parametrize(("width", "spacing"), [(3.0, 2.0), (2.41, 2.4), (5.0, 1.5)])
def test_beyond_the_trusses(width: float, spacing: float) -> None:
    """The near strip is (s + o)^2/(2s); people beyond the far truss lift with o^2/(2s)."""
    overhang = (width - spacing) / 2
    hurts, relieves = Floor(width, width, spacing, overhang).strips()
    assert hurts == pytest.approx((spacing + overhang) ** 2 / (2 * spacing), rel=1e-12)
    assert relieves == pytest.approx(overhang**2 / (2 * spacing), rel=1e-12)


def test_one_truss_takes_all() -> None:
    """One truss has the whole width, all of an axle, all of a force and of an even load."""
    floor = floor_of(ONE, "only")
    assert floor.strips() == (3.0, 0.0)
    assert floor.mean_share() == 1.0
    assert floor.wheel_shares(1.2) == (1.0, 1.0)
    assert floor.point_shares() == (1.0, 1.0)


def test_offset_goes_towards_the_named_truss() -> None:
    """The deck reaches 0.75 m beyond the truss that it is moved towards, 0.25 m beyond the other."""
    near, far = floor_of(TWO, "near"), floor_of(TWO, "far")
    assert (near.near, near.far) == pytest.approx((0.75, 0.25))
    assert (far.near, far.far) == pytest.approx((0.25, 0.75))
    assert (near.width, near.dead_width, near.spacing) == (3.0, 3.4, 2.0)


def test_defaults() -> None:
    """Without more, the trusses stand at the deck's width and the dead load is as wide as the deck."""
    bridge = replace(TWO, deck=Deck(width=metres(2.0), dead=DECK.dead))
    assert floor_of(bridge, "far") == Floor(2.0, 2.0, 2.0, 0.0)


@given(width=st.floats(0.5, 6.0), spacing=st.floats(0.5, 6.0), offset=st.floats(-4.0, 4.0))
def test_strips_against_integration(width: float, spacing: float, offset: float) -> None:
    """Wherever the deck lies, the strips are the integrals of both parts of the lever over it."""
    floor = Floor(width, width, spacing, (width - spacing) / 2 + offset)
    edges = (-floor.near, width - floor.near)
    grid = np.unique(np.clip(np.append(np.linspace(*edges, 4001), spacing), *edges))
    values = (spacing - grid) / spacing
    hurts, relieves = floor.strips()
    assert hurts == pytest.approx(trapezoid(np.maximum(values, 0.0), grid), abs=1e-9)
    assert relieves == pytest.approx(-trapezoid(np.minimum(values, 0.0), grid), abs=1e-9)
    assert floor.mean_share() * width == pytest.approx(hurts - relieves, abs=1e-9)


@given(width=st.floats(1.5, 6.0), spacing=st.floats(0.5, 6.0), offset=st.floats(-1.0, 1.0), track=st.floats(0.0, 1.5))
def test_wheels_and_forces_at_the_kerbs(width: float, spacing: float, offset: float, track: float) -> None:
    """Half an axle stands on each wheel; the outer wheel stands at either kerb, so does a single force."""
    floor = Floor(width, width, spacing, (width - spacing) / 2 + offset)
    near_kerb, far_kerb = -floor.near, width - floor.near
    expected = (
        (lever(floor, near_kerb) + lever(floor, near_kerb + track)) / 2,
        (lever(floor, far_kerb) + lever(floor, far_kerb - track)) / 2,
    )
    assert floor.wheel_shares(track) == pytest.approx(expected, abs=1e-9)
    assert floor.point_shares() == pytest.approx((lever(floor, near_kerb), lever(floor, far_kerb)), abs=1e-9)


@given(width=st.floats(0.5, 6.0), spacing=st.floats(0.5, 6.0), offset=st.floats(-1.0, 1.0))
def test_two_trusses_take_all(width: float, spacing: float, offset: float) -> None:
    """What one truss does not take of an even load, the other does."""
    one = Floor(width, width, spacing, (width - spacing) / 2 + offset)
    other = Floor(width, width, spacing, (width - spacing) / 2 - offset)
    assert one.mean_share() + other.mean_share() == pytest.approx(1.0, abs=1e-12)
    assert one.wheel_shares(0.4)[0] + other.wheel_shares(0.4)[1] == pytest.approx(1.0, abs=1e-12)
