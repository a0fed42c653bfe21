"""The lines of a hand check as people read them: ``symbol = formula = numbers = value``.

A line can be worked again from what is printed in it: numbers carry their units and enough digits.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator
from typing import Final

from models.calculation import Kind, Step, Traced
from models.words import Figures, significant

HAND_DIGITS: Final = 5
"""Significant digits of a hand check: enough to work each line again from what is printed."""

_ROUNDING: Final = 1e-9
"""In any printed unit: what is smaller is the rounding of the arithmetic and prints as 0."""

_LOOSE, _SUM, _PRODUCT, _POWER, _ATOM = range(5)
_RELATION_SIGNS: Final = {"<": "<", "<=": "≤", ">": ">", ">=": "≥"}

_CONSTANTS: Final = {math.pi: "π", math.pi**2: "π²"}

_Leaf = Callable[[Traced], tuple[str, int]]
_Parts = list[tuple[str, int]]


def is_computed(step: Step) -> bool:
    """Whether a line has a formula; one that was given stands for itself."""
    return not (step.expression.operation == "symbol" and step.expression.symbol == step.symbol)


def in_symbols(step: Step) -> str:
    """The right side of a line in symbols, as ``0.658^(Po/Pe) · Po``."""
    return _tree(step.expression, _symbol)[0]


def in_numbers(step: Step, figures: Figures) -> str:
    """The same with the numbers put in, each with its unit."""

    def leaf(node: Traced) -> tuple[str, int]:
        return _number(node, figures)

    return _tree(step.expression, leaf)[0]


def result(step: Step, figures: Figures) -> str:
    """The result of a line with its unit."""
    return _plain(step.value, step.kind, figures)


def reasons(step: Step, figures: Figures) -> tuple[str, ...]:
    """Why a formula was taken where there is a choice, as ``Pe/Po = 0.62 ≥ 0.44``."""
    return tuple(_reason(node, figures) for node in _walk(step.expression) if node.because)


def _reason(node: Traced, figures: Figures) -> str:
    if node.because is None:
        return ""
    left, relation, right = node.because
    return f"{_compared(left, figures)} {_RELATION_SIGNS[relation]} {_compared(right, figures)}"


def _compared(side: Traced, figures: Figures) -> str:
    """One side of a comparison: its symbols and its value."""
    name = _tree(side, _symbol)[0]
    put_in = _plain(side.value, _KIND_OF.get(_dimension(side), "factor"), figures)
    return put_in if side.operation == "number" else f"{name} = {put_in}"


_DIMENSION: Final[dict[Kind, tuple[float, float]]] = {
    "length": (1, 0), "size": (1, 0), "area": (2, 0), "modulus": (3, 0), "inertia": (4, 0), "warping": (6, 0),
    "force": (0, 1), "line load": (-1, 1), "pressure": (-2, 1), "stress": (-2, 1), "moment": (1, 1),
}  # fmt: skip
"""Powers of length and force of each kind; the last kind of equal dimension names a result."""

_KIND_OF: Final[dict[tuple[float, float], Kind]] = {dimension: kind for kind, dimension in _DIMENSION.items()}


def _dimension(node: Traced) -> tuple[float, float]:
    """Powers of length and force of a tree."""
    if not node.operands:
        return _DIMENSION.get(node.kind, (0, 0))
    first = _dimension(node.operands[0])
    if node.operation == "root":
        return first[0] / 2, first[1] / 2
    if node.operation == "^":
        power = node.operands[1].value
        return (first[0] * power, first[1] * power) if first != (0, 0) else first
    if node.operation in ("*", "/"):
        sign = 1 if node.operation == "*" else -1
        second = _dimension(node.operands[1])
        return first[0] + sign * second[0], first[1] + sign * second[1]
    return first


def _walk(node: Traced) -> Iterator[Traced]:
    yield node
    for operand in node.operands:
        yield from _walk(operand)


def _plain(number: float, kind: Kind, figures: Figures) -> str:
    unit = figures.unit(kind)
    printed = figures.scaled(number, kind)
    digits = significant(0.0 if abs(printed) < _ROUNDING else printed, HAND_DIGITS)
    if "." in digits:
        digits = digits.rstrip("0").rstrip(".")
    return f"{digits} {unit}".rstrip().replace("-", "−")


def _symbol(node: Traced) -> tuple[str, int]:
    if node.operation == "symbol":
        return node.symbol, _ATOM if node.symbol.isalnum() else _PRODUCT
    if node.value in _CONSTANTS:
        return _CONSTANTS[node.value], _ATOM
    return _plain(node.value, "factor", Figures()), _ATOM if node.value >= 0 else _LOOSE


def _number(node: Traced, figures: Figures) -> tuple[str, int]:
    text = _plain(node.value, node.kind if node.operation == "symbol" else "factor", figures)
    if node.value < 0:
        return text, _LOOSE
    return text, _PRODUCT if " " in text else _ATOM


def _tree(node: Traced, leaf: _Leaf) -> tuple[str, int]:
    """A tree as text, with how tightly it holds together."""
    if not node.operands:
        return leaf(node)
    parts = [_tree(operand, leaf) for operand in node.operands]
    return _WRITTEN[node.operation](node.operation, parts)


def _in_brackets(operation: str, parts: _Parts) -> tuple[str, int]:
    name = "√" if operation == "root" else f"{operation} of "
    return f"{name}({'; '.join(text for text, _ in parts)})", _ATOM


def _negative(operation: str, parts: _Parts) -> tuple[str, int]:
    return f"−{_held(parts[0], _PRODUCT)}", _LOOSE


def _between(operation: str, parts: _Parts) -> tuple[str, int]:
    sign, rank, left, right = _SIGNS[operation]
    return f"{_held(parts[0], left)}{sign}{_held(parts[1], right)}", rank


_SIGNS: Final = {
    "+": (" + ", _SUM, _SUM, _PRODUCT),
    "-": (" − ", _SUM, _SUM, _PRODUCT),
    "*": (" · ", _PRODUCT, _PRODUCT, _PRODUCT),
    "/": ("/", _PRODUCT, _POWER, _POWER),
    "^": ("^", _POWER, _ATOM, _ATOM),
}
"""Sign as printed, how tightly the result holds, and what its left and right side need to stand bare."""

_WRITTEN: Final[dict[str, Callable[[str, _Parts], tuple[str, int]]]] = {
    "root": _in_brackets, "least": _in_brackets, "greatest": _in_brackets, "minus": _negative,
    **dict.fromkeys(_SIGNS, _between),
}  # fmt: skip


def _held(part: tuple[str, int], rank: int) -> str:
    """A part in parentheses where it would fall apart beside a stronger sign."""
    return part[0] if part[1] >= rank else f"({part[0]})"
