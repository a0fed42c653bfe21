"""A truss that somebody else has solved: geometry, loads, and the numbers as printed."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from decimal import Decimal
from typing import Literal

Printed = Mapping[str, str]
"""Bars (several names where they share a value) -> the number with the digits that are printed."""

Pair = tuple[str | None, str | None]


@dataclass(frozen=True)
class Example:
    """One published example, in its own units.

    Parameters
    ----------
    source : author, title, edition, place in it.
    seen : ``read`` where the text or figure was seen, ``memory`` where it was recalled, ``computed`` where nothing
        is printed and the numbers are a second calculation's.
    joints : name -> (x, y). bars : names with spaces between them, `ab` or `b0-t1`.
    held : joint -> axes held.
    forces : printed bar forces, tension positive. also : the bars that the source leaves out, from a second
        calculation.
    reactions : joint -> printed reaction along x and y.
    area, modulus : of every bar, or bar by bar.
    imposed : bar -> elongation before any force (lack of fit, temperature).
    displacements : joint -> printed displacement along x and y, times ``displacement_unit``.
    units : how many units of the last printed digit the answer may be off.
    remark : where the print is wrong or rounded on the way.
    """

    name: str
    source: str
    seen: Literal["read", "memory", "computed"]
    joints: Mapping[str, tuple[float, float]]
    bars: str
    held: Mapping[str, str]
    loads: Mapping[str, tuple[float, float]] = field(default_factory=dict)
    forces: Printed = field(default_factory=dict)
    also: Printed = field(default_factory=dict)
    reactions: Mapping[str, Pair] = field(default_factory=dict)
    area: float | Mapping[str, float] = 1.0
    modulus: float = 1.0
    imposed: Mapping[str, float] = field(default_factory=dict)
    displacements: Mapping[str, Pair] = field(default_factory=dict)
    displacement_unit: float = 1.0
    units: float = 0.5
    remark: str = ""

    def __str__(self) -> str:
        return self.name

    def expected_forces(self) -> dict[str, str]:
        """Bar -> number as printed, one bar a row."""
        return {bar: number for names, number in {**self.forces, **self.also}.items() for bar in names.split()}


def within(found: float, printed: str, units: float = 0.5) -> bool:
    """Whether a number agrees with a printed one, by the digits that are printed."""
    number = Decimal(printed)
    exponent = number.as_tuple().exponent
    step = 10.0 ** int(exponent)
    return abs(found - float(number)) <= units * step * (1 + 1e-9) + 1e-9 * abs(float(number))
