"""Text with a unit to an SI float, by exact fractions: the judge's own small door in."""

from __future__ import annotations

import re
from fractions import Fraction
from functools import cache

INCH = Fraction(254, 10000)
FOOT = 12 * INCH
POUND = Fraction(45359237, 10**8)
GRAVITY = Fraction(980665, 10**5)
LBF = POUND * GRAVITY
LENGTHS = {"mm": Fraction(1, 1000), "cm": Fraction(1, 100), "m": Fraction(1), "in": INCH, "ft": FOOT}
STRESSES = {
    "Pa": Fraction(1),
    "kPa": Fraction(10**3),
    "MPa": Fraction(10**6),
    "GPa": Fraction(10**9),
    "N/mm^2": Fraction(10**6),
    "psi": LBF / INCH**2,
    "psf": LBF / FOOT**2,
    "ksi": 1000 * LBF / INCH**2,
}
FORCES = {"N": Fraction(1), "kN": Fraction(1000), "lbf": LBF, "kip": 1000 * LBF}
LINES = {
    "N/m": Fraction(1),
    "kN/m": Fraction(1000),
    "N/mm": Fraction(1000),
    "lbf/ft": LBF / FOOT,
    "plf": LBF / FOOT,
    "kip/ft": 1000 * LBF / FOOT,
    "kip/in": 1000 * LBF / INCH,
}
DENSITIES = {"kg/m^3": Fraction(1), "lb/ft^3": POUND / FOOT**3}
AREAS = {f"{name}^2": size**2 for name, size in LENGTHS.items()}
INERTIAS = {f"{name}^4": size**4 for name, size in LENGTHS.items()}
SIZES = {**LENGTHS, **STRESSES, **FORCES, **LINES, **DENSITIES, **AREAS, **INERTIAS}
NUMBER = r"-?(?:\d+ \d+/\d+|\d+/\d+|\d+(?:[.,]\d+)?)"


def number(text: str) -> Fraction:
    """Read `5`, `5.25`, `5,25`, `5/16` or `1 1/2`."""
    sign = -1 if text.startswith("-") else 1
    parts = text.lstrip("-").replace(",", ".").split(" ")
    return sign * sum((Fraction(part) for part in parts), Fraction(0))


def exact(text: str) -> Fraction:
    """Return the SI value of a quantity as a fraction."""
    plain = text.replace("²", "^2").replace("³", "^3").replace("⁴", "^4")
    parts = re.fullmatch(rf"({NUMBER}) ft ({NUMBER}) in", plain)
    if parts:
        feet, inches = number(parts[1]), number(parts[2])
        return feet * FOOT + (-inches if feet < 0 else inches) * INCH
    whole = re.fullmatch(rf"({NUMBER}) (\S+)", plain)
    if not whole:
        raise ValueError(text)
    return number(whole[1]) * SIZES[whole[2]]


@cache
def si(text: str) -> float:
    """Return the SI value of a quantity."""
    return float(exact(text))
