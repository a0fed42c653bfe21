"""Whole ratings of footbridges with bars that cannot push."""

from __future__ import annotations

from typing import Any

import numpy as np
import pytest
from benchmark.crossed import crossed_rods
from rewriting.rated import rated
from small.footbridge import add_bar, bar_of, record, short

from models.rating.result import BarRating, Rating

JSON = dict[str, Any]


def rows(rating: Rating) -> dict[str, BarRating]:
    """The rows by bar."""
    return {bar.bar: bar for bar in rating.bars}


def marked(document: JSON, *names: str) -> JSON:
    """The same bridge with bars that cannot push."""
    for name in names:
        bar_of(document, name)["tension only"] = True
    return document


def same(one: Rating, other: Rating) -> None:
    """Every figure of both is the same, to rounding."""
    for bar, twin in zip(one.bars, other.bars, strict=True):
        for name in ("dead_components", "dead_wearing", "demand", "loss_allowance", "without_it"):
            expected = getattr(twin, name)
            same_value = (
                expected if isinstance(expected, str) or expected is None else pytest.approx(expected, rel=1e-9)
            )
            assert getattr(bar, name) == same_value
        assert (bar.check, bar.load, bar.slack) == (twin.check, twin.load, ())
        for level, factor in twin.rating_factor.items():
            assert bar.rating_factor[level] == (None if factor is None else pytest.approx(factor, rel=1e-9))


def test_bars_that_are_never_pushed_change_nothing() -> None:
    """A tie that no load pushes may be marked or not."""
    same(rated(marked(short(crossed=True), "L1-L2", "L2-L3", "L1-U1")), rated(short(crossed=True)))


def test_a_rod_that_is_pushed_leaves_its_panel_to_the_other_one() -> None:
    """With rods crossed in two panels the one that is pushed is slack, and forces are those without it."""
    found = rows(rated(marked(short(crossed=True), "U1-L2", "L1-U2", "U2-L3", "L2-U3")))
    cut = [{"bar": name, "severed": True} for name in ("L1-U2", "U2-L3")]
    plain = rows(rated(record(short(crossed=True), *cut)))
    for name in ("U1-L2", "L2-U3", "U1-U2", "L2-U2"):
        assert found[name].dead_components == pytest.approx(plain[name].dead_components, rel=1e-9)
    for name in ("L1-U2", "U2-L3"):
        assert found[name].dead_components == 0.0
        assert name in found["U1-U2"].slack
    assert found["U1-U2"].rating_factor["operating"] == pytest.approx(plain["U1-U2"].rating_factor["operating"])


def test_the_only_diagonal_of_a_panel_limits_every_bar_when_it_would_be_pushed() -> None:
    """A Pratt truss whose middle diagonals cannot push: beyond some crowd on one side there is no equilibrium."""
    document = marked(short(), "U1-L2", "L2-U3")
    rating = rated(document)
    limited = [bar for bar in rating.bars if bar.check == "equilibrium"]
    assert limited
    assert len({bar.rating_factor["operating"] for bar in limited}) == 1
    factor = limited[0].rating_factor["operating"]
    assert factor is not None
    assert factor > 0.0
    assert rating.structure.rating_factor["operating"] <= factor
    assert any("no equilibrium beyond" in finding.text for finding in rating.findings)
    linear = rows(rated(short()))["U1-L2"]
    assert linear.live is not None
    assert linear.dead_components is not None
    assert linear.dead_wearing is not None
    least = 0.9 * linear.dead_components + 0.65 * linear.dead_wearing
    assert factor == pytest.approx(least / (1.35 * -linear.live["crowd"].minimum), rel=1e-6)


def test_dead_load_that_needs_a_push_is_a_mechanism() -> None:
    """End posts that cannot push carry nothing: no forces, factor 0, and the finding names what would have to push."""
    rating = rated(marked(short(), "L0-U1"))
    assert rating.trusses["only"].verdict == "mechanism"
    assert rating.trusses["only"].moving_joints
    assert rating.structure.rating_factor == {"inventory": 0.0, "operating": 0.0}
    assert all(bar.live is None for bar in rating.bars)
    told = [finding.text for finding in rating.findings if finding.level == "act now"]
    assert any("would need a push from bars that can only pull (L0-U1)" in text for text in told)


def test_a_counter_that_acts_only_far_beyond_all_others_carries_nothing() -> None:
    """A counter against the shear of a heavy deck is slack under what governs the others, and has no force."""
    document = short()
    counter = add_bar(document, "L1-U2", "L1", "U2", "counter")
    counter["tension only"] = True
    document["deck"]["dead"] = "20 kPa"
    rating = rated(document)
    found = rows(rating)["L1-U2"]
    assert found.dead_components == 0.0
    assert found.live is not None
    assert found.live["crowd"].maximum == 0.0
    others = [bar for bar in rating.bars if bar.bar != "L1-U2"]
    lowest = min(others, key=lambda bar: bar.rating_factor["operating"] or np.inf)
    assert lowest.slack == ("L1-U2",)
    factors = [bar.rating_factor["operating"] for bar in others]
    assert found.rating_factor["operating"] > 2 * min(factor for factor in factors if factor is not None)


def test_figures_do_not_hang_together_wrongly() -> None:
    """Forces, factors, allowances and losses of a crossed truss of rods agree with each other."""
    document = crossed_rods(6)
    rating = rated(document)
    for bar in rating.bars:
        factor = bar.rating_factor["operating"]
        assert bar.live is not None
        assert bar.live["crowd"].maximum >= 0.0 >= bar.live["crowd"].minimum
        if bar.demand is not None and factor is not None:
            assert (bar.demand <= bar.capacity * (1 + 1e-9)) == (factor >= 1 - 1e-9)
        if bar.role == "diagonal":
            assert bar.dead_components is not None
            assert bar.dead_wearing is not None
            assert bar.live["crowd"].minimum + bar.dead_components + bar.dead_wearing >= -1e-6
            assert bar.direction in (None, "tension")
    assert sum(bar.without_it == "mechanism" for bar in rating.bars) > 6


def test_what_is_left_without_a_rod_is_what_the_truss_without_it_rates() -> None:
    """`without it` of a rod is the lowest factor of the same bridge with that rod severed."""
    document = crossed_rods(6)
    whole = rows(rated(document))
    compared = 0
    for name in ("U2-L3", "L2-U3", "L3-U4", "L0-U1", "L2-L3"):
        severed = rated(record(crossed_rods(6), {"bar": name, "severed": True}))
        remains = whole[name].without_it
        if remains == "mechanism":
            assert not severed.trusses["only"].carries
            continue
        factors = [bar.rating_factor["operating"] for bar in severed.bars if bar.check != "severed"]
        lowest = min(factor for factor in factors if factor is not None)
        assert remains == pytest.approx(lowest, rel=0.02)
        compared += 1
    assert compared


def test_a_bar_may_lose_what_its_allowance_says() -> None:
    """With that much of a bar gone, and the forces solved again, its factor is still 1."""
    document = crossed_rods(4)
    found = rows(rated(document))
    for name in ("U0-L1", "U1-U2", "L1-L2"):
        allowance = found[name].loss_allowance
        if not allowance:
            continue
        again = rows(
            rated(record(crossed_rods(4), {"bar": name, "estimated loss": float(np.round(allowance - 1e-6, 6))}))
        )
        factor = again[name].rating_factor["operating"]
        assert factor is not None
        assert factor >= 1.0 - 1e-6
