"""Two devices in one visit: both answers stay, the lower resistance counts, until an entry chooses."""

from __future__ import annotations

import pytest
from strategies.journals import TRUSS, TUBE, at, day, entry, length, reading, texts, tube, visit, years

from models.journal import Bow, Crack, Entry, Journal, Replaced


def _two(**more: Entry) -> tuple[Entry, ...]:
    low = entry(reading(0.5, 3.0), device="A", name="low")
    high = entry(reading(0.51, 4.5), device="B", name="high")
    return (low, high, *more.values())


def test_two_readings_of_one_place_both_stay() -> None:
    """The lower thickness holds and a sentence names both."""
    found = tube(day(*_two()))
    assert at(found, 0.5) == 3.0
    assert texts(found) == [
        (
            "Two answers about the bottom wall at 0.50 in the visit of 2026-05-14: 3.00 mm, 4.50 mm. "
            "The one that gives the lower resistance counts until an entry chooses."
        )
    ]
    assert not any(one.doubtful or one.replaced for one in found.readings)


def test_equal_readings_are_no_two_answers() -> None:
    """Devices that agree need no choice."""
    assert not texts(tube(day(entry(reading(0.5, 4.0)), entry(reading(0.5, 4.0), device="B"))))


def test_different_extents_are_two_answers() -> None:
    """One thickness over two extents is a disagreement too; both extents are covered."""
    found = tube(day(entry(reading(0.5, 4.0, extent=0.1)), entry(reading(0.5, 4.0, extent=1.0), device="B")))
    assert len(texts(found)) == 1
    assert at(found, 0.4) == 4.0


@pytest.mark.parametrize(("chosen", "expected"), [("low", 3.0), ("high", 4.5)])
def test_a_choice_puts_the_rival_out(chosen: str, expected: float) -> None:
    """The chosen reading alone holds, and nothing is left to ask."""
    found = tube(day(*_two(choice=entry(name="c", at=1, chooses=chosen))))
    assert at(found, 0.5) == expected
    assert not texts(found)


def test_a_choice_on_a_later_visit_counts() -> None:
    """The office may choose when it likes."""
    later = visit("2027-01-01", entry(name="c", chooses="high"))
    assert at(tube(Journal((visit("2026-05-14", *_two()), later))), 0.5) == 4.5


def test_a_choice_puts_out_only_what_is_about_the_same_thing() -> None:
    """The rival entry's other statements stay."""
    other = entry(reading(0.51, 4.5), reading(0.1, 3.5), device="B", name="high", state="poor")
    found = tube(day(_two()[0], other, entry(name="c", at=1, chooses="low")))
    assert at(found, 0.1) == 3.5
    assert found.state == "poor"
    assert at(found, 0.5) == at(found, 0.53) - 2.0 == 3.0


def test_a_choice_reaches_its_own_visit_alone() -> None:
    """What an earlier visit read stays wherever it reached further."""
    first = visit("2024-05-14", entry(reading(0.5, 4.0, extent=0.4)))
    second = visit("2026-05-14", entry(reading(0.5, 4.1, extent=0.2), device="B", name="b"))
    found = tube(Journal((first, second, visit("2027-01-01", entry(name="c", chooses="b")))))
    assert at(found, 0.5) == 4.1
    assert at(found, 0.46) == 4.0


def test_the_later_choice_counts() -> None:
    """A choice replaces an earlier one by the same device."""
    choices = [entry(name="c1", at=1, chooses="high"), entry(name="c2", at=2, chooses="low")]
    assert at(tube(day(*_two(), *choices)), 0.5) == 3.0


def test_two_choices_without_order_choose_nothing() -> None:
    """Where two devices choose differently in one visit, both answers stay and the lower one counts."""
    choices = [entry(name="c1", at=1, chooses="high"), entry(name="c2", device="B", at=1, chooses="low")]
    found = tube(day(*_two(), *choices))
    assert at(found, 0.5) == 3.0
    assert len(texts(found)) == 1


def test_a_choice_taken_back_leaves_two_answers() -> None:
    """A retracted choice does not count."""
    choices = [entry(name="c", at=1, chooses="high"), entry(name="r", at=2, retracts="c")]
    assert at(tube(day(*_two(), *choices)), 0.5) == 3.0


def test_a_choice_of_a_doubtful_reading_puts_nothing_out() -> None:
    """Steel thicker than built cannot put a thinner reading out."""
    found = tube(
        day(
            entry(reading(0.5, 3.0), name="low"),
            entry(reading(0.5, 5.4), device="B", name="high"),
            entry(at=1, chooses="high"),
        )
    )
    assert at(found, 0.5) == 3.0


def test_a_later_visit_replaces_both_answers() -> None:
    """The next visit's reading stands in place of either; it is compared with the lower one."""
    first = (entry(reading(0.5, 4.0)), entry(reading(0.5, 4.2), device="B"))
    found = tube(years(first, (entry(reading(0.5, 4.1)),)))
    assert at(found, 0.5) == 4.1
    assert not texts(found)
    assert at(tube(years(first, (entry(reading(0.5, 4.4)),))), 0.5) == 4.0


def test_two_devices_after_one_reading_each_take_its_extent() -> None:
    """Neither device's answer depends on which of them is read first."""
    later = (entry(reading(0.5, 3.9)), entry(reading(0.5, 3.8), device="B"))
    found = tube(years((entry(reading(0.5, 4.0, extent=0.4)),), later))
    assert [one.extent for one in found.readings] == [0.4, 0.4, 0.4]
    assert at(found, 0.46) == 3.8


def test_two_estimates_are_two_answers() -> None:
    """The larger loss counts; a choice settles it."""
    both = (entry(estimated_loss=0.2, name="a"), entry(estimated_loss=0.4, device="B", name="b"))
    found = tube(day(*both))
    assert at(found, 0.5) == 3.0
    assert "Two answers about the estimated loss" in texts(found)[0]
    chosen = tube(day(*both, entry(at=1, chooses="a")))
    assert at(chosen, 0.5) == 4.0
    assert not texts(chosen)


def test_reading_and_estimate_of_two_devices_take_the_smaller() -> None:
    """They have no order, so the reading does not replace the estimate."""
    assert at(tube(day(entry(reading(0.5, 4.5)), entry(estimated_loss=0.4, device="B"))), 0.5) == 3.0


@pytest.mark.parametrize(
    ("field", "better", "worse"),
    [
        ("state", "fair", "severe"),
        ("severed", False, True),
        ("slack", False, True),
        ("crack", "no crack", Crack()),
        ("crack", Crack(length("10 mm")), Crack(length("20 mm"))),
        ("bow", Bow(length("10 mm")), Bow(length("-20 mm"))),
    ],
)
@pytest.mark.parametrize("swapped", [False, True])
def test_of_two_answers_the_worse_counts(field: str, better: object, worse: object, swapped: bool) -> None:
    """State, severed, slack, crack and bow alike; a sentence asks for a choice, and a choice settles it."""
    devices = "BA" if swapped else "AB"
    both = [
        entry(device=devices[0], name="better", **{field: better}),
        entry(device=devices[1], name="worse", **{field: worse}),
    ]
    found = tube(day(*both))
    assert getattr(found, field) == worse
    assert [text for text in texts(found) if text.startswith("Two answers")]
    chosen = tube(day(*both, entry(at=1, chooses="better")))
    assert getattr(chosen, field) == (None if better == "no crack" else better)
    assert not texts(chosen)


def test_two_replacements_take_the_one_with_less_steel() -> None:
    """Until an entry chooses."""
    both = [
        entry(replaced=Replaced("tube"), name="thick"),
        entry(replaced=Replaced("thin tube"), device="B", name="thin"),
    ]
    found = tube(day(*both))
    assert found.section == "thin tube"
    assert len(texts(found)) == 1
    assert tube(day(*both, entry(at=1, chooses="thick"))).section == "tube"


def test_the_same_id_twice_keeps_both() -> None:
    """Two different entries under one id, device and sequence have no order: the worse counts."""
    twins = [Entry("e", TRUSS, TUBE, "A", 0, state=state) for state in ("poor", "good")]
    assert tube(day(*twins)).state == "poor"
