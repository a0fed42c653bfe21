"""The number pad: large keys, the place along the bar, and what was stored at that place."""

from __future__ import annotations

from typing import Any

from kivy.metrics import dp
from kivy.properties import ObjectProperty, StringProperty
from kivy.uix.boxlayout import BoxLayout
from kivy.uix.layout import Layout

from inspector.app.bridge.pad import ERASE, SPACE, Pad, values_text
from inspector.app.bridge.state import Choice
from inspector.app.room import GAP, LARGE_TARGET, key_columns
from inspector.app.widgets.choices import offer
from inspector.app.widgets.push import Key

_SIGNS = {ERASE: "⌫", SPACE: "␣"}


class Keys(Layout):
    """The keys in a grid that fills its room."""

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self.bind(pos=self._changed, size=self._changed, children=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger_layout()

    def do_layout(self, *_: Any) -> None:
        """Place the keys."""
        keys = self.children[::-1]
        if not keys or self.width < 1 or self.height < 1:
            return
        gap, least = dp(GAP), dp(LARGE_TARGET)
        count = key_columns(self.width, self.height, len(keys), least, gap)
        rows = -(-len(keys) // count)
        width = (self.width - (count - 1) * gap) / count
        height = max((self.height - (rows - 1) * gap) / rows, least)
        for number, key in enumerate(keys):
            row, column = divmod(number, count)
            key.text_size = (width, None)
            key.size = (width, height)
            key.pos = (self.x + column * (width + gap), self.top - (row + 1) * height - row * gap)


class PadPanel(BoxLayout):
    """A reading that is being typed.

    Parameters
    ----------
    figure : the bar's rating factor, before and after what was stored.
    stored : what became of the last value.
    """

    __events__ = ("on_pad", "on_enter", "on_close")

    pad = ObjectProperty(None, allownone=True)
    title = StringProperty("")
    figure = StringProperty("")
    stored = StringProperty("")

    def on_pad(self, *_: Any) -> None:
        """Something was tapped; the pad as it is now."""

    def on_enter(self, *_: Any) -> None:
        """What was typed is to be stored."""

    def on_close(self, *_: Any) -> None:
        """Back to the sheet."""

    def show(self, pad: Pad) -> None:
        """Draw a pad."""
        self.pad = pad
        self.title = f"{pad.plate}, {pad.where}"
        offer(self.ids.grid, [Choice(key, _SIGNS.get(key, key)) for key in pad.keys], self.press, Key)
        names = {"start": pad.start, "middle": "Middle", "end": pad.end, "other": "Other place"}
        places = [Choice(key, name, chosen=key == pad.station) for key, name in names.items()]
        offer(self.ids.places, places, lambda key: self.dispatch("on_pad", self.pad.at(key)))
        cleaned = Choice("cleaned", "Cleaned to bright metal", chosen=pad.cleaned)
        offer(self.ids.cleaned, [cleaned], lambda _: self.dispatch("on_pad", self.pad.clean()))
        self.ids.section.picture = pad.section
        self.ids.shown.text = pad.shown
        self.ids.asked.text = pad.error or pad.question or values_text(pad)
        self.ids.enter.words = _enter_words(pad)

    def press(self, key: str) -> None:
        """A key."""
        self.dispatch("on_pad", self.pad.press(key))


def _enter_words(pad: Pad) -> str:
    if pad.target == "distance":
        return "That is the place"
    return "Store as read" if pad.question else "Store"
