"""The elevations: each truss with the names, panel points and rating factors of its bars."""

from __future__ import annotations

from typing import Final

from reportlab.platypus import Flowable, KeepTogether

from inspector.report.sketch import Legend, Sketch
from inspector.report.style import HEADING, NOTE, gap, part, text
from models.bridge import Footbridge
from models.picture.elevation import in_parts
from models.rating.result import Rating
from models.words import Figures

_LETTERS: Final = 6.2
"""Smallest wanted size of letters, points."""

_SIGNS: Final = (
    "Bold figures beside the bars are rating factors; bold names are panel points. Triangle on hatched ground: pin; "
    "triangle on rollers: roller. A name too long or too foreign for the drawing is given by its number in the tables "
    "(no. 12)."
)


def elevations(rating: Rating, bridge: Footbridge, figures: Figures, width: float, room: float) -> list[Flowable]:
    """One drawing of each truss, in parts where its labels need them, with the legend."""
    story: list[Flowable] = part("Elevations: rating factors")
    for name, truss in rating.trusses.items():
        pictures = in_parts(bridge.trusses[name], truss, "rating factor", rating.upper_level, figures, width / _LETTERS)
        share = (room - 60) / len(pictures) - 30
        still = "" if truss.carries else f" ({truss.verdict}: no forces)"
        for picture in pictures:
            title = text(f"Truss {name}: {picture.title}{still}", HEADING)
            story.append(KeepTogether([title, Sketch(picture, width, share), gap(4)]))
        story.append(Legend(pictures[0].legend, width))
    return [*story, text(_SIGNS, NOTE)]
