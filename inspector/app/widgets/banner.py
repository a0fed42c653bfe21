"""What always stands on top: the caution, and what calls for somebody to act now."""

from __future__ import annotations

from typing import Any

from kivy.clock import Clock
from kivy.core.window import Window
from kivy.factory import Factory
from kivy.metrics import Metrics
from kivy.properties import ListProperty

from inspector.app.widgets.arranged import Stack
from inspector.app.widgets.words import Words

MOST = 0.33
"""How much of the screen's height the findings to act on may take."""


class Caution(Words):
    """The safety statement, whole. Nothing takes it away."""


class ActNow(Stack):
    """Plain steps, whom to call, and why. It takes no room where nothing calls for it.

    The steps always stand there; what follows only where it leaves two thirds of the screen to work on.
    """

    lines = ListProperty()

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self._trigger = Clock.create_trigger(self._fill, -1)
        self.bind(lines=self._again, width=self._again)
        Window.bind(height=self._again)
        Metrics.bind(fontscale=self._again)

    def _again(self, *_: Any) -> None:
        self._trigger()

    def _fill(self, *_: Any) -> None:
        self.clear_widgets()
        for number, line in enumerate(self.lines):
            words = Factory.ActLine(text=line, bold=number == 0)
            if number and self.height_for(self.width) + words.height_for(self.width) > Window.height * MOST:
                break
            self.add_widget(words)
