"""A user's way through the app in a desktop window: ``python tests/app/journey.py FOLDER first|again``.

A test runs it. DISPLAY names the X server, whose mouse another program moves; the window and its loop are the
product's own; this process only looks where things stand. Prints what was seen as JSON.
"""

from __future__ import annotations

import json
import os
import subprocess
import sys
from pathlib import Path
from typing import Any

TESTS = Path(__file__).parents[1]
BAR = "L3-L4"


class Desktop:
    """The app on a desktop: frames, and a mouse that another program moves."""

    def __init__(self, folder: Path) -> None:
        from inspector.app import bootstrap

        bootstrap.settle(folder)
        from app.driver import Driver

        from inspector.app.app import FieldApp

        class Polling(Driver):
            """The same frames, with the window system asked for its events after each."""

            def frames(self, count: int = 1) -> None:
                for _ in range(count):
                    self.loop.idle()
                    self.window.mainloop()

        self.driver = Polling(FieldApp(folder / "store.db", folder / "field-app.json", "tablet a"))
        self.app = self.driver.app

    def click_at(self, x: float, y: float) -> None:
        """Move the mouse there and click, as a hand would."""
        top = self.driver.window.height - y
        for act in (["mousemove", "--sync", str(round(x)), str(round(top))], ["mousedown", "1"], ["mouseup", "1"]):
            subprocess.run(["xdotool", *act], check=True, timeout=20)
            self.driver.frames(4)
        self.driver.settled()

    def click(self, words: str) -> None:
        """Click a button by its words."""
        button = self.driver.button(words)
        self.click_at(*button.to_window(*button.center))

    def click_bar(self, bar: str) -> None:
        """Click a bar of the drawing."""
        elevation = self.app.bridge_screen.drawing.elevation
        start, end = elevation.pieces(["axis"])[bar][0]
        self.click_at(*elevation.to_window((start[0] + end[0]) / 2, (start[1] + end[1]) / 2))


def first(desk: Desktop) -> dict[str, Any]:
    """Open a sample, tap a bar, enter a reading, see the figure change, make the PDF."""
    screen = desk.app.bridge_screen
    desk.driver.settled()
    desk.click("Ellerwick Mill")
    desk.click_bar(BAR)
    before = screen.sheet.sheet.figure
    desk.click("Hands on")
    desk.click("Measure")
    desk.click("2  bottom wall")
    for key in ("2", ".", "5", "Store"):
        desk.click(key)
    desk.click("◀ Bar")
    seen = {"bar": screen.bar, "before": before, "after": screen.sheet.sheet.figure, "stored": screen.stored}
    desk.click("Report")
    desk.click("Make the PDF")
    desk.driver.until(lambda: not desk.app.report.state.busy, 90)
    return seen | {"report": desk.app.report.state.message}


def again(desk: Desktop) -> dict[str, Any]:
    """See where the app opens."""
    desk.driver.settled()
    screen = desk.app.bridge_screen
    entries = [
        one for visit in desk.app.bridge.rated.journal.visits for one in visit.entries if one.device == "tablet a"
    ]
    return {
        "screen": desk.app.screens.current,
        "bar": screen.bar,
        "figure": screen.sheet.sheet.figure,
        "entries": len(entries),
    }


if __name__ == "__main__":
    sys.path[:0] = [str(TESTS.parent), str(TESTS)]
    os.environ["SDL_VIDEODRIVER"] = "x11"
    desktop = Desktop(Path(sys.argv[1]))
    found = {"first": first, "again": again}[sys.argv[2]](desktop)
    desktop.driver.close()
    sys.stdout.write(json.dumps(found) + "\n")
