"""A drawing as values: lines and texts in model coordinates, without a library's colours.

The screen, the PDF and an SVG file draw the same picture: a drawer scales metres to its own units and
turns the names of weights, patterns and shades into strokes and fills. Nothing is told by a shade
alone; a shade only fills a dark outline whose pattern says the same.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from functools import lru_cache
from types import MappingProxyType
from typing import Final, Literal

import numpy as np
from numpy.typing import NDArray

Point = tuple[float, float]
Weight = Literal["thin", "medium", "heavy"]
Pattern = Literal["solid", "dashed", "dotted", "dash dot", "blank"]
Shade = Literal["paper", "ink", "vermillion", "orange", "yellow", "sky blue", "grey"]

PALETTE: Final[Mapping[Shade, tuple[int, int, int]]] = MappingProxyType(
    {
        "paper": (255, 255, 255),
        "ink": (0, 0, 0),
        "vermillion": (213, 94, 0),
        "orange": (230, 159, 0),
        "yellow": (240, 228, 66),
        "sky blue": (86, 180, 233),
        "grey": (200, 200, 200),
    }
)
"""Red, green and blue of a fill, 0 to 255: the colours of Okabe and Ito (2008), which people with any
kind of colour vision tell apart, with paper, ink and a light grey."""


@dataclass(frozen=True, slots=True)
class Line:
    """A line through points, m; a closed outline with a fill where it has a shade.

    Parameters
    ----------
    role : what it stands for (``bar``, ``support``, ``deck`` ...).
    of : the bar or joint that it belongs to.
    """

    points: tuple[Point, ...]
    role: str
    weight: Weight = "thin"
    pattern: Pattern = "solid"
    shade: Shade | None = None
    of: str = ""


@dataclass(frozen=True, slots=True)
class Text:
    """A short text centred on a point, m. ``angle`` in degrees from level, anticlockwise.

    ``height`` is the size of the letters (the em of the font), m.
    """

    text: str
    at: Point
    height: float
    role: str
    angle: float = 0.0
    bold: bool = False
    of: str = ""

    @property
    def width(self) -> float:
        """Length of the text, m, estimated on the long side."""
        return self.height * text_width(self.text)


@dataclass(frozen=True, slots=True)
class LegendRow:
    """A sample of lines in a box 4 wide and 1 high (text heights), and what they mean."""

    lines: tuple[Line, ...]
    text: str


@dataclass(frozen=True)
class Picture:
    """A drawing: its lines below its texts, the corners of its box, m, and its legend."""

    title: str
    lines: tuple[Line, ...]
    texts: tuple[Text, ...]
    lower: Point
    upper: Point
    height: float
    legend: tuple[LegendRow, ...] = ()

    @property
    def width(self) -> float:
        """Breadth of the whole drawing, m."""
        return self.upper[0] - self.lower[0]

    @property
    def rise(self) -> float:
        """Height of the whole drawing, m."""
        return self.upper[1] - self.lower[1]


_NARROW: Final = frozenset("ijlIft.,:;'|!()[]/- r")
_WIDE: Final = frozenset("mwMW@%+=<>≥≤×—")


@lru_cache(maxsize=4096)
def text_width(text: str) -> float:
    """Length of a text in text heights, never short of a bold sans-serif face such as DejaVu Sans."""
    return sum(0.5 if sign in _NARROW else 1.11 if sign in _WIDE else 0.86 if sign.isupper() else 0.72 for sign in text)


LETTER_HEIGHT: Final = 0.9
"""Height of a text's box, in text heights: capitals and descenders."""

Boxes = NDArray[np.float64]
"""(n, 6): centre x, centre y, half length, half height, cosine and sine of the angle."""


def box_of(text: Text, clear: float = 0.0) -> tuple[float, float, float, float, float, float]:
    """The turned rectangle that a text covers, with ``clear`` (text heights) of air around it."""
    air = clear * text.height
    turn = np.deg2rad(text.angle)
    half_height = 0.5 * LETTER_HEIGHT * text.height + air
    return (*text.at, 0.5 * text.width + air, half_height, float(np.cos(turn)), float(np.sin(turn)))


def box_along(start: Point, end: Point, thickness: float) -> tuple[float, float, float, float, float, float]:
    """The rectangle that a straight stroke covers."""
    dx, dy = end[0] - start[0], end[1] - start[1]
    length = float(np.hypot(dx, dy))
    cosine, sine = (dx / length, dy / length) if length else (1.0, 0.0)
    return ((start[0] + end[0]) / 2, (start[1] + end[1]) / 2, length / 2, thickness / 2, cosine, sine)


def as_boxes(rows: Iterable[Sequence[float]]) -> Boxes:
    """Rectangles as one array, also where there is none."""
    return np.array([tuple(row) for row in rows], dtype=float).reshape(-1, 6)


def meet(first: Boxes, second: Boxes) -> NDArray[np.bool_]:
    """Whether rectangles overlap, (n, m).

    Two convex figures are apart where their shadows on some axis are apart; for rectangles the four
    directions of their sides are enough.
    """
    a, b = first[:, None, :], second[None, :, :]
    dx, dy = b[..., 0] - a[..., 0], b[..., 1] - a[..., 1]
    cosine = np.abs(a[..., 4] * b[..., 4] + a[..., 5] * b[..., 5])
    sine = np.abs(a[..., 4] * b[..., 5] - a[..., 5] * b[..., 4])
    apart = np.zeros(dx.shape, dtype=bool)
    for one, other in ((a, b), (b, a)):
        along = np.abs(dx * one[..., 4] + dy * one[..., 5])
        across = np.abs(-dx * one[..., 5] + dy * one[..., 4])
        apart |= along >= one[..., 2] + other[..., 2] * cosine + other[..., 3] * sine
        apart |= across >= one[..., 3] + other[..., 2] * sine + other[..., 3] * cosine
    return ~apart


def overlaps(picture: Picture) -> list[tuple[str, str]]:
    """Pairs of texts that cover each other, and of texts that a bar's axis runs through.

    Empty where every label of the picture can be read.
    """
    texts = picture.texts
    boxes = as_boxes(box_of(text) for text in texts)
    together = np.triu(meet(boxes, boxes), 1)
    found = [(texts[i].text, texts[j].text) for i, j in np.argwhere(together)]
    axes = [line for line in picture.lines if line.role == "axis"]
    crossed = meet(boxes, as_boxes(box_along(line.points[0], line.points[-1], 0.0) for line in axes))
    return found + [(texts[i].text, f"bar {axes[j].of}") for i, j in np.argwhere(crossed)]
