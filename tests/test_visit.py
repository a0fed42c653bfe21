"""Logging on a bridge: what is stored, what is refused, and what is taken back."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path

import pytest
from store.examples import EVERY_KEY, FEWEST, read

from inspector.exchange import site
from inspector.store import Store, StoreError, open_store
from inspector.visit import Logbook, now
from models.errors import InputError
from models.journal import CRACK_TAKEN_BACK, Bow, Crack, Entry, Journal, Reading, Replaced, Visit
from models.journal_order import standing
from models.quantity import Quantity

BRIDGE = read(FEWEST).bridge
THIN = (Quantity("31 mm", 0.031),)


@pytest.fixture
def store(tmp_path: Path) -> Iterator[Store]:
    """A store with one bridge that nobody has visited."""
    with open_store(tmp_path / "store.db") as made:
        made.save_bridge(BRIDGE, Journal())
        yield made


@pytest.fixture
def logbook(store: Store) -> Logbook:
    """A visit that was begun on tablet a."""
    return Logbook.start(store, BRIDGE.id, "2026-05-14", "a.b.", "a", weather="dry", clock=lambda: "noon")


def _problems(caught: pytest.ExceptionInfo[InputError]) -> list[str]:
    return [problem.path for problem in caught.value.problems]


def test_an_entry_is_stored_when_log_returns(store: Store, logbook: Logbook) -> None:
    """Another connection sees each entry at once, in order, with its device, sequence and time."""
    first = logbook.log("near", "2", seen="hands on", state="fair")
    second = logbook.log("near", "2", readings=(Reading(0.5, "bar", THIN),), at="ten past")
    with open_store(store.path) as other:
        visit = other.load(BRIDGE.id)[1].visits[0]
    assert visit.entries == (first, second) == logbook.entries()
    assert [(entry.device, entry.sequence, entry.at) for entry in visit.entries] == [
        ("a", 1, "noon"),
        ("a", 2, "ten past"),
    ]
    assert (visit.date, visit.inspector, visit.weather, visit.device) == ("2026-05-14", "a.b.", "dry", "a")


def test_what_was_logged_goes_out_and_comes_back_as_the_same_entries(store: Store, logbook: Logbook) -> None:
    """The random ids of a tablet are written in a plain site file, so that reading it stores nothing new."""
    logbook.log("near", "1", estimated_loss=0.1, extent=Quantity("0.5 m", 0.5), station=0)
    logbook.log("near", "1", crack=Crack(note="at the pin"))
    logbook.log("near", "1", crack=CRACK_TAKEN_BACK)
    came = site.read_document(site.write(*store.load(BRIDGE.id)))
    assert came.journal == store.load(BRIDGE.id)[1]
    added = store.save_bridge(came.bridge, came.journal)
    assert (added.visits, added.entries) == (0, 0)


def test_strange_values_are_stored(logbook: Logbook) -> None:
    """Thicker than new, a station of 1.2, a negative thickness, a huge bow: kept, for the rating to doubt."""
    strange = (Reading(1.2, "bar", (Quantity("99 mm", 0.099),)), Reading(-3, "bar", (Quantity("-1 mm", -0.001),)))
    logbook.log("near", "2", readings=strange, estimated_loss=7, bow=Bow(Quantity("80 m", 80.0)))
    assert logbook.entries()[0].readings == strange


@pytest.mark.parametrize(
    ("truss", "bar", "what", "path"),
    [
        ("far", "2", {}, "truss"),
        ("near", "9", {}, "bar"),
        ("near", "2", {"readings": (Reading(0.5, "bar", THIN), Reading(0.5, "web", THIN))}, "readings/1/plate"),
        ("near", "2", {"replaced": Replaced("tube", "steel")}, "replaced/section"),
        ("near", "2", {"replaced": Replaced("rod", "wood")}, "replaced/material"),
        ("near", "2", {"state": "splendid"}, "state"),
        ("near", "2", {"station": float("nan")}, "station"),
    ],
)
def test_names_that_are_not_there_are_refused(
    logbook: Logbook, truss: str, bar: str, what: dict[str, object], path: str
) -> None:
    """A truss, bar, plate, section or material that the bridge lacks, or a word no file may hold: nothing is stored."""
    with pytest.raises(InputError) as caught:
        logbook.log(truss, bar, **what)
    assert _problems(caught) == [path]
    assert logbook.entries() == ()


def test_plates_of_the_new_section_can_be_read_once_a_bar_was_replaced(tmp_path: Path) -> None:
    """After a replacement the plates are those of the new section, also where another tablet logged it."""
    found = read(EVERY_KEY)
    reading = (Reading(0.5, "top wall", THIN),)
    with open_store(tmp_path / "other.db") as store:
        store.save_bridge(found.bridge, found.journal)
        logbook = Logbook.start(store, "bridge 9", "2026-06-01", None, "a")
        with pytest.raises(InputError) as caught:
            logbook.log("near", "1", readings=reading)
        assert _problems(caught) == ["readings/0/plate"]
        Logbook.resume(store, "bridge 9", logbook.visit.id, "b").log("near", "1", replaced=Replaced("box", "steel"))
        logbook.log("near", "1", readings=reading)


def test_undo_takes_back_the_last_that_stands(store: Store, logbook: Logbook) -> None:
    """Undo after undo goes back entry by entry, over what was retracted in between, and then says so."""
    entries = [logbook.log("near", bar, note=bar) for bar in ("1", "2", "3")]
    logbook.retract(entries[1].id)
    assert [logbook.undo().retracts, logbook.undo().retracts] == [entries[2].id, entries[0].id]
    with pytest.raises(InputError, match="left to take back"):
        logbook.undo()
    records = standing(store.journal(BRIDGE.id)).records.values()
    assert all(placed.entry.retracts is not None for record in records for placed in record.entries)
    assert len(logbook.entries()) == 6


def test_values_at_one_spot_are_stored_one_by_one_and_taken_back_one_by_one(store: Store, logbook: Logbook) -> None:
    """Each value is stored as it is typed; one entry with all of them stands, and undo leaves those before."""
    first = logbook.log("near", "2", readings=(Reading(0.5, "bar", THIN),))
    more = logbook.add_to_reading(first, Quantity("29 mm", 0.029))
    logbook.add_to_reading(more, Quantity("30 mm", 0.030))

    def values() -> list[list[str]]:
        records = standing(store.journal(BRIDGE.id)).records.values()
        entries = [placed.entry for record in records for placed in record.entries if placed.entry.readings]
        return [[one.text for one in reading.thickness] for entry in entries for reading in entry.readings or ()]

    assert values() == [["31 mm", "29 mm", "30 mm"]]
    logbook.undo()
    assert values() == [["31 mm", "29 mm"]]
    logbook.undo()
    assert values() == [["31 mm"]]
    logbook.undo()
    assert values() == []


def test_a_reading_that_was_taken_back_by_hand_stays_so_after_undo(store: Store, logbook: Logbook) -> None:
    """Undo restores nothing that the last entry does not extend."""
    first = logbook.log("near", "2", readings=(Reading(0.5, "bar", THIN),))
    second = logbook.log("near", "2", readings=(Reading(0.1, "bar", (*THIN, Quantity("29 mm", 0.029))),))
    logbook.retract(first.id)
    assert logbook.undo().retracts == second.id
    records = standing(store.journal(BRIDGE.id)).records.values()
    assert all(placed.entry.readings is None for record in records for placed in record.entries)


def test_undo_leaves_other_devices_and_other_visits_alone(store: Store, logbook: Logbook) -> None:
    """Undo on one tablet never takes back what another one wrote, nor what an earlier visit says."""
    earlier = Visit("earlier", "2020-01-01", (Entry("old", "near", "1", "a", 9, note="old"),))
    store.open_visit(BRIDGE.id, earlier)
    other = Logbook.resume(store, BRIDGE.id, logbook.visit.id, "b")
    mine = logbook.log("near", "1", note="mine")
    theirs = other.log("near", "1", note="theirs")
    assert logbook.undo().retracts == mine.id
    with pytest.raises(InputError, match="left to take back"):
        logbook.undo()
    assert other.undo().retracts == theirs.id


def test_a_choice_names_the_entry_and_its_bar(logbook: Logbook) -> None:
    """Choosing between two answers is an entry about the same bar; an id that is not there is refused."""
    one = logbook.log("near", "3", state="good")
    choice = logbook.choose(one.id)
    assert (choice.truss, choice.bar, choice.chooses) == ("near", "3", one.id)
    for act in (logbook.choose, logbook.retract):
        with pytest.raises(InputError, match="no entry `nowhere`"):
            act("nowhere")


def test_a_visit_goes_on_after_a_restart(store: Store, logbook: Logbook) -> None:
    """After a crash the same visit is taken up again and the sequence goes on; an unknown visit is refused."""
    logbook.log("near", "1", note="before")
    again = Logbook.resume(store, BRIDGE.id, logbook.visit.id, "a")
    assert again.log("near", "1", note="after").sequence == 2
    assert again.visit == replace(store.journal(BRIDGE.id).visits[0], entries=())
    with pytest.raises(InputError, match="no visit `nowhere`"):
        Logbook.resume(store, BRIDGE.id, "nowhere", "a")


def test_a_visit_to_a_bridge_that_is_not_there_is_refused(store: Store) -> None:
    """A visit begins on a stored bridge."""
    with pytest.raises(StoreError, match="no bridge"):
        Logbook.start(store, "nowhere", "2026-05-14", None, "a")


def test_the_clock_says_utc_to_the_second() -> None:
    """The recorded time is plain UTC text."""
    assert len(now()) == len("2026-05-14T10:21:07Z")
    assert now().endswith("Z")
