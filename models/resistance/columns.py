"""Columns: the elastic critical load that all bases share, and the curves over it.

Every formula takes floats, arrays or the numbers of a hand check (`models.calculation`).
"""

from __future__ import annotations

import math
from typing import Final

import numpy as np

from models.calculation import Number, Traced, choose, least, root
from models.resistance.protocol import Member

ELASTIC_BELOW: Final = 0.44
"""Pe/Po below which a column buckles elastically (AASHTO LRFD 6.9.4.1.1, from memory)."""

_LEAST_LOAD: Final = 1e-250


def elastic_critical_load(member: Member) -> Number:
    """The load at which a pinned bar buckles elastically, about whichever axis it chooses, N.

    The lesser eigenvalue of pi^2 E [[Ih/Li^2, Ihv/(Li Lo)], [Ihv/(Li Lo), Iv/Lo^2]] with effective lengths Li in
    the plane of the truss and Lo out of it. Exact where Li = Lo or Ihv = 0; elsewhere a safe lower bound.
    """
    in_plane, out_of_plane = critical_loads(member)
    inside, outside = member.effective_length_in_plane, member.effective_length_out_of_plane
    coupling = math.pi**2 * member.E * member.inertia_product / (inside * outside)
    if isinstance(coupling, Traced) and not coupling.value:
        return least(in_plane, out_of_plane)
    return (in_plane + out_of_plane) / 2 - root(((in_plane - out_of_plane) / 2) ** 2 + coupling**2)


def critical_loads(member: Member) -> tuple[Number, Number]:
    """The elastic critical loads in the plane of the truss and out of it, N, as if neither took part in the other."""
    scale = math.pi**2 * member.E
    return (
        scale * member.inertia_horizontal / member.effective_length_in_plane**2,
        scale * member.inertia_vertical / member.effective_length_out_of_plane**2,
    )


def column_strength(yield_load: Number, critical_load: Number) -> Number:
    """Nominal resistance of a column all of whose section counts, N.

    Parameters
    ----------
    yield_load : Po, yield strength times area, N. critical_load : Pe, elastic critical load, N.

    References
    ----------
    AASHTO LRFD 6.9.4.1.1 (from memory); the same curve as AISC 360-22 E3, which was read.
    """
    inelastic = 0.658 ** _over(yield_load, critical_load) * yield_load
    return choose(critical_load, ">=", ELASTIC_BELOW * yield_load, inelastic, 0.877 * critical_load)


def slenderness(E: Number, area: Number, critical_load: Number) -> Number:
    """KL/r of the axis about which a bar buckles; 0 where no area is left.

    A load below 1e-250 N counts as that much, so that the square can still be written down.
    """
    if isinstance(critical_load, Traced):
        return math.pi * root(E * area / critical_load) if critical_load.value and area.value else 0.0 * area
    ratio = math.pi * np.sqrt(E * area / np.maximum(critical_load, _LEAST_LOAD))
    return np.where(area > 0, ratio, 0.0)


def _over(number: Number, divisor: Number) -> Number:
    """A quotient that no one uses where it is above 1/0.44; there it is bounded, so that nothing overflows."""
    if isinstance(divisor, Traced):
        return number / divisor if divisor.value else number
    bounded = np.maximum(divisor, number / 10)
    return number / np.where(bounded > 0, bounded, 1.0)
