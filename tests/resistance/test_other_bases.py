"""Allowable stresses and Eurocode: laws of their resistances, limits without a jump, the sheet equal to the arrays."""

from __future__ import annotations

import math
import warnings
from dataclasses import replace
from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from section.making import ALL, section, sections

from models.bridge import Section
from models.calculation import Array, HandCheck, NoSheet
from models.resistance import ALLOWABLE_STRESS, EUROCODE, Basis, Member, Resistance
from models.section import built, plates_of, properties, stack, write_plates, write_section

OTHERS: tuple[Basis, ...] = (ALLOWABLE_STRESS, EUROCODE)
each_basis = pytest.mark.parametrize("basis", OTHERS, ids=lambda basis: basis.name)
NAMED = ("tension_yield", "tension_fracture", "flexural_buckling")
NUMBERS = {
    "E": 200e9, "Fy": 250e6, "Fu": 400e6, "effective_length_in_plane": 2.5, "effective_length_out_of_plane": 3.0,
    "net_area": 0.85, "shear_lag": 0.9,
}  # fmt: skip
THIN = (
    section("rectangular tube", depth=300, width=200, thickness=4, formed="welded"),
    section("i section", depth=420, flange_width=400, web_thickness=5, flange_thickness=10),
    section("i section", depth=420, flange_width=200, web_thickness=5, flange_thickness=10, rolled=True),
    section("angle", legs=(150, 80), thickness=6),
    section("round tube", diameter=302, thickness=2),
    section("tee", depth=200, flange_width=300, web_thickness=4, flange_thickness=6),
    section("channel", depth=300, flange_width=120, web_thickness=4, flange_thickness=5),
    section("double angle", legs=(150, 80), thickness=6, gap=8),
)


def many(one: Section, thickness: Array, turned: int = 0, **given: Any) -> Member:
    """Bars of one section with remaining thickness (n, P), m, as arrays."""
    new = built(one, turned)
    stacked = stack([new] * len(thickness))
    found = properties(stacked, thickness)
    numbers = {name: np.full(len(thickness), value) for name, value in {**NUMBERS, **given}.items()}
    return Member(
        area=found.area, inertia_horizontal=found.inertia_horizontal, inertia_vertical=found.inertia_vertical,
        inertia_product=found.inertia_product, curves=np.array([new.curves] * len(thickness)).T,
        plates=plates_of(stacked, thickness), **numbers,
    )  # fmt: skip


def written(basis: Basis, one: Section, thickness: Array, turned: int = 0) -> tuple[tuple[Resistance, ...], HandCheck]:
    """The hand check of one bar."""
    new, sheet = built(one, turned), HandCheck()
    found = write_section(new, thickness, sheet)
    numbers = {name: sheet.given(name, value, "factor", name) for name, value in NUMBERS.items()}
    member = Member(
        area=found.area, inertia_horizontal=found.inertia_horizontal, inertia_vertical=found.inertia_vertical,
        inertia_product=found.inertia_product, curves=new.curves, plates=write_plates(new, thickness), **numbers,
    )  # fmt: skip
    return basis.resistances(member, sheet), sheet


@each_basis
@pytest.mark.parametrize("turned", [0, 90])
@pytest.mark.parametrize("one", [*ALL, *THIN], ids=lambda value: value.shape)
def test_the_sheet_ends_where_the_arrays_do(basis: Basis, one: Section, turned: int) -> None:
    """For every shape, thinned unevenly, plates slender or not, a hand check gives the arrays' resistances, once each.

    Every line has its own symbol and a source where it was computed.
    """
    thickness = built(one).thickness * np.linspace(0.9, 0.6, len(built(one).plates))
    computed = basis.resistances(many(one, thickness[None], turned), NoSheet())
    by_hand, sheet = written(basis, one, thickness, turned)
    assert len(by_hand) == len(computed) == len(basis.levels)
    for hand, array in zip(by_hand, computed, strict=True):
        for name in NAMED:
            assert float(getattr(hand, name)) == pytest.approx(getattr(array, name)[0], rel=1e-9)
        assert float(hand.counted) == pytest.approx(np.broadcast_to(array.counted, 1)[0], rel=1e-9)
        assert hand.tension_check == array.tension_check[0]
    symbols = [step.symbol for step in sheet.steps]
    assert len(set(symbols)) == len(symbols)
    first = symbols.index("Po" if basis is ALLOWABLE_STRESS else "Npl")
    assert all(step.source for step in sheet.steps[first:] if not step.symbol.startswith("bf"))


@each_basis
def test_a_bar_with_nothing_left_resists_nothing(basis: Basis) -> None:
    """No steel at one place gives zeros, as arrays and by hand, without a warning."""
    for one in (*ALL, *THIN):
        nothing = np.zeros(len(built(one).plates))
        with warnings.catch_warnings():
            warnings.simplefilter("error")
            found = basis.resistances(many(one, nothing[None]), NoSheet())
        by_hand, _ = written(basis, one, nothing)
        assert [getattr(level, name).tolist() for level in found for name in NAMED] == [[0.0]] * 3 * len(found)
        assert [float(getattr(level, name)) for level in by_hand for name in NAMED] == [0.0] * 3 * len(found)


@each_basis
@settings(max_examples=60, deadline=None)
@given(sections(), st.lists(st.floats(1e-3, 1), min_size=5, max_size=5))
def test_an_even_loss_never_raises_a_resistance(basis: Basis, one: Section, ratios: list[float]) -> None:
    """The less is left of every plate, the less a bar resists at every level, slender plates or not."""
    ratio: Array = np.array([*sorted(ratios), 1.0])[:, None]
    for level in basis.resistances(many(one, built(one).thickness * ratio), NoSheet()):
        for name in NAMED:
            values = getattr(level, name)
            assert np.all(values[:-1] <= values[1:] * (1 + 1e-9))


@each_basis
@settings(max_examples=60, deadline=None)
@given(sections(), st.floats(0.3, 15), st.floats(1.0, 3.0))
def test_a_longer_bar_never_resists_more(basis: Basis, one: Section, length: float, factor: float) -> None:
    """Compression falls with length; tension does not depend on it."""
    bars = replace(
        many(one, np.stack([built(one).thickness] * 2)),
        effective_length_in_plane=np.array([length, factor * length]),
        effective_length_out_of_plane=np.array([length, factor * length]),
    )
    for level in basis.resistances(bars, NoSheet()):
        assert level.flexural_buckling[1] <= level.flexural_buckling[0] * (1 + 1e-9)
        assert level.tension[1] == level.tension[0]


@each_basis
@settings(max_examples=60, deadline=None)
@given(sections(), st.floats(0.01, 60))
def test_compression_is_below_yield_and_below_euler(basis: Basis, one: Section, length: float) -> None:
    """No column carries its yield load or its elastic critical load."""
    bar = many(one, built(one).thickness[None], effective_length_in_plane=length, effective_length_out_of_plane=length)
    found = basis.resistances(bar, NoSheet())[-1].flexural_buckling[0]
    least = np.linalg.eigvalsh(
        [
            [bar.inertia_horizontal[0], bar.inertia_product[0]],
            [bar.inertia_product[0], bar.inertia_vertical[0]],
        ]
    )[0]
    assert found < 250e6 * bar.area[0]
    assert found < math.pi**2 * 200e9 * least / length**2


def strut(slenderness: float) -> Member:
    """A bar of unit area and unit inertia with this KL/r."""
    return Member(
        E=200e9, Fy=250e6, Fu=400e6, area=1.0, inertia_horizontal=1.0, inertia_vertical=1.0, inertia_product=0.0,
        effective_length_in_plane=slenderness, effective_length_out_of_plane=slenderness, net_area=1.0, shear_lag=1.0,
        curves=("b", "b"),
    )  # fmt: skip


@pytest.mark.parametrize(
    ("basis", "limit"),
    [(ALLOWABLE_STRESS, math.pi * math.sqrt(2 * 800)), (EUROCODE, 0.2 * math.pi * math.sqrt(800))],
    ids=["Cc", "lambda 0.2"],
)
def test_no_jump_where_the_formula_changes(basis: Basis, limit: float) -> None:
    """At Cc the parabola meets Euler's curve, at slenderness 0.2 the curve meets yield; no step between."""
    below, above = (
        [float(level.flexural_buckling) for level in basis.resistances(strut(limit * (1 + side)), NoSheet())]
        for side in (-1e-9, 1e-9)
    )
    assert below == pytest.approx(above, rel=1e-8)
    middle = 250e6 / 2 if basis is ALLOWABLE_STRESS else 250e6
    safety = (2.12, 1.70) if basis is ALLOWABLE_STRESS else (1.1,)
    assert below == pytest.approx([middle / each for each in safety], rel=1e-8)


def test_levels_of_allowable_stress_have_their_own_resistances() -> None:
    """Each level has its own, the lower one less in every direction; those of the Eurocodes are one."""
    lower, upper = ALLOWABLE_STRESS.resistances(strut(80.0), NoSheet())
    assert [float(getattr(lower, name)) < float(getattr(upper, name)) for name in NAMED] == [True] * 3
    assert [level.name for level in ALLOWABLE_STRESS.levels] == ["inventory", "operating"]
    assert [level.name for level in EUROCODE.levels] == ["ultimate"]


@each_basis
def test_neither_has_condition_or_system_factors(basis: Basis) -> None:
    """What state a bar is in and how it is built changes no factor."""
    assert {basis.condition_factor(state, measured=True) for state in ("good", "poor", None)} == {None}
    assert {basis.system_factor(system) for system in ("welded", "redundant", None)} == {None}


def test_load_factors() -> None:
    """Allowable stresses leave loads as they are; EN 1990 A2 has 1.35, 1.0 where dead load relieves, 1.5 for snow."""
    assert {ALLOWABLE_STRESS.components, ALLOWABLE_STRESS.wearing} == {replace(EUROCODE.components, greatest=1.0,
            source=ALLOWABLE_STRESS.components.source)}  # fmt: skip
    assert [level.live_factor({"uniform"}) for level in ALLOWABLE_STRESS.levels] == [1.0, 1.0]
    assert (EUROCODE.components.greatest, EUROCODE.components.least) == (1.35, 1.0)
    assert EUROCODE.wearing == EUROCODE.components
    ultimate = EUROCODE.levels[0]
    kinds = ("crowd", "vehicle", "concentrated", "uniform")
    assert [ultimate.live_factor({kind}) for kind in kinds] == [1.35, 1.35, 1.35, 1.5]


@each_basis
def test_every_factor_has_its_source(basis: Basis) -> None:
    """The summary names each factor with its value and where it stands."""
    lines = basis.factor_lines()
    assert len({line.what for line in lines}) == len(lines)
    assert all(line.value and line.source for line in lines)
