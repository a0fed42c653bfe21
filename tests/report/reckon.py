"""Works a printed line of a hand check again from nothing but the signs on the paper."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass

from models.quantity import UNITS

_SI = {unit: size for units in UNITS.values() for unit, size in units.items()}
_PRINTED = {unit.replace("^2", "²").replace("^4", "⁴"): size for unit, size in _SI.items()}
_MORE = {"mm³": 1e-9, "in³": 0.0254**3, "mm⁶": 1e-18, "in⁶": 0.0254**6, "kNm": 1e3, "kip ft": _SI["kip"] * _SI["ft"]}
_ALL = {**_PRINTED, **_MORE}
_NAMES = "|".join(re.escape(unit) for unit in sorted(_ALL, key=len, reverse=True))
_TOKEN = re.compile(
    rf"\s*(?:(?P<number>\d+(?:\.\d+)?)(?: (?P<unit>{_NAMES})(?![\w²³⁴⁶]))?"
    r"|(?P<word>least of|greatest of)|(?P<sign>.))"
)


@dataclass
class _Reader:
    tokens: list[tuple[str, float]]
    at: int = 0

    @property
    def sign(self) -> str:
        return self.tokens[self.at][0] if self.at < len(self.tokens) else ""

    def take(self, sign: str) -> bool:
        if self.sign == sign:
            self.at += 1
            return True
        return False

    def sum(self) -> float:
        total = self.product()
        while self.sign in ("+", "−"):
            plus = self.take("+") or not self.take("−")
            total += self.product() if plus else -self.product()
        return total

    def product(self) -> float:
        total = self.power()
        while self.sign in ("·", "/"):
            times = self.take("·") or not self.take("/")
            total = total * self.power() if times else total / self.power()
        return total

    def power(self) -> float:
        base = self.atom()
        return base ** self.atom() if self.take("^") else base

    def atom(self) -> float:
        sign, value = self.tokens[self.at]
        self.at += 1
        if sign == "number":
            return value
        if sign == "−":
            return -self.power()
        values = self.listed() if sign != "(" else self.rest()
        return {"(": lambda: values[0], "√": lambda: math.sqrt(values[0]), "least of": lambda: min(values),
                "greatest of": lambda: max(values)}[sign]()  # fmt: skip

    def listed(self) -> list[float]:
        if not self.take("("):
            raise ValueError(self.tokens[self.at :])
        return self.rest()

    def rest(self) -> list[float]:
        values = [self.sum()]
        while self.take(";"):
            values.append(self.sum())
        if not self.take(")"):
            raise ValueError(self.tokens[self.at :])
        return values


def reckon(line: str) -> float:
    """The SI value of a printed expression."""
    tokens = []
    for found in _TOKEN.finditer(line.strip()):
        if found["number"]:
            tokens.append(("number", float(found["number"]) * (_ALL[found["unit"]] if found["unit"] else 1.0)))
        else:
            tokens.append((found["word"] or found["sign"], 0.0))
    reader = _Reader(tokens)
    value = reader.sum()
    if reader.at != len(tokens):
        raise ValueError(line)
    return value
