"""Loads on a truss: dead load by joint, the crowd by splitting at zeros, the vehicle by trying every place."""

from __future__ import annotations

import math
from collections.abc import Iterable
from functools import cache
from itertools import pairwise
from typing import Any

import numpy as np
from independent.sections import nominal, properties
from independent.units import GRAVITY, si

JSON = dict[str, Any]
NEAR = 1e-9  # m: two places that are one
LEVELS = 300  # of worth, tried before the search is made finer

NAMED = {
    "H5": {"axles": [["0 ft", "2 kip"], ["14 ft", "8 kip"]], "track": "6 ft"},
    "H10": {"axles": [["0 ft", "4 kip"], ["14 ft", "16 kip"]], "track": "6 ft"},
    "en service": {"axles": [["0 m", "80 kN"], ["3 m", "40 kN"]], "track": "1.3 m"},
}


class Across:
    """Where the deck lies between the trusses, seen from one of them: x = 0 at it, x = spacing at the other."""

    def __init__(self, document: JSON, truss: str) -> None:
        deck = document["deck"]
        self.alone = len(document["trusses"]) == 1
        self.width = si(deck["width"])
        self.dead_width = si(deck.get("dead width", deck["width"]))
        self.spacing = si(deck.get("truss spacing", deck["width"]))
        self.towards = sum((1 if name == truss else -1) * si(text) for name, text in deck.get("offset", {}).items())
        middle = self.spacing / 2 - self.towards
        self.near, self.far = middle - self.width / 2, middle + self.width / 2
        self.dead_share = 1.0 if self.alone else (self.spacing - middle) / self.spacing

    def strips(self) -> tuple[float, float]:
        """Return the widths (m) that press on the truss and that lift it."""
        if self.alone:
            return self.width, 0.0
        s = self.spacing
        press_to, lift_from = min(self.far, s), max(self.near, s)

        def area(a: float, b: float) -> float:
            return (b - a) * ((s - a) / s + (s - b) / s) / 2  # trapezium under the lever line

        press = area(self.near, press_to) if press_to > self.near else 0.0
        lift = -area(lift_from, self.far) if self.far > lift_from else 0.0
        return press, lift

    def strip(self) -> float:
        """Return the width (m) of deck that presses on the truss."""
        return self.width if self.alone else max(0.0, min(self.far, self.spacing) - self.near)

    def wheels(self, track: float) -> tuple[float, float]:
        """Return the greatest and the least share of an axle, its outer wheel at the near and at the far kerb."""
        if self.alone:
            return 1.0, 1.0

        def share(x: float) -> float:
            return (self.spacing - x) / self.spacing

        near = (share(self.near) + share(self.near + track)) / 2
        far = (share(self.far) + share(self.far - track)) / 2
        return near, far


def halves(stations: list[float], per_metre: float) -> list[float]:
    """Give each panel's load half to the deck joint at either end (N)."""
    joints = [0.0] * len(stations)
    for i, (a, b) in enumerate(pairwise(stations)):
        joints[i] += per_metre * (b - a) / 2
        joints[i + 1] += per_metre * (b - a) / 2
    return joints


def dead(document: JSON, name: str, truss: JSON, bars: Iterable[tuple[JSON, float, JSON, JSON]]) -> tuple[JSON, JSON]:
    """Return the downward loads (N) by joint: components, wearing. Bars come with length, section, material."""
    components = dict.fromkeys(truss["joints"], 0.0)
    wearing = dict.fromkeys(truss["joints"], 0.0)
    allowance = document["rating"].get("connection allowance", 1.10)
    for bar, length, section, material in bars:
        area = properties(section, nominal(section)).area
        weight = area * length * si(material["density"]) * float(GRAVITY) * allowance
        for end in ("from", "to"):
            components[bar[end]] += weight / 2
    deck, across = document["deck"], Across(document, name)
    edge = deck.get("edge", "0 N/m")
    line = si(edge.get(name, "0 N/m") if isinstance(edge, dict) else edge)
    share = across.dead_share * across.dead_width
    stations = [si(truss["joints"][joint][0]) for joint in truss["deck joints"]]
    for joint, load in zip(truss["deck joints"], halves(stations, si(deck["dead"]) * share + line), strict=True):
        components[joint] += load
    paving = si(deck.get("wearing", "0 Pa"))
    for joint, load in zip(truss["deck joints"], halves(stations, paving * share), strict=True):
        wearing[joint] += load
    return components, wearing


def parts(stations: list[float], ordinates: list[float]) -> tuple[float, float]:
    """Return the integrals of the positive and of the negative part (both as they are signed) of straight pieces."""
    above, below = [], []
    for x1, x2, y1, y2 in zip(stations, stations[1:], ordinates, ordinates[1:], strict=False):
        if y1 * y2 >= 0:
            (above if y1 + y2 > 0 else below).append((x2 - x1) * (y1 + y2) / 2)
        else:
            zero = (x2 - x1) * y1 / (y1 - y2)
            for length, y in ((zero, y1), (x2 - x1 - zero, y2)):
                (above if y > 0 else below).append(length * y / 2)
    return math.fsum(above), math.fsum(below)


def crowd(load: JSON, across: Across, stations: list[float], ordinates: list[float]) -> tuple[float, float]:
    """Return the greatest and the least force (N) of a bar under people where they hurt."""
    if "rule" in load:
        return RULES[load["rule"]](across, stations, ordinates)
    pressure = si(load["pressure"])
    press, lift = across.strips()
    above, below = parts(stations, ordinates)
    return pressure * (press * above - lift * below), pressure * (press * below - lift * above)


def pieces(stations: list[float], ordinates: list[float], press: float, lift: float) -> np.ndarray:
    """Return straight pieces of one sign: length, and what a metre of people is worth at the lower and higher end."""
    found = []
    for x1, x2, y1, y2 in zip(stations, stations[1:], ordinates, ordinates[1:], strict=False):
        zero = y1 / (y1 - y2) if y1 * y2 < 0 else 1.0
        for part, ends in ((zero, (y1, 0.0 if zero < 1 else y2)), (1.0 - zero, (0.0, y2))):
            worth = sorted(press * y if y > 0 else -lift * y for y in ends)
            found.append((part * (x2 - x1), *worth))
    return np.array(found)


def en(length: np.ndarray) -> np.ndarray:
    """Return the pressure (Pa) by loaded length."""
    return np.clip(2e3 + 120e3 / (length + 30), 2.5e3, 5e3)


def over(own: np.ndarray, levels: np.ndarray) -> np.ndarray:
    """Return the force of people wherever they are worth more than each of some levels."""
    length, low, high = own.T[:, :, None]
    rise = np.maximum(high - low, 1e-300)
    covered = length * np.clip((high - levels) / rise, 0.0, 1.0)
    mean = (high + np.maximum(low, levels)) / 2
    return en(covered.sum(axis=0)) * (covered * mean).sum(axis=0)


def ten_metres(own: np.ndarray) -> float:
    """Return the force of people on the worst ten metres, up to which the pressure stays at its greatest."""
    length, low, high = own.T
    levels = np.sort(np.append(own[:, 1:].ravel(), 0.0))[::-1]
    for level in levels:
        on_it = (low == high) & (high == level)
        part = np.clip((high - level) / np.where(high > low, high - low, 1.0), 0.0, 1.0)
        covered = float((length * part).sum())
        if covered <= 10.0 <= covered + length[on_it].sum():
            force = float((length * part * (high + np.maximum(low, level)) / 2).sum())
            return en(np.array(10.0)) * (force + level * (10.0 - covered))
    return 0.0


def by_length(across: Across, stations: list[float], ordinates: list[float]) -> tuple[float, float]:
    """Return the greatest and the least force under 2 + 120/(L + 30) kPa: many levels, the best ones finer."""

    def worst(line: list[float]) -> float:
        own = pieces(stations, line, *across.strips())
        levels = np.unique(np.concatenate([np.linspace(0.0, own[:, 1:].max(), LEVELS), own[:, 1:].ravel()]))
        force = over(own, levels)
        best = [ten_metres(own), float(force.max())]
        for peak in np.argsort(-force)[:3]:
            low, high = levels[max(peak - 1, 0)], levels[min(peak + 1, len(levels) - 1)]
            for _ in range(4):
                fine = np.linspace(low, high, 33)
                force_there = over(own, fine)
                top = int(np.argmax(force_there))
                low, high = fine[max(top - 1, 0)], fine[min(top + 1, 32)]
                best.append(float(force_there[top]))
        return max(best)

    return worst(ordinates), -worst([-y for y in ordinates])


def by_area(across: Across, stations: list[float], ordinates: list[float]) -> tuple[float, float]:
    """Return the greatest and the least force under 85 psf (0.25 + 15/sqrt(ft^2)), 65 to 85, on what presses."""
    press, lift = across.strips()
    above, below = parts(stations, ordinates)
    felt = 1e-9 * max(abs(y) for y in ordinates)

    def pressure(sign: int) -> float:
        length = 0.0
        for x1, x2, y1, y2 in zip(stations, stations[1:], ordinates, ordinates[1:], strict=False):
            ends = [sign * y if abs(y) > felt else 0.0 for y in (y1, y2)]
            if max(ends) > 0:
                length += (x2 - x1) * (1.0 if min(ends) >= 0 else max(ends) / (max(ends) - min(ends)))
        feet = across.strip() * length / si("1 ft") ** 2
        return si("1 psf") * min(85.0, max(65.0, 85 * (0.25 + 15 / math.sqrt(feet)) if feet > 0 else 85.0))

    return pressure(1) * (press * above - lift * below), pressure(-1) * (press * below - lift * above)


RULES = {"en 1991-2": by_length, "aashto 1997": by_area}


def floor(stations: list[float], x: float, side: int) -> list[float]:
    """Return what each deck joint gets of a unit load at x by the lever rule of its floor span, nothing off the deck.

    `side` tells to which side of x the axle has just gone (-1, 0 or 1), which matters at the deck's ends alone.
    """
    shares = [0.0] * len(stations)
    first, last = stations[0], stations[-1]
    off_left = x < first - NEAR or (x <= first + NEAR and side < 0)
    off_right = x > last + NEAR or (x >= last - NEAR and side > 0)
    if off_left or off_right:
        return shares
    x = min(max(x, first), last)
    span = next(i for i in range(len(stations) - 1) if x <= stations[i + 1])
    right = (x - stations[span]) / (stations[span + 1] - stations[span])
    shares[span], shares[span + 1] = 1 - right, right
    return shares


@cache
def placements(axles: tuple[tuple[float, float], ...], stations: tuple[float, ...]) -> np.ndarray:
    """Return the joint loads (N) of every place of a train: every axle over every deck joint, both ways round."""
    rows = []
    for way in (1, -1):
        for place, _ in axles:
            for vertex in stations:
                for side in (-1, 0, 1):
                    joints = np.zeros(len(stations))
                    for other, weight in axles:
                        joints += weight * np.array(floor(list(stations), vertex + way * (other - place), side))
                    rows.append(joints)
    return np.array(rows)


def vehicle(load: JSON, across: Across, stations: list[float], ordinates: list[float]) -> tuple[float, float]:
    """Return the greatest and the least force (N) of a bar under a vehicle at the worst of all its places."""
    own = NAMED[load["vehicle"]] if "vehicle" in load else load
    axles = tuple((si(place), si(weight)) for place, weight in own["axles"])
    forces = placements(axles, tuple(stations)) @ np.array(ordinates)
    shared = [share * force for share in across.wheels(si(own["track"])) for force in (forces.max(), forces.min())]
    return float(max(shared)), float(min(shared))


KINDS = {"crowd": crowd, "vehicle": vehicle}


def live(load: JSON, across: Across, stations: list[float], ordinates: list[float]) -> tuple[float, float]:
    """Return the greatest tension and the greatest compression (N, negative) that one live load gives."""
    most, least = KINDS[load["kind"]](load, across, stations, ordinates)
    return max(most, 0.0), min(least, 0.0)
