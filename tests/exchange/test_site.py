"""Site files that are right: read, written back, and known again."""

from __future__ import annotations

import copy
import json
import uuid
from pathlib import Path
from typing import Any

import jsonschema
import pytest
from hypothesis import given, settings
from strategies.sites import Labelled, sites

from inspector.exchange import site
from inspector.exchange.identity import NAMESPACE
from inspector.exchange.schema import site_schema
from models.errors import InputError
from models.journal import CRACK_TAKEN_BACK

HERE = Path(__file__).parent
GOOD = ["short_site.json", "every_key.json"]
SCHEMA = jsonschema.Draft202012Validator(site_schema())


def document(name: str) -> dict[str, Any]:
    """One of the good documents beside this file."""
    found: dict[str, Any] = json.loads((HERE / name).read_text(encoding="utf-8"))
    return found


def typed(value: Any) -> Any:
    """The value with the type of each number beside it, since Python takes 1 and 1.0 and True for equal."""
    if isinstance(value, dict):
        return {key: typed(item) for key, item in value.items()}
    if isinstance(value, list):
        return [typed(item) for item in value]
    return (type(value), value)


def written(found: site.Site, **options: bool) -> dict[str, Any]:
    """The document of a site."""
    return site.write(found.bridge, found.journal, **options)


@pytest.mark.parametrize("name", GOOD)
def test_written_as_read(name: str) -> None:
    """A document comes back as it was: texts, numbers and absent keys alike."""
    assert typed(written(site.read_file(HERE / name))) == typed(document(name))


@pytest.mark.parametrize("name", GOOD)
def test_order_of_names(name: str) -> None:
    """Joints, sections and trusses keep the order of the file, which numbers the equations."""
    truss = next(iter(document(name)["trusses"].values()))
    found = site.read_file(HERE / name)
    assert list(next(iter(found.bridge.trusses.values())).joints) == list(truss["joints"])
    assert list(written(found)["sections"]) == list(document(name)["sections"])


@pytest.mark.parametrize("name", GOOD)
def test_schema_takes_good_documents(name: str) -> None:
    """The JSON Schema accepts what the program reads, also with all identities written out."""
    SCHEMA.validate(document(name))
    SCHEMA.validate(written(site.read_file(HERE / name), identities=True))


@settings(max_examples=25, deadline=None)
@given(sites())
def test_any_good_site_comes_back(made: Labelled) -> None:
    """Whatever valid site is written by hand, reading and writing it changes nothing."""
    found = site.read(json.dumps(made[0]))
    assert typed(written(found)) == typed(made[0])
    SCHEMA.validate(made[0])


def properties(schema: Any) -> set[str]:
    """All keys, and all words of choices, that a schema names."""
    found: set[str] = set()
    if isinstance(schema, list):
        return found.union(*map(properties, schema))
    if isinstance(schema, dict):
        found.update(schema.get("properties", {}))
        found.update(str(option) for option in schema.get("enum", []))
        return found.union(*map(properties, schema.values()))
    return found


def words(value: Any) -> set[str]:
    """All keys and texts of a document."""
    if isinstance(value, list):
        return set().union(*map(words, value))
    if isinstance(value, dict):
        return set(value).union(*map(words, value.values()))
    return {str(value)}


def test_every_key_is_tried() -> None:
    """The document of every key really has every key of the format, so that none escapes the round trip."""
    left_to_others = {
        "lrfr",
        "allowable stress",
        "SI",
        "last",
        "hot",
        "braced overhead",
        "at deck",
        "joints",
        "top chord",
    }
    left_to_others |= {"diagonal", "welded", "bolted", "longer leg", "shorter leg", "aashto 1997", "H5", "H10"}
    left_to_others |= {"good", "fair", "poor", "in plane"}
    assert properties(site_schema()) - words(document("every_key.json")) <= left_to_others


def test_byte_order_mark() -> None:
    """A file saved with a byte order mark reads as one without."""
    data = (HERE / "short_site.json").read_bytes()
    assert site.read(b"\xef\xbb\xbf" + data) == site.read(data) == site.read(data.decode())


def test_copy_has_the_values_of_its_original() -> None:
    """A truss that copies another has its joints and bars under its own name."""
    trusses = site.read_file(HERE / "short_site.json").bridge.trusses
    assert trusses["right"].bars == trusses["left"].bars
    assert (trusses["right"].name, trusses["right"].same_as) == ("right", "left")


def test_null_takes_a_crack_back() -> None:
    """A crack of null is told from an entry that does not speak of cracks."""
    entries = site.read_file(HERE / "every_key.json").journal.visits[0].entries
    assert entries[4].crack == CRACK_TAKEN_BACK
    assert entries[5].crack is None


def test_device_and_sequence_by_default() -> None:
    """An entry takes its visit's device, else `file`, and its place in the visit, counted from 1."""
    every, short = (
        site.read_file(HERE / name).journal.visits[0].entries for name in ("every_key.json", "short_site.json")
    )
    assert [(entry.device, entry.sequence) for entry in every[:3]] == [
        ("tablet 3", 7),
        ("tablet 2", 2),
        ("tablet 2", 3),
    ]
    assert [(entry.device, entry.sequence) for entry in short] == [("file", 1), ("file", 2)]


def test_ids_by_the_published_rule() -> None:
    """Ids that a file leaves out follow the rule of the format, so that any other program finds the same ones."""
    found = site.read_file(HERE / "short_site.json")
    given = document("short_site.json")["visits"][0]

    def made(*parts: Any) -> str:
        text = json.dumps(list(parts), sort_keys=True, separators=(",", ":"), ensure_ascii=False)
        return str(uuid.uuid5(NAMESPACE, text))

    bridge = made("bridge", "Sedge Mill footbridge", "SM-03")
    visit = made("visit", bridge, given["date"], given["inspector"], 1)
    entry = json.dumps(given["observations"][1], sort_keys=True, separators=(",", ":"), ensure_ascii=False)
    assert found.bridge.id == bridge
    assert found.journal.visits[0].id == visit
    assert found.journal.visits[0].entries[1].id == made("entry", visit, entry, 1)
    assert str(NAMESPACE) in site_schema()["description"]


def test_equals_are_counted() -> None:
    """Two visits of one day, and two equal entries of one visit, have ids of their own."""
    changed = document("short_site.json")
    changed["visits"].append(copy.deepcopy(changed["visits"][0]))
    changed["visits"][0]["observations"].append(changed["visits"][0]["observations"][0])
    visits = site.read_document(changed).journal.visits
    assert len({entry.id for visit in visits for entry in visit.entries}) == 5
    assert len({visit.id for visit in visits}) == 2
    unchanged = site.read_file(HERE / "short_site.json").journal.visits[0]
    assert visits[0].entries[0].id == unchanged.entries[0].id


def test_ids_stay_where_an_entry_is_put_between() -> None:
    """An entry written into the middle of a visit by hand leaves the ids of the others alone."""
    changed = document("short_site.json")
    changed["visits"][0]["observations"].insert(1, {"truss": "left", "bar": "L1-L2", "severed": True})
    before = site.read_file(HERE / "short_site.json").journal.visits[0].entries
    after = site.read_document(changed).journal.visits[0].entries
    assert [entry.id for entry in before] == [after[0].id, after[2].id]


@pytest.mark.parametrize("name", GOOD)
def test_identities_written_out_are_the_same_site(name: str) -> None:
    """A site that travels with its identities is the one that it left as, and has its fingerprint."""
    found = site.read_file(HERE / name)
    full = written(found, identities=True)
    again = site.read_document(full)
    assert written(again) == full
    assert [visit.id for visit in again.journal.visits] == [visit.id for visit in found.journal.visits]
    assert site.fingerprint(again.bridge, again.journal) == site.fingerprint(found.bridge, found.journal)
    entries = [entry for visit in full["visits"] for entry in visit["observations"]]
    assert all({"id", "device", "sequence"} <= entry.keys() for entry in entries)


def test_fingerprint_knows_no_order_of_records() -> None:
    """The same records give the same fingerprint in whatever order they were stored; another reading changes it."""
    full = written(site.read_file(HERE / "every_key.json"), identities=True)
    turned = copy.deepcopy(full)
    turned["visits"].reverse()
    turned["visits"][-1]["observations"].reverse()
    other = copy.deepcopy(full)
    other["visits"][0]["observations"][1]["readings"][0]["thickness"][0] = "0.22 in"
    first, second, third = (site.read_document(one) for one in (full, turned, other))
    assert site.fingerprint(first.bridge, first.journal) == site.fingerprint(second.bridge, second.journal)
    assert site.fingerprint(first.bridge, first.journal) != site.fingerprint(third.bridge, third.journal)


def test_canonical_json() -> None:
    """The canonical text has sorted keys, no spaces, its own characters, and no point in a whole number."""
    assert (
        site.canonical_json({"b": [1.0, 0.1, -0.0], "a": "ü ⁴", "B": None})
        == '{"B":null,"a":"ü ⁴","b":[1,0.1,0]}'.encode()
    )


def test_strange_values_are_kept() -> None:
    """An observation is never refused for its value: thicker than new, off the bar, negative, or a huge bow."""
    entries = site.read_file(HERE / "every_key.json").journal.visits[0].entries
    assert entries[1].readings is not None
    assert entries[1].readings[0].station == 1.2
    assert entries[1].readings[1].thickness[0].si == -0.001
    assert entries[2].estimated_loss == 1.4


def test_two_bars_between_the_same_joints() -> None:
    """A pair of bars side by side is no error."""
    bars = site.read_file(HERE / "every_key.json").bridge.trusses["north"].bars
    assert (bars[4].start, bars[4].end) == (bars[5].start, bars[5].end)


def test_file_that_is_not_there(tmp_path: Path) -> None:
    """A file that cannot be opened is named, as any other input that cannot be used."""
    with pytest.raises(InputError) as caught:
        site.read_file(tmp_path / "none.json")
    assert caught.value.source.endswith("none.json")
    with pytest.raises(InputError):
        site.read_file(tmp_path)


def test_file_that_is_too_large() -> None:
    """More than 20 MB is refused before anything is made of it."""
    with pytest.raises(InputError, match="20000000"):
        site.read(b" " * 20_000_001)
