"""The kv files: every one is read, no colour stands in them, sizes follow the density and the text size."""

from __future__ import annotations

import re
from pathlib import Path

import pytest

from inspector.app.theme import NAMES, OUTLINE_ON, TEXT_ON

APP = Path(__file__).parents[2] / "inspector" / "app"
FILES = sorted(APP.rglob("*.kv"))


def ids(path: Path) -> str:
    """A file's path within the app."""
    return str(path.relative_to(APP))


@pytest.mark.parametrize("path", FILES, ids=ids)
def test_colours_come_from_the_theme_alone(path: Path) -> None:
    """Each colour is a role of the theme, and the role is there."""
    text = path.read_text(encoding="utf-8")
    for line in re.findall(r"^\s*(?:rgba|rgb|\w*color|ink|mark): *(.*)$", text, re.MULTILINE):
        assert not re.search(r"#|\d", line), line
        roles = re.findall(r"app\.theme\.(\w+)", line)
        assert roles
        assert set(roles) <= set(NAMES)


@pytest.mark.parametrize("path", FILES, ids=ids)
def test_sizes_are_written_in_dp_and_text_in_sp(path: Path) -> None:
    """No size is in pixels: text in `sp`, room in `dp`, as strings that follow a change."""
    text = path.read_text(encoding="utf-8")
    for name, value in re.findall(r"^\s*(font_size|height|width|spacing|padding): *'?([\d.]+\w*)", text, re.MULTILINE):
        unit = value.lstrip("0123456789.")
        assert unit == ("sp" if name == "font_size" else "dp"), f"{name}: {value}"


def test_every_pair_that_contrast_is_held_for_names_roles() -> None:
    """A role that was renamed cannot slip out of the contrast tests."""
    assert {role for pair in (*TEXT_ON, *OUTLINE_ON) for role in pair} <= set(NAMES)


def test_every_kv_file_is_read_by_a_module_beside_it() -> None:
    """No kv file lies there unread."""
    code = "\n".join(path.read_text(encoding="utf-8") for path in APP.rglob("*.py"))
    assert all(f'"{path.name}"' in code for path in FILES)
