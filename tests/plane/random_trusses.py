"""Random sound trusses of the usual families as arrays, with what hypothesis draws."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from hypothesis import assume
from hypothesis import strategies as st
from strategies import frames
from strategies.choices import Drawn

from models.calculation import Array
from models.statics.geometry import Geometry
from models.statics.response import Response, respond
from models.statics.stability import judge

E = 200e9


@dataclass(frozen=True, eq=False)
class Sample:
    """A truss, the elongation of each bar under unit tension (m/N), and loads on all joints (N)."""

    geometry: Geometry
    flexibility: Array
    loads: Array

    @property
    def response(self) -> Response:
        """Of the truss with all its bars."""
        return respond(self.geometry, judge(self.geometry).condition, self.flexibility)


def error_of(response: Response, loads: Array) -> float:
    """The rounding error that a response says its forces may have under these loads, N."""
    return response.noise * float(np.abs(response.forces).max() * np.abs(loads).sum())


def geometry_of_frame(frame: frames.Truss) -> Geometry:
    """A generated truss as arrays, in metres."""
    number = {joint: index for index, joint in enumerate(frame.joints)}
    held = np.zeros(2 * len(number), bool)
    for joint, support in frame.supports.items():
        held[2 * number[joint]] = support == "pin"
        held[2 * number[joint] + 1] = True
    return Geometry(
        joints=tuple(number),
        bars=tuple(f"{start}-{end}" for _, start, end in frame.bars),
        coordinates=np.array(list(frame.joints.values())) / 1000,
        ends=np.array([[number[start], number[end]] for _, start, end in frame.bars]),
        held=held,
        deck=np.array([number[joint] for joint in frame.deck]),
    )


@st.composite
def samples(draw: Callable[..., Any], *, redundant: bool = False, well: bool = False) -> Sample:
    """Pratt, Howe and Warren trusses of 2 to 10 panels, some crossed, on two or three supports.

    Parameters
    ----------
    redundant : over three supports, so that there is a state of self-stress. well : none with a nearly flat joint.
    """
    choices = Drawn(draw)
    plan = frames.plan(choices)
    frame = frames.build(choices, replace(plan, continuous=True) if redundant else plan)
    assume(not (well and "flat joint" in frame.labels))
    geometry = geometry_of_frame(frame)
    bars, freedoms = len(geometry.bars), 2 * len(geometry.joints)
    area = draw(st.lists(st.integers(500, 5000), min_size=bars, max_size=bars))
    loads = draw(st.lists(st.integers(-20, 20), min_size=freedoms, max_size=freedoms))
    return Sample(geometry, geometry.lengths / (E * 1e-6 * np.array(area, float)), 1e3 * np.array(loads, float))
