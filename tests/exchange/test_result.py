"""Result files: every figure in its place, null where there is none."""

from __future__ import annotations

import json
from dataclasses import replace
from pathlib import Path

import jsonschema
import pytest

from inspector.exchange import result
from inspector.exchange.schema import result_schema
from models.finding import Finding
from models.rating.result import BarRating, Effect, Governing, Provenance, Rating, TrussRating
from models.words import CAUTION

SCHEMA = jsonschema.Draft202012Validator(result_schema())
KEYS = ["format", "site", "basis", "caution", "inputs sha256", "program", "assumptions", "findings", "not rated"]
KEYS += ["trusses", "structure", "bars"]
BAR_KEYS = ["truss", "bar", "state", "known", "area", "nominal area", "dead", "live", "resistance"]
BAR_KEYS += ["condition factor", "system factor", "rating factor", "check", "load", "loss allowance", "without it"]
BAR = BarRating(
    truss="left",
    bar="L0-L1",
    role="bottom chord",
    section="chord",
    length=2.5,
    state=None,
    known="assumed",
    area=0.0021,
    nominal_area=0.0022,
    dead_components=7000.0,
    dead_wearing=-0.0,
    live={"crowd": Effect(41000.0, 0.0)},
    tension=500000.0,
    compression=400000.0,
    tension_check="tension yield",
    compression_check="flexural buckling",
    condition_factor=0.95,
    system_factor=0.85,
    rating_factor={"inventory": 4.1, "operating": 5.3},
    check="tension yield",
    load="crowd",
    direction="tension",
    where=(0.0, 1.0),
    demand=60000.0,
    capacity=400000.0,
    loss_allowance=0.6,
    without_it="mechanism",
)
TRUSS = TrussRating("left", 4, 5, 3, 0, 0, "determinate", (), (), (BAR,), (), (14000.0, 0.0))
RATING = Rating(
    site="Sedge Mill footbridge",
    basis="lrfr",
    levels=("inventory", "operating"),
    provenance=Provenance("ab" * 32, "a program 1"),
    structure=Governing({"inventory": 4.1, "operating": 5.3}, "left", "L0-L1", "tension yield", "crowd"),
    trusses={"left": TRUSS},
    assumptions=("One default.",),
    findings=(Finding("note", "Something about the whole."), Finding("assumed", "A state.", "left", "L0-L1")),
    not_rated=("connections",),
    loads=(),
)


def with_bar(**changes: object) -> Rating:
    """The rating with its only bar changed."""
    bar = BAR._replace(**changes)  # type: ignore[arg-type]  # each test gives fields of their types
    return replace(RATING, trusses={"left": replace(TRUSS, bars=(bar,))})


def test_keys_and_their_order() -> None:
    """The document has the keys of the format in their order, and no others."""
    made = result.document(RATING)
    assert list(made) == KEYS
    assert list(made["bars"][0]) == BAR_KEYS
    assert list(made["trusses"]["left"]) == ["joints", "bars", "reactions", "degree", "mechanisms", "verdict"]
    assert list(made["structure"]) == ["rating factor", "truss", "bar", "check", "load"]
    SCHEMA.validate(made)


def test_values() -> None:
    """Figures stand where the format puts them, with the safety statement whole."""
    made = result.document(RATING)
    assert made["caution"] == CAUTION
    assert made["bars"][0]["dead"] == {"components": 7000.0, "wearing": 0.0}
    assert made["bars"][0]["live"] == {"crowd": {"max": 41000.0, "min": 0.0}}
    assert made["bars"][0]["resistance"] == {"tension": 500000.0, "compression": 400000.0}
    assert made["bars"][0]["rating factor"] == {"inventory": 4.1, "operating": 5.3}
    assert made["findings"][0] == {"level": "note", "truss": None, "bar": None, "text": "Something about the whole."}


def test_mechanism_has_nulls() -> None:
    """In a mechanism forces, factors, check and load are null as a whole; area and resistance stay."""
    none = {"inventory": None, "operating": None}
    made = result.document(
        with_bar(
            dead_components=None,
            dead_wearing=None,
            live=None,
            rating_factor=none,
            check=None,
            load=None,
            direction=None,
            demand=None,
            capacity=None,
            loss_allowance=None,
            without_it=None,
        )
    )
    bar = made["bars"][0]
    assert [key for key, value in bar.items() if value is None] == [
        "state",
        "dead",
        "live",
        "rating factor",
        "check",
        "load",
        "loss allowance",
        "without it",
    ]
    SCHEMA.validate(made)


def test_without_it_as_a_factor() -> None:
    """Where the truss stands without a bar, the lowest factor of the others is a number; where none acts, null."""
    assert result.document(with_bar(without_it=0.4))["bars"][0]["without it"] == 0.4
    assert result.document(with_bar(without_it=None))["bars"][0]["without it"] is None


def test_other_answers_only_where_asked() -> None:
    """The answers the other way round stand at the top where there are such bars, and nowhere else."""
    other = Governing({"inventory": 3.0, "operating": 3.9}, "left", "L0-L1", "tension yield", "crowd")
    made = result.document(replace(RATING, if_cracked_bars_hold=other))
    assert made["if cracked bars hold"]["rating factor"]["operating"] == 3.9
    assert "if slack bars pull" not in made
    SCHEMA.validate(made)


@pytest.mark.parametrize("wrong", [float("inf"), float("nan")])
def test_no_figure_that_is_none(wrong: float) -> None:
    """A figure that is not finite is a fault of the program, named by its place, never written."""
    with pytest.raises(ValueError, match="bars/0/area"):
        result.document(with_bar(area=wrong))


def test_text() -> None:
    """The text of a result file is the document, indented, in its own characters."""
    text = result.text(replace(RATING, site="Größe ⁴"))
    assert "Größe ⁴" in text
    assert '\n  "basis"' in text
    assert json.loads(text) == result.document(replace(RATING, site="Größe ⁴"))


def test_reads_back() -> None:
    """A stored result is read by the form that wrote it, later keys included."""
    later = result.document(RATING) | {"outlook": {"year": 2050}}
    problems: list[object] = []
    result.RESULT.read(later, "", problems)  # type: ignore[arg-type]
    assert problems == []


def test_schema_files_are_those_of_the_program() -> None:
    """The schemas that are published are the ones that the program would write today."""
    docs = Path(__file__).parents[2] / "docs"
    script = docs / "scripts" / "make_schema.py"
    namespace: dict[str, object] = {"__name__": "make_schema", "__file__": str(script)}
    exec(script.read_text(encoding="utf-8"), namespace)  # noqa: S102  # our own script, outside any package
    texts = namespace["texts"]
    assert callable(texts)
    for name, text in texts().items():
        assert (docs / name).read_text(encoding="utf-8") == text


def test_schemas_are_schemas() -> None:
    """Both schemas are valid JSON Schema 2020-12."""
    from inspector.exchange.schema import site_schema

    jsonschema.Draft202012Validator.check_schema(site_schema())
    jsonschema.Draft202012Validator.check_schema(result_schema())
