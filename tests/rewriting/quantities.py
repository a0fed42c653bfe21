"""Every quantity of a site document found by its unit, and written again with another value or unit."""

from __future__ import annotations

import re
from collections.abc import Callable, Mapping
from decimal import Decimal
from fractions import Fraction
from typing import Any

from independent.units import FOOT, INCH, SIZES, exact

from models.quantity import UNITS, Dimension

JSON = dict[str, Any]
Change = Callable[[str, Dimension], str]

DIMENSIONS: tuple[Dimension, ...] = ("length", "stress", "force", "line load", "density", "area", "inertia")
"""A pressure has the units of a stress."""
SI_UNITS = {one: next(unit for unit, factor in UNITS[one].items() if factor == 1.0) for one in DIMENSIONS}

_QUANTITY = re.compile(r"-?\d[^a-z]* (\S+)")
_FREE_TEXT = {"name", "note", "notes", "reference", "weather", "text", "value", "was", "id", "date", "at", "phone"}


def dimension_of(text: str) -> Dimension | None:
    """Return what a text is a quantity of; None where it is none."""
    found = _QUANTITY.fullmatch(text.replace(" ft ", " ") if " ft " in text and text.endswith(" in") else text)
    return next((one for one in DIMENSIONS if found and found[1] in UNITS[one]), None)


def each(value: Any, change: Change) -> Any:
    """Return a copy of a document in which every quantity is changed."""
    if isinstance(value, Mapping):
        return {key: one if key in _FREE_TEXT else each(one, change) for key, one in value.items()}
    if isinstance(value, list):
        return [each(one, change) for one in value]
    dimension = dimension_of(value) if isinstance(value, str) else None
    return value if dimension is None else change(value, dimension)


def written(number: Fraction | float, unit: str) -> str:
    """Write a number in the fewest digits that give the same float, without an exponent."""
    return f"{Decimal(repr(float(number))):f} {unit}"


def times(document: JSON, factors: Mapping[Dimension, float]) -> JSON:
    """Return a document in which all quantities of some dimensions are multiplied."""

    def change(text: str, dimension: Dimension) -> str:
        factor = factors.get(dimension)
        return text if factor is None else written(exact(text) * Fraction(factor), SI_UNITS[dimension])

    return each(document, change)


def in_other_units(document: JSON, pick: Callable[[list[str]], str]) -> JSON:
    """Return a document that says the same in units that `pick` chooses, lengths in feet and inches among them."""

    def change(text: str, dimension: Dimension) -> str:
        size = exact(text)
        unit = pick([*UNITS[dimension], *(["ft in"] if dimension == "length" else [])])
        if unit != "ft in":
            return written(size / SIZES[unit], unit)
        feet = int(abs(size) / FOOT)
        sign = "-" if size < 0 else ""
        return f"{sign}{feet} ft {written((abs(size) - feet * FOOT) / INCH, 'in')}"

    return {**each(document, change), "units": pick(["SI", "US"])}
