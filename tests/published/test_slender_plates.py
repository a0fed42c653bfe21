"""Columns with slender plates against worked examples that are printed.

Source: AISC, Companion to the Steel Construction Manual, Design Examples, V16.0, chapter E (read in a transcription):
E.1E (W16x31), E.2 and E.3 (welded I sections), E.10 (HSS12x8x1/8), E.14B (L8x4x1/2). All steps there are rounded to
three digits, so that stresses and forces are compared to 0.6 %. E 29,000 ksi, Fy 50 ksi.
"""

from __future__ import annotations

import math

import numpy as np
import pytest
from section.making import texts

from models.calculation import NoSheet
from models.quantity import UNITS
from models.resistance import LRFR, Member
from models.resistance.effective import effective_breadth
from models.resistance.plate_rule import effective_area, uncounted
from models.section import Strip, built, plates_of, properties, stack

KSI, KIP, INCH = UNITS["stress"]["ksi"], UNITS["force"]["kip"], UNITS["length"]["in"]
E, FY = 29000.0, 50.0
HELD, WALL, OTHER = (1.49, 0.18, 1.31), (1.40, 0.20, 1.38), (0.45, 0.22, 1.49)

# name: limit and imperfections; printed b/t, b and t, in; Fn, ksi; be, in
PARTS = {
    "E.1E web, Lc 5 ft": (HELD, 51.6, 14.2, 0.275, 41.3, 11.7),
    "E.1E web, Lc 10 ft": (HELD, 51.6, 14.2, 0.275, 23.0, 14.2),
    "E.1E web, Lc 15 ft": (HELD, 51.6, 14.2, 0.275, 10.6, 14.2),
    "E.2 web": (HELD, 60.0, 15.0, 0.25, 28.9, 12.6),
    "E.3 flange": ((0.64 * math.sqrt(0.743), 0.22, 1.49), 14.0, 5.25, 0.375, 36.4, 5.25),
    "E.10 narrow wall, Lc 18 ft": (WALL, 43.0, 43.0 * 0.174, 0.174, 36.9, 7.05),
    "E.10 narrow wall, Lc 24 ft": (WALL, 43.0, 43.0 * 0.174, 0.174, 29.1, 43.0 * 0.174),
    "E.10 wide wall, Lc 18 ft": (WALL, 66.0, 66.0 * 0.174, 0.174, 36.9, 7.88),
    "E.10 wide wall, Lc 24 ft": (WALL, 66.0, 66.0 * 0.174, 0.174, 29.1, 8.66),
    "E.10 wide wall, Lc 40 ft": (WALL, 66.0, 66.0 * 0.174, 0.174, 12.3, 66.0 * 0.174),
    "E.14B longer leg": (OTHER, 16.0, 8.0, 0.5, 35.1, 7.07),
}

# printed gross area, in^2; parts that count; Fn, ksi; printed Ae, in^2, and Pn, kip
COLUMNS = {
    "E.1E, Lc 5 ft": (9.13, [("E.1E web, Lc 5 ft", 1)], 41.3, 8.44, 349),
    "E.2": (19.8, [("E.2 web", 1)], 28.9, 19.2, 555),
    "E.3": (9.69, [("E.3 flange", 4)], 36.4, 9.69, 353),
    "E.10, Lc 18 ft": (6.76, [("E.10 narrow wall, Lc 18 ft", 2), ("E.10 wide wall, Lc 18 ft", 2)], 36.9, 5.35, 197),
    "E.10, Lc 24 ft": (6.76, [("E.10 narrow wall, Lc 24 ft", 2), ("E.10 wide wall, Lc 24 ft", 2)], 29.1, 5.77, 168),
    "E.10, Lc 40 ft": (6.76, [("E.10 wide wall, Lc 40 ft", 2)], 12.3, 6.76, 83.1),
    "E.14B": (5.80, [("E.14B longer leg", 1)], 35.1, 5.34, 187),
}


def strip(name: str, count: int = 1) -> Strip:
    """A part as printed, in inches."""
    (limit, c1, c2), ratio, breadth, thickness, *_ = PARTS[name]
    return Strip(ratio * thickness, breadth, thickness, limit, c1, c2, None, count)


@pytest.mark.parametrize("name", PARTS)
def test_printed_effective_breadth(name: str) -> None:
    """The effective breadth is the printed one, to its three digits."""
    *_, stress, printed = PARTS[name]
    found = float(effective_breadth(strip(name), E, FY, stress, NoSheet()))
    assert found == pytest.approx(printed, rel=5e-3)


@pytest.mark.parametrize("name", COLUMNS)
def test_printed_effective_area_and_strength(name: str) -> None:
    """Gross area less what the slender parts leave out, times the column's stress, is the printed strength."""
    gross, parts, stress, printed, strength = COLUMNS[name]
    lost = 0.0
    for part, count in parts:
        one = strip(part, count)
        lost += float(uncounted(one, effective_breadth(one, E, FY, stress, NoSheet())))
    area = float(effective_area(gross, lost, None))
    assert area == pytest.approx(printed, rel=4e-3)
    assert stress * area == pytest.approx(strength, rel=6e-3)


@pytest.mark.parametrize(
    ("sizes", "strength"),
    [
        ({"depth": "17 in", "flange_width": "8 in", "web_thickness": "1/4 in", "flange_thickness": "1 in"}, 555),
        ({"depth": "8 in", "flange_width": "10 1/2 in", "web_thickness": "1/4 in", "flange_thickness": "3/8 in"}, 353),
    ],
)
def test_welded_columns_from_their_sizes(sizes: dict[str, str], strength: float) -> None:
    """The welded I sections of E.2 and E.3, 15 ft long, from their sizes alone, flanges with kc and all."""
    new = built(texts("i section", **sizes))
    stacked = stack([new])
    found = properties(stacked, new.thickness[None])
    length = np.array([180 * INCH])
    member = Member(
        E=np.array([E * KSI]), Fy=np.array([FY * KSI]), Fu=np.array([65 * KSI]), area=found.area,
        inertia_horizontal=found.inertia_horizontal, inertia_vertical=found.inertia_vertical,
        inertia_product=found.inertia_product, effective_length_in_plane=length, effective_length_out_of_plane=length,
        net_area=np.ones(1), shear_lag=np.ones(1), plates=plates_of(stacked, new.thickness[None]),
    )  # fmt: skip
    nominal = LRFR.resistances(member, NoSheet())[0].flexural_buckling[0] / 0.95 / KIP
    assert nominal == pytest.approx(strength, rel=4e-3)
