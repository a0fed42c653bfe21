"""Assumptions, findings, what was changed by hand, what should be done, and the reviewer's block."""

from __future__ import annotations

import json
from collections.abc import Sequence
from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import Flowable, KeepTogether, Table

from inspector.report.findings import Told
from inspector.report.fonts import REGULAR
from inspector.report.style import BODY, CELL, INK, SMALL, gap, heading, numbered, part, table, text
from models.bridge import Footbridge, Override, Recommendation
from models.rating.result import Rating


def findings_and_assumptions(
    rating: Rating, bridge: Footbridge, findings: Sequence[Told], width: float
) -> list[Flowable]:
    """Everything that a reader has to know beside the figures."""
    story = part("Findings and assumptions")
    story += heading("Findings")
    rows = [(one.mark, one.level, one.where, one.text) for one in findings]
    story.append(table(("no.", "level", "where", "what"), rows, (1, 2, 6, 10), width) if rows else text("None.", BODY))
    story += heading("Assumptions")
    story += numbered(rating.assumptions, "A") or [text("None.", BODY)]
    if bridge.overrides:
        story += heading("Values changed by hand")
        story.append(_overrides(bridge.overrides, width))
    if bridge.recommendations:
        story += heading("Recommendations")
        story.append(_recommendations(bridge.recommendations, width))
    return story


def _as_text(value: object) -> str:
    if value is None:
        return ""
    return value if isinstance(value, str) else json.dumps(value, ensure_ascii=False, sort_keys=True)


def _overrides(overrides: Sequence[Override], width: float) -> Any:
    head = ("truss", "bar", "what", "was", "value", "who", "why", "date")
    rows = [
        (one.truss or "", one.bar or "", one.what or "", _as_text(one.was), _as_text(one.value), one.who or "",
         one.why or "", one.date or "")
        for one in overrides
    ]  # fmt: skip
    return table(head, rows, (3, 3, 3, 3, 3, 3, 5, 3), width)


def _recommendations(recommendations: Sequence[Recommendation], width: float) -> Any:
    head = ("id", "priority", "what", "raised", "told", "done", "proof")
    rows = [
        (one.id or "", one.priority or "", one.text or "", one.raised or "", one.told or "", one.done or "not recorded",
         one.proof or "")
        for one in recommendations
    ]  # fmt: skip
    return table(head, rows, (2, 3.4, 8, 2.8, 3, 3, 3), width)


_LINES: Final = (
    ("Bars checked by hand, and their rating factors", 16),
    ("Disagreements and remarks", 40),
    ("Accepted / returned, with conditions", 16),
    ("Name", 9),
    ("Licence number", 9),
    ("Signature", 14),
    ("Date", 9),
)


def review(width: float) -> list[Flowable]:
    """The reviewer's block, blank."""
    body = [[text(name, CELL), ""] for name, _ in _LINES]
    style = [
        ("FONT", (0, 0), (-1, -1), REGULAR, 8),
        ("VALIGN", (0, 0), (-1, -1), "TOP"),
        ("BOX", (0, 0), (-1, -1), 1, INK),
        ("INNERGRID", (0, 0), (-1, -1), 0.4, INK),
    ]
    heights = [height * mm for _, height in _LINES]
    block = Table(body, colWidths=[width * 0.28, width * 0.72], rowHeights=heights, style=style, hAlign="LEFT")
    seal = Table([[text("Space for seal", SMALL)]], colWidths=[60 * mm], rowHeights=[50 * mm],
                 style=[("FONT", (0, 0), (-1, -1), REGULAR, 8), ("BOX", (0, 0), (-1, -1), 0.6, INK),
                        ("VALIGN", (0, 0), (-1, -1), "TOP")], hAlign="RIGHT")  # fmt: skip
    words = "This block is for the reviewing licensed engineer. The program leaves it blank."
    return [KeepTogether([*part("Review by the licensed engineer"), text(words, BODY), block, gap(8), seal])]
