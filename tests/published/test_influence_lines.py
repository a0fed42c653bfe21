"""Influence lines of bars and reactions for a unit load along the deck."""

from __future__ import annotations

import numpy as np
import pytest
from plane.build import influence, response_of, truss
from published.example import within
from published.redundant_trusses import EXAMPLES

BRIDGE = truss(
    {
        "A": (0, 0), "B": (6, 0), "C": (12, 0), "D": (18, 0), "E": (24, 0), "H": (6, 6), "G": (12, 6), "F": (18, 6),
    },
    "AB BC CD DE HG GF AH BG DG EF BH CG DF",
    {"A": "xy", "E": "y"},
    deck="A B C D E",
)  # fmt: skip
"""R. C. Hibbeler, Structural Analysis, 8th ed., examples 6.15 and 6.16 (from memory): four panels of 6 m, 6 m high."""

PRINTED = {
    "BG": ("0", "0.354", "-0.707", "-0.354", "0"),
    "CG": ("0", "0", "1", "0", "0"),
}
COMPUTED = {
    "BC": ("0", "0.5", "1.0", "0.5", "0"),
    "HG": ("0", "-0.75", "-0.5", "-0.25", "0"),
    "AH": ("0", "-1.0607", "-0.7071", "-0.3536", "0"),
}

TWO_SPANS = next(example for example in EXAMPLES if example.name == "two spans")


@pytest.mark.parametrize("bar", PRINTED | COMPUTED)
def test_through_truss(bar: str) -> None:
    """The influence line of a diagonal, a hanger, both chords and an end post, at every deck joint."""
    ordinates = influence(BRIDGE, response_of(BRIDGE))[BRIDGE.bars.index(bar)]
    for found, expected in zip(ordinates, (PRINTED | COMPUTED)[bar], strict=True):
        assert within(found, expected, 1.0 if expected in {"0", "1"} else 0.5)
        assert found == pytest.approx(float(expected), abs=5e-4)


@pytest.mark.parametrize(
    ("joint", "expected"),
    [
        ("b0", ("1", "0.48294", "0", "-0.01706", "0")),
        ("b2", ("0", "0.53411", "1", "0.53411", "0")),
        ("b4", ("0", "-0.01706", "0", "0.48294", "1")),
    ],
)
def test_reactions_of_two_spans(joint: str, expected: tuple[str, ...]) -> None:
    """A load in one span lifts the far end of the other (computed; equal EA)."""
    geometry = truss(TWO_SPANS.joints, TWO_SPANS.bars, TWO_SPANS.held, deck="b0 b1 b2 b3 b4")
    reactions = response_of(geometry, geometry.lengths).reactions
    found = -reactions[2 * geometry.joints.index(joint) + 1, 2 * geometry.deck + 1]
    np.testing.assert_allclose(found, [float(number) for number in expected], atol=5e-6)
