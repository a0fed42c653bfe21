"""Forms: one description of a JSON value that reads it, writes it and prints its JSON Schema.

A form collects every problem with its full path and never stops at the first. Where a value cannot be read,
`UNREADABLE` stands in its place, so that the rest of the document can still be looked at.
"""

from __future__ import annotations

import datetime as dt
import difflib
import json
import math
import re
from abc import ABC, abstractmethod
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Any, Final, Generic, TypeVar, cast, final

from models.errors import Problem, QuantityError
from models.quantity import UNITS, Dimension, Quantity, describe, parse, pattern

T = TypeVar("T")
Json = Any
"""Null, a boolean, a number, a text, a list or a dict with text keys; mypy has no useful name for it."""

LARGEST_WHOLE: Final = 2**53 - 1
"""The largest whole number that every JSON reader keeps exactly (RFC 8259, section 6)."""


class _Unreadable:
    __slots__ = ()

    def __repr__(self) -> str:
        return "UNREADABLE"


UNREADABLE: Final[Any] = _Unreadable()
"""Stands where a value could not be read. It never leaves this package: a document with a problem is refused."""


def readable(*values: object) -> bool:
    """Whether all these values could be read."""
    return all(value is not UNREADABLE for value in values)


def join(path: str, key: str | int) -> str:
    """The path of a key below a path."""
    return f"{path}/{key}" if path else str(key)


def shown(value: object) -> str:
    """A value of a file as it is quoted in a message: short, in the spelling of JSON."""
    if isinstance(value, dict):
        return "an object"
    if isinstance(value, list):
        return "a list"
    text = json.dumps(value) if value is None or isinstance(value, bool) else str(value)
    return f"`{text if len(text) <= 60 else text[:57] + '...'}`"


def nearest(name: object, known: Iterable[str]) -> str:
    """What would be right instead of an unknown name: the one most like it first."""
    names = [str(one) for one in known]
    close = difflib.get_close_matches(str(name), names, n=1, cutoff=0.6)
    rest = [one for one in names if one not in close]
    row = ", ".join(f"`{one}`" for one in (close + rest)[:8]) + (" ..." if len(names) > 8 else "")
    if not names:
        return "nothing: there are none"
    return row if len(names) == 1 else f"one of {row}"


def reference(name: str) -> dict[str, Json]:
    """The schema that says: as the definition of this name (see `definitions`)."""
    return {"$ref": f"#/$defs/{_slug(name)}"}


def _slug(name: str) -> str:
    return name.replace(" ", "-")


class Form(ABC, Generic[T]):
    """How one kind of value looks in JSON."""

    @property
    @abstractmethod
    def expected(self) -> str:
        """What is due here, in words."""

    @abstractmethod
    def read(self, value: Json, path: str, problems: list[Problem]) -> T:
        """Read a JSON value; what is wrong with it is added to ``problems`` and gives `UNREADABLE`."""

    @abstractmethod
    def write(self, value: T) -> Json:
        """The JSON value that `read` made this of."""

    @abstractmethod
    def schema(self) -> dict[str, Json]:
        """JSON Schema (2020-12) of the values that `read` takes."""

    @final
    def refuse(self, value: Json, path: str, problems: list[Problem], what: str = "") -> T:
        """Note that a value is not of this form."""
        problems.append(Problem(path, what or f"{shown(value)} cannot stand here", self.expected))
        return cast("T", UNREADABLE)


@dataclass(frozen=True)
class Text(Form[str]):
    """Free text; a ``name`` has at least one character that can be seen."""

    name: bool = False

    @property
    def expected(self) -> str:
        """See `Form`."""
        return "a text that is not empty" if self.name else "a text"

    def read(self, value: Json, path: str, problems: list[Problem]) -> str:
        """See `Form`."""
        if not isinstance(value, str) or (self.name and not value.strip(" \t\r\n")):
            return self.refuse(value, path, problems)
        return value

    def write(self, value: str) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return reference("name") if self.name else {"type": "string"}


@dataclass(frozen=True)
class Date(Form[str]):
    """A day of the calendar, ISO 8601 extended."""

    @property
    def expected(self) -> str:
        """See `Form`."""
        return "a date as 2026-05-14 (year, month, day)"

    def read(self, value: Json, path: str, problems: list[Problem]) -> str:
        """See `Form`."""
        if not isinstance(value, str) or not re.fullmatch(r"\d{4}-\d{2}-\d{2}", value, re.ASCII):
            return self.refuse(value, path, problems)
        try:
            dt.date.fromisoformat(value)
        except ValueError:
            return self.refuse(value, path, problems, f"{shown(value)} is not in the calendar")
        return value

    def write(self, value: str) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return reference("date")


@dataclass(frozen=True)
class Number(Form[float]):
    """A bare number, kept as written (3 stays 3, 3.0 stays 3.0). A boolean is not a number.

    Parameters
    ----------
    least, above, most : the range; ``above`` itself is outside it.
    """

    least: float | None = None
    above: float | None = None
    most: float | None = None

    @property
    def expected(self) -> str:
        """See `Form`."""
        ends = [("from", self.least), ("above", self.above), ("up to", self.most)]
        return " ".join(["a bare number", *(f"{word} {end:g}" for word, end in ends if end is not None)])

    def read(self, value: Json, path: str, problems: list[Problem]) -> float:
        """See `Form`."""
        if isinstance(value, bool) or not isinstance(value, int | float) or not math.isfinite(value):
            return self.refuse(value, path, problems)
        low = (self.least is not None and value < self.least) or (self.above is not None and value <= self.above)
        if low or (self.most is not None and value > self.most):
            return self.refuse(value, path, problems, f"{shown(value)} is out of range")
        return value

    def write(self, value: float) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        ends = {"minimum": self.least, "exclusiveMinimum": self.above, "maximum": self.most}
        return {"type": "number"} | {word: end for word, end in ends.items() if end is not None}


@dataclass(frozen=True)
class Whole(Form[int]):
    """A whole number. JSON knows no difference between 3 and 3.0, so both read as 3."""

    least: int = 0
    most: int = LARGEST_WHOLE

    @property
    def expected(self) -> str:
        """See `Form`."""
        return f"a whole number from {self.least} to {self.most}"

    def read(self, value: Json, path: str, problems: list[Problem]) -> int:
        """See `Form`."""
        if isinstance(value, bool) or not isinstance(value, int | float):
            return self.refuse(value, path, problems)
        if not (self.least <= value <= self.most and value == int(value)):
            return self.refuse(value, path, problems)
        return int(value)

    def write(self, value: int) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"type": "integer", "minimum": self.least, "maximum": self.most}


@dataclass(frozen=True)
class Boolean(Form[bool]):
    """True or false; with ``only`` just that one."""

    only: bool | None = None

    @property
    def expected(self) -> str:
        """See `Form`."""
        return "true or false" if self.only is None else str(self.only).lower()

    def read(self, value: Json, path: str, problems: list[Problem]) -> bool:
        """See `Form`."""
        if not isinstance(value, bool) or self.only not in (None, value):
            return self.refuse(value, path, problems)
        return value

    def write(self, value: bool) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"type": "boolean"} if self.only is None else {"const": self.only}


@dataclass(frozen=True)
class Choice(Form[Any]):
    """One of a few words or numbers."""

    options: Sequence[str | int]

    @property
    def expected(self) -> str:
        """See `Form`."""
        return nearest("", map(str, self.options))

    def read(self, value: Json, path: str, problems: list[Problem]) -> Any:
        """See `Form`."""
        if not isinstance(value, bool) and value in self.options:
            return self.options[self.options.index(value)]
        problems.append(Problem(path, f"{shown(value)} is not known here", nearest(value, map(str, self.options))))
        return UNREADABLE

    def write(self, value: Any) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"const": self.options[0]} if len(self.options) == 1 else {"enum": list(self.options)}


_ZERO: Final = r"(?:(?:0+ )?0+/[0-9]+|0+(?:[.,]0+)?)"
_SIGNS: Final = {
    "positive": ("above zero", rf"^(?!-)(?!(?:0+ ft )?{_ZERO} (?!ft [0-9])[^0-9])"),
    "not negative": ("zero or more", r"^(?!-)"),
}


@dataclass(frozen=True)
class Dimensioned(Form[Quantity]):
    """A quantity with its unit. ``sign`` is ``positive``, ``not negative`` or empty."""

    dimension: Dimension
    sign: str = ""

    @property
    def expected(self) -> str:
        """See `Form`."""
        return describe(self.dimension) + (f", {_SIGNS[self.sign][0]}" if self.sign else "")

    def read(self, value: Json, path: str, problems: list[Problem]) -> Quantity:
        """See `Form`."""
        try:
            quantity = parse(value, self.dimension)
        except QuantityError as error:
            problems.append(Problem(path, error.what, error.expected))
            return cast("Quantity", UNREADABLE)
        negative = quantity.text.startswith("-")
        if (self.sign and negative) or (self.sign == "positive" and quantity.si == 0):
            return self.refuse(value, path, problems, f"{shown(value)} is not {_SIGNS[self.sign][0]}")
        return quantity

    def write(self, value: Quantity) -> Json:
        """See `Form`."""
        return value.text

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        plain = reference(self.dimension)
        return {"allOf": [plain, reference(self.sign)]} if self.sign else plain


@dataclass(frozen=True)
class Anything(Form[Json]):
    """Any JSON value but null, kept as it is."""

    @property
    def expected(self) -> str:
        """See `Form`."""
        return "a value as the key that it replaces has it; leave the key out where there was none"

    def read(self, value: Json, path: str, problems: list[Problem]) -> Json:
        """See `Form`."""
        return self.refuse(value, path, problems) if value is None else value

    def write(self, value: Json) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"not": {"type": "null"}}


@dataclass(frozen=True)
class Null(Form[Any]):
    """Null, which stands for one value of the program."""

    stands_for: Any = None

    @property
    def expected(self) -> str:
        """See `Form`."""
        return "null"

    def read(self, value: Json, path: str, problems: list[Problem]) -> Any:
        """See `Form`."""
        return self.refuse(value, path, problems) if value is not None else self.stands_for

    def write(self, value: Any) -> Json:
        """See `Form`."""
        return

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"type": "null"}


def definitions() -> dict[str, Json]:
    """The ``$defs`` that the schemas of forms refer to."""
    dimensions = {
        _slug(dimension): {
            "type": "string",
            "maxLength": 80,
            "pattern": pattern(dimension),
            "description": describe(dimension),
        }
        for dimension in UNITS
    }
    signs = {_slug(sign): {"pattern": rule, "description": words} for sign, (words, rule) in _SIGNS.items()}
    day = r"^[0-9]{4}-(?:0[1-9]|1[0-2])-(?:0[1-9]|[12][0-9]|3[01])$"
    return {
        "name": {"type": "string", "pattern": r"[^ \t\r\n]", "description": Text(name=True).expected},
        "date": {"type": "string", "format": "date", "pattern": day, "description": Date().expected},
        **signs,
        **dimensions,
    }
