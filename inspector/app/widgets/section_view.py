"""The section of a bar on the screen: a plate is tapped to read it."""

from __future__ import annotations

from typing import Any

from kivy.metrics import dp

from inspector.app.strokes import touched
from inspector.app.widgets.elevation import REACH
from inspector.app.widgets.picture_view import PictureView


class SectionView(PictureView):
    """A section; a tap tells its plate."""

    __events__ = ("on_plate",)

    def on_plate(self, *_: Any) -> None:
        """A plate was tapped."""

    def on_touch_down(self, touch: Any) -> bool:
        """A finger comes down; whoever scrolls the sheet may still take it over."""
        if self.picture is None or touch.is_mouse_scrolling or not self.collide_point(*touch.pos):
            return False
        touch.grab(self)
        return True

    def on_touch_up(self, touch: Any) -> bool:
        """A finger goes up over a plate."""
        if touch.grab_current is not self:
            return False
        touch.ungrab(self)
        plate = touched(touch.pos, self.pieces(["plate"]), dp(REACH))
        if plate is not None and self.collide_point(*touch.pos):
            self.dispatch("on_plate", plate)
        return True
