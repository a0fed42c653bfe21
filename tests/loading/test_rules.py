"""Crowds at a pressure by rule: the worst of all arrangements, against plain search and closed forms."""

from __future__ import annotations

from itertools import pairwise

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.calculation import Array
from models.loading.floor import Floor
from models.loading.influence import loaded_lengths
from models.loading.live import Crowd
from models.loading.rules import RULES, CrowdByArea, CrowdByLength, aashto_pressure, en_pressure

lines_and_panels = st.integers(2, 9).flatmap(
    lambda joints: st.tuples(
        st.lists(
            st.floats(-3, 3) | st.sampled_from([0.0, 1.0, 1.0 + 1e-15, -0.5]), min_size=joints, max_size=joints
        ).map(np.array),
        st.lists(st.floats(0.3, 40), min_size=joints - 1, max_size=joints - 1).map(np.array),
    )
)
widths = st.tuples(st.floats(0.5, 3.0), st.just(0.0) | st.floats(0.01, 0.5))


def sliced(ordinates: Array, panels: Array, slices: int) -> tuple[Array, Array]:
    """Length and mean ordinate of thin slices, cut at the crossings so that none has two signs."""
    x = np.concatenate([[0.0], np.cumsum(panels)])
    crossing = np.flatnonzero(ordinates[:-1] * ordinates[1:] < 0)
    parts = ordinates[crossing] / (ordinates[crossing] - ordinates[crossing + 1])
    crossings = x[crossing] + panels[crossing] * parts
    fine = [np.linspace(a, b, slices + 1) for a, b in pairwise(x)]
    cuts = np.unique(np.concatenate([*fine, crossings]))
    return np.diff(cuts), np.interp((cuts[1:] + cuts[:-1]) / 2, x, ordinates)


def searched(ordinates: Array, panels: Array, hurts: float, relieves: float, slices: int = 300) -> float:
    """The largest effect over sets of thin slices, the worthiest first; each set can stand, so it is never too much."""
    length, mean = sliced(ordinates, panels, slices)
    worth = np.where(mean > 0, hurts * mean, -relieves * mean)
    order = np.argsort(-worth)
    covered = np.concatenate([[0.0], np.cumsum(length[order])])
    integral = np.concatenate([[0.0], np.cumsum((length * worth)[order])])
    tried = np.concatenate([covered, np.linspace(0.0, covered[-1], 1001), [min(10.0, covered[-1])]])
    return float((en_pressure(tried) * np.interp(tried, covered, integral)).max())


@given(lines_and_panels, widths)
def test_worst_of_all_lengths_against_search(drawn: tuple[Array, Array], counted: tuple[float, float]) -> None:
    """The exact answer is never below a search over sets of thin slices, and next to nothing above it."""
    ordinates, panels = drawn
    largest, least = CrowdByLength(*counted, panels).extremes(ordinates)
    for found, line in ((float(largest), ordinates), (-float(least), -ordinates)):
        best = searched(line, panels, *counted)
        assert found >= best * (1 - 1e-12)
        assert found <= best * (1 + 1e-4) + 1e-6


@given(lines_and_panels, widths, st.data())
def test_never_below_any_single_stretch(
    drawn: tuple[Array, Array], counted: tuple[float, float], data: st.DataObject
) -> None:
    """No single stretch of people, wherever it begins and ends, does more than what is found."""
    ordinates, panels = drawn
    length, mean = sliced(ordinates, panels, 40)
    first, last = sorted(data.draw(st.tuples(*[st.integers(0, len(length))] * 2)))
    worth = np.where(mean > 0, counted[0] * mean, -counted[1] * mean)
    pressure = float(en_pressure(length[first:last].sum()))
    largest, _ = CrowdByLength(*counted, panels).extremes(ordinates)
    assert largest >= pressure * (worth * length)[first:last].sum() * (1 - 1e-12)


@given(lines_and_panels, widths)
def test_between_the_greatest_and_the_least_pressure(drawn: tuple[Array, Array], counted: tuple[float, float]) -> None:
    """The answer lies between that of a crowd at the pressure of the whole length and one at the greatest pressure."""
    ordinates, panels = drawn
    lengths = [part.sum() for part in loaded_lengths(ordinates, panels)]
    found = CrowdByLength(*counted, panels).extremes(ordinates)
    most = Crowd(5000.0 * counted[0], 5000.0 * counted[1], panels).extremes(ordinates)
    all_of_it = float(en_pressure(np.array(sum(lengths) if counted[1] else max(lengths))))
    least = Crowd(all_of_it * counted[0], all_of_it * counted[1], panels).extremes(ordinates)
    for one, upper, lower in zip(found, most, least, strict=True):
        assert abs(lower) * (1 - 1e-12) <= abs(one) <= abs(upper) * (1 + 1e-12)


@given(lines_and_panels, widths, st.floats(1.0, 3.0))
def test_longer_panels_never_do_less(drawn: tuple[Array, Array], counted: tuple[float, float], stretch: float) -> None:
    """On a deck stretched lengthwise the same ordinates give no less, and no more than in proportion."""
    ordinates, panels = drawn
    before = CrowdByLength(*counted, panels).extremes(ordinates)
    after = CrowdByLength(*counted, stretch * panels).extremes(ordinates)
    for one, other in zip(before, after, strict=True):
        assert abs(one) * (1 - 1e-12) <= abs(other) <= stretch * abs(one) * (1 + 1e-12)


@given(lines_and_panels, widths, st.floats(1e-200, 1e100))
def test_reversed_and_scaled_lines(drawn: tuple[Array, Array], counted: tuple[float, float], size: float) -> None:
    """A line upside down exchanges the extremes, back to front changes nothing, and a factor comes out as itself."""
    ordinates, panels = drawn
    for rule in (CrowdByLength(*counted, panels), CrowdByArea(3.0, *counted, panels)):
        largest, least = rule.extremes(ordinates)
        assert largest >= 0.0 >= least
        assert rule.extremes(-ordinates) == pytest.approx((-least, -largest), rel=1e-9, abs=1e-9)
        assert rule.extremes(size * ordinates) == pytest.approx((size * largest, size * least), rel=1e-9)
    back = CrowdByLength(*counted, panels[::-1]).extremes(ordinates[::-1])
    assert back == pytest.approx(CrowdByLength(*counted, panels).extremes(ordinates), rel=1e-9, abs=1e-9)


def test_triangle_has_its_closed_form() -> None:
    """Under a triangle of length l and height 1 the worst length solves a quadratic.

    Over the middle part of length L the integral is L - L^2/(2 l); its product with 2 + 120/(L + 30) is stationary
    where (2 u^2 + 120 u)(1 - L/l) = 120 (L - L^2/(2 l)), u = L + 30. For l = 60 m that is u^3 - 60 u^2 = 135000.
    """
    crowd = CrowdByLength(1.0, 0.0, np.array([30.0, 30.0]))
    covered = max(np.roots([1.0, -60.0, 0.0, -135000.0]).real) - 30.0
    expected = (2000 + 120e3 / (covered + 30)) * (covered - covered**2 / 120)
    largest, least = crowd.extremes(np.array([0.0, 1.0, 0.0]))
    assert (float(largest), float(least)) == (pytest.approx(expected, rel=1e-13), 0.0)
    assert expected > 2000 * 30 + 120e3 / 90 * 30


def test_short_decks_take_the_greatest_pressure() -> None:
    """Up to ten metres in all, people stand everywhere that hurts, at 5 kPa."""
    ordinates, panels = np.array([[0.0, 1.0, -0.7, 0.2]]), np.array([3.0, 3.5, 3.0])
    found = CrowdByLength(1.2, 0.3, panels).extremes(ordinates)
    np.testing.assert_allclose(found, Crowd(6000.0, 1500.0, panels).extremes(ordinates), rtol=1e-13)


def test_plateau_is_loaded_in_part() -> None:
    """Where a long low plateau follows a peak, people stand on just so much of it that the pressure stays at 5 kPa."""
    crowd = CrowdByLength(1.0, 0.0, np.array([8.0, 0.01, 30.0]))
    largest, _ = crowd.extremes(np.array([1.0, 1.0, 0.05, 0.05]))
    assert largest == pytest.approx(5000.0 * (8.0 + 0.01 * 0.525 + 1.99 * 0.05), rel=1e-13)


def test_two_peaks_beat_one() -> None:
    """The loaded stretches may lie apart: two peaks with a valley between them are loaded without the valley."""
    panels = np.array([5.0, 5.0, 20.0, 5.0, 5.0])
    line = np.array([0.0, 1.0, 0.01, 0.01, 1.0, 0.0])
    largest, _ = CrowdByLength(1.0, 0.0, panels).extremes(line)
    valley = 0.01 * 20 * float(en_pressure(np.array(40.0)))
    assert largest > float(en_pressure(np.array(20.0))) * 9.0
    assert largest > float(en_pressure(np.array(40.0))) * 10.0 + valley / 2


def test_people_beyond_the_other_truss_count_with_their_length() -> None:
    """Those who lift this truss stand at the same pressure, and their stretch of deck makes it less for all."""
    panels, line = np.array([30.0, 30.0, 30.0]), np.array([1.0, 1.0, -1.0, -1.0])
    near = CrowdByLength(1.0, 0.0, panels).extremes(line)[0]
    both = CrowdByLength(1.0, 0.2, panels).extremes(line)[0]
    apart = near + 0.2 * CrowdByLength(1.0, 0.0, panels).extremes(-line)[0]
    assert near < both < apart


@pytest.mark.parametrize("rule", RULES)
def test_many_lines_at_once(rule: str) -> None:
    """Leading axes are kept, and each line gives what it gives alone."""
    floor, panels = Floor(3.6, 3.6, 2.4, 0.6), np.full(6, 9.0)
    lines = np.random.default_rng(3).uniform(-1, 1, (3, 4, 7))
    crowd = RULES[rule].crowd(floor, panels)
    largest, least = crowd.extremes(lines)
    assert largest.shape == least.shape == (3, 4)
    for place in np.ndindex(3, 4):
        np.testing.assert_allclose(crowd.extremes(lines[place]), (largest[place], least[place]), rtol=1e-14)
    assert [len(part) for part in crowd.extremes(lines[:0, 0])] == [0, 0]


def test_lines_of_many_blocks() -> None:
    """More lines than are searched at once give the same answers."""
    lines = np.random.default_rng(5).uniform(-1, 1, (5000, 5))
    crowd = CrowdByLength(1.0, 0.1, np.array([8.0, 20.0, 20.0, 8.0]))
    largest, _ = crowd.extremes(lines)
    np.testing.assert_allclose(crowd.extremes(lines[4090:4100])[0], largest[4090:4100], rtol=1e-14)


def test_area_of_each_sign_gives_its_own_pressure() -> None:
    """AASHTO 1997 takes the deck under the part of the line that hurts: its length times the near strip's width."""
    panels, line = np.array([10.0, 10.0, 5.0]), np.array([1.0, 1.0, -1.0, 0.0])
    largest, least = CrowdByArea(3.0, 1.5, 0.2, panels).extremes(line)
    up, down = (float(aashto_pressure(np.array(3.0 * length))) for length in (15.0, 10.0))
    assert up < down
    assert largest == pytest.approx(up * (1.5 * 12.5 + 0.2 * 5.0), rel=1e-13)
    assert least == pytest.approx(-down * (1.5 * 5.0 + 0.2 * 12.5), rel=1e-13)


def test_rounding_is_no_loaded_deck() -> None:
    """Ordinates that are nothing but rounding do not make the loaded area larger, and so the pressure less."""
    panels = np.array([20.0, 20.0, 20.0])
    crowd = CrowdByArea(3.0, 1.5, 0.0, panels)
    exact, noisy = np.array([0.0, 1.0, 0.0, 0.0]), np.array([0.0, 1.0, 1e-16, 1e-16])
    assert crowd.extremes(noisy)[0] == pytest.approx(float(crowd.extremes(exact)[0]), rel=1e-13)


@pytest.mark.parametrize("size", [0.0, 5e-324, 1e-310, 1e150])
@pytest.mark.parametrize("rule", RULES)
def test_tiny_and_large_ordinates(rule: str, size: float) -> None:
    """No ordinate, however small or large, gives anything but a number."""
    crowd = RULES[rule].crowd(Floor(2.0, 2.0, None, 0.0), np.array([20.0, 20.0]))
    assert np.isfinite(crowd.extremes(np.array([size, -size, size / 3]))).all()


@pytest.mark.parametrize(
    ("floor", "width"),
    [
        (Floor(2.0, 2.0, None, 0.0), 2.0),
        (Floor(2.0, 2.0, 2.4, -0.2), 2.0),
        (Floor(3.6, 3.6, 2.4, 0.6), 3.0),
        (Floor(2.0, 2.0, 2.4, -1.0), 1.4),
        (Floor(2.0, 2.0, 2.4, -2.5), 0.0),
    ],
)
def test_near_width(floor: Floor, width: float) -> None:
    """The strip whose people load this truss reaches from the near edge of the deck to the other truss."""
    assert floor.near_width() == pytest.approx(width, abs=1e-15)
