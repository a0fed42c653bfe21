"""Where a reading holds, and what it replaces."""

from __future__ import annotations

import numpy as np
import pytest
from strategies.journals import (
    DEPTH,
    LENGTH,
    PLATES,
    ROD,
    at,
    day,
    entry,
    reading,
    small_bridge,
    texts,
    tube,
    years,
)

from models.condition import DOUBTFUL, ESTIMATE, NOMINAL, READING
from models.journal import Journal

REACH = DEPTH / LENGTH
"""One section depth as a part of the tube's length."""


def test_a_bar_without_entries_is_as_built() -> None:
    """Nothing on record leaves one piece of nominal thickness that rests on the drawing."""
    found = tube(Journal())
    assert found.strength.stations.tolist() == [0, 1]
    assert found.strength.thickness.tolist() == [[0.005] * 4]
    assert (found.strength.rests_on == NOMINAL).all()
    assert (found.strength.visit == -1).all()
    assert found.stiff is found.strength
    assert found.soft is found.stiff
    assert not found.has_reading


def test_a_reading_holds_over_its_extent() -> None:
    """Centred on its station, on its own plate; elsewhere the drawing holds."""
    found = tube(day(entry(reading(0.5, 4.0, extent=0.4))))
    assert found.strength.stations == pytest.approx([0, 0.45, 0.55, 1])
    assert found.strength.thickness[1] == pytest.approx([0.005, 0.004, 0.005, 0.005])
    assert found.strength.thickness[[0, 2]] == pytest.approx(np.full((2, 4), 0.005))
    assert found.strength.rests_on[1].tolist() == [NOMINAL, READING, NOMINAL, NOMINAL]
    assert found.strength.visit[1].tolist() == [-1, 0, -1, -1]
    assert found.stiff is found.strength
    assert found.soft is found.stiff


@pytest.mark.parametrize(("station", "expected"), [(0.0, [0, 0.05, 1]), (1.0, [0, 0.95, 1])])
def test_an_extent_is_cut_at_the_ends(station: float, expected: list[float]) -> None:
    """A reading at a bar's end reaches into the bar alone."""
    assert tube(day(entry(reading(station, 4.0, extent=0.4)))).strength.stations == pytest.approx(expected)


def test_an_extent_longer_than_the_bar_is_the_whole_bar() -> None:
    """A reading can hold from end to end."""
    assert tube(day(entry(reading(0.5, 4.0, extent=99)))).strength.stations.tolist() == [0, 1]


def test_a_reading_without_extent_holds_one_depth_to_each_side() -> None:
    """For strength one section depth to each side; for flexibility nowhere, or over the whole bar."""
    found = tube(day(entry(reading(0.5, 4.0))))
    assert found.strength.stations == pytest.approx([0, 0.5 - REACH, 0.5 + REACH, 1])
    assert found.stiff.thickness.tolist() == [[0.005] * 4]
    assert found.soft.thickness == pytest.approx(np.array([[0.005, 0.004, 0.005, 0.005]]))


def test_a_reading_without_loss_leaves_one_flexibility() -> None:
    """Where an unknown extent changes nothing, there is nothing to solve twice."""
    found = tube(day(entry(reading(0.5, 5.0))))
    assert found.soft is found.stiff
    assert at(found, 0.5) == 5.0
    assert found.has_reading


def test_an_extent_of_nearly_nothing_still_counts() -> None:
    """However short its extent, a hole does not vanish between two stations."""
    found = tube(day(entry(reading(0.5, 0.0, extent=1e-30))))
    assert found.strength.thickness.min() == 0


def test_readings_of_one_entry_at_one_station_are_averaged() -> None:
    """All values of one place are one measurement; their least and greatest are kept."""
    found = tube(day(entry(reading(0.5, 4.0, 4.2), reading(0.5, 4.4, face="inside"))))
    assert at(found, 0.5) == 4.2
    (kept,) = found.readings
    assert (kept.mean, kept.least, kept.greatest) == pytest.approx((0.0042, 0.004, 0.0044))


def test_a_measurement_is_cleaned_where_all_of_it_is() -> None:
    """One value on rust is enough to doubt that the place was clean."""
    clean, rusty = reading(0.5, 4.0, cleaned=True), reading(0.5, 4.2, cleaned=None)
    assert tube(day(entry(clean))).strength.cleaned[1, 1]
    assert not tube(day(entry(clean, rusty))).strength.cleaned.any()


def test_overlapping_readings_take_the_smaller() -> None:
    """Two places further apart than half a depth both hold; where they overlap the smaller does."""
    found = tube(day(entry(reading(0.5, 4.0, extent=0.4)), entry(reading(0.54, 3.0, extent=0.4), at=1)))
    assert at(found, 0.46) == 4.0
    assert at(found, 0.52) == 3.0
    assert at(found, 0.58) == 3.0


def test_a_later_reading_near_replaces() -> None:
    """Within half a section depth the later reading stands in place of the earlier one."""
    found = tube(years((entry(reading(0.5, 4.0, extent=0.4)),), (entry(reading(0.5 + REACH / 2, 4.2, extent=0.6)),)))
    assert at(found, 0.5) == 4.2
    assert found.strength.visit.max() == 1
    assert [one.replaced for one in found.readings] == [True, False]


def test_a_later_reading_further_off_does_not_replace() -> None:
    """Beyond half a section depth both places stand, and the smaller holds where both do."""
    found = tube(years((entry(reading(0.5, 4.0, extent=0.4)),), (entry(reading(0.5 + REACH * 0.6, 4.2, extent=0.6)),)))
    assert at(found, 0.5) == 4.0
    assert [one.replaced for one in found.readings] == [False, False]


def test_a_later_reading_on_another_plate_does_not_replace() -> None:
    """Each plate has its own readings."""
    found = tube(years((entry(reading(0.5, 4.0)),), (entry(reading(0.5, 4.2, plate="top wall")),)))
    assert at(found, 0.5, "bottom wall") == 4.0
    assert at(found, 0.5, "top wall") == 4.2


def test_a_later_reading_takes_over_the_extent() -> None:
    """A reading without extent takes that of the reading that it replaces, centred on its own station."""
    found = tube(years((entry(reading(0.5, 4.0, extent=0.4)),), (entry(reading(0.5, 3.9)),)))
    assert found.strength.stations == pytest.approx([0, 0.45, 0.55, 1])
    assert at(found, 0.46) == 3.9
    assert found.soft is found.stiff
    assert found.stiff is found.strength


@pytest.mark.parametrize(("later", "beyond"), [(4.2, 4.0), (3.5, 3.5)])
def test_where_the_earlier_one_reached_further_the_smaller_holds(later: float, beyond: float) -> None:
    """A shorter later reading rules its own length; beyond it the smaller of the two."""
    found = tube(years((entry(reading(0.5, 4.0, extent=0.4)),), (entry(reading(0.5, later, extent=0.2)),)))
    assert at(found, 0.5) == later
    assert at(found, 0.46) == at(found, 0.54) == beyond
    assert at(found, 0.44) == 5.0


def test_what_the_earlier_one_still_holds_is_as_old_and_as_clean_as_the_worse_of_both() -> None:
    """Beyond the later reading the evidence is the earlier visit's, and clean only where both were."""
    first = entry(reading(0.5, 4.0, extent=0.4, cleaned=True))
    found = tube(years((first,), (entry(reading(0.5, 4.2, extent=0.2, cleaned=False)),)))
    assert found.strength.visit[:, 1].tolist() == [-1, 0, 1, 0, -1]
    assert not found.strength.cleaned.any()
    found = tube(years((first,), (entry(reading(0.5, 4.2, extent=0.2, cleaned=True)),)))
    assert found.strength.cleaned[:, 1].tolist() == [False, True, True, True, False]


def test_an_extent_found_later_ends_the_doubt_about_flexibility() -> None:
    """Once the extent of a loss is known, there is one flexibility."""
    found = tube(years((entry(reading(0.5, 4.0)),), (entry(reading(0.5, 3.9, extent=0.1)),)))
    assert found.soft is found.stiff
    assert at(found, 0.5, profile="stiff") == 3.9
    assert at(found, 0.6, profile="stiff") == 5.0


def test_a_third_reading_replaces_what_the_second_left() -> None:
    """What an earlier reading still holds gives way to the next reading near it."""
    visits = [(entry(reading(0.5, 4.0, extent=0.4)),), (entry(reading(0.5, 3.8, extent=0.2)),)]
    found = tube(years(*visits, (entry(reading(0.5, 3.9, extent=0.6)),)))
    assert at(found, 0.46) == at(found, 0.5) == 3.9


def test_zero_is_a_hole() -> None:
    """The plate is gone there, even where other values of the same place found steel; a note says so."""
    for values in ((0.0,), (4.0, 0.0, 4.0)):
        found = tube(day(entry(reading(0.5, *values))))
        assert at(found, 0.5) == 0
        assert texts(found, "note") == [
            "A hole is recorded in the bottom wall at 0.50; that plate counts as gone there."
        ]


def test_a_round_bar_is_read_by_its_diameter() -> None:
    """A reading on a round bar is what is left of its diameter."""
    found = tube(day(entry(reading(0.5, 18.0, plate="bar"), bar=ROD)), bar=ROD)
    assert at(found, 0.5) == 18.0
    assert found.strength.thickness.shape == (3, 1)


def test_a_retracted_reading_counts_for_nothing() -> None:
    """Taking every entry back gives the bar as built."""
    found = tube(day(entry(reading(0.5, 3.0), name="e"), entry(at=1, retracts="e")))
    assert found.strength.thickness.tolist() == [[0.005] * 4]
    assert not found.seen


def test_stations_always_cover_the_bar() -> None:
    """Pieces follow each other from 0 to 1 whatever was read."""
    found = tube(
        day(
            *(
                entry(reading(part / 7, 4.0, plate=plate), at=number)
                for number, (part, plate) in enumerate(zip(range(8), PLATES * 2, strict=True))
            )
        )
    )
    assert found.strength.stations[0] == 0
    assert found.strength.stations[-1] == 1
    assert (np.diff(found.strength.stations) > 0).all()


# --- estimates ---


def test_an_estimate_without_extent_covers_the_whole_bar() -> None:
    """Every plate is scaled, for strength and flexibility alike."""
    found = tube(day(entry(estimated_loss=0.2)))
    assert found.strength.thickness == pytest.approx(np.full((1, 4), 0.004))
    assert (found.strength.rests_on == ESTIMATE).all()
    assert found.stiff is found.strength
    assert found.soft is found.stiff
    assert found.has_estimate
    assert found.known == "estimated"


def test_an_estimated_loss_scales_a_round_bar_by_its_root() -> None:
    """A fifth of the area gone leaves sqrt(0.8) of the diameter."""
    found = tube(day(entry(estimated_loss=0.2, bar=ROD)), bar=ROD)
    assert found.strength.thickness[0, 0] == pytest.approx(0.02 * 0.8**0.5)


def test_an_estimate_with_extent_is_centred_on_its_station() -> None:
    """At mid-length where no station is given."""
    found = tube(day(entry(estimated_loss=0.2, extent=reading(0, 1, extent=0.4).extent)))
    assert found.strength.stations == pytest.approx([0, 0.45, 0.55, 1])
    moved = tube(day(entry(estimated_loss=0.2, station=0.1, extent=reading(0, 1, extent=0.4).extent)))
    assert moved.strength.stations == pytest.approx([0, 0.05, 0.15, 1])


def test_a_later_estimate_of_the_whole_bar_replaces_an_earlier_one() -> None:
    """By the same device, or on a later visit; also a smaller loss."""
    assert at(tube(years((entry(estimated_loss=0.4),), (entry(estimated_loss=0.1),))), 0.5) == 4.5
    assert at(tube(day(entry(estimated_loss=0.4), entry(estimated_loss=0.1, at=1))), 0.5) == 4.5


def test_a_later_local_estimate_counts_where_it_is_smaller() -> None:
    """An estimate with an extent replaces none; the smaller holds."""
    local = reading(0, 1, extent=0.4).extent
    found = tube(years((entry(estimated_loss=0.2),), (entry(estimated_loss=0.1, extent=local),)))
    assert at(found, 0.5) == 4.0
    found = tube(years((entry(estimated_loss=0.2),), (entry(estimated_loss=0.4, extent=local),)))
    assert at(found, 0.5) == 3.0
    assert at(found, 0.1) == 4.0


def test_a_reading_replaces_an_earlier_estimate_where_it_covers() -> None:
    """Over its plate and its length, and nowhere else."""
    found = tube(years((entry(estimated_loss=0.4),), (entry(reading(0.5, 4.5, extent=0.4)),)))
    assert at(found, 0.5) == 4.5
    assert at(found, 0.5, "top wall") == 3.0
    assert at(found, 0.4) == 3.0


def test_a_reading_without_extent_leaves_an_estimate_in_the_flexibility() -> None:
    """It covers no length there, and the softer variant never becomes the stiffer one."""
    found = tube(years((entry(estimated_loss=0.4),), (entry(reading(0.5, 4.5)),)))
    assert at(found, 0.5) == 4.5
    assert found.stiff.thickness == pytest.approx(np.full((1, 4), 0.003))
    assert (found.soft.thickness <= found.stiff.thickness).all()


def test_a_later_estimate_counts_where_it_is_smaller_than_a_reading() -> None:
    """An estimate never raises what a reading found."""
    visits = [(entry(reading(0.5, 4.0, extent=0.4)),)]
    assert at(tube(years(*visits, (entry(estimated_loss=0.4),))), 0.5) == 3.0
    found = tube(years(*visits, (entry(estimated_loss=0.1),)))
    assert at(found, 0.5) == 4.0
    assert at(found, 0.1) == 4.5


def test_reading_and_estimate_in_one_entry_take_the_smaller() -> None:
    """Neither is later than the other."""
    assert at(tube(day(entry(reading(0.5, 4.5), estimated_loss=0.4))), 0.5) == 3.0


# --- doubtful readings ---


def test_a_reading_above_nominal_is_kept_and_counts_as_nominal() -> None:
    """It rests on a doubtful reading, replaces nothing, and a sentence says so."""
    found = tube(day(entry(reading(0.9, 5.4))))
    assert at(found, 0.9) == 5.0
    assert DOUBTFUL in found.strength.rests_on
    assert READING not in found.strength.rests_on
    assert not found.has_reading
    assert texts(found) == [
        (
            "Reading 5.40 mm on the bottom wall at 0.90 is thicker than the 5.00 mm as built; "
            "it counts as 5.00 mm and replaces nothing."
        )
    ]
    (kept,) = found.readings
    assert kept.mean == pytest.approx(0.0054)
    assert kept.doubtful


def test_figures_are_in_the_units_of_the_bridge() -> None:
    """A bridge shown in US units has its sentences in inches."""
    found = tube(day(entry(reading(0.9, 5.4))), small_bridge(units="US"))
    assert "Reading 0.213 in on the bottom wall" in texts(found)[0]


def test_a_far_too_thick_reading_asks_for_the_unit() -> None:
    """Ten times what was built looks like another unit."""
    assert "Check the unit" in texts(tube(day(entry(reading(0.9, 127.0)))))[0]


def test_nominal_with_rounding_is_not_above_nominal() -> None:
    """The mean of equal values is not thicker than they are."""
    assert not texts(tube(day(entry(reading(0.9, 5.0, 5.0, 5.0, 5.0, 5.0, 5.0)))))


def test_one_absurd_value_does_not_hide_the_others() -> None:
    """Values that can be right lower the thickness; the measurement stays doubtful."""
    found = tube(day(entry(reading(0.5, 4.0, 4.0, 40.0))))
    assert at(found, 0.5) == 4.0
    assert found.strength.rests_on[1, 1] == DOUBTFUL
    assert "40.0 mm is thicker than as built and set aside" in texts(found)[0]


def test_steel_that_grew_replaces_nothing() -> None:
    """More than the last sound reading there by more than the error, with no repair on record."""
    found = tube(years((entry(reading(0.5, 3.0, extent=0.4)),), (entry(reading(0.5, 4.5, extent=0.4)),)))
    assert at(found, 0.5) == 3.0
    assert len(texts(found)) == 1
    assert "no repair is on record" in texts(found)[0]
    assert [one.doubtful for one in found.readings] == [False, True]


def test_within_the_error_steel_may_seem_to_grow() -> None:
    """A rise inside the error replaces quietly; 0.3 mm unless the instrument says otherwise, and said so."""
    found = tube(years((entry(reading(0.5, 3.0)),), (entry(reading(0.5, 3.3)),)))
    assert at(found, 0.5) == 3.3
    assert not texts(found)
    assert any("0.30 mm" in text for text in texts(found, "assumed"))
    gauged = tube(years((entry(reading(0.5, 3.0)),), (entry(reading(0.5, 3.3, instrument="good gauge")),)))
    assert at(gauged, 0.5) == 3.0
    assert not texts(gauged, "assumed")


def test_steel_is_compared_with_the_last_reading_there() -> None:
    """Not with one that the last has replaced: small rises inside the error may follow each other."""
    found = tube(years(*((entry(reading(0.5, value)),) for value in (3.0, 3.25, 3.5))))
    assert at(found, 0.5) == 3.5
    assert not texts(found)


def test_a_drop_inside_the_error_asks_nothing() -> None:
    """0.3 mm may be the gauge, 0.4 mm is not."""
    assert not texts(tube(years((entry(reading(0.5, 4.5)),), (entry(reading(0.5, 4.2)),))))
    assert texts(tube(years((entry(reading(0.5, 4.5)),), (entry(reading(0.5, 4.1)),))))


def test_a_drop_beyond_the_error_asks_for_a_second_look() -> None:
    """It counts; and a second reading that agrees answers the question."""
    visits = [(entry(reading(0.5, 4.5)),), (entry(reading(0.5, 3.0)),)]
    found = tube(years(*visits))
    assert at(found, 0.5) == 3.0
    assert len(texts(found)) == 1
    assert "1.50 mm less than the 4.50 mm read there before" in texts(found)[0]
    assert not texts(tube(years(visits[0], (*visits[1], entry(reading(0.5, 3.1), at=1)))))


def test_a_sound_reading_answers_a_doubtful_one() -> None:
    """A later sound reading at the same place ends the question."""
    found = tube(day(entry(reading(0.5, 5.4)), entry(reading(0.5, 4.9), at=1)))
    assert at(found, 0.5) == 4.9
    assert not texts(found)


def test_a_doubtful_reading_leaves_an_estimate() -> None:
    """It replaces no estimate either, not through a later reading that could take over its extent."""
    visits = [(entry(estimated_loss=0.4),), (entry(reading(0.5, 5.4, extent=4.0)),)]
    assert at(tube(years(*visits)), 0.5) == 3.0
    found = tube(years(*visits, (entry(reading(0.5, 4.9)),)))
    assert at(found, 0.5) == 4.9
    assert at(found, 0.3) == 3.0


def test_a_negative_thickness_counts_for_nothing() -> None:
    """Alone it leaves no measurement; among others it is left out; a sentence says so."""
    found = tube(day(entry(reading(0.5, -3.0))))
    assert at(found, 0.5) == 5.0
    assert not found.has_reading
    assert "counts for nothing until it is put right" in texts(found)[0]
    assert at(tube(day(entry(reading(0.5, -3.0, 4.0)))), 0.5) == 4.0


@pytest.mark.parametrize(("station", "used"), [(1.2, 1.0), (-0.3, 0.0)])
def test_a_station_beyond_the_ends_is_taken_at_the_nearer_end(station: float, used: float) -> None:
    """Its thickness counts; a sentence says so."""
    found = tube(day(entry(reading(station, 4.0))))
    assert at(found, used) == 4.0
    assert texts(found) == [
        f"Station {station:.2f} lies beyond the bar's ends; what is recorded there is taken at {used:.0f}."
        if station > 0
        else f"Station {station:.3f} lies beyond the bar's ends; what is recorded there is taken at {used:.0f}."
    ]


@pytest.mark.parametrize("loss", [-0.1, 1.3])
def test_a_loss_that_is_no_fraction_counts_for_nothing(loss: float) -> None:
    """Neither as a loss nor as a replacement of an earlier estimate; a sentence says so."""
    found = tube(years((entry(estimated_loss=0.4),), (entry(estimated_loss=loss),)))
    assert at(found, 0.5) == 3.0
    assert "counts for nothing until it is put right" in texts(found)[0]
    assert not tube(day(entry(estimated_loss=loss))).has_estimate


def test_an_extent_that_is_no_length_is_not_known() -> None:
    """The loss counts, its extent is unknown; such an estimate covers the bar but replaces none."""
    found = tube(day(entry(reading(0.5, 4.0, extent=-1))))
    assert at(found, 0.5 + REACH * 0.9) == 4.0
    assert len(texts(found)) == 1
    wrong = reading(0, 1, extent=-1).extent
    assert at(tube(years((entry(estimated_loss=0.4),), (entry(estimated_loss=0.1, extent=wrong),))), 0.5) == 3.0


def test_a_very_thin_reading_is_asked_about() -> None:
    """It may be what is lost, not what is left; it counts."""
    found = tube(day(entry(reading(0.5, 1.0))))
    assert at(found, 0.5) == 1.0
    assert "not what is lost" in texts(found)[0]


def test_a_reading_on_a_plate_that_is_not_there_counts_for_nothing() -> None:
    """After a replacement a plate may be gone from the section; a sentence says so."""
    found = tube(day(entry(reading(0.5, 4.0, plate="web"))))
    assert at(found, 0.5) == 5.0
    assert "no such plate" in texts(found)[0]
