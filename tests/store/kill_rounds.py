"""Kill a process that logs as fast as it can, again and again, and look at what is left. Run by itself.

Each round forks a child from this warm process. The child opens the store, logs, and says each entry's
sequence and id through a pipe once `log` has returned; the parent kills it (SIGKILL) at a random moment,
opens the store and prints one line of JSON about it.
"""

from __future__ import annotations

import itertools
import json
import os
import random
import select
import shutil
import signal
import sqlite3
import sys
import time
import traceback
from contextlib import closing
from dataclasses import replace
from pathlib import Path
from typing import Any, NoReturn

from store.examples import FEWEST, read

from inspector.store import Store, open_store
from inspector.visit import Logbook
from models.journal import Entry, Journal, Photo, Reading, Visit
from models.quantity import Quantity

SITE = read(FEWEST)
VISIT = Visit("the visit", "2026-05-14")
DEVICE = "tablet"


def what(sequence: int) -> dict[str, Any]:
    """Return what the entry of this sequence says: enough of it that half of it would show."""
    thickness = (Quantity(f"{sequence} mm", sequence / 1000), Quantity("5/16 in", 0.0079375))
    return {
        "seen": "hands on",
        "readings": (
            Reading(0.5, "bar", thickness, cleaned=True),
            Reading(1, "bar", thickness, Quantity("0.4 m", 0.4)),
        ),
        "note": f"entry {sequence} " + "x" * (sequence % 50 * 40),
        "photos": (Photo(f"{sequence}.jpg", "0" * 64),),
    }


def prepare(store: Store) -> None:
    """Put a bridge and a visit into an empty store."""
    store.save_bridge(SITE.bridge, Journal((VISIT,)))


def log_for_ever(path: Path, acknowledge: int) -> None:
    """Open or make the store and log until killed."""
    with open_store(path) as store:
        if not store.bridges():
            prepare(store)
        logbook = Logbook(store, SITE.bridge, VISIT, DEVICE)
        for sequence in itertools.count(store.next_sequence(SITE.bridge.id, VISIT.id, DEVICE)):
            entry = logbook.log("near", "2", at="now", **what(sequence))
            os.write(acknowledge, f"{entry.sequence} {entry.id}\n".encode())


def child(path: Path, acknowledge: int) -> NoReturn:
    """Log until killed; whatever else ends it is a failure that shows in the exit status."""
    try:
        log_for_ever(path, acknowledge)
    except BaseException:  # noqa: BLE001 (a forked child may not return into the parent's code)
        traceback.print_exc()
    finally:
        os._exit(70)


def kill_at_random(path: Path, chance: random.Random) -> list[tuple[int, str]]:
    """Run one child and kill it; returns what it acknowledged."""
    ours, theirs = os.pipe()
    pid = os.fork()
    if pid == 0:
        os.close(ours)
        child(path, theirs)
    os.close(theirs)
    if chance.random() < 0.7:
        select.select([ours], [], [], 10)
    time.sleep(chance.uniform(0.001, 0.040))
    os.kill(pid, signal.SIGKILL)
    _, status = os.waitpid(pid, 0)
    if not os.WIFSIGNALED(status):
        raise SystemExit(f"the child ended by itself, status {status}")
    with os.fdopen(ours) as pipe:
        lines = [line.split() for line in pipe if line.endswith("\n")]
    return [(int(sequence), identity) for sequence, identity in lines]


def left(path: Path) -> tuple[Entry, ...]:
    """Return the entries that the store holds after the kill, in order; it has to open as any other does."""
    with open_store(path) as store:
        visits = store.journal(SITE.bridge.id).visits
    return visits[0].entries if visits else ()


def is_whole(entry: Entry, sequence: int) -> bool:
    """Tell whether every field of an entry is as it was logged."""
    said = Entry(entry.id, "near", "2", DEVICE, sequence, at="now", **what(sequence))
    return entry == replace(said, written=entry.written)


def round_of(path: Path, before: int, chance: random.Random) -> dict[str, Any]:
    """Kill once and describe what is left in a store that held so many entries before."""
    acknowledged = kill_at_random(path, chance)
    entries = left(path)
    with closing(sqlite3.connect(path)) as connection:
        integrity = connection.execute("PRAGMA integrity_check").fetchone()[0]
    stored = [(entry.sequence, entry.id) for entry in entries[before:]]
    return {
        "acknowledged": len(acknowledged),
        "in order": stored[: len(acknowledged)] == acknowledged,
        "stored": len(entries),
        "more": len(stored) - len(acknowledged),
        "whole": all(is_whole(entry, place) for place, entry in enumerate(entries, start=1)),
        "integrity": integrity,
    }


def main(folder: Path, rounds: int, seed: int) -> None:
    """Kill in stores that are there, in one that has been killed in before, and in one that is being made."""
    chance = random.Random(seed)  # noqa: S311 (moments, not secrets)
    with open_store(folder / "prepared.db") as store:
        prepare(store)
    before = 0
    for number in range(rounds):
        kind = ("prepared", "again", "new")[number % 3]
        path = folder / (f"{number}.db" if kind != "again" else f"{number - 1}.db")
        if kind == "prepared":
            shutil.copyfile(folder / "prepared.db", path)
        found = round_of(path, before if kind == "again" else 0, chance)
        before = found["stored"]
        sys.stdout.write(json.dumps({"kind": kind, **found}) + "\n")


if __name__ == "__main__":
    main(Path(sys.argv[1]), int(sys.argv[2]), int(sys.argv[3]))
