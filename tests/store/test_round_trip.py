"""What comes out of the store is what went in."""

from __future__ import annotations

import json
from dataclasses import fields
from pathlib import Path
from typing import Any

import pytest
from hypothesis import HealthCheck, given, settings
from sqlalchemy import Table
from store.examples import EVERY_KEY, FEWEST, JSON, read
from strategies.sites import sites

from inspector.exchange import site
from inspector.store import journal_tables, open_store, structure_tables
from models import bridge as structure
from models import journal


def _stored(document: JSON, path: Path) -> None:
    before = read(document)
    with open_store(path) as store:
        store.save_bridge(before.bridge, before.journal)
    with open_store(path) as store:
        bridge, visits = store.load(before.bridge.id)
    assert bridge == before.bridge
    assert visits == before.journal
    assert site.write(bridge, visits) == document
    assert json.dumps(site.write(bridge, visits)) == json.dumps(site.write(before.bridge, before.journal))
    assert site.fingerprint(bridge, visits) == site.fingerprint(before.bridge, before.journal)


@pytest.mark.parametrize("document", [EVERY_KEY, FEWEST], ids=["every key", "fewest keys"])
def test_a_site_comes_back_as_it_was(document: JSON, tmp_path: Path) -> None:
    """Values, texts, the order of names, whole numbers and decimals, empty lists and absent ones all survive."""
    _stored(document, tmp_path / "store.db")


@given(sites())
@settings(
    max_examples=25, deadline=None, suppress_health_check=[HealthCheck.function_scoped_fixture, HealthCheck.too_slow]
)
def test_any_site_comes_back_as_it_was(tmp_path: Path, drawn: tuple[JSON, frozenset[str]]) -> None:
    """Sites of many kinds come back with the same values and the same fingerprint."""
    path = tmp_path / "store.db"
    path.unlink(missing_ok=True)
    _stored(drawn[0], path)


def test_the_order_of_joints_and_bars_is_the_order_of_the_file(tmp_path: Path) -> None:
    """Joint order numbers the equations, so it may not become alphabetical on the way."""
    before = read(FEWEST)
    with open_store(tmp_path / "store.db") as store:
        store.save_bridge(before.bridge, before.journal)
        bridge, _ = store.load(before.bridge.id)
    assert list(bridge.trusses["near"].joints) == ["B", "A", "T"]
    assert [bar.id for bar in bridge.trusses["near"].bars] == ["2", "1", "3"]


def test_one_and_one_point_nought_stay_apart(tmp_path: Path) -> None:
    """A number written as 1 is not written back as 1.0, nor the other way round."""
    before = read(EVERY_KEY)
    with open_store(tmp_path / "store.db") as store:
        store.save_bridge(before.bridge, before.journal)
        bridge, _ = store.load("bridge 9")
    bar = bridge.trusses["near"].bar["2"]
    assert [repr(value) for value in (bar.k_in_plane, bar.k_out_of_plane, bar.net_area, bar.shear_lag)] == [
        "1",
        "1.0",
    ] * 2


@pytest.mark.parametrize(
    ("value", "row", "elsewhere"),
    [
        (structure.Material, structure_tables.MaterialRow, set()),
        (structure.Section, structure_tables.SectionRow, {"dimensions"}),
        (structure.Bar, structure_tables.BarRow, set()),
        (structure.Truss, structure_tables.TrussRow, {"joints", "supports", "bars", "deck_joints"}),
        (structure.Deck, structure_tables.DeckRow, {"offset"}),
        (structure.RatingRules, structure_tables.RulesRow, {"live"}),
        (structure.LiveLoad, structure_tables.LiveLoadRow, {"axles", "companions"}),
        (structure.Axle, structure_tables.AxleRow, set()),
        (structure.Companion, structure_tables.CompanionRow, set()),
        (structure.Footbridge, structure_tables.BridgeRow, {"materials", "sections", "trusses", "deck", "rating"}),
        (journal.Visit, journal_tables.VisitRow, {"entries", "calls"}),
        (journal.Call, journal_tables.CallRow, set()),
        (journal.Entry, journal_tables.EntryRow, set()),
    ],
    ids=lambda value: getattr(value, "__name__", ""),
)
def test_every_field_has_a_column(value: type[Any], row: Any, elsewhere: set[str]) -> None:
    """A field that is added to a value and forgotten in the tables would be lost without a word."""
    table: Table = row.__table__
    columns = {name.removesuffix("_text") for name in table.columns.keys()}  # noqa: SIM118 (not a dict)
    assert {field.name for field in fields(value)} - elsewhere <= columns
