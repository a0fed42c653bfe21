"""How long the screen takes from a stored entry to the new figures, as a ratio to redrawing the same scene.

A truss of 77 bars in a window off the screen, multisampling off. Milliseconds are printed and never judged; a ratio
above twice what is stated fails. Run it by hand or in a build:

    python tests/benchmark/screen.py
"""

from __future__ import annotations

import json
import os
import sys
import tempfile
import time
from pathlib import Path
from typing import Any

sys.path[:0] = [str(Path(__file__).parents[2]), str(Path(__file__).parents[1])]

from benchmark.pratt import pratt  # noqa: E402

from inspector.app import bootstrap  # noqa: E402
from inspector.exchange import site  # noqa: E402
from models.journal import Reading  # noqa: E402
from models.quantity import Quantity  # noqa: E402

ROUNDS = 25
AIM = 2.0
BAR = ("only", "L1-L2")


class Bench:
    """The app with the truss open at one of its bars."""

    def __init__(self, folder: Path) -> None:
        from app.driver import Driver

        from inspector.app.app import FieldApp

        document = pratt(20)
        found = site.read(json.dumps(document))
        self.driver = Driver(FieldApp(folder / "store.db", folder / "field-app.json", "bench"))
        self.app = self.driver.app
        self.app.bridge.open(self.app.shelf.rated(self.app.shelf.add(found)), BAR)
        self.app.screens.current = "bridge"
        self.driver.settled()

    def frame(self) -> None:
        """One frame, to its very end."""
        from kivy.graphics.opengl import glFinish

        self.driver.frames()
        glFinish()

    def after_an_entry(self, thickness: float) -> float:
        """Ms from the moment at which a reading is stored to the end of the frame that shows its figures."""
        reading = Reading(0.5, "top wall", (Quantity(f"{thickness} mm", thickness / 1e3),))
        began: list[float] = []
        old = self.app.bridge.rated
        self.app.bridge.log_reading(reading, None, lambda _: began.append(time.perf_counter()))
        while self.app.bridge.rated is old:
            self.driver.frames()
        self.frame()
        return 1e3 * (time.perf_counter() - began[0])

    def redrawn(self, state: Any) -> float:
        """Ms to draw a state whose figures are at hand, all of it anew, to the end of its frame."""
        elevation = self.app.bridge_screen.drawing.elevation
        began = time.perf_counter()
        elevation._drawn_at = None
        self.app.bridge_screen.show(state)
        elevation._changed()
        self.frame()
        return 1e3 * (time.perf_counter() - began)


def main() -> int:
    """Measure, print, judge the ratio."""
    os.environ.setdefault("SDL_VIDEODRIVER", "offscreen")
    obstacle = bootstrap.missing(os.environ)
    if obstacle:
        print(f"the window's part is left out: {obstacle}")
        return int(os.environ.get("CI") == "true")
    with tempfile.TemporaryDirectory() as folder:
        bootstrap.settle(Path(folder))
        from kivy.config import Config

        Config.set("graphics", "multisamples", "0")
        Config.set("graphics", "maxfps", "0")
        bench = Bench(Path(folder))
        entries, scenes = [], []
        states = []
        for number in range(ROUNDS):
            entries.append(bench.after_an_entry(7.6 - 0.1 * (number % 20)))
            states.append(bench.app.bridge.state)
            scenes.append(bench.redrawn(states[number // 2]))
        bars = len(bench.app.bridge.rated.rating.bars)
        bench.driver.close()
    entry, scene = min(entries), min(scenes)
    ratio = entry / scene
    kept = ratio <= 2 * AIM
    name = f"screen of {bars} bars after a stored entry / redrawing it"
    print(
        f"{name:58} {entry:10.3f} ms / {scene:9.3f} ms = {ratio:9.1f}  (aim under {AIM:g}){'' if kept else '  FAILED'}"
    )
    return 0 if kept else 1


if __name__ == "__main__":
    sys.exit(main())
