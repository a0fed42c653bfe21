"""From measurements and estimates to the profiles of a bar: every plate's thickness along it."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Final, NamedTuple

import numpy as np

from models.condition.as_built import AsBuilt
from models.condition.measured import Estimate, Measured, Place, Spot
from models.condition.profile import DOUBTFUL, ESTIMATE, NOMINAL, READING, Profile
from models.journal_order import precedes

LEAST_REACH: Final = 1e-6
"""A measurement reaches at least this part of the bar to each side, so that no extent makes it vanish."""

_DECIMALS: Final = 12
"""Stations that agree to so many decimals are one."""

Span = tuple[float, float]


class Cover(NamedTuple):
    """A stretch of one plate with one thickness, m. Sorted, the one that counts comes first."""

    thickness: float
    less_known: int
    older: int
    uncleaned: bool
    column: int
    start: float
    end: float


@dataclass(frozen=True, eq=False)
class Thickness:
    """The profiles as in `models.condition.BarCondition`."""

    strength: Profile
    stiff: Profile
    soft: Profile

    def at_most(self, profile: Profile) -> Thickness:
        """The lesser of each profile and an even one."""
        strength = _lesser(self.strength, profile)
        stiff = strength if self.stiff is self.strength else _lesser(self.stiff, profile)
        return Thickness(strength, stiff, stiff if self.soft is self.stiff else _lesser(self.soft, profile))


def thickness_along(measured: Measured, place: Place) -> Thickness:
    """Lay all that was measured and estimated along a bar; where covers overlap the smaller counts.

    An estimate gives way to a later sound reading over the plate and length that the reading covers.
    """
    strength: list[Cover] = []
    known: list[Cover] = []
    anywhere: list[Cover] = []
    for spot, later in zip(measured.spots, measured.replacing, strict=True):
        if spot.used is None:
            continue
        covers = _of_spot(spot, later, place)
        strength += covers
        if spot.extent is not None:
            known += covers
        elif not later and spot.used < place.built.thickness[spot.column]:
            # Nobody knows how far this loss goes: nowhere in the stiff variant, everywhere in the soft one.
            anywhere.append(_cover(spot, spot.used, (0.0, 1.0), ()))
    unknown_extent = any(spot.extent is None and spot.used is not None for spot in measured.spots)
    for estimate in measured.estimates:
        covers = _of_estimate(estimate, measured.spots, place)
        strength += covers
        if unknown_extent:
            with_extent = [spot for spot in measured.spots if spot.extent is not None]
            covers = _of_estimate(estimate, with_extent, place)
        known += covers
    decisive = _painted(strength, place.built)
    stiff = _painted(known, place.built) if unknown_extent else decisive
    soft = _painted([*known, *anywhere], place.built) if anywhere else stiff
    return Thickness(decisive, stiff, soft)


def _reach(station: float, half: float, length: float) -> Span:
    """A stretch centred on a station and cut at the bar's ends; half its length in m."""
    if length <= 0:
        return 0.0, 1.0
    part = max(half / length, LEAST_REACH)
    return round(max(station - part, 0.0), _DECIMALS), round(min(station + part, 1.0), _DECIMALS)


def _span(spot: Spot, place: Place) -> Span:
    half = place.built.depth if spot.extent is None else spot.extent / 2
    return _reach(spot.station, half, place.length)


def _of_spot(spot: Spot, later: Sequence[Spot], place: Place) -> list[Cover]:
    """Where a measurement still holds: beyond what replaces it, with the smallest of them."""
    used = min(one.used for one in (spot, *later) if one.used is not None)
    left = _without([_span(spot, place)], [_span(one, place) for one in later])
    return [_cover(spot, used, span, later) for span in left]


def _cover(spot: Spot, used: float, span: Span, later: Sequence[Spot]) -> Cover:
    cleaned = all(one.cleaned for one in (spot, *later))
    return Cover(used, -(DOUBTFUL if spot.doubtful else READING), -spot.placed.visit, not cleaned, spot.column, *span)


def _of_estimate(estimate: Estimate, spots: Iterable[Spot], place: Place) -> list[Cover]:
    if estimate.loss is None:
        return []
    whole = (0.0, 1.0)
    span = whole if estimate.extent is None else _reach(estimate.station, estimate.extent / 2, place.length)
    later = [spot for spot in spots if spot.sound and precedes(estimate.placed, spot.placed)]
    covers: list[Cover] = []
    for column, left in enumerate(place.built.remaining(estimate.loss).tolist()):
        measured = [_span(spot, place) for spot in later if spot.column == column]
        covers += [
            Cover(left, -ESTIMATE, -estimate.placed.visit, True, column, start, end)
            for start, end in _without([span], measured)
        ]
    return covers


def _without(spans: list[Span], cuts: Iterable[Span]) -> list[Span]:
    """Stretches less other stretches."""
    for start, end in cuts:
        spans = [part for a, b in spans for part in ((a, min(b, start)), (max(a, end), b)) if part[0] < part[1]]
    return spans


def _painted(covers: Sequence[Cover], built: AsBuilt) -> Profile:
    """Lay covers over the nominal plates, those that count last and so on top."""
    if not covers:
        return built.profile
    stations = sorted({0.0, 1.0, *(one.start for one in covers), *(one.end for one in covers)})
    index = {station: number for number, station in enumerate(stations)}
    shape = (len(stations) - 1, len(built.thickness))
    thickness = np.tile(built.thickness, (shape[0], 1))
    rests_on = np.full(shape, NOMINAL, np.int8)
    cleaned = np.zeros(shape, bool)
    visit = np.full(shape, -1, np.int64)
    for cover in sorted(covers, reverse=True):
        where = slice(index[cover.start], index[cover.end]), cover.column
        thickness[where] = cover.thickness
        rests_on[where] = -cover.less_known
        cleaned[where] = not cover.uncleaned
        visit[where] = -cover.older
    return Profile(np.array(stations), thickness, rests_on, cleaned, visit)


def _lesser(profile: Profile, even: Profile) -> Profile:
    """The lesser of a profile and one of a single piece."""
    lower = even.thickness < profile.thickness
    if not lower.any():
        return profile
    return Profile(
        stations=profile.stations,
        thickness=np.where(lower, even.thickness, profile.thickness),
        rests_on=np.where(lower, even.rests_on, profile.rests_on),
        cleaned=profile.cleaned & ~lower,
        visit=np.where(lower, even.visit, profile.visit),
    )
