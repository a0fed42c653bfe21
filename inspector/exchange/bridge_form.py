"""How trusses, deck and the things beside them stand in a site file."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any, Final, NamedTuple

from inspector.exchange.container import Either, Items, Named, Way, two_of
from inspector.exchange.form import (
    UNREADABLE,
    Anything,
    Boolean,
    Choice,
    Date,
    Dimensioned,
    Form,
    Number,
    Text,
)
from inspector.exchange.rating_form import NAME, REASON_NEEDED, SYSTEMS
from inspector.exchange.record import Copy, Key, Record
from models.bridge import (
    Bar,
    Contact,
    Deck,
    FloorBeam,
    HalfThrough,
    Instrument,
    Override,
    Owner,
    Recommendation,
    Truss,
)
from models.quantity import Quantity

_TEXT: Final = Text()
_FRACTION: Final = Number(above=0, most=1)
ROLES: Final = ("top chord", "bottom chord", "end post", "vertical", "diagonal", "counter", "bracing", "other")


class _BucklingFactors(NamedTuple):
    """The `k` of a bar, which `models.bridge.Bar` keeps as two fields."""

    in_plane: float | None = None
    out_of_plane: float | None = None


_K: Final = Record(
    (Key("in plane", Number(above=0)), Key("out of plane", Number(above=0))),
    _BucklingFactors,
    least=1,
)


def _make_bar(k: _BucklingFactors | None = None, **fields: Any) -> Bar:
    if isinstance(k, _BucklingFactors):
        fields |= {"k_in_plane": k.in_plane, "k_out_of_plane": k.out_of_plane}
    return Bar(**fields)


def _take_from_bar(bar: Bar, field: str) -> Any:
    if field != "k":
        return getattr(bar, field)
    given = bar.k_in_plane is not None or bar.k_out_of_plane is not None
    return _BucklingFactors(bar.k_in_plane, bar.k_out_of_plane) if given else None


BAR: Final[Form[Bar]] = Record(
    (
        Key("id", NAME, required=True, about="its name, which no other bar of the truss has"),
        Key("from", NAME, "start", required=True, about="joint; stations run from here"),
        Key("to", NAME, "end", required=True, about="joint"),
        Key("section", NAME, required=True),
        Key("material", NAME, required=True),
        Key("role", Choice(ROLES), required=True),
        Key("k", _K, about="effective length factors; absent: 1.0"),
        Key("unbraced out of plane", Dimensioned("length", "positive"), about="absent: the bar's length"),
        Key("ends", Choice(("welded", "bolted", "riveted", "pinned")), about="absent: welded"),
        Key("net area", _FRACTION, about="net over gross area"),
        Key("shear lag", _FRACTION, about="factor on the net area"),
        Key("connected", Choice(("longer leg", "shorter leg", "both legs")), about="of a single angle"),
        Key("turned", Choice((0, 90)), about="degrees that the section is turned by; absent: 0"),
        Key("tension only", Boolean(), about="the bar cannot push; absent: false"),
        Key("system", SYSTEMS, about="absent: that of the rating"),
        Key("system reason", Text(name=True)),
        Key("stitch spacing", Dimensioned("length", "positive"), about="between the pieces of a built bar"),
    ),
    _make_bar,
    _take_from_bar,
    needs=(REASON_NEEDED,),
)


def _make_copy(same_as: str) -> Truss:
    # The rest is filled in from the truss that it copies as soon as all are read.
    unread = dict.fromkeys(("top_chord", "joints", "supports", "bars", "deck_joints"), UNREADABLE)
    return Truss(name="", same_as=same_as, **unread)


TRUSS: Final[Form[Truss]] = Copy(
    "same as",
    Record((Key("same as", NAME, required=True, about="the truss that this one copies"),), _make_copy),
    Record(
        (
            Key("top chord", Choice(("braced overhead", "at deck", "half through")), required=True),
            Key("joints", Named(two_of(Dimensioned("length"))), required=True, about="[x along the bridge, y up]"),
            Key("supports", Named(Choice(("pin", "roller"))), required=True, about="by joint"),
            Key("bars", Items(BAR, least=1), required=True),
            Key("deck joints", Items(NAME, least=2), required=True, about="from one end to the other, x rising"),
        ),
        lambda **fields: Truss(name="", **fields),
    ),
    lambda truss: truss.same_as is not None,
)

_EDGE: Final = Dimensioned("line load", "not negative")
DECK: Final[Form[Deck]] = Record(
    (
        Key("width", Dimensioned("length", "positive"), required=True, about="clear between kerbs or rails"),
        Key("dead width", Dimensioned("length", "positive"), about="that has weight; absent: the width"),
        Key("truss spacing", Dimensioned("length", "positive"), about="absent: the width"),
        Key("offset", Named(Dimensioned("length")), about="of the deck towards a truss"),
        Key("dead", Dimensioned("pressure", "not negative"), required=True),
        Key("wearing", Dimensioned("pressure", "not negative"), about="wearing course; absent: 0, a finding"),
        Key("edge", Either((Way(str, Quantity, _EDGE), Way(dict, Mapping, Named(_EDGE)))), about="on each truss"),
        Key("rests on", Choice(("joints", "chord")), about="absent: joints"),
    ),
    Deck,
)

HALF_THROUGH: Final[Form[HalfThrough]] = Record(
    (
        Key(
            "floor beam",
            Record(
                (
                    Key("section", NAME, required=True),
                    Key("material", NAME, required=True),
                    Key("span", Dimensioned("length", "positive"), required=True),
                ),
                FloorBeam,
            ),
        ),
        Key("end spring", Dimensioned("spring stiffness", "positive"), about="at the ends of the top chord"),
    ),
    HalfThrough,
)

OWNER: Final[Form[Owner]] = Record(
    (
        Key("name", _TEXT),
        Key("call", Items(Record((Key("who", _TEXT, required=True), Key("phone", _TEXT)), Contact))),
        Key("act below", Number(least=0), about="rating factor below which to call"),
    ),
    Owner,
)

INSTRUMENT: Final[Form[Instrument]] = Record(
    (Key("error", Dimensioned("length", "not negative"), about="of a reading"),), Instrument
)

OVERRIDE: Final[Form[Override]] = Record(
    (
        Key("truss", NAME),
        Key("bar", NAME),
        Key("what", _TEXT, about="the key that it replaces"),
        Key("value", Anything(), about="as that key has it"),
        Key("was", Anything(), about="as that key had it"),
        Key("who", _TEXT),
        Key("why", _TEXT),
        Key("date", Date()),
    ),
    Override,
)

RECOMMENDATION: Final[Form[Recommendation]] = Record(
    tuple(Key(key, _TEXT) for key in ("id", "text", "priority", "raised", "told", "done", "proof")), Recommendation
)
