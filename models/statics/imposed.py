"""Forces without loads: bars made too long or too short, changes of temperature, supports that moved.

In a determinate truss nothing resists such a change. In a redundant one the states of self-stress do: with S and the
projector P of the factorisation, and w how much too long each bar is for its place, N = -S P S w / f, where f is the
least flexibility, to which S refers.
"""

from __future__ import annotations

import numpy as np

from models.calculation import Array
from models.statics.geometry import Geometry, equilibrium_matrix
from models.statics.response import Response


def misfit_of_movement(geometry: Geometry, movement: Array) -> Array:
    """How much too long each bar becomes when supports move and all other joints stay.

    Parameters
    ----------
    movement : (..., 2j) of the held degrees of freedom, m; 0 elsewhere.

    Returns
    -------
    (..., m), m; negative where the bar would have to stretch.
    """
    misfit: Array = movement @ equilibrium_matrix(geometry)
    return misfit


def imposed_forces(response: Response, flexibility: Array, misfit: Array) -> Array:
    """Tension in each bar that misfits alone bring about.

    Parameters
    ----------
    flexibility : (m,) elongation under unit tension, m/N, as the response was made with.
    misfit : (k, m) how much too long each bar is for its place, m; negative for a bar made short.

    Returns
    -------
    (k, m), N. What is no more than rounding is zero.
    """
    wanted = response.scale * misfit / flexibility.min()
    forces = -(wanted @ response.projector) * response.scale
    rounding = response.noise * np.linalg.norm(wanted, axis=1, keepdims=True) * response.scale
    return np.where(np.abs(forces) <= rounding, 0.0, forces)


def imposed_reactions(geometry: Geometry, forces: Array) -> Array:
    """(k, 2j) reactions that hold bar forces (k, m) without loads, N; 0 where nothing is held."""
    return np.where(geometry.held, -(forces @ equilibrium_matrix(geometry).T), 0.0)
