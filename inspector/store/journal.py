"""A journal into its tables, and out of them as the same values. Rows are only ever added."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from sqlalchemy import func, insert, select
from sqlalchemy.orm import InstrumentedAttribute, Session

from inspector.store.codec import gather, spread
from inspector.store.errors import StoreError
from inspector.store.journal_tables import CallRow, EntryRow, VisitRow
from models.journal import Call, Entry, Journal, Visit

_UNWRITTEN: frozenset[str] = frozenset()


def load(session: Session, bridge_id: str) -> tuple[Visit, ...]:
    """All visits to a bridge with their entries, in the order in which they were stored."""
    calls: dict[str, list[Call]] = {}
    for call in session.scalars(select(CallRow).where(CallRow.bridge_id == bridge_id).order_by(CallRow.ordinal)):
        calls.setdefault(call.visit_id, []).append(gather(Call, call))
    entries: dict[str, list[Entry]] = {}
    for entry in session.scalars(select(EntryRow).where(EntryRow.bridge_id == bridge_id).order_by(EntryRow.ordinal)):
        entries.setdefault(entry.visit_id, []).append(gather(Entry, entry))
    rows = session.scalars(select(VisitRow).where(VisitRow.bridge_id == bridge_id).order_by(VisitRow.ordinal))
    return tuple(
        gather(
            Visit,
            row,
            entries=tuple(entries.get(row.id, ())),
            calls=tuple(calls.get(row.id, ())) if row.has_calls or row.id in calls else None,
        )
        for row in rows
    )


def entries_of(session: Session, bridge_id: str, truss: str, bar: str) -> tuple[Entry, ...]:
    """All entries about one bar, visit by visit in the order in which they were stored."""
    about = (EntryRow.bridge_id == bridge_id) & (EntryRow.truss == truss) & (EntryRow.bar == bar)
    same_visit = (VisitRow.bridge_id == EntryRow.bridge_id) & (VisitRow.id == EntryRow.visit_id)
    query = select(EntryRow).join(VisitRow, same_visit).where(about).order_by(VisitRow.ordinal, EntryRow.ordinal)
    return tuple(gather(Entry, row) for row in session.scalars(query))


def add_journal(session: Session, bridge_id: str, journal: Journal) -> tuple[int, int]:
    """Add what is not stored yet; returns how many visits and how many entries that was.

    Raises
    ------
    StoreError
        If a visit or an entry is stored already and says something else.
    """
    stored = {visit.id: visit for visit in load(session, bridge_id)}
    known = {entry.id: (visit.id, entry) for visit in stored.values() for entry in visit.entries}
    visits = entries = 0
    for visit in journal.visits:
        if visit.id not in stored:
            add_visit(session, bridge_id, visit)
            stored[visit.id] = replace(visit, entries=())
            visits += 1
        _add_calls(session, bridge_id, stored[visit.id], visit)
        fresh = [entry for entry in visit.entries if not _is_known(known, visit, entry)]
        add_entries(session, bridge_id, visit.id, fresh)
        known |= {entry.id: (visit.id, entry) for entry in fresh}
        entries += len(fresh)
    return visits, entries


def add_visit(session: Session, bridge_id: str, visit: Visit) -> None:
    """Insert a visit that is not there yet, and its calls; its entries are for `add_entries`."""
    row = spread(visit, without=("entries", "calls"))
    at = {"bridge_id": bridge_id, "ordinal": _next(session, VisitRow.ordinal, VisitRow.bridge_id == bridge_id)}
    session.execute(insert(VisitRow), [row | at | {"has_calls": visit.calls is not None}])
    _insert_calls(session, bridge_id, visit.id, list(visit.calls or ()), 0)


def add_entries(session: Session, bridge_id: str, visit_id: str, entries: list[Entry]) -> None:
    """Insert entries that are not there yet."""
    if not entries:
        return
    here = (EntryRow.bridge_id == bridge_id) & (EntryRow.visit_id == visit_id)
    first = _next(session, EntryRow.ordinal, here)
    at = {"bridge_id": bridge_id, "visit_id": visit_id}
    rows = [spread(entry) | at | {"ordinal": place} for place, entry in enumerate(entries, start=first)]
    session.execute(insert(EntryRow), rows)


def next_sequence(session: Session, bridge_id: str, visit_id: str, device: str) -> int:
    """One more than the last sequence of this device in this visit; 1 for its first entry."""
    mine = (EntryRow.bridge_id == bridge_id) & (EntryRow.visit_id == visit_id) & (EntryRow.device == device)
    return _next(session, EntryRow.sequence, mine, first=1)


def _add_calls(session: Session, bridge_id: str, stored: Visit, visit: Visit) -> None:
    if _header(stored) != _header(visit):
        raise StoreError(
            f"visit {visit.id} of {visit.date} is stored already with another date, inspector, weather or device. "
            "A stored visit is never changed, so nothing was stored. Give the other visit an id of its own."
        )
    known = stored.calls or ()
    fresh = [call for call in visit.calls or () if call not in known]
    _insert_calls(session, bridge_id, visit.id, fresh, len(known))


def _insert_calls(session: Session, bridge_id: str, visit_id: str, calls: list[Call], first: int) -> None:
    at = {"bridge_id": bridge_id, "visit_id": visit_id}
    rows = [spread(call) | at | {"ordinal": place} for place, call in enumerate(calls, start=first)]
    if rows:
        session.execute(insert(CallRow), rows)


def _is_known(known: dict[str, tuple[str, Entry]], visit: Visit, entry: Entry) -> bool:
    """Whether this entry is stored already. Which of its keys its file gave says nothing about the bar."""
    if entry.id not in known:
        return False
    visit_id, stored = known[entry.id]
    if visit_id == visit.id and replace(stored, written=_UNWRITTEN) == replace(entry, written=_UNWRITTEN):
        return True
    raise StoreError(
        f"entry {entry.id} on {entry.truss} {entry.bar} of {visit.date} is stored already and says something else. "
        "A stored entry is never changed, so nothing was stored. Record the correction as an entry of its own."
    )


def _header(visit: Visit) -> Visit:
    return replace(visit, entries=(), calls=None, written=_UNWRITTEN)


def _next(session: Session, column: InstrumentedAttribute[int], where: Any, first: int = 0) -> int:
    last = session.scalar(select(func.max(column)).where(where))
    return first if last is None else last + 1
