"""Rectangular and round tubes."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from models.bridge import Section
from models.errors import Problem
from models.section.plate import HELD, RING, TUBE_WALL, Free, Plate, level, upright
from models.section.shape import Curves, Key, Option, Shape, length, quantity

WALL_LIMIT: Final = 1.40
"""Walls of rectangular tubes: AISC 360 Table B4.1a case 6; AASHTO LRFD 6.9.4.2.1 (from memory). The breadth
counted is the one between sharp inner corners, which is more than the flat part."""
WELDED_WALL_LIMIT: Final = 1.49
"""Walls of boxes welded of plates: the same table, case 8."""

_FORMED: Final = Option("formed", ("hot", "cold", "welded"), "cold", "how the tube was made")


def _rectangular(section: Section) -> tuple[Plate, ...]:
    """The origin at the centre; top and bottom walls run the full width, side walls between them."""
    depth, width, wall = length(section, "depth"), length(section, "width"), length(section, "thickness")
    limit, imperfection = (WELDED_WALL_LIMIT, HELD) if section.formed == "welded" else (WALL_LIMIT, TUBE_WALL)
    clear = depth - 2 * wall
    across, up = Free(width - 2 * wall, limit, imperfection), Free(clear, limit, imperfection)
    arm, side = (depth - wall) / 2, (width - wall) / 2
    return (
        level("top wall", width, wall, 0.0, arm, across),
        level("bottom wall", width, wall, 0.0, -arm, across),
        upright("left wall", clear, wall, -side, 0.0, up),
        upright("right wall", clear, wall, side, 0.0, up),
    )


def _round(section: Section) -> tuple[Plate, ...]:
    diameter, wall = length(section, "diameter"), length(section, "thickness")
    return (Plate("wall", RING, diameter - wall, wall, 0.0, 0.0),)


def _curves(section: Section) -> Curves:
    """Hot finished a, cold formed c: EN 1993-1-1, Table 6.2 (from memory)."""
    name = "a" if section.formed == "hot" else "c"
    return name, name


def _box_curves(section: Section) -> Curves:
    """A box welded of plates b: the same table."""
    return ("b", "b") if section.formed == "welded" else _curves(section)


def _rectangular_too_thick(section: Section) -> Iterator[Problem]:
    wall = quantity(section, "thickness")
    smaller = min(quantity(section, "depth"), quantity(section, "width"), key=lambda side: side.si)
    yield from _walls(wall.si, wall.text, smaller.si, smaller.text)


def _round_too_thick(section: Section) -> Iterator[Problem]:
    wall, diameter = quantity(section, "thickness"), quantity(section, "diameter")
    yield from _walls(wall.si, wall.text, diameter.si, diameter.text)


def _walls(wall: float, wall_text: str, size: float, size_text: str) -> Iterator[Problem]:
    if 2 * wall >= size:
        yield Problem(
            "thickness", f"two walls of {wall_text} leave no room inside {size_text}", f"less than half of {size_text}"
        )


RECTANGULAR_TUBE: Final = Shape(
    "rectangular tube",
    (
        Key("depth", "length", "overall depth, in the plane of the truss"),
        Key("width", "length", "overall width, across the bridge"),
        Key("thickness", "length", "thickness of the walls"),
    ),
    ("top wall", "bottom wall", "left wall", "right wall"),
    _rectangular,
    _box_curves,
    _rectangular_too_thick,
    (_FORMED,),
)
ROUND_TUBE: Final = Shape(
    "round tube",
    (Key("diameter", "length", "outside diameter"), Key("thickness", "length", "thickness of the wall")),
    ("wall",),
    _round,
    _curves,
    _round_too_thick,
    (_FORMED,),
)
