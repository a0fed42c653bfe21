"""The loss allowance against its definition: the bar rated again with just that loss over its whole length."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Any

import pytest
from rewriting.rated import rated
from small.footbridge import add_bar, bar_of, reading, record, short

from models.rating import bar_of as row_of
from models.rating.result import BarRating

JSON = dict[str, Any]
HEAVY = "30 kPa"


def heavy(*, crossed: bool, thickness: str = "8 mm") -> JSON:
    """The short bridge under a crowd that leaves each bar little."""
    document = short(crossed=crossed)
    document["rating"]["live"][0]["pressure"] = HEAVY
    document["sections"]["tube"]["thickness"] = thickness
    return document


def allowed(document: JSON) -> Iterator[tuple[BarRating, float]]:
    """Bars with an allowance that is neither nothing nor missing."""
    for row in rated(document).bars:
        if row.loss_allowance:
            yield row, row.loss_allowance


def with_loss(document: JSON, bar: str, loss: float) -> JSON:
    """The same bridge in which a bar has lost this part of its area, over its whole length."""
    entry = {"bar": bar, "estimated loss": loss}
    return record({**document, "visits": list(document.get("visits", []))}, entry, date="2026-06-01")


def upper(document: JSON, bar: str) -> float | None:
    """The bar's rating factor at the upper level."""
    return row_of(rated(document), "only", bar).rating_factor["operating"]


@pytest.mark.parametrize("crossed", [False, True])
def test_a_bar_with_its_allowance_lost_rates_one(crossed: bool) -> None:
    """In a determinate and in a redundant truss, pulled or pushed: the loss allowed brings the bar to a factor of 1."""
    document = heavy(crossed=crossed)
    directions = set()
    for row, loss in allowed(document):
        assert upper(with_loss(document, row.bar, loss), row.bar) == pytest.approx(1.0, abs=1e-6)
        directions.add(row.direction)
    assert directions == {"tension", "compression"}


def test_thin_walls_are_followed_as_they_thin_further() -> None:
    """Where walls buckle on their own as they thin, the allowance still ends at a factor of 1."""
    document = heavy(crossed=False, thickness="4 mm")
    document["rating"]["live"][0]["pressure"] = "8 kPa"
    found = [(row.direction, upper(with_loss(document, row.bar, loss), row.bar)) for row, loss in allowed(document)]
    assert "compression" in dict(found)
    assert [factor for _, factor in found] == pytest.approx([1.0] * len(found), abs=1e-6)


@pytest.mark.parametrize("crossed", [False, True])
def test_a_round_bar_loses_diameter(crossed: bool) -> None:
    """The allowance is a part of the diameter, so that the area falls with its square."""
    document = heavy(crossed=crossed)
    document["sections"]["rod"] = {"shape": "round bar", "diameter": "80 mm"}
    rods = ("L1-L2", "U1-L2", "L1-U2") if crossed else ("L1-L2", "U1-L2", "L0-U1")
    for name in rods:
        bar_of(document, name)["section"] = "rod"
    found = {row.bar: loss for row, loss in allowed(document) if row.bar in rods}
    assert "L1-L2" in found
    for bar, loss in found.items():
        assert upper(with_loss(document, bar, 1 - (1 - loss) ** 2), bar) == pytest.approx(1.0, abs=1e-6)


def test_what_is_lost_already_is_not_allowed_again() -> None:
    """The allowance is a part of what remains: with an estimate on record both losses multiply."""
    document = record(heavy(crossed=True), {"bar": "L0-U1", "estimated loss": 0.1})
    row = row_of(rated(document), "only", "L0-U1")
    assert row.loss_allowance
    left = (1 - 0.1) * (1 - row.loss_allowance)
    assert upper(with_loss(document, "L0-U1", 1 - left), "L0-U1") == pytest.approx(1.0, abs=1e-6)


def test_the_allowance_is_the_lower_of_both_answers_about_a_loss_of_unknown_extent() -> None:
    """Where another bar's loss may be short or long, the bar still rates 1 or more in both answers."""
    document = record(heavy(crossed=True), reading("L1-U2", 3.0, extent=None))
    for row, loss in allowed(document):
        if row.bar != "L1-U2":
            assert upper(with_loss(document, row.bar, loss), row.bar) == pytest.approx(1.0, abs=1e-6)


def test_a_bar_below_one_has_no_allowance() -> None:
    """A bar that rates below 1 already may lose nothing: 0, not a negative number."""
    document = heavy(crossed=False)
    document["rating"]["live"][0]["pressure"] = "80 kPa"
    row = row_of(rated(document), "only", "L0-U1")
    factor = row.rating_factor["operating"]
    assert factor is not None
    assert 0.0 < factor < 1.0
    assert row.loss_allowance == 0.0


def test_a_bar_that_keeps_more_than_it_needs_at_any_loss_has_no_allowance_figure() -> None:
    """Where 95 % may go and the factor is still above 1 there is null; a factor of 1 lies beyond."""
    document = short()
    row = row_of(rated(document), "only", "L1-U1")
    assert row.loss_allowance is None
    remaining = upper(with_loss(document, "L1-U1", 0.949), "L1-U1")
    assert remaining is not None
    assert remaining > 1.0


def test_a_bar_without_a_factor_has_no_allowance_figure() -> None:
    """Null where no live load acts."""
    row = row_of(rated(short()), "only", "L2-U2")
    assert (row.rating_factor["operating"], row.loss_allowance) == (None, None)


def test_a_bar_that_is_gone_has_nothing_to_lose() -> None:
    """Severed and cracked bars have an allowance of 0."""
    document = record(
        heavy(crossed=True), {"bar": "U1-L2", "severed": True}, {"bar": "L2-U3", "crack": {"length": "20 mm"}}
    )
    rating = rated(document)
    assert row_of(rating, "only", "L2-U3").check == "cracked"
    assert [row_of(rating, "only", bar).loss_allowance for bar in ("U1-L2", "L2-U3")] == [0.0, 0.0]


def test_a_thin_bar_beside_a_thick_one_sheds_as_it_rusts() -> None:
    """Of a pair the thinner bar's stress hardly changes as it loses steel: no loss brings it to a factor of 1."""
    document = heavy(crossed=False)
    document["sections"]["small"] = {**document["sections"]["tube"], "thickness": "1 mm"}
    add_bar(document, "beside", "L1", "L2")["section"] = "small"
    row = row_of(rated(document), "only", "beside")
    assert (row.direction, row.loss_allowance) == ("tension", None)
    factors = [upper(with_loss(document, "beside", loss), "beside") for loss in (0.001, 0.5, 0.95)]
    assert factors == pytest.approx([factors[0]] * 3, rel=0.2)
    assert row_of(rated(document), "only", "L1-L2").loss_allowance is not None
