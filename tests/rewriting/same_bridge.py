"""The same footbridge told in another way: from the other bank, in another order, stronger and heavier, larger."""

from __future__ import annotations

import copy
import random
from collections.abc import Iterator
from typing import Any

from independent.loads import NAMED
from rewriting.quantities import times

from inspector.exchange import site
from models.material import strengths

JSON = dict[str, Any]
_OTHER_SIDE = {"top": "bottom", "bottom": "top"}


def written_out(document: JSON) -> JSON:
    """Return a document that names no default that has a dimension: strengths and vehicles are written out."""
    document = copy.deepcopy(document)
    bridge = site.read_document(document).bridge
    for name, material in document["materials"].items():
        found = strengths(bridge.materials[name], bridge.built)
        material |= {"Fy": f"{found.Fy:.9f} Pa", "Fu": f"{found.Fu:.9f} Pa"}
    for load in document["rating"]["live"]:
        if "vehicle" in load:
            load.update(NAMED[load.pop("vehicle")])
    return document


def stronger_and_heavier(document: JSON, factor: float) -> JSON:
    """Multiply everything that has a force in it."""
    return times(document, dict.fromkeys(("stress", "force", "line load", "density"), factor))


def larger(document: JSON, factor: float) -> JSON:
    """Make a bridge geometrically similar, of a metal so light that its own weight grows as its strength does."""
    factors = {"length": factor, "area": factor**2, "inertia": factor**4}
    return times(document, {**factors, "density": 1 / factor, "force": factor**2, "line load": factor})


def entries(document: JSON) -> Iterator[JSON]:
    """Yield every observation."""
    for visit in document.get("visits", []):
        yield from visit["observations"]


def from_the_other_bank(document: JSON, swapped: frozenset[tuple[str, str]]) -> JSON:
    """Look at a bridge from its other side: x becomes -x.

    Parameters
    ----------
    swapped : (truss, bar) of the bars that are also named from their other end.
    """
    document = copy.deepcopy(document)
    upright: set[tuple[str, str]] = set()
    for name, truss in document["trusses"].items():
        shape = document["trusses"][truss.get("same as", name)]
        upright |= {(name, bar["id"]) for bar in shape["bars"] if _is_upright(shape, bar)}
    for name, truss in document["trusses"].items():
        if "same as" in truss:
            continue
        truss["joints"] = {joint: [_opposite(x), y] for joint, (x, y) in truss["joints"].items()}
        truss["deck joints"].reverse()
        for bar in truss["bars"]:
            if (name, bar["id"]) in swapped:
                bar["from"], bar["to"] = bar["to"], bar["from"]
    for entry in entries(document):
        place = entry["truss"], entry["bar"]
        named = document["trusses"][entry["truss"]].get("same as", entry["truss"]), entry["bar"]
        _look_at(entry, turned=named in swapped, other_side=place in upright)
    return document


def _is_upright(truss: JSON, bar: JSON) -> bool:
    return truss["joints"][bar["from"]][0] == truss["joints"][bar["to"]][0]


def _opposite(text: str) -> str:
    return text.removeprefix("-") if text.startswith("-") else f"-{text}"


def _look_at(entry: JSON, *, turned: bool, other_side: bool) -> None:
    """Say of an entry what an inspector would write who calls the other end of the bar its start."""
    if turned and "estimated loss" in entry and "station" in entry:
        entry["station"] = 1 - entry["station"]
    for reading in entry.get("readings", []):
        if turned:
            reading["station"] = 1 - reading["station"]
        if other_side:
            reading["plate"] = " ".join(_OTHER_SIDE.get(word, word) for word in reading["plate"].split(" "))


def in_another_order(document: JSON, shuffle: random.Random) -> JSON:
    """Shuffle everything whose order says nothing; entries and visits say their own identity and sequence."""
    found = site.read_document(document)
    document = site.write(found.bridge, found.journal, identities=True)

    def shuffled(values: Any) -> Any:
        values = list(values.items()) if isinstance(values, dict) else list(values)
        shuffle.shuffle(values)
        return values

    for key in ("materials", "sections", "trusses"):
        document[key] = dict(shuffled(document[key]))
    for truss in document["trusses"].values():
        if "same as" not in truss:
            for key in ("joints", "supports"):
                truss[key] = dict(shuffled(truss[key]))
            truss["bars"] = [dict(shuffled(bar)) for bar in shuffled(truss["bars"])]
    document["rating"]["live"] = shuffled(document["rating"]["live"])
    if "visits" in document:
        document["visits"] = shuffled(document["visits"])
        for visit in document["visits"]:
            visit["observations"] = shuffled(visit["observations"])
    return dict(shuffled(document))
