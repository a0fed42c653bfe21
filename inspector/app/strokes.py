"""Strokes of a drawing as triangles: widths, dashes and fills in plain numbers. No screen in here."""

from __future__ import annotations

import itertools
import math
from collections.abc import Iterable, Iterator, Mapping, Sequence
from typing import Final

from models.picture import Line, Pattern, Point, Weight

WIDTHS: Final[Mapping[Weight, float]] = {"thin": 1.0, "medium": 1.7, "heavy": 2.8}
"""Width of strokes, dp."""

DASHES: Final[Mapping[Pattern, tuple[float, ...]]] = {
    "solid": (), "dashed": (8.0, 5.0), "dotted": (2.0, 4.0), "dash dot": (10.0, 4.0, 2.0, 4.0),
}  # fmt: skip
"""Lengths of strokes and gaps, dp."""


def strokes(line: Line, dp: float) -> list[float]:
    """The triangles (x, y of each corner, one after the other) that draw a line's stroke.

    Parameters
    ----------
    line : its points in pixels; closed where it has a shade.
    dp : pixels in a density-independent pixel.
    """
    if line.pattern == "blank" and line.shade is None:
        return []
    points = [*line.points, line.points[0]] if line.shade is not None else list(line.points)
    half = WIDTHS[line.weight] * dp / 2
    lengths = [length * dp for length in DASHES.get(line.pattern, ())]
    pieces: Iterable[tuple[Point, Point]] = itertools.pairwise(points)
    if lengths:
        pieces = dashes(points, lengths)
    corners: list[float] = []
    for start, end in pieces:
        corners += _stroke(start, end, half, 0.0 if lengths else half)
    return corners


def dashes(points: Sequence[Point], lengths: Sequence[float]) -> Iterator[tuple[Point, Point]]:
    """The drawn pieces of a dashed line; ``lengths`` of strokes and gaps in turn."""
    place, left, drawn = 0, lengths[0], True
    for start, end in itertools.pairwise(points):
        length, gone = math.dist(start, end), 0.0
        while length - gone > 1e-9:
            step = min(left, length - gone)
            if drawn:
                yield _between(start, end, gone / length), _between(start, end, (gone + step) / length)
            gone, left = gone + step, left - step
            if left <= 1e-9:
                place, drawn = (place + 1) % len(lengths), not drawn
                left = lengths[place]


def fan(points: Sequence[Point]) -> list[float]:
    """The triangles that fill a convex outline."""
    corners: list[float] = []
    for one, other in itertools.pairwise(points):
        corners += [*points[0], *one, *other]
    return corners


def distance(point: Point, start: Point, end: Point) -> float:
    """How far a point lies from a straight piece."""
    along_x, along_y = end[0] - start[0], end[1] - start[1]
    square = along_x**2 + along_y**2
    if not square:
        return math.dist(point, start)
    part = ((point[0] - start[0]) * along_x + (point[1] - start[1]) * along_y) / square
    return math.dist(point, _between(start, end, min(max(part, 0.0), 1.0)))


def touched(
    point: Point, pieces: Mapping[str, Sequence[tuple[Point, Point]]], reach: float, chosen: str | None = None
) -> str | None:
    """Which of several things a finger means: the nearest within reach.

    Where the nearest is chosen already, the next one that is almost as near: a second tap on a crossing takes
    the other bar.

    Parameters
    ----------
    pieces : the straight pieces that each thing is drawn with, pixels.
    reach : how far from its axis a thing can be touched, pixels.
    chosen : what is chosen now.
    """
    far = {name: min(distance(point, *piece) for piece in of) for name, of in pieces.items() if of}
    near = sorted((away, name) for name, away in far.items() if away <= reach)
    if not near:
        return None
    rivals = [name for away, name in near if away <= near[0][0] + reach / 2]
    if chosen in rivals and len(rivals) > 1:
        return rivals[(rivals.index(chosen) + 1) % len(rivals)]
    return near[0][1]


def _between(start: Point, end: Point, part: float) -> Point:
    return start[0] + part * (end[0] - start[0]), start[1] + part * (end[1] - start[1])


def _stroke(start: Point, end: Point, half: float, beyond: float) -> list[float]:
    """A straight stroke as two triangles, its ends drawn out so that corners close."""
    length = math.dist(start, end)
    if not length:
        return []
    along_x, along_y = (end[0] - start[0]) / length, (end[1] - start[1]) / length
    across_x, across_y = -along_y * half, along_x * half
    x0, y0 = start[0] - along_x * beyond, start[1] - along_y * beyond
    x1, y1 = end[0] + along_x * beyond, end[1] + along_y * beyond
    left, right = (x0 + across_x, y0 + across_y), (x0 - across_x, y0 - across_y)
    far_left, far_right = (x1 + across_x, y1 + across_y), (x1 - across_x, y1 - across_y)
    return [*left, *right, *far_right, *left, *far_right, *far_left]
