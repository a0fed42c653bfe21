"""Slender plates through the whole rating: what is told, what the hand check shows, how much a bar may still lose."""

from __future__ import annotations

import copy
from typing import Any

import pytest
from rewriting.rated import rated, solved
from small.footbridge import bar_of, reading, record, short, truss_of

from models.rating import bar_of as row_of
from models.rating import hand_check
from models.rating.result import BarRating, Rating

JSON = dict[str, Any]
BAR = "L0-U1"
"""The end post, which the crowd pushes."""

SECTIONS: dict[str, JSON] = {
    "tube": {"shape": "rectangular tube", "depth": "200 mm", "width": "160 mm", "thickness": "6 mm"},
    "welded box": {
        "shape": "rectangular tube", "depth": "200 mm", "width": "160 mm", "thickness": "6 mm", "formed": "welded",
    },
    "rolled": {
        "shape": "i section", "depth": "300 mm", "flange width": "150 mm", "web thickness": "8 mm",
        "flange thickness": "11 mm", "rolled": True, "area": "56 cm^2",
    },
    "welded": {
        "shape": "i section", "depth": "220 mm", "flange width": "200 mm", "web thickness": "8 mm",
        "flange thickness": "9 mm",
    },
    "angle": {"shape": "angle", "legs": ["150 mm", "100 mm"], "thickness": "14 mm"},
    "pair": {"shape": "double angle", "legs": ["120 mm", "80 mm"], "thickness": "12 mm", "gap": "8 mm"},
    "channel": {
        "shape": "channel", "depth": "240 mm", "flange width": "85 mm", "web thickness": "9 mm",
        "flange thickness": "13 mm",
    },
    "tee": {
        "shape": "tee", "depth": "150 mm", "flange width": "200 mm", "web thickness": "9 mm",
        "flange thickness": "12 mm",
    },
    "pipe": {"shape": "round tube", "diameter": "219.1 mm", "thickness": "5 mm"},
    "built up": {
        "shape": "built up",
        "plates": {
            "top": {"width": "240 mm", "height": "8 mm", "x": "0 mm", "y": "84 mm"},
            "bottom": {"width": "160 mm", "height": "8 mm", "x": "0 mm", "y": "-84 mm"},
            "left": {"width": "8 mm", "height": "160 mm", "x": "-60 mm", "y": "0 mm"},
            "right": {"width": "8 mm", "height": "160 mm", "x": "60 mm", "y": "0 mm"},
        },
    },
}  # fmt: skip


def bridge(section: JSON, pressure: str = "4 kPa") -> JSON:
    """The short bridge with one bar of this section, held so closely that it yields rather than buckles."""
    document = short()
    document["sections"]["own"] = section
    document["rating"]["live"][0]["pressure"] = pressure
    bar_of(document, BAR).update(section="own", k={"in plane": 0.5}, **{"unbraced out of plane": "1.5 m"})
    return document


def thinned(document: JSON, loss: float) -> JSON:
    """The same with a loss over the whole bar."""
    return record(copy.deepcopy(document), {"bar": BAR, "estimated loss": loss}, date="2026-06-01")


def operating(document: JSON) -> float:
    """The bar's rating factor at the upper level."""
    return row_of(rated(document), "only", BAR).rating_factor["operating"] or 0.0


def told(rating: Rating, bar: str = BAR) -> list[tuple[str, str]]:
    """Level and text of the findings that speak of slender plates or thin tubes."""
    words = ("slender:", "tube is above", "is slender", "are slender")
    return [
        (one.level, one.text) for one in rating.findings if one.bar == bar and any(word in one.text for word in words)
    ]


def row(document: JSON) -> BarRating:
    """The bar's row."""
    return row_of(rated(document), "only", BAR)


@pytest.mark.parametrize("name", SECTIONS)
def test_the_allowance_of_a_bar_whose_plates_turn_slender(name: str) -> None:
    """Stocky as built, slender where the factor falls to 1: found again by bisection, the bar rated anew each time."""
    document = bridge(SECTIONS[name])
    assert told(rated(document)) == []
    allowance = row(document).loss_allowance
    assert allowance is not None
    low, high = 0.0, 0.95
    while high - low > 1e-7:
        middle = (low + high) / 2
        low, high = (middle, high) if operating(thinned(document, middle)) >= 1 else (low, middle)
    assert allowance == pytest.approx(low, abs=2e-7)
    assert [level for level, _ in told(rated(thinned(document, allowance)))] == ["note"]


@pytest.mark.parametrize("name", SECTIONS)
def test_the_hand_check_of_a_thin_bar_ends_at_its_rating_factor(name: str) -> None:
    """Worn until its plates are slender, every shape's hand check comes to the figures of the rating."""
    document = thinned(bridge(SECTIONS[name]), 0.7)
    outcomes = solved(document)[1]
    lines = {step.symbol: step.value for step in hand_check(outcomes, "only", BAR).steps}
    found = row(document)
    assert {"Fcr", "Ae"} <= set(lines)
    assert lines["Prc"] == pytest.approx(found.compression, rel=1e-9)
    assert lines["RF operating"] == pytest.approx(found.rating_factor["operating"], rel=1e-9)


def test_a_finding_tells_how_much_of_a_thin_bar_counts() -> None:
    """A slender plate is a note, by the plates concerned and the part of the section that counts, rounded down.

    Walls 154/3 and 194/3 at yield: (1 - 0.2 r) r with r = 1.38 * 39.6/51.3 and /64.7 is 0.838 and 0.702; of the area
    of 2124 mm^2 497 mm^2 are lost, 76.6 % count; at the column's stress, a little below yield, 77.
    """
    document = bridge({**SECTIONS["tube"], "thickness": "3 mm"})
    ((level, text),) = told(rated(document))
    assert level == "note"
    assert text == (
        "The top wall, bottom wall, left wall, right wall are slender: 77 % of the section counts in compression."
    )
    assert row(document).check == "flexural buckling"


def test_a_finding_names_only_the_plates_that_lose_breadth() -> None:
    """Only the wall that was read thin is named, and the compression figure is not called incomplete."""
    document = record(bridge(SECTIONS["tube"]), reading(BAR, 6.0, 6.0, 2.5, 6.0))
    ((level, text),) = told(rated(document))
    assert level == "note"
    assert text.startswith("The left wall is slender: ")


def test_a_long_bar_with_slender_walls_loses_nothing() -> None:
    """Where the column bears so little stress that no plate buckles before, there is nothing to tell."""
    document = bridge({**SECTIONS["tube"], "thickness": "3.5 mm"})
    bar_of(document, BAR).update(k={"in plane": 4.0})
    assert told(rated(document)) == []


def test_a_tube_beyond_the_published_rule_is_left_out() -> None:
    """A round tube thinner than any rule covers carries the finding that the figure leaves something out."""
    document = bridge({**SECTIONS["pipe"], "thickness": "0.5 mm"}, "0.1 kPa")
    levels = [level for level, _ in told(rated(document))]
    assert levels == ["left out", "note"]
    inside = bridge({**SECTIONS["pipe"], "thickness": "0.7 mm"}, "0.1 kPa")
    assert [level for level, _ in told(rated(inside))] == ["note"]


def test_no_other_bar_changes() -> None:
    """One bar with slender plates changes no figure of its neighbours, not in the last digit."""
    stocky, slender = bridge(SECTIONS["pipe"]), bridge(SECTIONS["pipe"])
    record(slender, {"bar": BAR, "estimated loss": 0.7})
    record(stocky, {"bar": BAR, "estimated loss": 0.01})
    names = [bar["id"] for bar in truss_of(stocky)["bars"] if bar["id"] != BAR]
    one, other = rated(stocky), rated(slender)
    for name in names:
        assert row_of(one, "only", name).compression == row_of(other, "only", name).compression
