"""The order of a journal."""

from __future__ import annotations

from dataclasses import replace

from strategies.journals import entry, visit

from models.journal import Journal
from models.journal_order import Placed, ordered, precedes


def _ids(journal: Journal) -> list[str]:
    return [one.id for _, _, one in ordered(journal)]


def test_visits_order_by_date_then_id() -> None:
    """A visit's place in the file decides nothing."""
    late = visit("2026-05-14", entry(name="late"))
    twin = replace(visit("2024-05-14", entry(name="twin")), id="z")
    early = visit("2024-05-14", entry(name="early"))
    journal = Journal((late, twin, early))
    assert _ids(journal) == ["early", "twin", "late"]
    assert [index for index, _, _ in ordered(journal)] == [0, 1, 2]


def test_the_sequence_orders_the_entries_of_a_device() -> None:
    """Within a visit and device the sequence orders, never the time or the place in the file."""
    second = replace(entry(at=2, name="second"), at="08:00")
    first = replace(entry(at=1, name="first"), at="23:00")
    assert _ids(Journal((visit("2026-05-14", second, first),))) == ["first", "second"]


def test_equal_sequences_order_by_id() -> None:
    """Two entries with one sequence have a settled order."""
    journal = Journal((visit("2026-05-14", entry(name="b"), entry(name="a")),))
    assert _ids(journal) == ["a", "b"]


def test_devices_keep_a_settled_order() -> None:
    """Entries of two devices come device by device, so that equal journals read equally."""
    journal = Journal((visit("2026-05-14", entry(device="B", name="b"), entry(device="A", at=5, name="a")),))
    assert _ids(journal) == ["a", "b"]


def test_only_the_same_device_or_a_later_visit_can_replace() -> None:
    """Two devices on one visit do not replace each other, whatever their sequences are."""
    first = Placed(0, "2024-05-14", entry(at=1))
    again = Placed(0, "2024-05-14", entry(at=2))
    other = Placed(0, "2024-05-14", entry(device="B", at=9))
    later = Placed(1, "2026-05-14", entry(device="B", at=0))
    assert precedes(first, again)
    assert not precedes(again, first)
    assert not precedes(first, other)
    assert not precedes(other, first)
    assert precedes(again, later)
    assert not precedes(later, first)
    assert not precedes(first, first)
