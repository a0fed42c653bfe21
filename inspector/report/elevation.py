"""The elevations: `models.elevation` turned into strokes and fills on paper."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final

from reportlab.graphics.shapes import Drawing, Group, Polygon, PolyLine, String
from reportlab.lib import colors
from reportlab.platypus import Flowable, KeepTogether

from inspector.report.fonts import BOLD, REGULAR, visible
from inspector.report.style import HEADING, NOTE, gap, part, text
from models.bridge import Footbridge
from models.elevation import in_parts
from models.picture import PALETTE, LegendRow, Line, Picture, Text
from models.rating.result import Rating
from models.words import Figures

_WEIGHTS: Final = {"thin": 0.5, "medium": 0.8, "heavy": 1.3}
_DASHES: Final[dict[str, list[float] | None]] = {
    "solid": None, "dashed": [4, 2.4], "dotted": [0.8, 1.8], "dash dot": [5, 1.6, 0.8, 1.6], "blank": None,
}  # fmt: skip
_LETTERS: Final = 6.2
"""Smallest wanted size of letters, points."""


def elevations(rating: Rating, bridge: Footbridge, figures: Figures, width: float, room: float) -> list[Flowable]:
    """One drawing of each truss, in parts where its labels need them, with the legend."""
    story: list[Flowable] = part("Elevations: rating factors")
    for name, truss in rating.trusses.items():
        pictures = in_parts(bridge.trusses[name], truss, "rating factor", rating.upper_level, figures, width / _LETTERS)
        share = (room - 60) / len(pictures) - 30
        still = "" if truss.carries else f" ({truss.verdict}: no forces)"
        for picture in pictures:
            block = [text(f"Truss {name}: {picture.title}{still}", HEADING), drawing(picture, width, share), gap(4)]
            story.append(KeepTogether(block))
        story.append(_legend(pictures[0].legend, width))
    return [*story, text(_SIGNS, NOTE)]


_SIGNS: Final = (
    "Bold upright figures beside the bars are rating factors; names of panel points are bold. Triangle on hatched "
    "ground: pin; triangle on rollers: roller. A name too long or too foreign for the drawing is given by its number "
    "in the tables (no. 12)."
)


def drawing(picture: Picture, width: float, room: float) -> Any:
    """A picture scaled into a width and a height, points."""
    scale = min(width / picture.width, room / picture.rise)
    sheet = Drawing(width, picture.rise * scale)
    group = Group()
    for line in picture.lines:
        _stroke(group, line, scale, picture.lower)
    for words in picture.texts:
        _letter(group, words, scale, picture.lower)
    sheet.add(group)
    return sheet


def _stroke(group: Any, line: Line, scale: float, origin: tuple[float, float]) -> None:
    points = [value for x, y in line.points for value in ((x - origin[0]) * scale, (y - origin[1]) * scale)]
    style = {
        "strokeColor": colors.black,
        "strokeWidth": _WEIGHTS[line.weight],
        "strokeDashArray": _DASHES[line.pattern],
    }
    if line.shade:
        red, green, blue = PALETTE[line.shade]
        group.add(Polygon(points, fillColor=colors.Color(red / 255, green / 255, blue / 255), **style))
    elif line.pattern != "blank":
        group.add(PolyLine(points, fillColor=None, **style))


def _letter(group: Any, words: Text, scale: float, origin: tuple[float, float]) -> None:
    size = words.height * scale
    turned = Group()
    turned.translate((words.at[0] - origin[0]) * scale, (words.at[1] - origin[1]) * scale)
    turned.rotate(words.angle)
    face = BOLD if words.bold else REGULAR
    turned.add(String(0, -0.36 * size, visible(words.text), fontName=face, fontSize=size, textAnchor="middle"))
    group.add(turned)


def _legend(rows: Sequence[LegendRow], width: float) -> Any:
    """Samples and their meanings in a row, wrapped where the width ends."""
    size, tall = 7.0, 13.0
    places: list[tuple[float, int]] = []
    x, level = 0.0, 0
    for row in rows:
        needed = 4 * size + 6 + 0.7 * size * len(row.text) + 14
        if x and x + needed > width:
            x, level = 0.0, level + 1
        places.append((x, level))
        x += needed
    sheet = Drawing(width, tall * (level + 1))
    for row, (left, line_number) in zip(rows, places, strict=True):
        group = Group()
        group.translate(left, tall * (level - line_number) + 3)
        for line in row.lines:
            _stroke(group, line, size, (0.0, 0.0))
        group.add(String(4 * size + 5, 1, visible(row.text), fontName=REGULAR, fontSize=size))
        sheet.add(group)
    return sheet
