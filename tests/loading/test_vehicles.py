"""Axle trains along the deck against a search at steps of a millimetre."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from models.calculation import Array
from models.loading.live import Placed, axle_places, on_deck_joints

_STEP = 1e-3
_BESIDE = 1e-6

panels_in_mm = st.lists(st.integers(300, 3000), min_size=1, max_size=6)


@st.composite
def cases(draw: st.DrawFn) -> tuple[Array, Array, Array, Array]:
    """Deck joints and ordinates, axle positions and weights, all on whole millimetres.

    Axles are one to five; some trains are longer than the deck, some have their axles a panel or the whole deck apart.
    """
    panels = draw(panels_in_mm)
    x = np.concatenate([[0], np.cumsum(panels)])
    ends = st.sampled_from([0.0, 0.0, 1.0, -0.7, 0.4])
    inner = draw(st.lists(st.integers(-100, 100), min_size=len(x) - 2, max_size=len(x) - 2))
    ordinates = np.array([draw(ends), *[value / 100 for value in inner], draw(ends)])
    spacing = st.sampled_from([*panels, int(x[-1]), int(x[-1]) + 500]) | st.integers(100, 4000)
    gaps = draw(st.lists(spacing, max_size=4))
    positions = np.concatenate([[0], np.cumsum(gaps)])
    weights = draw(st.lists(st.integers(1, 20), min_size=len(positions), max_size=len(positions)))
    return x / 1000, ordinates, positions / 1000, np.array(weights, float)


def searched(x: Array, ordinates: Array, positions: Array, weights: Array) -> tuple[float, float]:
    """Largest and least effect over all places at 1 mm steps, and just beside each, in both directions."""
    largest, least = 0.0, 0.0
    for offsets in (positions, -positions):
        first, last = x[0] - offsets.max() - 0.01, x[-1] - offsets.min() + 0.01
        grid = np.arange(round(first / _STEP), round(last / _STEP) + 1) * _STEP
        for beside in (0.0, _BESIDE, -_BESIDE):
            places = np.round((grid + beside)[:, None] + offsets, 9)
            effects = np.interp(places, x, ordinates, left=0.0, right=0.0) @ weights
            largest, least = max(largest, float(effects.max())), min(least, float(effects.min()))
    return largest, least


@settings(max_examples=80, deadline=None)
@given(cases())
def test_places_against_a_search(case: tuple[Array, Array, Array, Array]) -> None:
    """No place is worse than those that are tried, and the search comes within a ten-thousandth of them."""
    x, ordinates, positions, weights = case
    largest, least = Placed(axle_places(x, positions, weights), (1.0,)).extremes(ordinates)
    found_largest, found_least = searched(x, ordinates, positions, weights)
    size = float(weights.sum() * np.abs(ordinates).max())
    assert found_largest <= largest + 1e-7 * size
    assert found_least >= least - 1e-7 * size
    assert found_largest == pytest.approx(largest, abs=1e-4 * size + 1e-12)
    assert found_least == pytest.approx(least, abs=1e-4 * size + 1e-12)


@settings(max_examples=40, deadline=None)
@given(cases())
def test_no_place_carries_more_than_the_train(case: tuple[Array, Array, Array, Array]) -> None:
    """At every place the deck joints share at most the whole train, and no joint is lifted."""
    x, _, positions, weights = case
    places = axle_places(x, positions, weights)
    assert places.min() >= 0.0
    assert places.sum(axis=1).max() <= weights.sum() * (1 + 1e-12)


@given(cases(), st.floats(-50, 50))
def test_where_positions_are_counted_from_does_not_matter(
    case: tuple[Array, Array, Array, Array], shift: float
) -> None:
    """A train whose axle positions are counted from elsewhere, or in another order, is the same train."""
    x, ordinates, positions, weights = case
    there = Placed(axle_places(x, positions, weights), (1.0,)).extremes(ordinates)
    moved = Placed(axle_places(x, (positions + shift)[::-1], weights[::-1]), (1.0,)).extremes(ordinates)
    assert moved == pytest.approx(there, abs=1e-6)


@pytest.mark.parametrize(
    ("x", "ordinates"),
    [([0.0, 2.0, 5.0], [-0.5, 1.0, -1.0]), ([0.0, 3.0, 5.0], [-1.0, 1.0, -0.5])],
    ids=["first end", "last end"],
)
def test_an_axle_that_left_the_deck_relieves_no_more(x: list[float], ordinates: list[float]) -> None:
    """At an end where the line stops abruptly, the relieving axle just beyond it does not count.

    Axles 2 m apart: with one over the middle and one over the end 1 - 0.5, with that one just off the deck 1.
    """
    places = axle_places(np.array(x), np.array([0.0, 2.0]), np.ones(2))
    largest, least = Placed(places, (1.0,)).extremes(np.array(ordinates))
    assert (largest, least) == pytest.approx((1.0, -1.0))


def test_a_relieving_axle_on_the_deck_counts() -> None:
    """Between the ends every axle on the deck counts, also where it relieves."""
    x, ordinates = np.array([0.0, 2.0, 4.0, 6.0]), np.array([0.0, 1.0, -1.0, 0.0])
    largest, _ = Placed(axle_places(x, np.array([0.0, 2.0]), np.array([10.0, 10.0])), (1.0,)).extremes(ordinates)
    assert largest == pytest.approx(10.0)


def test_both_directions() -> None:
    """A heavy rear axle may lead: the train turned round is tried too."""
    x, ordinates = np.array([0.0, 1.0, 4.0]), np.array([0.0, 1.0, 0.0])
    largest, _ = Placed(axle_places(x, np.array([0.0, 2.0]), np.array([2.0, 8.0])), (1.0,)).extremes(ordinates)
    assert largest == pytest.approx(8.0 + 2.0 / 3)


def test_the_share_across_may_be_negative() -> None:
    """A wheel line beyond the far truss lifts the near one: both signs of both places across are tried."""
    largest, least = Placed(np.eye(3), (1.2, -0.2)).extremes(np.array([0.0, 1.0, -0.5]))
    assert (largest, least) == pytest.approx((1.2, -0.6))


def test_forces_between_deck_joints() -> None:
    """The floor carries a force to both deck joints of its panel by the lever; beyond the deck nothing is carried."""
    x, positions = np.array([0.0, 2.0, 6.0]), np.array([0.0, 0.5, 2.0, 5.0, 6.0, 7.0])
    parts = on_deck_joints(x, positions, positions <= 6.0)
    expected = [[1, 0, 0], [0.75, 0.25, 0], [0, 1, 0], [0, 0.25, 0.75], [0, 0, 1], [0, 0, 0]]
    np.testing.assert_allclose(parts, expected)
