"""Columns whose plates are so slender that they buckle on their own: effective breadths.

The column curve is that of the gross section; of each slender plate only an effective breadth bears its stress.
Every formula takes arrays or the numbers of a hand check (`models.calculation`); there is one of each.

References
----------
AISC 360-22 E7 and Table E7.1 (read in a transcription); AASHTO LRFD 6.9.4.2.2 (from memory).
"""

from __future__ import annotations

from dataclasses import replace
from typing import Final, NamedTuple

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array, NoSheet, Number, Sheet, choose, least, root
from models.resistance.protocol import Member
from models.section import Plates, Ring, Strip, WrittenPlates

ROUND_LIMIT: Final = 0.11
"""Outside diameter over thickness, times E/Fy, up to which all of a round tube counts (AISC 360-22 E7.2, read)."""
ROUND_COVERED: Final = 0.45
"""The same, up to which there is a published rule (AISC 360-22 E7.2, read)."""

TUBE_RULE: Final = f"{ROUND_COVERED:.2f} E/Fy, beyond which no rule is published (AISC 360 E7.2)"

BREADTHS: Final = "AISC 360-22 E7.1; AASHTO LRFD 6.9.4.2.2 (from memory)"
_ROUND: Final = "AISC 360-22 E7.2; AASHTO LRFD 6.9.4.2.2 (from memory)"
_TABLE: Final = "AISC 360 Table B4.1a; AASHTO LRFD 6.9.4.2.1 (from memory)"
_NEGLIGIBLE: Final = 1e-12
"""A column stress below this part of yield: nothing buckles on its own under it."""


class Counted(NamedTuple):
    """A compressive resistance, N, with what decided how much of the section counts, as in `Resistance`."""

    strength: Number
    share: Number = 1.0
    slender: NDArray[np.bool_] | None = None
    uncovered: NDArray[np.bool_] | None = None


def counted_strength(member: Member, column: Number, sheet: Sheet) -> Counted:
    """Nominal compressive resistance where slender plates bear only part of the column's stress.

    Parameters
    ----------
    column : what the column curve gives for the gross section, N.
    sheet : lines are written to it only where a plate is slender.

    Returns
    -------
    The resistance and the part of the area that counts; ``column`` itself and 1 where all of it does.
    """
    if isinstance(member.plates, WrittenPlates):
        return _of_one(member, member.plates, column, sheet)
    return _of_many(member, member.plates, column) if member.plates else Counted(column)


def thin_tubes(member: Member, plates: Plates, limit: float) -> NDArray[np.bool_]:
    """Which members (n,) are round tubes whose diameter over thickness is above limit times E/Fy."""
    ring = plates.ring
    if ring is None:
        return np.zeros(len(member.area), bool)
    found: NDArray[np.bool_] = ring.diameter + ring.thickness > limit * member.E / member.Fy * ring.thickness
    there: NDArray[np.bool_] = ring.thickness > 0
    return found & there


def _stress(member: Member, column: Array) -> Array:
    """Stress (n,) of the gross section under the column's strength, Pa; never quite zero."""
    found: Array = np.maximum(column / np.where(member.area > 0, member.area, 1.0), _NEGLIGIBLE * member.Fy)
    return found


def _of_many(member: Member, plates: Plates, column: Array) -> Counted:
    stress = _stress(member, column)
    thin, tubes = plates.slender(member.E, stress), thin_tubes(member, plates, ROUND_LIMIT)
    if not thin.any() and not tubes.any():
        return Counted(column)
    area, where = member.area, np.nonzero(thin)
    bars, strip = where[0], plates.strip(where)
    breadth = effective_breadth(strip, member.E[bars], member.Fy[bars], stress[bars], NoSheet())
    lost = np.bincount(bars, uncounted(strip, breadth), len(area))
    effective = effective_area(area, lost, plates.table)
    if plates.ring is not None and tubes.any():
        ring = Ring(plates.ring.diameter[tubes], plates.ring.thickness[tubes])
        effective[tubes] = area[tubes] * effective_share(ring, member.E[tubes], member.Fy[tubes], NoSheet())
    # a bar with nothing slender keeps its figure to the last digit, whatever stands beside it
    reduced = effective < area
    return Counted(
        np.where(reduced, stress * effective, column),
        np.divide(effective, area, np.ones_like(area), where=reduced),
        thin,
        thin_tubes(member, plates, ROUND_COVERED),
    )


def _of_one(member: Member, plates: WrittenPlates, column: Number, sheet: Sheet) -> Counted:
    if not member.area.value:
        return Counted(column)
    E, Fy, stress = member.E.value, member.Fy.value, column.value / member.area.value
    thin = [strip for strip in plates.strips if strip.thickness.value and _is_slender(strip, E, Fy, stress)]
    ring = plates.ring if plates.ring and plates.ring.thickness.value else None
    if ring and float(_thinness(ring)) <= ROUND_LIMIT * E / Fy:
        ring = None
    if not thin and not ring:
        return Counted(column)
    gross = sheet.note(
        "Pcr", column, "force", "nominal resistance of the column, all of its section counting", BREADTHS
    )
    stress = sheet.note("Fcr", gross / member.area, "stress", "its stress", BREADTHS)
    if ring:
        effective = member.area * effective_share(ring, member.E, member.Fy, sheet)
    else:
        named = [_named(strip, sheet) for strip in thin]
        lost = [uncounted(one, effective_breadth(one, member.E, member.Fy, stress, sheet)) for one in named]
        effective = effective_area(member.area, sum(lost[1:], lost[0]), plates.table)
    source = _ROUND if ring else BREADTHS
    effective = sheet.note("Ae", effective, "area", "effective area", source)
    return Counted(stress * effective, effective.value / member.area.value)


def _named(strip: Strip, sheet: Sheet) -> Strip:
    """The strip with lines for what the section's own lines do not give."""
    kc, free = strip.kc, strip.free
    if kc is not None:
        kc = sheet.note(
            f"kc{strip.number}", kc, "ratio", f"{strip.plates}: factor of a flange welded to its web", _TABLE
        )
    if isinstance(free, float):
        free = sheet.given(f"bf{strip.number}", free, "size", f"{strip.plates}: breadth that is free")
    breadth = free if isinstance(strip.breadth, float) else strip.breadth
    return replace(strip, free=free, breadth=breadth, kc=kc)


def _limit(strip: Strip, E: Number, Fy: Number) -> Number:
    return strip.limit * root(E / Fy if strip.kc is None else E / Fy * strip.kc)


def _is_slender(strip: Strip, E: float, Fy: float, stress: float) -> bool:
    return bool(float(strip.free / strip.thickness) > float(_limit(strip, E, Fy)) * (Fy / stress) ** 0.5)


def effective_breadth(strip: Strip, E: Number, Fy: Number, stress: Number, sheet: Sheet) -> Number:
    """The breadth of a slender part that counts, m.

    Parameters
    ----------
    stress : of the column on its gross section, Pa.

    The printed c2 are rounded: just beyond the limit the formula gives up to 0.2 % more than the whole breadth,
    which is cut off, or (walls of rectangular tubes) 0.1 % less.
    """
    number, plates = strip.number, strip.plates
    slenderness = sheet.note(
        f"λ{number}", strip.free / strip.thickness, "ratio", f"{plates}: free breadth over thickness", _TABLE
    )
    limit = sheet.note(f"λr{number}", _limit(strip, E, Fy), "ratio", f"{plates}: limit of slenderness", _TABLE)
    local = sheet.note(
        f"Fel{number}",
        (strip.c2 * limit / slenderness) ** 2 * Fy,
        "stress",
        f"{plates}: stress of elastic local buckling",
        BREADTHS,
    )
    ratio = root(local / stress)
    reduced = least(strip.breadth * (1 - strip.c1 * ratio) * ratio, strip.breadth)
    kept = choose(slenderness, "<=", limit * root(Fy / stress), strip.breadth, reduced)
    return sheet.note(f"be{number}", kept, "size", f"{plates}: effective breadth", BREADTHS)


def uncounted(strip: Strip, breadth: Number) -> Number:
    """The area, m^2, that a slender part leaves out when only this breadth, m, of it counts."""
    lost = (strip.breadth - breadth) * strip.thickness
    return lost if isinstance(strip.count, int) and strip.count == 1 else strip.count * lost


def effective_area(area: Number, lost: Number, table: Number | None) -> Number:
    """The area that counts, m^2; where a table gives the area, what the plates lose is scaled as all else is."""
    return area - (lost if table is None else table * lost)


def _thinness(ring: Ring) -> Number:
    return (ring.diameter + ring.thickness) / ring.thickness


def effective_share(ring: Ring, E: Number, Fy: Number, sheet: Sheet) -> Number:
    """The part of a round tube that counts.

    Beyond 0.45 E/Fy no rule is published; there the last value of the rule falls as the tube gets thinner, as an
    elastic shell's would (common practice, no source), and a finding says so.
    """
    thinness = sheet.note(
        f"λ{ring.number}", _thinness(ring), "ratio", "outside diameter over thickness, the mean diameter kept", _ROUND
    )
    ruled = least(0.038 * E / (Fy * thinness) + 2 / 3, 1.0)
    ruled = choose(thinness, "<=", ROUND_LIMIT * E / Fy, 1.0, ruled)
    beyond = (0.038 / ROUND_COVERED + 2 / 3) * (ROUND_COVERED * E / Fy) / thinness
    share = choose(thinness, "<=", ROUND_COVERED * E / Fy, ruled, beyond)
    return sheet.note("Ae/A", share, "ratio", "part of the section that counts", _ROUND)
