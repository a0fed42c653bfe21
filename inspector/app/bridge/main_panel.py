"""Head, drawing, bar sheet and walk on one screen, each with the room that it needs."""

from __future__ import annotations

from typing import Any

from kivy.metrics import dp, sp
from kivy.properties import BooleanProperty, ObjectProperty, StringProperty
from kivy.uix.layout import Layout

from inspector.app.room import GAP, LEAST_DRAWING, LETTERS, fitting, mode_for


class Panel(Layout):
    """A layout that takes children in and out, and is laid out again when one of them needs another height."""

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self.bind(size=self._changed, pos=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger_layout()

    def _show(self, part: Any, *, shown: bool) -> None:
        if shown and part.parent is None:
            self.add_widget(part)
        elif not shown and part.parent is self:
            self.remove_widget(part)

    def _put(self, part: Any, x: float, y: float, width: float, height: float) -> None:
        self._show(part, shown=True)
        part.pos, part.size = (x, y), (max(width, 1), max(height, 1))


class DrawingPanel(Panel):
    """The truss with its views, its legend and the buttons that zoom and move it.

    Where the room is low the legend goes first, then the views, then the buttons.
    """

    screen = ObjectProperty(None)

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        # Ids are weak; what is taken out of the tree at times is held here.
        self.parts = {name: self.ids[name].__self__ for name in ("views", "legend", "moves")}
        self.elevation = self.ids.elevation.__self__
        self.views = self.parts["views"]
        for part in self.parts.values():
            part.bind(height=self._changed, children=self._changed)
        self.parts["legend"].bind(rows=self._changed, letters=self._changed)

    def do_layout(self, *_: Any) -> None:
        """Place what fits; the truss takes what is left."""
        if self.width < 1:
            return
        gap = dp(GAP)
        heights = {name: part.height_for(self.width) + gap for name, part in self.parts.items()}
        kept = fitting(self.height, dp(LEAST_DRAWING), [(name, heights[name]) for name in ("moves", "views", "legend")])
        top, bottom = self.top, self.y
        for name, part in self.parts.items():
            if name not in kept:
                self._show(part, shown=False)
            elif name == "views":
                top -= heights[name]
                self._put(part, self.x, top + gap, self.width, heights[name] - gap)
        for name in ("moves", "legend"):
            if name in kept:
                self._put(self.parts[name], self.x, bottom, self.width, heights[name] - gap)
                bottom += heights[name]
        self._put(self.elevation, self.x, bottom, self.width, top - bottom)


class MainPanel(Panel):
    """Everything under the banner, but while a number or an answer is typed.

    Parameters
    ----------
    sheet_open : where drawing and sheet have no room together, whether it is the sheet that is wanted.
    mode : how they share the room, see `inspector.app.room.mode_for`.
    covered : whether the sheet covers the drawing now.
    """

    screen = ObjectProperty(None)
    sheet_open = BooleanProperty(False)
    mode = StringProperty("beside")
    covered = BooleanProperty(False)

    def __init__(self, drawing: DrawingPanel, sheet: Any, **options: Any) -> None:
        super().__init__(**options)
        self.drawing, self.sheet = drawing, sheet
        self.head, self.walk = self.ids.head.__self__, self.ids.walk.__self__
        self.head.bind(height=self._changed)
        self.walk.bind(height=self._changed)
        self.bind(sheet_open=self._changed)

    def do_layout(self, *_: Any) -> None:
        """Place what is shown."""
        gap = dp(GAP)
        x, y, width = self.x + gap, self.y + gap, self.width - 2 * gap
        if width < 1:
            return
        walk, head = self.walk.height_for(width), self.head.height_for(width)
        low, top = y + walk + gap, self.top - gap
        below_head = top - head - gap - low
        self.mode = mode_for(width, below_head, sp(LETTERS))
        self.covered = self.mode == "cover" and (self.sheet_open or below_head < dp(LEAST_DRAWING))
        self.sheet.covering = self.mode == "cover"
        self.sheet.can_leave = below_head >= dp(LEAST_DRAWING)
        self._put(self.walk, x, y, width, walk)
        self._show(self.head, shown=not self.covered)
        if self.covered:
            self._show(self.drawing, shown=False)
            self._put(self.sheet, x, low, width, top - low)
            return
        self._put(self.head, x, top - head, width, head)
        self._share(x, low, width, below_head)

    def _share(self, x: float, y: float, width: float, height: float) -> None:
        """Drawing and sheet, or the drawing alone."""
        gap = dp(GAP)
        if self.mode == "beside":
            side = max(0.37 * width, min(26 * sp(LETTERS), 0.5 * width))
            self._put(self.drawing, x, y, width - side - gap, height)
            self._put(self.sheet, x + width - side, y, side, height)
        elif self.mode == "below":
            upper = 0.42 * height
            self._put(self.drawing, x, y + height - upper, width, upper)
            self._put(self.sheet, x, y, width, height - upper - gap)
        else:
            self._show(self.sheet, shown=False)
            self._put(self.drawing, x, y, width, height)
