"""The table of all bars: section, condition, forces, capacity and rating factors, a row a bar."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from typing import Final

from reportlab.platypus import Flowable

from inspector.report.findings import Place, Told, marks_by_bar
from inspector.report.style import NOTE, heading, part, table, text
from models import words
from models.rating.result import BarRating, Effect, Rating, TrussRating
from models.words import Figures

_LEAST_FORCE: Final = 0.5
"""N."""


def bars(rating: Rating, findings: Sequence[Told], figures: Figures, width: float) -> list[Flowable]:
    """All bars of all trusses."""
    marks = marks_by_bar(findings)
    story = part("All bars")
    for name, truss in rating.trusses.items():
        story += heading(f"Truss {name}", 90)
        story.append(_table(rating, truss, marks, figures, width))
    story.append(text(_NOTES, NOTE))
    return story


_NOTES = (
    "Tension is positive. Dead and live forces are unfactored; live forces are the largest tension and compression "
    "that the governing load gives (of all loads, where none governs). Tension and compression are factored "
    "resistances, condition and system factor not in them. D/C is factored demand over capacity, margin is capacity "
    "less demand, both of what governs at the upper level. May lose: the share of every plate's remaining thickness "
    "that could still go before the rating factor at the upper level falls to 1. Without it: the lowest rating factor "
    "of the truss's other bars, or mechanism. See: numbers of findings. Ends, lengths and roles of the bars stand with "
    "the model."
)


def _table(
    rating: Rating, rated: TrussRating, marks: Mapping[Place, str], figures: Figures,
    width: float,
) -> Flowable:  # fmt: skip
    force, area = figures.unit("force"), figures.unit("area")
    lower = tuple(dict.fromkeys(level for bar in rated.bars for level in bar.lower_levels))
    named = [f" {level}" for level in (*lower, rating.upper_level)] if lower else [""]
    resisted = [f"{what}{level} {force}" for level in named for what in ("tension", "compr.")]
    head = (
        "no.", "bar", "section", "state", "known", f"area {area}", "kept", f"dead DC {force}",
        f"dead DW {force}", f"live max {force}", f"live min {force}", *resisted, "check",
        "load", "D/C", *(f"RF {level}" for level in rating.levels), f"margin {force}", "may lose", "without it",
        "see",
    )  # fmt: skip
    levels = len(rating.levels)
    shares = (
        *((17, 35, 43, 26, 44, 28, 29) if lower else (14, 35, 43, 26, 56, 29, 24)), 28, 29, 28, 28,
        *((40.5,) * len(resisted) if lower else (30, 29)), 62 if lower else 66, 31, 30 if lower else 27,
        *(40.5 if lower else 39,) * levels, 31 if lower else 28, 23, 46 if lower else 43, 30,
    )  # fmt: skip
    align = "r" + "llll" + "rrrrrr" + "r" * len(resisted) + "ll" + "r" * (levels + 4) + "l"
    rows = [
        (number, *_bar(bar, rating, figures, lower), marks.get((bar.truss, bar.bar), ""))
        for number, bar in enumerate(rated.bars, 1)
    ]
    low = [number for number, bar in enumerate(rated.bars) if _below_one(bar, rating.upper_level)]
    return table(head, rows, shares, width, align, bold_rows=low)


def _below_one(bar: BarRating, level: str) -> bool:
    value = bar.rating_factor.get(level)
    return value is not None and value < 1


def _bar(bar: BarRating, rating: Rating, figures: Figures, lower: tuple[str, ...]) -> tuple[str, ...]:
    live = governing_live(bar)
    area = figures.number(bar.area, "area", 4)
    return (
        bar.bar, bar.section, bar.state or "none", bar.known, area,
        words.percent(bar.area / bar.nominal_area if bar.nominal_area else None),
        number(bar.dead_components, figures), number(bar.dead_wearing, figures),
        number(live.maximum if live else None, figures), number(live.minimum if live else None, figures),
        *(number(value, figures) for level in lower for value in bar.lower_levels[level]),
        number(bar.tension, figures), number(bar.compression, figures), bar.check or "none", bar.load or "none",
        "none" if bar.demand_over_capacity is None else words.significant(bar.demand_over_capacity),
        *(_factor(bar, rating, level) for level in rating.levels), number(bar.margin, figures),
        words.percent(bar.loss_allowance), _without(bar.without_it),
    )  # fmt: skip


def _factor(bar: BarRating, rating: Rating, level: str) -> str:
    """In a truss without forces there is no factor; elsewhere none means that no live load acts on the bar."""
    value = bar.rating_factor.get(level)
    if value is None and not rating.trusses[bar.truss].carries:
        return "none"
    return words.factor(value)


def _without(found: float | str | None) -> str:
    if found is None:
        return "none"
    return found if isinstance(found, str) else words.factor(found)


def number(value: float | None, figures: Figures) -> str:
    """A force to three significant digits, in the printed unit that stands in the head.

    What is below half a newton is rounding of the arithmetic, or no matter to a bridge: it prints as 0.
    """
    if value is None:
        return "none"
    return figures.number(value if abs(value) >= _LEAST_FORCE else 0.0, "force")


def governing_live(bar: BarRating) -> Effect | None:
    """The live forces of the load that governs, else the extremes of all loads."""
    if not bar.live:
        return None
    if bar.load is not None and bar.load in bar.live:
        return bar.live[bar.load]
    effects = bar.live.values()
    return Effect(max(effect.maximum for effect in effects), min(effect.minimum for effect in effects))
