"""Allowable stresses of columns and ties, and the rating factors that they give, against printed and worked values.

Sources:

Hicks
    T. G. Hicks, *Civil Engineering Formulas*, McGraw-Hill 2002, chapter 10, Table 10.1 and equations 10.3 to 10.7:
    Cc and the formulas with their numbers put in, inventory (factor of safety 2.12). Read.
worked
    Values worked apart from this program with the formulas of the Standard Specifications; E 29,000 ksi.
"""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from section.making import texts

from models.calculation import HandCheck, NoSheet
from models.quantity import UNITS
from models.rating.factor import live_factors, rating_factors
from models.resistance import ALLOWABLE_STRESS, Member, Resistance
from models.section import built

KSI, KIP, INCH = UNITS["stress"]["ksi"], UNITS["force"]["kip"], UNITS["length"]["in"]


def strut(slenderness: float, Fy: float) -> Member:
    """A bar of 1 in^2 with radius of gyration 1 in about every axis and a length of so many inches."""
    return Member(
        E=29000 * KSI, Fy=Fy * KSI, Fu=58 * KSI, area=INCH**2, inertia_horizontal=INCH**4, inertia_vertical=INCH**4,
        inertia_product=0.0, effective_length_in_plane=slenderness * INCH,
        effective_length_out_of_plane=slenderness * INCH, net_area=1.0, shear_lag=1.0,
    )  # fmt: skip


def stresses(slenderness: float, Fy: float) -> tuple[float, float]:
    """Allowable stress of a column, ksi, inventory and operating."""
    lower, upper = ALLOWABLE_STRESS.resistances(strut(slenderness, Fy), NoSheet())
    return float(lower.flexural_buckling) / KIP, float(upper.flexural_buckling) / KIP


HICKS = {
    36: (126.1, 16.98, 0.00053), 50: (107.0, 23.58, 0.00103), 90: (79.8, 42.45, 0.00333), 100: (75.7, 47.17, 0.00412),
}  # fmt: skip
"""By Fy in ksi: Cc, and the two numbers of Fa = a - b (KL/r)^2, ksi."""


@pytest.mark.parametrize("Fy", HICKS)
def test_printed_formulas(Fy: float) -> None:
    """Below Cc the stress is the printed parabola to its last digit (0.00333 is cut off), beyond 135,000/s^2."""
    limit, a, b = HICKS[Fy]
    for s in (1.0, 20.0, 40.0, 60.0, 70.0):
        assert stresses(s, Fy)[0] == pytest.approx(a - b * s**2, abs=0.006 + 0.00001 * s**2)
    for s in (130.0, 160.0, 200.0):
        assert stresses(s, Fy)[0] == pytest.approx(135_000.740 / s**2, rel=1e-4)
    sheet = HandCheck()
    member = strut(50.0, Fy)
    given = {name: sheet.given(name, value, "factor", name) for name, value in vars(member).items() if name[0] != "c"
             and value is not None}  # fmt: skip
    ALLOWABLE_STRESS.resistances(replace(member, **given), sheet)
    steps = {step.symbol: step.value for step in sheet.steps}
    assert steps["Cc"] == pytest.approx(limit, abs=0.06)
    assert steps["KL/r"] == pytest.approx(50.0, rel=1e-9)


WORKED = {
    20: ((12.153, 15.155), (14.003, 17.462), (15.387, 19.188), (16.768, 20.910), (23.173, 28.898)),
    40: ((11.819, 14.738), (13.558, 16.907), (14.848, 18.517), (16.127, 20.111), (21.937, 27.357)),
    60: ((11.261, 14.044), (12.816, 15.982), (13.951, 17.397), (15.059, 18.779), (19.877, 24.788)),
    80: ((10.482, 13.071), (11.778, 14.688), (12.695, 15.831), (13.564, 16.915), (16.993, 21.191)),
    100: ((9.479, 11.821), (10.443, 13.023), (11.079, 13.816), (11.641, 14.518), (13.285, 16.567)),
    120: ((8.253, 10.293), (8.811, 10.988), (9.105, 11.355), (9.292, 11.588), (9.376, 11.692)),
    140: ((6.805, 8.486), (6.888, 8.590), (6.888, 8.590), (6.888, 8.590), (6.888, 8.590)),
    160: ((5.274, 6.577),) * 5,
    180: ((4.167, 5.196),) * 5,
    200: ((3.375, 4.209),) * 5,
}
"""Inventory and operating, ksi, by KL/r, for Fy 26, 30, 33, 36 and 50 ksi."""


@pytest.mark.parametrize("s", WORKED)
def test_worked_table(s: float) -> None:
    """The allowable stress at both levels, for the steels of all eras, to the last digit of the table."""
    found = [stresses(s, Fy) for Fy in (26, 30, 33, 36, 50)]
    np.testing.assert_allclose(found, WORKED[s], atol=6e-4)


def test_a_worked_strut() -> None:
    """Two angles 6 x 4 x 1/2, long legs back to back, 15 ft, K 0.75, Fy 33: RF 1.525 and 2.260 for D 58, L 40 kip."""
    member = replace(
        strut(0.75 * 180, 33), area=9.50 * INCH**2, inertia_horizontal=9.50 * 1.91**2 * INCH**4,
        inertia_vertical=9.50 * 1.64**2 * INCH**4,
    )  # fmt: skip
    lower, upper = ALLOWABLE_STRESS.resistances(member, NoSheet())
    assert float(lower.flexural_buckling) / KIP == pytest.approx(118.99, abs=0.01)
    assert float(upper.flexural_buckling) / KIP == pytest.approx(148.39, abs=0.01)
    assert factors((lower, upper), -58, -40) == pytest.approx((1.5249, 2.2598), abs=2e-4)


def test_a_worked_tie() -> None:
    """7.50 in^2 of 30 ksi steel, D 70 and L 50 kip: 0.55 and 0.75 Fy give 1.075 and 1.975."""
    tie = replace(strut(10, 30), area=7.50 * INCH**2)
    assert factors(ALLOWABLE_STRESS.resistances(tie, NoSheet()), 70, 50) == pytest.approx((1.075, 1.975), abs=1e-9)


def factors(found: tuple[Resistance, ...], dead: float, live: float) -> tuple[float, float]:
    """Inventory and operating rating factor under a dead and a live force, kip, tension positive."""
    capacity = np.array([[level.tension, level.flexural_buckling] for level in found], float)[..., None] / KIP
    effects = np.array([[[max(live, 0.0)], [min(live, 0.0)]]])
    gamma = live_factors(ALLOWABLE_STRESS, [{"crowd"}])
    inventory, operating = rating_factors(
        ALLOWABLE_STRESS, capacity, np.array([[dead], [0.0]], float), effects, gamma
    ).lowest[:, 0]
    return float(inventory), float(operating)


def test_a_net_section() -> None:
    """One leg of an angle 4 x 4 x 1/2, A36: 0.50 and 0.67 Fu on the net section, gross yield at 0.55 and 0.75 Fy."""
    area = built(texts("angle", legs=("4 in", "4 in"), thickness="1/2 in")).nominal.area
    tie = replace(strut(10, 36), area=area, net_area=0.6, shear_lag=0.9)
    lower, upper = ALLOWABLE_STRESS.resistances(tie, NoSheet())
    in_square_inches = area / INCH**2
    assert float(lower.tension_fracture) / KIP == pytest.approx(0.50 * 58 * 0.54 * in_square_inches, rel=1e-9)
    assert float(upper.tension_fracture) / KIP == pytest.approx(0.67 * 58 * 0.54 * in_square_inches, rel=1e-9)
    assert float(lower.tension_yield) / KIP == pytest.approx(19.8 * in_square_inches, rel=1e-9)
    assert float(upper.tension_yield) / KIP == pytest.approx(27.0 * in_square_inches, rel=1e-9)
    assert [str(level.tension_check) for level in (lower, upper)] == ["tension fracture", "tension fracture"]
