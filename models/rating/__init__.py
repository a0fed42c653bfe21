"""Prepare a bridge once, rate it after every reading."""

from models.rating.hand_check import BarCheck, hand_check
from models.rating.prepare import Prepared, prepare
from models.rating.rate import bar_of, outcomes_of, rate, rating_of
from models.rating.result import Provenance, Rating

__all__ = [
    "BarCheck",
    "Prepared",
    "Provenance",
    "Rating",
    "bar_of",
    "hand_check",
    "outcomes_of",
    "prepare",
    "rate",
    "rating_of",
]
