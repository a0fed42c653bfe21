"""The list of bridges and the report, without a window."""

from __future__ import annotations

from collections.abc import Iterator
from pathlib import Path

import pytest
from app.desk_without_screen import SAMPLE, AtOnce, sample, shelf

from inspector import samples
from inspector.app.bridges.presenter import BridgesPresenter
from inspector.app.bridges.state import BridgesState
from inspector.app.report.presenter import ReportPresenter
from inspector.app.report.state import ReportState
from inspector.app.shelf import Shelf
from inspector.desk import Rated
from inspector.store import StoreError


@pytest.fixture
def made(tmp_path: Path) -> Iterator[Shelf]:
    """A shelf over a new store."""
    found = shelf(tmp_path)
    yield found
    found.store.close()


def test_an_empty_store_offers_the_invented_bridges(made: Shelf) -> None:
    """There is always something to open: each sample is a tap away and is then a stored bridge like any other."""
    opened: list[Rated] = []
    shown: list[BridgesState] = []
    presenter = BridgesPresenter(made, AtOnce(), shown.append, opened.append)
    presenter.enter()
    assert presenter.state.rows == ()
    assert [row.key for row in presenter.state.samples] == list(samples.names())
    presenter.add_sample(SAMPLE)
    assert opened[0].bridge.name == sample().bridge.name
    presenter.enter()
    assert [row.name for row in presenter.state.rows] == [sample().bridge.name]
    assert SAMPLE not in [row.key for row in presenter.state.samples]


def test_each_bridge_shows_its_last_visit_and_lowest_rating_factor(made: Shelf) -> None:
    """The list gives the figure, and says in words where it is below 1."""
    for name in (SAMPLE, "severed-hanger"):
        made.add_sample(name)
    presenter = BridgesPresenter(made, AtOnce(), lambda _: None, lambda _: None)
    presenter.enter()
    first = presenter.state.rows[0]
    assert "last visit 2026-05-14" in first.about
    value = float(first.figure.split()[0])
    assert ("below 1" in first.figure) == (value < 1)


def test_a_bridge_that_cannot_be_opened_says_why(made: Shelf, monkeypatch: pytest.MonkeyPatch) -> None:
    """A damaged store is told in words; nothing is opened."""

    def damaged(_: str) -> Rated:
        raise StoreError("the store is damaged")

    opened: list[Rated] = []
    made.add_sample(SAMPLE)
    monkeypatch.setattr(made, "rated", damaged)
    presenter = BridgesPresenter(made, AtOnce(), lambda _: None, opened.append)
    presenter.enter()
    assert presenter.state.rows[0].figure == "not rated"
    presenter.open(presenter.state.rows[0].key)
    assert presenter.state.message == "the store is damaged"
    assert opened == []


def test_the_report_is_written_beside_the_store_and_can_be_opened(made: Shelf) -> None:
    """The PDF is whole, is named after the bridge and the day, and goes to the program that shows it."""
    shown: list[ReportState] = []
    opened: list[Path] = []
    presenter = ReportPresenter(made, AtOnce(), shown.append, opened.append)
    presenter.enter(made.rated(made.add_sample(SAMPLE)))
    assert not presenter.state.ready
    presenter.make()
    assert shown[-2].busy
    assert presenter.state.ready
    presenter.open_file()
    (path,) = opened
    assert path.parent == made.store.path.parent / "reports"
    assert path.name == "ellerwick-mill-footbridge-2031-05-06.pdf"
    assert path.read_bytes().startswith(b"%PDF")
    assert [one.name for one in path.parent.iterdir()] == [path.name]


def test_a_report_that_cannot_be_written_says_why(made: Shelf) -> None:
    """A folder that cannot be made is told, and nothing counts as ready."""
    presenter = ReportPresenter(made, AtOnce(), lambda _: None, None)
    presenter.enter(made.rated(made.add_sample(SAMPLE)))
    (made.store.path.parent / "reports").touch()
    presenter.make()
    assert presenter.state.message.startswith("No report was written.")
    assert not presenter.state.ready
    assert not presenter.state.busy


def test_without_a_program_to_show_it_the_report_offers_no_button(made: Shelf) -> None:
    """The path is told all the same."""
    presenter = ReportPresenter(made, AtOnce(), lambda _: None, None)
    presenter.enter(made.rated(made.add_sample(SAMPLE)))
    presenter.make()
    assert not presenter.state.ready
    assert presenter.state.message.endswith(".pdf.")
