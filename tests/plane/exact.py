"""Forces of a small truss in rational arithmetic, without any rounding until the last step.

With the force density q = N/L the equations of equilibrium have the differences of coordinates for
coefficients, and these are rational. Where the truss is redundant, q is the minimum of sum w q^2 / 2 with
w = f L^2, f being a bar's elongation under unit tension: rational too where f is chosen as w/L^2.
"""

from __future__ import annotations

from fractions import Fraction

import numpy as np

from models.calculation import Array
from models.statics.geometry import Geometry

Row = list[Fraction]


def solve(matrix: list[Row], right: Row) -> Row:
    """Gauss elimination of a square system."""
    rows = [[*row, value] for row, value in zip(matrix, right, strict=True)]
    size = len(rows)
    for column in range(size):
        pivot = next(row for row in range(column, size) if rows[row][column])
        rows[column], rows[pivot] = rows[pivot], rows[column]
        lead = rows[column][column]
        rows[column] = [value / lead for value in rows[column]]
        for row in range(size):
            factor = rows[row][column]
            if row != column and factor:
                rows[row] = [value - factor * base for value, base in zip(rows[row], rows[column], strict=True)]
    return [row[-1] for row in rows]


def exact_forces(geometry: Geometry, weights: list[int], loads: Array) -> Array:
    """(m,) bar forces under loads on the degrees of freedom, right to the last bit.

    Parameters
    ----------
    weights : (m,) of q^2, flexibility times length squared.
    """
    equations = _equations(geometry)
    bars = len(weights)
    # Stationary: w q + B^T v = 0 and B q = -p.
    top = [
        [Fraction(weights[i]) if i == k else Fraction(0) for k in range(bars)] + [row[i] for row in equations]
        for i in range(bars)
    ]
    bottom = [row + [Fraction(0)] * len(equations) for row in equations]
    right = [Fraction(0)] * bars + [-Fraction(float(load)) for load in loads[~geometry.held]]
    densities = solve(top + bottom, right)[:bars]
    lengths = np.array([float(geometry.lengths[i]) for i in range(bars)])
    return np.array([float(density) for density in densities]) * lengths


def _equations(geometry: Geometry) -> list[Row]:
    rows = [[Fraction(0)] * len(geometry.bars) for _ in geometry.held]
    places = [[Fraction(float(value)) for value in place] for place in geometry.coordinates]
    for bar, (start, end) in enumerate(geometry.ends):
        for axis in (0, 1):
            difference = places[end][axis] - places[start][axis]
            rows[2 * start + axis][bar] += difference
            rows[2 * end + axis][bar] -= difference
    return [row for row, held in zip(rows, geometry.held, strict=True) if not held]
