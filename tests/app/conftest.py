"""Window tests need a window: one is opened on the first of them, off the screen unless a display is asked for."""

from __future__ import annotations

import os
import tempfile
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any

import pytest

from inspector.app import bootstrap


@pytest.fixture(scope="session")
def screen_of_tests() -> None:
    """Settle kivy's environment and configuration before its first import.

    Without the shared libraries that a window draws with, window tests skip and name the packages; in a build
    (CI=true) they fail.
    """
    os.environ.setdefault("SDL_VIDEODRIVER", "offscreen")
    os.environ.setdefault("KIVY_METRICS_DENSITY", "1")
    os.environ.setdefault("KIVY_METRICS_FONTSCALE", "1")
    obstacle = bootstrap.missing(os.environ)
    if obstacle and os.environ.get("CI") == "true":
        pytest.fail(f"a build has to run the window tests: {obstacle}")
    if obstacle:
        pytest.skip(obstacle)
    bootstrap.settle(Path(tempfile.mkdtemp(prefix="inspector-app-")))
    from kivy.config import Config

    Config.set("graphics", "multisamples", "0")
    Config.set("graphics", "maxfps", "0")
    for option, _ in Config.items("input"):
        Config.remove_option("input", option)


@pytest.fixture
def drive(screen_of_tests: None, tmp_path: Path) -> Iterator[Callable[..., Any]]:
    """Start the field app over a store in the test's own folder; may be called again to open it anew."""
    from app.driver import TABLET, Driver

    from inspector.app.app import FieldApp

    running: list[Driver] = []

    def start(bridge: str | None = None, size: tuple[int, int] = TABLET) -> Driver:
        while running:
            running.pop().close()
        app = FieldApp(tmp_path / "store.db", tmp_path / "field-app.json", "tablet a", bridge)
        running.append(Driver(app, size))
        return running[-1]

    yield start
    while running:
        running.pop().close()
