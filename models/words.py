"""Figures, units and sentences as people read them: the one door out.

Numbers inside the program are SI floats; only here do they meet a unit again.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Final

from models.calculation import Kind
from models.journal import CRACK_TAKEN_BACK, Entry, Reading

CAUTION: Final = (
    "Preliminary figures. The final rating needs a licensed engineer; local codes and the owner's "
    "procedures rule. A rating factor speaks only of the bars and loads that it names, on the day of "
    "the visit, and never says that a bridge may be used."
)
"""The safety statement, whole. It stands on every screen, every page and in every result."""

_POUND_FORCE: Final = 0.45359237 * 9.80665

_SI: Final[dict[Kind, tuple[str, float]]] = {
    "length": ("m", 1.0),
    "size": ("mm", 1e-3),
    "area": ("mm²", 1e-6),
    "modulus": ("mm³", 1e-9),
    "inertia": ("mm⁴", 1e-12),
    "warping": ("mm⁶", 1e-18),
    "stress": ("MPa", 1e6),
    "force": ("kN", 1e3),
    "moment": ("kNm", 1e3),
    "pressure": ("kPa", 1e3),
    "line load": ("kN/m", 1e3),
}
_US: Final[dict[Kind, tuple[str, float]]] = {
    "length": ("ft", 0.3048),
    "size": ("in", 0.0254),
    "area": ("in²", 0.0254**2),
    "modulus": ("in³", 0.0254**3),
    "inertia": ("in⁴", 0.0254**4),
    "warping": ("in⁶", 0.0254**6),
    "stress": ("ksi", 1e3 * _POUND_FORCE / 0.0254**2),
    "force": ("kip", 1e3 * _POUND_FORCE),
    "moment": ("kip ft", 1e3 * _POUND_FORCE * 0.3048),
    "pressure": ("psf", _POUND_FORCE / 0.3048**2),
    "line load": ("plf", _POUND_FORCE / 0.3048),
}


def significant(value: float, digits: int = 3) -> str:
    """A number to so many significant digits, without exponent and without thousands signs."""
    if not math.isfinite(value):
        return "none"
    if value == 0:
        return "0"
    decimals = digits - 1 - math.floor(math.log10(abs(value)))
    rounded = round(value, decimals)
    if rounded:
        decimals = digits - 1 - math.floor(math.log10(abs(rounded)))
    text = f"{rounded:.{max(decimals, 0)}f}"
    return "0" if text.strip("-0.") == "" else text


def factor(value: float | None) -> str:
    """A rating factor to three significant digits; words where there is none."""
    return "no live force" if value is None else significant(value)


def percent(fraction: float | None) -> str:
    """A fraction as whole per cent."""
    return "none" if fraction is None else f"{100 * fraction:.0f} %"


def count(number: int, one: str, many: str | None = None) -> str:
    """A number with its noun in the right form."""
    return f"{number} {one if number == 1 else many or one + 's'}"


def listed(names: list[str] | tuple[str, ...], most: int = 6) -> str:
    """Names in a row; a long row says how many more there are."""
    if len(names) > most:
        return ", ".join(names[:most]) + f" and {len(names) - most} more"
    return ", ".join(names)


@dataclass(frozen=True, slots=True)
class Figures:
    """Prints numbers in the units that a bridge is shown in. ``units`` is ``SI`` or ``US``."""

    units: str = "SI"

    def unit(self, kind: Kind) -> str:
        """The unit that numbers of this kind are printed in; empty for a pure number."""
        return self._table.get(kind, ("", 1.0))[0]

    def scaled(self, value: float, kind: Kind) -> float:
        """The SI value in the printed unit."""
        return value / self._table.get(kind, ("", 1.0))[1]

    def number(self, value: float, kind: Kind, digits: int = 3) -> str:
        """The number alone, in the printed unit."""
        return significant(self.scaled(value, kind), digits)

    def text(self, value: float, kind: Kind, digits: int = 3) -> str:
        """The number with its unit."""
        unit = self.unit(kind)
        return f"{self.number(value, kind, digits)} {unit}".rstrip()

    @property
    def _table(self) -> dict[Kind, tuple[str, float]]:
        return _US if self.units == "US" else _SI


# --- rating ---

NOT_RATED: Final = (
    "connections and gussets",
    "pins",
    "bearings",
    "floor beams and stringers under local load",
    "deck",
    "lateral bracing",
    "wind",
    "fatigue",
    "foundations",
)
"""What no figure of this program speaks of."""

ACT_NOW_STEPS: Final = (
    "Keep people off the bridge.",
    "Call the responsible engineer, then the owner.",
    "Stay until relieved; note who was told, and when.",
)
"""Plain steps for a finding `act now` (common practice, no source)."""


def severed(bar: str) -> str:
    """A bar is cut through."""
    return f"{bar} is severed; it carries nothing and all others are solved without it."


def no_steel_left(bar: str) -> str:
    """No plate is left somewhere along a bar."""
    return f"The readings on {bar} leave no steel at one place; it is treated as severed."


def cracked_out(bar: str) -> str:
    """A cracked bar in tension."""
    return (
        f"{bar} is cracked and pulled by the factored loads; it gets no credit until an engineer has assessed the "
        "crack. The figures are those without it."
    )


def cracked_in(bar: str) -> str:
    """A cracked bar that no factored load pulls."""
    return (
        f"{bar} is cracked; no factored load pulls it, so it stays in. What the crack does in compression is left out."
    )


def mechanism(truss: str, joints: tuple[str, ...], bars: tuple[str, ...], *, nearly: bool) -> str:
    """A truss that can move."""
    what = "is nearly a mechanism" if nearly else "is a mechanism: it has no equilibrium as a pin-jointed truss"
    loose = f" Bars between moving and still joints: {listed(bars)}." if bars else ""
    moving = f" {count(len(joints), 'joint moves', 'joints move')}: {listed(joints)}." if joints else ""
    return f"Truss {truss} {what}. There are no forces and no rating factors.{moving}{loose}"


def dead_exceeds(bar: str, direction: str, margin: str) -> str:
    """Dead load alone is more than a bar can carry."""
    what = f"what {bar} can carry in {direction}, by {margin}"
    return f"The factored dead load alone exceeds {what}; its rating factor is 0."


def below_trigger(bar: str, found: float, trigger: float) -> str:
    """The owner's trigger is met."""
    limit = f"the {factor(trigger)} at which the owner wants to be called"
    return f"{bar} has a rating factor of {factor(found)}, below {limit}."


def pushed(bar: str) -> str:
    """A bar that cannot push is pushed."""
    return (
        f"{bar} can only pull, but the loads push it. It is solved as if it could push; its forces and those of its "
        "neighbours leave out that it would go slack."
    )


def slender_plate(plates: tuple[str, ...], counted: float) -> str:
    """Thin plates in compression: how much of the section counts, rounded down."""
    verb = "is" if len(plates) == 1 else "are"
    return f"The {listed(plates)} {verb} slender: {math.floor(100 * counted)} % of the section counts in compression."


def tube_beyond_rule(limit: float) -> str:
    """A round tube thinner than any published rule covers."""
    return (
        f"The diameter over the thickness of the tube is above {limit:.2f} E/Fy, beyond which no rule is published "
        "(AISC 360 E7.2); the compression figure leaves out how much less of the section may count."
    )


def not_doubly_symmetric() -> str:
    """Flexural-torsional buckling is not computed."""
    return (
        "The section is not doubly symmetric; the compression figure leaves out flexural-torsional buckling and the "
        "eccentricity of its connection."
    )


def centroid_shift(shift: str) -> str:
    """One-sided loss moves the centroid."""
    return f"Loss on one side moves the centroid by {shift}; the compression figure leaves that eccentricity out."


def bowed(offset: str) -> str:
    """A recorded bow."""
    return f"A bow of {offset} is recorded; the compression figure leaves it out."


def half_through(k: float) -> str:
    """A top chord that nothing braces overhead."""
    return (
        f"The top chord is held sideways only by its verticals and floor beams: K out of plane {significant(k)} is "
        "assumed, and the lateral stability of the chord is not rated."
    )


def smaller_k(given: float) -> str:
    """The site gives a smaller K than a half-through chord may have."""
    what = f"K {significant(given)} out of plane"
    return f"The site gives {what} for a top chord that nothing braces overhead; it is not used."


def loaded_between_joints(bar: str) -> str:
    """The deck rests on the chord."""
    return f"The deck rests on {bar} between its joints; the bending that this gives is left out."


def very_slender(ratio: float, limit: int) -> str:
    """KL/r above the usual limit."""
    return f"KL/r is {significant(ratio)}, above {limit} (AASHTO LRFD 6.9.3, from memory)."


def uplift(joint: str, force: str, load: str | None) -> str:
    """A support that would lift."""
    cause = f" under {load}" if load else ""
    return f"The least factored reaction at {joint} is {force}{cause}: the bearing would lift unless it is held down."


def large_displacement(size: str, span: str) -> str:
    """Small-displacement statics is out of its depth."""
    limit = f"a fiftieth of the {span} span"
    return f"Under dead load and a full crowd a joint moves {size}, more than {limit}; check the model."


def not_used(key: str, why: str) -> str:
    """A key that is read and kept, but enters no figure."""
    return f"`{key}` is read, not used: {why}"


def double_bars(bars: tuple[str, ...]) -> str:
    """Several bars join the same joints."""
    return f"{listed(bars)} join the same joints; each is solved as a bar of its own."


def slack_out(bar: str) -> str:
    """A bar recorded as slack."""
    return f"{bar} is slack; the truss is rated with it and without it, and the lower figures are shown."


def no_state(number: int) -> str:
    """Bars without a recorded state."""
    verb = "has" if number == 1 else "have"
    return f"{count(number, 'bar')} {verb} no state on record and {'counts' if number == 1 else 'count'} as fair."


# --- condition ---


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


# --- entries ---


def entry(said: Entry) -> str:
    """What an entry says, in the inspector's own figures."""
    parts = [said.seen or "", f"state {said.state}" if said.state else ""]
    parts += [_reading_as_typed(reading) for reading in said.readings or ()]
    if said.estimated_loss is not None:
        parts.append(
            f"estimated loss {percent(said.estimated_loss)}" + (f" over {said.extent.text}" if said.extent else "")
        )
    if said.bow is not None:
        parts.append(f"bow {said.bow.offset.text}")
    if said.crack is not None:
        parts.append("crack taken back" if said.crack == CRACK_TAKEN_BACK else "crack")
    flags = (("severed", said.severed), ("slack", said.slack))
    parts += [name if value else f"not {name}" for name, value in flags if value is not None]
    if said.replaced is not None:
        parts.append("replaced")
    if said.look_unchanged:
        parts.append("no change since the last visit")
    parts += ["prefers an entry" if said.chooses else "", "takes an entry back" if said.retracts else ""]
    parts += [f"reason: {said.reason}" if said.reason else "", f"note: {said.note}" if said.note else ""]
    return "; ".join(part for part in parts if part) or "nothing"


def _reading_as_typed(reading: Reading) -> str:
    thickness = " / ".join(one.text for one in reading.thickness)
    extent = f" over {reading.extent.text}" if reading.extent else ""
    return f"{reading.plate} {thickness} at {significant(reading.station, 2)}{extent}"
