"""Live loads: the worst tension and the worst compression that each gives, exact on the influence line.

Between deck joints an influence line is straight, beyond the first and last deck joint it is zero. A kind of
live load is one row of `LIVE_KINDS`: its keys in a site file, and how it turns into a `Pattern`.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Final, Literal, Protocol

import numpy as np

from models.bridge import LiveLoad
from models.calculation import Array
from models.loading.floor import Floor
from models.loading.influence import loaded_areas
from models.loading.rules import RULES, CrowdByArea, CrowdByLength
from models.quantity import parse

_SAME_PLACE: Final = 1e-9
"""Positions closer than this part of the deck's length are one."""


class Pattern(Protocol):
    """A live load on a given deck, ready for any influence line."""

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """The worst that the load does.

        Parameters
        ----------
        ordinates : (..., d) influence ordinates at the deck joints, force per unit downward force.

        Returns
        -------
        largest, least : (...) each, N; never below, and never above zero, as a live load may stay away.
        """


@dataclass(frozen=True, eq=False)
class Crowd:
    """People at one pressure, standing wherever it hurts, along the bridge and across it.

    Parameters
    ----------
    hurts, relieves : line loads, N/m: on the part of the influence line that hurts, and, from people beyond the
        other truss who lift this one, on the other part.
    """

    hurts: float
    relieves: float
    panels: Array

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """See `Pattern`."""
        positive, negative = loaded_areas(ordinates, self.panels)
        return (
            self.hurts * positive - self.relieves * negative,
            self.hurts * negative - self.relieves * positive,
        )

    @property
    def everywhere(self) -> float:
        """Line load of people on the whole of the near strip, N/m."""
        return self.hurts


CROWDS: Final = (Crowd, CrowdByLength, CrowdByArea)
"""What people on the deck become, at a pressure that is given or by rule."""


@dataclass(frozen=True, eq=False)
class Everywhere:
    """A pressure that stands on the whole deck or not at all: snow, storage."""

    line_load: float
    panels: Array

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """See `Pattern`."""
        total = self.line_load * ((ordinates[..., :-1] + ordinates[..., 1:]) * (self.panels / 2)).sum(axis=-1)
        return np.maximum(total, 0.0), np.minimum(total, 0.0)


@dataclass(frozen=True, eq=False)
class Placed:
    """Forces at a finite number of places, one of which is the worst.

    Parameters
    ----------
    places : (c, d) force on each deck joint for each place along the bridge, N, whole load.
    shares : parts of the whole that this truss takes, for each place across.
    """

    places: Array
    shares: tuple[float, ...]

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """See `Pattern`."""
        effects = ordinates @ self.places.T
        largest, least = effects.max(axis=-1), effects.min(axis=-1)
        options = [share * extreme for share in self.shares for extreme in (largest, least)]
        zero = np.zeros_like(largest)
        return np.maximum.reduce([zero, *options]), np.minimum.reduce([zero, *options])


@dataclass(frozen=True, eq=False)
class Together:
    """A load and its companions, each at its own worst, times its factor."""

    parts: tuple[tuple[float, Pattern], ...]

    def extremes(self, ordinates: Array) -> tuple[Array, Array]:
        """See `Pattern`."""
        found = [(factor, part.extremes(ordinates)) for factor, part in self.parts]
        largest = np.sum([factor * extremes[0] for factor, extremes in found], axis=0)
        least = np.sum([factor * extremes[1] for factor, extremes in found], axis=0)
        return largest, least


def on_deck_joints(x: Array, positions: Array, deck: Array) -> Array:
    """How unit forces between deck joints go to the joints.

    Parameters
    ----------
    x : (d,) deck joints; positions : (n,), m; deck : (n,) whether the force stands on the deck at all.

    Returns
    -------
    (n, d) parts of each force.
    """
    panel = np.clip(np.searchsorted(x, positions, side="right") - 1, 0, len(x) - 2)
    along = np.clip((positions - x[panel]) / (x[panel + 1] - x[panel]), 0.0, 1.0)
    rows = np.arange(len(positions))
    parts = np.zeros((len(positions), len(x)))
    parts[rows, panel] = 1.0 - along
    parts[rows, panel + 1] = along
    return parts * deck[:, None]


def axle_places(x: Array, positions: Array, weights: Array) -> Array:
    """Every place of an axle train that can be the worst, in both directions.

    The effect of a train is a sum of straight pieces; it is extreme where some axle stands over a deck joint.
    At the ends of the deck an ordinate may end abruptly, so a train is also taken just before and just after.

    Parameters
    ----------
    x : (d,) deck joints, m. positions, weights : (k,) of the axles, m and N.

    Returns
    -------
    (c, d) force on each deck joint, N.
    """
    near = _SAME_PLACE * (x[-1] - x[0])
    found = []
    for direction in (1.0, -1.0):
        offsets = direction * positions
        starts = np.unique((x[:, None] - offsets).ravel())
        axles = starts[:, None] + offsets
        at_first, at_last = np.abs(axles - x[0]) <= near, np.abs(axles - x[-1]) <= near
        inside = (axles >= x[0] - near) & (axles <= x[-1] + near)
        for on in (inside, inside & ~at_first, inside & ~at_last):
            parts = on_deck_joints(x, axles.ravel(), on.ravel()).reshape(*axles.shape, len(x))
            found.append((parts * weights[:, None]).sum(axis=1))
    return np.concatenate(found)


@dataclass(frozen=True, slots=True)
class Vehicle:
    """A published vehicle. Axles as (position, weight), as printed; converted exactly."""

    axles: tuple[tuple[str, str], ...]
    track: str
    source: str


VEHICLES: Final[Mapping[str, Vehicle]] = {
    "H5": Vehicle((("0 ft", "2 kip"), ("14 ft", "8 kip")), "6 ft", "AASHTO pedestrian guide 2009, 3.2 (from memory)"),
    "H10": Vehicle((("0 ft", "4 kip"), ("14 ft", "16 kip")), "6 ft", "AASHTO pedestrian guide 2009, 3.2 (from memory)"),
    "en service": Vehicle((("0 m", "40 kN"), ("3 m", "80 kN")), "1.3 m", "EN 1991-2, 5.6.3 (from memory)"),
}


def axles_of(load: LiveLoad) -> tuple[Array, Array, float]:
    """Positions (m) and weights (N) of a vehicle's axles, and its track (m)."""
    if load.vehicle is not None:
        known = VEHICLES[load.vehicle]
        positions = [parse(position, "length").si for position, _ in known.axles]
        weights = [parse(weight, "force").si for _, weight in known.axles]
        return np.array(positions), np.array(weights), parse(known.track, "length").si
    axles = load.axles or ()
    track = load.track.si if load.track else 0.0
    return np.array([axle.position.si for axle in axles]), np.array([axle.weight.si for axle in axles]), track


def _crowd(load: LiveLoad, floor: Floor, x: Array) -> Pattern | None:
    if load.rule is not None:
        return RULES[load.rule].crowd(floor, np.diff(x))
    if load.pressure is None:
        return None
    hurts, relieves = floor.strips()
    return Crowd(load.pressure.si * hurts, load.pressure.si * relieves, np.diff(x))


def _vehicle(load: LiveLoad, floor: Floor, x: Array) -> Pattern | None:
    positions, weights, track = axles_of(load)
    return Placed(axle_places(x, positions, weights), floor.wheel_shares(track))


def _concentrated(load: LiveLoad, floor: Floor, x: Array) -> Pattern | None:
    if load.force is None:
        return None
    return Placed(load.force.si * np.eye(len(x)), floor.point_shares())


def _uniform(load: LiveLoad, floor: Floor, x: Array) -> Pattern | None:
    if load.pressure is None:
        return None
    return Everywhere(load.pressure.si * floor.width * floor.mean_share(), np.diff(x))


KeyForm = Literal["pressure", "force", "length", "axles", "rule", "vehicle name"]


@dataclass(frozen=True)
class LiveKind:
    """A kind of live load.

    Parameters
    ----------
    keys : name in a site file, form of its value, whether it is required.
    one_of : groups of keys of which exactly one group must be there.
    pattern : makes the load ready for a deck; None where this program cannot compute it yet.
    """

    keys: tuple[tuple[str, KeyForm, bool], ...]
    one_of: tuple[tuple[str, ...], ...]
    pattern: Callable[[LiveLoad, Floor, Array], Pattern | None]


LIVE_KINDS: Final[Mapping[str, LiveKind]] = {
    "crowd": LiveKind((("pressure", "pressure", False), ("rule", "rule", False)), (("pressure",), ("rule",)), _crowd),
    "vehicle": LiveKind(
        (("axles", "axles", False), ("track", "length", False), ("vehicle", "vehicle name", False)),
        (("axles", "track"), ("vehicle",)),
        _vehicle,
    ),
    "concentrated": LiveKind((("force", "force", True),), (), _concentrated),
    "uniform": LiveKind((("pressure", "pressure", True),), (), _uniform),
}


def crowds(loads: tuple[LiveLoad, ...], floor: Floor, x: Array) -> dict[str, Pattern]:
    """People on one truss's deck by the names of their loads, each crowd without the loads that act with it.

    Parameters
    ----------
    x : (d,) deck joints, m.
    """
    found = {load.name: _crowd(load, floor, x) for load in loads if load.kind == "crowd"}
    return {name: crowd for name, crowd in found.items() if crowd is not None}


def patterns(loads: tuple[LiveLoad, ...], floor: Floor, x: Array) -> dict[str, Pattern | None]:
    """Each live load of a site ready for one truss's deck, by name, in order of the names.

    None stands for a load that this program cannot compute; a load with such a companion is one too.

    Parameters
    ----------
    x : (d,) deck joints, m.
    """
    alone = {load.name: LIVE_KINDS[load.kind].pattern(load, floor, x) for load in loads}
    found: dict[str, Pattern | None] = {}
    for load in sorted(loads, key=lambda load: load.name):
        parts = [(1.0, alone[load.name])]
        parts += [(companion.factor, alone[companion.load]) for companion in load.companions or ()]
        known = tuple((factor, part) for factor, part in parts if part is not None)
        if len(known) < len(parts):
            found[load.name] = None
        else:
            found[load.name] = Together(known) if load.companions else alone[load.name]
    return found
