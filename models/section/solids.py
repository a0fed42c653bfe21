"""Round bars and flat bars."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from models.bridge import Section
from models.errors import Problem
from models.section.plate import DISC, Plate, upright
from models.section.shape import Key, Shape, curve, length, quantity


def _round(section: Section) -> tuple[Plate, ...]:
    return (Plate("bar", DISC, 0.0, length(section, "diameter"), 0.0, 0.0),)


def _flat(section: Section) -> tuple[Plate, ...]:
    """Its width stands in the plane of the truss."""
    return (upright("plate", length(section, "width"), length(section, "thickness"), 0.0, 0.0),)


def _thicker_than_wide(section: Section) -> Iterator[Problem]:
    thickness, width = quantity(section, "thickness"), quantity(section, "width")
    if thickness.si > width.si:
        yield Problem(
            "thickness",
            f"a plate {thickness.text} thick is thicker than its width of {width.text}",
            "at most the width (a bar that lies flat has `turned` 90)",
        )


ROUND_BAR: Final = Shape("round bar", (Key("diameter", "length", "diameter"),), ("bar",), _round, curve("c"))
FLAT_BAR: Final = Shape(
    "flat bar",
    (Key("width", "length", "width, in the plane of the truss"), Key("thickness", "length", "thickness")),
    ("plate",),
    _flat,
    curve("c"),
    _thicker_than_wide,
)
