"""Areas of influence lines and what crowds and even loads make of them."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.integrate import trapezoid

from models.calculation import Array
from models.loading.influence import loaded_areas
from models.loading.live import Crowd, Everywhere, Placed, Together

ordinates_and_panels = st.integers(2, 9).flatmap(
    lambda joints: st.tuples(
        st.lists(st.floats(-3, 3) | st.just(0.0), min_size=joints, max_size=joints).map(np.array),
        st.lists(st.floats(0.1, 6), min_size=joints - 1, max_size=joints - 1).map(np.array),
    )
)


def integrated(ordinates: Array, panels: Array) -> tuple[float, float]:
    """Positive and negative area by the trapezoidal rule on a fine grid that holds the zero crossings."""
    x = np.concatenate([[0.0], np.cumsum(panels)])
    first, last = ordinates[:-1], ordinates[1:]
    crossing = first * last < 0
    places = x[:-1][crossing] + (panels * np.abs(first) / (np.abs(first) + np.abs(last) + 1e-300))[crossing]
    grid = np.unique(np.concatenate([np.linspace(0.0, x[-1], 2001), x, places]))
    values = np.interp(grid, x, ordinates)
    return (
        float(trapezoid(np.maximum(values, 0.0), grid)),
        float(trapezoid(np.minimum(values, 0.0), grid)),
    )


@given(ordinates_and_panels)
def test_areas_against_integration(drawn: tuple[Array, Array]) -> None:
    """Both areas are the integrals of the straight pieces, zero crossings inside panels included."""
    positive, negative = loaded_areas(*drawn)
    expected = integrated(*drawn)
    assert (float(positive), float(negative)) == pytest.approx(expected, abs=1e-9, rel=1e-9)


@given(ordinates_and_panels)
def test_areas_sum_to_the_integral(drawn: tuple[Array, Array]) -> None:
    """Both areas together are the whole integral, and each has its sign."""
    ordinates, panels = drawn
    positive, negative = loaded_areas(ordinates, panels)
    assert positive >= 0.0 >= negative
    assert positive + negative == pytest.approx(((ordinates[1:] + ordinates[:-1]) / 2 * panels).sum(), abs=1e-12)


@pytest.mark.parametrize("size", [0.0, 5e-324, 1e-310, 1e-200, 1e150])
def test_areas_of_tiny_and_large_ordinates(size: float) -> None:
    """No ordinate, however small or large, makes the division overflow."""
    positive, negative = loaded_areas(np.array([size, -size, size]), np.array([4.0, 4.0]))
    assert positive == pytest.approx(2 * size, abs=1e-300)
    assert negative == pytest.approx(-2 * size, abs=1e-300)


def test_areas_of_many_lines_at_once() -> None:
    """Leading axes are kept: one row an influence line."""
    ordinates = np.array([[[0.0, 1.0, 0.0], [1.0, -1.0, 0.0]], [[2.0, 2.0, 2.0], [0.0, 0.0, 0.0]]])
    positive, negative = loaded_areas(ordinates, np.array([2.0, 4.0]))
    np.testing.assert_allclose(positive, [[3.0, 0.5], [12.0, 0.0]])
    np.testing.assert_allclose(negative, [[0.0, -2.5], [0.0, 0.0]])


def test_crowd_between_the_trusses() -> None:
    """People stand on the part of the line that hurts alone."""
    crowd = Crowd(hurts=1000.0, relieves=0.0, panels=np.array([2.0, 2.0]))
    largest, least = crowd.extremes(np.array([0.0, 1.0, -1.0]))
    assert (largest, least) == (1000.0 * 1.5, -1000.0 * 0.5)


def test_crowd_beyond_the_other_truss() -> None:
    """People beyond the far truss stand on the other part of the line, where they hurt by lifting."""
    crowd = Crowd(hurts=1000.0, relieves=100.0, panels=np.array([2.0, 2.0]))
    largest, least = crowd.extremes(np.array([0.0, 1.0, -1.0]))
    assert largest == pytest.approx(1000.0 * 1.5 + 100.0 * 0.5)
    assert least == pytest.approx(-1000.0 * 0.5 - 100.0 * 1.5)


@given(ordinates_and_panels)
def test_reversed_line(drawn: tuple[Array, Array]) -> None:
    """A line upside down gives the same extremes with their places and signs exchanged."""
    ordinates, panels = drawn
    for pattern in (Crowd(3.0, 0.5, panels), Everywhere(2.0, panels), Placed(np.eye(len(ordinates)), (0.9, -0.2))):
        largest, least = pattern.extremes(ordinates)
        other_largest, other_least = pattern.extremes(-ordinates)
        assert (largest, least) == pytest.approx((-other_least, -other_largest), abs=1e-12)
        assert largest >= 0.0 >= least


@pytest.mark.parametrize(
    ("ordinates", "expected"), [([0.0, 1.0, 0.5], (350.0, 0.0)), ([0.0, -1.0, 1.0], (0.0, -100.0))]
)
def test_everywhere(ordinates: list[float], expected: tuple[float, float]) -> None:
    """A load that stands everywhere gives its whole integral, on one side alone, or stays away."""
    pattern = Everywhere(line_load=100.0, panels=np.array([2.0, 2.0 if ordinates[1] < 0 else 10.0 / 3]))
    assert pattern.extremes(np.array(ordinates)) == pytest.approx(expected)


def test_together() -> None:
    """A load and its companions each stand at their own worst, times their factors."""
    panels = np.array([2.0, 2.0])
    crowd, snow = Crowd(1000.0, 0.0, panels), Everywhere(100.0, panels)
    line = np.array([0.0, 1.0, -0.5])
    largest, least = Together(((1.0, crowd), (0.3, snow))).extremes(line)
    assert largest == pytest.approx(crowd.extremes(line)[0] + 0.3 * snow.extremes(line)[0])
    assert least == pytest.approx(crowd.extremes(line)[1])
