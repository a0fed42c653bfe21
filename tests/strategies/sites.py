"""Valid site documents of many kinds, each with the classes that it belongs to.

`seeded(n, seed)` yields the same documents every time; `sites()` is the hypothesis strategy over the same
choices, which shrinks to a two-panel Pratt truss with nothing optional.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from typing import Any

from hypothesis import strategies as st
from strategies import frames, sections, visits
from strategies.choices import Choices, Drawn, Seeded

JSON = dict[str, Any]
Labelled = tuple[JSON, frozenset[str]]


class Writer:
    """Writes lengths (mm) and the other quantities in one system of units, as a person would."""

    def __init__(self, us: bool) -> None:
        self.us = us

    def length(self, mm: float) -> str:
        """Write a length; in feet and inches where it comes out in sixteenths."""
        if not self.us:
            return f"{mm / 1000:.9f}".rstrip("0").rstrip(".") + " m"
        sixteenths = mm / 25.4 * 16
        if abs(sixteenths - round(sixteenths)) < 1e-9 and mm > 0:
            inches, rest = divmod(round(sixteenths), 16)
            feet, inches = divmod(inches, 12)
            return f"{feet} ft {inches} {rest}/16 in" if rest else f"{feet} ft {inches} in"
        return f"{mm / 25.4:.10f}".rstrip("0").rstrip(".") + " in"

    def small(self, mm: float) -> str:
        """Write a thickness or another size of a section."""
        if self.us:
            return f"{mm / 25.4:.4f} in"
        return f"{mm:.3f}".rstrip("0").rstrip(".") + " mm"

    def pressure(self, pascal: int) -> str:
        """Write a pressure."""
        return f"{pascal / 47.88:.1f} psf" if self.us else f"{pascal / 1000:.3f} kPa"

    def line(self, newton_per_m: int) -> str:
        """Write a line load."""
        return f"{newton_per_m / 14.594:.1f} plf" if self.us else f"{newton_per_m / 1000:.3f} kN/m"

    def force(self, newton: int) -> str:
        """Write a force."""
        return f"{newton / 4448.2:.3f} kip" if self.us else f"{newton / 1000:.3f} kN"


def _materials(choices: Choices, labels: set[str], us: bool) -> JSON:
    steel: JSON = {"kind": "structural steel", "E": "200 GPa", "density": "7850 kg/m^3"}
    if us:
        steel = {"kind": "structural steel", "E": "29000 ksi", "density": "490 lb/ft^3"}
    known = choices.pick(("both", "Fy", "neither"))
    if known != "neither":
        steel["Fy"] = choices.pick(("36 ksi", "50 ksi") if us else ("235 MPa", "250 MPa", "345 MPa"))
    if known == "both":
        steel["Fu"] = "65 ksi" if us else "450 MPa"
    if known == "neither" and choices.chance(0.3):
        steel["kind"] = "wrought iron"
        labels.add("wrought iron")
    labels.add(f"strength given: {known}")
    # next to no weight: a flat joint that its own bars do not overload
    return {"steel": steel, "light": {**steel, "density": "0.001 kg/m^3"}}


def _options(choices: Choices, bar: JSON, out_of: float, writer: Writer) -> None:
    if choices.chance(0.15):
        bar["k"] = {"in plane": choices.pick((0.75, 0.9, 1.2)), "out of plane": choices.pick((0.8, 1.0, 1.5))}
    if choices.chance(0.1):
        bar["unbraced out of plane"] = writer.length(out_of * choices.pick((0.5, 1.5)))
    if choices.chance(0.25):
        bar["ends"] = choices.pick(("bolted", "riveted", "pinned", "welded"))
    if choices.chance(0.1):
        bar["net area"] = choices.pick((0.8, 0.85, 1.0))
    if choices.chance(0.1):
        bar["shear lag"] = choices.pick((0.75, 0.9))
    if choices.chance(0.1):
        bar["turned"] = 90
    if choices.chance(0.1):
        bar["system"] = choices.pick(("riveted", "eyebars", "welded"))


def _truss(choices: Choices, built: frames.Truss, writer: Writer, top_chord: str) -> JSON:
    chosen = {role: choices.pick(sections.FOR_ROLE[role]) for role in sections.FOR_ROLE}
    light = "flat joint" in built.labels and choices.chance(0.6)
    bars = []
    for role, start, end in built.bars:
        (x1, y1), (x2, y2) = built.joints[start], built.joints[end]
        bar: JSON = {"id": f"{start}-{end}", "from": start, "to": end, "section": chosen[role]}
        if choices.chance(0.3):
            bar["from"], bar["to"] = end, start
        bar |= {"material": "light" if light and "F" in (start, end) else "steel", "role": role}
        _options(choices, bar, ((x2 - x1) ** 2 + (y2 - y1) ** 2) ** 0.5, writer)
        bars.append(bar)
    joints = {name: [writer.length(x), writer.length(y)] for name, (x, y) in built.joints.items()}
    return {
        "top chord": top_chord,
        "joints": joints,
        "supports": dict(built.supports),
        "bars": bars,
        "deck joints": list(built.deck),
    }


def _deck(choices: Choices, labels: set[str], writer: Writer, names: list[str]) -> JSON:
    width = choices.whole(1500, 3200)
    deck: JSON = {
        "width": writer.length(width),
        "dead": writer.pressure(choices.whole(400, 1500)),
        "rests on": "joints",
    }
    if choices.chance(0.7):
        deck["wearing"] = writer.pressure(choices.whole(100, 600))
    if len(names) == 2:
        spacing = width + choices.whole(-400, 500)
        deck["truss spacing"] = writer.length(spacing)
        labels.add("deck wider than trusses" if spacing < width else "deck between trusses")
        if choices.chance(0.25):
            deck["offset"] = {choices.pick(names): writer.length(choices.whole(50, 200))}
            labels.add("deck off centre")
    if choices.chance(0.25):
        deck["dead width"] = writer.length(width + choices.whole(100, 400))
    if choices.chance(0.4):
        one = writer.line(choices.whole(100, 900))
        each = {name: writer.line(choices.whole(100, 900)) for name in names}
        deck["edge"] = each if choices.chance(0.5) else one
    labels.add(f"deck of {width // 1000} m")
    return deck


def _live(choices: Choices, labels: set[str], writer: Writer) -> list[JSON]:
    loads: list[JSON] = [{"name": "crowd", "kind": "crowd", "pressure": writer.pressure(choices.whole(2500, 5000))}]
    labels.add("crowd")
    if choices.chance(0.5):
        place, axles = 0, []
        for _ in range(choices.whole(1, 3)):
            axles.append([writer.length(place), writer.force(choices.whole(4000, 30000))])
            place += choices.whole(900, 4500)
        loads.append(
            {"name": "mower", "kind": "vehicle", "axles": axles, "track": writer.length(choices.whole(900, 1450))}
        )
        labels.add("vehicle")
    if choices.chance(0.15):
        loads.append({"name": "van", "kind": "vehicle", "vehicle": "en service"})
        labels |= {"vehicle", "vehicle by name"}
        if choices.chance(0.3):
            del loads[0]
            labels.discard("crowd")
    return loads


def _by_rule(choices: Choices, live: list[JSON], labels: set[str]) -> None:
    """Let a rule give the pressure of a crowd."""
    rule = choices.pick(("en 1991-2", "aashto 1997"))
    live.append({"name": "people", "kind": "crowd", "rule": rule})
    labels |= {"crowd by rule", rule}


def make(choices: Choices) -> Labelled:
    """Make one document."""
    labels: set[str] = set()
    us = choices.chance(0.35)
    writer = Writer(us)
    labels.add("US units" if us else "SI units")
    plan = frames.plan(choices)
    pair = choices.pick(("one truss", "two trusses, the same", "two trusses, different"))
    labels.add(pair)
    names = ["upstream"] if pair == "one truss" else ["upstream", "downstream"]
    shared = plan if pair != "two trusses, different" else replace(plan, deck_on_top=False)
    top_chord = choices.pick(("braced overhead", "at deck", "half through"))
    labels.add(top_chord)
    trusses: JSON = {}
    built: dict[str, frames.Truss] = {}
    for name in names[: 1 if pair != "two trusses, different" else 2]:
        built[name] = frames.build(choices, shared)
        labels |= built[name].labels
        trusses[name] = _truss(choices, built[name], writer, top_chord)
    if pair == "two trusses, the same":
        trusses["downstream"] = {"same as": "upstream"}
        built["downstream"] = built["upstream"]
    document: JSON = {
        "format": "truss-footbridge/1",
        "name": "Invented footbridge",
        "units": "US" if us else "SI",
        "materials": _materials(choices, labels, us),
        "sections": sections.written(writer),
        "trusses": trusses,
        "deck": _deck(choices, labels, writer, names),
        "rating": {
            "basis": "lrfr",
            "system": choices.pick(("welded", "riveted")),
            "connection allowance": choices.pick((1.0, 1.1, 1.2)),
            "live": _live(choices, labels, writer),
        },
    }
    if choices.chance(0.6):
        document["built"] = choices.pick((1890, 1905, 1920, 1936, 1950, 1963, 1975, 2001))
    visits.damage(choices, document, built, labels, writer)
    if any(one.extra for one in built.values()):
        labels.add("crossed diagonals")
    labels.add("redundant" if any(_degree(document, name, one) > 0 for name, one in built.items()) else "determinate")
    used = {bar["section"] for truss in trusses.values() for bar in truss.get("bars", [])}
    labels |= {str(document["sections"][name]["shape"]) for name in used}
    document["sections"] = {
        name: section for name, section in document["sections"].items() if name in used | visits.named(document)
    }
    if choices.chance(0.15):
        _by_rule(choices, document["rating"]["live"], labels)
    return document, frozenset(labels)


def _degree(document: JSON, name: str, built: frames.Truss) -> int:
    gone = sum(
        1
        for visit in document.get("visits", [])
        for entry in visit["observations"]
        if entry["truss"] == name and entry.get("severed")
    )
    return len(built.bars) - gone + len(built.supports) + 1 - 2 * len(built.joints)


def seeded(number: int, seed: int) -> Iterator[Labelled]:
    """Yield the same documents with their labels every time, without hypothesis."""
    for one in range(number):
        yield make(Seeded(1_000_003 * seed + one))


@st.composite
def sites(draw: st.DrawFn) -> Labelled:
    """Draw a document with its labels."""
    return make(Drawn(draw))
