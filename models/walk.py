"""The order in which an inspector walks along the bars, and which of them have something on record."""

from __future__ import annotations

from bisect import bisect_right
from collections.abc import Mapping
from typing import Final

from models.bridge import Bar, Footbridge, Truss
from models.condition.answers import speaks_of_bar
from models.journal_order import BarRecord

Place = tuple[str, str]
"""Truss and bar."""

_ROLES: Final = ("bottom chord", "end post", "vertical", "diagonal", "counter", "top chord")
"""Within a panel from the deck upwards, where a hand or a ladder comes first; other roles follow."""

_EDGE: Final = 1e-6
"""A bar whose middle lies so close to a deck joint, m, belongs to the panel that begins there."""


def walking_order(bridge: Footbridge) -> tuple[Place, ...]:
    """All bars: truss by truss, in each panel by panel from its first deck joint."""
    return tuple((name, bar.id) for name, truss in bridge.trusses.items() for bar in _along(truss))


def _along(truss: Truss) -> list[Bar]:
    starts = [truss.joints[name][0].si for name in truss.deck_joints]

    def key(bar: Bar) -> tuple[int, int, float, str]:
        middle = (truss.joints[bar.start][0].si + truss.joints[bar.end][0].si) / 2
        rank = _ROLES.index(bar.role) if bar.role in _ROLES else len(_ROLES)
        return bisect_right(starts, middle + _EDGE), rank, middle, bar.id

    return sorted(truss.bars, key=key)


def done_in(records: Mapping[Place, BarRecord], visit: int) -> frozenset[Place]:
    """The bars of which a visit says something: looked at, not seen, or found.

    Parameters
    ----------
    records : what stands about each bar; what was taken back is not in there.
    visit : its index among the visits in date order.
    """
    return frozenset(
        place
        for place, record in records.items()
        if any(
            placed.visit == visit and (placed.entry.seen is not None or speaks_of_bar(placed.entry))
            for placed in record.entries
        )
    )
