"""Small drawings with a meaning: which bars are done, and what the patterns of a drawing mean."""

from __future__ import annotations

from typing import Any

from kivy.clock import Clock
from kivy.graphics import Color, Line, Mesh, Rectangle
from kivy.metrics import dp
from kivy.properties import ColorProperty, ListProperty, NumericProperty
from kivy.uix.widget import Widget

from inspector.app.strokes import fan, strokes
from inspector.app.theme import fill
from inspector.app.widgets.picture_view import texture_of
from models.picture import Line as Drawn


class DoneStrip(Widget):
    """A mark a bar in walking order: full where it is done, open where not, taller where the inspector is."""

    done = ListProperty()
    here = NumericProperty(0)
    ink = ColorProperty([0, 0, 0, 1])
    stretch = True

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self._trigger = Clock.create_trigger(self._draw, -1)
        self.bind(pos=self._changed, size=self._changed, done=self._changed, here=self._changed, ink=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger()

    def height_for(self, width: float) -> float:
        """The height, px."""
        return float(dp(18))

    def _draw(self, *_: Any) -> None:
        self.canvas.clear()
        number = len(self.done)
        if not number or self.width < 1:
            return
        step = self.width / number
        gap = min(dp(2), step / 4)
        with self.canvas:
            Color(*self.ink)
            for place, done in enumerate(self.done):
                tall = dp(16) if place == self.here else dp(9)
                left, low, width = self.x + place * step + gap / 2, self.y + dp(1), max(step - gap, 1)
                if done:
                    Rectangle(pos=(left, low), size=(width, tall))
                else:
                    Line(rectangle=(left, low, width, tall), width=1)
                    if place == self.here:
                        Rectangle(pos=(left, low), size=(width, dp(4)))


class Legend(Widget):
    """The samples of a drawing's legend with their meanings, as many in a row as fit."""

    rows = ListProperty()
    letters = NumericProperty("13sp")
    ink = ColorProperty([0, 0, 0, 1])
    stretch = True

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        self._trigger = Clock.create_trigger(self._draw, -1)
        self.bind(pos=self._changed, size=self._changed, rows=self._changed, letters=self._changed, ink=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger()

    def places(self, width: float) -> list[tuple[float, int]]:
        """Where each sample begins, px, and in which row it stands."""
        found, x, level = [], 0.0, 0
        for row in self.rows:
            needed = 4 * self.letters + dp(6) + texture_of(row.text, round(self.letters), False).width + dp(18)
            if x and x + needed - dp(18) > width:
                x, level = 0.0, level + 1
            found.append((x, level))
            x += needed
        return found

    def height_for(self, width: float) -> float:
        """The height, px, at a width."""
        places = self.places(width)
        return (places[-1][1] + 1) * self._row() if places else 0.0

    def _row(self) -> float:
        return float(1.6 * self.letters)

    def _draw(self, *_: Any) -> None:
        self.canvas.clear()
        size = self.letters
        with self.canvas:
            for row, (left, level) in zip(self.rows, self.places(self.width), strict=True):
                x, y = self.x + left, self.top - (level + 1) * self._row() + 0.3 * size
                for line in row.lines:
                    self._stroke(line, x, y, size)
                texture = texture_of(row.text, round(size), False)
                Color(*self.ink)
                Rectangle(
                    texture=texture, pos=(x + 4 * size + dp(6), y + (size - texture.height) / 2), size=texture.size
                )

    @staticmethod
    def _stroke(line: Drawn, x: float, y: float, size: float) -> None:
        there = Drawn(
            tuple((x + px * size, y + py * size) for px, py in line.points),
            line.role,
            line.weight,
            line.pattern,
            line.shade,
        )
        if line.shade is not None:
            Color(*fill(line.shade))
            _mesh(fan(there.points))
        Color(*fill("ink"))
        _mesh(strokes(there, dp(1)))


def _mesh(corners: list[float]) -> None:
    vertices: list[float] = []
    for x, y in zip(corners[::2], corners[1::2], strict=True):
        vertices += (x, y, 0.0, 0.0)
    if vertices:
        Mesh(vertices=vertices, indices=range(len(corners) // 2), mode="triangles")
