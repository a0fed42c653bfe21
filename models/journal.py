"""What inspectors wrote down: visits and their entries, in order, never edited.

An entry is one thing recorded about one bar. A later entry replaces, a retraction takes back, a
choice prefers; nothing is ever changed in place, so every past state can be made again.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Final, Literal

from models.quantity import Quantity


@dataclass(frozen=True, slots=True)
class Reading:
    """What is left of one plate at one place. ``station`` is 0 at the bar's start and 1 at its end."""

    station: float
    plate: str
    thickness: tuple[Quantity, ...]
    extent: Quantity | None = None
    cleaned: bool | None = None
    instrument: str | None = None
    face: str | None = None


@dataclass(frozen=True, slots=True)
class Bow:
    """How far a bar is out of straight: ``offset`` over a length, ``in plane`` or ``out of plane``."""

    offset: Quantity
    over: Quantity | None = None
    direction: str | None = None


@dataclass(frozen=True, slots=True)
class Crack:
    """A crack as seen."""

    length: Quantity | None = None
    note: str | None = None


CRACK_TAKEN_BACK: Final = "no crack"
"""Stands where an entry takes a crack back (`"crack": null` in a site file)."""


@dataclass(frozen=True, slots=True)
class Replaced:
    """The bar was replaced by a new one."""

    section: str | None = None
    material: str | None = None


@dataclass(frozen=True, slots=True)
class Photo:
    """A photograph by file name and hash."""

    file: str
    sha256: str | None = None


@dataclass(frozen=True, slots=True)
class Entry:
    """One thing recorded about one bar. ``None`` means that the entry does not speak of it.

    Parameters
    ----------
    id : identity; ``device`` and ``sequence`` order the entries of one device within a visit.
    at : the time as recorded, any text; it never orders anything.
    written : which of the identity keys (``id``, ``device``, ``sequence``) the file itself gave.
    """

    id: str
    truss: str
    bar: str
    device: str
    sequence: int
    at: str | None = None
    seen: str | None = None
    reason: str | None = None
    state: str | None = None
    readings: tuple[Reading, ...] | None = None
    estimated_loss: float | None = None
    extent: Quantity | None = None
    station: float | None = None
    bow: Bow | None = None
    crack: Crack | Literal["no crack"] | None = None
    severed: bool | None = None
    slack: bool | None = None
    replaced: Replaced | None = None
    look_unchanged: bool | None = None
    note: str | None = None
    photos: tuple[Photo, ...] | None = None
    chooses: str | None = None
    retracts: str | None = None
    written: frozenset[str] = field(default=frozenset())


@dataclass(frozen=True, slots=True)
class Call:
    """Somebody was told during a visit."""

    who: str | None = None
    when: str | None = None
    said: str | None = None
    left: str | None = None


@dataclass(frozen=True, slots=True)
class Visit:
    """One day on the bridge. ``written`` as in `Entry` (``id``, ``device``)."""

    id: str
    date: str
    entries: tuple[Entry, ...] = ()
    inspector: str | None = None
    weather: str | None = None
    device: str | None = None
    calls: tuple[Call, ...] | None = None
    written: frozenset[str] = field(default=frozenset())


@dataclass(frozen=True)
class Journal:
    """All visits to one bridge, in the order in which they were read.

    ``present`` tells a site that gives an empty list of visits from one that gives none.
    """

    visits: tuple[Visit, ...] = ()
    present: bool = True
