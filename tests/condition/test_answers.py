"""What is known about a bar as a whole, and what holds for bars not seen."""

from __future__ import annotations

import numpy as np
import pytest
from strategies.journals import (
    LENGTH,
    ROD,
    TRUSS,
    TUBE,
    at,
    day,
    entry,
    length,
    reading,
    texts,
    tube,
    unseen,
    visit,
    whole,
    years,
)

from models.condition import ESTIMATE
from models.journal import Bow, Crack, Entry, Journal, Photo, Replaced


@pytest.mark.parametrize(
    "said",
    [
        {"seen": "hands on"},
        {"seen": "at a distance"},
        {"state": "fair"},
        {"readings": (reading(0.5, 4.0),)},
        {"estimated_loss": 0.1},
        {"severed": False},
        {"look_unchanged": True},
        {"note": "rust"},
        {"photos": (Photo("a.jpg"),)},
        {"replaced": Replaced()},
    ],
)
def test_any_entry_counts_as_seen(said: dict[str, object]) -> None:
    """Whatever was recorded in the last visit, somebody looked."""
    assert tube(day(Entry("e", TRUSS, TUBE, "A", 0, **said))).seen  # type: ignore[arg-type]


def test_not_seen_choices_and_retractions_are_no_look() -> None:
    """They say nothing about the bar as it is, a remark on them neither."""
    assert not tube(day(entry(seen="not seen", reason="under water"))).seen
    first = visit("2024-05-14", entry(state="poor", name="e"))
    for said in ({"chooses": "e"}, {"retracts": "e"}, {"retracts": "e", "note": "wrong bar"}):
        assert not tube(Journal((first, visit("2026-05-14", entry(name="r", **said))))).seen
    assert tube(Journal((first, visit("2026-05-14", entry(name="r", retracts="e", state="fair"))))).seen


def test_a_look_taken_back_is_no_look() -> None:
    """The same device's later `not seen` replaces its `hands on`, not what it recorded."""
    assert not tube(day(entry(seen="hands on"), entry(seen="not seen", at=1))).seen
    assert tube(day(entry(seen="not seen"), entry(seen="hands on", at=1))).seen
    assert tube(day(entry(seen="hands on", state="fair"), entry(seen="not seen", at=1))).seen
    assert tube(day(entry(seen="hands on"), entry(seen="not seen", device="B"))).seen


def test_only_the_last_visit_counts_as_seen() -> None:
    """A bar seen two years ago is not seen today; what was known then still holds."""
    found = tube(Journal((visit("2024-05-14", entry(reading(0.5, 4.0))), visit("2026-05-14"))))
    assert not found.seen
    assert found.known == "not seen"
    assert at(found, 0.5) == 4.0
    assert texts(found, "assumed") == [
        "Not seen in the visit of 2026-05-14; what was recorded up to 2024-05-14 is used."
    ]


def test_a_bar_never_recorded_is_assumed_as_built() -> None:
    """An assumption at that bar says so, with the reason where one was given."""
    assert texts(tube(day(entry(bar=ROD))), "assumed") == ["Not seen in the visit of 2026-05-14; it is taken as built."]
    found = tube(day(entry(seen="not seen", reason="under water")))
    assert texts(found, "assumed") == ["Not seen in the visit of 2026-05-14 (under water); it is taken as built."]


def test_without_a_visit_nothing_is_seen() -> None:
    """One assumption for the bridge instead of one for each bar."""
    found = whole(Journal())
    assert found.not_seen == len(found.bars) == 5
    assert not any(bar.findings for bar in found.bars.values())
    assert [finding.level for finding in found.findings] == ["assumed"]


def test_the_owners_loss_for_bars_not_seen() -> None:
    """The lower of the loss over the whole bar and what was last known."""
    visits = (visit("2024-05-14", entry(reading(0.5, 3.0, extent=0.4))), visit("2026-05-14"))
    found = tube(Journal(visits), unseen(0.2))
    assert at(found, 0.5) == 3.0
    assert at(found, 0.1) == at(found, 0.5, "top wall") == 4.0
    assert found.strength.rests_on[0, 0] == ESTIMATE
    assert found.soft is found.stiff is found.strength
    assert "a loss of 20 % over the whole bar is taken" in texts(found, "assumed")[0]
    never = tube(Journal(), unseen(0.2))
    assert never.strength.thickness == pytest.approx(np.full((1, 4), 0.004))
    assert not never.has_estimate


def test_the_owners_loss_in_every_profile() -> None:
    """Flexibility takes the loss as well, in each of its variants."""
    found = tube(Journal((visit("2024-05-14", entry(reading(0.5, 3.0))), visit("2026-05-14"))), unseen(0.2))
    assert at(found, 0.5, profile="stiff") == 4.0
    assert at(found, 0.1, profile="soft") == 3.0
    assert at(found, 0.1, "top wall", "soft") == 4.0


def test_the_owners_loss_does_not_touch_bars_seen() -> None:
    """A bar seen is as it was found."""
    assert at(tube(day(entry(seen="hands on")), unseen(0.2)), 0.5) == 5.0


def test_the_owners_loss_scales_a_round_bar_by_its_root() -> None:
    """A loss of area, as an estimate is."""
    assert tube(Journal(), unseen(0.19), ROD).strength.thickness[0, 0] == pytest.approx(0.02 * 0.9)


def test_the_last_answer_counts() -> None:
    """State, severed, slack and crack can be put right; the state keeps its visit."""
    bad = entry(state="severe", severed=True, slack=True, crack=Crack())
    found = tube(years((bad,), (entry(state="fair"),)))
    assert (found.state, found.state_visit) == ("fair", 1)
    assert found.severed
    assert found.slack
    assert found.crack == Crack()
    put_right = entry(severed=False, slack=False, crack="no crack", at=1)
    found = tube(years((bad, put_right)))
    assert not found.severed
    assert not found.slack
    assert found.crack is None
    assert (found.state, found.state_visit) == ("severe", 0)


def test_no_state_is_none() -> None:
    """A bar seen without a state has none on record."""
    found = tube(day(entry(seen="hands on")))
    assert (found.state, found.state_visit) == (None, -1)
    assert not found.findings


def test_an_unchanged_look_changes_nothing() -> None:
    """What was known stays, and the bar is seen."""
    found = tube(years((entry(reading(0.5, 4.0), state="poor"),), (entry(look_unchanged=True),)))
    assert found.seen
    assert found.state == "poor"
    assert at(found, 0.5) == 4.0


def test_the_last_bow_counts() -> None:
    """A later bow replaces; one of nothing puts it right."""
    bow = Bow(length("10 mm"))
    assert tube(years((entry(bow=Bow(length("20 mm"))),), (entry(bow=bow),))).bow == bow
    assert tube(years((entry(bow=bow),), (entry(bow=Bow(length("0 mm"))),))).bow is None


def test_bows_in_two_directions_both_stand() -> None:
    """A bow measured across does not straighten one in plane: the larger counts, and a sentence says so."""
    across = Bow(length("20 mm"), direction="out of plane")
    found = tube(years((entry(bow=across),), (entry(bow=Bow(length("10 mm"), direction="in plane")),)))
    assert found.bow == across
    assert texts(found) == ["Bows in two directions are recorded; the larger, 20.0 mm, counts."]


def test_a_very_large_bow_is_doubtful() -> None:
    """Beyond a fiftieth of the length that it is measured over, else of the bar, to either side."""
    limit = LENGTH / 50 * 1000
    assert not texts(tube(day(entry(bow=Bow(length(f"{limit} mm"))))))
    assert "more than a fiftieth" in texts(tube(day(entry(bow=Bow(length(f"-{limit + 1} mm"))))))[0]
    assert texts(tube(day(entry(bow=Bow(length("21 mm"), length("1 m"))))))


def test_a_replacement_ends_what_was_recorded_before() -> None:
    """New section, nothing else known; a rise is then no doubt."""
    old = entry(reading(0.5, 1.6), state="severe", severed=True, crack=Crack())
    found = tube(years((old,), (entry(replaced=Replaced("thin tube")),)))
    assert found.section == "thin tube"
    assert found.material == "steel"
    assert found.strength.thickness == pytest.approx(np.full((1, 4), 0.003))
    assert found.state is None
    assert not found.severed
    assert found.crack is None
    assert not found.findings
    assert not tube(day(old, entry(replaced=Replaced(), at=1))).has_reading
    again = tube(years((old,), (entry(replaced=Replaced()), entry(reading(0.5, 4.9), at=1))))
    assert at(again, 0.5) == 4.9
    assert not texts(again)


def test_a_replacement_and_its_own_readings_stand_together() -> None:
    """What one entry says beside the replacement is about the new bar."""
    assert at(tube(day(entry(reading(0.5, 2.8), replaced=Replaced("thin tube")))), 0.5) == 2.8


def test_another_devices_entries_of_that_visit_stay() -> None:
    """They have no order to the replacement, so whatever they found still counts."""
    found = tube(day(entry(reading(0.5, 2.0)), entry(replaced=Replaced(), device="B")))
    assert at(found, 0.5) == 2.0


def test_a_replacement_taken_back_never_was() -> None:
    """A retracted replacement leaves the old record."""
    found = tube(day(entry(reading(0.5, 2.0)), entry(replaced=Replaced(), at=1, name="n"), entry(at=2, retracts="n")))
    assert at(found, 0.5) == 2.0


@pytest.mark.parametrize("new", [Replaced("tree trunk"), Replaced(material="wood")])
def test_a_replacement_that_the_bridge_does_not_have_is_set_aside(new: Replaced) -> None:
    """What was recorded before still counts, and a sentence says so."""
    found = tube(day(entry(reading(0.5, 2.0)), entry(replaced=new, at=1)))
    assert found.section == "tube"
    assert at(found, 0.5) == 2.0
    assert "set aside" in texts(found)[0]
