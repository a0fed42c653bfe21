"""Joint movements and frequencies, against closed forms and the stiffness method with its masses."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from plane.build import response_of, truss
from plane.footbridge import pratt
from plane.random_trusses import Sample, samples
from scipy.linalg import eigh

from models.calculation import Array
from models.statics.geometry import Geometry, equilibrium_matrix, geometry_of
from models.statics.vibration import joint_flexibility, lowest_frequency

STEEL = 200e9


def stiffness_upward(geometry: Geometry, flexibility: Array) -> tuple[Array, Array]:
    """Stiffness of the joints that are free to go up, with all that go along free of force; and which they are."""
    everything = equilibrium_matrix(geometry)
    whole = (everything / flexibility) @ everything.T
    free = ~geometry.held
    up = np.flatnonzero(free & (np.arange(len(free)) % 2 == 1))
    along = np.flatnonzero(free & (np.arange(len(free)) % 2 == 0))
    coupling = whole[np.ix_(up, along)]
    return whole[np.ix_(up, up)] - coupling @ np.linalg.solve(whole[np.ix_(along, along)], coupling.T), up // 2


@settings(max_examples=30, deadline=None)
@given(sample=samples(well=True), seed=st.integers(0, 1000))
def test_against_the_stiffness_method(sample: Sample, seed: int) -> None:
    """Movements are the inverse of the stiffness, and the lowest frequency is that of stiffness and mass."""
    geometry = sample.geometry
    mass = np.random.default_rng(seed).uniform(100.0, 3000.0, len(geometry.joints))
    stiffness, joints = stiffness_upward(geometry, sample.flexibility)
    forces = sample.response.forces[:, 1::2]
    found = joint_flexibility(forces[:, joints], sample.flexibility)
    np.testing.assert_allclose(found @ stiffness, np.eye(len(joints)), atol=1e-6)
    slowest = eigh(stiffness, np.diag(mass[joints]), eigvals_only=True)[0]
    expected = math.sqrt(slowest) / (2 * math.pi)
    assert lowest_frequency(forces, sample.flexibility, mass) == pytest.approx(expected, rel=1e-6)


def test_one_mass_on_two_bars() -> None:
    """A mass over two bars at a slope of 3 in 4 has the upward stiffness 2 (EA/L) (3/5)^2."""
    geometry = truss({"a": (0, 0), "b": (8, 0), "c": (4, 3)}, "ac bc", {"a": "xy", "b": "xy"})
    flexibility = np.full(2, 5.0 / (STEEL * 0.001))
    stiffness = 2 * 0.6**2 / flexibility[0]
    forces = response_of(geometry).forces[:, 1::2]
    assert joint_flexibility(forces, flexibility)[2, 2] == pytest.approx(1 / stiffness, rel=1e-13)
    found = lowest_frequency(forces, flexibility, np.array([50.0, 50.0, 2000.0]))
    assert found == pytest.approx(math.sqrt(stiffness / 2000.0) / (2 * math.pi), rel=1e-13)


def test_a_slender_truss_is_a_beam() -> None:
    """A long truss with stiff webs sags by 5 w L^4/(384 EI), and swings at pi/2 sqrt(EI/(m L^4)), EI = EA h^2/2."""
    panels, panel, height, area = 40, 1.0, 1.0, 0.002
    geometry = geometry_of(pratt(panels, f"{panel} m", f"{height} m"))
    chord = np.array([start[0] == end[0] for start, end in (bar.split("-") for bar in geometry.bars)])
    flexibility = geometry.lengths / (STEEL * np.where(chord, area, 1e4 * area))
    forces = response_of(geometry).forces[:, 1::2]
    span, bending, mass = panels * panel, STEEL * area * height**2 / 2, 500.0
    on_deck = np.zeros(len(geometry.joints))
    on_deck[geometry.deck] = mass * panel
    sag = joint_flexibility(forces[:, geometry.deck], flexibility) @ on_deck[geometry.deck] * 9.81
    assert sag.max() == pytest.approx(5 * mass * 9.81 * span**4 / (384 * bending), rel=0.01)
    expected = math.pi / 2 * math.sqrt(bending / (mass * span**4))
    assert lowest_frequency(forces, flexibility, on_deck) == pytest.approx(expected, rel=0.01)


def test_the_lowest_shape_need_not_be_the_one_of_dead_load() -> None:
    """Two equal spans swing in opposite directions first, although both sag down under their weight."""
    joints = {f"b{i}": (3.0 * i, 0.0) for i in range(5)} | {f"t{i}": (3.0 * i, 2.0) for i in range(1, 4)}
    bars = "b0-b1 b1-b2 b2-b3 b3-b4 t1-t2 t2-t3 b0-t1 b1-t1 t1-b2 b2-t2 b2-t3 b3-t3 t3-b4"
    two = truss(joints, bars, {"b0": "xy", "b2": "y", "b4": "y"})
    one_joints = {"a": (0.0, 0.0), "b": (3.0, 0.0), "c": (6.0, 0.0), "d": (3.0, 2.0)}
    one = truss(one_joints, "ab bc ad bd dc", {"a": "xy", "c": "y"})
    found = []
    for geometry in (two, one):
        flexibility = geometry.lengths / (STEEL * 0.001)
        mass = np.full(len(geometry.joints), 1000.0)
        found.append(lowest_frequency(response_of(geometry, flexibility).forces[:, 1::2], flexibility, mass))
    assert found[0] == pytest.approx(found[1], rel=0.05)


def test_nothing_moves() -> None:
    """Without mass, or without joints that move, there is no frequency."""
    geometry = truss({"a": (0, 0), "b": (8, 0), "c": (4, 3)}, "ac bc", {"a": "xy", "b": "xy"})
    forces, flexibility = response_of(geometry).forces[:, 1::2], np.full(2, 1e-8)
    assert lowest_frequency(forces, flexibility, np.zeros(3)) == math.inf
    assert lowest_frequency(forces[:, :0], flexibility, np.zeros(0)) == math.inf
