"""Factored resistance of one bar by AASHTO LRFD 6.8, 6.9 and 6.5.4.2, with effective widths of AISC 360-16 E7.

All clauses and factors from memory, written a second time on purpose.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

from independent import sections
from independent.condition import Condition, Piece
from independent.units import si

JSON = dict[str, Any]
LOOSE = ("bolted", "riveted", "pinned")
ERAS = ((1905, 26, 52), (1936, 30, 60), (1963, 33, 66), (10**9, 36, 66))  # up to and with that year, ksi


def strengths(material: JSON, built: int | None) -> tuple[float, float]:
    """Return yield and tensile strength (Pa), by year built where the file has none (MBE Table 6A.6.2.1-1)."""
    era = next(pair for year, *pair in ERAS if (built or 0) <= year)
    old = [26, 48] if material["kind"] == "wrought iron" else era
    fy = si(material["Fy"]) if "Fy" in material else si(f"{old[0]} ksi")
    fu = si(f"{old[1]} ksi")
    if "Fu" in material:
        fu = si(material["Fu"])
    elif "Fy" in material:
        fu = min(fu, 1.2 * fy)
    return fy, fu


@dataclass(frozen=True)
class Resistance:
    """Factored resistances (N) with the check that governs in tension; areas in m^2."""

    tension: float
    tension_check: str
    compression: float
    area: float
    measured: bool
    slender: bool
    covered: bool = True


def net_section(bar: JSON, section: JSON) -> float:
    """Return net area times shear lag, both with their defaults."""
    loose = bar.get("ends", "welded") in LOOSE
    bar_like = section["shape"] in ("round bar", "flat bar")
    net = bar.get("net area", 0.75 if loose or section["shape"] == "round bar" else 1.0)
    lag = 1.0
    if loose and not bar_like and bar.get("connected") != "both legs":
        lag = 0.60
    elif not loose and section["shape"] == "angle" and bar.get("connected") != "both legs":
        lag = 0.80
    return net * bar.get("shear lag", lag)


def euler(p: sections.Properties, E: float, inside: float, outside: float) -> float:
    """Return the lesser elastic buckling force (N) for the effective lengths in and out of plane (m)."""
    a, b = p.horizontal / inside**2, p.vertical / outside**2
    c = p.product / (inside * outside)
    return math.pi**2 * E * ((a + b) / 2 - math.hypot((a - b) / 2, c))


def _elements(section: JSON, thickness: dict[str, float], E: float, fy: float) -> list[tuple[float, ...]]:
    """Return clear width, thickness, limit of slenderness and the two imperfection factors of each flat element."""
    ratio = math.sqrt(E / fy)
    if section["shape"] == "rectangular tube":
        d, b, t = (si(section[key]) for key in ("depth", "width", "thickness"))
        clear = {"top": b - 2 * t, "bottom": b - 2 * t, "left": d - 2 * t, "right": d - 2 * t}
        return [(clear[name.split()[0]], now, 1.40 * ratio, 0.20, 1.38) for name, now in thickness.items()]
    if section["shape"] == "i section":
        d, b, f = (si(section[key]) for key in ("depth", "flange width", "flange thickness"))
        web = thickness["web"]
        kc = min(max(4 / math.sqrt((d - 2 * f) / web), 0.35), 0.76)
        limit = 0.56 * ratio if section.get("rolled", False) else 0.64 * ratio * math.sqrt(kc)
        halves = [(b / 2, thickness[f"{side} flange"], limit, 0.22, 1.49) for side in ("top", "bottom")]
        return [(d - 2 * f, web, 1.49 * ratio, 0.18, 1.31), *halves, *halves]
    return []


def effective(section: JSON, piece: Piece, E: float, fy: float, stress: float) -> tuple[float, bool]:
    """Return the share of the area that is effective at a column stress (Pa), and whether any plate is slender."""
    if section["shape"] == "round tube":
        outside = si(section["diameter"]) - si(section["thickness"]) + piece.thickness["wall"]
        ratio = outside / piece.thickness["wall"]
        if ratio <= 0.11 * E / fy:
            return 1.0, False
        return min(1.0, 0.038 * E / (fy * ratio) + 2 / 3), True
    lost, slender = 0.0, False
    for width, t, limit, c1, c2 in _elements(section, piece.thickness, E, fy):
        slenderness = width / t
        slender = slender or slenderness > limit
        if slenderness > limit * math.sqrt(fy / stress):
            root = math.sqrt((c2 * limit / slenderness) ** 2 * fy / stress)
            lost += (width - min(width, width * (1 - c1 * root) * root)) * t
    return (1 - lost / sections.from_plates(section, piece.thickness).area, slender) if lost else (1.0, slender)


def column(condition: Condition, piece: Piece, lengths: tuple[float, float], fy: float) -> tuple[float, float, bool]:
    """Return one section's strength over the whole length (N), its effective share, whether plates are slender."""
    p = sections.properties(condition.section, piece.thickness, condition.turned)
    E = si(condition.material["E"])
    po, pe = fy * p.area, euler(p, E, *lengths)
    pn = 0.658 ** (po / pe) * po if pe >= 0.44 * po else 0.877 * pe
    share, slender = effective(condition.section, piece, E, fy, pn / p.area)
    return pn * share, share, slender


def lengths(bar: JSON, top_chord: str, length: float) -> tuple[float, float]:
    """Return effective lengths in and out of plane (m); a half-through top chord takes at least K 2.0 out of plane."""
    k = bar.get("k", {})
    out = k.get("out of plane", 1.0)
    if top_chord == "half through" and bar["role"] in ("top chord", "end post"):
        out = max(out, 2.0)
    free = si(bar["unbraced out of plane"]) if "unbraced out of plane" in bar else length
    return k.get("in plane", 1.0) * length, out * free


def covered(condition: Condition, piece: Piece, fy: float) -> bool:
    """Tell whether local buckling is settled: a round tube below 0.45 E/Fy (E7.2), no built-up plates.

    How the plates of a built-up section hold each other is not in the file.
    """
    if condition.section["shape"] == "round tube":
        mean = si(condition.section["diameter"]) - si(condition.section["thickness"])
        return mean / piece.thickness["wall"] + 1 < 0.45 * si(condition.material["E"]) / fy
    return condition.section["shape"] != "built up"


def resistance(bar: JSON, condition: Condition, top_chord: str, built: int | None, left: float = 1.0) -> Resistance:
    """Return the factored resistance with `left` of every plate's remaining thickness."""
    fy, fu = strengths(condition.material, built)
    pieces = [
        Piece(p.length, {name: t * left for name, t in p.thickness.items()}, p.measured)
        for p in condition.pieces("strength")
    ]
    areas = [sections.properties(condition.section, p.thickness).area for p in pieces]
    least = min(areas)
    measured = all(piece.measured for piece, area in zip(pieces, areas, strict=True) if area <= least * (1 + 1e-9))
    plain, torn = 0.95 * fy * least, 0.80 * fu * least * net_section(bar, condition.section)
    effective_lengths = lengths(bar, top_chord, condition.length)
    columns = [column(condition, piece, effective_lengths, fy) for piece in pieces]
    return Resistance(
        min(plain, torn),
        "tension yield" if plain <= torn else "tension fracture",
        0.95 * min(strength for strength, *_ in columns),
        least,
        measured,
        any(slender for *_, slender in columns),
        all(covered(condition, piece, fy) for piece in pieces),
    )


STATES = {"good": 1.00, "fair": 0.95, "poor": 0.85, "severe": 0.85, None: 0.95}
SYSTEMS = {"welded": 0.85, "riveted": 0.90, "eyebars": 0.90, "redundant": 1.00}


def condition_factor(condition: Condition, measured: bool) -> float:
    """Return the condition factor, raised by 0.05 where the section is measured on cleaned steel (MBE 6A.4.2.3)."""
    factor = STATES[condition.state]
    return min(1.00, factor + 0.05) if measured else factor
