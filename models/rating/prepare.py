"""What does not depend on a reading, worked out once and kept by the caller."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from functools import cached_property
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.bridge import Bar, Footbridge, LiveLoad, Truss
from models.calculation import Array
from models.condition import BarCondition
from models.loading.dead import ASSUMED_CONNECTION_ALLOWANCE, deck_on_joints
from models.loading.floor import floor_of
from models.loading.imposed import misfits
from models.loading.live import Pattern, crowds, patterns
from models.rating.fitted import Fitted, Stock, fit, stock
from models.statics.geometry import Geometry, geometry_of
from models.statics.response import Response, respond
from models.statics.stability import Stability, judge

HALF_THROUGH_K: Final = 2.0
"""Effective length factor out of plane of a top chord that nothing braces overhead, until its lateral
stability is worked out (common practice, no source)."""

_HELD_BY_FRAMES: Final = ("top chord", "end post")


@dataclass(frozen=True, eq=False)
class Standing:
    """A truss with some bars left out: whether it stands, and its response where no reading can change it.

    Parameters
    ----------
    kept : numbers of the bars that are in.
    response : of a determinate truss; None where forces depend on the bars' flexibility, or there are none.
    """

    kept: NDArray[np.int64]
    geometry: Geometry
    stability: Stability
    response: Response | None

    def respond(self, flexibility: Array) -> Response:
        """The response; flexibility (all bars) is used only where forces depend on it."""
        if self.response is not None:
            return self.response
        return respond(self.geometry, self.stability.condition, flexibility[self.kept])


@dataclass(frozen=True, eq=False)
class PreparedTruss:
    """One truss ready to be rated.

    Parameters
    ----------
    deck_load : (2, j) downward force of the deck on each joint, components and wearing, N.
    effective_lengths : (2, m) K times length, in and out of plane, m.
    patterns : live loads by name; None for one that cannot be computed. kinds : of what acts in each of them.
    tributary : (d,) length of deck that each deck joint carries, m.
    crowds : people on the deck by name, each crowd without the loads beside it.
    misfits : (k, m) how much too long each bar becomes under each change that the site imposes, m.
    """

    truss: Truss
    geometry: Geometry
    stock: Stock
    allowance: float
    deck_load: Array
    effective_lengths: Array
    patterns: Mapping[str, Pattern | None]
    kinds: Mapping[str, frozenset[str]]
    tributary: Array
    crowds: Mapping[str, Pattern]
    misfits: Array
    _standing: dict[frozenset[int], Standing] = field(default_factory=dict)

    @cached_property
    def tension_only(self) -> NDArray[np.bool_]:
        """(m,) which bars cannot push."""
        return np.array([bool(bar.tension_only) for bar in self.truss.bars], bool)

    def standing(self, removed: frozenset[int]) -> Standing:
        """The truss without some of its bars; worked out once for each set."""
        found = self._standing.get(removed)
        if found is None:
            found = self._standing[removed] = self._without(removed)
        return found

    def _without(self, removed: frozenset[int]) -> Standing:
        kept = np.array([bar for bar in range(len(self.geometry.bars)) if bar not in removed], int)
        geometry = self.geometry.keeping(kept)
        stability = judge(geometry)
        determinate = stability.verdict == "determinate"
        response = respond(geometry, stability.condition) if determinate else None
        return Standing(kept, geometry, stability, response)


@dataclass(frozen=True, eq=False)
class Prepared:
    """A footbridge ready to be rated again and again. Holds caches; share it, do not copy it."""

    bridge: Footbridge
    trusses: Mapping[str, PreparedTruss]
    _fitted: dict[tuple[str, str, str, str], Fitted] = field(default_factory=dict)

    def fitted(self, truss: str, bar: Bar, section: str, material: str) -> Fitted:
        """A bar with a section and metal that may not be the ones of the drawing."""
        key = truss, bar.id, section, material
        found = self._fitted.get(key)
        if found is None:
            found = self._fitted[key] = fit(self.bridge, bar, section, material)
        return found

    def stock(self, truss: str, conditions: tuple[BarCondition, ...]) -> Stock:
        """A truss's bars as they stand, replacements in."""
        prepared = self.trusses[truss]
        bars = prepared.truss.bars
        if all(
            now.section == bar.section and now.material == bar.material
            for bar, now in zip(bars, conditions, strict=True)
        ):
            return prepared.stock
        return stock(
            [self.fitted(truss, bar, now.section, now.material) for bar, now in zip(bars, conditions, strict=True)]
        )


def prepare(bridge: Footbridge) -> Prepared:
    """Work out geometry, sections, load patterns and, where possible, forces of a bridge.

    Raises
    ------
    InputError
        If a material that needs its own strengths has none.
    """
    return Prepared(bridge, {name: _prepare_truss(bridge, truss) for name, truss in bridge.trusses.items()})


def _prepare_truss(bridge: Footbridge, truss: Truss) -> PreparedTruss:
    geometry = geometry_of(truss)
    x = geometry.coordinates[geometry.deck, 0]
    panels = np.diff(x)
    allowance = bridge.rating.connection_allowance
    return PreparedTruss(
        truss=truss,
        geometry=geometry,
        stock=stock([fit(bridge, bar, bar.section, bar.material) for bar in truss.bars]),
        allowance=ASSUMED_CONNECTION_ALLOWANCE if allowance is None else allowance,
        deck_load=np.array(deck_on_joints(bridge, truss.name, geometry)),
        effective_lengths=_effective_lengths(truss, geometry.lengths),
        patterns=patterns(bridge.rating.live, floor_of(bridge, truss.name), x),
        kinds=_kinds(bridge.rating.live),
        tributary=np.append(panels, 0.0) / 2 + np.append(0.0, panels) / 2,
        crowds=crowds(bridge.rating.live, floor_of(bridge, truss.name), x),
        misfits=misfits(bridge.rating, truss.name, geometry),
    )


def _kinds(loads: tuple[LiveLoad, ...]) -> dict[str, frozenset[str]]:
    """The kinds of what acts in each live load, its own and its companions'."""
    own = {load.name: load.kind for load in loads}
    return {
        load.name: frozenset({load.kind, *(own[companion.load] for companion in load.companions or ())})
        for load in loads
    }


def held_by_frames(truss: Truss, bar: Bar) -> bool:
    """Whether only the verticals and floor beams keep this bar from going sideways."""
    return truss.top_chord == "half through" and bar.role in _HELD_BY_FRAMES


def _effective_lengths(truss: Truss, lengths: Array) -> Array:
    found = np.empty((2, len(lengths)))
    for number, bar in enumerate(truss.bars):
        out_of_plane = 1.0 if bar.k_out_of_plane is None else bar.k_out_of_plane
        if held_by_frames(truss, bar):
            out_of_plane = max(HALF_THROUGH_K, out_of_plane)
        free = bar.unbraced_out_of_plane.si if bar.unbraced_out_of_plane else lengths[number]
        in_plane = 1.0 if bar.k_in_plane is None else bar.k_in_plane
        found[:, number] = in_plane * lengths[number], out_of_plane * free
    return found
