"""Worst arrangements on trusses with slack bars, against a search that tries stretch by stretch."""

from __future__ import annotations

import numpy as np
import pytest
from plane.crossed import Crossed, crossed
from rating.slack_brute import end_by_trying, factors_by_trying, loads_of, stretches

from models.calculation import Array
from models.loading.arrangement import worst_arrangement
from models.loading.live import Crowd, Everywhere, Placed
from models.rating.slack_family import Family, SlackLoads, starting_sets
from models.rating.slack_items import Question
from models.rating.slack_limits import limit, necessary_bars
from models.rating.slack_search import worst
from models.statics.slack_bars import EQUILIBRIUM

LINE_LOAD = 4000.0
MULTIPLES = np.concatenate([np.linspace(0.0, 3.0, 41), np.linspace(3.2, 12.0, 45)])
KEPT_APART = 0.05
"""What trying may miss between its stretches, and what a bound may lie below the force that it bounds."""

BUILDS = [
    crossed(2, 0.8, seed=3),
    crossed(3, 1.0, seed=1),
    crossed(4, 0.6, seed=2),
    crossed(4, 0.5, seed=5),
    crossed(5, 1.0, seed=3),
    crossed(5, 0.7, seed=8),
    crossed(4, 0.8, seed=4, single=frozenset({"b0-t1", "t3-b4"})),
    crossed(4, 0.8, seed=6, stiff="b1-t2"),
]


def case(sample: Crossed, seed: int) -> tuple[SlackLoads, Array, Array]:
    """The truss with uneven dead load, its panels, and capacities that differ from bar to bar."""
    random = np.random.default_rng(seed)
    dead = 300.0 * random.uniform(0.5, 2.0, len(sample.geometry.joints)) * random.uniform(0.5, 3.0)
    loads = loads_of(sample, np.array([1.25, 0.9])[:, None] * dead)
    panels = np.diff(sample.geometry.coordinates[sample.geometry.deck, 0])
    capacity = random.uniform(2e3, 30e3, (2, len(sample.geometry.bars)))
    capacity[1, sample.cannot_push] = np.inf
    return loads, panels, capacity


def family_of(loads: SlackLoads, panels: Array) -> Family:
    """The sets from which a search starts."""
    return starting_sets(loads, panels, [LINE_LOAD, 4 * LINE_LOAD])[0]


@pytest.mark.parametrize("number", range(len(BUILDS)))
def test_no_stretch_of_crowd_reaches_a_capacity_before_the_factor_says_so(number: int) -> None:
    """The factor is never above what trying stretch by stretch finds, and close below it."""
    loads, panels, capacity = case(BUILDS[number], number)
    nothing = np.full_like(capacity, np.inf)
    found = worst(family_of(loads, panels), Crowd(LINE_LOAD, 0.0, panels), Question(capacity), nothing)
    parts = 12 if len(panels) < 4 else 6
    tried = factors_by_trying(loads, LINE_LOAD * stretches(panels, parts), capacity, MULTIPLES).min(axis=0)
    factors = np.maximum(found.merit, 0.0).min(axis=0)
    assert (factors <= tried * (1 + 1e-9)).all()
    known = np.isfinite(tried)
    assert known.sum() > 4
    np.testing.assert_allclose(factors[known], tried[known], rtol=KEPT_APART)


@pytest.mark.parametrize("number", range(len(BUILDS)))
def test_the_largest_force_is_that_of_no_stretch_exceeded(number: int) -> None:
    """At a given multiple no stretch of crowd gives a larger force than the one that is found, and one comes close."""
    loads, panels, capacity = case(BUILDS[number], number)
    nothing = np.full_like(capacity, np.inf)
    pattern, multiple = Crowd(LINE_LOAD, 0.0, panels), 1.35
    found = -worst(family_of(loads, panels), pattern, Question(None, multiple), nothing).merit
    arrangements = multiple * LINE_LOAD * np.vstack([np.zeros(len(panels) + 1), stretches(panels, 6)])
    tried = np.full_like(found, -np.inf)
    for dead in loads.dead:
        states = loads.truss.states(dead + arrangements @ loads.deck)
        forces = states.forces[states.verdict == EQUILIBRIUM] * loads.scale
        tried = np.maximum(tried, [forces.max(axis=0), -forces.min(axis=0)])
    size = np.abs(tried).max()
    found[1, BUILDS[number].cannot_push] = tried[1, BUILDS[number].cannot_push]
    assert (found >= tried - 1e-9 * size).all()
    assert (found <= tried + 2 * KEPT_APART * size).all()
    assert (np.abs(found - tried) <= 0.01 * size).mean() > 0.9


def test_what_is_attained_is_a_force_that_the_arrangement_gives() -> None:
    """The state under an arrangement that is said to govern has that very force in its bar."""
    sample = BUILDS[4]
    loads, panels, capacity = case(sample, 4)
    nothing = np.full_like(capacity, np.inf)
    found = worst(family_of(loads, panels), Crowd(LINE_LOAD, 0.0, panels), Question(capacity), nothing)
    direction, bar = np.nonzero(found.attained & np.isfinite(found.merit))
    assert len(bar) > 10
    live = found.merit[direction, bar, None] * found.arrangement[direction, bar]
    states = loads.truss.states(loads.dead[found.case[direction, bar]] + live @ loads.deck)
    forces = (states.forces * loads.scale)[np.arange(len(bar)), bar] * np.array([1.0, -1.0])[direction]
    np.testing.assert_allclose(forces, capacity[direction, bar], rtol=1e-5)


def test_an_axle_is_at_its_worst_where_trying_finds_it() -> None:
    """A single axle tried at every tenth of a panel reaches no capacity before the factor that is found."""
    sample = BUILDS[2]
    loads, panels, capacity = case(sample, 2)
    force = 6e3
    places = np.zeros((10 * len(panels) + 1, len(panels) + 1))
    for number in range(len(places)):
        panel = min(number // 10, len(panels) - 1)
        part = number / 10 - panel
        places[number, panel : panel + 2] = 1.0 - part, part
    nothing = np.full_like(capacity, np.inf)
    pattern = Placed(force * np.eye(len(panels) + 1), (1.0,))
    found = worst(family_of(loads, panels), pattern, Question(capacity), nothing)
    tried = factors_by_trying(loads, force * places, capacity, MULTIPLES).min(axis=0)
    factors = np.maximum(found.merit, 0.0).min(axis=0)
    known = np.isfinite(tried)
    assert (factors <= tried * (1 + 1e-9)).all()
    np.testing.assert_allclose(factors[known], tried[known], rtol=0.1)


def test_snow_on_the_whole_deck_is_a_single_arrangement() -> None:
    """A load that stands everywhere or nowhere reaches each capacity where its one state does."""
    loads, panels, capacity = case(BUILDS[3], 3)
    whole = np.append(panels, 0.0) / 2 + np.append(0.0, panels) / 2
    nothing = np.full_like(capacity, np.inf)
    found = worst(family_of(loads, panels), Everywhere(LINE_LOAD, panels), Question(capacity), nothing)
    tried = factors_by_trying(loads, LINE_LOAD * whole[None], capacity, np.linspace(0.0, 12.0, 241)).min(axis=0)
    factors = np.maximum(found.merit, 0.0).min(axis=0)
    known = np.isfinite(tried)
    assert (factors <= tried * (1 + 1e-9)).all()
    np.testing.assert_allclose(factors[known], tried[known], rtol=1e-3)


@pytest.mark.parametrize("single", [frozenset({"b0-t1", "t3-b4"}), frozenset({"b1-t2"}), frozenset({"b1-t2", "t2-b3"})])
def test_equilibrium_ends_where_trying_finds_no_state(single: frozenset[str]) -> None:
    """Without a counter in some panels there is a multiple of the crowd beyond which a stretch has no equilibrium."""
    sample = crossed(4, 0.8, seed=9, single=single)
    loads, panels, capacity = case(sample, 9)
    arrangements = LINE_LOAD * stretches(panels, 12)
    last, first = end_by_trying(loads, arrangements, np.linspace(0.0, 6.0, 121))
    pattern = Crowd(LINE_LOAD, 0.0, panels)
    family, conditions, undecided = starting_sets(loads, panels, [LINE_LOAD, 4 * LINE_LOAD, 40 * LINE_LOAD])
    ends = necessary_bars(loads).with_more(conditions)
    _, ends = limit(family, ends, pattern, Question(capacity), np.full_like(capacity, np.inf))
    end, place = ends.first(loads, pattern)
    assert not undecided
    assert end <= first
    assert end >= last * 0.97
    if np.isfinite(end):
        states = [loads.truss.states(dead[None] + 1.001 * end * place @ loads.deck).verdict[0] for dead in loads.dead]
        assert any(verdict != EQUILIBRIUM for verdict in states)


def test_where_sets_lead_to_each_other_the_figure_stays_on_the_safe_side() -> None:
    """Each set's own arrangement makes another set right: what is given lies between trying and the own arrangement.

    So it is with a post in tension: what stands at its foot pulls it, until the rods that meet there take it away.
    """
    sample = BUILDS[3]
    loads, panels, capacity = case(sample, 3)
    family, pattern, multiple = family_of(loads, panels), Crowd(LINE_LOAD, 0.0, panels), 1.35
    found = worst(family, pattern, Question(None, multiple), np.full_like(capacity, np.inf))
    post = sample.geometry.bars.index("b2-t2")
    number, dead = found.at_set[0, post], found.case[0, post]
    lines = family.lines
    own_place = multiple * worst_arrangement(pattern, lines.bars[number, post])
    own = own_place @ lines.bars[number, post] + lines.dead[number, dead, post]
    under_own = loads.truss.states(loads.dead[dead][None] + own_place @ loads.deck)
    assert (under_own.slack[0] != lines.slack[number]).any()
    arrangements = multiple * LINE_LOAD * np.vstack([np.zeros(len(panels) + 1), stretches(panels, 12)])
    states = [loads.truss.states(alone + arrangements @ loads.deck).forces[:, post] for alone in loads.dead]
    tried = float(np.max(states) * loads.scale[post])
    assert tried <= -found.merit[0, post] < own
