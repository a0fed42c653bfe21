"""The worst places for a load of a given length: super-level sets of an influence line.

Of all stretches of deck with the same total length, those where the line lies above some level have the largest
integral F. Its slope is the level; as the line is straight between deck joints, F is made of parabolas, and of straight
pieces where the line is level (a plateau may be loaded in part).
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from models.calculation import Array
from models.loading.influence import loaded_lengths


@dataclass(frozen=True, eq=False)
class LevelSets:
    """The greatest integral by loaded length, at the ends of its smooth pieces.

    Parameters
    ----------
    length : (n, k) loaded length, m, from 0 up to all that hurts. level : (n, k) what the line is worth there, the
        slope of the integral; it falls along a straight line from one end of a piece to the other. integral : (n, k).
    """

    length: Array
    level: Array
    integral: Array


def level_sets(lines: Array, panels: Array, hurts: float, relieves: float) -> LevelSets:
    """Level sets of what people do who stand where they hurt, on the near strip or beyond the other truss.

    Parameters
    ----------
    lines : (n, d) influence ordinates at the deck joints; positive is what hurts. panels : (d - 1,), m.
    hurts : worth of the line where it is positive (width of the near strip). relieves : where it is negative.
    """
    above = np.maximum(lines, 0.0)
    worth_above, worth_below = hurts * above, relieves * (above - lines)
    worth = worth_above + worth_below
    # Level 0 ends the list: below it nothing hurts.
    level = np.concatenate([-np.sort(-worth, axis=1), np.zeros((len(lines), 1))], axis=1)
    over, from_level = np.zeros_like(level), np.zeros_like(level)
    on_near, on_far = loaded_lengths(lines, panels)
    sides = [(worth_above, on_near)] + ([(worth_below, on_far)] if relieves > 0.0 else [])
    for ends, lengths in sides:
        for panel in range(len(panels)):
            _add(over, from_level, level, ends[:, panel : panel + 2], lengths[:, panel, None])
    from_level[:, -1] = over[:, -1]
    return _integrated(np.maximum.accumulate(_pairs(over, from_level), axis=1), _pairs(level, level))


def _add(over: Array, from_level: Array, level: Array, ends: Array, length: Array) -> None:
    """Add the length of one panel that lies over each level, and of what lies over it or on it."""
    low, high = ends.min(axis=1, keepdims=True), ends.max(axis=1, keepdims=True)
    rise = high - low
    above = high - level
    with np.errstate(over="ignore", invalid="ignore", divide="ignore"):
        sloped = np.clip(above / rise, 0.0, 1.0)
    flat = rise <= 0.0
    over += length * np.where(flat, above > 0.0, sloped)
    from_level += length * np.where(flat, above >= 0.0, sloped)


def _pairs(first: Array, second: Array) -> Array:
    """The columns of two arrays in turn."""
    turned: Array = np.stack([first, second], axis=2).reshape(len(first), -1)
    return turned


def _integrated(length: Array, level: Array) -> LevelSets:
    integral = np.zeros_like(length)
    np.cumsum((level[:, :-1] + level[:, 1:]) / 2 * np.diff(length, axis=1), axis=1, out=integral[:, 1:])
    return LevelSets(length, level, integral)
