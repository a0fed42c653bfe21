"""The plane pin-jointed truss as arrays: where its joints stand, what its bars join, what is held."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from models.bridge import Truss
from models.calculation import Array


@dataclass(frozen=True, eq=False)
class Geometry:
    """Joints, bars and supports of one truss.

    Degrees of freedom are numbered (x, y) by joint, in the order of the joints.

    Parameters
    ----------
    joints, bars : names, (j) and (m).
    coordinates : (j, 2), m; x along the bridge, y up.
    ends : (m, 2) joint numbers of each bar's start and end.
    held : (2j,) True where a support holds the joint: a pin both ways, a roller upward.
    deck : (d,) joint numbers of the deck joints from one end to the other.
    """

    joints: tuple[str, ...]
    bars: tuple[str, ...]
    coordinates: Array
    ends: NDArray[np.int64]
    held: NDArray[np.bool_]
    deck: NDArray[np.int64]

    @cached_property
    def lengths(self) -> Array:
        """Length of each bar, (m,), m."""
        along, up = (self.coordinates[self.ends[:, 1]] - self.coordinates[self.ends[:, 0]]).T
        lengths: Array = np.hypot(along, up)
        return lengths

    @cached_property
    def degree(self) -> int:
        """M + r - 2j (Maxwell 1864): what counting alone says of the degree of redundancy."""
        return len(self.bars) + int(self.held.sum()) - 2 * len(self.joints)

    @cached_property
    def span(self) -> float:
        """Distance between the outermost supports, or of all joints where there are not two, m."""
        supported = np.unique(np.flatnonzero(self.held) // 2)
        x = self.coordinates[supported if len(supported) > 1 else slice(None), 0]
        return float(np.ptp(x))

    def keeping(self, bars: Sequence[int] | NDArray[np.int64]) -> Geometry:
        """The same truss with only the bars of these numbers."""
        names = tuple(self.bars[number] for number in bars)
        return Geometry(self.joints, names, self.coordinates, self.ends[np.asarray(bars, int)], self.held, self.deck)


def geometry_of(truss: Truss) -> Geometry:
    """A truss of a bridge as arrays."""
    number = {joint: index for index, joint in enumerate(truss.joints)}
    held = np.zeros(2 * len(number), bool)
    for joint, support in truss.supports.items():
        held[2 * number[joint]] = support == "pin"
        held[2 * number[joint] + 1] = True
    return Geometry(
        joints=tuple(truss.joints),
        bars=tuple(bar.id for bar in truss.bars),
        coordinates=np.array([[x.si, y.si] for x, y in truss.joints.values()]).reshape(-1, 2),
        ends=np.array([[number[bar.start], number[bar.end]] for bar in truss.bars], int).reshape(-1, 2),
        held=held,
        deck=np.array([number[joint] for joint in truss.deck_joints], int),
    )


def equilibrium_matrix(geometry: Geometry) -> Array:
    """The matrix A of joint equilibrium, A N + p = 0, over all degrees of freedom.

    Returns
    -------
    (2j, m), no unit. The column of bar a-b holds the unit vector from a to b at a, and the opposite at b,
    so that a tension pulls both joints towards each other. Rows of held degrees of freedom give the
    reactions.
    """
    start, end = geometry.ends.T
    unit = (geometry.coordinates[end] - geometry.coordinates[start]) / geometry.lengths[:, None]
    matrix = np.zeros((2 * len(geometry.joints), len(geometry.bars)))
    columns = np.arange(len(geometry.bars))
    for axis in (0, 1):
        matrix[2 * start + axis, columns] = unit[:, axis]
        matrix[2 * end + axis, columns] = -unit[:, axis]
    return matrix
