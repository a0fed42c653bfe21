"""How far live loads may grow on a truss with bars that cannot push, and the forces on the way."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.loading.arrangement import worst_arrangement
from models.loading.live import Pattern
from models.rating.slack_family import Family, SlackLoads
from models.rating.slack_items import Question
from models.rating.slack_search import Worst, worst
from models.statics.loss import NECESSARY
from models.statics.slack_bars import NO_EQUILIBRIUM, Mask

_BEFORE: Final = 1.0 - 1e-6
"""Just before a limit there has to be equilibrium."""

_MOST_LOOKS: Final = 4
_ROUNDING: Final = 1e-10


@dataclass(frozen=True, eq=False)
class Ends:
    """What ends equilibrium: sums of scaled forces, as if every bar could push, that may not be negative.

    Parameters
    ----------
    weights : (n, t) of the bars that cannot push.
    """

    weights: Array

    def multiples(self, loads: SlackLoads, pattern: Pattern) -> tuple[Array, Array]:
        """Of each condition: at which multiple of a live load it fails, and the arrangement; (n,) and (n, d)."""
        among = loads.truss.among
        lines = -self.weights @ loads.deck[:, among].T
        dead = self.weights @ loads.dead[:, among].T
        size = np.abs(self.weights) @ np.abs(loads.deck[:, among]).max(axis=0, initial=0.0)
        lines[np.abs(lines) <= loads.noise * size[:, None]] = 0.0
        heavy = np.abs(self.weights) @ np.abs(loads.dead[:, among]).max(axis=0, initial=0.0)
        room = np.where(np.abs(dead) <= loads.noise * heavy[:, None], 0.0, dead).min(axis=1)
        extreme = pattern.extremes(lines)[0]
        found = np.divide(np.maximum(room, 0.0), extreme, out=np.full_like(extreme, np.inf), where=extreme > 0.0)
        return np.where(room < 0.0, 0.0, found), worst_arrangement(pattern, lines)

    def failed(self, loads: SlackLoads, whole: Array) -> bool:
        """Whether a load fails a condition; (m,) scaled forces as if every bar could push."""
        size = max(loads.noise, _ROUNDING) * np.abs(whole).max(initial=0.0) * np.abs(self.weights).sum(axis=1)
        return bool((self.weights @ whole[loads.truss.among] < -size).any())

    def first(self, loads: SlackLoads, pattern: Pattern) -> tuple[float, Array]:
        """The multiple at which equilibrium ends, infinite where it does not, and the arrangement of that."""
        multiples, places = self.multiples(loads, pattern)
        if not len(multiples):
            return np.inf, np.zeros(len(loads.deck))
        number = int(multiples.argmin())
        return float(multiples[number]), places[number]

    def with_more(self, conditions: Sequence[Array]) -> Ends:
        """With further conditions."""
        return Ends(np.vstack([self.weights, *conditions])) if len(conditions) else self


def necessary_bars(loads: SlackLoads) -> Ends:
    """Bars without which the truss is a mechanism may never be pushed."""
    among = loads.truss.among
    alone = loads.truss.projector[among, among] < NECESSARY
    return Ends(np.eye(len(among))[alone])


def limit(family: Family, ends: Ends, pattern: Pattern, question: Question, enough: Array) -> tuple[Worst, Ends]:
    """Multiples of a live load at which bars reach their capacity.

    Returns
    -------
    What was found; and the conditions of equilibrium, with those that were met on the way.
    """
    found = worst(family, pattern, question, enough)
    for _ in range(_MOST_LOOKS):
        more = _conditions_met(family, found, *ends.multiples(family.loads, pattern))
        if not more:
            break
        ends = ends.with_more(more)
    return found, ends


def _conditions_met(family: Family, found: Worst, ends: Array, places: Array) -> tuple[Array, ...]:
    """What else ends equilibrium under arrangements that seem to govern, just before they would."""
    end = float(ends.min(initial=np.inf))
    chosen = np.isfinite(found.merit) & ~found.attained & (found.merit > 0.0)
    multiple = np.minimum(found.merit[chosen], end) * _BEFORE
    live = [multiple[:, None] * found.arrangement[chosen]]
    dead = [family.loads.dead[found.case[chosen]]]
    if np.isfinite(end):
        live += [end * _BEFORE * places] * len(family.loads.dead)
        dead += [np.repeat(alone[None], len(places), axis=0) for alone in family.loads.dead]
    whole = np.concatenate(dead) + np.concatenate(live) @ family.loads.deck
    return family.loads.truss.states(whole).conditions


def forces_under(loads: SlackLoads, live: Array, base: Array) -> tuple[Array, Mask, NDArray[np.bool_]]:
    """Forces of all bars under live loads beside a dead load.

    Parameters
    ----------
    live : (q, d) forces on the deck joints, N. base : (m,) scaled forces of the dead load as if every bar could push.

    Returns
    -------
    (q, m) N; (q, t) what is slack; (q,) whether there is equilibrium.
    """
    states = loads.truss.states(base + live @ loads.deck)
    return states.forces * loads.scale, states.slack, states.verdict != NO_EQUILIBRIUM
