"""Thickness along a bar, and the measurements that it rests on."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

NOMINAL, ESTIMATE, DOUBTFUL, READING = range(4)
"""What a plate's thickness rests on, per piece: the drawing, an estimated loss, a doubtful reading
(which may lower a thickness, never raise one), or an undoubted reading."""


@dataclass(frozen=True, eq=False)
class Profile:
    """Plate by plate thickness along a bar, in pieces of even section.

    Parameters
    ----------
    stations : (pieces + 1,) rising from 0 at the bar's start to 1 at its end.
    thickness : (pieces, plates) remaining thickness, m; the remaining diameter of a round bar.
    rests_on : (pieces, plates) of NOMINAL, ESTIMATE, DOUBTFUL, READING.
    cleaned : (pieces, plates) whether the reading was taken on cleaned steel.
    visit : (pieces, plates) index of the visit (in date order) that the value comes from; -1 for nominal.
    """

    stations: NDArray[np.float64]
    thickness: NDArray[np.float64]
    rests_on: NDArray[np.int8]
    cleaned: NDArray[np.bool_]
    visit: NDArray[np.int64]


@dataclass(frozen=True, slots=True)
class Measurement:
    """The readings of one entry on one plate at one station, taken together.

    Parameters
    ----------
    station : as used, cut to 0..1.
    mean, least, greatest : of the recorded thicknesses, m.
    used : what counts, m; 0 where any of them found a hole; None where nothing can be used.
    extent : length of bar that is like this, m, the one taken over from an earlier reading included.
    doubtful : kept, but it replaces nothing and never raises a thickness.
    replaced : a later sound reading near it stands in its place.
    entry, date, visit : where it comes from.
    """

    plate: str
    station: float
    mean: float
    least: float
    greatest: float
    used: float | None
    extent: float | None
    cleaned: bool
    doubtful: bool
    replaced: bool
    entry: str
    date: str
    visit: int
