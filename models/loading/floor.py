"""The floor across the bridge: how much of what stands on it each truss takes.

The floor carries its load to the deck joints as simple spans, along the bridge and across it. Across,
the line of influence of a truss is straight: 1 over that truss, 0 over the other one, rising beyond the
near truss and negative beyond the far one (lever rule).
"""

from __future__ import annotations

from dataclasses import dataclass

from models.bridge import Footbridge


@dataclass(frozen=True, slots=True)
class Floor:
    """The deck as one truss sees it.

    Parameters
    ----------
    width : clear width that people and vehicles use, m.
    dead_width : width that has weight, m.
    spacing : distance between the trusses, m; None where there is one truss, which takes all.
    near : how far the deck's edge lies outside this truss, m; negative where it lies inside.
    """

    width: float
    dead_width: float
    spacing: float | None
    near: float

    @property
    def far(self) -> float:
        """How far the deck's other edge lies outside the other truss, m."""
        return self.width - self.near - self._spacing

    @property
    def _spacing(self) -> float:
        return self.spacing or 0.0

    def strips(self) -> tuple[float, float]:
        """Widths that a crowd counts with: where its load hurts, and where it relieves.

        Returns
        -------
        The integrals over the deck of the positive and of the negative part of the lever (s - x)/s,
        m; the second is zero unless the deck reaches beyond the other truss.
        """
        s = self.spacing
        if s is None:
            return self.width, 0.0
        first, last = -self.near, self.width - self.near
        inner = min(last, s)
        hurts = ((s - first) ** 2 - (s - inner) ** 2) / (2 * s) if first < s else 0.0
        outer = max(first, s)
        relieves = ((last - s) ** 2 - (outer - s) ** 2) / (2 * s) if last > s else 0.0
        return hurts, relieves

    def near_width(self) -> float:
        """Width of the deck on whose people this truss leans, up to the other truss, m: all where there is none."""
        s = self.spacing
        return self.width if s is None else min(max(s + self.near, 0.0), self.width)

    def mean_share(self) -> float:
        """The part of an even load over the whole width that this truss takes (lever rule)."""
        if self.spacing is None:
            return 1.0
        middle = self.width / 2 - self.near
        return (self.spacing - middle) / self.spacing

    def wheel_shares(self, track: float) -> tuple[float, float]:
        """The part of an axle that this truss takes with the outer wheel at either kerb.

        Parameters
        ----------
        track : distance between the two wheel lines, m.

        Returns
        -------
        With the outer wheel at the near kerb, and at the far one; the latter may be negative.
        """
        s = self.spacing
        if s is None:
            return 1.0, 1.0
        return (2 * (s + self.near) - track) / (2 * s), (track - 2 * self.far) / (2 * s)

    def point_shares(self) -> tuple[float, float]:
        """The part of a single force that this truss takes at the near kerb and at the far one."""
        return self.wheel_shares(0.0)


def floor_of(bridge: Footbridge, truss: str) -> Floor:
    """The floor as the named truss sees it."""
    deck = bridge.deck
    width = deck.width.si
    dead_width = (deck.dead_width or deck.width).si
    if len(bridge.trusses) == 1:
        return Floor(width, dead_width, None, 0.0)
    spacing = (deck.truss_spacing or deck.width).si
    offset = sum((size.si if name == truss else -size.si) for name, size in (deck.offset or {}).items())
    return Floor(width, dead_width, spacing, (width - spacing) / 2 + offset)
