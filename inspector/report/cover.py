"""The cover: which bridge, made from what, and room for names, signatures and a seal."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import Flowable, KeepTogether, Table

from inspector.report.fonts import REGULAR
from inspector.report.style import BODY, CELL, HAIR, INK, SMALL, STAMP, STRONG, TITLE, gap, heading, pairs, text, title
from models.bridge import Footbridge
from models.journal import Journal
from models.rating.result import Rating
from models.words import CAUTION

STATUS: Final = "PRELIMINARY – FOR REVIEW BY A LICENSED ENGINEER – NOT FOR POSTING"
_SIGNERS: Final = ("Inspected by", "Calculated by", "Checked by", "Approved by")


def cover(rating: Rating, bridge: Footbridge, journal: Journal, width: float) -> list[Flowable]:
    """The first page."""
    made = rating.provenance
    owner = bridge.owner.name if bridge.owner and bridge.owner.name else "not recorded"
    facts: list[tuple[str, object]] = [
        ("Owner", owner),
        ("Owner's number", bridge.reference or "not recorded"),
        ("Place", bridge.locality or "not recorded"),
        ("Built", bridge.built or "not recorded"),
        ("Visits", "\n".join(_visits(journal)) or "none: rated as on the drawings"),
        ("Basis", f"{rating.basis}; levels: {', '.join(rating.levels)}"),
        ("Program", made.program),
        ("Fingerprint of the inputs", made.inputs_sha256),
        ("Units", "US customary" if bridge.units == "US" else "SI"),
        ("Status", STATUS),
    ]
    story: list[Flowable] = [
        gap(6),
        text(STATUS, STAMP),
        text("Rating summary", TITLE),
        title(bridge.name),
        pairs(facts, width),
        gap(8),
        _boxed(text(CAUTION, STRONG), width),
        KeepTogether([*heading("Signatures"), _signatures(width)]),
    ]
    if bridge.notes:
        story += [*heading("Notes on the bridge"), text(bridge.notes, BODY)]
    return story


def _visits(journal: Journal) -> list[str]:
    return [f"{visit.date}, {visit.inspector or 'inspector not recorded'}" for visit in journal.visits]


def _boxed(words: Any, width: float) -> Any:
    style = [("BOX", (0, 0), (-1, -1), 1.2, INK), ("FONT", (0, 0), (-1, -1), REGULAR, 8)]
    return Table([[words]], colWidths=[width], style=style, hAlign="LEFT")


def _signatures(width: float) -> Any:
    """Blank lines for four people, and a blank space for a seal beside them."""
    head = [text(name, SMALL) for name in ("", "Name and licence number", "Signature", "Date", "Space for seal")]
    rows = [[text(who, CELL), "", "", "", ""] for who in _SIGNERS]
    style = [
        ("FONT", (0, 0), (-1, -1), REGULAR, 8),
        ("VALIGN", (0, 0), (-1, -1), "BOTTOM"),
        ("LINEBELOW", (0, 1), (3, -1), 0.6, INK),
        ("SPAN", (4, 1), (4, -1)),
        ("BOX", (4, 1), (4, -1), 0.6, HAIR),
        ("LEFTPADDING", (0, 0), (-1, -1), 2),
    ]
    shares = (0.14, 0.27, 0.21, 0.12, 0.26)
    heights = [5 * mm, *(15 * mm for _ in _SIGNERS)]
    return Table([head, *rows], colWidths=[width * share for share in shares], rowHeights=heights, style=style,
                 hAlign="LEFT")  # fmt: skip
