"""Laws of statics that hold for every truss, over random ones."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from plane.random_trusses import Sample, error_of, samples

from models.statics.geometry import equilibrium_matrix
from models.statics.response import respond
from models.statics.stability import judge

many = settings(max_examples=60, deadline=None)


@many
@given(sample=samples())
def test_equilibrium_at_every_joint(sample: Sample) -> None:
    """At every joint bar forces, load and reaction cancel."""
    geometry, response = sample.geometry, sample.response
    forces, reactions = response.forces @ sample.loads, response.reactions @ sample.loads
    remainder = np.zeros((len(geometry.joints), 2))
    for force, (start, end) in zip(forces, geometry.ends, strict=True):
        pull = force * (geometry.coordinates[end] - geometry.coordinates[start])
        pull /= np.linalg.norm(geometry.coordinates[end] - geometry.coordinates[start])
        remainder[start] += pull
        remainder[end] -= pull
    remainder += (sample.loads + reactions).reshape(-1, 2)
    assert np.abs(remainder).max() <= error_of(response, sample.loads) + 1e-6


@many
@given(sample=samples())
def test_equilibrium_of_the_whole(sample: Sample) -> None:
    """Loads and reactions have no resultant and no moment."""
    response = sample.response
    acting = (sample.loads + response.reactions @ sample.loads).reshape(-1, 2)
    x, y = sample.geometry.coordinates.T
    tolerance = error_of(response, sample.loads) + 1e-6
    np.testing.assert_allclose(acting.sum(axis=0), 0.0, atol=tolerance)
    assert (x * acting[:, 1] - y * acting[:, 0]).sum() == pytest.approx(0.0, abs=30 * tolerance)


@many
@given(sample=samples())
def test_mirror(sample: Sample) -> None:
    """A truss seen from the other side has the same forces under the loads seen from there."""
    geometry, response = sample.geometry, sample.response
    sideways = np.tile([-1.0, 1.0], len(geometry.joints))
    mirrored = replace(sample, geometry=replace(geometry, coordinates=geometry.coordinates * [-1.0, 1.0]))
    np.testing.assert_allclose(
        mirrored.response.forces @ (sideways * sample.loads),
        response.forces @ sample.loads,
        atol=2 * error_of(response, sample.loads),
    )


@many
@given(sample=samples(), size=st.floats(0.01, 100.0), softness=st.floats(0.01, 100.0))
def test_scale(sample: Sample, size: float, softness: float) -> None:
    """A larger truss and one of softer metal have the same forces."""
    geometry, response = sample.geometry, sample.response
    other = replace(
        sample,
        geometry=replace(geometry, coordinates=geometry.coordinates * size),
        flexibility=sample.flexibility * softness,
    )
    np.testing.assert_allclose(other.response.forces, response.forces, atol=2 * error_of(response, np.ones(1)))


@many
@given(sample=samples(), parts=st.integers(0, 5))
def test_superposition(sample: Sample, parts: int) -> None:
    """Two loads together give the sum of what each gives, and a reversed load reversed forces."""
    response = sample.response
    first = np.where(np.arange(len(sample.loads)) % 6 <= parts, sample.loads, 0.0)
    second = sample.loads - first
    together = response.forces @ first + response.forces @ second
    tolerance = error_of(response, sample.loads)
    np.testing.assert_allclose(together, response.forces @ sample.loads, atol=tolerance)
    np.testing.assert_array_equal(response.forces @ -sample.loads, -(response.forces @ sample.loads))


@many
@given(sample=samples(), data=st.data())
def test_order_does_not_matter(sample: Sample, data: st.DataObject) -> None:
    """Joints and bars may stand in any order in the file, and a bar may be drawn from either end."""
    geometry, response = sample.geometry, sample.response
    joints = np.array(data.draw(st.permutations(range(len(geometry.joints)))))
    bars = np.array(data.draw(st.permutations(range(len(geometry.bars)))))
    place = np.argsort(joints)
    freedoms = (2 * joints[:, None] + [0, 1]).ravel()
    other = Sample(
        replace(
            geometry,
            joints=tuple(geometry.joints[joint] for joint in joints),
            bars=tuple(geometry.bars[bar] for bar in bars),
            coordinates=geometry.coordinates[joints],
            ends=place[geometry.ends[bars]][:, ::-1],
            held=geometry.held[freedoms],
            deck=place[geometry.deck],
        ),
        sample.flexibility[bars],
        sample.loads[freedoms],
    )
    tolerance = 2 * error_of(response, sample.loads)
    found = other.response
    np.testing.assert_allclose(found.forces @ other.loads, (response.forces @ sample.loads)[bars], atol=tolerance)
    np.testing.assert_allclose(
        found.reactions @ other.loads, (response.reactions @ sample.loads)[freedoms], atol=tolerance + 1e-6
    )


@many
@given(sample=samples(well=True))
def test_the_bars_fit_together(sample: Sample) -> None:
    """The elongations belong to displacements of the joints, and these are reciprocal (Maxwell 1864, Betti 1872)."""
    geometry, response = sample.geometry, sample.response
    free = ~geometry.held
    elongations = sample.flexibility[:, None] * response.forces[:, free]
    compatibility = -equilibrium_matrix(geometry)[free].T
    displacements, *_ = np.linalg.lstsq(compatibility, elongations, rcond=None)
    size = np.abs(elongations).max()
    np.testing.assert_allclose(compatibility @ displacements, elongations, atol=1e-9 * size)
    np.testing.assert_allclose(displacements, displacements.T, atol=1e-9 * np.abs(displacements).max())
    by_virtual_work = response.forces[:, free].T @ elongations
    np.testing.assert_allclose(by_virtual_work, displacements, atol=1e-9 * np.abs(displacements).max())


@many
@given(sample=samples())
def test_redundancies_sum_to_the_degree(sample: Sample) -> None:
    """Each bar's redundancy lies between 0 and 1, and together they are the degree of redundancy."""
    redundancy = sample.response.redundancy
    assert (redundancy >= 0.0).all()
    assert (redundancy <= 1.0 + 1e-12).all()
    assert redundancy.sum() == pytest.approx(sample.geometry.degree, abs=1e-10)


@many
@given(sample=samples(redundant=True))
def test_projector(sample: Sample) -> None:
    """The states of self-stress are in equilibrium without load, and the projector on them is one."""
    geometry, response = sample.geometry, sample.response
    forces = response.scale[:, None] * response.projector
    free = equilibrium_matrix(geometry)[~geometry.held]
    np.testing.assert_allclose(free @ forces, 0.0, atol=1e-12)
    np.testing.assert_allclose(response.projector @ response.projector, response.projector, atol=1e-12)
    np.testing.assert_allclose(np.diag(response.projector), response.redundancy, atol=1e-14)


@many
@given(sample=samples())
def test_a_truss_stands_or_falls_with_its_shape_alone(sample: Sample) -> None:
    """The condition that decides is of the geometry; bars a hundred times softer do not make a mechanism."""
    found = judge(sample.geometry)
    softer = np.where(np.arange(len(sample.flexibility)) % 3 == 0, 100.0, 1.0) * sample.flexibility
    response = respond(sample.geometry, found.condition, softer)
    remainder = equilibrium_matrix(sample.geometry) @ response.forces @ sample.loads + sample.loads
    assert np.abs(remainder[~sample.geometry.held]).max() <= 100 * error_of(response, sample.loads)
