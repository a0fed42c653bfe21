"""Statically indeterminate trusses from textbooks and course notes, with lack of fit and displacements."""

from __future__ import annotations

from math import radians, tan

from published.example import Example

HIBBELER = "R. C. Hibbeler, Structural Analysis, 8th ed."
SQUARE_NOTE = "Course note on statically indeterminate trusses (public study page); equal EA, side 1"

_PANEL = {"A": (0.0, 0.0), "B": (8.0, 0.0), "C": (8.0, 6.0), "D": (0.0, 6.0)}
_SQUARE = {"A": (0.0, 0.0), "B": (1.0, 0.0), "C": (1.0, 1.0), "D": (0.0, 1.0)}
_TWO_SPANS = {f"{level}{i}": (3.0 * i, y) for level, y in (("b", 0.0), ("t", 3.0)) for i in range(5)}
_HANGER = tan(radians(30))

# The numbers stand side by side, as in the sources.
# fmt: off
EXAMPLES = (
    Example(
        name="crossed panel",
        source=f"{HIBBELER}, example 10.7; ft, lb, equal EA",
        seen="memory",
        joints=_PANEL,
        bars="AB BC CD AD BD AC",
        held={"A": "xy", "B": "y"},
        loads={"C": (400, 0)},
        forces={
            "AC": "324.07", "AB CD": "140.74", "BC": "-194.44", "AD": "105.56", "BD": "-175.93",
        },
        reactions={"A": ("-400", "-300"), "B": (None, "300")},
    ),
    Example(
        name="crossed panel, diagonal too short",
        source=f"{HIBBELER}, example 10.8; in, kips, AC 0.5 in short",
        seen="memory",
        joints={joint: (12 * x, 12 * y) for joint, (x, y) in _PANEL.items()},
        bars="AB BC CD AD BD AC",
        held={"A": "xy", "B": "y"},
        area=0.2,
        modulus=29000.0,
        imposed={"AC": -0.5},
        forces={"AC": "6.99"},
        also={"BD": "6.993", "AB CD": "-5.594", "BC AD": "-4.196"},
    ),
    Example(
        name="crossed square",
        source=f"{SQUARE_NOTE}; units of P",
        seen="read",
        joints=_SQUARE,
        bars="AB BC CD AD BD AC",
        held={"A": "xy", "D": "x"},
        loads={"C": (0, -1)},
        forces={"BD": "0.56"},
        also={"AC": "-0.8536", "CD": "0.6036", "AB BC AD": "-0.3964"},
        remark="The note prints magnitudes; the signs are those of the load downward.",
    ),
    Example(
        name="crossed square, diagonal too short",
        source=f"{SQUARE_NOTE}; units of EA times the lack of fit over the side",
        seen="read",
        joints=_SQUARE,
        bars="AB BC CD AD BD AC",
        held={"A": "xy", "D": "x"},
        imposed={"AC": -1.0},
        forces={"AC BD": "0.2071"},
        also={"AB BC CD AD": "-0.14645"},
        remark="Printed as 1 / 4.83.",
    ),
    Example(
        name="redundant by a support",
        source="Chandrupatla & Belegundu, Introduction to Finite Elements in Engineering, example 4.1; in, lb",
        seen="memory",
        joints={"1": (0, 0), "2": (40, 0), "3": (40, 30), "4": (0, 30)},
        bars="12 32 13 43",
        held={"1": "xy", "2": "y", "4": "xy"},
        loads={"2": (20000, 0), "3": (0, -25000)},
        modulus=29.5e6,
        forces={"12": "20000", "32": "-21880", "13": "-5208", "43": "4167"},
        reactions={"1": ("-15833", "3126"), "2": (None, "21879"), "4": ("-4167", "0")},
        displacements={"2": ("27.12", "0"), "3": ("5.65", "-22.25")},
        displacement_unit=1e-3,
        units=5.0,
        remark="The book goes on from rounded displacements; unrounded, the reactions are 3125 and 21,875.",
    ),
    Example(
        name="three bars to held joints",
        source="D. L. Logan, A First Course in the Finite Element Method, example 3.5; in, lb",
        seen="memory",
        joints={"1": (0, 0), "2": (0, 120), "3": (120, 120), "4": (120, 0)},
        bars="12 13 14",
        held={"2": "xy", "3": "xy", "4": "xy"},
        loads={"1": (0, -10000)},
        area=2.0,
        modulus=30e6,
        forces={"12": "7929", "13": "2929", "14": "-2071"},
        displacements={"1": ("0.414", "-1.586")},
        displacement_unit=1e-2,
        units=0.5,
        remark="The book prints stresses of 3965, 1471 and -1035 psi on 2 in^2, from rounded displacements; the exact "
        "ones, 3964.5, 1464.5 and -1035.5 psi, stand here as forces.",
    ),
    Example(
        name="three bars of different area",
        source="Public finite element teaching example, three held bases; in, kip",
        seen="memory",
        joints={"1": (0, 0), "2": (144, 0), "3": (168, 0), "4": (72, 96)},
        bars="14 24 34",
        held={"1": "xy", "2": "xy", "3": "xy"},
        loads={"4": (100, -50)},
        area={"14": 10, "24": 5, "34": 5},
        modulus=3000.0,
        forces={"14": "43.935", "24": "-57.546", "34": "-55.311"},
        displacements={"4": ("0.530093", "-0.177894")},
    ),
    Example(
        name="three bars from a ceiling",
        source="S. Timoshenko, Strength of Materials, part I, statically indeterminate systems; units of P, bars at 30 "
        "degrees",
        seen="memory",
        joints={"p": (0, 0), "m": (0, 1), "l": (-_HANGER, 1), "r": (_HANGER, 1)},
        bars="pm pl pr",
        held={"m": "xy", "l": "xy", "r": "xy"},
        loads={"p": (0, -1)},
        forces={"pm": "0.43496", "pl pr": "0.32622"},
    ),
    Example(
        name="two spans",
        source="None: a second calculation; kN, m, equal EA",
        seen="computed",
        joints=_TWO_SPANS,
        bars="b0-b1 b1-b2 b2-b3 b3-b4 t0-t1 t1-t2 t2-t3 t3-t4 b0-t0 b1-t1 b2-t2 b3-t3 b4-t4 t0-b1 b1-t2 t2-b3 b3-t4",
        held={"b0": "xy", "b2": "y", "b4": "y"},
        loads={"b1": (0, -100), "b3": (0, -100)},
        also={
            "t0-t1 t1-t2 t2-t3 t3-t4": "-46.589", "b0-b1 b3-b4": "0", "b1-b2 b2-b3": "-6.823", "t0-b1 b3-t4": "65.886",
            "b1-t2 t2-b3": "75.535", "b0-t0 b4-t4": "-46.589", "b2-t2": "-106.823", "b1-t1 b3-t3": "0",
        },
        reactions={"b0": ("0", "46.589"), "b2": (None, "106.823"), "b4": (None, "46.589")},
    ),
)
# fmt: on
