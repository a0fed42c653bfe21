"""Two journals of one bridge become one."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from hypothesis import given
from hypothesis import strategies as st
from strategies.journals import TRUSS, TUBE, day, entry

from models.journal import Call, Entry, Journal, Visit
from models.journal_order import ordered, union

ENTRIES = st.builds(
    Entry,
    st.sampled_from("abcd"),
    st.just(TRUSS),
    st.just(TUBE),
    st.sampled_from("AB"),
    st.integers(0, 1),
    state=st.sampled_from([None, "fair"]),
    written=st.sampled_from([frozenset(), frozenset({"id"})]),
)
VISITS = st.builds(
    Visit,
    st.sampled_from("uvw"),
    st.sampled_from(["2024-05-14", "2026-05-14"]),
    st.lists(ENTRIES, max_size=4).map(tuple),
    inspector=st.sampled_from([None, "AB", "CD", "EF"]),
    weather=st.sampled_from([None, "rain"]),
    device=st.sampled_from([None, "A", "B"]),
    calls=st.none() | st.lists(st.builds(Call, st.sampled_from(["duty engineer", "owner"])), max_size=2).map(tuple),
)
JOURNALS = st.builds(Journal, st.lists(VISITS, max_size=3).map(tuple), st.booleans())


def _unordered(journal: Journal) -> Any:
    """A journal as it is apart from the order of visits, entries and calls."""
    return journal.present, {
        visit.id: (
            replace(visit, entries=(), calls=None),
            sorted(map(repr, map(_plain, visit.entries))),
            None if visit.calls is None else frozenset(visit.calls),
        )
        for visit in journal.visits
    }


def _plain(one: Entry) -> tuple[Entry, list[str]]:
    return replace(one, written=frozenset()), sorted(one.written)


@given(JOURNALS, JOURNALS)
def test_union_is_commutative(a: Journal, b: Journal) -> None:
    """Which tablet is merged into which makes no difference."""
    assert _unordered(union(a, b)) == _unordered(union(b, a))


@given(JOURNALS, JOURNALS, JOURNALS)
def test_union_is_associative(a: Journal, b: Journal, c: Journal) -> None:
    """Three tablets may be merged in any order."""
    assert _unordered(union(union(a, b), c)) == _unordered(union(a, union(b, c)))


@given(JOURNALS, JOURNALS)
def test_union_is_idempotent(a: Journal, b: Journal) -> None:
    """Merging the same journal once more changes nothing."""
    merged = union(a, b)
    assert _unordered(union(merged, b)) == _unordered(merged)
    assert _unordered(union(merged, merged)) == _unordered(merged)


@given(JOURNALS, JOURNALS)
def test_union_loses_nothing(a: Journal, b: Journal) -> None:
    """Every entry, every call and every name of both journals is in the union."""
    merged = {visit.id: visit for visit in union(a, b).visits}
    for visit in (*a.visits, *b.visits):
        found = merged[visit.id]
        recorded = {replace(one, written=frozenset()) for one in found.entries}
        assert {replace(one, written=frozenset()) for one in visit.entries} <= recorded
        assert set(visit.calls or ()) <= set(found.calls or ())
        assert visit.inspector is None or visit.inspector in (found.inspector or "").split("; ")


@given(JOURNALS, JOURNALS)
def test_union_adds_nothing(a: Journal, b: Journal) -> None:
    """Nothing is in the union that was in neither journal."""
    recorded = {
        (visit.id, replace(one, written=frozenset())) for visit in (*a.visits, *b.visits) for one in visit.entries
    }
    for _, visit, one in ordered(union(a, b)):
        assert (visit.id, replace(one, written=frozenset())) in recorded


def test_one_entry_on_both_sides_is_one_entry() -> None:
    """An entry that both tablets hold stands once."""
    shared = entry(name="e", state="fair")
    merged = union(day(shared), day(shared, entry(name="f", at=1)))
    assert [one.id for _, _, one in ordered(merged)] == ["e", "f"]


def test_different_entries_under_one_id_both_stay() -> None:
    """No entry silently wins over another one with its id."""
    merged = union(day(entry(name="e", state="fair")), day(entry(name="e", state="poor")))
    assert {one.state for _, _, one in ordered(merged)} == {"fair", "poor"}
