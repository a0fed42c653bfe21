"""Least squares with unknowns that may not be negative, and the least distance to a set of half spaces.

References
----------
C. L. Lawson and R. J. Hanson, "Solving Least Squares Problems", Prentice-Hall 1974, chapter 23, sections 3 and 4.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array

_NEGLIGIBLE: Final = 1e-12
"""Gradients below this part of the largest possible one are rounding."""

_NO_SUCH_POINT: Final = 1e-10
"""A sum of the half spaces that is shorter than this, for its multipliers, shows that they have no common point."""


def nonnegative_least_squares(matrix: Array, right: Array) -> Array | None:
    """Minimise |matrix x - right| over x >= 0.

    Parameters
    ----------
    matrix : (r, c). right : (r,).

    Returns
    -------
    (c,), or None where the search does not end (which rounding alone can cause).
    """
    count = matrix.shape[1]
    solution: Array = np.zeros(count)
    free = np.zeros(count, bool)
    negligible = _NEGLIGIBLE * float(np.linalg.norm(matrix) * np.linalg.norm(right))
    for _ in range(3 * count + 10):
        gradient = np.where(free, -np.inf, matrix.T @ (right - matrix @ solution))
        if free.all() or gradient.max() <= negligible:
            return solution
        free[int(gradient.argmax())] = True
        solution = _back_to_nonnegative(matrix, right, solution, free)
    return None


def _back_to_nonnegative(matrix: Array, right: Array, solution: Array, free: NDArray[np.bool_]) -> Array:
    """Solve for the free unknowns; those that would turn negative on the way are held at zero again."""
    for _ in range(len(free) + 1):
        trial = np.zeros_like(solution)
        trial[free] = np.linalg.lstsq(matrix[:, free], right, rcond=None)[0]
        blocking = free & (trial <= 0.0)
        if not blocking.any():
            return trial
        reach = np.where(blocking, solution, np.inf)
        step = reach / np.where(blocking, solution - trial, 1.0)
        shortest = float(np.nan_to_num(step, nan=0.0, posinf=np.inf).min())
        solution = solution + shortest * (trial - solution)
        free &= ~(blocking & (solution <= _NEGLIGIBLE * np.abs(solution).max(initial=0.0)))
        solution[~free] = 0.0
    return solution


@dataclass(frozen=True, eq=False)
class LeastDistance:
    """The point of a set of half spaces that is nearest to the origin, by its multipliers.

    Parameters
    ----------
    multipliers : (c,) not negative; the point is matrix^T multipliers. Where there is no such point: a combination of
        the half spaces that no point satisfies.
    exists : whether the half spaces have a common point.
    """

    multipliers: Array
    exists: bool


def least_distance(matrix: Array, right: Array) -> LeastDistance | None:
    """Minimise |z| over matrix z >= right.

    Parameters
    ----------
    matrix : (c, n). right : (c,), of the order of one.

    Returns
    -------
    None where the search does not end.
    """
    stacked = np.vstack([matrix.T, right])
    target = np.zeros(len(stacked))
    target[-1] = 1.0
    found = nonnegative_least_squares(stacked, target)
    if found is None:
        return None
    size = float(np.linalg.norm(found))
    if np.linalg.norm(matrix.T @ found) <= _NO_SUCH_POINT * size:
        reached = float(right @ found)
        return LeastDistance(found, exists=reached <= _NO_SUCH_POINT * size)
    return LeastDistance(found / (1.0 - float(right @ found)), exists=True)
