"""Drawings as lines and texts: one for screen, PDF and whatever comes."""

from models.picture.drawing import (
    PALETTE,
    Boxes,
    LegendRow,
    Line,
    Pattern,
    Picture,
    Point,
    Shade,
    Text,
    Weight,
    as_boxes,
    box_along,
    box_of,
    meet,
    overlaps,
    text_width,
)

__all__ = [
    "PALETTE",
    "Boxes",
    "LegendRow",
    "Line",
    "Pattern",
    "Picture",
    "Point",
    "Shade",
    "Text",
    "Weight",
    "as_boxes",
    "box_along",
    "box_of",
    "meet",
    "overlaps",
    "text_width",
]
