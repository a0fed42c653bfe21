"""Angles: one alone, and two back to back."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from models.bridge import Section
from models.errors import Problem
from models.section.plate import OUTSTAND, Free, Plate, level, upright
from models.section.shape import Key, Shape, curve, length, pair, quantity

LEG_LIMIT: Final = 0.45
"""Legs of single angles and of double angles held apart by packs, in axial compression: AISC 360 Table B4.1a
case 3; AASHTO LRFD 6.9.4.2.1 (from memory). Legs in unbroken contact would be allowed 0.56; not taken."""

_KEYS: Final = (
    Key("legs", "pair of lengths", "overall length of the vertical leg (in the plane of the truss) and of the other"),
    Key("thickness", "length", "thickness of both legs"),
)


def _angle(section: Section, heel: float, outward: int, prefix: str) -> tuple[Plate, Plate]:
    """An angle whose vertical leg stands at x = heel and whose other leg points outward (1 right, -1 left)."""
    vertical, horizontal = (leg.si for leg in pair(section, "legs"))
    thickness = length(section, "thickness")
    flat = horizontal - thickness
    return (
        upright(
            f"{prefix}vertical leg",
            vertical,
            thickness,
            heel + outward * thickness / 2,
            vertical / 2,
            Free(vertical, LEG_LIMIT, OUTSTAND),
        ),
        level(
            f"{prefix}horizontal leg",
            flat,
            thickness,
            heel + outward * (thickness + flat / 2),
            thickness / 2,
            Free(horizontal, LEG_LIMIT, OUTSTAND),
        ),
    )


def _single(section: Section) -> tuple[Plate, ...]:
    """The heel at the origin, the legs upwards and to the right."""
    return _angle(section, 0.0, 1, "")


def _double(section: Section) -> tuple[Plate, ...]:
    """Vertical legs back to back with the gap between them, the other legs outward at the bottom."""
    half_gap = length(section, "gap") / 2
    return (*_angle(section, -half_gap, -1, "left "), *_angle(section, half_gap, 1, "right "))


def _too_thick(section: Section) -> Iterator[Problem]:
    thickness = quantity(section, "thickness")
    shorter = min(pair(section, "legs"), key=lambda leg: leg.si)
    if thickness.si >= shorter.si:
        yield Problem(
            "thickness",
            f"legs {thickness.text} thick are too thick for a leg of {shorter.text}",
            "less than the shorter leg",
        )


ANGLE: Final = Shape("angle", _KEYS, ("vertical leg", "horizontal leg"), _single, curve("b"), _too_thick)
DOUBLE_ANGLE: Final = Shape(
    "double angle",
    (*_KEYS, Key("gap", "length", "clear distance between the vertical legs, back to back", may_be_zero=True)),
    ("left vertical leg", "left horizontal leg", "right vertical leg", "right horizontal leg"),
    _double,
    curve("b"),
    _too_thick,
)
