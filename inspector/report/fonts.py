"""The two faces that everything is printed in, and what they cannot print.

Only embedded fonts are used, so that a page looks the same on every machine and in every reader.
"""

from __future__ import annotations

import unicodedata
from functools import cache
from importlib.resources import as_file, files
from typing import Final
from xml.sax.saxutils import escape

from reportlab.lib.fonts import addMapping
from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont

REGULAR: Final = "DejaVuSans"
BOLD: Final = "DejaVuSans-Bold"

_HIDDEN: Final = ("Cc", "Cf", "Cn", "Co", "Cs")
"""Unicode categories that leave no mark or turn the text around: controls, formats, unassigned,
private, surrogates."""


@cache
def register() -> None:
    """Tell reportlab of the fonts, once."""
    for name in (REGULAR, BOLD):
        with as_file(files("inspector.fonts") / f"{name}.ttf") as path:
            pdfmetrics.registerFont(TTFont(name, str(path)))
    for bold in (0, 1):
        for italic in (0, 1):
            addMapping(REGULAR, bold, italic, BOLD if bold else REGULAR)


@cache
def _glyphs() -> frozenset[int]:
    register()
    faces = [pdfmetrics.getFont(name).face for name in (REGULAR, BOLD)]
    return frozenset(faces[0].charToGlyph) & frozenset(faces[1].charToGlyph)


def visible(text: str) -> str:
    """The text with every sign that would leave no mark written as its code point, ``[U+1F600]``."""
    if text.isascii() and text.isprintable():
        return text
    glyphs = _glyphs()
    return "".join(
        sign
        if sign == "\n" or (ord(sign) in glyphs and unicodedata.category(sign) not in _HIDDEN)
        else " "
        if sign in "\t\r"
        else f"[U+{ord(sign):04X}]"
        for sign in text
    )


def markup(text: str) -> str:
    """A foreign text, harmless and visible inside a paragraph."""
    return escape(visible(text)).replace("\n", "<br/>")
