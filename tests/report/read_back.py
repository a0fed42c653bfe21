"""Reads a PDF the way a person or another program would: its words, page by page, and its fonts."""

from __future__ import annotations

import io
from dataclasses import dataclass
from typing import Any

from pypdf import PdfReader


@dataclass(frozen=True)
class Pages:
    """The words of each page with single blanks, and the same without any."""

    texts: tuple[str, ...]
    fonts: tuple[dict[str, Any], ...]

    @property
    def whole(self) -> str:
        """All pages in a row."""
        return " ".join(self.texts)

    @property
    def solid(self) -> str:
        """All pages without blanks: a word that was broken to fit a column is whole here."""
        return "".join(self.whole.split())

    def page_with(self, words: str) -> str:
        """The first page on which some words stand."""
        return next(text for text in self.texts if words in text)


def read(document: bytes) -> Pages:
    """Read a document."""
    pages = PdfReader(io.BytesIO(document)).pages
    fonts = [font.get_object() for page in pages for font in page["/Resources"].get_object()["/Font"].values()]
    return Pages(tuple(" ".join(page.extract_text().split()) for page in pages), tuple(fonts))
