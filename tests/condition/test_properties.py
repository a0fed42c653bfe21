"""What holds for the condition of a bar whatever was recorded."""

from __future__ import annotations

import random
from dataclasses import replace

import numpy as np
from hypothesis import given
from hypothesis import strategies as st
from strategies.journals import PLATES, ROD, TRUSS, TUBE, journals, reading, small_bridge, visit, whole

from models.condition import DOUBTFUL, NOMINAL, READING, BarCondition, Profile, fold_all
from models.journal import Entry, Journal
from models.journal_order import ordered, union

PROFILES = ("strength", "stiff", "soft")
PLACES = np.linspace(0.0005, 0.9995, 1000)


def _along(profile: Profile) -> np.ndarray:
    """Thickness (1000, plates) at many places, m."""
    return profile.thickness[np.searchsorted(profile.stations, PLACES) - 1]


def _same(one: BarCondition, other: BarCondition) -> bool:
    """Whether two conditions agree in all but the order of their sentences and readings."""
    for name in PROFILES:
        first, second = getattr(one, name), getattr(other, name)
        if not np.array_equal(_along(first), _along(second)):
            return False
    fields = ("section", "state", "state_visit", "seen", "severed", "slack", "crack", "has_reading", "has_estimate")
    return all(getattr(one, field) == getattr(other, field) for field in fields) and set(one.findings) == set(
        other.findings
    )


def _of(journal: Journal) -> BarCondition:
    return whole(journal).bars[TRUSS, TUBE]


@given(journals())
def test_profiles_are_whole_and_within_nominal(journal: Journal) -> None:
    """Pieces cover the bar from 0 to 1, and no plate is thicker than built or thinner than nothing."""
    found = _of(journal)
    nominal = fold_all(small_bridge(), Journal()).catalogue.as_built(found.section, 0).thickness
    for name in PROFILES:
        profile = getattr(found, name)
        assert profile.stations[0] == 0
        assert profile.stations[-1] == 1
        assert (np.diff(profile.stations) > 0).all()
        assert profile.thickness.shape == (len(profile.stations) - 1, len(PLATES))
        assert profile.thickness.shape == profile.rests_on.shape == profile.cleaned.shape == profile.visit.shape
        assert (profile.thickness >= 0).all()
        assert (profile.thickness <= nominal).all()
        drawn = profile.rests_on == NOMINAL
        assert (profile.thickness[drawn] == np.broadcast_to(nominal, profile.thickness.shape)[drawn]).all()
        assert (profile.visit[drawn] == -1).all()
        assert (profile.rests_on[profile.cleaned] >= DOUBTFUL).all()


@given(journals())
def test_the_soft_variant_is_nowhere_the_stiffer_one(journal: Journal) -> None:
    """Loss of unknown extent can only soften."""
    found = _of(journal)
    assert (_along(found.soft) <= _along(found.stiff)).all()


@given(journals(), st.randoms(use_true_random=False))
def test_the_order_in_the_file_does_not_matter(journal: Journal, dice: random.Random) -> None:
    """Sequences and dates order; the places of visits and entries in a file do not."""
    shuffled = [replace(one, entries=tuple(dice.sample(one.entries, len(one.entries)))) for one in journal.visits]
    dice.shuffle(shuffled)
    assert _same(_of(journal), _of(Journal(tuple(shuffled))))


@given(journals())
def test_the_names_of_devices_do_not_matter(journal: Journal) -> None:
    """Which of two devices sorts first decides nothing."""
    other = {"A": "B", "B": "A"}
    renamed = [
        replace(one, entries=tuple(replace(each, device=other[each.device]) for each in one.entries))
        for one in journal.visits
    ]
    one, two = _of(journal), _of(Journal(tuple(renamed)))
    assert all(np.array_equal(_along(getattr(one, name)), _along(getattr(two, name))) for name in PROFILES)
    assert (one.state, one.severed, one.slack, one.seen) == (two.state, two.severed, two.slack, two.seen)


@given(journals())
def test_merging_a_journal_with_itself_changes_no_condition(journal: Journal) -> None:
    """Reading the same file twice is reading it once."""
    assert _same(_of(journal), _of(union(journal, journal)))


@given(journals(), st.integers(0, 12))
def test_folding_step_by_step_is_folding_at_once(journal: Journal, cut: int) -> None:
    """Taking unchanged bars over from an earlier fold gives what a fresh fold gives."""
    bridge = small_bridge()
    kept = {one.id for _, _, one in ordered(journal)[:cut]}
    part = [replace(one, entries=tuple(each for each in one.entries if each.id in kept)) for one in journal.visits]
    before = fold_all(bridge, Journal(tuple(part)))
    after, fresh = fold_all(bridge, journal, before), fold_all(bridge, journal)
    assert all(_same(after.bars[place], fresh.bars[place]) for place in fresh.bars)
    again = fold_all(bridge, journal, after)
    assert all(again.bars[place] is after.bars[place] for place in again.bars)


@given(
    journals(replacing=False),
    st.sampled_from(PLATES[:2]),
    st.floats(-0.5, 1.5),
    st.floats(5.001, 1000),
    st.none() | st.floats(0.01, 6),
)
def test_a_later_reading_above_nominal_raises_nothing(
    journal: Journal, plate: str, station: float, value: float, extent: float | None
) -> None:
    """Doubt never makes a bar thicker, in no plate and in no profile."""
    doubtful = Entry("last", TRUSS, TUBE, "A", 99, readings=(reading(station, value, plate=plate, extent=extent),))
    before = _of(journal)
    after = _of(_with_last(journal, doubtful))
    assert all((_along(getattr(after, name)) <= _along(getattr(before, name))).all() for name in PROFILES)
    assert after.has_reading == before.has_reading


@given(journals(replacing=False), st.sampled_from(PLATES[:2]), st.floats(0, 1), st.floats(0.31, 2))
def test_steel_that_grows_raises_nothing(journal: Journal, plate: str, station: float, more: float) -> None:
    """A visit that reads more than holds at a place, by more than the error, makes no bar thicker."""
    read = [one for one in _of(journal).readings if one.plate == plate and not one.doubtful and not one.replaced]
    place = min((one.station for one in read), key=lambda one: abs(one - station), default=station)
    there = [one.used for one in read if one.station == place and one.used is not None]
    value = (min(there) if there else 0.005) * 1000 + more
    last = Entry("last", TRUSS, TUBE, "A", 99, readings=(reading(place, value, plate=plate),))
    before, after = _of(journal), _of(Journal((*journal.visits, visit("2030-01-01", last))))
    assert all((_along(getattr(after, name)) <= _along(getattr(before, name))).all() for name in PROFILES)


def _with_last(journal: Journal, last: Entry) -> Journal:
    *others, final = journal.visits
    return Journal((*others, replace(final, entries=(*final.entries, last))))


@given(journals(replacing=False), st.floats(-0.5, 1.5), st.sampled_from([-1.0, -0.001]))
def test_a_negative_thickness_changes_no_plate(journal: Journal, station: float, value: float) -> None:
    """It counts for nothing until it is put right."""
    last = Entry("last", TRUSS, TUBE, "A", 99, readings=(reading(station, value),))
    before, after = _of(journal), _of(_with_last(journal, last))
    assert all(np.array_equal(_along(getattr(after, name)), _along(getattr(before, name))) for name in PROFILES)


@given(journals())
def test_taking_everything_back_gives_the_bar_as_built(journal: Journal) -> None:
    """Retractions of all that was recorded leave nothing but the drawing."""
    # Retractions of retractions would bring entries back.
    said = [
        replace(one, entries=tuple(each for each in one.entries if each.retracts is None)) for one in journal.visits
    ]
    names = [each.id for one in said for each in one.entries]
    back = [Entry(f"back-{name}", TRUSS, TUBE, "A", 50, retracts=name) for name in names]
    found = _of(Journal((*said, visit("2030-01-01", *back))))
    assert found.section == "tube"
    assert np.array_equal(found.strength.thickness, np.full((1, 4), 0.005))
    assert found.soft is found.stiff is found.strength
    assert (found.state, found.severed, found.slack, found.crack, found.bow) == (None, False, False, None, None)
    assert not found.seen


@given(journals())
def test_other_bars_are_left_alone(journal: Journal) -> None:
    """What is recorded about one bar changes no other one."""
    rod = whole(journal).bars[TRUSS, ROD]
    assert np.array_equal(rod.strength.thickness, [[0.02]])
    assert not rod.has_reading


@given(journals())
def test_sentences_are_fit_to_read(journal: Journal) -> None:
    """Every finding is a sentence with its place, without endless digits."""
    found = whole(journal)
    for one in found.bars[TRUSS, TUBE].findings:
        assert one.text[0].isupper()
        assert one.text.endswith((".", ")"))
        assert (one.truss, one.bar) == (TRUSS, TUBE)
        numbers = [word.strip("-.,;()") for word in one.text.split() if word[0].isdigit() and "-" not in word]
        assert all(len(number.replace(".", "")) <= 8 for number in numbers), one.text


@given(journals())
def test_what_counts_as_measured_rests_on_a_sound_reading(journal: Journal) -> None:
    """No piece claims a reading where every reading is doubtful."""
    found = _of(journal)
    claimed = READING in found.strength.rests_on
    assert not claimed or found.has_reading
