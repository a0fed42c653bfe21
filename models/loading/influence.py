"""Influence lines that are straight between deck joints: the area and the length of each of their signs."""

from __future__ import annotations

import numpy as np

from models.calculation import Array


def loaded_areas(ordinates: Array, panels: Array) -> tuple[Array, Array]:
    """Areas of the positive and of the negative part of influence lines.

    Parameters
    ----------
    ordinates : (..., d); panels : (d - 1,) distances between deck joints, m.

    Returns
    -------
    positive, negative : (...), m times the ordinate's unit; the second is negative or zero. Exact at zero
        crossings inside a panel: a straight line from a to b has the positive area
        (a+ + b+)^2 / (2 (|a| + |b|)) per unit length, a+ being max(a, 0).
    """
    both, above, below = _by_sign(ordinates)

    def area(ends: Array) -> Array:
        # The quotient first: it is at most 1, where the square of a tiny ordinate would vanish.
        areas: Array = (_part(ends, both) * ends * (panels / 2)).sum(axis=-1)
        return areas

    return area(above), -area(below)


def loaded_lengths(ordinates: Array, panels: Array) -> tuple[Array, Array]:
    """How much of each panel lies under the positive, and under the negative part of influence lines.

    Parameters
    ----------
    ordinates : (..., d); panels : (d - 1,), m.

    Returns
    -------
    positive, negative : (..., d - 1), m. A panel without influence at both ends counts for neither.
    """
    both, above, below = _by_sign(ordinates)
    return _part(above, both) * panels, _part(below, both) * panels


def _by_sign(ordinates: Array) -> tuple[Array, Array, Array]:
    """Sums over both ends of each panel: of the sizes, of what is above zero and of what is below."""
    size = np.abs(ordinates)
    above = np.maximum(ordinates, 0.0)
    below = above - ordinates
    return size[..., :-1] + size[..., 1:], above[..., :-1] + above[..., 1:], below[..., :-1] + below[..., 1:]


def _part(ends: Array, both: Array) -> Array:
    """The part of each panel under one sign: all, nothing, or up to the crossing."""
    parts: Array = np.divide(ends, both, out=np.zeros_like(both), where=both > 0.0)
    return parts
