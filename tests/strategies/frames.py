"""Plane trusses of the usual families, each bar statically sound: joints, bars, supports, deck joints."""

from __future__ import annotations

from dataclasses import dataclass, field
from itertools import pairwise

from strategies.choices import Choices

FAMILIES = ("pratt", "howe", "warren", "warren with verticals")
FLAT = 1e-6  # m of rise over a half panel: cond(A) about 1e6


@dataclass
class Truss:
    """A truss in millimetres; `extra` lists bars that the truss stands without."""

    joints: dict[str, tuple[float, float]] = field(default_factory=dict)
    bars: list[tuple[str, str, str]] = field(default_factory=list)
    supports: dict[str, str] = field(default_factory=dict)
    deck: list[str] = field(default_factory=list)
    extra: list[tuple[str, str]] = field(default_factory=list)
    labels: set[str] = field(default_factory=set)

    def bar(self, role: str, start: str, end: str) -> None:
        """Add a bar."""
        self.bars.append((role, start, end))


@dataclass(frozen=True)
class Plan:
    """What two trusses of one bridge share: the deck joints' places and where the supports stand."""

    bottom: tuple[int, ...]
    overhang: bool
    continuous: bool
    deck_on_top: bool


def plan(choices: Choices) -> Plan:
    """Choose panels of 2 to 4 m and what carries them."""
    overhang = choices.chance(0.25)
    continuous = choices.chance(0.2)
    panels = choices.whole(4 if overhang or continuous else 2, 10)
    usual = choices.whole(2000, 3500)
    even = not choices.chance(0.3)
    places = [0]
    for _ in range(panels):
        places.append(places[-1] + (usual if even else choices.whole(2000, 3500)))
    on_top = not overhang and panels > 3 and choices.chance(0.55)
    return Plan(tuple(places), overhang, continuous, on_top)


def _heights(choices: Choices, number: int, labels: set[str]) -> list[int]:
    middle = choices.whole(1200, 2600)
    if not choices.chance(0.4):
        labels.add("parallel chords")
        return [middle] * number
    labels.add("polygonal chord")
    return [max(1000, middle - choices.whole(0, 400) + 40 * min(i, number - 1 - i)) for i in range(number)]


def _chord(truss: Truss, role: str, names: list[str]) -> None:
    for start, end in pairwise(names):
        truss.bar(role, start, end)


def _with_verticals(truss: Truss, choices: Choices, family: str, plan_: Plan) -> None:
    places, n = plan_.bottom, len(plan_.bottom) - 1
    ends = family in ("pratt", "howe") and plan_.deck_on_top
    first, last = (0, n) if ends else (1, n - 1)
    heights = _heights(choices, last - first + 1, truss.labels)
    tops = {i: f"U{i}" for i in range(first, last + 1)}
    for i, height in zip(tops, heights, strict=True):
        truss.joints[tops[i]] = (places[i], height)
    _chord(truss, "bottom chord", [f"L{i}" for i in range(n + 1)])
    _chord(truss, "top chord", list(tops.values()))
    if not ends:
        truss.bar("end post", "L0", "U1")
        truss.bar("end post", f"L{n}", f"U{n - 1}")
    for i, top in tops.items():
        truss.bar("vertical", f"L{i}", top)
    crossed = choices.chance(0.5)
    for i in range(first, last):
        inwards = i + 0.5 < n / 2
        to_middle = (f"U{i}", f"L{i + 1}") if inwards else (f"L{i}", f"U{i + 1}")
        outwards = (f"L{i}", f"U{i + 1}") if inwards else (f"U{i}", f"L{i + 1}")
        alternate = (f"U{i}", f"L{i + 1}") if i % 2 else (f"L{i}", f"U{i + 1}")
        main = {"pratt": to_middle, "howe": outwards}.get(family, alternate)
        truss.bar("diagonal", *main)
        if crossed and choices.chance(0.6):
            other = to_middle if main != to_middle else outwards
            truss.bar("diagonal", *other)
            truss.extra += [main, other]


def _warren(truss: Truss, choices: Choices, plan_: Plan) -> None:
    places, n = plan_.bottom, len(plan_.bottom) - 1
    heights = _heights(choices, n, truss.labels)
    for i, height in enumerate(heights):
        truss.joints[f"U{i}"] = ((places[i] + places[i + 1]) / 2, height)
    _chord(truss, "bottom chord", [f"L{i}" for i in range(n + 1)])
    _chord(truss, "top chord", [f"U{i}" for i in range(n)])
    for i in range(n):
        role = "end post" if i == 0 else "diagonal"
        truss.bar(role, f"L{i}", f"U{i}")
        truss.bar("end post" if i == n - 1 else "diagonal", f"U{i}", f"L{i + 1}")


def _flat_joint(truss: Truss, choices: Choices) -> None:
    """Break the top chord over a crossed panel by a joint that only the chord's own slight rise holds."""
    start, end = next(
        (bar[1], bar[2])
        for bar in truss.bars
        if bar[0] == "top chord" and {f"L{bar[1][1:]}", bar[2]} in [set(pair) for pair in truss.extra]
    )
    (x1, y1), (x2, y2) = truss.joints[start], truss.joints[end]
    rise = choices.pick((FLAT * 1000, 0.01, 1.0))
    truss.joints["F"] = ((x1 + x2) / 2, (y1 + y2) / 2 + rise)
    at = truss.bars.index(("top chord", start, end))
    truss.bars[at : at + 1] = [("top chord", start, "F"), ("top chord", "F", end)]
    truss.extra = [pair for pair in truss.extra if {pair[0][1:], pair[1][1:]} != {start[1:], end[1:]}]
    truss.labels.add("flat joint")


def _supports(truss: Truss, plan_: Plan) -> None:
    n = len(plan_.bottom) - 1
    left, right = (1, n - 1) if plan_.overhang else (0, n)
    truss.supports = {f"L{left}": "pin", f"L{right}": "roller"}
    if plan_.continuous:
        truss.supports[f"L{n // 2}"] = "roller"
        truss.labels.add("continuous")
    if plan_.overhang:
        truss.labels.add("overhanging deck")


def build(choices: Choices, plan_: Plan) -> Truss:
    """Build one truss on a plan."""
    truss = Truss(joints={f"L{i}": (x, 0.0) for i, x in enumerate(plan_.bottom)})
    family = choices.pick(FAMILIES)
    truss.labels |= {family.split(" ", maxsplit=1)[0]}
    if family == "warren":
        _warren(truss, choices, plan_)
    else:
        _with_verticals(truss, choices, family, plan_)
    _supports(truss, plan_)
    truss.deck = [f"L{i}" for i in range(len(plan_.bottom))]
    if plan_.deck_on_top and family != "warren":
        truss.deck = [joint for joint in truss.joints if joint.startswith("U")]
        truss.labels.add("deck on top")
    if truss.extra and choices.chance(0.45):
        _flat_joint(truss, choices)
    return truss
