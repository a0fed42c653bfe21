"""How visits and what was recorded in them stand in a site file.

A strange value is no error here: it is kept, and marked as doubtful where it is used. So numbers and
quantities of an observation have no range.
"""

from __future__ import annotations

from typing import Any, Final

from inspector.exchange.container import Either, Items, Way
from inspector.exchange.form import Boolean, Choice, Date, Dimensioned, Form, Null, Number, Text, Whole
from inspector.exchange.record import Key, Record
from models.journal import CRACK_TAKEN_BACK, Bow, Call, Crack, Entry, Photo, Reading, Replaced, Visit

_NAME: Final = Text(name=True)
_TEXT: Final = Text()
_LENGTH: Final = Dimensioned("length")

_ID: Final = Key("id", _NAME, identity=True, about="absent: made from the rest, see the description of this schema")

READING: Final[Form[Reading]] = Record(
    (
        Key("station", Number(), required=True, about="0 at `from`, 1 at `to`"),
        Key("plate", _NAME, required=True, about="a plate of the section's shape"),
        Key("thickness", Items(_LENGTH, least=1), required=True, about="what is left, never what is lost"),
        Key("extent", _LENGTH, about="length of bar that is like this"),
        Key("cleaned", Boolean(), about="whether the steel was bare when it was measured"),
        Key("instrument", _TEXT),
        Key("face", _TEXT),
    ),
    Reading,
)

_BOW: Final = Record(
    (
        Key("offset", _LENGTH, required=True),
        Key("over", _LENGTH, about="the length that it was measured over; absent: the bar's"),
        Key("direction", Choice(("in plane", "out of plane"))),
    ),
    Bow,
)
_CRACK: Final = Either(
    (
        Way(None, str, Null(CRACK_TAKEN_BACK)),
        Way(dict, Crack, Record((Key("length", _LENGTH), Key("note", _TEXT)), Crack)),
    )
)
_REPLACED: Final = Record((Key("section", _NAME), Key("material", _NAME)), Replaced)
_PHOTO: Final = Record((Key("file", _NAME, required=True), Key("sha256", _TEXT)), Photo)

ENTRY: Final[Record[Entry]] = Record(
    (
        _ID,
        Key("device", _NAME, identity=True, about="absent: the visit's, else `file`"),
        Key("sequence", Whole(), identity=True, about="order among the entries of a device; absent: the position"),
        Key("truss", _NAME, required=True),
        Key("bar", _NAME, required=True),
        Key("at", _TEXT, about="the time as recorded; it orders nothing"),
        Key("seen", Choice(("hands on", "at a distance", "not seen"))),
        Key("reason", _TEXT, about="why it was not seen"),
        Key("state", Choice(("good", "fair", "poor", "severe"))),
        Key("readings", Items(READING)),
        Key("estimated loss", Number(), about="fraction of the area"),
        Key("extent", _LENGTH, about="of the estimated loss"),
        Key("station", Number(), about="of the estimated loss; absent: 0.5"),
        Key("bow", _BOW),
        Key("crack", _CRACK, about="null takes it back"),
        Key("severed", Boolean(), about="false when put right"),
        Key("slack", Boolean(), about="false when put right"),
        Key("replaced", _REPLACED, about="nothing recorded before counts any more"),
        Key("look unchanged", Boolean(only=True), about="seen, no change since the last visit"),
        Key("note", _TEXT),
        Key("photos", Items(_PHOTO)),
        Key("chooses", _NAME, about="id of the entry preferred"),
        Key("retracts", _NAME, about="id of the entry taken back"),
    ),
    Entry,
)


def _make_visit(written: frozenset[str], entries: tuple[Entry, ...] | None = None, **fields: Any) -> Visit:
    # An empty list of observations is told from none at all, so that a file is written back as it was.
    there = written if entries is None else written | {"observations"}
    return Visit(entries=() if entries is None else entries, written=there, **fields)


def _take_from_visit(visit: Visit, field: str) -> Any:
    if field == "entries" and not visit.entries and "observations" not in visit.written:
        return None
    return getattr(visit, field)


VISIT: Final[Record[Visit]] = Record(
    (
        _ID,
        Key("date", Date(), required=True),
        Key("inspector", _TEXT),
        Key("weather", _TEXT),
        Key("device", _NAME),
        Key("calls", Items(Record(tuple(Key(key, _TEXT) for key in ("who", "when", "said", "left")), Call))),
        Key("observations", Items(ENTRY), "entries"),
    ),
    _make_visit,
    _take_from_visit,
)
