"""Forms of objects with known keys: records, and records that depend on one of their keys."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any, TypeVar, cast

from inspector.exchange.form import UNREADABLE, Choice, Form, Json, join, nearest
from models.errors import Problem

T = TypeVar("T")


@dataclass(frozen=True)
class Key:
    """One key of a record.

    Parameters
    ----------
    key : as spelled in the file.
    field : as the record's constructor calls it.
    about : what it means, for the schema.
    identity : may be left out and is then made from the rest; `Entry.written` tells which were given.
    """

    key: str
    form: Form[Any]
    field: str = ""
    required: bool = False
    about: str = ""
    identity: bool = False

    @property
    def name(self) -> str:
        """The name of the field."""
        return self.field or self.key.replace(" ", "_")

    def schema(self) -> dict[str, Json]:
        """The key's schema with its description."""
        return self.form.schema() | ({"description": self.about} if self.about else {})


@dataclass(frozen=True)
class Need:
    """Where ``key`` has this value, the keys ``then`` are required too."""

    key: str
    value: str
    then: tuple[str, ...]


@dataclass(frozen=True)
class Record(Form[T]):
    """An object with known keys. A key that is not there is None and is not written, unless it is required.

    Parameters
    ----------
    make : constructor, called with the fields whose keys are there.
    take : a field of a value, for writing.
    needs : keys that are required in some cases only.
    one_of : groups of keys of which exactly one group must be there, whole.
    least : how many keys must be there.
    grows : whether keys may be there that this program does not know.
    """

    keys: tuple[Key, ...]
    make: Callable[..., T]
    take: Callable[[T, str], Any] = getattr
    needs: tuple[Need, ...] = ()
    one_of: tuple[tuple[str, ...], ...] = ()
    least: int = 0
    grows: bool = False

    @property
    def expected(self) -> str:
        """See `Form`."""
        keys = [key.key for key in self.keys if key.required] or [key.key for key in self.keys]
        return "an object with " + ", ".join(f"`{key}`" for key in keys)

    def read(self, value: Json, path: str, problems: list[Problem]) -> T:
        """See `Form`."""
        if not isinstance(value, dict):
            return self.refuse(value, path, problems)
        known = [key.key for key in self.keys]
        problems += [
            Problem(join(path, name), f"`{name}` is not a key here", nearest(name, known))
            for name in value
            if name not in known and not self.grows
        ]
        if len(value) < self.least:
            self.refuse(value, path, problems, "the object is empty")
        problems += self._groups(value, path)
        fields = {key.name: self._field(key, value, path, problems) for key in self.keys if self._due(key, value)}
        identities = [key for key in self.keys if key.identity]
        if identities:
            fields["written"] = frozenset(key.key for key in identities if key.key in value)
        return self.make(**fields)

    def _due(self, key: Key, value: Mapping[str, Json]) -> bool:
        return key.key in value or key.identity or key.required or self._needed(key.key, value)

    def _needed(self, name: str, value: Mapping[str, Json]) -> bool:
        return any(name in need.then and value.get(need.key) == need.value for need in self.needs)

    def _field(self, key: Key, value: Mapping[str, Json], path: str, problems: list[Problem]) -> Any:
        if key.key in value:
            return key.form.read(value[key.key], join(path, key.key), problems)
        if key.identity:
            return None
        reasons = [f", which `{need.value}` needs" for need in self.needs if key.key in need.then]
        problems.append(Problem(join(path, key.key), "is missing" + "".join(reasons), key.form.expected))
        return UNREADABLE

    def _groups(self, value: Mapping[str, Json], path: str) -> list[Problem]:
        if not self.one_of:
            return []
        there = [group for group in self.one_of if any(name in value for name in group)]
        if len(there) == 1 and all(name in value for name in there[0]):
            return []
        words = ", or ".join(" with ".join(f"`{name}`" for name in group) for group in self.one_of)
        found = [f"`{name}`" for group in there for name in group if name in value]
        return [Problem(path, f"has {' and '.join(found) or 'none of them'}", f"exactly one of: {words}")]

    def write(self, value: T) -> Json:
        """See `Form`."""
        document = {}
        for key in self.keys:
            if key.identity and key.key not in self.take(value, "written"):
                continue
            part = self.take(value, key.name)
            if part is not None or key.required:
                document[key.key] = key.form.write(part)
        return document

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        plain: dict[str, Json] = {
            "type": "object",
            "properties": {key.key: key.schema() for key in self.keys},
            "required": [key.key for key in self.keys if key.required],
            "additionalProperties": self.grows,
        }
        if self.least:
            plain["minProperties"] = self.least
        if self.needs:
            plain["allOf"] = [_when(need.key, need.value, {"required": list(need.then)}) for need in self.needs]
        if self.one_of:
            plain["oneOf"] = [self._only(group) for group in self.one_of]
        return plain

    def _only(self, group: tuple[str, ...]) -> dict[str, Json]:
        others = [{"required": [name]} for other in self.one_of for name in other if name not in group]
        return {"required": list(group), "not": {"anyOf": others}}


def _when(key: str, value: str, then: dict[str, Json]) -> dict[str, Json]:
    return {"if": {"properties": {key: {"const": value}}, "required": [key]}, "then": then}


@dataclass(frozen=True)
class Tagged(Form[T]):
    """A record whose other keys depend on the value of one key, as a section's on its shape."""

    key: str
    cases: Mapping[str, Form[T]]
    case_of: Callable[[T], str]

    @property
    def expected(self) -> str:
        """See `Form`."""
        return f"an object whose `{self.key}` is {nearest('', self.cases)}"

    def read(self, value: Json, path: str, problems: list[Problem]) -> T:
        """See `Form`."""
        if not isinstance(value, dict):
            return self.refuse(value, path, problems)
        here = join(path, self.key)
        if self.key not in value:
            problems.append(Problem(here, "is missing", nearest("", self.cases)))
            return cast("T", UNREADABLE)
        case = Choice(tuple(self.cases)).read(value[self.key], here, problems)
        return cast("T", UNREADABLE) if case is UNREADABLE else self.cases[case].read(value, path, problems)

    def write(self, value: T) -> Json:
        """See `Form`."""
        return self.cases[self.case_of(value)].write(value)

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {
            "type": "object",
            "properties": {self.key: {"enum": list(self.cases)}},
            "required": [self.key],
            "allOf": [_when(self.key, case, form.schema()) for case, form in self.cases.items()],
        }


@dataclass(frozen=True)
class Copy(Form[T]):
    """A record, or an object with one key that names the record which it copies."""

    key: str
    copy: Record[T]
    whole: Record[T]
    is_copy: Callable[[T], bool]

    @property
    def expected(self) -> str:
        """See `Form`."""
        return f"{self.whole.expected}; or an object with `{self.key}` alone"

    def read(self, value: Json, path: str, problems: list[Problem]) -> T:
        """See `Form`."""
        form = self.copy if isinstance(value, dict) and self.key in value else self.whole
        return form.read(value, path, problems)

    def write(self, value: T) -> Json:
        """See `Form`."""
        return (self.copy if self.is_copy(value) else self.whole).write(value)

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        parts = {"if": {"required": [self.key]}, "then": self.copy.schema(), "else": self.whole.schema()}
        return {"type": "object"} | parts
