"""One bar gone: every single loss from the factorisation of the whole truss.

With Z the orthonormal states of self-stress of the scaled forces n = S^-1 N, taking bar i away changes
them to n_j - (Z Z^T)_ji n_i / r_i, where r_i = (Z Z^T)_ii is the bar's redundancy (Bahndorf 1991; von
Scheven, Ramm and Bischoff 2021). A bar is necessary where r_i is zero.
"""

from __future__ import annotations

from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.statics.response import Response

NECESSARY: Final = 1e-9
"""A bar whose row of Z is shorter than this has nothing to fall back on."""


def necessary(response: Response) -> NDArray[np.bool_]:
    """(m,) True for the bars without which the truss is a mechanism."""
    return response.redundancy < NECESSARY**2


def transfer(response: Response) -> Array:
    """How the force of each lost bar goes to the others.

    Returns
    -------
    (m, m): entry (i, j) times the force that bar i had is what bar j gains when bar i goes; -1 on the
    diagonal, zero rows for necessary bars.
    """
    gone = ~necessary(response)
    divisor = np.where(gone, response.redundancy, 1.0)
    shared = response.projector * response.scale[None, :] / (response.scale * divisor)[:, None]
    return np.where(gone[:, None], -shared, 0.0)
