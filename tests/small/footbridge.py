"""A short footbridge as a site document: four panels of 3 m, plain or crossed in the middle, one truss or two."""

from __future__ import annotations

from typing import Any

from benchmark.pratt import pratt

JSON = dict[str, Any]

WALLS = ("top wall", "bottom wall", "left wall", "right wall")
WALL = 8.0
"""Thickness of every wall of the tube that all bars are made of, mm."""


def short(*, crossed: bool = False, two: bool = False) -> JSON:
    """Return a Pratt truss `only`, or `left` and `right`, that nobody has visited.

    Parameters
    ----------
    crossed : with second diagonals L1-U2 and U2-L3, so that it is redundant twice.
    """
    document = pratt(4)
    del document["visits"]
    if crossed:
        for start, end in (("L1", "U2"), ("U2", "L3")):
            add_bar(document, f"{start}-{end}", start, end, "diagonal")
    if two:
        document["trusses"] = {"left": document["trusses"]["only"], "right": {"same as": "left"}}
    return document


def truss_of(document: JSON, name: str = "") -> JSON:
    """Return a truss as written; the first one where no name is given."""
    return document["trusses"][name or next(iter(document["trusses"]))]


def add_bar(document: JSON, name: str, start: str, end: str, role: str = "other") -> JSON:
    """Add a bar of the same tube to the first truss."""
    bar = {"id": name, "from": start, "to": end, "section": "tube", "material": "steel", "role": role}
    truss_of(document)["bars"].append(bar)
    return bar


def bar_of(document: JSON, name: str) -> JSON:
    """Return a bar of the first truss as written."""
    return next(bar for bar in truss_of(document)["bars"] if bar["id"] == name)


def without_bar(document: JSON, name: str) -> JSON:
    """Take a bar out of the first truss."""
    truss = truss_of(document)
    truss["bars"] = [bar for bar in truss["bars"] if bar["id"] != name]
    return document


def record(document: JSON, *observations: JSON, date: str = "2026-05-14") -> JSON:
    """Add a visit; entries that name no truss are about the first one."""
    first = next(iter(document["trusses"]))
    visit = {"date": date, "observations": [{"truss": first, **said} for said in observations]}
    document.setdefault("visits", []).append(visit)
    return document


def reading(bar: str, *thickness: float, extent: str | None = "0.5 m", station: float = 0.5, **more: Any) -> JSON:
    """Return an entry with one reading on every wall (mm), the last one repeated where there are fewer than walls."""
    walls = dict(zip(WALLS, [*thickness, *[thickness[-1]] * len(WALLS)], strict=False))
    shared = {"station": station, **({"extent": extent} if extent else {}), **more}
    readings = [{"plate": wall, "thickness": [f"{mm} mm"], **shared} for wall, mm in walls.items()]
    return {"bar": bar, "seen": "hands on", "readings": readings}
