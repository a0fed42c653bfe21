"""Make the pictures of the field app in docs/pictures/ from a sample, in a window off the screen.

Needs the libraries that `inspector app` asks for. Run it again after a change of the screens:

    python docs/scripts/make_screen_pictures.py
"""

from __future__ import annotations

import os
import sys
import tempfile
from pathlib import Path
from typing import Any

ROOT = Path(__file__).parents[2]
sys.path[:0] = [str(ROOT), str(ROOT / "tests")]

from inspector.app import bootstrap  # noqa: E402

PICTURES = Path(__file__).parents[1] / "pictures"
SAMPLE = "Ellerwick Mill footbridge"
BAR = "L3-L4"
DAY = "2026-06-03"


def take(driver: Any, name: str) -> None:
    """Keep what the window shows."""
    driver.settled()
    print(driver.picture(PICTURES / f"{name}.png"))


def loop(driver: Any) -> None:
    """The way from the list of bridges to the findings that call for somebody to act."""
    driver.settled()
    driver.push(SAMPLE)
    driver.settled()
    driver.tap_bar(BAR)
    driver.push("Hands on")
    driver.settled()
    take(driver, "app-bar")
    driver.push("Measure")
    driver.settled()
    driver.push("2  bottom wall")
    for key in ("2", ".", "5", "Store"):
        driver.push(key)
        driver.settled()
    take(driver, "app-reading")
    driver.push("◀ Bar")
    take(driver, "app-figures")
    driver.push("Look")
    driver.settled()
    driver.push("Severed")
    driver.push("Severed, it carries nothing")
    take(driver, "app-act-now")
    driver.push("Undo")
    driver.settled()
    driver.push("◀ Bridges")
    driver.settled()
    driver.push("Sun screen")
    take(driver, "app-bridges")


def main() -> None:
    """Write one PNG a step."""
    os.environ.setdefault("SDL_VIDEODRIVER", "offscreen")
    os.environ["KIVY_METRICS_DENSITY"] = os.environ["KIVY_METRICS_FONTSCALE"] = "1"
    bootstrap.require_window()
    PICTURES.mkdir(exist_ok=True)
    with tempfile.TemporaryDirectory() as folder:
        home = Path(folder)
        bootstrap.settle(home)
        from app.driver import Driver  # noqa: PLC0415 (kivy is loaded once it is settled)

        from inspector.app.app import FieldApp  # noqa: PLC0415 (the same)

        driver = Driver(FieldApp(home / "store.db", home / "field-app.json", "tablet a"))
        driver.app.shelf.today = lambda: DAY
        loop(driver)
        driver.close()


if __name__ == "__main__":
    main()
