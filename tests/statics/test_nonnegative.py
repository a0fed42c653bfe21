"""Least squares without negative unknowns, against another library."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import nnls

from models.statics.nonnegative import least_distance, nonnegative_least_squares


@given(st.integers(1, 12), st.integers(1, 12), st.integers(0, 10**6))
def test_the_residual_is_that_of_another_library(rows: int, columns: int, seed: int) -> None:
    """The smallest residual over unknowns that are not negative is the one that scipy finds."""
    random = np.random.default_rng(seed)
    matrix, right = random.normal(size=(rows, columns)), random.normal(size=rows)
    found = nonnegative_least_squares(matrix, right)
    assert found is not None
    assert (found >= 0.0).all()
    expected, residual = nnls(matrix, right)
    assert np.linalg.norm(matrix @ found - right) == pytest.approx(residual, abs=1e-9)
    if columns <= rows:
        np.testing.assert_allclose(found, expected, atol=1e-8)


@given(st.integers(1, 10), st.integers(1, 6), st.integers(0, 10**6))
def test_the_nearest_point_meets_every_half_space(count: int, size: int, seed: int) -> None:
    """The point is in all half spaces, lies on those whose multiplier is at work, and points along them."""
    random = np.random.default_rng(seed)
    matrix, right = random.normal(size=(count, size)), random.normal(size=count)
    found = least_distance(matrix, right)
    assert found is not None
    if found.exists:
        point = matrix.T @ found.multipliers
        tolerance = 1e-7 * max(1.0, float(np.linalg.norm(point)))
        assert (matrix @ point >= right - tolerance).all()
        assert np.abs(found.multipliers * (matrix @ point - right)).max() <= tolerance * max(
            1.0, found.multipliers.max()
        )
    else:
        assert np.linalg.norm(matrix.T @ found.multipliers) <= 1e-9 * np.linalg.norm(found.multipliers)
        assert right @ found.multipliers > 0.0


def test_half_spaces_without_a_common_point_are_told() -> None:
    """No x is at least 1 and at most -1, and the sum of both conditions says so."""
    found = least_distance(np.array([[1.0], [-1.0]]), np.array([1.0, 1.0]))
    assert found is not None
    assert not found.exists
    assert found.multipliers[0] == pytest.approx(found.multipliers[1])


def test_one_half_space_that_holds_the_origin_leaves_it_there() -> None:
    """Where nothing keeps the origin out it is the nearest point."""
    found = least_distance(np.array([[1.0, 2.0]]), np.array([-3.0]))
    assert found is not None
    assert found.exists
    assert not found.multipliers.any()
