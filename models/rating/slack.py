"""One truss some of whose bars cannot push: dead load, every live load at its worst, rating factors, loss of a bar.

Superposition is lost, so the rating factor is the multiple of the factored live load at which a bar's force reaches its
capacity, on the slack set that is right there; once with all dead load at its greatest and once at its least factors.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from itertools import product
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.loading.live import Pattern
from models.rating.answer import Answer, full_crowd, joint_dead_load, largest_displacement
from models.rating.fitted import Stock
from models.rating.prepare import PreparedTruss
from models.rating.slack_family import SlackLoads, Supports, starting_sets, without_noise
from models.rating.slack_items import Question
from models.rating.slack_limits import forces_under, limit, necessary_bars
from models.rating.slack_search import Roughly, Worst, roughly, worst
from models.rating.slack_without import Carried, factors_without
from models.rating.worked import SlackParts, Worked
from models.resistance.protocol import Basis
from models.statics.geometry import equilibrium_matrix
from models.statics.response import respond
from models.statics.slack_bars import EQUILIBRIUM, Mask, States, scaled, slack_truss

_REACH: Final = (1.0, 4.0, 40.0)
"""Multiples of the factored live load from which the search for slack sets starts."""

_TIE: Final = 1e-9
_LEAST_NOISE: Final = 1e-12
_BEFORE: Final = 1.0 - 1e-6


@dataclass(frozen=True, eq=False)
class Asked:
    """What is asked of a truss; m counts the bars that are in.

    Parameters
    ----------
    linear : the answer as if every bar could push. flexibility : (m,) m/N. cannot_push : (m,).
    capacity : (levels, 2, m) N. gamma : (levels, loads) live load factors.
    """

    basis: Basis
    prepared: PreparedTruss
    stock: Stock
    linear: Answer
    flexibility: Array
    cannot_push: Mask
    capacity: Array
    gamma: Array

    @property
    def patterns(self) -> list[Pattern]:
        """The live loads that can be computed, in the order of the answer."""
        return [pattern for pattern in self.prepared.patterns.values() if pattern is not None]


def is_pushed(linear: Answer, cannot_push: Mask) -> bool:
    """Whether loads push a bar that cannot push, at whatever multiple; if not, superposition holds."""
    dead, live = linear.dead[:, cannot_push], linear.live[:, 1, cannot_push]
    return bool((dead < 0.0).any() or (live < 0.0).any())


def slack_loads(asked: Asked) -> SlackLoads:
    """The truss and what acts on it, in scaled forces."""
    linear, prepared = asked.linear, asked.prepared
    response, geometry, deck = linear.response, linear.standing.geometry, prepared.geometry.deck
    joint_load = joint_dead_load(prepared, asked.stock)
    down = -scaled(response)[:, 1::2]
    parts = np.concatenate([joint_load @ down.T, linear.dead[2:] / response.scale])
    factors = dead_cases(asked.basis, len(parts) - 2)
    on_supports = np.zeros((len(deck), len(linear.supports)))
    on_supports[deck[:, None] == linear.supports] = 1.0
    supports = Supports(
        bars=-equilibrium_matrix(geometry)[2 * linear.supports + 1],
        deck=on_supports,
        dead=factors[:, :2] @ joint_load[:, linear.supports],
    )
    return SlackLoads(
        truss=slack_truss(response, asked.cannot_push),
        scale=response.scale,
        deck=down[:, deck].T.copy(),
        dead=factors @ parts,
        parts=parts,
        supports=supports,
        noise=max(response.noise, _LEAST_NOISE),
    )


def dead_cases(basis: Basis, imposed: int) -> Array:
    """Load factors of components, wearing course and each imposed change, (c, 2 + imposed).

    All dead load at its greatest and at its least factors; imposed changes with the factor of components, any of them
    or none, as what relieves does not count.
    """
    dead_factors = [(part.greatest, part.least) for part in (basis.components, basis.wearing)]
    choices = np.array(list(product((0.0, basis.components.greatest), repeat=imposed))).reshape(2**imposed, imposed)
    return np.array([[*dead, *choice] for dead in zip(*dead_factors, strict=True) for choice in choices.tolist()])


def solve_slack(asked: Asked) -> Worked | None:
    """Solve a truss some of whose bars go slack; None where dead load has no equilibrium, or rounding hides it."""
    loads = slack_loads(asked)
    present = loads.truss.states(loads.parts[:2].sum(axis=0)[None])
    if present.verdict[0] != EQUILIBRIUM:
        return None
    return _Solution(asked, loads, present).answer()


class _Solution:
    """The steps of one solution, each using what came before."""

    def __init__(self, asked: Asked, loads: SlackLoads, present: States) -> None:
        self.asked, self.loads, self.present = asked, loads, present
        self.bars = len(loads.scale)
        self.rows = self.bars + len(asked.linear.supports)
        self.panels = np.diff(asked.prepared.geometry.coordinates[asked.prepared.geometry.deck, 0])
        heaviest = Carried(self.panels, asked.patterns, asked.gamma.max(axis=0), asked.capacity[-1]).line_load
        self.family, conditions, self.undecided = starting_sets(
            loads, self.panels, [reach * heaviest for reach in _REACH if heaviest]
        )
        self.ends = necessary_bars(loads).with_more(conditions)
        self.alone = loads.truss.states(loads.dead)
        self.limits: dict[int, list[Worst]] = {}

    def answer(self) -> Worked:
        """Everything in its order."""
        asked = self.asked
        lowest, direction, load = self._factors()
        dead_exceeds = self._dead_exceeds()
        lowest[:, dead_exceeds.any(axis=0)] = 0.0
        load = np.where(dead_exceeds.any(axis=0) | np.isinf(lowest[-1]), -1, load)
        direction = np.where(dead_exceeds.any(axis=0), dead_exceeds.argmax(axis=0), direction)
        upper = self._demands(asked.gamma[-1])
        greatest = asked.gamma.max(axis=0)
        rough = [roughly(self.family, pattern, gamma) for pattern, gamma in zip(asked.patterns, greatest, strict=True)]
        live = self._live(upper)
        slack = self._slack(direction, load)
        parts = self._parts(direction, load)
        demand = self._demand(upper, lowest, direction)
        acts = self._acts(demand, rough)
        lowest, load, ends, by_end = self._ended(lowest, load)
        direction, slack = np.where(ends, -1, direction), np.where(ends[:, None], by_end, slack)
        parts[0][:, dead_exceeds.any(axis=0)] = self._dead_alone()[:, dead_exceeds.any(axis=0)].max(axis=0)
        without = factors_without(
            self.family, Carried(self.panels, asked.patterns, asked.gamma[-1], asked.capacity[-1])
        )
        return Worked(
            answer=self._answer(live, rough),
            lowest=lowest,
            direction=direction,
            load=load,
            dead_exceeds=dead_exceeds,
            demand=demand,
            acts=acts,
            without=without,
            redundancy=np.zeros(self.bars),
            slack=SlackParts(*parts, ends, slack, self.undecided or self.family.full),
        )

    def _capacity(self, level: int) -> Array:
        """(2, rows) with no limit on reactions, nor on pushing what cannot push."""
        found = np.full((2, self.rows), np.inf)
        found[:, : self.bars] = self.asked.capacity[level]
        found[1, : self.bars][self.asked.cannot_push] = np.inf
        return found

    def _factors(self) -> tuple[Array, NDArray[np.int64], NDArray[np.int64]]:
        """Rating factors (levels, m) before anything caps them, direction and load that govern at the upper level."""
        gamma, capacity = self.asked.gamma, self.asked.capacity
        lowest = np.full((len(gamma), self.bars), np.inf)
        direction, load = np.zeros((2, self.bars), int)
        for level in reversed(range(len(gamma))):
            like = next((done for done in self.limits if np.array_equal(capacity[done], capacity[level])), None)
            self.limits[level] = self.limits[like] if like is not None else self._limits(level)
            for number, found in enumerate(self.limits[level]):
                factors = np.maximum(found.merit[:, : self.bars], 0.0) / gamma[level, number]
                better = factors.min(axis=0) < lowest[level] * (1.0 - _TIE)
                lowest[level] = np.where(better, factors.min(axis=0), lowest[level])
                if level == len(gamma) - 1:
                    direction = np.where(better, factors.argmin(axis=0), direction)
                    load = np.where(better, number, load)
        return lowest, direction, load

    def _limits(self, level: int) -> list[Worst]:
        """How far each live load may grow before bars reach their capacity of a level."""
        question = Question(self._capacity(level))
        factors = np.full((len(self.asked.gamma), self.rows), np.inf)
        found = []
        for number, pattern in enumerate(self.asked.patterns):
            gamma = self.asked.gamma[:, number, None]
            enough = np.repeat((factors * gamma).max(axis=0)[None], 2, axis=0)
            worst_of, self.ends = limit(self.family, self.ends, pattern, question, enough)
            found.append(worst_of)
            factors = np.minimum(factors, np.maximum(worst_of.merit.min(axis=0), 0.0) / gamma)
        return found

    def _demands(self, gamma: Array) -> list[Worst]:
        """The largest force of each row in each direction under each live load with its factor."""
        found: list[Worst] = []
        for number, pattern in enumerate(self.asked.patterns):
            enough = np.full((2, self.rows), np.inf)
            for before in found:
                enough = np.minimum(enough, before.merit)
            enough[:, self.bars :] = np.inf
            found.append(worst(self.family, pattern, Question(None, float(gamma[number])), enough))
        return found

    def _demand_of(self, found: list[Worst]) -> Array:
        """(2, m) the largest of all loads and of dead load alone."""
        demand = self._dead_alone()
        for each in found:
            demand = np.maximum(demand, -each.merit[:, : self.bars])
        noise = self.loads.noise * np.abs(demand).max(initial=0.0)
        demand[np.abs(demand) <= noise] = 0.0
        demand[1, self.asked.cannot_push] = np.minimum(demand[1, self.asked.cannot_push], 0.0)
        return demand

    def _demand(self, upper: list[Worst], lowest: Array, direction: NDArray[np.int64]) -> Array:
        """The same at the upper level, on the side of the capacity on which the rating factor says that it is."""
        demand, capacity = self._demand_of(upper), self.asked.capacity[-1]
        governs = np.arange(2)[:, None] == direction
        demand = np.where(lowest[-1] >= 1.0, np.minimum(demand, capacity), demand)
        return np.where(governs & (lowest[-1] < 1.0), np.maximum(demand, capacity), demand)

    def _acts(self, demand: Array, rough: list[Roughly]) -> NDArray[np.bool_]:
        """(2, m) whether factored loads of any level pull a bar, and push it."""
        forces = np.maximum.reduce([demand, *(each.surely[:, : self.bars] for each in rough)])
        found: NDArray[np.bool_] = forces > self.loads.noise * np.abs(forces).max(initial=0.0)
        return found

    def _dead_exceeds(self) -> NDArray[np.bool_]:
        found: NDArray[np.bool_] = self._dead_alone() > self.asked.capacity[-1]
        return found

    def _dead_alone(self) -> Array:
        """(2, m) the largest factored dead force in each direction."""
        forces = self.alone.forces * self.loads.scale
        return np.array([forces.max(axis=0), -forces.min(axis=0)])

    def _live(self, upper: list[Worst]) -> Array:
        """(loads, 2, m) what the arrangements that govern add to the forces of dead load, unfactored."""
        base = self.loads.parts[:2].sum(axis=0)
        dead = self.present.forces[0] * self.loads.scale
        every = np.arange(self.bars)
        found = np.zeros((len(upper), 2, self.bars))
        for number, (at_limit, at_one) in enumerate(zip(self.limits[len(self.asked.gamma) - 1], upper, strict=True)):
            for direction, sign in enumerate((1.0, -1.0)):
                reached = np.isfinite(at_limit.merit[direction, : self.bars])[:, None]
                place = np.where(
                    reached, at_limit.arrangement[direction, : self.bars], at_one.arrangement[direction, : self.bars]
                )
                forces, _, stands = forces_under(self.loads, place, base)
                change = sign * (forces[every, every] - dead)
                noise = self.loads.noise * np.abs(forces).max(axis=1, initial=0.0)
                found[number, direction] = sign * np.where(stands & (change > noise), change, 0.0)
        return found + 0.0

    def _slack(self, direction: NDArray[np.int64], load: NDArray[np.int64]) -> NDArray[np.bool_]:
        """(m, m) slack bars under what governs each bar, or under dead load where nothing does."""
        masks = np.repeat(self.present.slack, self.bars, axis=0)
        for number, found in enumerate(self.limits[len(self.asked.gamma) - 1]):
            chosen = np.flatnonzero(load == number)
            masks[chosen] = self.family.lines.slack[found.at_set[direction[chosen], chosen]]
        slack = np.zeros((self.bars, self.bars), bool)
        slack[:, self.loads.truss.among] = masks
        return slack

    def _parts(self, direction: NDArray[np.int64], load: NDArray[np.int64]) -> tuple[Array, Array]:
        """(levels, m) what the rating factors are made of."""
        dead, live = np.full((2, len(self.asked.gamma), self.bars), np.nan)
        for level, limits in self.limits.items():
            for number, found in enumerate(limits):
                chosen = np.flatnonzero(load == number)
                dead[level, chosen] = found.dead[direction[chosen], chosen]
                live[level, chosen] = found.live[direction[chosen], chosen]
        return dead, live

    def _ended(
        self, lowest: Array, load: NDArray[np.int64]
    ) -> tuple[Array, NDArray[np.int64], NDArray[np.bool_], NDArray[np.bool_]]:
        """Factors where the end of equilibrium caps them, and what is slack just before it."""
        gamma = self.asked.gamma
        none = np.zeros(self.bars, bool)
        if (self.alone.verdict != EQUILIBRIUM).any():
            return np.zeros_like(lowest), np.full_like(load, -1), ~none, none
        ends = [self.ends.first(self.loads, pattern) for pattern in self.asked.patterns]
        multiples = np.array([multiple for multiple, _ in ends])
        if not ends or not np.isfinite(multiples).any():
            return lowest, load, none, none
        by_load = multiples / gamma
        number = int(by_load[-1].argmin())
        capped = np.asarray(lowest[-1] * (1.0 - _TIE) > by_load[-1].min(), bool)
        before = multiples[number] * _BEFORE * ends[number][1]
        masks = np.zeros((len(self.loads.dead), self.bars), bool)
        masks[:, self.loads.truss.among] = self.loads.truss.states(self.loads.dead + before @ self.loads.deck).slack
        slack = np.asarray(masks.any(axis=0), bool)
        lowest = np.minimum(lowest, by_load.min(axis=1)[:, None])
        return lowest, np.where(capped, number, load), capped, slack

    def _answer(self, live: Array, rough: list[Roughly]) -> Answer:
        """Forces and reactions as any truss gives them; dead load and influence lines on the set of dead load alone."""
        linear, loads = self.asked.linear, self.loads
        dead, ordinates = self._dead_parts()
        joint_load = joint_dead_load(self.asked.prepared, self.asked.stock)
        support_dead = dead @ loads.supports.bars.T
        support_dead[:2] += joint_load[:, linear.supports]
        basis, gamma = self.asked.basis, self.asked.gamma.max(axis=0)
        relieved = basis.components.least * support_dead[0] + basis.wearing.least * support_dead[1]
        relieved += basis.components.greatest * np.minimum(support_dead[2:], 0.0).sum(axis=0)
        least = -np.array([each.at_most[1, self.bars :] for each in rough]).reshape(len(rough), -1)
        lifting = np.minimum((least - relieved) / gamma[:, None], 0.0)
        lifting[np.abs(lifting) <= loads.noise * np.abs(relieved).max(initial=0.0)] = 0.0
        return replace(
            linear, dead=dead, ordinates=ordinates, live=live, support_dead=support_dead, support_live=lifting,
            displacement=self._displacement(),
        )  # fmt: skip

    def _dead_parts(self) -> tuple[Array, Array]:
        """Forces (2 + k, m) of components, wearing course and imposed changes, and influence lines (m, d), N.

        All on the set that is right under dead load. Where the rest would be a mechanism without the slack bars, parts
        of dead load go by their weights, and influence lines are those of bars that push.
        """
        loads, weight = self.loads, joint_dead_load(self.asked.prepared, self.asked.stock).sum(axis=1)
        held = loads.truss.under(self.present.slack[0])
        if held is None:
            dead = np.zeros_like(loads.parts)
            dead[:2] = (weight / weight.sum())[:, None] * self.present.forces[0] * loads.scale
            return dead, self.asked.linear.ordinates
        dead, ordinates = held.forces(loads.parts) * loads.scale, (held.forces(loads.deck) * loads.scale).T
        return without_noise(dead, loads.noise), without_noise(ordinates, loads.noise)

    def _displacement(self) -> float:
        """As for any truss, on the set that is right under dead load and a full crowd, as far as that stands."""
        linear, prepared = self.asked.linear, self.asked.prepared
        full = self.loads.parts[:2].sum(axis=0) + full_crowd(prepared) @ self.loads.deck
        state = self.loads.truss.states(full[None])
        if state.verdict[0] != EQUILIBRIUM or self.loads.truss.under(state.slack[0]) is None:
            return linear.displacement
        pulls = np.ones(self.bars, bool)
        pulls[self.loads.truss.among[state.slack[0]]] = False
        numbers = np.flatnonzero(pulls)
        geometry = linear.standing.geometry.keeping(numbers)
        flexibility = self.asked.flexibility[numbers]
        response = respond(geometry, linear.standing.stability.condition, flexibility)
        joint_load = joint_dead_load(prepared, self.asked.stock).sum(axis=0)
        return largest_displacement(prepared, response, joint_load, flexibility)
