"""The whole site file as one form: every key of the format stands in this module or in one that it is made of."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Any, Final

from inspector.exchange.bridge_form import DECK, HALF_THROUGH, INSTRUMENT, OVERRIDE, OWNER, RECOMMENDATION, TRUSS
from inspector.exchange.container import Items, Named
from inspector.exchange.form import Choice, Form, Json, Text, Whole, shown
from inspector.exchange.rating_form import RATING
from inspector.exchange.record import Key, Record
from inspector.exchange.section_form import MATERIAL, SECTION
from inspector.exchange.visit_form import VISIT
from models.bridge import Footbridge
from models.errors import Problem
from models.journal import Journal, Visit

FORMAT: Final = "truss-footbridge/1"
"""The only version there is so far. A later key raises the minor number, as in ``truss-footbridge/1.1``."""


@dataclass(frozen=True)
class Site:
    """What a site file holds: the footbridge as built, and what was recorded on its visits."""

    bridge: Footbridge
    journal: Journal


@dataclass(frozen=True)
class Format(Form[str]):
    """The name and version of the format, which the reader knows or refuses by name."""

    @property
    def expected(self) -> str:
        """See `Form`."""
        return f"`{FORMAT}`"

    def read(self, value: Json, path: str, problems: list[Problem]) -> str:
        """See `Form`."""
        if value == FORMAT:
            return FORMAT
        newer = isinstance(value, str) and value.startswith(f"{FORMAT}.")
        what = f"{shown(value)} is a newer version than this program reads" if newer else f"{shown(value)} is not known"
        hint = "; a newer version of this program reads it" if newer else ""
        problems.append(Problem(path, what, self.expected + hint))
        return FORMAT

    def write(self, value: str) -> Json:
        """See `Form`."""
        return value

    def schema(self) -> dict[str, Json]:
        """See `Form`."""
        return {"const": FORMAT}


def _called(value: Any, name: str) -> Any:
    """The same value, knowing its name."""
    return replace(value, name=name)


def _make(visits: tuple[Visit, ...] | None = None, **fields: Any) -> Site:
    del fields["format"]
    journal = Journal(() if visits is None else visits, present=visits is not None)
    return Site(Footbridge(**fields), journal)


def _take(site: Site, field: str) -> Any:
    if field == "format":
        return FORMAT
    if field == "visits":
        return site.journal.visits if site.journal.present else None
    return getattr(site.bridge, field)


_TEXT: Final = Text()
SITE: Final[Record[Site]] = Record(
    (
        Key("format", Format(), required=True, about="name and version of this format"),
        Key("id", Text(name=True), identity=True, about="absent: made of `name` and `reference`"),
        Key("name", Text(name=True), required=True, about="of the footbridge"),
        Key("reference", _TEXT, about="the owner's number"),
        Key("locality", _TEXT),
        Key("built", Whole(1000, 9999), about="year"),
        Key("units", Choice(("SI", "US")), about="for display only; absent: SI"),
        Key("notes", _TEXT),
        Key("owner", OWNER),
        Key("materials", Named(MATERIAL, _called), required=True),
        Key("sections", Named(SECTION, _called), required=True),
        Key("trusses", Named(TRUSS, _called, least=1, most=2), required=True),
        Key("deck", DECK, required=True),
        Key("half through", HALF_THROUGH, about="what holds the top chords of half-through trusses"),
        Key("rating", RATING, required=True),
        Key("instruments", Named(INSTRUMENT)),
        Key("overrides", Items(OVERRIDE)),
        Key("recommendations", Items(RECOMMENDATION)),
        Key("visits", Items(VISIT)),
    ),
    _make,
    _take,
)
