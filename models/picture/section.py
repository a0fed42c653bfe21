"""A section as a picture: its plates as they lie in the truss, each with its number."""

from __future__ import annotations

import math
from collections.abc import Collection
from typing import Final

from models.picture.drawing import Line, Picture, Point, Shade, Text, Weight
from models.section import Built, Plate
from models.section.plate import DISC, RING

_THINNEST: Final = 0.07
"""A plate is drawn at least this part of the section's greatest extent thick, so that it can be seen and touched."""

_SIDES: Final = 32


def section_picture(built: Built, thinned: Collection[str] = (), chosen: str | None = None) -> Picture:
    """Draw a section, up as it stands in the truss; extents to scale, thin plates drawn thicker than they are.

    Parameters
    ----------
    thinned : plates that have lost thickness; they are shaded.
    chosen : the plate that is being read; it is drawn with a heavy outline.
    """
    extent = max(max(abs(2 * plate.x) + plate.width, abs(2 * plate.y) + plate.height) for plate in built.pieces)
    least, height = _THINNEST * extent, 0.11 * extent
    lines: list[Line] = []
    texts: list[Text] = []
    for number, plate in enumerate(built.pieces, 1):
        shade: Shade = "orange" if plate.name in thinned else "grey"
        lines += _outline(plate, least, shade, heavy=plate.name == chosen)
        texts.append(
            Text(str(number), _label_at(plate, extent, height), height, "plate number", bold=True, of=plate.name)
        )
    xs = [x for line in lines for x, _ in line.points] + [text.at[0] for text in texts]
    ys = [y for line in lines for _, y in line.points] + [text.at[1] for text in texts]
    air = 1.2 * height
    return Picture(
        built.section,
        tuple(lines),
        tuple(texts),
        (min(xs) - air, min(ys) - air),
        (max(xs) + air, max(ys) + air),
        height,
    )


def _outline(plate: Plate, least: float, shade: Shade, *, heavy: bool) -> list[Line]:
    weight: Weight = "heavy" if heavy else "thin"
    if plate.form in (RING, DISC):
        outer = (plate.breadth + plate.thickness) / 2 if plate.form == RING else plate.thickness / 2
        rings = [Line(_around(plate, outer), "plate", weight, "solid", shade, plate.name)]
        if plate.form == RING:
            inner = max(outer - max(plate.thickness, least), 0.0)
            rings.append(Line(_around(plate, inner), "plate", "thin", "solid", "paper", plate.name))
        return rings
    half_width, half_height = max(plate.width, least) / 2, max(plate.height, least) / 2
    corners = tuple(
        (plate.x + i * half_width, plate.y + j * half_height) for i, j in ((-1, -1), (1, -1), (1, 1), (-1, 1))
    )
    return [Line(corners, "plate", weight, "solid", shade, plate.name)]


def _around(plate: Plate, radius: float) -> tuple[Point, ...]:
    turns = (2 * math.pi * k / _SIDES for k in range(_SIDES))
    return tuple((plate.x + radius * math.cos(turn), plate.y + radius * math.sin(turn)) for turn in turns)


def _label_at(plate: Plate, extent: float, height: float) -> Point:
    """Beside the plate's middle, on the side that faces away from the section's origin."""
    if plate.form in (RING, DISC):
        return plate.x, plate.y
    away = max(plate.thickness / 2, _THINNEST * extent / 2) + 0.8 * height
    if plate.width >= plate.height:
        return plate.x, plate.y + (away if plate.y >= 0 else -away)
    return plate.x + (away if plate.x >= 0 else -away), plate.y
