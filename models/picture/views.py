"""What a drawing of a truss can show of its bars: a view is one row of this registry.

Each view gives every bar a short label and one of a few bands. A band is told by its line pattern and
by the label; its shade only repeats it. The limits of the bands are for reading the drawing, they
are no criterion of any standard.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from types import MappingProxyType
from typing import Final

from models import words
from models.picture.drawing import Pattern, Shade, Weight
from models.rating.result import BarRating


@dataclass(frozen=True, slots=True)
class Band:
    """How a group of bars is drawn: the bar's outline and fill, and the pattern along its axis."""

    text: str
    shade: Shade
    weight: Weight
    pattern: Pattern


@dataclass(frozen=True, slots=True)
class View:
    """One way to look at the bars.

    Parameters
    ----------
    title : what the labels are.
    bands : in the order of the legend.
    label, band : of a bar, at a level of the basis.
    """

    name: str
    title: str
    bands: tuple[Band, ...]
    label: Callable[[BarRating, str], str]
    band: Callable[[BarRating, str], Band]


GONE: Final = ("severed", "cracked")
"""Checks of a bar that is given no credit; it is drawn as a broken line in every view."""

_BELOW = Band("below 1", "vermillion", "heavy", "solid")
_NEAR = Band("1 to below 1.5", "orange", "medium", "dashed")
_ABOVE = Band("1.5 and more", "sky blue", "thin", "blank")
_NONE = Band("no rating factor", "paper", "thin", "dotted")


def _rating_label(bar: BarRating, level: str) -> str:
    if bar.check in GONE:
        return str(bar.check)
    value = bar.rating_factor.get(level)
    return "none" if value is None else words.factor(value)


def _rating_band(bar: BarRating, level: str) -> Band:
    value = bar.rating_factor.get(level)
    if value is None:
        return _NONE
    if value < 1:
        return _BELOW
    return _NEAR if value < 1.5 else _ABOVE


_STATES: Final[Mapping[str | None, Band]] = MappingProxyType(
    {
        "severe": Band("severe", "vermillion", "heavy", "solid"),
        "poor": Band("poor", "orange", "medium", "dashed"),
        "fair": Band("fair", "yellow", "medium", "dash dot"),
        "good": Band("good", "sky blue", "thin", "blank"),
        None: Band("no state on record", "paper", "thin", "dotted"),
    }
)


def _condition_label(bar: BarRating, _level: str) -> str:
    if bar.check == "severed":
        return "severed"
    kept = words.percent(bar.area / bar.nominal_area if bar.nominal_area else None)
    return f"{bar.state or 'no state'} {kept}"


def _condition_band(bar: BarRating, _level: str) -> Band:
    return _STATES.get(bar.state, _STATES[None])


VIEWS: Final[Mapping[str, View]] = MappingProxyType(
    {
        "rating factor": View(
            "rating factor", "rating factor", (_BELOW, _NEAR, _ABOVE, _NONE), _rating_label, _rating_band
        ),
        "condition": View(
            "condition",
            "condition state and area kept",
            tuple(_STATES.values()),
            _condition_label,
            _condition_band,
        ),
    }
)
"""By name. A further view (force, loss allowance) is one more row."""
