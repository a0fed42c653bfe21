"""Loss allowance: how much more of every plate, over the whole bar, may go before the rating factor is 1.

In a determinate truss the forces stay. In a redundant one a bar that thins sheds force: with redundancy r and
its stiffness scaled by a, its force under any load is scaled by a / (a (1 - r) + r), which follows from the
flexibility of the bar and of the rest of the truss in series. So nothing has to be solved again.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

import numpy as np

from models.calculation import Array, NoSheet
from models.rating.fitted import Stock
from models.rating.strength import Strength, member_of
from models.resistance.protocol import Basis
from models.section import plates_of, properties

MOST: Final = 0.95
"""No larger loss is looked at."""

_PRECISION: Final = 1e-10
_MOST_STEPS: Final = 100
_HALVING: Final = 8
"""Every so many steps the bracket is halved: functions that rise late would creep otherwise."""


def loss_allowance(
    basis: Basis,
    stock: Stock,
    strength: Strength,
    effective_lengths: Array,
    factor: Array,
    demand: Array,
    redundancy: Array,
) -> Array:
    """The fraction of every plate's remaining thickness that could still go.

    Parameters
    ----------
    factor : (2, m) condition times system factor, in tension and compression.
    demand : (2, m) largest factored effect in each direction at the upper level, N.
    redundancy : (m,) of each bar, 0 in a determinate truss.

    Returns
    -------
    (m,): 0 where the capacity is exceeded already, infinite where even 95 % would not bring the rating
    factor to 1. Bars without a rating factor are the caller's to leave out.
    """
    capacity = factor * strength.resistance[-1]
    exceeded = (demand > capacity).any(axis=0)
    remaining = np.maximum(
        _tension(stock, capacity[0], demand[0], redundancy),
        _compression(basis, stock, strength, effective_lengths, factor[1], demand[1], capacity[1], redundancy),
    )
    allowance = np.where(remaining < 1 - MOST, np.inf, 1 - remaining)
    return np.where(exceeded, 0.0, allowance)


def _tension(stock: Stock, capacity: Array, demand: Array, redundancy: Array) -> Array:
    """Remaining part of the thickness at which tension governs; 0 where it never does.

    The resistance follows the area.
    """
    used = np.divide(demand, capacity, out=np.ones_like(demand), where=capacity > 0)
    area = _area_at_limit(used, redundancy)
    return np.where(demand > 0, area ** (1 / stock.whole_bar_exponent), 0.0)


def _compression(
    basis: Basis,
    stock: Stock,
    strength: Strength,
    effective_lengths: Array,
    factor: Array,
    demand: Array,
    capacity: Array,
    redundancy: Array,
) -> Array:
    """Remaining part of the thickness at which compression governs; 0 where it never does."""
    remaining = np.zeros(len(demand))
    bars = np.flatnonzero((demand > 0) & (demand <= capacity))
    if not len(bars):
        return remaining
    pieces = np.flatnonzero(np.isin(strength.pieces.owner, bars))
    owner = strength.pieces.owner[pieces]
    first = np.searchsorted(owner, bars)
    stack, thickness = strength.pieces.stack.take(pieces), strength.pieces.thickness[pieces]
    repeats = np.diff(np.append(first, len(owner)))
    exponent, shed = stock.whole_bar_exponent[bars], redundancy[bars]

    # In logarithms all that a strut bears is close to straight: it goes with the thickness while all of it counts, and
    # with its square where plates are slender.
    def spare(logarithm: Array) -> Array:
        part = np.exp(logarithm)
        left = thickness * np.repeat(part, repeats)[:, None]
        member = member_of(stock, owner, properties(stack, left), effective_lengths, plates_of(stack, left))
        resistance = np.minimum.reduceat(basis.resistances(member, NoSheet())[-1].flexural_buckling, first)
        area = part**exponent
        ratio = factor[bars] * resistance * (area * (1 - shed) + shed) / (area * demand[bars])
        return np.log(np.maximum(ratio, _PRECISION))

    # Thinner plates never raise the load over the area that a strut bears: neither the stress of its column, nor the
    # part of its area that counts times that stress. So the limit lies above the one of its area alone.
    used = demand[bars] / capacity[bars]
    low = np.clip(_area_at_limit(used, shed) ** (1 / exponent), 1 - MOST, 1.0)
    at_low = spare(np.log(low))
    found = np.exp(find_root(spare, np.log(low), np.zeros(len(bars)), at_low, -np.log(used)))
    remaining[bars] = np.where(at_low < 0, found, np.where(low > 1 - MOST, low, 0.0))
    return remaining


def _area_at_limit(used: Array, redundancy: Array) -> Array:
    """Remaining part a of the area at which a (1 - r) + r = demand/capacity; 0 where the bar sheds all it must."""
    shed = 1 - redundancy
    area = np.divide(used - redundancy, shed, out=np.zeros_like(used), where=shed > _PRECISION)
    return np.clip(area, 0.0, 1.0)


def find_root(function: Callable[[Array], Array], low: Array, high: Array, at_low: Array, at_high: Array) -> Array:
    """Roots of many continuous functions at once, by regula falsi with the end that stays brought down.

    Parameters
    ----------
    function : (n,) -> (n,), of the order of one. low, high : (n,) brackets, with the values there. Where the signs
        at both ends are the same the answer has no meaning.

    Returns
    -------
    (n,) places where the function is within 1e-10 of zero, or known to 1e-10.

    References
    ----------
    Anderson and Bjorck, "A new high order method of regula falsi type for computing a root of an equation", BIT 13,
    1973.
    """
    kept, f_kept, last, f_last = low, at_low, high, at_high
    for step in range(1, _MOST_STEPS + 1):
        slope = f_last - f_kept
        trial = last - np.divide(f_last * (last - kept), slope, out=np.zeros_like(last), where=slope != 0)
        trial = np.clip(trial, np.minimum(kept, last), np.maximum(kept, last))
        if step % _HALVING == 0:
            trial = np.where(np.abs(f_last) > _PRECISION, (kept + last) / 2, last)
        f_trial = function(trial)
        crossed = np.sign(f_trial) != np.sign(f_last)
        left = np.abs(trial - np.where(crossed, last, kept))
        if (np.minimum(np.abs(f_trial), left) <= _PRECISION).all():
            return trial
        ratio = 1 - np.divide(f_trial, f_last, out=np.ones_like(f_last), where=f_last != 0)
        brought_down = f_kept * np.where(ratio > 0, ratio, 0.5)
        kept, f_kept = np.where(crossed, last, kept), np.where(crossed, f_last, brought_down)
        last, f_last = trial, f_trial
    return last
