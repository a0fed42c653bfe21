"""How long a rating takes, as ratios to things that everybody has: a dense solve, sympy's truss.

Milliseconds are printed and never judged; a ratio above twice what is stated fails. Run it by hand or in a build:

    python tests/benchmark/run.py
"""

from __future__ import annotations

import json
import sys
import time
from collections.abc import Callable
from functools import partial
from pathlib import Path
from typing import Any

import numpy as np
from sympy import Float
from sympy.physics.continuum_mechanics.truss import Truss as SympyTruss

sys.path[:0] = [str(Path(__file__).parents[2]), str(Path(__file__).parents[1])]

from benchmark.crossed import crossed_rods  # noqa: E402
from benchmark.pratt import pratt, reading  # noqa: E402

from inspector.exchange import site  # noqa: E402
from models.condition import fold_all  # noqa: E402
from models.rating import Provenance, prepare, rate  # noqa: E402
from models.resistance import basis  # noqa: E402
from models.statics.geometry import equilibrium_matrix  # noqa: E402

AFTER_A_READING = 40
"""28 to 39 were measured; 25 is wanted."""

GROWTH = 30
"""There are 27 times as many bars; a dense solve takes several hundred times as long."""

MADE_FROM = Provenance("benchmark", "benchmark")

Job = Callable[[], Any]


def best(jobs: dict[str, Job], rounds: int) -> dict[str, float]:
    """The shortest time of each job in ms, the jobs taking turns so that a slow moment hits all alike."""
    times: dict[str, list[float]] = {name: [] for name in jobs}
    for _ in range(rounds):
        for name, job in jobs.items():
            start = time.perf_counter()
            job()
            times[name].append(1e3 * (time.perf_counter() - start))
    return {name: min(taken) for name, taken in times.items()}


def crossed_times() -> tuple[float, float]:
    """Full ratings of 20 panels of crossed rods, ms: the rods able to push, and not."""
    jobs: dict[str, Job] = {}
    for push in (True, False):
        found = site.read(json.dumps(crossed_rods(20, push=push)))
        prepared, condition = prepare(found.bridge), fold_all(found.bridge, found.journal)
        by = basis(found.bridge.rating.basis)
        jobs[str(push)] = partial(rate, prepared, condition, by, MADE_FROM)
        jobs[str(push)]()
    times = best(jobs, 3)
    return times["True"], times["False"]


class Case:
    """A Pratt truss before and after one more reading."""

    def __init__(self, panels: int) -> None:
        document = pratt(panels)
        found = site.read(json.dumps(document))
        document["visits"][0]["observations"].append(reading("L1-L2", 7.0))
        self.document, self.bridge = document, found.bridge
        self.after = site.read(json.dumps(document)).journal
        self.prepared = prepare(found.bridge)
        self.before = fold_all(found.bridge, found.journal)
        self.basis = basis(found.bridge.rating.basis)
        self.geometry = self.prepared.trusses["only"].geometry
        self.rate_again()

    @property
    def bars(self) -> int:
        """How many bars the truss has."""
        return len(self.geometry.bars)

    def rate_again(self) -> Any:
        """Fold the journal with the new reading, and rate every bar and the structure."""
        condition = fold_all(self.bridge, self.after, self.before)
        return rate(self.prepared, condition, self.basis, MADE_FROM)

    def dense_solve(self) -> Job:
        """One solve of the truss's stiffness system with a right-hand side a deck joint."""
        matrix = equilibrium_matrix(self.geometry)[~self.geometry.held]
        stiffness = 1e8 * matrix @ matrix.T
        loads = np.zeros((len(stiffness), len(self.geometry.deck)))
        loads[np.arange(len(self.geometry.deck)), np.arange(len(self.geometry.deck))] = 1.0
        return lambda: np.linalg.solve(stiffness, loads)

    def sympy_solve(self) -> Job:
        """The forces that the same rating needs, by sympy's truss: a unit load at each deck joint that is free."""
        truss = self.document["trusses"]["only"]

        def solve() -> None:
            for joint in truss["deck joints"]:
                if joint not in truss["supports"]:
                    one(joint)

        def one(joint: str) -> None:
            model = SympyTruss()
            model.add_node(*[(name, *(Float(size.split()[0]) for size in at)) for name, at in truss["joints"].items()])
            model.add_member(*[(bar["id"], bar["from"], bar["to"]) for bar in truss["bars"]])
            model.apply_support(
                *[(name, "pinned" if kind == "pin" else kind) for name, kind in truss["supports"].items()]
            )
            model.apply_load((joint, 1, 270))
            model.solve()

        return solve


def row(name: str, time_of: float, reference: float, stated: float, *, at_least: bool = False) -> bool:
    """Print one ratio; whether it is within twice what is stated."""
    ratio = time_of / reference
    kept = ratio >= stated / 2 if at_least else ratio <= 2 * stated
    aim = f"stated: {'over' if at_least else 'under'} {stated:g}"
    print(f"{name:58} {time_of:10.3f} ms / {reference:9.3f} ms = {ratio:9.1f}  ({aim}){'' if kept else '  FAILED'}")
    return kept


def main() -> int:
    """Measure, print, judge the ratios."""
    twenty = Case(20)
    times = best({"rating": twenty.rate_again, "solve": twenty.dense_solve()}, 200)
    rated = f"rating of {twenty.bars} bars after a reading / dense solve"
    kept = [row(rated, times["rating"], times["solve"], AFTER_A_READING)]
    small, large = Case(8), Case(200)
    of_small = best({"rating": small.rate_again, "solve": small.dense_solve()}, 100)
    of_large = best({"rating": large.rate_again, "solve": large.dense_solve()}, 10)
    grown = f"rating of {large.bars} bars / of {small.bars} bars"
    kept.append(row(grown, of_large["rating"], of_small["rating"], GROWTH))
    kept.append(row(f"rating of {large.bars} bars / dense solve", of_large["rating"], of_large["solve"], 5))
    plain, slack = crossed_times()
    kept.append(row("20 panels of crossed rods that cannot push / that can", slack, plain, 60))
    sympy_time = best({"sympy": twenty.sympy_solve()}, 1)["sympy"]
    kept.append(row("forces by sympy's truss / full rating", sympy_time, times["rating"], 1000, at_least=True))
    return 0 if all(kept) else 1


if __name__ == "__main__":
    sys.exit(main())
