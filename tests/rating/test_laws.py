"""Laws of statics and strength that every rating obeys, on generated footbridges, and the shape of its document."""

from __future__ import annotations

import copy
import math
from collections import Counter
from collections.abc import Iterator
from typing import Any

import numpy as np
from hypothesis import Phase, assume, given, settings
from hypothesis import strategies as st
from independent import loads
from independent.rate import expanded
from independent.units import si
from rewriting.rated import rated, solved
from strategies.sites import sites

from inspector.exchange import result
from models.condition import Condition
from models.rating.outcome import Outcome
from models.rating.rows import reactions_of, rows_of

JSON = dict[str, Any]
Labelled = tuple[JSON, frozenset[str]]
Forces = dict[str, float]

ROUNDING = 1e-9
LAST_DIGITS = 1e-12
"""Figures of bars in arrays of another shape may differ in their last digits."""
CLASSES = ("redundant", "continuous", "one truss", "overhanging deck", "damaged")
SHARE = 0.10
DRAWS = 60

few = settings(max_examples=12)


def test_every_class_has_its_share_of_the_generated_bridges() -> None:
    """Redundant, continuous, single, overhanging and damaged trusses are each a tenth of what is drawn, or more."""
    shares: Counter[str] = Counter()

    @settings(max_examples=DRAWS, phases=[Phase.generate], database=None)
    @given(sites())
    def count(drawn: Labelled) -> None:
        labels = drawn[1]
        shares.update(labels | {"drawn"} | (set() if "never visited" in labels else {"damaged"}))

    count()
    assert shares["drawn"] >= DRAWS
    assert {name: shares[name] for name in CLASSES if shares[name] < SHARE * shares["drawn"]} == {}


def what_is_left(truss: JSON, forces: Forces, down: Forces) -> tuple[float, Forces]:
    """The largest force at any joint that nothing takes, and what each support has to push upward, N.

    Parameters
    ----------
    forces : tension in each bar that is in. down : load on joints.
    """
    places = {joint: np.array([si(x), si(y)]) for joint, (x, y) in truss["joints"].items()}
    left = {joint: np.array([0.0, -down.get(joint, 0.0)]) for joint in places}
    for bar in truss["bars"]:
        along = places[bar["to"]] - places[bar["from"]]
        pull = forces.get(bar["id"], 0.0) * along / math.hypot(*along)
        left[bar["from"]] = left[bar["from"]] + pull
        left[bar["to"]] = left[bar["to"]] - pull
    held = truss["supports"]
    free = [abs(left[joint][1]) for joint in left if joint not in held]
    free += [abs(left[joint][0]) for joint in left if held.get(joint) != "pin"]
    return float(max(free)), {joint: -float(left[joint][1]) for joint in held}


def dead_on_joints(document: JSON, name: str, truss: JSON, condition: Condition) -> Forces:
    """Dead load on each joint by the loads of the independent solution, N."""
    weighed = []
    for bar in truss["bars"]:
        now = condition.bars[name, bar["id"]]
        (x1, y1), (x2, y2) = (map(si, truss["joints"][bar[end]]) for end in ("from", "to"))
        length = math.hypot(x2 - x1, y2 - y1)
        weighed.append((bar, length, document["sections"][now.section], document["materials"][now.material]))
    components, wearing = loads.dead(document, name, truss, weighed)
    return {joint: components[joint] + wearing[joint] for joint in components}


def dead_states(outcome: Outcome) -> Iterator[tuple[Forces, Forces]]:
    """Bar forces and reactions under dead load: as the rating gives them out, or of each of several answers."""
    assert outcome.solved is not None
    if len(outcome.solved.answers) == 1:
        rows, reactions = rows_of(outcome, {}), reactions_of(outcome)
        forces = {row.bar: row.dead_components + (row.dead_wearing or 0.0) for row in rows if row.dead_components}
        yield forces, {reaction.joint: reaction.dead for reaction in reactions}
        return
    geometry = outcome.prepared.geometry
    for answer in outcome.solved.answers:
        kept = [geometry.bars[bar] for bar in answer.standing.kept]
        joints = [geometry.joints[joint] for joint in answer.supports]
        yield (
            dict(zip(kept, answer.dead.sum(axis=0).tolist(), strict=True)),
            dict(zip(joints, answer.support_dead.sum(axis=0).tolist(), strict=True)),
        )


def standing(document: JSON) -> Iterator[tuple[JSON, Condition, Outcome]]:
    """The trusses that have forces."""
    condition, outcomes = solved(document)
    for outcome in outcomes:
        if outcome.solved is not None:
            yield expanded(document)[outcome.name], condition, outcome


@few
@given(sites())
def test_dead_load_is_in_equilibrium_at_every_joint(drawn: Labelled) -> None:
    """Bar forces and the document's dead load leave nothing at any joint; the reactions carry all of it."""
    document, _ = drawn
    for truss, condition, outcome in standing(document):
        down, total = dead_on_joints(document, outcome.name, truss, condition), sum(outcome.dead_total)
        assert math.isclose(sum(down.values()), total, rel_tol=ROUNDING)
        for forces, given_out in dead_states(outcome):
            limit = ROUNDING * max(total, *map(abs, forces.values()))
            left, needed = what_is_left(truss, forces, down)
            assert left <= limit
            assert given_out.keys() == needed.keys()
            assert all(abs(given_out[joint] - needed[joint]) <= limit for joint in needed)
            assert math.isclose(sum(given_out.values()), total, rel_tol=ROUNDING, abs_tol=limit)


@few
@given(sites())
def test_a_unit_load_on_any_deck_joint_is_in_equilibrium(drawn: Labelled) -> None:
    """The influence ordinates of all bars at one deck joint balance a unit load there, and reactions add up to it."""
    document, _ = drawn
    for truss, _, outcome in standing(document):
        assert outcome.solved is not None
        names = outcome.prepared.geometry.bars
        for answer in outcome.solved.answers:
            limit = max(ROUNDING, answer.response.noise) * max(1.0, float(np.abs(answer.ordinates).max()))
            kept = [names[bar] for bar in answer.standing.kept]
            for column, joint in enumerate(truss["deck joints"]):
                forces = dict(zip(kept, answer.ordinates[:, column].tolist(), strict=True))
                left, needed = what_is_left(truss, forces, {joint: 1.0})
                assert left <= limit
                assert abs(sum(needed.values()) - 1.0) <= len(kept) * limit


def with_more_loss(document: JSON, truss: str, bar: str, loss: float) -> JSON:
    """The same bridge with a loss over the whole of a bar, estimated after everything else was recorded."""
    document = copy.deepcopy(document)
    entry = {"truss": truss, "bar": bar, "estimated loss": loss}
    document.setdefault("visits", []).append({"date": "2026-12-01", "observations": [entry]})
    return document


@st.composite
def losses(draw: st.DrawFn, *, determinate: bool = False) -> tuple[JSON, str, str, float]:
    """Draw a site, one of its bars, and a loss there that is more than anything recorded."""
    document, labels = draw(sites())
    assume("determinate" in labels or not determinate)
    truss = draw(st.sampled_from(sorted(document["trusses"])))
    bar = draw(st.sampled_from([bar["id"] for bar in expanded(document)[truss]["bars"]]))
    return document, truss, bar, draw(st.sampled_from((0.4, 0.6, 0.9, 0.99)))


@few
@given(losses())
def test_an_even_loss_never_raises_a_resistance(drawn: tuple[JSON, str, str, float]) -> None:
    """Less steel over the whole of a bar lowers its area and both its resistances, and those of no other bar."""
    document, truss, name, loss = drawn
    before, after = rated(document), rated(with_more_loss(document, truss, name, loss))
    for one, other in zip(before.bars, after.bars, strict=True):
        if (one.truss, one.bar) == (truss, name):
            assert other.area < one.area or one.check == "severed"
            assert other.tension < one.tension
            assert other.compression < one.compression
        else:
            for key in ("area", "tension", "compression"):
                assert math.isclose(getattr(one, key), getattr(other, key), rel_tol=LAST_DIGITS)


@few
@given(losses(determinate=True))
def test_an_even_loss_in_a_determinate_truss_never_raises_a_factor(drawn: tuple[JSON, str, str, float]) -> None:
    """Forces stay in a determinate truss, so that a loss can only lower a factor, and only that bar's."""
    document, truss, name, loss = drawn
    before, after = rated(document), rated(with_more_loss(document, truss, name, loss))
    assert before.trusses[truss].verdict == "determinate"
    for one, other in zip(before.trusses[truss].bars, after.trusses[truss].bars, strict=True):
        forces = [(row.dead_components, row.dead_wearing, row.live) for row in (one, other)]
        assert forces[0] == forces[1]
        for level, factor in one.rating_factor.items():
            now = other.rating_factor[level]
            if factor is None or now is None:
                # Dead load alone may become too much where no live load acts.
                assert now == factor or (other.check, one.bar) == ("dead load", name)
            else:
                assert now <= factor * (1 + LAST_DIGITS)
                assert now >= factor * (1 - LAST_DIGITS) or one.bar == name


KEYS = {
    "format", "site", "basis", "caution", "inputs sha256", "program", "assumptions", "findings", "not rated", "trusses",
    "structure", "bars",
}  # fmt: skip
BAR_KEYS = {
    "truss", "bar", "state", "known", "area", "nominal area", "dead", "live", "resistance", "condition factor",
    "system factor", "rating factor", "check", "load", "loss allowance", "without it",
}  # fmt: skip
INSIDE = {"dead": {"components", "wearing"}, "resistance": {"tension", "compression"}}
LEVELS = {"inventory", "operating"}
CHECKS = {
    "tension yield", "tension fracture", "flexural buckling", "flexural-torsional buckling", "bow and shift",
    "axial and bending", "dead load", "severed", "cracked", "equilibrium", None,
}  # fmt: skip


def numbers(value: Any) -> Iterator[float]:
    """Every number of a document."""
    if isinstance(value, dict | list):
        for one in value.values() if isinstance(value, dict) else value:
            yield from numbers(one)
    elif isinstance(value, int | float):
        yield value


@few
@given(sites())
def test_a_result_has_every_key_and_only_numbers_that_are_numbers(drawn: Labelled) -> None:
    """The document has every key of the result format, null for what does not exist, and never NaN or infinity."""
    document, _ = drawn
    made = result.document(rated(document))
    assert all(math.isfinite(number) for number in numbers(made))
    assert made.keys() >= KEYS
    assert made["trusses"].keys() == document["trusses"].keys()
    for truss in made["trusses"].values():
        assert truss.keys() >= {"joints", "bars", "reactions", "degree", "mechanisms", "verdict"}
    assert made["structure"].keys() == {"rating factor", "truss", "bar", "check", "load"}
    assert len(made["bars"]) == sum(len(truss["bars"]) for truss in expanded(document).values())
    names = {load["name"] for load in document["rating"]["live"]}
    for bar in made["bars"]:
        assert bar.keys() >= BAR_KEYS
        assert all(bar[key] is None or bar[key].keys() == inside for key, inside in INSIDE.items())
        assert bar["live"] is None or bar["live"].keys() == names
        assert bar["rating factor"] is None or bar["rating factor"].keys() == LEVELS
        assert bar["check"] in CHECKS
    for finding in made["findings"]:
        assert finding.keys() == {"level", "truss", "bar", "text"}
