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

from models.calculation import Array, Number, Sheet, choose, least, root
from models.resistance.plate_rule import area_of_many, area_of_one, named_breadths, thin_of_one, thinness
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
    plates = member.plates
    if isinstance(plates, WrittenPlates):
        return _of_one(member, plates, column, sheet)
    area = member.area
    stress = np.maximum(column / np.where(area > 0, area, 1.0), _NEGLIGIBLE * member.Fy) if plates else column
    found = area_of_many(AISC, member, plates, stress) if plates else None
    if found is None:
        return Counted(column)
    # a bar with nothing slender keeps its figure to the last digit, whatever stands beside it
    reduced = found.area < area
    share = np.divide(found.area, area, np.ones_like(area), where=reduced)
    return Counted(np.where(reduced, stress * found.area, column), share, found.slender, found.uncovered)


def _of_one(member: Member, plates: WrittenPlates, column: Number, sheet: Sheet) -> Counted:
    thin = thin_of_one(AISC, member, plates, column.value / member.area.value) if member.area.value else None
    if thin is None:
        return Counted(column)
    gross = sheet.note(
        "Pcr", column, "force", "nominal resistance of the column, all of its section counting", BREADTHS
    )
    stress = sheet.note("Fcr", gross / member.area, "stress", "its stress", BREADTHS)
    effective = area_of_one(AISC, member, plates, thin, stress, sheet)
    return Counted(stress * effective, effective.value / member.area.value)


def _limit(strip: Strip, E: Number, Fy: Number) -> Number:
    return strip.limit * root(E / Fy if strip.kc is None else E / Fy * strip.kc)


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


def effective_share(ring: Ring, E: Number, Fy: Number, sheet: Sheet) -> Number:
    """The part of a round tube that counts.

    Beyond 0.45 E/Fy no rule is published; there the last value of the rule falls as the tube gets thinner, as an
    elastic shell's would (common practice, no source), and a finding says so.
    """
    ratio = sheet.note(
        f"λ{ring.number}", thinness(ring), "ratio", "outside diameter over thickness, the mean diameter kept", _ROUND
    )
    ruled = least(0.038 * E / (Fy * ratio) + 2 / 3, 1.0)
    ruled = choose(ratio, "<=", ROUND_LIMIT * E / Fy, 1.0, ruled)
    beyond = (0.038 / ROUND_COVERED + 2 / 3) * (ROUND_COVERED * E / Fy) / ratio
    share = choose(ratio, "<=", ROUND_COVERED * E / Fy, ruled, beyond)
    return sheet.note("Ae/A", share, "ratio", "part of the section that counts", _ROUND)


class _Aisc:
    """The rule of AISC 360-22 E7, see `models.resistance.plate_rule.PlateRule`."""

    breadths: Final = BREADTHS
    round_tubes: Final = _ROUND

    def slender(self, plates: Plates, member: Member, stress: Array) -> NDArray[np.bool_]:
        return plates.slender(member.E, stress)

    def is_slender(self, strip: Strip, E: float, Fy: float, stress: float) -> bool:
        return bool(float(strip.free / strip.thickness) > float(_limit(strip, E, Fy)) * (Fy / stress) ** 0.5)

    def named(self, strip: Strip, sheet: Sheet) -> Strip:
        if strip.kc is None:
            return named_breadths(strip, sheet)
        title = f"{strip.plates}: factor of a flange welded to its web"
        return named_breadths(
            replace(strip, kc=sheet.note(f"kc{strip.number}", strip.kc, "ratio", title, _TABLE)), sheet
        )

    def breadth(self, strip: Strip, E: Number, Fy: Number, stress: Number, sheet: Sheet) -> Number:
        return effective_breadth(strip, E, Fy, stress, sheet)

    def ring_limit(self, E: Number, Fy: Number) -> Number:
        return ROUND_LIMIT * E / Fy

    def ring_covered(self, E: Number, Fy: Number) -> Number:
        return ROUND_COVERED * E / Fy

    def ring_share(self, ring: Ring, E: Number, Fy: Number, sheet: Sheet) -> Number:
        return effective_share(ring, E, Fy, sheet)


AISC: Final = _Aisc()
