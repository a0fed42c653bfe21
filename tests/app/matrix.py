"""The screens in every size and text size: ``python tests/app/matrix.py DENSITY`` walks those of a density."""

from __future__ import annotations

import os
import sys
import tempfile
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any

TEXT_SIZES = (1.0, 1.5, 2.0)

SIZES = {1.0: ((1280, 800), (800, 1280), (1024, 600)), 1.5: ((2000, 1200),), 2.0: ((2560, 1600),)}
"""Window sizes, px, by density."""


def states(d: Any) -> Iterator[str]:
    """Take the app from screen to screen, with everything that can stand there; names of what is shown."""
    d.settled()
    yield "bridges, none stored yet"
    d.app.bridges.add_sample("warren-feet-and-kips")
    d.settled()
    yield "a bridge in feet and inches"
    d.app.bridge_screen.open_sheet()
    yield from _pages(d)
    d.app.bridge_screen._plate(None, d.app.bridge.state.sheet.plates[0].name)
    yield "number pad with fractions"
    d.app.bridge_screen.pad_panel.press("9")
    d.app.bridge_screen._pad_entered()
    yield "number pad that asks"
    d.app.bridge_screen.back_to_bar()
    d.app.bridges.add_sample("pratt-half-through")
    d.settled()
    d.app.bridge.log(severed=True)
    d.app.bridge.log(estimated_loss=0.1, seen="hands on", note="rust under the gusset, scaling on both sides of it")
    d.settled()
    d.app.bridge_screen.main.sheet_open = False
    yield "act now, over the drawing"
    d.app.bridge_screen.open_sheet()
    yield from _pages(d)
    d.app.bridge_screen._not_seen()
    yield "reasons why not seen"
    d.app.bridge_screen.back_to_bar()
    d.app._to_report()
    d.app.report.make()
    d.settled()
    yield "report"
    d.app._to_bridges()
    d.settled()
    yield "bridges, two stored"


def _pages(d: Any) -> Iterator[str]:
    for tab in ("measure", "notes", "look"):
        d.app.bridge_screen.sheet.turn(tab)
        yield f"bar sheet, {tab}"


def walk(d: Any, density: float) -> list[str]:
    """Every fault in every state, size and text size."""
    from app.audit import faults
    from kivy.metrics import Metrics

    found: list[str] = []
    for state in states(d):
        for size in SIZES[density]:
            for text in TEXT_SIZES:
                d.window.size = size
                Metrics.fontscale = text
                d.settled()
                where = f"{state}, {size[0]} x {size[1]}, text {text:.0%}: "
                found += [where + fault for fault in faults(d)]
        d.window.size = SIZES[density][0]
        Metrics.fontscale = 1.0
        d.settled()
    return found


def main(density: float, start: Callable[[Path], Any]) -> int:
    """Walk one density and print what is wrong."""
    with tempfile.TemporaryDirectory() as folder:
        d = start(Path(folder))
        found = walk(d, density)
        d.close()
    sys.stdout.write(("\n".join(found) or "nothing is wrong") + "\n")
    return int(bool(found))


def start_app(folder: Path) -> Any:
    """The app in a window of the first size."""
    from inspector.app import bootstrap

    density = float(os.environ["KIVY_METRICS_DENSITY"])
    bootstrap.settle(folder, SIZES[density][0])
    from app.driver import Driver
    from kivy.config import Config

    from inspector.app.app import FieldApp

    class Blind(Driver):
        """Lays out and draws nothing: the sizes are what is looked at."""

        def frames(self, count: int = 1) -> None:
            self.blind_frames(count)

    Config.set("graphics", "multisamples", "0")
    Config.set("graphics", "maxfps", "0")
    return Blind(FieldApp(folder / "store.db", folder / "field-app.json", "tablet a"), SIZES[density][0])


if __name__ == "__main__":
    sys.path[:0] = [str(Path(__file__).parents[2]), str(Path(__file__).parents[1])]
    os.environ.setdefault("SDL_VIDEODRIVER", "offscreen")
    os.environ["KIVY_METRICS_DENSITY"] = sys.argv[1]
    os.environ["KIVY_METRICS_FONTSCALE"] = "1"
    sys.exit(main(float(sys.argv[1]), start_app))
