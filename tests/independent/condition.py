"""What the visits say about one bar: its plates' thickness along it, and whether it carries at all.

The rules that are needed for even losses: readings of known or unknown extent, estimates, severed, replaced.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, field
from itertools import pairwise
from typing import Any

from independent import sections

JSON = dict[str, Any]


@dataclass
class Spot:
    """One averaged reading on one plate. Lengths in m from the bar's start."""

    plate: str
    centre: float
    value: float
    low: float
    high: float
    unknown: bool
    visit: int
    order: int
    cleaned: bool
    leftovers: list[tuple[float, float, float]] = field(default_factory=list)

    def covers(self, x: float, mode: str) -> float | None:
        """Return the thickness that this reading gives at x, or nothing. Modes: strength, zero, whole."""
        if self.unknown and mode != "strength":
            return self.value if mode == "whole" else None
        if self.low <= x <= self.high:
            return self.value
        inside = [value for low, high, value in self.leftovers if low <= x <= high]
        return min(inside) if inside else None


@dataclass(frozen=True)
class Estimate:
    """A guessed loss of area over a stretch of the bar."""

    low: float
    high: float
    loss: float
    order: int


@dataclass(frozen=True)
class Piece:
    """A stretch of bar with one section. `measured` where every plate rests on a reading on cleaned steel."""

    length: float
    thickness: dict[str, float]
    measured: bool


@dataclass
class Condition:
    """The state of one bar after all its entries."""

    length: float
    section: JSON
    material: JSON
    turned: int
    severed: bool = False
    state: str | None = None
    state_visit: int = -1
    spots: list[Spot] = field(default_factory=list)
    estimates: list[Estimate] = field(default_factory=list)
    _known: JSON = field(default_factory=dict)

    def nominal(self) -> dict[str, float]:
        """Return the plates as built."""
        if "nominal" not in self._known:
            self._known["nominal"] = sections.nominal(self.section)
        return self._known["nominal"]

    def uncertain(self) -> bool:
        """Tell whether any reading has no extent."""
        return any(spot.unknown for spot in self.spots)

    def _thickness(self, plate: str, x: float, mode: str) -> tuple[float, bool]:
        nominal = self.nominal()[plate]
        covering = [
            (value, spot) for spot in self.spots if spot.plate == plate and (value := spot.covers(x, mode)) is not None
        ]
        latest = max((spot.order for _, spot in covering), default=-1)
        rest = [e.loss for e in self.estimates if e.low <= x <= e.high and e.order > latest]
        guessed = nominal * min((self._left(loss) for loss in rest), default=1.0)
        if not covering:
            return guessed, False
        value, spot = min(covering, key=lambda pair: pair[0])
        fresh = spot.cleaned and spot.visit >= self.state_visit
        return (value, fresh) if value <= guessed else (guessed, False)

    def _left(self, loss: float) -> float:
        return math.sqrt(1 - loss) if self.section["shape"] == "round bar" else 1 - loss

    def pieces(self, mode: str) -> list[Piece]:
        """Return the stretches of one section each, cut where anything changes. Ask only when all is folded."""
        if mode not in self._known:
            self._known[mode] = self._cut(mode)
        return self._known[mode]

    def _cut(self, mode: str) -> list[Piece]:
        cuts = {0.0, self.length}
        for spot in self.spots:
            cuts |= {spot.low, spot.high} | {end for low, high, _ in spot.leftovers for end in (low, high)}
        for estimate in self.estimates:
            cuts |= {estimate.low, estimate.high}
        ends = sorted(cuts)
        pieces = []
        for low, high in pairwise(ends):
            found = {plate: self._thickness(plate, (low + high) / 2, mode) for plate in self.nominal()}
            thickness = {plate: value for plate, (value, _) in found.items()}
            pieces.append(Piece(high - low, thickness, all(fresh for _, fresh in found.values())))
        return pieces


def _span(centre: float, extent: float, length: float) -> tuple[float, float]:
    return max(0.0, centre - extent / 2), min(length, centre + extent / 2)


def _read(condition: Condition, entry: JSON, order: int, visit: int) -> None:
    groups: dict[tuple[str, float], list[JSON]] = {}
    for reading in entry.get("readings", []):
        groups.setdefault((reading["plate"], reading["station"]), []).append(reading)
    depth = sections.depth(condition.section, condition.turned)
    for (plate, station), readings in groups.items():
        values = [sections.si(text) for reading in readings for text in reading["thickness"]]
        value = sum(values) / len(values)
        given = [sections.si(reading["extent"]) for reading in readings if "extent" in reading]
        centre = station * condition.length
        earlier = [s for s in condition.spots if s.plate == plate and abs(s.centre - centre) <= depth / 2]
        known = [s for s in earlier if not s.unknown]
        if given or not known:
            low, high = _span(centre, max(given) if given else 2 * depth, condition.length)
        else:
            low, high = known[-1].low, known[-1].high
        cleaned = all(reading.get("cleaned", False) for reading in readings)
        spot = Spot(plate, centre, value, low, high, not given and not known, visit, order, cleaned)
        for old in known:
            for left, right, thin in [(old.low, old.high, old.value), *old.leftovers]:
                spot.leftovers.append((left, min(right, low), min(thin, value)))
                spot.leftovers.append((max(left, high), right, min(thin, value)))
        spot.leftovers = [piece for piece in spot.leftovers if piece[0] < piece[1]]
        condition.spots = [s for s in condition.spots if s not in earlier] + [spot]


def _guess(condition: Condition, entry: JSON, order: int) -> None:
    if "extent" in entry:
        centre = entry.get("station", 0.5) * condition.length
        low, high = _span(centre, sections.si(entry["extent"]), condition.length)
    else:
        low, high = 0.0, condition.length
        condition.estimates = []
    condition.estimates.append(Estimate(low, high, entry["estimated loss"], order))


def fold(document: JSON, truss: str, bar: JSON, length: float) -> Condition:
    """Walk the visits by date and their observations by place in the file, and keep what holds for this bar."""
    section, material = document["sections"][bar["section"]], document["materials"][bar["material"]]
    condition = Condition(length, section, material, bar.get("turned", 0))
    visits = sorted(document.get("visits", []), key=lambda visit: (visit["date"], visit.get("id", "")))
    order = 0
    for number, visit in enumerate(visits):
        for entry in visit["observations"]:
            order += 1
            if (entry["truss"], entry["bar"]) != (truss, bar["id"]):
                continue
            if "replaced" in entry:
                new = entry["replaced"]
                condition = Condition(
                    length,
                    document["sections"][new["section"]],
                    document["materials"][new["material"]],
                    condition.turned,
                )
            if "severed" in entry:
                condition.severed = bool(entry["severed"])
            if "state" in entry:
                condition.state, condition.state_visit = entry["state"], number
            if "estimated loss" in entry:
                _guess(condition, entry, order)
            _read(condition, entry, order, number)
    return condition
