"""The bridge: the drawing, the bar sheet beside it, and the walk from bar to bar."""

from __future__ import annotations

from pathlib import Path
from typing import Any

from kivy.properties import BooleanProperty, ListProperty, StringProperty
from kivy.uix.screenmanager import Screen

from inspector.app.bridge.ask_panel import AskPanel
from inspector.app.bridge.main_panel import DrawingPanel, MainPanel
from inspector.app.bridge.pad import Pad
from inspector.app.bridge.pad_panel import PadPanel
from inspector.app.bridge.presenter import BridgePresenter
from inspector.app.bridge.sheet import REASONS
from inspector.app.bridge.sheet_panel import SheetPanel
from inspector.app.bridge.state import OTHER, BridgeState
from inspector.app.widgets import load_rules
from inspector.app.widgets.choices import offer
from models.journal import Entry
from models.picture.views import VIEWS

for _name in ("sheet.kv", "pad.kv", "ask.kv", "screen.kv"):
    load_rules(Path(__file__).with_name(_name))


class BridgeScreen(Screen):
    """Shows a bridge. What is tapped goes to the presenter; what the presenter says is shown."""

    __events__ = ("on_back", "on_report")

    title = StringProperty("")
    structure = StringProperty("")
    structure_changed = BooleanProperty(False)
    act_now = ListProperty()
    remark = StringProperty("")
    stored = StringProperty("")
    trouble = BooleanProperty(False)
    can_undo = BooleanProperty(False)
    walk_text = StringProperty("")
    first = BooleanProperty(True)
    last = BooleanProperty(False)
    bar = StringProperty("")

    def __init__(self, presenter: BridgePresenter | None = None, **options: Any) -> None:
        self.presenter = presenter
        super().__init__(**options)
        self.drawing = DrawingPanel(screen=self)
        self.sheet = SheetPanel()
        self.main = MainPanel(self.drawing, self.sheet, screen=self)
        self.pad_panel = PadPanel()
        self.ask_panel = AskPanel()
        self._pad: Pad | None = None
        self._spot: Entry | None = None
        self._answer: Any = None
        self._drawn: tuple[str, ...] = ()
        self._bind()
        self._panel(self.main)

    def _bind(self) -> None:
        sheet, elevation = self.sheet, self.drawing.elevation
        sheet.bind(on_log=self._log, on_not_seen=self._not_seen, on_severed=self._severed, on_plate=self._plate)
        sheet.bind(on_loss=self._loss, on_drawing=self._to_drawing)
        sheet.bind(on_bridges=lambda _: self.dispatch("on_back"), on_report=lambda _: self.dispatch("on_report"))
        elevation.bind(on_tap=self._tapped, across=self._across)
        self.pad_panel.bind(on_pad=self._pad_changed, on_enter=self._pad_entered, on_close=self.back_to_bar)
        self.ask_panel.bind(on_answer=self._answered, on_close=self.back_to_bar)

    def on_back(self, *_: Any) -> None:
        """Back to the list of bridges."""

    def on_report(self, *_: Any) -> None:
        """The report is wanted."""

    # --- showing ---

    def show(self, state: BridgeState) -> None:
        """Draw a state."""
        self.title, self.structure, self.structure_changed = state.title, state.structure, state.structure_changed
        self.act_now, self.remark = list(state.act_now), state.remark
        self.stored, self.trouble, self.can_undo = state.stored, state.trouble, state.can_undo
        self.bar = state.bar
        walk = state.walk
        self.walk_text = walk.text
        self.first, self.last = walk.here == 0, walk.here == len(walk.done) - 1
        strip = self.main.ids.strip
        strip.done, strip.here = list(walk.done), walk.here
        if self.presenter is not None:
            offer(self.drawing.views, [*state.views, *state.other_trusses], self._look_at)
        self._show_picture(state)
        if state.sheet is not None:
            self.sheet.show(state.sheet)
            self.sheet.structure, self.sheet.structure_changed = state.structure, state.structure_changed
            self.pad_panel.figure = state.sheet.figure
        self.pad_panel.stored = state.stored

    def _show_picture(self, state: BridgeState) -> None:
        elevation, thumb = self.drawing.elevation, self.sheet.thumb
        # Each drawing opens with letters that can be read; an entry leaves it as it is zoomed.
        seen = (state.title, state.truss, *(view.key for view in state.views if view.chosen))
        elevation.bar = thumb.bar = state.bar
        if state.picture is not None:
            elevation.picture = thumb.picture = state.picture
            self.drawing.parts["legend"].rows = list(state.picture.legend)
            if seen != self._drawn:
                self._drawn = seen
                elevation.open_anew()

    def _look_at(self, key: str) -> None:
        """Another view, or another truss."""
        if self.presenter is not None:
            if key in VIEWS:
                self.presenter.show_view(key)
            else:
                self.presenter.show_truss(key.removeprefix(OTHER))

    def _panel(self, panel: Any) -> None:
        content = self.ids.content
        if panel.parent is None:
            content.clear_widgets()
            content.add_widget(panel)

    def back_to_bar(self, *_: Any) -> None:
        """Leave the pad or the question."""
        self._pad = self._spot = self._answer = None
        self._panel(self.main)

    @property
    def at_home(self) -> bool:
        """Whether neither pad nor question stands there."""
        return self.main.parent is not None

    # --- what is tapped ---

    def step(self, by: int) -> None:
        """Previous or next bar."""
        if self.presenter is not None:
            self.presenter.step(by)

    def undo(self) -> None:
        """Take the last entry back."""
        if self.presenter is not None:
            self.presenter.undo()

    def _across(self, _: Any, number: float) -> None:
        if self.presenter is not None:
            self.presenter.letters_across(number)

    def _tapped(self, _: Any, bar: str) -> None:
        if self.presenter is not None:
            self.presenter.tap(bar)
        self.open_sheet()

    def _to_drawing(self, *_: Any) -> None:
        self.main.sheet_open = False

    def open_sheet(self) -> None:
        """Show the sheet where the drawing covers it."""
        self.main.sheet_open = True

    def _log(self, _: Any, what: dict[str, Any]) -> None:
        if self.presenter is not None:
            self.presenter.log(**what)

    def _loss(self, _: Any, steps: int) -> None:
        if self.presenter is not None:
            self.presenter.change_loss(steps)

    def _not_seen(self, *_: Any) -> None:
        self._ask(
            f"{self.bar}: why was it not seen?", REASONS, lambda why: {"seen": "not seen", "reason": why}, own=True
        )

    def _severed(self, *_: Any) -> None:
        sheet = self.sheet.sheet
        if sheet is not None and sheet.severed:
            self._ask(f"{self.bar}: is it whole?", ("it is not severed",), lambda _: {"severed": False}, own=False)
        else:
            self._ask(
                f"{self.bar}: is it severed?", ("severed, it carries nothing",), lambda _: {"severed": True}, own=False
            )

    def _ask(self, question: str, answers: tuple[str, ...], entry: Any, *, own: bool) -> None:
        self._answer = entry
        self.ask_panel.ask(question, answers, own_words=own)
        self._panel(self.ask_panel)

    def _answered(self, _: Any, answer: str) -> None:
        what = self._answer(answer)
        self.back_to_bar()
        self._log(None, what)

    # --- the pad ---

    def _plate(self, _: Any, plate: str) -> None:
        if self.presenter is not None:
            pad = self.presenter.pad(plate)
            if pad is not None:
                self._spot = None
                self._show_pad(pad)
                self._panel(self.pad_panel)

    def _show_pad(self, pad: Pad) -> None:
        if not pad.values:
            self._spot = None
        self._pad = pad
        self.pad_panel.show(pad)

    def _pad_changed(self, _: Any, pad: Pad) -> None:
        self._show_pad(pad)

    def _pad_entered(self, *_: Any) -> None:
        if self._pad is None or self.presenter is None:
            return
        pad, reading = self._pad.enter()
        self._show_pad(pad)
        if reading is None:
            return
        plate, station = pad.plate, pad.station

        def stored(entry: Entry) -> None:
            now = self._pad
            if now is not None and (now.plate, now.station, now.cleaned) == (plate, station, pad.cleaned):
                self._spot = entry
                self._show_pad(now.stored(reading.thickness[0].text))

        self.presenter.log_reading(reading, self._spot, stored)
