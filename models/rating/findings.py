"""What a reader of the rating has to know, bar by bar and for the whole truss."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Iterator
from typing import Final

import numpy as np

from models.bridge import Bar, Footbridge
from models.finding import Finding, Level
from models.rating.factor import factored_dead
from models.rating.outcome import Outcome
from models.rating.prepare import HALF_THROUGH_K, PreparedTruss, held_by_frames
from models.rating.result import Reaction
from models.resistance.columns import elastic_critical_load, slenderness
from models.resistance.protocol import Basis
from models.section import centroid_shift
from models.words import Figures
from models.words import rating as sentences

_LARGE_DISPLACEMENT: Final = 1 / 50
_MOST_SLENDER: Final = {"bracing": 140}
_MOST_SLENDER_MAIN: Final = 120
_NOTICEABLE_SHIFT: Final = 1e-6
"""Parts of the bar's length; less is rounding."""


def by_bar(bridge: Footbridge, outcome: Outcome) -> dict[str, tuple[Finding, ...]]:
    """The findings of each bar of a truss, what was recorded first, then what the figures say."""
    found: dict[str, list[Finding]] = defaultdict(list)
    for now in outcome.conditions:
        found[now.bar].extend(now.findings)
    figures = Figures(bridge.units or "SI")
    for part in _PARTS:
        for number, level, text in part(outcome, figures, bridge):
            bar = outcome.prepared.truss.bars[number].id
            found[bar].append(Finding(level, text, outcome.name, bar))
    return {bar: tuple(findings) for bar, findings in found.items()}


_Found = Iterator[tuple[int, Level, str]]
_Part = Callable[[Outcome, Figures, Footbridge], _Found]


def _bar(outcome: Outcome, number: int) -> Bar:
    return outcome.prepared.truss.bars[number]


def _gone(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    for number in sorted(outcome.severed):
        told = outcome.conditions[number].severed
        name = _bar(outcome, number).id
        yield number, "act now", sentences.severed(name) if told else sentences.no_steel_left(name)
    for number, now in enumerate(outcome.conditions):
        if number in outcome.cracked:
            yield number, "act now", sentences.cracked_out(now.bar)
        elif now.crack is not None and number not in outcome.severed:
            yield number, "left out", sentences.cracked_in(now.bar)
    for number in sorted(outcome.slack):
        yield number, "note", sentences.slack_out(_bar(outcome, number).id)


def _dead_alone(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    if outcome.solved is None:
        return
    found, capacity = outcome.solved.figures, outcome.task.capacity[-1]
    for number in np.flatnonzero(found.dead_exceeds.any(axis=0)).tolist():
        direction = int(found.direction[number])
        alone = factored_dead(outcome.task.basis, found.dead[:, number])
        excess = float(alone[direction] - capacity[direction, number])
        name = ("tension", "compression")[direction]
        yield number, "act now", sentences.dead_exceeds(_bar(outcome, number).id, name, figures.text(excess, "force"))


def _slack(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    """Bars that cannot push and go slack under what governs any bar of their truss, their own panel's others too."""
    parts = outcome.solved.figures.slack if outcome.solved else None
    if parts is None:
        return
    bars = outcome.prepared.truss.bars
    for number in np.flatnonzero(parts.slack.any(axis=0)).tolist():
        governed = tuple(bars[other].id for other in np.flatnonzero(parts.slack[:, number]).tolist())
        yield number, "note", sentences.goes_slack(bars[number].id, governed, len(bars))


def _compression_leaves_out(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    """Tubes beyond the rule, sections that are not doubly symmetric, centroid shift and bow."""
    stock, strength = outcome.task.stock, outcome.task.strength
    pieces = strength.pieces
    if strength.upper.uncovered is not None:
        for number in np.unique(pieces.owner[strength.upper.uncovered]).tolist():
            yield number, "left out", sentences.tube_beyond_rule(outcome.task.basis.tube_rule)
    for number, fitted in enumerate(stock.fitted):
        if not fitted.built.doubly_symmetric:
            yield number, "left out", sentences.not_doubly_symmetric()
    shift = centroid_shift(pieces.stack, pieces.thickness)
    length = outcome.prepared.geometry.lengths
    for number in np.unique(pieces.owner[shift > _NOTICEABLE_SHIFT * length[pieces.owner]]).tolist():
        largest = float(shift[pieces.owner == number].max())
        yield number, "left out", sentences.centroid_shift(figures.text(largest, "size", 2))
    for number, now in enumerate(outcome.conditions):
        if now.bow is not None:
            yield number, "left out", sentences.bowed(figures.text(now.bow.offset.si, "size"))


def _frames(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    for number, bar in enumerate(outcome.prepared.truss.bars):
        if not held_by_frames(outcome.prepared.truss, bar):
            continue
        given = bar.k_out_of_plane
        yield number, "left out", sentences.half_through(max(HALF_THROUGH_K, given or 0.0))
        if given is not None and given < HALF_THROUGH_K:
            yield number, "note", sentences.smaller_k(given)


def _deck_on_chord(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    if bridge.deck.rests_on != "chord":
        return
    geometry = outcome.prepared.geometry
    panels = {frozenset(pair) for pair in zip(geometry.deck[:-1].tolist(), geometry.deck[1:].tolist(), strict=True)}
    for number, ends in enumerate(geometry.ends.tolist()):
        if frozenset(ends) in panels:
            yield number, "left out", sentences.loaded_between_joints(_bar(outcome, number).id)


def _slender_plates(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    """Bars of whose section only a part counts in compression, by the piece of which least does."""
    strength = outcome.task.strength
    thin = strength.upper.slender
    if thin is None:
        return
    owner, counted = strength.pieces.owner, strength.upper.counted
    reduced = np.flatnonzero(counted < 1.0)
    for number in np.unique(owner[reduced]).tolist():
        piece = min(np.flatnonzero(owner == number).tolist(), key=counted.__getitem__)
        pieces = outcome.task.stock.fitted[number].built.pieces
        of_parts = [plate.name for plate in pieces for _ in plate.free]
        names = dict.fromkeys(name for name, is_thin in zip(of_parts, thin[piece], strict=False) if is_thin)
        yield number, "note", sentences.slender_plate(tuple(names) or (pieces[0].name,), float(counted[piece]))


def _slenderness(outcome: Outcome, figures: Figures, bridge: Footbridge) -> _Found:
    strength = outcome.task.strength
    member = strength.member
    ratio = slenderness(member.E, member.area, elastic_critical_load(member))
    for number in np.unique(strength.pieces.owner[ratio > _MOST_SLENDER_MAIN]).tolist():
        bar = _bar(outcome, number)
        limit = _MOST_SLENDER.get(bar.role, _MOST_SLENDER_MAIN)
        largest = float(ratio[strength.pieces.owner == number].max())
        if largest > limit and _may_be_pushed(outcome, number):
            yield number, "note", sentences.very_slender(largest, limit)


def _may_be_pushed(outcome: Outcome, number: int) -> bool:
    """Whether factored loads push a bar, as far as forces tell."""
    return outcome.solved is None or bool(outcome.solved.figures.acts[1, number])


_PARTS: Final[tuple[_Part, ...]] = (
    _gone, _dead_alone, _slack, _compression_leaves_out, _frames, _deck_on_chord, _slender_plates, _slenderness,
)  # fmt: skip


def of_truss(bridge: Footbridge, outcome: Outcome, reactions: tuple[Reaction, ...]) -> Iterator[Finding]:
    """Findings about a truss as a whole."""
    figures = Figures(bridge.units or "SI")
    stability, geometry = outcome.standing.stability, outcome.standing.geometry
    if not stability.carries:
        joints = tuple(name for name, moves in zip(geometry.joints, stability.moving, strict=True) if moves)
        bars = tuple(name for name, loose in zip(geometry.bars, stability.loose, strict=True) if loose)
        nearly = stability.verdict == "nearly a mechanism"
        yield Finding("act now", sentences.mechanism(outcome.name, joints, bars, nearly=nearly), outcome.name)
    for reaction in reactions:
        if reaction.least < 0:
            text = sentences.uplift(reaction.joint, figures.text(reaction.least, "force"), reaction.load)
            yield Finding("note", text, outcome.name)
    span = geometry.span
    largest = max((answer.displacement for answer in outcome.solved.answers), default=0.0) if outcome.solved else 0.0
    if largest > span * _LARGE_DISPLACEMENT:
        size = figures.text(largest, "size")
        text = sentences.large_displacement(size, figures.text(span, "length"))
        yield Finding("doubtful", text, outcome.name)
    yield from _without_pushing(outcome)
    yield from _double_bars(outcome.prepared)


def _without_pushing(outcome: Outcome) -> Iterator[Finding]:
    """Where bars cannot push: panels that no rod holds, the end of equilibrium, what is not known."""
    truss, stability = outcome.prepared.truss, outcome.standing.stability
    cannot = tuple(bar.id for number, bar in enumerate(truss.bars) if bar.tension_only and number not in outcome.out)
    if cannot and not stability.carries and outcome.prepared.standing(outcome.out).stability.carries:
        yield Finding("act now", sentences.would_have_to_push(outcome.name, cannot), outcome.name)
    parts = outcome.solved.figures.slack if outcome.solved else None
    if parts is None or outcome.solved is None:
        return
    if parts.undecided:
        yield Finding("left out", sentences.not_decided(outcome.name), outcome.name)
    if parts.ends.any():
        load = int(outcome.solved.figures.load[int(parts.ends.argmax())])
        name = outcome.solved.loads[load] if load >= 0 else None
        factor = float(outcome.solved.figures.lowest[-1][parts.ends].min())
        yield Finding("note", sentences.equilibrium_ends(outcome.name, factor, name), outcome.name)
    for rods in _panels_of_rods(outcome):
        number = next((row for row, slack in enumerate(parts.slack[:, list(rods)]) if slack.all()), None)
        if number is not None:
            names = tuple(truss.bars[rod].id for rod in rods)
            yield Finding("note", sentences.panel_slack(names, truss.bars[number].id), outcome.name)


def _panels_of_rods(outcome: Outcome) -> list[tuple[int, ...]]:
    """Bars that cannot push by the stretch of the bridge that they cross, where there are several."""
    geometry = outcome.prepared.geometry
    x = np.sort(geometry.coordinates[geometry.ends, 0], axis=1)
    by_stretch: dict[tuple[float, ...], list[int]] = defaultdict(list)
    for number in np.flatnonzero(outcome.prepared.tension_only).tolist():
        by_stretch[tuple(x[number].tolist())].append(number)
    return [tuple(rods) for rods in by_stretch.values() if len(rods) > 1]


def _double_bars(prepared: PreparedTruss) -> Iterator[Finding]:
    joined: dict[frozenset[str], list[str]] = defaultdict(list)
    for bar in prepared.truss.bars:
        joined[frozenset((bar.start, bar.end))].append(bar.id)
    for bars in joined.values():
        if len(bars) > 1:
            yield Finding("note", sentences.double_bars(tuple(bars)), prepared.truss.name)


def of_bridge(bridge: Footbridge, basis: Basis) -> Iterator[Finding]:
    """What the basis leaves out, keys that are read and kept but that no figure uses yet, and what is not said."""
    for sentence in basis.leaves_out:
        yield Finding("left out", sentence)
    for place, imposed in enumerate(bridge.rating.imposed or ()):
        if imposed.truss and imposed.joint and imposed.joint not in bridge.trusses[imposed.truss].supports:
            why = f"{imposed.joint} is no support, so that it goes where the bars let it."
            yield Finding("not used", sentences.not_used(f"rating/imposed/{place}", why), imposed.truss)
    if bridge.half_through is not None:
        why = "the lateral stability of the top chord is not rated."
        yield Finding("not used", sentences.not_used("half through", why))
    if bridge.overrides:
        why = "overrides are printed in the report and change no figure."
        yield Finding("not used", sentences.not_used("overrides", why))
    if bridge.deck.wearing is None:
        yield Finding("assumed", "The site gives no wearing course; its weight is taken as 0.")
    stitched = [bar.id for truss in bridge.trusses.values() for bar in truss.bars if bar.stitch_spacing is not None]
    if stitched:
        why = "buckling of the pieces of built-up bars between their stitches is not computed."
        yield Finding("not used", sentences.not_used("stitch spacing", why))
