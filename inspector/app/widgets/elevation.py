"""The elevation on the screen: zoom, move, and the bar under a finger."""

from __future__ import annotations

import math
from typing import Any, Final

from kivy.graphics import Color, InstructionGroup, Line
from kivy.metrics import dp, sp
from kivy.properties import BooleanProperty, ColorProperty, NumericProperty, StringProperty
from kivy.uix.stencilview import StencilView

from inspector.app.strokes import touched
from inspector.app.widgets.picture_view import PictureView
from models.picture import Point

REACH: Final = 28.5
"""Half the width over which a bar can be touched, dp."""

_READABLE: Final = 12.0
"""Letters as a drawing opens, sp."""

_LARGEST: Final = 12.0
_STEP: Final = 1.5
_DRAG: Final = 14.0
_THUMBNAIL: Final = 260.0


class ElevationView(StencilView, PictureView):
    """A truss that can be zoomed and moved by buttons, one finger or two; a tap tells its bar.

    Parameters
    ----------
    bar : the chosen bar; it is marked, and kept in sight.
    zoom : 1 shows the whole truss.
    across : how many letters of the smallest readable size fit into the width.
    still : a thumbnail: nothing can be touched, and it shows the whole truss.
    """

    __events__ = ("on_tap",)

    bar = StringProperty("")
    zoom = NumericProperty(1.0)
    across = NumericProperty(80.0)
    mark = ColorProperty([0, 0, 0, 1])
    still = BooleanProperty(False)
    stretch = BooleanProperty(True)

    @property
    def natural_width(self) -> float:
        """The width, px, of a thumbnail in a row."""
        return float(dp(_THUMBNAIL))

    least_width = natural_width

    def __init__(self, **options: Any) -> None:
        self._centre: Point | None = None
        self._fresh = True
        self._fingers: dict[Any, Point] = {}
        self._began: Point | None = None
        self._spread = 0.0
        self._chosen = InstructionGroup()
        super().__init__(**options)
        self.canvas.add(self._chosen)
        self.bind(zoom=self._changed, bar=self._another_bar, mark=self._changed)

    def on_tap(self, *_: Any) -> None:
        """A bar was tapped."""

    def height_for(self, width: float) -> float:
        """The height, px, of a thumbnail in a row."""
        return float(dp(_THUMBNAIL / 4))

    def _another_bar(self, *_: Any) -> None:
        self._centre = None
        self._changed()

    def open_anew(self) -> None:
        """Show the drawing as if it were seen for the first time: with letters that can be read."""
        self._fresh = True
        self._centre = None
        self._changed()

    # --- where the drawing lies ---

    @property
    def whole(self) -> float:
        """Pixels in a metre where the whole truss is shown."""
        return float(super().scale)

    @property
    def scale(self) -> float:
        """Pixels in a metre."""
        return self.whole * float(self.zoom)

    def offset(self) -> Point:
        """Where the drawing's lower left corner lies, px: as centred as its edges allow."""
        picture, scale = self.picture, self.scale
        centre = self._centre or self._middle_of_bar()
        x = self.center_x - (centre[0] - picture.lower[0]) * scale
        y = self.center_y - (centre[1] - picture.lower[1]) * scale
        return (
            _held(x, picture.width * scale, self.x, self.width),
            _held(y, picture.rise * scale, self.y, self.height),
        )

    def _middle_of_bar(self) -> Point:
        for line in self.picture.lines:
            if line.role == "axis" and line.of == self.bar:
                (x0, y0), (x1, y1) = line.points[0], line.points[-1]
                return (x0 + x1) / 2, (y0 + y1) / 2
        low, high = self.picture.lower, self.picture.upper
        return (low[0] + high[0]) / 2, (low[1] + high[1]) / 2

    def move(self, right: float, up: float) -> None:
        """Look further to the right or up, by parts of what is in sight."""
        self._shift(right * self.width, up * self.height)

    def _shift(self, right: float, up: float) -> None:
        if self.picture is None:
            return
        x, y = self.offset()
        low, scale = self.picture.lower, self.scale
        middle = low[0] + (self.center_x - x) / scale, low[1] + (self.center_y - y) / scale
        self._centre = middle[0] + right / scale, middle[1] + up / scale
        x, y = self.offset()
        self._centre = low[0] + (self.center_x - x) / scale, low[1] + (self.center_y - y) / scale
        self._changed()

    def nearer(self, steps: int = 1) -> None:
        """Zoom in, or out where ``steps`` is negative."""
        self._zoom_to(self.zoom * _STEP**steps)

    def show_whole(self) -> None:
        """Show the whole truss."""
        self._zoom_to(1.0)

    def _zoom_to(self, zoom: float) -> None:
        self.zoom = float(min(max(zoom, 1.0), _LARGEST))

    # --- drawing ---

    def _draw(self, *_: Any) -> None:
        self.across = float(max(self.width, 1.0) / sp(_READABLE))
        if self._fresh and self.picture is not None and self.width > 1 and not self.still:
            self._fresh = False
            letters = self.picture.height * self.whole
            self._zoom_to(sp(_READABLE) / letters if letters else 1.0)
        super()._draw()
        self._mark_bar()

    def _mark_bar(self) -> None:
        self._chosen.clear()
        if self.picture is None:
            return
        for start, end in self.pieces(["axis"]).get(self.bar, ())[:1]:
            length = math.dist(start, end)
            if not length:
                continue
            away = dp(6) if self.still else max(dp(8), 0.55 * self.picture.height * self.scale)
            along = (end[0] - start[0]) / length * away, (end[1] - start[1]) / length * away
            corners = [
                at[k] + i * along[k] + j * (-along[1], along[0])[k]
                for at, i, j in ((start, -1, -1), (end, 1, -1), (end, 1, 1), (start, -1, 1))
                for k in (0, 1)
            ]
            self._chosen.add(Color(*self.mark))
            self._chosen.add(Line(points=corners, close=True, width=dp(1.6), joint="miter"))

    # --- fingers ---

    def bar_at(self, point: Point) -> str | None:
        """The bar that a finger at this point, px, means."""
        return touched(point, self.pieces(["axis"]), dp(REACH), self.bar)

    def on_touch_down(self, touch: Any) -> bool:
        """A finger comes down."""
        if self.still or self.picture is None or not self.collide_point(*touch.pos):
            return False
        if touch.is_mouse_scrolling:
            self.nearer(1 if touch.button == "scrolldown" else -1)
            return True
        touch.grab(self)
        self._fingers[touch.uid] = touch.pos
        self._began = touch.pos if len(self._fingers) == 1 else None
        self._spread = self._distance()
        self.held = len(self._fingers) > 1
        return True

    def on_touch_move(self, touch: Any) -> bool:
        """A finger moves: one drags, two zoom."""
        if touch.grab_current is not self or touch.uid not in self._fingers:
            return False
        before = self._fingers[touch.uid]
        self._fingers[touch.uid] = touch.pos
        if len(self._fingers) > 1:
            spread = self._distance()
            if self._spread > 0 and spread > 0:
                self._zoom_to(self.zoom * spread / self._spread)
            self._spread = spread
        elif self._began is None or math.dist(self._began, touch.pos) > dp(_DRAG):
            self._began = None
            self._shift(before[0] - touch.pos[0], before[1] - touch.pos[1])
        return True

    def on_touch_up(self, touch: Any) -> bool:
        """A finger goes up; where it did not move, it meant a bar."""
        if touch.grab_current is not self:
            return False
        touch.ungrab(self)
        self._fingers.pop(touch.uid, None)
        self._spread = 0.0
        self.held = len(self._fingers) > 1
        if self._began is not None:
            self._began = None
            found = self.bar_at(touch.pos)
            if found is not None:
                self.dispatch("on_tap", found)
        return True

    def _distance(self) -> float:
        points = list(self._fingers.values())
        return math.dist(points[0], points[1]) if len(points) > 1 else 0.0


def _held(wanted: float, size: float, start: float, room: float) -> float:
    """An offset that leaves no gap where the drawing is larger than its room; centred where it is smaller."""
    if size <= room:
        return float(start + (room - size) / 2)
    return float(min(max(wanted, start + room - size), start))
