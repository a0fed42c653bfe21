"""The list of bridges."""

from __future__ import annotations

from pathlib import Path
from typing import Any

from kivy.factory import Factory
from kivy.properties import NumericProperty, StringProperty
from kivy.uix.screenmanager import Screen

from inspector.app.bridges.state import BridgesState
from inspector.app.widgets import load_rules

load_rules(Path(__file__).with_name("screen.kv"))


class BridgesScreen(Screen):
    """Shows the bridges; a tap opens one."""

    __events__ = ("on_open", "on_sample", "on_theme", "on_text_size")

    message = StringProperty("")
    text_size_now = NumericProperty(100)
    theme_now = StringProperty("field")

    def on_open(self, *_: Any) -> None:
        """A stored bridge was tapped; its id."""

    def on_sample(self, *_: Any) -> None:
        """An invented bridge was tapped; its name."""

    def on_theme(self, *_: Any) -> None:
        """The other theme is wanted."""

    def on_text_size(self, *_: Any) -> None:
        """The next text size is wanted."""

    def show(self, state: BridgesState) -> None:
        """Draw a state."""
        self.message = state.message
        rows = self.ids.rows
        rows.clear_widgets()
        if state.rows:
            rows.add_widget(Factory.Heading(text="Bridges on this device"))
        for row in state.rows:
            text = f"{row.name}\n{row.about}\nLowest rating factor: {row.figure}"
            rows.add_widget(self._button(text, "on_open", row.key))
        if state.samples:
            rows.add_widget(Factory.Heading(text="Invented footbridges to learn with"))
        for row in state.samples:
            rows.add_widget(self._button(row.name, "on_sample", row.key))

    def _button(self, text: str, event: str, key: str) -> Any:
        button = Factory.Push(words=text)
        button.bind(on_release=lambda _: self.dispatch(event, key))
        return button
