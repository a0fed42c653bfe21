"""Connections to the file: what each one is told, how a transaction begins, what an error means."""

from __future__ import annotations

import sqlite3
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import Any, Final

from sqlalchemy import URL, Connection, Engine, create_engine, event
from sqlalchemy.exc import DBAPIError
from sqlalchemy.pool import QueuePool

from inspector.store.errors import StoreError

BUSY_TIMEOUT: Final = 5000
"""How long to wait for another program that is writing, ms."""

_BEGIN: Final = "footbridge_begin"

_MEANINGS: Final = {
    sqlite3.SQLITE_BUSY: "is in use by another program, which did not let go within 5 seconds. "
    "Close the other program and try again.",
    sqlite3.SQLITE_LOCKED: "is in use by another program. Close the other program and try again.",
    sqlite3.SQLITE_READONLY: "cannot be written. Allow writing to the file and its folder, "
    "or copy it to a place that can be written.",
    sqlite3.SQLITE_IOERR: "could not be read or written: the storage reported an error. "
    "Copy the file to other storage before anything else.",
    sqlite3.SQLITE_CORRUPT: "is damaged. Keep a copy of the file as it is; "
    "then use the last backup, or read the exported site files into a new store.",
    sqlite3.SQLITE_FULL: "could not grow: the storage is full. Make room and try again.",
    sqlite3.SQLITE_CANTOPEN: "cannot be opened. See that its folder exists and that you may write in it.",
    sqlite3.SQLITE_PERM: "cannot be opened. See that you may read and write it.",
    sqlite3.SQLITE_NOTADB: "is not a store of this program, nor any database. "
    "Give the path of a store, or of a new file.",
}


def make_engine(path: Path, *, foreign_keys: bool = True) -> Engine:
    """An engine on this file. Dispose of it, or a connection is left open.

    Transactions begin by an explicit BEGIN, because the driver's own way of beginning them differs
    between Python 3.11 and 3.13 and leaves the definition of tables outside.
    """
    engine = create_engine(URL.create("sqlite", database=str(path.absolute())), poolclass=QueuePool, pool_size=2)

    def settle(connection: sqlite3.Connection, _record: object) -> None:
        connection.isolation_level = None
        connection.execute(f"PRAGMA busy_timeout = {BUSY_TIMEOUT}")
        connection.execute(f"PRAGMA foreign_keys = {'ON' if foreign_keys else 'OFF'}")
        connection.execute("PRAGMA journal_mode = WAL")
        connection.execute("PRAGMA synchronous = FULL")

    event.listen(engine, "connect", settle)
    event.listen(engine, "begin", _begin)
    return engine


def writing(engine: Engine) -> Engine:
    """The same connections, each transaction taking the right to write before it reads anything."""
    return engine.execution_options(**{_BEGIN: "BEGIN IMMEDIATE"})


@contextmanager
def explained(path: Path) -> Iterator[None]:
    """Turn what the database says into a `StoreError` that names the file and the next step."""
    try:
        yield
    except DBAPIError as error:
        raise StoreError(_explain(path, error.orig)) from error
    except sqlite3.Error as error:
        raise StoreError(_explain(path, error)) from error
    except OSError as error:
        raise StoreError(
            f"{path} cannot be reached: {error.strerror}. See that you may read and write there."
        ) from error
    except (OverflowError, UnicodeEncodeError) as error:
        raise StoreError(
            f"{path}: a value cannot be stored ({error}): a number has more than 18 digits, or a text holds half a "
            "character. Nothing was stored. Correct the value and try again."
        ) from error


def _begin(connection: Connection) -> None:
    options: dict[str, Any] = dict(connection.get_execution_options())
    connection.exec_driver_sql(options.get(_BEGIN, "BEGIN"))


def _explain(path: Path, error: BaseException | None) -> str:
    code = getattr(error, "sqlite_errorcode", 0) & 0xFF
    if code == sqlite3.SQLITE_CONSTRAINT:
        return f"{path}: {error}. Nothing was stored."
    return f"{path} {_MEANINGS.get(code, f'cannot be used: {error}.')}"
