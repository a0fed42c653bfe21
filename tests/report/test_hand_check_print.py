"""A hand check as printed: its formulas, its numbers, and that both give the printed value."""

from __future__ import annotations

import pytest
from report import invented, sample
from report.reckon import reckon

from models import formula
from models.calculation import HandCheck, Step, Traced, choose, least
from models.words import Figures


def line(made: Traced, symbol: str = "y") -> Step:
    """A step around a traced number."""
    return Step(symbol, "a title", made, "factor")


def given(**values: float) -> list[Traced]:
    """Pure numbers by their symbols."""
    sheet = HandCheck()
    return [sheet.given(name, value, "factor", name) for name, value in values.items()]


def test_a_product_of_sums_keeps_its_parentheses() -> None:
    """Parentheses stand where leaving them out would change the value, and nowhere else."""
    a, b, c = given(a=2.0, b=3.0, c=5.0)
    assert formula.in_symbols(line(a * (b + c))) == "a · (b + c)"
    assert formula.in_symbols(line(a * b + c)) == "a · b + c"
    assert formula.in_symbols(line(a - (b - c))) == "a − (b − c)"
    assert formula.in_symbols(line(a / (b * c))) == "a/(b · c)"
    assert formula.in_symbols(line((a / b) / c)) == "(a/b)/c"
    assert formula.in_symbols(line((a**b) ** c)) == "(a^b)^c"
    assert formula.in_symbols(line(-(a + b))) == "−(a + b)"


def test_the_column_curve_reads_as_in_the_book() -> None:
    """The inelastic column curve prints with its constant, exponent and factor."""
    curve = next(step for step in invented.hand_check() if step.symbol == "Pn")
    assert formula.in_symbols(curve) == "0.658^(Po/Pe) · Po"


def test_a_choice_says_what_decided() -> None:
    """Where a formula was chosen, the comparison that chose it is printed with its values."""
    curve = next(step for step in invented.hand_check() if step.symbol == "Pn")
    assert formula.reasons(curve, Figures()) == ("Pe/Po = 1.8719 ≥ 0.44",)


def test_a_choice_between_forces_prints_them_with_their_unit() -> None:
    """A compared expression carries the unit that its operands give it."""
    sheet = HandCheck()
    squash = sheet.given("Po", 100e3, "force", "yield load")
    euler = sheet.given("Pe", 30e3, "force", "elastic critical load")
    step = Step("Pn", "t", choose(euler, ">=", 0.44 * squash, squash, 0.877 * euler), "force")
    assert formula.reasons(step, Figures()) == ("Pe = 30 kN < 0.44 · Po = 44 kN",)


def test_a_choice_of_a_given_number_is_still_a_computed_line() -> None:
    """A result that equals one of its inputs prints that input's symbol, not itself."""
    a, b = given(a=2.0, b=3.0)
    step = line(choose(a, "<", b, a, b))
    assert formula.is_computed(step)
    assert formula.in_symbols(step) == "a"
    assert not formula.is_computed(invented.hand_check()[0])


def test_a_negative_number_stands_in_parentheses() -> None:
    """A minus sign of a number is never taken for a difference."""
    a, b = given(a=2.0, b=-3.0)
    assert formula.in_numbers(line(a * b), Figures()) == "2 · (−3)"
    assert formula.in_numbers(line(a - b), Figures()) == "2 − (−3)"
    assert formula.in_numbers(line(least(a, b)), Figures()) == "least of (2; −3)"


def test_rounding_of_the_arithmetic_prints_as_nothing() -> None:
    """A centroid that is zero up to rounding prints as 0, not as seventeen digits."""
    sheet = HandCheck()
    offset = sheet.given("x", 1.1e-18, "size", "offset")
    assert formula.result(Step("x", "t", offset, "size"), Figures()) == "0 mm"


@pytest.mark.parametrize("units", ["SI", "US"])
def test_every_kind_of_operation_can_be_worked_again(units: str) -> None:
    """Each line gives its printed value within 0.1 % from its printed numbers, in both unit systems."""
    figures = Figures(units)
    for step in invented.hand_check():
        assert reckon(formula.in_numbers(step, figures)) == pytest.approx(
            reckon(formula.result(step, figures)), rel=1e-3, abs=1e-16
        ), step.symbol


@pytest.mark.parametrize("units", ["SI", "US"])
@pytest.mark.parametrize("name", sample.NAMES)
def test_every_line_of_every_bar_can_be_worked_again(name: str, units: str) -> None:
    """A reviewer gets each printed value of each bar from the numbers in that line, within 0.1 %."""
    rated = sample.rated(name)
    figures = Figures(units)
    apart = [
        (bar.bar, step.symbol, formula.in_numbers(step, figures), formula.result(step, figures))
        for bar in rated.rating.bars
        for step in rated.hand_check(bar.truss, bar.bar).steps
        if reckon(formula.in_numbers(step, figures))
        != pytest.approx(reckon(formula.result(step, figures)), rel=1e-3, abs=1e-16)
    ]
    assert apart == []
