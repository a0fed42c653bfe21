"""What a rating says when bars are gone, doubtful or slack, or when the truss does not stand."""

from __future__ import annotations

from typing import Any

import pytest
from rewriting.rated import rated
from small.footbridge import add_bar, reading, record, short, truss_of, without_bar

from inspector.exchange import result
from models.rating import bar_of
from models.rating.result import BarRating, Rating

NO_FACTORS = {"inventory": None, "operating": None}
ZERO = {"inventory": 0.0, "operating": 0.0}


def upper(row: BarRating) -> float:
    """The rating factor at the upper level of a bar that has one."""
    factor = row.rating_factor["operating"]
    assert factor is not None
    return factor


def factors(rating: Rating) -> dict[str, float | None]:
    """Rating factors at the upper level of every bar of the first truss."""
    first = next(iter(rating.trusses.values()))
    return {row.bar: row.rating_factor["operating"] for row in first.bars}


def urgent(rating: Rating) -> list[tuple[str | None, str | None]]:
    """Truss and bar of the findings that tell to act now."""
    return [(finding.truss, finding.bar) for finding in rating.findings if finding.level == "act now"]


def flat_joint(rise: str) -> dict[str, Any]:
    """A crossed truss whose top chord is broken by a joint that only the chord's own slight rise holds."""
    document = without_bar(short(crossed=True), "U1-U2")
    truss_of(document)["joints"]["F"] = ["4.5 m", rise]
    add_bar(document, "U1-F", "U1", "F", "top chord")
    add_bar(document, "F-U2", "F", "U2", "top chord")
    return document


def test_a_severed_bar_of_a_determinate_truss_leaves_a_mechanism() -> None:
    """The truss moves, the joints that move are named, the structure rates 0, and everyone is told to act."""
    rating = rated(record(short(two=True), {"bar": "L1-L2", "severed": True}))
    left = rating.trusses["left"]
    assert (left.verdict, left.mechanisms, left.degree, left.bars_standing) == ("mechanism", 1, -1, 12)
    assert left.moving_joints == ("L1", "L2", "L3", "L4", "U1", "U2", "U3")
    assert left.loose_bars == ("L0-L1", "L0-U1")
    structure = rating.structure
    assert structure.rating_factor == ZERO
    assert (structure.truss, structure.bar, structure.check, structure.load) == (None, None, None, None)
    assert ("left", None) in urgent(rating)
    assert ("left", "L1-L2") in urgent(rating)
    told = next(finding.text for finding in rating.findings if finding.truss == "left" and finding.bar is None)
    assert "7 joints move: L1, L2" in told


def test_bars_of_a_mechanism_keep_what_needs_no_forces() -> None:
    """Area and resistance stay, forces and factors are null; the severed bar has area and rating factor 0."""
    document = result.document(rated(record(short(two=True), {"bar": "L1-L2", "severed": True})))
    rows = {(row["truss"], row["bar"]): row for row in document["bars"]}
    gone = rows["left", "L1-L2"]
    assert (gone["area"], gone["rating factor"], gone["check"], gone["load"]) == (0, ZERO, "severed", None)
    for bar in ("L0-L1", "U1-U2", "L2-U2"):
        row = rows["left", bar]
        keys = ("dead", "live", "rating factor", "check", "load", "loss allowance", "without it")
        assert [row[key] for key in keys] == [None] * len(keys)
        assert row["area"] == row["nominal area"] > 0
        assert row["resistance"]["tension"] > row["resistance"]["compression"] > 0


def test_the_other_truss_is_rated_as_usual() -> None:
    """A mechanism on one side takes no figure from the other side, and lends it none."""
    sound, broken = rated(short(two=True)), rated(record(short(two=True), {"bar": "L1-L2", "severed": True}))
    for before, after in zip(sound.trusses["right"].bars, broken.trusses["right"].bars, strict=True):
        assert after.rating_factor == before.rating_factor
        assert after.live == before.live


@pytest.mark.parametrize("bar", ["L0-L1", "U1-U2", "L2-U2", "L2-U3"])
def test_each_severed_bar_of_a_determinate_truss_is_enough(bar: str) -> None:
    """No bar of a determinate truss can be spared, not even one that no load acts on."""
    rating = rated(record(short(), {"bar": bar, "severed": True}))
    assert rating.trusses["only"].verdict == "mechanism"
    assert rating.structure.rating_factor == ZERO


@pytest.mark.parametrize(
    ("supports", "mechanisms"), [({}, 3), ({"L0": "roller", "L4": "roller"}, 1), ({"L2": "pin"}, 1)]
)
def test_a_truss_that_nothing_holds_is_a_mechanism(supports: dict[str, str], mechanisms: int) -> None:
    """Without supports, on rollers alone or on one pin a truss moves as a whole, and that is said, not an error."""
    document = short()
    truss_of(document)["supports"] = supports
    rating = rated(document)
    truss = rating.trusses["only"]
    assert (truss.verdict, truss.mechanisms) == ("mechanism", mechanisms)
    assert set(truss.moving_joints) >= {"L0", "L4", "U1"}
    assert rating.structure.rating_factor == ZERO
    assert urgent(rating) == [("only", None)]


def test_a_joint_that_is_almost_flat_has_no_forces() -> None:
    """Beyond a condition of 1e8 a truss is nearly a mechanism: its flat joint is named and nothing is rated."""
    rating = rated(flat_joint("3.000000002 m"))
    truss = rating.trusses["only"]
    assert (truss.verdict, truss.mechanisms) == ("nearly a mechanism", 0)
    assert truss.moving_joints == ("F",)
    assert truss.loose_bars == ("U1-F", "F-U2")
    assert rating.structure.rating_factor == ZERO
    assert all(row.dead_components is None and row.rating_factor == NO_FACTORS for row in truss.bars)
    assert any("nearly a mechanism" in finding.text and finding.level == "act now" for finding in rating.findings)


def test_a_joint_that_is_flat_but_held_is_rated() -> None:
    """On the other side of that limit the truss has forces, and a movement that is too large is doubtful."""
    rating = rated(flat_joint("3.0001 m"))
    assert rating.trusses["only"].verdict == "redundant"
    assert bar_of(rating, "only", "U1-F").dead_components is not None
    assert any("more than a fiftieth" in finding.text for finding in rating.findings if finding.level == "doubtful")


def test_a_severed_bar_of_a_redundant_truss_passes_its_load_on() -> None:
    """The others carry on without it, and the structure's factor is the lowest of those that still carry."""
    rating = rated(record(short(crossed=True), {"bar": "U1-L2", "severed": True}))
    gone = bar_of(rating, "only", "U1-L2")
    assert (gone.area, gone.rating_factor, gone.check) == (0, ZERO, "severed")
    assert (gone.dead_components, gone.live) == (None, None)
    truss = rating.trusses["only"]
    assert (truss.verdict, truss.degree, truss.bars_standing) == ("redundant", 1, 14)
    assert rating.structure.bar == "L0-U1"
    assert rating.structure.rating_factor["operating"] == pytest.approx(
        min(factor for bar, factor in factors(rating).items() if factor is not None and bar != "U1-L2"), rel=1e-12
    )
    assert urgent(rating) == [("only", "U1-L2")]


def test_a_severed_bar_still_weighs() -> None:
    """A bar that is cut through hangs where it is; it lightens nothing."""
    whole, cut = rated(short(crossed=True)), rated(record(short(crossed=True), {"bar": "U1-L2", "severed": True}))
    assert cut.trusses["only"].dead_total == whole.trusses["only"].dead_total


def test_a_crack_in_a_pulled_bar_gets_no_credit() -> None:
    """The figures are those without the cracked bar, and those with it whole stand beside."""
    cracked = rated(record(short(crossed=True), {"bar": "U1-L2", "crack": {"length": "20 mm"}}))
    severed = rated(record(short(crossed=True), {"bar": "U1-L2", "severed": True}))
    row = bar_of(cracked, "only", "U1-L2")
    assert row.area == row.nominal_area
    assert (row.rating_factor, row.check, row.load) == (ZERO, "cracked", None)
    assert (row.dead_components, row.live) == (None, None)
    assert {**factors(cracked), "U1-L2": 0.0} == factors(severed)
    assert cracked.structure == severed.structure
    held = cracked.if_cracked_bars_hold
    assert held is not None
    assert held == rated(short(crossed=True)).structure
    assert urgent(cracked) == [("only", "U1-L2")]


def test_a_crack_in_a_pulled_bar_of_a_determinate_truss_leaves_a_mechanism() -> None:
    """The headline is 0; the row says why, and the answer with the bar whole still stands beside."""
    rating = rated(record(short(), {"bar": "L1-L2", "crack": {"note": "across the bottom wall"}}))
    assert rating.trusses["only"].verdict == "mechanism"
    assert rating.structure.rating_factor == ZERO
    assert bar_of(rating, "only", "L1-L2").check == "cracked"
    assert bar_of(rating, "only", "L1-L2").rating_factor == ZERO
    assert bar_of(rating, "only", "L0-L1").rating_factor == NO_FACTORS
    assert rating.if_cracked_bars_hold == rated(short()).structure


def test_a_crack_in_a_pushed_bar_leaves_it_in() -> None:
    """Where no factored load pulls a cracked bar it still counts, and a finding says what is left out."""
    rating = rated(record(short(), {"bar": "U1-U2", "crack": {"length": "20 mm"}}))
    assert factors(rating) == factors(rated(short()))
    assert rating.if_cracked_bars_hold is None
    assert urgent(rating) == []
    assert [finding.bar for finding in rating.findings if finding.level == "left out"] == ["U1-U2"]


def test_a_crack_that_was_taken_back_is_gone() -> None:
    """A later entry that takes a crack back gives the bar its credit again."""
    document = record(short(), {"bar": "L1-L2", "crack": {}}, date="2025-05-14")
    rating = rated(record(document, {"bar": "L1-L2", "crack": None}))
    assert factors(rating) == factors(rated(short()))


def test_a_slack_bar_is_rated_both_ways() -> None:
    """Each bar has the lower of the answers with the slack bar and without it; the one with it in stands beside."""
    rating = rated(record(short(crossed=True), {"bar": "U1-L2", "slack": True}))
    pulling = factors(rated(short(crossed=True)))
    hanging = factors(rated(record(short(crossed=True), {"bar": "U1-L2", "severed": True})))
    hanging["U1-L2"] = None
    for bar, factor in factors(rating).items():
        both = [answer[bar] for answer in (pulling, hanging)]
        assert factor == pytest.approx(min(one for one in both if one is not None), rel=1e-9)
    assert hanging != pulling
    assert rating.if_slack_bars_pull == rated(short(crossed=True)).structure
    assert any(finding.bar == "U1-L2" and "slack" in finding.text for finding in rating.findings)


def test_a_slack_bar_of_a_determinate_truss_leaves_a_mechanism() -> None:
    """Without the bar the truss does not stand, so nothing is rated; the answer with the bar in stands beside."""
    rating = rated(record(short(), {"bar": "L1-L2", "slack": True}))
    assert rating.trusses["only"].verdict == "mechanism"
    assert rating.structure.rating_factor == ZERO
    assert rating.if_slack_bars_pull == rated(short()).structure


def test_a_crack_counts_as_pulled_if_either_answer_about_a_slack_bar_pulls_it() -> None:
    """Whether the slack diagonal takes load decides the sign in its cracked partner: the worse sign counts."""
    slack, cut = {"bar": "U1-L2", "slack": True}, {"bar": "U1-L2", "severed": True}
    crack = {"bar": "L1-U2", "crack": {"length": "20 mm"}}
    for said, check in (([crack], "cracked"), ([cut, crack], "flexural buckling"), ([slack, crack], "cracked")):
        document = short(crossed=True)
        document["deck"]["dead"] = "1.5 kPa"
        assert bar_of(rated(record(document, *said)), "only", "L1-U2").check == check


def test_a_hole_that_leaves_no_steel_is_as_good_as_severed() -> None:
    """Readings of zero on every wall at one place end the bar, and the finding says that readings did it."""
    rating = rated(record(short(crossed=True), reading("U1-L2", 0.0)))
    severed = rated(record(short(crossed=True), {"bar": "U1-L2", "severed": True}))
    assert factors(rating) == factors(severed)
    row = bar_of(rating, "only", "U1-L2")
    assert (row.area, row.check) == (0, "severed")
    assert [finding.text for finding in rating.findings if finding.level == "act now"] == [
        "The readings on U1-L2 leave no steel at one place; it is treated as severed."
    ]


def test_a_hole_in_one_wall_leaves_the_others() -> None:
    """A plate that is gone at one place takes its area with it there, and no more."""
    row = bar_of(rated(record(short(), reading("L1-L2", 0.0, 8.0))), "only", "L1-L2")
    assert row.area == pytest.approx(row.nominal_area - 0.2 * 0.008, rel=1e-12)
    assert row.check == "tension yield"


def test_loss_of_unknown_extent_keeps_the_lower_of_both_factors() -> None:
    """In a redundant truss each bar has the lower factor of two ratings: the loss at no length, and over all of it."""
    unknown = factors(rated(record(short(crossed=True), reading("U1-L2", 2.0, extent=None))))
    nowhere = factors(rated(record(short(crossed=True), reading("U1-L2", 2.0, extent="0.000001 mm"))))
    everywhere = factors(rated(record(short(crossed=True), reading("U1-L2", 2.0, extent="100 m"))))
    lower = set()
    for bar, factor in unknown.items():
        least, other = sorted((answer[bar] or 0.0, name) for answer, name in ((nowhere, "none"), (everywhere, "all")))
        assert factor == pytest.approx(least[0], rel=1e-5)
        if other[0] > 1.01 * least[0]:
            lower.add(least[1])
    assert lower == {"none", "all"}


def test_loss_of_unknown_extent_costs_a_determinate_truss_nothing() -> None:
    """Where forces do not depend on stiffness there is one answer, with every force as before."""
    before, after = rated(short()), rated(record(short(), reading("L1-L2", 4.0, extent=None)))
    for one, other in zip(before.bars, after.bars, strict=True):
        assert (one.dead_components, one.live) == (other.dead_components, other.live)
    assert upper(bar_of(after, "only", "L1-L2")) < upper(bar_of(before, "only", "L1-L2"))
