"""Whether a truss stands at all: what the rank of its equilibrium matrix says, and what moves if not.

Counting bars and reactions is not enough: a truss of degree 0 can still move (Pellegrino & Calladine,
"Matrix analysis of statically and kinematically indeterminate frameworks", 1986). The rank is taken from
the singular values of the equilibrium matrix, never from the stiffness matrix, whose condition grows with
the number of panels of a sound truss.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final, Literal

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.statics.geometry import Geometry, equilibrium_matrix

Verdict = Literal["determinate", "redundant", "mechanism", "nearly a mechanism"]

RANK_TOLERANCE: Final = 1e-10
"""Singular values below this part of the largest one count as zero."""

WORST_CONDITION: Final = 1e8
"""Above this condition number of the equilibrium matrix forces are not worth printing."""

_STILL: Final = 1e-6
"""A joint moves if it takes more than this part of the largest motion."""


@dataclass(frozen=True, eq=False)
class Stability:
    """What the geometry of a truss says before any load.

    Parameters
    ----------
    mechanisms : number of independent motions that stretch no bar.
    self_stress : number of independent states of force without load.
    condition : ratio of the largest to the least singular value; infinite for a mechanism.
    moving : (j,) True for joints that move, of a mechanism or nearly one.
    loose : (m,) True for bars that join a moving joint to a still one.
    """

    verdict: Verdict
    mechanisms: int
    self_stress: int
    condition: float
    moving: NDArray[np.bool_]
    loose: NDArray[np.bool_]

    @property
    def carries(self) -> bool:
        """Whether there are forces at all."""
        return self.verdict in ("determinate", "redundant")


def judge(geometry: Geometry) -> Stability:
    """Rank, mechanisms and condition of a truss, and which joints would move."""
    free = ~geometry.held
    matrix = equilibrium_matrix(geometry)[free]
    left, values, _ = np.linalg.svd(matrix)
    equations, bars = matrix.shape
    largest = values[0] if len(values) else 0.0
    rank = int((values > RANK_TOLERANCE * largest).sum())
    mechanisms, self_stress = equations - rank, bars - rank
    if mechanisms:
        return Stability("mechanism", mechanisms, self_stress, np.inf, *motion(geometry, left[:, rank:]))
    condition = float(largest / values[-1]) if len(values) else 1.0
    if condition > WORST_CONDITION:
        return Stability("nearly a mechanism", 0, self_stress, condition, *motion(geometry, left[:, -1:]))
    still = np.zeros(len(geometry.joints), bool), np.zeros(bars, bool)
    return Stability("redundant" if self_stress else "determinate", 0, self_stress, condition, *still)


def motion(geometry: Geometry, modes: Array) -> tuple[NDArray[np.bool_], NDArray[np.bool_]]:
    """Which joints move, and which bars join a moving joint to a still one.

    Parameters
    ----------
    modes : (free degrees of freedom, k) motions.
    """
    displacement = np.zeros((2 * len(geometry.joints), modes.shape[1]))
    displacement[~geometry.held] = modes
    size = np.sqrt((displacement.reshape(len(geometry.joints), -1) ** 2).sum(axis=1))
    moving = size > _STILL * size.max(initial=0.0)
    return moving, moving[geometry.ends].sum(axis=1) == 1
