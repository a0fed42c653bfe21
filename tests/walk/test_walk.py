"""The order of the walk, and what counts as done."""

from __future__ import annotations

import pytest

from inspector import samples
from models.journal import Entry, Journal, Visit
from models.journal_order import standing
from models.walk import done_in, walking_order


@pytest.mark.parametrize("name", samples.names())
def test_the_walk_goes_through_every_bar_once_truss_by_truss(name: str) -> None:
    """No bar is left out, and the second truss begins when the first is finished."""
    bridge = samples.sample(name).bridge
    order = walking_order(bridge)
    assert sorted(order) == sorted((truss.name, bar.id) for truss in bridge.trusses.values() for bar in truss.bars)
    trusses = [truss for truss, _ in order]
    assert list(dict.fromkeys(trusses)) == list(bridge.trusses)
    assert trusses == sorted(trusses, key=list(bridge.trusses).index)


@pytest.mark.parametrize("name", samples.names())
def test_the_walk_goes_panel_by_panel_from_one_end(name: str) -> None:
    """The panel in which a bar's middle lies never goes back within a truss."""
    bridge = samples.sample(name).bridge
    for truss in bridge.trusses.values():
        starts = [truss.joints[joint][0].si for joint in truss.deck_joints]
        panels = []
        for where, bar in walking_order(bridge):
            if where == truss.name:
                ends = truss.bar[bar].start, truss.bar[bar].end
                middle = sum(truss.joints[joint][0].si for joint in ends) / 2
                panels.append(sum(start <= middle + 1e-6 for start in starts))
        assert panels == sorted(panels)


def test_a_bar_is_done_when_the_visit_says_something_of_it() -> None:
    """A look, a reason why not seen, a finding count; another visit, a retraction and what was taken back do not."""
    entries = (
        Entry("1", "near", "a", "d", 1, seen="hands on"),
        Entry("2", "near", "b", "d", 2, seen="not seen", reason="water"),
        Entry("3", "near", "c", "d", 3, severed=True),
        Entry("4", "near", "e", "d", 4, state="good"),
        Entry("5", "near", "e", "d", 5, retracts="4"),
    )
    old = Visit("old", "2020-01-01", (Entry("0", "near", "f", "d", 1, seen="hands on"),))
    records = standing(Journal((old, Visit("new", "2022-01-01", entries)))).records
    assert done_in(records, 1) == {("near", "a"), ("near", "b"), ("near", "c")}
    assert done_in(records, 0) == {("near", "f")}
    assert done_in(records, 2) == frozenset()
