"""Allowable stress rating: AASHTO Manual for Bridge Evaluation 6B with the stresses of the Standard Specifications.

Loads stay unfactored; safety lies in the allowable stresses, which differ from level to level.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Final

from models.calculation import Number, Sheet, choose, root
from models.resistance.columns import elastic_critical_load, slenderness
from models.resistance.effective import BREADTHS, TUBE_RULE, counted_strength
from models.resistance.protocol import DeadFactors, FactorLine, Level, Member, Resistance

_MANUAL: Final = "AASHTO Manual for Bridge Evaluation"
_RATING_FACTOR: Final = f"{_MANUAL} 6B.4.1 (from memory)"
_FACTORS: Final = f"{_MANUAL} 6B.4.2 (from memory)"
_STRESSES: Final = f"{_MANUAL}, Tables 6B.5.2.1-1 and -2 (from memory)"
_COLUMN: Final = f"AASHTO Standard Specifications, Table 10.32.1A (formula read elsewhere); {_STRESSES}"


@dataclass(frozen=True, slots=True)
class Allowable:
    """Parts of yield and tensile strength that tension may use, and the factor of safety in compression."""

    gross: float
    net: float
    safety: float


ALLOWABLE: Final = (Allowable(0.55, 0.50, 2.12), Allowable(0.75, 0.67, 1.70))
"""Inventory and operating: AASHTO Manual for Bridge Evaluation, Tables 6B.5.2.1-1 and -2 (from memory)."""


def column_strength(member: Member, yield_load: Number, critical_load: Number, sheet: Sheet) -> Number:
    """What a column bears without any factor of safety, all of its section counting, N.

    Parameters
    ----------
    yield_load : Po, yield strength times area, N. critical_load : Pe, elastic critical load, N, which is
        pi^2 E A/(KL/r)^2.

    With 2 Cc^2 = 4 pi^2 E/Fy the stress is Fy (1 - (KL/r)^2 Fy/(4 pi^2 E)) up to Cc, and pi^2 E/(KL/r)^2 beyond.
    """
    ratio = sheet.note(
        "KL/r", slenderness(member.E, member.area, critical_load), "ratio", "slenderness, from Pe", _COLUMN
    )
    limit = sheet.note(
        "Cc",
        math.pi * root(2 * member.E / member.Fy),
        "ratio",
        "slenderness above which buckling is elastic",
        _COLUMN,
    )
    return choose(ratio, "<=", limit, yield_load * (1 - ratio**2 / (2 * limit**2)), critical_load)


class AllowableStressRating:
    """The basis `allowable stress`."""

    name: Final = "allowable stress"
    levels: Final = (Level("inventory", 1.0, _FACTORS), Level("operating", 1.0, _FACTORS))
    components: Final = DeadFactors(1.0, 1.0, _FACTORS)
    wearing: Final = DeadFactors(1.0, 1.0, _FACTORS)
    rating_source: Final = _RATING_FACTOR
    tube_rule: Final = TUBE_RULE
    leaves_out: Final = ()

    def condition_factor(self, state: str | None, measured: bool) -> float | None:
        """There is none."""
        return None

    def system_factor(self, system: str | None) -> float | None:
        """There is none."""
        return None

    def combined_factor(self, condition: Number, system: Number) -> Number:
        """Never asked for."""
        return condition * system

    def resistances(self, member: Member, sheet: Sheet) -> tuple[Resistance, ...]:
        """Inventory and operating, each with its own allowable stresses."""
        full = sheet.note("Po", member.Fy * member.area, "force", "yield load", _COLUMN)
        critical = sheet.note("Pe", elastic_critical_load(member), "force", "elastic critical load", _COLUMN)
        column = column_strength(member, full, critical, sheet)
        counts = counted_strength(member, column, sheet)
        source = _COLUMN if counts.strength is column else BREADTHS
        nominal = sheet.note("Pn", counts.strength, "force", "compression without factor of safety", source)
        found = []
        for level, allowable in zip(self.levels, ALLOWABLE, strict=True):
            yields = allowable.gross * full
            fractures = allowable.net * member.Fu * member.area * member.net_area * member.shear_lag
            found.append(
                Resistance(
                    _note(sheet, "Pry", yields, "tension, gross section", level),
                    _note(sheet, "Pru", fractures, "tension, net section", level),
                    _note(sheet, "Prc", nominal / allowable.safety, "compression, flexural buckling", level),
                    *counts[1:],
                )
            )
        return tuple(found)

    def factor_lines(self) -> tuple[FactorLine, ...]:
        """Allowable stresses and load factors."""
        return (
            *(
                FactorLine(f"allowable {what}, {level.name}", value, _STRESSES)
                for level, allowable in zip(self.levels, ALLOWABLE, strict=True)
                for what, value in (
                    ("tension, gross section", f"{allowable.gross:.2f} Fy"),
                    ("tension, net section", f"{allowable.net:.2f} Fu"),
                    ("compression, factor of safety", f"{allowable.safety:.2f}"),
                )
            ),
            FactorLine("dead load factor", f"{self.components.greatest:.2f}", _FACTORS),
            FactorLine("live load factor", f"{self.levels[-1].live:.2f}", _FACTORS),
            FactorLine("condition and system factor", "none", _RATING_FACTOR),
        )


def _note(sheet: Sheet, symbol: str, value: Number, title: str, level: Level) -> Number:
    return sheet.note(f"{symbol} {level.name}", value, "force", f"{title}, {level.name}", _STRESSES)


ALLOWABLE_STRESS: Final = AllowableStressRating()
