"""One truss in one state: forces, rating factors, allowance, and what would remain without each bar."""

from __future__ import annotations

from dataclasses import dataclass, fields
from functools import reduce

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.rating.allowance import loss_allowance
from models.rating.answer import Answer, solve
from models.rating.factor import live_factors
from models.rating.fitted import Stock
from models.rating.prepare import PreparedTruss, Standing
from models.rating.slack import Asked, is_pushed, solve_slack
from models.rating.strength import Strength
from models.rating.worked import SlackParts, Worked, no_slack, spread, superposed
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
    dead : (2 + k, m) as in `answer.Answer`. live : (loads, 2, m). demand : (2, m) factored, upper level, N.
    acts : (2, m) whether factored loads of any level pull it, and push it.
    lowest : (levels, m) rating factor, infinite where there is none.
    direction, load : (m,) what governs, as in `factor.Factors`. dead_exceeds : (2, m).
    allowance : (m,). without : (m,) NaN for a mechanism.
    slack : what is known only where bars go slack; None where superposition holds.
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
    slack: SlackParts | None = None


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
    known = [each for each in solved if each is not None]
    return reduce(worse, known) if len(known) == len(solved) else None


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
    names = [entry.name for entry in fields(Figures) if entry.name != "slack"]
    pairs = {name: (getattr(one, name), getattr(other, name)) for name in names}
    chosen = {name: np.where(take, b, a) for name, (a, b) in pairs.items()}
    chosen["acts"] = one.acts | other.acts
    chosen["allowance"] = np.fmin(one.allowance, other.allowance)
    out = np.isnan(other.lowest[-1])
    # NaN in `without` means a mechanism, which is lower than any factor; but not of a bar that one answer left out.
    chosen["without"] = np.where(
        out, one.without, np.where(known, other.without, np.minimum(one.without, other.without))
    )
    return Figures(**chosen, slack=_worse_slack(one, other, take))


def _worse_slack(one: Figures, other: Figures, take: NDArray[np.bool_]) -> SlackParts | None:
    if one.slack is None and other.slack is None:
        return None
    nothing = no_slack(*one.lowest.shape)
    return (one.slack or nothing).where(take, other.slack or nothing)


def _solve_once(task: Task, standing: Standing, flexibility: Array) -> Solved | None:
    kept, whole = standing.kept, len(task.stock.area)
    found = _work(task, standing, flexibility)
    if found is None:
        return None
    demand, redundancy = spread(found.demand, kept, whole), spread(found.redundancy, kept, whole, 0.0)
    allowance = loss_allowance(
        task.basis,
        task.stock,
        task.strength,
        task.prepared.effective_lengths,
        task.factor,
        np.nan_to_num(demand),
        redundancy,
    )
    lowest = spread(found.lowest, kept, whole)
    if found.slack is not None:
        allowance = np.where(lowest[-1] < 1.0, 0.0, allowance)
    figures = Figures(
        dead=spread(found.answer.dead, kept, whole),
        live=spread(found.answer.live, kept, whole),
        demand=demand,
        acts=spread(found.acts, kept, whole, 0),
        lowest=lowest,
        direction=spread(found.direction, kept, whole, -1),
        load=spread(found.load, kept, whole, -1),
        dead_exceeds=spread(found.dead_exceeds, kept, whole, 0),
        allowance=np.where(np.isinf(lowest[-1]), np.inf, allowance),
        without=spread(found.without, kept, whole),
        slack=found.slack.among_all(kept, whole) if found.slack else None,
    )
    return Solved(standing, (found.answer,), figures)


def _work(task: Task, standing: Standing, flexibility: Array) -> Worked | None:
    """Forces and factors; None where dead load has no equilibrium unless a bar pushes that cannot."""
    kept = standing.kept
    answer = solve(task.prepared, standing, task.stock, flexibility)
    capacity = task.capacity[:, :, kept]
    gamma = live_factors(task.basis, [task.prepared.kinds[load] for load in answer.loads])
    cannot_push = task.prepared.tension_only[kept]
    if is_pushed(answer, cannot_push):
        asked = Asked(task.basis, task.prepared, task.stock, answer, flexibility[kept], cannot_push, capacity, gamma)
        return solve_slack(asked)
    return superposed(task.basis, task.prepared, answer, capacity, gamma)
