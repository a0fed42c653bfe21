"""Buckling by EN 1993-1-1 against the handbook table and worked members, and thin plates by EN 1993-1-5 by hand.

Sources:

table
    chi by lambda for the curves a0 to d, the common handbook table; its values at 0.5, 1.0, 1.5 and 2.0 from memory,
    all of it worked apart from this program.
trusses
    *Steel Buildings in Europe, Single-Storey Steel Buildings, Part 5: Detailed Design of Trusses*, 2010, pages 5-33,
    5-34 and 5-37: members worked with gamma M1 1.0. Read.
"""

from __future__ import annotations

import math
from typing import Any

import numpy as np
import pytest
from section.making import section

from models.calculation import NoSheet
from models.resistance import EUROCODE, Member, Resistance
from models.resistance.eurocode import IMPERFECTION, reduction
from models.section import built, plates_of, properties, stack

E, FY = 210e9, 355e6
CM = 1e-2

TABLE = {
    0.2: (1.0000, 1.0000, 1.0000, 1.0000, 1.0000), 0.3: (0.9859, 0.9775, 0.9641, 0.9491, 0.9235),
    0.4: (0.9701, 0.9528, 0.9261, 0.8973, 0.8504), 0.5: (0.9513, 0.9243, 0.8842, 0.8430, 0.7793),
    0.6: (0.9276, 0.8900, 0.8371, 0.7854, 0.7100), 0.7: (0.8961, 0.8477, 0.7837, 0.7247, 0.6431),
    0.8: (0.8533, 0.7957, 0.7245, 0.6622, 0.5797), 0.9: (0.7961, 0.7339, 0.6612, 0.5998, 0.5208),
    1.0: (0.7253, 0.6656, 0.5970, 0.5399, 0.4671), 1.1: (0.6482, 0.5960, 0.5352, 0.4842, 0.4189),
    1.2: (0.5732, 0.5300, 0.4781, 0.4338, 0.3762), 1.3: (0.5053, 0.4703, 0.4269, 0.3888, 0.3385),
    1.4: (0.4461, 0.4179, 0.3817, 0.3492, 0.3055), 1.5: (0.3953, 0.3724, 0.3422, 0.3145, 0.2766),
    1.6: (0.3520, 0.3332, 0.3079, 0.2842, 0.2512), 1.8: (0.2833, 0.2702, 0.2521, 0.2345, 0.2093),
    2.0: (0.2323, 0.2229, 0.2095, 0.1962, 0.1766), 2.2: (0.1937, 0.1867, 0.1765, 0.1662, 0.1508),
    2.4: (0.1639, 0.1585, 0.1506, 0.1425, 0.1302), 2.5: (0.1515, 0.1467, 0.1397, 0.1325, 0.1214),
    2.6: (0.1404, 0.1362, 0.1299, 0.1234, 0.1134), 2.8: (0.1216, 0.1182, 0.1132, 0.1079, 0.0997),
    3.0: (0.1063, 0.1036, 0.0994, 0.0951, 0.0882),
}  # fmt: skip


def member(area: float, inertia: float, length: float, **changes: Any) -> Member:
    """A bar of S355 with the same inertia and length both ways."""
    numbers: dict[str, Any] = {
        "E": E, "Fy": FY, "Fu": 510e6, "area": area, "inertia_horizontal": inertia, "inertia_vertical": inertia,
        "inertia_product": 0.0, "effective_length_in_plane": length, "effective_length_out_of_plane": length,
        "net_area": 1.0, "shear_lag": 1.0,
    }  # fmt: skip
    return Member(**{**numbers, **changes})


def resisted(one: Member) -> Resistance:
    """What it resists."""
    return EUROCODE.resistances(one, NoSheet())[0]


@pytest.mark.parametrize("slenderness", TABLE)
def test_handbook_table(slenderness: float) -> None:
    """The reduction factor of every curve is the tabulated one, to its last digit."""
    for alpha, expected in zip(IMPERFECTION.values(), TABLE[slenderness], strict=True):
        assert float(reduction(slenderness, alpha, NoSheet())) == pytest.approx(expected, abs=5.1e-5)


@pytest.mark.parametrize(
    ("curve", "inertia", "length", "critical", "factor", "resistance"),
    [("b", 788, 193.6, 4357, 0.781, 1690), ("a", 11770, 850.4, 3373, 0.7952, 1720)],
)
def test_worked_truss_members(
    curve: str, inertia: float, length: float, critical: float, factor: float, resistance: float
) -> None:
    """Two chords of 60.95 cm^2, S355: critical load, reduction factor and, with gamma M1 1.0, resistance as printed."""
    one = member(60.95 * CM**2, inertia * CM**4, length * CM, curves=(curve, curve))
    assert math.pi**2 * E * inertia * CM**4 / (length * CM) ** 2 == pytest.approx(critical * 1e3, rel=2e-4)
    found = float(resisted(one).flexural_buckling) * 1.1
    assert found / (60.95 * CM**2 * FY) == pytest.approx(factor, abs=6e-4)
    assert found == pytest.approx(resistance * 1e3, rel=1e-3)


def test_tension_by_hand() -> None:
    """A 20 cm^2 tie: yield 710 kN; net 0.85 and shear lag 0.9 leave 0.9 x 510 x 2000 x 0.765 / 1.25 = 561.8 kN."""
    found = resisted(member(20 * CM**2, 100 * CM**4, 1.0, net_area=0.85, shear_lag=0.9))
    assert float(found.tension_yield) == pytest.approx(710e3, rel=1e-12)
    assert float(found.tension_fracture) == pytest.approx(561.816e3, rel=1e-6)
    assert str(found.tension_check) == "tension fracture"


def test_each_direction_has_its_own_curve() -> None:
    """A bar that is weaker in plane takes that curve, and the better curve out of plane does not help it."""
    weak_inside = {"inertia_vertical": 400 * CM**4}
    by = {
        curves: float(resisted(member(20 * CM**2, 100 * CM**4, 2.0, curves=curves, **weak_inside)).flexural_buckling)
        for curves in (("a", "c"), ("c", "a"), ("a", "a"), ("c", "c"))
    }
    assert by["a", "c"] == by["a", "a"] > by["c", "a"] == by["c", "c"]


def test_directions_that_take_part_in_each_other_take_the_worse_curve() -> None:
    """With a product of inertia the least critical load counts, by the worse of the two curves."""
    one = member(20 * CM**2, 100 * CM**4, 2.0, inertia_product=60 * CM**4, curves=("a", "c"))
    critical = math.pi**2 * E * 40 * CM**4 / 4
    ratio = math.sqrt(20 * CM**2 * FY / critical)
    half = 0.5 * (1 + 0.49 * (ratio - 0.2) + ratio**2)
    expected = 20 * CM**2 * FY / (half + math.sqrt(half**2 - ratio**2)) / 1.1
    assert float(resisted(one).flexural_buckling) == pytest.approx(expected, rel=1e-9)


def stub(shape: str, now: float, fy: float = FY, modulus: float = E, **sizes: Any) -> Resistance:
    """A section so short that nothing buckles but its plates, every plate ``now`` mm thick."""
    one = stack([built(section(shape, **sizes))])
    left = np.full(one.shape, now * 1e-3)
    found = properties(one, left)
    return resisted(
        Member(
            E=np.array([modulus]), Fy=np.array([fy]), Fu=np.array([510e6]), area=found.area,
            inertia_horizontal=found.inertia_horizontal, inertia_vertical=found.inertia_vertical,
            inertia_product=found.inertia_product, effective_length_in_plane=np.array([0.01]),
            effective_length_out_of_plane=np.array([0.01]), net_area=np.ones(1), shear_lag=np.ones(1),
            plates=plates_of(one, left),
        )
    )  # fmt: skip


def test_a_square_tube_with_slender_walls_by_hand() -> None:
    """200 x 200 x 4, S355: 192/4 = 48, epsilon 0.8136, lambda_p 48/(28.4 x 0.8136 x 2) = 1.0387, rho 0.7588.

    Four walls each lose 0.2412 x 192 x 4 mm^2 of 3136 mm^2.
    """
    found = stub("rectangular tube", 4.0, depth=200, width=200, thickness=4)
    ratio = 48 / (28.4 * math.sqrt(235 / 355) * 2)
    rho = (ratio - 0.22) / ratio**2
    assert rho == pytest.approx(0.7588, abs=1e-4)
    assert found.flexural_buckling[0] * 1.1 == pytest.approx((3136 - 4 * (1 - rho) * 768) * 355, rel=1e-9)
    assert found.slender is not None
    assert found.slender.tolist() == [[True] * 4]


def test_an_angle_with_slender_legs_by_hand() -> None:
    """150 x 150 x 8, S355: 18.75 over 28.4 x 0.8136 x sqrt(0.43) is 1.2374, rho 0.6853 of both legs."""
    found = stub("angle", 8.0, legs=(150, 150), thickness=8)
    ratio = 18.75 / (28.4 * math.sqrt(235 / 355) * math.sqrt(0.43))
    rho = (ratio - 0.188) / ratio**2
    assert rho == pytest.approx(0.6853, abs=1e-4)
    assert found.flexural_buckling[0] * 1.1 == pytest.approx(rho * (150 + 142) * 8 * 355, rel=1e-9)


@pytest.mark.parametrize(
    ("shape", "limit", "sizes"),
    [
        ("rectangular tube", 192 / (0.673 * 28.4 * 2), {"depth": 200, "width": 200, "thickness": 4}),
        ("angle", 150 / (0.748 * 28.4 * math.sqrt(0.43)), {"legs": (150, 150), "thickness": 8}),
    ],
)
def test_the_limit_of_slender_plates(shape: str, limit: float, sizes: dict[str, Any]) -> None:
    """Just thicker than the limit all counts; just thinner next to nothing is lost, as the rule begins there at 1."""
    thick = stub(shape, limit * (1 + 1e-6), fy=235e6, **sizes)
    thin = stub(shape, limit * (1 - 1e-6), fy=235e6, **sizes)
    assert thick.slender is None
    assert thin.slender is not None
    assert 1 - 1e-3 < thin.counted[0] <= 1.0


def test_another_modulus_moves_the_limit() -> None:
    """Epsilon goes with the root of E: with a tenth less the same tube loses more."""
    sizes = {"depth": 200, "width": 200, "thickness": 4}
    stiff, soft = (stub("rectangular tube", 5.0, modulus=modulus, **sizes).counted[0] for modulus in (E, 0.9 * E))
    ratio = 192 / 5 / (28.4 * math.sqrt(235 / 355 * 0.9) * 2)
    assert soft < stiff
    assert soft == pytest.approx(1 - 4 * 192 * (1 - (ratio - 0.22) / ratio**2) / 784, rel=1e-9)


def test_round_tubes_beyond_class_3() -> None:
    """Up to 90 epsilon squared all of a round tube counts; beyond, the part falls as 1/(D/t), and it is marked."""
    limit = 90 * 235 / 355
    thickness = 296 / (limit - 1)
    inside = stub("round tube", thickness * 1.0001, diameter=300, thickness=4)
    assert inside.uncovered is None
    beyond = stub("round tube", 3.0, diameter=300, thickness=4)
    assert beyond.uncovered is not None
    assert beyond.uncovered.tolist() == [True]
    assert beyond.counted[0] == pytest.approx(limit / (299 / 3), rel=1e-9)
