"""A picture on paper: strokes, fills and turned texts put straight onto the page."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final

from reportlab.lib.colors import Color, black
from reportlab.platypus import Flowable

from inspector.report.fonts import BOLD, REGULAR, visible
from models.picture import PALETTE, LegendRow, Line, Picture, Point, Text

_WEIGHTS: Final = {"thin": 0.5, "medium": 0.8, "heavy": 1.3}
_DASHES: Final[dict[str, list[float]]] = {
    "solid": [], "dashed": [4, 2.4], "dotted": [0.8, 1.8], "dash dot": [5, 1.6, 0.8, 1.6],
}  # fmt: skip
_CENTRE: Final = 0.36
"""From the middle of a capital to the line it stands on, in text heights."""


class Sketch(Flowable):  # type: ignore[misc]  # reportlab has no type hints
    """A picture scaled into a width and a height, points."""

    def __init__(self, picture: Picture, width: float, room: float) -> None:
        super().__init__()
        self._picture = picture
        self._scale = min(width / picture.width, room / picture.rise)
        self.width, self.height = width, picture.rise * self._scale

    def draw(self) -> None:
        """Put it on the page."""
        for line in self._picture.lines:
            stroke(self.canv, line, self._scale, self._picture.lower)
        for words in self._picture.texts:
            _letter(self.canv, words, self._scale, self._picture.lower)


def stroke(canvas: Any, line: Line, scale: float, origin: Point) -> None:
    """One line, closed and filled where it has a shade."""
    if line.pattern == "blank":
        return
    points = [((x - origin[0]) * scale, (y - origin[1]) * scale) for x, y in line.points]
    path = canvas.beginPath()
    path.moveTo(*points[0])
    for point in points[1:]:
        path.lineTo(*point)
    canvas.setStrokeColor(black)
    canvas.setLineWidth(_WEIGHTS[line.weight])
    canvas.setDash(_DASHES[line.pattern])
    if line.shade:
        path.close()
        red, green, blue = PALETTE[line.shade]
        canvas.setFillColor(Color(red / 255, green / 255, blue / 255))
    canvas.drawPath(path, stroke=1, fill=int(line.shade is not None))


def _letter(canvas: Any, words: Text, scale: float, origin: Point) -> None:
    size = words.height * scale
    canvas.saveState()
    canvas.translate((words.at[0] - origin[0]) * scale, (words.at[1] - origin[1]) * scale)
    canvas.rotate(words.angle)
    canvas.setFillColor(black)
    canvas.setFont(BOLD if words.bold else REGULAR, size)
    canvas.drawCentredString(0, -_CENTRE * size, visible(words.text))
    canvas.restoreState()


class Legend(Flowable):  # type: ignore[misc]  # reportlab has no type hints
    """Samples with their meanings in a row, wrapped where the width ends."""

    _SIZE: Final = 7.0
    _TALL: Final = 13.0

    def __init__(self, rows: Sequence[LegendRow], width: float) -> None:
        super().__init__()
        self._rows = rows
        self._places: list[tuple[float, int]] = []
        x, level = 0.0, 0
        for row in rows:
            needed = 4 * self._SIZE + 0.7 * self._SIZE * len(row.text) + 20
            if x and x + needed > width:
                x, level = 0.0, level + 1
            self._places.append((x, level))
            x += needed
        self.width, self.height = width, self._TALL * (level + 1)

    def draw(self) -> None:
        """Put it on the page."""
        for row, (left, level) in zip(self._rows, self._places, strict=True):
            self.canv.saveState()
            self.canv.translate(left, self.height - self._TALL * (level + 1) + 3)
            for line in row.lines:
                stroke(self.canv, line, self._SIZE, (0.0, 0.0))
            self.canv.setFillColor(black)
            self.canv.setFont(REGULAR, self._SIZE)
            self.canv.drawString(4 * self._SIZE + 5, 1, visible(row.text))
            self.canv.restoreState()
