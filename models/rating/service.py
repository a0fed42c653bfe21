"""Deflection under people and vertical frequency: advisory, beside the rating factors.

Limits of the AASHTO guide specifications for pedestrian bridges, 2009 (from memory): live deflection 1/360 of the span
and 1/220 of a cantilever arm (5); vertical frequency 3 Hz, or else 2.86 ln(180 kip/W) Hz, W the dead load of the whole
bridge (6).
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping
from typing import Final

import numpy as np

from models.bridge import Footbridge
from models.calculation import Array
from models.finding import Finding
from models.quantity import GRAVITY, parse
from models.rating.answer import joint_dead_load
from models.rating.outcome import Outcome
from models.rating.prepare import PreparedTruss
from models.rating.result import Deflection, TrussRating
from models.statics.geometry import Geometry
from models.statics.vibration import joint_flexibility, lowest_frequency
from models.words import Figures
from models.words import rating as sentences

SPAN_OVER: Final = 360
ARM_OVER: Final = 220
LEAST_FREQUENCY: Final = 3.0
"""Hz."""

_SAME_PLACE: Final = 1e-9
_KIP: Final = parse("1 kip", "force").si


def frequency_by_weight(weight: float) -> float:
    """The frequency that a bridge of this dead load (N) shall have where it swings slower than 3 Hz, Hz."""
    return 2.86 * math.log(180 * _KIP / weight)


def service_of(outcome: Outcome) -> tuple[Deflection | None, float | None]:
    """The worst deflection of a deck joint under people, and the lowest vertical frequency of the dead load, Hz.

    None where the truss has no forces, where no crowd is among the live loads, where a span is not to be told; and in
    a redundant truss with bars that cannot push, which is softer than superposition says.
    """
    if outcome.solved is None or _goes_slack(outcome):
        return None, None
    mass = joint_dead_load(outcome.prepared, outcome.task.stock).sum(axis=0) / GRAVITY
    limits = deflection_limits(outcome.prepared.geometry)
    deflections: list[Deflection] = []
    frequencies: list[float] = []
    for answer in outcome.solved.answers:
        if answer.flexibility is not None:
            forces = answer.response.forces[:, 1::2]
            frequencies.append(lowest_frequency(forces, answer.flexibility, mass))
            deck = joint_flexibility(forces[:, outcome.prepared.geometry.deck], answer.flexibility)
            deflections += _deflections(outcome.prepared, deck, limits)
    frequency = min(frequencies, default=math.inf)
    worst = max(deflections, key=lambda one: one.size / one.limit, default=None)
    return worst, frequency if math.isfinite(frequency) else None


def _goes_slack(outcome: Outcome) -> bool:
    bars = outcome.prepared.truss.bars
    return outcome.standing.response is None and any(bars[number].tension_only for number in outcome.standing.kept)


def _deflections(prepared: PreparedTruss, lines: Array, limits: Array) -> Iterator[Deflection]:
    """The deck joint that comes nearest to its limit, for each crowd by itself, people where they hurt.

    Parameters
    ----------
    lines : (d, d) how far each deck joint goes under a unit force on each deck joint, m/N. limits : (d,), m.
    """
    if not np.isfinite(limits).any():
        return
    for load, crowd in prepared.crowds.items():
        largest, least = crowd.extremes(lines)
        size = np.maximum(largest, -least)
        joint = int(np.argmax(size / limits))
        name = prepared.geometry.joints[prepared.geometry.deck[joint]]
        yield Deflection(name, float(size[joint]), float(limits[joint]), load)


def deflection_limits(geometry: Geometry) -> Array:
    """How far each deck joint may go, (d,), m; infinite over supports, and where there are not two of them."""
    x = geometry.coordinates[geometry.deck, 0]
    supports = np.unique(geometry.coordinates[geometry.held[1::2], 0])
    limits = np.full(len(x), np.inf)
    if len(supports) < 2:
        return limits
    place = np.clip(np.searchsorted(supports, x), 1, len(supports) - 1)
    limits = (supports[place] - supports[place - 1]) / SPAN_OVER
    near = _SAME_PLACE * (supports[-1] - supports[0])
    limits = np.where(x < supports[0] - near, (supports[0] - x.min()) / ARM_OVER, limits)
    limits = np.where(x > supports[-1] + near, (x.max() - supports[-1]) / ARM_OVER, limits)
    return np.where(geometry.held[2 * geometry.deck + 1], np.inf, limits)


def notes(bridge: Footbridge, trusses: Mapping[str, TrussRating]) -> Iterator[Finding]:
    """What swings or sags more than the guide would have it."""
    figures = Figures(bridge.units or "SI")
    weight = sum(sum(truss.dead_total) for truss in trusses.values())
    for name, truss in trusses.items():
        sags = truss.deflection
        if sags is not None and sags.size > sags.limit:
            sizes = figures.text(sags.size, "size"), figures.text(sags.limit, "size")
            yield Finding("note", sentences.sags(sags.load, sags.joint, *sizes), name)
        if truss.frequency is not None and truss.frequency < LEAST_FREQUENCY:
            text = sentences.swings(truss.frequency, frequency_by_weight(weight), figures.text(weight, "force"))
            yield Finding("note", text, name)
