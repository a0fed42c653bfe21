"""A finding: something that a reader of the rating has to know."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal, get_args

Level = Literal["act now", "doubtful", "assumed", "left out", "not used", "note"]
LEVELS: tuple[Level, ...] = get_args(Level)
"""In the order in which people should read them."""


@dataclass(frozen=True, slots=True)
class Finding:
    """One sentence with its weight and the place that it is about.

    Parameters
    ----------
    level : ``left out`` means that a figure leaves something out; the text says what.
    text : a whole sentence in plain words, in the bridge's display units.
    truss, bar : the place; both None where the finding is about the whole bridge.
    """

    level: Level
    text: str
    truss: str | None = None
    bar: str | None = None
