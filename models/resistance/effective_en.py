"""Slender plates by EN 1993-1-5 4.4: effective widths at the yield strength. All from memory.

References
----------
EN 1993-1-5 4.4(2) and Tables 4.1 and 4.2, even compression; EN 1993-1-1, Table 5.2, sheet 3 for round tubes. For steel
with another modulus than 210 GPa epsilon follows EN 1993-1-4, Table 5.2.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array, Number, Sheet, Traced, choose, least, root
from models.resistance.plate_rule import named_breadths, thinness
from models.resistance.protocol import Member
from models.section import Plates, Ring, Strip

WIDTHS: Final = "EN 1993-1-5, 4.4(2) (from memory)"
_EPSILON: Final = "EN 1993-1-1, Table 5.2; EN 1993-1-4, Table 5.2 (from memory)"
_TUBES: Final = "EN 1993-1-1, Table 5.2, sheet 3 (from memory)"
ROUND_LIMIT: Final = 90.0
"""Outside diameter over thickness of round tubes of class 3, over epsilon squared (the same table)."""
TUBE_RULE: Final = "90 ε², class 4, for which EN 1993-1-6 stands, which is not computed"


@dataclass(frozen=True, slots=True)
class Edge:
    """A row of the rule: buckling factor, the number taken off, and the slenderness up to which all counts."""

    buckling: float
    less: float
    limit: float


INTERNAL: Final = Edge(4.0, 0.22, 0.673)
"""Held along both edges, even compression: 0.055 (3 + psi) with psi = 1."""
OUTSTAND: Final = Edge(0.43, 0.188, 0.748)
"""Held along one edge."""


def epsilon(E: Number, Fy: Number) -> Number:
    """The square root of 235 MPa over Fy, for another modulus than 210 GPa times E over that."""
    return root(_stress(235e6, "235 MPa", Fy) / Fy * (E / _stress(210e9, "210 GPa", E)))


def _stress(value: float, text: str, like: Number) -> Number:
    """A stress of the standard, with its unit where a hand check prints it."""
    return Traced(value, "symbol", symbol=text, kind="stress") if isinstance(like, Traced) else value


def effective_width(strip: Strip, eps: Number, sheet: Sheet) -> Number:
    """The breadth of a part that counts, m: rho times it, never more than all of it."""
    number, plates = strip.number, strip.plates
    buckling, less, limit = (_by_edge(strip, name) for name in ("buckling", "less", "limit"))
    slenderness = sheet.note(
        f"λp{number}",
        strip.free / strip.thickness / (28.4 * eps * root(buckling)),
        "ratio",
        f"{plates}: slenderness of the plate",
        WIDTHS,
    )
    reduced = least((slenderness - less) / slenderness**2, 1.0)
    rho = choose(slenderness, "<=", limit, 1.0, reduced)
    rho = sheet.note(f"ρ{number}", rho, "ratio", f"{plates}: reduction factor", WIDTHS)
    return sheet.note(f"be{number}", rho * strip.breadth, "size", f"{plates}: effective breadth", WIDTHS)


def _by_edge(strip: Strip, name: str) -> Number:
    both, one = getattr(INTERNAL, name), getattr(OUTSTAND, name)
    return np.where(strip.held, both, one) if isinstance(strip.held, np.ndarray) else both if strip.held else one


@dataclass(frozen=True, eq=False)
class European:
    """The rule, see `models.resistance.plate_rule.PlateRule`; whatever the stress, it takes Fy.

    Parameters
    ----------
    eps : epsilon where it has a line of its own already, as in a hand check; None to work it out.
    """

    eps: Number | None = None

    @property
    def breadths(self) -> str:
        """See `PlateRule`."""
        return WIDTHS

    @property
    def round_tubes(self) -> str:
        """See `PlateRule`."""
        return _TUBES

    def noted(self, member: Member, sheet: Sheet) -> European:
        """The rule with a line for epsilon."""
        title = "root of 235 MPa over Fy, times E over 210 GPa"
        return European(sheet.note("ε", epsilon(member.E, member.Fy), "ratio", title, _EPSILON))

    def slender(self, plates: Plates, member: Member, stress: Array) -> NDArray[np.bool_]:
        """See `PlateRule`."""
        sizes, eps = plates.parts.sizes, epsilon(member.E, member.Fy)
        held = sizes[..., 5] > 0
        reach = np.where(held, INTERNAL.limit * INTERNAL.buckling**0.5, OUTSTAND.limit * OUTSTAND.buckling**0.5) * (
            28.4 * np.asarray(eps)[..., None] * plates.thickness
        )
        found: NDArray[np.bool_] = (sizes[..., 0] > reach) & (plates.thickness > 0)
        return found

    def is_slender(self, strip: Strip, E: float, Fy: float, stress: float) -> bool:
        """See `PlateRule`."""
        edge = INTERNAL if strip.held else OUTSTAND
        ratio = float(strip.free / strip.thickness)
        return ratio > float(edge.limit * edge.buckling**0.5 * 28.4 * epsilon(E, Fy))

    def named(self, strip: Strip, sheet: Sheet) -> Strip:
        """See `PlateRule`."""
        return named_breadths(strip, sheet)

    def breadth(self, strip: Strip, E: Number, Fy: Number, stress: Number, sheet: Sheet) -> Number:
        """See `PlateRule`."""
        return effective_width(strip, self._epsilon(E, Fy), sheet)

    def ring_limit(self, E: Number, Fy: Number) -> Number:
        """See `PlateRule`."""
        return ROUND_LIMIT * epsilon(E, Fy) ** 2

    def ring_covered(self, E: Number, Fy: Number) -> Number:
        """See `PlateRule`."""
        return self.ring_limit(E, Fy)

    def ring_share(self, ring: Ring, E: Number, Fy: Number, sheet: Sheet) -> Number:
        """Falls as the tube gets thinner beyond the limit (common practice, no source); a finding says so."""
        ratio = sheet.note(f"λ{ring.number}", thinness(ring), "ratio", "outside diameter over thickness", _TUBES)
        return sheet.note(
            "Ae/A",
            ROUND_LIMIT * self._epsilon(E, Fy) ** 2 / ratio,
            "ratio",
            "part that counts (common practice, no source)",
            _TUBES,
        )

    def _epsilon(self, E: Number, Fy: Number) -> Number:
        return epsilon(E, Fy) if self.eps is None else self.eps


EUROPEAN: Final = European()
