"""The number pad: what is typed becomes a reading, and strange values are asked about, never refused."""

from __future__ import annotations

import pytest

from inspector.app.bridge.pad import ERASE, SPACE, Pad, values_text

PAD = Pad("top wall", 0.006, "L0", "L1", 3.0)
INCHES = Pad("web", 0.3125 * 0.0254, "L0", "L1", 3.048, units="US")


def typed(pad: Pad, text: str) -> Pad:
    """The pad after these keys."""
    for sign in text:
        pad = pad.press({" ": SPACE}.get(sign, sign))
    return pad


@pytest.mark.parametrize(
    ("pad", "text", "written", "si"),
    [
        (PAD, "5.2", "5.2 mm", 0.0052),
        (INCHES, "5/16", "5/16 in", 0.0079375),
        (INCHES, "0.25", "0.25 in", 0.00635),
        (INCHES, "1/4", "1/4 in", 0.00635),
    ],
)
def test_a_number_in_the_unit_of_the_site_becomes_a_reading(pad: Pad, text: str, written: str, si: float) -> None:
    """Millimetres, inches and fractions of an inch, kept as typed."""
    after, reading = typed(pad, text).enter()
    assert reading is not None
    assert (reading.plate, reading.station) == (pad.plate, 0.5)
    assert [one.text for one in reading.thickness] == [written]
    assert reading.thickness[0].si == pytest.approx(si, rel=1e-12)
    assert after.typed == ""


def test_whole_inches_with_a_fraction(request: pytest.FixtureRequest) -> None:
    """A thick plate: one and a quarter inch."""
    pad = Pad("plate", 0.035, "A", "B", 2.0, units="US")
    reading = typed(pad, "1 1/4").enter()[1]
    assert reading is not None
    assert reading.thickness[0].text == "1 1/4 in"


@pytest.mark.parametrize(("key", "station"), [("start", 0.0), ("middle", 0.5), ("end", 1.0)])
def test_the_three_ready_places(key: str, station: float) -> None:
    """Either end or the middle is one tap."""
    reading = typed(PAD.at(key), "5").enter()[1]
    assert reading is not None
    assert reading.station == station


def test_another_place_is_typed_as_a_distance_from_the_start() -> None:
    """A distance in metres, entered like a number, becomes a station; the keys then go to the thickness again."""
    pad, nothing = typed(PAD.at("other"), "0.75").enter()
    assert nothing is None
    assert (pad.target, pad.where) == ("thickness", "0.75 m from L0")
    reading = typed(pad, "5").enter()[1]
    assert reading is not None
    assert reading.station == pytest.approx(0.25)


def test_a_place_beyond_the_bar_is_told_with_its_length() -> None:
    """Nobody types 30 for 3.0 unnoticed."""
    pad, nothing = typed(PAD.at("other"), "30").enter()
    assert nothing is None
    assert pad.error == "The bar is only 3.00 m long."
    assert pad.target == "distance"


def test_a_thickness_without_its_place_asks_for_the_place() -> None:
    """Another place was chosen and not typed: the pad asks instead of guessing."""
    pad = typed(PAD.at("other"), "1")
    pad = pad.press(ERASE).at("other")
    moved = typed(Pad(**{**_fields(pad), "target": "thickness"}), "5")
    asked, nothing = moved.enter()
    assert nothing is None
    assert asked.error == "How far from L0?"


def _fields(pad: Pad) -> dict[str, object]:
    return {name: getattr(pad, name) for name in Pad.__dataclass_fields__}


@pytest.mark.parametrize("text", ["", "5..2", ".", "1/0", "/", "5 5"])
def test_what_is_no_number_is_stopped_at_the_pad(text: str) -> None:
    """Two points, a stroke alone, nothing at all: the pad says what it expects and keeps what was typed."""
    pad, nothing = typed(INCHES, text).enter()
    assert nothing is None
    assert pad.error
    assert pad.typed.strip() == text.strip()


@pytest.mark.parametrize(
    ("text", "words"), [("0", "hole"), ("52", "thicker than the 6.00 mm"), ("1", "left of 6.00 mm")]
)
def test_a_strange_value_is_asked_about_once_and_stored_when_entered_again(text: str, words: str) -> None:
    """A hole, a value far above the drawing, a loss typed for what remains: asked, then kept as read."""
    asked, nothing = typed(PAD, text).enter()
    assert nothing is None
    assert words in asked.question
    after, reading = asked.enter()
    assert reading is not None
    assert reading.thickness[0].text == f"{text} mm"
    assert after.question == ""


def test_another_key_takes_the_question_away() -> None:
    """After a question the number can be typed again."""
    asked, _ = typed(PAD, "52").enter()
    assert asked.press(ERASE).question == ""
    assert asked.press(ERASE).typed == "5"


def test_the_display_shows_the_unit_and_grows_no_further_than_it_can_show() -> None:
    """The unit stands beside every number; a stuck key does not run over."""
    assert typed(PAD, "5.2").shown == "5.2 mm"
    assert len(typed(PAD, "1" * 40).typed) == 12


def test_cleaned_steel_is_said_only_where_it_was_said() -> None:
    """A reading says `cleaned` where that was tapped, else nothing about it."""
    plain, clean = typed(PAD, "5").enter()[1], typed(PAD.clean(), "5").enter()[1]
    assert plain is not None
    assert clean is not None
    assert (plain.cleaned, clean.cleaned) == (None, True)


def test_values_of_a_spot_are_counted_and_begin_anew_elsewhere() -> None:
    """The pad says what was stored at the spot; another place is another spot."""
    pad = PAD.stored("5.2").stored("5.0")
    assert values_text(pad) == "2 values stored here: 5.2, 5.0."
    assert "Three values" in values_text(pad.at("end"))
    assert pad.clean().values == ()
