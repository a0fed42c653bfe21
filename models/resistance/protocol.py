"""What a rating basis is: factors, levels, and what a bar resists.

One module a basis. A basis is handed numbers (areas, inertias, lengths, strengths) and hands numbers
back; it knows nothing of trusses, plates or journals.
"""

from __future__ import annotations

from collections.abc import Collection
from dataclasses import dataclass
from typing import Protocol

import numpy as np
from numpy.typing import NDArray

from models.calculation import Number, Sheet, Traced, least
from models.section import Plates, WrittenPlates


@dataclass(frozen=True, eq=False)
class Member:
    """All that decides what a bar resists; arrays (n,) for many bars, or numbers of a hand check.

    Parameters
    ----------
    E, Fy, Fu : elastic modulus, yield and tensile strength, Pa.
    area : least remaining, m^2.
    inertia_horizontal, inertia_vertical, inertia_product : remaining, about the horizontal axis (which resists
        in-plane buckling) and the vertical axis, m^4.
    effective_length_in_plane, effective_length_out_of_plane : K times length, m.
    net_area, shear_lag : fractions of the area that count in fracture.
    curves : names of the buckling curves of EN 1993-1-1 in and out of plane: two, or an array (2, n).
    plates : what decides whether plates buckle on their own; None where none can.
    """

    E: Number
    Fy: Number
    Fu: Number
    area: Number
    inertia_horizontal: Number
    inertia_vertical: Number
    inertia_product: Number
    effective_length_in_plane: Number
    effective_length_out_of_plane: Number
    net_area: Number
    shear_lag: Number
    curves: tuple[str, str] | NDArray[np.str_] = ("d", "d")
    plates: Plates | WrittenPlates | None = None


@dataclass(frozen=True, eq=False)
class Resistance:
    """Factored resistances of a bar, N, all positive; condition and system factors are not in them.

    Parameters
    ----------
    counted : part of the area that counts in compression; below 1 where a plate is slender.
    slender : (n, Q) which free parts of plates lose breadth in compression, None where none does.
    uncovered : (n,) which members are round tubes beyond the basis's rule for them, None where none is. Both are
        of arrays alone.
    """

    tension_yield: Number
    tension_fracture: Number
    flexural_buckling: Number
    counted: Number = 1.0
    slender: NDArray[np.bool_] | None = None
    uncovered: NDArray[np.bool_] | None = None

    @property
    def tension(self) -> Number:
        """The lesser of yield and fracture, N."""
        return least(self.tension_yield, self.tension_fracture)

    @property
    def tension_check(self) -> Number:
        """``tension yield`` or ``tension fracture``: which is lesser; an array of texts for arrays."""
        if isinstance(self.tension_yield, Traced) or isinstance(self.tension_fracture, Traced):
            fractures = float(self.tension_fracture) < float(self.tension_yield)
            return "tension fracture" if fractures else "tension yield"
        return np.where(self.tension_fracture < self.tension_yield, "tension fracture", "tension yield")

    @property
    def compression(self) -> Number:
        """The least in compression, N."""
        return self.flexural_buckling

    @property
    def compression_check(self) -> str:
        """What limits compression."""
        return "flexural buckling"


@dataclass(frozen=True, slots=True)
class FactorLine:
    """A factor or load with its value as text and the standard and clause that it comes from."""

    what: str
    value: str
    source: str


@dataclass(frozen=True, slots=True)
class Level:
    """A level of rating with its live load factors and where they stand.

    Parameters
    ----------
    live : factor on live loads. of_kind : kinds of load that have another one, with it.
    """

    name: str
    live: float
    source: str = ""
    of_kind: tuple[tuple[str, float], ...] = ()

    def live_factor(self, kinds: Collection[str]) -> float:
        """The factor on a live load of these kinds, the greatest where several act together."""
        own = dict(self.of_kind)
        return max((own.get(kind, self.live) for kind in kinds), default=self.live)


@dataclass(frozen=True, slots=True)
class DeadFactors:
    """Load factors of a part of the dead load: where it adds to the effect, and where it relieves."""

    greatest: float
    least: float
    source: str = ""


class Basis(Protocol):
    """A rating basis.

    ``levels`` end with the upper one. ``components`` and ``wearing`` are the dead load factors of the
    structure's own parts and of the wearing surface.
    """

    @property
    def name(self) -> str:
        """As a site file names it."""

    @property
    def levels(self) -> tuple[Level, ...]:
        """From the lower to the upper."""

    @property
    def components(self) -> DeadFactors:
        """Own weight, deck and what stands on it."""

    @property
    def wearing(self) -> DeadFactors:
        """Wearing surface."""

    def condition_factor(self, state: str | None, measured: bool) -> float | None:
        """The factor for a bar's state; None where the basis has none.

        Parameters
        ----------
        state : ``good``, ``fair``, ``poor``, ``severe``, or None where none is on record.
        measured : whether the section rests on measurement enough to raise the factor.
        """

    def system_factor(self, system: str | None) -> float | None:
        """The factor for how the bar is built and what stands beside it; None where the basis has none.

        Parameters
        ----------
        system : ``welded``, ``riveted``, ``eyebars``, ``redundant``, or None where the site says nothing.
        """

    def combined_factor(self, condition: Number, system: Number) -> Number:
        """Both together, with the basis's bound on their product; asked only of a basis that has them."""

    @property
    def rating_source(self) -> str:
        """Where the rating factor's own equation stands."""

    @property
    def tube_rule(self) -> str:
        """Up to which thinness the basis has a rule for round tubes in compression, and where that stands."""

    @property
    def leaves_out(self) -> tuple[str, ...]:
        """What its standards ask for and no figure on this basis has, a sentence each."""

    def resistances(self, member: Member, sheet: Sheet) -> tuple[Resistance, ...]:
        """What a bar resists at each level; the upper level's own object again where a level has no other.

        The section of a bar that resists least at one level does so at every level.

        Parameters
        ----------
        sheet : every step is written to it, once for all levels that share it.
        """

    def factor_lines(self) -> tuple[FactorLine, ...]:
        """Every factor with its clause, for the summary of a rating."""
