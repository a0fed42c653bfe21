"""The elastic critical load and the column curve: axes, coupling, edges of the curve, and no overflow."""

from __future__ import annotations

import math
import warnings
from dataclasses import replace
from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from models.calculation import HandCheck
from models.resistance.columns import column_strength, elastic_critical_load, slenderness
from models.resistance.protocol import Member

MEMBER = Member(
    E=200e9,
    Fy=250e6,
    Fu=400e6,
    area=2e-3,
    inertia_horizontal=3e-6,
    inertia_vertical=1e-6,
    inertia_product=0.0,
    effective_length_in_plane=3.0,
    effective_length_out_of_plane=3.0,
    net_area=1.0,
    shear_lag=1.0,
)


def test_a_bar_buckles_about_its_weaker_direction() -> None:
    """Without a product of inertia the lesser of the two Euler loads counts, each with its own length."""
    assert elastic_critical_load(MEMBER) == pytest.approx(math.pi**2 * 200e9 * 1e-6 / 9, rel=1e-12)
    braced = replace(MEMBER, effective_length_out_of_plane=1.0)
    assert elastic_critical_load(braced) == pytest.approx(math.pi**2 * 200e9 * 3e-6 / 9, rel=1e-12)


def test_with_equal_lengths_the_least_principal_inertia_counts() -> None:
    """An angle buckles about its minor principal axis."""
    angle = replace(MEMBER, inertia_product=-1.2e-6)
    least = np.linalg.eigvalsh([[3e-6, -1.2e-6], [-1.2e-6, 1e-6]])[0]
    assert elastic_critical_load(angle) == pytest.approx(math.pi**2 * 200e9 * least / 9, rel=1e-12)


sizes = st.floats(1e-8, 1e-4)
lengths = st.floats(0.3, 20)


@settings(max_examples=100, deadline=None)
@given(sizes, sizes, st.floats(-1, 1), lengths, lengths)
def test_the_critical_load_is_the_lesser_eigenvalue(
    h: float, v: float, c: float, inside: float, outside: float
) -> None:
    """With any inertias and lengths the load is the lesser eigenvalue of the matrix, and the sheet agrees."""
    product = c * math.sqrt(h * v)
    member = replace(
        MEMBER,
        inertia_horizontal=h,
        inertia_vertical=v,
        inertia_product=product,
        effective_length_in_plane=inside,
        effective_length_out_of_plane=outside,
    )
    matrix = np.array([[h / inside**2, product / (inside * outside)], [product / (inside * outside), v / outside**2]])
    scale = math.pi**2 * 200e9
    most = scale * np.linalg.eigvalsh(matrix)[1]
    expected = scale * np.linalg.eigvalsh(matrix)[0]
    assert elastic_critical_load(member) == pytest.approx(expected, rel=1e-9, abs=1e-12 * most)
    assert elastic_critical_load(traced(member)).value == pytest.approx(expected, rel=1e-9, abs=1e-12 * most)


def traced(member: Member) -> Member:
    """The member with every number given on a sheet."""
    sheet = HandCheck()
    numbers = {name: value for name, value in vars(member).items() if name not in ("plates", "curves")}
    fields: dict[str, Any] = {name: sheet.given(name, value, "factor", name) for name, value in numbers.items()}
    return Member(**fields)


def test_the_curve_meets_at_its_limit() -> None:
    """At Pe/Po = 0.44 the inelastic branch holds, just below it the elastic one, lower by under 0.5 %."""
    at, below = column_strength(np.array([1.0, 1.0]), np.array([0.44, 0.44 - 1e-12]))
    assert at == pytest.approx(0.658 ** (1 / 0.44), rel=1e-12)
    assert below == pytest.approx(0.877 * 0.44, rel=1e-9)
    assert below < at < 1.005 * below


def test_a_stocky_column_yields() -> None:
    """As the critical load grows without bound, the resistance approaches the yield load from below."""
    loads = column_strength(np.full(4, 1.0), np.array([1e1, 1e3, 1e6, 1e12]))
    assert np.all(np.diff(loads) > 0)
    assert loads[-1] == pytest.approx(1.0, abs=1e-11)


@settings(max_examples=100, deadline=None)
@given(st.floats(1e3, 1e8), st.floats(1e-3, 1e12))
def test_the_curve_never_exceeds_yield_or_euler(yield_load: float, critical: float) -> None:
    """A column carries at most its yield load and at most its elastic critical load."""
    found = float(column_strength(yield_load, critical))
    assert found <= yield_load
    assert found <= critical * (1 + 1e-12)


def test_extremes_raise_no_warning() -> None:
    """A hole right through, a hair and a block give numbers without any numpy warning."""
    yields = np.array([0.0, 1e6, 1e6, 0.0, 1e6])
    critical = np.array([0.0, 0.0, 1e-320, 1e6, 1e300])
    with warnings.catch_warnings(), np.errstate(over="raise", divide="raise", invalid="raise"):
        warnings.simplefilter("error")
        found = column_strength(yields, critical)
    assert found.tolist() == pytest.approx([0, 0, 0, 0, 1e6], abs=1e-300)


def test_a_traced_bar_without_area_resists_nothing() -> None:
    """The sheet of a bar that is gone ends at zero instead of failing."""
    gone = traced(replace(MEMBER, area=0.0, inertia_horizontal=0.0, inertia_vertical=0.0))
    assert column_strength(gone.Fy * gone.area, elastic_critical_load(gone)).value == 0


def test_the_sheet_keeps_the_comparison_that_chose_the_branch() -> None:
    """A traced column remembers which branch of the curve held and why."""
    member = traced(replace(MEMBER, inertia_vertical=2e-6))
    found = column_strength(member.Fy * member.area, elastic_critical_load(member))
    assert found.because is not None
    assert found.because[1] == ">="
    hair = traced(replace(MEMBER, inertia_vertical=1e-8))
    assert column_strength(hair.Fy * hair.area, elastic_critical_load(hair)).because[1] == "<"


def test_slenderness_is_that_of_the_axis_that_buckles() -> None:
    """KL/r follows from the critical load; a bar that is gone has none."""
    E, area = np.array([200e9, 200e9]), np.array([2e-3, 0.0])
    critical = np.array([math.pi**2 * 200e9 * 1e-6 / 9, 0.0])
    assert slenderness(E, area, critical) == pytest.approx([3.0 / math.sqrt(1e-6 / 2e-3), 0.0])
