"""What differs between two ratings of one footbridge that was told in two ways."""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Any

from models.rating.result import BarRating, Governing, Rating, TrussRating

SAME_WORDS = ("state", "known", "check", "load", "direction", "tension_check", "compression_check")
PURE = ("condition_factor", "system_factor", "loss_allowance", "without_it")
FORCES = ("dead_components", "dead_wearing", "tension", "compression", "demand", "capacity")


def close(one: Any, other: Any, rel: float, floor: float = 0.0) -> bool:
    """Tell whether two figures agree, or are the same word, or neither exists."""
    if isinstance(one, float) and isinstance(other, float):
        return math.isclose(one, other, rel_tol=rel, abs_tol=floor)
    return type(one) is type(other) and one == other


def differences(one: Rating, other: Rating, rel: float, force: float = 1.0, area: float = 1.0) -> list[str]:
    """Compare two ratings, truss by truss and bar by bar.

    Parameters
    ----------
    rel : relative tolerance of every figure; of forces, also of the largest in their truss.
    force, area : by how much the forces and areas of the other rating are larger.
    """
    found = list(_governing(one.structure, other.structure, rel))
    if one.trusses.keys() != other.trusses.keys():
        return [*found, f"trusses {sorted(one.trusses)} and {sorted(other.trusses)}"]
    for name, truss in one.trusses.items():
        found += [f"{name}: {what}" for what in _truss(truss, other.trusses[name], rel, force, area)]
    return found


def _governing(one: Governing, other: Governing, rel: float) -> Iterator[str]:
    for level, factor in one.rating_factor.items():
        if not close(factor, other.rating_factor[level], rel):
            yield f"structure {level}: {factor} and {other.rating_factor[level]}"
    places = [(found.truss, found.bar, found.check, found.load) for found in (one, other)]
    if places[0] != places[1]:
        yield f"governing: {places[0]} and {places[1]}"


def _truss(one: TrussRating, other: TrussRating, rel: float, force: float, area: float) -> Iterator[str]:
    counts = [
        (each.verdict, each.joints, each.bars_standing, each.reaction_components, each.degree, each.mechanisms)
        for each in (one, other)
    ]
    if counts[0] != counts[1]:
        yield f"{counts[0]} and {counts[1]}"
    floor = rel * force * max((abs(bar.dead_components or 0.0) for bar in one.bars), default=0.0)
    for total, again in zip(one.dead_total, other.dead_total, strict=True):
        if not close(force * total, again, rel, floor):
            yield f"dead load {total} and {again}"
    reactions = {reaction.joint: reaction for reaction in other.reactions}
    for reaction in one.reactions:
        again = reactions[reaction.joint]
        for key in ("dead", "least"):
            if not close(force * getattr(reaction, key), getattr(again, key), rel, floor):
                yield f"reaction at {reaction.joint}, {key}: {getattr(reaction, key)} and {getattr(again, key)}"
    rows = {bar.bar: bar for bar in other.bars}
    if sorted(rows) != sorted(bar.bar for bar in one.bars):
        yield "bars are not the same"
        return
    for bar in one.bars:
        yield from (f"{bar.bar}: {what}" for what in _bar(bar, rows[bar.bar], rel, force, area, floor))


def _bar(one: BarRating, other: BarRating, rel: float, force: float, area: float, floor: float) -> Iterator[str]:
    pairs = [(key, getattr(one, key), getattr(other, key), 1.0, 0.0) for key in (*SAME_WORDS, *PURE)]
    pairs += [(key, getattr(one, key), getattr(other, key), area, 0.0) for key in ("area", "nominal_area")]
    pairs += [(key, getattr(one, key), getattr(other, key), force, floor) for key in FORCES]
    pairs += [
        (f"rating factor {level}", factor, other.rating_factor[level], 1.0, 0.0)
        for level, factor in one.rating_factor.items()
    ]
    if (one.live is None) != (other.live is None):
        yield "live forces in one answer only"
    for name, effect in (one.live or {}).items():
        for end in ("maximum", "minimum"):
            again = getattr((other.live or {})[name], end)
            pairs.append((f"{name} {end}", getattr(effect, end), again, force, floor))
    for key, first, second, scale, least in pairs:
        scaled = first * scale if isinstance(first, float) else first
        if not close(scaled, second, rel, least):
            yield f"{key}: {first} and {second}"
