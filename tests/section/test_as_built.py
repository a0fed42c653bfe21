"""Nominal properties of every shape against Green's theorem on its outline, and what else is known as built."""

from __future__ import annotations

import math
from dataclasses import replace

import pytest
from section.making import (
    ALL,
    ANGLE,
    BOX,
    BUILT_UP,
    CHANNEL,
    DOUBLE_ANGLE,
    FLAT,
    I_SECTION,
    PIPE,
    ROD,
    TEE,
    Outline,
    mm,
    outlined,
    rectangle,
    section,
)

from models.bridge import Section
from models.errors import InputError
from models.section import Built, built, depth_in_plane, plate_names

ANGLE_OUTLINE = ((0, 0), (80, 0), (80, 10), (10, 10), (10, 120), (0, 120))
DOUBLE_OUTLINES = (
    ((4, 0), (84, 0), (84, 10), (14, 10), (14, 120), (4, 120)),
    ((-4, 0), (-4, 120), (-14, 120), (-14, 10), (-84, 10), (-84, 0)),
)
CHANNEL_OUTLINE = (
    (0, -80), (65, -80), (65, -69.5), (7.5, -69.5), (7.5, 69.5), (65, 69.5), (65, 80), (0, 80),
)  # fmt: skip
I_OUTLINE = (
    (-50, -100), (50, -100), (50, -91), (3, -91), (3, 91), (50, 91),
    (50, 100), (-50, 100), (-50, 91), (-3, 91), (-3, -91), (-50, -91),
)  # fmt: skip
TEE_OUTLINE = ((-4, 0), (4, 0), (4, 108), (50, 108), (50, 120), (-50, 120), (-50, 108), (-4, 108))
BOX_OUTLINES = (rectangle(-40, -60, 40, 60), rectangle(-35, -55, 35, 55)[::-1])
BUILT_UP_OUTLINES = (
    rectangle(-100, 100, 100, 110),
    rectangle(-84, -100, -76, 100),
    rectangle(76, -100, 84, 100),
    rectangle(-76, -100, -24, -88),
)

OUTLINES: tuple[tuple[Section, tuple[Outline, ...]], ...] = (
    (ANGLE, (ANGLE_OUTLINE,)),
    (DOUBLE_ANGLE, DOUBLE_OUTLINES),
    (CHANNEL, (CHANNEL_OUTLINE,)),
    (I_SECTION, (I_OUTLINE,)),
    (TEE, (TEE_OUTLINE,)),
    (BOX, BOX_OUTLINES),
    (FLAT, (rectangle(-6, -50, 6, 50),)),
    (BUILT_UP, BUILT_UP_OUTLINES),
)


def in_mm(one: Built) -> list[float]:
    """A section's properties in mm, mm^2 and mm^4."""
    now = one.nominal
    return [
        now.area * 1e6,
        now.centroid_x * 1e3,
        now.centroid_y * 1e3,
        now.inertia_horizontal * 1e12,
        now.inertia_vertical * 1e12,
        now.inertia_product * 1e12,
    ]


@pytest.mark.parametrize(("as_drawn", "outlines"), OUTLINES, ids=lambda value: getattr(value, "shape", ""))
def test_plates_add_up_to_the_outline(as_drawn: Section, outlines: tuple[Outline, ...]) -> None:
    """The plates of a shape leave out nothing of its outline and count nothing twice."""
    assert in_mm(built(as_drawn)) == pytest.approx(outlined(outlines), rel=1e-12, abs=1e-7)


def test_round_tube_is_a_ring() -> None:
    """Area and inertia of a round tube are those of the outer less the inner circle."""
    now = built(PIPE).nominal
    assert now.area == pytest.approx(math.pi / 4 * (0.1143**2 - 0.1043**2), rel=1e-12)
    assert now.inertia_horizontal == pytest.approx(math.pi / 64 * (0.1143**4 - 0.1043**4), rel=1e-12)
    assert now.inertia_vertical == now.inertia_horizontal


def test_round_bar_is_a_disc() -> None:
    """Area and inertia of a round bar are those of a circle of its diameter."""
    now = built(ROD).nominal
    assert now.area == pytest.approx(math.pi / 4 * 0.025**2, rel=1e-12)
    assert now.inertia_horizontal == pytest.approx(math.pi / 64 * 0.025**4, rel=1e-12)


@pytest.mark.parametrize(
    ("as_drawn", "depth", "across"),
    [
        (ANGLE, 120, 80), (DOUBLE_ANGLE, 120, 168), (CHANNEL, 160, 65), (I_SECTION, 200, 100), (TEE, 120, 100),
        (BOX, 120, 80), (PIPE, 114.3, 114.3), (ROD, 25, 25), (FLAT, 100, 12),
    ],
    ids=lambda value: getattr(value, "shape", ""),
)  # fmt: skip
def test_depth_lies_in_the_plane_of_the_truss(as_drawn: Section, depth: float, across: float) -> None:
    """The depth in the plane of the truss is the vertical extent, and the horizontal one once turned."""
    assert depth_in_plane(as_drawn, 0) == pytest.approx(depth / 1e3, rel=1e-12)
    assert depth_in_plane(as_drawn, 90) == pytest.approx(across / 1e3, rel=1e-12)


@pytest.mark.parametrize("as_drawn", ALL, ids=lambda value: value.shape)
def test_turning_swaps_the_axes(as_drawn: Section) -> None:
    """Turned by 90 degrees a section keeps plates, area and least inertia, and swaps its two axes."""
    straight, turned = built(as_drawn), built(as_drawn, 90)
    assert turned.plates == straight.plates
    assert turned.nominal.area == pytest.approx(straight.nominal.area, rel=1e-12)
    assert turned.nominal.inertia_horizontal == pytest.approx(straight.nominal.inertia_vertical, rel=1e-12)
    assert turned.nominal.inertia_vertical == pytest.approx(straight.nominal.inertia_horizontal, rel=1e-12)
    assert turned.nominal.inertia_product == pytest.approx(-straight.nominal.inertia_product, rel=1e-9, abs=1e-20)
    assert turned.nominal.least_inertia == pytest.approx(straight.nominal.least_inertia, rel=1e-9)


def test_turning_by_another_angle_is_refused() -> None:
    """A section is turned by 0 or 90 degrees only, and the error says so."""
    with pytest.raises(InputError, match="0 or 90"):
        built(BOX, 45)


@pytest.mark.parametrize("as_drawn", ALL, ids=lambda value: value.shape)
def test_symmetry_is_read_from_the_plates(as_drawn: Section) -> None:
    """Only sections with two axes of symmetry count as doubly symmetric, turned or not."""
    symmetric = as_drawn.shape in ("i section", "rectangular tube", "round tube", "round bar", "flat bar")
    assert built(as_drawn).doubly_symmetric is symmetric
    assert built(as_drawn, 90).doubly_symmetric is symmetric


def test_a_symmetric_built_up_box_is_doubly_symmetric() -> None:
    """A box built up of four plates is doubly symmetric; with one cover thicker it is not."""
    plates = {"top": (200, 10, 0, 105), "bottom": (200, 10, 0, -105), "l": (8, 200, -80, 0), "r": (8, 200, 80, 0)}
    assert built(section("built up", plates=plates)).doubly_symmetric
    assert not built(section("built up", plates={**plates, "bottom": (200, 12, 0, -106)})).doubly_symmetric


def test_point_symmetry_is_not_enough() -> None:
    """A Z of three plates, which twists as it buckles, is not doubly symmetric."""
    z = section("built up", plates={"web": (8, 100, 0, 0), "top": (50, 8, 21, 54), "bottom": (50, 8, -21, -54)})
    assert not built(z).doubly_symmetric


def test_plates_carry_the_names_of_the_site_format() -> None:
    """A reading is taken on a plate by its name; the names of each shape are fixed."""
    assert {one.shape: plate_names(one) for one in ALL} == {
        "angle": ("vertical leg", "horizontal leg"),
        "double angle": ("left vertical leg", "left horizontal leg", "right vertical leg", "right horizontal leg"),
        "channel": ("web", "top flange", "bottom flange"),
        "i section": ("web", "top flange", "bottom flange"),
        "tee": ("flange", "web"),
        "rectangular tube": ("top wall", "bottom wall", "left wall", "right wall"),
        "round tube": ("wall",),
        "round bar": ("bar",),
        "flat bar": ("plate",),
        "built up": ("cover", "left", "right", "lip"),
    }


def test_the_smaller_side_of_a_built_up_plate_is_its_thickness() -> None:
    """Of a plate given by width and height, the smaller is what a reading measures."""
    assert built(BUILT_UP).thickness.tolist() == pytest.approx([0.010, 0.008, 0.008, 0.012])


def test_a_section_that_does_not_fit_is_not_built() -> None:
    """Building a tube without room inside raises an error that names the dimension and both sizes."""
    with pytest.raises(InputError, match=r"thickness: two walls of 60 mm leave no room inside 80 mm"):
        built(replace(BOX, dimensions={**BOX.dimensions, "thickness": mm(60)}))
