"""The bridges of this device with their last rating: what presenters ask for, on the worker.

A bridge is loaded once and kept, so that each rating after an entry builds on the one before.
"""

from __future__ import annotations

import os
from collections.abc import Callable
from dataclasses import dataclass
from datetime import date, timedelta
from pathlib import Path

from inspector import desk, samples
from inspector.desk import Rated
from inspector.exchange.site import Site
from inspector.store import BridgeSummary, Store
from inspector.visit import Logbook
from models.journal import Journal, Visit
from models.journal_order import by_date


@dataclass(frozen=True, slots=True)
class Today:
    """The visit that entries go into now.

    Parameters
    ----------
    visit : None until the first entry opens it.
    dated : the date that it has or will have; ``shifted`` where this tablet's own date lies before the last
        visit on record, so that the new one is dated the day after it.
    before : the last visit before it.
    """

    visit: Visit | None
    dated: str
    shifted: bool
    before: Visit | None


def today_in(journal: Journal, device: str, today: str) -> Today:
    """Find the visit of today: this device's, else another's, else none yet."""
    visits = by_date(journal.visits)
    mine = [visit for visit in visits if visit.date == today and visit.device == device]
    here = mine or [visit for visit in visits if visit.date == today]
    last = visits[-1] if visits else None
    if here and last is not None and last.date == today:
        earlier = [visit for visit in visits if visit.date < today]
        return Today(here[-1], today, shifted=False, before=earlier[-1] if earlier else None)
    if last is None or last.date < today:
        return Today(None, today, shifted=False, before=last)
    # Entries count in the order of the visits' dates: a visit dated before the last one would change nothing.
    if last.device == device:
        earlier = [visit for visit in visits if visit.date < last.date]
        return Today(last, last.date, shifted=True, before=earlier[-1] if earlier else None)
    after = date.fromisoformat(last.date) + timedelta(days=1)
    return Today(None, after.isoformat(), shifted=True, before=last)


class Shelf:
    """Stored bridges and their ratings. Every method may take long: call it on the worker.

    Parameters
    ----------
    today : tells this device's date, ISO.
    """

    def __init__(
        self,
        store: Store,
        device: str,
        today: Callable[[], str] = lambda: date.today().isoformat(),  # noqa: DTZ011
    ) -> None:
        self.store = store
        self.device = device
        self.today = today
        self._rated: dict[str, Rated] = {}
        self._logbooks: dict[str, Logbook] = {}

    def summaries(self) -> tuple[BridgeSummary, ...]:
        """The stored bridges."""
        return self.store.bridges()

    def add(self, found: Site) -> str:
        """Store a site; returns the bridge's id."""
        self.store.save_bridge(found.bridge, found.journal)
        self._rated.pop(found.bridge.id, None)
        return found.bridge.id

    def add_sample(self, name: str) -> str:
        """Store one of the invented footbridges; returns its id."""
        return self.add(samples.sample(name))

    def rated(self, bridge_id: str) -> Rated:
        """A bridge in its condition of the moment.

        Raises
        ------
        StoreError, InputError, BasisNotAvailable
            If it is not there, or cannot be rated.
        """
        before = self._rated.get(bridge_id)
        if before is None:
            found = desk.rate(Site(*self.store.load(bridge_id)))
        else:
            found = desk.rate(Site(before.bridge, self.store.journal(bridge_id)), before)
        self._rated[bridge_id] = found
        return found

    def logbook(self, bridge_id: str) -> Logbook:
        """The visit of today, opened if it is not there yet."""
        day = today_in(self.store.journal(bridge_id), self.device, self.today())
        kept = self._logbooks.get(bridge_id)
        if kept is not None and day.visit is not None and kept.visit.id == day.visit.id:
            return kept
        if day.visit is None:
            made = Logbook.start(self.store, bridge_id, day.dated, None, self.device)
        else:
            made = Logbook.resume(self.store, bridge_id, day.visit.id, self.device)
        self._logbooks[bridge_id] = made
        return made

    def report(self, rated: Rated) -> Path:
        """Make the PDF rating summary beside the store; returns its path. A crash leaves no half of it."""
        folder = self.store.path.parent / "reports"
        folder.mkdir(parents=True, exist_ok=True)
        path = folder / f"{_file_name(rated.bridge.name)}-{self.today()}.pdf"
        draft = path.with_name(f"{path.name}.new")
        with draft.open("wb") as stream:
            stream.write(desk.report(rated))
            stream.flush()
            os.fsync(stream.fileno())
        draft.replace(path)
        return path


def _file_name(name: str) -> str:
    """A bridge's name as part of a file's name on any system."""
    plain = "".join(sign if sign.isascii() and sign.isalnum() else "-" for sign in name.lower())
    return "-".join(part for part in plain.split("-") if part)[:60] or "bridge"
