"""Figures, units and sentences as people read them: the one door out.

Numbers inside the program are SI floats; only here do they meet a unit again.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Final

from models.calculation import Kind

CAUTION: Final = (
    "Preliminary figures. The final rating needs a licensed engineer; local codes and the owner's "
    "procedures rule. A rating factor speaks only of the bars and loads that it names, on the day of "
    "the visit, and never says that a bridge may be used."
)
"""The safety statement, whole. It stands on every screen, every page and in every result."""

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
