"""Result files: a rating as one JSON document, described once for writing and for its JSON Schema.

SI base units (N, m, m^2, Pa), tension positive; a value that does not exist is null.
"""

from __future__ import annotations

import json
from collections.abc import Callable, Collection, Mapping
from dataclasses import dataclass
from typing import Any, Final, get_args

from inspector.exchange.container import Either, Items, Named, Way, nullable
from inspector.exchange.form import Choice, Form, Json, Null, Number, Text, Whole
from inspector.exchange.json_text import unusable
from inspector.exchange.record import Key, Record
from models.finding import LEVELS
from models.rating.result import BarRating, Deflection, Effect, Governing, Rating, TrussRating
from models.statics.stability import Verdict
from models.words import CAUTION

FORMAT: Final = "truss-footbridge-rating/1"

_TEXT: Final = Text()
_TEXT_OR_NULL: Final = nullable(_TEXT, str)
_STATES: Final = nullable(Choice(("good", "fair", "poor", "severe")), str)
_KNOWN: Final = Choice(("measured", "partly measured", "estimated", "assumed", "not seen"))


@dataclass(frozen=True)
class _Figure(Number):
    """A figure of the program as a plain number; no zero has a sign."""

    def write(self, value: float) -> Json:
        return float(value) + 0.0


_FIGURE: Final = _Figure()
_FIGURE_OR_NULL: Final = nullable(_FIGURE, (int, float))
_COUNT: Final = Whole(-(2**31), 2**31)


def _record(
    takes: Mapping[str, tuple[Form[Any], Callable[[Any], Any]]],
    about: Mapping[str, str],
    optional: Collection[str] = (),
) -> Record[Any]:
    """A record of a result: each key with its form and how it is taken from the rating."""
    keys = tuple(
        Key(name, form, name, required=name not in optional, about=about.get(name, ""))
        for name, (form, _) in takes.items()
    )
    return Record(keys, dict, lambda value, name: takes[name][1](value), grows=True)


def _of(field: str) -> Callable[[Any], Any]:
    return lambda value: getattr(value, field)


_FACTORS: Final = nullable(Named(_FIGURE_OR_NULL), dict)


def _factors(value: BarRating | Governing) -> Mapping[str, float | None] | None:
    """Rating factors by level; None as a whole where there is none at any level."""
    there = any(factor is not None for factor in value.rating_factor.values())
    return value.rating_factor if there else None


_DEAD: Final = _record(
    {"components": (_FIGURE, _of("dead_components")), "wearing": (_FIGURE, _of("dead_wearing"))},
    {"components": "own weight, deck and edge, N", "wearing": "wearing course, N"},
)
_EFFECT: Final[Form[Effect]] = _record(
    {"max": (_FIGURE, _of("maximum")), "min": (_FIGURE, _of("minimum"))},
    {"max": "largest tension, N", "min": "largest compression, N, negative"},
)
_RESISTANCE: Final = _record(
    {"tension": (_FIGURE, _of("tension")), "compression": (_FIGURE, _of("compression"))},
    {"tension": "N", "compression": "N"},
)
_WITHOUT: Final = Either(
    (
        Way(None, type(None), Null()),
        Way(str, str, Choice(("mechanism",))),
        Way((int, float), (int, float), _FIGURE),
    )
)

_BAR: Final[Form[BarRating]] = _record(
    {
        "truss": (_TEXT, _of("truss")),
        "bar": (_TEXT, _of("bar")),
        "state": (_STATES, _of("state")),
        "known": (_KNOWN, _of("known")),
        "area": (_FIGURE, _of("area")),
        "nominal area": (_FIGURE, _of("nominal_area")),
        "dead": (nullable(_DEAD, dict), lambda bar: None if bar.dead_components is None else bar),
        "live": (nullable(Named(_EFFECT), dict), _of("live")),
        "imposed": (_EFFECT, _of("imposed")),
        "resistance": (_RESISTANCE, lambda bar: bar),
        "resistance inventory": (_RESISTANCE, lambda bar: bar.lower_levels.get("inventory")),
        "condition factor": (_FIGURE_OR_NULL, _of("condition_factor")),
        "system factor": (_FIGURE_OR_NULL, _of("system_factor")),
        "rating factor": (_FACTORS, _factors),
        "check": (_TEXT_OR_NULL, _of("check")),
        "load": (_TEXT_OR_NULL, _of("load")),
        "loss allowance": (_FIGURE_OR_NULL, _of("loss_allowance")),
        "without it": (_WITHOUT, _of("without_it")),
        "slack": (Items(_TEXT), lambda bar: bar.slack or None),
    },
    {
        "state": "last on record",
        "known": "what the area rests on",
        "area": "least remaining area along the bar, m^2",
        "nominal area": "as built, m^2",
        "dead": "unfactored force; null where the truss does not stand",
        "live": "by name of the load: the most that its worst arrangement gives, unfactored, N",
        "imposed": "what settlements, temperature and bars made short pull (max) and push (min), unfactored, N",
        "resistance": "factored, without condition and system factor, at the upper level",
        "resistance inventory": "the same at the inventory level, where it differs: basis `allowable stress`",
        "rating factor": "the lowest over tension, compression and all live loads, by level; null where there is none",
        "check": "what governs at the upper level",
        "load": "the live load that governs at the upper level",
        "loss allowance": "fraction of every plate's remaining thickness that could go before the factor falls to 1",
        "without it": "lowest rating factor of the other bars without this one, or `mechanism`",
        "slack": "bars of the truss that cannot push and go slack under what governs this one, where there are any",
    },
    optional=("imposed", "resistance inventory", "slack"),
)
_DEFLECTION: Final[Form[Deflection]] = _record(
    {
        "joint": (_TEXT, _of("joint")),
        "size": (_FIGURE, _of("size")),
        "limit": (_FIGURE, _of("limit")),
        "load": (_TEXT, _of("load")),
    },
    {"size": "m", "limit": "span/360, or 1/220 of a cantilever arm, m"},
)
_TRUSS: Final[Form[TrussRating]] = _record(
    {
        "joints": (_COUNT, _of("joints")),
        "bars": (_COUNT, _of("bars_standing")),
        "reactions": (_COUNT, _of("reaction_components")),
        "degree": (_COUNT, _of("degree")),
        "mechanisms": (_COUNT, _of("mechanisms")),
        "verdict": (Choice(get_args(Verdict)), _of("verdict")),
        "deflection": (_DEFLECTION, _of("deflection")),
        "frequency": (_FIGURE, _of("frequency")),
    },
    {
        "degree": "bars + reactions - 2 joints",
        "mechanisms": "independent motions",
        "deflection": "of the deck joint that a crowd brings nearest to its limit; advisory",
        "frequency": "lowest vertical one, with the mass of the dead load, Hz; advisory",
    },
    optional=("deflection", "frequency"),
)
_GOVERNING: Final[Form[Governing]] = _record(
    {
        "rating factor": (_FACTORS, _factors),
        "truss": (_TEXT_OR_NULL, _of("truss")),
        "bar": (_TEXT_OR_NULL, _of("bar")),
        "check": (_TEXT_OR_NULL, _of("check")),
        "load": (_TEXT_OR_NULL, _of("load")),
    },
    {"rating factor": "the lowest over the bars that still carry, by level; 0 of a mechanism"},
)
_FINDING: Final = _record(
    {
        "level": (Choice(LEVELS), _of("level")),
        "truss": (_TEXT_OR_NULL, _of("truss")),
        "bar": (_TEXT_OR_NULL, _of("bar")),
        "text": (_TEXT, _of("text")),
    },
    {},
)
_ALWAYS: Final = _record(
    {
        "format": (Choice((FORMAT,)), lambda _: FORMAT),
        "site": (_TEXT, _of("site")),
        "basis": (_TEXT, _of("basis")),
        "caution": (_TEXT, lambda _: CAUTION),
        "inputs sha256": (_TEXT, lambda rating: rating.provenance.inputs_sha256),
        "program": (_TEXT, lambda rating: rating.provenance.program),
        "assumptions": (Items(_TEXT), _of("assumptions")),
        "findings": (Items(_FINDING), _of("findings")),
        "not rated": (Items(_TEXT), _of("not_rated")),
        "trusses": (Named(_TRUSS), _of("trusses")),
        "structure": (_GOVERNING, _of("structure")),
        "bars": (Items(_BAR), _of("bars")),
    },
    {
        "caution": "the safety statement, whole",
        "inputs sha256": "of the canonical site document and the visits that it used",
        "program": "name and version",
        "assumptions": "every default that was used",
        "not rated": "what the figures do not speak of",
        "trusses": "as they stand, severed bars left out",
    },
)
RESULT: Final[Record[Rating]] = Record(
    (
        *_ALWAYS.keys,
        Key("if cracked bars hold", _GOVERNING, about="the structure with cracked bars whole"),
        Key("if slack bars pull", _GOVERNING, about="the structure with slack bars in"),
    ),
    dict,  # type: ignore[arg-type]  # a result is read as the document that it is
    lambda rating, name: getattr(rating, name) if name.startswith("if_") else _ALWAYS.take(rating, name),
    grows=True,
)


def document(rating: Rating) -> dict[str, Json]:
    """The rating as a JSON document.

    Raises
    ------
    ValueError
        If a figure is not finite: this program never gives one out.
    """
    made: dict[str, Json] = RESULT.write(rating)
    for problem in unusable(made):
        raise ValueError(str(problem))
    return made


def text(rating: Rating) -> str:
    """The text of a result file."""
    return json.dumps(document(rating), indent=2, ensure_ascii=False, allow_nan=False)
