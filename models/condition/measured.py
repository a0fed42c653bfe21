"""Readings and estimates of one bar: which are sound, which replace which, and what to ask about.

Readings of one entry on one plate at one station are one measurement. A sound one replaces what the
same device, or anybody on an earlier visit, read within half a section depth of it. A doubtful one is
kept, replaces nothing and may only lower a thickness.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, replace
from typing import Final

from models import words
from models.bridge import Instrument
from models.condition.answers import are_rivals, without_rivals
from models.condition.as_built import AsBuilt
from models.condition.profile import Measurement
from models.finding import Finding, Level
from models.journal import Reading
from models.journal_order import Choice, Placed, precedes
from models.words import condition as sentences

ASSUMED_ERROR: Final = 0.3e-3
"""Error of a reading whose instrument does not say, m (common practice, no source)."""

VERY_THIN: Final = 1.5e-3
"""Below this thickness, m, common gauges are unreliable (common practice, no source)."""

SAME: Final = 1e-9
"""Lengths closer than this, m, are the same length typed in two ways."""


@dataclass(frozen=True, eq=False)
class Place:
    """The bar that is being read: its length in m, what it is built of, the gauges, how to print numbers."""

    length: float
    built: AsBuilt
    instruments: Mapping[str, Instrument]
    figures: words.Figures

    def near(self, one: float, other: float) -> bool:
        """Whether two stations lie within half a section depth of each other."""
        return abs(one - other) * self.length <= self.built.depth / 2 + SAME


@dataclass(frozen=True, eq=False, slots=True)
class Spot:
    """One measurement with what it replaces; ``column`` is its plate's, ``used`` as in `Measurement`.

    Parameters
    ----------
    values : what was recorded and can be used, m.
    error : of its instrument, m; None where that is not given.
    remarks : what to ask about while this measurement stands.
    """

    placed: Placed
    plate: str
    column: int
    station: float
    values: tuple[float, ...]
    used: float | None
    extent: float | None
    cleaned: bool
    error: float | None
    doubtful: bool = False
    remarks: tuple[Finding, ...] = ()

    @property
    def sound(self) -> bool:
        """Whether it can replace others."""
        return self.used is not None and not self.doubtful


@dataclass(frozen=True, eq=False, slots=True)
class Estimate:
    """An estimated loss of area; ``loss`` is None where it is no fraction, ``extent`` where it is the whole bar."""

    placed: Placed
    loss: float | None
    station: float
    extent: float | None
    remarks: tuple[Finding, ...] = ()


@dataclass(frozen=True, eq=False)
class Measured:
    """What was measured and estimated on a bar, in order, and what there is to ask.

    Parameters
    ----------
    replacing : for each spot, the later sound ones that replace it.
    estimates : those that no later estimate of the whole bar replaces.
    """

    spots: tuple[Spot, ...]
    replacing: tuple[tuple[Spot, ...], ...]
    estimates: tuple[Estimate, ...]
    findings: tuple[Finding, ...]

    def values(self) -> tuple[Measurement, ...]:
        """The measurements for a table of readings."""
        return tuple(
            Measurement(
                plate=spot.plate,
                station=spot.station,
                mean=_mean(spot.values),
                least=min(spot.values),
                greatest=max(spot.values),
                used=spot.used,
                extent=spot.extent,
                cleaned=spot.cleaned,
                doubtful=not spot.sound,
                replaced=bool(later),
                entry=spot.placed.entry.id,
                date=spot.placed.date,
                visit=spot.placed.visit,
            )
            for spot, later in zip(self.spots, self.replacing, strict=True)
        )


def measured(entries: Sequence[Placed], choices: Sequence[Choice], place: Place) -> Measured:
    """Take readings and estimates out of the entries of one bar that count, in order."""
    stray: list[Finding] = []
    given = [spot for placed in entries for spot in _spots(placed, place, stray)]

    def rivals(one: Spot, other: Spot) -> bool:
        # A choice of a reading thicker than the bar was built cannot put a thinner one out.
        too_thick = one.used is None or one.used > place.built.thickness[one.column] + SAME
        return not too_thick and _same_spot(one, other, place)

    spots: list[Spot] = []
    for spot in without_rivals(given, choices, rivals):
        spots.append(_judged(spot, spots, place))
    replacing = tuple(tuple(later for later in spots if replaces(later, spot, place)) for spot in spots)
    guesses = [guess for placed in entries for guess in _estimates(placed, place)]
    guesses = without_rivals(guesses, choices, lambda one, other: _overlap(one, other, place))
    estimates = tuple(guess for guess in guesses if not any(_replaces_estimate(later, guess) for later in guesses))
    standing = [spot for spot, later in zip(spots, replacing, strict=True) if not later]
    findings = [
        *stray,
        *(remark for spot in standing for remark in spot.remarks),
        *(remark for guess in estimates for remark in guess.remarks),
        *_disagreements(standing, estimates, place),
    ]
    return Measured(tuple(spots), replacing, estimates, tuple(dict.fromkeys(findings)))


def replaces(later: Spot, earlier: Spot, place: Place) -> bool:
    """Whether a measurement stands in the place of another one."""
    return later.sound and precedes(earlier.placed, later.placed) and _same_spot(earlier, later, place)


def _same_spot(one: Spot, other: Spot, place: Place) -> bool:
    return one.column == other.column and place.near(one.station, other.station)


def _replaces_estimate(later: Estimate, earlier: Estimate) -> bool:
    return later.extent is None and later.loss is not None and precedes(earlier.placed, later.placed)


def _overlap(one: Estimate, other: Estimate, place: Place) -> bool:
    """Whether two estimates speak of a common part of the bar."""
    if one.loss is None or one.extent is None or other.extent is None:
        return one.loss is not None
    return abs(one.station - other.station) * place.length < (one.extent + other.extent) / 2


def _mean(values: Sequence[float]) -> float:
    return math.fsum(values) / len(values)


def _say(level: Level, text: str) -> Finding:
    return Finding(level, text)


def _on_the_bar(station: float) -> tuple[float, tuple[Finding, ...]]:
    """A station cut to the bar's nearer end, with what to say about it."""
    used = min(max(station, 0.0), 1.0)
    return used, () if used == station else (_say("doubtful", sentences.station_outside(station, used)),)


def _a_length(extent: float, place: Place) -> tuple[float | None, tuple[Finding, ...]]:
    """An extent, or None where it is no length, with what to say about it."""
    if extent > 0:
        return extent, ()
    return None, (_say("doubtful", sentences.extent_not_a_length(place.figures, extent)),)


def _spots(placed: Placed, place: Place, stray: list[Finding]) -> Iterable[Spot]:
    """The readings of one entry, those on one plate at one station together."""
    together: dict[tuple[str, float], list[Reading]] = {}
    for reading in placed.entry.readings or ():
        if reading.plate not in place.built.plates:
            stray.append(_say("doubtful", sentences.plate_not_there(reading.plate, place.built.section)))
        elif reading.thickness:
            together.setdefault((reading.plate, reading.station), []).append(reading)
    return [_spot(placed, place, readings) for readings in together.values()]


def _spot(placed: Placed, place: Place, readings: Sequence[Reading]) -> Spot:
    plate = readings[0].plate
    station, remarks = _on_the_bar(readings[0].station)
    extents = []
    for given in (one.extent.si for one in readings if one.extent is not None):
        extent, about = _a_length(given, place)
        remarks += about
        extents += [] if extent is None else [extent]
    recorded = tuple(thickness.si for one in readings for thickness in one.thickness)
    values = tuple(value for value in recorded if value >= 0)
    for negative in (value for value in recorded if value < 0):
        text = sentences.negative_thickness(place.figures, negative, plate, station)
        remarks += (_say("doubtful", text),)
    return Spot(
        placed=placed,
        plate=plate,
        column=place.built.plates[plate],
        station=station,
        values=values or recorded,
        used=(0.0 if 0.0 in values else _mean(values)) if values else None,
        extent=max(extents, default=None),
        cleaned=all(one.cleaned is True for one in readings),
        error=_error(readings, place.instruments),
        remarks=remarks,
    )


def _error(readings: Sequence[Reading], instruments: Mapping[str, Instrument]) -> float | None:
    """The largest error of the instruments; None where one of them does not say."""
    errors: list[float] = []
    for reading in readings:
        instrument = None if reading.instrument is None else instruments.get(reading.instrument)
        if instrument is None or instrument.error is None:
            return None
        errors.append(abs(instrument.error.si))
    return max(errors)


def _judged(spot: Spot, before: Sequence[Spot], place: Place) -> Spot:
    """Decide whether a measurement is sound, given those before it, and what extent it takes over."""
    used = spot.used
    if used is None:
        return spot
    nominal = float(place.built.thickness[spot.column])
    where = (spot.plate, spot.station)
    if used > nominal + SAME:
        return _too_thick(spot, used, nominal, place)
    used = min(used, nominal)
    remarks = [*spot.remarks, *_thin(used, nominal, where, place.figures)]
    earlier = [
        one for one in before if one.sound and precedes(one.placed, spot.placed) and _same_spot(one, spot, place)
    ]
    latest = [one for one in earlier if not any(replaces(later, one, place) for later in earlier)]
    last = min((one.used for one in latest if one.used is not None), default=None)
    extent = spot.extent
    doubtful = False
    if last is not None:
        error = ASSUMED_ERROR if spot.error is None else spot.error
        doubtful = used > last + error + SAME
        if doubtful:
            remarks.append(_say("doubtful", sentences.reading_grew(place.figures, used, last, *where)))
        elif used < last - error - SAME:
            remarks.append(_say("doubtful", sentences.reading_dropped(place.figures, used, last, *where)))
        if spot.error is None:
            remarks.append(_say("assumed", sentences.error_assumed(place.figures, ASSUMED_ERROR)))
        if extent is None and not doubtful:
            extent = max((one.extent for one in latest if one.extent is not None), default=None)
    return replace(spot, used=used, extent=extent, doubtful=doubtful, remarks=tuple(remarks))


def _too_thick(spot: Spot, used: float, nominal: float, place: Place) -> Spot:
    """A measurement above nominal: doubtful. It counts as nominal, or as those of its values that can be right."""
    where = (spot.plate, spot.station)
    limit = nominal + (ASSUMED_ERROR if spot.error is None else spot.error)
    left = [value for value in spot.values if value <= limit]
    counts = min(nominal, _mean(left)) if left else nominal
    if counts < nominal:
        aside = [value for value in spot.values if value > limit]
        text = sentences.values_set_aside(place.figures, aside, counts, *where)
    else:
        text = sentences.reading_too_thick(place.figures, used, nominal, *where)
    return replace(spot, used=counts, doubtful=True, remarks=(*spot.remarks, _say("doubtful", text)))


def _thin(used: float, nominal: float, where: tuple[str, float], figures: words.Figures) -> Iterable[Finding]:
    if used == 0:
        yield _say("note", sentences.hole(*where))
    elif used < VERY_THIN and used < nominal / 2:
        yield _say("doubtful", sentences.reading_very_thin(figures, used, *where))


def _estimates(placed: Placed, place: Place) -> Iterable[Estimate]:
    entry = placed.entry
    if entry.estimated_loss is None:
        return
    loss: float | None = entry.estimated_loss
    station, remarks = _on_the_bar(0.5 if entry.station is None else entry.station)
    extent = None
    if entry.extent is not None:
        extent, about = _a_length(entry.extent.si, place)
        remarks += about
        # The whole bar, but not as a statement about all of it, which would replace earlier estimates.
        extent = math.inf if extent is None else extent
    if not 0 <= entry.estimated_loss <= 1:
        loss = None
        remarks += (_say("doubtful", sentences.loss_outside(entry.estimated_loss)),)
    yield Estimate(placed, loss, station, extent, remarks)


def _disagreements(spots: Sequence[Spot], estimates: Sequence[Estimate], place: Place) -> Iterable[Finding]:
    """Two devices, one visit, one thing, different answers."""
    figures = place.figures
    done: set[int] = set()
    for spot in spots:
        rivals = [one for one in spots if are_rivals(one.placed, spot.placed) and _same_spot(one, spot, place)]
        given = [spot, *rivals]
        differ = {(one.used, one.extent) for one in given if one.used is not None}
        if len(differ) > 1 and not done.intersection(map(id, given)):
            about = sentences.plate_place(spot.plate, spot.station)
            texts = [_with_extent(one, figures) for one in given if one.used is not None]
            yield from _two_answers(about, texts, spot.placed.date)
        done.update(map(id, given))
    for index, guess in enumerate(estimates):
        rivals_of = [
            one
            for one in estimates[index + 1 :]
            if are_rivals(one.placed, guess.placed) and one.loss != guess.loss and _overlap(guess, one, place)
        ]
        if rivals_of:
            texts = [words.percent(one.loss) for one in (guess, *rivals_of)]
            yield from _two_answers("the estimated loss", texts, guess.placed.date)


def _two_answers(about: str, texts: Sequence[str], date: str) -> Iterable[Finding]:
    different = list(dict.fromkeys(texts))
    if len(different) > 1:
        yield _say("doubtful", sentences.two_answers(about, different, date))


def _with_extent(spot: Spot, figures: words.Figures) -> str:
    read = figures.text(_mean(spot.values), "size")
    return read if spot.extent is None else f"{read} over {figures.text(spot.extent, 'length')}"
