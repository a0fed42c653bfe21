"""Pedestrian loads and a design example against the figures of the standards."""

from __future__ import annotations

import numpy as np
import pytest
from plane.build import influence, load_vector, response_of
from plane.footbridge import footbridge, pratt, quantity
from published.example import within

from models.bridge import Deck, Footbridge, LiveLoad
from models.loading.dead import deck_on_joints
from models.loading.floor import Floor, floor_of
from models.loading.live import VEHICLES, Crowd, axles_of, patterns
from models.loading.rules import aashto_pressure, en_pressure
from models.rating.factor import factored_dead
from models.resistance.lrfr import LRFR
from models.statics.geometry import Geometry, geometry_of

KIP = quantity("1 kip", "force").si
FOOT = quantity("1 ft", "length").si
PSF = quantity("1 psf", "pressure").si
CROWD = LiveLoad("crowd", "crowd", pressure=quantity("90 psf", "pressure"))


@pytest.mark.parametrize(
    ("name", "weight", "parts", "apart", "track"),
    [
        ("H5", 10 * KIP, (0.2, 0.8), 14 * FOOT, 6 * FOOT),
        ("H10", 20 * KIP, (0.2, 0.8), 14 * FOOT, 6 * FOOT),
        ("en service", 120e3, (1 / 3, 2 / 3), 3.0, 1.3),
    ],
)
def test_published_vehicles(name: str, weight: float, parts: tuple[float, float], apart: float, track: float) -> None:
    """H5 and H10 (AASHTO pedestrian guide 2009, 3.2: H5 read in its design example, H10 from memory).

    The service vehicle of EN 1991-2, 5.6.3, is from memory.
    """
    positions, weights, between = axles_of(LiveLoad("v", "vehicle", vehicle=name))
    assert weights.sum() == pytest.approx(weight, rel=1e-14)
    np.testing.assert_allclose(weights / weight, parts, rtol=1e-14)
    assert np.ptp(positions) == pytest.approx(apart, rel=1e-14)
    assert between == pytest.approx(track, rel=1e-14)
    assert VEHICLES[name].source


@pytest.mark.parametrize(
    ("length", "printed"),
    [
        (5, "5.0"), (10, "5.0"), (15, "4.667"), (20, "4.4"), (30, "4.0"), (50, "3.5"), (70, "3.2"), (100, "2.923"),
        (120, "2.8"), (150, "2.667"), (210, "2.5"), (250, "2.5"),
    ],
)  # fmt: skip
def test_pressure_by_loaded_length(length: float, printed: str) -> None:
    """EN 1991-2, 5.3.2.1(2): 2.0 + 120/(L + 30) kPa, 2.5 at least, 5.0 at most (rule read in two texts; computed)."""
    assert within(float(en_pressure(np.array(length))) / 1000, printed)


@pytest.mark.parametrize(
    ("area", "printed"),
    [
        (100, "85"), (400, "85"), (500, "78.27"), (600, "73.30"), (720, "68.77"), (800, "66.33"), (849.2, "65.0"),
        (2000, "65.0"),
    ],
)  # fmt: skip
def test_pressure_by_influence_area(area: float, printed: str) -> None:
    """AASHTO pedestrian guide 1997: 85 psf (0.25 + 15/sqrt(A)), 65 at least, 85 at most (from memory; computed)."""
    assert within(float(aashto_pressure(np.array(area * FOOT**2))) / PSF, printed)


def design_example() -> tuple[Footbridge, Geometry]:
    """The half-through bridge of the guide's design example (NCHRP 20-07, task 244; data read).

    72 ft in 12 panels, trusses 5 ft deep and 10.5 ft apart, a deck of 10 ft, 200 lb/ft of dead load on each truss
    with its own weight in it, and 90 psf of people. The diagonals fall towards the middle.
    """
    deck = Deck(
        width=quantity("10 ft", "length"),
        truss_spacing=quantity("10.5 ft", "length"),
        dead=quantity("0 psf", "pressure"),
        edge=quantity("200 lbf/ft", "line load"),
    )
    bridge = footbridge({"near": pratt(12, "6 ft", "5 ft"), "far": pratt(12, "6 ft", "5 ft")}, deck)
    return bridge, geometry_of(bridge.trusses["near"])


def chord_effects() -> tuple[float, float]:
    """Dead load and crowd in the top chord at mid-span, kip, tension positive."""
    bridge, geometry = design_example()
    response = response_of(geometry)
    chord = geometry.bars.index("U5-U6")
    components, _ = deck_on_joints(bridge, "near", geometry)
    dead = -response.forces[chord, 1::2] @ components
    x = geometry.coordinates[geometry.deck, 0]
    crowd = patterns((CROWD,), floor_of(bridge, "near"), x)["crowd"]
    assert crowd is not None
    largest, least = crowd.extremes(influence(geometry, response)[chord])
    assert largest == pytest.approx(0.0, abs=1e-6)
    return dead / KIP, float(least) / KIP


def test_design_example_chord_forces() -> None:
    """Mid-span chord: 25.92 kip of dead load and 58.32 kip of crowd (computed from the example's data)."""
    dead, live = chord_effects()
    assert dead == pytest.approx(-25.92, abs=5e-3)
    assert live == pytest.approx(-58.32, abs=5e-3)


def test_design_example_factored_force() -> None:
    """1.25 times dead load and 1.75 times crowd are 134.46 kip of compression (AASHTO LRFD, strength I)."""
    dead, live = chord_effects()
    _, compression = factored_dead(LRFR, np.array([dead, 0.0])[:, None])
    assert compression[0] - LRFR.levels[0].live * live == pytest.approx(134.46, abs=5e-3)


def test_design_example_crowd_on_a_truss() -> None:
    """A deck of 10 ft between trusses 10.5 ft apart gives each 450 lb/ft of people: half the deck's width."""
    bridge, _ = design_example()
    crowd = patterns((CROWD,), floor_of(bridge, "near"), np.array([0.0, 1.0]))["crowd"]
    assert isinstance(crowd, Crowd)
    assert crowd.hurts == pytest.approx(quantity("450 lbf/ft", "line load").si, rel=1e-14)
    assert crowd.relieves == 0.0


def test_design_example_reactions() -> None:
    """Dead load goes to the supports in halves: 7.2 kip each."""
    bridge, geometry = design_example()
    components, _ = deck_on_joints(bridge, "near", geometry)
    load = load_vector(geometry, {})
    load[1::2] = -components
    reactions = response_of(geometry).reactions @ load
    np.testing.assert_allclose(reactions[reactions > 1] / KIP, [7.2, 7.2], rtol=1e-12)


def test_deck_beyond_the_trusses() -> None:
    """With trusses at s under a deck b, a truss takes (s + o)^2/(2s) of it, and o^2/(2s) lifts it.

    o = (b - s)/2 is the overhang on each side; the lever rule, common practice, no source.
    """
    b, s = 3.6, 2.4
    o = (b - s) / 2
    hurts, relieves = Floor(b, b, s, o).strips()
    assert hurts == pytest.approx((s + o) ** 2 / (2 * s), rel=1e-14)
    assert relieves == pytest.approx(o**2 / (2 * s), rel=1e-14)
    assert hurts - relieves == pytest.approx(b / 2, rel=1e-14)
