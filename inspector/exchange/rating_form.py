"""How the rules of a rating stand in a site file. A live load has the keys of its row in `LIVE_KINDS`."""

from __future__ import annotations

from typing import Any, Final

from inspector.exchange.container import Either, Items, Pair, Way
from inspector.exchange.form import Choice, Dimensioned, Form, Number, Text
from inspector.exchange.record import Key, Need, Record, Tagged
from models.bridge import Axle, Companion, Imposed, LiveLoad, RatingRules
from models.loading import LIVE_KINDS
from models.loading.live import VEHICLES, KeyForm, LiveKind
from models.loading.rules import RULES

NAME: Final = Text(name=True)
SYSTEMS: Final = Choice(("welded", "riveted", "eyebars", "redundant"))
REASON_NEEDED: Final = Need("system", "redundant", ("system reason",))

_AXLE: Final = Pair(
    Dimensioned("length"), Dimensioned("force", "positive"), Axle, lambda axle: (axle.position, axle.weight)
)
_LIVE_FORMS: Final[dict[KeyForm, Form[Any]]] = {
    "pressure": Dimensioned("pressure", "not negative"),
    "force": Dimensioned("force", "not negative"),
    "length": Dimensioned("length", "positive"),
    "axles": Items(_AXLE, least=1),
    "rule": Choice(tuple(RULES)),
    "vehicle name": Choice(tuple(VEHICLES)),
}
_COMPANION: Final = Record(
    (
        Key("load", NAME, required=True, about="name of another live load"),
        Key("factor", Number(least=0), required=True),
    ),
    Companion,
)


def _live_form(name: str, kind: LiveKind) -> Record[LiveLoad]:
    own = [Key(key, _LIVE_FORMS[form], required=required) for key, form, required in kind.keys]
    keys = (
        Key("name", NAME, required=True, about="its name, which no other live load has"),
        Key("kind", Choice((name,)), required=True),
        *own,
        Key("with", Items(_COMPANION), "companions", about="other live loads that act with it, each at its own worst"),
    )
    return Record(keys, LiveLoad, one_of=kind.one_of)


LIVE: Final[Form[LiveLoad]] = Tagged(
    "kind", {name: _live_form(name, kind) for name, kind in LIVE_KINDS.items()}, lambda load: load.kind
)


def _imposed_form(kind: str, *keys: Key) -> Record[Imposed]:
    return Record((Key("kind", Choice((kind,)), required=True), *keys), Imposed)


IMPOSED: Final[Form[Imposed]] = Tagged(
    "kind",
    {
        "settlement": _imposed_form(
            "settlement",
            Key("truss", NAME, required=True),
            Key("joint", NAME, required=True, about="a support"),
            Key("down", Dimensioned("length"), required=True, about="how far it went down"),
        ),
        "temperature": _imposed_form(
            "temperature",
            Key("truss", NAME, about="absent: all trusses"),
            Key("change", Number(), required=True, about="kelvin"),
            Key("expansion", Number(above=0), about="of the material, per kelvin; absent: 0.000012, an assumption"),
        ),
        "length": _imposed_form(
            "length",
            Key("truss", NAME, required=True),
            Key("bar", NAME, required=True),
            Key("short", Dimensioned("length"), required=True, about="how much the bar was made too short"),
        ),
    },
    lambda imposed: imposed.kind,
)

UNSEEN: Final = Either(
    (
        Way(str, str, Choice(("last",))),
        Way(
            dict,
            (int, float),
            Record(
                (Key("loss", Number(least=0, most=1), required=True, about="fraction of every plate"),),
                lambda loss: loss,
                lambda loss, _: loss,
                least=1,
            ),
        ),
    )
)

RATING: Final[Form[RatingRules]] = Record(
    (
        Key("basis", Choice(("lrfr", "allowable stress", "eurocode")), required=True),
        Key("system", SYSTEMS, about="how the bars are built; a single rolled piece counts as welded"),
        Key("system reason", Text(name=True), about="why the structure counts as redundant"),
        Key("connection allowance", Number(least=0), about="factor on the bars' own weight; absent: 1.10, assumed"),
        Key("unseen", UNSEEN, about="how a bar that was not seen is rated; absent: `last`"),
        Key("live", Items(LIVE), required=True, about="live loads, each rated by itself"),
        Key("imposed", Items(IMPOSED), about="settlements, temperature, bars made short"),
    ),
    RatingRules,
    needs=(REASON_NEEDED,),
)
