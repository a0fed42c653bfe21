"""Dead load as forces on joints: own weight, deck and edge as components, wearing course apart.

Half of every bar's weight goes to each of its joints, half of every deck panel's load to the deck joint at
either end (common practice, no source). Neither loss nor severing lightens a bar.
"""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from models.bridge import Deck, Footbridge
from models.calculation import Array
from models.loading.floor import floor_of
from models.quantity import GRAVITY, Quantity
from models.statics.geometry import Geometry

ASSUMED_CONNECTION_ALLOWANCE = 1.10
"""On the bars' own weight, for gussets, splices, bolts and paint (common practice, no source)."""


def bar_weights(area: Array, density: Array, length: Array, allowance: float) -> Array:
    """Own weight of each bar with its share of connections, N.

    Parameters
    ----------
    area, density, length : (m,) as built; m^2, kg/m^3, m.
    allowance : factor for gussets, bolts and the like.
    """
    return area * density * length * (GRAVITY * allowance)


def own_weight_on_joints(geometry: Geometry, weights: Array) -> Array:
    """(j,) downward force on each joint, N: half of each bar's weight to either end."""
    halves = np.repeat(weights / 2, 2)
    load: Array = np.zeros(len(geometry.joints))
    np.add.at(load, geometry.ends.ravel(), halves)
    return load


def deck_on_joints(bridge: Footbridge, truss: str, geometry: Geometry) -> tuple[Array, Array]:
    """Downward force of the deck on each joint, N.

    Returns
    -------
    components, wearing : (j,) each; the edge load is in the components.
    """
    deck = bridge.deck
    floor = floor_of(bridge, truss)
    shared = floor.dead_width * floor.mean_share()
    panels = np.diff(geometry.coordinates[geometry.deck, 0])
    tributary = np.zeros(len(geometry.joints))
    np.add.at(tributary, geometry.deck[:-1], panels / 2)
    np.add.at(tributary, geometry.deck[1:], panels / 2)
    wearing = deck.wearing.si if deck.wearing else 0.0
    return tributary * (deck.dead.si * shared + edge_load(deck, truss)), tributary * (wearing * shared)


def edge_load(deck: Deck, truss: str) -> float:
    """Line load along the edge that this truss carries, N/m."""
    if isinstance(deck.edge, Quantity):
        return deck.edge.si
    if isinstance(deck.edge, Mapping) and truss in deck.edge:
        return deck.edge[truss].si
    return 0.0
