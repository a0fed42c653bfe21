"""Trusses with crossed bars in their panels, some of which cannot push, and another library's word on their forces."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise

import numpy as np
from numpy.typing import NDArray
from plane.build import truss
from scipy.optimize import nnls

from models.calculation import Array
from models.statics.geometry import Geometry, equilibrium_matrix
from models.statics.response import Response, respond
from models.statics.slack_bars import SlackTruss, scaled, slack_truss
from models.statics.stability import judge


@dataclass(frozen=True, eq=False)
class Crossed:
    """A truss with bars that cannot push.

    Parameters
    ----------
    flexibility : (m,) m/N. cannot_push : (m,).
    """

    geometry: Geometry
    flexibility: Array
    cannot_push: NDArray[np.bool_]

    @property
    def response(self) -> Response:
        """As if every bar could push."""
        return respond(self.geometry, judge(self.geometry).condition, self.flexibility)

    @property
    def slack(self) -> SlackTruss:
        """The truss whose bars go slack."""
        return slack_truss(self.response, self.cannot_push)

    def whole(self, loads: Array) -> Array:
        """(q, m) scaled forces under loads (q, 2j) as if every bar could push."""
        return loads @ scaled(self.response).T

    def expected(self, load: Array) -> Array | None:
        """(m,) forces as scipy's least squares finds them, N; None where there is no equilibrium."""
        free = ~self.geometry.held
        scale = 1.0 / np.sqrt(self.flexibility)
        matrix = equilibrium_matrix(self.geometry)[free] * scale
        some = -np.linalg.pinv(matrix) @ load[free]
        size = max(float(np.abs(some).max()), 1e-300)
        states = np.linalg.svd(matrix)[2][len(matrix) :].T
        # A push of no more than rounding is none.
        stacked = np.vstack([states[self.cannot_push].T, -some[self.cannot_push] / size - 1e-12])
        target = np.zeros(len(stacked))
        target[-1] = 1.0
        multipliers, _ = nnls(stacked, target, maxiter=10000)
        residual = stacked @ multipliers - target
        if np.linalg.norm(residual) < 1e-8:
            return None
        found: Array = (some - size * states @ (residual[:-1] / residual[-1])) * scale
        return found


def crossed(
    panels: int, height: float = 1.0, *, seed: int = 0, single: frozenset[str] = frozenset(), stiff: str = ""
) -> Crossed:
    """A truss of square or other panels 1 m long, crossed rods in each, on a pin and a roller.

    Parameters
    ----------
    seed : of the bars' areas; 0 for equal ones. single : rods that are not there. stiff : further bars, that can push.
    """
    joints = {f"b{i}": (float(i), 0.0) for i in range(panels + 1)} | {
        f"t{i}": (float(i), height) for i in range(panels + 1)
    }
    chords = [f"{row}{i}-{row}{k}" for row in "bt" for i, k in pairwise(range(panels + 1))]
    posts = [f"b{i}-t{i}" for i in range(panels + 1)]
    rods = [rod for i in range(panels) for rod in (f"b{i}-t{i + 1}", f"t{i}-b{i + 1}") if rod not in single]
    bars = [*chords, *posts, *stiff.split(), *rods]
    deck = " ".join(f"b{i}" for i in range(panels + 1))
    geometry = truss(joints, " ".join(bars), {"b0": "xy", f"b{panels}": "y"}, deck)
    area = np.random.default_rng(seed).uniform(0.5e-3, 5e-3, len(bars)) if seed else np.full(len(bars), 1e-3)
    cannot_push = np.arange(len(bars)) >= len(bars) - len(rods)
    return Crossed(geometry, geometry.lengths / (200e9 * area), cannot_push)


def downward(sample: Crossed, *sizes: float) -> Array:
    """(1, 2j) forces on the deck joints, N downward."""
    load = np.zeros((1, 2 * len(sample.geometry.joints)))
    load[0, 2 * sample.geometry.deck[: len(sizes)] + 1] = -np.array(sizes)
    return load
