"""The end of a hand check where bars that cannot push go slack: forces as they are with those bars out."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import Final

from models.calculation import Number, Sheet, greatest
from models.rating.outcome import Outcome
from models.rating.solved import Solved
from models.rating.worked import SlackParts
from models.resistance.protocol import Level

_NO_EQUILIBRIUM: Final = "The factored dead load has no equilibrium unless bars push that can only pull: factor 0."
_EXCEEDED: Final = "Dead load alone exceeds the capacity: rating factor 0."
_ENDS: Final = "Equilibrium ends before the bar reaches its capacity: a bar that can only pull would have to push."

LiveFactor = Callable[[Sheet, Level, frozenset[str]], Number]


def write_with_slack_bars(
    outcome: Outcome,
    solved: Solved,
    parts: SlackParts,
    number: int,
    name: str,
    capacities: Mapping[int, Number],
    live_factor: LiveFactor,
    sheet: Sheet,
) -> str:
    """Rating factors of one bar; returns a remark where they are not those of its own capacity.

    Parameters
    ----------
    name : of the direction that governs. capacities : by number of the level, the upper level and those of their own.
    """
    basis, load = outcome.task.basis, int(solved.figures.load[number])
    if load < 0:
        return _dead_alone(parts, number, name, capacities[len(basis.levels) - 1], sheet)
    live_name = solved.loads[load]
    kinds = outcome.prepared.kinds[live_name]
    if parts.ends[number]:
        size = float(solved.figures.lowest[-1, number]) * basis.levels[-1].live_factor(kinds)
        multiple = sheet.given("mE", size, "ratio", f"{live_name}, times this, ends equilibrium")
        rooms = dict.fromkeys(range(len(basis.levels)), (multiple, 1.0))
    else:
        rooms = _rooms(outcome, parts, number, f"{live_name}, as {name}", capacities, sheet)
    for at, level in enumerate(basis.levels):
        room, live = rooms[at]
        factor = room / (live_factor(sheet, level, kinds) * live)
        title = f"rating factor, {level.name}"
        sheet.note(f"RF {level.name}", greatest(factor, 0.0), "ratio", title, basis.rating_source)
    return _ENDS if parts.ends[number] else ""


def _dead_alone(parts: SlackParts, number: int, name: str, capacity: Number, sheet: Sheet) -> str:
    if parts.ends[number]:
        return _NO_EQUILIBRIUM
    told = f"factored dead load with slack bars out, as {name}"
    dead = sheet.given("D", float(parts.dead[-1, number]), "force", told)
    sheet.note("margin", capacity - dead, "force", "capacity less factored dead load")
    return _EXCEEDED


def _rooms(
    outcome: Outcome, parts: SlackParts, number: int, what: str, capacities: Mapping[int, Number], sheet: Sheet
) -> dict[int, tuple[Number, Number]]:
    """What is left of the capacity for the live load, and the live load's force, by number of the level."""
    levels = outcome.task.basis.levels
    found: dict[int, tuple[Number, Number]] = {}
    for at in capacities:
        own = f" {levels[at].name}" if len(capacities) > 1 else ""
        told = f"with the bars out that are slack at the limit{own}"
        dead = sheet.given(f"D{own}", float(parts.dead[at, number]), "force", f"factored dead load {told}")
        live = sheet.given(f"LL{own}", float(parts.live[at, number]), "force", f"{what}, {told}")
        found[at] = capacities[at] - dead, live
    return {at: found.get(at, found[len(levels) - 1]) for at in range(len(levels))}
