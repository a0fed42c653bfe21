"""The force method: a determinate base by pivoted elimination, redundants by compatibility.

Numbers are carried in the longest float of the machine (64 bits of mantissa on x86) and refined once,
so that a flat joint whose equilibrium matrix has a condition number of 1e6 keeps ten digits and more.
"""

from __future__ import annotations

import numpy as np

LONG = np.longdouble
NEGLIGIBLE = 1e-11  # of the largest entry: a pivot below is no pivot


def solved(matrix: np.ndarray, right: np.ndarray) -> np.ndarray:
    """Solve a small square system by elimination with row pivots."""
    size = len(matrix)
    work = np.concatenate([matrix, right], axis=1).astype(LONG)
    for step in range(size):
        best = step + int(np.argmax(np.abs(work[step:, step])))
        work[[step, best]] = work[[best, step]]
        work[step] /= work[step, step]
        for row in range(size):
            if row != step:
                work[row] -= work[row, step] * work[step]
    return work[:, size:]


class Frame:
    """Equilibrium of a pin-jointed plane truss: A N + p = 0 in its free directions.

    Parameters
    ----------
    joints : name to (x, y) in m.
    supports : joint to `pin` or `roller`.
    bars : pairs of joint names.
    """

    def __init__(
        self, joints: dict[str, tuple[float, float]], supports: dict[str, str], bars: list[tuple[str, str]]
    ) -> None:
        held = {(joint, "y") for joint in supports}
        held |= {(joint, "x") for joint, kind in supports.items() if kind == "pin"}
        free = [(joint, axis) for joint in joints for axis in "xy" if (joint, axis) not in held]
        self.row = {direction: number for number, direction in enumerate(free)}
        self.reactions = len(held)
        self.matrix = np.zeros((len(free), len(bars)), dtype=LONG)
        for column, (a, b) in enumerate(bars):
            dx, dy = LONG(joints[b][0]) - LONG(joints[a][0]), LONG(joints[b][1]) - LONG(joints[a][1])
            length = np.sqrt(dx * dx + dy * dy)
            for joint, sign in ((a, 1), (b, -1)):
                for axis, part in (("x", dx), ("y", dy)):
                    if (joint, axis) in self.row:
                        self.matrix[self.row[joint, axis], column] = sign * part / length
        self._eliminate()

    def _eliminate(self) -> None:
        rows, columns = self.matrix.shape
        work = np.concatenate([self.matrix, np.eye(rows, dtype=LONG)], axis=1)
        self.base: list[int] = []
        smallest = NEGLIGIBLE * (np.max(np.abs(self.matrix)) if self.matrix.size else 1)
        for step in range(min(rows, columns)):
            sizes = np.abs(work[step:, :columns])
            down, column = divmod(int(np.argmax(sizes)), columns)
            if sizes[down, column] <= smallest:
                break
            work[[step, step + down]] = work[[step + down, step]]
            work[step] /= work[step, column]
            factors = work[:, column].copy()
            factors[step] = 0
            work -= np.outer(factors, work[step])
            self.base.append(column)
        self.rank = len(self.base)
        self.inverse = work[: self.rank, columns:]
        self.redundants = [column for column in range(columns) if column not in self.base]
        self.mechanisms = rows - self.rank
        self.self_stress = len(self.redundants)
        if self.mechanisms == 0:
            self._states()

    def _states(self) -> None:
        self.states = np.zeros((self.matrix.shape[1], self.self_stress), dtype=LONG)
        for number, column in enumerate(self.redundants):
            self.states[column, number] = 1
        for _ in range(2):
            self.states[self.base] -= self.inverse @ (self.matrix @ self.states)

    def condition(self) -> float:
        """Return the ratio of the largest to the least singular value of the equilibrium matrix."""
        values = np.linalg.svd(self.matrix.astype(float), compute_uv=False)
        return float(values[0] / values[-1])

    def loads(self, down: list[dict[str, float]]) -> np.ndarray:
        """Return the load columns for downward loads (N) by joint."""
        return self.pushes([{joint: (0.0, -weight) for joint, weight in case.items()} for case in down])

    def pushes(self, cases: list[dict[str, tuple[float, float]]]) -> np.ndarray:
        """Return the load columns for forces (right, up) by joint; what a support takes is left out."""
        columns = np.zeros((len(self.row), len(cases)), dtype=LONG)
        for number, case in enumerate(cases):
            for joint, force in case.items():
                for axis, part in zip("xy", force, strict=True):
                    if (joint, axis) in self.row:
                        columns[self.row[joint, axis], number] += part
        return columns

    def determinate(self, loads: np.ndarray) -> np.ndarray:
        """Return the forces with every redundant at zero, refined twice against the residual."""
        forces = np.zeros((self.matrix.shape[1], loads.shape[1]), dtype=LONG)
        for _ in range(3):
            forces[self.base] -= self.inverse @ (self.matrix @ forces + loads)
        return forces

    def compatible(self, forces: np.ndarray, flexibility: list[float]) -> np.ndarray:
        """Add the self-stress that closes every gap: bar flexibilities in m/N."""
        if self.self_stress == 0:
            return forces
        stretch = np.array(flexibility, dtype=LONG)[:, None]
        own = self.states.T @ (stretch * self.states)
        gaps = self.states.T @ (stretch * forces)
        return forces - self.states @ solved(own, gaps)
