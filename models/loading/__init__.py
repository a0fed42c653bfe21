"""Dead load, crowds, vehicles: what acts on the deck joints of a truss, and how badly."""

from models.loading.live import LIVE_KINDS, LiveKind

__all__ = ["LIVE_KINDS", "LiveKind"]
