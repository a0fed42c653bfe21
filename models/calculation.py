"""A hand check as values, filled by the very code that computes.

Engineering functions are written once, over numbers. Given numpy arrays they compute a whole truss at
once; given `Traced` numbers they compute one bar and every result remembers the formula that made
it. There is no second formula that could drift from the first.

    sheet = HandCheck()
    area = sheet.given("A", 1.83e-3, "area", "least remaining area")
    strength = sheet.given("Fy", 250e6, "stress", "yield strength")
    capacity = sheet.note("Pr", 0.95 * strength * area, "force", "tension, yield", "AASHTO LRFD 6.8.2.1")
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass, field
from typing import Any, Literal, Protocol

import numpy as np
from numpy.typing import NDArray

Kind = Literal[
    "factor", "length", "size", "area", "modulus", "inertia", "warping", "stress", "force", "moment", "pressure",
    "line load", "ratio",
]  # fmt: skip
"""What a number is, so that `models.words` can print it with its unit.

``length`` is a length of bar (m or ft), ``size`` one of a section (mm or in)."""


@dataclass(frozen=True, eq=False)
class Traced:
    """A number that knows how it was made.

    Arithmetic on it gives another one; `models.words` prints the tree with symbols or with numbers.

    Parameters
    ----------
    value : in SI.
    operation : ``symbol``, ``number``, ``+``, ``-``, ``*``, ``/``, ``^``, ``least``, ``greatest``,
        ``root`` or ``minus``.
    operands : what the operation was applied to.
    symbol, kind : for ``symbol``: its name, and what the number is.
    because : for a choice between formulas: left side, relation, right side, as found.
    """

    value: float
    operation: str
    operands: tuple[Traced, ...] = ()
    symbol: str = ""
    kind: Kind = "factor"
    because: tuple[Traced, str, Traced] | None = None

    def __float__(self) -> float:
        return self.value

    def __add__(self, other: Traced | float) -> Traced:
        return _binary("+", self, other, lambda a, b: a + b)

    def __radd__(self, other: float) -> Traced:
        return _binary("+", other, self, lambda a, b: a + b)

    def __sub__(self, other: Traced | float) -> Traced:
        return _binary("-", self, other, lambda a, b: a - b)

    def __rsub__(self, other: float) -> Traced:
        return _binary("-", other, self, lambda a, b: a - b)

    def __mul__(self, other: Traced | float) -> Traced:
        return _binary("*", self, other, lambda a, b: a * b)

    def __rmul__(self, other: float) -> Traced:
        return _binary("*", other, self, lambda a, b: a * b)

    def __truediv__(self, other: Traced | float) -> Traced:
        return _binary("/", self, other, _divide)

    def __rtruediv__(self, other: float) -> Traced:
        return _binary("/", other, self, _divide)

    def __pow__(self, other: Traced | float) -> Traced:
        return _binary("^", self, other, lambda a, b: a**b)

    def __rpow__(self, other: float) -> Traced:
        return _binary("^", other, self, lambda a, b: a**b)

    def __neg__(self) -> Traced:
        return Traced(-self.value, "minus", (self,))


Number = Any
"""A float, a numpy array or a `Traced`: engineering functions take any of the three.

`Any`, because numpy's operators and ours have no common static type; what goes in comes out."""


def _traced(number: Traced | float) -> Traced:
    return number if isinstance(number, Traced) else Traced(float(number), "number")


def _binary(sign: str, a: Traced | float, b: Traced | float, compute: Callable[[float, float], float]) -> Traced:
    left, right = _traced(a), _traced(b)
    return Traced(compute(left.value, right.value), sign, (left, right))


def _divide(a: float, b: float) -> float:
    return a / b if b else math.copysign(math.inf, a) if a else math.nan


def least(*numbers: Number) -> Number:
    """The smallest, element by element."""
    if any(isinstance(number, Traced) for number in numbers):
        operands = tuple(_traced(number) for number in numbers)
        return Traced(min(operand.value for operand in operands), "least", operands)
    result = numbers[0]
    for number in numbers[1:]:
        result = np.minimum(result, number)
    return result


def greatest(*numbers: Number) -> Number:
    """The largest, element by element."""
    if any(isinstance(number, Traced) for number in numbers):
        operands = tuple(_traced(number) for number in numbers)
        return Traced(max(operand.value for operand in operands), "greatest", operands)
    result = numbers[0]
    for number in numbers[1:]:
        result = np.maximum(result, number)
    return result


def root(number: Number) -> Number:
    """The square root, element by element."""
    if isinstance(number, Traced):
        return Traced(math.sqrt(number.value), "root", (number,))
    return np.sqrt(number)


_RELATIONS: dict[str, Callable[[Any, Any], Any]] = {
    "<": lambda a, b: a < b,
    "<=": lambda a, b: a <= b,
    ">": lambda a, b: a > b,
    ">=": lambda a, b: a >= b,
}


def choose(left: Number, relation: str, right: Number, then: Number, otherwise: Number) -> Number:
    """``then`` where left relates to right as said, else ``otherwise``, element by element.

    A traced choice keeps the formula that was taken and the comparison that decided.
    """
    if any(isinstance(number, Traced) for number in (left, right, then, otherwise)):
        a, b = _traced(left), _traced(right)
        holds = _RELATIONS[relation](a.value, b.value)
        taken = _traced(then if holds else otherwise)
        found = relation if holds else {"<": ">=", "<=": ">", ">": "<=", ">=": "<"}[relation]
        return Traced(taken.value, taken.operation, taken.operands, taken.symbol, taken.kind, because=(a, found, b))
    return np.where(_RELATIONS[relation](left, right), then, otherwise)


@dataclass(frozen=True)
class Step:
    """One line of a hand check: ``symbol = formula = numbers = value``.

    Parameters
    ----------
    symbol, title : short name, and what it is in words.
    expression : the tree that made the value; a bare symbol for a value that was given.
    kind : what the number is; decides unit and rounding in print.
    source : clause of the standard, or where the number came from.
    """

    symbol: str
    title: str
    expression: Traced
    kind: Kind
    source: str = ""

    @property
    def value(self) -> float:
        """The result, SI."""
        return self.expression.value

    @property
    def is_given(self) -> bool:
        """Whether the value was put in rather than computed."""
        return self.expression.operation == "symbol"


class Sheet(Protocol):
    """Where a calculation writes its lines. What is written comes back for use."""

    def given(self, symbol: str, value: Number, kind: Kind, title: str, source: str = "") -> Number:
        """Put a number in."""

    def note(self, symbol: str, value: Number, kind: Kind, title: str, source: str = "") -> Number:
        """Name a result."""


class NoSheet:
    """Computes without writing: for whole trusses, as arrays."""

    def given(self, symbol: str, value: Number, kind: Kind, title: str, source: str = "") -> Number:
        """Hand the number back."""
        return value

    def note(self, symbol: str, value: Number, kind: Kind, title: str, source: str = "") -> Number:
        """Hand the result back."""
        return value


@dataclass
class HandCheck:
    """Collects the lines of one bar's calculation in the order in which it was done."""

    steps: list[Step] = field(default_factory=list)

    def given(self, symbol: str, value: Number, kind: Kind, title: str, source: str = "") -> Traced:
        """Put a number in as a named line."""
        return self._line(symbol, Traced(float(value), "symbol", symbol=symbol, kind=kind), kind, title, source)

    def note(self, symbol: str, value: Number, kind: Kind, title: str, source: str = "") -> Traced:
        """Name a result; later lines print the symbol, not the whole formula."""
        return self._line(symbol, _traced(value), kind, title, source)

    def _line(self, symbol: str, expression: Traced, kind: Kind, title: str, source: str) -> Traced:
        self.steps.append(Step(symbol, title, expression, kind, source))
        return Traced(expression.value, "symbol", symbol=symbol, kind=kind)


Array = NDArray[np.float64]
"""A numpy array of floats; shapes stand in the docstrings."""
