"""Footbridges for tests of loading: a Pratt truss of any size, and a bridge around trusses and a deck."""

from __future__ import annotations

from collections.abc import Mapping
from itertools import pairwise

from models.bridge import Bar, Deck, Footbridge, RatingRules, Truss
from models.quantity import Dimension, Quantity, parse


def quantity(text: str, dimension: Dimension) -> Quantity:
    """A dimension as a site file has it."""
    return parse(text, dimension)


def metres(value: float) -> Quantity:
    """A length in metres."""
    return Quantity(f"{value!r} m", value)


def pratt(panels: int, panel: str, height: str) -> Truss:
    """A Pratt truss of an even number of panels: L0 ... on the deck, U1 ... above, diagonals falling inwards."""
    width, rise = parse(panel, "length").si, parse(height, "length").si
    bottom, top = [f"L{i}" for i in range(panels + 1)], [f"U{i}" for i in range(1, panels)]
    joints = {
        joint: (metres(width * int(joint[1:])), metres(rise if joint[0] == "U" else 0.0)) for joint in bottom + top
    }
    ends = [*pairwise(bottom), *pairwise(top), ("L0", top[0]), (top[-1], bottom[-1])]
    ends += [(f"L{i}", f"U{i}") for i in range(1, panels)]
    ends += [(f"U{i}", f"L{i + 1}") for i in range(1, panels // 2)]
    ends += [(f"L{i}", f"U{i + 1}") for i in range(panels // 2, panels - 1)]
    bars = tuple(Bar(f"{start}-{end}", start, end, "any", "steel", "other") for start, end in ends)
    supports = {bottom[0]: "pin", bottom[-1]: "roller"}
    return Truss("pratt", "half through", joints, supports, bars, tuple(bottom))


def footbridge(trusses: Mapping[str, Truss], deck: Deck) -> Footbridge:
    """A bridge of which only trusses and deck count."""
    return Footbridge(
        id="00000000-0000-5000-8000-000000000000",
        name="Alder Weir footbridge",
        materials={},
        sections={},
        trusses=trusses,
        deck=deck,
        rating=RatingRules("lrfr", ()),
    )
