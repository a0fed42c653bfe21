"""Settlements, changes of temperature and bars made short in a rating."""

from __future__ import annotations

import copy
from typing import Any

import pytest
from rewriting.rated import rated, solved
from small.footbridge import record, short, truss_of

from inspector.exchange import result
from models.rating import bar_of as row_of
from models.rating import hand_check
from models.rating.result import Rating
from models.resistance.lrfr import LRFR

JSON = dict[str, Any]
SHORT = {"kind": "length", "truss": "only", "bar": "L1-U2", "short": "1 mm"}
LONG = {"kind": "length", "truss": "only", "bar": "U1-L2", "short": "-0.7 mm"}
COLD = {"kind": "temperature", "change": -30}


def with_imposed(document: JSON, *imposed: JSON) -> JSON:
    """The same bridge with changes imposed on it."""
    changed = copy.deepcopy(document)
    changed["rating"]["imposed"] = list(imposed)
    return changed


def three_supports() -> JSON:
    """The short bridge with a support at midspan."""
    document = short()
    truss_of(document)["supports"]["L2"] = "roller"
    return document


def factors(rating: Rating) -> list[float | None]:
    """All factors at the upper level."""
    return [row.rating_factor["operating"] for row in rating.bars]


@pytest.mark.parametrize("change", [COLD, SHORT | {"bar": "U1-L2"}])
def test_nothing_in_a_determinate_truss(change: JSON) -> None:
    """A determinate truss goes along: the same figures, and zeros for what is imposed."""
    plain, changed = rated(short()), rated(with_imposed(short(), change))
    assert factors(changed) == factors(plain)
    assert [row.imposed for row in changed.bars] == [(0.0, 0.0)] * len(changed.bars)
    assert all(row.imposed is None for row in plain.bars)


def test_a_short_bar_takes_from_what_is_left() -> None:
    """What is imposed counts with the factor of components where it acts, and not at all where it relieves."""
    plain, changed = rated(short(crossed=True)), rated(with_imposed(short(crossed=True), SHORT))
    acted = 0
    for row, other in zip(changed.bars, plain.bars, strict=True):
        assert row.imposed is not None
        assert (row.dead_components, row.live) == (other.dead_components, other.live)
        if row.direction != other.direction or row.demand is None or other.demand is None:
            continue
        adds = row.imposed.maximum if row.direction == "tension" else -row.imposed.minimum
        assert row.demand == pytest.approx(other.demand + 1.25 * adds, rel=1e-12, abs=1e-6)
        acted += adds > 1.0
    assert acted >= 3
    assert min(factors(changed), key=lambda f: f or 0) <= min(factors(plain), key=lambda f: f or 0)


def test_no_factor_rises() -> None:
    """Whatever is imposed, no bar rates higher than without it."""
    document = short(crossed=True)
    plain = factors(rated(document))
    for changes in ((SHORT,), (LONG,), (SHORT, LONG), (COLD, LONG)):
        for now, before in zip(factors(rated(with_imposed(document, *changes))), plain, strict=True):
            assert now is not None
            assert before is not None
            assert now <= before * (1 + 1e-12)


def test_changes_never_relieve_each_other() -> None:
    """Two opposite changes stand beside each other: each may be there alone."""
    back = SHORT | {"short": "-1 mm"}
    one = row_of(rated(with_imposed(short(crossed=True), SHORT)), "only", "L1-U2")
    both = row_of(rated(with_imposed(short(crossed=True), SHORT, back)), "only", "L1-U2")
    assert one.imposed is not None
    assert both.imposed is not None
    assert both.imposed == pytest.approx((one.imposed.maximum, -one.imposed.maximum), rel=1e-12)


def test_what_is_left_without_a_bar_has_its_imposed_forces_too() -> None:
    """`without it` is the lowest factor of the same bridge with that bar severed, imposed changes included."""
    document = with_imposed(short(crossed=True), SHORT, COLD)
    for row in rated(document).bars:
        gone = rated(record(copy.deepcopy(document), {"bar": row.bar, "severed": True}))
        if row.without_it == "mechanism":
            assert not gone.trusses["only"].carries
        else:
            left = [each.rating_factor["operating"] for each in gone.bars if each.bar != row.bar]
            assert row.without_it == pytest.approx(min(factor for factor in left if factor is not None), rel=1e-9)


def test_the_loss_allowance_leaves_a_factor_of_one() -> None:
    """A bar that thins sheds imposed force as it sheds load: after its allowance is gone, its factor is 1."""
    document = with_imposed(short(crossed=True), SHORT | {"short": "6 mm"})
    row = row_of(rated(document), "only", "L1-U2")
    assert row.loss_allowance is not None
    thin = rated(record(document, {"bar": "L1-U2", "estimated loss": row.loss_allowance, "state": "fair"}))
    assert row_of(thin, "only", "L1-U2").rating_factor["operating"] == pytest.approx(1.0, rel=1e-6)


def test_a_settlement_takes_from_the_least_reaction() -> None:
    """A middle support that goes down presses less: its least reaction falls by 1.25 of that, the dead one stays."""
    changes = [{"kind": "settlement", "truss": "only", "joint": "L2", "down": f"{mm} mm"} for mm in (5, -5)]
    plain, down, up = (rated(with_imposed(three_supports(), *some)) for some in ([], changes[:1], changes[1:]))
    (middle,) = (one for one in plain.trusses["only"].reactions if one.joint == "L2")
    (lower,) = (one for one in down.trusses["only"].reactions if one.joint == "L2")
    (higher,) = (one for one in up.trusses["only"].reactions if one.joint == "L2")
    assert lower.dead == middle.dead
    assert lower.least < middle.least
    assert higher.least == middle.least
    ends = [one.least for one in up.trusses["only"].reactions if one.joint != "L2"]
    assert sum(ends) == pytest.approx(
        sum(one.least for one in plain.trusses["only"].reactions if one.joint != "L2") + lower.least - middle.least
    )


def test_a_severed_bar_brings_no_misfit() -> None:
    """A bar that is gone cannot be too short."""
    document = record(with_imposed(short(crossed=True), SHORT), {"bar": "L1-U2", "severed": True})
    assert {row.imposed for row in rated(document).bars if row.bar != "L1-U2"} == {(0.0, 0.0)}


def test_imposed_forces_in_the_result_file() -> None:
    """The key stands in every row of a site that imposes something, and in no other."""
    made = result.document(rated(with_imposed(short(crossed=True), SHORT)))
    assert {tuple(bar["imposed"]) for bar in made["bars"]} == {("max", "min")}
    assert not any("imposed" in bar for bar in result.document(rated(short(crossed=True)))["bars"])


def test_the_hand_check_works_it_in() -> None:
    """A line for the imposed force and one for its factor lead to the same rating factor."""
    document = with_imposed(short(crossed=True), SHORT | {"short": "6 mm"})
    row = row_of(rated(document), "only", "L1-U2")
    steps = {step.symbol: step for step in hand_check(solved(document)[1], "only", "L1-U2").steps}
    assert row.imposed is not None
    assert steps["IM"].value == pytest.approx(row.imposed.maximum)
    assert (steps["gIM"].value, steps["gIM"].source) == (1.25, LRFR.components.source)
    assert steps["RF operating"].value == pytest.approx(row.rating_factor["operating"], rel=1e-12)


def test_loads_and_assumptions_name_what_is_imposed() -> None:
    """Each change is a line with its source; the assumed expansion stands among the assumptions."""
    settled = {"kind": "settlement", "truss": "only", "joint": "L4", "down": "12 mm"}
    rating = rated(with_imposed(short(crossed=True), SHORT, COLD, settled))
    lines = {line.what: line for line in rating.loads}
    assert lines["L1-U2 made short, truss only"].value == "1 mm"
    assert lines["change of temperature, all trusses"].value == "-30 K, 12 µm/m per K"
    assert lines["settlement of L4, truss only"].value == "12 mm down"
    assert lines["imposed changes, load factor"].value.startswith("1.25")
    assert any("0.000012" in text for text in rating.assumptions)
    given = rated(with_imposed(short(), COLD | {"expansion": 0.00001}))
    assert not any("expand" in text for text in given.assumptions)
