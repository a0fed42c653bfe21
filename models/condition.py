"""The fold of what was recorded about a bar to its condition and its plates along the bar."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

import numpy as np
from numpy.typing import NDArray

from models.finding import Finding
from models.journal import Bow, Crack

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


@dataclass(frozen=True, eq=False)
class BarCondition:
    """All that is known about one bar on the day of the last visit.

    Parameters
    ----------
    section, material : names, after any replacement.
    state : last state on record, ``good`` to ``severe``, or None; ``state_visit`` its visit's index.
    seen : whether any entry of the last visit counts as seen.
    strength : the profile that decides resistance: a reading without extent holds over one section
        depth to each side.
    stiff, soft : the profiles that decide flexibility: a reading without extent covers no length in
        ``stiff`` and the whole bar in ``soft``; the same object where there is no such reading.
    findings : with truss and bar filled in.
    """

    truss: str
    bar: str
    section: str
    material: str
    state: str | None
    state_visit: int
    seen: bool
    severed: bool
    slack: bool
    crack: Crack | None
    bow: Bow | None
    strength: Profile
    stiff: Profile
    soft: Profile
    has_reading: bool
    has_estimate: bool
    findings: tuple[Finding, ...] = ()

    @property
    def known(self) -> Literal["not seen", "partly measured", "estimated", "assumed"]:
        """How the bar is known as a whole; `rating` raises it to ``measured`` where that holds."""
        if not self.seen:
            return "not seen"
        if self.has_reading:
            return "partly measured"
        return "estimated" if self.has_estimate else "assumed"
