"""Live loads of a site made ready for a deck."""

from __future__ import annotations

import numpy as np
import pytest
from plane.footbridge import metres, quantity

from models.bridge import Axle, Companion, LiveLoad
from models.loading import LIVE_KINDS
from models.loading.floor import Floor
from models.loading.live import Crowd, Everywhere, Placed, Together, axles_of, patterns
from models.loading.rules import RULES, CrowdByArea, CrowdByLength

FLOOR = Floor(2.4, 2.4, 2.8, -0.2)
X = np.array([0.0, 3.0, 6.0])
LINE = np.array([0.0, 1.0, -0.5])
CROWD = LiveLoad("crowd", "crowd", pressure=quantity("5 kPa", "pressure"))
SNOW = LiveLoad("snow", "uniform", pressure=quantity("1 kPa", "pressure"))
BARREL = LiveLoad("barrel", "concentrated", force=quantity("10 kN", "force"))
CART = LiveLoad(
    "cart",
    "vehicle",
    axles=(Axle(metres(0.0), quantity("8 kN", "force")), Axle(metres(1.8), quantity("14 kN", "force"))),
    track=metres(1.2),
)


def test_each_kind() -> None:
    """Each kind of load becomes its pattern, in order of the names."""
    found = patterns((SNOW, CART, CROWD, BARREL), FLOOR, X)
    assert list(found) == ["barrel", "cart", "crowd", "snow"]
    assert [type(pattern) for pattern in found.values()] == [Placed, Placed, Crowd, Everywhere]
    assert set(LIVE_KINDS) == {"crowd", "vehicle", "concentrated", "uniform"}


def test_crowd() -> None:
    """Half of the deck is one truss's strip."""
    crowd = patterns((CROWD,), FLOOR, X)["crowd"]
    assert isinstance(crowd, Crowd)
    assert (crowd.hurts, crowd.relieves) == pytest.approx((5000 * 1.2, 0.0))


def test_uniform() -> None:
    """A pressure on the whole deck is shared evenly."""
    snow = patterns((SNOW,), FLOOR, X)["snow"]
    assert isinstance(snow, Everywhere)
    assert snow.line_load == pytest.approx(1000 * 2.4 / 2)


def test_concentrated() -> None:
    """A force stands at the greatest and at the least ordinate, at the kerb that is worse."""
    barrel = patterns((BARREL,), FLOOR, X)["barrel"]
    assert barrel is not None
    share = (2.8 - 0.2) / 2.8
    assert barrel.extremes(LINE) == pytest.approx((10e3 * share, -5e3 * share))


def test_vehicle_of_the_site() -> None:
    """Axles and track as the site gives them, with the outer wheel at the near kerb."""
    cart = patterns((CART,), FLOOR, X)["cart"]
    assert cart is not None
    share = (2 * (2.8 - 0.2) - 1.2) / (2 * 2.8)
    # The heavy axle over the joint, the light one 1.8 m before it.
    assert cart.extremes(LINE)[0] == pytest.approx(share * (14e3 + 8e3 * 1.2 / 3))


def test_axles_of_a_named_vehicle_and_of_the_site() -> None:
    """A vehicle's name stands for its axles; a site's own are taken as they stand."""
    positions, weights, track = axles_of(CART)
    assert (positions.tolist(), weights.tolist(), track) == ([0.0, 1.8], [8e3, 14e3], 1.2)
    named = axles_of(LiveLoad("mower", "vehicle", vehicle="H5"))
    np.testing.assert_allclose(named[0], [0.0, 4.2672], rtol=1e-14)


def test_companions() -> None:
    """A load with companions is itself plus factor times each of them, each at its own worst."""
    both = LiveLoad("both", "crowd", pressure=CROWD.pressure, companions=(Companion("snow", 0.5),))
    found = patterns((both, SNOW), FLOOR, X)
    together, snow = found["both"], found["snow"]
    assert isinstance(together, Together)
    assert snow is not None
    alone = patterns((CROWD,), FLOOR, X)["crowd"]
    assert alone is not None
    for both_of, crowd_of, snow_of in zip(
        together.extremes(LINE), alone.extremes(LINE), snow.extremes(LINE), strict=True
    ):
        assert both_of == pytest.approx(crowd_of + 0.5 * snow_of)


def test_companions_do_not_bring_their_own() -> None:
    """A companion comes alone: loads may name each other."""
    first = LiveLoad("first", "uniform", pressure=SNOW.pressure, companions=(Companion("second", 1.0),))
    second = LiveLoad("second", "uniform", pressure=SNOW.pressure, companions=(Companion("first", 1.0),))
    found = patterns((first, second), FLOOR, X)
    expected = 2 * 1200.0 * 3.0 * 0.75
    for pattern in found.values():
        assert pattern is not None
        assert pattern.extremes(LINE)[0] == pytest.approx(expected)


@pytest.mark.parametrize(("rule", "kind"), [("en 1991-2", CrowdByLength), ("aashto 1997", CrowdByArea)])
def test_crowd_by_rule(rule: str, kind: type) -> None:
    """A crowd whose pressure a rule gives is a crowd like any other, alone or beside another load."""
    by_rule = LiveLoad("by rule", "crowd", rule=rule)
    with_it = LiveLoad("with it", "crowd", pressure=CROWD.pressure, companions=(Companion("by rule", 0.4),))
    found = patterns((by_rule, with_it, CROWD), FLOOR, X)
    alone, crowd, together = found["by rule"], found["crowd"], found["with it"]
    assert isinstance(alone, kind)
    assert crowd is not None
    assert together is not None
    expected = crowd.extremes(LINE)[0] + 0.4 * alone.extremes(LINE)[0]
    assert together.extremes(LINE)[0] == pytest.approx(expected)


def test_every_rule_names_its_source() -> None:
    """The rules are those that a site file may name, each with its source."""
    assert set(RULES) == {"en 1991-2", "aashto 1997"}
    assert all(rule.source and rule.text for rule in RULES.values())
