"""What a rating says, as values ready to be shown: one row a bar, one verdict a truss."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from types import MappingProxyType
from typing import Literal, NamedTuple

from models.finding import Finding
from models.resistance.protocol import FactorLine
from models.statics.stability import Verdict


class Effect(NamedTuple):
    """The largest tension and the largest compression (negative) that a load gives, N, unfactored."""

    maximum: float
    minimum: float


class Deflection(NamedTuple):
    """The deck joint that people bring nearest to its limit: how far it goes, and the limit, m."""

    joint: str
    size: float
    limit: float
    load: str


class Resisted(NamedTuple):
    """Factored resistances in both directions, N, condition and system factors not in them."""

    tension: float
    compression: float


class BarRating(NamedTuple):
    """One bar's figures. ``None`` where a figure does not exist.

    A named tuple, as a rating makes one for every bar after every reading.

    Parameters
    ----------
    known : ``measured``, ``partly measured``, ``estimated``, ``assumed`` or ``not seen``.
    area, nominal_area : least remaining, and as built, m^2.
    dead_components, dead_wearing : N, unfactored, tension positive.
    live : by load name, N; None in a mechanism.
    tension, compression : factored resistance at the upper level, N, condition and system factors not in it.
    tension_check, compression_check : what limits each of them.
    rating_factor : by level; a value is None where no live load acts that way.
    check, load, direction : what governs at the upper level; None where nothing does. ``direction`` is
        ``tension`` or ``compression``.
    where : the governing piece of the bar, as stations from its start to its end.
    demand : factored dead plus live effect of the governing direction and load at the upper level, N.
    capacity : resistance times condition and system factor, of the governing direction, N.
    loss_allowance : fraction of every plate's remaining thickness that could still go.
    without_it : ``mechanism``, or the lowest rating factor of the truss's other bars.
    imposed : the sums of what imposed changes pull, and push, N, unfactored; None where nothing is imposed.
    slack : bars of the truss that go slack under what governs this one.
    lower_levels : by level: the resistance at a level below the upper one that has its own.
    """

    truss: str
    bar: str
    role: str
    section: str
    length: float
    state: str | None
    known: str
    area: float
    nominal_area: float
    dead_components: float | None
    dead_wearing: float | None
    live: Mapping[str, Effect] | None
    tension: float
    compression: float
    tension_check: str
    compression_check: str
    condition_factor: float | None
    system_factor: float | None
    rating_factor: Mapping[str, float | None]
    check: str | None
    load: str | None
    direction: Literal["tension", "compression"] | None
    where: tuple[float, float]
    demand: float | None
    capacity: float | None
    loss_allowance: float | None
    without_it: float | Literal["mechanism"] | None
    findings: tuple[Finding, ...] = ()
    lower_levels: Mapping[str, Resisted] = MappingProxyType({})
    imposed: Effect | None = None
    slack: tuple[str, ...] = ()

    @property
    def demand_over_capacity(self) -> float | None:
        """Factored demand over capacity at the upper level."""
        if self.demand is None or not self.capacity:
            return None
        return self.demand / self.capacity

    @property
    def margin(self) -> float | None:
        """Capacity less factored demand at the upper level, N; negative where the demand is larger."""
        if self.demand is None or self.capacity is None:
            return None
        return self.capacity - self.demand


@dataclass(frozen=True, slots=True)
class Reaction:
    """A support's vertical reaction, N, upward positive.

    Parameters
    ----------
    dead : components and wearing, unfactored.
    least : at 0.90 DC + 0.65 DW + the live factor times the live load that lifts most; imposed changes that lift count
        with the factor of components; negative is uplift.
    load : the load that gives the least.
    """

    joint: str
    dead: float
    least: float
    load: str | None


@dataclass(frozen=True)
class TrussRating:
    """One truss: what its geometry says, and its bars.

    Parameters
    ----------
    bars_standing, reaction_components, degree, mechanisms : counts of the truss as it stands, severed
        bars left out; degree is m + r - 2j.
    moving_joints, loose_bars : of a mechanism: the joints that move, and the bars that join moving to
        still parts.
    dead_total : all dead load on this truss, N (components, wearing).
    deflection, frequency : advisory, the latter vertical, of the dead load's mass, Hz; None where there is none.
    """

    name: str
    joints: int
    bars_standing: int
    reaction_components: int
    degree: int
    mechanisms: int
    verdict: Verdict
    moving_joints: tuple[str, ...]
    loose_bars: tuple[str, ...]
    bars: tuple[BarRating, ...]
    reactions: tuple[Reaction, ...]
    dead_total: tuple[float, float]
    deflection: Deflection | None = None
    frequency: float | None = None

    @property
    def carries(self) -> bool:
        """Whether there are forces at all."""
        return self.verdict in ("determinate", "redundant")


@dataclass(frozen=True, slots=True)
class Governing:
    """The lowest rating factor of a structure, and where it stands."""

    rating_factor: Mapping[str, float | None]
    truss: str | None
    bar: str | None
    check: str | None
    load: str | None


@dataclass(frozen=True, slots=True)
class Provenance:
    """What a rating was made from. ``inputs_sha256`` is the hash of the canonical site and visits."""

    inputs_sha256: str
    program: str


@dataclass(frozen=True)
class Rating:
    """The rating of a footbridge on one basis.

    Parameters
    ----------
    levels : of the basis, the upper one last (``inventory``, ``operating``; or ``ultimate`` alone).
    trusses : by name, in the order of the site.
    if_cracked_bars_hold, if_slack_bars_pull : the structure's figures the other way round, where asked.
    loads : dead and live loads and the factors of the basis, each with its source.
    """

    site: str
    basis: str
    levels: tuple[str, ...]
    provenance: Provenance
    structure: Governing
    trusses: Mapping[str, TrussRating]
    assumptions: tuple[str, ...]
    findings: tuple[Finding, ...]
    not_rated: tuple[str, ...]
    loads: tuple[FactorLine, ...]
    if_cracked_bars_hold: Governing | None = None
    if_slack_bars_pull: Governing | None = None

    @property
    def bars(self) -> tuple[BarRating, ...]:
        """All bars of all trusses, in the order of the site."""
        return tuple(bar for truss in self.trusses.values() for bar in truss.bars)

    @property
    def upper_level(self) -> str:
        """The level at which ``check`` and ``load`` govern."""
        return self.levels[-1]
