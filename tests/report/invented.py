"""An invented rating to print: a Pratt truss bridge with figures that are made up, not computed.

The report and the drawing only show values; any values will do, and these are small, reproducible
and contain what is hard to print.
"""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from inspector.report import lowest_bars
from models.bridge import Bar, Deck, Footbridge, LiveLoad, Material, Owner, RatingRules, Section, Truss
from models.calculation import HandCheck, Step, choose, least, root
from models.condition import NOMINAL, READING, BarCondition, Profile
from models.finding import Finding
from models.journal import Entry, Journal, Reading, Visit
from models.quantity import Quantity, parse
from models.rating.hand_check import BarCheck
from models.rating.result import (
    BarRating,
    Effect,
    FactorLine,
    Governing,
    Provenance,
    Rating,
    Reaction,
    TrussRating,
)

LEVELS = ("inventory", "operating")
FINGERPRINT = "3f9a" * 16
_ROLES = {"B": "bottom chord", "T": "top chord", "V": "vertical", "D": "diagonal", "E": "end post"}


def metres(value: float) -> Quantity:
    """A length as a site file has it."""
    return Quantity(f"{value:g} m", value)


def pratt(name: str, panels: int = 8, panel: float = 2.5, height: float = 2.5) -> Truss:
    """A Pratt truss with 4 n - 3 bars, its deck at the lower joints."""
    joints = {f"L{i}": (metres(panel * i), metres(0.0)) for i in range(panels + 1)}
    joints |= {f"U{i}": (metres(panel * i), metres(height)) for i in range(1, panels)}
    ends = [("B", f"L{i}", f"L{i + 1}") for i in range(panels)]
    ends += [("T", f"U{i}", f"U{i + 1}") for i in range(1, panels - 1)]
    ends += [("V", f"L{i}", f"U{i}") for i in range(1, panels)]
    ends += [("E", "L0", "U1"), ("E", f"U{panels - 1}", f"L{panels}")]
    half = panels // 2
    ends += [("D", f"U{i}", f"L{i + 1}") for i in range(1, half)]
    ends += [("D", f"L{i}", f"U{i + 1}") for i in range(half, panels - 1)]
    bars = tuple(
        Bar(f"{a}-{b}", a, b, "chord" if kind in "BTE" else "web", "steel", _ROLES[kind]) for kind, a, b in ends
    )
    deck = tuple(f"L{i}" for i in range(panels + 1))
    return Truss(name, "braced overhead", joints, {"L0": "pin", f"L{panels}": "roller"}, bars, deck)


def crossed(name: str, panels: int = 6) -> Truss:
    """A Pratt truss whose inner panels have two crossing diagonals."""
    plain = pratt(name, panels)
    have = {bar.id for bar in plain.bars}
    more = []
    for i in range(1, panels - 1):
        for a, b in ((f"U{i}", f"L{i + 1}"), (f"L{i}", f"U{i + 1}")):
            if f"{a}-{b}" not in have:
                more.append(Bar(f"{a}-{b}", a, b, "web", "steel", "counter"))
    return replace(plain, bars=plain.bars + tuple(more))


def bridge(*trusses: Truss, units: str = "SI", name: str = "Alder Weir footbridge") -> Footbridge:
    """An invented footbridge around trusses."""
    steel = Material("steel", "structural steel", parse("200 GPa", "stress"), parse("7850 kg/m^3", "density"),
                     parse("250 MPa", "stress"))  # fmt: skip
    tube = {
        "depth": parse("100 mm", "length"),
        "width": parse("100 mm", "length"),
        "thickness": parse("5 mm", "length"),
    }
    leg = {"legs": (parse("80 mm", "length"), parse("80 mm", "length")), "thickness": parse("8 mm", "length")}
    crowd = LiveLoad("crowd", "crowd", pressure=parse("90 psf", "pressure"))
    chosen = trusses or (pratt("upstream"), replace(pratt("downstream"), same_as="upstream"))
    return Footbridge(
        id="6f1e5a52-7d0b-5a57-9f5e-2f64a9b0a001", name=name, materials={"steel": steel},
        sections={
            "chord": Section("chord", "rectangular tube", tube, formed="hot"),
            "web": Section("web", "angle", leg),
        },
        trusses={truss.name: truss for truss in chosen},
        deck=Deck(parse("2.4 m", "length"), parse("0.9 kPa", "pressure"), wearing=parse("0.2 kPa", "pressure")),
        rating=RatingRules("lrfr", (crowd,), system="welded"),
        reference="AW-07", locality="Alder Weir, river path", built=1968, units=units,
        owner=Owner("Parks office"), notes="Invented for trying things out.",
    )  # fmt: skip


def bar_rating(truss: str, bar: Bar, number: int, length: float) -> BarRating:
    """Made-up figures that differ from bar to bar."""
    pull = bar.role in ("bottom chord", "diagonal")
    factor = 0.713 + 0.117 * ((7 * number) % 19)
    force = (1.0 if pull else -1.0) * (31_415.9 + 2_718.28 * number)
    area, nominal = 1.831e-3 - 1e-5 * (number % 5), 1.9e-3
    return BarRating(
        truss=truss, bar=bar.id, role=bar.role, section=bar.section, length=length,
        state=("good", "fair", "poor", None)[number % 4], known=("measured", "partly measured", "assumed")[number % 3],
        area=area, nominal_area=nominal, dead_components=force / 4, dead_wearing=force / 20,
        live={"crowd": Effect(max(force, 0.0), min(force, 0.0)), "mower": Effect(1_234.5, -987.6)},
        tension=421_337.0, compression=308_301.0, tension_check="tension yield", compression_check="flexural buckling",
        condition_factor=0.95, system_factor=0.85,
        rating_factor={"inventory": factor * 1.35 / 1.75, "operating": factor},
        check="tension yield" if pull else "flexural buckling", load="crowd",
        direction="tension" if pull else "compression", where=(0.8, 1.0),
        demand=215_000.0, capacity=238_123.0, loss_allowance=0.4177 if factor > 1 else 0.0,
        without_it="mechanism" if number % 2 else 0.612,
    )  # fmt: skip


def truss_rating(truss: Truss) -> TrussRating:
    """Made-up figures of a truss that carries."""
    at = {name: np.array([x.si, y.si]) for name, (x, y) in truss.joints.items()}
    bars = tuple(
        bar_rating(truss.name, bar, number, float(np.linalg.norm(at[bar.end] - at[bar.start])))
        for number, bar in enumerate(truss.bars)
    )
    return TrussRating(
        truss.name, len(truss.joints), len(bars), 3, len(bars) + 3 - 2 * len(truss.joints), 0, "determinate", (), (),
        bars, tuple(Reaction(joint, 34_567.8, 12_345.6, "crowd") for joint in truss.supports), (60_000.0, 9_135.6),
    )  # fmt: skip


def rating(site: Footbridge, findings: tuple[Finding, ...] = ()) -> Rating:
    """A made-up rating of all trusses of a bridge."""
    trusses = {name: truss_rating(truss) for name, truss in site.trusses.items()}
    rows = [bar for truss in trusses.values() for bar in truss.bars]
    worst = min(rows, key=lambda bar: (bar.rating_factor["operating"] or 0.0, bar.truss, bar.bar))
    return Rating(
        site.name, "lrfr", LEVELS, Provenance(FINGERPRINT, "truss footbridge inspector 0.1.0"),
        Governing(worst.rating_factor, worst.truss, worst.bar, worst.check, worst.load), trusses,
        ("The allowance for connections on the bars' own weight is 1.10 (common practice, no source).",
         "The state of a bar with none on record counts as fair."),
        findings, ("connections and gussets", "pins", "bearings", "foundations"),
        (FactorLine("live load factor, operating", "1.35", "AASHTO MBE 6A.4.4.2 (from memory)"),
         FactorLine("crowd", "4.309 kPa", "the site file")),
    )  # fmt: skip


def with_bar(whole: Rating, truss: str, bar: str, **changes: object) -> Rating:
    """The rating with some fields of one bar put otherwise."""
    old = whole.trusses[truss]
    rows = tuple(row._replace(**changes) if row.bar == bar else row for row in old.bars)
    return replace(whole, trusses={**whole.trusses, truss: replace(old, bars=rows)})


def hand_checks(whole: Rating) -> list[BarCheck]:
    """The invented calculation under the names of the governing bars."""
    return [BarCheck(bar.truss, bar.bar, hand_check(), "") for bar in lowest_bars(whole)]


def hand_check() -> tuple[Step, ...]:
    """A compression check with every kind of operation in it."""
    sheet = HandCheck()
    area = sheet.given("A", 1.8312e-3, "area", "least remaining area", "readings")
    strength = sheet.given("Fy", 250e6, "stress", "yield strength", "drawing")
    modulus = sheet.given("E", 200e9, "stress", "modulus of elasticity", "drawing")
    inertia = sheet.given("I", 2.7133e-6, "inertia", "least second moment of area", "remaining section")
    length = sheet.given("L", 2.5, "length", "length between joints", "geometry")
    k = sheet.given("K", 1.0, "factor", "effective length factor", "site file")
    radius = sheet.note("r", root(inertia / area), "size", "radius of gyration", "definition")
    sheet.note("KL/r", k * length / radius, "ratio", "slenderness", "AASHTO LRFD 6.9.3 (from memory)")
    euler = sheet.note("Pe", np.pi**2 * modulus * inertia / (k * length) ** 2, "force", "elastic critical load",
                       "AASHTO LRFD 6.9.4.1.2 (from memory)")  # fmt: skip
    squash = sheet.note("Po", strength * area, "force", "yield load", "AASHTO LRFD 6.9.4.1.1 (from memory)")
    curve = choose(euler / squash, ">=", 0.44, 0.658 ** (squash / euler) * squash, 0.877 * euler)
    nominal = sheet.note("Pn", curve, "force", "nominal compressive resistance", "AASHTO LRFD 6.9.4.1.1 (from memory)")
    factored = sheet.note("Pr", 0.95 * nominal, "force", "factored resistance", "AASHTO LRFD 6.5.4.2 (from memory)")
    pull = sheet.note("Pt", least(0.95 * strength * area, squash), "force", "tension, yield", "AASHTO LRFD 6.8.2.1")
    dead = sheet.given("DC", -8.2e3, "force", "dead load, components", "analysis")
    live = sheet.given("LL", -31.4159e3, "force", "live load, crowd", "analysis")
    sheet.note("RF", (0.85 * factored + 1.25 * dead) / (1.35 * -live), "factor", "rating factor, operating",
               "AASHTO MBE 6A.4.2.1 (from memory)")  # fmt: skip
    sheet.note("s", pull - (factored - dead), "force", "a difference of a difference", "for the test")
    return tuple(sheet.steps)


def journal(site: Footbridge) -> Journal:
    """One visit with an entry for each bar of the first truss and a few readings."""
    truss = next(iter(site.trusses.values()))
    entries = [
        Entry(
            f"entry-{number}",
            truss.name,
            bar.id,
            "file",
            number,
            at="2026-05-14T10:21:07Z",
            seen="hands on",
            state="fair",
        )
        for number, bar in enumerate(truss.bars)
    ]
    thin = Reading(0.9, "bottom wall", (parse("3.9 mm", "length"), parse("4.1 mm", "length")), parse("0.4 m", "length"),
                   True, "ultrasonic gauge", "outer")  # fmt: skip
    entries.append(Entry("entry-a", truss.name, truss.bars[0].id, "file", 900, readings=(thin,)))
    entries.append(Entry("entry-b", truss.name, truss.bars[0].id, "file", 901, readings=(replace(thin, station=0.1),)))
    entries.append(Entry("entry-c", truss.name, truss.bars[0].id, "file", 902, retracts="entry-b"))
    entries.append(
        Entry("entry-d", truss.name, truss.bars[1].id, "file", 903, estimated_loss=0.15,
              extent=parse("0.5 m", "length"), note="laminar rust under the gusset")
    )  # fmt: skip
    entries.append(
        Entry("entry-e", truss.name, truss.bars[2].id, "file", 904, seen="not seen", reason="behind the abutment wall")
    )
    return Journal((Visit("visit-1", "2026-05-14", tuple(entries), "A. Surveyor", "light rain"),))


def conditions(site: Footbridge) -> dict[tuple[str, str], BarCondition]:
    """Every bar as seen, the first one measured."""
    found = {}
    for truss in site.trusses.values():
        for number, bar in enumerate(truss.bars):
            basis = READING if number == 0 else NOMINAL
            shape = (1, 4)
            profile = Profile(np.array([0.0, 1.0]), np.full(shape, 0.005), np.full(shape, basis, dtype=np.int8),
                              np.zeros(shape, dtype=bool), np.full(shape, -1, dtype=np.int64))  # fmt: skip
            found[truss.name, bar.id] = BarCondition(
                truss.name, bar.id, bar.section, bar.material, "fair", 0, number != 2, False, False, None, None,
                profile, profile, profile, number == 0, number == 1,
            )  # fmt: skip
    return found
