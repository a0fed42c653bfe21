"""Placing labels on a drawing so that each can be read."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

import numpy as np

from models.picture.drawing import Boxes, Point, Text, as_boxes, box_of, meet

LONGEST: Final = 14
_LAST_PLAIN: Final = 0x052F


def short_name(name: str, number: int) -> str:
    """A name that fits beside a bar: itself, or its place in the table where it is long or foreign.

    Latin, Greek and Cyrillic letters are drawn; other scripts may lack a glyph or run the other way.
    """
    plain = name.isprintable() and all(ord(sign) <= _LAST_PLAIN for sign in name)
    return name if plain and 0 < len(name.strip()) <= LONGEST else f"no. {number}"


@dataclass(frozen=True, slots=True)
class Candidate:
    """One way to place the texts of a label, and how little it is liked (0 best)."""

    texts: tuple[Text, ...]
    dislike: float


_TEXT_HIT: Final = 100.0
_BAR_HIT: Final = 30.0
_AIR: Final = 0.06


def place(requests: Sequence[Sequence[Candidate]], fixed: Sequence[Text], obstacles: Boxes) -> tuple[Text, ...]:
    """Choose one candidate for each request, in the order given.

    A candidate costs most where it covers a text that is already placed, less where an obstacle (a bar,
    a support) runs through it, and least for being further from where one would look for it.
    """
    placed = as_boxes(box_of(text, _AIR) for text in fixed)
    chosen: list[Text] = []
    for request in requests:
        boxes = [as_boxes(box_of(text, _AIR) for text in candidate.texts) for candidate in request]
        stacked = np.concatenate(boxes)
        owner = np.repeat(np.arange(len(request)), [len(box) for box in boxes])
        costs = _TEXT_HIT * meet(stacked, placed).sum(axis=1) + _BAR_HIT * meet(stacked, obstacles).sum(axis=1)
        cost = np.bincount(owner, costs, len(request)) + np.array([candidate.dislike for candidate in request])
        best = int(np.argmin(cost))
        chosen += request[best].texts
        placed = np.concatenate([placed, boxes[best]])
    return tuple(chosen)


_FRACTIONS: Final = (0.5, 0.38, 0.62, 0.3, 0.7, 0.22, 0.78)


@dataclass(frozen=True, slots=True)
class Stretch:
    """Where a bar is drawn. ``outward`` is +1 where the free side is to the left of start -> end."""

    start: Point
    end: Point
    depth: float
    height: float
    outward: int

    @property
    def length(self) -> float:
        """Drawn length, m."""
        return math.dist(self.start, self.end)

    @property
    def angle(self) -> float:
        """Angle of a text along the bar, degrees, so that it is never upside down."""
        return math.degrees(math.atan2(self.end[1] - self.start[1], self.end[0] - self.start[0]))

    def beside(self, fraction: float, row: float, shift: float = 0.0) -> Point:
        """A point beside the bar: rows of text count from it to the left, negative to the right."""
        turn = math.radians(self.angle)
        across = math.copysign(self.depth / 2 + (abs(row) - 0.5) * 1.05 * self.height + 0.2 * self.height, row)
        x = self.start[0] + fraction * (self.end[0] - self.start[0]) + shift * math.cos(turn) - across * math.sin(turn)
        y = self.start[1] + fraction * (self.end[1] - self.start[1]) + shift * math.sin(turn) + across * math.cos(turn)
        return x, y


def upright(start: Point, end: Point, depth: float, height: float, centre: Point | None) -> Stretch:
    """A bar ready for labels: turned so that text runs left to right, or upward on a vertical.

    ``centre`` is a point on the side that labels rather keep away from; None where either side will do.
    """
    level = 1e-9 * math.dist(start, end)
    if end[0] - start[0] < -level or (end[0] - start[0] <= level and end[1] < start[1]):
        start, end = end, start
    if centre is None:
        return Stretch(start, end, depth, height, 1)
    turn = (end[0] - start[0]) * (centre[1] - start[1]) - (end[1] - start[1]) * (centre[0] - start[0])
    return Stretch(start, end, depth, height, -1 if turn > 0 else 1)


def along(stretch: Stretch, name: str, figure: str, of: str) -> list[Candidate]:
    """The ways to write a bar's name and its figure beside it; the figure alone where there is no name."""
    found: list[Candidate] = []
    for fraction in _FRACTIONS:
        far = 4 * abs(fraction - 0.5)
        for side in (stretch.outward, -stretch.outward):
            other = 0.0 if side == stretch.outward else 1.0
            if not name:
                found.append(_alone(stretch, figure, of, fraction, side, far + other))
                continue
            found += [
                _in_line(stretch, name, figure, of, fraction, side, far + other),
                _pair(stretch, name, figure, of, fraction, (side, -side), far + other + 1),
                _pair(stretch, name, figure, of, fraction, (2 * side, side), far + other + 2),
            ]
    return found


def _texts(stretch: Stretch, name: str, figure: str, of: str, places: tuple[Point, Point]) -> tuple[Text, Text]:
    return (
        Text(name, places[0], stretch.height, "bar name", stretch.angle, of=of),
        Text(figure, places[1], stretch.height, "bar figure", stretch.angle, bold=True, of=of),
    )


def _overhang(stretch: Stretch, fraction: float, width: float) -> float:
    """Dislike of a label that reaches beyond its bar's end."""
    room = 2 * min(fraction, 1 - fraction) * stretch.length
    return 20 * max(0.0, width - 0.95 * room) / stretch.height


def _alone(stretch: Stretch, figure: str, of: str, fraction: float, side: int, dislike: float) -> Candidate:
    text = Text(figure, stretch.beside(fraction, side), stretch.height, "bar figure", stretch.angle, bold=True, of=of)
    return Candidate((text,), dislike + _overhang(stretch, fraction, text.width))


def _in_line(
    stretch: Stretch, name: str, figure: str, of: str, fraction: float, side: int, dislike: float
) -> Candidate:
    first, second = _texts(stretch, name, figure, of, ((0.0, 0.0), (0.0, 0.0)))
    gap = 0.6 * stretch.height
    whole = first.width + gap + second.width
    places = (
        stretch.beside(fraction, side, (first.width - whole) / 2),
        stretch.beside(fraction, side, (whole - second.width) / 2),
    )
    return Candidate(_texts(stretch, name, figure, of, places), dislike + _overhang(stretch, fraction, whole))


def _pair(
    stretch: Stretch, name: str, figure: str, of: str, fraction: float, rows: tuple[int, int], dislike: float
) -> Candidate:
    places = stretch.beside(fraction, rows[0]), stretch.beside(fraction, rows[1])
    texts = _texts(stretch, name, figure, of, places)
    return Candidate(texts, dislike + _overhang(stretch, fraction, max(text.width for text in texts)))


_AROUND: Final = ((0, 1), (1, 1), (-1, 1), (1, 0), (-1, 0), (0, -1), (1, -1), (-1, -1))


def around(point: Point, name: str, height: float, upward: bool) -> list[Candidate]:
    """The ways to write a joint's name beside it."""
    found = []
    for distance in (1.0, 1.6, 2.4):
        for rank, (right, up) in enumerate(_AROUND):
            blank = Text(name, point, height, "joint name", bold=True, of=name)
            rise = up if upward else -up
            at = (
                point[0] + right * (blank.width / 2 + 0.5 * distance * height),
                point[1] + rise * distance * height * (1.0 if right == 0 else 0.8),
            )
            found.append(Candidate((Text(name, at, height, "joint name", bold=True, of=name),), rank + 6 * distance))
    return found
