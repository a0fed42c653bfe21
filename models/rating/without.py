"""What the other bars of a truss still carry when one bar goes: every single loss at once."""

from __future__ import annotations

import numpy as np

from models.calculation import Array
from models.rating.answer import Answer
from models.rating.factor import rating_factors
from models.rating.prepare import PreparedTruss
from models.resistance.protocol import Basis
from models.statics.loss import necessary, transfer


def factors_without(basis: Basis, prepared: PreparedTruss, answer: Answer, capacity: Array, gamma: Array) -> Array:
    """Lowest rating factor at the upper level of the bars that remain, for each bar lost.

    Parameters
    ----------
    capacity : (levels, 2, m) of the bars that are in, N. gamma : (levels, loads) live load factors.

    Returns
    -------
    (m,): NaN where the truss becomes a mechanism, infinite where no live load acts on what remains.
    """
    bars = len(answer.ordinates)
    gone = necessary(answer.response)
    if gone.all():
        return np.full(bars, np.nan)
    lost = np.flatnonzero(~gone)
    gain = transfer(answer.response)[lost]
    dead = answer.dead[:, None, :] + gain * answer.dead[:, lost, None]
    ordinates = answer.ordinates + gain[:, :, None] * answer.ordinates[lost][:, None, :]
    size = np.abs(answer.ordinates).max(initial=0.0) * np.abs(gain).max(axis=1, initial=1.0)
    ordinates[np.abs(ordinates) <= (answer.response.noise * size)[:, None, None]] = 0.0
    live = np.array([pattern.extremes(ordinates) for pattern in prepared.patterns.values() if pattern is not None])
    live = live.reshape(len(answer.loads), 2, len(lost), bars)
    lowest = rating_factors(basis, capacity, dead, live, gamma).lowest[-1]
    lowest[np.arange(len(lost)), lost] = np.inf
    found = np.full(bars, np.nan)
    found[lost] = lowest.min(axis=1)
    return found
