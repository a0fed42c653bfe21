"""The figures of a truss as rows that can be shown: one a bar."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Final, Literal

import numpy as np

from models.condition import BarCondition
from models.finding import Finding
from models.rating.outcome import Outcome
from models.rating.result import BarRating, Effect, Reaction
from models.rating.strength import CHECKS

_DIRECTIONS: Final[tuple[Literal["tension", "compression"], ...]] = ("tension", "compression")


def rows_of(outcome: Outcome, findings: Mapping[str, tuple[Finding, ...]]) -> tuple[BarRating, ...]:
    """One row a bar, in the order of the truss.

    Parameters
    ----------
    findings : by bar.
    """
    table = _columns(outcome)
    bars = outcome.prepared.truss.bars
    return tuple(
        _row(outcome, number, bar.id, bar.role, now, cells, findings.get(bar.id, ()))
        for number, (bar, now, cells) in enumerate(zip(bars, outcome.conditions, table, strict=True))
    )


def _columns(outcome: Outcome) -> list[tuple[float, ...]]:
    """Per bar: area, nominal area, length, resistances, checks, condition factors, system factor, least piece."""
    strength = outcome.task.strength
    columns = [
        strength.area,
        outcome.task.stock.area,
        outcome.prepared.geometry.lengths,
        *strength.resistance[-1],
        *strength.check,
        *outcome.condition_factor,
        outcome.system_factor,
        strength.least,
        *strength.piece,
    ]
    return list(zip(*[column.tolist() for column in columns], strict=True))


def _row(
    outcome: Outcome,
    number: int,
    bar: str,
    role: str,
    now: BarCondition,
    cells: tuple[float, ...],
    findings: tuple[Finding, ...],
) -> BarRating:
    area, nominal, length, tension, compression, *rest = cells
    tension_check, compression_check, *rest = rest
    condition_tension, condition_compression, system, least, *pieces = rest
    gone = number in outcome.severed or number in outcome.cracked
    figures = _Bar(outcome, number)
    direction = None if gone else figures.direction
    piece = int(least if direction is None else pieces[direction])
    condition = (condition_tension, condition_compression)[direction or 0]
    names = CHECKS[int(tension_check)], CHECKS[int(compression_check)]
    return BarRating(
        truss=outcome.name,
        bar=bar,
        role=role,
        section=now.section,
        length=length,
        state=now.state,
        known=_known(outcome, now, piece),
        area=0.0 if number in outcome.severed else area,
        nominal_area=nominal,
        dead_components=figures.dead(0),
        dead_wearing=figures.dead(1),
        live=figures.live(),
        tension=tension,
        compression=compression,
        tension_check=names[0],
        compression_check=names[1],
        condition_factor=_number(condition),
        system_factor=_number(system),
        rating_factor=figures.gone() if gone else figures.rating_factor(),
        check=_check(outcome, number, direction, names, figures),
        load=None if gone else figures.load,
        direction=None if direction is None else _DIRECTIONS[direction],
        where=_where(outcome, number, piece),
        demand=None if direction is None else figures.demand(direction),
        capacity=None if direction is None else (tension, compression)[direction] * figures.factor(direction),
        loss_allowance=0.0 if gone else figures.allowance(),
        without_it=figures.lowest_of_all() if gone else figures.without(),
        findings=findings,
    )


def check_and_load(outcome: Outcome, number: int) -> tuple[str | None, str | None]:
    """What governs one bar at the upper level."""
    checks = outcome.task.strength.check[:, number]
    figures = _Bar(outcome, number)
    names = CHECKS[int(checks[0])], CHECKS[int(checks[1])]
    return _check(outcome, number, figures.direction, names, figures), figures.load


class _Bar:
    """One bar's figures out of the arrays of its truss, None where there are none."""

    def __init__(self, outcome: Outcome, number: int) -> None:
        self._levels = tuple(level.name for level in outcome.task.basis.levels)
        self._factor = outcome.task.factor[:, number]
        self._figures = outcome.solved.figures if outcome.solved else None
        self._loads = outcome.solved.answer.loads if outcome.solved else ()
        self._number = number

    @property
    def direction(self) -> int | None:
        if self._figures is None or not math.isfinite(self._figures.lowest[-1, self._number]):
            return None
        return int(self._figures.direction[self._number])

    @property
    def dead_exceeds(self) -> bool:
        return self._figures is not None and bool(self._figures.dead_exceeds[:, self._number].any())

    @property
    def load(self) -> str | None:
        if self._figures is None:
            return None
        load = int(self._figures.load[self._number])
        return None if load < 0 else self._loads[load]

    def dead(self, part: int) -> float | None:
        return None if self._figures is None else _number(self._figures.dead[part, self._number])

    def live(self) -> dict[str, Effect] | None:
        if self._figures is None:
            return None
        found = self._figures.live[:, :, self._number].tolist()
        if any(math.isnan(value) for pair in found for value in pair):
            return None
        return {load: Effect(largest, least) for load, (largest, least) in zip(self._loads, found, strict=True)}

    def rating_factor(self) -> dict[str, float | None]:
        if self._figures is None:
            return dict.fromkeys(self._levels)
        found = self._figures.lowest[:, self._number].tolist()
        return {level: _number(value) for level, value in zip(self._levels, found, strict=True)}

    def gone(self) -> dict[str, float | None]:
        return dict.fromkeys(self._levels, 0.0)

    def demand(self, direction: int) -> float | None:
        if self._figures is None:
            return None
        return _number(self._figures.demand[direction, self._number])

    def factor(self, direction: int) -> float:
        return float(self._factor[direction])

    def allowance(self) -> float | None:
        return None if self._figures is None else _number(self._figures.allowance[self._number])

    def without(self) -> float | Literal["mechanism"] | None:
        if self._figures is None:
            return None
        found = float(self._figures.without[self._number])
        return "mechanism" if math.isnan(found) else _number(found)

    def lowest_of_all(self) -> float | None:
        return None if self._figures is None else _number(np.nanmin(self._figures.lowest[-1]))


def _number(value: float) -> float | None:
    """A float that exists, or None."""
    return float(value) if math.isfinite(value) else None


def _check(outcome: Outcome, number: int, direction: int | None, names: tuple[str, str], figures: _Bar) -> str | None:
    if number in outcome.severed:
        return "severed"
    if number in outcome.cracked:
        return "cracked"
    if direction is None:
        return None
    return "dead load" if figures.dead_exceeds else names[direction]


def _known(outcome: Outcome, now: BarCondition, piece: int) -> str:
    """How the governing section is known, in the words of the result."""
    if now.seen and outcome.task.strength.pieces.measured[piece]:
        return "measured"
    return now.known


def _where(outcome: Outcome, number: int, piece: int) -> tuple[float, float]:
    stations = outcome.conditions[number].strength.stations
    place = piece - int(outcome.task.strength.pieces.first[number])
    return float(stations[place]), float(stations[place + 1])


def reactions_of(outcome: Outcome) -> tuple[Reaction, ...]:
    """Vertical reactions: under dead load, and the least under the load that lifts most."""
    if outcome.solved is None:
        return ()
    answer, basis = outcome.solved.answer, outcome.task.basis
    relieved = basis.components.least * answer.support_dead[0] + basis.wearing.least * answer.support_dead[1]
    gamma = max(level.live for level in basis.levels)
    found = []
    for place, joint in enumerate(answer.supports.tolist()):
        lifting = answer.support_live[:, place]
        load = int(np.argmin(lifting)) if len(lifting) else -1
        lifts = load >= 0 and lifting[load] < 0
        found.append(
            Reaction(
                joint=outcome.prepared.geometry.joints[joint],
                dead=float(answer.support_dead[:, place].sum()),
                least=float(relieved[place] + (gamma * lifting[load] if lifts else 0.0)),
                load=answer.loads[load] if lifts else None,
            )
        )
    return tuple(found)
