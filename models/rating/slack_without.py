"""What the other bars of a truss with slack bars still carry when one bar goes."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

import numpy as np

from models.calculation import Array
from models.loading.live import Pattern
from models.rating.slack_family import Family, SlackLoads, runs
from models.rating.slack_items import Question
from models.rating.slack_limits import Ends, limit, necessary_bars
from models.statics.slack_bars import EQUILIBRIUM, NO_EQUILIBRIUM, Mask

_REACH: Final = 4.0
"""Multiple of the factored live load from which the search for what ends equilibrium starts."""


@dataclass(frozen=True, eq=False)
class Carried:
    """What the truss has to carry, bar lost or not.

    Parameters
    ----------
    panels : (d - 1,) m. patterns, gamma : live loads and their factors. capacity : (2, m) N.
    """

    panels: Array
    patterns: Sequence[Pattern]
    gamma: Array
    capacity: Array

    @property
    def line_load(self) -> float:
        """The heaviest factored live load, spread over the deck, N/m."""
        everywhere = np.ones(len(self.panels) + 1)
        whole = [float(pattern.extremes(everywhere)[0]) for pattern in self.patterns]
        return max((self.gamma * whole).tolist(), default=0.0) / float(self.panels.sum())


def factors_without(family: Family, carried: Carried) -> Array:
    """Lowest rating factor at the upper level of the bars that remain, for each bar lost.

    Parameters
    ----------
    family : of the truss with all its bars; its sets are where each search starts.

    Returns
    -------
    (m,): NaN where dead load has no equilibrium any more, infinite where no live load acts on what remains.
    """
    slack = family.lines.slack
    return np.array([_without(family.loads, slack, bar, carried) for bar in range(len(family.loads.scale))])


def _without(whole: SlackLoads, slack: Mask, bar: int, carried: Carried) -> float:
    loads = whole.without(bar)
    if loads is None:
        return np.nan
    present = loads.parts[:2].sum(axis=0)
    if necessary_bars(loads).failed(loads, present) or loads.truss.states(present[None]).verdict[0] != EQUILIBRIUM:
        return np.nan
    bars = len(loads.scale)
    limited = np.full((2, bars + len(loads.supports.bars)), np.inf)
    limited[:, :bars] = carried.capacity
    limited[:, bar] = limited[1, loads.truss.among] = np.inf
    dead = loads.truss.states(loads.dead).forces * loads.scale
    if (np.array([dead.max(axis=0), -dead.min(axis=0)]) > limited[:, :bars]).any():
        return 0.0
    family, ends = _start(loads, slack[:, whole.truss.among != bar], carried)
    return _lowest(family, ends, carried, Question(limited, overall=True))


def _lowest(family: Family, ends: Ends, carried: Carried, question: Question) -> float:
    """The lowest factor of all bars, and of the multiples at which equilibrium ends."""
    lowest = np.inf
    for pattern, gamma in zip(carried.patterns, carried.gamma.tolist(), strict=True):
        lowest = min(lowest, ends.first(family.loads, pattern)[0] / gamma)
        enough = np.full((2, family.lines.bars.shape[1]), lowest * gamma)
        found, ends = limit(family, ends, pattern, question, enough)
        lowest = min(lowest, max(float(found.merit.min()), 0.0) / gamma)
    ended = [ends.first(family.loads, pattern)[0] for pattern in carried.patterns]
    return float(min([lowest, *(np.array(ended) / carried.gamma).tolist()]))


def _start(loads: SlackLoads, slack: Mask, carried: Carried) -> tuple[Family, Ends]:
    """The sets of the whole truss and of dead load, and what ends equilibrium under runs of panels from either end."""
    family = Family(loads)
    family.add([np.zeros(len(loads.truss.among), bool), *slack])
    every = runs(carried.panels)
    from_ends = every[(every[:, 0] > 0.0) | (every[:, -1] > 0.0)]
    alone = loads.truss.states(loads.dead)
    live = _REACH * carried.line_load * from_ends @ loads.deck
    whole = np.concatenate([loads.dead, loads.dead[-1] + live])
    start = np.concatenate([alone.slack, np.repeat(alone.slack[-1:], len(live), axis=0)])
    states = loads.truss.states(whole, start)
    family.add(states.slack[states.verdict != NO_EQUILIBRIUM])
    return family, necessary_bars(loads).with_more(states.conditions)
