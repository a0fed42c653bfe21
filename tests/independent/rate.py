"""The whole rating of a site document by the force method: one plain loop after another."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np
from independent import loads, sections
from independent.condition import Condition, fold
from independent.force_method import Frame
from independent.other_bases import RULES, Rules
from independent.resistance import SYSTEMS, Resistance, condition_factor
from independent.units import si

JSON = dict[str, Any]
NO_FORCE = 1e-9  # of the largest force in the truss: below it a bar has none
SINGULAR = 1e8
STEPS = 10
Candidate = tuple[float, str, str | None]


@dataclass(frozen=True)
class Effects:
    """Unfactored forces of one bar (N, tension positive)."""

    components: float
    wearing: float
    live: dict[str, tuple[float, float]]


def factored_dead(effects: Effects, sign: int, rules: Rules) -> float:
    """Return the factored dead effect in a direction: each part at its greatest factor where it adds."""
    parts = zip((effects.components, effects.wearing), rules.dead, strict=True)
    return sum((adds if sign * part > 0 else relieves) * sign * part for part, (adds, relieves) in parts)


def candidates(
    effects: Effects,
    own: Resistance,
    factor: float,
    factor_live: Mapping[str, float],
    tiny: float,
    rules: Rules = RULES["lrfr"],
) -> list[Candidate]:
    """Return every rating factor of a bar with its check and load; `factor_live` is by name of the load."""
    found: list[Candidate] = []
    directions = ((1, own.tension, own.tension_check), (-1, own.compression, "flexural buckling"))
    for sign, strength, check in directions:
        margin = factor * strength - factored_dead(effects, sign, rules)
        if margin < 0:
            found.append((0.0, "dead load", None))
            continue
        for name, extremes in effects.live.items():
            force = sign * extremes[0 if sign > 0 else 1]
            if force > tiny:
                found.append((margin / (factor_live[name] * force), check, name))
    return found


class Truss:
    """One truss of the document with everything that its bars' readings do to it."""

    def __init__(self, document: JSON, name: str, truss: JSON) -> None:
        self.document, self.name, self.truss = document, name, truss
        self.joints = {joint: (si(x), si(y)) for joint, (x, y) in truss["joints"].items()}
        self.bars: dict[str, JSON] = {bar["id"]: bar for bar in truss["bars"]}
        self.conditions = {key: fold(document, name, bar, self.length(bar)) for key, bar in self.bars.items()}
        self.carrying = [key for key in self.bars if not self.conditions[key].severed]
        self.across = loads.Across(document, name)
        self.stations = [self.joints[joint][0] for joint in truss["deck joints"]]
        weighed = [
            (bar, self.length(bar), self.conditions[key].section, self.conditions[key].material)
            for key, bar in self.bars.items()
        ]
        units = [{joint: 1.0} for joint in truss["deck joints"]]
        self.cases = [*loads.dead(document, name, truss, weighed), *units]
        self.frame, self.base = self.framed(self.carrying)
        self._flexible: dict[str, list[float]] = {}
        self._owns: dict[tuple[str, float, str], Resistance] = {}
        self.rules = RULES[document["rating"]["basis"]]
        kinds = {load["name"]: load["kind"] for load in document["rating"]["live"]}
        self.live_factors = {
            level: {name: by_kind[kind] for name, kind in kinds.items()} for level, by_kind in self.rules.levels.items()
        }
        uncertain = self.frame.self_stress > 0 and any(self.conditions[key].uncertain() for key in self.carrying)
        self.variants = ("zero", "whole") if uncertain else ("zero",)

    def length(self, bar: JSON) -> float:
        """Return a bar's length (m)."""
        a, b = self.joints[bar["from"]], self.joints[bar["to"]]
        return math.hypot(b[0] - a[0], b[1] - a[1])

    def framed(self, keys: list[str]) -> tuple[Frame, np.ndarray | None]:
        """Return the truss of these bars and its forces with every redundant at zero; none for a mechanism."""
        ends = [(self.bars[key]["from"], self.bars[key]["to"]) for key in keys]
        frame = Frame(self.joints, self.truss["supports"], ends)
        if frame.mechanisms or frame.condition() > SINGULAR:
            return frame, None
        return frame, frame.determinate(frame.loads(self.cases))

    def flexibility(self, key: str, variant: str, left: float = 1.0) -> float:
        """Return the integral of dx/(E A(x)) along a bar (m/N)."""
        condition = self.conditions[key]
        E = si(condition.material["E"])
        total = 0.0
        for piece in condition.pieces(variant):
            thickness = {name: t * left for name, t in piece.thickness.items()}
            total += piece.length / (E * sections.properties(condition.section, thickness).area)
        return total

    def effects(self, row: np.ndarray) -> Effects:
        """Return one bar's forces from its row of dead and unit cases."""
        numbers = [float(number) for number in row]
        live = {
            load["name"]: loads.live(load, self.across, self.stations, numbers[2:])
            for load in self.document["rating"]["live"]
        }
        return Effects(numbers[0], numbers[1], live)

    def own(self, key: str, left: float = 1.0, level: str = "") -> Resistance:
        """Return a bar's factored resistance with a share of its thickness left, at the upper level or another."""
        level = level or self.rules.upper
        if (key, left, level) not in self._owns:
            built, top = self.document.get("built"), self.truss["top chord"]
            strength = self.rules.strength[level]
            self._owns[key, left, level] = strength(self.bars[key], self.conditions[key], top, built, left)
        return self._owns[key, left, level]

    def found(self, key: str, effects: Effects, tiny: float, left: float = 1.0, level: str = "") -> list[Candidate]:
        """Return every rating factor of a bar under these forces, with its check and load."""
        level = level or self.rules.upper
        own, factor = self.own(key, left, level), strength_factor(self, key)
        return candidates(effects, own, factor, self.live_factors[level], tiny, self.rules)

    def factors(self, key: str) -> tuple[float, float] | tuple[None, None]:
        """Return the condition factor and the system factor of a bar; none where the basis has none."""
        if not self.rules.reduced:
            return None, None
        system = self.bars[key].get("system", self.document["rating"]["system"])
        return condition_factor(self.conditions[key], self.own(key).measured), SYSTEMS[system]

    def all_effects(self, variant: str, without: str | None = None) -> dict[str, Effects] | None:
        """Return the forces of every bar that carries; none for a mechanism."""
        frame, base, keys = self.frame, self.base, self.carrying
        if without is not None:
            keys = [key for key in keys if key != without]
            frame, base = self.framed(keys)
        if base is None:
            return None
        forces = frame.compatible(base, [self.flexibility(key, variant) for key in keys])
        return {key: self.effects(forces[number]) for number, key in enumerate(keys)}

    def thinned(self, key: str, variant: str, left: float) -> Effects:
        """Return one bar's forces with only `left` of its plates' thickness."""
        if self.base is None:
            raise ValueError(self.name)
        if variant not in self._flexible:
            self._flexible[variant] = [self.flexibility(one, variant) for one in self.carrying]
        place = self.carrying.index(key)
        flexible = list(self._flexible[variant])
        flexible[place] = self.flexibility(key, variant, left)
        return self.effects(self.frame.compatible(self.base, flexible)[place])


def largest(effects: dict[str, Effects]) -> float:
    """Return the largest force (N) that any load puts into any bar of a truss."""
    return max(
        abs(force)
        for own in effects.values()
        for force in (own.components, own.wearing, *(end for pair in own.live.values() for end in pair))
    )


def strength_factor(truss: Truss, key: str) -> float:
    """Return the product of condition and system factor, not below 0.85 (MBE 6A.4.2.1)."""
    condition, system = truss.factors(key)
    return 1.0 if condition is None or system is None else max(0.85, condition * system)


def lowest(found: list[Candidate]) -> float | None:
    """Return the least rating factor, or none."""
    return min((factor for factor, *_ in found), default=None)


def crossing(above: Callable[[float], float], low: float, high: float) -> float:
    """Return where a function falls below zero from `low` (not below) to `high` (below): Illinois false position."""
    left, right, last = above(low), above(high), 0
    for _ in range(200):
        middle = (low * right - high * left) / (right - left)
        value = above(middle)
        side = 1 if value >= 0 else -1
        halved = 0.5 if side == last else 1.0  # an end that stays twice pulls with half its weight
        if side > 0:
            low, left, right = middle, value, right * halved
        else:
            high, right, left = middle, value, left * halved
        last = side
        if abs(value) < 1e-13 or high - low < 1e-13:
            return middle
    raise ArithmeticError(low, high)


def allowance(truss: Truss, key: str, effects: dict[str, dict[str, Effects]], tiny: float) -> float | None:
    """Return the share of thickness that may still go until the operating factor is 1.

    The first step of a grid that ends below 1, then the crossing in it, everything computed again at every trial.
    """

    def at(lost: float) -> float:
        held = truss.frame.self_stress == 0
        found = []
        for variant in truss.variants:
            forces = effects[variant][key] if held else truss.thinned(key, variant, 1 - lost)
            found += truss.found(key, forces, tiny, 1 - lost)
        least = lowest(found)
        return math.inf if least is None else least

    now = at(0.0)
    if now < 1:
        return 0.0
    low = 0.0
    for step in range(1, STEPS + 1):
        high = 0.95 * step / STEPS
        if at(high) < 1:
            return None if now == math.inf else crossing(lambda lost: min(at(lost), 10.0) - 1, low, high)
        low = high
    return None


def without(truss: Truss, key: str, tiny: float) -> str | float | None:
    """Return what one bar's loss leaves: `mechanism`, or the lowest operating factor of the truss's other bars."""
    found: list[Candidate] = []
    for variant in truss.variants:
        effects = truss.all_effects(variant, key)
        if effects is None:
            return "mechanism"
        for other, own in effects.items():
            found += truss.found(other, own, tiny)
    return lowest(found)


def severed(truss: Truss, key: str) -> JSON:
    """Return the row of a bar that is gone."""
    area = sections.properties(truss.conditions[key].section, truss.conditions[key].nominal()).area
    zero = dict.fromkeys(truss.rules.levels, 0.0)
    return {"truss": truss.name, "bar": key, "area": 0.0, "nominal area": area, "rating factor": zero, "severed": True}


def row(truss: Truss, key: str, effects: dict[str, dict[str, Effects]], tiny: float, redundancy: bool) -> JSON:
    """Return one bar's row: its worse variant's forces, factors and every candidate that could govern."""
    own, condition = truss.own(key), truss.conditions[key]
    phi_c, phi_s = truss.factors(key)
    by_level = {
        level: {v: truss.found(key, effects[v][key], tiny, level=level) for v in truss.variants}
        for level in truss.rules.levels
    }
    upper = by_level[truss.rules.upper]
    shown = min(truss.variants, key=lambda v: math.inf if lowest(upper[v]) is None else lowest(upper[v]))
    forces = effects[shown][key]
    allowed = allowance(truss, key, effects, tiny) if redundancy else None
    return {
        "truss": truss.name,
        "bar": key,
        "severed": False,
        "area": own.area,
        "nominal area": sections.properties(condition.section, condition.nominal()).area,
        "dead": {"components": forces.components, "wearing": forces.wearing},
        "live": {name: {"max": most, "min": least} for name, (most, least) in forces.live.items()},
        "resistance": {"tension": own.tension, "compression": own.compression},
        "condition factor": phi_c,
        "system factor": phi_s,
        "rating factor": {level: lowest([c for v in found.values() for c in v]) for level, found in by_level.items()},
        "candidates": sorted((c for v in upper.values() for c in v), key=lambda c: c[0]),
        "lower resistance": {
            level: (lower.tension, lower.compression)
            for level, lower in ((level, truss.own(key, level=level)) for level in truss.rules.levels)
            if (lower.tension, lower.compression) != (own.tension, own.compression)
        },
        "loss allowance": allowed,
        "without it": without(truss, key, tiny) if redundancy else None,
        "allowance covered": truss.own(key, 0.05 if allowed is None else 1 - allowed).covered,
        "slender": own.slender,
        "largest force": tiny / NO_FORCE,
    }


def expanded(document: JSON) -> dict[str, JSON]:
    """Return the trusses with `same as` written out."""
    trusses = document["trusses"]
    return {name: trusses[truss["same as"]] if "same as" in truss else truss for name, truss in trusses.items()}


def counts(truss: Truss) -> JSON:
    """Return what can be counted in a truss, and its verdict."""
    frame, bars, joints = truss.frame, len(truss.carrying), len(truss.joints)
    if frame.mechanisms:
        verdict = "mechanism"
    elif truss.base is None:
        verdict = "nearly a mechanism"
    else:
        verdict = "redundant" if frame.self_stress else "determinate"
    return {
        "joints": joints,
        "bars": bars,
        "reactions": frame.reactions,
        "degree": bars + frame.reactions - 2 * joints,
        "mechanisms": frame.mechanisms,
        "verdict": verdict,
    }


def solve(document: JSON, *, redundancy: bool = True) -> JSON:
    """Rate a site document.

    Parameters
    ----------
    document : a site file as parsed JSON.
    redundancy : also find loss allowances and what is left without each bar (the slow part).

    Returns
    -------
    `trusses`, `bars` and `structure` much as in the result file; each bar also lists its `candidates`
    (factor at the upper level, check, load), lowest first, so that a tie can be told from a disagreement.
    """
    result: JSON = {"trusses": {}, "bars": [], "structure": None}
    for name, one in expanded(document).items():
        truss = Truss(document, name, one)
        result["trusses"][name] = counts(truss)
        result["bars"] += [severed(truss, key) for key in truss.bars if key not in truss.carrying]
        if truss.base is None:
            continue
        effects = {variant: truss.all_effects(variant) or {} for variant in truss.variants}
        tiny = NO_FORCE * max(largest(own) for own in effects.values())
        result["bars"] += [row(truss, key, effects, tiny, redundancy) for key in truss.carrying]
    levels = RULES[document["rating"]["basis"]].levels
    rated = [bar for bar in result["bars"] if not bar["severed"] and bar["candidates"]]
    moving = any(
        truss["mechanisms"] or truss["verdict"] == "nearly a mechanism" for truss in result["trusses"].values()
    )
    result["structure"] = (
        dict.fromkeys(levels, 0.0)
        if moving
        else {level: min((bar["rating factor"][level] for bar in rated), default=None) for level in levels}
    )
    return result


def conditions(document: JSON, truss: str) -> dict[str, Condition]:
    """Return the folded condition of each bar of a truss, for tests of the fold alone."""
    return Truss(document, truss, expanded(document)[truss]).conditions
