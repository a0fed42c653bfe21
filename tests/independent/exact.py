"""Two further ways to the forces of a truss, for judging the judge: exact fractions, and stiffness in 20 lines."""

from __future__ import annotations

import math
from fractions import Fraction

import numpy as np

Joints = dict[str, tuple[float, float]]
Pushes = dict[str, tuple[float, float]]


def force_densities(
    joints: Joints, supports: dict[str, str], bars: list[tuple[str, str]], pushes: Pushes
) -> list[Fraction]:
    """Return N/L of every bar of a determinate truss exactly: with N/L as unknowns no root appears in the equations."""
    held = {(joint, axis) for joint, kind in supports.items() for axis in ("xy" if kind == "pin" else "y")}
    rows = []
    for joint in joints:
        for number, axis in enumerate("xy"):
            if (joint, axis) not in held:
                row = [Fraction(0)] * len(bars)
                for column, pair in enumerate(bars):
                    if joint in pair:
                        other = pair[1 - pair.index(joint)]
                        row[column] = Fraction(joints[other][number]) - Fraction(joints[joint][number])
                rows.append([*row, -Fraction(pushes.get(joint, (0, 0))[number])])
    for step in range(len(bars)):
        pivot = next(i for i in range(step, len(rows)) if rows[i][step] != 0)
        rows[step], rows[pivot] = rows[pivot], rows[step]
        for i in range(len(rows)):
            if i != step and rows[i][step] != 0:
                ratio = rows[i][step] / rows[step][step]
                rows[i] = [a - ratio * b for a, b in zip(rows[i], rows[step], strict=True)]
    return [rows[i][-1] / rows[i][i] for i in range(len(bars))]


def lengths(joints: Joints, bars: list[tuple[str, str]]) -> list[float]:
    """Return the bars' lengths."""
    return [math.dist(joints[a], joints[b]) for a, b in bars]


def stiffness_forces(
    joints: Joints, supports: dict[str, str], bars: list[tuple[str, str]], flexibility: list[float], pushes: Pushes
) -> list[float]:
    """Return bar forces by the displacement method: K u = p, N = k (elongation)."""
    order = {joint: 2 * number for number, joint in enumerate(joints)}
    K, p = np.zeros((2 * len(joints),) * 2), np.zeros(2 * len(joints))
    stretch = np.zeros((len(bars), 2 * len(joints)))
    for row, (a, b) in enumerate(bars):
        along = (np.array(joints[b]) - np.array(joints[a])) / math.dist(joints[a], joints[b])
        stretch[row, order[b] : order[b] + 2], stretch[row, order[a] : order[a] + 2] = along, -along
    K = stretch.T @ np.diag(1 / np.array(flexibility)) @ stretch
    for joint, force in pushes.items():
        p[order[joint] : order[joint] + 2] = force
    held = {order[joint] + axis for joint, kind in supports.items() for axis in ((0, 1) if kind == "pin" else (1,))}
    free = [i for i in range(len(p)) if i not in held]
    u = np.zeros(len(p))
    u[free] = np.linalg.solve(K[np.ix_(free, free)], p[free])
    return list((stretch @ u) / np.array(flexibility))
