"""One truss in one state: forces, rating factors, allowance, and what would remain without each bar."""

from __future__ import annotations

from dataclasses import dataclass, fields
from functools import reduce
from typing import Any

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.rating.allowance import loss_allowance
from models.rating.answer import Answer, solve
from models.rating.factor import acts, demands, live_factors, rating_factors
from models.rating.fitted import Stock
from models.rating.prepare import PreparedTruss, Standing
from models.rating.strength import Strength
from models.rating.without import factors_without
from models.resistance.protocol import Basis


@dataclass(frozen=True, eq=False)
class Task:
    """What stays the same while bars are taken in and out of one truss.

    Parameters
    ----------
    factor : (2, m) condition times system factor in tension and compression.
    """

    basis: Basis
    prepared: PreparedTruss
    stock: Stock
    strength: Strength
    factor: Array

    @property
    def capacity(self) -> Array:
        """(levels, 2, m) resistance times condition and system factor, N."""
        return self.strength.resistance * self.factor


@dataclass(frozen=True, eq=False)
class Figures:
    """The figures of all bars of a truss; NaN (or -1) for bars that were left out.

    Parameters
    ----------
    dead : (2, m). live : (loads, 2, m). demand : (2, m) factored, upper level, N.
    acts : (2, m) whether factored loads of any level pull it, and push it.
    lowest : (levels, m) rating factor, infinite where there is none.
    direction, load : (m,) what governs, as in `factor.Factors`. dead_exceeds : (2, m).
    allowance : (m,). without : (m,) NaN for a mechanism.
    """

    dead: Array
    live: Array
    demand: Array
    acts: NDArray[np.bool_]
    lowest: Array
    direction: NDArray[np.int64]
    load: NDArray[np.int64]
    dead_exceeds: NDArray[np.bool_]
    allowance: Array
    without: Array


@dataclass(frozen=True, eq=False)
class Solved:
    """A truss that stands, with its figures and the answers that they were taken from."""

    standing: Standing
    answers: tuple[Answer, ...]
    figures: Figures

    @property
    def loads(self) -> tuple[str, ...]:
        """Names of the live loads, in the order of the figures."""
        return self.answers[0].loads


def solve_state(task: Task, removed: frozenset[int], flexibilities: tuple[Array, ...]) -> Solved | None:
    """Solve a truss without some of its bars; of several flexibilities each bar keeps its worse answer.

    Parameters
    ----------
    flexibilities : (m,) each, elongation under unit tension; more than one where a loss has no known extent.

    Returns
    -------
    None where the truss does not stand.
    """
    standing = task.prepared.standing(removed)
    if not standing.stability.carries:
        return None
    if standing.response is not None:
        flexibilities = flexibilities[-1:]  # no force depends on it; the softer one tells deflections
    solved = [_solve_once(task, standing, flexibility) for flexibility in flexibilities]
    return reduce(worse, solved)


def worse(one: Solved, other: Solved) -> Solved:
    """Of two answers, bar by bar the one with the lower rating factor at the upper level.

    What a bar may still lose, and what remains without it, is the lower of both answers, whichever governs now; and
    a bar counts as pulled, or as pushed, where either answer says so.
    """
    figures = _worse(one.figures, other.figures)
    return Solved(one.standing, one.answers + other.answers, figures)


def _worse(one: Figures, other: Figures) -> Figures:
    first, second = (np.nan_to_num(figures.lowest[-1], nan=np.inf, posinf=np.inf) for figures in (one, other))
    known = np.isnan(one.lowest[-1]) & ~np.isnan(other.lowest[-1])
    take = (second < first) | known
    pairs = {entry.name: (getattr(one, entry.name), getattr(other, entry.name)) for entry in fields(Figures)}
    chosen = {name: np.where(take, b, a) for name, (a, b) in pairs.items()}
    chosen["acts"] = one.acts | other.acts
    chosen["allowance"] = np.fmin(one.allowance, other.allowance)
    out = np.isnan(other.lowest[-1])
    # NaN in `without` means a mechanism, which is lower than any factor; but not of a bar that one answer left out.
    chosen["without"] = np.where(
        out, one.without, np.where(known, other.without, np.minimum(one.without, other.without))
    )
    return Figures(**chosen)


def _solve_once(task: Task, standing: Standing, flexibility: Array) -> Solved:
    kept = standing.kept
    answer = solve(task.prepared, standing, task.stock, flexibility)
    capacity = task.capacity
    gamma = live_factors(task.basis, [task.prepared.kinds[load] for load in answer.loads])
    demand, whole = np.full((2, len(task.stock.area)), np.nan), len(task.stock.area)
    demand[:, kept] = demands(task.basis, answer.dead, answer.live, gamma[-1])
    redundancy = np.zeros(whole)
    redundancy[kept] = answer.response.redundancy
    factors = rating_factors(task.basis, capacity[:, :, kept], answer.dead, answer.live, gamma)
    allowance = loss_allowance(
        task.basis,
        task.stock,
        task.strength,
        task.prepared.effective_lengths,
        task.factor,
        np.nan_to_num(demand),
        redundancy,
    )
    figures = Figures(
        dead=_spread(answer.dead, kept, whole),
        live=_spread(answer.live, kept, whole),
        demand=demand,
        acts=_spread(acts(task.basis, answer.dead, answer.live, gamma), kept, whole, 0),
        lowest=_spread(factors.lowest, kept, whole),
        direction=_spread(factors.direction, kept, whole, -1),
        load=_spread(factors.load, kept, whole, -1),
        dead_exceeds=_spread(factors.dead_exceeds, kept, whole, 0),
        allowance=np.where(np.isinf(_spread(factors.lowest[-1], kept, whole)), np.inf, allowance),
        without=_spread(factors_without(task.basis, task.prepared, answer, capacity[:, :, kept], gamma), kept, whole),
    )
    return Solved(standing, (answer,), figures)


def _spread(values: NDArray[Any], kept: NDArray[np.int64], whole: int, empty: float = np.nan) -> NDArray[Any]:
    """Values of the bars that are in, at their places among all bars."""
    if len(kept) == whole:
        return values
    spread = np.full((*values.shape[:-1], whole), empty, dtype=values.dtype)
    spread[..., kept] = values
    return spread
