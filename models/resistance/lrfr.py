"""Load and resistance factor rating: AASHTO Manual for Bridge Evaluation 6A with AASHTO LRFD resistances."""

from __future__ import annotations

from types import MappingProxyType
from typing import Final

from models.calculation import Number, Sheet, greatest
from models.errors import InputError, Problem
from models.resistance.columns import column_strength, elastic_critical_load
from models.resistance.effective import BREADTHS, TUBE_RULE, counted_strength
from models.resistance.protocol import DeadFactors, FactorLine, Level, Member, Resistance

PHI_YIELD: Final = 0.95
"""Yield of the gross section in tension (AASHTO LRFD 6.5.4.2, from memory)."""
PHI_FRACTURE: Final = 0.80
"""Fracture of the net section in tension (AASHTO LRFD 6.5.4.2, from memory)."""
PHI_COMPRESSION: Final = 0.95
"""Axial compression (AASHTO LRFD 6.5.4.2 since 2014, from memory)."""

CONDITION: Final = MappingProxyType({"good": 1.00, "fair": 0.95, "poor": 0.85, "severe": 0.85})
"""AASHTO Manual for Bridge Evaluation, Table 6A.4.2.3-1 (from memory)."""
UNRECORDED_STATE: Final = "fair"
"""The state that counts where none is on record."""
MEASURED: Final = 0.05
"""What measurement adds to the condition factor, to at most 1 (the same manual, C6A.4.2.3, from memory)."""
SYSTEM: Final = MappingProxyType({"welded": 0.85, "riveted": 0.90, "eyebars": 0.90, "redundant": 1.00})
"""AASHTO Manual for Bridge Evaluation, Table 6A.4.2.4-1 (from memory)."""
UNRECORDED_SYSTEM: Final = "welded"
"""The system that counts where the site names none: the one with the least factor."""
LEAST_PRODUCT: Final = 0.85
"""Condition times system factor is at least this (the same manual, 6A.4.2.1, from memory)."""

_MANUAL: Final = "AASHTO Manual for Bridge Evaluation"
_LRFD: Final = "AASHTO LRFD"
_LIVE_FACTORS: Final = f"{_MANUAL}, Table 6A.4.2.2-1 (from memory)"
_DEAD_FACTORS: Final = f"{_MANUAL}, Table 6A.4.2.2-1; {_LRFD} 3.4.1 (from memory)"
_RATING_FACTOR: Final = f"{_MANUAL} 6A.4.2.1 (from memory)"
_PHI: Final = f"{_LRFD} 6.5.4.2 (from memory)"
_GROSS_AND_NET: Final = f"{_LRFD} 6.8.2.1 (from memory)"
_COLUMN: Final = f"{_LRFD} 6.9.4.1.1 (from memory)"


class LoadAndResistanceFactorRating:
    """The basis `lrfr`."""

    name: Final = "lrfr"
    levels: Final = (Level("inventory", 1.75, _LIVE_FACTORS), Level("operating", 1.35, _LIVE_FACTORS))
    components: Final = DeadFactors(1.25, 0.90, _DEAD_FACTORS)
    wearing: Final = DeadFactors(1.50, 0.65, _DEAD_FACTORS)
    rating_source: Final = _RATING_FACTOR
    tube_rule: Final = TUBE_RULE
    leaves_out: Final = ()

    def condition_factor(self, state: str | None, measured: bool) -> float | None:
        """From the state on record; raised by measurement, to at most 1."""
        factor = CONDITION.get(state or UNRECORDED_STATE)
        if factor is None:
            raise InputError([Problem("state", f"`{state}` is not a state", "one of " + ", ".join(CONDITION))])
        return min(1.0, round(factor + MEASURED, 2)) if measured else factor

    def system_factor(self, system: str | None) -> float | None:
        """From how the bar is built; the least factor where the site does not say."""
        factor = SYSTEM.get(system or UNRECORDED_SYSTEM)
        if factor is None:
            raise InputError([Problem("system", f"`{system}` is not a system", "one of " + ", ".join(SYSTEM))])
        return factor

    def combined_factor(self, condition: Number, system: Number) -> Number:
        """Condition times system factor, not below 0.85."""
        return greatest(condition * system, LEAST_PRODUCT)

    def resistances(self, member: Member, sheet: Sheet) -> tuple[Resistance, ...]:
        """The same resistance at both levels."""
        yields = PHI_YIELD * member.Fy * member.area
        fractures = PHI_FRACTURE * member.Fu * member.area * member.net_area * member.shear_lag
        tension_yield = sheet.note("Pry", yields, "force", "tension, yield of the gross section", _GROSS_AND_NET)
        tension_fracture = sheet.note("Pru", fractures, "force", "tension, fracture of the net section", _GROSS_AND_NET)
        full = sheet.note("Po", member.Fy * member.area, "force", "yield load", _COLUMN)
        critical = sheet.note(
            "Pe", elastic_critical_load(member), "force", "elastic critical load", f"{_LRFD} 6.9.4.1.2 (from memory)"
        )
        column = column_strength(full, critical)
        counts = counted_strength(member, column, sheet)
        source = _COLUMN if counts.strength is column else BREADTHS
        nominal = sheet.note("Pn", counts.strength, "force", "nominal compressive resistance", source)
        factored = PHI_COMPRESSION * nominal
        buckling = sheet.note(
            "Prc", factored, "force", "compression, flexural buckling", f"{_LRFD} 6.9.2.1 (from memory)"
        )
        resistance = Resistance(tension_yield, tension_fracture, buckling, *counts[1:])
        return tuple(resistance for _ in self.levels)

    def factor_lines(self) -> tuple[FactorLine, ...]:
        """Resistance, load, condition and system factors."""
        return (
            FactorLine("resistance factor, tension yield", f"{PHI_YIELD:.2f}", _PHI),
            FactorLine("resistance factor, tension fracture", f"{PHI_FRACTURE:.2f}", _PHI),
            FactorLine("resistance factor, compression", f"{PHI_COMPRESSION:.2f}", _PHI),
            FactorLine("dead load factor, components", _dead(self.components), self.components.source),
            FactorLine("dead load factor, wearing surface", _dead(self.wearing), self.wearing.source),
            *(
                FactorLine(f"live load factor, {level.name}", f"{level.live:.2f}", level.source)
                for level in self.levels
            ),
            FactorLine("condition factor", _table(CONDITION), f"{_MANUAL}, Table 6A.4.2.3-1 (from memory)"),
            FactorLine(
                "condition factor of a measured section",
                f"+ {MEASURED:.2f}, to at most 1.00",
                f"{_MANUAL} C6A.4.2.3 (from memory)",
            ),
            FactorLine("system factor", _table(SYSTEM), f"{_MANUAL}, Table 6A.4.2.4-1 (from memory)"),
            FactorLine("condition times system factor", f"at least {LEAST_PRODUCT:.2f}", _RATING_FACTOR),
        )


def _dead(factors: DeadFactors) -> str:
    return f"{factors.greatest:.2f}, or {factors.least:.2f} where it relieves"


def _table(factors: MappingProxyType[str, float]) -> str:
    return ", ".join(f"{name} {factor:.2f}" for name, factor in factors.items())


LRFR: Final = LoadAndResistanceFactorRating()
