"""Which plates are so slender that they buckle on their own before the section yields.

The limits stand beside the shapes; they are the ones between nonslender and slender elements in axial
compression of AISC 360 Table B4.1a, which AASHTO LRFD 6.9.4.2.1 shares (from memory).
"""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.section.stacked import Limits, Stack


def slender(stack: Stack, thickness: Array, E: Array | float, Fy: Array | float) -> NDArray[np.bool_]:
    """Which remaining plates exceed the nonslender limit in axial compression.

    Parameters
    ----------
    thickness : (n, P) remaining, m. E, Fy : (n,) or one value, Pa.

    Returns
    -------
    (n, P). A plate that is gone is not slender; flat and round bars have no limit.
    """
    ratio = np.broadcast_to(np.asarray(E, float) / np.asarray(Fy, float), (len(thickness),))[:, None]
    limits = stack.limits
    reach = thickness * np.where(limits.ring, ratio, np.sqrt(ratio)) * _welded_flange(limits, thickness)
    found: NDArray[np.bool_] = (thickness > 0) & (limits.breadth > reach)
    return found


def _welded_flange(limits: Limits, thickness: Array) -> Any:
    """The square root of kc = 4/sqrt(h/tw), from 0.35 to 0.76, for flanges welded to a web; else 1."""
    if not (limits.web >= 0).any():
        return 1.0
    web = np.take_along_axis(thickness, np.maximum(limits.web, 0), axis=1)
    kc = np.clip(4 * np.sqrt(web / np.where(limits.web_depth > 0, limits.web_depth, 1.0)), 0.35, 0.76)
    return np.where(limits.web >= 0, np.sqrt(kc), 1.0)
