"""Forces of one truss in one state of its bars: dead load, every live load at its worst, reactions."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.loading.dead import bar_weights, own_weight_on_joints
from models.loading.live import CROWDS
from models.rating.fitted import Stock
from models.rating.prepare import PreparedTruss, Standing
from models.statics.imposed import imposed_forces, imposed_reactions
from models.statics.response import Response


@dataclass(frozen=True, eq=False)
class Answer:
    """What a truss that stands does under its loads.

    Numbers count the bars that are in (m of them); forces are unfactored, N, tension positive.

    Parameters
    ----------
    dead : (2 + k, m) components and wearing, then what each imposed change brings about.
    ordinates : (m, d) influence ordinates at the deck joints.
    loads : names, in order. live : (loads, 2, m) largest tension, and largest compression (negative).
    supports : joints. support_dead : (2 + k, s). support_live : (loads, s) the least (most lifting) reaction.
    displacement : the largest under dead load and a full crowd, m.
    flexibility : (m,) elongation of each bar under unit tension, m/N; None where forces do not superpose.
    """

    standing: Standing
    response: Response
    dead: Array
    ordinates: Array
    loads: tuple[str, ...]
    live: Array
    supports: NDArray[np.int64]
    support_dead: Array
    support_live: Array
    displacement: float
    flexibility: Array | None = None


def joint_dead_load(prepared: PreparedTruss, stock: Stock) -> Array:
    """(2, j) downward dead load on each joint, components and wearing, N."""
    weights = bar_weights(stock.area, stock.density, prepared.geometry.lengths, prepared.allowance)
    own = own_weight_on_joints(prepared.geometry, weights)
    load: Array = prepared.deck_load + np.array([own, np.zeros_like(own)])
    return load


def solve(prepared: PreparedTruss, standing: Standing, stock: Stock, flexibility: Array) -> Answer:
    """Forces of a truss that stands.

    Parameters
    ----------
    flexibility : (all bars,) elongation under unit tension, m/N.
    """
    response = standing.respond(flexibility)
    down = -response.forces[:, 1::2]
    joint_load = joint_dead_load(prepared, stock)
    dead = _without_noise(joint_load @ down.T, response.noise)
    ordinates = _without_noise(down[:, prepared.geometry.deck].T, response.noise).T
    supports = np.flatnonzero(standing.geometry.held[1::2])
    lift = -response.reactions[1::2, 1::2][supports]
    support_dead = joint_load @ lift.T
    if len(prepared.misfits):
        locked = imposed_forces(response, flexibility[standing.kept], prepared.misfits[:, standing.kept])
        dead = np.concatenate([dead, locked])
        held = imposed_reactions(standing.geometry, locked)[:, 1::2][:, supports]
        support_dead = np.concatenate([support_dead, held])
    loads = tuple(name for name, pattern in prepared.patterns.items() if pattern is not None)
    rows = np.concatenate([ordinates, lift[:, prepared.geometry.deck]])
    found = np.array([pattern.extremes(rows) for pattern in prepared.patterns.values() if pattern is not None])
    found = found.reshape(len(loads), 2, len(rows)) + 0.0  # no negative zeros
    bars = len(ordinates)
    return Answer(
        standing=standing,
        response=response,
        dead=dead,
        ordinates=ordinates,
        loads=loads,
        live=found[:, :, :bars],
        supports=supports,
        support_dead=support_dead,
        support_live=found[:, 1, bars:],
        displacement=largest_displacement(prepared, response, joint_load.sum(axis=0), flexibility[standing.kept]),
        flexibility=np.where(np.isfinite(flexibility), flexibility, 0.0)[standing.kept],
    )


def _without_noise(force: Array, noise: float) -> Array:
    """Forces that are nothing but rounding error become zero, so that no rating factor rests on them.

    Parameters
    ----------
    force : (cases, m); small is what is below the error to expect of the largest force in the truss.
    """
    return np.where(np.abs(force) <= noise * np.abs(force).max(initial=0.0), 0.0, force)


def full_crowd(prepared: PreparedTruss) -> Array:
    """(d,) downward force on each deck joint of the heaviest crowd on the whole deck, N."""
    crowds = [pattern.everywhere for pattern in prepared.patterns.values() if isinstance(pattern, CROWDS)]
    load: Array = max(crowds, default=0.0) * prepared.tributary
    return load


def largest_displacement(prepared: PreparedTruss, response: Response, dead: Array, flexibility: Array) -> float:
    """Largest elastic displacement of a joint under dead load and a crowd on the whole deck, m (virtual work)."""
    down = dead.copy()
    down[prepared.geometry.deck] += full_crowd(prepared)
    forces = -response.forces[:, 1::2] @ down
    finite = np.where(np.isfinite(flexibility), flexibility, 0.0)
    movement = (response.forces.T @ (finite * forces)).reshape(-1, 2)
    return float(np.hypot(*movement.T).max(initial=0.0))
