"""What the file itself guarantees, whatever program opens it."""

from __future__ import annotations

import sqlite3
from collections.abc import Iterator
from contextlib import closing
from pathlib import Path

import pytest
from store.examples import EVERY_KEY, read

from inspector.store import StoreError, open_store
from inspector.store.connection import make_engine
from inspector.store.schema import METADATA

TABLES = ("visit", "call", "entry", "rating")


@pytest.fixture
def raw(tmp_path: Path) -> Iterator[sqlite3.Connection]:
    """A store with visits, calls, entries and a rating, opened by nothing but the database's own driver."""
    path = tmp_path / "store.db"
    site = read(EVERY_KEY)
    with open_store(path) as store:
        store.save_bridge(site.bridge, site.journal)
        store.keep_rating(site.bridge.id, {"inputs sha256": "f", "program": "p"})
    with closing(sqlite3.connect(path)) as connection:
        yield connection


def _everything(connection: sqlite3.Connection) -> list[list[tuple[object, ...]]]:
    return [connection.execute(f"SELECT * FROM {table}").fetchall() for table in TABLES]  # noqa: S608 (our own names)


@pytest.mark.parametrize("table", TABLES)
@pytest.mark.parametrize(
    "statement",
    [
        "UPDATE {table} SET bridge_id = bridge_id",
        "UPDATE OR REPLACE {table} SET bridge_id = 'other'",
        "DELETE FROM {table}",
        "INSERT OR REPLACE INTO {table} SELECT * FROM {table}",
        "REPLACE INTO {table} SELECT * FROM {table} LIMIT 1",
    ],
)
def test_what_was_written_down_cannot_be_changed(raw: sqlite3.Connection, table: str, statement: str) -> None:
    """UPDATE, DELETE and the REPLACE that goes round both are refused by the tables themselves."""
    before = _everything(raw)
    assert all(before)
    with pytest.raises(sqlite3.IntegrityError, match=f"{table} is (never changed or removed|stored already)"):
        raw.execute(statement.format(table=table))
    raw.rollback()
    assert _everything(raw) == before


@pytest.mark.parametrize("column", ["ordinal", "id"])
@pytest.mark.parametrize("table", ["visit", "entry"])
def test_no_second_key_lets_a_row_be_replaced(raw: sqlite3.Connection, table: str, column: str) -> None:
    """REPLACE by the id alone, and by the place alone, is refused as well."""
    names = [row[1] for row in raw.execute(f"PRAGMA table_info({table})")]
    other = {"ordinal": "'another'", "id": "99"}[column]
    changed = {"ordinal": "id", "id": "ordinal"}[column]
    values = ", ".join(other if name == changed else f'"{name}"' for name in names)
    with pytest.raises(sqlite3.IntegrityError, match="stored already"):
        raw.execute(f"INSERT OR REPLACE INTO {table} SELECT {values} FROM {table} LIMIT 1")  # noqa: S608 (our own names)


def test_every_connection_is_told_how_to_keep_what_it_is_given(tmp_path: Path) -> None:
    """Foreign keys hold, a commit is on the disk when it returns, readers do not wait, a busy file is waited for."""
    engine = make_engine(tmp_path / "store.db")
    try:
        with engine.connect() as connection:
            asked = {
                name: connection.exec_driver_sql(f"PRAGMA {name}").scalar()
                for name in ("foreign_keys", "journal_mode", "synchronous", "busy_timeout")
            }
    finally:
        engine.dispose()
    assert asked == {"foreign_keys": 1, "journal_mode": "wal", "synchronous": 2, "busy_timeout": 5000}


def test_a_bar_that_is_not_there_cannot_be_spoken_of(tmp_path: Path) -> None:
    """An entry about a bar that the bridge lacks is refused by its foreign key, and nothing of it stays."""
    site = read(EVERY_KEY)
    visit = site.journal.visits[0]
    with open_store(tmp_path / "store.db") as store:
        store.save_bridge(site.bridge, site.journal)
        stray = type(visit.entries[0])("stray", "near", "no such bar", "a", 1)
        with pytest.raises(StoreError, match=r"FOREIGN KEY.*Nothing was stored"):
            store.append(site.bridge.id, visit.id, stray)
        assert store.load(site.bridge.id)[1] == site.journal


def test_every_constraint_has_a_name(raw: sqlite3.Connection) -> None:
    """A later migration can speak of every key and index by its name."""
    unnamed = [
        constraint for table in METADATA.tables.values() for constraint in table.constraints if not constraint.name
    ]
    assert not unnamed
    sql = "\n".join(row[0] for row in raw.execute("SELECT sql FROM sqlite_master WHERE type = 'table'"))
    keys = sql.count("PRIMARY KEY") + sql.count("FOREIGN KEY") + sql.count("UNIQUE")
    assert sql.count("CONSTRAINT") == keys
    automatic = raw.execute(
        "SELECT name FROM sqlite_master WHERE type = 'index' AND sql IS NOT NULL AND name NOT LIKE 'ix_%'"
    ).fetchall()
    assert not automatic
