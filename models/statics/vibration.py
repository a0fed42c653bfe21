"""How far joints go under unit loads, and how fast a truss swings: by virtual work, without a stiffness matrix.

For bar forces n_i under a unit force at joint i and flexibilities f, joint i goes sum f n_i n_j under a unit force at
joint j. With the masses lumped at the joints, the lowest frequency belongs to the largest eigenvalue of
sqrt(m_i m_j) sum f n_i n_j, which is 1/omega^2.
"""

from __future__ import annotations

import math

import numpy as np

from models.calculation import Array


def joint_flexibility(forces: Array, flexibility: Array) -> Array:
    """How far each joint goes along its own force under a unit force at each joint, m/N.

    Parameters
    ----------
    forces : (m, q) in each bar under q unit forces. flexibility : (m,) elongation under unit tension, m/N.

    Returns
    -------
    (q, q), symmetric.
    """
    found: Array = forces.T @ (flexibility[:, None] * forces)
    return found


def lowest_frequency(forces: Array, flexibility: Array, mass: Array) -> float:
    """The lowest natural frequency of masses that move along the unit forces alone, Hz; infinite if nothing moves.

    Parameters
    ----------
    forces, flexibility : as for `joint_flexibility`. mass : (q,) kg.
    """
    root = np.sqrt(mass)
    weighted = (np.sqrt(flexibility)[:, None] * forces) * root
    largest = float(np.linalg.eigvalsh(weighted.T @ weighted)[-1]) if len(mass) else 0.0
    return 1 / (2 * math.pi * math.sqrt(largest)) if largest > 0.0 else math.inf
