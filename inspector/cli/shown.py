"""What the commands print: the caution, the result, the table of bars, a hand check. At most 100 columns."""

from __future__ import annotations

import sys
from collections.abc import Sequence

from rich.box import SIMPLE_HEAD
from rich.console import Console
from rich.table import Table
from rich.text import Text

from inspector.desk import Rated
from models import formula, words
from models.finding import Finding
from models.rating import BarCheck
from models.rating.result import BarRating, Governing, Rating, TrussRating

WIDTH = 100


def console(*, error: bool = False) -> Console:
    """Where a command prints; foreign text is never read as markup."""
    stream = sys.stderr if error else sys.stdout
    wide = Console(file=stream)
    width = min(WIDTH, wide.width) if stream.isatty() else WIDTH
    return Console(file=stream, width=width, markup=False, highlight=False, emoji=False, soft_wrap=False)


def rating_of(out: Console, rated: Rated) -> None:
    """The whole result: caution, what to act on, the structure, trusses, all bars, assumptions."""
    rating = rated.rating
    out.print(Text(words.CAUTION, style="bold"))
    out.print()
    _findings(out, [finding for finding in rating.findings if finding.level == "act now"])
    out.print(Text(f"{rating.site}, basis {rating.basis}", style="bold"))
    out.print(structure_line(rating, rating.structure))
    for name, other in (
        ("If cracked bars hold", rating.if_cracked_bars_hold),
        ("If slack bars pull", rating.if_slack_bars_pull),
    ):
        if other is not None:
            out.print(f"{name}: {structure_line(rating, other)}")
    for truss in rating.trusses.values():
        counted = f"{words.count(truss.bars_standing, 'bar')}, {words.count(truss.joints, 'joint')}"
        out.print()
        out.print(Text(f"Truss {truss.name}: {truss.verdict}; {counted}, degree {truss.degree}", style="bold"))
        out.print(bars_table(rating, truss))
    _findings(out, [finding for finding in rating.findings if finding.level != "act now" and finding.bar is None])
    _counted_findings(out, rating)
    out.print(Text("Assumed", style="bold"))
    for number, sentence in enumerate(rating.assumptions, 1):
        out.print(f"{number:3}. {sentence}")
    out.print(f"Not rated: {', '.join(rating.not_rated)}.")
    out.print(f"Inputs {rating.provenance.inputs_sha256[:16]}, {rating.provenance.program}.")


def structure_line(rating: Rating, found: Governing) -> str:
    """The structure's rating factors and what governs, in a sentence."""
    factors = ", ".join(f"{level} {words.factor(found.rating_factor[level])}" for level in rating.levels)
    if found.bar is None:
        lowest = found.rating_factor[rating.upper_level]
        reason = "a truss does not stand" if lowest == 0 else "no live load acts on any bar"
        return f"Lowest rating factor: {factors} ({reason})."
    return (
        f"Lowest rating factor: {factors}; {found.truss}/{found.bar}, {found.check}, {found.load or 'dead load alone'}."
    )


def bars_table(rating: Rating, truss: TrussRating) -> Table:
    """Every bar of a truss, a line each."""
    table = Table(box=SIMPLE_HEAD, padding=(0, 1, 0, 0), pad_edge=False)
    for head in ("bar", "known", "state"):
        table.add_column(head, overflow="fold")
    for level in rating.levels:
        table.add_column(level, justify="right")
    for head in ("check", "load"):
        table.add_column(head, overflow="fold")
    table.add_column("may\nlose", justify="right")
    table.add_column("without\nit", justify="right")
    for bar in truss.bars:
        table.add_row(*(Text(cell) for cell in _cells(rating, bar)), style="bold" if _is_low(rating, bar) else None)
    return table


def _cells(rating: Rating, bar: BarRating) -> list[str]:
    without = words.factor(bar.without_it) if isinstance(bar.without_it, float) else bar.without_it or "-"
    factors = [_factor(bar, bar.rating_factor[level]) for level in rating.levels]
    may_lose = _may_lose(rating, bar)
    known = bar.known + (" *" if any(finding.level == "left out" for finding in bar.findings) else "")
    return [
        bar.bar,
        known,
        bar.state or "-",
        *factors,
        bar.check or "-",
        bar.load or "-",
        may_lose,
        without,
    ]


def _may_lose(rating: Rating, bar: BarRating) -> str:
    if bar.loss_allowance is None:
        return "-" if bar.rating_factor[rating.upper_level] is None else "> 95 %"
    return words.percent(bar.loss_allowance)


def _factor(bar: BarRating, value: float | None) -> str:
    if value is None:
        return "no forces" if bar.dead_components is None else "no live"
    return words.factor(value)


def _is_low(rating: Rating, bar: BarRating) -> bool:
    lowest = bar.rating_factor[rating.upper_level]
    return lowest is not None and lowest < 1


def _findings(out: Console, findings: Sequence[Finding]) -> None:
    for finding in findings:
        place = "/".join(part for part in (finding.truss, finding.bar) if part)
        urgent = finding.level == "act now"
        level = finding.level.upper() if urgent else finding.level
        line = f"{level}: {place}: {finding.text}" if place else f"{level}: {finding.text}"
        out.print(Text(line, style="bold" if urgent else ""))
    if any(finding.level == "act now" for finding in findings):
        for step in words.ACT_NOW_STEPS:
            out.print(f"  - {step}")
        out.print()


def _counted_findings(out: Console, rating: Rating) -> None:
    """Findings at bars: the doubtful ones whole, of the others how many, as the report has them all."""
    at_bars = [finding for finding in rating.findings if finding.bar is not None and finding.level != "act now"]
    _findings(out, [finding for finding in at_bars if finding.level == "doubtful"])
    out_of = {level: sum(finding.level == level for finding in at_bars) for level in ("left out", "assumed", "note")}
    said = ", ".join(f"{number} {level}" for level, number in out_of.items() if number)
    if said:
        out.print(
            f"Findings at bars: {said}. `inspector explain` and the report give each in words; * marks a bar "
            "whose figures leave something out."
        )


def hand_check_of(out: Console, rated: Rated, check: BarCheck) -> None:
    """One bar's calculation, a line a step."""
    figures = words.Figures(rated.bridge.units or "SI")
    out.print(Text(f"Hand check of {check.truss}/{check.bar}, basis {rated.rating.basis}", style="bold"))
    out.print(Text(words.CAUTION))
    for step in check.steps:
        out.print()
        out.print(Text(f"{step.title}" + (f"  [{step.source}]" if step.source else ""), style="dim"))
        for reason in formula.reasons(step, figures):
            out.print(Text(f"  {reason}"))
        if formula.is_computed(step):
            out.print(Text(f"  {step.symbol} = {formula.in_symbols(step)}"))
            if formula.in_numbers(step, figures) != formula.result(step, figures):
                out.print(Text(f"  {' ' * len(step.symbol)} = {formula.in_numbers(step, figures)}"))
            out.print(Text(f"  {' ' * len(step.symbol)} = {formula.result(step, figures)}", style="bold"))
        else:
            out.print(Text(f"  {step.symbol} = {formula.result(step, figures)}"))
    if check.remark:
        out.print()
        out.print(Text(check.remark, style="bold"))
