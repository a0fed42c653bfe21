"""Window tests that silently vanish would leave the screens untested."""

from __future__ import annotations

import pytest

FLOOR = 30
"""There are at least so many tests that open a window."""


def test_the_window_tests_are_collected(request: pytest.FixtureRequest) -> None:
    """Where this whole folder is collected, its window tests are among what is collected."""
    items = [item for item in request.session.items if "tests/app/" in item.nodeid]
    files = {item.nodeid.split("::")[0] for item in items}
    if len(files) < 5:
        return
    window = [item for item in items if {"drive", "screen_of_tests"} & set(item.fixturenames)]
    assert len(window) >= FLOOR
