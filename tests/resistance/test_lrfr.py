"""Load and resistance factor rating: factors, resistances as arrays and as a sheet, monotony under loss."""

from __future__ import annotations

import warnings
from dataclasses import fields, replace
from typing import Any

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from section.making import ALL, sections

from models.bridge import Section
from models.calculation import Array, HandCheck, NoSheet
from models.errors import BasisNotAvailable, InputError
from models.resistance import BASES, LRFR, NAMES, Member, Resistance, basis, registry
from models.section import Properties, built, properties, stack, write_section

GIVEN = {
    "E": 200e9, "Fy": 250e6, "Fu": 400e6, "effective_length_in_plane": 2.5, "effective_length_out_of_plane": 3.0,
    "net_area": 0.85, "shear_lag": 0.9,
}  # fmt: skip
NAMED = ("tension_yield", "tension_fracture", "flexural_buckling")


def member(found: Properties, **given: Any) -> Member:
    """A member with a section's properties and the numbers that this module gives every bar."""
    parts = ("area", "inertia_horizontal", "inertia_vertical", "inertia_product")
    return Member(**{**GIVEN, **given}, **{part: getattr(found, part) for part in parts})


def resistance(found: Properties) -> Resistance:
    """What bars with these properties resist at the upper level."""
    return LRFR.resistances(member(found), NoSheet())[-1]


def test_tension_has_yield_and_fracture() -> None:
    """Yield is 0.95 Fy A on the gross area, fracture 0.80 Fu A on what is net and engaged; the lesser counts."""
    one = replace(Member(**GIVEN, area=2e-3, inertia_horizontal=3e-6, inertia_vertical=1e-6, inertia_product=0.0))
    found = LRFR.resistances(one, NoSheet())[0]
    assert found.tension_yield == pytest.approx(0.95 * 250e6 * 2e-3, rel=1e-12)
    assert found.tension_fracture == pytest.approx(0.80 * 400e6 * 2e-3 * 0.85 * 0.9, rel=1e-12)
    assert found.tension == pytest.approx(found.tension_yield, rel=1e-12)
    assert str(found.tension_check) == "tension yield"
    holed = LRFR.resistances(replace(one, net_area=0.6), NoSheet())[0]
    assert str(holed.tension_check) == "tension fracture"


def test_both_levels_have_the_same_resistance() -> None:
    """Inventory and operating differ by the live load factor alone."""
    found = LRFR.resistances(member(built(ALL[0]).nominal), NoSheet())
    assert [level.name for level in LRFR.levels] == ["inventory", "operating"]
    assert found[0] is found[1]


@pytest.mark.parametrize("one", ALL, ids=lambda value: value.shape)
def test_the_sheet_ends_where_the_arrays_do(one: Section) -> None:
    """For every shape, thinned unevenly, the hand check of a bar gives the resistances of the arrays."""
    new = built(one)
    thickness = new.thickness * np.linspace(0.9, 0.6, len(new.plates))
    computed = resistance(properties(stack([new]), thickness[None]))
    sheet = HandCheck()
    section = write_section(new, thickness, sheet)
    given = {name: sheet.given(name, value, "factor", name) for name, value in GIVEN.items()}
    written = LRFR.resistances(member(section, **given), sheet)[-1]
    for name in NAMED:
        assert float(getattr(written, name)) == pytest.approx(getattr(computed, name)[0], rel=1e-9)
    assert float(written.tension) == pytest.approx(computed.tension[0], rel=1e-9)
    assert written.tension_check == computed.tension_check[0]
    assert [step.symbol for step in sheet.steps][-6:] == ["Pry", "Pru", "Po", "Pe", "Pn", "Prc"]
    assert all(step.source for step in sheet.steps[-6:])


@settings(max_examples=100, deadline=None)
@given(sections(), st.lists(st.floats(0, 1), min_size=5, max_size=5))
def test_an_even_loss_never_raises_a_resistance(one: Section, ratios: list[float]) -> None:
    """The less is left of every plate, the less a bar resists, down to nothing."""
    stacked = stack([built(one)] * 7)
    ratio: Array = np.array([0.0, *sorted(ratios), 1.0])[:, None]
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        found = resistance(properties(stacked, stacked.thickness * ratio))
    for name in (*NAMED, "tension", "compression"):
        values = getattr(found, name)
        assert values[0] == 0
        assert np.all(values[:-1] <= values[1:] * (1 + 1e-9))


@settings(max_examples=60, deadline=None)
@given(sections(), st.floats(0.2, 5))
def test_strength_and_stiffness_scale_the_resistance(one: Section, scale: float) -> None:
    """With E, Fy and Fu times k every resistance is times k."""
    section = built(one).nominal
    now = LRFR.resistances(member(section), NoSheet())[0]
    scaled = LRFR.resistances(member(section, E=scale * 200e9, Fy=scale * 250e6, Fu=scale * 400e6), NoSheet())[0]
    for name in NAMED:
        assert float(getattr(scaled, name)) == pytest.approx(scale * float(getattr(now, name)), rel=1e-9)


@settings(max_examples=60, deadline=None)
@given(sections(), st.floats(0.3, 15), st.floats(1.0, 3.0))
def test_a_longer_bar_never_resists_more(one: Section, length: float, factor: float) -> None:
    """Compression falls with either effective length; tension does not depend on it."""
    section = built(one).nominal
    short, long = (
        LRFR.resistances(
            member(section, effective_length_in_plane=each, effective_length_out_of_plane=each), NoSheet()
        )[0]
        for each in (length, factor * length)
    )
    assert long.flexural_buckling <= short.flexural_buckling * (1 + 1e-9)
    assert long.tension == short.tension


@pytest.mark.parametrize(
    ("state", "measured", "factor"),
    [
        ("good", False, 1.0), ("fair", False, 0.95), ("poor", False, 0.85), ("severe", False, 0.85),
        (None, False, 0.95),
        ("good", True, 1.0), ("fair", True, 1.0), ("poor", True, 0.9), ("severe", True, 0.9), (None, True, 1.0),
    ],
)  # fmt: skip
def test_condition_factors(state: str | None, measured: bool, factor: float) -> None:
    """Each state has its factor, none counts as fair, and measurement raises it by 0.05 to at most 1."""
    assert LRFR.condition_factor(state, measured) == factor


@pytest.mark.parametrize(
    ("system", "factor"), [("welded", 0.85), ("riveted", 0.9), ("eyebars", 0.9), ("redundant", 1.0), (None, 0.85)]
)
def test_system_factors(system: str | None, factor: float) -> None:
    """Each system has its factor; where the site names none, the least counts."""
    assert LRFR.system_factor(system) == factor


def test_unknown_words_are_refused() -> None:
    """A state or system that the basis does not know is an input error, never a silent default."""
    with pytest.raises(InputError, match="not a state"):
        LRFR.condition_factor("fine", measured=False)
    with pytest.raises(InputError, match="not a system"):
        LRFR.system_factor("glued")


def test_the_product_of_the_factors_has_a_floor() -> None:
    """Condition times system factor counts as at least 0.85, for one bar and for many."""
    assert LRFR.combined_factor(0.85, 0.85) == 0.85
    assert LRFR.combined_factor(0.95, 0.90) == pytest.approx(0.855)
    assert LRFR.combined_factor(np.array([0.85, 1.0]), np.array([0.9, 1.0])).tolist() == [0.85, 1.0]


def test_every_factor_has_its_clause() -> None:
    """The summary's factors each name a standard, and say that the clause is from memory."""
    lines = LRFR.factor_lines()
    assert {"0.95", "0.80", "1.75", "1.35"} <= {line.value for line in lines}
    assert all(line.source.startswith("AASHTO") and line.source.endswith("(from memory)") for line in lines)


def test_bases_are_found_by_name(monkeypatch: pytest.MonkeyPatch) -> None:
    """The registry gives the basis that a site names, and says which ones this program has where it lacks one."""
    assert basis("lrfr") is LRFR
    assert set(BASES) <= set(NAMES)
    assert all(found.name == name for name, found in BASES.items())
    monkeypatch.setattr(registry, "BASES", {"lrfr": LRFR})
    with pytest.raises(BasisNotAvailable, match="`eurocode` yet; it has `lrfr`"):
        basis("eurocode")


def test_a_member_names_every_number_once() -> None:
    """The protocol's member carries exactly the numbers that a basis may use, and what can make plates slender."""
    assert {field.name for field in fields(Member)} == {
        *GIVEN, "area", "inertia_horizontal", "inertia_vertical", "inertia_product", "curves", "plates",
    }  # fmt: skip
