"""The slack sets that a truss meets under its loads, each with its influence lines."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from typing import Final

import numpy as np

from models.calculation import Array
from models.statics.slack_bars import NO_EQUILIBRIUM, UNDECIDED, Mask, SlackTruss

MOST_SETS: Final = 400
"""No more sets are looked at."""


@dataclass(frozen=True, eq=False)
class Supports:
    """Upward reactions as more rows under the bars' forces.

    Parameters
    ----------
    bars : (s, m) reaction that a unit force in each bar gives. deck, dead : (d, s) and (c, s) what stands on the very
        joint, for a unit force on each deck joint and for factored dead load.
    """

    bars: Array
    deck: Array
    dead: Array


@dataclass(frozen=True, eq=False)
class SlackLoads:
    """A truss with bars that cannot push, and what acts on it.

    Parameters
    ----------
    scale : (m,) N over scaled force.
    deck : (d, m) scaled forces under a unit force on each deck joint, as if every bar could push.
    dead : (c, m) the same under factored dead load, at its greatest and at its least factors.
    parts : (2, m) the same under components and wearing, unfactored.
    supports : what joint forces and dead load give at the supports whatever the bars do, and what the bars add.
    noise : rounding error to expect, as a part of the largest force.
    """

    truss: SlackTruss
    scale: Array
    deck: Array
    dead: Array
    parts: Array
    supports: Supports
    noise: float

    def without(self, bar: int) -> SlackLoads | None:
        """The same without one of its bars; None where that is a mechanism whatever acts."""
        left = self.truss.without(bar)
        if left is None:
            return None
        own = self.truss.projector[bar] / self.truss.projector[bar, bar]
        deck, dead, parts = (rows - rows[:, bar, None] * own for rows in (self.deck, self.dead, self.parts))
        deck[:, bar] = dead[:, bar] = parts[:, bar] = 0.0
        return SlackLoads(left, self.scale, deck, dead, parts, self.supports, self.noise)


@dataclass(frozen=True, eq=False)
class Lines:
    """Influence lines of several slack sets (g of them), N.

    Parameters
    ----------
    slack : (g, t). bars, dead : (g, m + s, d) and (g, c, m + s) forces of all bars, then upward reactions.
    taut, taut_dead : (g, t, d) and (g, c, t): not negative where the set is right.
    """

    slack: Mask
    bars: Array
    dead: Array
    taut: Array
    taut_dead: Array

    def since(self, number: int) -> Lines:
        """The sets from a number on."""
        return Lines(*(getattr(self, name)[number:] for name in Lines.__dataclass_fields__))

    @property
    def size(self) -> tuple[Array, float]:
        """The largest of what is taut, under each dead load (c,), and under a unit force on a deck joint."""
        return np.abs(self.taut_dead).max(axis=(0, 2), initial=0.0), float(np.abs(self.taut).max(initial=0.0))


class Family:
    """The sets that were met, in the order in which they were met; it grows while arrangements are looked for."""

    def __init__(self, loads: SlackLoads) -> None:
        self.loads = loads
        self._seen: set[bytes] = set()
        self._lines: list[Lines] = []
        self._joined: Lines | None = None

    def __len__(self) -> int:
        return len(self._lines)

    @property
    def full(self) -> bool:
        """Whether sets may have been left out."""
        return len(self) >= MOST_SETS

    def add(self, masks: Iterable[Mask]) -> bool:
        """Take in sets that leave the truss standing; whether any was new."""
        before = len(self)
        for mask in masks:
            key = mask.tobytes()
            if key in self._seen or len(self) >= MOST_SETS:
                continue
            self._seen.add(key)
            lines = self._lines_of(mask)
            if lines is not None:
                self._lines.append(lines)
        if len(self) > before:
            self._joined = None
        return len(self) > before

    def known(self, mask: Mask) -> bool:
        """Whether a set was looked at before."""
        return mask.tobytes() in self._seen

    @property
    def lines(self) -> Lines:
        """All of them, side by side."""
        if self._joined is None:
            parts = self._lines
            self._joined = Lines(
                *(np.concatenate([getattr(part, name) for part in parts]) for name in Lines.__dataclass_fields__)
            )
        return self._joined

    def _lines_of(self, mask: Mask) -> Lines | None:
        loads = self.loads
        held = loads.truss.under(mask)
        if held is None:
            return None
        bars = without_noise(held.forces(loads.deck), loads.noise) * loads.scale
        dead = without_noise(held.forces(loads.dead), loads.noise) * loads.scale
        taut, taut_dead = held.tautness(loads.deck), held.tautness(loads.dead)
        supports = loads.supports
        return Lines(
            mask[None],
            np.hstack([bars, supports.deck + bars @ supports.bars.T]).T[None],
            np.hstack([dead, supports.dead + dead @ supports.bars.T])[None],
            without_noise(taut, loads.noise).T[None],
            without_noise(taut_dead, loads.noise)[None],
        )


def without_noise(rows: Array, noise: float) -> Array:
    """What is no more than rounding becomes zero."""
    return np.where(np.abs(rows) <= noise * np.abs(rows).max(initial=0.0), 0.0, rows)


def starting_sets(
    loads: SlackLoads, panels: Array, intensities: Iterable[float]
) -> tuple[Family, tuple[Array, ...], bool]:
    """The sets under dead load alone, a full crowd and every contiguous run of panels, and what ends equilibrium.

    Parameters
    ----------
    panels : (d - 1,) m. intensities : line loads, N/m.

    Returns
    -------
    The family; weights (t,) of the scaled forces as if every bar could push, whose sum may not be negative; and whether
    rounding hides what some of these loads do.
    """
    family = Family(loads)
    family.add([np.zeros(len(loads.truss.among), bool)])
    alone = loads.truss.states(loads.dead)
    live = runs(panels) @ loads.deck
    whole, start = [loads.dead], [alone.slack]
    for dead, slack in zip(loads.dead, alone.slack, strict=True):
        for intensity in intensities:
            whole.append(dead + intensity * live)
            start.append(np.broadcast_to(slack, (len(live), len(slack))))
    states = loads.truss.states(np.concatenate(whole), np.concatenate(start))
    family.add(states.slack[states.verdict != NO_EQUILIBRIUM])
    return family, states.conditions, bool((states.verdict == UNDECIDED).any())


def runs(panels: Array) -> Array:
    """(n, d) forces on the deck joints of a unit line load on every contiguous run of panels."""
    count = len(panels)
    found = np.zeros((count * (count + 1) // 2, count + 1))
    row = 0
    for first in range(count):
        for last in range(first, count):
            halves = panels[first : last + 1] / 2
            found[row, first : last + 1] += halves
            found[row, first + 1 : last + 2] += halves
            row += 1
    return found
