"""The screens in a real window, with real touches."""

from __future__ import annotations

from collections.abc import Callable
from itertools import combinations
from typing import Any

import pytest
from app.desk_without_screen import SAMPLE, sample

from inspector import samples
from inspector.app.theme import THEMES
from models.words import CAUTION

Drive = Callable[..., Any]


def opened(drive: Drive, name: str = SAMPLE) -> Any:
    """The app with a sample open."""
    d = drive()
    d.settled()
    d.push(samples.sample(name).bridge.name)
    d.settled()
    return d


def entries(d: Any) -> list[Any]:
    """What this device stored."""
    (bridge,) = d.app.store.bridges()
    visits = d.app.store.journal(bridge.id).visits
    return [entry for visit in visits for entry in visit.entries if entry.device == "tablet a"]


def texts(root: Any) -> str:
    """All texts below a widget."""
    return "\n".join(str(one.text) for one in root.walk(restrict=True) if hasattr(one, "text"))


def test_the_app_opens_with_the_invented_bridges_to_choose_from(drive: Drive) -> None:
    """An empty store shows each sample as a button; a tap opens it at the first bar of the walk."""
    d = drive()
    d.settled()
    assert all(d.button(samples.sample(name).bridge.name) for name in samples.names())
    d.push(sample().bridge.name)
    d.settled()
    assert d.app.screens.current == "bridge"
    assert d.app.bridge_screen.bar == "L0-L1"
    assert d.app.bridge_screen.drawing.elevation.picture is not None


@pytest.mark.parametrize("screen", ["bridges", "bridge", "report", "pad", "question"])
def test_the_caution_stands_on_every_screen_and_cannot_be_touched_away(drive: Drive, screen: str) -> None:
    """The banner holds the whole statement, lies on top at full width, and a tap on it does nothing."""
    from inspector.app.widgets.banner import Caution

    d = opened(drive)
    {
        "bridges": lambda: d.push("◀ Bridges"),
        "bridge": lambda: None,
        "report": lambda: d.push("Report"),
        "pad": lambda: (d.push("Measure"), d.push("2  ")),
        "question": lambda: d.push("Severed"),
    }[screen]()
    d.settled()
    (banner,) = [one for one in d.app.screens.current_screen.walk(restrict=True) if isinstance(one, Caution)]
    before = texts(d.app.screens.current_screen)
    d.tap(banner)
    assert banner.text == CAUTION
    assert banner.width == d.window.width
    assert banner.to_window(0, banner.top)[1] == pytest.approx(d.window.height)
    assert texts(d.app.screens.current_screen) == before


def test_a_tap_on_a_bar_opens_its_sheet_beside_the_drawing(drive: Drive) -> None:
    """The bar under the finger is chosen, its sheet does not lie over the drawing."""
    d = opened(drive)
    d.tap_bar("L3-L4")
    d.settled()
    screen = d.app.bridge_screen
    assert screen.sheet.sheet.title == "L3-L4"
    assert screen.sheet.x >= screen.drawing.right
    assert screen.bar == "L3-L4"


def test_answers_are_stored_by_one_tap_each_and_shown_as_chosen(drive: Drive) -> None:
    """Hands on, poor: two taps, two entries, each marked with a tick once it is stored."""
    d = opened(drive)
    d.tap_bar("L3-L4")
    d.push("Hands on")
    d.settled()
    d.push("Poor")
    d.settled()
    assert [(entry.bar, entry.seen, entry.state) for entry in entries(d)] == [
        ("L3-L4", "hands on", None),
        ("L3-L4", None, "poor"),
    ]
    assert d.button("Poor").text == "✓ Poor"
    assert d.app.bridge_screen.stored == "Stored: state poor (L3-L4)"


def test_a_reading_typed_on_the_pad_changes_the_figure(drive: Drive) -> None:
    """A plate, 2.5, store: the factor before and after stand on the pad, on the sheet and on the drawing."""
    d = opened(drive)
    d.tap_bar("L3-L4")
    d.push("Measure")
    d.settled()
    d.push("2  bottom wall")
    for key in ("2", ".", "5"):
        d.push(key)
    assert d.app.bridge_screen.pad_panel.ids.shown.text == "2.5 mm"
    d.push("Store")
    d.settled()
    assert [entry.readings[0].thickness[0].text for entry in entries(d)] == ["2.5 mm"]
    before, after = d.app.bridge_screen.pad_panel.figure.split(" → ")
    assert float(after) < float(before)
    d.push("◀ Bar")
    d.settled()
    figures = {t.of: t.text for t in d.app.bridge_screen.drawing.elevation.picture.texts if t.role == "bar figure"}
    assert figures["L3-L4"] == after


def test_three_values_typed_at_one_spot_are_one_reading(drive: Drive) -> None:
    """Each is stored as it is typed; together they stand as one."""
    d = opened(drive)
    d.tap_bar("L3-L4")
    d.push("Measure")
    d.settled()
    d.push("1  top wall")
    for value in ("4", "5", "3"):
        d.push(value)
        d.push("Store")
        d.settled()
    last = entries(d)[-2]
    assert [one.text for one in last.readings[0].thickness] == ["4 mm", "5 mm", "3 mm"]
    assert "3 values stored here: 4 mm, 5 mm, 3 mm." in texts(d.app.bridge_screen.pad_panel)


def test_a_plate_is_tapped_on_the_drawing_of_the_section(drive: Drive) -> None:
    """The drawing of the section leads to the pad of the plate under the finger."""
    d = opened(drive)
    d.push("Measure")
    d.settled()
    section = d.app.bridge_screen.sheet._pages["measure"].ids.section
    start, end = section.pieces(["plate"])["left wall"][1]
    d.tap_at(*section.to_window((start[0] + end[0]) / 2, (start[1] + end[1]) / 2))
    d.settled()
    assert d.app.bridge_screen.pad_panel.title == "left wall, at the middle"


def test_not_seen_asks_why_and_stores_the_reason(drive: Drive) -> None:
    """A reason is one more tap; going back stores nothing."""
    d = opened(drive)
    d.push("Not seen")
    d.push("◀ Back")
    assert entries(d) == []
    d.push("Not seen")
    d.push("Under water")
    d.settled()
    assert [(entry.seen, entry.reason) for entry in entries(d)] == [("not seen", "under water")]


def test_a_reason_can_be_written(drive: Drive) -> None:
    """Any other reason is typed."""
    d = opened(drive)
    d.push("Not seen")
    d.frames(2)
    d.tap(d.app.bridge_screen.ask_panel.written)
    d.type("wasps")
    d.push("Store this reason")
    d.settled()
    assert entries(d)[0].reason == "wasps"


def test_severed_takes_two_taps_and_calls_for_somebody_to_act(drive: Drive) -> None:
    """One touch of a wet screen cuts no bar; when it is meant, the plain steps take the top."""
    d = opened(drive)
    d.push("Severed")
    assert entries(d) == []
    d.push("Severed, it carries nothing")
    d.settled()
    act_now = d.app.bridge_screen.ids.act_now
    assert "Keep people off the bridge." in texts(act_now)
    assert act_now.to_window(0, act_now.top)[1] > d.app.bridge_screen.main.top - 1
    d.push("Undo")
    d.settled()
    assert act_now.height == 0
    assert texts(act_now) == ""


def test_the_walk_goes_on_by_its_large_buttons(drive: Drive) -> None:
    """Next, next, previous; at the first bar there is no previous one."""
    d = opened(drive)
    assert d.button("◀ Previous").disabled
    order = []
    for words in ("Next", "Next", "◀ Previous"):
        d.push(words)
        d.frames(2)
        order.append(d.app.bridge_screen.bar)
    assert order == ["L0-U1", "L1-L2", "L0-U1"]


def crossing(pieces: dict[str, Any]) -> tuple[str, str, tuple[float, float]]:
    """Two bars that cross between their ends, and where."""
    for (one, ((a, b), *_)), (other, ((c, e), *_)) in combinations(pieces.items(), 2):
        ux, uy, vx, vy = b[0] - a[0], b[1] - a[1], e[0] - c[0], e[1] - c[1]
        turn = ux * vy - uy * vx
        if not turn:
            continue
        part = ((c[0] - a[0]) * vy - (c[1] - a[1]) * vx) / turn
        along = ((c[0] - a[0]) * uy - (c[1] - a[1]) * ux) / turn
        if 0.2 < part < 0.8 and 0.2 < along < 0.8:
            return one, other, (a[0] + part * ux, a[1] + part * uy)
    raise AssertionError("no bars cross")


def test_where_two_bars_cross_a_second_tap_takes_the_other(drive: Drive) -> None:
    """The crossing of two diagonals gives first one, then the other."""
    d = opened(drive, "wrought-iron-crossed")
    elevation = d.app.bridge_screen.drawing.elevation
    d.push("Whole")
    one, other, middle = crossing(elevation.pieces(["axis"]))
    found = []
    for _ in range(2):
        d.tap_at(*elevation.to_window(*middle))
        d.settled()
        found.append(d.app.bridge_screen.bar)
    assert sorted(found) == sorted([one, other])


def test_the_condition_view_shows_states(drive: Drive) -> None:
    """The switch changes the figures at the bars."""
    d = opened(drive)
    d.push("Condition")
    d.settled()
    picture = d.app.bridge_screen.drawing.elevation.picture
    assert any(text.text.startswith("fair") for text in picture.texts)
    assert d.button("Condition").chosen


@pytest.mark.parametrize("view", ["Rating factor", "Condition"])
@pytest.mark.parametrize("name", samples.names())
def test_a_drawing_opens_with_letters_that_can_be_read(drive: Drive, name: str, view: str) -> None:
    """Whatever the truss and the view, figures are 12 sp high or more as it opens, and the chosen bar is in sight."""
    d = opened(drive, name)
    d.push(view)
    d.settled()
    elevation = d.app.bridge_screen.drawing.elevation
    assert elevation.picture.height * elevation.scale >= 11.9
    start, end = elevation.pieces(["axis"])[d.app.bridge_screen.bar][0]
    assert elevation.collide_point((start[0] + end[0]) / 2, (start[1] + end[1]) / 2)


def test_the_other_truss_is_a_tap_away(drive: Drive) -> None:
    """The switch shows the other truss, and leads back."""
    d = opened(drive)
    d.push("Show downstream")
    d.settled()
    assert d.app.bridge.state.truss == "downstream"
    d.push("Show upstream")
    d.settled()
    assert d.app.bridge.state.truss == "upstream"


def test_the_drawing_is_zoomed_and_moved_by_buttons(drive: Drive) -> None:
    """Nearer, whole, further; moving shows another part and never leaves the truss behind."""
    d = opened(drive)
    elevation = d.app.bridge_screen.drawing.elevation
    d.push("Whole")
    assert elevation.zoom == 1
    assert d.button("–").disabled
    d.push("+")
    d.push("+")
    assert elevation.zoom == pytest.approx(2.25)
    before = elevation.offset()
    d.push("▶")
    assert elevation.offset()[0] < before[0]
    for _ in range(9):
        d.push("▶")
    right = elevation.to_pixels(elevation.picture.upper)[0]
    assert right == pytest.approx(elevation.right, abs=1)


def test_one_finger_drags_and_two_fingers_zoom(drive: Drive) -> None:
    """Dragging moves the drawing and chooses no bar; spreading two fingers makes it larger."""
    from kivy.tests.common import UnitTestTouch

    d = opened(drive)
    elevation = d.app.bridge_screen.drawing.elevation
    d.push("Whole")
    d.push("+")
    chosen, before = d.app.bridge_screen.bar, elevation.offset()
    x, y = elevation.to_window(*elevation.center)
    finger = UnitTestTouch(x, y)
    finger.touch_down()
    for step in range(1, 6):
        finger.touch_move(x - 30 * step, y)
        d.frames()
    finger.touch_up()
    d.frames(2)
    assert elevation.offset()[0] < before[0]
    assert d.app.bridge_screen.bar == chosen
    zoom = elevation.zoom
    one, other = UnitTestTouch(x - 40, y), UnitTestTouch(x + 40, y)
    one.touch_down()
    other.touch_down()
    other.touch_move(x + 120, y)
    d.frames()
    assert elevation.held
    one.touch_up()
    other.touch_up()
    d.frames(2)
    assert elevation.zoom > zoom
    assert not elevation.held


def test_a_note_is_kept_as_typed_and_never_read_as_markup(drive: Drive) -> None:
    """Brackets and signs of any script are shown as they are."""
    d = opened(drive)
    d.push("Notes")
    d.settled()
    note = "[b]rust[/b] & <größer> ✓"
    field = d.app.bridge_screen.sheet._pages["notes"].ids.note
    d.tap(field)
    d.type(note)
    d.push("Store the note")
    d.settled()
    assert entries(d)[0].note == note
    assert f"note: {note}" in texts(d.app.bridge_screen.sheet)
    assert not any(getattr(one, "markup", False) for one in d.app.root.walk(restrict=True))


def test_a_sign_that_the_font_lacks_leaves_a_visible_mark(drive: Drive) -> None:
    """A missing glyph is drawn as a box, not as nothing."""
    d = drive()
    from inspector.app.widgets.picture_view import texture_of

    del d
    pixels = texture_of("\U0001f309", 24, False).pixels
    assert max(pixels[3::4]) > 100


def test_the_report_is_made_and_can_be_opened(drive: Drive, monkeypatch: pytest.MonkeyPatch) -> None:
    """The button makes the PDF; a second one opens it, once it is there."""
    shown: list[Any] = []
    monkeypatch.setattr("inspector.app.app.opener", lambda: shown.append)
    d = opened(drive)
    d.push("Report")
    d.settled()
    d.push("Make the PDF")
    d.until(lambda: not d.app.report.state.busy, 60)
    d.frames(3)
    d.push("Open the PDF")
    assert shown[0].read_bytes().startswith(b"%PDF")
    d.push("◀ Bridge")
    assert d.app.screens.current == "bridge"


def test_the_app_opens_again_at_the_same_bar(drive: Drive) -> None:
    """Bridge, truss, bar, view, theme and text size come back; what was stored is there."""
    d = opened(drive)
    d.push("Condition")
    d.push("Show downstream")
    d.push("Next")
    d.push("Fair")
    d.settled()
    bar = d.app.bridge_screen.bar
    again = drive()
    again.settled()
    assert again.app.screens.current == "bridge"
    assert (again.app.bridge.state.truss, again.app.bridge_screen.bar) == ("downstream", bar)
    assert again.button("Condition").chosen
    assert again.button("Fair").chosen


def test_theme_and_text_size_change_at_once_and_stay(drive: Drive) -> None:
    """The sun screen and larger text are a tap each, and are kept."""
    d = drive()
    d.settled()
    from kivy.metrics import Metrics

    before = d.button("Ellerwick").font_size
    d.push("Sun screen")
    d.push("Text 100 %")
    d.frames(3)
    assert tuple(d.button("Ellerwick").color) == THEMES["sun"].button_ink
    assert d.button("Ellerwick").font_size == pytest.approx(1.5 * before)
    again = drive()
    again.settled()
    assert again.button("Field screen")
    assert again.button("Text 150 %")
    again.push("Text 150 %")
    again.push("Text 200 %")
    assert Metrics.fontscale == 1


def test_keys_do_what_touches_do(drive: Drive) -> None:
    """On a desktop the arrow keys walk, plus and minus zoom, and escape goes back step by step."""
    d = opened(drive)
    d.window.dispatch("on_keyboard", 275, 0, "", [])
    d.frames(2)
    assert d.app.bridge_screen.bar == "L0-U1"
    zoom = d.app.bridge_screen.drawing.elevation.zoom
    d.window.dispatch("on_keyboard", 43, 0, "+", [])
    assert d.app.bridge_screen.drawing.elevation.zoom > zoom
    d.push("Severed")
    assert d.window.dispatch("on_keyboard", 27, 0, "", [])
    assert d.app.bridge_screen.at_home
    assert d.window.dispatch("on_keyboard", 27, 0, "", [])
    assert d.app.screens.current == "bridges"
    assert not d.app._key(d.window, 27)


def test_a_bridge_that_is_given_is_opened(drive: Drive) -> None:
    """The bridge named at the start wins over the one of the last time."""
    d = opened(drive)
    other = d.app.shelf.add_sample("three-supports")
    again = drive(other)
    again.settled()
    assert again.app.bridge_screen.title == samples.sample("three-supports").bridge.name


def test_screens_opened_again_and_again_leave_nothing_behind(drive: Drive) -> None:
    """Twenty ways to and fro add no widget to the screens."""
    d = opened(drive)
    d.push("Severed")
    d.push("◀ Back")
    d.settled()
    number = len(list(d.app.root.walk(restrict=True)))
    for _ in range(20):
        d.push("Severed")
        d.push("◀ Back")
        d.push("Report")
        d.push("◀ Bridge")
    d.settled()
    assert len(list(d.app.root.walk(restrict=True))) == number
