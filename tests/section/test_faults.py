"""What a section may not be, and that each fault names its place."""

from __future__ import annotations

from dataclasses import replace

import pytest
from section.making import ALL, ANGLE, BOX, DOUBLE_ANGLE, mm, section

from models.bridge import Section
from models.quantity import Quantity
from models.section import SHAPES, faults

WRONG = [
    (section("angle", legs=(80, 60), thickness=60), "thickness"),
    (section("double angle", legs=(80, 60), thickness=70, gap=0), "thickness"),
    (section("channel", depth=100, flange_width=50, web_thickness=5, flange_thickness=50), "flange thickness"),
    (section("channel", depth=100, flange_width=50, web_thickness=50, flange_thickness=5), "web thickness"),
    (section("i section", depth=100, flange_width=50, web_thickness=60, flange_thickness=5), "web thickness"),
    (section("tee", depth=100, flange_width=50, web_thickness=5, flange_thickness=100), "flange thickness"),
    (section("rectangular tube", depth=100, width=60, thickness=30), "thickness"),
    (section("round tube", diameter=60, thickness=30), "thickness"),
    (section("flat bar", width=10, thickness=12), "thickness"),
    (section("round bar", diameter=0), "diameter"),
    (section("round bar", diameter=-5), "diameter"),
    (section("angle", legs=(80, 0), thickness=5), "legs/1"),
    (section("double angle", legs=(80, 60), thickness=5, gap=-1), "gap"),
    (section("built up", plates={"a": (100, 0, 0, 0)}), "plates/a/height"),
    (section("built up", plates={"a": (100, 10, 0, 0), "b": (10, 100, 0, 0)}), "plates/b"),
    (section("built up", plates={}), "plates"),
    (section("angle", legs=80, thickness=5), "legs"),
    (section("round bar"), "diameter"),
    (section("star", points=5), "shape"),
    (replace(BOX, area=Quantity("0 mm^2", 0.0)), "area"),
    (replace(BOX, inertia_horizontal=Quantity("-1 mm^4", -1e-12)), "I horizontal"),
    (replace(BOX, inertia_vertical=Quantity("0 mm^4", 0.0)), "I vertical"),
    (replace(BOX, least_radius=Quantity("0 mm", 0.0)), "r min"),
]


@pytest.mark.parametrize(("wrong", "path"), WRONG, ids=lambda value: getattr(value, "shape", value))
def test_a_fault_names_its_place(wrong: Section, path: str) -> None:
    """Each dimension that cannot be is one fault, at its own path, with what was expected."""
    found = faults(wrong)
    assert [fault.path for fault in found] == [path]
    assert found[0].what
    assert found[0].expected


@pytest.mark.parametrize("right", ALL, ids=lambda value: value.shape)
def test_sections_that_fit_have_no_faults(right: Section) -> None:
    """A section whose plates fit together has no fault."""
    assert faults(right) == ()


def test_all_faults_come_at_once() -> None:
    """Faults of several dimensions and of table values are reported together."""
    wrong = replace(section("angle", legs=(-80, 0), thickness=0), area=Quantity("0 mm^2", 0.0))
    assert [fault.path for fault in faults(wrong)] == ["legs/0", "legs/1", "thickness", "area"]


def test_a_gap_of_zero_is_allowed() -> None:
    """Two angles may touch back to back."""
    assert faults(replace(DOUBLE_ANGLE, dimensions={**DOUBLE_ANGLE.dimensions, "gap": mm(0)})) == ()


def test_plates_may_touch() -> None:
    """Built-up plates that share an edge do not overlap."""
    assert faults(section("built up", plates={"a": (100, 10, 0, 5), "b": (10, 100, 0, -50)})) == ()


def test_the_registry_tells_keys_and_options_of_every_shape() -> None:
    """Each row of the registry has the keys that its sections use, and only tubes and I sections have options."""
    for one in ALL:
        assert {key.name for key in SHAPES[one.shape].keys} == set(one.dimensions)
    options = {name: [option.name for option in shape.options] for name, shape in SHAPES.items() if shape.options}
    assert options == {"i section": ["rolled"], "rectangular tube": ["formed"], "round tube": ["formed"]}
    assert next(key.form for key in SHAPES["angle"].keys if key.name == "legs") == "pair of lengths"
    assert ANGLE.shape in SHAPES
