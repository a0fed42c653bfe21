"""The condition of a whole bridge, and what is folded again."""

from __future__ import annotations

from dataclasses import replace

from strategies.journals import ROD, TRUSS, TUBE, at, day, entry, reading, small_bridge, visit, whole

from models.bridge import Footbridge
from models.condition import fold_all
from models.journal import Journal


def _both_trusses() -> Footbridge:
    bridge = small_bridge()
    copy = replace(bridge.trusses[TRUSS], name="downstream", same_as=TRUSS)
    return replace(bridge, trusses={TRUSS: bridge.trusses[TRUSS], "downstream": copy})


def test_every_bar_of_every_truss_has_a_condition() -> None:
    """In the order of the bridge; a reading on one truss is not copied to the other."""
    found = fold_all(_both_trusses(), day(entry(reading(0.5, 4.0))))
    assert list(found.bars) == [(truss, bar.bar) for truss in (TRUSS, "downstream") for bar in found.of_truss(truss)]
    assert at(found.bars[TRUSS, TUBE], 0.5) == 4.0
    assert at(found.bars["downstream", TUBE], 0.5) == 5.0
    assert found.bars["downstream", TUBE].truss == "downstream"
    assert found.not_seen == 9


def test_findings_name_their_bar() -> None:
    """A sentence about a bar stands at that bar."""
    found = whole(day(entry(reading(0.5, 5.4))))
    assert {(one.truss, one.bar) for bar in found.bars.values() for one in bar.findings} == {
        (TRUSS, bar.id) for bar in found.bridge.trusses[TRUSS].bars
    }


def test_bars_without_entries_share_their_profile() -> None:
    """Seventy sound bars of one section cost one profile."""
    found = whole(Journal())
    assert found.bars[TRUSS, TUBE].strength is found.bars[TRUSS, "L1-L2"].strength
    assert found.bars[TRUSS, TUBE].strength is not found.bars[TRUSS, ROD].strength


def test_one_new_entry_folds_one_bar() -> None:
    """All other conditions are the very same objects."""
    bridge = small_bridge()
    first = [entry(reading(0.5, 4.0)), entry(bar=ROD, state="fair", name="rod")]
    before = fold_all(bridge, day(*first))
    after = fold_all(bridge, day(*first, entry(reading(0.1, 3.0), at=1)), before)
    changed = [place for place, bar in after.bars.items() if bar is not before.bars[place]]
    assert changed == [(TRUSS, TUBE)]
    assert at(after.bars[TRUSS, TUBE], 0.1) == 3.0


def test_a_choice_filed_elsewhere_folds_the_chosen_bar() -> None:
    """What decides about a bar is part of what is compared."""
    bridge = small_bridge()
    both = [entry(reading(0.5, 3.0)), entry(reading(0.5, 4.5), device="B", name="high")]
    before = fold_all(bridge, day(*both))
    after = fold_all(bridge, day(*both, entry(bar=ROD, at=1, chooses="high")), before)
    assert at(after.bars[TRUSS, TUBE], 0.5) == 4.5


def test_a_new_visit_folds_every_bar() -> None:
    """What was seen in the last visit is no longer seen in the new one."""
    bridge = small_bridge()
    first = visit("2024-05-14", entry(state="fair"))
    before = fold_all(bridge, Journal((first,)))
    after = fold_all(bridge, Journal((first, visit("2026-05-14"))), before)
    assert before.bars[TRUSS, TUBE].seen
    assert not after.bars[TRUSS, TUBE].seen
    assert "2026-05-14" in after.bars[TRUSS, ROD].findings[0].text


def test_another_bridge_is_folded_anew() -> None:
    """Nothing is taken over from a bridge that was drawn differently."""
    before = whole(Journal())
    thin = small_bridge(sections=before.bridge.sections | {"tube": before.bridge.sections["thin tube"]})
    assert at(fold_all(thin, Journal(), before).bars[TRUSS, TUBE], 0.5) == 3.0


def test_entries_about_no_bar_are_told() -> None:
    """An entry about a bar that the bridge lacks counts for nothing, and a note says so."""
    found = whole(day(entry(bar="L7-L8", state="poor")))
    assert [one.text for one in found.findings] == [
        f"Entries about L7-L8 of truss {TRUSS} count for nothing: this bridge has no such bar."
    ]


def test_the_last_visit_is_the_latest_by_date() -> None:
    """Not the last in the file."""
    assert whole(Journal()).last_visit is None
    found = whole(Journal((visit("2026-05-14"), visit("2020-05-14"))))
    assert found.last_visit is not None
    assert found.last_visit.date == "2026-05-14"
