"""`without it`: what the other bars still carry when one goes, against the same bridge without that bar."""

from __future__ import annotations

import copy
from typing import Any

import pytest
from rewriting.rated import rated
from small.footbridge import bar_of, reading, record, short, truss_of, without_bar

from models.rating import bar_of as row_of
from models.rating.result import Rating

JSON = dict[str, Any]


def unequal() -> JSON:
    """The crossed bridge with bars of two sizes, some of them worn, under a crowd and a cart."""
    document = short(crossed=True)
    document["sections"]["small"] = {**document["sections"]["tube"], "depth": "120 mm", "width": "100 mm"}
    for name in ("L1-U2", "U1-L2", "L3-U3"):
        bar_of(document, name)["section"] = "small"
    document["rating"]["live"].append({"name": "cart", "kind": "concentrated", "force": "30 kN"})
    return record(document, reading("L1-L2", 5.0, 7.0), {"bar": "U2-L3", "estimated loss": 0.3})


def lowest(rating: Rating) -> float | None:
    """The lowest factor at the upper level of the first truss's bars that carry."""
    first = next(iter(rating.trusses.values()))
    carrying = [row.rating_factor["operating"] for row in first.bars if row.check not in ("severed", "cracked")]
    return min((factor for factor in carrying if factor is not None), default=None)


@pytest.mark.parametrize("two", [False, True])
def test_without_a_bar_is_the_rating_with_that_bar_severed(two: bool) -> None:
    """For each bar: `mechanism` where the truss then moves, else the lowest factor of the bars that remain."""
    document = unequal()
    if two:
        document["trusses"] = {"only": document["trusses"]["only"], "other": {"same as": "only"}}
    outcomes = set()
    for row in rated(document).trusses["only"].bars:
        cut = record(copy.deepcopy(document), {"truss": "only", "bar": row.bar, "severed": True}, date="2026-05-15")
        rating = rated(cut)
        moves = rating.trusses["only"].verdict == "mechanism"
        assert (row.without_it == "mechanism") == moves
        if not moves:
            assert row.without_it == pytest.approx(lowest(rating), rel=1e-9)
        outcomes.add(moves)
    assert outcomes == {True, False}


def test_without_a_bar_is_the_rating_of_a_bridge_that_never_had_it() -> None:
    """The same against a document that lacks the bar, in a metal whose weight is next to nothing."""
    document = unequal()
    document["materials"]["steel"]["density"] = "0.000001 kg/m^3"
    found = {row.bar: row.without_it for row in rated(document).bars}
    for bar in [each["id"] for each in truss_of(document)["bars"]]:
        lacking = without_bar(copy.deepcopy(document), bar)
        for visit in lacking["visits"]:
            visit["observations"] = [said for said in visit["observations"] if said["bar"] != bar]
        rating = rated(lacking)
        if found[bar] == "mechanism":
            assert rating.trusses["only"].verdict == "mechanism"
        else:
            assert found[bar] == pytest.approx(lowest(rating), rel=1e-6)


def test_no_bar_of_a_determinate_truss_can_be_spared() -> None:
    """Every bar of a determinate truss is one without which it moves."""
    assert {row.without_it for row in rated(short()).bars} == {"mechanism"}


def test_without_a_bar_there_may_be_nothing_to_rate() -> None:
    """With no live load a bar that can be spared leaves no factor: null, not a number."""
    document = short(crossed=True)
    document["rating"]["live"] = []
    rating = rated(document)
    assert row_of(rating, "only", "U1-L2").without_it is None
    assert row_of(rating, "only", "L0-U1").without_it == "mechanism"


def test_a_bar_that_is_gone_leaves_what_the_truss_carries_now() -> None:
    """A severed bar's `without it` is the truss as it stands, so that the column can be read down."""
    rating = rated(record(short(crossed=True), {"bar": "U1-L2", "severed": True}))
    assert row_of(rating, "only", "U1-L2").without_it == pytest.approx(lowest(rating), rel=1e-12)
