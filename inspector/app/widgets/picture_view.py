"""A drawing on the screen. What did not change since the last drawing is not drawn again."""

from __future__ import annotations

import itertools
import math
from collections.abc import Iterable
from typing import Any, Final

from kivy.clock import Clock
from kivy.core.text import Label as TextImage
from kivy.graphics import Color, InstructionGroup, Mesh, PopMatrix, PushMatrix, Quad, Scale, Translate
from kivy.metrics import dp
from kivy.properties import BooleanProperty, ObjectProperty
from kivy.uix.widget import Widget

from inspector.app.strokes import fan, strokes
from inspector.app.theme import fill
from models.picture import Line, Picture, Point, Text

Content = tuple[tuple[Line, ...], tuple[Text, ...]]

_OF_ONE: Final = ("bar", "axis", "gone", "not seen", "bar figure")
"""Roles of what belongs to one bar and changes with it."""

_SMALLEST: Final = 6.0
"""Letters smaller than this, px, cannot be read and are not drawn."""

_MOST_TEXTURES: Final = 1500
_MOST_CORNERS: Final = 30000

_textures: dict[tuple[str, int, bool], Any] = {}


def texture_of(text: str, size: int, bold: bool) -> Any:
    """The image of a text, kept for the next time."""
    key = (text, size, bold)
    found = _textures.get(key)
    if found is None:
        if len(_textures) >= _MOST_TEXTURES:
            _textures.clear()
        image = TextImage(text=text, font_size=size, bold=bold)
        image.refresh()
        found = _textures[key] = image.texture
    return found


def layers(picture: Picture) -> dict[str, Content]:
    """What a drawing holds, apart by what can change: ground, each bar, and what lies over the bars."""
    parts: dict[str, tuple[list[Line], list[Text]]] = {" ground": ([], [])}
    over: tuple[list[Line], list[Text]] = ([], [])
    met = False
    for line in picture.lines:
        if line.role in _OF_ONE:
            met = True
            parts.setdefault(line.of, ([], []))[0].append(line)
        else:
            (over if met else parts[" ground"])[0].append(line)
    for text in picture.texts:
        (parts.setdefault(text.of, ([], [])) if text.role in _OF_ONE else over)[1].append(text)
    parts[" over"] = over
    return {name: (tuple(lines), tuple(texts)) for name, (lines, texts) in parts.items()}


class PictureView(Widget):
    """Shows a drawing as large as fits, in the middle."""

    picture = ObjectProperty(None, allownone=True)
    held = BooleanProperty(False)
    """While two fingers hold the drawing it is stretched; it is drawn sharp when they let go."""

    def __init__(self, **options: Any) -> None:
        self._groups: dict[str, tuple[Content, InstructionGroup]] = {}
        self._drawn_at: tuple[float, Point] | None = None
        self._place = Translate(0, 0)
        self._stretch = Scale(1, 1, 1)
        self._inside = InstructionGroup()
        super().__init__(**options)
        for instruction in (PushMatrix(), self._place, self._stretch, self._inside, PopMatrix()):
            self.canvas.add(instruction)
        self._trigger = Clock.create_trigger(self._draw, -1)
        self.bind(pos=self._changed, size=self._changed, picture=self._changed, held=self._changed)

    def _changed(self, *_: Any) -> None:
        self._trigger()

    @property
    def scale(self) -> float:
        """Pixels in a metre."""
        picture: Picture | None = self.picture
        if picture is None or self.width < 1 or self.height < 1:
            return 1.0
        return float(min(self.width / picture.width, self.height / picture.rise))

    def offset(self) -> Point:
        """Where the drawing's lower left corner lies, px."""
        picture: Picture = self.picture
        scale = self.scale
        return (
            float(self.x + (self.width - picture.width * scale) / 2),
            float(self.y + (self.height - picture.rise * scale) / 2),
        )

    def to_pixels(self, point: Point) -> Point:
        """A point of the drawing, m, on the screen."""
        picture: Picture = self.picture
        x, y = self.offset()
        return x + (point[0] - picture.lower[0]) * self.scale, y + (point[1] - picture.lower[1]) * self.scale

    def pieces(self, roles: Iterable[str]) -> dict[str, list[tuple[Point, Point]]]:
        """The straight pieces, px, of what can be touched, by what they belong to."""
        found: dict[str, list[tuple[Point, Point]]] = {}
        wanted = set(roles)
        if self.picture is not None:
            for line in self.picture.lines:
                if line.role in wanted and line.of:
                    points = [self.to_pixels(point) for point in line.points]
                    closed = [*points, points[0]] if line.shade is not None else points
                    found.setdefault(line.of, []).extend(itertools.pairwise(closed))
        return found

    def _draw(self, *_: Any) -> None:
        if self.picture is None or self.width < 1 or self.height < 1:
            self._inside.clear()
            self._groups.clear()
            return
        place = self.scale, self.picture.lower
        contents = layers(self.picture)
        moved = self._drawn_at != place and not (self.held and self._drawn_at is not None)
        if moved or list(contents) != list(self._groups):
            self._inside.clear()
            self._groups = {name: (((), ()), InstructionGroup()) for name in contents}
            for _, group in self._groups.values():
                self._inside.add(group)
            self._drawn_at = place
        for name, content in contents.items():
            known, group = self._groups[name]
            if known != content:
                group.clear()
                self._fill(group, content)
                self._groups[name] = content, group
        self._move()

    def _move(self) -> None:
        self._place.x, self._place.y = self.offset()
        drawn = self._drawn_at[0] if self._drawn_at else 1.0
        self._stretch.x = self._stretch.y = self.scale / drawn

    def _fill(self, group: InstructionGroup, content: Content) -> None:
        scale, lower = self.scale, self.picture.lower

        def local(point: Point) -> Point:
            return (point[0] - lower[0]) * scale, (point[1] - lower[1]) * scale

        batches: list[tuple[str, list[float]]] = []
        for line in content[0]:
            there = Line(tuple(map(local, line.points)), line.role, line.weight, line.pattern, line.shade)
            if line.shade is not None:
                batches.append((line.shade, fan(there.points)))
            batches.append(("ink", strokes(there, dp(1))))
        for shade, corners in _joined(batches):
            group.add(Color(*fill(shade)))
            group.add(_mesh(corners))
        group.add(Color(*fill("ink")))
        for text in content[1]:
            size = round(text.height * scale)
            if size >= _SMALLEST and text.text.strip():
                group.add(_lettered(text, local(text.at), size))


def _joined(batches: list[tuple[str, list[float]]]) -> list[tuple[str, list[float]]]:
    """Neighbours of one shade together, so that a bar is a few meshes."""
    found: list[tuple[str, list[float]]] = []
    for shade, corners in batches:
        if found and found[-1][0] == shade and len(found[-1][1]) < _MOST_CORNERS:
            found[-1][1].extend(corners)
        elif corners:
            found.append((shade, list(corners)))
    return found


def _mesh(corners: list[float]) -> Mesh:
    vertices: list[float] = []
    for x, y in zip(corners[::2], corners[1::2], strict=True):
        vertices += (x, y, 0.0, 0.0)
    return Mesh(vertices=vertices, indices=range(len(corners) // 2), mode="triangles")


def _lettered(text: Text, at: Point, size: int) -> Quad:
    texture = texture_of(text.text, size, text.bold)
    turn = math.radians(text.angle)
    cosine, sine = math.cos(turn), math.sin(turn)
    half_width, half_height = texture.width / 2, texture.height / 2
    points: list[float] = []
    for i, j in ((-1, -1), (1, -1), (1, 1), (-1, 1)):
        x, y = i * half_width, j * half_height
        points += (at[0] + x * cosine - y * sine, at[1] + x * sine + y * cosine)
    return Quad(texture=texture, points=points)
