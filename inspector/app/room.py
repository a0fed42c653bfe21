"""How things share the room of a screen, in plain numbers: columns, keys, drawing and sheet. All in px."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Final, Literal

GAP: Final = 8
"""Between two targets, dp."""

TARGET: Final = 57
"""Least height and width of what is touched, dp."""

LARGE_TARGET: Final = 76
"""The same for the buttons of the walk and the keys of the number pad, dp."""

LETTERS: Final = 16
"""Size of plain text, sp."""

LEAST_DRAWING: Final = 120
"""A drawing with less height than this, dp, shows nothing."""

Mode = Literal["beside", "below", "cover"]


def columns(width: float, natural: Sequence[float], least: Sequence[float], gap: float) -> int:
    """How many equal columns fit: as many as let every text stand in one line, else as its longest word needs.

    Parameters
    ----------
    natural, least : width of each child in one line, and of its longest word.
    """
    number = len(natural)

    def most(needed: float) -> int:
        return max(min(int((width + gap) // (needed + gap)), number), 1)

    in_lines, in_words = most(max(natural)), most(max(least))
    if in_lines == number or -(-number // in_lines) <= 2:
        return _even(number, in_lines)
    return _even(number, in_words)


def _even(number: int, most: int) -> int:
    """The fewest columns that need no more rows: four buttons stand two by two rather than three and one."""
    rows = -(-number // most)
    return -(-number // rows)


def key_columns(width: float, height: float, keys: int, key: float, gap: float) -> int:
    """How many keys stand in a row: three as on a telephone, more where the room is low."""
    rows = max(int((height + gap) // (key + gap)), 1)
    most = max(int((width + gap) // (key + gap)), 1)
    return min(max(3, -(-keys // rows)), most)


def mode_for(width: float, height: float, letter: float) -> Mode:
    """How drawing and sheet share a room; ``letter`` is the size of the text.

    Beside each other both need some 25 letters; with little room or large text the sheet covers the drawing.
    """
    if width > height and width >= 50 * letter and height >= 20 * letter:
        return "beside"
    if height >= 38 * letter and width >= 24 * letter:
        return "below"
    return "cover"


def fitting(height: float, least: float, parts: Sequence[tuple[str, float]]) -> frozenset[str]:
    """Which parts fit beside something that needs a least height itself.

    Parameters
    ----------
    parts : name and height of each, the most needed first; from the first that does not fit, none is kept.
    """
    kept: list[str] = []
    for name, needed in parts:
        height -= needed
        if height < least:
            break
        kept.append(name)
    return frozenset(kept)
