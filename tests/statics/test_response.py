"""Forces and reactions under unit loads: exact cases, accuracy close to a mechanism, redundancy."""

from __future__ import annotations

import numpy as np
import pytest
from plane.build import load_vector, response_of, truss
from plane.exact import exact_forces

from models.statics.geometry import Geometry, equilibrium_matrix
from models.statics.response import respond
from models.statics.stability import judge

CROSSED = truss(
    {"a": (0, 0), "b": (4, 0), "c": (4, 3), "d": (0, 3)}, "ab bc cd da ac bd", {"a": "xy", "b": "y"}, deck="a b"
)


def flat_chord(rise: float, second_crossed: bool) -> Geometry:
    """A truss of two panels whose sloping top chord is broken by a joint that only its own slight rise holds."""
    joints = {
        "a": (0, 0),
        "b": (2.1, 0),
        "c": (4, 0),
        "d": (0, 1.3),
        "f": (1.05, 1.5 + rise),
        "e": (2.1, 1.7),
        "g": (4, 1.3),
    }
    bars = "ab bc df fe eg ad be cg ae bd bg" + (" ce" if second_crossed else "")
    return truss(joints, bars, {"a": "xy", "c": "y"})


def test_a_bracket_by_hand() -> None:
    """A 3-4-5 bracket carries a load as its triangle of forces says."""
    geometry = truss({"a": (0, 0), "b": (0, 3), "c": (4, 0)}, "ac bc", {"a": "xy", "b": "xy"})
    response = response_of(geometry)
    load = load_vector(geometry, {"c": (0, -30)})
    np.testing.assert_allclose(response.forces @ load, [-40.0, 50.0], rtol=1e-14)
    np.testing.assert_allclose(response.reactions @ load, [40.0, 0.0, -40.0, 30.0, 0.0, 0.0], atol=1e-13)


def test_loads_on_supports_go_straight_down() -> None:
    """A force on a held degree of freedom stretches no bar and comes back as the reaction."""
    response = response_of(CROSSED, CROSSED.lengths)
    load = load_vector(CROSSED, {"a": (3, -5), "b": (0, -7)})
    np.testing.assert_array_equal(response.forces @ load, 0.0)
    np.testing.assert_array_equal((response.reactions @ load)[CROSSED.held], [-3.0, 5.0, 7.0])


def test_free_joints_have_no_reaction() -> None:
    """Rows of degrees of freedom that nothing holds are zero."""
    response = response_of(CROSSED, CROSSED.lengths)
    assert not response.reactions[~CROSSED.held].any()


def test_redundancies_of_a_crossed_panel() -> None:
    """A bar's redundancy is the share of its own flexibility in that of the loop: f n^2 over the sum of them."""
    flexibility = CROSSED.lengths * np.array([1.0, 2.0, 0.5, 1.0, 3.0, 1.0])
    state = np.array([-0.8, -0.6, -0.8, -0.6, 1.0, 1.0])
    share = flexibility * state**2 / (flexibility * state**2).sum()
    response = response_of(CROSSED, flexibility)
    np.testing.assert_allclose(response.redundancy, share, rtol=1e-13)
    assert response.redundancy.sum() == pytest.approx(1.0, abs=1e-14)


def test_forces_of_a_determinate_truss_do_not_depend_on_stiffness() -> None:
    """With no redundancy the bars' areas change nothing, and there is no self-stress."""
    geometry = CROSSED.keeping([0, 1, 2, 3, 4])
    stiff, soft = response_of(geometry), response_of(geometry, np.array([1e-9, 1e-6, 1e-7, 1e-8, 1e-9]))
    np.testing.assert_allclose(soft.forces, stiff.forces, atol=1e-12)
    assert not stiff.redundancy.any()
    assert not stiff.projector.any()


def test_a_softer_bar_sheds_force() -> None:
    """Of two bars side by side each takes its share of stiffness."""
    geometry = truss({"a": (0, 0), "b": (2, 0), "c": (2, 2)}, "ab bc bc", {"a": "xy", "c": "xy"})
    response = response_of(geometry, np.array([1.0, 1.0, 3.0]))
    forces = response.forces @ load_vector(geometry, {"b": (0, -8)})
    np.testing.assert_allclose(forces, [0.0, 6.0, 2.0], atol=1e-14)


def test_a_truss_with_every_joint_held() -> None:
    """There is nothing to solve: no forces, and loads go straight to the supports."""
    geometry = truss({"a": (0, 0), "b": (3, 0)}, "ab", {"a": "xy", "b": "xy"})
    response = respond(geometry, 1.0, geometry.lengths)
    assert not response.forces.any()
    np.testing.assert_array_equal(response.reactions, -np.eye(4))
    assert response.redundancy.tolist() == [1.0]


@pytest.mark.parametrize("second_crossed", [False, True], ids=["determinate", "redundant"])
@pytest.mark.parametrize(("rise", "condition"), [(6e-8, 4e7), (1e-3, 2e3)])
def test_accuracy_on_a_flat_joint(rise: float, condition: float, second_crossed: bool) -> None:
    """At a condition of some 4e7 every force is within 1e-8 of the exact rational answer, and of its noise."""
    geometry = flat_chord(rise, second_crossed)
    found = judge(geometry)
    assert condition / 3 < found.condition < condition * 3
    assert found.verdict == ("redundant" if second_crossed else "determinate")
    weights = [3 + (7 * i) % 5 for i in range(len(geometry.bars))]
    flexibility = np.array(weights) / geometry.lengths**2
    response = respond(geometry, found.condition, flexibility if second_crossed else None)
    for loads in ({"f": (0, -1)}, {"b": (0, -1), "e": (0.25, -0.5)}):
        vector = load_vector(geometry, loads)
        exact = exact_forces(geometry, weights, vector)
        error = np.abs(response.forces @ vector - exact).max()
        assert error <= 1e-8 * np.abs(exact).max()
        assert error <= response.noise * np.abs(response.forces).max() * np.abs(vector).sum()


def test_the_stiffness_matrix_would_not_do() -> None:
    """On the same joint the stiffness matrix has lost what the factorisation keeps, so the test above bites."""
    geometry = flat_chord(6e-8, second_crossed=False)
    response = response_of(geometry)
    vector = load_vector(geometry, {"f": (0, -1)})
    exact = exact_forces(geometry, [1] * len(geometry.bars), vector)
    free = equilibrium_matrix(geometry)[~geometry.held]
    by_stiffness = -free.T @ np.linalg.solve(free @ free.T, vector[~geometry.held])
    assert np.abs(by_stiffness - exact).max() > 1e3 * np.abs(response.forces @ vector - exact).max()
