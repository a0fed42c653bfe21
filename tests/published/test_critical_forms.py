"""Trusses that count as determinate and still move, from the literature on critical forms.

HOLTZ stands for the open book named in `published.determinate_trusses`. Cases marked computed are not printed
anywhere we have seen; a second calculation gave the rank.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from math import sqrt

import numpy as np
import pytest
from plane.build import Joints, load_vector, response_of, truss
from published.determinate_trusses import HOLTZ
from published.example import within

from models.statics.geometry import equilibrium_matrix
from models.statics.stability import judge

HEXAGON_BARS = "ab bc cd de ef fa be cf ad"
PIN_AND_ROLLER = {"a": "xy", "f": "y"}
NEAR_HEXAGON: Joints = {"a": (0, 0), "b": (0, 4), "c": (2, 8.001), "d": (6, 8), "e": (8, 4), "f": (8, 0)}


@dataclass(frozen=True)
class Critical:
    """A truss with the rank of its equilibrium equations, bars and reactions together."""

    name: str
    source: str
    joints: Joints
    bars: str
    held: Mapping[str, str]
    unknowns: int
    rank: int

    def __str__(self) -> str:
        return self.name


CASES = (
    Critical(
        name="square without a diagonal",
        source=f"{HOLTZ}, chapter 3 (principle read; computed)",
        joints={"a": (0, 0), "b": (1, 0), "c": (1, 1), "d": (0, 1)},
        bars="ab bc cd da",
        held={"a": "xy", "b": "y"},
        unknowns=7,
        rank=7,
    ),
    Critical(
        name="regular hexagon with its long diagonals",
        source=f"{HOLTZ}, 3.2.2 (read)",
        joints={
            "a": (0, 0),
            "b": (-0.5, sqrt(3) / 2),
            "c": (0, sqrt(3)),
            "d": (1, sqrt(3)),
            "e": (1.5, sqrt(3) / 2),
            "f": (1, 0),
        },
        bars=HEXAGON_BARS,
        held=PIN_AND_ROLLER,
        unknowns=12,
        rank=11,
    ),
    Critical(
        name="irregular hexagon",
        source=f"{HOLTZ}, notebook (read)",
        joints={"a": (0, 0), "b": (0, 4), "c": (2, 8), "d": (6, 8), "e": (8, 4), "f": (8, 0)},
        bars=HEXAGON_BARS,
        held=PIN_AND_ROLLER,
        unknowns=12,
        rank=11,
    ),
    Critical(
        name="hexagon on a conic",
        source="six joints of a K(3,3) truss on one conic (computed)",
        joints={"a": (0, 0), "b": (0, 4), "c": (3, 8), "d": (7, 8), "e": (10, 4), "f": (10, 0)},
        bars=HEXAGON_BARS,
        held=PIN_AND_ROLLER,
        unknowns=12,
        rank=11,
    ),
    Critical(
        name="triangle on three parallel rollers",
        source=f"{HOLTZ}; Baker & Haynes, Engineering Statics: Open and Interactive, 6.3 (rule read; computed)",
        joints={"A": (0, 0), "B": (4, 0), "C": (2, 3)},
        bars="AB BC AC",
        held={"A": "y", "B": "y", "C": "y"},
        unknowns=6,
        rank=5,
    ),
    Critical(
        name="triangle with reactions through one point",
        source="pin and a roller along the line to it (computed)",
        joints={"A": (0, 0), "B": (4, 0), "C": (2, 3)},
        bars="AB BC AC",
        held={"A": "xy", "B": "x"},
        unknowns=6,
        rank=5,
    ),
    Critical(
        name="crossed end panel, open middle panel",
        source="counts as determinate (computed)",
        joints={f"{level}{i}": (3.0 * i, y) for level, y in (("b", 0.0), ("t", 3.0)) for i in range(4)},
        bars="b0-b1 b1-b2 b2-b3 t0-t1 t1-t2 t2-t3 b0-t0 b1-t1 b2-t2 b3-t3 t0-b1 b0-t1 t3-b2",
        held={"b0": "xy", "b3": "y"},
        unknowns=16,
        rank=15,
    ),
)


@pytest.mark.parametrize("case", CASES, ids=str)
def test_rank(case: Critical) -> None:
    """The rank tells the mechanism, whatever counting says."""
    geometry = truss(case.joints, case.bars, case.held)
    found = judge(geometry)
    unknowns = len(geometry.bars) + int(geometry.held.sum())
    assert unknowns == case.unknowns
    assert unknowns - found.self_stress == case.rank
    assert found.verdict == "mechanism"
    assert found.mechanisms == 2 * len(geometry.joints) - case.rank


def test_hexagon_close_to_its_critical_form() -> None:
    """A joint moved by 1 mm leaves a condition of about 4.5e4, which still carries (Holtz, notebook, read).

    The printed number is of all equations with the reactions as unknowns; of the free equations alone it is 3.9e4.
    """
    geometry = truss(NEAR_HEXAGON, HEXAGON_BARS, PIN_AND_ROLLER)
    found = judge(geometry)
    whole = np.hstack([equilibrium_matrix(geometry), np.eye(12)[:, geometry.held]])
    assert within(np.linalg.cond(whole), "4.5e4")
    assert found.verdict == "determinate"
    assert found.condition == pytest.approx(3.9e4, rel=0.01)


def test_forces_close_to_a_critical_form() -> None:
    """The forces there are those printed: thousands of times the load, and right to the last digit."""
    printed = {
        "ab": "1778.6", "bc": "1988.5", "cd": "2222.3", "de": "1988.1", "ef": "1778.2", "fa": "1334.2", "be": "-889.1",
        "cf": "-2223.9", "ad": "-2222.0",
    }  # fmt: skip
    geometry = truss(NEAR_HEXAGON, HEXAGON_BARS, PIN_AND_ROLLER)
    response = response_of(geometry)
    load = load_vector(geometry, {"c": (1, 0)})
    for bar, force in zip(geometry.bars, response.forces @ load, strict=True):
        assert within(force, printed[bar]), (bar, force)
    reactions = (response.reactions @ load).reshape(-1, 2)
    assert within(reactions[0, 0], "-1")
    assert within(reactions[0, 1], "-1.0001")
    assert within(reactions[-1, 1], "1.0001")


def test_double_warren_counts_one_redundant() -> None:
    """A double Warren truss of four panels has 14 bars, 3 reactions, 8 joints and one redundant.

    Counts from Holtz, problem set, 9 (figure read); which joints the bars join is ours.
    """
    joints = {f"b{i}": (3.0 * i, 0.0) for i in range(5)} | {f"t{i}": (3.0 * i, 3.0) for i in (1, 2, 3)}
    bars = "b0-b1 b1-b2 b2-b3 b3-b4 t1-t2 t2-t3 b0-t1 b1-t2 b2-t1 b2-t3 b3-t2 b4-t3 b1-t1 b3-t3"
    geometry = truss(joints, bars, {"b0": "xy", "b4": "y"})
    found = judge(geometry)
    assert (len(geometry.bars), geometry.degree) == (14, 1)
    assert (found.verdict, found.self_stress) == ("redundant", 1)
    assert response_of(geometry).redundancy.sum() == pytest.approx(1.0, abs=1e-12)
    assert np.isfinite(found.condition)
