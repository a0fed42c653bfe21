"""A small bridge, and journals about it, as values: builders for tests and strategies for properties."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from hypothesis import strategies as st

from models.bridge import Bar, Deck, Footbridge, Instrument, LiveLoad, Material, RatingRules, Section, Truss
from models.condition import BarCondition, Condition, fold_all
from models.journal import Bow, Crack, Entry, Journal, Reading, Replaced, Visit
from models.quantity import Quantity, parse

TRUSS, TUBE, ROD = "upstream", "L0-L1", "L1-U1"
PLATES = ("top wall", "bottom wall", "left wall", "right wall")
WALL = 5e-3
"""Nominal thickness of every plate of the tube, m."""
DEPTH = 0.1
LENGTH = 4.0
"""Of the tube, m."""


def length(text: str) -> Quantity:
    """A length as a person types it."""
    return parse(text, "length")


def millimetres(value: float) -> Quantity:
    """A length from a number of millimetres."""
    return Quantity(f"{value} mm", value / 1000)


SECTIONS = {
    "tube": Section(
        "tube",
        "rectangular tube",
        {key: length("100 mm") for key in ("depth", "width")} | {"thickness": length("5 mm")},
    ),
    "thin tube": Section(
        "thin tube",
        "rectangular tube",
        {key: length("100 mm") for key in ("depth", "width")} | {"thickness": length("3 mm")},
    ),
    "rod": Section("rod", "round bar", {"diameter": length("20 mm")}),
}


def small_bridge(**changes: Any) -> Footbridge:
    """A triangle of tubes with a rod for its vertical; `changes` as for a Footbridge."""
    joints = {"L0": ("0 m", "0 m"), "L1": ("4 m", "0 m"), "L2": ("8 m", "0 m"), "U1": ("4 m", "2 m")}
    ends = [("L0", "L1"), ("L1", "L2"), ("L0", "U1"), ("U1", "L2"), ("L1", "U1")]
    bars = tuple(Bar(f"{a}-{b}", a, b, "rod" if (a, b) == ("L1", "U1") else "tube", "steel", "other") for a, b in ends)
    truss = Truss(
        TRUSS,
        "at deck",
        {name: (length(x), length(y)) for name, (x, y) in joints.items()},
        {"L0": "pin", "L2": "roller"},
        bars,
        ("L0", "L1", "L2"),
    )
    bridge = Footbridge(
        id="bridge",
        name="Alder Weir",
        materials={
            "steel": Material("steel", "structural steel", parse("200 GPa", "stress"), parse("7850 kg/m^3", "density"))
        },
        sections=SECTIONS,
        trusses={TRUSS: truss},
        deck=Deck(length("2 m"), parse("1 kPa", "pressure")),
        rating=RatingRules("lrfr", (LiveLoad("crowd", "crowd", parse("4 kPa", "pressure")),)),
        instruments={"good gauge": Instrument(length("0.1 mm"))},
    )
    return replace(bridge, **changes)


def unseen(rule: float | str) -> Footbridge:
    """The small bridge with a rule for bars not seen."""
    bridge = small_bridge()
    return replace(bridge, rating=replace(bridge.rating, unseen=rule))


def reading(
    station: float, *values: float, plate: str = "bottom wall", extent: float | None = None, **more: Any
) -> Reading:
    """A reading by its values in millimetres and its extent in metres."""
    reach = None if extent is None else Quantity(f"{extent} m", extent)
    return Reading(station, plate, tuple(millimetres(value) for value in values), reach, **more)


def entry(*readings: Reading, device: str = "A", at: int = 0, name: str = "", bar: str = TUBE, **more: Any) -> Entry:
    """An entry of one device; `at` is its sequence."""
    return Entry(name or f"{device}{at}-{bar}", TRUSS, bar, device, at, readings=readings or None, **more)


def visit(date: str, *entries: Entry) -> Visit:
    """A visit named by its date."""
    return Visit(id=date, date=date, entries=entries)


def day(*entries: Entry) -> Journal:
    """A journal of one visit."""
    return Journal((visit("2026-05-14", *entries),))


def years(*visits: tuple[Entry, ...]) -> Journal:
    """A journal with a visit a year; entries are renamed so that their ids are unique."""
    return Journal(
        tuple(
            visit(f"{2020 + year}-05-14", *(replace(one, id=f"{one.id}@{year}") for one in entries))
            for year, entries in enumerate(visits)
        )
    )


def tube(journal: Journal, bridge: Footbridge | None = None, bar: str = TUBE) -> BarCondition:
    """The condition of one bar of the small bridge."""
    return whole(journal, bridge).bars[TRUSS, bar]


def whole(journal: Journal, bridge: Footbridge | None = None) -> Condition:
    """The condition of the small bridge."""
    return fold_all(small_bridge() if bridge is None else bridge, journal)


def at(condition: BarCondition, station: float, plate: str = "bottom wall", profile: str = "strength") -> float:
    """Thickness of a plate at a place, mm, rounded to a nanometre."""
    along = getattr(condition, profile)
    piece = min(int((along.stations[1:] <= station).sum()), len(along.thickness) - 1)
    return round(float(along.thickness[piece, PLATES.index(plate) if condition.bar != ROD else 0]) * 1000, 6)


def texts(condition: BarCondition, level: str = "doubtful") -> list[str]:
    """The sentences of one level about a bar."""
    return [finding.text for finding in condition.findings if finding.level == level]


def _between(low: float, high: float) -> st.SearchStrategy[float]:
    """Numbers as people type them, with four decimals at most."""
    return st.integers(int(low * 10000), int(high * 10000)).map(lambda number: number / 10000)


STATIONS = st.one_of(st.sampled_from([0.0, 0.5, 0.51, 1.0]), _between(-0.5, 1.5))
VALUES = st.one_of(st.sampled_from([0.0, 3.0, 4.0, 4.2, 5.0, 5.4]), _between(-1, 8))
EXTENTS = st.one_of(st.none(), st.sampled_from([0.2, 1.0]), _between(-1, 6))
READINGS = st.builds(
    lambda station, values, plate, extent, cleaned, instrument: reading(
        station, *values, plate=plate, extent=extent, cleaned=cleaned, instrument=instrument
    ),
    STATIONS,
    st.lists(VALUES, min_size=1, max_size=3),
    st.sampled_from(PLATES[:2]),
    EXTENTS,
    st.sampled_from([None, False, True]),
    st.sampled_from([None, "good gauge", "lost gauge"]),
)
"""Any reading on the tube, strange ones too."""

LOSSES = st.one_of(st.sampled_from([0.0, 0.1, 0.5, 1.0]), _between(-0.2, 1.2))
BOWS = st.builds(
    Bow,
    st.integers(-200, 200).map(millimetres),
    st.none() | st.integers(-1, 4000).map(millimetres),
    st.sampled_from([None, "in plane", "out of plane"]),
)
SAID: dict[str, st.SearchStrategy[Any]] = {
    "seen": st.sampled_from(["hands on", "at a distance", "not seen"]),
    "state": st.sampled_from(["good", "fair", "poor", "severe"]),
    "readings": st.lists(READINGS, min_size=1, max_size=2).map(tuple),
    "estimated_loss": LOSSES,
    "bow": BOWS,
    "crack": st.sampled_from([Crack(), Crack(millimetres(20)), "no crack"]),
    "severed": st.booleans(),
    "slack": st.booleans(),
    "look_unchanged": st.just(True),
    "note": st.sampled_from(["rust", "bird's nest"]),
}


KEYS = st.lists(st.sampled_from([*SAID, "readings", "readings"]), min_size=1, max_size=2, unique=True)
ANY_STATION = st.none() | STATIONS
RARELY = st.integers(0, 9)
NEW = st.sampled_from([None, "tube", "thin tube"])
DEVICES = st.sampled_from("AB")
RELATIONS = st.sampled_from(["retracts", "chooses"])


def _said(draw: st.DrawFn, known: list[str], replacing: bool) -> dict[str, Any]:
    """What an entry says: one or two things about the tube, or something about an entry before it."""
    rare = draw(RARELY)
    if rare in (7, 8) and known:
        return {draw(RELATIONS): draw(st.sampled_from([*known, "nobody"]))}
    found = {key: draw(SAID[key]) for key in draw(KEYS)}
    if "estimated_loss" in found:
        extent = draw(EXTENTS)
        found["extent"] = None if extent is None else Quantity(f"{extent} m", extent)
        found["station"] = draw(ANY_STATION)
    if rare == 9 and replacing:
        found["replaced"] = Replaced(draw(NEW))
    return found


@st.composite
def journals(draw: st.DrawFn, visits: int = 3, entries: int = 4, *, replacing: bool = True) -> Journal:
    """A journal about the tube by up to two devices, with retractions and choices."""
    known: list[str] = []
    made: list[Visit] = []
    for year in range(draw(st.integers(1, visits))):
        written = []
        for sequence in range(draw(st.integers(0, entries))):
            about = _said(draw, known, replacing)
            known.append(f"e{year}.{sequence}")
            written.append(Entry(known[-1], TRUSS, TUBE, draw(DEVICES), sequence, **about))
        made.append(visit(f"{2020 + year}-05-14", *written))
    return Journal(tuple(made))
