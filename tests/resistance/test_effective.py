"""Slender plates: effective breadths worked by hand, the same on the sheet, and the laws that losses rely on."""

from __future__ import annotations

import math
import warnings
from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from section.making import ALL, BOX, FLAT, I_SECTION, PIPE, ROD, section, sections

from models.bridge import Section
from models.calculation import Array, HandCheck, NoSheet, Step
from models.formula import in_symbols, reasons
from models.quantity import parse
from models.resistance import LRFR, Member, Resistance
from models.resistance.effective import ROUND_COVERED, ROUND_LIMIT
from models.resistance.plate_rule import thin_tubes
from models.section import built, plates_of, properties, stack, write_plates, write_section
from models.words import Figures

E, FY = 200e9, 250e6
STUB = 0.01
"""So short that the column bears all but its yield stress, m."""

WELDED_BOX = section("rectangular tube", depth=300, width=200, thickness=4, formed="welded")
TUBE = section("rectangular tube", depth=200, width=200, thickness=4)
WEB = section("i section", depth=420, flange_width=200, web_thickness=5, flange_thickness=10, rolled=True)
WIDE = section("i section", depth=220, flange_width=400, web_thickness=5, flange_thickness=10)
ANGLE = section("angle", legs=(150, 80), thickness=6)
CHS = section("round tube", diameter=302, thickness=2)
COVERED = section(
    "built up",
    plates={"top": (400, 6, 0, 103), "bottom": (220, 6, 0, -103), "l": (6, 200, -80, 0), "r": (6, 200, 80, 0)},
)
THIN = (WELDED_BOX, TUBE, WEB, WIDE, ANGLE, CHS, COVERED, section("tee", depth=200, flange_width=300, web_thickness=4,
        flange_thickness=6), section("channel", depth=300, flange_width=120, web_thickness=4, flange_thickness=5),
        section("double angle", legs=(150, 80), thickness=6, gap=8))  # fmt: skip


def many(one: Section, thickness: Array, length: float = STUB) -> Member:
    """Bars of one section with remaining thickness (n, P), m, as arrays."""
    count = len(thickness)
    stacked = stack([built(one)] * count)
    found = properties(stacked, thickness)
    return Member(
        E=np.full(count, E), Fy=np.full(count, FY), Fu=np.full(count, 400e6), area=found.area,
        inertia_horizontal=found.inertia_horizontal, inertia_vertical=found.inertia_vertical,
        inertia_product=found.inertia_product, effective_length_in_plane=np.full(count, length),
        effective_length_out_of_plane=np.full(count, length), net_area=np.ones(count), shear_lag=np.ones(count),
        plates=plates_of(stacked, thickness),
    )  # fmt: skip


def resisted(one: Section, thickness: Array, length: float = STUB) -> Resistance:
    """What they resist."""
    return LRFR.resistances(many(one, thickness, length), NoSheet())[0]


def nominal(one: Section, length: float = STUB) -> float:
    """Nominal compressive resistance as built, N."""
    return float(resisted(one, built(one).thickness[None], length).flexural_buckling[0]) / 0.95


def sheet_of(one: Section, thickness: Array, length: float = STUB) -> tuple[Resistance, list[Step]]:
    """The hand check of one bar, with its lines."""
    new, sheet = built(one), HandCheck()
    found = write_section(new, thickness, sheet)
    names = {"E": E, "Fy": FY, "Fu": 400e6, "Li": length, "Lo": length, "An/A": 1.0, "U": 1.0}
    numbers = [sheet.given(name, value, "factor", name) for name, value in names.items()]
    shape = (found.area, found.inertia_horizontal, found.inertia_vertical, found.inertia_product)
    member = Member(*numbers[:3], *shape, *numbers[3:], plates=write_plates(new, thickness))
    return LRFR.resistances(member, sheet)[0], sheet.steps


def test_a_welded_box_by_hand() -> None:
    """Box 300 x 200 x 4 welded, a stub: b 292 and 192, limit 1.49 sqrt(800) = 42.144, c 0.18 and 1.31.

    Side walls: 292/4 = 73; root = 1.31 * 42.144/73 = 0.75628; be = 292 * (1 - 0.13613) * 0.75628 = 190.77 mm.
    Covers: 192/4 = 48; root = 1.31 * 42.144/48 = 1.15017; be = 192 * (1 - 0.20703) * 1.15017 = 175.11 mm.
    A = 2 * 200 * 4 + 2 * 292 * 4 = 3936; Ae = 3936 - 8 * (101.23 + 16.89) = 2991.0 mm^2; Pn = 250 Ae = 747.8 kN.
    """
    assert nominal(WELDED_BOX) == pytest.approx(747.8e3, rel=2e-4)


def test_a_square_tube_by_hand() -> None:
    """Tube 200 x 200 x 4, a stub: b/t = 192/4 = 48, limit 1.40 sqrt(800) = 39.598, c 0.20 and 1.38.

    root = 1.38 * 39.598/48 = 1.13844; be = 192 * (1 - 0.22769) * 1.13844 = 168.81 mm;
    A = 3136; Ae = 3136 - 16 * 23.19 = 2765.0 mm^2; Pn = 691.2 kN.
    """
    assert nominal(TUBE) == pytest.approx(691.2e3, rel=2e-4)


def test_a_long_square_tube_by_hand() -> None:
    """The same 8 m long: r = sqrt((200^2 + 192^2)/12) = 80.03; KL/r = 99.96; Fe = 197.5; Fcr = 147.2 MPa.

    0.658^(250/197.5) * 250 = 147.2. The limit rises to 39.598 * sqrt(250/147.2) = 51.6, above 48: all of it counts.
    """
    assert nominal(TUBE, 8.0) == pytest.approx(147.2e6 * 3136e-6, rel=1e-3)
    assert resisted(TUBE, built(TUBE).thickness[None], 8.0).counted == 1.0


def test_a_slender_web_by_hand() -> None:
    """Rolled I 420 x 200, web 400 x 5, flanges 200 x 10, a stub: 80 against 42.144; flanges 10 against 15.84.

    root = 1.31 * 42.144/80 = 0.69011; be = 400 * (1 - 0.12422) * 0.69011 = 241.75 mm;
    A = 6000; Ae = 6000 - 158.25 * 5 = 5208.7 mm^2; Pn = 1302.2 kN.
    """
    assert nominal(WEB) == pytest.approx(1302.2e3, rel=2e-4)


def test_flanges_welded_to_a_web_by_hand() -> None:
    """Welded I 220 x 400, web 200 x 5: kc = 4/sqrt(40) = 0.63246; limit 0.64 sqrt(0.63246 * 800) = 14.396.

    Flanges 200/10 = 20; root = 1.49 * 14.396/20 = 1.07250; be = 200 * (1 - 0.23595) * 1.07250 = 163.89 mm;
    A = 9000; Ae = 9000 - 4 * 36.11 * 10 = 7555.6 mm^2; Pn = 1888.9 kN.
    """
    assert nominal(WIDE) == pytest.approx(1888.9e3, rel=2e-4)


def test_an_angle_by_hand() -> None:
    """Angle 150 x 80 x 6, a stub: legs 25 and 13.33 against 0.45 sqrt(800) = 12.728; c 0.22 and 1.49.

    Vertical leg: root = 1.49 * 12.728/25 = 0.75859; be = 150 * (1 - 0.16689) * 0.75859 = 94.80 mm, 55.20 lost.
    Other leg: root = 1.49 * 12.728/13.333 = 1.42236; (1 - 0.31292) * 1.42236 = 0.97728 of its 74 mm, 1.68 lost.
    A = 1344; Ae = 1344 - 6 * (55.20 + 1.68) = 1002.7 mm^2; Pn = 250.7 kN.
    """
    assert nominal(ANGLE) == pytest.approx(250.7e3, rel=3e-4)


def test_a_round_tube_by_hand() -> None:
    """Tube 302 x 2, a stub: D/t = 151 between 0.11 * 800 = 88 and 360.

    Ae/A = 0.038 * 800/151 + 2/3 = 0.86799; A = pi * 300 * 2 = 1884.96 mm^2; Pn = 250 * 1636.1 = 409.0 kN.
    """
    assert nominal(CHS) == pytest.approx(409.0e3, rel=2e-4)


def test_all_parts_of_a_cover_count() -> None:
    """A cover 400 x 6 on two webs loses breadth in both outstands and between the webs."""
    parts = [(117e-3, 0.45, 0.22, 1.49, 2), (154e-3, 1.49, 0.18, 1.31, 1), (27e-3, 0.45, 0.22, 1.49, 0)]
    lost = 0.0
    for breadth, limit, c1, c2, count in parts:
        root = c2 * limit * math.sqrt(E / FY) / (breadth / 6e-3)
        lost += count * 6e-3 * (breadth - min(breadth, breadth * (1 - c1 * root) * root))
    whole = resisted(COVERED, np.array([[6e-3] * 4]))
    area = float(many(COVERED, np.array([[6e-3] * 4])).area[0])
    assert float(whole.counted[0]) == pytest.approx(1 - lost / area, rel=1e-3)


@pytest.mark.parametrize("length", [STUB, 2.0, 9.0])
@pytest.mark.parametrize("left", [1.0, 0.5, 0.12])
@pytest.mark.parametrize("one", [*ALL, *THIN], ids=lambda value: value.shape)
def test_the_sheet_ends_where_the_arrays_do(one: Section, left: float, length: float) -> None:
    """For every shape, stocky and slender, worn evenly or not, the hand check gives the resistance of the arrays."""
    thickness = built(one).thickness * left * np.linspace(1.0, 0.8, len(built(one).plates))
    found, _ = sheet_of(one, thickness, length)
    computed = resisted(one, thickness[None], length)
    assert float(found.flexural_buckling) == pytest.approx(computed.flexural_buckling[0], rel=1e-12)
    assert float(found.counted) == pytest.approx(np.broadcast_to(computed.counted, 1)[0], rel=1e-12)


def test_the_sheet_shows_each_slender_plate() -> None:
    """Walls that are alike share their lines; each line carries its formula, its clause, and the comparison made."""
    _, steps = sheet_of(WELDED_BOX, built(WELDED_BOX).thickness)
    symbols = [step.symbol for step in steps]
    assert symbols[symbols.index("Pe") + 1 :] == [
        "Pcr", "Fcr", "bf1", "λ1", "λr1", "Fel1", "be1", "λ3", "λr3", "Fel3", "be3", "Ae", "Pn", "Prc",
    ]  # fmt: skip
    lines = {step.symbol: step for step in steps}
    assert in_symbols(lines["Ae"]) == "A − (2 · (bf1 − be1) · t1 + 2 · (b3 − be3) · t3)"
    assert in_symbols(lines["Pn"]) == "Fcr · Ae"
    assert in_symbols(lines["λ3"]) == "b3/t3"
    assert lines["be3"].title.startswith("left wall, right wall")
    assert reasons(lines["be3"], Figures()) == ("λ3 = 73 > λr3 · √(Fy/Fcr) = 42.144",)
    assert all("AISC 360" in lines[symbol].source for symbol in ("λ1", "λr1", "Fel1", "be1", "Ae", "Pn"))


@pytest.mark.parametrize("one", [BOX, PIPE, ROD, FLAT, I_SECTION], ids=lambda value: value.shape)
def test_the_sheet_of_a_stocky_bar_has_no_further_line(one: Section) -> None:
    """Where all of the section counts, the hand check of compression keeps its four lines."""
    _, steps = sheet_of(one, built(one).thickness)
    assert [step.symbol for step in steps][-4:] == ["Po", "Pe", "Pn", "Prc"]


def test_a_flange_welded_to_a_web_shows_its_factor() -> None:
    """The limit of such a flange is worked on the sheet with kc from what is left of the web."""
    _, steps = sheet_of(WIDE, built(WIDE).thickness)
    lines = {step.symbol: step for step in steps}
    assert lines["kc2"].value == pytest.approx(0.63246, rel=1e-4)
    assert in_symbols(lines["λr2"]) == "0.64 · √(E/Fy · kc2)"


def test_a_table_area_scales_what_is_lost() -> None:
    """Where a table gives the area, the part that counts is the one that the plates give, on the sheet too."""
    tabled = replace(TUBE, area=parse("30 cm^2", "area"))
    thickness = built(TUBE).thickness
    plain, with_table = resisted(TUBE, thickness[None]), resisted(tabled, thickness[None])
    assert with_table.counted == pytest.approx(plain.counted, rel=1e-6)
    found, steps = sheet_of(tabled, thickness)
    assert float(found.flexural_buckling) == pytest.approx(with_table.flexural_buckling[0], rel=1e-12)
    assert in_symbols(next(step for step in steps if step.symbol == "Ae")) == "A' − fA · 4 · (bf1 − be1) · t1"


@pytest.mark.parametrize("one", THIN, ids=lambda value: value.shape)
def test_the_resistance_is_continuous_where_plates_turn_slender(one: Section) -> None:
    """As all plates get thinner by small steps, the resistance falls by no more than three times the step.

    The printed c2 of tube walls is rounded so that 0.09 % of their breadth goes at once; nothing else may jump.
    """
    jump = 1e-3 if one is TUBE else 0.0
    part = np.linspace(0.05, 1.0, 20001)[:, None]
    load = resisted(one, 3 * built(one).thickness * part, 1.0).flexural_buckling
    assert np.all(np.diff(load) / load[1:] <= jump + 3 * np.diff(part[:, 0]) / part[1:, 0])


@pytest.mark.parametrize("one", [TUBE, WELDED_BOX, ANGLE], ids=lambda value: str(value.formed))
def test_at_the_limit_the_whole_breadth_counts(one: Section) -> None:
    """A hair's breadth on the stocky side of the limit all counts; on the slender side all but a thousandth."""
    part = built(one).pieces[-1].free[0]
    at = part.breadth / (part.limit * math.sqrt(E / FY))
    thick = np.full((1, len(built(one).plates)), 1.0)
    thickness = np.concatenate([thick, thick]) * 10 * at
    thickness[:, -1] = at * (1 + 1e-6), at * (1 - 1e-6)
    counted = np.broadcast_to(resisted(one, thickness).counted, 2)
    assert counted[0] == 1.0
    assert 1 - 1e-3 < counted[1] <= 1.0


def test_round_tubes_on_both_sides_of_their_limits() -> None:
    """All counts until E7.2 falls below one; beyond its end the tube is told, and bears ever less stress."""
    ratio = np.array([0.109, 0.1105, 0.1141, 0.449, 0.451, 0.9]) * E / FY
    thickness = (0.3 / (ratio - 1))[:, None]
    found, member = resisted(CHS, thickness), many(CHS, thickness)
    assert member.plates is not None
    assert np.broadcast_to(found.counted, 6)[:2].tolist() == [1.0, 1.0]
    assert found.counted[2] == pytest.approx(0.038 / 0.1141 + 2 / 3, rel=1e-9)
    assert found.counted[3:] == pytest.approx([0.75130, 0.75111 * 0.45 / 0.451, 0.75111 / 2], rel=1e-4)
    plates = plates_of(stack([built(CHS)] * 6), thickness)
    assert thin_tubes(plates, ROUND_COVERED * member.E / member.Fy).tolist() == [False] * 4 + [True] * 2
    assert thin_tubes(plates, ROUND_LIMIT * member.E / member.Fy).tolist() == [False] + [True] * 5


@settings(max_examples=150, deadline=None)
@given(
    st.one_of(sections(), st.sampled_from(THIN)),
    st.lists(st.floats(1e-9, 1), min_size=6, max_size=6),
    st.floats(0.1, 12),
    st.lists(st.floats(0.2, 1), min_size=6, max_size=6),
)
def test_thinner_plates_never_raise_what_a_strut_bears(
    one: Section, ratios: list[float], length: float, worn: list[float]
) -> None:
    """With every plate thinned by the same part neither the load nor the load over the area ever rises.

    The loss allowance looks for its limit above the one of the area alone, which holds for this reason.
    """
    new = built(one)
    start = new.thickness * np.resize(worn, len(new.plates))
    thickness = start * np.array([0.0, *sorted(ratios), 1.0])[:, None]
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        member = many(one, thickness, length)
        load = LRFR.resistances(member, NoSheet())[0].flexural_buckling
    over = np.divide(load, member.area, out=np.zeros_like(load), where=member.area > 1e-15)
    assert np.all(load >= 0)
    assert np.all(load[:-1] <= load[1:] * (1 + 1e-9))
    assert np.all(over[:-1] <= over[1:] * (1 + 1e-9))


@settings(max_examples=60, deadline=None)
@given(st.one_of(sections(), st.sampled_from(THIN)), st.floats(0.1, 12), st.floats(0.05, 1))
def test_slender_plates_only_ever_lower_a_resistance(one: Section, length: float, left: float) -> None:
    """With effective breadths a strut bears at most what its gross section would, and more than nothing."""
    thickness = built(one).thickness[None] * left
    member = many(one, thickness, length)
    with_plates, gross = (
        LRFR.resistances(each, NoSheet())[0].flexural_buckling[0] for each in (member, replace(member, plates=None))
    )
    assert 0 < with_plates <= gross * (1 + 1e-12)


def test_plates_that_are_gone_raise_no_warning() -> None:
    """A hole right through one plate or all of them leaves numbers, on the sheet and in arrays."""
    with warnings.catch_warnings(), np.errstate(all="raise", under="ignore"):
        warnings.simplefilter("error")
        for one in (*ALL, *THIN):
            whole = built(one).thickness * 0.3
            for plate in range(len(whole)):
                thickness = whole.copy()
                thickness[plate] = 0.0
                computed = resisted(one, np.stack([thickness, 0 * whole])).flexural_buckling
                written, _ = sheet_of(one, thickness)
                assert computed[1] == 0.0
                assert float(written.flexural_buckling) == pytest.approx(computed[0], rel=1e-9, abs=1e-6)
