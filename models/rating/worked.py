"""What one solution of a truss says of the bars that are in, whether superposition holds or bars go slack."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.rating.answer import Answer
from models.rating.factor import acts, demands, rating_factors
from models.rating.prepare import PreparedTruss
from models.rating.without import factors_without
from models.resistance.protocol import Basis


@dataclass(frozen=True, eq=False)
class SlackParts:
    """What is known only where bars that cannot push go slack.

    Parameters
    ----------
    dead, live : (levels, m) factored dead force and force of one live load, along the direction that governs, on the
        slack set that is right at the limit: the rating factor is (C - dead) / (factor x live); NaN where none is.
    ends : (m,) whether the end of equilibrium is what limits the bar.
    slack : (m, m) which bars are slack under what governs each bar; the first number is the bar that is rated.
    undecided : whether some arrangements could not be looked at.
    """

    dead: Array
    live: Array
    ends: NDArray[np.bool_]
    slack: NDArray[np.bool_]
    undecided: bool

    def among_all(self, kept: NDArray[np.int64], whole: int) -> SlackParts:
        """The same with rows for all bars of the truss."""
        slack = np.zeros((whole, whole), bool)
        slack[np.ix_(kept, kept)] = self.slack
        return SlackParts(
            spread(self.dead, kept, whole),
            spread(self.live, kept, whole),
            spread(self.ends, kept, whole, 0),
            slack,
            self.undecided,
        )

    def where(self, take: NDArray[np.bool_], other: SlackParts) -> SlackParts:
        """For some bars what the other says."""
        return SlackParts(
            np.where(take, other.dead, self.dead),
            np.where(take, other.live, self.live),
            np.where(take, other.ends, self.ends),
            np.where(take[:, None], other.slack, self.slack),
            self.undecided or other.undecided,
        )


def no_slack(levels: int, whole: int) -> SlackParts:
    """Where superposition holds."""
    nothing = np.full((levels, whole), np.nan)
    return SlackParts(nothing, nothing, np.zeros(whole, bool), np.zeros((whole, whole), bool), undecided=False)


@dataclass(frozen=True, eq=False)
class Worked:
    """One solution, (m,) the bars that are in.

    Parameters
    ----------
    lowest, direction, load, dead_exceeds : as in `models.rating.factor.Factors`.
    demand, acts : (2, m) as in `models.rating.solved.Figures`. without : (m,) NaN for a mechanism.
    redundancy : (m,) what a bar that thins may count on to shed force; 0 where that is not known.
    slack : None where superposition holds.
    """

    answer: Answer
    lowest: Array
    direction: NDArray[np.int64]
    load: NDArray[np.int64]
    dead_exceeds: NDArray[np.bool_]
    demand: Array
    acts: NDArray[np.bool_]
    without: Array
    redundancy: Array
    slack: SlackParts | None = None


def superposed(basis: Basis, prepared: PreparedTruss, answer: Answer, capacity: Array, gamma: Array) -> Worked:
    """Work out a truss whose forces add up.

    Parameters
    ----------
    capacity : (levels, 2, m) N. gamma : (levels, loads) live load factors.
    """
    factors = rating_factors(basis, capacity, answer.dead, answer.live, gamma)
    return Worked(
        answer=answer,
        lowest=factors.lowest,
        direction=factors.direction,
        load=factors.load,
        dead_exceeds=factors.dead_exceeds,
        demand=demands(basis, answer.dead, answer.live, gamma[-1]),
        acts=acts(basis, answer.dead, answer.live, gamma),
        without=factors_without(basis, prepared, answer, capacity, gamma),
        redundancy=answer.response.redundancy,
    )


def spread(values: NDArray[Any], kept: NDArray[np.int64], whole: int, empty: float = np.nan) -> NDArray[Any]:
    """Values of the bars that are in, at their places among all bars."""
    if len(kept) == whole:
        return values
    among_all = np.full((*values.shape[:-1], whole), empty, dtype=values.dtype)
    among_all[..., kept] = values
    return among_all
