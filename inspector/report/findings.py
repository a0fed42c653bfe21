"""The findings as a reader wants them: the most urgent first, each sentence once with all its places."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from models.condition import BarCondition
from models.finding import LEVELS, Finding, Level
from models.rating.result import Rating

Place = tuple[str | None, str | None]
"""Truss and bar; None where a finding is about the whole truss or bridge."""


@dataclass(frozen=True, slots=True)
class Told:
    """One sentence of the report with the number that it keeps, and the places that it is about."""

    number: int
    level: Level
    text: str
    places: tuple[Place, ...]

    @property
    def mark(self) -> str:
        """The number as it stands in tables."""
        return f"F{self.number}"

    @property
    def where(self) -> str:
        """The places in words, truss by truss."""
        by_truss: dict[str | None, list[str]] = {}
        for truss, bar in self.places:
            by_truss.setdefault(truss, []).extend([bar] if bar else [])
        said = [f"truss {truss}" + _bars(bars) if truss else "the bridge" for truss, bars in by_truss.items()]
        return "; ".join(said)


def _bars(bars: Sequence[str]) -> str:
    if not bars:
        return ""
    return f", bar {bars[0]}" if len(bars) == 1 else ", bars " + ", ".join(bars)


def all_told(rating: Rating, conditions: Mapping[tuple[str, str], BarCondition]) -> tuple[Told, ...]:
    """Every finding of a rating and of what was recorded, equal sentences as one."""
    at_bars = [finding for bar in rating.bars for finding in bar.findings]
    recorded = [finding for condition in conditions.values() for finding in condition.findings]
    groups: dict[tuple[Level, str], dict[Place, None]] = {}
    for finding in sorted([*rating.findings, *at_bars, *recorded], key=_urgency):
        groups.setdefault((finding.level, finding.text), {})[finding.truss, finding.bar] = None
    return tuple(
        Told(number, level, text, tuple(places)) for number, ((level, text), places) in enumerate(groups.items(), 1)
    )


def _urgency(finding: Finding) -> int:
    return LEVELS.index(finding.level)


def marks_by_bar(findings: Sequence[Told], level: Level | None = None) -> Mapping[Place, str]:
    """The numbers of the findings at each bar, of one level or of all."""
    found: dict[Place, list[str]] = {}
    for told in findings:
        if level is None or told.level == level:
            for place in told.places:
                found.setdefault(place, []).append(told.mark)
    return {place: ", ".join(numbers) for place, numbers in found.items()}
