"""The rating factor: what is left of a bar's capacity under dead load, over what a live load takes."""

from __future__ import annotations

from collections.abc import Collection, Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.resistance.protocol import Basis

_TIE = 1e-9

_SIGNS = np.array([1.0, -1.0])
"""Directions: tension, compression."""


def factored_dead(basis: Basis, dead: Array) -> Array:
    """Factored dead effect in each direction.

    Parameters
    ----------
    dead : (2 + k, ..., m) components and wearing, N, tension positive; then what each imposed change brings about.

    Returns
    -------
    (2, ..., m) in tension and in compression, N; each part takes the factor of its own sign in the
    direction that is checked, the lesser where it relieves. What is imposed takes the factor of components where it
    acts and counts for nothing where it relieves: creep or slip may have undone it (common practice, no source).
    """
    total = np.zeros_like(dead[:2])
    for part in dead[2:]:
        total += basis.components.greatest * np.maximum(_SIGNS.reshape(2, *([1] * part.ndim)) * part, 0.0)
    for part, factors in zip(dead[:2], (basis.components, basis.wearing), strict=True):
        for direction, sign in enumerate(_SIGNS):
            effect = sign * part
            total[direction] += np.where(effect > 0, factors.greatest, factors.least) * effect
    return total


def live_factors(basis: Basis, kinds: Sequence[Collection[str]]) -> Array:
    """Load factor of each live load at each level, (levels, loads).

    Parameters
    ----------
    kinds : of the loads that act together in each live load.
    """
    found = [[level.live_factor(of_load) for of_load in kinds] for level in basis.levels]
    return np.array(found).reshape(len(basis.levels), len(kinds))


@dataclass(frozen=True, eq=False)
class Factors:
    """Rating factors of the bars of one truss. Infinite where no live load acts that way.

    Parameters
    ----------
    lowest : (levels, ..., m) over directions and loads.
    direction, load : (..., m) what governs at the upper level; load is -1 where dead load alone exceeds the
        capacity, or where there is no factor.
    dead_exceeds : (2, ..., m) True where the factored dead effect exceeds the capacity.
    """

    lowest: Array
    direction: NDArray[np.int64]
    load: NDArray[np.int64]
    dead_exceeds: NDArray[np.bool_]


def rating_factors(basis: Basis, capacity: Array, dead: Array, live: Array, gamma: Array) -> Factors:
    """RF = (C - gDC DC - gDW DW) / (gLL LL), tension and compression apart, each live load by itself.

    Parameters
    ----------
    capacity : (levels, 2, m) factored resistance times condition and system factor, N.
    dead : (2 + k, ..., m), as for `factored_dead`. live : (loads, 2, ..., m) largest tension and largest
        compression (negative), N.
    gamma : (levels, loads) as `live_factors` gives them.

    References
    ----------
    AASHTO Manual for Bridge Evaluation 6A.4.2.1 (from memory).
    """
    demand = factored_dead(basis, dead)
    shaped = capacity.reshape(*capacity.shape[:2], *([1] * (dead.ndim - 2)), capacity.shape[-1])
    room = shaped - demand
    exceeds = room < 0
    size = live * _SIGNS.reshape(1, 2, *([1] * (live.ndim - 2)))
    gamma = gamma.reshape(*gamma.shape, *([1] * (live.ndim - 1)))
    with np.errstate(divide="ignore", invalid="ignore", over="ignore"):
        factors = room[:, None] / (gamma * size[None])
    factors = np.where(size[None] > 0, factors, np.inf)
    factors = np.where(exceeds[:, None], 0.0, factors)
    dead_alone = np.where(exceeds, 0.0, np.inf)[:, None]
    factors = np.concatenate([factors, dead_alone], axis=1)
    by_choice = factors.reshape(len(factors), -1, *factors.shape[3:])
    upper = by_choice[-1]
    lowest = by_choice.min(axis=1)
    choice = (upper <= lowest[-1] * (1 + _TIE)).argmax(axis=0)
    load, direction = np.divmod(choice, 2)
    no_load = exceeds[-1].any(axis=0) | np.isinf(lowest[-1])
    direction = np.where(exceeds[-1].any(axis=0), exceeds[-1].argmax(axis=0), direction)
    return Factors(lowest, direction, np.where(no_load, -1, load), exceeds[-1])


def demands(basis: Basis, dead: Array, live: Array, gamma: Array) -> Array:
    """The largest factored effect of dead and live load together.

    Parameters
    ----------
    dead : (2 + k, m). live : (loads, 2, m), as for `rating_factors`.
    gamma : (loads,) live load factors of the level that is looked at.

    Returns
    -------
    (2, m) in tension and in compression, N; dead load alone where no live load acts that way.
    """
    size = (gamma[:, None, None] * (live * _SIGNS[None, :, None])).max(axis=0, initial=0.0)
    total: Array = factored_dead(basis, dead) + size
    return total


def acts(basis: Basis, dead: Array, live: Array, gamma: Array) -> NDArray[np.bool_]:
    """Whether factored loads of any level pull a bar, and whether they push it: (2, m).

    Parameters
    ----------
    gamma : (levels, loads) as for `rating_factors`.
    """
    return demands(basis, dead, live, gamma.max(axis=0)) > 0.0
