"""What may be longer than its room: scrolled by a finger, or by two buttons that stand there when it is."""

from __future__ import annotations

from typing import Any

from kivy.metrics import dp
from kivy.uix.layout import Layout

from inspector.app.room import GAP, TARGET

PART = 0.7
"""How much of what is in sight a tap on a scroll button moves."""

_OWN = 3


class Scroller(Layout):
    """Holds one child that knows its height for a width, and scrolls it where that is more than there is room for."""

    def __init__(self, **options: Any) -> None:
        self._content: Any = None
        super().__init__(**options)
        self.bind(size=self._changed, pos=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger_layout()

    def add_widget(self, widget: Any, *rest: Any, **options: Any) -> None:
        """The first three children are the view and its buttons (from the kv rule), the next is the content."""
        if len(self.children) < _OWN:
            super().add_widget(widget, *rest, **options)
            return
        self._content = widget
        widget.bind(height=self._changed)
        self.ids.view.add_widget(widget)

    def do_layout(self, *_: Any) -> None:
        """Give the buttons room where the content is higher than the room."""
        if self._content is None or self.width < 1:
            return
        needed = self._content.height_for(self.width) > self.height
        target, gap = dp(TARGET), dp(GAP)
        low = self.height < 2 * target + gap
        side = 0 if not needed else 2 * (target + gap) if low else target + gap
        view, up, down = self.ids.view, self.ids.up, self.ids.down
        view.pos, view.size = self.pos, (self.width - side, self.height)
        self._content.size_hint_x = None
        self._content.width = view.width - (gap if needed else 0)
        # Where the room is low they stand side by side, else one over the other.
        each = self.height if low else (self.height - gap) / 2
        up_at = (self.right - 2 * target - gap, self.y) if low else (self.right - target, self.top - each)
        for button, at in ((up, up_at), (down, (self.right - target, self.y))):
            button.disabled, button.opacity = not needed, float(needed)
            button.pos = at if needed else (self.right, self.y)
            button.size = (target, each) if needed else (0, 0)

    def scroll(self, pages: float) -> None:
        """Move by parts of what is in sight; down is positive."""
        view = self.ids.view
        beyond = self._content.height - view.height if self._content is not None else 0
        if beyond > 0:
            view.scroll_y = min(max(view.scroll_y - pages * PART * view.height / beyond, 0), 1)

    def to_top(self) -> None:
        """Show the beginning."""
        self.ids.view.scroll_y = 1
