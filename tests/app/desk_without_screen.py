"""What presenter tests share: a store with a sample, and work that is done at once."""

from __future__ import annotations

import json
from collections.abc import Callable
from pathlib import Path
from typing import TypeVar

from inspector import samples
from inspector.app.shelf import Shelf
from inspector.app.worker import Failure, outcome_of
from inspector.exchange import site
from inspector.exchange.site import Site
from inspector.store import open_store

Result = TypeVar("Result")

SAMPLE = "pratt-half-through"
DAY = "2031-05-06"


class AtOnce:
    """A worker that does everything when it is asked."""

    def __init__(self) -> None:
        self.forgotten: list[str] = []

    def ask(self, job: Callable[[], Result], then: Callable[[Result | Failure], None], topic: str = "") -> None:
        """Do it now."""
        then(outcome_of(job))

    def forget(self, topic: str) -> None:
        """Keep what was forgotten."""
        self.forgotten.append(topic)


class Later:
    """A worker that does nothing until it is told to, in any order."""

    def __init__(self) -> None:
        self.jobs: list[Callable[[], None]] = []

    def ask(self, job: Callable[[], Result], then: Callable[[Result | Failure], None], topic: str = "") -> None:
        """Keep it."""
        self.jobs.append(lambda: then(outcome_of(job)))

    def forget(self, topic: str) -> None:
        """Nothing is dropped here."""

    def run(self, count: int = 1) -> None:
        """Do the oldest jobs."""
        for _ in range(count):
            self.jobs.pop(0)()


def shelf(folder: Path, day: str = DAY, device: str = "tablet a") -> Shelf:
    """A shelf over a new store."""
    return Shelf(open_store(folder / "store.db"), device, lambda: day)


def without_visits(found: Site) -> Site:
    """The same bridge, nobody has visited it."""
    document = site.write(found.bridge, found.journal)
    document["visits"] = []
    return site.read(json.dumps(document))


def sample() -> Site:
    """The sample that most tests use."""
    return samples.sample(SAMPLE)
