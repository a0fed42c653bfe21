"""Upper bounds of the force that loads give which leave a slack set right: one multiplier after the other.

See `models.rating.slack_search` for what the bounds are.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any, Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.loading.arrangement import worst_arrangement
from models.loading.live import Pattern
from models.rating.slack_family import Lines
from models.rating.slack_items import Items, Question, is_right, lies_below

_NEARLY_RIGHT: Final = 1e-6
"""After refining; the figure is a bound all the same."""

_MOST_ROUNDS: Final = 24
_MOST_WIDENINGS: Final = 12
_MOST_STEPS: Final = 40
_HALVING: Final = 4
_FLAT: Final = 1e-7

Slope = Callable[[Array, NDArray[np.int64]], Array]
"""A function of places, for those of its members that are still looked at."""


def rising_root(slope: Slope, count: int) -> tuple[Array, Array]:
    """Where functions that may rise through zero, or jump, cross it.

    Regula falsi; the value at the end that stays is halved so that both close in (the Illinois rule), and now and then
    the bracket itself.

    Returns
    -------
    low, high : (count,) close around the crossing; both 0 where the function is not negative there, both large where it
        stays negative.
    """
    found, active = np.zeros((2, count)), np.arange(count)
    f_low = slope(found[0], active)
    active, f_low = active[f_low < 0.0], f_low[f_low < 0.0]
    low, high = np.zeros(len(active)), np.ones(len(active))
    f_high = slope(high, active)
    for _ in range(_MOST_WIDENINGS):
        short = f_high < 0.0
        if not short.any():
            break
        low, f_low = np.where(short, high, low), np.where(short, f_high, f_low)
        high = np.where(short, 8.0 * high, high)
        f_high[short] = slope(high[short], active[short])
    found[0, active], found[1, active] = np.where(f_high < 0.0, high, low), high
    side = np.zeros(len(active))
    keep = f_high > _FLAT
    for step in range(1, _MOST_STEPS + 1):
        active = active[keep]
        side, low, high, f_low, f_high = (part[keep] for part in (side, low, high, f_low, f_high))
        if not len(active):
            break
        middle = (low + high) / 2 if step % _HALVING == 0 else (low * f_high - high * f_low) / (f_high - f_low)
        value = slope(middle, active)
        below = value < 0.0
        f_low, f_high = (
            np.where(below, value, np.where(side > 0, f_low / 2, f_low)),
            np.where(below, np.where(side < 0, f_high / 2, f_high), value),
        )
        low, high, side = np.where(below, middle, low), np.where(below, high, middle), np.where(below, -1.0, 1.0)
        flat = np.abs(value) <= _FLAT
        found[0, active], found[1, active] = np.where(flat, middle, low), np.where(flat, middle, high)
        keep = ~flat & (high - low > _FLAT * high)
    return found[0], found[1]


class _Refining:
    """Combinations on their way to the least bound."""

    def __init__(self, lines: Lines, pattern: Pattern, question: Question, items: Items) -> None:
        self.lines, self.pattern, self.question, self.items = lines, pattern, question, items
        self.line, self.dead = items.line.copy(), items.dead.copy()
        self.live, self.merit = items.live.copy(), items.merit.copy()
        self.arrangement, self.taut, self.right = items.arrangement.copy(), items.taut.copy(), items.right.copy()
        self.weights = np.zeros_like(items.taut)
        self.tried = np.zeros(items.taut.shape, bool)
        self.together = np.zeros(len(items.bar), bool)

    def next_directions(self) -> tuple[Array, Array, NDArray[np.bool_]]:
        """Where each combination goes next: (n, t) multipliers to start from, how they grow, and (n,) whether at all.

        First the one that is most wrong and was not tried since the bound last moved; when all were tried, everything
        that is wrong together, once.
        """
        wrong = np.maximum(-self.taut, np.where(self.weights > 0.0, self.taut, 0.0))
        wrong[self.tried] = 0.0
        single = wrong.max(axis=1, initial=0.0) > 0.0
        start, growth = self.weights.copy(), np.maximum(-self.taut, 0.0)
        rows = np.flatnonzero(single)
        which = wrong[rows].argmax(axis=1) if len(rows) else rows
        start[rows, which], growth[rows] = 0.0, 0.0
        growth[rows, which] = 1.0
        together = ~single & ~self.together & ((growth > 0.0).sum(axis=1) > 1)
        self.tried[rows, which] = True
        self.together |= together
        return start, growth, single | together

    def step(self, numbers: NDArray[np.int64], start: Array, growth: Array, enough: Array) -> None:
        """Move multipliers of each combination along a line to where the bound is least."""
        items, lines = self.items, self.lines
        at_set, case, direction, bar = (
            part[numbers] for part in (items.at_set, items.case, items.direction, items.bar)
        )
        taut, taut_dead = lines.taut[at_set], lines.taut_dead[at_set, case]

        def blend(weights: Array) -> _Line:
            return _Line(np.einsum("nt,ntd->nd", weights, taut), (weights * taut_dead).sum(axis=1))

        condition, base = blend(growth), blend(start)
        base = _Line(items.line[numbers] + base.line, items.dead[numbers] + base.dead)
        first, back = _one_of_each(direction, bar, case, base.line, base.dead, condition.line, condition.dead)
        found = _OneMultiplier(
            self.pattern, self.question, direction[first], bar[first], condition.of(first), base.of(first)
        ).best(enough[first]).at_places(back)  # fmt: skip
        moved = numbers[lies_below(self.merit[numbers], found.merit)]
        self.tried[moved], self.together[moved] = (growth > 0.0)[np.isin(numbers, moved)], False
        self.weights[numbers] = start + found.weight[:, None] * growth
        self.line[numbers], self.dead[numbers] = found.line, found.dead
        self.live[numbers], self.merit[numbers], self.arrangement[numbers] = found.live, found.merit, found.arrangement
        multiple = self.question.multiples(found.merit)
        self.taut[numbers] = taut_dead + multiple[:, None] * np.einsum("nd,ntd->nt", found.arrangement, taut)
        right = is_right(lines, case, multiple, found.arrangement, self.taut[numbers], _NEARLY_RIGHT)
        # Where a multiplier is at work its own bar has to be at its limit.
        idle = np.abs(self.weights[numbers] * self.taut[numbers]).max(axis=1, initial=0.0)
        self.right[numbers] = right & (idle <= _NEARLY_RIGHT * (np.abs(found.dead) + multiple * found.live))

    def finished(self) -> Items:
        """The combinations with what was found."""
        items = self.items
        return Items(
            items.direction, items.at_set, items.case, items.bar,
            self.line, self.dead, self.live, self.arrangement, self.merit, self.taut, self.right,
        )  # fmt: skip


@dataclass(frozen=True, eq=False)
class _Line:
    """Influence lines (n, d) with what dead load gives (n,)."""

    line: Array
    dead: Array

    def of(self, numbers: NDArray[np.int64]) -> _Line:
        """Those of some numbers."""
        return _Line(self.line[numbers], self.dead[numbers])


@dataclass(frozen=True, eq=False)
class _Found:
    """Bounds: multiplier, blended line, parts of the force, answer and arrangement; all (n,) or (n, d)."""

    weight: Array
    line: Array
    dead: Array
    live: Array
    merit: Array
    arrangement: Array

    def at_places(self, places: NDArray[np.int64]) -> _Found:
        """The bounds of these numbers."""
        return _Found(*(getattr(self, name)[places] for name in _Found.__dataclass_fields__))


def _one_of_each(*columns: NDArray[Any]) -> tuple[NDArray[np.int64], NDArray[np.int64]]:
    """Numbers of rows that differ, and for each row the one among them that is like it.

    Many sets differ only far away and lead to the same line; it is looked at once.
    """
    parts = []
    for column in columns:
        flat = column.reshape(len(column), -1).astype(float)
        # Lines are told apart by one number: weights without a pattern.
        number = flat @ np.sqrt(np.arange(2, 2 + flat.shape[1]))
        parts.append(np.round(number / max(np.abs(number).max(initial=0.0), 1e-300), 11) + 0.0)
    _, first, back = np.unique(np.column_stack(parts), axis=0, return_index=True, return_inverse=True)
    return first, back.reshape(-1)


@dataclass(frozen=True, eq=False)
class _OneMultiplier:
    """The bound as it changes with one multiplier of each combination."""

    pattern: Pattern
    question: Question
    direction: NDArray[np.int64]
    bar: NDArray[np.int64]
    condition: _Line
    base: _Line

    def at(self, weight: Array, which: NDArray[np.int64]) -> _Found:
        """The bound at given multipliers of some of the combinations."""
        line = self.base.line[which] + weight[:, None] * self.condition.line[which]
        dead = self.base.dead[which] + weight * self.condition.dead[which]
        place = worst_arrangement(self.pattern, line)
        live = (place * line).sum(axis=1)
        merit = self.question.merit(self.question.room(self.direction[which], self.bar[which], dead), live)
        return _Found(weight, line, dead, live, merit, place)

    def slope(self, found: _Found, which: NDArray[np.int64]) -> Array:
        """What a bound's arrangement makes of the condition, between -1 and 1; the bound falls where it is negative."""
        multiple = self.question.multiples(found.merit)
        line, dead = self.condition.line[which], self.condition.dead[which]
        live = multiple * (found.arrangement * line).sum(axis=1)
        size = np.abs(dead) + multiple * (np.abs(found.arrangement) * np.abs(line)).sum(axis=1)
        value: Array = np.divide(dead + live, size, out=np.zeros_like(size), where=size > 0.0)
        return value

    def best(self, enough: Array) -> _Found:
        """The least bounds over multipliers that are not negative, or bounds that are out of the way.

        Where the arrangement jumps, a mixture of both sides leaves the condition just met.
        """
        every = np.arange(len(self.bar))
        largest = np.abs(self.condition.line).max(axis=1, initial=0.0)
        own = np.abs(self.base.line).max(axis=1, initial=0.0)
        unit = np.divide(own, largest, out=np.ones_like(own), where=(largest > 0.0) & (own > 0.0))

        def slope(relative: Array, which: NDArray[np.int64]) -> Array:
            found = self.at(relative * unit[which], which)
            return np.where(lies_below(found.merit, enough[which]), self.slope(found, which), 0.0)

        low, high = rising_root(slope, len(every))
        below, above = self.at(low * unit, every), self.at(high * unit, every)
        at_low, at_high = self.slope(below, every), self.slope(above, every)
        crosses = (at_low < 0.0) & (at_high > 0.0)
        part = np.where(crosses, at_low / np.where(crosses, at_low - at_high, 1.0), 1.0)[:, None]
        mixed = (1.0 - part) * below.arrangement + part * above.arrangement
        return _Found(above.weight, above.line, above.dead, above.live, above.merit, mixed)


def refine(lines: Lines, pattern: Pattern, question: Question, items: Items, best: Array) -> Items:
    """Bring the bounds of doubtful combinations down to where some arrangement reaches them, or out of the way."""
    at = _Refining(lines, pattern, question, items)
    best = best.copy()
    for _ in range(_MOST_ROUNDS):
        start, growth, left = at.next_directions()
        limit = best[items.direction, items.bar]
        active = np.flatnonzero(left & ~at.right & lies_below(at.merit, limit))
        if not len(active):
            break
        at.step(active, start[active], growth[active], limit[active])
        right = active[at.right[active]]
        np.minimum.at(best, (items.direction[right], items.bar[right]), at.merit[right])
        best = question.least(best)
    return at.finished()
