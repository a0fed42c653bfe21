"""The sample sites, rated once for all tests of a process."""

from __future__ import annotations

from functools import cache
from pathlib import Path

from report.read_back import Pages, read

from inspector import desk
from inspector.desk import Rated

FOLDER = Path(__file__).parents[2] / "sample_sites"
NAMES = tuple(sorted(path.stem for path in FOLDER.glob("*.json")))


@cache
def rated(name: str) -> Rated:
    """A sample site, rated."""
    return desk.rate(desk.check(FOLDER / f"{name}.json"))


@cache
def pages(name: str) -> Pages:
    """Its report, read back."""
    return read(desk.report(rated(name)))
