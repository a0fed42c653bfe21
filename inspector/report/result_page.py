"""The result on one page: the lowest rating factor, what stands behind it, and what is not rated."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Final

from reportlab.platypus import Flowable

from inspector.report.findings import Told
from inspector.report.style import BODY, FIGURE, STRONG, gap, heading, part, table, text
from models import words
from models.picture.views import GONE
from models.rating.result import BarRating, Governing, Rating
from models.words import Figures

GOVERNING: Final = 5
_MOST_NAMED: Final = 40
_MOST_URGENT: Final = 8


def lowest_bars(rating: Rating, number: int = GOVERNING) -> tuple[BarRating, ...]:
    """The bars that still carry with the lowest rating factors at the upper level, lowest first."""
    carrying = [
        (value, bar.truss, bar.bar, bar)
        for bar in rating.bars
        if bar.check not in GONE and (value := bar.rating_factor.get(rating.upper_level)) is not None
    ]
    return tuple(row[3] for row in sorted(carrying, key=lambda row: row[:3])[:number])


def result_page(rating: Rating, findings: Sequence[Told], figures: Figures, width: float) -> list[Flowable]:
    """One page, read by somebody who may read no other."""
    story = part("Result")
    urgent = [finding for finding in findings if finding.level == "act now"]
    if urgent:
        story += heading("Act now")
        rows = [(finding.where, finding.text) for finding in urgent[:_MOST_URGENT]]
        story.append(table(("where", "what"), rows, (1, 4), width, bold_rows=range(len(rows))))
        if len(urgent) > _MOST_URGENT:
            story.append(text(f"and {len(urgent) - _MOST_URGENT} more, all in the list of findings", BODY))
    story += _headline(rating)
    story += _lowest(rating, figures, width)
    story += _other_answers(rating, width)
    story += heading("Summary")
    story.append(table(("part", "lowest rating factor, " + rating.upper_level + " level", "remark"),
                       [*_trusses(rating), *_not_rated(rating)], (3, 3, 6), width))  # fmt: skip
    story += heading("Bars not seen in the last visit")
    story.append(text(_not_seen(rating), BODY))
    return story


def _headline(rating: Rating) -> list[Flowable]:
    found = rating.structure
    value = found.rating_factor.get(rating.upper_level)
    number = "none" if value is None else words.factor(value)
    bar = next((row for row in rating.bars if (row.truss, row.bar) == (found.truss, found.bar)), None)
    others = [
        f"{level}: {_rf(found.rating_factor.get(level))}" for level in rating.levels if level != rating.upper_level
    ]
    story: list[Flowable] = [
        gap(10),
        text(f"Lowest rating factor, {rating.upper_level} level", STRONG),
        text(number, FIGURE),
        gap(8),
    ]
    if bar is None:
        story.append(text(_why_no_bar(rating), STRONG))
    else:
        said = (
            f"Truss {bar.truss}, bar {bar.bar} ({bar.role}); check: {found.check}; load: {found.load or 'dead load'}; "
            f"how the bar is known: {bar.known}."
        )
        story.append(text(said, STRONG))
    if others:
        story.append(text("At the other level, " + "; ".join(others) + ".", BODY))
    return story


def _why_no_bar(rating: Rating) -> str:
    still = [(name, truss.verdict) for name, truss in rating.trusses.items() if not truss.carries]
    moving = [f"truss {name} is {with_article(verdict)}" for name, verdict in still]
    if not moving:
        return "No bar has a rating factor."
    return "No bar gives this figure: " + "; ".join(moving) + " and has no forces."


def with_article(verdict: str) -> str:
    """A verdict as it stands in a sentence."""
    return "a mechanism" if verdict == "mechanism" else verdict


def _rf(value: float | None) -> str:
    return "none" if value is None else words.factor(value)


def _lowest(rating: Rating, figures: Figures, width: float) -> list[Flowable]:
    bars = lowest_bars(rating)
    if not bars:
        return [*heading("Lowest bars"), text("No bar has a rating factor.", BODY)]
    unit = figures.unit("force")
    head = ("truss", "bar", "check", "load", "stations", *rating.levels, "demand / capacity", f"margin {unit}", "known")
    rows = [
        (
            bar.truss, bar.bar, bar.check or "", bar.load or "", stations(bar),
            *(_rf(bar.rating_factor.get(level)) for level in rating.levels),
            "none" if bar.demand_over_capacity is None else words.significant(bar.demand_over_capacity),
            "none" if bar.margin is None else figures.number(bar.margin, "force"), bar.known,
        )
        for bar in bars
    ]  # fmt: skip
    shares = (4, 4, 5, 3.4, 3.4, *(3.4 for _ in rating.levels), 3.4, 3, 4)
    align = "lllll" + "r" * (len(rating.levels) + 2) + "l"
    return [*heading("Lowest bars, all trusses"), table(head, rows, shares, width, align, bold_rows=(0,))]


def stations(bar: BarRating) -> str:
    """The governing piece of a bar, as fractions of its length from its start."""
    return f"{bar.where[0]:.2f} to {bar.where[1]:.2f}"


def _other_answers(rating: Rating, width: float) -> list[Flowable]:
    asked: list[tuple[str, Governing | None]] = [
        ("if cracked bars hold", rating.if_cracked_bars_hold),
        ("if slack bars pull", rating.if_slack_bars_pull),
    ]
    rows = [
        (name, _rf(found.rating_factor.get(rating.upper_level)), found.truss or "", found.bar or "", found.check or "",
         found.load or "")
        for name, found in asked
        if found is not None
    ]  # fmt: skip
    if not rows:
        return []
    head = ("the other answer", "lowest rating factor", "truss", "bar", "check", "load")
    return [*heading("The other way round"), table(head, rows, (4, 3, 3, 3, 4, 3), width)]


def _trusses(rating: Rating) -> list[tuple[str, str, str]]:
    rows = []
    for name, truss in rating.trusses.items():
        values = [
            value
            for bar in truss.bars
            if bar.check not in GONE and (value := bar.rating_factor.get(rating.upper_level)) is not None
        ]
        lowest = _rf(min(values)) if values else "none"
        remark = f"{truss.verdict}; {words.count(truss.bars_standing, 'bar')} standing"
        rows.append((f"truss {name}", lowest, remark))
    return rows


def _not_rated(rating: Rating) -> list[tuple[str, str, str]]:
    return [(what, "not rated", "") for what in rating.not_rated]


def _not_seen(rating: Rating) -> str:
    lines = []
    for name, truss in rating.trusses.items():
        unseen = [bar.bar for bar in truss.bars if bar.known == "not seen"]
        if len(unseen) == len(truss.bars):
            lines.append(f"Truss {name}: all {words.count(len(unseen), 'bar')}.")
        elif unseen:
            lines.append(f"Truss {name}: {words.count(len(unseen), 'bar')}: {words.listed(unseen, _MOST_NAMED)}.")
    return "\n".join(lines) or "None."
