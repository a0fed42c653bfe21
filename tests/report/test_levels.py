"""Bases whose levels have resistances of their own, and bases of one level, in the printed summary."""

from __future__ import annotations

import pytest
from report.read_back import Pages, read
from small.footbridge import short

from inspector import desk
from inspector.exchange import site
from models.rating.result import Rating
from models.words import Figures


def printed(basis: str) -> tuple[Rating, Pages]:
    """The short bridge rated on a basis, and its report read back."""
    document = short()
    document["rating"]["basis"] = basis
    rated = desk.rate(site.read_document(document))
    return rated.rating, read(desk.report(rated))


def test_both_levels_resistances_stand_in_the_table() -> None:
    """By allowable stresses a bar's row has tension and compression at inventory and then at operating level."""
    rating, pages = printed("allowable stress")
    assert pages.whole.count("tension inventory kN") == 1
    figures = Figures("SI")
    for bar in rating.bars:
        lower = bar.lower_levels["inventory"]
        four = (lower.tension, lower.compression, bar.tension, bar.compression)
        assert " ".join(figures.number(value, "force") for value in four) in pages.whole


@pytest.mark.parametrize("basis", ["lrfr", "eurocode"])
def test_one_resistance_has_one_pair_of_columns(basis: str) -> None:
    """Where all levels share their resistances the columns are not doubled and carry no level."""
    rating, pages = printed(basis)
    assert "tension inventory" not in pages.whole
    assert all(f"RF {level}" in pages.whole for level in rating.levels)


def test_a_basis_of_one_level_speaks_of_no_other() -> None:
    """By the Eurocodes the headline is the ultimate level, with its factors and what the basis leaves out."""
    _, pages = printed("eurocode")
    assert "Lowest rating factor, ultimate level" in pages.whole
    assert "At the other level" not in pages.whole
    assert "partial factor γM1, buckling 1.10" in pages.whole
    assert "EN 1991-2, 5.4" in pages.whole
