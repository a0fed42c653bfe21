"""Where a live load stands at its worst, as forces on the deck joints.

Where superposition holds, `Pattern.extremes` tells all that is needed. Where bars cannot push, the state under the very
arrangement has to be looked at.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import Any, Final

import numpy as np

from models.calculation import Array
from models.loading.live import Crowd, Everywhere, Pattern, Placed, Together
from models.loading.rules import CrowdByArea, CrowdByLength, en_pressure

_LEVEL: Final = 1e-9
"""A line this close to a level, as a part of it, lies on it."""

_STEP: Final = 1e-6
"""Change of an ordinate, as a part of the largest one, from which other kinds of load tell their place."""


def worst_arrangement(pattern: Pattern, lines: Array) -> Array:
    """Forces on the deck joints under which the effect is largest.

    Parameters
    ----------
    lines : (..., d) influence ordinates at the deck joints.

    Returns
    -------
    (..., d) downward forces on this truss, N; their sum with the ordinates is what `Pattern.extremes` calls largest.
    """
    arranged = _ARRANGED.get(type(pattern), _by_differences)
    return arranged(pattern, lines)


def _crowd(crowd: Crowd, lines: Array) -> Array:
    hurts = _under_positive(lines, crowd.panels)
    if not crowd.relieves:
        return crowd.hurts * hurts
    return crowd.hurts * hurts + crowd.relieves * _under_positive(-lines, crowd.panels) * -1.0


def _together(pattern: Together, lines: Array) -> Array:
    forces: Array = np.sum([factor * worst_arrangement(part, lines) for factor, part in pattern.parts], axis=0)
    return forces


def _everywhere(pattern: Everywhere, lines: Array) -> Array:
    whole = np.ones_like(lines[..., 1:])
    total = pattern.line_load * _to_joints(pattern.panels, whole, whole)
    acts = (lines * total).sum(axis=-1, keepdims=True) > 0.0
    return np.where(acts, total, 0.0)


def _by_area(crowd: CrowdByArea, lines: Array) -> Array:
    everyone = _crowd(Crowd(crowd.hurts, crowd.relieves, crowd.panels), lines)
    effect = (everyone * lines).sum(axis=-1)
    pressure = np.divide(crowd.extremes(lines)[0], effect, out=np.zeros_like(effect), where=effect > 0.0)
    forces: Array = everyone * pressure[..., None]
    return forces


def _by_length(crowd: CrowdByLength, shaped: Array) -> Array:
    lines = shaped.reshape(-1, shaped.shape[-1])
    if not len(lines):
        return np.zeros_like(shaped)
    found = crowd.worst(lines)
    pressure = en_pressure(found.length)[:, None]

    def above(level: Array) -> Array:
        forces = np.zeros_like(lines)
        for side in (crowd.hurts, -crowd.relieves):
            if side:
                forces += side * _under_positive(np.sign(side) * lines - level / abs(side), crowd.panels)
        return pressure * forces

    # Where the line is level at the very limit, only a part of it is loaded.
    without, along = (above(found.level[:, None] * (1.0 + side)) for side in (_LEVEL, -_LEVEL))
    short, more = found.effect - (without * lines).sum(axis=1), ((along - without) * lines).sum(axis=1)
    part = np.divide(short, more, out=np.zeros_like(short), where=more > _LEVEL * found.effect)
    forces: Array = without + np.clip(part, 0.0, 1.0)[:, None] * (along - without)
    return forces.reshape(shaped.shape)


def _under_positive(lines: Array, panels: Array) -> Array:
    """(..., d) forces on the deck joints of a unit line load where a line is positive."""
    left, right = lines[..., :-1], lines[..., 1:]
    size = np.abs(left) + np.abs(right)
    above = np.maximum(left, 0.0) + np.maximum(right, 0.0)
    part = np.divide(above, size, out=np.zeros_like(size), where=size > 0.0)
    # Of a panel loaded over a part p from one end, the near joint takes p - p^2/2 of the length, the far one p^2/2.
    near, far = part - part**2 / 2, part**2 / 2
    from_left = left >= right
    return _to_joints(panels, 2 * np.where(from_left, near, far), 2 * np.where(from_left, far, near))


def _to_joints(panels: Array, to_left: Array, to_right: Array) -> Array:
    """Forces on the deck joints, of parts of half of each panel's length."""
    forces = np.zeros((*to_left.shape[:-1], to_left.shape[-1] + 1))
    forces[..., :-1] += to_left * (panels / 2)
    forces[..., 1:] += to_right * (panels / 2)
    return forces


def _placed(pattern: Placed, lines: Array) -> Array:
    effects = lines @ pattern.places.T
    highest, lowest = effects.argmax(axis=-1), effects.argmin(axis=-1)
    best, found = np.zeros(lines.shape[:-1]), np.zeros_like(lines)
    for share in pattern.shares:
        for place in (highest, lowest):
            effect = share * np.take_along_axis(effects, place[..., None], axis=-1)[..., 0]
            better = effect > best
            best = np.where(better, effect, best)
            found = np.where(better[..., None], share * pattern.places[place], found)
    return found


def _by_differences(pattern: Pattern, lines: Array) -> Array:
    """The change of the largest effect with each ordinate is the force on that joint."""
    step = _STEP * np.abs(lines).max(axis=-1, initial=0.0)
    found = np.zeros_like(lines)
    for joint in range(lines.shape[-1]):
        moved = np.zeros_like(lines)
        moved[..., joint] = step
        change = pattern.extremes(lines + moved)[0] - pattern.extremes(lines - moved)[0]
        found[..., joint] = np.divide(change, 2 * step, out=np.zeros_like(step), where=step > 0.0)
    return found


_ARRANGED: Final[Mapping[type, Callable[[Any, Array], Array]]] = {
    Crowd: _crowd,
    Everywhere: _everywhere,
    Placed: _placed,
    Together: _together,
    CrowdByArea: _by_area,
    CrowdByLength: _by_length,
}
