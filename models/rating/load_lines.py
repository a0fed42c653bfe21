"""The loads and factors of a rating as lines that a reviewer can check, each with its source."""

from __future__ import annotations

from collections.abc import Iterator

from models.bridge import Footbridge, LiveLoad
from models.loading.dead import ASSUMED_CONNECTION_ALLOWANCE
from models.loading.imposed import ASSUMED_EXPANSION
from models.loading.live import VEHICLES
from models.loading.rules import RULES
from models.quantity import Quantity
from models.resistance.protocol import Basis, FactorLine

_SITE = "site file"


def load_lines(bridge: Footbridge, basis: Basis) -> tuple[FactorLine, ...]:
    """Dead loads, live loads and the factors of the basis."""
    live = (_live(load) for load in bridge.rating.live)
    return (*_dead(bridge), *live, *_imposed(bridge, basis), *basis.factor_lines())


def _dead(bridge: Footbridge) -> Iterator[FactorLine]:
    deck, allowance = bridge.deck, bridge.rating.connection_allowance
    given = allowance is not None
    yield FactorLine(
        "own weight of bars, times",
        f"{allowance if given else ASSUMED_CONNECTION_ALLOWANCE}",
        _SITE if given else "assumed (common practice, no source)",
    )
    yield FactorLine("deck, dead", f"{deck.dead.text} on {(deck.dead_width or deck.width).text}", _SITE)
    yield FactorLine("wearing course", deck.wearing.text if deck.wearing else "none", _SITE)
    if isinstance(deck.edge, Quantity):
        yield FactorLine("edge, each truss", deck.edge.text, _SITE)
    elif deck.edge:
        for truss, load in deck.edge.items():
            yield FactorLine(f"edge, {truss}", load.text, _SITE)


def _imposed(bridge: Footbridge, basis: Basis) -> Iterator[FactorLine]:
    for one in bridge.rating.imposed or ():
        where = f"truss {one.truss}" if one.truss else "all trusses"
        if one.down is not None:
            yield FactorLine(f"settlement of {one.joint}, {where}", f"{one.down.text} down", _SITE)
        elif one.short is not None:
            yield FactorLine(f"{one.bar} made short, {where}", one.short.text, _SITE)
        elif one.change is not None:
            expansion = ASSUMED_EXPANSION if one.expansion is None else one.expansion
            value = f"{one.change:g} K, {1e6 * expansion:g} µm/m per K"
            assumed = f"{_SITE}; expansion assumed (EN 1991-1-5, annex C, from memory)"
            source = assumed if one.expansion is None else _SITE
            yield FactorLine(f"change of temperature, {where}", value, source)
    if bridge.rating.imposed:
        value = f"{basis.components.greatest:.2f} where they act; what relieves counts for nothing"
        yield FactorLine("imposed changes, load factor", value, "as of components (common practice, no source)")


def _live(load: LiveLoad) -> FactorLine:
    what = f"{load.name} ({load.kind})"
    companions = "".join(f", with {companion.factor} x {companion.load}" for companion in load.companions or ())
    if load.vehicle is not None:
        vehicle = VEHICLES[load.vehicle]
        axles = ", ".join(f"{weight} at {position}" for position, weight in vehicle.axles)
        return FactorLine(what, f"{axles}; track {vehicle.track}{companions}", vehicle.source)
    if load.axles is not None:
        axles = ", ".join(f"{axle.weight.text} at {axle.position.text}" for axle in load.axles)
        return FactorLine(what, f"{axles}; track {load.track.text if load.track else 'none'}{companions}", _SITE)
    if load.rule is not None:
        rule = RULES[load.rule]
        return FactorLine(what, f"{rule.text}{companions}", rule.source)
    size = load.pressure or load.force
    return FactorLine(what, f"{size.text if size else 'none'}{companions}", _SITE)
