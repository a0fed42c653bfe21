"""Buttons for a gloved hand: large, outlined, and saying by a sign what is chosen."""

from __future__ import annotations

from typing import Any

from kivy.metrics import dp
from kivy.properties import BooleanProperty, NumericProperty, StringProperty
from kivy.uix.behaviors import ButtonBehavior
from kivy.uix.label import Label

from inspector.app.room import TARGET
from inspector.app.widgets.measure import text_size

AIR = 12
"""Room on either side of a button's text, dp."""


class Push(ButtonBehavior, Label):
    """A button.

    Parameters
    ----------
    words : what stands on it.
    chosen : it is the chosen one of a group; a tick stands before its text.
    target : least height and width, dp.
    stretch : whether it takes the room that is left in a row.
    """

    words = StringProperty("")
    chosen = BooleanProperty(False)
    target = NumericProperty(TARGET)
    stretch = BooleanProperty(False)
    key = StringProperty("")

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self.bind(width=self._fit)
        self._fit()

    def _fit(self, *_: Any) -> None:
        self.text_size = (max(self.width - dp(AIR), 1), None)

    @property
    def natural_width(self) -> float:
        """The width, px, at which the text stands in one line."""
        return self._wide(self.words.split("\n"))

    @property
    def least_width(self) -> float:
        """The width, px, that the longest word needs."""
        return self._wide(self.words.split() or [""])

    def height_for(self, width: float) -> float:
        """The height, px, that the button needs at a width."""
        inner = max(width - dp(AIR), 1)
        high = text_size(self._ticked(self.words), self.font_size, self.bold, inner)[1]
        return float(max(high + dp(AIR), dp(self.target)))

    def _wide(self, parts: list[str]) -> float:
        # Room for the tick is kept, so that nothing moves when the button is chosen.
        widest = max(text_size(self._ticked(part), self.font_size, self.bold)[0] for part in parts)
        return float(max(widest + dp(AIR) + 2, dp(self.target)))

    def _ticked(self, text: str) -> str:
        return f"✓ {text}" if self.ticks else text

    @property
    def ticks(self) -> bool:
        """Whether it is a button of a group, which may be chosen."""
        return bool(self.key)


class Key(Push):
    """A key of the number pad."""

    @property
    def ticks(self) -> bool:
        """A key is never the chosen one."""
        return False
