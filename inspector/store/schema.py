"""The version of the tables in a file: looking, making, bringing up to date, refusing.

Looking reads alone. Alembic is imported only where a file is behind: a tablet that opens its own
store never pays for it.
"""

from __future__ import annotations

import os
import sqlite3
from collections.abc import Sequence
from contextlib import closing
from pathlib import Path
from typing import Final

from sqlalchemy import Column, Engine, PrimaryKeyConstraint, String, Table, insert, inspect
from sqlalchemy.orm import Session

from inspector.store.connection import make_engine, writing
from inspector.store.errors import StoreError
from inspector.store.journal_tables import APPEND_ONLY

APPLICATION: Final = 0x54464249
"""Written into the file's head: tells a store of this program from any other SQLite database."""

REVISIONS: Final = ("0001",)
"""The versions of the tables, oldest first; the last is this program's."""

METADATA: Final = APPEND_ONLY[0].metadata
"""All tables; the journal's rest on those of the structure, so importing them defines both."""

_MIGRATIONS: Final = Path(__file__).parent / "migrations"

_version = Table(
    "alembic_version",
    METADATA,
    Column("version_num", String(32), nullable=False),
    PrimaryKeyConstraint("version_num", name="alembic_version_pkc"),
)


def settle(path: Path, engine: Engine, revisions: Sequence[str] = REVISIONS) -> None:
    """Make sure that the file holds the tables of this program.

    Raises
    ------
    StoreError
        If it is another program's, a newer program's, or damaged.
    """
    version = look(path)
    if version is None:
        create(engine)
    elif version not in revisions:
        raise StoreError(
            f"{path} was written by a newer version of this program (its tables are version {version}, this program "
            f"knows up to {revisions[-1]}). It was left as it is. Update this program, or give another store."
        )
    elif version != revisions[-1]:
        back_up(path, path.with_name(f"{path.name}.version-{version}"))
        upgrade(path)


def look(path: Path) -> str | None:
    """The version of the tables in a file; None where there is no file yet, or an empty one.

    Raises
    ------
    StoreError
        If the file is another program's, or damaged.
    """
    if path.is_dir():
        raise StoreError(f"{path} is a folder. Give the path of a file in it.")
    if not path.parent.is_dir():
        raise StoreError(f"{path.parent} does not exist. Make that folder first, or give another path.")
    if not path.exists() or path.stat().st_size == 0:
        return None
    with closing(sqlite3.connect(f"{path.absolute().as_uri()}?mode=rw", uri=True)) as connection:
        application = connection.execute("PRAGMA application_id").fetchone()[0]
        tables = connection.execute("SELECT count(*) FROM sqlite_master").fetchone()[0]
        if application == 0 and tables == 0:
            return None
        if application != APPLICATION:
            raise StoreError(
                f"{path} is a database of another program; it was left as it is. Give the path of a store, or of a "
                "new file."
            )
        version = connection.execute("SELECT version_num FROM alembic_version").fetchone()
        found = connection.execute("PRAGMA quick_check(1)").fetchone()[0] if version else "no version"
        if found != "ok":
            raise StoreError(
                f"{path} is damaged ({found}). Keep a copy of the file as it is; then use the last backup, or read the "
                "exported site files into a new store."
            )
        return str(version[0])


def create(engine: Engine) -> None:
    """Make all tables and triggers in an empty file, in one transaction, stamped with the version."""
    with Session(writing(engine)) as session, session.begin():
        connection = session.connection()
        if inspect(connection).get_table_names():
            return  # another process was faster by a moment
        METADATA.create_all(connection, checkfirst=False)
        connection.execute(insert(_version), [{"version_num": REVISIONS[-1]}])
        connection.exec_driver_sql(f"PRAGMA application_id = {APPLICATION}")


def upgrade(path: Path, locations: Sequence[str] = ()) -> None:
    """Run the migrations that the file has not seen, all in one transaction.

    Foreign keys rest meanwhile, since a table may have to be made anew, and are looked at in the end.
    ``locations`` are further folders of migrations.
    """
    from alembic import command  # noqa: PLC0415 (only where a file is behind)
    from alembic.config import Config  # noqa: PLC0415

    config = Config()
    config.set_main_option("script_location", str(_MIGRATIONS))
    config.set_main_option("path_separator", "os")
    config.set_main_option("version_locations", os.pathsep.join([str(_MIGRATIONS / "versions"), *locations]))
    config.set_main_option("sourceless", str(__file__.endswith(".pyc")).lower())
    engine = make_engine(path, foreign_keys=False)
    try:
        with writing(engine).begin() as connection:
            config.attributes["connection"] = connection
            command.upgrade(config, "head")
            connection.exec_driver_sql(f"PRAGMA application_id = {APPLICATION}")
            dangling = connection.exec_driver_sql("PRAGMA foreign_key_check").fetchall()
            if dangling:
                raise StoreError(f"{path} could not be brought up to date: {len(dangling)} rows would point nowhere.")
    finally:
        engine.dispose()


def back_up(path: Path, copy: Path) -> None:
    """Copy a store that may be open: by the database's own means, never as a file."""
    with closing(sqlite3.connect(path)) as source, closing(sqlite3.connect(copy)) as target:
        source.backup(target)
