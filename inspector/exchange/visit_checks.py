"""Whether what was recorded on visits speaks of bars and plates that are there."""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from itertools import chain

from inspector.exchange.form import readable
from inspector.exchange.references import Directory, Problems, each, known, twice
from models.bridge import Section
from models.journal import Entry
from models.section.registry import SHAPES


def identities(there: Directory) -> Problems:
    """Ids that two visits or two observations have."""
    visits = list(each(there.journal.visits))
    yield from twice(((f"visits/{place}/id", visit.id) for place, visit in visits), "visit")
    yield from twice(((f"{path}/id", entry.id) for path, entry in _entries(there)), "observation")


def observations(there: Directory) -> Problems:
    """Observations of trusses, bars, plates, sections and materials that are not there."""
    replacing = _replacing(there)
    for path, entry in _entries(there):
        yield from there.truss_and_bar(entry.truss, entry.bar, path)
        new = entry.replaced
        if new is not None and readable(new):
            yield from there.piece(new.section, new.material, f"{path}/replaced")
        if entry.readings and readable(entry.truss, entry.bar, entry.readings):
            plates = _plates(there, entry, replacing.get((entry.truss, entry.bar), []))
            for number, reading in each(entry.readings) if plates is not None else ():
                place = f"{path}/readings/{number}/plate"
                yield from known(reading.plate, plates or (), place, "plate", f"the section of `{entry.bar}`")


def _entries(there: Directory) -> Iterable[tuple[str, Entry]]:
    """All observations that could be read, with their paths."""
    return chain.from_iterable(
        ((f"visits/{place}/observations/{index}", entry) for index, entry in each(visit.entries))
        for place, visit in each(there.journal.visits)
    )


def _replacing(there: Directory) -> Mapping[tuple[str, str], list[str]]:
    """The sections that each bar was given when it was replaced."""
    found: dict[tuple[str, str], list[str]] = {}
    for _, entry in _entries(there):
        new = entry.replaced
        if new is not None and readable(new, entry.truss, entry.bar) and new.section is not None:
            found.setdefault((entry.truss, entry.bar), []).append(new.section)
    return found


def _plates(there: Directory, entry: Entry, later: list[str]) -> Sequence[str] | None:
    """Plates of all the sections that a bar has or had; None where one of them could not be read."""
    bar = (there.bars(entry.truss) or {}).get(entry.bar)
    if bar is None or not readable(there.bridge.sections):
        return None
    plates: list[str] = []
    for name in dict.fromkeys([bar.section, *later]):
        section = there.bridge.sections.get(name)
        names = _plate_names(section) if section is not None and readable(section) else None
        if names is None:
            return None
        plates += names
    return plates


def _plate_names(section: Section) -> Sequence[str] | None:
    """The plates of a section whose dimensions may be wrong, so that it cannot be cut into them."""
    named = section.dimensions.get("plates")
    return SHAPES[section.shape].plates or (tuple(named) if isinstance(named, Mapping) else None)
