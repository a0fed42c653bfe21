"""Where the app was when it was closed."""

from __future__ import annotations

from pathlib import Path

import pytest

from inspector.app.memory import Memory, keep, recall


def test_what_was_kept_comes_back(tmp_path: Path) -> None:
    """Bridge, bar, view, theme and text size survive a restart, and no draft is left behind."""
    kept = Memory("id 1", "near", "L0-L1", "condition", "sun", 150)
    keep(tmp_path / "app.json", kept)
    assert recall(tmp_path / "app.json") == kept
    assert [path.name for path in tmp_path.iterdir()] == ["app.json"]


@pytest.mark.parametrize("spoilt", ["", "{", "[]", "null", '{"bridge": 5, "text_size": true, "other": 1}', "\xff"])
def test_a_spoilt_file_is_a_first_start(tmp_path: Path, spoilt: str) -> None:
    """A file cut short or of another kind keeps nobody from opening the app."""
    (tmp_path / "app.json").write_bytes(spoilt.encode("latin-1"))
    assert recall(tmp_path / "app.json") == Memory()


def test_no_file_is_a_first_start(tmp_path: Path) -> None:
    """Nothing kept yet."""
    assert recall(tmp_path / "app.json") == Memory()
