"""Pictures of the trusses, kept from entry to entry: labels find their places once, figures change in them."""

from __future__ import annotations

from dataclasses import dataclass

from inspector.desk import Rated
from models.picture import Picture
from models.picture.elevation import elevation, redrawn
from models.words import Figures

_LETTERS_A_PANEL = 6


@dataclass(frozen=True, slots=True)
class Wanted:
    """Which drawing: a truss in a view, for so many letters across the width that it gets."""

    truss: str
    view: str
    across: int


def draw(rated: Rated, wanted: Wanted) -> Picture:
    """The drawing, laid out anew. It may take seconds on a crowded truss."""
    truss, row = rated.bridge.trusses[wanted.truss], rated.rating.trusses[wanted.truss]
    level, figures = rated.rating.upper_level, Figures(rated.bridge.units or "SI")
    # A figure needs some six letters a panel: larger ones would only be tried in vain.
    across = max(wanted.across, _LETTERS_A_PANEL * (len(truss.deck_joints) - 1))
    return elevation(truss, row, wanted.view, level, figures, across, bar_names=False)


def draw_again(rated: Rated, wanted: Wanted, before: Picture) -> Picture | None:
    """The drawing with new figures in the old places; None where it has to be laid out anew. It is quick."""
    truss, row = rated.bridge.trusses[wanted.truss], rated.rating.trusses[wanted.truss]
    level, figures = rated.rating.upper_level, Figures(rated.bridge.units or "SI")
    return redrawn(before, truss, row, wanted.view, level, figures)
