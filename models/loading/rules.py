"""Crowd pressures that a standard gives by a rule: the more deck is loaded, the less stands on it.

A rule is one row of `RULES`. Across the bridge the near strip of the deck acts on the part of the influence line that
hurts, and people beyond the other truss act on the other part, where they lift: one crowd, at one pressure.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.loading.floor import Floor
from models.loading.influence import loaded_areas, loaded_lengths
from models.loading.level_sets import LevelSets, level_sets
from models.quantity import parse

EN_SHORT: Final = 10.0
"""Loaded length up to which the pressure of EN 1991-2 stays at its greatest, m: 2.0 + 120/(10 + 30) = 5.0."""

EN_LONG: Final = 210.0
"""Loaded length from which it stays at its least, m: 2.0 + 120/(210 + 30) = 2.5."""

_FOOT: Final = parse("1 ft", "length").si
_AASHTO: Final = parse("85 psf", "pressure").si
_AASHTO_LEAST: Final = parse("65 psf", "pressure").si
_NO_INFLUENCE: Final = 1e-9
"""Ordinates below this part of the largest one of their line are rounding, and no deck is loaded there."""

_BLOCK: Final = 4096
"""Influence lines that are searched at once, so that memory stays small."""

_NEAR: Final = 1e-9
"""A step this small, as a part of the length, ends the search: the product is level there."""

_LEVEL: Final = 1e-12
"""A piece along which a line falls by less than this part of its largest value is a plateau."""

_MOST_STEPS: Final = 60


def en_pressure(length: Array) -> Array:
    """Crowd pressure by loaded length, Pa (EN 1991-2, 5.3.2.1(2)).

    Parameters
    ----------
    length : (...) summed length of deck that is loaded, m.
    """
    pressure: Array = 2000.0 + 120e3 / (np.clip(length, EN_SHORT, EN_LONG) + 30.0)
    return pressure


def aashto_pressure(area: Array) -> Array:
    """Crowd pressure by deck influence area, Pa (AASHTO pedestrian guide 1997, from memory).

    Parameters
    ----------
    area : (...) m^2.
    """
    root = np.sqrt(area) / _FOOT
    reduced = 0.25 + np.divide(15.0, root, out=np.full_like(root, np.inf), where=root > 0.0)
    pressure: Array = np.clip(_AASHTO * reduced, _AASHTO_LEAST, _AASHTO)
    return pressure


@dataclass(frozen=True, eq=False)
class CrowdByLength:
    """People at a pressure that falls with the length they cover, as many of them as hurt most (EN 1991-2).

    The loaded length is the sum of all stretches with people on them, whether on the near strip or beyond the other
    truss. Every set of stretches counts, and the worst is one of finitely many, so that the answer is exact.

    Parameters
    ----------
    hurts, relieves : widths that count on the part of the influence line that hurts, and on the other part, m.
    """

    hurts: float
    relieves: float
    panels: Array

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """See `models.loading.live.Pattern`."""
        lines = ordinates.reshape(-1, ordinates.shape[-1])
        largest, least = self._worst(lines), -self._worst(-lines)
        return largest.reshape(ordinates.shape[:-1])[()], least.reshape(ordinates.shape[:-1])[()]

    def _worst(self, lines: Array) -> Array:
        """The largest effect, N, of people where lines are positive and, beyond the other truss, negative."""
        size = np.abs(lines).max(axis=1, keepdims=True, initial=0.0)
        lines = np.divide(lines, size, out=np.zeros_like(lines), where=size > 0.0)
        blocks = [lines[first : first + _BLOCK] for first in range(0, len(lines), _BLOCK)]
        found = [_largest(level_sets(block, self.panels, self.hurts, self.relieves)) for block in blocks]
        return np.concatenate([each.effect for each in found]) * size[:, 0] if found else np.zeros(0)

    def worst(self, lines: Array) -> Stretches:
        """Which people stand where they hurt most.

        Parameters
        ----------
        lines : (n, d) influence ordinates at the deck joints; positive is what hurts.
        """
        size = np.abs(lines).max(axis=1, initial=0.0)
        lines = np.divide(lines, size[:, None], out=np.zeros_like(lines), where=size[:, None] > 0.0)
        found = _largest(level_sets(lines, self.panels, self.hurts, self.relieves))
        return Stretches(found.effect * size, found.length, found.level * size)

    @property
    def everywhere(self) -> float:
        """Line load of people on the whole of the near strip, N/m."""
        return self.hurts * float(en_pressure(self.panels.sum()))


@dataclass(frozen=True, eq=False)
class Stretches:
    """The worst crowd by length, for each influence line; (n,) each.

    Parameters
    ----------
    effect : N. length : loaded, m. level : people stand where the line, times the width that counts, is above it.
    """

    effect: Array
    length: Array
    level: Array


def _largest(sets: LevelSets) -> Stretches:
    """The largest product of pressure and integral.

    It stands at an end of a smooth piece, where the pressure begins to fall, or where the product is stationary.
    """
    product = en_pressure(sets.length) * sets.integral
    best, every = product.argmax(axis=1), np.arange(len(product))
    worst, length, level = product[every, best], sets.length[every, best], sets.level[every, best]
    start, end = sets.length[:, :-1], sets.length[:, 1:]
    curved = (end > start) & (-np.diff(sets.level) > _LEVEL * sets.level[:, :1])
    for inside, place in (
        ((start < EN_SHORT) & (end > EN_SHORT), _where_it_begins_to_fall),
        ((start < EN_LONG) & (end > EN_SHORT) & curved, _where_stationary),
    ):
        line, number = np.nonzero(inside)
        pieces = _Pieces.of(sets, line, number)
        at = place(pieces)
        effect = en_pressure(at) * pieces.integral_at(at)
        better = effect > worst[line]
        np.maximum.at(worst, line, effect)
        chosen = better & (effect == worst[line])
        length[line[chosen]] = at[chosen]
        level[line[chosen]] = (pieces.level - pieces.fall * (at - pieces.start))[chosen]
    return Stretches(worst, length, level)


@dataclass(frozen=True, eq=False)
class _Pieces:
    """Smooth pieces of the integral: from start to end the level falls evenly. All (n,)."""

    start: Array
    end: Array
    level: Array
    fall: Array
    integral: Array

    @classmethod
    def of(cls, sets: LevelSets, line: NDArray[np.int64], number: NDArray[np.int64]) -> _Pieces:
        start, end = sets.length[line, number], sets.length[line, number + 1]
        level = sets.level[line, number]
        fall = (level - sets.level[line, number + 1]) / (end - start)
        return cls(start, end, level, fall, sets.integral[line, number])

    def integral_at(self, length: Array) -> Array:
        """The integral at a length in the piece."""
        x = length - self.start
        return self.integral + (self.level - self.fall * x / 2) * x


def _where_it_begins_to_fall(pieces: _Pieces) -> Array:
    return np.full_like(pieces.start, EN_SHORT)


def _where_stationary(pieces: _Pieces) -> Array:
    """The length at which the product has its maximum inside each piece, or the end of the piece that is nearest to it.

    With u = L + 30, the level t, its fall s per metre and the integral F, the product (2 + 120/u) F has the slope
    D/u^2, D = (2 u^2 + 120 u) t - 120 F. D rises up to u* = 2 (t0/s + u0)/3 - 20, with t0 the level at u0, and falls
    and bends down beyond: so there is one maximum at most, beyond u*, and Newton's steps from the far end lead down to
    it. On a plateau, where s = 0, there is none.
    """
    turn = 2 / 3 * (pieces.level / pieces.fall + pieces.start + 30.0) - 20.0
    low = np.maximum(np.maximum(pieces.start, EN_SHORT) + 30.0, turn)
    u = np.maximum(np.minimum(pieces.end, EN_LONG) + 30.0, low)
    for _ in range(_MOST_STEPS):
        level = pieces.level - pieces.fall * (u - 30.0 - pieces.start)
        slope = (2 * u**2 + 120 * u) * level - 120 * pieces.integral_at(u - 30.0)
        bend = 4 * u * level - (2 * u**2 + 120 * u) * pieces.fall
        step = np.divide(slope, bend, out=np.zeros_like(u), where=(slope < 0) & (bend < 0))
        u = np.maximum(u - step, low)
        if (step <= _NEAR * u).all():
            break
    return np.clip(u - 30.0, pieces.start, pieces.end)


@dataclass(frozen=True, eq=False)
class CrowdByArea:
    """People at a pressure that falls with the area of deck that hurts, all of which is loaded (AASHTO 1997).

    The area is that of the near strip along the part of the influence line that hurts. People beyond the other truss
    act at the same pressure; their area is not counted, which never makes the pressure less.

    Parameters
    ----------
    width : of the near strip, m. hurts, relieves : widths that count on the part that hurts, and on the other, m.
    """

    width: float
    hurts: float
    relieves: float
    panels: Array

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """See `models.loading.live.Pattern`."""
        felt = np.abs(ordinates) > _NO_INFLUENCE * np.abs(ordinates).max(axis=-1, keepdims=True, initial=0.0)
        on_positive, on_negative = (part.sum(axis=-1) for part in loaded_lengths(ordinates * felt, self.panels))
        positive, negative = loaded_areas(ordinates, self.panels)
        return (
            aashto_pressure(self.width * on_positive) * (self.hurts * positive - self.relieves * negative),
            aashto_pressure(self.width * on_negative) * (self.hurts * negative - self.relieves * positive),
        )

    @property
    def everywhere(self) -> float:
        """Line load of people on the whole of the near strip, N/m."""
        return self.hurts * float(aashto_pressure(self.width * self.panels.sum()))


@dataclass(frozen=True, slots=True)
class Rule:
    """A rule for the pressure of a crowd.

    Parameters
    ----------
    text : as people read it. crowd : makes it ready for a deck, given the distances between deck joints.
    """

    text: str
    source: str
    crowd: Callable[[Floor, Array], CrowdByLength | CrowdByArea]


RULES: Final[Mapping[str, Rule]] = {
    "en 1991-2": Rule(
        "2.0 + 120/(L + 30) kPa, 2.5 at least and 5.0 at most, L the loaded length in m, the worst of all lengths",
        "EN 1991-2, 5.3.2.1(2)",
        lambda floor, panels: CrowdByLength(*floor.strips(), panels),
    ),
    "aashto 1997": Rule(
        "85 psf x (0.25 + 15/sqrt(A)), 65 at least and 85 at most, A the loaded deck in ft^2",
        "AASHTO pedestrian guide 1997, 1.2.1.1 (from memory)",
        lambda floor, panels: CrowdByArea(floor.near_width(), *floor.strips(), panels),
    ),
}
"""The rules by which a crowd's pressure may be given, by their names in a site file."""
