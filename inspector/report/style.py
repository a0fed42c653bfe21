"""Sizes, paragraphs and tables of the report: the one place where they are decided."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final, Literal

from reportlab.lib import colors
from reportlab.lib.pagesizes import A4, letter
from reportlab.lib.styles import ParagraphStyle
from reportlab.lib.units import mm
from reportlab.platypus import CondPageBreak, Flowable, Paragraph, Spacer, Table

from inspector.report.fonts import BOLD, REGULAR, markup

MARGIN: Final = 15 * mm
HEAD: Final = 12 * mm
FOOT: Final = 19 * mm
INK: Final = colors.black
HAIR: Final = colors.Color(0.55, 0.55, 0.55)
SHADED: Final = colors.Color(0.9, 0.9, 0.9)

Align = Literal["l", "r"]

_LONG_TITLE: Final = 60


def page_size(units: str | None) -> tuple[float, float]:
    """A4, or letter where the bridge is shown in US units; upright, in points."""
    width, height = letter if units == "US" else A4
    return float(width), float(height)


def _style(name: str, size: float, *, bold: bool = False, before: float = 0, after: float = 0, **more: Any) -> Any:
    face = BOLD if bold else REGULAR
    return ParagraphStyle(
        name, fontName=face, fontSize=size, leading=size * 1.25, spaceBefore=before, spaceAfter=after,
        bulletFontName=REGULAR, splitLongWords=1, textColor=INK, **more,
    )  # fmt: skip


TITLE: Final = _style("title", 20, bold=True, after=6)
PART: Final = _style("part", 13, bold=True, before=10, after=5)
HEADING: Final = _style("heading", 9.5, bold=True, before=8, after=3)
BODY: Final = _style("body", 8.5, after=3)
SMALL: Final = _style("small", 7)
NOTE: Final = _style("note", 7, before=4, after=2)
STRONG: Final = _style("strong", 8.5, bold=True, after=3)
STAMP: Final = _style("stamp", 11, bold=True, after=4)
FIGURE: Final = _style("figure", 26, bold=True)
CELL: Final = _style("cell", 6.3)
CELL_HEAD: Final = _style("cell head", 5.9, bold=True)
CELL_HEAD_RIGHT: Final = _style("cell head right", 5.9, bold=True, alignment=2)
CELL_BOLD: Final = _style("cell bold", 6.3, bold=True)
CELL_RIGHT: Final = _style("cell right", 6.3, alignment=2)
CELL_RIGHT_BOLD: Final = _style("cell right bold", 6.3, bold=True, alignment=2)


def text(words: object, style: Any = BODY) -> Any:
    """A paragraph of foreign text: nothing in it is read as markup."""
    return Paragraph(markup(str(words)), style)


def title(words: str) -> Any:
    """A name in large letters, smaller where it is long."""
    return text(words, TITLE if len(words) <= _LONG_TITLE else PART)


def cell(words: object, align: Align = "l", *, bold: bool = False) -> Any:
    """A table cell that wraps, and breaks a word that is longer than its column."""
    styles = {(False, False): CELL, (True, False): CELL_BOLD, (False, True): CELL_RIGHT, (True, True): CELL_RIGHT_BOLD}
    return Paragraph(markup(str(words)), styles[bold, align == "r"])


def part(title: str, room: float = 140) -> list[Flowable]:
    """The heading of a part of the report, with some of what follows on its page."""
    return [CondPageBreak(room), text(title, PART)]


def heading(title: str, room: float = 60) -> list[Flowable]:
    """A heading with at least ``room`` points of what follows on its page."""
    return [CondPageBreak(room + 20), text(title, HEADING)]


def caption(words: str) -> list[Flowable]:
    """A small heading of a table, never alone at a page's end."""
    return [CondPageBreak(60), text(words, NOTE)]


def gap(height: float) -> Any:
    """Empty height, points."""
    return Spacer(1, height)


def table(
    head: Sequence[str], rows: Sequence[Sequence[object]], shares: Sequence[float], width: float,
    align: str = "", bold_rows: Sequence[int] = (),
) -> Any:  # fmt: skip
    """A table whose head stands again on every page.

    Parameters
    ----------
    shares : of the width, one for each column.
    align : one letter for each column, ``l`` or ``r``; left where it is short.
    bold_rows : rows to print bold.
    """
    sides: list[Align] = [("r" if k < len(align) and align[k] == "r" else "l") for k in range(len(head))]
    total = sum(shares)
    widths = [width * share / total for share in shares]
    body = [
        [
            value if isinstance(value, Flowable) else cell(value, side, bold=number in bold_rows)
            for value, side in zip(row, sides, strict=True)
        ]
        for number, row in enumerate(rows)
    ]
    top = [text(name, CELL_HEAD_RIGHT if side == "r" else CELL_HEAD) for name, side in zip(head, sides, strict=True)]
    commands: list[tuple[Any, ...]] = [
        ("FONT", (0, 0), (-1, -1), REGULAR, 6.3),
        ("VALIGN", (0, 0), (-1, -1), "TOP"),
        ("VALIGN", (0, 0), (-1, 0), "BOTTOM"),
        ("BACKGROUND", (0, 0), (-1, 0), SHADED),
        ("LINEABOVE", (0, 0), (-1, 0), 0.8, INK),
        ("LINEBELOW", (0, 0), (-1, 0), 0.8, INK),
        ("LINEBELOW", (0, 1), (-1, -1), 0.25, HAIR),
        ("LEFTPADDING", (0, 0), (-1, -1), 1.5),
        ("RIGHTPADDING", (0, 0), (-1, -1), 1.5),
        ("TOPPADDING", (0, 0), (-1, -1), 1.4),
        ("BOTTOMPADDING", (0, 0), (-1, -1), 1.8),
        *(("LEFTPADDING", (k, 0), (k, -1), 5) for k in range(1, len(sides)) if sides[k - 1 : k + 1] == ["r", "l"]),
    ]
    tall = any(_lines(value, share) > _MOST_LINES for row in rows for value, share in zip(row, widths, strict=True))
    return Table([top, *body], colWidths=widths, repeatRows=1, style=commands, hAlign="LEFT", splitInRow=int(tall))


_MOST_LINES: Final = 25
"""A row of more lines may be cut where a page ends; shorter ones stay whole."""


def _lines(value: object, width: float) -> float:
    """How many lines a cell may take, on the long side."""
    if isinstance(value, Flowable):
        return 0
    words = str(value)
    return words.count("\n") + len(words) * 5 / width


def pairs(rows: Sequence[tuple[str, object]], width: float, first: float = 0.3) -> Any:
    """Names with their values, in two columns without a head."""
    body = [[text(name, SMALL), value if isinstance(value, Flowable) else text(value, BODY)] for name, value in rows]
    commands = [
        ("FONT", (0, 0), (-1, -1), REGULAR, 8),
        ("VALIGN", (0, 0), (-1, -1), "TOP"),
        ("LEFTPADDING", (0, 0), (-1, -1), 0),
        ("TOPPADDING", (0, 0), (-1, -1), 1.5),
        ("BOTTOMPADDING", (0, 0), (-1, -1), 1),
        ("LINEBELOW", (0, 0), (-1, -1), 0.25, HAIR),
    ]
    return Table(body, colWidths=[width * first, width * (1 - first)], style=commands, hAlign="LEFT", splitInRow=1)


def numbered(sentences: Sequence[str], mark: str = "") -> list[Flowable]:
    """Sentences with their numbers, ``mark`` before each."""
    style = _style("numbered", 8.5, after=2, leftIndent=9 * mm, firstLineIndent=-9 * mm)
    return [
        Paragraph(f"<b>{mark}{number}</b>&nbsp; {markup(words)}", style) for number, words in enumerate(sentences, 1)
    ]
