"""What the site's own rules and loads make of a rating, and what the rating says it leaves out or does not use."""

from __future__ import annotations

import json
from typing import Any

import pytest
from rewriting.rated import rated, solved
from small.footbridge import add_bar, bar_of, reading, record, short, truss_of, without_bar

from inspector import desk
from inspector.exchange import result, site
from models.errors import BasisNotAvailable
from models.loading.rules import RULES
from models.rating import bar_of as row_of
from models.rating import hand_check
from models.rating.result import Rating
from models.resistance import LRFR, registry

NO_FACTORS = {"inventory": None, "operating": None}


def texts(rating: Rating, level: str, bar: str | None = None) -> list[str]:
    """The findings of a level, of one bar or of none."""
    return [finding.text for finding in rating.findings if finding.level == level and finding.bar == bar]


def with_live(*loads: dict[str, Any]) -> dict[str, Any]:
    """The short bridge under other live loads."""
    document = short()
    document["rating"]["live"] = list(loads)
    return document


def test_dead_load_alone_can_be_too_much() -> None:
    """A bar that its factored dead load exceeds rates 0 by `dead load`, with the margin in kN, and asks to act now."""
    document = short()
    document["deck"]["dead"] = "70 kPa"
    rating = rated(document)
    row = row_of(rating, "only", "L0-U1")
    assert (row.rating_factor, row.check, row.load) == ({"inventory": 0.0, "operating": 0.0}, "dead load", None)
    assert row.loss_allowance == 0.0
    effect = 1.25 * -(row.dead_components or 0.0) + 1.50 * -(row.dead_wearing or 0.0)
    margin = effect - 0.85 * row.compression
    assert margin > 0
    (told,) = texts(rating, "act now", "L0-U1")
    assert f"can carry in compression, by {margin / 1000:.3g} kN" in told
    assert (rating.structure.bar, rating.structure.check) == ("L0-U1", "dead load")
    assert texts(rating, "act now", "L2-U2") == []


def test_dead_load_alone_can_be_too_much_without_any_live_load() -> None:
    """The verdict on dead load does not wait for a live load."""
    document = with_live()
    document["deck"]["dead"] = "70 kPa"
    assert rated(document).structure.rating_factor == {"inventory": 0.0, "operating": 0.0}


def test_a_bar_that_no_live_load_acts_on_has_no_factor() -> None:
    """Where dead load is carried and nothing else acts there is null, never a large number."""
    rating = rated(short())
    row = row_of(rating, "only", "L2-U2")
    assert row.dead_components is not None
    assert row.dead_components < 0
    assert row.live is not None
    assert set(row.live["crowd"]) == {0.0}
    assert (row.rating_factor, row.check, row.load, row.loss_allowance) == (NO_FACTORS, None, None, None)
    document = next(one for one in result.document(rating)["bars"] if one["bar"] == "L2-U2")
    assert document["rating factor"] is None


def test_a_bridge_without_live_loads_has_no_factors() -> None:
    """With no live load every factor is null, the structure's too; forces and resistances stand."""
    rating = rated(with_live())
    assert rating.structure.rating_factor == NO_FACTORS
    assert rating.structure.bar is None
    for row in rating.bars:
        assert (row.rating_factor, row.check, row.live, row.loss_allowance) == (NO_FACTORS, None, {}, None)
        assert row.dead_components is not None


def test_a_bar_that_goes_slack_is_told_of() -> None:
    """A rod that loads would push says in a note that it goes slack; one that is always pulled says nothing."""
    document = short(crossed=True)
    for name in ("L1-U2", "L1-L2"):
        bar_of(document, name)["tension only"] = True
    rating = rated(document)
    assert any("can only pull. It goes slack" in text for text in texts(rating, "note", "L1-U2"))
    assert not any("can only pull" in text for text in texts(rating, "note", "L1-L2"))
    assert {name for bar in rating.bars for name in bar.slack} == {"L1-U2"}


@pytest.mark.parametrize(("given", "used"), [(None, 2.0), (1.0, 2.0), (3.0, 3.0)])
def test_a_half_through_top_chord_takes_a_k_of_two(given: float | None, used: float) -> None:
    """Nothing braces the chord overhead: K out of plane is 2.0 or the file's larger one, and stability is not rated."""
    document, braced = short(), short()
    truss_of(document)["top chord"] = "half through"
    for name in ("U1-U2", "L0-U1"):
        bar_of(braced, name)["k"] = {"out of plane": used}
        if given is not None:
            bar_of(document, name)["k"] = {"out of plane": given}
    rating, expected = rated(document), rated(braced)
    for name in ("U1-U2", "L0-U1"):
        assert row_of(rating, "only", name).compression == row_of(expected, "only", name).compression
        assert any("lateral stability of the chord is not rated" in text for text in texts(rating, "left out", name))
        notes = [text for text in texts(rating, "note", name) if "is not used" in text]
        assert bool(notes) == (given is not None and given < used)
    assert texts(rating, "left out", "L1-U1") == []
    _, outcomes = solved(document)
    lengths = {step.symbol: step.value for step in hand_check(outcomes, "only", "U1-U2").steps}
    assert (lengths["Li"], lengths["Lo"]) == (3.0, used * 3.0)


def test_a_deck_on_the_chord_leaves_its_bending_out() -> None:
    """Bars between deck joints say that the bending between their joints is left out; no other bar does."""
    document = short()
    document["deck"]["rests on"] = "chord"
    rating = rated(document)
    told = {finding.bar for finding in rating.findings if "The deck rests on" in finding.text}
    assert told == {"L0-L1", "L1-L2", "L2-L3", "L3-L4"}
    assert {finding.level for finding in rating.findings if finding.bar in told} == {"left out"}


@pytest.mark.parametrize(("trigger", "calls"), [(10.0, False), (20.0, True)])
def test_the_owner_is_called_below_the_limit_it_set(trigger: float, calls: bool) -> None:
    """A structure below the owner's `act below` asks to act now, and only then."""
    document = short()
    document["owner"] = {"name": "Parks office", "act below": trigger}
    rating = rated(document)
    told = texts(rating, "act now", rating.structure.bar)
    assert bool(told) == calls
    assert all("at which the owner wants to be called" in text for text in told)


def test_bars_not_seen_can_be_taken_with_a_loss() -> None:
    """Under an `unseen` loss a bar that nobody saw has that loss, or what is known of it where that is less."""
    document = short()
    document["rating"]["unseen"] = {"loss": 0.2}
    record(document, reading("L1-L2", 4.0), {"bar": "L0-L1", "seen": "hands on"}, date="2024-05-14")
    record(document, {"bar": "L2-L3", "seen": "at a distance"})
    rating = rated(document)
    left = {row.bar: row.area / row.nominal_area for row in rating.bars}
    assert left["L2-L3"] == 1.0
    assert left["L0-L1"] == pytest.approx(0.8, rel=1e-12)
    assert left["U1-U2"] == pytest.approx(0.8, rel=1e-12)
    assert left["L1-L2"] == pytest.approx(0.5, rel=1e-2)
    assert any("loss of 20 % over the whole bar" in text for text in texts(rating, "assumed", "L0-L1"))


def test_ties_go_to_the_least_truss_and_bar_name() -> None:
    """Equal factors are told by the least (truss, bar) name, whatever the order in the file."""
    document = short()
    truss = document["trusses"].pop("only")
    document["trusses"] = {"right": {**truss, "bars": truss["bars"][::-1]}, "left": {"same as": "right"}}
    structure = rated(document).structure
    assert (structure.truss, structure.bar) == ("left", "L0-U1")


def test_what_is_read_and_not_used_is_told() -> None:
    """Keys that no figure uses yet are named one by one, and the figures are those without them."""
    document = short()
    plain = rated(document)
    document["rating"]["imposed"] = [{"kind": "settlement", "truss": "only", "joint": "L2", "down": "10 mm"}]
    document["half through"] = {"floor beam": {"section": "tube", "material": "steel", "span": "2 m"}}
    document["overrides"] = [{"truss": "only", "bar": "L0-L1", "what": "Fy", "value": "300 MPa", "why": "tests"}]
    bar_of(document, "U1-U2")["stitch spacing"] = "0.5 m"
    rating = rated(document)
    told = sorted(text.split("`")[1] for text in texts(rating, "not used"))
    assert told == ["half through", "overrides", "rating/imposed/0", "stitch spacing"]
    assert [row.rating_factor for row in rating.bars] == [row.rating_factor for row in plain.bars]
    assert set(row_of(rating, "only", "L0-L1").live or {}) == {"crowd"}


@pytest.mark.parametrize(("rule", "pressure"), [("en 1991-2", "5 kPa"), ("aashto 1997", "85 psf")])
def test_a_crowd_by_rule_on_a_small_deck_is_one_at_its_greatest_pressure(rule: str, pressure: str) -> None:
    """A rule rates like a pressure; up to 10 m, or 400 ft², it is the greatest, and its text and source are printed."""
    by_rule = {"name": "people", "kind": "crowd", "rule": rule}
    plain = {"name": "people", "kind": "crowd", "pressure": pressure}
    documents = [with_live(load) for load in (by_rule, plain)]
    for document in documents:
        for joint in truss_of(document)["joints"].values():
            joint[0] = f"{float(joint[0].split()[0]) * 2 / 3:.6f} m"
    found, expected = (rated(document) for document in documents)
    for row, other in zip(found.bars, expected.bars, strict=True):
        assert row.live is not None
        assert other.live is not None
        assert row.live["people"] == pytest.approx(other.live["people"], rel=1e-12)
    assert found.structure.rating_factor == pytest.approx(expected.structure.rating_factor, rel=1e-12)
    assert not texts(found, "not used")
    line = next(line for line in found.loads if line.what == "people (crowd)")
    assert (line.value.startswith(RULES[rule].text), line.source) == (True, RULES[rule].source)


def test_a_load_with_a_crowd_by_rule_beside_it() -> None:
    """A combination takes a crowd by rule at its own worst, times its factor."""
    people = {"name": "people", "kind": "crowd", "rule": "en 1991-2"}
    cart = {"name": "cart", "kind": "concentrated", "force": "5 kN"}
    both = {**cart, "with": [{"load": "people", "factor": 0.4}]}
    rating, alone = rated(with_live(both, people)), rated(with_live(cart, people))
    for row, other in zip(rating.bars, alone.bars, strict=True):
        assert row.live is not None
        assert other.live is not None
        expected = other.live["cart"].maximum + 0.4 * other.live["people"].maximum
        assert row.live["cart"].maximum == pytest.approx(expected, rel=1e-12)


def test_a_basis_that_is_not_built_is_refused_by_name(monkeypatch: pytest.MonkeyPatch) -> None:
    """The file itself is in order and can be read; only rating it by that basis is refused, naming what there is."""
    document = short()
    document["rating"]["basis"] = "eurocode"
    found = site.read(json.dumps(document))
    monkeypatch.setattr(registry, "BASES", {"lrfr": LRFR})
    with pytest.raises(BasisNotAvailable, match=r"eurocode.*lrfr"):
        desk.rate(found)


def test_a_support_that_would_lift_is_told() -> None:
    """A crowd on an overhang can lift the far support; the least reaction is printed with its load."""
    document = short()
    truss_of(document)["supports"] = {"L1": "pin", "L3": "roller"}
    document["rating"]["live"][0]["pressure"] = "20 kPa"
    rating = rated(document)
    reaction = {each.joint: each for each in rating.trusses["only"].reactions}["L3"]
    components, wearing = rating.trusses["only"].dead_total
    lift = 1.75 * 20e3 * 2.0 * 3.0 * 1.5 / 6.0
    assert reaction.dead == pytest.approx((components + wearing) / 2, rel=1e-9)
    assert reaction.least == pytest.approx((0.90 * components + 0.65 * wearing) / 2 - lift, rel=1e-9)
    assert reaction.load == "crowd"
    assert any("at L3 is" in text and "would lift" in text for text in texts(rating, "note"))


def test_two_bars_between_the_same_joints_share_their_load() -> None:
    """A pair is two bars, each with half the force of one; a finding names them."""
    alone, pair = short(), without_bar(short(), "L1-L2")
    for name in ("near L1-L2", "far L1-L2"):
        add_bar(pair, name, "L1", "L2", "bottom chord")
    one, two = rated(alone), rated(pair)
    whole = row_of(one, "only", "L1-L2")
    for name in ("near L1-L2", "far L1-L2"):
        half = row_of(two, "only", name)
        assert half.live is not None
        assert whole.live is not None
        assert half.live["crowd"].maximum == pytest.approx(whole.live["crowd"].maximum / 2, rel=1e-9)
        assert half.without_it != "mechanism"
    assert two.trusses["only"].verdict == "redundant"
    assert any("near L1-L2, far L1-L2 join the same joints" in text for text in texts(two, "note"))
