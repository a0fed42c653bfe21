"""Forces without loads: against displacements solved for directly, and against what must be nothing."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from plane.build import response_of, truss
from plane.random_trusses import Sample, samples

from models.calculation import Array
from models.statics.geometry import Geometry, equilibrium_matrix
from models.statics.imposed import imposed_forces, imposed_reactions, misfit_of_movement

TWO_SPANS = truss(
    {"a": (0, 0), "b": (4, 0), "c": (8, 0), "d": (2, 3), "e": (6, 3)},
    "ab bc ad db be ec de",
    {"a": "xy", "b": "y", "c": "y"},
)


def by_displacements(geometry: Geometry, flexibility: Array, too_long: Array, movement: Array) -> Array:
    """Bar forces by the stiffness method: the joints go where no unbalanced force is left."""
    everything, free = equilibrium_matrix(geometry), ~geometry.held
    stiffness = 1 / flexibility
    stretched = -too_long - movement @ everything
    unbalanced = everything[free] @ (stiffness * stretched)
    moved = np.linalg.solve((everything[free] * stiffness) @ everything[free].T, unbalanced)
    return stiffness * (stretched - moved @ everything[free])


@settings(max_examples=40, deadline=None)
@given(sample=samples(redundant=True, well=True), seed=st.integers(0, 1000))
def test_against_the_stiffness_method(sample: Sample, seed: int) -> None:
    """Bars too long or short and supports that move give the forces that displacements give."""
    geometry, response = sample.geometry, sample.response
    numbers = np.random.default_rng(seed)
    too_long = numbers.uniform(-0.01, 0.01, len(geometry.bars))
    movement = np.where(geometry.held, numbers.uniform(-0.01, 0.01, len(geometry.held)), 0.0)
    misfit = too_long + misfit_of_movement(geometry, movement)
    (found,) = imposed_forces(response, sample.flexibility, misfit[None])
    expected = by_displacements(geometry, sample.flexibility, too_long, movement)
    size = (np.abs(misfit) / sample.flexibility).max()
    np.testing.assert_allclose(found, expected, atol=1e-6 * size)
    (reactions,) = imposed_reactions(geometry, found[None])
    np.testing.assert_allclose(equilibrium_matrix(geometry) @ found + reactions, 0.0, atol=1e-9 * size)
    np.testing.assert_allclose(reactions.reshape(-1, 2).sum(axis=0), 0.0, atol=1e-9 * size)


@settings(max_examples=30, deadline=None)
@given(sample=samples(well=True), seed=st.integers(0, 1000))
def test_bars_that_fit_some_other_shape_are_free_of_force(sample: Sample, seed: int) -> None:
    """Bars as long as joints that moved a little would ask for fit, exactly: their forces are zero, not small."""
    geometry = sample.geometry
    moved = np.where(geometry.held, 0.0, np.random.default_rng(seed).uniform(-0.01, 0.01, len(geometry.held)))
    (found,) = imposed_forces(sample.response, sample.flexibility, -moved[None] @ equilibrium_matrix(geometry))
    assert not found.any()


@settings(max_examples=20, deadline=None)
@given(sample=samples(well=True))
def test_even_warmth_is_free_of_force_where_supports_give_way(sample: Sample) -> None:
    """A truss on a pin and rollers at one height grows evenly: no forces at all."""
    geometry = sample.geometry
    heights = geometry.coordinates[np.unique(np.flatnonzero(geometry.held) // 2), 1]
    if np.ptp(heights) == 0.0:
        (found,) = imposed_forces(sample.response, sample.flexibility, 3.6e-4 * geometry.lengths[None])
        assert not found.any()


def test_a_determinate_truss_takes_anything_without_force() -> None:
    """Nothing resists a short bar, warmth or a settlement where every bar is necessary."""
    geometry = TWO_SPANS.keeping([0, 1, 2, 3, 4, 5])
    misfits = np.eye(6) * 0.01
    assert not imposed_forces(response_of(geometry), geometry.lengths / 2e8, misfits).any()


def test_a_middle_support_that_goes_down_loses_its_reaction() -> None:
    """Going down takes reaction from the middle support and gives half of it to each end."""
    flexibility = TWO_SPANS.lengths / 4e8
    movement = np.zeros(10)
    movement[3] = -0.01
    misfit = misfit_of_movement(TWO_SPANS, movement)
    forces = imposed_forces(response_of(TWO_SPANS, flexibility), flexibility, misfit[None])
    _, middle, last = imposed_reactions(TWO_SPANS, forces)[0, 1:6:2]
    assert middle < 0.0
    assert last == pytest.approx(-middle / 2)
    assert forces[0, 6] < 0.0


def test_changes_are_independent() -> None:
    """Each row stands for itself, and opposite changes give opposite forces."""
    flexibility = TWO_SPANS.lengths / 4e8
    response = response_of(TWO_SPANS, flexibility)
    misfits = np.zeros((2, 7))
    misfits[:, 6] = 0.004, -0.004
    one, other = imposed_forces(response, flexibility, misfits)
    np.testing.assert_allclose(one, -other, rtol=1e-14)
    assert one[6] < 0.0
    assert imposed_forces(response, flexibility, np.zeros((0, 7))).shape == (0, 7)
