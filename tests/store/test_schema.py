"""Which files are opened, which are refused, and how old ones are brought up to date."""

from __future__ import annotations

import os
import shutil
import sqlite3
import subprocess
import sys
from contextlib import closing
from pathlib import Path

import pytest
from store.examples import EVERY_KEY, read

from inspector.store import StoreError, open_store
from inspector.store.connection import make_engine
from inspector.store.schema import REVISIONS, settle, upgrade

NEXT = """
from alembic import op

revision = "0002"
down_revision = "0001"


def upgrade() -> None:
    with op.batch_alter_table("bridge", recreate="always") as table:
        table.alter_column("locality", new_column_name="place")
"""


def _schema(path: Path) -> dict[str, list[str]]:
    """Every table, index and trigger by name; the order of constraints within a table says nothing."""
    with closing(sqlite3.connect(path)) as connection:
        rows = connection.execute("SELECT name, sql FROM sqlite_master").fetchall()
    return {name: sorted(line.strip().rstrip(",") for line in (sql or "").splitlines()) for name, sql in rows}


def _every_key(path: Path) -> None:
    site = read(EVERY_KEY)
    with open_store(path) as store:
        store.save_bridge(site.bridge, site.journal)


def test_migrations_make_what_the_tables_say(tmp_path: Path) -> None:
    """A new store and one that went through every migration have the same tables, keys, indexes and triggers."""
    open_store(tmp_path / "new.db").close()
    upgrade(tmp_path / "migrated.db")
    assert _schema(tmp_path / "migrated.db") == _schema(tmp_path / "new.db")
    _every_key(tmp_path / "migrated.db")


def test_opening_a_store_imports_no_migrations(tmp_path: Path) -> None:
    """Neither making a store nor opening it costs the import of alembic."""
    program = (
        "import sys; from pathlib import Path; from inspector.store import open_store\n"
        "for _ in range(2): open_store(Path(sys.argv[1])).close()\n"
        "print(sorted(name for name in ('alembic', 'mako', 'sqlalchemy') if name in sys.modules))"
    )
    arguments = [sys.executable, "-W", "error", "-c", program, str(tmp_path / "store.db")]
    done = subprocess.run(arguments, capture_output=True, text=True, check=False, env=_here())
    assert (done.stdout.strip(), done.stderr) == ("['sqlalchemy']", "")


def test_a_store_that_is_behind_is_brought_up_to_date(tmp_path: Path) -> None:
    """A later version changes the tables with nothing lost, keeps a copy, and leaves the journal append-only."""
    path = tmp_path / "store.db"
    _every_key(path)
    later = tmp_path / "later"
    later.mkdir()
    (later / "0002_next.py").write_text(NEXT)
    upgrade(path, [str(later)])
    with closing(sqlite3.connect(path)) as connection:
        assert connection.execute("SELECT version_num FROM alembic_version").fetchone() == ("0002",)
        assert connection.execute("SELECT place FROM bridge").fetchone() == ("valley",)
        assert connection.execute("SELECT count(*) FROM entry").fetchone() == (14,)
        assert connection.execute("PRAGMA foreign_key_check").fetchall() == []
        with pytest.raises(sqlite3.IntegrityError, match="never changed"):
            connection.execute("DELETE FROM entry")


def test_a_copy_is_kept_before_a_store_is_changed(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """Before the first migration the store is copied beside itself, as its old version."""
    path = tmp_path / "store.db"
    _every_key(path)
    seen: list[tuple[str, ...]] = []
    monkeypatch.setattr("inspector.store.schema.upgrade", lambda _: seen.append(_versions(copy)))
    copy = tmp_path / "store.db.version-0001"
    engine = make_engine(path)
    settle(path, engine, (*REVISIONS, "0002"))
    engine.dispose()
    assert seen == [("0001",)]
    assert _schema(copy) == _schema(path)


def _versions(path: Path) -> tuple[str, ...]:
    with closing(sqlite3.connect(path)) as connection:
        return tuple(row[0] for row in connection.execute("SELECT version_num FROM alembic_version"))


def test_a_newer_programs_store_is_refused(tmp_path: Path) -> None:
    """A store of a newer program is left as it is, and the message says to update."""
    path = tmp_path / "store.db"
    _every_key(path)
    with closing(sqlite3.connect(path)) as connection:
        connection.execute("UPDATE alembic_version SET version_num = '0999'")
        connection.commit()
    before = path.read_bytes()
    with pytest.raises(StoreError, match=r"newer version .*0999.* Update this program"):
        open_store(path)
    assert path.read_bytes() == before


def test_another_programs_database_is_left_alone(tmp_path: Path) -> None:
    """A database of another program gets no tables of ours and is not changed in a byte."""
    path = tmp_path / "other.db"
    with closing(sqlite3.connect(path)) as connection:
        connection.execute("CREATE TABLE recipes (name)")
    before = path.read_bytes()
    with pytest.raises(StoreError, match="database of another program"):
        open_store(path)
    assert path.read_bytes() == before


def test_a_file_that_is_no_database_is_named(tmp_path: Path) -> None:
    """A text file given as the store is refused in words and kept."""
    path = tmp_path / "site.json"
    path.write_text('{"format": "truss-footbridge/1"}' * 100)
    with pytest.raises(StoreError, match="is not a store of this program, nor any database"):
        open_store(path)
    assert path.read_text().startswith('{"format"')


@pytest.mark.parametrize("share", [0.999, 0.7, 0.3, 0.03])
def test_a_store_that_was_cut_off_is_refused(tmp_path: Path, share: float) -> None:
    """A store of which only the beginning was copied is refused as damaged, not half opened."""
    _every_key(tmp_path / "whole.db")
    data = (tmp_path / "whole.db").read_bytes()
    path = tmp_path / "cut.db"
    path.write_bytes(data[: int(len(data) * share)])
    with pytest.raises(StoreError, match=r"is damaged|nor any database"):
        open_store(path)


def test_a_store_with_a_spoilt_page_is_refused(tmp_path: Path) -> None:
    """Rubbish in the middle of the file is found at opening, before an entry is added to it."""
    path = tmp_path / "store.db"
    _every_key(path)
    data = bytearray(path.read_bytes())
    middle = len(data) // 2 // 4096 * 4096
    data[middle : middle + 4096] = b"\xa5" * 4096
    path.write_bytes(data)
    with pytest.raises(StoreError, match="is damaged"):
        open_store(path)


def test_a_folder_and_a_missing_folder_are_named(tmp_path: Path) -> None:
    """A path that cannot be a file gets its own words."""
    with pytest.raises(StoreError, match="is a folder"):
        open_store(tmp_path)
    with pytest.raises(StoreError, match=r"does not exist\. Make that folder first"):
        open_store(tmp_path / "nowhere" / "store.db")


def test_a_store_without_a_version_is_refused(tmp_path: Path) -> None:
    """A store that lost the mark of its version is damaged, whatever else is whole."""
    path = tmp_path / "store.db"
    _every_key(path)
    with closing(sqlite3.connect(path)) as connection:
        connection.execute("DELETE FROM alembic_version")
        connection.commit()
    with pytest.raises(StoreError, match=r"is damaged \(no version\)"):
        open_store(path)


def test_an_empty_file_becomes_a_store(tmp_path: Path) -> None:
    """An empty file, as some file dialogs make it first, is a new store."""
    path = tmp_path / "store.db"
    path.touch()
    open_store(path).close()
    assert _versions(path) == ("0001",)


def test_a_store_that_cannot_be_written_is_refused(tmp_path: Path) -> None:
    """A read-only store is refused at opening, not at the first entry."""
    _every_key(tmp_path / "store.db")
    helper = Path(__file__).with_name("read_only.py")
    arguments = [sys.executable, "-W", "error", str(helper), str(tmp_path / "store.db")]
    done = subprocess.run(arguments, capture_output=True, text=True, check=False, env=_here())
    assert done.stderr == ""
    assert "cannot be written. Allow writing" in done.stdout


def _here() -> dict[str, str]:
    """The environment of a process that finds what this one finds."""
    return os.environ | {"PYTHONPATH": os.pathsep.join(sys.path)}


def test_a_store_may_lie_under_any_name(tmp_path: Path) -> None:
    """Spaces, percent signs, question marks and letters beyond ASCII in the path do no harm."""
    folder = tmp_path / "büro 100% ?#"
    folder.mkdir()
    path = folder / "store ü.db"
    _every_key(path)
    assert _versions(path) == ("0001",)
    shutil.copy(path, folder / "b.db")
    upgrade(folder / "b.db")
