"""The root finder against a library's, many roots at once."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.optimize import brentq

from models.calculation import Array
from models.rating.allowance import find_root

Function = Callable[[Array], Array]

FAMILIES: tuple[Callable[[Array, Array], Array], ...] = (
    lambda x, a: x - a,
    lambda x, a: x**3 - a**3,
    lambda x, a: np.sqrt(x) - np.sqrt(a),
    lambda x, a: np.expm1(30 * (x - a)),
    lambda x, a: np.tanh(40 * (x - a)),
    lambda x, a: 1e3 * (x**4 - a**4),
    lambda x, a: np.where(x > a, 2 * (x - a), 0.01 * (x - a)),
    lambda x, a: x**2 * np.minimum(x, 0.7) - a**2 * np.minimum(a, 0.7),
    lambda x, a: 1e6 * (x - a),
)


def solved(function: Function, low: Array, high: Array) -> Array:
    """Roots between both ends."""
    return find_root(function, low, high, function(low), function(high))


@settings(max_examples=60, deadline=None)
@given(
    roots=st.lists(st.floats(0.051, 0.999), min_size=1, max_size=12),
    family=st.integers(0, len(FAMILIES) - 1),
)
def test_against_brentq(roots: list[float], family: int) -> None:
    """Every root of a rising function is found, as a library finds them one by one."""
    a = np.array(roots)
    low, high = np.full(len(a), 0.05), np.ones(len(a))
    function = FAMILIES[family]
    found = solved(lambda x: function(x, a), low, high)
    expected = [brentq(lambda x, root=root: float(function(x, root)), 0.05, 1.0, xtol=1e-13) for root in roots]
    close = (np.abs(found - expected) <= 1e-9) | (np.abs(function(found, a)) <= 1e-10)
    assert close.all(), (found, expected)


@settings(max_examples=60, deadline=None)
@given(
    slopes=st.lists(st.floats(0.0, 50.0), min_size=3, max_size=8),
    level=st.floats(0.02, 0.98),
)
def test_random_rising_functions(slopes: list[float], level: float) -> None:
    """Rising functions of straight pieces, nearly flat ones among them, have the library's root or one as good."""
    steps = np.array(slopes) + 1e-3
    x = np.linspace(0.05, 1.0, len(steps) + 1)
    y = np.concatenate([[0.0], np.cumsum(steps)])
    y -= level * y[-1]

    def function(at: Array) -> Array:
        return np.interp(at, x, y)

    expected = brentq(lambda at: float(np.interp(at, x, y)), 0.05, 1.0, xtol=1e-13)
    found = solved(function, x[:1], x[-1:])
    assert abs(found[0] - expected) <= 1e-8 or abs(function(found)[0]) <= 1e-10


def test_a_function_that_rises_late() -> None:
    """A function that is flat over most of its bracket and then a million times steeper keeps being halved."""
    a = np.linspace(0.1, 0.9, 9)
    found = solved(lambda x: np.expm1(30 * (x - a)), np.full(9, 0.05), np.ones(9))
    np.testing.assert_allclose(found, a, atol=1e-9)


def test_different_brackets_at_once() -> None:
    """Each root has its own bracket, and those found early wait for the others."""
    low, high = np.array([0.0, -3.0, 10.0]), np.array([1.0, 5.0, 20.0])
    found = solved(lambda x: np.array([x[0] - 0.25, x[1] ** 3 - 8.0, np.log(x[2]) - np.log(12.0)]), low, high)
    np.testing.assert_allclose(found, [0.25, 2.0, 12.0], rtol=1e-9)


def test_root_at_an_end() -> None:
    """A root at either end of its bracket is found there."""
    low, high = np.array([0.05, 0.05]), np.ones(2)
    found = solved(lambda x: x - np.array([0.05, 1.0]), low, high)
    np.testing.assert_allclose(found, [0.05, 1.0], atol=1e-9)


def test_a_few_evaluations_are_enough() -> None:
    """Smooth functions take some ten evaluations, which is what keeps a rating quick."""
    count = 0
    a = np.linspace(0.1, 0.95, 200)

    def function(x: Array) -> Array:
        nonlocal count
        count += 1
        return x**2 * (1 + x) - a**2 * (1 + a)

    solved(function, np.full(200, 0.05), np.ones(200))
    assert count <= 16
