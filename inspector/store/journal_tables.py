"""Tables of what was written down: visits, calls, entries and stored ratings. They only ever grow.

Triggers refuse UPDATE and DELETE, and also an INSERT of a key that is there already: without that,
``INSERT OR REPLACE`` would change a row and no trigger would fire. So the rule holds for whatever
program opens the file, not for this one alone.
"""

from __future__ import annotations

from collections.abc import Iterator
from typing import Final

from sqlalchemy import Connection, ForeignKey, ForeignKeyConstraint, Index, Table, UniqueConstraint, event
from sqlalchemy.orm import Mapped, mapped_column

from inspector.store.base import Base, BridgeKey, Document, Key, Number, Place
from inspector.store.structure_tables import within

GROWS: Final = {"sqlite_with_rowid": False}
"""No hidden row number: the keys below are then the only way to name a row."""


class VisitRow(Base):
    """One day on the bridge. ``has_calls`` tells an empty list of calls from none."""

    __tablename__ = "visit"
    __table_args__ = (UniqueConstraint("bridge_id", "ordinal"), GROWS)

    bridge_id: Mapped[BridgeKey]
    id: Mapped[Key]
    ordinal: Mapped[int]
    date: Mapped[str]
    inspector: Mapped[str | None]
    weather: Mapped[str | None]
    device: Mapped[str | None]
    has_calls: Mapped[bool]
    written: Mapped[Document]


class CallRow(Base):
    """Somebody was told during a visit."""

    __tablename__ = "call"
    __table_args__ = (within("visit", "visit_id", key="id"), GROWS)

    bridge_id: Mapped[Key]
    visit_id: Mapped[Key]
    ordinal: Mapped[Place]
    who: Mapped[str | None]
    when: Mapped[str | None]
    said: Mapped[str | None]
    left: Mapped[str | None]


class EntryRow(Base):
    """One thing recorded about one bar: one row, so that storing it is one short transaction.

    ``device`` and ``sequence`` order the entries of a device within a visit. Equal sequences may stand
    in a file written by hand, so they are no key; ``ordinal`` is the order of arrival.
    """

    __tablename__ = "entry"
    __table_args__ = (
        within("visit", "visit_id", key="id"),
        ForeignKeyConstraint(["bridge_id", "truss", "bar"], ["bar.bridge_id", "bar.truss", "bar.id"]),
        UniqueConstraint("bridge_id", "visit_id", "ordinal"),
        Index(None, "bridge_id", "visit_id", "device", "sequence"),
        GROWS,
    )

    bridge_id: Mapped[Key]
    id: Mapped[Key]
    visit_id: Mapped[str]
    ordinal: Mapped[int]
    truss: Mapped[str]
    bar: Mapped[str]
    device: Mapped[str]
    sequence: Mapped[int]
    at: Mapped[str | None]
    seen: Mapped[str | None]
    reason: Mapped[str | None]
    state: Mapped[str | None]
    readings: Mapped[Document]
    estimated_loss: Mapped[Number | None]
    extent_text: Mapped[str | None]
    extent_si: Mapped[float | None]
    station: Mapped[Number | None]
    bow: Mapped[Document]
    crack: Mapped[Document]
    severed: Mapped[bool | None]
    slack: Mapped[bool | None]
    replaced: Mapped[Document]
    look_unchanged: Mapped[bool | None]
    note: Mapped[str | None]
    photos: Mapped[Document]
    chooses: Mapped[str | None]
    retracts: Mapped[str | None]
    written: Mapped[Document]


class RatingRow(Base):
    """A rating as it was given out: the result document, and what it was made from."""

    __tablename__ = "rating"
    __table_args__ = (GROWS,)

    bridge_id: Mapped[str] = mapped_column(ForeignKey("bridge.id"), primary_key=True)
    ordinal: Mapped[Place]
    fingerprint: Mapped[str]
    program: Mapped[str]
    made_from: Mapped[Document]
    document: Mapped[Document]


APPEND_ONLY: Final[tuple[Table, ...]] = tuple(
    Base.metadata.tables[row.__tablename__] for row in (VisitRow, CallRow, EntryRow, RatingRow)
)


def triggers(table: Table) -> Iterator[str]:
    """The SQL of the triggers that let a table only grow."""
    name = table.name
    for verb in ("UPDATE", "DELETE"):
        refusal = f"SELECT RAISE(ABORT, 'a stored {name} is never changed or removed');"
        yield f"CREATE TRIGGER {name}_no_{verb.lower()} BEFORE {verb} ON {name} BEGIN {refusal} END"
    uniques = [each for each in table.constraints if isinstance(each, UniqueConstraint)]
    for number, key in enumerate([table.primary_key, *uniques], start=1):
        same = " AND ".join(f"{column} = NEW.{column}" for column in key.columns.keys())  # noqa: SIM118 (not a dict)
        there = f"EXISTS (SELECT 1 FROM {name} WHERE {same})"  # noqa: S608 (names of our own tables)
        refusal = f"SELECT RAISE(ABORT, 'this {name} is stored already');"
        yield f"CREATE TRIGGER {name}_once_{number} BEFORE INSERT ON {name} WHEN {there} BEGIN {refusal} END"


def _let_grow(table: Table, connection: Connection, **_: object) -> None:
    for trigger in triggers(table):
        connection.exec_driver_sql(trigger)


for _table in APPEND_ONLY:
    event.listen(_table, "after_create", _let_grow)
