"""How large a text will be, without drawing it: layouts ask before they place anything."""

from __future__ import annotations

from functools import lru_cache

from kivy.core.text import Label as TextImage


@lru_cache(maxsize=4096)
def text_size(text: str, font_size: float, bold: bool, width: float | None = None) -> tuple[float, float]:
    """Width and height of a text, px; wrapped where a width is given."""
    image = TextImage(text=text or " ", font_size=font_size, bold=bold, text_size=(width, None))
    image.resolve_font_name()
    wide, high = image.render()
    return float(wide), float(high)
