"""What the bridge screen does: choose a bar, log what is seen, show the figures before and after."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, field, replace
from typing import Any

from inspector.app.bridge.drawing import Wanted, draw, draw_again
from inspector.app.bridge.headline import act_now_lines, remark_on, structure_text
from inspector.app.bridge.pad import Pad
from inspector.app.bridge.sheet import sheet_of
from inspector.app.bridge.state import OTHER, BridgeState, Choice, Walk
from inspector.app.shelf import Shelf, Today, today_in
from inspector.app.worker import Failure, Work
from inspector.desk import Rated
from inspector.visit import Logbook
from models.journal import Entry, Reading
from models.picture import Picture
from models.picture.section import section_picture
from models.picture.views import VIEWS
from models.section import built
from models.walk import Place, done_in, walking_order
from models.words import entries

RATING = "rating"
DRAWING = "drawing"
_STEP = 5
_MOST_LOSS = 95


@dataclass
class _Open:
    """The bridge that is open, and where the inspector is on it."""

    rated: Rated
    day: Today
    order: tuple[Place, ...]
    place: Place
    view: str
    before: Rated | None = None
    about: Place | None = None
    pictures: dict[Wanted, tuple[Rated, Picture]] = field(default_factory=dict)


class BridgePresenter:
    """The bridge screen without its widgets.

    Parameters
    ----------
    show : draws a state.
    remember : keeps where the inspector is: bridge, truss, bar, view.
    """

    def __init__(
        self,
        shelf: Shelf,
        work: Work,
        show: Callable[[BridgeState], None],
        remember: Callable[[str, str, str, str], None] = lambda *_: None,
    ) -> None:
        self._shelf = shelf
        self._work = work
        self._show = show
        self._remember = remember
        self._open: _Open | None = None
        self._across = 80
        self.state = BridgeState()

    @property
    def rated(self) -> Rated | None:
        """The last rating of the open bridge."""
        return None if self._open is None else self._open.rated

    # --- opening and looking ---

    def open(self, rated: Rated, place: Place | None = None, view: str = "rating factor") -> None:
        """Open a bridge at a bar; without one that is there, at the first of the walk."""
        order = walking_order(rated.bridge)
        self._open = _Open(
            rated=rated,
            day=self._day(rated),
            order=order,
            place=place if place in order else order[0],
            view=view if view in VIEWS else "rating factor",
        )
        self.state = BridgeState()
        self._refresh()
        self._draw()

    def close(self) -> None:
        """Nothing is asked for any more."""
        self._open = None

    def letters_across(self, number: float) -> None:
        """How many letters fit into the drawing's width; another number lays the drawing out anew."""
        across = max(round(number / 10) * 10, 30)
        if across != self._across:
            self._across = across
            self._draw()

    def show_view(self, name: str) -> None:
        """Show another figure of the bars."""
        if self._open is not None and name in VIEWS:
            self._open.view = name
            self._refresh()
            self._draw()

    def show_truss(self, name: str) -> None:
        """Show another truss, at its first bar in the walk."""
        if self._open is not None and name != self._open.place[0]:
            self.choose(next(place for place in self._open.order if place[0] == name))

    def tap(self, bar: str) -> None:
        """A bar of the truss on the screen was tapped."""
        if self._open is not None:
            self.choose((self._open.place[0], bar))

    def step(self, by: int) -> None:
        """Go along the walk; it ends at either end."""
        if self._open is None:
            return
        here = self._open.order.index(self._open.place) + by
        if 0 <= here < len(self._open.order):
            self.choose(self._open.order[here])

    def choose(self, place: Place) -> None:
        """Choose a bar."""
        if self._open is None or place not in self._open.order:
            return
        other_truss = place[0] != self._open.place[0]
        self._open.place = place
        self._refresh()
        if other_truss:
            self._draw()

    # --- logging ---

    def log(self, **what: Any) -> None:
        """Store one thing about the chosen bar: fields of `models.journal.Entry` by name."""
        if self._open is not None:
            truss, bar = self._open.place
            self._store(lambda: self._book().log(truss, bar, **what))

    def change_loss(self, steps: int) -> None:
        """Estimate more loss or less, in steps of 5 %."""
        sheet = self.state.sheet
        if sheet is None:
            return
        loss = min(max((sheet.loss or 0) + _STEP * steps, 0), _MOST_LOSS)
        if loss != (sheet.loss if sheet.loss is not None else -1):
            self.log(estimated_loss=loss / 100)

    def log_reading(self, reading: Reading, after: Entry | None, then: Callable[[Entry], None]) -> None:
        """Store a reading.

        Parameters
        ----------
        after : the entry that holds what was read before at the same spot; the new value joins it.
        then : is told of the stored entry.
        """
        if self._open is None:
            return
        truss, bar = self._open.place

        def job() -> Entry:
            if after is None:
                return self._book().log(truss, bar, readings=(reading,))
            return self._book().add_to_reading(after, reading.thickness[0])

        self._store(job, then)

    def undo(self) -> None:
        """Take back the last entry of this device in this visit."""
        if self._open is not None and self.state.can_undo:
            self._store(lambda: self._book().undo())

    def pad(self, plate: str) -> Pad | None:
        """A number pad for a plate of the chosen bar."""
        if self._open is None:
            return None
        rated, (truss, bar) = self._open.rated, self._open.place
        as_built = rated.bridge.trusses[truss].bar[bar]
        cut = built(rated.bridge.sections[rated.condition.bars[truss, bar].section], as_built.turned or 0)
        row = next(row for row in rated.rating.trusses[truss].bars if row.bar == bar)
        nominal = float(cut.thickness[cut.plates.index(plate)])
        units, section = rated.bridge.units or "SI", section_picture(cut, chosen=plate)
        return Pad(plate, nominal, as_built.start, as_built.end, row.length, units, section=section)

    def _book(self) -> Logbook:
        return self._shelf.logbook(self._opened.rated.bridge.id)

    @property
    def _opened(self) -> _Open:
        if self._open is None:
            raise RuntimeError("no bridge is open")
        return self._open

    def _store(self, job: Callable[[], Entry], then: Callable[[Entry], None] = lambda _: None) -> None:
        self._put(stored="Storing ...", trouble=False)

        def returned(found: Entry | Failure) -> None:
            if isinstance(found, Failure):
                self._put(stored=f"NOT stored. {found.text}", trouble=True)
                return
            said = "Taken back" if found.retracts else f"Stored: {entries.entry(found)}"
            self._put(stored=f"{said} ({found.bar})", trouble=False)
            then(found)
            self._rate((found.truss, found.bar))

        self._work.ask(job, returned)

    # --- figures ---

    def _rate(self, about: Place) -> None:
        """Rate again after an entry, and redraw what can be redrawn in place."""
        now = self._open
        if now is None:
            return
        bridge, wanted = now.rated.bridge.id, self._wanted()
        drawn = now.pictures.get(wanted)

        def job() -> tuple[Rated, Picture | None]:
            rated = self._shelf.rated(bridge)
            return rated, None if drawn is None else draw_again(rated, wanted, drawn[1])

        def answered(found: tuple[Rated, Picture | None] | Failure) -> None:
            if self._open is not now:
                return
            if isinstance(found, Failure):
                self._put(stored=f"{self.state.stored} No new figures: {found.text}", trouble=True)
                return
            rated, picture = found
            now.before, now.about = now.rated, about
            now.rated, now.day = rated, self._day(rated)
            if picture is not None:
                now.pictures[wanted] = rated, picture
            self._refresh()
            self._draw()

        self._work.ask(job, answered, RATING)

    def _wanted(self) -> Wanted:
        now = self._opened
        return Wanted(now.place[0], now.view, self._across)

    def _draw(self) -> None:
        """Lay the drawing out where none of this rating is at hand."""
        now = self._open
        if now is None:
            return
        wanted, rated = self._wanted(), now.rated
        kept = now.pictures.get(wanted)
        if kept is not None and kept[0] is rated:
            self._put(picture=kept[1])
            return

        def job() -> Picture:
            again = None if kept is None else draw_again(rated, wanted, kept[1])
            return draw(rated, wanted) if again is None else again

        def drawn(found: Picture | Failure) -> None:
            if self._open is not now:
                return
            if isinstance(found, Failure):
                self._put(stored=f"No drawing: {found.text}", trouble=True)
                return
            now.pictures[wanted] = rated, found
            if wanted == self._wanted() and rated is now.rated:
                self._put(picture=found)

        self._work.ask(job, drawn, DRAWING)

    # --- showing ---

    def _day(self, rated: Rated) -> Today:
        return today_in(rated.journal, self._shelf.device, self._shelf.today())

    def _put(self, **changes: Any) -> None:
        self.state = replace(self.state, **changes)
        self._show(self.state)

    def _refresh(self) -> None:
        now = self._open
        if now is None:
            return
        rated, rating = now.rated, now.rated.rating
        truss = now.place[0]
        kept = now.pictures.get(self._wanted())
        before = now.before
        structure, then = structure_text(rating), None if before is None else structure_text(before.rating)
        changed = then is not None and then != structure
        visit = now.day.visit
        self.state = replace(
            self.state,
            title=rated.bridge.name,
            structure=f"{then} → {structure}" if changed else structure,
            structure_changed=changed,
            act_now=act_now_lines(rated),
            other_trusses=tuple(
                Choice(f"{OTHER}{name}", f"Show {name}") for name in rated.bridge.trusses if name != truss
            ),
            views=tuple(Choice(name, name.capitalize(), chosen=name == now.view) for name in VIEWS),
            truss=truss,
            bar=now.place[1],
            picture=None if kept is None else kept[1],
            sheet=sheet_of(rated, now.place, visit.id if visit else None, before if now.about == now.place else None),
            walk=self._walk(now),
            can_undo=self._can_undo(now),
            remark=remark_on(now.day),
        )
        self._remember(rated.bridge.id, *now.place, now.view)
        self._show(self.state)

    def _walk(self, now: _Open) -> Walk:
        visit, condition = now.day.visit, now.rated.condition
        number = next((k for k, one in enumerate(condition.visits) if visit and one.id == visit.id), -1)
        done = done_in(condition.records, number)
        here = now.order.index(now.place)
        flags = tuple(place in done for place in now.order)
        left = len(flags) - sum(flags)
        return Walk(f"Bar {here + 1} of {len(flags)}; {left} not done", flags, here)

    def _can_undo(self, now: _Open) -> bool:
        """Whether an entry of this device in this visit stands."""
        visit = now.day.visit
        if visit is None:
            return False
        mine = {one.id for one in visit.entries if one.device == self._shelf.device and one.retracts is None}
        records = now.rated.condition.records.values()
        return any(placed.entry.id in mine for record in records for placed in record.entries)
