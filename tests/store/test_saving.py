"""Saving a bridge again, two tablets' journals, and what is refused."""

from __future__ import annotations

import copy
import sqlite3
import threading
from collections.abc import Iterator
from contextlib import closing
from dataclasses import replace
from pathlib import Path

import pytest
from store.examples import EVERY_KEY, FEWEST, read

from inspector.exchange import site
from inspector.store import BridgeSummary, Store, StoreError, open_store
from models.journal import Entry, Journal, Visit
from models.journal_order import union


@pytest.fixture
def store(tmp_path: Path) -> Iterator[Store]:
    """An empty store."""
    with open_store(tmp_path / "store.db") as made:
        yield made


def _entry(name: str, device: str = "a", sequence: int = 1, note: str | None = None) -> Entry:
    return Entry(name, "near", "2", device, sequence, seen="hands on", note=note)


def test_saving_a_file_twice_stores_nothing_new(store: Store) -> None:
    """The same file read again adds no visit and no entry, though two of its entries say the same."""
    first, second = read(EVERY_KEY), read(EVERY_KEY)
    added = store.save_bridge(first.bridge, first.journal)
    assert (added.bridge, added.visits, added.entries) == (True, 3, 14)
    added = store.save_bridge(second.bridge, second.journal)
    assert (added.bridge, added.visits, added.entries) == (False, 0, 0)
    assert store.load(first.bridge.id)[1] == first.journal


def test_a_file_with_its_identities_is_the_same_file(store: Store) -> None:
    """A site that went out with every id spelled out adds nothing when it comes back."""
    before = read(EVERY_KEY)
    store.save_bridge(before.bridge, before.journal)
    travelled = site.read_document(site.write(*store.load("bridge 9"), identities=True))
    added = store.save_bridge(travelled.bridge, travelled.journal)
    assert (added.visits, added.entries) == (0, 0)


def test_two_tablets_become_one_journal(store: Store, tmp_path: Path) -> None:
    """Two journals that grew apart are joined: in either order, nothing lost, nothing twice."""
    bridge = read(FEWEST).bridge
    shared = Visit("v", "2026-05-14", (_entry("1"),), inspector="a.b.")
    a = Journal((replace(shared, entries=(_entry("1"), _entry("2", sequence=2))), Visit("only a", "2026-05-15")))
    b = Journal((replace(shared, entries=(_entry("1"), _entry("3", device="b"))),))
    for journal in (a, b, a, b):
        store.save_bridge(bridge, journal)
    with open_store(tmp_path / "other.db") as other:
        for journal in (b, a):
            other.save_bridge(bridge, journal)
        prints = {site.fingerprint(*one.load(bridge.id)) for one in (store, other)}
    assert prints == {site.fingerprint(bridge, union(a, b))}
    assert store.load(bridge.id)[1] == union(a, b)


def test_an_entry_that_says_something_else_is_refused_whole(store: Store) -> None:
    """An entry edited in a file under its old id is refused, and the file's new entries are not stored either."""
    bridge = read(FEWEST).bridge
    visit = Visit("v", "2026-05-14", (_entry("1"),))
    store.save_bridge(bridge, Journal((visit,)))
    edited = replace(visit, entries=(_entry("2", sequence=2), _entry("1", note="edited")))
    with pytest.raises(StoreError, match=r"entry 1 on near 2 of 2026-05-14 .* nothing was stored"):
        store.save_bridge(bridge, Journal((edited,)))
    assert store.load(bridge.id)[1] == Journal((visit,))


def test_a_visit_that_says_something_else_is_refused(store: Store) -> None:
    """A visit is never changed: another inspector under its id is refused with what to do."""
    bridge = read(FEWEST).bridge
    visit = Visit("v", "2026-05-14", inspector="a.b.")
    store.save_bridge(bridge, Journal((visit,)))
    with pytest.raises(StoreError, match=r"visit v of 2026-05-14 .* an id of its own"):
        store.save_bridge(bridge, Journal((replace(visit, inspector="c.d."),)))


def test_a_changed_structure_is_refused(store: Store) -> None:
    """A bridge is not changed under the entries that were made on it; the message names what differs."""
    before = read(FEWEST)
    store.save_bridge(before.bridge, before.journal)
    document = copy.deepcopy(FEWEST)
    document["deck"]["dead"] = "0.6 kPa"
    with pytest.raises(StoreError, match=r"Mill leat footbridge .* another deck\..* an `id` of its own"):
        store.save_bridge(*_values(document))
    assert store.load(before.bridge.id) == (before.bridge, before.journal)


def _values(document: dict[str, object]) -> tuple[site.Footbridge, Journal]:
    found = read(document)
    return found.bridge, found.journal


def test_two_bridges_may_use_the_same_short_ids(store: Store) -> None:
    """Visits called `1` in two files written by hand do not meet."""
    bridge = read(FEWEST).bridge
    other = replace(bridge, id="other", name="Other footbridge")
    journal = Journal((Visit("1", "2026-05-14", (_entry("1"),)),))
    for each in (bridge, other):
        store.save_bridge(each, journal)
        assert store.load(each.id) == (each, journal)


def test_the_list_of_bridges_tells_the_last_visit(store: Store) -> None:
    """The list shows each bridge in the order of saving, with the latest date of its visits."""
    for document in (EVERY_KEY, FEWEST):
        store.save_bridge(*_values(document))
    assert store.bridges() == (
        BridgeSummary("bridge 9", "Every key footbridge", "EK-1", "2026-05-14"),
        BridgeSummary(read(FEWEST).bridge.id, "Mill leat footbridge", None, None),
    )


def test_a_bridge_that_is_not_there_is_named(store: Store) -> None:
    """Loading an unknown id says so."""
    with pytest.raises(StoreError, match="no bridge with the id nowhere"):
        store.load("nowhere")


def test_a_number_that_no_file_can_hold_is_refused(store: Store) -> None:
    """Not-a-number would come back as nothing at all, so it is refused in words."""
    bridge = read(FEWEST).bridge
    store.save_bridge(bridge, Journal((Visit("v", "2026-05-14"),)))
    for bad in (float("nan"), float("inf")):
        with pytest.raises(StoreError, match="has to be finite"):
            store.append(bridge.id, "v", replace(_entry("1"), station=bad))
    with pytest.raises(StoreError, match="half a character"):
        store.append(bridge.id, "v", _entry("1", note="\ud800"))
    assert store.load(bridge.id)[1].visits[0].entries == ()


def test_each_entry_gets_its_devices_next_sequence(store: Store) -> None:
    """Two programs that log for one device at the same time never give a sequence twice."""
    bridge = read(FEWEST).bridge
    store.save_bridge(bridge, Journal((Visit("v", "2026-05-14"),)))

    def log(worker: str) -> None:
        with open_store(store.path) as mine:
            for number in range(10):
                mine.append(bridge.id, "v", _entry(f"{worker}{number}"))

    workers = [threading.Thread(target=log, args=(name,)) for name in "xyz"]
    for worker in workers:
        worker.start()
    for worker in workers:
        worker.join()
    entries = store.load(bridge.id)[1].visits[0].entries
    assert [entry.sequence for entry in entries] == list(range(1, 31))
    assert store.next_sequence(bridge.id, "v", "a") == 31
    assert store.next_sequence(bridge.id, "v", "b") == 1


def test_a_file_in_use_is_waited_for_and_then_named(store: Store, monkeypatch: pytest.MonkeyPatch) -> None:
    """Another program that keeps the file to itself gives a message, not a traceback and not a loss."""
    monkeypatch.setattr("inspector.store.connection.BUSY_TIMEOUT", 50)
    bridge = read(FEWEST).bridge
    store.save_bridge(bridge, Journal())
    with open_store(store.path) as impatient, closing(sqlite3.connect(store.path)) as other:
        other.execute("BEGIN IMMEDIATE")
        with pytest.raises(StoreError, match="is in use by another program"):
            impatient.open_visit(bridge.id, Visit("v", "2026-05-14"))
        other.rollback()
        impatient.open_visit(bridge.id, Visit("v", "2026-05-14"))


def test_a_rating_is_kept_once_as_it_was_given_out(store: Store) -> None:
    """A kept rating comes back whole with its fingerprint; the same document is kept once."""
    bridge = read(FEWEST).bridge
    store.save_bridge(bridge, Journal())
    document = {"inputs sha256": "0f", "program": "inspector 1", "bars": [{"area": 1.0, "known": None}], "caution": "…"}
    for _ in range(2):
        kept = store.keep_rating(bridge.id, document, {"visits": ["v"]})
    store.keep_rating(bridge.id, document | {"program": "inspector 2"})
    assert [one.program for one in store.ratings(bridge.id)] == ["inspector 1", "inspector 2"]
    assert store.ratings(bridge.id)[0] == kept
    assert (kept.fingerprint, kept.document, kept.made_from) == ("0f", document, {"visits": ["v"]})


def test_a_copy_of_an_open_store_is_a_store(store: Store, tmp_path: Path) -> None:
    """A backup taken while the store is open holds everything that was stored."""
    found = read(EVERY_KEY)
    store.save_bridge(found.bridge, found.journal)
    store.back_up(tmp_path / "copy.db")
    with open_store(tmp_path / "copy.db") as copied:
        assert copied.load("bridge 9") == (found.bridge, found.journal)
