"""The way into kivy: what the device must have, the environment that kivy reads, then the app.

Nothing here imports kivy until it is known that a window can be opened.
"""

from __future__ import annotations

import ctypes
import logging
import os
import sys
from collections.abc import Callable, Mapping
from importlib.resources import as_file, files
from pathlib import Path
from typing import Final

from models.errors import InspectorError

LIBRARIES: Final = (("libGL.so.1", "libgl1"), ("libEGL.so.1", "libegl1"))
"""Shared libraries that a window draws with, and the Debian packages that hold them."""

PACKAGES: Final = ("libgl1", "libegl1", "libgl1-mesa-dri")

LOG: Final = "field-app.log"

TABLET: Final = (1280, 800)

_ENVIRONMENT: Final = {
    "KIVY_NO_ARGS": "1",  # the command line has read them
    "KIVY_NO_CONFIG": "1",  # nothing of another program's settings
    "KIVY_NO_FILELOG": "1",
    "KIVY_NO_CONSOLELOG": "1",
    "KIVY_LOG_MODE": "PYTHON",  # the root logger and the error stream stay as they are
    "KIVY_CLIPBOARD": "sdl2",  # asks no other program
    "SDL_TOUCH_MOUSE_EVENTS": "0",  # a finger is a touch, and not a mouse besides
}


class NoScreen(InspectorError):
    """No window can be opened here."""


def missing(
    environment: Mapping[str, str], platform: str = sys.platform, loads: Callable[[str], bool] | None = None
) -> str:
    """What stands in the way of a window, in one line; empty where nothing does.

    Parameters
    ----------
    loads : tells whether a shared library can be loaded.
    """
    if not platform.startswith("linux"):
        return ""
    can = _loads if loads is None else loads
    absent = [(library, package) for library, package in LIBRARIES if not can(library)]
    if absent:
        libraries = " and ".join(library for library, _ in absent)
        return f"{libraries} cannot be loaded. On Debian: apt-get install {' '.join(PACKAGES)}"
    if not any(environment.get(name) for name in ("DISPLAY", "WAYLAND_DISPLAY", "SDL_VIDEODRIVER")):
        return (
            "there is no display: neither DISPLAY nor WAYLAND_DISPLAY is set. Start the app from a desktop; without "
            "one, on Debian: apt-get install xvfb, then xvfb-run inspector app"
        )
    return ""


def require_window() -> None:
    """Make sure that a window can be opened, before anything is stored or loaded.

    Raises
    ------
    NoScreen
        If it cannot; says what is missing.
    """
    obstacle = missing(os.environ)
    if obstacle:
        raise NoScreen(f"The field app needs a window: {obstacle}")


def _loads(library: str) -> bool:
    try:
        ctypes.CDLL(library)
    except OSError:
        return False
    return True


def settle(home: Path, size: tuple[int, int] = TABLET) -> None:
    """Set the environment and kivy's configuration; must come before any other import of kivy.

    Parameters
    ----------
    home : a folder that kivy may write to.
    size : of the window as it opens, px.
    """
    os.environ.update(_ENVIRONMENT)
    os.environ.setdefault("KIVY_HOME", str(home / "kivy"))
    log = logging.getLogger("kivy")
    log.propagate = False
    log.addHandler(logging.FileHandler(home / LOG, mode="w", encoding="utf-8", delay=True))
    from kivy.config import Config  # noqa: PLC0415 (only the field app loads kivy)

    Config.set("graphics", "width", str(size[0]))
    Config.set("graphics", "height", str(size[1]))
    Config.set("kivy", "exit_on_escape", "0")
    Config.set("widgets", "scroll_timeout", "150")  # a gloved finger is slow to move
    for option, _ in Config.items("input"):
        Config.remove_option("input", option)
    Config.set("input", "mouse", "mouse,disable_multitouch")


def register_fonts() -> None:
    """Let every text be set in the fonts of the report, which have a visible sign for a glyph that they lack."""
    from kivy.core.text import DEFAULT_FONT, LabelBase  # noqa: PLC0415 (only the field app loads kivy)

    with as_file(files("inspector.fonts")) as folder:
        regular, bold = str(folder / "DejaVuSans.ttf"), str(folder / "DejaVuSans-Bold.ttf")
        LabelBase.register(DEFAULT_FONT, regular, regular, bold, bold)


def start(store: Path, memory: Path, device: str, bridge: str | None) -> None:
    """Open the window and stay in it until it is closed.

    Parameters
    ----------
    memory : the file that knows where the inspector was.
    bridge : the id of the bridge to open; where none is given, the one of the last time.

    Raises
    ------
    NoScreen
        If no window can be opened; says what is missing.
    """
    require_window()
    settle(memory.parent)
    from kivy.core.window import Window  # noqa: PLC0415 (only the field app loads kivy)

    if Window is None:
        raise NoScreen(f"The field app could not open a window; {memory.parent / LOG} tells why.")
    from inspector.app.app import FieldApp  # noqa: PLC0415 (only the field app loads kivy)

    FieldApp(store, memory, device, bridge).run()
