"""A truss that would stand if all its bars could push, and has no equilibrium under its own weight as they cannot."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.rating.answer import joint_dead_load
from models.rating.fitted import Stock
from models.rating.prepare import PreparedTruss, Standing
from models.statics.response import Response
from models.statics.slack_bars import EQUILIBRIUM, scaled, slack_truss
from models.statics.stability import Stability, motion


def standing_under_dead_load(prepared: PreparedTruss, standing: Standing, stock: Stock, flexibility: Array) -> Standing:
    """The truss with the verdict that dead load leads to: as before, or that it moves, and how.

    Parameters
    ----------
    flexibility : (all bars,) m/N; whether there is equilibrium does not depend on it.
    """
    cannot_push = prepared.tension_only[standing.kept]
    if not standing.stability.carries or not cannot_push.any():
        return standing
    response = standing.respond(flexibility)
    truss = slack_truss(response, cannot_push)
    down = joint_dead_load(prepared, stock).sum(axis=0)
    states = truss.states((-scaled(response)[:, 1::2] @ down)[None])
    if states.verdict[0] == EQUILIBRIUM:
        return standing
    return replace(standing, stability=_moves(standing, response, truss.among, states.conditions), response=None)


def _moves(
    standing: Standing, response: Response, among: NDArray[np.int64], conditions: tuple[Array, ...]
) -> Stability:
    """The motion in which no bar stretches and bars that cannot push shorten, unless rounding hides it."""
    before = standing.stability
    if not conditions:
        return replace(before, verdict="nearly a mechanism", condition=np.inf)
    held = standing.geometry.held
    displacement = (conditions[0] @ scaled(response)[among])[~held]
    moving, loose = motion(standing.geometry, displacement[:, None])
    return replace(before, verdict="mechanism", mechanisms=1, condition=np.inf, moving=moving, loose=loose)
