"""The order of a journal, what still stands in it, and how two journals become one.

Visits order by date, then id; entries of one device within a visit by sequence, then id. No clock
orders anything. Between devices within a visit there is no order: their entries stand side by side.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace
from graphlib import CycleError, TopologicalSorter
from typing import Final, NamedTuple

from models.finding import Finding
from models.journal import Call, Entry, Journal, Visit
from models.words import condition as sentences


class Placed(NamedTuple):
    """An entry with the index (in date order) and the date of its visit."""

    visit: int
    date: str
    entry: Entry


class Choice(NamedTuple):
    """An entry preferred over its rivals, and the entry that prefers it."""

    chosen: str
    by: Placed


@dataclass(frozen=True, slots=True)
class BarRecord:
    """What stands about one bar. Equal records give equal conditions.

    Parameters
    ----------
    entries : in order, without those taken back.
    choices : those that prefer one of these entries, in order.
    """

    entries: tuple[Placed, ...] = ()
    choices: tuple[Choice, ...] = ()


NOTHING_RECORDED: Final = BarRecord()


@dataclass(frozen=True)
class Standing:
    """A whole journal after retractions, by bar.

    Parameters
    ----------
    visits : in date order.
    records : (truss, bar) -> what stands about it; a bar without entries is absent.
    findings : choices and retractions that lead nowhere.
    """

    visits: tuple[Visit, ...]
    records: Mapping[tuple[str, str], BarRecord]
    findings: tuple[Finding, ...]


def by_date(visits: Iterable[Visit]) -> tuple[Visit, ...]:
    """Visits by date, then id."""
    return tuple(sorted(visits, key=lambda visit: (visit.date, visit.id)))


def ordered(journal: Journal) -> tuple[tuple[int, Visit, Entry], ...]:
    """All entries, each with its visit and that visit's index in date order.

    Within a visit by device, then sequence, then id; the order of devices is a convention that
    replaces nothing.
    """
    return tuple(
        (index, visit, entry)
        for index, visit in enumerate(by_date(journal.visits))
        for entry in sorted(visit.entries, key=_within_visit)
    )


def _within_visit(entry: Entry) -> tuple[str, int, str]:
    return entry.device, entry.sequence, entry.id


def precedes(earlier: Placed, later: Placed) -> bool:
    """Whether the second entry can replace the first: same device and later, or from a later visit."""
    if earlier.visit != later.visit:
        return earlier.visit < later.visit
    first, second = earlier.entry, later.entry
    return first.device == second.device and (first.sequence, first.id) < (second.sequence, second.id)


def standing(journal: Journal) -> Standing:
    """Take back what was retracted and group the rest by (truss, bar)."""
    placed = [Placed(index, visit.date, entry) for index, visit, entry in ordered(journal)]
    known: dict[str, list[Placed]] = defaultdict(list)
    for one in placed:
        known[one.entry.id].append(one)
    findings: list[Finding] = []
    taken = _taken_back(placed, known, findings)
    entries: dict[tuple[str, str], list[Placed]] = defaultdict(list)
    choices: dict[tuple[str, str], list[Choice]] = defaultdict(list)
    for one in placed:
        entry = one.entry
        if entry.id in taken:
            continue
        entries[entry.truss, entry.bar].append(one)
        if entry.chooses is None:
            continue
        if entry.chooses in taken or entry.chooses not in known:
            findings.append(_note(entry, sentences.chooses_nothing(entry.chooses)))
            continue
        for place in dict.fromkeys((target.entry.truss, target.entry.bar) for target in known[entry.chooses]):
            choices[place].append(Choice(entry.chooses, one))
    records = {place: BarRecord(tuple(those), tuple(choices.get(place, ()))) for place, those in entries.items()}
    return Standing(by_date(journal.visits), records, tuple(findings))


def _note(entry: Entry, text: str) -> Finding:
    return Finding("note", text, entry.truss, entry.bar)


def _taken_back(placed: Iterable[Placed], known: Mapping[str, list[Placed]], findings: list[Finding]) -> frozenset[str]:
    """The ids of entries taken back; a retraction that is itself taken back takes back nothing."""
    retractions: dict[str, set[str]] = defaultdict(set)
    for one in placed:
        target = one.entry.retracts
        if target is None:
            continue
        if any(other is not one and not precedes(one, other) for other in known.get(target, ())):
            retractions[target].add(one.entry.id)
        else:
            findings.append(_note(one.entry, sentences.retracts_nothing(target)))
    taken: set[str] = set()
    for identity in _retractions_first(retractions):
        if any(by not in taken for by in retractions.get(identity, ())):
            taken.add(identity)
    return frozenset(taken)


def _retractions_first(retractions: dict[str, set[str]]) -> tuple[str, ...]:
    """Ids in an order in which each comes after the retractions that name it.

    Two devices can take each other's retraction back only in a file put together by hand; such a ring
    is cut out of `retractions`: it takes back nothing.
    """
    while True:
        try:
            return tuple(TopologicalSorter(retractions).static_order())
        except CycleError as error:
            ring = set(error.args[1])
            for identity in ring:
                retractions[identity] -= ring


def union(a: Journal, b: Journal) -> Journal:
    """Two journals of one bridge as one: visits by id, entries by id, nothing lost.

    Idempotent, and up to the order of visits and entries commutative and associative. Two different
    entries under one id both stay.
    """
    visits: dict[str, Visit] = {}
    for visit in (*a.visits, *b.visits):
        visits[visit.id] = _joined(visits.get(visit.id, visit), visit)
    return Journal(tuple(visits.values()), present=a.present or b.present)


def _joined(a: Visit, b: Visit) -> Visit:
    calls: dict[Call, None] | None = None
    if a.calls is not None or b.calls is not None:
        calls = dict.fromkeys((*(a.calls or ()), *(b.calls or ())))
    return Visit(
        id=a.id,
        date=max(a.date, b.date),
        entries=_joined_entries((*a.entries, *b.entries)),
        inspector=_both(a.inspector, b.inspector),
        weather=_both(a.weather, b.weather),
        device=max((device for device in (a.device, b.device) if device is not None), default=None),
        calls=None if calls is None else tuple(calls),
        written=a.written | b.written,
    )


def _joined_entries(entries: Iterable[Entry]) -> tuple[Entry, ...]:
    kept: dict[str, list[Entry]] = {}
    for entry in entries:
        same = kept.setdefault(entry.id, [])
        for index, known in enumerate(same):
            # Which identity keys a file spelled out is no difference in what was recorded.
            if replace(known, written=entry.written) == entry:
                same[index] = replace(known, written=known.written | entry.written)
                break
        else:
            same.append(entry)
    return tuple(entry for same in kept.values() for entry in same)


_BETWEEN: Final = "; "


def _both(a: str | None, b: str | None) -> str | None:
    """Two free texts about one visit, each part once; sorted, so that the order of merging shows nowhere."""
    if a is None or b is None or a == b:
        return b if a is None else a
    return _BETWEEN.join(sorted({*a.split(_BETWEEN), *b.split(_BETWEEN)}))
