"""Plane trusses for tests, written as on a sketch: joints by letter, bars by the letters they join."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from models.calculation import Array
from models.statics.geometry import Geometry
from models.statics.response import Response, respond
from models.statics.stability import judge

Joints = Mapping[str, tuple[float, float]]
Loads = Mapping[str, tuple[float, float]]


def ends_of(bar: str) -> tuple[str, str]:
    """The joints of a bar `ab` or `b0-t1`."""
    start, end = bar.split("-") if "-" in bar else bar
    return start, end


def truss(joints: Joints, bars: str, held: Mapping[str, str], deck: str = "") -> Geometry:
    """A truss.

    Parameters
    ----------
    bars, deck : names with spaces between them. held : joint -> the axes held, ``xy``, ``x`` or ``y``.
    """
    number = {joint: index for index, joint in enumerate(joints)}
    names = tuple(bars.split())
    fixed = np.zeros(2 * len(joints), bool)
    for joint, axes in held.items():
        for axis in axes:
            fixed[2 * number[joint] + "xy".index(axis)] = True
    return Geometry(
        joints=tuple(joints),
        bars=names,
        coordinates=np.array(list(joints.values()), float).reshape(-1, 2),
        ends=np.array([[number[joint] for joint in ends_of(bar)] for bar in names], int).reshape(-1, 2),
        held=fixed,
        deck=np.array([number[joint] for joint in deck.split()], int),
    )


def load_vector(geometry: Geometry, loads: Loads) -> Array:
    """(2j,) forces along every degree of freedom."""
    vector = np.zeros(2 * len(geometry.joints))
    for joint, force in loads.items():
        at = 2 * geometry.joints.index(joint)
        vector[at : at + 2] = force
    return vector


def response_of(geometry: Geometry, flexibility: Array | None = None) -> Response:
    """The response of a truss that stands."""
    return respond(geometry, judge(geometry).condition, flexibility)


def influence(geometry: Geometry, response: Response) -> Array:
    """(m, d) force in each bar for a unit downward force on each deck joint."""
    return -response.forces[:, 2 * geometry.deck + 1]
