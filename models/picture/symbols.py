"""The small signs of an elevation: supports, deck, direction, scale, marks on bars, and the legend."""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import Final

from models.picture.drawing import LegendRow, Line, Pattern, Point, Shade, Text
from models.picture.views import GONE, View
from models.rating.result import BarRating
from models.words import Figures, significant

_SIDES: Final = 12


def circle(centre: Point, radius: float, role: str, shade: Shade, of: str = "") -> Line:
    """A small circle, as a polygon."""
    turns = [2 * math.pi * k / _SIDES for k in range(_SIDES)]
    points = tuple((centre[0] + radius * math.cos(turn), centre[1] + radius * math.sin(turn)) for turn in turns)
    return Line(points, role, "thin", "solid", shade, of)


def _triangle(joint: Point, height: float, of: str) -> Line:
    x, y = joint
    return Line(((x, y), (x - 0.7 * height, y - 1.2 * height), (x + 0.7 * height, y - 1.2 * height)), "support",
                "medium", "solid", "paper", of)  # fmt: skip


def support_box(joint: Point, height: float) -> tuple[float, float, float, float, float, float]:
    """The rectangle that a support's sign covers."""
    return joint[0], joint[1] - 0.85 * height, 1.2 * height, 0.85 * height, 1.0, 0.0


def pin(joint: Point, height: float, of: str) -> list[Line]:
    """A support that holds both ways: a triangle on hatched ground."""
    x, base = joint[0], joint[1] - 1.2 * height
    ground = Line(((x - 1.1 * height, base), (x + 1.1 * height, base)), "support", "medium", of=of)
    hatch = [
        Line(((x + k * 0.4 * height, base), (x + (k * 0.4 - 0.3) * height, base - 0.4 * height)), "support", of=of)
        for k in range(-2, 4)
    ]
    return [_triangle(joint, height, of), ground, *hatch]


def roller(joint: Point, height: float, of: str) -> list[Line]:
    """A support that holds up and down only: a triangle on rollers."""
    x, base = joint[0], joint[1] - 1.2 * height
    wheels = [
        circle((x + k * 0.4 * height, base - 0.2 * height), 0.2 * height, "support", "paper", of) for k in (-1, 1)
    ]
    level = base - 0.4 * height
    return [_triangle(joint, height, of), *wheels,
            Line(((x - 1.1 * height, level), (x + 1.1 * height, level)), "support", "medium", of=of)]  # fmt: skip


def cross(centre: Point, angle: float, height: float, of: str) -> list[Line]:
    """The mark of a bar that is given no credit."""
    arms = [math.radians(angle + turn) for turn in (45, -45)]
    reach = 0.45 * height
    return [
        Line(
            (
                (centre[0] - reach * math.cos(arm), centre[1] - reach * math.sin(arm)),
                (centre[0] + reach * math.cos(arm), centre[1] + reach * math.sin(arm)),
            ),
            "gone", "heavy", of=of,
        )
        for arm in arms
    ]  # fmt: skip


def strokes(start: Point, end: Point, height: float, of: str) -> list[Line]:
    """Short strokes across a bar that was not seen."""
    length = math.dist(start, end)
    number = max(int(length / (0.9 * height)), 1)
    if not length:
        return []
    dx, dy = (end[0] - start[0]) / length, (end[1] - start[1]) / length
    reach = 0.45 * height
    found = []
    for k in range(number):
        x, y = start[0] + dx * length * (k + 0.5) / number, start[1] + dy * length * (k + 0.5) / number
        found.append(Line(((x - dy * reach, y + dx * reach), (x + dy * reach, y - dx * reach)), "not seen", of=of))
    return found


def deck_line(joints: Sequence[Point], height: float, below: bool) -> tuple[list[Line], list[Text]]:
    """The floor, drawn clear of the chord that it rests on, with a tick at each deck joint."""
    away = -3.6 * height if below else 3.6 * height
    floor = [(x, y + away) for x, y in joints]
    ticks = [Line(((x, y - 0.3 * height), (x, y + 0.3 * height)), "deck", "thin") for x, y in floor]
    name = Text("deck", (floor[0][0] - 2.2 * height, floor[0][1]), height, "note")
    return [Line(tuple(floor), "deck", "medium"), *ticks], [name]


def way_ahead(at: Point, text: str, height: float) -> tuple[list[Line], list[Text]]:
    """An arrow in the direction of x with its words."""
    x, y = at
    tip = (x + 5 * height, y)
    head = Line((tip, (tip[0] - height, y + 0.35 * height), (tip[0] - height, y - 0.35 * height)), "ahead", "thin",
                "solid", "ink")  # fmt: skip
    words = Text(text, tip, height, "note")
    words = Text(text, (tip[0] + 0.8 * height + words.width / 2, y), height, "note")
    return [Line((at, tip), "ahead", "medium"), head], [words]


def scale_bar(right: Point, span: float, figures: Figures, height: float) -> tuple[list[Line], list[Text]]:
    """A bar of a round length in the printed unit, about a fifth of the drawing, its end at ``right``."""
    unit = span / figures.scaled(span, "length") if span else 1.0
    fifth = max(figures.scaled(span, "length") / 5, 1e-3)
    power = 10 ** math.floor(math.log10(fifth))
    length = max(step * power for step in (1, 2, 5) if step * power <= fifth * (1 + 1e-9))
    end = Text(f"{significant(length)} {figures.unit('length')}", right, height, "note")
    x1, y = right[0] - end.width - 0.6 * height, right[1]
    x0 = x1 - length * unit
    middle = (x0 + x1) / 2
    box = (y - 0.2 * height, y + 0.2 * height)
    lines = [
        Line(((a, box[0]), (b, box[0]), (b, box[1]), (a, box[1])), "scale", "thin", "solid", shade)
        for a, b, shade in _halves(x0, middle, x1)
    ]
    return lines, [
        Text("0", (x0 - 0.7 * height, y), height, "note"),
        Text(end.text, (x1 + 0.6 * height + end.width / 2, y), height, "note"),
    ]


def _halves(x0: float, middle: float, x1: float) -> tuple[tuple[float, float, Shade], tuple[float, float, Shade]]:
    return (x0, middle, "ink"), (middle, x1, "paper")


def legend(view: View, bars: Sequence[BarRating]) -> tuple[LegendRow, ...]:
    """What the patterns of the bars mean; marks only where the drawing has them."""
    ends: tuple[Point, Point] = ((0.0, 0.5), (4.0, 0.5))
    rows = [
        LegendRow(
            (
                Line(((0.0, 0.2), (4.0, 0.2), (4.0, 0.8), (0.0, 0.8)), "bar", band.weight, "solid", band.shade),
                Line(ends, "axis", "thin", band.pattern),
            ),
            band.text,
        )
        for band in view.bands
    ]
    gone = sorted({str(bar.check) for bar in bars if bar.check in GONE})
    if gone:
        dashed: Pattern = "dashed"
        rows.append(
            LegendRow(
                (Line(ends, "axis", "medium", dashed), *cross((2.0, 0.5), 0.0, 1.0, "")),
                " or ".join(gone) + ", no credit",
            )
        )
    if any(bar.known == "not seen" for bar in bars):
        rows.append(LegendRow((Line(ends, "axis", "thin"), *strokes(*ends, 1.0, "")), "not seen in the last visit"))
    return tuple(rows)
