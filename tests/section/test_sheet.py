"""The hand check of a section: the same numbers as the arrays, line by line, and nothing superfluous."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from section.making import ALL, ANGLE, BOX, PIPE, ROD, sections

from models.bridge import Section
from models.calculation import HandCheck, Traced
from models.quantity import parse
from models.section import Properties, built, properties, stack, write_section

TABLED = replace(
    ANGLE,
    area=parse("1930 mm^2", "area"),
    inertia_horizontal=parse("2750000 mm^4", "inertia"),
    least_radius=parse("17 mm", "length"),
)
NAMES = ("area", "centroid_x", "centroid_y", "inertia_horizontal", "inertia_vertical", "inertia_product")


def numbers(found: Properties) -> list[float]:
    """All properties as floats."""
    return [float(np.squeeze(getattr(found, name))) for name in NAMES]


def same(one: Section, turned: int, ratio: list[float]) -> None:
    """Compare both ways of one section."""
    new = built(one, turned)
    thickness = new.thickness * ratio
    written = numbers(write_section(new, thickness, HandCheck()))
    computed = numbers(properties(stack([new]), thickness[None]))
    size = computed[3] + computed[4]
    assert written[:5] == pytest.approx(computed[:5], rel=1e-12, abs=1e-15)
    assert written[5] == pytest.approx(computed[5], rel=1e-9, abs=2e-9 * size)


@pytest.mark.parametrize("turned", [0, 90])
@pytest.mark.parametrize("one", [*ALL, TABLED], ids=lambda value: value.shape)
def test_the_hand_check_gives_the_numbers_of_the_arrays(one: Section, turned: int) -> None:
    """For every shape, whole and unevenly thinned, the written calculation ends where the arrays do."""
    count = len(built(one).plates)
    same(one, turned, [1.0] * count)
    same(one, turned, [0.9 - 0.1 * place for place in range(count)])


@settings(max_examples=40, deadline=None)
@given(sections(), st.data())
def test_whatever_is_lost_both_ways_agree(one: Section, data: st.DataObject) -> None:
    """Any loss of any plates, to nothing at all, gives the same numbers both ways."""
    count = len(built(one).plates)
    same(one, 0, data.draw(st.lists(st.sampled_from([0.0, 0.3, 0.75, 1.0]), min_size=count, max_size=count)))


def test_a_box_takes_a_line_a_plate() -> None:
    """A tube's sheet has its walls' areas, their sum, the centroid and the inertias wall by wall, named."""
    sheet = HandCheck()
    write_section(built(BOX), built(BOX).thickness, sheet)
    assert [step.symbol for step in sheet.steps] == [
        "A1", "A2", "A3", "A4", "A", "xc", "yc", "Ih1", "Ih2", "Ih3", "Ih4", "Ih", "Iv1", "Iv2", "Iv3", "Iv4", "Iv",
    ]  # fmt: skip
    assert sheet.steps[1].title == "bottom wall: width times remaining thickness"
    assert [operand.symbol for operand in sheet.steps[0].expression.operands] == ["b1", "t1"]


@pytest.mark.parametrize("one", [PIPE, ROD], ids=lambda value: value.shape)
def test_a_single_plate_needs_three_lines(one: Section) -> None:
    """A round tube or bar has one line for its area and one for each inertia."""
    sheet = HandCheck()
    write_section(built(one), built(one).thickness, sheet)
    assert [step.symbol for step in sheet.steps] == ["A", "Ih", "Iv"]


def leaves(number: Traced) -> list[Traced]:
    """All numbers and symbols at the ends of a formula."""
    return [leaf for operand in number.operands for leaf in leaves(operand)] if number.operands else [number]


@pytest.mark.parametrize("one", ALL, ids=lambda value: value.shape)
def test_no_formula_shows_a_term_that_is_not_there(one: Section) -> None:
    """A term that a plate's form lacks is left out of its formula, not written as zero times something."""
    sheet = HandCheck()
    write_section(built(one), built(one).thickness, sheet)
    zeros = [
        leaf
        for step in sheet.steps
        for leaf in leaves(step.expression)
        if leaf.operation == "number" and not leaf.value
    ]
    assert zeros == []


def test_table_values_are_lines_of_their_own() -> None:
    """Where a table rules, the sheet shows its factor and the property after it."""
    sheet = HandCheck()
    write_section(built(TABLED), built(TABLED).thickness, sheet)
    symbols = [step.symbol for step in sheet.steps]
    assert [symbol for symbol in symbols if symbol.startswith("f")] == ["fA", "fh", "fr"]
    assert [symbol for symbol in symbols if symbol.endswith("'")] == ["A'", "Ih'", "Ihv'"]
    assert next(step.value for step in sheet.steps if step.symbol == "A'") == pytest.approx(1930e-6, rel=1e-12)
