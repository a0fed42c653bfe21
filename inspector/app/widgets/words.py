"""Text that wraps, and is as high as it needs to be."""

from __future__ import annotations

from typing import Any

from kivy.uix.label import Label

from inspector.app.widgets.measure import text_size


class Words(Label):
    """A text on the ground of a screen. Markup is never read, so foreign text is shown as it is.

    An empty text takes no room.
    """

    stretch = True

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self.size_hint_y = None
        for name in ("width", "text", "font_size", "bold", "padding"):
            self.fbind(name, self._fit)
        self._fit()

    def height_for(self, width: float) -> float:
        """The height, px, that the text needs at a width."""
        if not self.text:
            return 0.0
        left, top, right, bottom = self.padding
        inner = max(width - left - right, 1)
        return text_size(self.text, self.font_size, self.bold, inner)[1] + float(top + bottom)

    def _fit(self, *_: Any) -> None:
        self.text_size = (self.width, None)
        self.height = self.height_for(self.width)
