"""The footbridge as built: frozen values, each dimension with its text beside its SI number.

``None`` means that the site does not say; the default that then holds is applied, and named as an
assumption, where it is used (`models.material`, `models.rating.prepare`), so that a site is written
back as it was read.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from functools import cached_property

from models.quantity import Quantity


@dataclass(frozen=True, slots=True)
class Material:
    """A metal. ``kind`` is ``structural steel``, ``wrought iron`` or ``stainless steel``."""

    name: str
    kind: str
    E: Quantity
    density: Quantity
    Fy: Quantity | None = None
    Fu: Quantity | None = None


@dataclass(frozen=True, slots=True)
class Rectangle:
    """One plate of a built-up section, by its size and the place of its centre."""

    width: Quantity
    height: Quantity
    x: Quantity
    y: Quantity


SectionDimension = Quantity | tuple[Quantity, ...] | Mapping[str, Rectangle]


@dataclass(frozen=True)
class Section:
    """A section as built: a shape of the registry in `models.section` with its overall dimensions.

    ``area``, ``inertia_horizontal``, ``inertia_vertical`` and ``least_radius`` are table values; where
    given they rule for the section as built.
    """

    name: str
    shape: str
    dimensions: Mapping[str, SectionDimension]
    formed: str | None = None
    rolled: bool | None = None
    area: Quantity | None = None
    inertia_horizontal: Quantity | None = None
    inertia_vertical: Quantity | None = None
    least_radius: Quantity | None = None


@dataclass(frozen=True, slots=True)
class Bar:
    """A straight bar between two joints, ``start`` and ``end`` (`from` and `to` in a site file)."""

    id: str
    start: str
    end: str
    section: str
    material: str
    role: str
    k_in_plane: float | None = None
    k_out_of_plane: float | None = None
    unbraced_out_of_plane: Quantity | None = None
    ends: str | None = None
    net_area: float | None = None
    shear_lag: float | None = None
    connected: str | None = None
    turned: int | None = None
    tension_only: bool | None = None
    system: str | None = None
    system_reason: str | None = None
    stitch_spacing: Quantity | None = None


@dataclass(frozen=True)
class Truss:
    """One plane truss. ``joints`` keep the order of the file; that order numbers the equations.

    Parameters
    ----------
    top_chord : ``braced overhead``, ``at deck`` or ``half through``.
    joints : name -> (x along the bridge, y up).
    supports : joint -> ``pin`` or ``roller``.
    deck_joints : from one end to the other, x strictly increasing.
    same_as : the name of the truss that this one copies; the other fields then hold that truss's values.
    """

    name: str
    top_chord: str
    joints: Mapping[str, tuple[Quantity, Quantity]]
    supports: Mapping[str, str]
    bars: tuple[Bar, ...]
    deck_joints: tuple[str, ...]
    same_as: str | None = None

    @cached_property
    def bar(self) -> Mapping[str, Bar]:
        """The bars by their id."""
        return {bar.id: bar for bar in self.bars}


@dataclass(frozen=True)
class Deck:
    """The floor. ``edge`` is a line load on each truss, or one for each truss by name."""

    width: Quantity
    dead: Quantity
    dead_width: Quantity | None = None
    truss_spacing: Quantity | None = None
    offset: Mapping[str, Quantity] | None = None
    wearing: Quantity | None = None
    edge: Quantity | Mapping[str, Quantity] | None = None
    rests_on: str | None = None


@dataclass(frozen=True, slots=True)
class FloorBeam:
    """The cross-beam that, with the verticals, holds a half-through top chord upright."""

    section: str
    material: str
    span: Quantity


@dataclass(frozen=True, slots=True)
class HalfThrough:
    """What holds the top chords of a half-through bridge."""

    floor_beam: FloorBeam | None = None
    end_spring: Quantity | None = None


@dataclass(frozen=True, slots=True)
class Companion:
    """Another live load that acts with a live load, times a factor."""

    load: str
    factor: float


@dataclass(frozen=True, slots=True)
class Axle:
    """One axle of a vehicle: how far behind the first, and what it carries."""

    position: Quantity
    weight: Quantity


@dataclass(frozen=True, slots=True)
class LiveLoad:
    """A live load; which of the optional fields hold is decided by ``kind`` (`models.loading`).

    ``companions`` is `with` in a site file.
    """

    name: str
    kind: str
    pressure: Quantity | None = None
    rule: str | None = None
    axles: tuple[Axle, ...] | None = None
    track: Quantity | None = None
    vehicle: str | None = None
    force: Quantity | None = None
    companions: tuple[Companion, ...] | None = None


@dataclass(frozen=True, slots=True)
class Imposed:
    """A settlement, a change of temperature or a bar made short."""

    kind: str
    truss: str | None = None
    joint: str | None = None
    down: Quantity | None = None
    change: float | None = None
    expansion: float | None = None
    bar: str | None = None
    short: Quantity | None = None


@dataclass(frozen=True)
class RatingRules:
    """How the owner wants the bridge rated.

    ``unseen`` is ``last``, or the fraction of loss that a bar not seen is rated with.
    """

    basis: str
    live: tuple[LiveLoad, ...]
    system: str | None = None
    system_reason: str | None = None
    connection_allowance: float | None = None
    unseen: str | float | None = None
    imposed: tuple[Imposed, ...] | None = None


@dataclass(frozen=True, slots=True)
class Contact:
    """Somebody to call."""

    who: str
    phone: str | None = None


@dataclass(frozen=True, slots=True)
class Owner:
    """Who owns the bridge, whom to call, and the rating factor below which to call."""

    name: str | None = None
    call: tuple[Contact, ...] | None = None
    act_below: float | None = None


@dataclass(frozen=True, slots=True)
class Instrument:
    """A gauge with the error of its readings."""

    error: Quantity | None = None


@dataclass(frozen=True, slots=True)
class Override:
    """A value changed by hand, with who, why and when. ``value`` and ``was`` keep their JSON form."""

    truss: str | None = None
    bar: str | None = None
    what: str | None = None
    value: object = None
    was: object = None
    who: str | None = None
    why: str | None = None
    date: str | None = None


@dataclass(frozen=True, slots=True)
class Recommendation:
    """Something that somebody should do, and whether it was done."""

    id: str | None = None
    text: str | None = None
    priority: str | None = None
    raised: str | None = None
    told: str | None = None
    done: str | None = None
    proof: str | None = None


@dataclass(frozen=True)
class Footbridge:
    """A footbridge as built, and how it is to be rated.

    Parameters
    ----------
    id : identity of the bridge (a UUID unless the site gives its own).
    units : ``SI`` or ``US``, for display only; None means SI.
    written : which of the identity keys (``id``) the site itself gave.
    """

    id: str
    name: str
    materials: Mapping[str, Material]
    sections: Mapping[str, Section]
    trusses: Mapping[str, Truss]
    deck: Deck
    rating: RatingRules
    reference: str | None = None
    locality: str | None = None
    built: int | None = None
    units: str | None = None
    notes: str | None = None
    owner: Owner | None = None
    half_through: HalfThrough | None = None
    instruments: Mapping[str, Instrument] | None = None
    overrides: tuple[Override, ...] | None = None
    recommendations: tuple[Recommendation, ...] | None = None
    written: frozenset[str] = field(default=frozenset())
