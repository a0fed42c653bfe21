"""Rating by the Eurocodes: EN 1993 resistances, EN 1990 load factors, one level `ultimate`. All from memory.

The Eurocodes know no rating factor; it is the factor on the live loads at which the verification of EN 1990 6.4.3.2
is just met.
"""

from __future__ import annotations

from typing import Any, Final

import numpy as np

from models.calculation import Number, Sheet, Traced, choose, greatest, least, root
from models.resistance.columns import critical_loads, elastic_critical_load
from models.resistance.effective_en import EUROPEAN, TUBE_RULE
from models.resistance.plate_rule import area_of_many, area_of_one, thin_of_one
from models.resistance.protocol import DeadFactors, FactorLine, Level, Member, Resistance
from models.section import WrittenPlates

GAMMA_M0: Final = 1.00
"""Yield of the gross section (EN 1993-2, 6.1(1), from memory)."""
GAMMA_M1: Final = 1.10
"""Buckling of members (the same)."""
GAMMA_M2: Final = 1.25
"""Fracture of the net section (the same)."""
IMPERFECTION: Final = {"a0": 0.13, "a": 0.21, "b": 0.34, "c": 0.49, "d": 0.76}
"""EN 1993-1-1, Table 6.1 (read)."""
PLATEAU: Final = 0.2
"""Slenderness up to which nothing buckles (EN 1993-1-1, 6.3.1.2(4), from memory)."""

HORIZONTAL_FORCE: Final = (
    "The horizontal force that EN 1991-2, 5.4 (from memory) puts at deck level with every traffic load of a footbridge "
    "is left out of all figures on this basis; along the bridge it adds to the chords' forces and to what the bearings "
    "take."
)

_LOADS: Final = "EN 1990, Table A2.4(B) (read in a transcription)"
_PARTIAL: Final = "EN 1993-2, 6.1(1) (from memory)"
_TENSION: Final = "EN 1993-1-1, 6.2.3(2) (from memory)"
_BUCKLING: Final = "EN 1993-1-1, 6.3.1.1(3) (from memory)"
_CURVE: Final = "EN 1993-1-1, 6.3.1.2 (formula read)"
_CURVES: Final = "EN 1993-1-1, Table 6.1 (read) and Table 6.2 (from memory)"
_NEGLIGIBLE: Final = 1e-12
"""A critical load below this part of yield is taken as that much, so that nothing overflows."""

_WAYS: Final = (("i", "in plane"), ("o", "out of plane"))
_COUPLED: Final = 1e-9
"""A product of inertia below this part of the inertias is rounding, as in the section's hand check."""


def reduction(slenderness: Number, imperfection: Number, sheet: Sheet, mark: str = "") -> Number:
    """The reduction factor for flexural buckling.

    Parameters
    ----------
    slenderness : root of yield over critical load. imperfection : alpha. mark : what follows the symbols of its lines.

    References
    ----------
    EN 1993-1-1, 6.3.1.2(1) (formula read).
    """
    half = 0.5 * (1 + imperfection * (slenderness - PLATEAU) + slenderness**2)
    half = sheet.note(f"Φ{mark}", half, "ratio", "help value", _CURVE)
    curve = 1 / (half + root(half**2 - slenderness**2))
    return sheet.note(
        f"χ{mark}", choose(slenderness, "<=", PLATEAU, 1.0, curve), "ratio", "reduction factor for buckling", _CURVE
    )


def weakest_reduction(member: Member, strength: Number, sheet: Sheet) -> Number:
    """The reduction factor of a bar: in plane and out of plane, each by its own curve.

    Where the two directions take part in each other, the least elastic critical load with the worse of the two curves.

    Parameters
    ----------
    strength : yield strength times effective area, N.
    """
    imperfections = [
        sheet.given(f"α{mark}", _imperfection(name), "ratio", f"imperfection factor {way}{_curve(name)}", _CURVES)
        for (mark, way), name in zip(_WAYS, member.curves, strict=True)
    ]
    loads = critical_loads(member)
    found = [
        _reduced(strength, load, alpha, sheet, mark, way)
        for (mark, way), load, alpha in zip(_WAYS, loads, imperfections, strict=True)
    ]
    weakest = least(*found)
    product = member.inertia_product
    if isinstance(product, Traced) and not product.value:
        return weakest
    worse = greatest(*imperfections)
    together = _reduced(strength, elastic_critical_load(member), worse, sheet, "", "about the weakest axis")
    if isinstance(product, Traced):
        return together
    size = member.inertia_horizontal + member.inertia_vertical
    return np.where(np.abs(product) > _COUPLED * size, together, weakest)


def _reduced(strength: Number, load: Number, alpha: Number, sheet: Sheet, mark: str, way: str) -> Number:
    critical = sheet.note(f"Ncr{mark}", load, "force", f"elastic critical load {way}", _CURVE)
    ratio = sheet.note(f"λ{mark}", root(_over(strength, critical)), "ratio", f"slenderness {way}", _CURVE)
    return reduction(ratio, alpha, sheet, mark)


def _over(strength: Number, critical: Number) -> Number:
    if isinstance(critical, Traced):
        return strength / critical if critical.value else strength
    bounded = np.maximum(critical, _NEGLIGIBLE * strength)
    return strength / np.where(bounded > 0, bounded, 1.0)


def _imperfection(curve: Any) -> Any:
    """Alpha by the name of its curve, or by an array of names."""
    if isinstance(curve, str):
        return IMPERFECTION[curve]
    found = np.zeros(curve.shape)
    for name, alpha in IMPERFECTION.items():
        found[curve == name] = alpha
    return found


def _curve(curve: Any) -> str:
    return f", curve {curve}" if isinstance(curve, str) else ""


class EurocodeRating:
    """The basis `eurocode`."""

    name: Final = "eurocode"
    levels: Final = (Level("ultimate", 1.35, _LOADS, (("uniform", 1.50),)),)
    components: Final = DeadFactors(1.35, 1.00, _LOADS)
    wearing: Final = DeadFactors(1.35, 1.00, _LOADS)
    rating_source: Final = "EN 1990, 6.4.3.2 (from memory), solved for the factor on the live load"
    tube_rule: Final = TUBE_RULE
    leaves_out: Final = (HORIZONTAL_FORCE,)

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
        """The design resistances at the ultimate limit state."""
        yields = member.Fy * member.area / GAMMA_M0
        fractures = 0.9 * member.Fu * member.area * member.net_area * member.shear_lag / GAMMA_M2
        tension_yield = sheet.note("Npl", yields, "force", "tension, yield of the gross section", _TENSION)
        tension_fracture = sheet.note("Nu", fractures, "force", "tension, fracture of the net section", _TENSION)
        area, *counts = _effective(member, sheet)
        strength = sheet.note(
            "Nc", member.Fy * area, "force", "yield strength times what counts of the area", _BUCKLING
        )
        reduced = weakest_reduction(member, strength, sheet)
        buckling = sheet.note("Nb", reduced * strength / GAMMA_M1, "force", "compression, flexural buckling", _BUCKLING)
        return (Resistance(tension_yield, tension_fracture, buckling, *counts),)

    def factor_lines(self) -> tuple[FactorLine, ...]:
        """Partial factors on resistances and loads."""
        ultimate = self.levels[-1]
        dead = f"{self.components.greatest:.2f}, or {self.components.least:.2f} where it relieves"
        return (
            FactorLine("partial factor γM0, tension yield", f"{GAMMA_M0:.2f}", _PARTIAL),
            FactorLine("partial factor γM1, buckling", f"{GAMMA_M1:.2f}", _PARTIAL),
            FactorLine("partial factor γM2, tension fracture", f"{GAMMA_M2:.2f}", _PARTIAL),
            FactorLine("imperfection factors α", ", ".join(f"{name} {a}" for name, a in IMPERFECTION.items()), _CURVES),
            FactorLine("dead load factor, all parts", dead, _LOADS),
            FactorLine("live load factor", f"{ultimate.live:.2f}", _LOADS),
            *(FactorLine(f"live load factor, {kind}", f"{factor:.2f}", _LOADS) for kind, factor in ultimate.of_kind),
            FactorLine("condition and system factor", "none", "EN 1990 has none"),
        )


def _effective(member: Member, sheet: Sheet) -> tuple[Number, ...]:
    """Effective area, the part of the area that this is, and what `Resistance` says of slender plates and tubes."""
    plates, area = member.plates, member.area
    if isinstance(plates, WrittenPlates):
        thin = thin_of_one(EUROPEAN, member, plates, member.Fy.value)
        if thin is None:
            return (area,)
        effective = area_of_one(EUROPEAN.noted(member, sheet), member, plates, thin, member.Fy, sheet)
        return effective, effective.value / area.value
    found = area_of_many(EUROPEAN, member, plates, member.Fy) if plates else None
    if found is None:
        return (area,)
    share = np.divide(found.area, area, out=np.ones_like(area), where=area > 0)
    return found.area, share, found.slender, found.uncovered


EUROCODE: Final = EurocodeRating()
