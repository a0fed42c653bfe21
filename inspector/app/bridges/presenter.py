"""What the list of bridges does: show each with its lowest rating factor, open one, add an invented one."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from functools import cache

from inspector import samples
from inspector.app.bridges.state import BridgeRow, BridgesState
from inspector.app.shelf import Shelf
from inspector.app.worker import Failure, Work
from inspector.desk import Rated
from inspector.store import BridgeSummary
from models import words

_FIGURES = "figures of the list"
_OPENING = "opening"


class BridgesPresenter:
    """The list without its widgets.

    Parameters
    ----------
    opened : is told of the bridge that was opened, rated.
    """

    def __init__(
        self, shelf: Shelf, work: Work, show: Callable[[BridgesState], None], opened: Callable[[Rated], None]
    ) -> None:
        self._shelf = shelf
        self._work = work
        self._show = show
        self._opened = opened
        self.state = BridgesState()

    def enter(self) -> None:
        """List the bridges, then work out their figures one after the other."""
        self._put(message="")
        self._work.ask(lambda: (self._shelf.summaries(), sample_rows()), self._listed)

    def leave(self) -> None:
        """Nobody looks any more: no further figures are wanted."""
        self._work.forget(_FIGURES)

    def open(self, bridge_id: str) -> None:
        """Open a stored bridge."""
        self.leave()
        self._put(message="Opening ...")
        self._work.ask(lambda: self._shelf.rated(bridge_id), self._arrived, _OPENING)

    def add_sample(self, name: str) -> None:
        """Store one of the invented footbridges and open it."""
        self.leave()
        self._put(message="Opening ...")
        self._work.ask(lambda: self._shelf.rated(self._shelf.add_sample(name)), self._arrived, _OPENING)

    def _arrived(self, found: Rated | Failure) -> None:
        if isinstance(found, Failure):
            self._put(message=found.text)
            return
        self._put(message="")
        self._opened(found)

    def _listed(self, answer: tuple[tuple[BridgeSummary, ...], tuple[BridgeRow, ...]] | Failure) -> None:
        if isinstance(answer, Failure):
            self._put(message=answer.text)
            return
        found, every_sample = answer
        known = {row.key: row.figure for row in self.state.rows}
        rows = tuple(BridgeRow(one.id, one.name, _about(one), known.get(one.id, "...")) for one in found)
        names = {row.name for row in rows}
        invented = tuple(row for row in every_sample if row.name not in names)
        self._put(rows=rows, samples=invented)
        self._figure_of([row.key for row in rows])

    def _figure_of(self, left: list[str]) -> None:
        if not left:
            return
        first, rest = left[0], left[1:]

        def answered(found: Rated | Failure) -> None:
            figure = "not rated" if isinstance(found, Failure) else _lowest(found)
            rows = tuple(replace(row, figure=figure) if row.key == first else row for row in self.state.rows)
            self._put(rows=rows)
            self._figure_of(rest)

        self._work.ask(lambda: self._shelf.rated(first), answered, _FIGURES)

    def _put(
        self,
        rows: tuple[BridgeRow, ...] | None = None,
        samples: tuple[BridgeRow, ...] | None = None,
        message: str | None = None,
    ) -> None:
        old = self.state
        self.state = BridgesState(
            old.rows if rows is None else rows,
            old.samples if samples is None else samples,
            old.message if message is None else message,
        )
        self._show(self.state)


@cache
def sample_rows() -> tuple[BridgeRow, ...]:
    """The invented footbridges. Reading them takes long the first time."""
    rows = []
    for name in samples.names():
        bridge = samples.sample(name).bridge
        rows.append(BridgeRow(name, bridge.name, "invented, to learn with", "", sample=True))
    return tuple(rows)


def _about(one: BridgeSummary) -> str:
    parts = [one.reference or "", f"last visit {one.last_visit}" if one.last_visit else "no visit yet"]
    return ", ".join(part for part in parts if part)


def _lowest(rated: Rated) -> str:
    value = rated.rating.structure.rating_factor[rated.rating.upper_level]
    if value is None:
        return "no rating factor"
    return words.factor(value) + (" below 1" if value < 1 else "")
