"""Tables of the footbridge as built and of how it is rated.

Keys are the names that the site itself uses, within the bridge, so that the foreign keys say what a
site file says: a bar runs between joints of its own truss. ``ordinal`` keeps the order of the file. A
quantity is two columns: ``_text`` as typed, and ``_si`` in SI base units. Columns are named after the
fields of `models.bridge`, which is how `inspector.store.codec` finds them.
"""

from __future__ import annotations

from sqlalchemy import ForeignKey, ForeignKeyConstraint
from sqlalchemy.orm import Mapped, mapped_column

from inspector.store.base import Base, BridgeKey, Document, Key, Number, Place


def within(table: str, *columns: str, key: str = "name", last: bool = False) -> ForeignKeyConstraint:
    """A foreign key that stays within the bridge; the last of ``columns`` names a row of ``table``.

    With ``last`` it is looked at when all rows of a transaction are there, for a row that may name a later one.
    """
    owners = ["bridge_id", *columns[:-1]]
    return ForeignKeyConstraint(
        ["bridge_id", *columns],
        [*(f"{table}.{owner}" for owner in owners), f"{table}.{key}"],
        deferrable=True if last else None,
        initially="DEFERRED" if last else None,
    )


class BridgeRow(Base):
    """A footbridge; what it is made of stands in the tables below."""

    __tablename__ = "bridge"

    id: Mapped[Key]
    ordinal: Mapped[int] = mapped_column(unique=True)
    name: Mapped[str]
    reference: Mapped[str | None]
    locality: Mapped[str | None]
    built: Mapped[int | None]
    units: Mapped[str | None]
    notes: Mapped[str | None]
    owner: Mapped[Document]
    half_through: Mapped[Document]
    instruments: Mapped[Document]
    overrides: Mapped[Document]
    recommendations: Mapped[Document]
    written: Mapped[Document]
    has_visits: Mapped[bool]


class MaterialRow(Base):
    """A metal."""

    __tablename__ = "material"

    bridge_id: Mapped[BridgeKey]
    name: Mapped[Key]
    ordinal: Mapped[int]
    kind: Mapped[str]
    E_text: Mapped[str]
    E_si: Mapped[float]
    density_text: Mapped[str]
    density_si: Mapped[float]
    Fy_text: Mapped[str | None]
    Fy_si: Mapped[float | None]
    Fu_text: Mapped[str | None]
    Fu_si: Mapped[float | None]


class SectionRow(Base):
    """A section; its overall dimensions are rows of their own."""

    __tablename__ = "section"

    bridge_id: Mapped[BridgeKey]
    name: Mapped[Key]
    ordinal: Mapped[int]
    shape: Mapped[str]
    formed: Mapped[str | None]
    rolled: Mapped[bool | None]
    area_text: Mapped[str | None]
    area_si: Mapped[float | None]
    inertia_horizontal_text: Mapped[str | None]
    inertia_horizontal_si: Mapped[float | None]
    inertia_vertical_text: Mapped[str | None]
    inertia_vertical_si: Mapped[float | None]
    least_radius_text: Mapped[str | None]
    least_radius_si: Mapped[float | None]


class DimensionRow(Base):
    """One key of a section. ``form`` tells a single quantity from a list and from named rectangles."""

    __tablename__ = "section_dimension"
    __table_args__ = (within("section", "section"),)

    bridge_id: Mapped[Key]
    section: Mapped[Key]
    key: Mapped[Key]
    ordinal: Mapped[int]
    form: Mapped[str]
    value_text: Mapped[str | None]
    value_si: Mapped[float | None]


class DimensionItemRow(Base):
    """One quantity of a list, as of the legs of an angle."""

    __tablename__ = "section_dimension_item"
    __table_args__ = (within("section_dimension", "section", "key", key="key"),)

    bridge_id: Mapped[Key]
    section: Mapped[Key]
    key: Mapped[Key]
    ordinal: Mapped[Place]
    value_text: Mapped[str]
    value_si: Mapped[float]


class RectangleRow(Base):
    """One plate of a built-up section."""

    __tablename__ = "section_rectangle"
    __table_args__ = (within("section_dimension", "section", "key", key="key"),)

    bridge_id: Mapped[Key]
    section: Mapped[Key]
    key: Mapped[Key]
    name: Mapped[Key]
    ordinal: Mapped[int]
    width_text: Mapped[str]
    width_si: Mapped[float]
    height_text: Mapped[str]
    height_si: Mapped[float]
    x_text: Mapped[str]
    x_si: Mapped[float]
    y_text: Mapped[str]
    y_si: Mapped[float]


class TrussRow(Base):
    """A plane truss. One that copies another has joints and bars of its own all the same."""

    __tablename__ = "truss"
    __table_args__ = (within("truss", "same_as", last=True),)

    bridge_id: Mapped[BridgeKey]
    name: Mapped[Key]
    ordinal: Mapped[int]
    top_chord: Mapped[str]
    same_as: Mapped[str | None]


class JointRow(Base):
    """A joint; its ordinal numbers the equations."""

    __tablename__ = "joint"
    __table_args__ = (within("truss", "truss"),)

    bridge_id: Mapped[Key]
    truss: Mapped[Key]
    name: Mapped[Key]
    ordinal: Mapped[int]
    x_text: Mapped[str]
    x_si: Mapped[float]
    y_text: Mapped[str]
    y_si: Mapped[float]


class SupportRow(Base):
    """A pin or a roller under a joint."""

    __tablename__ = "support"
    __table_args__ = (within("joint", "truss", "joint"),)

    bridge_id: Mapped[Key]
    truss: Mapped[Key]
    joint: Mapped[Key]
    ordinal: Mapped[int]
    kind: Mapped[str]


class BarRow(Base):
    """A straight bar between two joints of its truss."""

    __tablename__ = "bar"
    __table_args__ = (
        within("truss", "truss"),
        within("joint", "truss", "start"),
        within("joint", "truss", "end"),
        within("section", "section"),
        within("material", "material"),
    )

    bridge_id: Mapped[Key]
    truss: Mapped[Key]
    id: Mapped[Key]
    ordinal: Mapped[int]
    start: Mapped[str]
    end: Mapped[str]
    section: Mapped[str]
    material: Mapped[str]
    role: Mapped[str]
    k_in_plane: Mapped[Number | None]
    k_out_of_plane: Mapped[Number | None]
    unbraced_out_of_plane_text: Mapped[str | None]
    unbraced_out_of_plane_si: Mapped[float | None]
    ends: Mapped[str | None]
    net_area: Mapped[Number | None]
    shear_lag: Mapped[Number | None]
    connected: Mapped[str | None]
    turned: Mapped[int | None]
    tension_only: Mapped[bool | None]
    system: Mapped[str | None]
    system_reason: Mapped[str | None]
    stitch_spacing_text: Mapped[str | None]
    stitch_spacing_si: Mapped[float | None]


class DeckJointRow(Base):
    """A joint that the floor rests on, from one end to the other."""

    __tablename__ = "deck_joint"
    __table_args__ = (within("joint", "truss", "joint"),)

    bridge_id: Mapped[Key]
    truss: Mapped[Key]
    ordinal: Mapped[Place]
    joint: Mapped[str]


class DeckRow(Base):
    """The floor. ``by_truss`` names what is given for each truss by name (`DeckShareRow`)."""

    __tablename__ = "deck"

    bridge_id: Mapped[BridgeKey]
    width_text: Mapped[str]
    width_si: Mapped[float]
    dead_text: Mapped[str]
    dead_si: Mapped[float]
    dead_width_text: Mapped[str | None]
    dead_width_si: Mapped[float | None]
    truss_spacing_text: Mapped[str | None]
    truss_spacing_si: Mapped[float | None]
    wearing_text: Mapped[str | None]
    wearing_si: Mapped[float | None]
    edge_text: Mapped[str | None]
    edge_si: Mapped[float | None]
    rests_on: Mapped[str | None]
    by_truss: Mapped[Document]


class DeckShareRow(Base):
    """The offset of the deck towards one truss, or the edge load on it: ``what`` is the deck's field."""

    __tablename__ = "deck_share"
    __table_args__ = (ForeignKeyConstraint(["bridge_id"], ["deck.bridge_id"]), within("truss", "truss"))

    bridge_id: Mapped[Key]
    what: Mapped[Key]
    truss: Mapped[Key]
    ordinal: Mapped[int]
    value_text: Mapped[str]
    value_si: Mapped[float]


class RulesRow(Base):
    """How the owner wants the bridge rated."""

    __tablename__ = "rating_rules"

    bridge_id: Mapped[BridgeKey]
    basis: Mapped[str]
    system: Mapped[str | None]
    system_reason: Mapped[str | None]
    connection_allowance: Mapped[Number | None]
    unseen: Mapped[Document]
    imposed: Mapped[Document]


class LiveLoadRow(Base):
    """A live load. ``has_axles`` and ``has_companions`` tell an empty list from none."""

    __tablename__ = "live_load"

    bridge_id: Mapped[str] = mapped_column(ForeignKey("rating_rules.bridge_id"), primary_key=True)
    name: Mapped[Key]
    ordinal: Mapped[int]
    kind: Mapped[str]
    pressure_text: Mapped[str | None]
    pressure_si: Mapped[float | None]
    rule: Mapped[str | None]
    track_text: Mapped[str | None]
    track_si: Mapped[float | None]
    vehicle: Mapped[str | None]
    force_text: Mapped[str | None]
    force_si: Mapped[float | None]
    has_axles: Mapped[bool]
    has_companions: Mapped[bool]


class AxleRow(Base):
    """One axle of a vehicle."""

    __tablename__ = "axle"
    __table_args__ = (within("live_load", "live_load"),)

    bridge_id: Mapped[Key]
    live_load: Mapped[Key]
    ordinal: Mapped[Place]
    position_text: Mapped[str]
    position_si: Mapped[float]
    weight_text: Mapped[str]
    weight_si: Mapped[float]


class CompanionRow(Base):
    """Another live load, ``load``, that acts with ``live_load``, times a factor."""

    __tablename__ = "companion"
    __table_args__ = (within("live_load", "live_load"), within("live_load", "load"))

    bridge_id: Mapped[Key]
    live_load: Mapped[Key]
    ordinal: Mapped[Place]
    load: Mapped[str]
    factor: Mapped[Number]
