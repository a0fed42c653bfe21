"""What stands after retractions and choices."""

from __future__ import annotations

from strategies.journals import ROD, TRUSS, TUBE, day, entry, visit, years

from models.journal import Journal
from models.journal_order import standing


def _standing(journal: Journal) -> list[str]:
    record = standing(journal).records.get((TRUSS, TUBE))
    return [] if record is None else [one.entry.id for one in record.entries]


def _notes(journal: Journal) -> list[str]:
    return [finding.text for finding in standing(journal).findings if finding.level == "note"]


def test_a_retraction_takes_an_entry_back() -> None:
    """The entry named no longer stands; the retraction does."""
    journal = day(entry(name="e", state="poor"), entry(name="r", at=1, retracts="e"))
    assert _standing(journal) == ["r"]
    assert not _notes(journal)


def test_a_retraction_can_be_taken_back() -> None:
    """Undo of an undo brings the entry back, and so on down a long chain."""
    undo = [entry(name="e0", state="poor")]
    undo += [entry(name=f"e{number}", at=number, retracts=f"e{number - 1}") for number in range(1, 2001)]
    assert "e0" in _standing(day(*undo))
    assert "e0" not in _standing(day(*undo[:-1]))


def test_a_retraction_of_nothing_is_told() -> None:
    """An unknown id takes nothing back, and a note says so."""
    journal = day(entry(name="e", state="poor"), entry(name="r", at=1, retracts="x"))
    assert _standing(journal) == ["e", "r"]
    assert len(_notes(journal)) == 1
    assert "`x`" in _notes(journal)[0]


def test_a_retraction_reaches_back_only() -> None:
    """A retraction written before the entry that it names, or one of itself, takes nothing back."""
    assert _standing(day(entry(name="r", retracts="e"), entry(name="e", at=1, state="poor"))) == ["r", "e"]
    itself = day(entry(name="r", retracts="r"))
    assert _standing(itself) == ["r"]
    assert len(_notes(itself)) == 1


def test_another_device_may_take_back() -> None:
    """Within a visit a retraction reaches the entries of every device, on whichever side they sort."""
    journal = day(entry(device="B", name="e", state="poor"), entry(device="A", name="r", retracts="e"))
    assert _standing(journal) == ["r"]


def test_a_ring_of_retractions_takes_nothing_back() -> None:
    """Two retractions that name each other end in no endless loop, and both stand."""
    journal = day(entry(device="A", name="a", retracts="b"), entry(device="B", name="b", retracts="a"))
    assert _standing(journal) == ["a", "b"]


def test_a_choice_is_kept_where_the_chosen_entry_is() -> None:
    """A choice filed under one bar belongs to the bar of the entry that it chooses."""
    journal = day(entry(name="e", state="poor"), entry(name="c", bar=ROD, at=1, chooses="e"))
    records = standing(journal).records
    assert [choice.chosen for choice in records[TRUSS, TUBE].choices] == ["e"]
    assert not records[TRUSS, ROD].choices


def test_a_choice_of_nothing_is_told() -> None:
    """A choice of an unknown entry, or of one taken back, chooses nothing, and a note says so."""
    assert len(_notes(day(entry(name="c", chooses="x")))) == 1
    gone = day(entry(name="e", state="poor"), entry(name="r", at=1, retracts="e"), entry(name="c", at=2, chooses="e"))
    assert len(_notes(gone)) == 1
    assert not standing(gone).records[TRUSS, TUBE].choices


def test_a_choice_taken_back_chooses_nothing() -> None:
    """A retracted choice does not count."""
    journal = day(
        entry(name="e", state="poor"), entry(name="c", at=1, chooses="e"), entry(name="r", at=2, retracts="c")
    )
    assert not standing(journal).records[TRUSS, TUBE].choices


def test_records_are_by_bar_and_equal_when_nothing_changed() -> None:
    """An entry about one bar leaves the record of every other bar equal, so that it need not be folded again."""
    about_rod = entry(bar=ROD, state="fair", name="rod")
    before = standing(day(about_rod)).records
    after = standing(day(about_rod, entry(name="tube", at=1, state="poor"))).records
    assert before[TRUSS, ROD] == after[TRUSS, ROD]
    assert (TRUSS, TUBE) not in before


def test_visits_stand_in_date_order() -> None:
    """The visits beside the records are those that the indices count in."""
    journal = Journal((visit("2026-05-14"), visit("2020-05-14")))
    assert [one.date for one in standing(journal).visits] == ["2020-05-14", "2026-05-14"]
    assert standing(years()).visits == ()
