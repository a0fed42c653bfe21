"""What is wrong with a screen as it stands: cut off, overlapping, too small to touch, too close together."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import combinations
from typing import Any, NamedTuple

SLACK = 1.5
"""px, for rounding."""


class Box(NamedTuple):
    """A widget in the window, px."""

    name: str
    left: float
    low: float
    right: float
    top: float
    target: bool


def faults(d: Any) -> list[str]:
    """Everything that is wrong with what the window shows."""
    from kivy.metrics import dp

    found: list[str] = []
    boxes: dict[Any, list[Box]] = {}
    for widget, scrolled in _shown(d.app.screens.current_screen, None):
        box = _box(widget)
        found += _cut_off(widget, box, scrolled, d.window.size)
        if box.target:
            found += _too_small(widget, box, dp(1))
        if _leaf(widget):
            boxes.setdefault(scrolled, []).append(box)
    for group in boxes.values():
        for one, other in combinations(group, 2):
            found += _too_close(one, other, dp(8) if one.target and other.target else 0.0)
    return found


def _shown(widget: Any, scrolled: Any) -> Iterator[tuple[Any, Any]]:
    """Each widget that can be seen, with the scrolled view that it lies in."""
    from kivy.uix.scrollview import ScrollView

    if widget.opacity == 0 or widget.width < 1 or widget.height < 1:
        return
    yield widget, scrolled
    inside = widget if isinstance(widget, ScrollView) else scrolled
    for child in widget.children:
        yield from _shown(child, inside)


def _leaf(widget: Any) -> bool:
    from kivy.uix.label import Label
    from kivy.uix.textinput import TextInput

    from inspector.app.widgets.marks import DoneStrip, Legend
    from inspector.app.widgets.picture_view import PictureView

    if isinstance(widget, Label):
        return bool(widget.text)
    return isinstance(widget, TextInput | DoneStrip | Legend | PictureView)


def _box(widget: Any) -> Box:
    from kivy.uix.textinput import TextInput

    from inspector.app.widgets.push import Push

    left, low = widget.to_window(widget.x, widget.y)
    right, top = widget.to_window(widget.right, widget.top)
    text = str(getattr(widget, "text", "")).replace("\n", " / ")[:40]
    name = f"{type(widget).__name__} `{text}`"
    return Box(name, left, low, right, top, isinstance(widget, Push | TextInput))


def _cut_off(widget: Any, box: Box, scrolled: Any, window: tuple[float, float]) -> list[str]:
    from kivy.uix.label import Label

    found = []
    if isinstance(widget, Label) and widget.text:
        wide, high = widget.texture_size
        if wide > widget.width + SLACK or high > widget.height + SLACK:
            found.append(f"{box.name} is cut off: text {wide} x {high} in {widget.width:.0f} x {widget.height:.0f}")
    outer = (0.0, 0.0, *window)
    if scrolled is not None:
        # What is scrolled may be higher than its view, never wider.
        view = _box(scrolled)
        outer = (view.left, box.low, view.right, box.top)
    if (
        box.left < outer[0] - SLACK
        or box.low < outer[1] - SLACK
        or box.right > outer[2] + SLACK
        or box.top > outer[3] + SLACK
    ):
        found.append(f"{box.name} reaches out of its room: {box[1:5]} in {outer}")
    return found


def _too_small(widget: Any, box: Box, dp: float) -> list[str]:
    least = getattr(widget, "target", 57) * dp
    wide, high = box.right - box.left, box.top - box.low
    if wide < least - SLACK or high < least - SLACK:
        return [f"{box.name} is too small to touch: {wide / dp:.0f} x {high / dp:.0f} dp"]
    return []


def _too_close(one: Box, other: Box, wanted: float) -> list[str]:
    across = max(one.left - other.right, other.left - one.right)
    upward = max(one.low - other.top, other.low - one.top)
    if max(across, upward) < wanted - SLACK:
        return [f"{one.name} and {other.name} are {max(across, upward):.0f} px apart"]
    return []
