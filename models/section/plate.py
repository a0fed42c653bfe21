"""Plates: what every section is made of, and the formulas for one plate.

A section's axes: x horizontal, across the bridge; y vertical, in the plane of the truss. A reading
changes a plate's thickness about its mid-line; the mid-line and the plate's other extent stay where
the drawing has them.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import Any, Final, NamedTuple

import numpy as np

from models.calculation import Number, Traced


@dataclass(frozen=True, slots=True)
class Form:
    """How area and own inertia of a plate follow from its breadth b and thickness t.

    area = around b t + disc t^2, and about its own centre inertia = area (b^2 / breadth + t^2 / thickness),
    with one pair of divisors for each axis; an infinite divisor means that there is no such term.
    """

    around: float
    disc: float
    breadth_horizontal: float
    thickness_horizontal: float
    breadth_vertical: float
    thickness_vertical: float


LEVEL: Final = Form(1.0, 0.0, math.inf, 12.0, 12.0, math.inf)
"""A rectangle whose breadth lies horizontally."""
UPRIGHT: Final = Form(1.0, 0.0, 12.0, math.inf, math.inf, 12.0)
"""A rectangle whose breadth stands vertically."""
RING: Final = Form(math.pi, 0.0, 8.0, 8.0, 8.0, 8.0)
"""The wall of a round tube; its breadth is the mean diameter, which stays as the wall thins."""
DISC: Final = Form(0.0, math.pi / 4, math.inf, 16.0, math.inf, 16.0)
"""A round bar; its thickness is the diameter."""

_TURNED: Final = {LEVEL: UPRIGHT, UPRIGHT: LEVEL, RING: RING, DISC: DISC}


class Imperfection(NamedTuple):
    """How a slender part of a plate is held, and the two numbers by which its imperfections lower what counts of it.

    ``held`` is whether it is held along both edges, not along one alone.
    """

    c1: float
    c2: float
    held: bool


HELD: Final = Imperfection(0.18, 1.31, held=True)
"""Plates held along both edges, other than walls of rectangular tubes: AISC 360-22 Table E7.1 (read)."""
TUBE_WALL: Final = Imperfection(0.20, 1.38, held=True)
"""Walls of square and rectangular tubes: the same table."""
OUTSTAND: Final = Imperfection(0.22, 1.49, held=False)
"""All other plates: the same table."""


@dataclass(frozen=True, slots=True)
class Free:
    """A part of a plate that may buckle on its own, beside the line or between the lines along which it is held.

    Parameters
    ----------
    breadth : over which it is free, m; its ratio to the thickness is its slenderness.
    limit : the greatest slenderness at which it still reaches yield is limit * sqrt(E/Fy).
    count : how many such parts the plate has.
    web : name of the web whose own slenderness lowers the limit by sqrt(kc) (flanges welded to it).
    """

    breadth: float
    limit: float
    imperfection: Imperfection
    count: int = 1
    web: str | None = None


@dataclass(frozen=True, slots=True)
class Plate:
    """One plate of a section as built.

    Parameters
    ----------
    breadth, thickness : m; the mean diameter and the wall of a ring, 0 and the diameter of a disc.
    x, y : centre, m.
    free : the parts that may buckle on their own; a ring has its own rule and none of them.
    """

    name: str
    form: Form
    breadth: float
    thickness: float
    x: float
    y: float
    free: tuple[Free, ...] = ()

    @property
    def width(self) -> float:
        """Horizontal extent, m."""
        return {LEVEL: self.breadth, UPRIGHT: self.thickness}.get(self.form, self.breadth + self.thickness)

    @property
    def height(self) -> float:
        """Vertical extent, m."""
        return {LEVEL: self.thickness, UPRIGHT: self.breadth}.get(self.form, self.breadth + self.thickness)

    def turned(self) -> Plate:
        """The plate after the section has been turned by 90 degrees, counterclockwise."""
        return replace(self, form=_TURNED[self.form], x=-self.y, y=self.x)


@dataclass(frozen=True, slots=True)
class Rows:
    """Coefficients of plates, so that one formula serves every shape: arrays, or objects in a hand check.

    area = length t + disc t^2; own inertia = area (fixed + share t^2), for each axis.

    Parameters
    ----------
    length : m. fixed_horizontal, fixed_vertical : m^2. x, y : centres, m. disc and shares are numbers.
    """

    length: Number
    disc: Number
    fixed_horizontal: Number
    share_horizontal: Number
    fixed_vertical: Number
    share_vertical: Number
    x: Number
    y: Number


def coefficients(form: Form, breadth: Number, one: Number = 1.0, nothing: Number = 0.0) -> tuple[Number, ...]:
    """The first six fields of `Rows` for one plate.

    Parameters
    ----------
    breadth : m.
    one, nothing : what a hand check writes for 1 and for a term that is not there.
    """

    def over(number: Number, divisor: float) -> Any:
        return nothing if math.isinf(divisor) else number / divisor

    square = breadth**2
    around = {0.0: nothing, 1.0: breadth}.get(form.around)
    return (
        form.around * breadth if around is None else around,
        form.disc or nothing,
        over(square, form.breadth_horizontal),
        over(one, form.thickness_horizontal),
        over(square, form.breadth_vertical),
        over(one, form.thickness_vertical),
    )


def plate_area(rows: Rows, thickness: Number) -> Number:
    """Area of each plate, m^2.

    Parameters
    ----------
    thickness : (..., plates) remaining, m.
    """
    return rows.length * thickness + rows.disc * thickness**2


def centroid(area: Number, position: Number, total: Number) -> Number:
    """Where the centroid lies along one axis, m; 0 where nothing is left.

    Parameters
    ----------
    area, position : (..., plates), m^2 and m. total : (...) their whole area.
    """
    return (area * position).sum(axis=-1) / _divisor(total)


def _divisor(total: Number) -> Number:
    if isinstance(total, Traced):
        return total if total.value else 1.0
    return np.where(total > 0, total, 1.0)


def plate_inertia(area: Number, fixed: Number, share: Number, thickness: Number, distance: Number) -> Number:
    """Inertia of each plate about an axis through the section's centroid, m^4 (parallel-axis theorem).

    Parameters
    ----------
    area, fixed, share, thickness : (..., plates) as in `Rows`. distance : of the plate's centre from the axis, m.
    """
    return area * (fixed + share * thickness**2 + distance**2)


def level(name: str, breadth: float, thickness: float, x: float, y: float, *free: Free) -> Plate:
    """A rectangle that lies: breadth horizontal, thickness vertical; all in m."""
    return Plate(name, LEVEL, breadth, thickness, x, y, free)


def upright(name: str, breadth: float, thickness: float, x: float, y: float, *free: Free) -> Plate:
    """A rectangle that stands: breadth vertical, thickness horizontal; all in m."""
    return Plate(name, UPRIGHT, breadth, thickness, x, y, free)
