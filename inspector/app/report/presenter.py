"""What the report screen does: make the PDF rating summary, and open it."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from pathlib import Path
from typing import Any

from inspector.app.bridge.headline import act_now_lines, structure_text
from inspector.app.report.state import ReportState
from inspector.app.shelf import Shelf
from inspector.app.worker import Failure, Work
from inspector.desk import Rated
from models import words

_REPORT = "report"


class ReportPresenter:
    """The report screen without its widgets.

    Parameters
    ----------
    opener : shows a file in another program; None where this device has none.
    """

    def __init__(
        self, shelf: Shelf, work: Work, show: Callable[[ReportState], None], opener: Callable[[Path], None] | None
    ) -> None:
        self._shelf = shelf
        self._work = work
        self._show = show
        self._opener = opener
        self._rated: Rated | None = None
        self._path: Path | None = None
        self.state = ReportState()

    def enter(self, rated: Rated) -> None:
        """Show what a report of this rating will say."""
        self._rated, self._path = rated, None
        rating = rated.rating
        not_seen = rated.condition.not_seen
        self._put(
            title=rated.bridge.name,
            act_now=act_now_lines(rated),
            lines=(
                f"Lowest rating factor ({rating.upper_level}): {structure_text(rating)}.",
                f"{words.count(not_seen, 'bar')} of {len(rating.bars)} not seen in the last visit.",
                f"Not rated: {', '.join(rating.not_rated)}.",
            ),
            message="",
            busy=False,
            ready=False,
        )

    def make(self) -> None:
        """Make the PDF in the condition of the moment."""
        rated = self._rated
        if rated is None or self.state.busy:
            return
        self._put(busy=True, ready=False, message="Writing the rating summary ...")
        self._work.ask(lambda: self._shelf.report(rated), self._made, _REPORT)

    def open_file(self) -> None:
        """Open the PDF in another program."""
        if self._path is not None and self._opener is not None:
            self._opener(self._path)

    def _made(self, found: Path | Failure) -> None:
        if isinstance(found, Failure):
            self._put(busy=False, message=f"No report was written. {found.text}")
            return
        self._path = found
        self._put(busy=False, ready=self._opener is not None, message=f"Written to {found}.")

    def _put(self, **changes: Any) -> None:
        self.state = replace(self.state, **changes)
        self._show(self.state)
