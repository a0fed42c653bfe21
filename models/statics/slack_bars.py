"""Bars that cannot push: which of them go slack under given loads, and the forces that are left.

The state under loads p is the one minimum of sum N^2 f / 2 (f being a bar's elongation under unit tension) over all
forces in equilibrium, A N + p = 0, with N >= 0 in the bars that cannot push. With n = S^-1 N scaled as in
`models.statics.response`, n0 the forces as if every bar could push and Z the states of self-stress, that is the least
|z| with n = n0 + Z z; bars that are slack have a multiplier, the gap that opens in them, which is not negative.
For a set of slack bars k the forces are n0 - Z Z_k^T (Z_k Z_k^T)^-1 n0_k: linear, so a set is worked out once.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.statics.nonnegative import LeastDistance, least_distance
from models.statics.response import Response

Mask = NDArray[np.bool_]

EQUILIBRIUM: Final = 0
NO_EQUILIBRIUM: Final = 1
UNDECIDED: Final = 2

_ROUNDING: Final = 1e-10
"""Forces below this part of the largest one of their state are zero."""

_SINGULAR: Final = 1e-9
"""Without slack bars that have less self-stress between them than this, the rest is a mechanism."""

_MOST_STEPS: Final = 20


@dataclass(frozen=True, eq=False)
class SlackSet:
    """A truss with some of its bars slack.

    Parameters
    ----------
    slack : (t,) which of the bars that cannot push. among : (t,) their numbers in the truss.
    inverse, gain : (k, k) and (k, m): what the k slack bars hand on.
    """

    slack: Mask
    among: NDArray[np.int64]
    inverse: Array
    gain: Array

    def forces(self, whole: Array) -> Array:
        """Scaled forces without the slack bars.

        Parameters
        ----------
        whole : (..., m) scaled forces as if every bar could push.
        """
        numbers = self.among[self.slack]
        left: Array = whole - whole[..., numbers] @ self.gain
        left[..., numbers] = 0.0
        return left

    def tautness(self, whole: Array) -> Array:
        """(..., t) scaled force of bars that pull, opening gap of slack ones; where all are >= 0 the set is right."""
        numbers = self.among[self.slack]
        found: Array = self.forces(whole)[..., self.among]
        found[..., self.slack] = -whole[..., numbers] @ self.inverse
        return found


@dataclass(frozen=True, eq=False)
class States:
    """What a truss does under several loads.

    Parameters
    ----------
    slack : (q, t). verdict : (q,) `EQUILIBRIUM`, `NO_EQUILIBRIUM` or `UNDECIDED`.
    forces : (q, m) scaled; of no meaning where there is no equilibrium.
    conditions : (t,) each; weights of scaled forces `whole` whose sum may not be negative for there to be equilibrium.
    """

    slack: Mask
    verdict: NDArray[np.int64]
    forces: Array
    conditions: tuple[Array, ...]


@dataclass(frozen=True, eq=False)
class SlackTruss:
    """A truss that would stand if all its bars could push; some cannot.

    Parameters
    ----------
    projector : (m, m) of the states of self-stress, over scaled forces.
    among : (t,) numbers of the bars that cannot push.
    """

    projector: Array
    among: NDArray[np.int64]
    _sets: dict[bytes, SlackSet | None] = field(default_factory=dict)

    def under(self, slack: Mask) -> SlackSet | None:
        """The truss with a set of bars slack, worked out once; None where the rest is a mechanism."""
        key = slack.tobytes()
        if key not in self._sets:
            self._sets[key] = self._without(slack)
        return self._sets[key]

    def _without(self, slack: Mask) -> SlackSet | None:
        numbers = self.among[slack]
        try:
            inverse = np.linalg.inv(self.projector[np.ix_(numbers, numbers)]).astype(float)
        except np.linalg.LinAlgError:
            return None
        own = inverse.diagonal()
        if len(own) and not 0.0 < own.min() <= own.max() < 1.0 / _SINGULAR:
            return None
        return SlackSet(slack.copy(), self.among, inverse, inverse @ self.projector[numbers])

    def without(self, bar: int) -> SlackTruss | None:
        """The same truss without one of its bars, its number kept with zero force; None where that is a mechanism."""
        own = self.projector[bar]
        if own[bar] < _SINGULAR:
            return None
        left = self.projector - np.outer(own, own) / own[bar]
        left[bar] = left[:, bar] = 0.0
        return SlackTruss(left, self.among[self.among != bar])

    def states(self, whole: Array, start: Mask | None = None) -> States:
        """Which bars are slack under each of several loads.

        Parameters
        ----------
        whole : (q, m) scaled forces as if every bar could push.
        start : (q, t) guesses; none slack where not given.
        """
        slack = np.zeros((len(whole), len(self.among)), bool) if start is None else start.copy()
        size = np.abs(whole).max(axis=1, initial=0.0)
        waiting = np.flatnonzero(size > 0.0)
        slack[size == 0.0] = False
        hard: list[int] = []
        for _ in range(_MOST_STEPS):
            still: list[int] = []
            for numbers in _alike(slack, waiting):
                held = self.under(slack[numbers[0]])
                if held is None:
                    hard.extend(numbers.tolist())
                    continue
                margin = held.tautness(whole[numbers]) + _ROUNDING * size[numbers, None]
                slack[numbers] = self._next(slack[numbers], margin)
                still.extend(numbers[(margin < 0.0).any(axis=1)].tolist())
            waiting = np.array(still, int)
            if not len(waiting):
                break
        return self._finish(whole, size, slack, sorted({*hard, *waiting.tolist()}))

    def _next(self, slack: Mask, margin: Array) -> Mask:
        """The sets to try next: every bar that is wrong changes sides.

        Where the rest would then be a mechanism, bars that were slack pull again in place of those that go slack with
        them; where that does not help, the worst bar alone changes sides.
        """
        wrong = margin < 0.0
        found = slack ^ wrong
        for numbers in _alike(np.hstack([found, slack]), np.flatnonzero(wrong.any(axis=1))):
            tried, before = found[numbers[0]], slack[numbers[0]]
            if self.under(tried) is not None:
                continue
            exchanged = tried & ~(before & self._entangled(tried))
            if self.under(exchanged) is not None:
                found[numbers] = exchanged
                continue
            found[numbers] = before
            found[numbers, margin[numbers].argmin(axis=1)] ^= True
        return found

    def _entangled(self, slack: Mask) -> Mask:
        """Of bars that leave a mechanism behind when all of them are slack, those that would stop it."""
        numbers = self.among[slack]
        values, vectors = np.linalg.eigh(self.projector[np.ix_(numbers, numbers)])
        taking_part = np.zeros_like(slack)
        taking_part[slack] = (vectors[:, values < _SINGULAR] ** 2).sum(axis=1) > _SINGULAR
        return taking_part

    def _finish(self, whole: Array, size: Array, slack: Mask, hard: list[int]) -> States:
        """Let the convex problem decide where going from set to set did not end, and put all forces together."""
        verdict = np.zeros(len(whole), int)
        forces = np.zeros_like(whole)
        conditions: list[Array] = []
        root = _square_root(self.projector[np.ix_(self.among, self.among)])
        for number in hard:
            load = whole[number] / size[number]
            limits = [condition / np.abs(condition).max() @ load[self.among] for condition in conditions]
            if min(limits, default=0.0) < -_ROUNDING:
                verdict[number] = NO_EQUILIBRIUM
                continue
            nearest = least_distance(root, -load[self.among])
            verdict[number] = self._judge(nearest, load)
            if nearest is not None and verdict[number] == NO_EQUILIBRIUM:
                conditions.append(nearest.multipliers / np.abs(nearest.multipliers).max())
            elif nearest is not None:
                slack[number] = nearest.multipliers > 0.0
                forces[number] = size[number] * self._with_multipliers(load, nearest.multipliers)
        easy = np.setdiff1d(np.arange(len(whole)), hard)
        for numbers in _alike(slack, easy):
            held = self.under(slack[numbers[0]])
            if held is not None:
                forces[numbers] = held.forces(whole[numbers])
        return States(slack, verdict, forces, tuple(conditions))

    def _with_multipliers(self, load: Array, multipliers: Array) -> Array:
        found: Array = load + self.projector[:, self.among] @ multipliers
        found[self.among[multipliers > 0.0]] = 0.0
        return found

    def _judge(self, nearest: LeastDistance | None, load: Array) -> int:
        """Whether what was found is a state, is none, or cannot be told from rounding."""
        if nearest is None:
            return UNDECIDED
        if not nearest.exists:
            return NO_EQUILIBRIUM
        found = load + self.projector[:, self.among] @ nearest.multipliers
        size = max(1.0, float(np.abs(found).max()))
        wrong = np.where(nearest.multipliers > 0.0, np.abs(found[self.among]), np.maximum(-found[self.among], 0.0))
        return EQUILIBRIUM if wrong.max(initial=0.0) <= 1e-8 * size else UNDECIDED


def slack_truss(response: Response, cannot_push: Mask) -> SlackTruss:
    """Make a truss that stands ready for loads under which some of its bars go slack."""
    return SlackTruss(response.projector, np.flatnonzero(cannot_push))


def scaled(response: Response) -> Array:
    """(m, 2j) scaled forces under a unit force along each degree of freedom, as if every bar could push."""
    found: Array = response.forces / response.scale[:, None]
    return found


def _alike(slack: Mask, numbers: NDArray[np.int64]) -> list[NDArray[np.int64]]:
    """Numbers of states by equal sets."""
    groups: dict[bytes, list[int]] = {}
    for number in numbers.tolist():
        groups.setdefault(slack[number].tobytes(), []).append(number)
    return [np.array(group) for group in groups.values()]


def _square_root(matrix: Array) -> Array:
    """Some G with G G^T the given matrix."""
    values, vectors = np.linalg.eigh(matrix)
    kept = values > 1e-12
    root: Array = vectors[:, kept] * np.sqrt(values[kept])
    return root
