"""What is asked of live loads on a truss with slack bars, and what is known on the way to the answer."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.rating.slack_family import Lines

_RIGHT: Final = 1e-9
"""A set is right where nothing that has to be positive is below minus this part of the largest."""

_SAME: Final = 1e-9
_NEVER: Final = 1e6
"""Multiples of a live load above this are those of rounding."""


@dataclass(frozen=True, eq=False)
class Question:
    """What is asked of a live load.

    Parameters
    ----------
    capacity : (2, m), N: at which multiple of the load is it reached? None: what is the largest force at a multiple?
    multiple : that multiple. overall : whether only the lowest of all bars is asked for.
    """

    capacity: Array | None
    multiple: float = 1.0
    overall: bool = False

    def room(self, direction: NDArray[np.int64], bar: NDArray[np.int64], force: Array) -> Array:
        """What is left for the live load."""
        return (0.0 if self.capacity is None else self.capacity[direction, bar]) - force

    def merit(self, room: Array, extreme: Array) -> Array:
        """What is sought at its least: the multiple at which the capacity is reached, or minus the force."""
        if self.capacity is None:
            return room - self.multiple * extreme
        nothing = np.where(room >= 0.0, np.inf, -np.inf)
        found = np.divide(room, extreme, out=nothing, where=extreme > 0.0)
        return np.where(found > _NEVER, np.inf, found)

    def least(self, merit: Array) -> Array:
        """(2, m) from where on nothing need be looked at: the lower of both directions where a multiple is asked."""
        if self.capacity is None:
            return merit
        return np.broadcast_to(merit.min() if self.overall else merit.min(axis=0), merit.shape).copy()

    def multiples(self, merit: Array) -> Array:
        """The multiple of the load under which the merit stands; none of it where it is never reached."""
        if self.capacity is None:
            return np.full_like(merit, self.multiple)
        return np.where(np.isfinite(merit), np.maximum(merit, 0.0), 0.0)


@dataclass(frozen=True, eq=False)
class Items:
    """Combinations of direction, set, dead load and bar, with their influence lines; all (n,) or (n, ...)."""

    direction: NDArray[np.int64]
    at_set: NDArray[np.int64]
    case: NDArray[np.int64]
    bar: NDArray[np.int64]
    line: Array
    dead: Array
    live: Array
    arrangement: Array
    merit: Array
    taut: Array
    right: NDArray[np.bool_]


def is_right(
    lines: Lines, case: NDArray[np.int64], multiple: Array, arrangement: Array, taut: Array, within: float = _RIGHT
) -> NDArray[np.bool_]:
    """Whether the set of each combination is right under a multiple of its arrangement."""
    by_dead, by_unit = lines.size
    size = by_dead[case] + multiple * by_unit * np.abs(arrangement).max(axis=-1, initial=0.0)
    found: NDArray[np.bool_] = taut.min(axis=1, initial=np.inf) >= -within * size
    return found


def best_known(items: Items, question: Question, enough: Array) -> Array:
    """(2, m) the least merit that some arrangement is known to bring about; of a multiple, in either direction."""
    best = enough.copy()
    right = items.right
    np.minimum.at(best, (items.direction[right], items.bar[right]), items.merit[right])
    return question.least(best)


def lies_below(merit: Array, limit: Array) -> NDArray[np.bool_]:
    """Whether merits lie below limits by more than rounding."""
    with np.errstate(invalid="ignore"):
        margin = np.where(np.isfinite(limit), _SAME * np.abs(limit), 0.0)
        found: NDArray[np.bool_] = merit < limit - margin
    return found
