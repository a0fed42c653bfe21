"""The rating summary as one PDF: pages, their head and foot, and the order of the parts.

The same values, program, library versions and fonts give the same bytes: nothing here reads a clock,
the locale or the order of a set.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from io import BytesIO
from typing import Any

from reportlab.pdfbase.pdfmetrics import stringWidth
from reportlab.pdfgen.canvas import Canvas
from reportlab.platypus import BaseDocTemplate, Flowable, Frame, NextPageTemplate, PageBreak, PageTemplate

from inspector.report.bars import bars
from inspector.report.checks import checks
from inspector.report.cover import STATUS, cover
from inspector.report.elevation import elevations
from inspector.report.findings import Told, all_told
from inspector.report.fonts import BOLD, REGULAR, register, visible
from inspector.report.loads import loads, model
from inspector.report.readings import readings
from inspector.report.result_page import result_page
from inspector.report.review import findings_and_assumptions, review
from inspector.report.style import FOOT, HAIR, HEAD, MARGIN, SMALL, page_size, text
from models.bridge import Footbridge
from models.condition import BarCondition
from models.journal import Journal
from models.rating.hand_check import BarCheck
from models.rating.result import Rating
from models.words import CAUTION, Figures

_UPRIGHT, _ACROSS = "upright", "across"


def make_report(
    rating: Rating,
    bridge: Footbridge,
    journal: Journal,
    conditions: Mapping[tuple[str, str], BarCondition],
    hand_checks: Sequence[BarCheck],
) -> bytes:
    """Print a rating.

    Parameters
    ----------
    rating : as computed; nothing is computed again.
    journal : the visits that it used.
    conditions : of each bar by (truss, bar); what was found doubtful there is printed.
    hand_checks : of the governing bars (`lowest_bars`), in the order in which they shall stand.
    """
    register()
    width, height = page_size(bridge.units)
    findings = all_told(rating, conditions)
    story = _story(rating, bridge, journal, findings, hand_checks, (width, height))
    target = BytesIO()
    document = BaseDocTemplate(
        target, pagesize=(width, height), title=visible(f"Rating summary: {bridge.name}"), author="", invariant=1,
        pageTemplates=[_template(_UPRIGHT, width, height), _template(_ACROSS, height, width)],
        lang="en", leftMargin=MARGIN, rightMargin=MARGIN,
    )  # fmt: skip

    def canvas(*args: Any, **more: Any) -> _NumberedPages:
        return _NumberedPages(rating, *args, **{**more, "initialFontName": REGULAR})

    document.build(story, canvasmaker=canvas)
    return target.getvalue()


def _template(name: str, width: float, height: float) -> Any:
    frame = Frame(MARGIN, MARGIN / 2 + FOOT, width - 2 * MARGIN, height - MARGIN - FOOT - HEAD, 0, 0, 0, 0, id=name)
    return PageTemplate(name, [frame], pagesize=(width, height))


def _story(
    rating: Rating, bridge: Footbridge, journal: Journal, findings: Sequence[Told], hand_checks: Sequence[BarCheck],
    page: tuple[float, float],
) -> list[Flowable]:  # fmt: skip
    figures = Figures(bridge.units or "SI")
    upright, across = page[0] - 2 * MARGIN, page[1] - 2 * MARGIN
    parts: list[tuple[str, bool, list[Flowable]]] = [
        (_UPRIGHT, True, cover(rating, bridge, journal, upright)),
        (_UPRIGHT, True, result_page(rating, findings, figures, upright)),
        (_ACROSS, True, elevations(rating, bridge, figures, across, page[0] - MARGIN - FOOT - HEAD)),
        (_ACROSS, True, bars(rating, findings, figures, across)),
        (_UPRIGHT, True, checks(rating, hand_checks, figures, upright)),
        (_ACROSS, True, readings(journal, findings, figures, across)),
        (_UPRIGHT, True, loads(rating, bridge, figures, upright)),
        (_UPRIGHT, False, model(rating, bridge, figures, upright)),
        (_UPRIGHT, False, findings_and_assumptions(rating, bridge, findings, upright)),
        (_UPRIGHT, True, review(upright)),
    ]
    story: list[Flowable] = []
    for way, fresh_page, content in parts:
        if story and fresh_page:
            story += [NextPageTemplate(way), PageBreak()]
        story += content
    return story


class _NumberedPages(Canvas):  # type: ignore[misc]  # reportlab has no type hints
    """Holds every page back until their number is known, then writes its head and foot."""

    def __init__(self, rating: Rating, *args: Any, **more: Any) -> None:
        super().__init__(*args, **more)
        self._rating = rating
        self._pages: list[dict[str, Any]] = []

    def showPage(self) -> None:  # noqa: N802 - reportlab's name
        """Keep the page."""
        self._pages.append(dict(self.__dict__))
        self._startPage()

    def save(self) -> None:
        """Write all pages."""
        for number, page in enumerate(self._pages, 1):
            self.__dict__.update(page)
            self._head()
            self._foot(number, len(self._pages))
            super().showPage()
        super().save()

    def _head(self) -> None:
        width, height = self._pagesize
        top = height - MARGIN / 2 - 8
        self.setFont(BOLD, 8)
        self.drawString(MARGIN, top, STATUS)
        room = width - 2 * MARGIN - stringWidth(STATUS, BOLD, 8) - 12
        self.setFont(REGULAR, 8)
        self.drawRightString(width - MARGIN, top, fitted(visible(self._rating.site), 8, room))
        self.setStrokeColor(HAIR)
        self.line(MARGIN, top - 5, width - MARGIN, top - 5)

    def _foot(self, number: int, total: int) -> None:
        width = self._pagesize[0]
        caution = text(CAUTION, SMALL)
        _, tall = caution.wrap(width - 2 * MARGIN, FOOT)
        base = MARGIN / 2
        caution.drawOn(self, MARGIN, base + 12)
        self.setFont(REGULAR, 6.5)
        made = self._rating.provenance
        self.drawString(MARGIN, base, visible(f"Inputs {made.inputs_sha256} · {made.program}"))
        self.setFont(BOLD, 8)
        self.drawRightString(width - MARGIN, base, f"Page {number} of {total}")
        self.setStrokeColor(HAIR)
        self.line(MARGIN, base + 14 + tall, width - MARGIN, base + 14 + tall)


def fitted(words: str, size: float, room: float) -> str:
    """A line of text cut to a width, points, the cut shown."""
    line = " ".join(words.split())
    if stringWidth(line, REGULAR, size) <= room:
        return line
    while line and stringWidth(line + "…", REGULAR, size) > room:
        line = line[:-1]
    return line + "…"
