"""The sheet of one bar: what was seen, how it is, what was measured."""

from __future__ import annotations

from typing import Any

from kivy.factory import Factory
from kivy.properties import BooleanProperty, NumericProperty, ObjectProperty, StringProperty
from kivy.uix.boxlayout import BoxLayout

from inspector.app.bridge.state import Choice, Sheet
from inspector.app.widgets.arranged import Stack
from inspector.app.widgets.choices import offer

TABS = (("look", "Look"), ("measure", "Measure"), ("notes", "Notes"))


class LookPage(Stack):
    """Seen, state, no change, severed."""

    panel = ObjectProperty(None)

    def show(self, sheet: Sheet, panel: Any) -> None:
        """Draw a sheet."""
        offer(self.ids.seen, sheet.seen, panel.seen)
        offer(self.ids.state, sheet.states, lambda key: panel.dispatch("on_log", {"state": key}))
        self.ids.seen_before.text = sheet.seen_before
        self.ids.state_before.text = sheet.state_before
        self.ids.severed_before.text = sheet.severed_before
        severed = Choice("severed", "Severed", chosen=sheet.severed)
        more = [severed] if sheet.unchanged is None else [sheet.unchanged, severed]
        offer(self.ids.more, more, panel.more)
        self.ids.hint.text = "" if sheet.unchanged is None or sheet.unchanged.enabled else _LOOK_FIRST


_HEAD = ("title", "about", "figure", "governs", "tabs")
_NAMES = ("title", "figure")
_BRIEF = ("brief",)
_REST = ("about", "governs", "whole", "ways")
_DRAWING = "drawing"

_LOOK_FIRST = "'No change' can be tapped once the bar was seen hands on or at a distance."


class MeasurePage(Stack):
    """The section with its plates, and the estimated loss."""

    panel = ObjectProperty(None)
    loss = NumericProperty(-1)

    def show(self, sheet: Sheet, panel: Any) -> None:
        """Draw a sheet."""
        self.ids.section.picture = sheet.section
        rows = [Choice(row.name, f"{row.number}  {row.name}\n{row.known}") for row in sheet.plates]
        offer(self.ids.plates, rows, lambda key: panel.dispatch("on_plate", key))
        self.loss = -1 if sheet.loss is None else sheet.loss
        self.ids.loss_before.text = sheet.loss_before
        self.ids.doubts.text = "\n".join(sheet.doubts)


class NotesPage(Stack):
    """A note, and what was recorded now and before."""

    panel = ObjectProperty(None)

    def show(self, sheet: Sheet, panel: Any) -> None:
        """Draw a sheet."""
        lines = self.ids.lines
        lines.clear_widgets()
        for title, texts in (("In this visit", sheet.notes), ("Before", sheet.earlier)):
            lines.add_widget(Factory.Caption(text=title))
            for text in texts or ("nothing",):
                lines.add_widget(Factory.Words(text=text))


class SheetPanel(BoxLayout):
    """One bar: its figures, and three pages to log on.

    Parameters
    ----------
    covering : it covers the drawing, so that it shows a thumbnail and the ways out, and scrolls as a whole.
    can_leave : whether there is room for the drawing at all.
    structure, structure_changed : the structure's figure, shown where the head of the screen is covered.
    """

    __events__ = ("on_log", "on_not_seen", "on_severed", "on_plate", "on_loss", "on_drawing", "on_bridges", "on_report")

    sheet = ObjectProperty(None, allownone=True)
    covering = BooleanProperty(False)
    can_leave = BooleanProperty(True)
    structure = StringProperty("")
    structure_changed = BooleanProperty(False)
    tab = StringProperty("look")

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        # Ids are weak; what is taken out of the tree at times is held here.
        self.parts = {name: self.ids[name].__self__ for name in (*_HEAD, *_BRIEF, *_REST, "thumb", "page")}
        self.thumb, self.tabs, self.page = self.parts["thumb"], self.parts["tabs"], self.parts["page"]
        self._pages = {"look": LookPage(panel=self), "measure": MeasurePage(panel=self), "notes": NotesPage(panel=self)}
        self._arrange()

    def on_log(self, *_: Any) -> None:
        """An answer was tapped; fields of an entry by name."""

    def on_not_seen(self, *_: Any) -> None:
        """`Not seen` was tapped; a reason is wanted."""

    def on_severed(self, *_: Any) -> None:
        """`Severed` was tapped; a second tap is wanted."""

    def on_plate(self, *_: Any) -> None:
        """A plate was tapped."""

    def on_loss(self, *_: Any) -> None:
        """More or less loss is estimated; steps."""

    def on_drawing(self, *_: Any) -> None:
        """Back to the drawing."""

    def on_bridges(self, *_: Any) -> None:
        """Back to the list."""

    def on_report(self, *_: Any) -> None:
        """The report is wanted."""

    def on_covering(self, *_: Any) -> None:
        """More or less room than before."""
        self._arrange()

    def on_can_leave(self, *_: Any) -> None:
        """Room for the drawing came or went."""
        self._turn()

    def on_tab(self, *_: Any) -> None:
        """Another page."""
        self._turn()

    def show(self, sheet: Sheet) -> None:
        """Draw a sheet."""
        another = self.sheet is None or self.sheet.title != sheet.title
        self.sheet = sheet
        self._turn()
        if another:
            self.ids.scroller.to_top()

    def seen(self, key: str) -> None:
        """How the bar was seen."""
        if key == "not seen":
            self.dispatch("on_not_seen")
        else:
            self.dispatch("on_log", {"seen": key})

    def more(self, key: str) -> None:
        """No change, or severed."""
        if key == "severed":
            self.dispatch("on_severed")
        else:
            self.dispatch("on_log", {"look_unchanged": True})

    def store_note(self, field: Any) -> None:
        """Store the note that was typed."""
        if field.text.strip():
            self.dispatch("on_log", {"note": field.text.strip()})
            field.text = ""

    def turn(self, tab: str) -> None:
        """Turn to a page, or back to the drawing."""
        if tab == _DRAWING:
            self.dispatch("on_drawing")
            return
        self.tab = tab
        self.ids.scroller.to_top()

    def _turn(self) -> None:
        tabs = [Choice(key, text, chosen=key == self.tab) for key, text in TABS]
        if self.covering:
            tabs.append(Choice(_DRAWING, "Drawing", enabled=self.can_leave))
        offer(self.tabs, tabs, self.turn)
        page = self._pages[self.tab]
        if page.parent is not self.page:
            self.page.clear_widgets()
            self.page.add_widget(page)
        if self.sheet is not None:
            page.show(self.sheet, self)

    def _arrange(self) -> None:
        """Where the sheet has little room everything scrolls with its page, what is needed most first."""
        for part in self.parts.values():
            if part.parent is not None and part is not self.thumb:
                part.parent.remove_widget(part)
        names, scrolled, top = self.ids.names, self.ids.scrolled, self.ids.top
        if self.covering:
            for name in _NAMES:
                names.add_widget(self.parts[name])
            for name in ("brief", "tabs", "page", *_REST):
                scrolled.add_widget(self.parts[name])
        else:
            for name in _HEAD:
                top.add_widget(self.parts[name])
            scrolled.add_widget(self.page)
        self._turn()
