"""Channel, I section and tee: flanges run the full width, the web lies between them."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from models.bridge import Section
from models.errors import Problem
from models.section.plate import HELD, OUTSTAND, Free, Plate, level, upright
from models.section.shape import Curves, Key, Option, Shape, curve, length, quantity

FLANGE_LIMIT: Final = 0.56
"""Flanges of rolled I sections, channels and tees: AISC 360 Table B4.1a case 1; AASHTO LRFD 6.9.4.2.1
(from memory)."""
WELDED_FLANGE_LIMIT: Final = 0.64
"""Flanges welded to a web, times sqrt(kc): the same table, case 2."""
STEM_LIMIT: Final = 0.75
"""Stems of tees: the same table, case 4."""
WEB_LIMIT: Final = 1.49
"""Webs held along both edges: the same table, case 5."""

TALL: Final = 1.2
"""Depth over width above which rolled I sections buckle by better curves: EN 1993-1-1, Table 6.2 (from memory)."""
THICK: Final = 0.040
"""Thickness of flanges above which curves are worse, m: the same table."""
VERY_THICK: Final = 0.100
"""The same for rolled I sections that are not tall, m."""

_KEYS: Final = (
    Key("depth", "length", "overall depth, in the plane of the truss"),
    Key("flange width", "length", "overall width of a flange"),
    Key("web thickness", "length", "thickness of the web"),
    Key("flange thickness", "length", "thickness of a flange"),
)
_ROLLED: Final = Option("rolled", (), default=False, about="rolled in one piece, rather than welded of plates")


def _two_flanges(section: Section, web_x: float, flange_x: float, free: Free) -> tuple[Plate, ...]:
    """The origin lies at half depth."""
    depth, width = length(section, "depth"), length(section, "flange width")
    web, flange = length(section, "web thickness"), length(section, "flange thickness")
    clear = depth - 2 * flange
    arm = (depth - flange) / 2
    return (
        upright("web", clear, web, web_x, 0.0, Free(clear, WEB_LIMIT, HELD)),
        level("top flange", width, flange, flange_x, arm, free),
        level("bottom flange", width, flange, flange_x, -arm, free),
    )


def _channel(section: Section) -> tuple[Plate, ...]:
    """The back of the web at x = 0, the flanges to the right."""
    width = length(section, "flange width")
    free = Free(width, FLANGE_LIMIT, OUTSTAND)
    return _two_flanges(section, length(section, "web thickness") / 2, width / 2, free)


def _i_section(section: Section) -> tuple[Plate, ...]:
    half = length(section, "flange width") / 2
    limit, web = (FLANGE_LIMIT, None) if section.rolled else (WELDED_FLANGE_LIMIT, "web")
    return _two_flanges(section, 0.0, 0.0, Free(half, limit, OUTSTAND, count=2, web=web))


def _i_curves(section: Section) -> Curves:
    """EN 1993-1-1, Table 6.2 (from memory), steels up to S420: rolled, by depth over width; welded; thick flanges."""
    tall = length(section, "depth") > TALL * length(section, "flange width")
    flange = length(section, "flange thickness")
    if not section.rolled:
        return ("b", "c") if flange <= THICK else ("c", "d")
    if tall:
        return ("a", "b") if flange <= THICK else ("b", "c")
    return ("b", "c") if flange <= VERY_THICK else ("d", "d")


def _tee(section: Section) -> tuple[Plate, ...]:
    """The flange on top, the foot of the web at y = 0."""
    depth, width = length(section, "depth"), length(section, "flange width")
    web, flange = length(section, "web thickness"), length(section, "flange thickness")
    return (
        level("flange", width, flange, 0.0, depth - flange / 2, Free(width / 2, FLANGE_LIMIT, OUTSTAND, count=2)),
        upright("web", depth - flange, web, 0.0, (depth - flange) / 2, Free(depth, STEM_LIMIT, OUTSTAND)),
    )


def _too_thick(section: Section, flanges: int) -> Iterator[Problem]:
    depth, width = quantity(section, "depth"), quantity(section, "flange width")
    web, flange = quantity(section, "web thickness"), quantity(section, "flange thickness")
    if flanges * flange.si >= depth.si:
        yield Problem(
            "flange thickness",
            f"{'two flanges' if flanges == 2 else 'a flange'} of {flange.text} leave no web in a depth of {depth.text}",
            "thinner flanges or a greater depth",
        )
    if web.si >= width.si:
        yield Problem(
            "web thickness",
            f"a web of {web.text} is too thick for a flange of {width.text}",
            "less than the flange width",
        )


def _too_thick_two(section: Section) -> Iterator[Problem]:
    return _too_thick(section, 2)


def _too_thick_one(section: Section) -> Iterator[Problem]:
    return _too_thick(section, 1)


CHANNEL: Final = Shape("channel", _KEYS, ("web", "top flange", "bottom flange"), _channel, curve("c"), _too_thick_two)
I_SECTION: Final = Shape(
    "i section", _KEYS, ("web", "top flange", "bottom flange"), _i_section, _i_curves, _too_thick_two, (_ROLLED,)
)
TEE: Final = Shape("tee", _KEYS, ("flange", "web"), _tee, curve("c"), _too_thick_one)
