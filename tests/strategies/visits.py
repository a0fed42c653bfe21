"""Damage that visits record: even losses read or guessed, bars severed where the truss stands without, replaced."""

from __future__ import annotations

from typing import Any

from strategies import sections
from strategies.choices import Choices
from strategies.frames import Truss

JSON = dict[str, Any]
DATES = ("2022-05-10", "2024-06-03", "2026-05-14")


def readings(writer: Any, bar: JSON, left: float, station: float, extent: str | None, cleaned: bool) -> list[JSON]:
    """Return readings on every plate of a bar that leave the same share of each."""
    found = []
    for plate, thickness in sections.plates(bar["section"]).items():
        shape = writer.small(thickness * left)
        reading: JSON = {
            "station": station,
            "plate": plate,
            "thickness": [shape],
            "instrument": "gauge",
            "cleaned": cleaned,
        }
        if extent is not None:
            reading["extent"] = extent
        found.append(reading)
    return found


def _read(choices: Choices, bar: JSON, labels: set[str], writer: Any) -> list[tuple[int, JSON]]:
    """Return one to three visits' entries on one bar: read, perhaps read again, perhaps guessed afterwards."""
    labels.add("readings")
    left = choices.whole(70, 96) / 100
    station = choices.pick((0.5, 0.0, 0.3, 1.0))
    extent = writer.length(choices.whole(200, 1500))
    if choices.chance(0.15):
        extent = None
        labels.add("reading of unknown extent")
    cleaned = choices.chance(0.6)
    first: JSON = {"readings": readings(writer, bar, left, station, extent, cleaned)}
    if choices.chance(0.6):
        first["state"] = choices.pick(("good", "fair", "poor", "severe"))
    entries: list[tuple[int, JSON]] = [(0, first)]
    if choices.chance(0.3):
        labels.add("read again")
        again = readings(writer, bar, left - 0.05, station, extent, cleaned)
        entries.append((1, {"readings": again, "state": "poor"}))
    if choices.chance(0.2):
        entries.append((2, {"estimated loss": choices.whole(5, 25) / 100, "note": "rust in the pocket"}))
    if choices.chance(0.2):
        entries.append((2, {"seen": "at a distance", "state": choices.pick(("fair", "severe"))}))
    return entries


def _guess(choices: Choices, labels: set[str], writer: Any) -> list[tuple[int, JSON]]:
    labels.add("estimated loss")
    entry: JSON = {"estimated loss": choices.whole(5, 35) / 100}
    if choices.chance(0.5):
        entry |= {"extent": writer.length(choices.whole(200, 1500)), "station": choices.pick((0.5, 0.1, 1.0))}
    return [(choices.whole(0, 2), entry)]


def _replace(choices: Choices, bar: JSON, labels: set[str], writer: Any) -> list[tuple[int, JSON]]:
    labels.add("replaced")
    new = choices.pick(("box 150", "box 100", "pipe 168"))
    entries: list[tuple[int, JSON]] = [(0, {"estimated loss": 0.3, "state": "severe"})]
    entries.append((1, {"replaced": {"section": new, "material": bar["material"]}}))
    if choices.chance(0.5):
        fresh = readings(writer, {"section": new}, 0.93, 0.5, writer.length(400), cleaned=True)
        entries.append((2, {"readings": fresh, "state": "good"}))
    return entries


def _on(choices: Choices, bar: JSON, labels: set[str], writer: Any) -> list[tuple[int, JSON]]:
    kind = choices.pick(("look", "read", "read", "guess", "replace", "state"))
    if kind == "read":
        return _read(choices, bar, labels, writer)
    if kind == "guess":
        return _guess(choices, labels, writer)
    if kind == "replace":
        return _replace(choices, bar, labels, writer)
    if kind == "state":
        return [(choices.whole(0, 2), {"seen": "hands on", "state": choices.pick(("good", "fair", "poor", "severe"))})]
    return [(2, {"seen": "hands on", "look unchanged": True})]


def damage(choices: Choices, document: JSON, built: dict[str, Truss], labels: set[str], writer: Any) -> None:
    """Add visits to a document in most cases."""
    if not choices.chance(0.85):
        labels.add("never visited")
        return
    entries: list[tuple[int, JSON]] = []
    for name, frame in built.items():
        truss = document["trusses"][name]
        bars = truss["bars"] if "bars" in truss else document["trusses"][truss["same as"]]["bars"]
        gone = None
        if frame.extra and choices.chance(0.6):
            gone = "-".join(choices.pick(frame.extra))
            entries.append((1, {"truss": name, "bar": gone, "severed": True}))
            labels.add("severed")
        for bar in bars:
            if bar["id"] != gone and choices.chance(0.2):
                where = {"truss": name, "bar": bar["id"]}
                entries += [(visit, {**where, **entry}) for visit, entry in _on(choices, bar, labels, writer)]
    document["visits"] = [
        {"date": date, "inspector": "AB", "observations": [entry for visit, entry in entries if visit == number]}
        for number, date in enumerate(DATES)
    ]


def named(document: JSON) -> set[str]:
    """Return the sections that the visits name."""
    return {
        entry["replaced"]["section"]
        for visit in document.get("visits", [])
        for entry in visit["observations"]
        if "replaced" in entry
    }
