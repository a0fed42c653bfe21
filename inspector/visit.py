"""The one door for everything that is logged: an entry is on the disk when `log` returns it."""

from __future__ import annotations

import uuid
from collections.abc import Callable
from dataclasses import replace
from datetime import UTC, datetime
from typing import Any, Final, Self

from inspector.exchange import visit_checks
from inspector.exchange.references import Directory
from inspector.exchange.site_form import Site
from inspector.exchange.visit_form import ENTRY
from inspector.store import Store
from models.bridge import Footbridge
from models.errors import InputError, Problem
from models.journal import Entry, Journal, Visit
from models.journal_order import standing
from models.quantity import Quantity

_VISIT_KEYS: Final = frozenset({"id", "observations"})
_ENTRY_KEYS: Final = frozenset({"id", "device", "sequence"})
"""The identities that a file made from this visit has to spell out: they are random, not made of the rest."""


def now() -> str:
    """The time of this moment for the record, in UTC to the second. It orders nothing."""
    return datetime.now(UTC).isoformat(timespec="seconds").replace("+00:00", "Z")


class Logbook:
    """A visit in progress, as one device writes it.

    Parameters
    ----------
    visit : as it stands in the store; its entries are not kept here.
    device : the id of the device that writes.
    clock : tells the time for the record.
    """

    def __init__(
        self, store: Store, bridge: Footbridge, visit: Visit, device: str, clock: Callable[[], str] = now
    ) -> None:
        self.bridge = bridge
        self.visit = replace(visit, entries=())
        self.device = device
        self._store = store
        self._clock = clock

    @classmethod
    def start(
        cls,
        store: Store,
        bridge_id: str,
        date: str,
        inspector: str | None,
        device: str,
        *,
        weather: str | None = None,
        clock: Callable[[], str] = now,
    ) -> Self:
        """Begin a visit and store it. ``date`` is an ISO date, the inspector's own day.

        Raises
        ------
        StoreError
            If there is no bridge of this id.
        """
        bridge, _ = store.load(bridge_id)
        visit = Visit(str(uuid.uuid4()), date, (), inspector, weather, device, None, _VISIT_KEYS)
        return cls(store, bridge, store.open_visit(bridge_id, visit), device, clock)

    @classmethod
    def resume(
        cls, store: Store, bridge_id: str, visit_id: str, device: str, *, clock: Callable[[], str] = now
    ) -> Self:
        """Go on with a visit that is stored already, this device's or another's.

        Raises
        ------
        InputError
            If the bridge has no such visit.
        """
        bridge, journal = store.load(bridge_id)
        for visit in journal.visits:
            if visit.id == visit_id:
                return cls(store, bridge, visit, device, clock)
        raise InputError([Problem("visits", f"there is no visit `{visit_id}` to {bridge.name}", "a stored visit's id")])

    def log(self, truss: str, bar: str, *, at: str | None = None, **what: Any) -> Entry:
        """Store one thing recorded about one bar; when this returns, it is on the disk.

        Parameters
        ----------
        at : the time as recorded; the clock's if not given.
        what : fields of `models.journal.Entry` by name.

        Returns
        -------
        The entry as stored, with its id, device and sequence.

        Raises
        ------
        InputError
            If a truss, bar, plate, section or material is named that is not there, or if a value could not be
            written in a site file at all. A strange value is stored like any other.
        """
        entry = Entry(
            id=str(uuid.uuid4()),
            truss=truss,
            bar=bar,
            device=self.device,
            sequence=0,
            at=self._clock() if at is None else at,
            written=_ENTRY_KEYS,
            **what,
        )
        problems = [*self._unreadable(entry)] or [*self._unknown_names(entry)]
        if problems:
            raise InputError(problems)
        return self._store.append(self.bridge.id, self.visit.id, entry)

    def entries(self) -> tuple[Entry, ...]:
        """The entries of the visit as stored, of all devices, taken back or not."""
        visits = self._store.journal(self.bridge.id).visits
        return next((visit.entries for visit in visits if visit.id == self.visit.id), ())

    def add_to_reading(self, entry: Entry, thickness: Quantity) -> Entry:
        """Store one more value read at the spot of an entry's single reading; returns the entry that now stands.

        Each value is on the disk as soon as it is typed. The entry with all values is stored first, then the
        one with fewer is taken back, so that nothing is lost in between; `undo` goes back the same way.

        Raises
        ------
        InputError
            As `log` does.
        """
        (reading,) = entry.readings or ()
        more = replace(reading, thickness=(*reading.thickness, thickness))
        stored = self.log(entry.truss, entry.bar, readings=(more,))
        self.retract(entry.id)
        return stored

    def undo(self) -> Entry:
        """Take back the last entry of this device in this visit that still stands; returns the retraction.

        Where that entry holds one value more than a reading before it, that reading stands again.

        Raises
        ------
        InputError
            If nothing is left to take back.
        """
        journal = self._store.journal(self.bridge.id)
        here = next(visit for visit in journal.visits if visit.id == self.visit.id)
        mine = {entry.id for entry in here.entries if entry.device == self.device and entry.retracts is None}
        records = standing(journal).records.values()
        left = [placed.entry for record in records for placed in record.entries if placed.entry.id in mine]
        if not left:
            raise InputError([Problem("", "no entry of this device in this visit is left to take back")])
        last = max(left, key=lambda entry: (entry.sequence, entry.id))
        self._let_stand_what_it_extends(last, here.entries)
        return self.log(last.truss, last.bar, retracts=last.id)

    def _let_stand_what_it_extends(self, last: Entry, entries: tuple[Entry, ...]) -> None:
        before = {entry.id: entry for entry in entries if _extends(last, entry)}
        for entry in entries:
            if entry.device == self.device and entry.sequence == last.sequence + 1 and entry.retracts in before:
                self.log(last.truss, last.bar, retracts=entry.id)

    def retract(self, entry_id: str) -> Entry:
        """Take back an entry, this device's or another's; returns the retraction. Raises as `choose` does."""
        entry = self._stored(entry_id)
        return self.log(entry.truss, entry.bar, retracts=entry_id)

    def choose(self, entry_id: str) -> Entry:
        """Prefer an entry where two devices gave two answers; returns the choice.

        Raises
        ------
        InputError
            If the bridge has no such entry.
        """
        entry = self._stored(entry_id)
        return self.log(entry.truss, entry.bar, chooses=entry_id)

    def _stored(self, entry_id: str) -> Entry:
        for visit in self._store.journal(self.bridge.id).visits:
            for entry in visit.entries:
                if entry.id == entry_id:
                    return entry
        raise InputError([Problem("", f"there is no entry `{entry_id}` on {self.bridge.name}", "a stored entry's id")])

    def _unreadable(self, entry: Entry) -> list[Problem]:
        """What a site file could not say."""
        problems: list[Problem] = []
        ENTRY.read(ENTRY.write(entry), "", problems)
        return problems

    def _unknown_names(self, entry: Entry) -> list[Problem]:
        """Names that the bridge does not have; a plate may be one of a section that the bar was given later."""
        before: tuple[Entry, ...] = ()
        if entry.readings:
            stored = self._store.entries_of(self.bridge.id, entry.truss, entry.bar)
            before = tuple(each for each in stored if each.replaced is not None)
        site = Site(self.bridge, Journal((replace(self.visit, entries=(*before, entry)),)))
        prefix = f"visits/0/observations/{len(before)}/"
        found = visit_checks.observations(Directory(site))
        return [replace(one, path=one.path.removeprefix(prefix)) for one in found if one.path.startswith(prefix)]


def _extends(entry: Entry, earlier: Entry) -> bool:
    """Whether an entry is an earlier one's single reading with one value more."""
    if not (entry.readings and earlier.readings and len(entry.readings) == len(earlier.readings) == 1):
        return False
    (now,), (then,) = entry.readings, earlier.readings
    return now == replace(then, thickness=now.thickness) and now.thickness[:-1] == then.thickness
