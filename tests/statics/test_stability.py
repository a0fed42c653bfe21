"""Whether a truss stands, on each side of every limit, and what moves where it does not."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from plane.build import Joints, truss
from plane.random_trusses import Sample, samples

from models.statics.geometry import Geometry
from models.statics.stability import RANK_TOLERANCE, WORST_CONDITION, judge

SQUARE: Joints = {"a": (0, 0), "b": (3, 0), "c": (3, 2), "d": (0, 2)}
PANELS: Joints = {f"{level}{i}": (3.0 * i, y) for level, y in (("b", 0.0), ("t", 2.0)) for i in range(4)}
PANEL_BARS = "b0-b1 b1-b2 b2-b3 t0-t1 t1-t2 t2-t3 b0-t0 b1-t1 b2-t2 b3-t3"


def shallow(rise: float, size: float = 1.0) -> Geometry:
    """Two bars to held joints: the ratio of the singular values is the rise over half the span, exactly."""
    return truss({"a": (-size, 0), "b": (size, 0), "c": (0, rise * size)}, "ac bc", {"a": "xy", "b": "xy"})


def named(names: tuple[str, ...], which: np.ndarray) -> set[str]:
    """The names that are marked."""
    return {name for name, marked in zip(names, which, strict=True) if marked}


@pytest.mark.parametrize("size", [1e-3, 1.0, 1e4])
@pytest.mark.parametrize(
    ("rise", "verdict"),
    [
        (0.99 * RANK_TOLERANCE, "mechanism"),
        (1.01 * RANK_TOLERANCE, "nearly a mechanism"),
        (0.99 / WORST_CONDITION, "nearly a mechanism"),
        (1.01 / WORST_CONDITION, "determinate"),
        (0.5, "determinate"),
    ],
)
def test_limits(rise: float, verdict: str, size: float) -> None:
    """Rank tolerance 1e-10 and condition 1e8 divide the verdicts, whatever the size of the truss."""
    assert judge(shallow(rise, size)).verdict == verdict


def test_limits_are_those_of_the_methods() -> None:
    """The two limits have the values that the documents state."""
    assert (RANK_TOLERANCE, WORST_CONDITION) == (1e-10, 1e8)


@pytest.mark.parametrize("rise", [1e-12, 5e-9])
def test_a_flat_joint_is_named(rise: float) -> None:
    """The joint that would move is named of a mechanism and of a truss that nearly is one."""
    found = judge(shallow(rise))
    assert named(("a", "b", "c"), found.moving) == {"c"}
    assert found.loose.all()
    assert not found.carries


def test_condition_of_a_shallow_pair() -> None:
    """The condition number is the ratio of the singular values."""
    assert judge(shallow(1e-3)).condition == pytest.approx(1e3, rel=1e-9)


def test_a_standing_truss_moves_nowhere() -> None:
    """Nothing is marked as moving or loose, and forces may be worked out."""
    found = judge(truss(SQUARE, "ab bc cd da ac", {"a": "xy", "b": "y"}))
    assert (found.verdict, found.mechanisms, found.self_stress) == ("determinate", 0, 0)
    assert found.carries
    assert not found.moving.any()
    assert not found.loose.any()


def test_a_redundant_truss() -> None:
    """The second diagonal of a panel is one state of self-stress."""
    found = judge(truss(SQUARE, "ab bc cd da ac bd", {"a": "xy", "b": "y"}))
    assert (found.verdict, found.self_stress, found.carries) == ("redundant", 1, True)


def test_a_square_sways() -> None:
    """Without a diagonal the top joints move and the bars up to them join moving to still parts."""
    geometry = truss(SQUARE, "ab bc cd da", {"a": "xy", "b": "y"})
    found = judge(geometry)
    assert (found.verdict, found.mechanisms, found.condition) == ("mechanism", 1, np.inf)
    assert named(geometry.joints, found.moving) == {"c", "d"}
    assert named(geometry.bars, found.loose) == {"bc", "da"}


def test_an_end_panel_that_lost_its_diagonal() -> None:
    """What hangs on the still part is named: the rest of the truss does not move."""
    geometry = truss(PANELS, PANEL_BARS + " b0-t1 b1-t2", {"b0": "xy", "b2": "y"})
    found = judge(geometry)
    assert (found.verdict, found.mechanisms) == ("mechanism", 1)
    assert named(geometry.joints, found.moving) == {"b3", "t3"}
    assert named(geometry.bars, found.loose) == {"b2-b3", "t2-t3"}


def test_redundant_and_moving_at_once() -> None:
    """A crossed panel does not help an open one: one state of self-stress, one mechanism, degree 0."""
    geometry = truss(PANELS, PANEL_BARS + " t0-b1 b0-t1 t3-b2", {"b0": "xy", "b3": "y"})
    found = judge(geometry)
    assert geometry.degree == 0
    assert (found.verdict, found.mechanisms, found.self_stress) == ("mechanism", 1, 1)


def test_no_support() -> None:
    """A truss that stands on nothing has the three motions of a rigid body, in which every joint moves."""
    found = judge(truss(SQUARE, "ab bc cd da ac", {}))
    assert (found.verdict, found.mechanisms) == ("mechanism", 3)
    assert found.moving.all()
    assert not found.loose.any()


def test_rollers_only() -> None:
    """On rollers alone a truss slides away as a whole."""
    found = judge(truss(SQUARE, "ab bc cd da ac", {"a": "y", "b": "y"}))
    assert (found.verdict, found.mechanisms) == ("mechanism", 1)
    assert found.moving.all()


def test_three_rollers() -> None:
    """Three reactions that are parallel hold nothing along the bridge, although they are enough in number."""
    geometry = truss(PANELS, PANEL_BARS + " b0-t1 b1-t2 b2-t3", {"b0": "y", "b1": "y", "b3": "y"})
    assert geometry.degree == 0
    assert (judge(geometry).mechanisms, judge(geometry).self_stress) == (1, 1)


def test_reactions_through_one_point() -> None:
    """A pin and a support along the line to it let the truss turn about the pin."""
    geometry = truss(SQUARE, "ab bc cd da ac", {"a": "xy", "b": "x"})
    found = judge(geometry)
    assert (found.verdict, found.mechanisms, geometry.degree) == ("mechanism", 1, 0)
    assert named(geometry.joints, found.moving) == {"b", "c", "d"}


def test_reactions_that_coincide() -> None:
    """A single pinned joint holds no truss: it swings about it."""
    found = judge(truss(SQUARE, "ab bc cd da ac", {"a": "xy"}))
    assert (found.verdict, found.mechanisms) == ("mechanism", 1)
    assert not found.moving[0]


def test_no_bar_left() -> None:
    """A truss that lost all its bars is joints that fall, each for itself."""
    found = judge(truss(SQUARE, "", {"a": "xy", "b": "y"}))
    assert (found.verdict, found.mechanisms) == ("mechanism", 5)
    assert found.moving.tolist() == [False, True, True, True]


def test_every_joint_held() -> None:
    """A bar between two pins has a self-stress and no motion."""
    found = judge(truss({"a": (0, 0), "b": (3, 0)}, "ab", {"a": "xy", "b": "xy"}))
    assert (found.verdict, found.mechanisms, found.self_stress) == ("redundant", 0, 1)


@settings(max_examples=50, deadline=None)
@given(sample=samples())
def test_counts_agree(sample: Sample) -> None:
    """Degree is states of self-stress less mechanisms, and the usual trusses stand."""
    found = judge(sample.geometry)
    assert found.carries
    assert sample.geometry.degree == found.self_stress - found.mechanisms
