"""What each rating basis asks, and resistances by allowable stresses and by the Eurocodes, written a second time.

AASHTO Manual for Bridge Evaluation 6B; EN 1993-1-1 6.2.3, 6.3.1, EN 1993-1-5 4.4, EN 1993-2, EN 1990 A2. From memory.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

from independent import sections
from independent.condition import Condition, Piece
from independent.resistance import Resistance, covered, effective, euler, lengths, net_section, resistance, strengths
from independent.units import si

JSON = dict[str, Any]
Strength = Callable[[JSON, Condition, str, int | None, float], Resistance]
ALPHA = {"a": 0.21, "b": 0.34, "c": 0.49, "d": 0.76}


def service_stress(ratio: float, E: float, fy: float) -> float:
    """Return a column's stress without factor of safety (Pa) for KL/r."""
    if ratio * ratio <= 2 * math.pi**2 * E / fy:
        return fy * (1 - ratio * ratio * fy / (4 * math.pi**2 * E))
    return math.pi**2 * E / (ratio * ratio)


def service_column(condition: Condition, piece: Piece, at: tuple[float, float], fy: float) -> tuple[float, bool]:
    """Return a column's strength without factor of safety (N), and whether plates are slender."""
    p = sections.properties(condition.section, piece.thickness, condition.turned)
    E = si(condition.material["E"])
    stress = service_stress(math.pi * math.sqrt(E * p.area / euler(p, E, *at)), E, fy)
    share, slender = effective(condition.section, piece, E, fy, stress)
    return stress * p.area * share, slender


def curves(section: JSON, turned: int) -> tuple[str, str]:
    """Return the buckling curves in and out of plane (EN 1993-1-1, Table 6.2); flanges here are below 40 mm."""
    shape = section["shape"]
    if shape in ("rectangular tube", "round tube"):
        made = section.get("formed", "cold")
        both = "a" if made == "hot" else "b" if made == "welded" and shape == "rectangular tube" else "c"
        return both, both
    if shape == "i section":
        tall = si(section["depth"]) / si(section["flange width"]) > 1.2
        pair = ("a", "b") if section.get("rolled", False) and tall else ("b", "c")
        return pair if turned != 90 else (pair[1], pair[0])
    return ("b", "b") if "angle" in shape else ("c", "c")


def widths(section: JSON, now: dict[str, float]) -> list[tuple[float, float, bool]]:
    """Return clear width, thickness and whether both edges are held, of each flat part."""
    if section["shape"] == "rectangular tube":
        d, b, t = (si(section[key]) for key in ("depth", "width", "thickness"))
        return [((b if side in ("top wall", "bottom wall") else d) - 2 * t, now[side], True) for side in now]
    if section["shape"] == "i section":
        d, b, f = (si(section[key]) for key in ("depth", "flange width", "flange thickness"))
        halves = [(b / 2, now[flange], False) for flange in ("top flange", "bottom flange")]
        return [(d - 2 * f, now["web"], True), *halves, *halves]
    return []


def class_4(section: JSON, piece: Piece, E: float, fy: float) -> tuple[float, bool]:
    """Return the share of the area that is effective (EN 1993-1-5, 4.4), and whether any part is slender."""
    square = 235e6 / fy * E / 210e9
    if section["shape"] == "round tube":
        ratio = (si(section["diameter"]) - si(section["thickness"])) / piece.thickness["wall"] + 1
        return min(1.0, 90 * square / ratio), ratio > 90 * square
    lost = 0.0
    for width, t, held in widths(section, piece.thickness):
        ratio = width / t / (28.4 * math.sqrt(square) * math.sqrt(4.0 if held else 0.43))
        if ratio > (0.673 if held else 0.748):
            lost += width * t * (1 - min(1.0, 1 / ratio - (0.22 if held else 0.188) / ratio**2))
    return 1 - lost / sections.from_plates(section, piece.thickness).area, lost > 0


def perry(strength: float, critical: float, alpha: float) -> float:
    """Return what an imperfect strut bears (N): the lesser root of (R - N)(C - N) = eta C N."""
    ratio = math.sqrt(strength / critical)
    if ratio <= 0.2:
        return strength
    middle = strength + critical * (1 + alpha * (ratio - 0.2))
    # 2 R C over the sum, as the difference of the two would lose digits
    return 2 * strength * critical / (middle + math.sqrt(middle**2 - 4 * strength * critical))


def european_column(condition: Condition, piece: Piece, at: tuple[float, float], fy: float) -> tuple[float, bool]:
    """Return a column's strength without partial factor (N), and whether plates are slender."""
    p = sections.properties(condition.section, piece.thickness, condition.turned)
    E = si(condition.material["E"])
    share, slender = class_4(condition.section, piece, E, fy)
    strength = fy * p.area * share
    inside, outside = (ALPHA[name] for name in curves(condition.section, condition.turned))
    scale = math.pi**2 * E
    if abs(p.product) > 1e-9 * (p.horizontal + p.vertical):
        return perry(strength, euler(p, E, *at), max(inside, outside)), slender
    both = (scale * p.horizontal / at[0] ** 2, inside), (scale * p.vertical / at[1] ** 2, outside)
    return min(perry(strength, critical, alpha) for critical, alpha in both), slender


Column = Callable[[Condition, Piece, tuple[float, float], float], tuple[float, bool]]


def by(gross: float, net: float, column: Column, safety: float) -> Strength:
    """Return a resistance: parts of yield and tensile strength in tension, a column over a factor of safety."""

    def found(bar: JSON, condition: Condition, top_chord: str, built: int | None, left: float = 1.0) -> Resistance:
        fy, fu = strengths(condition.material, built)
        pieces = [
            Piece(p.length, {name: t * left for name, t in p.thickness.items()}, p.measured)
            for p in condition.pieces("strength")
        ]
        least = min(sections.properties(condition.section, p.thickness).area for p in pieces)
        plain, torn = gross * fy * least, net * fu * least * net_section(bar, condition.section)
        columns = [column(condition, p, lengths(bar, top_chord, condition.length), fy) for p in pieces]
        return Resistance(
            min(plain, torn),
            "tension yield" if plain <= torn else "tension fracture",
            min(strength for strength, _ in columns) / safety,
            least,
            measured=False,
            slender=any(slender for _, slender in columns),
            covered=all(covered(condition, piece, fy) for piece in pieces),
        )

    return found


@dataclass(frozen=True)
class Rules:
    """One basis: levels with their live factors by kind, dead factors, resistances by level, factors of state."""

    levels: dict[str, dict[str, float]]
    dead: tuple[tuple[float, float], tuple[float, float]]
    strength: dict[str, Strength]
    reduced: bool = False

    @property
    def upper(self) -> str:
        """Return the level at which what governs is told."""
        return list(self.levels)[-1]


def _all(factor: float, **other: float) -> dict[str, float]:
    return {**dict.fromkeys(("crowd", "vehicle", "concentrated", "uniform"), factor), **other}


RULES = {
    "lrfr": Rules(
        {"inventory": _all(1.75), "operating": _all(1.35)},
        ((1.25, 0.90), (1.50, 0.65)),
        {"inventory": resistance, "operating": resistance},
        reduced=True,
    ),
    "allowable stress": Rules(
        {"inventory": _all(1.0), "operating": _all(1.0)},
        ((1.0, 1.0), (1.0, 1.0)),
        {"inventory": by(0.55, 0.50, service_column, 2.12), "operating": by(0.75, 0.67, service_column, 1.70)},
    ),
    "eurocode": Rules(
        {"ultimate": _all(1.35, uniform=1.50)},
        ((1.35, 1.0), (1.35, 1.0)),
        {"ultimate": by(1.0, 0.9 / 1.25, european_column, 1.1)},
    ),
}
