"""Text with a unit to SI: the one door in for every dimension.

The factors are the exact definitions of NIST SP 811 (2008), appendix B; the foot and the inch are
the international ones, the pound-force rests on the standard acceleration of free fall.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from fractions import Fraction
from typing import Final, Literal

from models.errors import QuantityError

Dimension = Literal[
    "length", "stress", "pressure", "force", "line load", "spring stiffness", "density", "area", "inertia"
]

GRAVITY: Final = 9.80665
"""Standard acceleration of free fall, m/s^2 (exact; NIST SP 811 B.8)."""

_INCH: Final = 0.0254
_FOOT: Final = 0.3048
_POUND: Final = 0.45359237
_POUND_FORCE: Final = _POUND * GRAVITY

_LENGTH: Final = {"mm": 1e-3, "cm": 1e-2, "m": 1.0, "in": _INCH, "ft": _FOOT}
_PRESSURE: Final = {
    "Pa": 1.0,
    "kPa": 1e3,
    "MPa": 1e6,
    "GPa": 1e9,
    "N/mm^2": 1e6,
    "psi": _POUND_FORCE / _INCH**2,
    "psf": _POUND_FORCE / _FOOT**2,
    "ksi": 1e3 * _POUND_FORCE / _INCH**2,
}
_LINE_LOAD: Final = {
    "N/m": 1.0,
    "kN/m": 1e3,
    "N/mm": 1e3,
    "lbf/ft": _POUND_FORCE / _FOOT,
    "plf": _POUND_FORCE / _FOOT,
    "kip/ft": 1e3 * _POUND_FORCE / _FOOT,
    "kip/in": 1e3 * _POUND_FORCE / _INCH,
}

UNITS: Final[dict[Dimension, dict[str, float]]] = {
    "length": _LENGTH,
    "stress": _PRESSURE,
    "pressure": _PRESSURE,
    "force": {"N": 1.0, "kN": 1e3, "lbf": _POUND_FORCE, "kip": 1e3 * _POUND_FORCE},
    "line load": _LINE_LOAD,
    "spring stiffness": _LINE_LOAD,
    "density": {"kg/m^3": 1.0, "lb/ft^3": _POUND / _FOOT**3},
    "area": {f"{unit}^2": factor**2 for unit, factor in _LENGTH.items()},
    "inertia": {f"{unit}^4": factor**4 for unit, factor in _LENGTH.items()},
}

_DECIMAL = r"\d+(?:[.,]\d+)?"
_FRACTION = r"(?:\d+ )?\d+/0*[1-9]\d*"
_NUMBER = rf"(?:{_FRACTION}|{_DECIMAL})"
_SIMPLE = re.compile(rf"(-?)({_NUMBER}) (\S+)", re.ASCII)
_FEET_AND_INCHES = re.compile(rf"(-?)(\d+) ft ({_NUMBER}) in", re.ASCII)
_AMBIGUOUS = re.compile(r"\d,\d{3}(?!\d)", re.ASCII)
_LONGEST: Final = 80
_SUPERSCRIPTS = str.maketrans({"²": "^2", "³": "^3", "⁴": "^4"})


@dataclass(frozen=True, slots=True)
class Quantity:
    """A dimension as a person typed it, beside its SI value.

    Parameters
    ----------
    text : as typed; written back unchanged.
    si : the value in SI base units (m, N, Pa, N/m, kg/m^3, m^2, m^4).
    """

    text: str
    si: float


def parse(text: object, dimension: Dimension) -> Quantity:
    """Read a number with its unit.

    Parameters
    ----------
    text : as ``"3.2 m"``, ``"5/16 in"``, ``"12 ft 6 1/2 in"``.
    dimension : what is due; decides which units are known.

    Raises
    ------
    QuantityError
        Says what was found and what was expected.
    """
    expected = describe(dimension)
    if not isinstance(text, str):
        raise QuantityError(f"{_shown(text)} has no unit", expected)
    if len(text) > _LONGEST:
        raise QuantityError(f"{_shown(text)} is {len(text)} characters long", expected)
    plain = text.translate(_SUPERSCRIPTS)
    if _AMBIGUOUS.search(plain):
        raise QuantityError(
            f"the comma in {_shown(text)} may be a decimal sign or a thousands sign", expected + ", without grouping"
        )
    parts = _FEET_AND_INCHES.fullmatch(plain)
    if parts and dimension == "length":
        sign, feet, inches = parts.groups()
        value = int(feet) * _FOOT + _number(inches) * _INCH
        return _finite(text, -value if sign else value, expected)
    match = _SIMPLE.fullmatch(plain)
    if match is None:
        raise QuantityError(f"{_shown(text)} is not a number, a space and a unit", expected)
    sign, number, unit = match.groups()
    factor = UNITS[dimension].get(unit)
    if factor is None:
        raise QuantityError(_wrong_unit(text, unit), expected)
    value = _number(number) * factor
    return _finite(text, -value if sign else value, expected)


def describe(dimension: Dimension) -> str:
    """What a quantity of this dimension looks like, for an error or a form."""
    return f"a {dimension} as a number, a space and one of {' '.join(UNITS[dimension])}"


def pattern(dimension: Dimension) -> str:
    """The same grammar as a regular expression (ECMA 262), for a JSON Schema."""
    units = sorted(UNITS[dimension], key=lambda unit: (-len(unit), unit))
    spelled = "|".join(_spellings(unit) for unit in units)
    number = r"(?:(?:[0-9]+ )?[0-9]+/0*[1-9][0-9]*|[0-9]+(?:\.[0-9]+|,(?![0-9]{3}(?![0-9]))[0-9]+)?)"
    feet = rf"|[0-9]+ ft {number} in" if dimension == "length" else ""
    return rf"^-?(?:{number} (?:{spelled}){feet})$"


def _spellings(unit: str) -> str:
    raised = {"^2": "(?:\\^2|²)", "^3": "(?:\\^3|³)", "^4": "(?:\\^4|⁴)"}
    return next((unit.replace(power, spelled) for power, spelled in raised.items() if power in unit), unit)


def _number(text: str) -> float:
    if "/" not in text:
        return float(text.replace(",", "."))
    whole, _, fraction = text.rpartition(" ")
    return float(Fraction(fraction) + int(whole or 0))


def _finite(text: str, value: float, expected: str) -> Quantity:
    if value in (float("inf"), float("-inf")):
        raise QuantityError(f"{_shown(text)} is too large to be a number", expected)
    return Quantity(text, value)


def _wrong_unit(text: str, unit: str) -> str:
    owners = [dimension for dimension, units in UNITS.items() if unit in units]
    if owners:
        return f"the unit of {_shown(text)} belongs to a {owners[0]}"
    return f"the unit of {_shown(text)} is not known here"


def _shown(value: object) -> str:
    shown = value if isinstance(value, str) else repr(value)
    if len(shown) > 60:
        shown = shown[:57] + "..."
    return f"`{shown}`"
