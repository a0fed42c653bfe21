"""The number pad: what was typed, where along the bar, and what becomes of it. No screen in here."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Final, Literal

from models import words
from models.errors import QuantityError
from models.journal import Reading
from models.picture import Picture
from models.quantity import Quantity, parse
from models.words import Figures

Target = Literal["thickness", "distance"]

ERASE: Final = "erase"
SPACE: Final = "space"
STATIONS: Final = ("start", "middle", "end", "other")

_FAR_ABOVE: Final = 1.1
_FAR_BELOW: Final = 0.2
_LONGEST: Final = 12


@dataclass(frozen=True, slots=True)
class Pad:
    """A reading that is being typed.

    Parameters
    ----------
    plate : that is read; ``nominal`` its thickness as built, m.
    start, end : the joints of the bar; ``length`` between them, m.
    units : ``SI`` or ``US``.
    typed : what the keys have put together; ``distance`` the same for the distance from the start.
    target : which of the two the keys go to.
    values : what was stored already at this spot, as typed.
    question : what to answer by entering the same number again.
    error : why what was typed cannot be stored.
    section : the section with this plate marked.
    """

    plate: str
    nominal: float
    start: str
    end: str
    length: float
    units: str = "SI"
    typed: str = ""
    distance: str = ""
    target: Target = "thickness"
    station: str = "middle"
    cleaned: bool = False
    values: tuple[str, ...] = ()
    question: str = ""
    error: str = ""
    section: Picture | None = None

    @property
    def unit(self) -> str:
        """The unit of what is typed."""
        kind: Literal["size", "length"] = "size" if self.target == "thickness" else "length"
        return Figures(self.units).unit(kind)

    @property
    def keys(self) -> tuple[str, ...]:
        """The keys in the order of a telephone; a fraction of an inch needs its stroke and a space."""
        digits = ("1", "2", "3", "4", "5", "6", "7", "8", "9", ".", "0", ERASE)
        return (*digits, "/", SPACE) if self.units == "US" else digits

    @property
    def shown(self) -> str:
        """What stands in the display."""
        text = self.typed if self.target == "thickness" else self.distance
        return f"{text or '–'} {self.unit}"

    @property
    def where(self) -> str:
        """The place of the reading, in words."""
        places = {"start": f"at {self.start}", "middle": "at the middle", "end": f"at {self.end}"}
        if self.station in places:
            return places[self.station]
        return f"{self.distance or '–'} {Figures(self.units).unit('length')} from {self.start}"

    def press(self, key: str) -> Pad:
        """One key."""
        text = self.typed if self.target == "thickness" else self.distance
        if key == ERASE:
            text = text[:-1]
        elif len(text) < _LONGEST:
            text += " " if key == SPACE else key
        pad = replace(self, question="", error="")
        return replace(pad, typed=text) if self.target == "thickness" else replace(pad, distance=text)

    def at(self, station: str) -> Pad:
        """Choose the place; another one than the three is typed as a distance. What was read elsewhere stays there."""
        target: Target = "distance" if station == "other" else "thickness"
        return replace(self, station=station, target=target, values=(), question="", error="")

    def clean(self) -> Pad:
        """Say, or take back, that the steel was cleaned to bright metal. It begins a spot of its own."""
        return replace(self, cleaned=not self.cleaned, values=())

    def enter(self) -> tuple[Pad, Reading | None]:
        """Take what was typed: a reading to be stored, or a pad that says what is wrong or asks."""
        if self.target == "distance":
            return self._distance_entered(), None
        found = self._parsed(self.typed, "size")
        if isinstance(found, str):
            return replace(self, error=found), None
        station = self._station()
        if station is None:
            return replace(self, target="distance", error=f"How far from {self.start}?"), None
        question = self._question(found)
        if question and question != self.question:
            return replace(self, question=question, error=""), None
        reading = Reading(station, self.plate, (found,), cleaned=True if self.cleaned else None)
        return replace(self, typed="", question="", error=""), reading

    def stored(self, value: str) -> Pad:
        """A value is on the disk."""
        return replace(self, values=(*self.values, value))

    def _distance_entered(self) -> Pad:
        found = self._parsed(self.distance, "length")
        if isinstance(found, str):
            return replace(self, error=found)
        if found.si > self.length:
            length = Figures(self.units).text(self.length, "length")
            return replace(self, error=f"The bar is only {length} long.")
        return replace(self, target="thickness", error="")

    def _station(self) -> float | None:
        fixed = {"start": 0.0, "middle": 0.5, "end": 1.0}
        if self.station in fixed:
            return fixed[self.station]
        found = self._parsed(self.distance, "length")
        return None if isinstance(found, str) or found.si > self.length else found.si / self.length

    def _parsed(self, typed: str, kind: Literal["size", "length"]) -> Quantity | str:
        unit = Figures(self.units).unit(kind)
        if not typed.strip():
            return "Type a number first."
        try:
            return parse(f"{' '.join(typed.split())} {unit}", "length")
        except QuantityError:
            example = "5/16 or 0.31" if self.units == "US" else "5.2"
            return f"{typed} is not a number. Type it like {example}."

    def _question(self, found: Quantity) -> str:
        """Strange values are asked about once and stored when entered again: nothing that was read is refused."""
        built = Figures(self.units).text(self.nominal, "size")
        if found.si == 0:
            return "Zero means a hole: this plate is gone there. Enter again to store it."
        if found.si > self.nominal * _FAR_ABOVE:
            return f"{found.text} is thicker than the {built} as built. Paint, rust, unit? Enter again to store it."
        if found.si < self.nominal * _FAR_BELOW:
            return f"{found.text} left of {built}? What remains is typed, not what is lost. Enter again to store it."
        return ""


def values_text(pad: Pad) -> str:
    """What was stored at this spot, and how many values make a reading."""
    if not pad.values:
        return "Three values at one spot, five if pitted."
    return f"{words.count(len(pad.values), 'value')} stored here: {', '.join(pad.values)}."
