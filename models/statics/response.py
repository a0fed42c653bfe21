"""Forces of a truss that stands: one orthogonal factorisation, all right-hand sides.

With S = diag(sqrt(EA/L)) and (A S)^T = Q R, the bar forces under joint loads p are N = -S Q R^-T p. The
factorisation of A S keeps its accuracy on flat joints where the stiffness matrix A S^2 A^T has lost it.
In a determinate truss the forces do not depend on S, and S = I.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.statics.geometry import Geometry, equilibrium_matrix


@dataclass(frozen=True, eq=False)
class Response:
    """Forces and reactions of a truss under unit loads.

    Parameters
    ----------
    forces : (m, 2j) tension in each bar under a unit force along each degree of freedom.
    reactions : (2j, 2j) reaction along each held degree of freedom, zero rows elsewhere.
    redundancy : (m,) the part of a bar's own elongation that the rest of the truss takes back: 0 for a
        bar without which it moves, summing to the degree of redundancy (Bahndorf 1991).
    projector : (m, m) of the states of self-stress, over the scaled forces S^-1 N.
    scale : (m,) the diagonal of S.
    noise : the rounding error to expect, as a part of the largest entry of ``forces``.
    """

    forces: Array
    reactions: Array
    redundancy: Array
    projector: Array
    scale: Array
    noise: float


def respond(geometry: Geometry, condition: float, flexibility: Array | None = None) -> Response:
    """Factorise a truss that stands.

    Parameters
    ----------
    geometry : a truss that `stability.judge` found to stand.
    condition : of its equilibrium matrix, for the rounding error to expect.
    flexibility : (m,) elongation of each bar under unit tension, the integral of dx/(E A), m/N. None for
        a determinate truss.
    """
    free = ~geometry.held
    everything = equilibrium_matrix(geometry)
    bars, equations = len(geometry.bars), int(free.sum())
    scale = np.ones(bars) if flexibility is None else np.sqrt(flexibility.min() / flexibility)
    orthogonal, triangle = np.linalg.qr((everything[free] * scale).T, mode="complete")
    inverse = np.linalg.solve(triangle[:equations], np.eye(equations))
    forces = np.zeros((bars, 2 * len(geometry.joints)))
    forces[:, free] = -(scale[:, None] * orthogonal[:, :equations]) @ inverse.T
    self_stress = orthogonal[:, equations:]
    return Response(
        forces=forces,
        reactions=_reactions(everything, forces, geometry.held),
        redundancy=(self_stress**2).sum(axis=1),
        projector=self_stress @ self_stress.T,
        scale=scale,
        noise=64 * float(np.finfo(float).eps) * condition,
    )


def _reactions(everything: Array, forces: Array, held: NDArray[np.bool_]) -> Array:
    """What the supports give so that the held joints are in equilibrium too, under each unit force."""
    reactions = -(everything @ forces)
    reactions -= np.eye(len(held))
    reactions[~held] = 0.0
    return reactions
