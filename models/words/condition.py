"""Sentences about what inspectors recorded."""

from __future__ import annotations

from models.words import Figures, listed, percent, significant


def plate_place(plate: str, station: float) -> str:
    """Where a reading was taken."""
    return f"the {plate} at {station:.2f}"


def _reading(figures: Figures, reading: float, plate: str, station: float) -> str:
    return f"Reading {figures.text(reading, 'size')} on {plate_place(plate, station)}"


def reading_too_thick(figures: Figures, reading: float, nominal: float, plate: str, station: float) -> str:
    """A reading above what the drawing has."""
    check = " Check the unit and the bar." if reading > 10 * nominal else ""
    built = figures.text(nominal, "size")
    return (
        f"{_reading(figures, reading, plate, station)} is thicker than the {built} as built; "
        f"it counts as {built} and replaces nothing.{check}"
    )


def values_set_aside(figures: Figures, aside: list[float], used: float, plate: str, station: float) -> str:
    """Some values of a reading lie far above what the drawing has, and the others do not."""
    verb = "is" if len(aside) == 1 else "are"
    thick = listed([figures.text(one, "size") for one in aside])
    return (
        f"Of the values on {plate_place(plate, station)}, {thick} {verb} "
        f"thicker than as built and set aside; {figures.text(used, 'size')} counts where it is less than what is known."
    )


def reading_grew(figures: Figures, reading: float, before: float, plate: str, station: float) -> str:
    """A reading above the last sound one, with no repair on record."""
    return (
        f"{_reading(figures, reading, plate, station)} is more than the "
        f"{figures.text(before, 'size')} read there before, and no repair is on record; it replaces nothing. "
        "Measure again, or take the earlier reading back if that was wrong."
    )


def reading_dropped(figures: Figures, reading: float, before: float, plate: str, station: float) -> str:
    """A reading below the last sound one by more than the error."""
    return (
        f"{_reading(figures, reading, plate, station)} is "
        f"{figures.text(before - reading, 'size')} less than the {figures.text(before, 'size')} read there before; "
        "it counts. Measure again."
    )


def reading_very_thin(figures: Figures, reading: float, plate: str, station: float) -> str:
    """A reading that looks like what is lost, or that a gauge can hardly take."""
    return (
        f"{_reading(figures, reading, plate, station)} is very thin; it counts. "
        "Check that it is what is left, not what is lost, and that the gauge can read it."
    )


def hole(plate: str, station: float) -> str:
    """A zero reading."""
    return f"A hole is recorded in {plate_place(plate, station)}; that plate counts as gone there."


def negative_thickness(figures: Figures, reading: float, plate: str, station: float) -> str:
    """A thickness below zero."""
    return (
        f"A thickness of {figures.text(reading, 'size')} is recorded on {plate_place(plate, station)}; "
        "it counts for nothing until it is put right."
    )


def station_outside(station: float, used: float) -> str:
    """A place beyond the bar's ends."""
    return f"Station {significant(station)} lies beyond the bar's ends; what is recorded there is taken at {used:.0f}."


def extent_not_a_length(figures: Figures, extent: float) -> str:
    """An extent of zero or less."""
    return f"An extent of {figures.text(extent, 'length')} is recorded; it counts as an extent that is not known."


def plate_not_there(plate: str, section: str) -> str:
    """A reading on a plate that the bar's section does not have."""
    return f"A reading on the {plate} counts for nothing: section {section} has no such plate."


def loss_outside(loss: float) -> str:
    """An estimated loss that is no fraction."""
    return (
        f"An estimated loss of {significant(100 * loss)} % is recorded; it counts for nothing until it is put right. "
        "A loss lies between 0 and 100 %."
    )


def error_assumed(figures: Figures, error: float) -> str:
    """Readings were compared without a known error."""
    return (
        f"The instrument's error is not given; readings are compared as if it were {figures.text(error, 'size', 2)} "
        "(common practice, no source)."
    )


def two_answers(about: str, answers: list[str], date: str) -> str:
    """Devices disagree within a visit."""
    number = {2: "Two", 3: "Three", 4: "Four"}.get(len(answers), "Several")
    return (
        f"{number} answers about {about} in the visit of {date}: {listed(answers)}. "
        "The one that gives the lower resistance counts until an entry chooses."
    )


def bow_very_large(figures: Figures, offset: float, over: float) -> str:
    """A bow beyond a fiftieth of the length that it is measured over."""
    return (
        f"A bow of {figures.text(offset, 'size')} over {figures.text(over, 'length')} is more than a fiftieth of that "
        "length. Measure again."
    )


def bow_both_ways(figures: Figures, offset: float) -> str:
    """Bows in more than one direction are on record."""
    return f"Bows in two directions are recorded; the larger, {figures.text(offset, 'size')}, counts."


def replacement_not_there(what: str, name: str, date: str) -> str:
    """A replacement by a section or a material that the bridge does not have."""
    return (
        f"The visit of {date} replaces the bar by {what} {name}, which this bridge does not have; the replacement "
        "is set aside and what was recorded before still counts."
    )


def not_seen(date: str, reason: str | None, known_from: str | None, loss: float | None) -> str:
    """A bar that the last visit did not see, and what it is rated by."""
    because = f" ({reason})" if reason else ""
    known = "it is taken as built" if known_from is None else f"what was recorded up to {known_from} is used"
    if loss is not None:
        known = f"a loss of {percent(loss)} over the whole bar is taken, or what is known where that is less steel"
    return f"Not seen in the visit of {date}{because}; {known}."


def never_visited(loss: float | None) -> str:
    """A journal without visits."""
    taken = "as built" if loss is None else f"with a loss of {percent(loss)}"
    return f"No visit is on record; no bar counts as seen and every bar is taken {taken}."


def bar_not_there(truss: str, bar: str) -> str:
    """Entries about a bar that the bridge does not have."""
    return f"Entries about {bar} of truss {truss} count for nothing: this bridge has no such bar."


def retracts_nothing(identity: str) -> str:
    """A retraction that leads nowhere."""
    return f"An entry takes back `{identity}`, which is not on record before it; nothing is taken back."


def chooses_nothing(identity: str) -> str:
    """A choice that leads nowhere."""
    return f"An entry chooses `{identity}`, which does not stand on record; nothing is chosen."
