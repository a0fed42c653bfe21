"""Remaining properties: closed forms, scaling, monotony, padding, table values and the shift of the centroid."""

from __future__ import annotations

import math
import warnings
from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from section.making import ALL, ANGLE, BOX, FLAT, I_SECTION, PIPE, ROD, outlined, rectangle, sections

from models.bridge import Section
from models.calculation import Array
from models.quantity import parse
from models.section import Properties, built, centroid_shift, properties, stack

TABLED = replace(
    ANGLE,
    area=parse("1930 mm^2", "area"),
    inertia_horizontal=parse("2750000 mm^4", "inertia"),
    inertia_vertical=parse("970000 mm^4", "inertia"),
    least_radius=parse("17 mm", "length"),
)


def left(one: Section, thickness: list[float] | Array, turned: int = 0) -> Properties:
    """Properties of one section with its plates' remaining thickness in mm."""
    return properties(stack([built(one, turned)]), np.array([thickness], float) / 1e3)


def tensor(found: Properties) -> list[float]:
    """Area and inertias in mm."""
    return [
        found.area[0] * 1e6,
        found.centroid_x[0] * 1e3,
        found.centroid_y[0] * 1e3,
        found.inertia_horizontal[0] * 1e12,
        found.inertia_vertical[0] * 1e12,
        found.inertia_product[0] * 1e12,
    ]


def test_a_wall_thins_about_its_mid_line() -> None:
    """A thinner wall keeps its mid-line and extent, and the walls beside it keep theirs."""
    expected = outlined(
        [
            rectangle(-40, 57.5 - 1.5, 40, 57.5 + 1.5),
            rectangle(-40, -60, 40, -55),
            rectangle(-37.5 - 2, -55, -37.5 + 2, 55),
            rectangle(37.5 - 0.5, -55, 37.5 + 0.5, 55),
        ]
    )
    assert tensor(left(BOX, [3, 5, 4, 1])) == pytest.approx(expected, rel=1e-12)


def test_an_angle_loses_metal_leg_by_leg() -> None:
    """The vertical leg keeps its full height and the horizontal one its nominal extent from it."""
    expected = outlined([rectangle(5 - 3, 0, 5 + 3, 120), rectangle(10, 5 - 4, 80, 5 + 4)])
    assert tensor(left(ANGLE, [6, 8])) == pytest.approx(expected, rel=1e-12)


def test_a_gone_plate_leaves_the_others() -> None:
    """A plate of zero thickness takes its metal and its inertia with it."""
    expected = outlined([rectangle(-40, 55, 40, 60), rectangle(-40, -55, -35, 55), rectangle(35, -55, 40, 55)])
    assert tensor(left(BOX, [5, 0, 5, 5])) == pytest.approx(expected, rel=1e-12, abs=1e-7)


def test_a_round_tube_keeps_its_mean_diameter() -> None:
    """The wall of a round tube thins from both sides: outer and inner diameter close in on the mean."""
    outer, inner = 109.3 + 3.2, 109.3 - 3.2
    found = left(PIPE, [3.2])
    assert found.area[0] * 1e6 == pytest.approx(math.pi / 4 * (outer**2 - inner**2), rel=1e-12)
    assert found.inertia_horizontal[0] * 1e12 == pytest.approx(math.pi / 64 * (outer**4 - inner**4), rel=1e-12)


def test_a_reading_on_a_round_bar_is_its_diameter() -> None:
    """A round bar's area follows the square and its inertia the fourth power of the remaining diameter."""
    found = left(ROD, [20])
    assert found.area[0] * 1e6 == pytest.approx(math.pi / 4 * 20**2, rel=1e-12)
    assert found.inertia_vertical[0] * 1e12 == pytest.approx(math.pi / 64 * 20**4, rel=1e-12)


def test_a_flat_bar_thins_to_its_closed_form() -> None:
    """A flat bar's inertias are t h^3/12 in the plane and h t^3/12 across it."""
    found = left(FLAT, [9])
    assert found.inertia_horizontal[0] * 1e12 == pytest.approx(9 * 100**3 / 12, rel=1e-12)
    assert found.inertia_vertical[0] * 1e12 == pytest.approx(100 * 9**3 / 12, rel=1e-12)


def test_nothing_left_is_zero_without_a_warning() -> None:
    """Where every plate is gone, area, inertias and centroid shift are zero, and numpy has nothing to say."""
    stacked = stack([built(one) for one in (*ALL, TABLED)])
    with warnings.catch_warnings(), np.errstate(all="raise"):
        warnings.simplefilter("error")
        found = properties(stacked, np.zeros(stacked.shape))
        shift = centroid_shift(stacked, np.zeros(stacked.shape))
    assert not found.area.any()
    assert not found.inertia_horizontal.any()
    assert not found.inertia_product.any()
    assert not shift.any()


def test_sections_of_all_shapes_stand_side_by_side() -> None:
    """Padding changes nothing: each section of a stack has the properties that it has alone, nominal and reduced."""
    builts = [built(one, turned) for one in (*ALL, TABLED) for turned in (0, 90)]
    stacked = stack(builts)
    together = properties(stacked, stacked.thickness)
    thinner = properties(stacked, 0.8 * stacked.thickness)
    for place, one in enumerate(builts):
        assert together.area[place] == pytest.approx(one.nominal.area, rel=1e-12)
        assert together.inertia_horizontal[place] == pytest.approx(one.nominal.inertia_horizontal, rel=1e-12)
        assert together.inertia_vertical[place] == pytest.approx(one.nominal.inertia_vertical, rel=1e-12)
        assert together.inertia_product[place] == pytest.approx(one.nominal.inertia_product, rel=1e-9, abs=1e-20)
        alone = properties(stack([one]), 0.8 * one.thickness[None])
        assert thinner.inertia_horizontal[place] == pytest.approx(alone.inertia_horizontal[0], rel=1e-12)
        assert thinner.inertia_product[place] == pytest.approx(alone.inertia_product[0], rel=1e-9, abs=1e-20)


def test_taking_from_a_stack_repeats_and_reorders() -> None:
    """A stack taken by indices has the same sections, as often and in the order asked for, tables included."""
    stacked = stack([built(one) for one in (BOX, TABLED, ROD)])
    taken = stacked.take(np.array([2, 1, 1, 0]))
    assert taken.shape == (4, 4)
    before, after = properties(stacked, stacked.thickness), properties(taken, taken.thickness)
    assert after.area.tolist() == before.area[[2, 1, 1, 0]].tolist()
    assert after.inertia_product.tolist() == before.inertia_product[[2, 1, 1, 0]].tolist()


def test_an_empty_stack_is_empty() -> None:
    """A stack of no sections has no properties."""
    stacked = stack([])
    assert properties(stacked, np.zeros((0, 0))).area.shape == (0,)


def test_table_values_rule_as_built() -> None:
    """Given area, inertias and least radius are those of the section as built, and together make one tensor."""
    now = built(TABLED).nominal
    assert now.area == pytest.approx(1930e-6, rel=1e-12)
    assert now.inertia_horizontal == pytest.approx(2750000e-12, rel=1e-12)
    assert now.inertia_vertical == pytest.approx(970000e-12, rel=1e-12)
    least, most = np.linalg.eigvalsh(
        [[now.inertia_horizontal, now.inertia_product], [now.inertia_product, now.inertia_vertical]]
    )
    assert least == pytest.approx(1930e-6 * 0.017**2, rel=1e-9)
    assert most > now.inertia_horizontal
    assert now.inertia_product < 0


def test_turning_takes_table_values_along() -> None:
    """A table value belongs to an axis of the section, and turns with it."""
    now = built(TABLED, 90).nominal
    assert now.inertia_horizontal == pytest.approx(970000e-12, rel=1e-12)
    assert now.inertia_vertical == pytest.approx(2750000e-12, rel=1e-12)
    assert now.least_inertia == pytest.approx(1930e-6 * 0.017**2, rel=1e-9)


def test_losses_scale_table_values_by_the_ratio_of_the_plates() -> None:
    """With losses each table value goes down as the plates' own property does; r min by its own rule."""
    plain, tabled = left(ANGLE, [6, 8]), left(TABLED, [6, 8])
    new = built(ANGLE).nominal
    assert tabled.area[0] == pytest.approx(1930e-6 * plain.area[0] / new.area, rel=1e-12)
    ratio = plain.inertia_horizontal[0] / new.inertia_horizontal
    assert tabled.inertia_horizontal[0] == pytest.approx(2750000e-12 * ratio, rel=1e-12)
    least_ratio = plain.least_inertia[0] / new.least_inertia
    radius = 0.017 * math.sqrt(least_ratio / (plain.area[0] / new.area))
    assert tabled.least_inertia[0] == pytest.approx(tabled.area[0] * radius**2, rel=1e-9)


def test_one_table_value_leaves_the_others_to_the_plates() -> None:
    """Where only the area is given, the inertias stay those of the plates."""
    now, plain = built(replace(BOX, area=parse("1700 mm^2", "area"))).nominal, built(BOX).nominal
    assert now.area == pytest.approx(1700e-6, rel=1e-12)
    assert now.inertia_horizontal == plain.inertia_horizontal


def test_a_least_radius_above_the_axes_changes_nothing() -> None:
    """A tabulated least radius larger than both axes' radii, by rounding, cannot raise the least inertia."""
    plain = built(I_SECTION).nominal
    radius = math.sqrt(plain.inertia_vertical / plain.area) * 1.01
    now = built(replace(I_SECTION, least_radius=parse(f"{radius:.12f} m", "length"))).nominal
    assert now.least_inertia == pytest.approx(plain.inertia_vertical, rel=1e-9)


def test_the_centroid_moves_away_from_a_loss() -> None:
    """A box with one wall gone has its centroid where statics put it; an even loss does not move it."""
    stacked = stack([built(BOX), built(BOX)])
    thickness = np.array([[5, 0, 5, 5], [3, 3, 3, 3]]) / 1e3
    shift = centroid_shift(stacked, thickness)
    assert shift[0] * 1e3 == pytest.approx(80 * 5 * 57.5 / (80 * 5 + 2 * 110 * 5), rel=1e-12)
    assert shift[1] == pytest.approx(0, abs=1e-15)


@settings(max_examples=60, deadline=None)
@given(sections(), st.floats(0.2, 5.0))
def test_properties_scale_with_size(one: Section, scale: float) -> None:
    """A section with every dimension times k has k^2 the area and k^4 the inertias."""
    stacked = stack([built(one)])
    rows = stacked.rows
    larger = replace(
        stacked,
        rows=replace(
            rows,
            length=rows.length * scale,
            fixed_horizontal=rows.fixed_horizontal * scale**2,
            fixed_vertical=rows.fixed_vertical * scale**2,
            x=rows.x * scale,
            y=rows.y * scale,
        ),
    )
    small, large = properties(stacked, stacked.thickness), properties(larger, scale * stacked.thickness)
    assert large.area == pytest.approx(small.area * scale**2, rel=1e-9)
    assert large.inertia_horizontal == pytest.approx(small.inertia_horizontal * scale**4, rel=1e-9)
    assert large.least_inertia == pytest.approx(small.least_inertia * scale**4, rel=1e-6)


PARTS_LEFT = st.one_of(st.just(0.0), st.floats(1e-9, 1))
"""Parts of a thickness: nothing, or at least a billionth, below which floats lose their own precision."""


@settings(max_examples=100, deadline=None)
@given(sections(), PARTS_LEFT, PARTS_LEFT, st.sampled_from([0, 90]))
def test_an_even_loss_never_raises_a_property(one: Section, first: float, second: float, turned: int) -> None:
    """With less left of every plate evenly, area and every inertia are no larger."""
    stacked = stack([built(one, turned)] * 2)
    less, more = sorted((first, second))
    found = properties(stacked, stacked.thickness * np.array([[less], [more]]))
    assert found.area[0] <= found.area[1] * (1 + 1e-12)
    assert found.inertia_horizontal[0] <= found.inertia_horizontal[1] * (1 + 1e-12)
    assert found.inertia_vertical[0] <= found.inertia_vertical[1] * (1 + 1e-12)
    assert found.least_inertia[0] <= found.least_inertia[1] * (1 + 1e-9)


@settings(max_examples=100, deadline=None)
@given(sections(), st.data())
def test_the_inertias_make_a_tensor(one: Section, data: st.DataObject) -> None:
    """Whatever is lost of whichever plate, the inertia tensor stays positive."""
    new = built(one)
    ratio = data.draw(st.lists(st.floats(0, 1), min_size=len(new.plates), max_size=len(new.plates)))
    found = properties(stack([new]), (new.thickness * ratio)[None])
    product, both = found.inertia_product**2, found.inertia_horizontal * found.inertia_vertical
    assert product <= both * (1 + 1e-9)
    assert found.inertia_horizontal >= 0


@settings(max_examples=60, deadline=None)
@given(sections(), st.data())
def test_losing_metal_from_one_plate_never_raises_area_or_the_inertia_of_the_whole(
    one: Section, data: st.DataObject
) -> None:
    """Taking metal from any single plate lowers the area and both inertias."""
    new = built(one)
    plate = data.draw(st.integers(0, len(new.plates) - 1))
    thickness = np.array([new.thickness, new.thickness])
    thickness[0, plate] *= data.draw(st.floats(0, 1))
    found = properties(stack([new, new]), thickness)
    assert found.area[0] <= found.area[1]
    assert found.inertia_horizontal[0] <= found.inertia_horizontal[1] * (1 + 1e-12)
    assert found.inertia_vertical[0] <= found.inertia_vertical[1] * (1 + 1e-12)
