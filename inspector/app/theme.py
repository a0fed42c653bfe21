"""Colours by what they are for, as plain data. No screen and no kv file names a colour.

Fills come from the palette of Okabe and Ito, inside dark outlines; no text stands on them but ink.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, fields
from typing import Final

from models.picture import PALETTE

Colour = tuple[float, float, float, float]


def _colour(text: str) -> Colour:
    red, green, blue = (int(text[i : i + 2], 16) / 255 for i in (0, 2, 4))
    return red, green, blue, 1.0


@dataclass(frozen=True, slots=True)
class Roles:
    """A theme.

    Parameters
    ----------
    surface, ink : the ground of a screen and its text; ``quiet`` is text of less weight on it.
    card : the ground of drawings and sheets, with the same text.
    button, button_ink, outline : a button that is not chosen, its text, and the outline of everything touched.
    chosen, chosen_ink : a button that is chosen.
    off, off_ink : a button that cannot be used now.
    caution, caution_ink : the banner.
    act, act_ink : findings that need somebody to act now.
    changed, changed_ink : figures that the last entry changed.
    bar_mark : the outline of the chosen bar. clear : nothing at all.
    """

    surface: Colour
    ink: Colour
    quiet: Colour
    card: Colour
    button: Colour
    button_ink: Colour
    outline: Colour
    chosen: Colour
    chosen_ink: Colour
    off: Colour
    off_ink: Colour
    caution: Colour
    caution_ink: Colour
    act: Colour
    act_ink: Colour
    changed: Colour
    changed_ink: Colour
    bar_mark: Colour
    clear: Colour = (0.0, 0.0, 0.0, 0.0)


FIELD: Final = Roles(
    surface=_colour("E7ECEA"),
    ink=_colour("14201F"),
    quiet=_colour("33413F"),
    card=_colour("FFFFFF"),
    button=_colour("F7FAF8"),
    button_ink=_colour("14201F"),
    outline=_colour("35504C"),
    chosen=_colour("134E4A"),
    chosen_ink=_colour("FFFFFF"),
    off=_colour("DDE3E1"),
    off_ink=_colour("4A5553"),
    caution=_colour("F0E442"),
    caution_ink=_colour("14201F"),
    act=_colour("7A1F00"),
    act_ink=_colour("FFFFFF"),
    changed=_colour("F0E442"),
    changed_ink=_colour("14201F"),
    bar_mark=_colour("134E4A"),
)

SUN: Final = Roles(
    surface=_colour("FFFFFF"),
    ink=_colour("000000"),
    quiet=_colour("000000"),
    card=_colour("FFFFFF"),
    button=_colour("FFFFFF"),
    button_ink=_colour("000000"),
    outline=_colour("000000"),
    chosen=_colour("000000"),
    chosen_ink=_colour("FFFFFF"),
    off=_colour("FFFFFF"),
    off_ink=_colour("3D3D3D"),
    caution=_colour("F0E442"),
    caution_ink=_colour("000000"),
    act=_colour("5C1700"),
    act_ink=_colour("FFFFFF"),
    changed=_colour("F0E442"),
    changed_ink=_colour("000000"),
    bar_mark=_colour("000000"),
)

THEMES: Final[Mapping[str, Roles]] = {"field": FIELD, "sun": SUN}

TEXT_ON: Final = (
    ("ink", "surface"), ("quiet", "surface"), ("ink", "card"), ("quiet", "card"), ("button_ink", "button"),
    ("chosen_ink", "chosen"), ("off_ink", "off"), ("caution_ink", "caution"), ("act_ink", "act"),
    ("changed_ink", "changed"),
)  # fmt: skip
"""Every pair of a text and its ground that a screen uses."""

OUTLINE_ON: Final = (("outline", "surface"), ("outline", "card"), ("bar_mark", "card"), ("act", "surface"))
"""Every pair of an outline or a mark and its ground."""

NAMES: Final = tuple(field.name for field in fields(Roles))


def contrast(one: Colour, other: Colour) -> float:
    """The contrast ratio of two colours (Web Content Accessibility Guidelines 2.2, relative luminance)."""
    bright, dark = sorted((_luminance(one), _luminance(other)), reverse=True)
    return (bright + 0.05) / (dark + 0.05)


def _luminance(colour: Colour) -> float:
    red, green, blue = (part / 12.92 if part <= 0.04045 else ((part + 0.055) / 1.055) ** 2.4 for part in colour[:3])
    return 0.2126 * red + 0.7152 * green + 0.0722 * blue


def fill(shade: str) -> Colour:
    """A shade of a drawing."""
    red, green, blue = PALETTE[shade]  # type: ignore[index]  # the drawing's own name of a shade
    return red / 255, green / 255, blue / 255, 1.0
