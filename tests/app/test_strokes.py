"""Strokes, dashes and fingers in plain numbers."""

from __future__ import annotations

import math

import pytest

from inspector.app.strokes import WIDTHS, dashes, distance, fan, strokes, touched
from models.picture import Line


def area(corners: list[float]) -> float:
    """The area of triangles given as x, y of one corner after the other."""
    total = 0.0
    for k in range(0, len(corners), 6):
        ax, ay, bx, by, cx, cy = corners[k : k + 6]
        total += abs((bx - ax) * (cy - ay) - (cx - ax) * (by - ay)) / 2
    return total


def test_a_stroke_covers_its_length_times_its_width() -> None:
    """Two triangles, drawn out by half a width at either end so that corners close."""
    width = WIDTHS["medium"] * 2
    line = Line(((0.0, 0.0), (30.0, 40.0)), "axis", "medium")
    assert area(strokes(line, 2.0)) == pytest.approx((50 + width) * width)


def test_a_dashed_line_leaves_its_gaps_open() -> None:
    """Strokes and gaps take turns along the whole line, around its corners."""
    pieces = list(dashes([(0.0, 0.0), (10.0, 0.0), (10.0, 10.0)], [8.0, 5.0]))
    assert [(round(math.dist(*piece), 6)) for piece in pieces] == [8.0, 7.0]
    assert pieces[1] == ((10.0, 3.0), (10.0, 10.0))


def test_a_blank_axis_is_not_drawn_and_a_filled_outline_is_closed() -> None:
    """The pattern of the best band is no stroke at all; a shade closes an outline."""
    assert strokes(Line(((0.0, 0.0), (9.0, 0.0)), "axis", pattern="blank"), 1.0) == []
    square = ((0.0, 0.0), (10.0, 0.0), (10.0, 10.0), (0.0, 10.0))
    assert len(strokes(Line(square, "bar", shade="grey"), 1.0)) == 4 * 12
    assert area(fan(square)) == pytest.approx(100)


def test_nothing_is_drawn_of_a_line_without_length() -> None:
    """Two equal points give no stroke and no error."""
    assert strokes(Line(((1.0, 1.0), (1.0, 1.0)), "axis"), 1.0) == []
    assert distance((4.0, 5.0), (1.0, 1.0), (1.0, 1.0)) == 5


PIECES = {
    "across": [((0.0, 0.0), (100.0, 100.0))],
    "back": [((0.0, 100.0), (100.0, 0.0))],
    "far": [((300.0, 0.0), (300.0, 100.0))],
}


def test_the_nearest_bar_within_reach_is_meant() -> None:
    """A finger beside a bar takes it; a finger far from all takes none."""
    assert touched((10.0, 20.0), PIECES, 28.5) == "across"
    assert touched((325.0, 50.0), PIECES, 28.5) == "far"
    assert touched((200.0, 50.0), PIECES, 28.5) is None
    assert touched((0.0, 0.0), {}, 28.5) is None


def test_a_second_tap_on_a_crossing_takes_the_other_bar() -> None:
    """Tap after tap goes from one to the other and back; away from the crossing the chosen one stays."""
    first = touched((50.0, 51.0), PIECES, 28.5)
    second = touched((50.0, 51.0), PIECES, 28.5, first)
    assert {first, second} == {"across", "back"}
    assert touched((50.0, 51.0), PIECES, 28.5, second) == first
    assert touched((10.0, 12.0), PIECES, 28.5, "across") == "across"
