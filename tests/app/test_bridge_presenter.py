"""The bridge screen without a window: choosing, logging, figures before and after."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path

import pytest
from app.desk_without_screen import DAY, AtOnce, Later, sample, shelf, without_visits

from inspector.app.bridge.presenter import BridgePresenter
from inspector.app.bridge.state import BridgeState
from inspector.app.shelf import Shelf, today_in
from inspector.store import StoreError
from models.journal import Entry, Journal, Reading, Visit
from models.quantity import Quantity
from models.words import ACT_NOW_STEPS

BAR = ("upstream", "L3-L4")


class Screen:
    """A presenter with everything that it showed."""

    def __init__(self, made: Shelf, work: AtOnce | Later) -> None:
        self.shelf = made
        self.shown: list[BridgeState] = []
        self.kept: list[tuple[str, ...]] = []
        self.presenter = BridgePresenter(made, work, self.shown.append, lambda *where: self.kept.append(where))

    @property
    def now(self) -> BridgeState:
        """What is on the screen."""
        return self.presenter.state

    def entries(self) -> tuple[Entry, ...]:
        """What is stored of today's visit."""
        (bridge,) = self.shelf.summaries()
        return next((v.entries for v in self.shelf.store.journal(bridge.id).visits if v.date == DAY), ())


@pytest.fixture
def screen(tmp_path: Path) -> Iterator[Screen]:
    """The sample, opened at a bar of its bottom chord."""
    made = shelf(tmp_path)
    screen = Screen(made, AtOnce())
    screen.presenter.open(made.rated(made.add(sample())), BAR)
    yield screen
    made.store.close()


def reading(thickness: str, si: float, plate: str = "bottom wall") -> Reading:
    """A reading at the middle."""
    return Reading(0.5, plate, (Quantity(thickness, si),))


def test_a_bridge_opens_at_the_bar_where_it_was_left(screen: Screen) -> None:
    """The bar, its truss and the view come back; an unknown bar is the first of the walk."""
    assert (screen.now.truss, screen.now.bar) == BAR
    assert screen.now.sheet is not None
    assert screen.now.sheet.title == "L3-L4"
    assert screen.now.picture is not None
    rated = screen.presenter.rated
    assert rated is not None
    screen.presenter.open(rated, ("upstream", "gone"), "no such view")
    assert screen.now.bar == "L0-L1"
    assert screen.now.walk.here == 0


def test_every_answer_is_stored_at_once_in_todays_visit(screen: Screen) -> None:
    """A tap is an entry; the first one opens the visit of today on this device."""
    screen.presenter.log(seen="hands on")
    screen.presenter.log(state="poor")
    assert [(entry.seen, entry.state) for entry in screen.entries()] == [("hands on", None), (None, "poor")]
    assert {entry.device for entry in screen.entries()} == {"tablet a"}
    assert screen.now.sheet is not None
    assert [choice.key for choice in screen.now.sheet.seen if choice.chosen] == ["hands on"]
    assert [choice.key for choice in screen.now.sheet.states if choice.chosen] == ["poor"]


def test_an_entry_is_shown_as_stored_only_after_the_commit(tmp_path: Path) -> None:
    """Until the store has it, the screen says that it is being stored; figures come later still."""
    made, later = shelf(tmp_path), Later()
    screen = Screen(made, later)
    screen.presenter.open(made.rated(made.add(sample())), BAR)
    later.run(len(later.jobs))
    screen.presenter.log(state="severe")
    assert screen.now.stored == "Storing ..."
    assert screen.entries() == ()
    later.run()
    assert screen.now.stored.startswith("Stored: state severe")
    assert len(screen.entries()) == 1
    assert screen.now.sheet is not None
    assert not any(choice.chosen for choice in screen.now.sheet.states)
    later.run(len(later.jobs))
    assert [choice.key for choice in screen.now.sheet.states if choice.chosen] == ["severe"]
    made.store.close()


def test_what_could_not_be_stored_is_said_and_changes_nothing(screen: Screen, monkeypatch: pytest.MonkeyPatch) -> None:
    """A full disk is told in words, and no answer is shown as given."""

    def full(*_: object, **__: object) -> None:
        raise StoreError("The storage is full. Make room and try again.")

    monkeypatch.setattr(screen.shelf.store, "append", full)
    screen.presenter.log(state="poor")
    assert screen.now.trouble
    assert screen.now.stored == "NOT stored. The storage is full. Make room and try again."
    assert screen.now.sheet is not None
    assert not any(choice.chosen for choice in screen.now.sheet.states)


def test_a_reading_changes_the_figures_of_bar_and_structure(screen: Screen) -> None:
    """Before and after stand side by side, with what governs, until another bar is chosen."""
    stored: list[Entry] = []
    screen.presenter.log_reading(reading("2.5 mm", 0.0025), None, stored.append)
    assert [entry.readings for entry in stored] == [(reading("2.5 mm", 0.0025),)]
    sheet = screen.now.sheet
    assert sheet is not None
    assert sheet.changed
    before, after = sheet.figure.split(" → ")
    assert float(after.split()[0]) < float(before.split()[0])
    assert "tension" in sheet.governs
    screen.presenter.step(1)
    assert screen.now.sheet is not None
    assert "→" not in screen.now.sheet.figure


def test_a_second_value_at_the_spot_joins_the_first(screen: Screen) -> None:
    """Both values count as one reading, and each was stored when it was typed."""
    stored: list[Entry] = []
    screen.presenter.log_reading(reading("4.0 mm", 0.004), None, stored.append)
    screen.presenter.log_reading(reading("5.0 mm", 0.005), stored[0], stored.append)
    rated = screen.presenter.rated
    assert rated is not None
    (measured,) = [one for one in rated.condition.bars[BAR].readings if one.visit == len(rated.condition.visits) - 1]
    assert measured.mean == pytest.approx(0.0045)
    assert not measured.doubtful


def test_undo_takes_the_last_entry_back_until_nothing_is_left(screen: Screen) -> None:
    """Undo is offered while an entry of this device in this visit stands, and the figures go back."""
    figure = screen.now.structure
    assert not screen.now.can_undo
    screen.presenter.log(seen="hands on")
    screen.presenter.log(severed=True)
    assert screen.now.act_now
    screen.presenter.undo()
    assert screen.now.act_now == ()
    assert screen.now.structure.split(" → ")[-1] == figure
    assert screen.now.can_undo
    screen.presenter.undo()
    assert not screen.now.can_undo
    screen.presenter.undo()
    assert len(screen.entries()) == 4


def test_a_severed_bar_takes_the_top_with_plain_steps(screen: Screen) -> None:
    """Keep people off, call the engineer, and why."""
    screen.presenter.log(severed=True)
    assert screen.now.act_now[0] == " ".join(ACT_NOW_STEPS)
    assert "L3-L4" in screen.now.act_now[-1]
    assert screen.now.sheet is not None
    assert screen.now.sheet.severed
    assert screen.now.sheet.figure.endswith("severed")


def test_no_change_needs_a_look_first(screen: Screen) -> None:
    """`No change since the last visit` waits for hands on or at a distance; not seen does not open it."""

    def button() -> bool:
        assert screen.now.sheet is not None
        assert screen.now.sheet.unchanged is not None
        return screen.now.sheet.unchanged.enabled

    assert not button()
    screen.presenter.log(seen="not seen", reason="under water")
    assert not button()
    screen.presenter.log(seen="at a distance")
    assert button()
    screen.presenter.log(look_unchanged=True)
    assert screen.now.sheet is not None
    assert screen.now.sheet.unchanged is not None
    assert screen.now.sheet.unchanged.chosen


def test_nothing_is_compared_where_nobody_was_before(tmp_path: Path) -> None:
    """On the first visit of a bridge no button speaks of an earlier one."""
    made = shelf(tmp_path)
    screen = Screen(made, AtOnce())
    screen.presenter.open(made.rated(made.add(without_visits(sample()))))
    assert screen.now.sheet is not None
    assert screen.now.sheet.unchanged is None
    assert screen.now.sheet.earlier == ()
    made.store.close()


def test_what_was_recorded_before_stands_beside_each_entry(screen: Screen) -> None:
    """Seen, state, loss and readings of earlier visits are shown with their dates."""
    states = {screen.now.sheet.state_before for _ in range(58) if screen.now.sheet and screen.presenter.step(1) is None}
    assert any(text.startswith(("2019-09-24: ", "2026-05-14: ")) for text in states)
    plates = [row.known for row in screen.now.sheet.plates] if screen.now.sheet else []
    assert all("as built" in known for known in plates)


def test_loss_goes_in_steps_of_five_per_cent_and_stops_at_its_ends(screen: Screen) -> None:
    """Each step is an entry; below zero there is nothing to store."""
    for steps in (1, 1, -1, -1, -1):
        screen.presenter.change_loss(steps)
    assert [entry.estimated_loss for entry in screen.entries()] == [0.05, 0.1, 0.05, 0.0]
    for _ in range(25):
        screen.presenter.change_loss(1)
    assert max(entry.estimated_loss or 0 for entry in screen.entries()) == 0.95


def test_the_walk_goes_from_bar_to_bar_and_counts_what_is_done(screen: Screen) -> None:
    """Next and previous stop at the ends; the strip has a mark a bar."""
    number = len(screen.now.walk.done)
    assert number == 58
    start = screen.now.walk.here
    screen.presenter.log(seen="hands on")
    assert screen.now.walk.done[start]
    assert screen.now.walk.text == f"Bar {start + 1} of 58; 57 not done"
    for _ in range(100):
        screen.presenter.step(1)
    assert screen.now.walk.here == number - 1
    assert screen.now.truss == "downstream"
    for _ in range(100):
        screen.presenter.step(-1)
    assert screen.now.walk.here == 0


def test_nothing_recorded_on_one_truss_appears_on_the_other(screen: Screen) -> None:
    """The twin bar of the other truss stays as it was."""
    rated = screen.presenter.rated
    assert rated is not None
    before = rated.condition.bars["downstream", "L3-L4"]
    screen.presenter.log(state="severe", seen="hands on")
    rated = screen.presenter.rated
    assert rated is not None
    assert rated.condition.bars["downstream", "L3-L4"].state == before.state
    screen.presenter.show_truss("downstream")
    assert (screen.now.truss, screen.now.walk.here) == ("downstream", 29)


def test_the_view_changes_the_labels_and_stays_from_bar_to_bar(screen: Screen) -> None:
    """The condition view shows states in the place of rating factors."""
    screen.presenter.show_view("condition")
    assert screen.now.picture is not None
    figures = [text.text for text in screen.now.picture.texts if text.role == "bar figure"]
    assert all("%" in figure or figure == "severed" for figure in figures)
    screen.presenter.step(1)
    assert [view.key for view in screen.now.views if view.chosen] == ["condition"]
    assert screen.kept[-1][-1] == "condition"


def test_an_entry_leaves_every_label_of_the_drawing_in_its_place(screen: Screen) -> None:
    """After a reading only figures and bands change; nothing jumps under the finger."""
    before = screen.now.picture
    screen.presenter.log_reading(reading("2.5 mm", 0.0025), None, lambda _: None)
    after = screen.now.picture
    assert before is not None
    assert after is not None
    assert [text.at for text in before.texts] == [text.at for text in after.texts]
    assert [text.text for text in before.texts] != [text.text for text in after.texts]


def test_a_late_drawing_of_a_bridge_that_was_closed_is_not_shown(tmp_path: Path) -> None:
    """An answer for the bridge before does not reach the one that is open now."""
    made, later = shelf(tmp_path), Later()
    screen = Screen(made, later)
    first = made.rated(made.add(sample()))
    screen.presenter.open(first)
    second = made.rated(made.add_sample("three-supports"))
    screen.presenter.open(second)
    later.run()
    assert screen.now.picture is None
    later.run()
    assert screen.now.picture is not None
    made.store.close()


def test_the_place_is_remembered_at_every_step(screen: Screen) -> None:
    """Bridge, truss, bar and view are kept whenever they change."""
    screen.presenter.step(1)
    rated = screen.presenter.rated
    assert rated is not None
    assert screen.kept[-1] == (rated.bridge.id, screen.now.truss, screen.now.bar, "rating factor")


def test_the_visit_of_the_day_is_found_again_on_a_second_start(tmp_path: Path) -> None:
    """After a crash the same visit goes on; on the next day another one begins."""
    made = shelf(tmp_path)
    bridge = made.add(without_visits(sample()))
    made.logbook(bridge).log("upstream", "L0-L1", seen="hands on")
    made.store.close()
    again = shelf(tmp_path)
    again.logbook(bridge).log("upstream", "L0-L1", state="good")
    again.store.close()
    next_day = shelf(tmp_path, "2031-05-07")
    next_day.logbook(bridge).log("upstream", "L0-L1", state="fair")
    visits = next_day.store.journal(bridge).visits
    assert [(visit.date, len(visit.entries)) for visit in visits] == [("2031-05-06", 2), ("2031-05-07", 1)]
    next_day.store.close()


def test_a_tablet_whose_date_is_behind_still_logs_last_and_says_so(tmp_path: Path) -> None:
    """Entries count by the visit's date, so a wrong clock must not put them before what is on record."""
    made = shelf(tmp_path, "2001-01-01")
    screen = Screen(made, AtOnce())
    bridge = made.add(sample())
    screen.presenter.open(made.rated(bridge))
    assert "before the last visit" in screen.now.remark
    screen.presenter.log(state="severe")
    screen.presenter.log(seen="hands on")
    visits = sorted(made.store.journal(bridge).visits, key=lambda visit: visit.date)
    assert visits[-1].date == "2026-05-15"
    assert len(visits[-1].entries) == 2
    assert screen.now.sheet is not None
    assert [choice.key for choice in screen.now.sheet.states if choice.chosen] == ["severe"]
    made.store.close()


def test_two_people_on_one_day_write_into_one_visit() -> None:
    """Where another device's visit of today is on record already, this device's entries join it."""
    theirs = Visit("theirs", DAY, (), device="tablet b")
    day = today_in(Journal((theirs,)), "tablet a", DAY)
    assert day.visit == theirs
    mine = replace(theirs, id="mine", device="tablet a")
    assert today_in(Journal((mine, theirs)), "tablet a", DAY).visit == mine


def test_the_pad_knows_the_plate_the_bar_and_the_unit(tmp_path: Path) -> None:
    """The pad of a bridge shown in feet and inches has a stroke for fractions."""
    made = shelf(tmp_path)
    screen = Screen(made, AtOnce())
    screen.presenter.open(made.rated(made.add_sample("warren-feet-and-kips")))
    assert screen.now.sheet is not None
    pad = screen.presenter.pad(screen.now.sheet.plates[0].name)
    assert pad is not None
    assert pad.unit == "in"
    assert "/" in pad.keys
    made.store.close()
