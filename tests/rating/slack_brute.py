"""Rating factors of trusses with slack bars by trying: many arrangements of a crowd, many multiples of each.

Nothing is looked for; every stretch of deck whose ends lie at parts of a panel is loaded, and its complement too, at a
row of multiples.
"""

from __future__ import annotations

import numpy as np
from plane.crossed import Crossed

from models.calculation import Array
from models.rating.slack_family import SlackLoads, Supports
from models.statics.slack_bars import EQUILIBRIUM, scaled


def loads_of(sample: Crossed, dead: Array) -> SlackLoads:
    """The truss under downward forces (c, j) on its joints, N, as dead load of several cases."""
    response = sample.response
    down = -scaled(response)[:, 1::2]
    none = np.zeros((0, len(sample.geometry.bars)))
    supports = Supports(none, np.zeros((len(sample.geometry.deck), 0)), np.zeros((len(dead), 0)))
    rows = dead @ down.T
    return SlackLoads(
        sample.slack, response.scale, down[:, sample.geometry.deck].T.copy(), rows, rows[:1], supports, 1e-12
    )


def stretches(panels: Array, parts: int) -> Array:
    """(n, d) forces on the deck joints of a unit line load on every stretch, and on all of the deck but it.

    Parameters
    ----------
    parts : of a panel at which a stretch may begin and end.
    """
    cells = []
    for panel, length in enumerate(panels):
        for part in range(parts):
            start, end = part / parts, (part + 1) / parts
            forces = np.zeros(len(panels) + 1)
            forces[panel + 1] = length * (end**2 - start**2) / 2
            forces[panel] = length * (end - start) - forces[panel + 1]
            cells.append(forces)
    up_to = np.vstack([np.zeros(len(panels) + 1), np.cumsum(cells, axis=0)])
    first, last = np.triu_indices(len(up_to), 1)
    loaded = up_to[last] - up_to[first]
    found: Array = np.unique(np.vstack([loaded, up_to[-1] - loaded]).round(12), axis=0)
    return found


def factors_by_trying(loads: SlackLoads, arrangements: Array, capacity: Array, multiples: Array) -> Array:
    """(2, m) the first multiple at which some arrangement brings a bar to its capacity in tension and in compression.

    Forces along a row of multiples of one arrangement go in straight pieces; where one passes the capacity between two
    multiples, the place is found by a straight line. Infinite where none does.
    """
    best = np.full(capacity.shape, np.inf)
    for dead in loads.dead:
        before: Array | None = None
        for number, multiple in enumerate(multiples):
            states = loads.truss.states(dead + multiple * arrangements @ loads.deck)
            forces = states.forces * loads.scale
            forces[states.verdict != EQUILIBRIUM] = np.nan
            now = np.stack([forces, -forces])
            if before is None:
                best = np.where((now >= capacity[:, None]).any(axis=1), np.minimum(best, multiple), best)
            else:
                step = multiple - multiples[number - 1]
                passes = (before < capacity[:, None]) & (now >= capacity[:, None])
                rise = np.where(passes, now - before, 1.0)
                at = multiples[number - 1] + step * (capacity[:, None] - before) / rise
                best = np.minimum(best, np.where(passes, at, np.inf).min(axis=1))
            before = now
    return best


def end_by_trying(loads: SlackLoads, arrangements: Array, multiples: Array) -> tuple[float, float]:
    """The last multiple at which every arrangement has equilibrium, and the first at which one has none."""
    last = 0.0
    for multiple in multiples:
        for dead in loads.dead:
            if (loads.truss.states(dead + multiple * arrangements @ loads.deck).verdict != EQUILIBRIUM).any():
                return last, float(multiple)
        last = float(multiple)
    return last, np.inf
