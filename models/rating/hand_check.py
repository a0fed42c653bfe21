"""The hand check of one bar: the very code that rates a truss, run over traced numbers.

Each line carries its formula, its numbers, its unit and its clause, so that a reviewer can redo a bar on paper.
"""

from __future__ import annotations

import math
from collections.abc import Collection, Iterable, Mapping
from dataclasses import dataclass

import numpy as np

from models.calculation import Array, HandCheck, Number, Sheet, Step, greatest
from models.rating.hand_check_slack import write_with_slack_bars
from models.rating.outcome import Outcome
from models.resistance.protocol import DeadFactors, Level, Member
from models.section import write_plates, write_section


@dataclass(frozen=True)
class BarCheck:
    """A bar's calculation.

    Parameters
    ----------
    steps : in the order in which a person would write them.
    remark : why there is no rating factor at the end, or what it leaves out; empty otherwise.
    """

    truss: str
    bar: str
    steps: tuple[Step, ...]
    remark: str = ""


def hand_check(outcomes: Iterable[Outcome], truss: str, bar: str) -> BarCheck:
    """Work one bar out again, line by line.

    Parameters
    ----------
    outcomes : as solved for the rating.

    Raises
    ------
    KeyError
        If there is no such truss or bar.
    """
    outcome = next((each for each in outcomes if each.name == truss), None)
    if outcome is None:
        raise KeyError(truss)
    number = [each.id for each in outcome.prepared.truss.bars].index(bar) if bar in outcome.prepared.truss.bar else -1
    if number < 0:
        raise KeyError(bar)
    return _check(outcome, number)


def _check(outcome: Outcome, number: int) -> BarCheck:
    bar = outcome.prepared.truss.bars[number]
    sheet = HandCheck()
    direction = _direction(outcome, number)
    piece = int(outcome.task.strength.piece[direction][number])
    basis = outcome.task.basis
    member = _member(outcome, number, piece, sheet)
    levels = basis.resistances(member, sheet)
    if number in outcome.severed or number in outcome.cracked:
        what = "severed" if number in outcome.severed else "cracked and pulled"
        return BarCheck(outcome.name, bar.id, tuple(sheet.steps), f"The bar is {what}: it gets no credit.")
    if outcome.solved is None:
        what = "nearly a mechanism" if outcome.standing.stability.verdict == "nearly a mechanism" else "a mechanism"
        return BarCheck(outcome.name, bar.id, tuple(sheet.steps), f"The truss is {what}: there are no forces.")
    own = (*outcome.task.strength.own_levels, len(levels) - 1)
    resisted = {at: (levels[at].tension, levels[at].flexural_buckling)[direction] for at in own}
    remark = _write_factor(outcome, number, direction, resisted, sheet)
    return BarCheck(outcome.name, bar.id, tuple(sheet.steps), remark)


def _direction(outcome: Outcome, number: int) -> int:
    """The direction that governs; where none does, the one in which dead load acts."""
    if outcome.solved is None:
        return 0
    governs = int(outcome.solved.figures.direction[number])
    if governs >= 0 and outcome.solved.figures.lowest[-1, number] < float("inf"):
        return governs
    return int(outcome.solved.figures.dead[:, number].sum() < 0)


def _member(outcome: Outcome, number: int, piece: int, sheet: Sheet) -> Member:
    """The bar's numbers as lines, from its plates at the governing place to its effective lengths."""
    stock, pieces = outcome.task.stock, outcome.task.strength.pieces
    fitted = stock.fitted[number]
    thickness = pieces.thickness[piece][: len(fitted.built.plates)]
    section = write_section(fitted.built, thickness, sheet)
    lengths = outcome.prepared.effective_lengths[:, number]
    return Member(
        E=sheet.given("E", fitted.E, "stress", "modulus of elasticity"),
        Fy=sheet.given("Fy", fitted.Fy, "stress", "yield strength"),
        Fu=sheet.given("Fu", fitted.Fu, "stress", "tensile strength"),
        area=section.area,
        inertia_horizontal=section.inertia_horizontal,
        inertia_vertical=section.inertia_vertical,
        inertia_product=section.inertia_product,
        effective_length_in_plane=sheet.given(
            "Li", lengths[0], "length", "effective length in the plane of the truss, K L"
        ),
        effective_length_out_of_plane=sheet.given("Lo", lengths[1], "length", "effective length out of plane, K L"),
        net_area=sheet.given("An/A", fitted.net_area, "ratio", "net over gross area"),
        shear_lag=sheet.given("U", fitted.shear_lag, "ratio", "shear lag factor"),
        curves=fitted.built.curves,
        plates=write_plates(fitted.built, thickness),
    )


def _write_factor(outcome: Outcome, number: int, direction: int, resisted: Mapping[int, Number], sheet: Sheet) -> str:
    """Capacity, factored dead load and rating factors; returns a remark where there is no factor.

    Parameters
    ----------
    resisted : resistance by number of the level, the upper level and those that have their own.
    """
    solved, basis = outcome.solved, outcome.task.basis
    if solved is None:
        return ""
    figures, sign = solved.figures, (1.0, -1.0)[direction]
    name = ("tension", "compression")[direction]
    capacities = _write_capacities(outcome, number, direction, resisted, sheet)
    capacity = capacities[len(basis.levels) - 1]
    parts = figures.slack
    if parts is not None and (parts.ends[number] or np.isfinite(parts.dead[-1, number])):
        return write_with_slack_bars(outcome, solved, parts, number, name, capacities, _live_factor, sheet)
    dead = _write_dead(outcome, figures.dead[:, number], direction, sheet)
    load = int(figures.load[number])
    if load < 0:
        sheet.note("margin", capacity - dead, "force", "capacity less factored dead load")
        exceeded = bool(figures.dead_exceeds[:, number].any())
        return (
            "Dead load alone exceeds the capacity: rating factor 0."
            if exceeded
            else "No live load acts on this bar that way."
        )
    live_name = solved.loads[load]
    size = max(sign * float(figures.live[load, direction, number]), 0.0)
    live = sheet.given("LL", size, "force", f"{live_name} at its worst, as {name}")
    for at, level in enumerate(basis.levels):
        gamma = _live_factor(sheet, level, outcome.prepared.kinds[live_name])
        factor = (capacities.get(at, capacity) - dead) / (gamma * live)
        title = f"rating factor, {level.name}"
        sheet.note(f"RF {level.name}", greatest(factor, 0.0), "ratio", title, basis.rating_source)
    return ""


def _write_dead(outcome: Outcome, dead: Array, direction: int, sheet: Sheet) -> Number:
    """Factored dead load, and what imposed changes add to it, in the direction that governs."""
    basis, sign, name = outcome.task.basis, (1.0, -1.0)[direction], ("tension", "compression")[direction]
    components = sheet.given("DC", sign * dead[0], "force", f"dead load of components, as {name}")
    wearing = sheet.given("DW", sign * dead[1], "force", f"wearing course, as {name}")
    gdc = _dead_factor(sheet, "gDC", basis.components, components)
    gdw = _dead_factor(sheet, "gDW", basis.wearing, wearing)
    if len(dead) == 2:
        return gdc * components + gdw * wearing
    size = float(np.maximum(sign * dead[2:], 0.0).sum())
    imposed = sheet.given("IM", size, "force", f"imposed changes that act as {name}; the others count for nothing")
    gim = sheet.given("gIM", basis.components.greatest, "ratio", "their load factor, as of DC", basis.components.source)
    return gdc * components + gdw * wearing + gim * imposed


def _dead_factor(sheet: Sheet, symbol: str, factors: DeadFactors, effect: Number) -> Number:
    acts = float(effect) > 0
    what = "load factor where dead load acts" if acts else "load factor where dead load relieves"
    return sheet.given(symbol, factors.greatest if acts else factors.least, "ratio", what, factors.source)


def _live_factor(sheet: Sheet, level: Level, kinds: Collection[str]) -> Number:
    title = f"live load factor, {level.name}"
    return sheet.given(f"gLL {level.name}", level.live_factor(kinds), "ratio", title, level.source)


def _told(outcome: Outcome, number: int, direction: int) -> str:
    """What the condition factor rests on."""
    state = outcome.conditions[number].state
    strength = outcome.task.strength
    raised = strength.pieces.raises[strength.piece[direction][number]]
    rests_on = f"state {state}" if state else "no state on record: as fair"
    why = "; raised, as the section was measured on cleaned steel" if raised else ""
    return f"condition factor, {rests_on}{why}"


def _write_capacities(
    outcome: Outcome, number: int, direction: int, resisted: Mapping[int, Number], sheet: Sheet
) -> dict[int, Number]:
    """Resistance times condition and system factor, where the basis has them, by number of the level."""
    combined = _write_factors(outcome, number, direction, sheet)
    levels = [level.name for level in outcome.task.basis.levels]
    names = {at: f" {levels[at]}" if len(resisted) > 1 else "" for at in resisted}
    return {
        at: sheet.note(
            f"C{names[at]}",
            resistance if combined is None else combined * resistance,
            "force",
            f"capacity,{names[at]}" if names[at] else "capacity",
        )
        for at, resistance in resisted.items()
    }


def _write_factors(outcome: Outcome, number: int, direction: int, sheet: Sheet) -> Number | None:
    """Condition times system factor; None where the basis has none."""
    condition = float(outcome.condition_factor[direction, number])
    system = float(outcome.system_factor[number])
    if math.isnan(condition):
        return None
    phi_c_told = _told(outcome, number, direction)
    phi_c = sheet.given("phi_c", condition, "ratio", phi_c_told)
    phi_s = sheet.given("phi_s", system, "ratio", "system factor")
    product = outcome.task.basis.combined_factor(phi_c, phi_s)
    return sheet.note("phi_c phi_s", product, "ratio", "their product, 0.85 at least")
