"""How one part of a site file refers to another by name, where parts of the file could not be read."""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Mapping
from functools import cached_property
from typing import Any, TypeVar

from inspector.exchange.form import UNREADABLE, nearest, readable
from inspector.exchange.site_form import Site
from models.bridge import Bar, Truss
from models.errors import Problem

T = TypeVar("T")
Problems = Iterator[Problem]


def each(values: Iterable[T] | None) -> Iterator[tuple[int, T]]:
    """The values of a list that could be read, with their places."""
    if values is not None and readable(values):
        yield from ((place, value) for place, value in enumerate(values) if readable(value))


def items(values: Mapping[str, T] | None) -> Iterator[tuple[str, T]]:
    """The values of an object that could be read, with their names."""
    if values is not None and readable(values):
        yield from ((name, value) for name, value in values.items() if readable(value))


def complete(names: Iterable[str]) -> list[str]:
    """All names; unreadable as a whole where one of them is, since a name may then be there after all."""
    found = list(names)
    return found if readable(*found) else UNREADABLE


def known(name: str | None, names: Iterable[str], path: str, what: str, owner: str = "") -> Problems:
    """A problem where a name is given and nothing, or nothing of its owner's, has it."""
    if name is None or not readable(name, names):
        return
    if name not in names:
        start = f"{owner} has no" if owner else "there is no"
        yield Problem(path, f"{start} {what} `{name}`", nearest(name, names))


def twice(names: Iterable[tuple[str, str | None]], what: str) -> Problems:
    """A problem for each name, given with its path, that stood before."""
    before: set[str] = set()
    for path, name in names:
        if name is None or not readable(name):
            continue
        if name in before:
            yield Problem(path, f"another {what} is called `{name}` already", f"a name that no other {what} has")
        before.add(name)


class Directory:
    """What a site has, by name, as far as it could be read."""

    def __init__(self, site: Site) -> None:
        self.bridge = site.bridge
        self.journal = site.journal

    def truss(self, name: str | None) -> Truss | None:
        """A truss by its name; for a copy the truss that it copies."""
        found = self._trusses.get(name) if name is not None and readable(name) else None
        if found is None or found.same_as is None:
            return found
        return self._trusses.get(found.same_as) if readable(found.same_as) else None

    @cached_property
    def _trusses(self) -> Mapping[str, Truss]:
        return dict(items(self.bridge.trusses))

    def bars(self, truss: str | None) -> Mapping[str, Bar] | None:
        """The bars of a truss by id; None where not all of them could be read."""
        found = self.truss(truss)
        return None if found is None else self._bars[found.name]

    @cached_property
    def _bars(self) -> Mapping[str, Mapping[str, Bar] | None]:
        found: dict[str, Mapping[str, Bar] | None] = {}
        for name, truss in self._trusses.items():
            listed = readable(truss.bars) and readable(*truss.bars) and readable(*(bar.id for bar in truss.bars))
            found[name] = {bar.id: bar for bar in truss.bars} if listed else None
        return found

    def truss_and_bar(self, truss: str | None, bar: str | None, path: str) -> Problems:
        """Problems where a truss, or a bar of it, is named that is not there."""
        yield from known(truss, self.bridge.trusses, f"{path}/truss", "truss")
        bars = self.bars(truss)
        if bars is not None:
            yield from known(bar, bars, f"{path}/bar", "bar", f"truss `{truss}`")

    def piece(self, section: str | None, material: str | None, path: str) -> Problems:
        """Problems where a section or a material is named that is not there."""
        yield from known(section, self.bridge.sections, f"{path}/section", "section")
        yield from known(material, self.bridge.materials, f"{path}/material", "material")


def parts_readable(value: Any) -> bool:
    """Whether a value could be read with all that it is made of: lists, objects, and rectangles of a section."""
    if isinstance(value, Mapping):
        return all(parts_readable(part) for part in value.values())
    if isinstance(value, tuple):
        return all(parts_readable(part) for part in value)
    return readable(value)
