"""Site files that are wrong: every one is refused, with the path of everything that is wrong in it."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

import jsonschema
import pytest

from inspector.exchange import site
from inspector.exchange.schema import site_schema
from models.errors import InputError

FOLDER = Path(__file__).parents[1] / "bad_sites"
INDEX: list[dict[str, Any]] = json.loads((FOLDER / "index.json").read_text(encoding="utf-8"))
SCHEMA = jsonschema.Draft202012Validator(site_schema())


def each(*answers: str) -> list[Any]:
    """The rows of the index to which the schema answers so."""
    return [pytest.param(row, id=row["file"]) for row in INDEX if not answers or row["schema"] in answers]


def problems_of(row: dict[str, Any]) -> list[tuple[str, str, str]]:
    """What the program says of a file: path, what is wrong, what was expected."""
    with pytest.raises(InputError) as caught:
        site.read_file(FOLDER / row["file"])
    return [(problem.path, problem.what, problem.expected) for problem in caught.value.problems]


def test_index_is_complete() -> None:
    """Every bad file has its row in the index, and every row its file."""
    assert {row["file"] for row in INDEX} == {path.name for path in FOLDER.iterdir()} - {"index.json"}


@pytest.mark.parametrize("row", each())
def test_all_problems_at_once(row: dict[str, Any]) -> None:
    """A bad file is refused with the paths of all its problems, none of them twice, and none that is not there."""
    assert sorted(path for path, _, _ in problems_of(row)) == sorted(row["problems"])


@pytest.mark.parametrize("row", each())
def test_every_problem_says_what_and_what_else(row: dict[str, Any]) -> None:
    """A problem says what is wrong, and what would be right."""
    assert all(what and expected for _, what, expected in problems_of(row))


@pytest.mark.parametrize("row", each("refuses"))
def test_schema_refuses_it_too(row: dict[str, Any]) -> None:
    """What can be said in a JSON Schema is said there: an editor marks the mistake before the program does."""
    document = json.loads((FOLDER / row["file"]).read_text(encoding="utf-8"))
    assert not SCHEMA.is_valid(document)


@pytest.mark.parametrize("row", each("accepts"))
def test_only_the_program_can_tell(row: dict[str, Any]) -> None:
    """What a JSON Schema cannot say is listed with the reason, and the schema really accepts it."""
    document = json.loads((FOLDER / row["file"]).read_text(encoding="utf-8"))
    SCHEMA.validate(document)
    assert row["only the program can tell"]


@pytest.mark.parametrize("row", each("not JSON"))
def test_not_json_at_all(row: dict[str, Any]) -> None:
    """A file that no JSON reader takes is refused as a whole, in plain words."""
    with pytest.raises((ValueError, RecursionError)):
        json.loads((FOLDER / row["file"]).read_text(encoding="utf-8"))
    assert [path for path, _, _ in problems_of(row)] == [""]


def test_nearest_name_is_offered() -> None:
    """A misspelled key or name is answered with the one that is most like it first."""
    row = next(row for row in INDEX if row["file"] == "unknown-key-in-bar.json")
    assert problems_of(row)[0][2].startswith("one of `net area`")
