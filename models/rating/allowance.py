"""Loss allowance: how much more of every plate, over the whole bar, may go before the rating factor is 1.

In a determinate truss the forces stay. In a redundant one a bar that thins sheds force: with redundancy r and
its stiffness scaled by a, its force under any load is scaled by a / (a (1 - r) + r), which follows from the
flexibility of the bar and of the rest of the truss in series. So nothing has to be solved again.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array, NoSheet
from models.rating.fitted import Stock
from models.rating.strength import Strength, member_of
from models.resistance.protocol import Basis
from models.section import properties

MOST: Final = 0.95
"""No larger loss is looked at."""

_PRECISION: Final = 1e-10


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

    The resistance follows the area, so a (1 - r) + r = demand/capacity at the limit, with a the area's part.
    """
    used = np.divide(demand, capacity, out=np.ones_like(demand), where=capacity > 0)
    shed = 1 - redundancy
    area = np.divide(used - redundancy, shed, out=np.zeros_like(used), where=shed > _PRECISION)
    return np.where(demand > 0, np.clip(area, 0.0, 1.0) ** (1 / stock.whole_bar_exponent), 0.0)


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

    def spare(part: Array) -> Array:
        found = properties(stack, thickness * np.repeat(part, repeats)[:, None])
        member = member_of(stock, owner, found, effective_lengths)
        resistance = np.minimum.reduceat(basis.resistances(member, NoSheet())[-1].flexural_buckling, first)
        area = part**exponent
        return factor[bars] * resistance * (area * (1 - shed) + shed) / area - demand[bars]

    least = np.full(len(bars), 1 - MOST)
    spare_at_least = spare(least)
    reaches = spare_at_least < 0
    found = find_root(spare, least, np.ones(len(bars)), spare_at_least, capacity[bars] - demand[bars])
    remaining[bars] = np.where(reaches, found, 0.0)
    return remaining


def find_root(function: Callable[[Array], Array], low: Array, high: Array, at_low: Array, at_high: Array) -> Array:
    """Roots of many rising functions at once, by bracketing and inverse quadratic interpolation.

    Parameters
    ----------
    function : (n,) -> (n,). low, high : (n,) brackets, with the values there. Where the signs at both ends are
        the same the answer has no meaning.

    References
    ----------
    Chandrupatla, "A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function
    without using derivatives", Advances in Engineering Software 28, 1997.
    """
    best, other, third = high.copy(), low.copy(), low.copy()
    f_best, f_other, f_third = at_high.copy(), at_low.copy(), at_low.copy()
    step = _first_step(f_best, f_other)
    for _ in range(60):
        trial = best + step * (other - best)
        f_trial = function(trial)
        same = np.sign(f_trial) == np.sign(f_best)
        third, f_third = np.where(same, best, other), np.where(same, f_best, f_other)
        other, f_other = np.where(same, other, best), np.where(same, f_other, f_best)
        best, f_best = trial, f_trial
        if (np.minimum(np.abs(other - best), np.where(f_best == 0, 0.0, 1.0)) <= _PRECISION).all():
            break
        step = _next_step(best, other, third, f_best, f_other, f_third)
    return np.where(np.abs(f_other) < np.abs(f_best), other, best)


def _first_step(f_best: Array, f_other: Array) -> Array:
    """Where the straight line through both ends crosses zero; the middle where it does not."""
    difference = f_best - f_other
    with np.errstate(divide="ignore", invalid="ignore"):
        step = np.where(difference != 0, f_best / difference, 0.5)
    return np.where((step > 0) & (step < 1), step, 0.5)


def _next_step(best: Array, other: Array, third: Array, f_best: Array, f_other: Array, f_third: Array) -> Array:
    """Inverse quadratic interpolation where it is sure to stay inside, bisection elsewhere."""
    with np.errstate(divide="ignore", invalid="ignore"):
        xi = (best - other) / (third - other)
        phi = (f_best - f_other) / (f_third - f_other)
        trusted: NDArray[np.bool_] = (phi**2 < xi) & ((1 - phi) ** 2 < 1 - xi)
        quadratic = f_best / (f_other - f_best) * f_third / (f_other - f_third) + (third - best) / (
            other - best
        ) * f_best / (f_third - f_best) * f_other / (f_third - f_other)
        closest = _PRECISION / np.abs(other - best)
    step = np.where(trusted & np.isfinite(quadratic), quadratic, 0.5)
    closest = np.minimum(np.nan_to_num(closest, nan=0.5, posinf=0.5), 0.5)
    return np.clip(step, closest, 1 - closest)
