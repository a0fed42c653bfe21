"""Layouts that give every child the height that its text needs."""

from __future__ import annotations

from typing import Any

from kivy.metrics import dp
from kivy.properties import NumericProperty
from kivy.uix.layout import Layout

from inspector.app.room import GAP, columns

_SPEAKING = ("text", "words", "font_size", "target", "rows", "letters", "height")
"""Properties of a child that may change the height that it needs."""


class Arranged(Layout):
    """Lays its children out in a frame, when anything about them has changed.

    The height that a child needs at a width is asked for, never tried out: nothing changes while it is asked.
    """

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self.size_hint_y = None
        self.bind(pos=self._changed, width=self._changed, children=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger_layout()

    def add_widget(self, widget: Any, *rest: Any, **options: Any) -> None:
        """Add a child, and lay out again when it speaks of another height."""
        for name in _SPEAKING:
            if widget.property(name, quiet=True) is not None:
                widget.fbind(name, self._changed)
        super().add_widget(widget, *rest, **options)

    def remove_widget(self, widget: Any, *rest: Any, **options: Any) -> None:
        """Take a child out."""
        for name in _SPEAKING:
            if widget.property(name, quiet=True) is not None:
                widget.funbind(name, self._changed)
        super().remove_widget(widget, *rest, **options)


class Tiles(Arranged):
    """Buttons of one size in a grid; as many in a row as their texts allow. ``most`` limits that."""

    most = NumericProperty(12)
    stretch = True

    def plan(self, width: float) -> tuple[int, float, float]:
        """How many stand in a row at a width, and the width and height of each, px."""
        tiles = self.children[::-1]
        gap = dp(GAP)
        natural, least = [tile.natural_width for tile in tiles], [tile.least_width for tile in tiles]
        count = min(columns(width, natural, least, gap), int(self.most))
        each = (width - (count - 1) * gap) / count
        return count, each, max(tile.height_for(each) for tile in tiles)

    def height_for(self, width: float) -> float:
        """The height, px, that the buttons need at a width."""
        if not self.children or width < 1:
            return 0.0
        count, _, height = self.plan(width)
        rows = -(-len(self.children) // count)
        return float(rows * height + (rows - 1) * dp(GAP))

    def do_layout(self, *_: Any) -> None:
        """Place the children."""
        self.height = self.height_for(self.width)
        if not self.height:
            return
        count, width, height = self.plan(self.width)
        gap = dp(GAP)
        for number, tile in enumerate(self.children[::-1]):
            row, column = divmod(number, count)
            tile.size = (width, height)
            tile.pos = (self.x + column * (width + gap), self.top - (row + 1) * height - row * gap)


class Strip(Arranged):
    """Children side by side: buttons as wide as their text, one other child as wide as is left."""

    stretch = True

    def widths(self, width: float) -> list[float]:
        """The width of each child, px, in a width."""
        parts = self.children[::-1]
        fixed = {
            part: max(min(part.natural_width, width * 0.3), part.least_width) for part in parts if not part.stretch
        }
        spare = width - sum(fixed.values()) - dp(GAP) * (len(parts) - 1)
        stretched = max(len(parts) - len(fixed), 1)
        return [fixed.get(part, max(spare / stretched, 1)) for part in parts]

    def height_for(self, width: float) -> float:
        """The height, px, that the children need at a width."""
        parts = zip(self.children[::-1], self.widths(width), strict=True)
        return max((_height_of(part, each) for part, each in parts), default=0.0)

    def do_layout(self, *_: Any) -> None:
        """Place the children."""
        if self.width < 1:
            return
        self.height = self.height_for(self.width)
        left = self.x
        for part, width in zip(self.children[::-1], self.widths(self.width), strict=True):
            own = _height_of(part, width) if part.stretch else self.height
            part.size = (width, own)
            part.pos = (left, self.y + (self.height - own) / 2)
            left += width + dp(GAP)


class Stack(Arranged):
    """Children one under the other, each as high as it needs. What needs no height takes no gap either."""

    stretch = True
    spacing = NumericProperty(0)

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self.bind(spacing=self._changed)

    def height_for(self, width: float) -> float:
        """The height, px, that the children need at a width."""
        heights = [_height_of(child, width) for child in self.children]
        shown = [height for height in heights if height]
        return sum(shown) + float(self.spacing) * max(len(shown) - 1, 0)

    def do_layout(self, *_: Any) -> None:
        """Place the children."""
        if self.width < 1:
            return
        self.height = self.height_for(self.width)
        top = self.y + self.height
        for child in self.children[::-1]:
            height = _height_of(child, self.width)
            child.size = (self.width, height)
            top -= height
            child.pos = (self.x, top)
            top -= self.spacing if height else 0


def _height_of(child: Any, width: float) -> float:
    return float(child.height_for(width)) if hasattr(child, "height_for") else float(child.height)
