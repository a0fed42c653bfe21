"""Hand checks of every bar of every sample against the rating, which computes whole trusses at once."""

from __future__ import annotations

import json
from functools import cache
from pathlib import Path
from typing import Any

import numpy as np
import pytest
from small.footbridge import reading, record, short

from inspector import desk
from inspector.exchange import site
from models.calculation import Number, Step
from models.formula import is_computed
from models.rating import BarCheck, bar_of
from models.rating.outcome import Outcome
from models.rating.result import BarRating

SAMPLES = sorted((Path(__file__).parents[2] / "sample_sites").glob("*.json"))
BASES = ("lrfr", "allowable stress", "eurocode")


def every_sample(test: Any) -> Any:
    """Run a test for every sample on every basis."""
    by_path = pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
    return pytest.mark.parametrize("basis", BASES)(by_path(test))


EXACT = 1e-9

SECTION = {
    "A": "area", "Ih": "inertia_horizontal", "Iv": "inertia_vertical", "Ihv": "inertia_product", "E": "E", "Fy": "Fy",
    "Fu": "Fu", "Li": "effective_length_in_plane", "Lo": "effective_length_out_of_plane", "An/A": "net_area",
    "U": "shear_lag",
}  # fmt: skip
RESISTANCES = {
    "lrfr": {"Pry", "Pru", "Po", "Pe", "Pn", "Prc"},
    "allowable stress": {
        "Po", "Pe", "KL/r", "Cc", "Pn",
        *(f"{what} {level}" for what in ("Pry", "Pru", "Prc") for level in ("inventory", "operating")),
    },
    "eurocode": {"Npl", "Nu", "Nc", "Ncri", "Ncro", "λi", "λo", "Φi", "Φo", "χi", "χo", "Nb"},
}  # fmt: skip
UPPER = {
    "lrfr": ("Pry", "Pru", "Prc"), "allowable stress": ("Pry operating", "Pru operating", "Prc operating"),
    "eurocode": ("Npl", "Nu", "Nb"),
}  # fmt: skip
"""Resistances of the upper level: tension by yield and by fracture, compression."""
LOADS = {"DC", "DW", "gDC", "gDW"}
CAPACITY = {"phi_c", "phi_s", "phi_c phi_s", "C", *LOADS}
FACTORS = {"LL", "gLL inventory", "RF inventory", "gLL operating", "RF operating"}
CAPACITIES = {"lrfr": CAPACITY, "allowable stress": {"C inventory", "C operating", *LOADS}, "eurocode": {"C", *LOADS}}
FACTORS_OF = {
    "lrfr": FACTORS, "allowable stress": FACTORS, "eurocode": {"LL", "gLL ultimate", "RF ultimate"},
}  # fmt: skip


class Recorder:
    """A sheet that keeps what is named, as arrays over the pieces of a truss."""

    def __init__(self) -> None:
        self.named: dict[str, Any] = {}

    def given(self, symbol: str, value: Number, kind: str, title: str, source: str = "") -> Number:
        """Hand the number back."""
        return value

    def note(self, symbol: str, value: Number, kind: str, title: str, source: str = "") -> Number:
        """Keep the result."""
        self.named[symbol] = value
        return value


@cache
def rated(path: Path, basis: str) -> desk.Rated:
    """A sample, rated on a basis."""
    document = json.loads(path.read_text(encoding="utf-8"))
    document["rating"]["basis"] = basis
    return desk.rate(site.read_document(document))


def checks(found: desk.Rated) -> list[tuple[Outcome, int, BarRating, dict[str, Step], BarCheck]]:
    """Every bar with its truss, its row, the lines of its hand check by symbol, and the check itself."""
    every = []
    for outcome in found.outcomes:
        for number, bar in enumerate(outcome.prepared.truss.bars):
            check = found.hand_check(outcome.name, bar.id)
            steps = {step.symbol: step for step in check.steps}
            assert len(steps) == len(check.steps)
            every.append((outcome, number, bar_of(found.rating, outcome.name, bar.id), steps, check))
    return every


@every_sample
def test_a_hand_check_ends_at_the_factor_of_the_rating(path: Path, basis: str) -> None:
    """The last lines are the bar's rating factors at both levels, and their demand and capacity are the row's."""
    for _, _, row, steps, check in checks(rated(path, basis)):
        if row.load is None:
            continue
        upper = list(row.rating_factor)[-1]
        assert (check.steps[-1].symbol, check.remark) == (f"RF {upper}", "")
        for level, factor in row.rating_factor.items():
            assert steps[f"RF {level}"].value == pytest.approx(factor, rel=EXACT)
        assert steps.get("C", steps.get(f"C {upper}")).value == pytest.approx(row.capacity, rel=EXACT)
        if "DC" not in steps:  # Bars go slack: the lines hold at the limit, and the demand stands under other loads.
            continue
        demand = sum(steps[f"g{part}"].value * steps[part].value for part in ("DC", "DW"))
        demand += steps[f"gLL {upper}"].value * steps["LL"].value
        assert demand == pytest.approx(row.demand, rel=EXACT, abs=1e-6)


@every_sample
def test_each_line_is_what_the_whole_truss_was_computed_with(path: Path, basis: str) -> None:
    """Section, material, lengths and resistances by hand equal those in the arrays, at the piece that governs."""
    found = rated(path, basis)
    arrays: dict[str, dict[str, Any]] = {}
    for outcome in found.outcomes:
        sheet = Recorder()
        outcome.task.basis.resistances(outcome.task.strength.member, sheet)
        arrays[outcome.name] = sheet.named
    for outcome, number, row, steps, _ in checks(found):
        strength = outcome.task.strength
        pieces = strength.piece[:, number]
        at = int(pieces[int(row.direction == "compression")]) if row.direction else _piece_of(strength, pieces, steps)
        for symbol, field in SECTION.items():
            if symbol in steps:
                size = np.broadcast_to(getattr(strength.member, field), strength.member.area.shape)[at]
                assert _last(steps, symbol).value == pytest.approx(size, rel=EXACT, abs=1e-18)
        assert arrays[outcome.name].keys() >= RESISTANCES[basis]
        for symbol in RESISTANCES[basis] & steps.keys():
            values = np.broadcast_to(arrays[outcome.name][symbol], strength.member.area.shape)
            assert steps[symbol].value == pytest.approx(values[at], rel=EXACT, abs=1e-9)


def _last(steps: dict[str, Step], symbol: str) -> Step:
    """The line of a property; where a section table rules over the plates, the line with the prime."""
    return steps.get(f"{symbol}'", steps[symbol])


def _piece_of(strength: Any, pieces: Any, steps: dict[str, Step]) -> int:
    """Where nothing governs, whichever of the two governing pieces the check was written for."""
    area = pytest.approx(_last(steps, "A").value, rel=EXACT)
    return next(int(at) for at in pieces if strength.member.area[at] == area)


@every_sample
def test_a_hand_check_covers_everything_between_the_plates_and_the_factor(path: Path, basis: str) -> None:
    """Area, inertias, lengths, resistances, capacity and factors all stand there, each with title and value."""
    for _, _, row, steps, check in checks(rated(path, basis)):
        assert steps.keys() >= (SECTION.keys() - {"Ihv"}) | RESISTANCES[basis]
        if row.load is not None and "DC" in steps:
            assert steps.keys() >= CAPACITIES[basis] | FACTORS_OF[basis]
        elif row.load is not None:
            assert steps.keys() >= (CAPACITIES[basis] | FACTORS_OF[basis]) - {"DC", "DW", "gDC", "gDW", "LL"}
            assert {"D", "D operating"} & steps.keys()
        assert all(step.title and np.isfinite(step.value) for step in check.steps)
        computed = [steps[symbol] for symbol in RESISTANCES[basis]]
        assert all(is_computed(step) for step in computed)
        assert all(step.source for step in computed)


@every_sample
def test_resistances_of_a_hand_check_are_those_of_the_row(path: Path, basis: str) -> None:
    """The resistance of the governing direction is the one that the rating prints for the bar."""
    for _, _, row, steps, _ in checks(rated(path, basis)):
        yields, fractures, buckles = (steps[symbol].value for symbol in UPPER[basis])
        if row.direction == "tension":
            assert min(yields, fractures) == pytest.approx(row.tension, rel=EXACT)
        if row.direction == "compression":
            assert buckles == pytest.approx(row.compression, rel=EXACT)
        for level, lower in row.lower_levels.items():
            if row.direction == "tension":
                assert min(steps[f"{what} {level}"].value for what in ("Pry", "Pru")) == pytest.approx(lower.tension)
            if row.direction == "compression":
                assert steps[f"Prc {level}"].value == pytest.approx(lower.compression, rel=EXACT)


@every_sample
def test_a_hand_check_without_a_factor_says_why(path: Path, basis: str) -> None:
    """Where the row has no live load that governs, the check ends with a remark and without a factor of its own."""
    found = rated(path, basis)
    for outcome, number, row, steps, check in checks(found):
        if row.load is not None:
            continue
        assert check.remark
        assert not any(symbol.startswith("RF ") for symbol in steps)
        if number in outcome.severed:
            assert "severed" in check.remark
        elif outcome.solved is None:
            assert "no forces" in check.remark


def of(document: dict[str, Any], bar: str) -> tuple[dict[str, Step], str]:
    """Lines and remark of one bar of a small bridge."""
    check = desk.rate(site.read_document(document)).hand_check("only", bar)
    return {step.symbol: step for step in check.steps}, check.remark


def test_a_severed_bar_gets_no_credit_by_hand_either() -> None:
    """The lines stop at what the bar could carry if it were whole, and the remark says that it is cut."""
    steps, remark = of(record(short(crossed=True), {"bar": "U1-L2", "severed": True}), "U1-L2")
    assert remark == "The bar is severed: it gets no credit."
    assert "Prc" in steps
    assert not steps.keys() & (CAPACITY | FACTORS)


def test_a_cracked_bar_gets_no_credit_by_hand_either() -> None:
    """The same for a bar that is cracked and pulled."""
    steps, remark = of(record(short(crossed=True), {"bar": "U1-L2", "crack": {}}), "U1-L2")
    assert remark == "The bar is cracked and pulled: it gets no credit."
    assert not steps.keys() & FACTORS


def test_a_bar_with_no_steel_left_can_be_written_down() -> None:
    """Zeros on every wall give lines of zeros, not a fault."""
    steps, remark = of(record(short(crossed=True), reading("U1-L2", 0.0)), "U1-L2")
    assert remark
    assert (steps["A"].value, steps["Pry"].value, steps["Prc"].value) == (0.0, 0.0, 0.0)


def test_a_bar_that_dead_load_exceeds_ends_at_its_margin() -> None:
    """The margin is negative and the remark says what that means."""
    document = short()
    document["deck"]["dead"] = "70 kPa"
    steps, remark = of(document, "L0-U1")
    assert remark == "Dead load alone exceeds the capacity: rating factor 0."
    assert steps["margin"].value < 0
    assert not steps.keys() & FACTORS


def test_a_bar_that_no_live_load_acts_on_ends_at_its_margin() -> None:
    """What is left of its capacity stands in place of a factor."""
    steps, remark = of(short(), "L2-U2")
    assert remark == "No live load acts on this bar that way."
    assert 0 < steps["margin"].value < steps["C"].value


def test_an_unknown_bar_or_truss_is_an_error_of_the_caller() -> None:
    """Asking for what is not there raises, naming it."""
    found = desk.rate(site.read_document(short()))
    with pytest.raises(KeyError, match="L9-L9"):
        found.hand_check("only", "L9-L9")
    with pytest.raises(KeyError, match="upstream"):
        found.hand_check("upstream", "L0-L1")
