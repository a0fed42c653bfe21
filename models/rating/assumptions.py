"""Every default that a rating used, a sentence each."""

from __future__ import annotations

from collections.abc import Iterator

from models import words
from models.bridge import Footbridge
from models.loading.dead import ASSUMED_CONNECTION_ALLOWANCE
from models.loading.imposed import ASSUMED_EXPANSION
from models.rating.outcome import Outcome
from models.rating.prepare import HALF_THROUGH_K, held_by_frames
from models.resistance.protocol import Basis
from models.words import rating as sentences


def assumptions_of(bridge: Footbridge, outcomes: tuple[Outcome, ...]) -> tuple[str, ...]:
    """The assumptions, each once, in the order in which they bear on the figures."""
    sentences = [*_loads(bridge), *_bars(outcomes), *_system(bridge, outcomes[0].task.basis)]
    for outcome in outcomes:
        for fitted in outcome.task.stock.fitted:
            sentences.extend(fitted.assumptions)
    sentences.extend(_conditions(outcomes))
    return tuple(dict.fromkeys(sentences))


def _loads(bridge: Footbridge) -> Iterator[str]:
    yield (
        "Bars are joined by smooth pins and loaded at their joints only; half of each bar's weight goes to either end "
        "(common practice, no source)."
    )
    if bridge.rating.connection_allowance is None:
        yield (
            f"The bars' own weight is multiplied by {ASSUMED_CONNECTION_ALLOWANCE:.2f} for connections "
            "(common practice, no source)."
        )
    if bridge.deck.dead_width is None:
        yield "The deck's weight acts on its clear width, as the site gives no other."
    if len(bridge.trusses) > 1 and bridge.deck.truss_spacing is None:
        yield "The trusses are taken as far apart as the deck is wide, as the site gives no spacing."
    if bridge.deck.wearing is None:
        yield "The wearing course weighs nothing, as the site gives none."
    if bridge.deck.rests_on is None:
        yield "The deck rests on the joints, as the site does not say."
    if any(one.change is not None and one.expansion is None for one in bridge.rating.imposed or ()):
        yield (
            f"Bars expand by {ASSUMED_EXPANSION:f} per kelvin where the site gives nothing else "
            "(EN 1991-1-5, annex C, from memory)."
        )
    yield "Live loads act without a dynamic allowance (AASHTO pedestrian guide 2009, 3)."


def _bars(outcomes: tuple[Outcome, ...]) -> Iterator[str]:
    bars = [bar for outcome in outcomes for bar in outcome.prepared.truss.bars]
    plain = sum(bar.k_in_plane is None or bar.k_out_of_plane is None for bar in bars)
    if plain:
        yield f"The effective length factor K is 1.0 where the site gives none ({words.count(plain, 'bar')})."
    sideways = sum(
        held_by_frames(outcome.prepared.truss, bar) and (bar.k_out_of_plane or 0.0) < HALF_THROUGH_K
        for outcome in outcomes
        for bar in outcome.prepared.truss.bars
    )
    if sideways:
        yield (
            f"K out of plane is {HALF_THROUGH_K} for top chords and end posts that nothing braces overhead "
            f"({words.count(sideways, 'bar')}; common practice, no source)."
        )


def _system(bridge: Footbridge, basis: Basis) -> Iterator[str]:
    rules = bridge.rating
    if basis.system_factor(None) is None:
        return
    if rules.system is None and any(bar.system is None for truss in bridge.trusses.values() for bar in truss.bars):
        yield "The site names no system; its system factor is taken as for welded bars."


def _conditions(outcomes: tuple[Outcome, ...]) -> Iterator[str]:
    unstated = sum(now.state is None for outcome in outcomes for now in outcome.conditions)
    if unstated and outcomes[0].task.basis.condition_factor(None, False) is not None:
        yield sentences.no_state(unstated)
