"""A footbridge into its tables, and out of them as the same value."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import Any, TypeVar

from sqlalchemy import func, insert, select
from sqlalchemy.orm import Session

from inspector.store import structure_tables as tables
from inspector.store.base import Base
from inspector.store.codec import gather, quantity, spread
from models.bridge import (
    Axle,
    Bar,
    Companion,
    Deck,
    Footbridge,
    LiveLoad,
    Material,
    RatingRules,
    Rectangle,
    Section,
    SectionDimension,
    Truss,
)
from models.quantity import Quantity

Row = TypeVar("Row", bound=Base)
Rows = Iterator[tuple[type[Base], dict[str, Any]]]

_BY_TRUSS = ("offset", "edge")


def add(session: Session, bridge: Footbridge, *, has_visits: bool) -> None:
    """Insert a bridge that is not there yet, parents before children."""
    last = session.scalar(select(func.max(tables.BridgeRow.ordinal)))
    written: dict[type[Base], list[dict[str, Any]]] = {}
    for table, row in _rows(bridge):
        written.setdefault(table, []).append(row | {"bridge_id": bridge.id})
    head = spread(bridge, without=("materials", "sections", "trusses", "deck", "rating"))
    head |= {"ordinal": 0 if last is None else last + 1, "has_visits": has_visits}
    session.execute(insert(tables.BridgeRow), [head])
    for table in sorted(written, key=_DEPTH.index):
        session.execute(insert(table), written[table])


_DEPTH: list[type[Base]] = [
    tables.MaterialRow,
    tables.SectionRow,
    tables.DimensionRow,
    tables.DimensionItemRow,
    tables.RectangleRow,
    tables.TrussRow,
    tables.JointRow,
    tables.SupportRow,
    tables.BarRow,
    tables.DeckJointRow,
    tables.DeckRow,
    tables.DeckShareRow,
    tables.RulesRow,
    tables.LiveLoadRow,
    tables.AxleRow,
    tables.CompanionRow,
]


def _rows(bridge: Footbridge) -> Rows:
    for ordinal, material in enumerate(bridge.materials.values()):
        yield tables.MaterialRow, spread(material) | {"ordinal": ordinal}
    for ordinal, section in enumerate(bridge.sections.values()):
        yield tables.SectionRow, spread(section, without=("dimensions",)) | {"ordinal": ordinal}
        yield from _dimension_rows(section)
    for ordinal, truss in enumerate(bridge.trusses.values()):
        yield (
            tables.TrussRow,
            {"name": truss.name, "top_chord": truss.top_chord, "same_as": truss.same_as} | {"ordinal": ordinal},
        )
        yield from _truss_rows(truss)
    yield from _deck_rows(bridge.deck)
    yield tables.RulesRow, spread(bridge.rating, without=("live",))
    for ordinal, load in enumerate(bridge.rating.live):
        yield from _live_rows(load, ordinal)


def _dimension_rows(section: Section) -> Rows:
    for ordinal, (key, value) in enumerate(section.dimensions.items()):
        at = {"section": section.name, "key": key}
        row: dict[str, Any] = at | {"ordinal": ordinal, "value_text": None, "value_si": None}
        if isinstance(value, Quantity):
            yield tables.DimensionRow, row | {"form": "quantity"} | _value(value)
        elif isinstance(value, Mapping):
            yield tables.DimensionRow, row | {"form": "rectangles"}
            for place, (name, rectangle) in enumerate(value.items()):
                yield tables.RectangleRow, at | spread(rectangle) | {"name": name, "ordinal": place}
        else:
            yield tables.DimensionRow, row | {"form": "list"}
            for place, item in enumerate(value):
                yield tables.DimensionItemRow, at | _value(item) | {"ordinal": place}


def _truss_rows(truss: Truss) -> Rows:
    at = {"truss": truss.name}
    for ordinal, (name, (x, y)) in enumerate(truss.joints.items()):
        place = {"x_text": x.text, "x_si": x.si, "y_text": y.text, "y_si": y.si}
        yield tables.JointRow, at | place | {"name": name, "ordinal": ordinal}
    for ordinal, (joint, kind) in enumerate(truss.supports.items()):
        yield tables.SupportRow, at | {"joint": joint, "kind": kind, "ordinal": ordinal}
    for ordinal, bar in enumerate(truss.bars):
        yield tables.BarRow, at | spread(bar) | {"ordinal": ordinal}
    for ordinal, joint in enumerate(truss.deck_joints):
        yield tables.DeckJointRow, at | {"joint": joint, "ordinal": ordinal}


def _deck_rows(deck: Deck) -> Rows:
    shares = {what: value for what in _BY_TRUSS if isinstance(value := getattr(deck, what), Mapping)}
    edge = deck.edge if isinstance(deck.edge, Quantity) else None
    row = spread(deck, without=_BY_TRUSS) | {"by_truss": list(shares)}
    yield tables.DeckRow, row | {"edge_text": edge and edge.text, "edge_si": edge and edge.si}
    for what, share in shares.items():
        for ordinal, (truss, value) in enumerate(share.items()):
            yield tables.DeckShareRow, _value(value) | {"what": what, "truss": truss, "ordinal": ordinal}


def _live_rows(load: LiveLoad, ordinal: int) -> Rows:
    has = {"has_axles": load.axles is not None, "has_companions": load.companions is not None}
    yield tables.LiveLoadRow, spread(load, without=("axles", "companions")) | has | {"ordinal": ordinal}
    at = {"live_load": load.name}
    for place, axle in enumerate(load.axles or ()):
        yield tables.AxleRow, at | spread(axle) | {"ordinal": place}
    for place, companion in enumerate(load.companions or ()):
        yield tables.CompanionRow, at | spread(companion) | {"ordinal": place}


def _value(value: Quantity) -> dict[str, Any]:
    return {"value_text": value.text, "value_si": value.si}


def load(session: Session, bridge_id: str) -> Footbridge | None:
    """The bridge of this id as it was stored, names in the order of its file; None if there is none."""
    row = session.get(tables.BridgeRow, bridge_id)
    if row is None:
        return None
    deck, rules = session.get(tables.DeckRow, bridge_id), session.get(tables.RulesRow, bridge_id)
    found = _Found(session, bridge_id)
    return gather(
        Footbridge,
        row,
        materials={each.name: gather(Material, each) for each in found.all(tables.MaterialRow)},
        sections=found.sections(),
        trusses=found.trusses(),
        deck=gather(Deck, deck, **found.shares(deck)),
        rating=gather(RatingRules, rules, live=found.live_loads()),
    )


class _Found:
    """The rows of one bridge, in order."""

    def __init__(self, session: Session, bridge_id: str) -> None:
        self._session = session
        self._bridge_id = bridge_id

    def all(self, table: type[Row]) -> list[Row]:
        columns = table.__table__.columns
        query = select(table).where(columns["bridge_id"] == self._bridge_id).order_by(columns["ordinal"])
        return list(self._session.scalars(query))

    def sections(self) -> dict[str, Section]:
        dimensions: dict[str, dict[str, SectionDimension]] = {}
        items, rectangles = self.all(tables.DimensionItemRow), self.all(tables.RectangleRow)
        for row in self.all(tables.DimensionRow):
            at = (row.section, row.key)
            value: SectionDimension | None = quantity(row, "value")
            if row.form == "list":
                value = tuple(_quantity(item) for item in items if (item.section, item.key) == at)
            elif row.form == "rectangles":
                mine = (each for each in rectangles if (each.section, each.key) == at)
                value = {each.name: gather(Rectangle, each) for each in mine}
            if value is not None:
                dimensions.setdefault(row.section, {})[row.key] = value
        return {
            row.name: gather(Section, row, dimensions=dimensions.get(row.name, {}))
            for row in self.all(tables.SectionRow)
        }

    def trusses(self) -> dict[str, Truss]:
        joints, supports = self.all(tables.JointRow), self.all(tables.SupportRow)
        bars, deck_joints = self.all(tables.BarRow), self.all(tables.DeckJointRow)
        return {
            row.name: Truss(
                name=row.name,
                top_chord=row.top_chord,
                joints={
                    each.name: (Quantity(each.x_text, each.x_si), Quantity(each.y_text, each.y_si))
                    for each in joints
                    if each.truss == row.name
                },
                supports={each.joint: each.kind for each in supports if each.truss == row.name},
                bars=tuple(gather(Bar, each) for each in bars if each.truss == row.name),
                deck_joints=tuple(each.joint for each in deck_joints if each.truss == row.name),
                same_as=row.same_as,
            )
            for row in self.all(tables.TrussRow)
        }

    def shares(self, deck: tables.DeckRow | None) -> dict[str, Any]:
        rows = self.all(tables.DeckShareRow)
        given: dict[str, Any] = {"offset": None, "edge": quantity(deck, "edge")}
        for what in deck.by_truss if deck else ():
            given[what] = {row.truss: _quantity(row) for row in rows if row.what == what}
        return given

    def live_loads(self) -> tuple[LiveLoad, ...]:
        axles, companions = self.all(tables.AxleRow), self.all(tables.CompanionRow)
        return tuple(
            gather(
                LiveLoad,
                row,
                axles=tuple(gather(Axle, each) for each in axles if each.live_load == row.name)
                if row.has_axles
                else None,
                companions=tuple(gather(Companion, each) for each in companions if each.live_load == row.name)
                if row.has_companions
                else None,
            )
            for row in self.all(tables.LiveLoadRow)
        )


def _quantity(row: tables.DimensionItemRow | tables.DeckShareRow) -> Quantity:
    return Quantity(row.value_text, row.value_si)
