"""The elevation of a truss as a picture: joints, supports, bars with their names and one figure each.

Texts are placed so that none covers another and no bar runs through one: beside their bar, turned
with it, at another fraction of the length where bars cross; if need be all letters are made smaller.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass, replace
from typing import Final

from models.bridge import Bar, Truss
from models.picture.drawing import Line, Picture, Point, Text, as_boxes, box_along, overlaps
from models.picture.labels import Stretch, along, around, place, short_name, upright
from models.picture.symbols import (
    circle,
    cross,
    deck_line,
    legend,
    pin,
    roller,
    scale_bar,
    strokes,
    support_box,
    way_ahead,
)
from models.picture.views import GONE, VIEWS, View
from models.rating.result import BarRating, TrussRating
from models.words import Figures

BAR_DEPTH: Final = 0.6
"""Drawn depth of a bar, in text heights."""

_SMALLER: Final = 0.92
_STEPS: Final = 10
_STEPS_IN_PARTS: Final = 4
_MOST_PARTS: Final = 6
_MARGIN: Final = 4.0
_HULL: Final = ("top chord", "bottom chord", "end post")
_OF_BARS: Final = ("bar", "axis", "gone", "not seen")


def elevation(
    truss: Truss, rated: TrussRating, view: str = "rating factor", level: str = "operating",
    figures: Figures | None = None, across: float = 125.0, *, bar_names: bool = True,
) -> Picture:  # fmt: skip
    """Draw a truss as one picture.

    Parameters
    ----------
    view : a name in `models.picture.views.VIEWS`.
    level : the level of the basis whose rating factors are shown.
    across : how many text heights fit into the width that the drawing will get; letters become
        smaller only where labels would cover each other.
    bar_names : whether bars are named beside their figure; without, letters can be larger.
    """
    look = _Look(VIEWS[view], level, figures or Figures(), _numbers(truss), bar_names)
    return _clearest(truss, rated, look, across, _STEPS)


def redrawn(
    picture: Picture, truss: Truss, rated: TrussRating, view: str = "rating factor", level: str = "operating",
    figures: Figures | None = None,
) -> Picture | None:  # fmt: skip
    """The same picture with new figures, every label in its place; None where a figure has become too long for it.

    Finding places for labels takes much longer than a rating does; it is done again only where it must.

    Parameters
    ----------
    picture : what `elevation` drew of this truss with the same view, level and figures.
    """
    look = _Look(VIEWS[view], level, figures or Figures(), _numbers(truss))
    rows = {bar.bar: bar for bar in rated.bars}
    texts = tuple(
        replace(text, text=look.view.label(rows[text.of], level)) if text.role == "bar figure" else text
        for text in picture.texts
    )
    sheet = _Sheet(truss, rows, look, picture.height, {name: (x.si, y.si) for name, (x, y) in truss.joints.items()})
    stretches = _stretches(sheet)
    bars = [line for bar in truss.bars for line in _bar(sheet, bar, stretches[bar.id])]
    first = next(place for place, line in enumerate(picture.lines) if line.role in _OF_BARS)
    others = tuple(line for line in picture.lines[first:] if line.role not in _OF_BARS)
    lines = (*picture.lines[:first], *bars, *others)
    found = replace(picture, lines=lines, texts=texts, legend=legend(look.view, rated.bars))
    wider = any(new.width > old.width for new, old in zip(texts, picture.texts, strict=True))
    return None if wider and len(overlaps(found)) > len(overlaps(picture)) else found


def in_parts(
    truss: Truss, rated: TrussRating, view: str = "rating factor", level: str = "operating",
    figures: Figures | None = None, across: float = 125.0,
) -> tuple[Picture, ...]:  # fmt: skip
    """Draw a truss as few pictures as its labels need at a readable size, cut at panel points.

    A bar that stands on a cut is drawn on both sides of it. Parameters as in `elevation`.
    """
    look = _Look(VIEWS[view], level, figures or Figures(), _numbers(truss))
    most = max(len(truss.deck_joints) - 1, 1)
    pictures: tuple[Picture, ...] = ()
    for number in range(1, min(most, _MOST_PARTS) + 1):
        parts = [_part(truss, number, k) for k in range(number)]
        pictures = tuple(_clearest(part, rated, look, across, _STEPS_IN_PARTS) for part in parts)
        if not any(overlaps(picture) for picture in pictures):
            break
    else:
        pictures = tuple(_clearest(part, rated, look, across, _STEPS) for part in parts)
    if len(pictures) == 1:
        return pictures
    return tuple(
        replace(picture, title=f"{picture.title} (part {k} of {len(pictures)})")
        for k, picture in enumerate(pictures, 1)
    )


def _part(truss: Truss, number: int, k: int) -> Truss:
    """Part ``k`` of ``number``: the bars of some panels, with the joints that they need."""
    if number == 1:
        return truss
    panels = len(truss.deck_joints) - 1
    first, last = round(k * panels / number), round((k + 1) * panels / number)
    at = {name: x.si for name, (x, _) in truss.joints.items()}
    low = at[truss.deck_joints[first]] if k else -math.inf
    high = at[truss.deck_joints[last]] if k + 1 < number else math.inf
    bars = tuple(bar for bar in truss.bars if low <= (at[bar.start] + at[bar.end]) / 2 <= high)
    deck = truss.deck_joints[first : last + 1]
    needed = {end for bar in bars for end in (bar.start, bar.end)} | set(deck)
    return replace(
        truss,
        bars=bars,
        joints={name: place for name, place in truss.joints.items() if name in needed},
        supports={name: kind for name, kind in truss.supports.items() if name in needed},
        deck_joints=deck,
    )


def _numbers(truss: Truss) -> Mapping[tuple[str, str], int]:
    """Each joint's and bar's place in the tables, from 1."""
    joints = {("joint", name): number for number, name in enumerate(truss.joints, 1)}
    return joints | {("bar", bar.id): number for number, bar in enumerate(truss.bars, 1)}


def _clearest(truss: Truss, rated: TrussRating, look: _Look, across: float, steps: int) -> Picture:
    """The picture with the largest letters and no overlap, else the one with the fewest."""
    best, fewest = None, math.inf
    for step in range(steps):
        picture = _drawn(_Sheet.of(truss, rated, look, across / _SMALLER**step))
        found = len(overlaps(picture))
        if best is None or found < fewest:
            best, fewest = picture, found
        if not found:
            break
    return best or _drawn(_Sheet.of(truss, rated, look, across))


@dataclass(frozen=True)
class _Look:
    """What is shown of the bars, the same in all parts of a drawing."""

    view: View
    level: str
    figures: Figures
    numbers: Mapping[tuple[str, str], int]
    bar_names: bool = True

    def joint(self, name: str) -> str:
        """The joint's name as drawn."""
        return short_name(name, self.numbers["joint", name])

    def bar(self, name: str) -> str:
        """The bar's name as drawn."""
        return short_name(name, self.numbers["bar", name])


@dataclass(frozen=True)
class _Sheet:
    """What one attempt draws, with the height of its letters, m."""

    truss: Truss
    bars: Mapping[str, BarRating]
    look: _Look
    height: float
    at: Mapping[str, Point]

    @staticmethod
    def of(truss: Truss, rated: TrussRating, look: _Look, across: float) -> _Sheet:
        """Find the height of letters at which ``across`` of them fill the width with its margins."""
        at = {name: (x.si, y.si) for name, (x, y) in truss.joints.items()}
        span = max(x for x, _ in at.values()) - min(x for x, _ in at.values())
        rise = max(y for _, y in at.values()) - min(y for _, y in at.values())
        height = max(span, rise, 1e-6) / (across - 2 * _MARGIN)
        return _Sheet(truss, {bar.bar: bar for bar in rated.bars}, look, height, at)

    @property
    def middle(self) -> Point:
        """The centre of the truss's box."""
        xs, ys = zip(*self.at.values(), strict=True)
        return (min(xs) + max(xs)) / 2, (min(ys) + max(ys)) / 2

    @property
    def deck_below(self) -> bool:
        """Whether the deck hangs at the lower joints."""
        deck = [self.at[name][1] for name in self.truss.deck_joints]
        return sum(deck) / len(deck) <= self.middle[1]


def _drawn(sheet: _Sheet) -> Picture:
    stretches = _stretches(sheet)
    supports = [
        line
        for joint, kind in sheet.truss.supports.items()
        for line in (pin if kind == "pin" else roller)(sheet.at[joint], sheet.height, joint)
    ]
    floor, floor_texts = deck_line([sheet.at[name] for name in sheet.truss.deck_joints], sheet.height, sheet.deck_below)
    bottom = min([y for line in (*supports, *floor) for _, y in line.points] + [y for _, y in sheet.at.values()])
    below, below_texts = _below(sheet, bottom - 1.6 * sheet.height)
    lines = [line for bar in sheet.truss.bars for line in _bar(sheet, bar, stretches[bar.id])]
    joints = [circle(point, 0.22 * sheet.height, "joint", "paper", name) for name, point in sheet.at.items()]
    fixed = [*floor_texts, *below_texts]
    texts = [*fixed, *_labels(sheet, stretches, fixed)]
    every = [*floor, *supports, *lines, *joints, *below]
    lower, upper = _corners(every, texts, 0.5 * sheet.height)
    title = (
        f"{sheet.look.view.title}, {sheet.look.level} level"
        if sheet.look.view.name == "rating factor"
        else sheet.look.view.title
    )
    rows = legend(sheet.look.view, list(sheet.bars.values()))
    return Picture(title, tuple(every), tuple(texts), lower, upper, sheet.height, rows)


def _stretches(sheet: _Sheet) -> dict[str, Stretch]:
    """Where each bar is drawn; bars between the same joints lie side by side."""
    drawn: dict[frozenset[str], int] = {}
    found = {}
    for bar in sheet.truss.bars:
        ends = frozenset((bar.start, bar.end))
        twin = drawn.get(ends, 0)
        drawn[ends] = twin + 1
        start, end = sheet.at[bar.start], sheet.at[bar.end]
        if twin:
            length = math.dist(start, end) or 1.0
            aside = 2.2 * sheet.height * twin / length
            dx, dy = (start[1] - end[1]) * aside, (end[0] - start[0]) * aside
            start, end = (start[0] + dx, start[1] + dy), (end[0] + dx, end[1] + dy)
        centre = sheet.middle if bar.role in _HULL else None
        found[bar.id] = upright(start, end, BAR_DEPTH * sheet.height, sheet.height, centre)
    return found


def _bar(sheet: _Sheet, bar: Bar, stretch: Stretch) -> list[Line]:
    """A bar's outline with its fill, its axis, and the marks of a bar that is gone or was not seen."""
    rated = sheet.bars[bar.id]
    band = sheet.look.view.band(rated, sheet.look.level)
    if rated.check in GONE:
        axis = Line((stretch.start, stretch.end), "axis", "medium", "dashed", of=bar.id)
        lines = [axis, *cross(_off(stretch, 0.35, 0.0), stretch.angle, sheet.height, bar.id)]
    else:
        edge = 0.5 * stretch.depth
        short = min(0.3 * sheet.height / stretch.length, 0.2) if stretch.length else 0.0
        corners = tuple(
            _off(stretch, fraction, side * edge)
            for fraction, side in ((short, 1), (1 - short, 1), (1 - short, -1), (short, -1))
        )
        lines = [
            Line(corners, "bar", band.weight, "solid", band.shade, bar.id),
            Line((stretch.start, stretch.end), "axis", "thin", band.pattern, of=bar.id),
        ]
    if rated.known == "not seen":
        lines += strokes(stretch.start, stretch.end, sheet.height, bar.id)
    return lines


def _off(stretch: Stretch, fraction: float, across: float) -> Point:
    turn = math.radians(stretch.angle)
    x = stretch.start[0] + fraction * (stretch.end[0] - stretch.start[0]) - across * math.sin(turn)
    return x, stretch.start[1] + fraction * (stretch.end[1] - stretch.start[1]) + across * math.cos(turn)


def _labels(sheet: _Sheet, stretches: Mapping[str, Stretch], fixed: list[Text]) -> tuple[Text, ...]:
    """Names of joints, then of bars, the shortest bar first because it has the least choice."""
    strokes_of = [box_along(one.start, one.end, one.depth) for one in stretches.values()]
    stands = [support_box(sheet.at[joint], sheet.height) for joint in sheet.truss.supports]
    requests = [
        around(point, sheet.look.joint(name), sheet.height, point[1] > sheet.middle[1])
        for name, point in sheet.at.items()
    ]
    order = sorted(range(len(sheet.truss.bars)), key=lambda i: (round(stretches[sheet.truss.bars[i].id].length, 6), i))
    for i in order:
        bar = sheet.truss.bars[i]
        figure = sheet.look.view.label(sheet.bars[bar.id], sheet.look.level)
        name = sheet.look.bar(bar.id) if sheet.look.bar_names else ""
        requests.append(along(stretches[bar.id], name, figure, bar.id))
    return place(requests, fixed, as_boxes([*strokes_of, *stands]))


def _below(sheet: _Sheet, level: float) -> tuple[list[Line], list[Text]]:
    """The direction arrow and the scale bar."""
    names = list(sheet.at)
    ends = [
        short_name(name, names.index(name) + 1) for name in (sheet.truss.deck_joints[0], sheet.truss.deck_joints[-1])
    ]
    left = min(x for x, _ in sheet.at.values())
    right = max(x for x, _ in sheet.at.values())
    arrow, arrow_texts = way_ahead((left, level), f"ahead: {ends[0]} to {ends[1]}", sheet.height)
    scale, scale_texts = scale_bar((right, level), right - left, sheet.look.figures, sheet.height)
    return arrow + scale, arrow_texts + scale_texts


def _corners(lines: list[Line], texts: list[Text], air: float) -> tuple[Point, Point]:
    """The box around everything that is drawn."""
    xs = [x for line in lines for x, _ in line.points]
    ys = [y for line in lines for _, y in line.points]
    for text in texts:
        turn = math.radians(text.angle)
        reach = 0.5 * text.width * abs(math.cos(turn)) + 0.5 * text.height * abs(math.sin(turn))
        rise = 0.5 * text.width * abs(math.sin(turn)) + 0.5 * text.height * abs(math.cos(turn))
        xs += [text.at[0] - reach, text.at[0] + reach]
        ys += [text.at[1] - rise, text.at[1] + rise]
    return (min(xs) - air, min(ys) - air), (max(xs) + air, max(ys) + air)
