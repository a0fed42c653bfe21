"""Whether the parts of a footbridge, and of how it is to be rated, fit together."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import fields
from itertools import pairwise
from typing import Any, Final

from inspector.exchange.form import UNREADABLE, join, readable
from inspector.exchange.references import Directory, Problems, complete, each, items, known, parts_readable, twice
from models.bridge import Bar, LiveLoad, Rectangle, Section, Truss
from models.errors import Problem
from models.loading.live import axles_of
from models.section.registry import faults

_NO_LENGTH: Final = 1e-6
"""Joints nearer to each other than this are at one place, m: far below what any drawing tells apart."""
_SAME_X: Final = 1e-3
"""Deck joints of two trusses stand at the same x within this, m: drawings in feet and in metres round differently."""


def sections(there: Directory) -> Problems:
    """Walls and plates too thick for their section."""
    for name, section in items(there.bridge.sections):
        if _readable_section(section):
            for problem in faults(section):
                yield Problem(join(f"sections/{name}", problem.path), problem.what, problem.expected)


def _readable_section(section: Section) -> bool:
    parts: list[Any] = [getattr(section, field.name) for field in fields(section)]
    for dimension in section.dimensions.values():
        rectangles = list(dimension.values()) if isinstance(dimension, Mapping) else []
        parts += [(one.width, one.height, one.x, one.y) for one in rectangles if isinstance(one, Rectangle)]
    return all(parts_readable(part) for part in parts)


def trusses(there: Directory) -> Problems:
    """Joints, sections and materials that are not there; bars without length; deck joints out of order."""
    for name, truss in items(there.bridge.trusses):
        path = f"trusses/{name}"
        if truss.same_as is not None:
            yield from _copy(there, truss.same_as, path)
            continue
        for joint in truss.supports if readable(truss.supports) else ():
            yield from known(joint, truss.joints, f"{path}/supports/{joint}", "joint")
        bars = list(each(truss.bars))
        yield from twice(((f"{path}/bars/{place}/id", bar.id) for place, bar in bars), "bar")
        for place, bar in bars:
            yield from _bar(there, truss, bar, f"{path}/bars/{place}")
        yield from _deck_joints(truss, f"{path}/deck joints")


def _copy(there: Directory, original: str, path: str) -> Problems:
    yield from known(original, there.bridge.trusses, f"{path}/same as", "truss")
    found = there.bridge.trusses.get(original)
    if found is not None and readable(found) and found.same_as is not None:
        what = f"`{original}` is a copy itself"
        yield Problem(f"{path}/same as", what, "the name of a truss that is written out")


def _bar(there: Directory, truss: Truss, bar: Bar, path: str) -> Problems:
    yield from known(bar.start, truss.joints, f"{path}/from", "joint")
    yield from known(bar.end, truss.joints, f"{path}/to", "joint")
    yield from there.piece(bar.section, bar.material, path)
    start, end = _place(truss, bar.start), _place(truss, bar.end)
    if start is not None and end is not None and math.dist(start, end) < _NO_LENGTH:
        yield Problem(
            path, f"from `{bar.start}` to `{bar.end}` the bar has no length", "two joints at different places"
        )


def _place(truss: Truss, joint: str) -> tuple[float, float] | None:
    """Where a joint is, m, if that could be read."""
    if not readable(joint, truss.joints) or joint not in truss.joints:
        return None
    place = truss.joints[joint]
    return (place[0].si, place[1].si) if parts_readable(place) else None


def _deck_joints(truss: Truss, path: str) -> Problems:
    found: list[tuple[str, float]] = []
    for index, joint in each(truss.deck_joints):
        yield from known(joint, truss.joints, f"{path}/{index}", "joint")
        place = _place(truss, joint)
        if place is None:
            continue
        if found and place[0] <= found[-1][1] + _NO_LENGTH:
            what = f"`{joint}` does not lie beyond `{found[-1][0]}`"
            yield Problem(f"{path}/{index}", what, "deck joints in the order of rising x")
        found.append((joint, place[0]))


def decks_match(there: Directory) -> Problems:
    """Deck joints of two trusses that do not stand side by side."""
    written = [(name, truss) for name, truss in items(there.bridge.trusses) if truss.same_as is None]
    for (name, one), (other_name, other) in pairwise(written):
        x, other_x = _deck_places(one), _deck_places(other)
        if x is None or other_x is None:
            continue
        if len(x) != len(other_x) or any(abs(a - b) > _SAME_X for a, b in zip(x, other_x, strict=True)):
            what = f"they do not stand at the same x as those of `{name}`"
            yield Problem(f"trusses/{other_name}/deck joints", what, "deck joints of both trusses at the same x")


def _deck_places(truss: Truss) -> list[float] | None:
    """The x of all deck joints, m, if all could be read."""
    if not readable(truss.deck_joints):
        return None
    places = [_place(truss, joint) for joint in truss.deck_joints]
    found = [place[0] for place in places if place is not None]
    return found if len(found) == len(places) else None


def deck(there: Directory) -> Problems:
    """Trusses that the deck names and that are not there."""
    if readable(there.bridge.deck):
        for key, value in (("offset", there.bridge.deck.offset), ("edge", there.bridge.deck.edge)):
            for name in value if isinstance(value, Mapping) else ():
                yield from known(name, there.bridge.trusses, f"deck/{key}/{name}", "truss")


def half_through(there: Directory) -> Problems:
    """A floor beam of a section or material that is not there."""
    given = there.bridge.half_through
    beam = given.floor_beam if given is not None and readable(given) else None
    if beam is not None and readable(beam):
        yield from there.piece(beam.section, beam.material, "half through/floor beam")


def live(there: Directory) -> Problems:
    """Live loads of one name, companions that are not there, vehicles wider than the deck."""
    rating = there.bridge.rating
    if not readable(rating) or not readable(rating.live):
        return
    loads = list(each(rating.live))
    yield from twice(((f"rating/live/{place}/name", load.name) for place, load in loads), "live load")
    names = complete(load.name for _, load in loads) if readable(*rating.live) else UNREADABLE
    for place, load in loads:
        for index, companion in each(load.companions):
            yield from known(companion.load, names, f"rating/live/{place}/with/{index}/load", "live load")
        yield from _track(there, load, f"rating/live/{place}")


def _track(there: Directory, load: LiveLoad, path: str) -> Problems:
    width = there.bridge.deck.width if readable(there.bridge.deck) else UNREADABLE
    if not readable(width, load.track, load.vehicle) or (load.track is None and load.vehicle is None):
        return
    track = load.track.si if load.track is not None else axles_of(load)[2]
    if track > width.si:
        key = "vehicle" if load.track is None else "track"
        what = f"its wheels stand {track:.4g} m apart, and the deck is {width.text} wide"
        yield Problem(f"{path}/{key}", what, "a vehicle that fits on the deck")


def imposed(there: Directory) -> Problems:
    """Settlements, temperatures and short bars of trusses, joints and bars that are not there."""
    rating = there.bridge.rating
    for place, one in each(rating.imposed) if readable(rating) else ():
        path = f"rating/imposed/{place}"
        yield from there.truss_and_bar(one.truss, one.bar, path)
        truss = there.truss(one.truss)
        if truss is not None:
            yield from known(one.joint, truss.joints, f"{path}/joint", "joint")


def overrides(there: Directory) -> Problems:
    """Overrides of trusses and bars that are not there."""
    for place, one in each(there.bridge.overrides):
        yield from there.truss_and_bar(one.truss, one.bar, f"overrides/{place}")
