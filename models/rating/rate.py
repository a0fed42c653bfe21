"""Rate a prepared bridge in the condition that its journal tells."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from itertools import chain

import numpy as np

from models import words
from models.bridge import Footbridge
from models.condition import Condition
from models.finding import LEVELS, Finding
from models.rating import findings, service
from models.rating.assumptions import assumptions_of
from models.rating.load_lines import load_lines
from models.rating.outcome import Outcome, outcome_of
from models.rating.prepare import Prepared
from models.rating.result import BarRating, Governing, Provenance, Rating, TrussRating
from models.rating.rows import check_and_load, reactions_of, rows_of
from models.rating.solved import Solved
from models.resistance.protocol import Basis
from models.words import rating as sentences

_TIE = 1e-9


def rate(prepared: Prepared, condition: Condition, basis: Basis, provenance: Provenance) -> Rating:
    """A rating factor for every bar and for the structure.

    Parameters
    ----------
    prepared : what does not depend on a reading; kept by the caller from rating to rating.
    condition : of every bar, folded from the journal of the same bridge.
    provenance : what the rating is made from, for whoever reads it later.
    """
    return rating_of(condition, outcomes_of(prepared, condition, basis), basis, provenance)


def rating_of(condition: Condition, outcomes: tuple[Outcome, ...], basis: Basis, provenance: Provenance) -> Rating:
    """What solved trusses say, as values ready to be shown."""
    bridge = condition.bridge
    trusses = {outcome.name: _truss_rating(bridge, outcome) for outcome in outcomes}
    found = [*findings.of_bridge(bridge, basis), *condition.findings]
    for outcome in outcomes:
        found.extend(findings.of_truss(bridge, outcome, trusses[outcome.name].reactions))
    found.extend(service.notes(bridge, trusses))
    bars = tuple(chain.from_iterable(truss.bars for truss in trusses.values()))
    found.extend(chain.from_iterable(bar.findings for bar in bars))
    structure = governing(basis, outcomes, lambda outcome: outcome.solved)
    found.extend(_owner_trigger(bridge, structure))
    rating = Rating(
        site=bridge.name,
        basis=basis.name,
        levels=tuple(level.name for level in basis.levels),
        provenance=provenance,
        structure=structure,
        trusses=trusses,
        assumptions=assumptions_of(bridge, outcomes),
        findings=tuple(sorted(found, key=lambda finding: LEVELS.index(finding.level))),
        not_rated=words.NOT_RATED,
        loads=load_lines(bridge, basis),
    )
    return _with_other_answers(rating, basis, outcomes)


def outcomes_of(prepared: Prepared, condition: Condition, basis: Basis) -> tuple[Outcome, ...]:
    """Each truss solved in its condition, in the order of the site."""
    return tuple(outcome_of(prepared, name, condition.of_truss(name), basis) for name in prepared.trusses)


def _truss_rating(bridge: Footbridge, outcome: Outcome) -> TrussRating:
    standing = outcome.standing
    geometry, stability = standing.geometry, standing.stability
    weights = outcome.dead_total
    deflection, frequency = service.service_of(outcome)
    return TrussRating(
        name=outcome.name,
        joints=len(geometry.joints),
        bars_standing=len(geometry.bars),
        reaction_components=int(geometry.held.sum()),
        degree=geometry.degree,
        mechanisms=stability.mechanisms,
        verdict=stability.verdict,
        moving_joints=tuple(np.array(geometry.joints, object)[stability.moving]),
        loose_bars=tuple(np.array(geometry.bars, object)[stability.loose]),
        bars=rows_of(outcome, findings.by_bar(bridge, outcome)),
        reactions=reactions_of(outcome),
        dead_total=weights,
        deflection=deflection,
        frequency=frequency,
    )


def governing(basis: Basis, outcomes: tuple[Outcome, ...], choose: Callable[[Outcome], Solved | None]) -> Governing:
    """The lowest rating factor over the bars that still carry; 0 where a truss does not stand.

    Parameters
    ----------
    choose : which answer of a truss to look at.

    Notes
    -----
    Factors that differ by less than 1e-9 of their size tie; the first by (truss, bar) name governs, so that the
    order of a file does not matter.
    """
    levels = tuple(level.name for level in basis.levels)
    solved = {outcome.name: choose(outcome) for outcome in outcomes}
    if any(answer is None for answer in solved.values()):
        return Governing(dict.fromkeys(levels, 0.0), None, None, None, None)
    lowest = np.array(
        [np.nanmin(answer.figures.lowest, axis=1, initial=np.inf) for answer in solved.values() if answer]
    )
    least = lowest.min(axis=0)
    factor = {level: float(value) if np.isfinite(value) else None for level, value in zip(levels, least, strict=True)}
    if not np.isfinite(least[-1]):
        return Governing(factor, None, None, None, None)
    ties: list[tuple[str, str, int, Outcome]] = []
    for outcome in outcomes:
        answer = solved[outcome.name]
        if answer is not None:
            numbers = np.flatnonzero(answer.figures.lowest[-1] <= least[-1] * (1 + _TIE)).tolist()
            ties.extend((outcome.name, outcome.conditions[number].bar, number, outcome) for number in numbers)
    truss, bar, number, outcome = min(ties, key=lambda tie: tie[:2])
    check, load = check_and_load(replace(outcome, solved=solved[truss], cracked=frozenset()), number)
    return Governing(factor, truss, bar, check, load)


def _owner_trigger(bridge: Footbridge, structure: Governing) -> list[Finding]:
    trigger = bridge.owner.act_below if bridge.owner else None
    lowest = list(structure.rating_factor.values())[-1]
    if trigger is None or lowest is None or structure.bar is None or lowest >= trigger:
        return []
    text = sentences.below_trigger(structure.bar, lowest, trigger)
    return [Finding("act now", text, structure.truss, structure.bar)]


def _with_other_answers(rating: Rating, basis: Basis, outcomes: tuple[Outcome, ...]) -> Rating:
    """The structure's figures with cracked bars whole, and with slack bars in, where there are such bars."""
    if any(outcome.cracked for outcome in outcomes):
        held = governing(basis, outcomes, lambda o: o.if_cracked_bars_hold if o.cracked else o.solved)
        rating = replace(rating, if_cracked_bars_hold=held)
    if any(outcome.slack for outcome in outcomes):
        pulled = governing(basis, outcomes, lambda o: o.if_slack_bars_pull if o.slack else o.solved)
        rating = replace(rating, if_slack_bars_pull=pulled)
    return rating


def bar_of(rating: Rating, truss: str, bar: str) -> BarRating:
    """One bar's row."""
    return next(row for row in rating.trusses[truss].bars if row.bar == bar)
