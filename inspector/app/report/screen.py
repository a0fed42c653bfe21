"""The report: make the PDF rating summary, and open it."""

from __future__ import annotations

from pathlib import Path
from typing import Any

from kivy.factory import Factory
from kivy.properties import BooleanProperty, ListProperty, StringProperty
from kivy.uix.screenmanager import Screen

from inspector.app.report.state import ReportState
from inspector.app.widgets import load_rules

load_rules(Path(__file__).with_name("screen.kv"))


class ReportScreen(Screen):
    """Shows what the report will say first, and makes it."""

    __events__ = ("on_make", "on_view", "on_back")

    title = StringProperty("")
    message = StringProperty("")
    act_now = ListProperty()
    busy = BooleanProperty(False)

    def on_make(self, *_: Any) -> None:
        """The report is wanted."""

    def on_view(self, *_: Any) -> None:
        """The report is to be opened."""

    def on_back(self, *_: Any) -> None:
        """Back to the bridge."""

    def show(self, state: ReportState) -> None:
        """Draw a state."""
        self.title, self.message, self.busy = state.title, state.message, state.busy
        self.act_now = list(state.act_now)
        lines = self.ids.lines
        lines.clear_widgets()
        for line in state.lines:
            lines.add_widget(Factory.Words(text=line))
        tiles = self.ids.tiles
        if state.ready and self.opener not in tiles.children:
            tiles.add_widget(self.opener)
        elif not state.ready:
            tiles.remove_widget(self.opener)

    @property
    def opener(self) -> Any:
        """The button that opens the report; it stands there once there is one."""
        if not hasattr(self, "_opener"):
            self._opener = Factory.Push(words="Open the PDF", target=76)
            self._opener.bind(on_release=lambda _: self.dispatch("on_view"))
        return self._opener
