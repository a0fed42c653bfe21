"""Slender plates: the limits as printed, from both sides, with what remains of the thickness."""

from __future__ import annotations

import math
from dataclasses import replace
from typing import Any

import numpy as np
import pytest
from numpy.typing import NDArray
from section.making import ALL, BOX, BUILT_UP, I_SECTION, PIPE, mm, section

from models.bridge import Section
from models.calculation import Array
from models.section import Stack, built, plates_of, stack

E, FY = 200e9, 250e6
ROOT = math.sqrt(E / FY)
BACK_TO_BACK = section("double angle", legs=(100, 60), thickness=8, gap=0)
CHANNEL = section("channel", depth=200, flange_width=60, web_thickness=8, flange_thickness=10)
ROLLED = section("i section", depth=200, flange_width=100, web_thickness=6, flange_thickness=9, rolled=True)
TEE = section("tee", depth=120, flange_width=100, web_thickness=8, flange_thickness=12)
WELDED_BOX = section("rectangular tube", depth=120, width=80, thickness=5, formed="welded")
BUILT_BOX = section(
    "built up",
    plates={"top": (220, 10, 0, 105), "bottom": (220, 10, 0, -105), "l": (8, 200, -80, 0), "r": (8, 200, 80, 0)},
)


def slender(stacked: Stack, thickness: Array, E: Array | float, Fy: Array | float) -> NDArray[np.bool_]:
    """Which plates (n, P) have a part that is slender at yield."""
    found = plates_of(stacked, thickness).slender(E, Fy)
    whole, parts = np.zeros(stacked.shape, bool), stacked.free
    places = np.tile(np.arange(found.shape[1]), (len(found), 1)) if parts.plate is None else parts.plate
    for row, column in zip(*np.nonzero(found), strict=True):
        whole[row, places[row, column]] = True
    return whole


@pytest.mark.parametrize(
    ("one", "plate", "limit"),
    [
        (section("angle", legs=(100, 60), thickness=8), "vertical leg", 100 / (0.45 * ROOT)),
        (section("angle", legs=(100, 60), thickness=8), "horizontal leg", 60 / (0.45 * ROOT)),
        (BACK_TO_BACK, "left vertical leg", 100 / (0.45 * ROOT)),
        (CHANNEL, "web", 180 / (1.49 * ROOT)),
        (CHANNEL, "top flange", 60 / (0.56 * ROOT)),
        (ROLLED, "bottom flange", 50 / (0.56 * ROOT)),
        (ROLLED, "web", 182 / (1.49 * ROOT)),
        (TEE, "flange", 50 / (0.56 * ROOT)),
        (TEE, "web", 120 / (0.75 * ROOT)),
        (BOX, "top wall", 70 / (1.40 * ROOT)),
        (BOX, "left wall", 110 / (1.40 * ROOT)),
        (WELDED_BOX, "left wall", 110 / (1.49 * ROOT)),
        (BUILT_BOX, "top", 152 / (1.49 * ROOT)),
        (BUILT_BOX, "l", 200 / (1.49 * ROOT)),
    ],
    ids=lambda value: getattr(value, "shape", None),
)
def test_a_plate_is_slender_just_below_its_limit_thickness(one: Section, plate: str, limit: float) -> None:
    """At breadth over thickness just above the coefficient of its row in the table a plate is slender, below not."""
    new = built(one)
    stacked = stack([new, new])
    place = new.plates.index(plate)
    thickness = stacked.thickness.copy()
    thickness[:, place] = limit * (1 - 1e-9) / 1e3, limit * (1 + 1e-9) / 1e3
    assert slender(stacked, thickness, E, FY)[:, place].tolist() == [True, False]


def test_flanges_welded_to_a_slender_web_have_the_lower_limit() -> None:
    """A flange welded to its web takes 0.64 sqrt(kc E/Fy), kc from what remains of the web and at least 0.35."""
    stacked = stack([built(I_SECTION)] * 4)
    thickness = stacked.thickness.copy()
    kc = 4 / math.sqrt(182 / 4)
    thickness[:2, 0], thickness[2:, 0] = 4 / 1e3, 0.5 / 1e3
    for row, factor in ((0, kc), (2, 0.35)):
        limit = 50 / (0.64 * math.sqrt(factor) * ROOT) / 1e3
        thickness[row : row + 2, 1] = limit * (1 - 1e-9), limit * (1 + 1e-9)
    assert slender(stacked, thickness, E, FY)[:, 1].tolist() == [True, False, True, False]


def test_the_part_of_a_cover_that_stands_out_has_the_outstand_limit() -> None:
    """Of a built-up cover plate, a long overhang decides by the limit of plates held along one edge."""
    wide = {"top": (400, 10, 0, 105), "l": (8, 200, -80, 0), "r": (8, 200, 80, 0)}
    stacked = stack([built(section("built up", plates=wide))] * 2)
    thickness = stacked.thickness.copy()
    limit = (200 - 84) / (0.45 * ROOT) / 1e3
    thickness[:, 0] = limit * (1 - 1e-9), limit * (1 + 1e-9)
    assert slender(stacked, thickness, E, FY)[:, 0].tolist() == [True, False]


def test_solid_bars_and_loose_plates_have_no_limit() -> None:
    """Round bars, flat bars and built-up plates that nothing holds are never called slender."""
    loose = section("built up", plates={"a": (200, 2, 0, 0), "b": (200, 2, 0, 100)})
    stacked = stack(
        [built(one) for one in (section("round bar", diameter=5), section("flat bar", width=200, thickness=1), loose)]
    )
    assert not slender(stacked, stacked.thickness, E, FY).any()


def test_a_gone_plate_is_not_slender() -> None:
    """A plate of zero thickness is gone; only what is left can buckle."""
    stacked = stack([built(one) for one in ALL])
    assert not slender(stacked, np.zeros(stacked.shape), E, FY).any()


def test_strengths_may_differ_from_bar_to_bar() -> None:
    """Stronger steel has the lower limit: the same tube is slender in one bar and not in another."""
    stacked = stack([built(BOX), built(BOX)])
    thickness = np.full((2, 4), 0.0033)
    assert slender(stacked, thickness, np.array([E, E]), np.array([250e6, 690e6])).all(axis=1).tolist() == [
        False,
        False,
    ]
    assert slender(stacked, thickness, np.array([E, E]), np.array([250e6, 690e6]))[:, 2].tolist() == [False, True]


def test_a_cover_plate_has_every_part_that_stands_out_or_spans() -> None:
    """Both outstands of a cover and the part between the webs may buckle, each with its own limit and count."""
    (cover,) = (plate for plate in built(BUILT_BOX).pieces if plate.name == "top")
    found = [(round(1e3 * part.breadth, 6), part.limit, tuple(part.imperfection), part.count) for part in cover.free]
    assert found == [(26.0, 0.45, (0.22, 1.49, False), 2), (152.0, 1.49, (0.18, 1.31, True), 1)]


def test_imperfections_are_those_of_the_table() -> None:
    """Walls of tubes, other plates held along both edges, and all others take their row of AISC 360-22 Table E7.1.

    The last says whether they are held along both edges.
    """
    rows = {
        "tube": (BOX, 0, (0.20, 1.38, True)),
        "welded": (WELDED_BOX, 0, (0.18, 1.31, True)),
        "web": (I_SECTION, 0, (0.18, 1.31, True)),
        "flange": (I_SECTION, 1, (0.22, 1.49, False)),
        "channel": (CHANNEL, 1, (0.22, 1.49, False)),
        "stem": (TEE, 1, (0.22, 1.49, False)),
        "leg": (BACK_TO_BACK, 0, (0.22, 1.49, False)),
    }
    found = {name: tuple(built(one).pieces[place].free[0].imperfection) for name, (one, place, _) in rows.items()}
    assert found == {name: expected for name, (*_, expected) in rows.items()}


def test_flanges_on_both_sides_of_a_web_count_twice() -> None:
    """I sections and tees have two outstands on a flange, channels one."""
    assert [built(one).pieces[place].free[0].count for one, place in ((I_SECTION, 1), (TEE, 0), (CHANNEL, 1))] == [
        2, 2, 1,
    ]  # fmt: skip


def test_a_corner_counts_in_one_plate() -> None:
    """An angle's other leg is free over its whole length, but brings only what the vertical leg leaves of it."""
    plates = plates_of(stack([built(ALL[0])]), built(ALL[0]).thickness[None])
    strip = plates.strip((np.array([0, 0]), np.array([0, 1])))
    assert strip.free == pytest.approx([0.12, 0.08])
    assert strip.breadth == pytest.approx([0.12, 0.07])


def test_round_tubes_keep_their_mean_diameter() -> None:
    """A ring has no free parts; its mean diameter and its remaining wall decide, and stand only where there is one."""
    plates = plates_of(stack([built(PIPE), built(BUILT_UP)]), np.array([[0.002, 0, 0, 0], [0.01, 0.008, 0.008, 0.012]]))
    assert plates.ring is not None
    assert plates.ring.diameter == pytest.approx([0.1093, 0.0])
    assert plates.ring.thickness[0] == 0.002
    assert plates_of(stack([built(BOX)]), built(BOX).thickness[None]).ring is None


CURVES: dict[str, tuple[str, dict[str, Any], tuple[str, str]]] = {
    "hot tube": ("rectangular tube", {"formed": "hot"}, ("a", "a")),
    "cold tube": ("rectangular tube", {"formed": "cold"}, ("c", "c")),
    "tube": ("rectangular tube", {}, ("c", "c")),
    "box": ("rectangular tube", {"formed": "welded"}, ("b", "b")),
    "hot pipe": ("round tube", {"formed": "hot"}, ("a", "a")),
    "welded pipe": ("round tube", {"formed": "welded"}, ("c", "c")),
    "tall rolled": ("i section", {"rolled": True}, ("a", "b")),
    "square rolled": ("i section", {"rolled": True, "flange_width": 170}, ("b", "c")),
    "tall thick rolled": ("i section", {"rolled": True, "flange_thickness": 41}, ("b", "c")),
    "square very thick rolled": (
        "i section", {"rolled": True, "depth": 400, "flange_width": 390, "flange_thickness": 101}, ("d", "d"),
    ),
    "welded": ("i section", {}, ("b", "c")),
    "thick welded": ("i section", {"flange_thickness": 41}, ("c", "d")),
    "angle": ("angle", {}, ("b", "b")),
    "pair": ("double angle", {}, ("b", "b")),
    "channel": ("channel", {}, ("c", "c")),
    "tee": ("tee", {}, ("c", "c")),
    "rod": ("round bar", {}, ("c", "c")),
    "flat": ("flat bar", {}, ("c", "c")),
    "built up": ("built up", {}, ("c", "c")),
}  # fmt: skip
"""EN 1993-1-1, Table 6.2 (from memory): curves about the horizontal and the vertical axis."""


@pytest.mark.parametrize("name", CURVES)
def test_each_shape_has_its_buckling_curves(name: str) -> None:
    """The curves follow the shape and how it was made, and change places when the section is turned."""
    shape, changed, curves = CURVES[name]
    plain = next(one for one in ALL if one.shape == shape)
    options = {key: changed[key] for key in ("formed", "rolled") if key in changed}
    sizes = {key.replace("_", " "): mm(size) for key, size in changed.items() if key not in options}
    one = replace(plain, dimensions={**plain.dimensions, **sizes}, **options)
    assert built(one).curves == curves
    assert built(one, 90).curves == curves[::-1]
