"""The figures of a truss as rows that can be shown: one a bar."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any, Final, Literal

import numpy as np
from numpy.typing import NDArray

from models.finding import Finding
from models.rating.answer import Answer
from models.rating.factor import live_factors
from models.rating.outcome import Outcome
from models.rating.result import BarRating, Effect, Reaction, Resisted
from models.rating.solved import Figures
from models.rating.strength import CHECKS
from models.resistance.protocol import Basis

EQUILIBRIUM: Final = "equilibrium"
"""The check of bars whose truss has no equilibrium beyond some multiple of a live load, as bars would have to push that
cannot."""

_DIRECTIONS: Final[tuple[Literal["tension", "compression"], ...]] = ("tension", "compression")


def rows_of(outcome: Outcome, findings: Mapping[str, tuple[Finding, ...]]) -> tuple[BarRating, ...]:
    """One row a bar, in the order of the truss.

    Parameters
    ----------
    findings : by bar.
    """
    table = _Table(outcome)
    columns = {**table.identity(findings), **table.strength(), **table.forces(), **table.governing()}
    in_order: list[list[Any]] = [columns[name] for name in BarRating._fields]
    return tuple(BarRating._make(cells) for cells in zip(*in_order, strict=True))


_Columns = Mapping[str, list[Any]]


class _Table:
    """The rows' fields by column, (m,) each; a value that does not exist is None."""

    def __init__(self, outcome: Outcome) -> None:
        self.outcome = outcome
        self.count = len(outcome.conditions)
        self.figures = outcome.solved.figures if outcome.solved else None
        self.loads = outcome.solved.loads if outcome.solved else ()
        self.gone = np.zeros(self.count, bool)
        self.gone[sorted(outcome.severed | outcome.cracked)] = True
        self.direction = self._direction()
        self.piece = self._piece()

    def _direction(self) -> NDArray[np.int64]:
        """What governs: 0 tension, 1 compression, -1 nothing."""
        if self.figures is None:
            return np.full(self.count, -1)
        rated = np.isfinite(self.figures.lowest[-1]) & ~self.gone
        return np.where(rated, self.figures.direction, -1)

    def _piece(self) -> NDArray[np.int64]:
        """The piece of the bar that governs, or the one of least area."""
        strength = self.outcome.task.strength
        chosen: NDArray[np.int64] = np.choose(self.direction + 1, [strength.least, *strength.piece])
        return chosen

    def identity(self, findings: Mapping[str, tuple[Finding, ...]]) -> _Columns:
        """Names, what is known, and what there is to find."""
        bars, conditions = self.outcome.prepared.truss.bars, self.outcome.conditions
        measured = self.outcome.task.strength.pieces.measured[self.piece].tolist()
        known = [
            "measured" if raised and now.seen else now.known for now, raised in zip(conditions, measured, strict=True)
        ]
        return {
            "truss": [self.outcome.name] * self.count,
            "bar": [bar.id for bar in bars],
            "role": [bar.role for bar in bars],
            "section": [now.section for now in conditions],
            "state": [now.state for now in conditions],
            "known": list(known),
            "findings": [findings.get(bar.id, ()) for bar in bars],
            "slack": self._slack(),
        }

    def _slack(self) -> list[tuple[str, ...]]:
        """The bars that go slack under what governs each bar."""
        slack = self.figures.slack if self.figures else None
        if slack is None:
            return [()] * self.count
        names = [bar.id for bar in self.outcome.prepared.truss.bars]
        return [tuple(names[other] for other in np.flatnonzero(row).tolist()) for row in slack.slack]

    def strength(self) -> _Columns:
        """Sizes, resistances and the factors on them."""
        outcome, strength = self.outcome, self.outcome.task.strength
        severed = np.zeros(self.count, bool)
        severed[sorted(outcome.severed)] = True
        condition = np.where(self.direction == 1, outcome.condition_factor[1], outcome.condition_factor[0])
        tension, compression = strength.check.tolist()
        return {
            "length": outcome.prepared.geometry.lengths.tolist(),
            "area": np.where(severed, 0.0, strength.area).tolist(),
            "nominal_area": outcome.task.stock.area.tolist(),
            "tension": strength.resistance[-1, 0].tolist(),
            "compression": strength.resistance[-1, 1].tolist(),
            "tension_check": [CHECKS[check] for check in tension],
            "compression_check": [CHECKS[check] for check in compression],
            "condition_factor": _cells(condition),
            "system_factor": _cells(outcome.system_factor),
            "where": self._where(),
            "lower_levels": self._lower_levels(),
        }

    def _lower_levels(self) -> list[Any]:
        task = self.outcome.task
        by_level = {
            task.basis.levels[number].name: [
                Resisted._make(pair) for pair in task.strength.resistance[number].T.tolist()
            ]
            for number in task.strength.own_levels
        }
        return [{name: rows[bar] for name, rows in by_level.items()} for bar in range(self.count)]

    def _where(self) -> list[Any]:
        conditions = self.outcome.conditions
        places = (self.piece - self.outcome.task.strength.pieces.first).tolist()
        whole = (0.0, 1.0)
        return [
            whole if len(now.strength.stations) == 2 else tuple(now.strength.stations[place : place + 2].tolist())
            for now, place in zip(conditions, places, strict=True)
        ]

    def forces(self) -> _Columns:
        """Unfactored forces; none in a mechanism, and none of bars that are out."""
        if self.figures is None:
            nothing: list[Any] = [None] * self.count
            return {"dead_components": nothing, "dead_wearing": nothing, "live": nothing, "imposed": nothing}
        out = np.isnan(self.figures.dead[0]).tolist()
        by_bar = self.figures.live.transpose(2, 0, 1).tolist()
        live: list[Any] = [
            None if is_out else {load: Effect._make(pair) for load, pair in zip(self.loads, effects, strict=True)}
            for is_out, effects in zip(out, by_bar, strict=True)
        ]
        return {
            "dead_components": _cells(self.figures.dead[0]),
            "dead_wearing": _cells(self.figures.dead[1]),
            "live": live,
            "imposed": self._imposed(out),
        }

    def _imposed(self, out: list[bool]) -> list[Any]:
        """What all imposed changes together pull and push each bar; none where nothing is imposed."""
        by_change = self.figures.dead[2:] if self.figures else np.zeros((0, self.count))
        if not len(by_change):
            return [None] * self.count
        sums = np.array([np.maximum(by_change, 0.0).sum(axis=0), np.minimum(by_change, 0.0).sum(axis=0)])
        return [None if is_out else Effect._make(pair) for is_out, pair in zip(out, sums.T.tolist(), strict=True)]

    def governing(self) -> _Columns:
        """Rating factors, what governs them, and what else the bar has left."""
        chosen = np.maximum(self.direction, 0)
        capacity = self._of_direction(self.outcome.task.capacity[-1], chosen)
        demand = (
            np.full(self.count, np.nan) if self.figures is None else self._of_direction(self.figures.demand, chosen)
        )
        checks = self._checks()
        return {
            "rating_factor": self._rating_factors(),
            "check": [check for check, _ in checks],
            "load": [load for _, load in checks],
            "direction": [None if way < 0 else _DIRECTIONS[way] for way in self.direction.tolist()],
            "demand": _cells(demand),
            "capacity": _cells(capacity),
            "loss_allowance": self._allowance(),
            "without_it": self._without(),
        }

    def _checks(self) -> list[tuple[str | None, str | None]]:
        """Check and load that govern each bar."""
        if self.figures is None:
            return [check_and_load(self.outcome, number) for number in range(self.count)]
        ways, loads = self.direction.tolist(), self.figures.load.tolist()
        strength = self.outcome.task.strength.check.tolist()
        found: list[tuple[str | None, str | None]] = []
        for number, (way, load) in enumerate(zip(ways, loads, strict=True)):
            if way < 0 or load < 0:
                found.append(check_and_load(self.outcome, number))
            else:
                found.append((CHECKS[strength[way][number]], self.loads[load]))
        return found

    def _of_direction(self, pair: NDArray[np.float64], chosen: NDArray[np.int64]) -> NDArray[np.float64]:
        return np.where(self.direction < 0, np.nan, np.where(chosen == 1, pair[1], pair[0]))

    def _rating_factors(self) -> list[Any]:
        levels = [level.name for level in self.outcome.task.basis.levels]
        nothing = np.full((len(levels), self.count), np.nan)
        found = nothing if self.figures is None else self.figures.lowest
        by_level = [_cells(np.where(self.gone, 0.0, row)) for row in found]
        return [dict(zip(levels, cells, strict=True)) for cells in zip(*by_level, strict=True)]

    def _allowance(self) -> list[Any]:
        found = np.full(self.count, np.nan) if self.figures is None else self.figures.allowance
        return _cells(np.where(self.gone, 0.0, found))

    def _without(self) -> list[Any]:
        if self.figures is None:
            return [None] * self.count
        now = float(np.nanmin(self.figures.lowest[-1], initial=np.inf))
        found = np.where(self.gone, now, self.figures.without).tolist()
        return ["mechanism" if math.isnan(factor) else _cell(factor) for factor in found]


def check_and_load(outcome: Outcome, number: int) -> tuple[str | None, str | None]:
    """What governs one bar at the upper level."""
    if number in outcome.severed:
        return "severed", None
    if number in outcome.cracked:
        return "cracked", None
    figures = outcome.solved.figures if outcome.solved else None
    if figures is None or not math.isfinite(figures.lowest[-1, number]):
        return None, None
    return _governs(outcome, figures, number)


def _governs(outcome: Outcome, figures: Figures, number: int) -> tuple[str, str | None]:
    load = int(figures.load[number])
    if load < 0 or outcome.solved is None:
        return "dead load", None
    if figures.slack is not None and figures.slack.ends[number]:
        return EQUILIBRIUM, outcome.solved.loads[load]
    check = outcome.task.strength.check[figures.direction[number], number]
    return CHECKS[check], outcome.solved.loads[load]


def _cell(value: float) -> float | None:
    """A float that exists, or None."""
    return value if math.isfinite(value) else None


def _cells(values: NDArray[np.float64]) -> list[Any]:
    """Floats, None where there is none."""
    return [value if math.isfinite(value) else None for value in values.tolist()]


def reactions_of(outcome: Outcome) -> tuple[Reaction, ...]:
    """Vertical reactions: under dead load, and the least under the load that lifts most, of all answers."""
    if outcome.solved is None:
        return ()
    joints = outcome.prepared.geometry.joints
    basis, kinds = outcome.task.basis, outcome.prepared.kinds
    by_answer = [_reactions(basis, answer, kinds, joints) for answer in outcome.solved.answers]
    return tuple(min(same, key=lambda reaction: reaction.least) for same in zip(*by_answer, strict=True))


def _reactions(
    basis: Basis, answer: Answer, kinds: Mapping[str, frozenset[str]], joints: tuple[str, ...]
) -> list[Reaction]:
    relieved = basis.components.least * answer.support_dead[0] + basis.wearing.least * answer.support_dead[1]
    relieved = relieved + basis.components.greatest * np.minimum(answer.support_dead[2:], 0.0).sum(axis=0)
    gamma = live_factors(basis, [kinds[load] for load in answer.loads]).max(axis=0)
    found = []
    for place, joint in enumerate(answer.supports.tolist()):
        lifting = gamma * answer.support_live[:, place]
        load = int(np.argmin(lifting)) if len(lifting) else -1
        lifts = load >= 0 and lifting[load] < 0
        least = float(relieved[place] + (lifting[load] if lifts else 0.0))
        dead = float(answer.support_dead[:2, place].sum())
        found.append(Reaction(joints[joint], dead, least, answer.loads[load] if lifts else None))
    return found
