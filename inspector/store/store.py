"""The store: frozen values in, frozen values out. What a method returned after is on the disk."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass, fields, replace
from pathlib import Path
from types import TracebackType
from typing import Any, Self

from sqlalchemy import Engine, func, insert, select
from sqlalchemy.orm import Session

from inspector.store import journal as journals
from inspector.store import structure
from inspector.store.codec import spread
from inspector.store.connection import explained, make_engine, writing
from inspector.store.errors import StoreError
from inspector.store.journal_tables import RatingRow, VisitRow
from inspector.store.schema import back_up, settle
from inspector.store.structure_tables import BridgeRow
from models.bridge import Footbridge
from models.journal import Entry, Journal, Visit


@dataclass(frozen=True, slots=True)
class BridgeSummary:
    """A bridge as a list shows it. ``last_visit`` is the latest ISO date, or None."""

    id: str
    name: str
    reference: str | None
    last_visit: str | None


@dataclass(frozen=True, slots=True)
class Added:
    """What was new in something that was saved."""

    bridge: bool
    visits: int
    entries: int


@dataclass(frozen=True, slots=True)
class StoredRating:
    """A rating as it was given out.

    Parameters
    ----------
    fingerprint, program : of the document, ``inputs sha256`` and ``program``.
    made_from : whatever else tells how to make it again, as plain values.
    document : the result document.
    """

    bridge_id: str
    fingerprint: str
    program: str
    made_from: Mapping[str, object]
    document: Mapping[str, object]


def open_store(path: Path) -> Store:
    """Open the store in this file, make it if there is none, bring it up to date if it is behind.

    Raises
    ------
    StoreError
        If the file cannot be written, is not a store, is damaged, or is a newer program's.
    """
    engine = make_engine(path)
    try:
        with explained(path):
            settle(path, engine)
            with writing(engine).begin():
                pass  # refuses a file that cannot be written now, not at the first entry
    except StoreError:
        engine.dispose()
        raise
    return Store(path, engine)


class Store:
    """All bridges with their journals and ratings. Close it, or use it in a ``with``.

    Every method is one transaction with a session of its own, and may be called from any thread.
    """

    def __init__(self, path: Path, engine: Engine) -> None:
        self.path = path
        self._engine = engine
        self._writer = writing(engine)

    def __enter__(self) -> Self:
        return self

    def __exit__(
        self, kind: type[BaseException] | None, error: BaseException | None, trace: TracebackType | None
    ) -> None:
        self.close()

    def close(self) -> None:
        """Close all connections."""
        self._engine.dispose()

    def back_up(self, copy: Path) -> None:
        """Copy the store to another file while it is open."""
        with explained(copy):
            back_up(self.path, copy)

    def bridges(self) -> tuple[BridgeSummary, ...]:
        """All bridges, in the order in which they were first saved."""
        last = select(func.max(VisitRow.date)).where(VisitRow.bridge_id == BridgeRow.id).scalar_subquery()
        query = select(BridgeRow.id, BridgeRow.name, BridgeRow.reference, last).order_by(BridgeRow.ordinal)
        with self._read() as session:
            return tuple(BridgeSummary(*row) for row in session.execute(query))

    def save_bridge(self, bridge: Footbridge, journal: Journal) -> Added:
        """Save a bridge with its journal; of one that is stored already, the visits and entries that are new.

        Reading a file twice stores nothing new, and two tablets' files of one bridge become one journal.

        Raises
        ------
        StoreError
            If another structure, or another wording of a visit or an entry, is stored under the same id.
        """
        with self._write() as session:
            stored = structure.load(session, bridge.id)
            if stored is None:
                structure.add(session, bridge, has_visits=journal.present)
            else:
                _same_structure(stored, bridge)
            visits, entries = journals.add_journal(session, bridge.id, journal)
        return Added(bridge=stored is None, visits=visits, entries=entries)

    def load(self, bridge_id: str) -> tuple[Footbridge, Journal]:
        """The bridge and its journal, equal to what was saved.

        Raises
        ------
        StoreError
            If there is no bridge of this id.
        """
        with self._read() as session:
            bridge = structure.load(session, bridge_id)
            if bridge is None:
                raise StoreError(f"{self.path} holds no bridge with the id {bridge_id}.")
            return bridge, self._journal(session, bridge_id)

    def journal(self, bridge_id: str) -> Journal:
        """The journal alone."""
        with self._read() as session:
            return self._journal(session, bridge_id)

    def entries_of(self, bridge_id: str, truss: str, bar: str) -> tuple[Entry, ...]:
        """All entries about one bar, in the order in which they were stored."""
        with self._read() as session:
            return journals.entries_of(session, bridge_id, truss, bar)

    def open_visit(self, bridge_id: str, visit: Visit) -> Visit:
        """Store a new visit, with the entries that it has already."""
        with self._write() as session:
            journals.add_visit(session, bridge_id, visit)
            journals.add_entries(session, bridge_id, visit.id, list(visit.entries))
        return visit

    def next_sequence(self, bridge_id: str, visit_id: str, device: str) -> int:
        """The sequence that the next entry of this device in this visit will have."""
        with self._read() as session:
            return journals.next_sequence(session, bridge_id, visit_id, device)

    def append(self, bridge_id: str, visit_id: str, entry: Entry) -> Entry:
        """Store one entry with its device's next sequence, and return it so.

        The sequence is given within the transaction: whatever else writes at the same time, no two
        entries of a device get the same one. When this returns, the entry is on the disk.
        """
        with self._write() as session:
            sequence = journals.next_sequence(session, bridge_id, visit_id, entry.device)
            stored = replace(entry, sequence=sequence)
            journals.add_entries(session, bridge_id, visit_id, [stored])
        return stored

    def keep_rating(
        self, bridge_id: str, document: Mapping[str, Any], made_from: Mapping[str, object] | None = None
    ) -> StoredRating:
        """Keep a result document. The same document of the same bridge is kept once."""
        rating = StoredRating(
            bridge_id, str(document["inputs sha256"]), str(document["program"]), dict(made_from or {}), dict(document)
        )
        with self._write() as session:
            stored = self._ratings(session, bridge_id)
            if rating not in stored:
                session.execute(insert(RatingRow), [spread(rating) | {"ordinal": len(stored)}])
        return rating

    def ratings(self, bridge_id: str) -> tuple[StoredRating, ...]:
        """The ratings that were kept, oldest first."""
        with self._read() as session:
            return self._ratings(session, bridge_id)

    def _ratings(self, session: Session, bridge_id: str) -> tuple[StoredRating, ...]:
        query = select(RatingRow).where(RatingRow.bridge_id == bridge_id).order_by(RatingRow.ordinal)
        return tuple(
            StoredRating(row.bridge_id, row.fingerprint, row.program, row.made_from, row.document)
            for row in session.scalars(query)
        )

    def _journal(self, session: Session, bridge_id: str) -> Journal:
        visits = journals.load(session, bridge_id)
        present = session.scalar(select(BridgeRow.has_visits).where(BridgeRow.id == bridge_id))
        return Journal(visits, present=bool(visits) or bool(present))

    @contextmanager
    def _read(self) -> Iterator[Session]:
        with explained(self.path), Session(self._engine) as session, session.begin():
            yield session

    @contextmanager
    def _write(self) -> Iterator[Session]:
        with explained(self.path), Session(self._writer) as session, session.begin():
            yield session


def _same_structure(stored: Footbridge, bridge: Footbridge) -> None:
    """Refuse to change a bridge under the entries and ratings that were made on it."""
    differing = [
        field.name.replace("_", " ")
        for field in fields(Footbridge)
        if field.name != "written" and getattr(stored, field.name) != getattr(bridge, field.name)
    ]
    if differing:
        raise StoreError(
            f"{stored.name} is stored already, with another {', '.join(differing)}. Its entries and ratings were made "
            "on the stored one, so nothing was stored. To keep both, give the changed site an `id` of its own."
        )
