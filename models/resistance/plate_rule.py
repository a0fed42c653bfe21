"""What counts of a section whose plates buckle on their own, under the rule of whichever standard.

Every formula takes arrays or the numbers of a hand check (`models.calculation`); there is one of each.
"""

from __future__ import annotations

from dataclasses import replace
from typing import NamedTuple, Protocol

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array, NoSheet, Number, Sheet
from models.resistance.protocol import Member
from models.section import Plates, Ring, Strip, WrittenPlates


class PlateRule(Protocol):
    """How much of slender plates counts, by one standard.

    ``breadths`` and ``round_tubes`` say where the two rules stand. Stresses are the column's on its gross section, Pa.
    """

    @property
    def breadths(self) -> str:
        """Where the rule for effective breadths stands."""

    @property
    def round_tubes(self) -> str:
        """Where the rule for round tubes stands."""

    def slender(self, plates: Plates, member: Member, stress: Array) -> NDArray[np.bool_]:
        """Which free parts (n, Q) of plates buckle on their own."""

    def is_slender(self, strip: Strip, E: float, Fy: float, stress: float) -> bool:
        """Whether one part does."""

    def named(self, strip: Strip, sheet: Sheet) -> Strip:
        """The strip with lines for what the section's own lines do not give."""

    def breadth(self, strip: Strip, E: Number, Fy: Number, stress: Number, sheet: Sheet) -> Number:
        """What counts of a slender part's breadth, m."""

    def ring_limit(self, E: Number, Fy: Number) -> Number:
        """Outside diameter over thickness up to which all of a round tube counts."""

    def ring_covered(self, E: Number, Fy: Number) -> Number:
        """The same, up to which the standard has a rule."""

    def ring_share(self, ring: Ring, E: Number, Fy: Number, sheet: Sheet) -> Number:
        """The part of a thinner round tube that counts."""


class CountedArea(NamedTuple):
    """Effective area, m^2, with which parts lose breadth and which tubes no rule covers, as in `Resistance`."""

    area: Array
    slender: NDArray[np.bool_]
    uncovered: NDArray[np.bool_]


class Thin(NamedTuple):
    """The slender parts of one section of a hand check: plates, or the wall of a round tube."""

    strips: tuple[Strip, ...]
    ring: Ring | None


def area_of_many(rule: PlateRule, member: Member, plates: Plates, stress: Array) -> CountedArea | None:
    """Effective areas (n,); None where all of every section counts."""
    E, Fy, area = member.E, member.Fy, member.area
    slender, tubes = rule.slender(plates, member, stress), thin_tubes(plates, rule.ring_limit(E, Fy))
    if not slender.any() and not tubes.any():
        return None
    where = np.nonzero(slender)
    bars, strip = where[0], plates.strip(where)
    breadth = rule.breadth(strip, E[bars], Fy[bars], stress[bars], NoSheet())
    effective = effective_area(area, np.bincount(bars, uncounted(strip, breadth), len(area)), plates.table)
    if plates.ring is not None and tubes.any():
        ring = Ring(plates.ring.diameter[tubes], plates.ring.thickness[tubes])
        effective[tubes] = area[tubes] * rule.ring_share(ring, E[tubes], Fy[tubes], NoSheet())
    return CountedArea(effective, slender, thin_tubes(plates, rule.ring_covered(E, Fy)))


def thin_of_one(rule: PlateRule, member: Member, plates: WrittenPlates, stress: float) -> Thin | None:
    """What is slender of one section; None where nothing is, or nothing is left."""
    E, Fy = member.E.value, member.Fy.value
    strips = tuple(one for one in plates.strips if one.thickness.value and rule.is_slender(one, E, Fy, stress))
    ring = plates.ring if plates.ring and plates.ring.thickness.value else None
    if ring and float(thinness(ring)) <= rule.ring_limit(E, Fy):
        ring = None
    return Thin(strips, ring) if (strips or ring) and member.area.value else None


def area_of_one(
    rule: PlateRule, member: Member, plates: WrittenPlates, thin: Thin, stress: Number, sheet: Sheet
) -> Number:
    """Effective area of one section, m^2, with a line for each step."""
    if thin.ring:
        effective = member.area * rule.ring_share(thin.ring, member.E, member.Fy, sheet)
    else:
        named = [rule.named(strip, sheet) for strip in thin.strips]
        lost = [uncounted(one, rule.breadth(one, member.E, member.Fy, stress, sheet)) for one in named]
        effective = effective_area(member.area, sum(lost[1:], lost[0]), plates.table)
    return sheet.note("Ae", effective, "area", "effective area", rule.round_tubes if thin.ring else rule.breadths)


def named_breadths(strip: Strip, sheet: Sheet) -> Strip:
    """The strip with a line for the breadth that is free, where it is not the plate's own."""
    free = strip.free
    if isinstance(free, float):
        free = sheet.given(f"bf{strip.number}", free, "size", f"{strip.plates}: breadth that is free")
    return replace(strip, free=free, breadth=free if isinstance(strip.breadth, float) else strip.breadth)


def thin_tubes(plates: Plates, limit: Array) -> NDArray[np.bool_]:
    """Which members (n,) are round tubes whose outside diameter over thickness is above a limit (n,)."""
    ring = plates.ring
    if ring is None:
        return np.zeros(len(plates.thickness), bool)
    found: NDArray[np.bool_] = ring.diameter + ring.thickness > limit * ring.thickness
    there: NDArray[np.bool_] = ring.thickness > 0
    return found & there


def thinness(ring: Ring) -> Number:
    """Outside diameter over thickness, the mean diameter kept as the wall thins."""
    return (ring.diameter + ring.thickness) / ring.thickness


def uncounted(strip: Strip, breadth: Number) -> Number:
    """The area, m^2, that a slender part leaves out when only this breadth, m, of it counts."""
    lost = (strip.breadth - breadth) * strip.thickness
    return lost if isinstance(strip.count, int) and strip.count == 1 else strip.count * lost


def effective_area(area: Number, lost: Number, table: Number | None) -> Number:
    """The area that counts, m^2; where a table gives the area, what the plates lose is scaled as all else is."""
    return area - (lost if table is None else table * lost)
