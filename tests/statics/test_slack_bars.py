"""Bars that cannot push: the one state under given loads, whatever way leads there."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from plane.crossed import Crossed, crossed, downward

from models.calculation import Array
from models.statics import slack_bars
from models.statics.geometry import equilibrium_matrix
from models.statics.slack_bars import EQUILIBRIUM, NO_EQUILIBRIUM, States

CLOSE = 1e-8


def loads_on(sample: Crossed, seed: int, count: int = 6) -> Array:
    """Loads on all joints, some of them bare, in every direction."""
    random = np.random.default_rng(seed)
    shape = count, 2 * len(sample.geometry.joints)
    loads: Array = random.normal(size=shape) * (random.random(shape) < 0.6)
    return loads


def forces_of(sample: Crossed, states: States) -> Array:
    """Forces of all states, N."""
    return states.forces * sample.response.scale


samples = st.builds(crossed, st.integers(1, 7), st.sampled_from((0.4, 1.0, 2.5)), seed=st.integers(0, 10**6))
"""Crossed trusses with areas that differ by ten to one, or equal ones."""

with_gaps = st.builds(
    lambda panels, seed, which: crossed(
        panels,
        seed=seed,
        single=frozenset(f"b{i}-t{i + 1}" for i in range(panels) if which >> i & 1),
    ),
    st.integers(1, 6),
    st.integers(1, 10**6),
    st.integers(0, 63),
)
"""The same with a single rod in some panels, which holds the panel one way only."""


@given(st.one_of(samples, with_gaps), st.integers(0, 10**6))
def test_forces_are_those_of_another_library(sample: Crossed, seed: int) -> None:
    """The least energy over forces in equilibrium, none of them a push in a rod, is the one that scipy finds."""
    loads = loads_on(sample, seed)
    states = sample.slack.states(sample.whole(loads))
    for load, verdict, found in zip(loads, states.verdict, forces_of(sample, states), strict=True):
        expected = sample.expected(load)
        if expected is None:
            assert verdict == NO_EQUILIBRIUM
        else:
            assert verdict == EQUILIBRIUM
            np.testing.assert_allclose(found, expected, atol=CLOSE * max(1.0, float(np.abs(expected).max())))


@given(st.one_of(samples, with_gaps), st.integers(0, 10**6))
def test_a_state_is_in_equilibrium_and_pushes_no_rod(sample: Crossed, seed: int) -> None:
    """Joints are in equilibrium, no rod pushes, a slack rod has no force, and the gap of a slack rod is open."""
    loads = loads_on(sample, seed)
    truss = sample.slack
    states = truss.states(sample.whole(loads))
    free = ~sample.geometry.held
    matrix = equilibrium_matrix(sample.geometry)[free]
    rods = np.flatnonzero(sample.cannot_push)
    for number in np.flatnonzero(states.verdict == EQUILIBRIUM):
        forces = forces_of(sample, states)[number]
        size = max(1.0, float(np.abs(forces).max()))
        assert np.abs(matrix @ forces + loads[number, free]).max() <= CLOSE * size
        assert forces[rods].min() >= -CLOSE * size
        assert not forces[rods[states.slack[number]]].any()
        held = truss.under(states.slack[number])
        if held is not None:
            assert held.tautness(sample.whole(loads[number : number + 1])).min() >= -CLOSE * size


@given(with_gaps, st.integers(0, 10**6))
def test_what_ends_equilibrium_is_told_by_a_motion(sample: Crossed, seed: int) -> None:
    """A load without equilibrium fails a condition that every load with equilibrium meets."""
    loads = loads_on(sample, seed, 12)
    whole = sample.whole(loads)
    states = sample.slack.states(whole)
    rods = np.flatnonzero(sample.cannot_push)
    values = np.array([whole[:, rods] @ condition for condition in states.conditions]).reshape(-1, len(loads))
    small = 1e-7 * np.abs(whole).max()
    assert (values[:, states.verdict == EQUILIBRIUM] >= -small).all()
    fails = (values < 0.0).any(axis=0)
    assert fails[states.verdict == NO_EQUILIBRIUM].all()


@given(samples, st.integers(0, 10**6))
def test_the_convex_problem_alone_says_the_same(sample: Crossed, seed: int) -> None:
    """Going from set to set is only the fast way: without it the same forces come out."""
    whole = sample.whole(loads_on(sample, seed))
    fast = sample.slack.states(whole)
    with pytest.MonkeyPatch.context() as patch:
        patch.setattr(slack_bars, "_MOST_STEPS", 0)
        slow = sample.slack.states(whole)
    np.testing.assert_array_equal(fast.verdict, slow.verdict)
    np.testing.assert_allclose(fast.forces, slow.forces, atol=CLOSE * np.abs(whole).max())


def test_a_single_rod_the_wrong_way_is_a_mechanism() -> None:
    """One panel with one rod carries a load that pulls it, and none that would push it."""
    sample = crossed(1, single=frozenset({"b0-t1"}))
    pulls, pushes = np.zeros((2, 8))
    pushes[2 * sample.geometry.joints.index("t0")] = 1000.0
    pulls -= pushes
    states = sample.slack.states(sample.whole(np.array([pulls, pushes])))
    assert states.verdict.tolist() == [EQUILIBRIUM, NO_EQUILIBRIUM]
    assert forces_of(sample, states)[0, -1] == pytest.approx(1000.0 * np.sqrt(2.0))


def test_only_one_rod_of_a_sheared_panel_pulls() -> None:
    """A load in the middle of two panels: one rod of each takes all of the shear, P/2 over the sine of its slope."""
    sample = crossed(2, 0.75)
    states = sample.slack.states(sample.whole(downward(sample, 0.0, 1200.0, 0.0)))
    found = dict(zip(sample.geometry.bars, forces_of(sample, states)[0], strict=True))
    assert found["t0-b1"] == pytest.approx(600.0 / 0.6)
    assert found["b1-t2"] == pytest.approx(600.0 / 0.6)
    assert found["b0-t1"] == found["t1-b2"] == 0.0


def test_a_panel_without_shear_stands_with_all_its_rods_idle() -> None:
    """Between two equal loads the middle panel has no shear: its rods have no force, and that is no mechanism."""
    sample = crossed(3)
    states = sample.slack.states(sample.whole(downward(sample, 0.0, 900.0, 900.0, 0.0)))
    found = dict(zip(sample.geometry.bars, forces_of(sample, states)[0], strict=True))
    assert states.verdict.tolist() == [EQUILIBRIUM]
    assert abs(found["b1-t2"]) < 1e-6
    assert abs(found["t1-b2"]) < 1e-6


def test_all_rods_of_a_panel_may_be_slack_at_once() -> None:
    """Where stiff diagonals hold a panel whose posts shorten, both of its rods go slack."""
    sample = crossed(1, stiff="b0-t1 t0-b1")
    load = np.zeros((1, 8))
    load[0, [2 * sample.geometry.joints.index(joint) + 1 for joint in ("t0", "t1")]] = -1000.0
    truss = sample.slack
    states = truss.states(sample.whole(load))
    assert states.verdict.tolist() == [EQUILIBRIUM]
    assert states.slack.all()
    assert forces_of(sample, states)[0, :4].min() < 0.0


def test_nothing_is_slack_without_loads() -> None:
    """No load, no force, nothing slack."""
    sample = crossed(3, seed=5)
    states = sample.slack.states(np.zeros((2, len(sample.geometry.bars))))
    assert not states.slack.any()
    assert not states.forces.any()
    assert states.verdict.tolist() == [EQUILIBRIUM, EQUILIBRIUM]


@given(samples, st.integers(0, 10**6))
def test_a_truss_without_one_bar_is_that_truss(sample: Crossed, seed: int) -> None:
    """Taking a bar out of the factorised truss leaves the forces that the truss without it has."""
    loads = loads_on(sample, seed, 3)
    whole = sample.whole(loads)
    gone = seed % len(sample.geometry.bars)
    left = sample.slack.without(gone)
    if left is None:
        return
    own = sample.slack.projector[gone] / sample.slack.projector[gone, gone]
    changed = whole - whole[:, gone, None] * own
    changed[:, gone] = 0.0
    states = left.states(changed)
    kept = np.delete(np.arange(len(sample.geometry.bars)), gone)
    other = Crossed(sample.geometry.keeping(kept), sample.flexibility[kept], sample.cannot_push[kept])
    for load, verdict, found in zip(loads, states.verdict, forces_of(sample, states), strict=True):
        expected = other.expected(load)
        assert (verdict == EQUILIBRIUM) == (expected is not None)
        if expected is not None:
            np.testing.assert_allclose(found[kept], expected, atol=CLOSE * max(1.0, float(np.abs(expected).max())))
