"""Whatever stands in a file, there is a site or a list of problems: no other error, and no silent acceptance."""

from __future__ import annotations

import copy
import json
from pathlib import Path
from typing import Any

import jsonschema
from hypothesis import given, settings
from hypothesis import strategies as st

from inspector.exchange import site
from inspector.exchange.schema import site_schema
from models.errors import InputError

DOCUMENTS = [
    json.loads((Path(__file__).parent / name).read_text(encoding="utf-8"))
    for name in ("short_site.json", "every_key.json")
]
SCHEMA = jsonschema.Draft202012Validator(site_schema())
NUMBERS = st.integers() | st.floats(allow_nan=False, allow_infinity=False)
QUANTITIES = st.sampled_from(
    ["3 m", "-3 m", "0 mm", "1,000 m", "2 kN", "1/2 in", "5 ft 0 in", "3 m\n", "kN", "9" * 90 + " m"]
)
NAMES = st.sampled_from(
    ["left", "north", "L0", "L0-L1", "chord", "steel", "crowd", "vehicle", "hands on", "same as", "id", ""]
)
ODD = st.recursive(
    st.none() | st.booleans() | NUMBERS | st.text(max_size=5) | QUANTITIES | NAMES,
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(NAMES | st.text(max_size=5), inner, max_size=3),
    max_leaves=6,
)


def places(value: Any, path: tuple[Any, ...] = ()) -> list[tuple[Any, ...]]:
    """The paths of all values inside a document."""
    inside = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    found = [place for key, item in inside for place in places(item, (*path, key))]
    return [path, *found] if path else found


PLACES = [places(document) for document in DOCUMENTS]


@st.composite
def mutated(draw: st.DrawFn) -> Any:
    """A good document of which a few values were dropped, replaced or given a neighbour."""
    number = draw(st.integers(0, len(DOCUMENTS) - 1))
    document = copy.deepcopy(DOCUMENTS[number])
    for path in draw(st.lists(st.sampled_from(PLACES[number]), min_size=1, max_size=3)):
        parent = document
        try:
            for key in path[:-1]:
                parent = parent[key]
            parent[path[-1]]
        except (KeyError, IndexError, TypeError):
            continue
        how = draw(st.sampled_from(["drop", "replace", "add"]))
        if how == "drop":
            del parent[path[-1]]
        elif how == "replace" or isinstance(parent, list):
            parent[path[-1]] = draw(ODD)
        else:
            parent[draw(NAMES | st.text(max_size=5))] = draw(ODD)
    return document


def outcome(document: Any) -> site.Site | InputError:
    """What reading a document gives: a site or its problems."""
    try:
        return site.read(json.dumps(document))
    except InputError as error:
        return error


@given(ODD)
def test_any_value(value: Any) -> None:
    """Any JSON value but a site is refused with problems."""
    found = outcome(value)
    assert isinstance(found, InputError)
    assert found.problems


@settings(max_examples=150, deadline=None)
@given(mutated())
def test_mutated_site(document: Any) -> None:
    """A site with random damage is refused, or it is written back as it stands and its schema accepts it."""
    found = outcome(document)
    if isinstance(found, InputError):
        assert len({problem.path for problem in found.problems}) > 0
        assert all(problem.what for problem in found.problems)
    else:
        assert site.write(found.bridge, found.journal) == document
        assert site.fingerprint(found.bridge, found.journal)
        SCHEMA.validate(document)
