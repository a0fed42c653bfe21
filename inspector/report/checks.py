"""The hand checks: each line of a bar's calculation with its formula, numbers, value and clause."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Final

from reportlab.platypus import Flowable, Paragraph

from inspector.report.fonts import markup
from inspector.report.result_page import stations
from inspector.report.style import BODY, CELL, STRONG, heading, part, table, text
from models import formula
from models.calculation import Step
from models.rating.hand_check import BarCheck
from models.rating.result import BarRating, Rating
from models.words import Figures

_HOW: Final = (
    "Each line can be worked again from the numbers printed in it: numbers carry their units and five significant "
    "digits. They come from the same functions that computed the rating."
)


def checks(rating: Rating, hand_checks: Sequence[BarCheck], figures: Figures, width: float) -> list[Flowable]:
    """One table a bar, in the order in which they are handed in."""
    story = [*part("Hand checks of the governing bars"), text(_HOW, BODY)]
    if not hand_checks:
        return [*story, text("No bar has a rating factor that could be checked by hand.", BODY)]
    bars = {(bar.truss, bar.bar): bar for bar in rating.bars}
    for check in hand_checks:
        place = (check.truss, check.bar)
        story += heading(_title(place, bars.get(place)), 110)
        rows = [(step.title, _line(step, figures), step.source) for step in check.steps]
        story.append(table(("what", "formula = numbers = value", "source"), rows, (4.2, 10.5, 4.6), width))
        if check.remark:
            story.append(text(check.remark, STRONG))
    return story


def _title(place: tuple[str, str], bar: BarRating | None) -> str:
    said = f"Truss {place[0]}, bar {place[1]}"
    if bar is None or bar.check is None:
        return said
    load = f", {bar.load}" if bar.load else ""
    return f"{said}: {bar.check}{load}, stations {stations(bar)}"


def _line(step: Step, figures: Figures) -> Paragraph:
    result = markup(formula.result(step, figures))
    if not formula.is_computed(step):
        return Paragraph(f"<b>{markup(step.symbol)}</b> = <b>{result}</b>", CELL)
    symbols, numbers = formula.in_symbols(step), formula.in_numbers(step, figures)
    rows = [f"<b>{markup(step.symbol)}</b> = {markup(symbols)}"]
    if numbers not in (symbols, formula.result(step, figures)):
        rows.append(f"&nbsp;&nbsp;= {markup(numbers)}")
    rows[-1] += f" = <b>{result}</b>"
    rows += [f"&nbsp;&nbsp;as {markup(reason)}" for reason in formula.reasons(step, figures)]
    return Paragraph("<br/>".join(rows), CELL)
