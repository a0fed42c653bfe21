"""The app, killed at the moment at which it says that an entry is stored: ``python tests/app/killed.py FOLDER``."""

from __future__ import annotations

import os
import signal
import sys
from pathlib import Path

if __name__ == "__main__":
    sys.path[:0] = [str(Path(__file__).parents[2]), str(Path(__file__).parents[1])]
    from inspector.app import bootstrap

    folder = Path(sys.argv[1])
    bootstrap.settle(folder)
    from app.driver import Driver

    from inspector.app.app import FieldApp

    d = Driver(FieldApp(folder / "store.db", folder / "field-app.json", "tablet a"))
    d.settled()
    d.push("Ellerwick Mill")
    d.settled()
    d.tap_bar("L3-L4")
    d.push("At a distance")
    d.until(lambda: d.app.bridge_screen.stored.startswith("Stored"))
    os.kill(os.getpid(), signal.SIGKILL)
