"""Quantities: every unit against another library, and one grammar in two spellings."""

from __future__ import annotations

import re

import pint
import pytest
from hypothesis import example, given
from hypothesis import strategies as st

from models.errors import QuantityError
from models.quantity import UNITS, Dimension, parse, pattern

REGISTRY = pint.UnitRegistry()
SPELLED = {
    "kip": "kip",
    "kip/ft": "kip/ft",
    "kip/in": "kip/inch",
    "psf": "lbf/ft^2",
    "plf": "lbf/ft",
    "ksi": "kip/inch^2",
    "lbf": "lbf",
    "in": "inch",
    "in^2": "inch^2",
    "in^4": "inch^4",
    "psi": "lbf/inch^2",
    "lb/ft^3": "lb/ft^3",
}
BASE = {
    "length": "m",
    "stress": "Pa",
    "pressure": "Pa",
    "force": "N",
    "line load": "N/m",
    "spring stiffness": "N/m",
    "density": "kg/m^3",
    "area": "m^2",
    "inertia": "m^4",
}
ALL_UNITS = [(dimension, unit) for dimension, units in UNITS.items() for unit in units]
DIMENSIONS = st.sampled_from(list(UNITS))
DIGITS = st.text("0123456789", min_size=1, max_size=5)
NUMBERS = st.one_of(
    DIGITS,
    st.builds("{}{}{}".format, DIGITS, st.sampled_from(".,"), DIGITS),
    st.builds("{}/{}".format, DIGITS, DIGITS),
    st.builds("{} {}/{}".format, DIGITS, DIGITS, DIGITS),
    st.sampled_from(["", ".5", "5.", "1e3", "1.2.3", "+1", "1'000", "٣", "1 2", "1//2", "0/0", "inf", "nan", "1_0"]),
)
UNIT_TEXTS = st.sampled_from(
    [*dict.fromkeys(unit for _, unit in ALL_UNITS), "mm²", "in⁴", "kg/m³", "N/mm²", "MM", "", "m m"]
)
TEXTS = st.one_of(
    st.builds(
        "{}{}{}{}".format, st.sampled_from(["", "-", "--", " "]), NUMBERS, st.sampled_from([" ", "", "  "]), UNIT_TEXTS
    ),
    st.builds("{}{} ft {} in{}".format, st.sampled_from(["", "-"]), DIGITS, NUMBERS, st.sampled_from(["", " ", "\n"])),
    st.text("0123456789 .,/-^²ftinmkNPa", max_size=12),
)


def accepted(text: str, dimension: Dimension) -> bool:
    """Whether the program reads a text."""
    try:
        parse(text, dimension)
    except QuantityError:
        return False
    return True


@pytest.mark.parametrize(("dimension", "unit"), ALL_UNITS)
def test_factor(dimension: Dimension, unit: str) -> None:
    """Every unit is as large as an independent library of units says."""
    other = REGISTRY.Quantity(1.0, SPELLED.get(unit, unit)).to(BASE[dimension]).magnitude
    assert parse(f"1 {unit}", dimension).si == pytest.approx(other, rel=1e-14)


@example("1,000 mm", "length")
@example("1,0000 mm", "length")
@example("12 ft 6 1/2 in", "length")
@example("12 ft 1,250 in", "length")
@example("1 1/02 in", "length")
@given(TEXTS, DIMENSIONS)
def test_schema_pattern_agrees(text: str, dimension: Dimension) -> None:
    """The pattern that the JSON Schema gives accepts exactly the texts that the program reads."""
    # `$` ends a text in a JSON Schema (ECMA 262); in Python it would let a line end follow.
    strict = re.compile(pattern(dimension).replace("$", r"\Z"))
    assert accepted(text, dimension) == (strict.search(text) is not None)


@pytest.mark.parametrize(
    ("text", "metres"),
    [
        ("3.2 m", 3.2),
        ("3,25 m", 3.25),
        ("-4 mm", -0.004),
        ("5/16 in", 0.0079375),
        ("1 1/2 in", 0.0381),
        ("12 ft 6 in", 3.81),
        ("12 ft 6 1/2 in", 3.8227),
        ("-1 ft 6 in", -0.4572),
        ("1.0000 cm", 0.01),
    ],
)
def test_lengths(text: str, metres: float) -> None:
    """Lengths as people write them on drawings; the text is kept as typed."""
    assert parse(text, "length").si == pytest.approx(metres, rel=1e-15)
    assert parse(text, "length").text == text


@pytest.mark.parametrize(
    "text",
    ["3", "3m", "3 M", "3 yd", "3 kN", "1,000 m", "1.000,5 m", "1 000 m", "1e3 mm", "1/0 in", "6 in 12 ft", "", " 3 m"],
)
def test_refused(text: str) -> None:
    """What may mean two things, or nothing, is refused."""
    assert not accepted(text, "length")


@pytest.mark.parametrize("value", [3, 3.5, True, None, ["3 m"], {"m": 3}])
def test_bare_values(value: object) -> None:
    """A number without a unit is no quantity."""
    with pytest.raises(QuantityError, match="has no unit"):
        parse(value, "length")


def test_raised_figures() -> None:
    """Raised figures read as powers."""
    assert parse("2 m²", "area").si == 2.0
    assert parse("1 N/mm²", "stress").si == 1e6
    assert parse("7850 kg/m³", "density").si == 7850.0
    assert parse("3 cm⁴", "inertia").si == pytest.approx(3e-8)
