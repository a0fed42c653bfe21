"""Widgets that several screens share. `load_rules` reads their kv file, once."""

from __future__ import annotations

from functools import cache
from pathlib import Path

from kivy.lang import Builder

from inspector.app.widgets import arranged, banner, elevation, marks, picture_view, push, scroller, section_view, words

__all__ = [
    "arranged",
    "banner",
    "elevation",
    "load_rules",
    "marks",
    "picture_view",
    "push",
    "scroller",
    "section_view",
    "words",
]


@cache
def load_rules(path: Path) -> None:
    """Read a kv file of rules; a second time does nothing, because rules that are read twice act twice."""
    Builder.load_file(str(path), rulesonly=True)


load_rules(Path(__file__).with_name("widgets.kv"))
