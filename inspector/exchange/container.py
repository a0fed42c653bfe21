"""Forms of many values: lists, pairs, names with values, and values that may be written in several ways."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any, TypeVar

from inspector.exchange.form import UNREADABLE, Form, Json, Null, Text, join, shown
from models.errors import Problem

T = TypeVar("T")


@dataclass(frozen=True)
class Items(Form[tuple[T, ...]]):
    """A list of values of one form, at least ``least`` of them."""

    item: Form[T]
    least: int = 0

    @property
    def expected(self) -> str:
        """See `Form`."""
        size = f" of at least {self.least}" if self.least else ""
        return f"a list{size}, each {self.item.expected}"

    def read(self, value: Json, path: str, problems: list[Problem]) -> tuple[T, ...]:
        """See `Form`."""
        if not isinstance(value, list):
            return self.refuse(value, path, problems)
        if len(value) < self.least:
            self.refuse(value, path, problems, f"the list is too short, it has {len(value)}")
        return tuple(self.item.read(item, join(path, index), problems) for index, item in enumerate(value))

    def write(self, value: tuple[T, ...]) -> Json:
        """See `Form`."""
        return [self.item.write(item) for item in value]

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"type": "array", "items": self.item.schema()} | ({"minItems": self.least} if self.least else {})


@dataclass(frozen=True)
class Pair(Form[T]):
    """A list of two values, each of its own form.

    Parameters
    ----------
    make, take : from two values to the value of the program, and back.
    """

    first: Form[Any]
    second: Form[Any]
    make: Callable[[Any, Any], T]
    take: Callable[[T], tuple[Any, Any]]

    @property
    def expected(self) -> str:
        """See `Form`."""
        return f"a list of two: {self.first.expected}; and {self.second.expected}"

    def read(self, value: Json, path: str, problems: list[Problem]) -> T:
        """See `Form`."""
        if not isinstance(value, list):
            return self.refuse(value, path, problems)
        if len(value) != 2:
            return self.refuse(value, path, problems, f"the list has {len(value)}")
        first = self.first.read(value[0], join(path, 0), problems)
        return self.make(first, self.second.read(value[1], join(path, 1), problems))

    def write(self, value: T) -> Json:
        """See `Form`."""
        first, second = self.take(value)
        return [self.first.write(first), self.second.write(second)]

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        both = [self.first.schema(), self.second.schema()]
        return {"type": "array", "prefixItems": both, "items": False, "minItems": 2}


def two_of(form: Form[Any]) -> Pair[tuple[Any, Any]]:
    """Two values of one form."""
    return Pair(form, form, lambda first, second: (first, second), lambda pair: pair)


@dataclass(frozen=True)
class Named(Form[Mapping[str, T]]):
    """Names with values of one form, in the order of the file.

    Parameters
    ----------
    called : makes the value know its own name, as a material does.
    least, most : how many there may be.
    """

    item: Form[T]
    called: Callable[[T, str], T] | None = None
    least: int = 0
    most: int | None = None

    @property
    def expected(self) -> str:
        """See `Form`."""
        ends = [("at least", self.least or None), ("at most", self.most)]
        return ", ".join(
            ["an object of names and what they stand for", *(f"{word} {end}" for word, end in ends if end)]
        )

    def read(self, value: Json, path: str, problems: list[Problem]) -> Mapping[str, T]:
        """See `Form`."""
        if not isinstance(value, dict):
            return self.refuse(value, path, problems)
        if not self.least <= len(value) <= (len(value) if self.most is None else self.most):
            self.refuse(value, path, problems, f"there are {len(value)}")
        return {name: self._one(name, item, path, problems) for name, item in value.items()}

    def _one(self, name: str, item: Json, path: str, problems: list[Problem]) -> T:
        here = join(path, name)
        Text(name=True).read(name, here, problems)
        found = self.item.read(item, here, problems)
        return self.called(found, name) if self.called and found is not UNREADABLE else found

    def write(self, value: Mapping[str, T]) -> Json:
        """See `Form`."""
        return {name: self.item.write(item) for name, item in value.items()}

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        ends = {"minProperties": self.least or None, "maxProperties": self.most}
        plain = {
            "type": "object",
            "propertyNames": Text(name=True).schema(),
            "additionalProperties": self.item.schema(),
        }
        return plain | {word: end for word, end in ends.items() if end is not None}


@dataclass(frozen=True)
class Way:
    """One of several ways to write a value: its JSON type (None is null), and the type of the program's value."""

    json_type: type | tuple[type, ...] | None
    value_type: type | tuple[type, ...]
    form: Form[Any]

    def reads(self, value: Json) -> bool:
        """Whether the JSON value looks like this way."""
        return value is None if self.json_type is None else isinstance(value, self.json_type)


@dataclass(frozen=True)
class Either(Form[Any]):
    """A value that may be written in several ways, told apart by their JSON types."""

    ways: tuple[Way, ...]

    @property
    def expected(self) -> str:
        """See `Form`."""
        return "; or ".join(way.form.expected for way in self.ways)

    def read(self, value: Json, path: str, problems: list[Problem]) -> Any:
        """See `Form`."""
        for way in self.ways:
            if way.reads(value):
                return way.form.read(value, path, problems)
        problems.append(Problem(path, f"{shown(value)} cannot stand here", self.expected))
        return UNREADABLE

    def write(self, value: Any) -> Json:
        """See `Form`."""
        return next(way.form.write(value) for way in self.ways if isinstance(value, way.value_type))

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"anyOf": [way.form.schema() for way in self.ways]}


def nullable(form: Form[Any], json_type: type | tuple[type, ...]) -> Either:
    """A value of a form, or null where there is none."""
    return Either((Way(None, type(None), Null()), Way(json_type, object, form)))
