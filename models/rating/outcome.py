"""One truss with all that was recorded about it: which bars are in, and what comes out."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from models.calculation import Array
from models.condition import BarCondition, Profile
from models.rating.answer import joint_dead_load
from models.rating.prepare import Prepared, PreparedTruss, Standing
from models.rating.slack_fallen import standing_under_dead_load
from models.rating.solved import Solved, Task, solve_state, worse
from models.rating.strength import Strength, padded, strength_of
from models.resistance.protocol import Basis
from models.section import properties


@dataclass(frozen=True, eq=False)
class Outcome:
    """What the state of a truss leads to.

    Parameters
    ----------
    severed, cracked, slack : numbers of bars: cut through (or with no steel left), cracked and given no credit,
        recorded as slack.
    standing : the truss as it stands; its verdict and counts.
    solved : None where it has no forces.
    if_cracked_bars_hold, if_slack_bars_pull : the answer the other way round; None where it has no forces or
        where there is no such bar.
    condition_factor, system_factor : (2, m) and (m,) as shown; NaN where the basis has none.
    """

    name: str
    task: Task
    conditions: tuple[BarCondition, ...]
    severed: frozenset[int]
    cracked: frozenset[int]
    slack: frozenset[int]
    standing: Standing
    solved: Solved | None
    if_cracked_bars_hold: Solved | None
    if_slack_bars_pull: Solved | None
    condition_factor: Array
    system_factor: Array

    @property
    def prepared(self) -> PreparedTruss:
        """The truss that this is the outcome of."""
        return self.task.prepared

    @property
    def out(self) -> frozenset[int]:
        """Bars that are not in the truss as it stands."""
        return frozenset(range(len(self.conditions))) - frozenset(self.standing.kept.tolist())

    @property
    def dead_total(self) -> tuple[float, float]:
        """All dead load on the truss, components and wearing, N."""
        components, wearing = joint_dead_load(self.prepared, self.task.stock).sum(axis=1).tolist()
        return components, wearing


def outcome_of(prepared: Prepared, name: str, conditions: tuple[BarCondition, ...], basis: Basis) -> Outcome:
    """Solve a truss with everything that was recorded about its bars."""
    truss = prepared.trusses[name]
    stock = prepared.stock(name, conditions)
    strength = strength_of(basis, stock, conditions, truss.effective_lengths)
    condition_factor, system_factor, combined = _factors(prepared, truss, conditions, strength, basis)
    task = Task(basis, truss, stock, strength, combined)
    flexibilities = _flexibilities(task, conditions)
    severed = frozenset(bar for bar, now in enumerate(conditions) if now.severed or strength.area[bar] <= 0.0)
    slack = frozenset(bar for bar, now in enumerate(conditions) if now.slack) - severed
    whole = _evaluate(task, severed, slack, flexibilities)
    cracked = _cracked_in_tension(conditions, severed, whole.solved)
    final = _evaluate(task, severed | cracked, slack - cracked, flexibilities) if cracked else whole
    return Outcome(
        name=name,
        task=task,
        conditions=conditions,
        severed=severed,
        cracked=cracked,
        slack=slack,
        standing=final.standing,
        solved=final.solved,
        if_cracked_bars_hold=whole.solved if cracked else None,
        if_slack_bars_pull=final.with_slack if slack else None,
        condition_factor=condition_factor,
        system_factor=system_factor,
    )


@dataclass(frozen=True, eq=False)
class _Evaluated:
    standing: Standing
    solved: Solved | None
    with_slack: Solved | None


def _evaluate(
    task: Task, removed: frozenset[int], slack: frozenset[int], flexibilities: tuple[Array, ...]
) -> _Evaluated:
    """The truss without the removed bars; slack bars both in and out, the lower answer counts."""
    pulling = solve_state(task, removed, flexibilities)
    if not slack or pulling is None:
        return _Evaluated(_standing(task, removed, pulling, flexibilities), pulling, pulling)
    hanging = solve_state(task, removed | slack, flexibilities)
    if hanging is None:
        return _Evaluated(_standing(task, removed | slack, hanging, flexibilities), None, pulling)
    return _Evaluated(task.prepared.standing(removed), worse(pulling, hanging), pulling)


def _standing(task: Task, removed: frozenset[int], solved: Solved | None, flexibilities: tuple[Array, ...]) -> Standing:
    """The truss as it stands; where it was not solved, with the reason."""
    standing = task.prepared.standing(removed)
    if solved is not None:
        return standing
    return standing_under_dead_load(task.prepared, standing, task.stock, flexibilities[0])


def _cracked_in_tension(
    conditions: tuple[BarCondition, ...], severed: frozenset[int], whole: Solved | None
) -> frozenset[int]:
    """Cracked bars that factored loads pull; every cracked bar where forces cannot tell."""
    cracked = [bar for bar, now in enumerate(conditions) if now.crack is not None and bar not in severed]
    if whole is None:
        return frozenset(cracked)
    return frozenset(bar for bar in cracked if whole.figures.acts[0, bar])


def _factors(
    prepared: Prepared, truss: PreparedTruss, conditions: tuple[BarCondition, ...], strength: Strength, basis: Basis
) -> tuple[Array, Array, Array]:
    """Condition factor (2, m), system factor (m,) and their product as it counts (2, m)."""
    rules = prepared.bridge.rating
    systems = [bar.system or rules.system for bar in truss.truss.bars]
    by_system = {system: basis.system_factor(system) for system in dict.fromkeys(systems)}
    system = [by_system[name] for name in systems]
    raises = strength.pieces.raises[strength.piece].tolist()
    keys = [[(now.state, up) for now, up in zip(conditions, row, strict=True)] for row in raises]
    by_key = {key: basis.condition_factor(*key) for key in {key for row in keys for key in row}}
    condition = [[by_key[key] for key in row] for row in keys]
    if any(value is None for value in system):
        shape = (2, len(conditions))
        return np.full(shape, np.nan), np.full(shape[1], np.nan), np.ones(shape)
    found_condition, found_system = np.array(condition, float), np.array(system, float)
    return found_condition, found_system, np.asarray(basis.combined_factor(found_condition, found_system))


def _flexibilities(task: Task, conditions: tuple[BarCondition, ...]) -> tuple[Array, ...]:
    """Elongation of each bar under unit tension, the integral of dx/(E A), m/N.

    One answer where every loss has a known extent; two, at no length and over the whole bar, where not.
    """
    stiff = _flexibility(task, [now.stiff for now in conditions], [now.strength for now in conditions])
    if all(now.soft is now.stiff for now in conditions):
        return (stiff,)
    return stiff, _flexibility(task, [now.soft for now in conditions], [now.strength for now in conditions])


def _flexibility(task: Task, profiles: list[Profile], evaluated: list[Profile]) -> Array:
    stock, pieces = task.stock, task.strength.pieces
    counts = [len(profile.thickness) for profile in profiles]
    owner = np.repeat(np.arange(len(profiles)), counts)
    if all(profile is known for profile, known in zip(profiles, evaluated, strict=True)):
        area = task.strength.member.area
    else:
        thickness = padded([profile.thickness for profile in profiles], pieces.thickness.shape[1])
        area = properties(stock.stack.take(owner), thickness).area
    steps = np.diff(np.concatenate([profile.stations for profile in profiles]))
    parts = np.delete(steps, np.cumsum(np.array(counts) + 1)[:-1] - 1)
    with np.errstate(divide="ignore", invalid="ignore"):
        share = np.where(parts > 0, parts / area, 0.0)
    return np.bincount(owner, weights=share) * task.prepared.geometry.lengths / stock.E
