"""The rating factor against hand arithmetic, and what happens at its edges."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.calculation import Array
from models.rating.factor import Factors, acts, demands, factored_dead, live_factors, rating_factors
from models.resistance.lrfr import LRFR
from models.resistance.protocol import DeadFactors, Level

KIP = 1.0


@dataclass(frozen=True)
class Unfactored:
    """A basis as far as the rating factor asks: loads as they are, two levels of capacity.

    AASHTO Manual for Bridge Evaluation 6B.4.1: A1 = A2 = 1 (from memory).
    """

    levels: tuple[Level, ...]
    components: DeadFactors
    wearing: DeadFactors


UNFACTORED = Unfactored(
    (Level("inventory", 1.0), Level("operating", 1.0)), DeadFactors(1.0, 1.0), DeadFactors(1.0, 1.0)
)


def gamma(live: Array, basis: Any = LRFR) -> Array:
    """Live load factors of so many crowds."""
    return live_factors(basis, [{"crowd"}] * len(live))


def rate(capacity: tuple[float, float], dead: tuple[float, float], *live: tuple[float, float]) -> Factors:
    """One bar: capacity in tension and compression, dead load, largest tension and compression of each live load."""
    both = np.array([capacity, capacity])[..., None]
    effects = np.array(live).reshape(-1, 2)[..., None]
    return rating_factors(LRFR, both, np.array(dead)[:, None], effects, gamma(effects))


def lowest(factors: Factors) -> tuple[float, float]:
    """Inventory and operating of one bar."""
    inventory, operating = factors.lowest[:, 0]
    return float(inventory), float(operating)


@pytest.mark.parametrize(
    ("condition", "system", "capacity", "inventory", "operating"),
    [
        (1.00, 0.90, 230.85, 1.6097, 2.0867),
        (0.95, 0.90, 219.3075, 1.4778, 1.9157),
        (0.85, 0.85, 218.025, 1.4631, 1.8967),
        (0.90, 0.85, 218.025, 1.4631, 1.8967),
    ],
)
def test_tension_member(condition: float, system: float, capacity: float, inventory: float, operating: float) -> None:
    """Two angles 4 x 4 x 1/2: 256.5 kip in yield, DC 60, DW 10, LL 50 kip (computed)."""
    product = LRFR.combined_factor(condition, system)
    assert product * 256.5 == pytest.approx(capacity, rel=1e-12)
    found = rate((product * 256.5, product * 100.0), (60 * KIP, 10 * KIP), (50 * KIP, 0.0))
    assert lowest(found) == pytest.approx((inventory, operating), abs=5e-5)
    assert (found.direction[0], found.load[0]) == (0, 0)


def test_compression_member() -> None:
    """Two angles 6 x 4 x 1/2: 193.282 kip with condition and system factors, DC 50, DW 8, LL 40 kip (computed)."""
    found = rate((400.0, 193.282), (-50.0, -8.0), (0.0, -40.0))
    assert lowest(found) == pytest.approx((1.6969, 2.1997), abs=5e-5)
    assert found.direction[0] == 1


@pytest.mark.parametrize(
    ("capacities", "direction", "dead", "live", "expected"),
    [
        ((123.75, 168.75), 0, 70.0, 50.0, (1.075, 1.975)),
        ((118.99, 148.39), 1, -58.0, -40.0, (1.5249, 2.2598)),
    ],
    ids=["tension", "compression"],
)
def test_allowable_stress(
    capacities: tuple[float, float], direction: int, dead: float, live: float, expected: tuple[float, float]
) -> None:
    """RF = (C - D)/L with a capacity for each level (computed)."""
    capacity = np.full((2, 2, 1), 1e6)
    capacity[:, direction, 0] = capacities
    effects = np.zeros((1, 2, 1))
    effects[0, direction, 0] = live
    found = rating_factors(UNFACTORED, capacity, np.array([[dead], [0.0]]), effects, gamma(effects, UNFACTORED))
    assert lowest(found) == pytest.approx(expected, abs=2e-4)


def test_dead_load_takes_the_factor_of_its_own_sign() -> None:
    """A part that adds takes its greatest factor in that direction, one that relieves its least."""
    found = factored_dead(LRFR, np.array([[100.0, -100.0, 100.0], [10.0, -10.0, -10.0]]))
    tension = [125.0 + 15.0, -90.0 - 6.5, 125.0 - 6.5]
    compression = [-90.0 - 6.5, 125.0 + 15.0, -90.0 + 15.0]
    np.testing.assert_allclose(found, [tension, compression])


def test_relieving_dead_load_leaves_room() -> None:
    """A live load against the dead load first has to undo 0.90 of it."""
    found = rate((200.0, 200.0), (100.0, 0.0), (0.0, -50.0))
    assert lowest(found) == pytest.approx(((200 + 90) / (1.75 * 50), (200 + 90) / (1.35 * 50)))


def test_dead_load_alone_exceeds() -> None:
    """Where factored dead load is more than the capacity the factor is 0, live load or not, and no load is named."""
    for live in ((50.0, 0.0), (0.0, 0.0), (0.0, -50.0)):
        found = rate((100.0, 100.0), (90.0, 0.0), live)
        assert lowest(found) == (0.0, 0.0)
        assert found.dead_exceeds[:, 0].tolist() == [True, False]
        assert (found.load[0], found.direction[0]) == (-1, 0)


def test_dead_load_exceeds_in_compression() -> None:
    """The direction in which dead load exceeds is the one that is named, whatever live load does the other way."""
    found = rate((1.0, 100.0), (-90.0, 0.0), (500.0, 0.0))
    assert found.dead_exceeds[:, 0].tolist() == [False, True]
    assert found.direction[0] == 1


def test_dead_load_just_carried() -> None:
    """Where nothing is left for live load the factor is 0, and the live load governs."""
    found = rate((125.0, 100.0), (100.0, 0.0), (10.0, 0.0))
    assert lowest(found) == (0.0, 0.0)
    assert not found.dead_exceeds.any()
    assert found.load[0] == 0


def test_no_live_load() -> None:
    """A bar that no live load touches has no factor: infinite, and no load is named."""
    found = rate((100.0, 100.0), (10.0, 1.0), (0.0, 0.0))
    assert lowest(found) == (np.inf, np.inf)
    assert found.load[0] == -1


def test_a_live_load_of_next_to_nothing() -> None:
    """A live effect so small that the factor is beyond any number counts as none."""
    found = rate((1e6, 1e6), (0.0, 0.0), (1e-310, 0.0))
    assert lowest(found) == (np.inf, np.inf)
    assert found.load[0] == -1


def test_no_live_load_at_all() -> None:
    """A site without live loads gives the same."""
    found = rate((100.0, 100.0), (10.0, 1.0))
    assert lowest(found) == (np.inf, np.inf)
    assert found.load[0] == -1


def test_no_capacity() -> None:
    """A bar that has nothing left has the factor 0 under any load and exceeds only where dead load acts."""
    found = rate((0.0, 0.0), (0.0, 0.0), (10.0, 0.0))
    assert lowest(found) == (0.0, 0.0)
    assert not found.dead_exceeds.any()


def test_the_lowest_over_directions_and_loads_governs() -> None:
    """Each live load is rated by itself in both directions; direction and load of the lowest are named."""
    found = rate((200.0, 150.0), (20.0, 0.0), (30.0, -20.0), (60.0, -70.0), (90.0, -10.0))
    expected = min(
        (200 - 25) / (1.35 * 90),
        (150 + 18) / (1.35 * 70),
    )
    assert lowest(found)[1] == pytest.approx(expected)
    assert (found.load[0], found.direction[0]) == (2, 0)
    turned = rate((200.0, 150.0), (20.0, 0.0), (30.0, -20.0), (60.0, -270.0), (90.0, -10.0))
    assert (turned.load[0], turned.direction[0]) == (1, 1)


@pytest.mark.parametrize(("nudge", "load"), [(0.0, 0), (5e-10, 0), (-5e-10, 0), (5e-9, 1)])
def test_ties(nudge: float, load: int) -> None:
    """Within 1e-9 the first load by name is named; a load that is really worse is named itself."""
    found = rate((200.0, 200.0), (0.0, 0.0), (50.0, 0.0), (50.0 * (1 + nudge), 0.0))
    assert found.load[0] == load


def test_tension_before_compression_in_a_tie() -> None:
    """Of two directions that are equally bad tension is named."""
    assert rate((100.0, 100.0), (0.0, 0.0), (50.0, -50.0)).direction[0] == 0


def test_many_bars_and_variants_at_once() -> None:
    """Variants between loads and bars give what each gives by itself."""
    rng = np.random.default_rng(7)
    capacity = rng.uniform(50, 300, (2, 2, 5))
    dead = rng.uniform(-60, 60, (2, 3, 5))
    live = np.stack([rng.uniform(0, 80, (4, 3, 5)), -rng.uniform(0, 80, (4, 3, 5))], axis=1)
    together = rating_factors(LRFR, capacity, dead, live, gamma(live))
    for variant in range(3):
        alone = rating_factors(LRFR, capacity, dead[:, variant], live[:, :, variant], gamma(live))
        np.testing.assert_array_equal(together.lowest[:, variant], alone.lowest)
        np.testing.assert_array_equal(together.load[variant], alone.load)
        np.testing.assert_array_equal(together.direction[variant], alone.direction)
        np.testing.assert_array_equal(together.dead_exceeds[:, variant], alone.dead_exceeds)


forces = st.floats(-500, 500)


@given(dead=st.tuples(forces, forces), pull=st.floats(0, 500), push=st.floats(-500, 0), capacity=st.floats(1, 2000))
def test_at_the_factor_the_capacity_is_used_up(
    dead: tuple[float, float], pull: float, push: float, capacity: float
) -> None:
    """Live load times the factor, with dead load, is the capacity of the direction that governs."""
    found = rate((capacity, capacity), dead, (pull, push))
    inventory, operating = lowest(found)
    assert inventory <= operating
    if not np.isfinite(operating) or found.dead_exceeds.any():
        return
    direction, sign = int(found.direction[0]), (1.0, -1.0)[int(found.direction[0])]
    demand = factored_dead(LRFR, np.array(dead)[:, None])[direction, 0]
    live = sign * (pull, push)[direction]
    assert demand + 1.35 * (operating * live) == pytest.approx(capacity, rel=1e-9)


@given(dead=st.tuples(forces, forces), pull=st.floats(0, 500), push=st.floats(-500, 0), capacity=st.floats(1, 2000))
def test_factor_of_one_is_demand_at_capacity(
    dead: tuple[float, float], pull: float, push: float, capacity: float
) -> None:
    """The factor is below 1 exactly where the largest factored effect exceeds the capacity."""
    effects = np.array([[pull, push]])[..., None]
    demand: Array = demands(LRFR, np.array(dead)[:, None], effects, gamma(effects)[-1])
    _, operating = lowest(rate((capacity, capacity), dead, (pull, push)))
    if abs(demand.max() - capacity) > 1e-9 * capacity:
        assert (operating < 1) == (demand.max() > capacity)


def test_demand_is_the_worst_load() -> None:
    """The demand takes the worst of the live loads in each direction, and dead load alone where none acts."""
    live = np.array([[[10.0], [-5.0]], [[30.0], [0.0]]])
    found = demands(LRFR, np.array([[20.0], [0.0]]), live, gamma(live)[-1])
    np.testing.assert_allclose(found[:, 0], [25 + 1.35 * 30, -18 + 1.35 * 5])
    np.testing.assert_allclose(
        demands(LRFR, np.array([[20.0], [0.0]]), np.zeros((0, 2, 1)), np.zeros(0))[:, 0], [25, -18]
    )


def test_a_bar_is_pulled_if_any_level_pulls_it() -> None:
    """A bar that only the larger live load factor pulls counts as pulled, and one that nothing pushes is not pushed."""
    dead = np.array([[-100.0, 10.0], [0.0, 0.0]])
    live = np.array([[[60.0, 5.0], [0.0, 0.0]]])  # 1.35 x 60 < 0.90 x 100 < 1.75 x 60
    assert acts(LRFR, dead, live, gamma(live)).tolist() == [[True, True], [True, False]]


def test_a_kind_of_load_may_have_its_own_factor() -> None:
    """Loads that stand everywhere take another factor where a basis says so; of several together the greatest."""
    level = Level("ultimate", 1.35, of_kind=(("uniform", 1.5),))
    basis: Any = Unfactored((level,), DeadFactors(1.35, 1.0), DeadFactors(1.35, 1.0))
    factors = live_factors(basis, [{"crowd"}, {"uniform"}, {"crowd", "uniform"}])
    assert factors.tolist() == [[1.35, 1.5, 1.5]]
    live = np.full((3, 2, 1), [[30.0], [-30.0]])
    found = rating_factors(basis, np.full((1, 2, 1), 90.0), np.zeros((2, 1)), live, factors)
    assert found.lowest[0, 0] == pytest.approx(90 / (1.5 * 30), rel=1e-12)
    assert found.load[0] == 1
    assert demands(basis, np.zeros((2, 1)), live, factors[-1])[:, 0] == pytest.approx([45.0, 45.0], rel=1e-12)
